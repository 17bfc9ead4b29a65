package action

import (
	"encoding/binary"
	"errors"
	"math"
	"math/bits"
	"slices"
)

// Rules say how cases are combined.
type Rules struct {
	Values
	Equation string // Equation610 or Equation610ab
	// Independent gives every permanent case its own upper or lower factor; else
	// all have the upper or all the lower one, as actions of one source (Table
	// A1.2(B), note 3).
	Independent bool
	// QuasiLeading takes psi_2 for the leading variable action of an accidental
	// situation, else psi_1 (6.4.3.3(2), Table A1.3).
	QuasiLeading bool
	// RoofsTogether lets an imposed load on a roof (category H) act with snow and
	// wind; else it does not (EN 1991-1-1 3.3.2(1)).
	RoofsTogether bool
	// Exclusive are groups of cases, by index, of which one acts at a time.
	Exclusive [][]int
}

// MaxVariable is how many variable cases are combined: the number of
// combinations doubles with each. MaxIndependent is the same for permanent cases
// that are independent.
const (
	MaxVariable    = 7
	MaxIndependent = 4
)

// The reasons why cases are not combined.
var (
	ErrNoPsi           = errors.New("a variable case has no psi values")
	ErrManyVariable    = errors.New("there are too many variable cases")
	ErrManyIndependent = errors.New("there are too many independent permanent cases")
)

// Ultimate makes the combinations for ultimate limit states. For persistent and
// transient situations by (6.10), or by (6.10a) and (6.10b): permanent actions
// with their upper or lower factor, every selection of the variable actions (one
// that relieves is left out), each of them leading in turn where the equation has
// a leading one. For every accidental case by (6.11b), and for every seismic
// case, to either side, by (6.12b). The error is one of those above.
func Ultimate(cases []Case, r Rules) ([]Combination, error) {
	m, err := newMaker(cases, r)
	if err != nil {
		return nil, err
	}
	if r.Equation == Equation610ab {
		m.persistent("(6.10a)", r.GSup, nil)
		m.persistent("(6.10b)", r.Xi*r.GSup, full)
	} else {
		m.persistent("(6.10)", r.GSup, full)
	}
	m.begin(Accidental, "(6.11b)")
	leading := frequent
	if r.QuasiLeading {
		leading = nil
	}
	for _, a := range m.of(Accident) {
		m.selections(m.permanent(1, a, 1), a, leading, quasi)
	}
	m.begin(Seismic, "(6.12b)")
	for _, e := range m.of(Earthquake) {
		m.selections(m.permanent(1, e, 1), e, nil, quasi)
		m.selections(m.permanent(1, e, -1), e, nil, quasi)
	}
	return m.out, nil
}

// Service makes the combinations for limit states of serviceability:
// characteristic (6.14b), frequent (6.15b) and quasi-permanent (6.16b).
// Accidental and seismic cases have no part in them. The error is one of those
// above.
func Service(cases []Case, r Rules) ([]Combination, error) {
	m, err := newMaker(cases, r)
	if err != nil {
		return nil, err
	}
	base := m.permanent(1, -1, 0)
	m.begin(Characteristic, "(6.14b)")
	m.selections(base, -1, full, combined)
	m.begin(Frequent, "(6.15b)")
	m.selections(base, -1, frequent, quasi)
	m.begin(QuasiPermanent, "(6.16b)")
	m.selections(base, -1, nil, quasi)
	return m.out, nil
}

// value is the part of a variable action's characteristic value that an equation
// takes.
type value func(Psi) float64

func full(Psi) float64       { return 1 }
func combined(p Psi) float64 { return p[0] }
func frequent(p Psi) float64 { return p[1] }
func quasi(p Psi) float64    { return p[2] }

// maker makes combinations of one list of cases.
type maker struct {
	cases    []Case
	rules    Rules
	variable []int  // the variable cases
	psi      []Psi  // of each of them
	apart    []uint // of each case: the variable cases that never act with it, as a bit set
	sets     []uint // selections of variable cases that can act together, the small ones first

	situation Situation
	source    string
	seen      map[string]bool
	key       []byte
	out       []Combination
}

func newMaker(cases []Case, r Rules) (*maker, error) {
	m := &maker{cases: cases, rules: r, apart: make([]uint, len(cases))}
	for i, c := range cases {
		if !c.Kind.Variable() {
			continue
		}
		p, ok := r.Psi(c)
		if !ok {
			return nil, ErrNoPsi
		}
		m.variable, m.psi = append(m.variable, i), append(m.psi, p)
	}
	switch {
	case len(m.variable) > MaxVariable:
		return nil, ErrManyVariable
	case r.Independent && len(m.of(Permanent)) > MaxIndependent:
		return nil, ErrManyIndependent
	}
	m.separate()
	for size := 1; size <= len(m.variable); size++ {
		for set := uint(1); set < 1<<len(m.variable); set++ {
			if bits.OnesCount(set) == size && m.together(set) {
				m.sets = append(m.sets, set)
			}
		}
	}
	return m, nil
}

// separate finds out which cases never act together.
func (m *maker) separate() {
	for j, b := range m.variable {
		for a := range m.cases {
			if a != b && m.rules.excludes(m.cases, a, b) {
				m.apart[a] |= 1 << j
			}
		}
	}
}

// excludes tells whether two different cases never act together.
func (r Rules) excludes(cases []Case, a, b int) bool {
	if !r.RoofsTogether {
		for _, p := range [][2]Case{{cases[a], cases[b]}, {cases[b], cases[a]}} {
			if p[0].roof() && (p[1].Kind == Snow || p[1].Kind == Wind) {
				return true
			}
		}
	}
	for _, group := range r.Exclusive {
		both := 0
		for _, i := range group {
			if i == a || i == b {
				both++
			}
		}
		if both == 2 {
			return true
		}
	}
	return false
}

