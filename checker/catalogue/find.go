package catalogue

import "strings"

// Find returns the section that a designation names, in any usual way of
// writing it: "HEB 200", "HE 200 B", "SHS 100x100x5", "SHS 100x5",
// "CHS 114,3 × 5", "100/100/5 SHS", "CFRHS 200x100x8", "SHS 100x100x5 EN 10219",
// "UB 457x191x67", "203 x 203 UC 46", "L 100x10", "half IPE 300", "½ HE 300 A",
// "T 305x457x127", and of the American sections "W14x90", "HSS8x8x.5",
// "HSS6.625x0.280", "Pipe 6 STD", "L4x4x1/2", "2L4x3x3/8x3/8 LLBB". Capitals and
// blanks do not matter. An unequal angle written
// shorter leg first is taken with the longer leg upright.
//
// A hollow section of a size that its standard does not list is found as long
// as it can be made, with Listed false. Without a word on how it is made it is
// taken as hot finished; a rectangular one written shorter side first is taken
// with the longer side upright. An American hollow section is taken to be to ASTM
// A500 unless a standard follows the size ("HSS8x8x1/2 A1085"), which decides the
// design wall. All this is named in Assumed. Find reports false for everything
// else, whatever the text.
func Find(designation string) (Entry, bool) {
	x := catalogue()
	var buf [maxName]byte
	name, ok := compact(buf[:0], designation)
	if n, found := x.names[string(name)]; found {
		e := x.entries[n]
		if e.Product == HotHollow {
			e.Assumed = assumedHot
		}
		return e, true
	}
	if e, found := x.american(designation); found {
		return e, true
	}
	if !ok {
		return Entry{}, false
	}
	if n, found := x.turned[string(name)]; found {
		return x.legsTurned(n), true
	}
	q := split(string(name))
	if q.bad {
		return Entry{}, false
	}
	if q.family == "" {
		// What is left may be an open section followed by its standard.
		n, found := x.names[q.rest]
		turned := false
		if !found {
			n, turned = x.turned[q.rest]
		}
		if !found && !turned || x.entries[n].Product != OpenSection || q.cold || q.hollow || q.hot && !q.rolled {
			return Entry{}, false
		}
		if angle := x.entries[n].Family == "L"; q.open && angle || q.angle && !angle {
			return Entry{}, false
		}
		if turned {
			return x.legsTurned(n), true
		}
		return x.entries[n], true
	}
	if q.rolled || q.open || q.angle {
		return Entry{}, false
	}
	size, turned, ok := q.size()
	if !ok {
		return Entry{}, false
	}
	var e Entry
	if n, found := x.hollow[size]; found {
		e = x.entries[n]
	} else {
		e = size.entry(false)
	}
	switch {
	case !q.hot && !q.cold && turned:
		e.Assumed = assumedHot + ", " + assumedUpright
	case !q.hot && !q.cold:
		e.Assumed = assumedHot
	case turned:
		e.Assumed = assumedUpright
	}
	return e, true
}

// legsTurned returns the entry of an unequal angle whose shorter leg was written
// first.
func (x *index) legsTurned(n int32) Entry {
	e := x.entries[n]
	e.Assumed = assumedLeg
	return e
}

// What Entry.Assumed says.
const (
	assumedHot     = "hot finished"
	assumedUpright = "longer side upright"
	assumedLeg     = "longer leg upright"
)

// query is a compact name taken apart.
type query struct {
	rest   string // what is left once the known words are gone
	family string // CHS, SHS, RHS or EHS; empty if no hollow family is named
	hot    bool   // named hot finished, or hot rolled
	rolled bool   // named hot rolled
	cold   bool   // named cold formed
	open   bool   // the standard named is one of I and H sections and channels
	angle  bool   // the standard named is that of angles
	hollow bool   // the standard named is one of hollow sections
	bad    bool   // words that contradict each other
}

// word is something that may stand before or after the dimensions, and what it
// says of the section.
type word struct {
	text string
	says query // without rest and bad
}

