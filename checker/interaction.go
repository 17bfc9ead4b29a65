package checker

import (
	"math"
	"slices"

	"kern/checker/model"
	"kern/checker/standard"
)

// Interaction is a member's compression beside its bending, for a picture: the
// point of every combination and the line that its standard draws.
type Interaction struct {
	Combination int        // the one that decides, by its index
	Axis        model.Axis // that the moments of the points are about
	Force       float64    // greatest compression of the combination, N
	Moments     [2]float64 // its greatest moments about both axes, first order, Nm
	Points      []Forces   // of every combination, by index
	Envelope    *Envelope
	// Undecided are the checks that the line leaves out, as the member has no answer
	// to them: inside the line it passes the others alone.
	Undecided []string
}

// Forces are the greatest compression and the greatest moment of a combination,
// first order and without its sign, N and Nm; NaN where the member cannot stand.
type Forces struct{ Compression, Moment float64 }

// Line gives the envelope in forces, N and Nm.
func (i *Interaction) Line() []Forces {
	var out []Forces
	for _, p := range i.Envelope.Points {
		out = append(out, Forces{p.Axial * i.Force, p.Bending * i.Moments[i.Axis]})
	}
	return out
}

// Interaction is false for a member that its deciding combination does not both
// compress and bend, and where the standard decides nothing.
func (r *Result) Interaction() (*Interaction, bool) {
	f := r.Frame()
	c, found := r.GoverningCheck()
	if f == nil || !found || c.Combination < 0 {
		return nil, false
	}
	i := &Interaction{Combination: c.Combination, Force: f.Compression(c.Combination, 0, r.Member.Height)}
	for a := range i.Moments {
		i.Moments[a] = r.moment(f, a, c.Combination)
	}
	// the axis that is bent harder for its modulus, that of the lift which decides
	w := [2]float64{r.Member.Section.WelMajor, r.Member.Section.WelMinor}
	for _, l := range r.Member.Lifts {
		if l.Name() == r.Lift {
			w = [2]float64{l.Section.WelMajor, l.Section.WelMinor}
		}
	}
	if !(w[0] > 0) || !(w[1] > 0) {
		w = [2]float64{1, 1}
	}
	if i.Moments[1]/w[1] > i.Moments[0]/w[0] {
		i.Axis = model.Minor
	}
	if !(i.Force > 0) || !(i.Moments[i.Axis] > 0) {
		return nil, false
	}
	var ok bool
	if i.Envelope, ok = r.Envelope(c.Combination); !ok {
		return nil, false
	}
	for _, c := range r.Checks {
		if r.silentOn(c.Rule) && !r.departs(c.Rule) && !slices.Contains(i.Undecided, c.Rule) {
			i.Undecided = append(i.Undecided, c.Rule)
		}
	}
	for _, c := range r.Coverage {
		if c.State == standard.NotCovered && !r.departs(c.Rule) && !slices.Contains(i.Undecided, c.Rule) {
			i.Undecided = append(i.Undecided, c.Rule)
		}
	}
	for k := range r.combinations {
		i.Points = append(i.Points, Forces{f.Compression(k, 0, r.Member.Height), r.moment(f, int(i.Axis), k)})
	}
	return i, true
}

// moment is the greatest first-order moment about an axis, without its sign.
func (r *Result) moment(f *standard.Frame, axis, combination int) float64 {
	pieces, ok := f.Bending(axis, r.combinations[combination].Factors, nil)
	if !ok {
		return math.NaN()
	}
	most := 0.0
	for _, p := range pieces {
		m, _ := p.Largest()
		most = max(most, math.Abs(m))
	}
	return most
}
