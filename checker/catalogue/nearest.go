package catalogue

import (
	"cmp"
	"math"
	"slices"
	"strconv"
	"strings"
	"unicode/utf8"

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
	x := catalogue()
	g, families, ok := guessAmerican(designation)
	if !ok {
		var buf [maxName]byte
		name, ok := compact(buf[:0], designation)
		if !ok {
			return nil
		}
		g = guess(string(name))
		if families, ok = probable(g); !ok {
			return nil
		}
	}
	type candidate struct {
		index    int
		distance float64
	}
	found := make([]candidate, 0, 256)
	for i := range x.entries {
		e, s := &x.entries[i], &x.sizes[i]
		if s.tee != g.tee || s.inches != g.inches || !slices.Contains(families, s.family) {
			continue
		}
		if e.Product != OpenSection && (e.Product == ColdHollow) != g.cold && !g.inches {
			continue
		}
		d := s.distance(g.numbers)
		if g.inches && s.suffix != g.suffix {
			d += 0.5 // another weight of the pipe, other legs back to back
		}
		found = append(found, candidate{i, d})
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
	inches  bool // American
	suffix  string
}

// americanSlips are letters that are written for those of an American family.
var americanSlips = map[string]string{"WF": "W", "TS": "HSS", "HS": "HSS", "HHS": "HSS", "HSSS": "HSS", "PIP": "PIPE", "PIPES": "PIPE", "LL": "2L", "DL": "2L", "2LS": "2L", "TW": "WT", "CM": "MC"}

// guessAmerican takes apart what seems to be meant for an American designation:
// the letters are those of a family, and where a European one has the same, the
// sizes are inches. Numbers that cannot be read are left out.
func guessAmerican(text string) (g guessed, families []string, ok bool) {
	if len(text) > maxName || !utf8.ValidString(text) {
		return g, nil, false
	}
	rest := strings.ToUpper(fractionSigns.Replace(strings.TrimSpace(text)))
	end := strings.IndexFunc(rest, func(r rune) bool { return r < 'A' || r > 'Z' })
	if strings.HasPrefix(rest, "2L") {
		end = 2
	}
	if end < 0 {
		end = len(rest)
	}
	letters := rest[:end]
	if slip, found := americanSlips[letters]; found {
		letters = slip
	}
	if americanOrder[letters] == 0 {
		return g, nil, false
	}
	n := americanName{family: letters}
	rest = rest[end:]
	if i := strings.Index(rest, " A"); i >= 0 {
		rest = rest[:i] // a standard, or what is none of sections: A992
	}
	rest, _ = n.endings(rest)
	for field := range strings.SplitSeq(rest, "X") {
		if len(g.numbers) == len(size{}.numbers) {
			break
		}
		field = mixedNumber(field)
		if v, ok := parseInches(field); ok {
			g.numbers = append(g.numbers, float64(v)/inchUnits)
		} else if over, under, fraction := strings.Cut(field, "/"); fraction {
			// no fraction of an inch, 1/3, but a number all the same
			a, err := strconv.ParseFloat(over, 64)
			b, err2 := strconv.ParseFloat(under, 64)
			if v := a / b; err == nil && err2 == nil && v > 0 && v < 100 {
				g.numbers = append(g.numbers, v)
			}
		}
	}
	const smallestEuropean = 20 // mm; the largest American HP and L have 18 inches
	if (letters == "HP" || letters == "L") && (len(g.numbers) == 0 || g.numbers[0] >= smallestEuropean) {
		return g, nil, false
	}
	g.inches, g.suffix = true, n.weight+n.back
	return g, []string{letters}, true
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