// words lists them, longer before shorter where one begins or ends another.
var words = []word{
	{"HOTFINISHED", query{hot: true}},
	{"HOTFORMED", query{hot: true}},
	{"HOTROLLED", query{hot: true, rolled: true}},
	{"HOT", query{hot: true}},
	{"COLDFORMED", query{cold: true}},
	{"COLD", query{cold: true}},
	{"HFCHS", query{hot: true, family: "CHS"}},
	{"HFSHS", query{hot: true, family: "SHS"}},
	{"HFRHS", query{hot: true, family: "RHS"}},
	{"HFEHS", query{hot: true, family: "EHS"}},
	{"CFCHS", query{cold: true, family: "CHS"}},
	{"CFSHS", query{cold: true, family: "SHS"}},
	{"CFRHS", query{cold: true, family: "RHS"}},
	{"CHS", query{family: "CHS"}},
	{"SHS", query{family: "SHS"}},
	{"RHS", query{family: "RHS"}},
	{"EHS", query{family: "EHS"}},
	{"HF", query{hot: true}},
	{"CF", query{cold: true}},
	// The product standards say how a section is made.
	{"EN10210-2", query{hot: true, hollow: true}}, {"EN10210-1", query{hot: true, hollow: true}}, {"EN10210", query{hot: true, hollow: true}},
	{"EN10219-2", query{cold: true, hollow: true}}, {"EN10219-1", query{cold: true, hollow: true}}, {"EN10219", query{cold: true, hollow: true}},
	{"EN10365", query{open: true}}, {"DIN1026-1", query{open: true}}, {"DIN1026-2", query{open: true}},
	{"BS4-1", query{open: true}}, {"BS4", query{open: true}},
	{"EN10056-1", query{angle: true}}, {"EN10056", query{angle: true}},
	{"BS", query{}}, {"DIN", query{}}, {"NF", query{}}, {"MM", query{}},
}

// add takes in what a word says; two families contradict each other.
func (q *query) add(says *query) {
	q.hot = q.hot || says.hot
	q.rolled = q.rolled || says.rolled
	q.cold = q.cold || says.cold
	q.open = q.open || says.open
	q.angle = q.angle || says.angle
	q.hollow = q.hollow || says.hollow
	if says.family != "" {
		q.bad = q.bad || q.family != ""
		q.family = says.family
	}
}

// split takes the known words off both ends of a compact name.
func split(name string) query {
	q := query{rest: name}
	for again := true; again && q.rest != ""; {
		again = false
		if digit(q.rest[0]) && digit(q.rest[len(q.rest)-1]) && !strings.Contains(q.rest, "EN") && !strings.Contains(q.rest, "BS") {
			break // nothing but dimensions
		}
		for i := range words {
			w := &words[i]
			switch {
			case q.rest[len(q.rest)-1] == w.text[len(w.text)-1] && strings.HasSuffix(q.rest, w.text):
				q.rest = q.rest[:len(q.rest)-len(w.text)]
			case q.rest[0] == w.text[0] && strings.HasPrefix(q.rest, w.text):
				q.rest = q.rest[len(w.text):]
				if digit(w.text[len(w.text)-1]) {
					// compact parts a standard's number from a dimension.
					q.rest = strings.TrimPrefix(q.rest, "X")
				}
			default:
				continue
			}
			q.add(&w.says)
			again = true
			break
		}
	}
	if q.hot && q.cold {
		q.bad = true
	}
	return q
}

// size reads the dimensions of a hollow section. turned tells that the shorter
// side was written first.
func (q query) size() (s hollowSize, turned, ok bool) {
	var d [3]int32
	n := 0
	for rest, more := q.rest, true; more; n++ {
		var field string
		field, rest, more = strings.Cut(rest, "X")
		if n == len(d) {
			return s, false, false
		}
		if d[n], ok = parseMicro(field); !ok {
			return s, false, false
		}
	}
	s.cold = q.cold
	switch {
	case q.family == "CHS" && n == 2:
		s.a, s.t = d[0], d[1]
	case q.family == "SHS" && n == 2:
		s.a, s.b, s.t = d[0], d[0], d[1]
	case q.family != "CHS" && n == 3:
		s.oval = q.family == "EHS"
		s.a, s.b, s.t = d[0], d[1], d[2]
		if s.a < s.b {
			s.a, s.b, turned = s.b, s.a, true
		}
	default:
		return s, false, false
	}
	return s, turned, s.sane()
}
