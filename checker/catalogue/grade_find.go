package catalogue

import (
	"cmp"
	"math"
	"slices"
	"strconv"
	"strings"
	"sync"

	"github.com/agnivade/levenshtein"
)

// gradeKey is a grade's compact name with its standard; an empty standard
// leads to the first standard that has the name.
type gradeKey struct{ name, standard string }

// gradesIndex is the list of grades made ready for searching.
type gradesIndex struct {
	grades []Grade
	byKey  map[gradeKey]int
}

// gradeIndex builds the index at its first use. A name that several standards
// have leads to the first of them in the order of steels: EN 10025-2, then hot
// finished, then cold formed hollow sections.
var gradeIndex = sync.OnceValue(func() *gradesIndex {
	x := &gradesIndex{byKey: make(map[gradeKey]int, 256)}
	for _, s := range steels() {
		table := s.table
		for _, q := range s.qualities {
			n := len(x.grades)
			name := s.base + q
			x.grades = append(x.grades, Grade{
				Name: name, Standard: s.standard,
				E: modulus, G: shearModulus, Density: density,
				Recalled: s.recalled, Eurocode: s.eurocode(), Flat: s.standard == "EN 10025-6",
				table: &table,
			})
			for _, standard := range []string{"", s.standard, strings.TrimRight(s.standard, "123456")} {
				// The last form is that without the part: "EN 10025-".
				key := gradeKey{name, strings.TrimSuffix(standard, "-")}
				if _, taken := x.byKey[key]; !taken {
					x.byKey[key] = n
				}
			}
		}
	}
	for _, s := range americanSteels() {
		g := s.graded()
		for _, standard := range []string{"", g.Standard} {
			x.byKey[gradeKey{g.Name, standard}] = len(x.grades)
		}
		x.grades = append(x.grades, g)
	}
	return x
})

// FindGrade returns the grade of a name ("S355", "s355 j2", "S355J2+N",
// "S275NH") in a product standard ("EN 10025-2", "EN 10210", "BS EN
// 10219-1:2006"). With an empty standard EN 10025-2 goes before EN 10210-1, that
// before EN 10219-1, EN 10025-3, EN 10025-4 and EN 10025-6. In a standard of hollow sections
// the closing H may be missing. American grades: "A992", "A572 Grade 50", "ASTM
// A500 Gr C", or the grade alone in its standard ("Grade 50" in "ASTM A572"). It
// reports false for a name that the standard does not have and for a standard
// that the catalogue does not have.
func FindGrade(name, standard string) (Grade, bool) {
	if g, found := findAmericanGrade(name, standard); found {
		return g, true
	}
	n, ok := gradeName(name)
	if !ok {
		return Grade{}, false
	}
	s, ok := standardName(standard)
	if !ok {
		return Grade{}, false
	}
	x := gradeIndex()
	if i, found := x.byKey[gradeKey{n, s}]; found {
		return x.grades[i], true
	}
	if strings.HasPrefix(s, "EN 10210") || strings.HasPrefix(s, "EN 10219") {
		if i, found := x.byKey[gradeKey{n + "H", s}]; found {
			return x.grades[i], true
		}
	}
	return Grade{}, false
}

// findAmericanGrade is FindGrade for American grades.
func findAmericanGrade(name, standard string) (Grade, bool) {
	in := ""
	if strings.TrimSpace(standard) != "" {
		var ok bool
		if in, ok = americanStandard(standard); !ok {
			return Grade{}, false
		}
	}
	n, ok := americanGradeName(name)
	if !ok && in != "" && strings.TrimSpace(name) != "" {
		n, ok = americanGradeName(in + " " + name)
	}
	i, found := gradeIndex().byKey[gradeKey{n, in}]
	if !ok || !found {
		return Grade{}, false
	}
	return gradeIndex().grades[i], true
}

