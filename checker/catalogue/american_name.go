package catalogue

import (
	"math"
	"strconv"
	"strings"
	"unicode/utf8"
)

// inchUnits is the number of units in an inch in which American sizes are exact:
// sixteenths and thirty-seconds as well as five decimals.
const inchUnits = 100000

// metresOf turns inchUnits into metres.
func metresOf(units int64) float64 { return float64(units) / inchUnits * inch }

// parseInches reads a positive number of inches: "8", ".500", "1/2", "1-3/8".
func parseInches(text string) (int64, bool) {
	whole, fraction, mixed := strings.Cut(text, "-")
	if !mixed {
		whole, fraction = "", text
		if !strings.Contains(text, "/") {
			whole, fraction = text, ""
		}
	} else if whole == "" || strings.Contains(whole, "/") || !strings.Contains(fraction, "/") {
		return 0, false
	}
	var sum int64
	if whole != "" {
		v, ok := parseDecimal(whole)
		if !ok || mixed && v%inchUnits != 0 {
			return 0, false
		}
		sum = v
	}
	if fraction != "" {
		over, under, ok := strings.Cut(fraction, "/")
		n, err := strconv.ParseInt(over, 10, 16)
		d, err2 := strconv.ParseInt(under, 10, 16)
		// A fraction of an inch has a power of two below, up to 32.
		if !ok || err != nil || err2 != nil || n <= 0 || d < 2 || d > 32 || d&(d-1) != 0 || mixed && n >= d || over[0] == '+' || under[0] == '+' {
			return 0, false
		}
		sum += n * inchUnits / d
	}
	return sum, sum > 0
}

// parseDecimal reads a decimal number with at most five decimals as inchUnits.
func parseDecimal(text string) (int64, bool) {
	if len(text) == 0 || len(text) > 9 {
		return 0, false
	}
	var v int64
	decimals, digits := -1, 0
	for i := range len(text) {
		switch c := text[i]; {
		case digit(c):
			v = v*10 + int64(c-'0')
			digits++
			if decimals >= 0 {
				decimals++
			}
		case c == '.' && decimals < 0:
			decimals = 0
		default:
			return 0, false
		}
	}
	if digits == 0 || decimals == 0 || decimals > 5 {
		return 0, false
	}
	for range 5 - max(decimals, 0) {
		v *= 10
	}
	return v, v < math.MaxInt64/2
}

// sixteenth takes a decimal that is a sixteenth written with three digits, 0.188
// or 0.312, for that sixteenth.
func sixteenth(units int64) int64 {
	const step, near = inchUnits / 16, 63
	n := (units + step/2) / step
	if d := units - n*step; n > 0 && d >= -near && d <= near {
		return n * step
	}
	return units
}

// fractionInches writes a size as American designations do: whole inches and a
// fraction, or a decimal for what is no sixteenth.
func fractionInches(units int64) string {
	whole, rest := units/inchUnits, units%inchUnits
	if rest == 0 {
		return strconv.FormatInt(whole, 10)
	}
	for under := int64(2); under <= 32; under *= 2 {
		if rest*under%inchUnits == 0 {
			f := strconv.FormatInt(rest*under/inchUnits, 10) + "/" + strconv.FormatInt(under, 10)
			if whole > 0 {
				f = strconv.FormatInt(whole, 10) + "-" + f
			}
			return f
		}
	}
	return decimalInches(units)
}

// decimalInches writes a size as a decimal without trailing zeros.
func decimalInches(units int64) string {
	return strconv.FormatFloat(float64(units)/inchUnits, 'f', -1, 64)
}

// americanName is an American designation taken apart.
type americanName struct {
	family   string  // "W", "HSS", "2L", …
	size     []int64 // the numbers, in inchUnits; the mass in lb/ft likewise
	weight   string  // STD, XS or XXS of a pipe
	back     string  // LLBB or SLBB of a double angle
	standard string  // the product standard, "" if none is named
}

