package action

import "math"

// End is how an end of a column is held against bending about one axis.
type End uint8

// The end conditions.
const (
	Pinned End = iota // held in place, free to turn
	Fixed             // held in place and against turning
	Free              // not held
	Guided            // free to move sideways, held against turning
)

// EndNames are the words of the language for end conditions.
var EndNames = map[string]End{"pinned": Pinned, "fixed": Fixed, "free": Free, "guided": Guided}

// String is the condition's word in the language.
func (e End) String() string { return [...]string{"pinned", "fixed", "free", "guided"}[e] }

// Held tells whether the end stays in place.
func (e End) Held() bool { return e.held() }

// held tells whether the end stays in place.
func (e End) held() bool { return e == Pinned || e == Fixed }

// clamped tells whether the end cannot turn.
func (e End) clamped() bool { return e == Fixed || e == Guided }

// Factor is the effective length factor of a uniform bar with the given ends:
// the theoretical value, or the one recommended for design, which allows for
// fixity that is never perfect (common handbook values: fixed–fixed 0.65,
// fixed–pinned 0.80, fixed–guided 1.2, fixed–free 2.1). It is false for a
// mechanism, which has no critical load.
func Factor(a, b End, recommended bool) (float64, bool) {
	if a > b {
		a, b = b, a
	}
	type pair struct{ a, b End }
	table := map[pair][2]float64{
		{Pinned, Pinned}: {1, 1},
		{Pinned, Fixed}:  {0.7, 0.8}, // exactly 0.699156; the rounded value is on the safe side
		{Fixed, Fixed}:   {0.5, 0.65},
		{Pinned, Guided}: {2, 2},
		{Fixed, Guided}:  {1, 1.2},
		{Fixed, Free}:    {2, 2.1},
	}
	k, ok := table[pair{a, b}]
	if recommended {
		return k[1], ok
	}
	return k[0], ok
}

// Stretch is a part of a column between two neighbouring points that are held
// against buckling about one axis.
type Stretch struct {
	From, To   float64 // heights, m
	Base, Top  End
	K          float64 // effective length factor
	Exact      bool    // K was solved for the whole column, see Stretches
	Overridden bool    // K is the user's
	Sprung     bool    // a spring keeps it from moving sideways somewhere
	Whole      bool    // K follows from the critical load of the whole column under a combination
	Joints     bool    // K follows from the stiffness ratios of rigid joints
	Sway       bool    // then, its joints can move sideways against each other
	Direct     bool    // K is 1 by the direct analysis method
	Stepped    bool    // the section changes in it; K is for one of its sections and one combination
}

// Length is the stretch's own length.
func (s Stretch) Length() float64 { return s.To - s.From }

// Effective is the effective length.
func (s Stretch) Effective() float64 { return s.K * s.Length() }

// Spans splits a column at its rigid holds (ascending, strictly inside) without
// effective length factors: the critical load of the whole column gives them, and
// K is NaN until then. A column with a free end beyond a hold stays whole.
func Spans(base, top End, holds []float64, height float64) []Stretch {
	if len(holds) > 0 && (base == Free || top == Free) {
		return []Stretch{{To: height, Base: base, Top: top, K: math.NaN(), Exact: true, Whole: true}}
	}
	var out []Stretch
	from, end := 0.0, base
	for _, h := range holds {
		out = append(out, Stretch{From: from, To: h, Base: end, Top: Pinned, K: math.NaN(), Whole: true})
		from, end = h, Pinned
	}
	return append(out, Stretch{From: from, To: height, Base: end, Top: top, K: math.NaN(), Whole: true})
}

// Stretches splits a column of the given height at its holds (ascending,
// strictly inside). Each stretch is taken for itself, pinned where the column
// goes on: hinges put into a column can only make it weaker, so the least
// critical load of the stretches is a lower bound of the column's own.
//
// A free end beyond a hold is the exception: with a hinge at the hold it would
// fall over. There the whole column is one stretch whose factor is solved from
// the exact stability equation for an axial force that does not change with
// height. It is false for a column that cannot stand at all.
func Stretches(base, top End, holds []float64, height float64, recommended bool) ([]Stretch, bool) {
	if len(holds) > 0 && (base == Free || top == Free) {
		n := CriticalUniform(base, top, holds, height)
		if !(n > 0) {
			return nil, false
		}
		return []Stretch{{From: 0, To: height, Base: base, Top: top, K: pi / sqrt(n) / height, Exact: true}}, true
	}
	out := make([]Stretch, 0, len(holds)+1)
	from, end := 0.0, base
	for i := 0; i <= len(holds); i++ {
		to, next := height, top
		if i < len(holds) {
			to, next = holds[i], Pinned
		}
		k, ok := Factor(end, next, recommended)
		if !ok {
			return nil, false
		}
		out = append(out, Stretch{From: from, To: to, Base: end, Top: next, K: k})
		from, end = to, Pinned
	}
	return out, true
}