// gradeName writes a grade's name in capitals without blanks and without the
// delivery condition of EN 10025.
func gradeName(text string) (string, bool) {
	if len(text) > maxName {
		return "", false
	}
	var buf [maxName]byte
	b := buf[:0]
	for i := range len(text) {
		c := text[i]
		switch {
		case c >= 'a' && c <= 'z':
			b = append(b, c-('a'-'A'))
		case c >= 'A' && c <= 'Z', digit(c), c == '+':
			b = append(b, c)
		case c == ' ' || c == '\t' || c == '-':
		default:
			return "", false
		}
	}
	n := string(b)
	for _, condition := range []string{"+AR", "+N", "+M"} {
		n = strings.TrimSuffix(n, condition)
	}
	return n, n != ""
}

// standardName writes a standard's name as the catalogue has it, "EN 10025-2",
// with no national prefix and no year. An empty text stays empty.
func standardName(text string) (string, bool) {
	if len(text) > maxName {
		return "", false
	}
	s := strings.ToUpper(strings.TrimSpace(text))
	if s == "" {
		return "", true
	}
	s, _, _ = strings.Cut(s, ":")
	s = strings.ReplaceAll(s, " ", "")
	at := strings.Index(s, "EN")
	if at < 0 {
		return "", false
	}
	number := s[at+2:]
	if number == "" || !digit(number[0]) {
		return "", false
	}
	return "EN " + number, true
}

// NearestGrades returns up to n names of grades nearest to one that FindGrade
// does not know, each name once. It returns nil for a text that resembles none.
func NearestGrades(name string, n int) []string {
	if n <= 0 {
		return nil
	}
	if american, ok := americanGradeName(strings.NewReplacer("_", " ", ",", " ", ":", " ").Replace(name)); ok {
		return nearestAmericanGrades(american, n)
	}
	wanted, ok := gradeName(name)
	if !ok {
		return nil
	}
	type candidate struct {
		name     string
		distance float64
	}
	class, quality := gradeParts(wanted)
	var found []candidate
	for _, g := range gradeIndex().grades {
		if g.American() || slices.ContainsFunc(found, func(c candidate) bool { return c.name == g.Name }) {
			continue
		}
		d := float64(levenshtein.ComputeDistance(wanted, g.Name))
		if own, q := gradeParts(g.Name); class > 0 {
			// A strength class is nearest by its value, a quality by its letters.
			d = math.Abs(class-own)/10 + float64(levenshtein.ComputeDistance(quality, q))
		}
		found = append(found, candidate{g.Name, d})
	}
	slices.SortStableFunc(found, func(a, b candidate) int { return cmp.Compare(a.distance, b.distance) })
	if class == 0 && found[0].distance >= float64(len(wanted)) {
		return nil
	}
	names := make([]string, 0, min(n, len(found)))
	for _, c := range found[:min(n, len(found))] {
		names = append(names, c.name)
	}
	return names
}

// nearestAmericanGrades returns the names nearest to one of an American grade:
// those of the standard's number first.
func nearestAmericanGrades(wanted string, n int) []string {
	type candidate struct {
		name     string
		distance int
	}
	number, grade, _ := strings.Cut(wanted, " Gr ")
	var found []candidate
	for _, g := range gradeIndex().grades {
		if g.American() {
			own, q, _ := strings.Cut(g.Name, " Gr ")
			d := 10*levenshtein.ComputeDistance(number, own) + levenshtein.ComputeDistance(grade, q)
			found = append(found, candidate{g.Name, d})
		}
	}
	slices.SortStableFunc(found, func(a, b candidate) int { return cmp.Compare(a.distance, b.distance) })
	var names []string
	for _, c := range found[:min(n, len(found))] {
		names = append(names, c.name)
	}
	return names
}

// gradeParts cuts a name into the strength class in N/mm2, 0 if there is none,
// and what follows it.
func gradeParts(name string) (class float64, quality string) {
	rest := strings.TrimPrefix(name, "S")
	end := 0
	for end < len(rest) && end < 4 && digit(rest[end]) {
		end++
	}
	v, err := strconv.Atoi(rest[:end])
	if err != nil {
		return 0, name
	}
	return float64(v), rest[end:]
}