// americanFamilies are the letters with which an American designation begins,
// longer before shorter.
var americanFamilies = []struct{ letters, family string }{
	{"PIPE", "PIPE"}, {"HSS", "HSS"}, {"2L", "2L"}, {"WT", "WT"}, {"MT", "MT"}, {"ST", "ST"},
	{"MC", "MC"}, {"HP", "HP"}, {"W", "W"}, {"M", "M"}, {"S", "S"}, {"C", "C"}, {"L", "L"},
}

// fractionSigns are the fractions that have a character of their own.
var fractionSigns = strings.NewReplacer("½", " 1/2", "¼", " 1/4", "¾", " 3/4", "⅛", " 1/8", "⅜", " 3/8", "⅝", " 5/8", "⅞", " 7/8",
	"×", "X", "✕", "X", "⨯", "X", "*", "X", "″", "", "”", "", "\u00a0", " ", "\u202f", " ", "\u2009", " ", "–", "-")

// parseAmerican takes a designation apart. It reports false for a text that has
// not the form of one, whatever the sizes.
func parseAmerican(text string) (n americanName, ok bool) {
	if len(text) > maxName || !utf8.ValidString(text) {
		return n, false
	}
	rest := strings.ToUpper(fractionSigns.Replace(strings.TrimSpace(text)))
	rest = strings.TrimSpace(strings.TrimPrefix(rest, "ASTM "))
	if after, found := strings.CutPrefix(rest, "2 L"); found {
		rest = "2L" + after
	}
	for _, f := range americanFamilies {
		if after, found := strings.CutPrefix(rest, f.letters); found {
			n.family, rest = f.family, after
			break
		}
	}
	if n.family == "" {
		return n, false
	}
	rest, ok = n.endings(rest)
	if !ok {
		return n, false
	}
	for more := true; more; {
		var field string
		field, rest, more = strings.Cut(rest, "X")
		v, ok := parseInches(mixedNumber(field))
		if !ok || len(n.size) == 4 {
			return n, false
		}
		n.size = append(n.size, v)
	}
	return n, true
}

// mixedNumber writes the number of a designation without blanks, "1 1/2" as
// "1-1/2".
func mixedNumber(text string) string {
	fields := strings.Fields(text)
	if len(fields) == 2 && !strings.HasSuffix(fields[0], "-") && !strings.HasPrefix(fields[1], "-") && strings.Contains(fields[1], "/") {
		return fields[0] + "-" + fields[1]
	}
	return strings.Join(fields, "")
}

// endings takes the words behind the sizes off: the weight of a pipe, the legs
// back to back and the product standard.
func (n *americanName) endings(rest string) (string, bool) {
	for again := true; again; {
		again = false
		rest = strings.TrimRight(rest, " ")
		if i := strings.LastIndexByte(rest, ' '); i >= 0 && n.standard == "" && strings.HasPrefix(rest[i+1:], "A") {
			number, _, _ := strings.Cut(rest[i+1:], "/")
			n.standard = "ASTM " + number
			if !hollowStandards[n.standard] && n.standard != astmRolled && n.standard != astmPipe {
				return "", false
			}
			rest, again = strings.TrimSuffix(strings.TrimRight(rest[:i], " "), " ASTM"), true
			continue
		}
		for _, back := range []string{longBacks, shortBacks} {
			if after, found := strings.CutSuffix(rest, back); found && n.family == "2L" && n.back == "" {
				n.back, rest, again = back, after, true
			}
		}
		if n.family == "PIPE" && n.weight == "" {
			for _, w := range pipeWords {
				if after, found := strings.CutSuffix(rest, w.word); found {
					n.weight, rest, again = w.weight, after, true
					break
				}
			}
		}
	}
	return rest, true
}

// pipeWords are the words for the weights, longer before shorter.
var pipeWords = []struct{ word, weight string }{
	{"DOUBLE EXTRA STRONG", "XXS"}, {"XX-STRONG", "XXS"}, {"XX STRONG", "XXS"}, {"XXS", "XXS"},
	{"EXTRA STRONG", "XS"}, {"X-STRONG", "XS"}, {"X STRONG", "XS"}, {"XS", "XS"},
	{"STANDARD", "STD"}, {"STD.", "STD"}, {"STD", "STD"},
}

