package catalogue

import (
	"cmp"
	"math"
	"slices"
	"strings"

	"github.com/agnivade/levenshtein"
)

// Nearest returns up to n canonical designations nearest to a designation that
// Find does not know: sections of the family that was probably meant, nearest
// size first. A family's letters may be misspelt ("HBE 200"); the dimensions of
// a hollow section may be incomplete ("SHS 100x"). It returns nil for a text
// that resembles nothing.
func Nearest(designation string, n int) []string {
	if n <= 0 {
		return nil
	}
	var buf [maxName]byte
	name, ok := compact(buf[:0], designation)
	if !ok {
		return nil
	}
	x := catalogue()
	g := guess(string(name))
	families, ok := probable(g)
	if !ok {
		return nil
	}
	type candidate struct {
		index    int
		distance float64
	}
	found := make([]candidate, 0, 256)
	for i := range x.entries {
		e, s := &x.entries[i], &x.sizes[i]
		if s.tee != g.tee || !slices.Contains(families, s.family) {
			continue
		}
		if e.Product != OpenSection && (e.Product == ColdHollow) != g.cold {
			continue
		}
		found = append(found, candidate{i, s.distance(g.numbers)})
	}
	slices.SortStableFunc(found, func(a, b candidate) int { return cmp.Compare(a.distance, b.distance) })
	names := make([]string, 0, min(n, len(found)))
	for _, c := range found[:min(n, len(found))] {
		names = append(names, x.entries[c.index].Designation)
	}
	return names
}

// guessed is what can be made of a designation that is not known.
type guessed struct {
	letters string    // those that name a family
	numbers []float64 // in mm, at most four
	cold    bool
	tee     bool // half of a section
}

// guess takes a compact name apart without asking that it makes sense.
func guess(name string) guessed {
	var g guessed
	for _, half := range []string{"TEECUTFROM", "TCUTFROM", "T1X2", "1X2X", "1X2", "HALF"} {
		if rest, found := strings.CutPrefix(name, half); found && strings.ContainsAny(rest, "IHU") {
			name, g.tee = rest, true
			break
		}
	}
	q := split(name)
	g.letters, g.cold = q.family, q.cold
	var letters []byte
	for i := 0; i < len(q.rest); {
		if c := q.rest[i]; !digit(c) {
			// An X beside a number parts dimensions, elsewhere it is a letter.
			beside := i > 0 && (digit(q.rest[i-1]) || q.rest[i-1] == '.')
			if c >= 'A' && c <= 'Z' && !(c == 'X' && beside) {
				letters = append(letters, c)
			}
			i++
			continue
		}
		j := i
		for j < len(q.rest) && (digit(q.rest[j]) || q.rest[j] == '.') {
			j++
		}
		if um, ok := parseMicro(strings.TrimSuffix(q.rest[i:j], ".")); ok && len(g.numbers) < 4 {
			g.numbers = append(g.numbers, float64(um)/micro)
		}
		i = j
	}
	if g.letters == "" {
		g.letters = string(letters)
	}
	return g
}

// familyNames maps the letters of a designation to the family.
var familyNames = []struct{ letters, family string }{
	{"IPE", "IPE"}, {"HEA", "HEA"}, {"HEB", "HEB"}, {"HEM", "HEM"},
	{"UPN", "UPN"}, {"UNP", "UPN"}, {"UPE", "UPE"},
	{"IPBL", "HEA"}, {"IPB", "HEB"}, {"IPBV", "HEM"},
	{"SHS", "SHS"}, {"RHS", "RHS"}, {"CHS", "CHS"}, {"EHS", "EHS"},
	{"HEAA", "HEAA"}, {"HL", "HL"}, {"HD", "HD"}, {"HP", "HP"},
	{"UB", "UB"}, {"UC", "UC"}, {"UBP", "UBP"}, {"PFC", "PFC"},
	{"L", "L"}, {"RSA", "L"},
}

// probable returns the families whose letters are nearest to those given; ok is
// false if none is near.
func probable(g guessed) (families []string, ok bool) {
	letters := g.letters
	switch letters {
	case "":
		// Numbers alone: hollow sections, three of them perhaps something else.
		families = []string{"SHS", "RHS", "CHS"}
		if len(g.numbers) == 3 {
			families = append(families, "EHS", "UB", "UC", "UBP", "PFC", "L")
		}
		return families, true
	case "HE":
		return []string{"HEA", "HEB", "HEM"}, true
	}
	best := math.Inf(1)
	for _, f := range familyNames {
		d := float64(levenshtein.ComputeDistance(letters, f.letters))
		if d > 0 && sameLetters(letters, f.letters) {
			d = 0.5 // only their order is wrong
		}
		switch {
		case d < best:
			best, families = d, append(families[:0], f.family)
		case d == best && !slices.Contains(families, f.family):
			families = append(families, f.family)
		}
	}
	return families, best <= 2 && best < float64(len(letters))
}

// sameLetters tells whether two words have the same letters in any order.
func sameLetters(a, b string) bool {
	if len(a) != len(b) {
		return false
	}
	p, q := []byte(a), []byte(b)
	slices.Sort(p)
	slices.Sort(q)
	return string(p) == string(q)
}
