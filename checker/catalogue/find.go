package catalogue

import "strings"

// Find returns the section that a designation names, in any usual way of
// writing it: "HEB 200", "HE 200 B", "SHS 100x100x5", "SHS 100x5",
// "CHS 114,3 × 5", "100/100/5 SHS", "CFRHS 200x100x8", "SHS 100x100x5 EN 10219".
// Capitals and blanks do not matter.
//
// A hollow section of a size that its standard does not list is found as long
// as it can be made, with Listed false. Without a word on how it is made it is
// taken as hot finished; a rectangular one written shorter side first is taken
// with the longer side upright. Both are named in Assumed. Find reports false
// for everything else, whatever the text.
func Find(designation string) (Entry, bool) {
	var buf [maxName]byte
	name, ok := compact(buf[:0], designation)
	if !ok {
		return Entry{}, false
	}
	x := catalogue()
	if n, found := x.names[string(name)]; found {
		e := x.entries[n]
		if e.Product == HotHollow {
			e.Assumed = assumedHot
		}
		return e, true
	}
	q := split(string(name))
	if q.bad {
		return Entry{}, false
	}
	if q.family == "" {
		// What is left may be an open section followed by its standard.
		n, found := x.names[q.rest]
		if !found || x.entries[n].Product != OpenSection || q.cold || q.hollow || q.hot && !q.rolled {
			return Entry{}, false
		}
		return x.entries[n], true
	}
	if q.rolled || q.open {
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

// What Entry.Assumed says.
const (
	assumedHot     = "hot finished"
	assumedUpright = "longer side upright"
)

// query is a compact name taken apart.
type query struct {
	rest   string // what is left once the known words are gone
	family string // CHS, SHS or RHS; empty if no hollow family is named
	hot    bool   // named hot finished, or hot rolled
	rolled bool   // named hot rolled
	cold   bool   // named cold formed
	open   bool   // the standard named is that of open sections
	hollow bool   // the standard named is one of hollow sections
	bad    bool   // words that contradict each other
}

// word is something that may stand before or after the dimensions.
type word struct {
	text  string
	apply func(*query)
}

// words lists them, longer before shorter where one begins or ends another.
var words = []word{
	{"HOTFINISHED", func(q *query) { q.hot = true }},
	{"HOTFORMED", func(q *query) { q.hot = true }},
	{"HOTROLLED", func(q *query) { q.hot, q.rolled = true, true }},
	{"HOT", func(q *query) { q.hot = true }},
	{"COLDFORMED", func(q *query) { q.cold = true }},
	{"COLD", func(q *query) { q.cold = true }},
	{"HFCHS", func(q *query) { q.hot = true; q.name("CHS") }},
	{"HFSHS", func(q *query) { q.hot = true; q.name("SHS") }},
	{"HFRHS", func(q *query) { q.hot = true; q.name("RHS") }},
	{"CFCHS", func(q *query) { q.cold = true; q.name("CHS") }},
	{"CFSHS", func(q *query) { q.cold = true; q.name("SHS") }},
	{"CFRHS", func(q *query) { q.cold = true; q.name("RHS") }},
	{"CHS", func(q *query) { q.name("CHS") }},
	{"SHS", func(q *query) { q.name("SHS") }},
	{"RHS", func(q *query) { q.name("RHS") }},
	{"HF", func(q *query) { q.hot = true }},
	{"CF", func(q *query) { q.cold = true }},
	{"EN10210-2", hotStandard}, {"EN10210-1", hotStandard}, {"EN10210", hotStandard},
	{"EN10219-2", coldStandard}, {"EN10219-1", coldStandard}, {"EN10219", coldStandard},
	{"EN10365", openStandard}, {"DIN1026-1", openStandard}, {"DIN1026-2", openStandard},
	{"BS", func(*query) {}}, {"DIN", func(*query) {}}, {"NF", func(*query) {}},
	{"MM", func(*query) {}},
}

// The product standards say how a section is made.
func hotStandard(q *query)  { q.hot, q.hollow = true, true }
func coldStandard(q *query) { q.cold, q.hollow = true, true }
func openStandard(q *query) { q.open = true }

// name sets the family; two families contradict each other.
func (q *query) name(family string) {
	if q.family != "" {
		q.bad = true
	}
	q.family = family
}

// split takes the known words off both ends of a compact name.
func split(name string) query {
	q := query{rest: name}
	for again := true; again && q.rest != ""; {
		again = false
		if digit(q.rest[0]) && digit(q.rest[len(q.rest)-1]) && !strings.Contains(q.rest, "EN") {
			break // nothing but dimensions
		}
		for i := range words {
			w := &words[i]
			switch {
			case strings.HasSuffix(q.rest, w.text):
				q.rest = q.rest[:len(q.rest)-len(w.text)]
			case strings.HasPrefix(q.rest, w.text):
				q.rest = q.rest[len(w.text):]
			default:
				continue
			}
			w.apply(&q)
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
		s.a, s.b, s.t = d[0], d[1], d[2]
		if s.a < s.b {
			s.a, s.b, turned = s.b, s.a, true
		}
	default:
		return s, false, false
	}
	return s, turned, s.sane()
}