// key is the form in which the index holds the designation. ok is false for what
// the index cannot hold.
func (n americanName) key() (string, bool) {
	count := 2
	switch n.family {
	case "L":
		count = 3
	case "PIPE":
		count = 1
	case "HSS", "2L":
		return "", false
	}
	if len(n.size) != count || (n.family == "PIPE") != (n.weight != "") {
		return "", false
	}
	if n.standard != "" && n.standard != astmRolled && (n.standard != astmPipe || n.family != "PIPE") {
		return "", false
	}
	key := n.family
	for _, v := range n.size {
		key += "X" + strconv.FormatInt(v, 10)
	}
	return key + n.weight, true
}

// american returns the American section that a designation names.
func (x *index) american(text string) (Entry, bool) {
	n, ok := parseAmerican(text)
	if !ok {
		return Entry{}, false
	}
	switch n.family {
	case "HSS":
		return x.hollowNamed(n)
	case "2L":
		return x.pairNamed(n)
	}
	key, ok := n.key()
	if !ok {
		return Entry{}, false
	}
	if i, found := x.inches[key]; found {
		return x.entries[i], true
	}
	if n.family == "L" && n.size[0] < n.size[1] {
		n.size[0], n.size[1] = n.size[1], n.size[0]
		if key, _ = n.key(); key != "" {
			if i, found := x.inches[key]; found {
				return x.legsTurned(i), true
			}
		}
	}
	return Entry{}, false
}

// assumedA500 is what Entry.Assumed says of a hollow section whose standard is
// not named.
const assumedA500 = "a section of ASTM A500, whose design wall is 0.93 of the nominal"

// hollowNamed makes the hollow section that a name stands for: two numbers are a
// round one.
func (x *index) hollowNamed(n americanName) (Entry, bool) {
	if n.standard == astmRolled || n.standard == astmPipe || len(n.size) < 2 || len(n.size) > 3 {
		return Entry{}, false
	}
	h := hollowInches{a: n.size[0], t: n.size[len(n.size)-1], standard: n.standard}
	turned := false
	if len(n.size) == 3 {
		h.b, h.t = n.size[1], sixteenth(h.t)
		if h.a < h.b {
			h.a, h.b, turned = h.b, h.a, true
		}
	}
	if !h.sane() {
		return Entry{}, false
	}
	listed := h
	listed.standard = ""
	_, found := x.inches[listed.key()]
	e := h.entry(found)
	var assumed []string
	if n.standard == "" {
		assumed = append(assumed, assumedA500)
	}
	if turned {
		assumed = append(assumed, assumedUpright)
	}
	e.Assumed = strings.Join(assumed, ", ")
	return e, true
}

// key is the form in which the index holds a hollow section.
func (h hollowInches) key() string {
	return "HSSX" + strconv.FormatInt(h.a, 10) + "X" + strconv.FormatInt(h.b, 10) + "X" + strconv.FormatInt(sixteenth(h.t), 10)
}

// pairNamed makes the double angle that a name stands for. Without a word on the
// legs the longer ones are taken to be back to back.
func (x *index) pairNamed(n americanName) (Entry, bool) {
	if len(n.size) < 3 || n.standard != "" && n.standard != astmRolled {
		return Entry{}, false
	}
	var gap int64
	if len(n.size) == 4 {
		gap = n.size[3]
	}
	one := americanName{family: "L", size: []int64{max(n.size[0], n.size[1]), min(n.size[0], n.size[1]), n.size[2]}}
	key, _ := one.key()
	i, found := x.inches[key]
	const widest = 6 * inchUnits // beyond it the last number is no gap
	if !found || gap > widest {
		return Entry{}, false
	}
	angle := x.entries[i]
	assumed := ""
	equal := angle.Shape.Depth == angle.Shape.Width
	switch {
	case equal && n.back != "":
		n.back = ""
	case !equal && n.back == "":
		n.back, assumed = longBacks, "the longer legs back to back"
	}
	e := pairOf(angle, gap, n.back, false)
	for _, listed := range americanPairs(angle) {
		if listed.Designation == e.Designation {
			e.Listed = true
		}
	}
	e.Assumed = assumed
	return e, true
}
