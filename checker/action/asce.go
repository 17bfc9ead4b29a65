package action

import "slices"

// Method is how ASCE/SEI 7 combines loads: for strength design or for allowable
// stress design.
type Method string

// The two methods.
const (
	LRFD Method = "LRFD" // 2.3
	ASD  Method = "ASD"  // 2.4
)

// Methods lists the methods by which ASCE/SEI 7 combines loads.
func Methods() []string { return []string{string(LRFD), string(ASD)} }

// BasicRules say how cases are combined by ASCE/SEI 7-22.
type BasicRules struct {
	Method Method
	// Companion is the factor of live loads beside roof, snow, rain, wind and
	// earthquake loads by 2.3.1 (3), (4) and (6), in 0.5 to 1: 0.5 may be taken where
	// the live load is no more than 100 psf and no garage or place of public assembly.
	Companion float64
	Exclusive [][]int // as in Rules
}

// part is the factor of all cases of a kind in an equation.
type part struct {
	kind   Kind
	factor float64
}

// basic is an equation of ASCE/SEI 7: the factor of permanent cases and the parts
// of the others. Those in or stand in turn: one of them acts.
type basic struct {
	source string
	dead   float64
	parts  []part
	or     []part
	or2    []part
	quake  float64 // factor of an earthquake case, which acts to either side; 0 for none
}

// equations are those of 2.3.1 and 2.3.6, or 2.4.1 and 2.4.5. From memory but for
// 1.2D + 1.6L, D + L and 1.2D + 1.0S, which printed examples show. Snow and wind
// are the loads of ASCE/SEI 7-22, at strength level.
func (r BasicRules) equations() []basic {
	l := r.Companion
	if r.Method == ASD {
		roof := []part{{RoofLive, 1}, {Snow, 0.7}, {Rain, 1}}
		roofs := []part{{RoofLive, 0.75}, {Snow, 0.75 * 0.7}, {Rain, 0.75}}
		return []basic{
			{source: "2.4.1 (1)", dead: 1},
			{source: "2.4.1 (2)", dead: 1, parts: []part{{Imposed, 1}}},
			{source: "2.4.1 (3)", dead: 1, or: roof},
			{source: "2.4.1 (4)", dead: 1, parts: []part{{Imposed, 0.75}}, or: roofs},
			{source: "2.4.1 (5)", dead: 1, parts: []part{{Wind, 0.6}}},
			{source: "2.4.1 (6)", dead: 1, parts: []part{{Imposed, 0.75}, {Wind, 0.75 * 0.6}}, or: roofs},
			{source: "2.4.1 (7)", dead: 0.6, parts: []part{{Wind, 0.6}}},
			{source: "2.4.5 (8)", dead: 1, quake: 0.7},
			{source: "2.4.5 (9)", dead: 1, quake: 0.525, parts: []part{{Imposed, 0.75}, {Snow, 0.1}}},
			{source: "2.4.5 (10)", dead: 0.6, quake: 0.7},
		}
	}
	companions := []part{{RoofLive, 0.5}, {Snow, 0.3}, {Rain, 0.5}}
	return []basic{
		{source: "2.3.1 (1)", dead: 1.4},
		{source: "2.3.1 (2)", dead: 1.2, parts: []part{{Imposed, 1.6}}, or: companions},
		{source: "2.3.1 (3)", dead: 1.2, or: []part{{RoofLive, 1.6}, {Snow, 1}, {Rain, 1.6}}, or2: []part{{Imposed, l}, {Wind, 0.5}}},
		{source: "2.3.1 (4)", dead: 1.2, parts: []part{{Wind, 1}, {Imposed, l}}, or: companions},
		{source: "2.3.1 (5)", dead: 0.9, parts: []part{{Wind, 1}}},
		{source: "2.3.6 (6)", dead: 1.2, quake: 1, parts: []part{{Imposed, l}, {Snow, 0.15}}},
		{source: "2.3.6 (7)", dead: 0.9, quake: 1},
	}
}

// Basic makes the combinations of ASCE/SEI 7-22 for strength (2.3) or for
// allowable stress (2.4): in every equation each selection of the variable cases
// that can act together, since one that relieves is left out. A load that has a
// case for each of its directions is told by exclusive cases. Fluids, lateral
// earth pressure, self-straining and flood loads, ice, and the load factor of
// 2.3.1 for wind that relieves have no kinds and are not combined. The error is
// one of those of Ultimate.
func Basic(cases []Case, r BasicRules) ([]Combination, error) {
	m, err := newBasicMaker(cases, r)
	if err != nil {
		return nil, err
	}
	for _, e := range r.equations() {
		if e.quake == 0 {
			m.basic(e, -1, 0)
			continue
		}
		for _, q := range m.of(Earthquake) {
			m.basic(e, q, e.quake)
			m.basic(e, q, -e.quake)
		}
	}
	return m.out, nil
}

// BasicService makes combinations for deflections: those of 2.4.1, as is common
// practice; ASCE/SEI 7 leaves them to appendix C, which is not mandatory.
func BasicService(cases []Case, r BasicRules) ([]Combination, error) {
	r.Method = ASD
	out, err := Basic(cases, r)
	out = slices.DeleteFunc(out, func(c Combination) bool { return c.Situation == Seismic })
	for i := range out {
		out[i].Situation = Characteristic
	}
	return out, err
}

func newBasicMaker(cases []Case, r BasicRules) (*maker, error) {
	m := &maker{cases: cases, rules: Rules{RoofsTogether: true, Exclusive: r.Exclusive}, apart: make([]uint, len(cases))}
	for i, c := range cases {
		if c.Kind.Variable() {
			m.variable = append(m.variable, i)
		}
	}
	if len(m.variable) > MaxVariable {
		return nil, ErrManyVariable
	}
	m.separate()
	m.seen = map[string]bool{}
	return m, nil
}

// basic makes the combinations of one equation, with an earthquake case unless
// with is -1.
func (m *maker) basic(e basic, with int, quake float64) {
	m.situation, m.source = Persistent, "ASCE/SEI 7-22 "+e.source
	if with >= 0 {
		m.situation = Seismic
	}
	none := []part{{}}
	first, second := e.or, e.or2
	if len(first) == 0 {
		first = none
	}
	if len(second) == 0 {
		second = none
	}
	for _, a := range first {
		for _, b := range second {
			m.choose(append(slices.Clone(e.parts), a, b), e.dead, with, quake)
		}
	}
}

// choose adds every selection of the cases that have a factor.
func (m *maker) choose(parts []part, dead float64, with int, quake float64) {
	factor := make([]float64, len(m.cases))
	var index []int // into m.variable
	for j, i := range m.variable {
		for _, p := range parts {
			if p.factor != 0 && p.kind == m.cases[i].Kind {
				factor[i] = p.factor
			}
		}
		if factor[i] != 0 {
			index = append(index, j)
		}
	}
	for pick := range uint(1) << len(index) {
		var set uint
		for k, j := range index {
			if pick&(1<<k) != 0 {
				set |= 1 << j
			}
		}
		if !m.together(set) || with >= 0 && m.apart[with]&set != 0 {
			continue
		}
		factors := m.permanent(dead, with, quake)
		for j, i := range m.variable {
			if set&(1<<j) != 0 {
				factors[i] = factor[i]
			}
		}
		m.add(factors, nil)
	}
}