// together tells whether the variable cases of a selection can act together.
func (m *maker) together(set uint) bool {
	for j, i := range m.variable {
		if set&(1<<j) != 0 && m.apart[i]&set != 0 {
			return false
		}
	}
	return true
}

// of lists the cases of a kind.
func (m *maker) of(k Kind) []int {
	var out []int
	for i, c := range m.cases {
		if c.Kind == k {
			out = append(out, i)
		}
	}
	return out
}

// permanent gives the factor to all permanent cases, and another to one more
// case unless it is -1.
func (m *maker) permanent(factor float64, more int, other float64) []float64 {
	out := make([]float64, len(m.cases))
	for _, i := range m.of(Permanent) {
		out[i] = factor
	}
	if more >= 0 {
		out[more] = other
	}
	return out
}

// begin starts the combinations of another equation.
func (m *maker) begin(s Situation, equation string) {
	// one vector of factors is one combination, whichever of the equations of a
	// situation it comes from
	if m.seen == nil || s != m.situation {
		m.seen = map[string]bool{}
	}
	m.situation, m.source = s, "EN 1990:2002 "+equation
}

// persistent makes the combinations of one equation for persistent and transient
// situations; leading is nil when the equation has no leading action.
func (m *maker) persistent(equation string, sup float64, leading value) {
	m.begin(Persistent, equation)
	q := m.rules.Q
	scaled := func(v value) value {
		if v == nil {
			return nil
		}
		return func(p Psi) float64 { return q * v(p) }
	}
	for _, base := range m.permanents(sup, m.rules.GInf) {
		m.selections(base, -1, scaled(leading), scaled(combined))
	}
}

// permanents are the factors of the permanent cases: all with the upper one and
// all with the lower one, and, where they are independent, all mixtures.
func (m *maker) permanents(sup, inf float64) [][]float64 {
	all := [][]float64{m.permanent(sup, -1, 0)}
	index := m.of(Permanent)
	if len(index) == 0 || sup == inf {
		return all
	}
	if m.rules.Independent {
		for mixture := 1; mixture < 1<<len(index)-1; mixture++ {
			base := m.permanent(sup, -1, 0)
			for k, i := range index {
				if mixture&(1<<k) != 0 {
					base[i] = inf
				}
			}
			all = append(all, base)
		}
	}
	return append(all, m.permanent(inf, -1, 0))
}

// selections adds to the factors of the other actions every selection of variable
// ones: each in turn with its leading value and the others with the accompanying
// one, or all with the accompanying one when leading is nil. with is the
// accidental or seismic case of the combination, -1 for none.
func (m *maker) selections(base []float64, with int, leading, accompanying value) {
	m.add(base, nil)
	leadsFully := leading != nil && leading(Psi{}) != 0 // no psi value in it
	// from few variable actions to many: of combinations that do the same to a
	// member, the first and so the shortest is named
	for _, set := range m.sets {
		if with >= 0 && m.apart[with]&set != 0 {
			continue
		}
		for lead := range m.variable {
			if leading != nil && set&(1<<lead) == 0 {
				continue
			}
			factors, psi := append([]float64(nil), base...), make([]bool, len(base))
			for j, i := range m.variable {
				switch {
				case set&(1<<j) == 0:
				case j == lead && leading != nil:
					factors[i], psi[i] = leading(m.psi[j]), !leadsFully
				default:
					factors[i], psi[i] = accompanying(m.psi[j]), true
				}
			}
			m.add(factors, psi)
			if leading == nil {
				break
			}
		}
	}
}

// add notes a combination unless it is nothing, or was there before.
func (m *maker) add(factors []float64, psi []bool) {
	some := false
	m.key = m.key[:0]
	for _, f := range factors {
		some = some || f != 0
		// by the factors, not by the name: cases may share one, and it is rounded
		m.key = binary.LittleEndian.AppendUint64(m.key, math.Float64bits(f))
	}
	if !some || m.seen[string(m.key)] {
		return
	}
	m.seen[string(m.key)] = true
	m.out = append(m.out, Combination{Name: Sum(m.cases, factors), Factors: factors, Source: m.source, Situation: m.situation, Accompanying: psi})
}

// MaxExclusive is how many cases may stand in groups of which one acts at a time
// when no standard combines them.
const MaxExclusive = 7

// Together gives, for cases that no standard combines, the factor 1 to every case
// of each largest selection that can act together; false when more than
// MaxExclusive cases exclude each other.
func Together(cases []Case, exclusive [][]int) ([][]float64, bool) {
	r := Rules{RoofsTogether: true, Exclusive: exclusive}
	var tied []int // those in a group
	for i := range cases {
		for _, group := range exclusive {
			if len(group) > 1 && slices.Contains(group, i) && !slices.Contains(tied, i) {
				tied = append(tied, i)
			}
		}
	}
	if len(tied) > MaxExclusive {
		return nil, false
	}
	fits := func(set uint, k int) bool {
		for j, i := range tied {
			if set&(1<<j) != 0 && j != k && r.excludes(cases, i, tied[k]) {
				return false
			}
		}
		return true
	}
	var out [][]float64
	for set := uint(0); set < 1<<len(tied); set++ {
		largest := true
		for k := range tied {
			// all that are in it fit, and none that is not could be in it too
			largest = largest && fits(set, k) == (set&(1<<k) != 0)
		}
		if !largest {
			continue
		}
		factors := make([]float64, len(cases))
		for i := range factors {
			factors[i] = 1
		}
		for k, i := range tied {
			if set&(1<<k) == 0 {
				factors[i] = 0
			}
		}
		out = append(out, factors)
	}
	return out, true
}
