package checker

import (
	"math"
	"slices"

	"kern/checker/model"
)

// Takedown is how the loads of a member come down to its base, by case and
// without factors.
type Takedown struct {
	Cases  []int // indices into the Env's cases: those that bring anything
	Levels []TakedownLevel
	Base   []Reaction // of each of the cases
}

// TakedownLevel is a height where loads along the member come in, from the top
// down.
type TakedownLevel struct {
	Name string  // a level, or metres above the base
	At   float64 // above the base, m
	// Of each case: what comes in, N; the axial force just below, compression
	// positive, N; and the reduction of what floors bring, 1 for none.
	Load, Force, Factor []float64
	Storeys             []int
	Area                []float64 // m2 of floors above, of each case
}

// Reaction is what a case brings to the base of a member: the axial force,
// compression positive, N, and about each axis that is bent the shear force across
// it, N, and the moment, Nm, as the analysis has them.
type Reaction struct {
	Axial         float64
	Shear, Moment [2]float64 // NaN where the member cannot stand
}

// Takedown adds the loads of the member up from the top down; nil for one that
// could not be checked and for one with forces from a table. Forces are not reduced: Factor says by how much they may be.
func (r *Result) Takedown() *Takedown {
	f := r.Frame()
	if f == nil || r.Member.Imported != nil { // whose forces are known by combination alone
		return nil
	}
	m := r.Member
	t := &Takedown{}
	var heights []float64
	for _, l := range m.Loads {
		if l.Kind == model.AxialLoad && !slices.ContainsFunc(heights, func(z float64) bool { return math.Abs(z-l.At) <= 1e-9*m.Height }) {
			heights = append(heights, l.At)
		}
	}
	slices.Sort(heights)
	slices.Reverse(heights)
	for i := range r.env.Cases {
		brings := i == r.env.SelfWeight && r.OwnWeight() > 0
		for _, l := range m.Loads {
			brings = brings || l.Case == i && l.Value != 0
		}
		if brings {
			t.Cases = append(t.Cases, i)
			t.Base = append(t.Base, r.reaction(i))
		}
	}
	for _, z := range heights {
		row := TakedownLevel{Name: r.env.PlaceName(m, z), At: z}
		for _, c := range t.Cases {
			load := 0.0
			for _, l := range m.Loads {
				if l.Kind == model.AxialLoad && l.Case == c && math.Abs(z-l.At) <= 1e-9*m.Height {
					load += l.Value
				}
			}
			factor, storeys, area := f.Reduction(c, z)
			row.Load, row.Force = append(row.Load, load), append(row.Force, f.CaseForce(c, z))
			row.Factor, row.Storeys, row.Area = append(row.Factor, factor), append(row.Storeys, storeys), append(row.Area, area)
		}
		t.Levels = append(t.Levels, row)
	}
	return t
}

// reaction is what one case brings to the base.
func (r *Result) reaction(c int) Reaction {
	f := r.Frame()
	out := Reaction{Axial: f.CaseForce(c, 0)}
	factors := make([]float64, len(r.env.Cases))
	factors[c] = 1
	for a, bends := range f.Bends {
		if !bends {
			continue
		}
		out.Shear[a], out.Moment[a] = math.NaN(), math.NaN()
		if pieces, ok := f.Bending(a, factors, nil); ok && len(pieces) > 0 {
			out.Shear[a], out.Moment[a] = pieces[0].V, pieces[0].M
		}
	}
	return out
}
