package standard

import (
	"fmt"
	"math"
	"strings"

	"kern/checker/action"
	"kern/checker/model"
	"kern/lang/unit"
)

// floors is what the floors above a segment bring of one case.
type floors struct {
	storeys  int
	area     float64 // m2
	force    float64 // N
	pressure float64 // the greatest, Pa
	factor   float64 // the reduction
}

// reduce finds the reduction of the imposed loads of floors: [case][segment]; nil
// without one. Loads that are given as forces are never reduced.
func (f *Frame) reduce() {
	m := f.Member
	if m.Reduction.Kind == model.NoReduction {
		return
	}
	segments := len(f.cuts) - 1
	f.floors = make([]floors, len(f.Env.Cases)*segments)
	for c, k := range f.Env.Cases {
		for s := range segments {
			x := &f.floors[c*segments+s]
			x.factor = 1
			seen := map[*model.Level]bool{}
			for _, l := range m.Loads {
				if l.Level == nil || l.Case != c || !(f.cuts[s+1] <= l.At+1e-9*m.Height) {
					continue
				}
				if !seen[l.Level] {
					seen[l.Level] = true
					x.storeys++
				}
				x.area += l.Area
				x.force += l.Value
				x.pressure = max(x.pressure, l.Value/l.Area)
			}
			if x.storeys > 0 && f.reducible(k) && x.force > 0 {
				x.factor = f.factor(c, x)
			}
		}
	}
}

// reducible tells whether the member's reduction may be used on a case.
func (f *Frame) reducible(c *model.Case) bool {
	if f.Member.Reduction.Kind == model.ByTributaryArea || f.Env.Basis.Basic() {
		return c.ReducibleLive()
	}
	return c.Reducible()
}

// factor is the reduction of what the floors above bring of a case.
func (f *Frame) factor(c int, x *floors) float64 {
	values := f.Env.Basis.Combining.Values
	switch r := f.Member.Reduction; r.Kind {
	case model.ByStoreys:
		return values.StoreyFactor(x.storeys, f.Env.PsiOf(c))
	case model.ByArea:
		return values.AreaFactor(f.Env.Cases[c].Category, x.area, f.Env.PsiOf(c))
	case model.ByTributaryArea:
		return action.LiveFactor(r.Element, x.area, x.storeys, x.pressure)
	case model.StatedReduction:
		return r.Value
	}
	return 1
}

// relief is what the reduction takes off the axial force of a combination in a
// segment for one case, before the factor of the case. The reduction by storeys is
// not used together with psi_0 (EN 1991-1-1 3.3.2(2)).
func (f *Frame) relief(combination, c, segment int) float64 {
	if f.floors == nil {
		return 0
	}
	x := f.floors[c*(len(f.cuts)-1)+segment]
	if x.factor >= 1 || f.Member.Reduction.Kind == model.ByStoreys && f.Env.Accompanied(f.Combinations[combination], c) {
		return 0
	}
	return x.force * (1 - x.factor)
}

// Reduced is the factor that a combination takes a load along the member with at
// the base beside that of its case: the reduction of imposed loads of floors, 1 for
// any other.
func (f *Frame) Reduced(combination int, l model.Load) float64 {
	if l.Level == nil || f.relief(combination, l.Case, 0) == 0 {
		return 1
	}
	return f.floors[l.Case*(len(f.cuts)-1)].factor
}

// Reduction is the factor of the imposed loads of floors of a case just below a
// height, and the number of storeys and the area (m2) that it comes from; 1 where
// nothing is reduced.
func (f *Frame) Reduction(c int, z float64) (factor float64, storeys int, area float64) {
	eps := 1e-9 * f.Member.Height
	for s := len(f.cuts) - 2; s >= 0 && f.floors != nil; s-- {
		if f.cuts[s] < z-eps || s == 0 {
			x := f.floors[c*(len(f.cuts)-1)+s]
			return x.factor, x.storeys, x.area
		}
	}
	return 1, 0, 0
}

// reductions lists what was reduced, for the assumptions.
func (f *Frame) reductions() []string {
	r := f.Member.Reduction
	if f.floors == nil {
		return nil
	}
	kind := map[model.ReductionKind]string{
		model.ByStoreys:       "imposed loads of floors reduced by storeys (EN 1991-1-1 6.3.1.2(11), " + f.annex() + "), where no psi value goes with them (3.3.2(2))",
		model.ByArea:          "imposed loads of floors reduced by area (EN 1991-1-1 6.3.1.2(10), " + f.annex() + ", from memory)",
		model.ByTributaryArea: "live loads of floors reduced by tributary area (ASCE/SEI 7 4.7, from memory), K_LL = " + unit.Short(r.Element, 3),
		model.StatedReduction: "imposed loads of floors times " + unit.Short(r.Value, 3) + ", because \"" + r.Because + "\"",
	}[r.Kind]
	segments := len(f.cuts) - 1
	var list, kept []string
	for c, k := range f.Env.Cases {
		var parts []string
		any := false
		for s := segments - 1; s >= 0; s-- {
			x := f.floors[c*segments+s]
			any = any || x.force != 0
			if s < segments-1 && x.storeys == f.floors[c*segments+s+1].storeys || x.factor >= 1 {
				continue
			}
			parts = append(parts, fmt.Sprintf("%s below %s (%s, %s)", unit.Short(x.factor, 3), f.Env.PlaceName(f.Member, f.cuts[s+1]), count(x.storeys, "storey"), f.Env.Basis.Show.Floor(x.area, 4)))
		}
		switch {
		case !any || k.Kind != action.Imposed:
		case len(parts) > 0:
			list = append(list, k.Name+": "+strings.Join(parts, ", "))
		case f.reducible(k):
			kept = append(kept, k.Name)
		default:
			kept = append(kept, k.Name+" (category "+k.Category+")")
		}
	}
	out := []string{kind + ": " + strings.Join(list, "; ")}
	if len(list) == 0 {
		out[0] = kind + ": nothing to reduce"
	}
	if len(kept) > 0 {
		out = append(out, "not reduced: "+strings.Join(kept, ", "))
	}
	for _, b := range f.Bends {
		if b {
			out = append(out, "moments of loads off the centroid are not reduced")
			break
		}
	}
	return out
}

func (f *Frame) annex() string {
	if a := f.Env.Basis.Combining.Values.Annex; a != "" {
		return "annex " + a
	}
	return "recommended values"
}

func count(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}

// nominal gives the moments of simple construction that the loads off the
// centroid of one case make about an axis: at each level the moment is shared by
// the lengths of column above and below, and nothing of it comes to other levels.
// The share follows the stiffness of the lengths, 3 E I/L where the section does
// not change; where one is no more than 1.5 times the other, both have half (common
// practice in simple construction, from memory).
func (f *Frame) nominal(axis, c int, into []action.Piece) {
	m := f.Member
	for _, l := range m.Loads {
		if l.Kind != model.AxialLoad || l.Case != c || l.Offset[axis] == 0 || l.Value == 0 {
			continue
		}
		below, above := f.lengths(axis, l.At)
		moment := l.Value * l.Offset[axis]
		share := 1.0
		switch {
		case below[1] <= below[0]:
			share = 0
		case above[1] > above[0]:
			low, high := f.turning(axis, below[0], below[1], true), f.turning(axis, above[0], above[1], false)
			share = 0.5
			if !(max(low, high) <= 1.5*min(low, high)) {
				share = low / (low + high)
			}
		}
		for i := range into {
			p := &into[i]
			middle := (p.From + p.To) / 2
			switch {
			case middle > below[0] && middle < below[1]:
				// the bending of a bar on two pins, from its lower end
				l, x := below[1]-below[0], p.From-below[0]
				v := share * moment / l
				p.M += v * x
				p.V += v
				p.D += v * x * (x*x - l*l) / 6
				p.R += v * (3*x*x - l*l) / 6
			case middle > above[0] && middle < above[1]:
				l, x := above[1]-above[0], p.From-above[0]
				v := (1 - share) * moment / l
				p.M += v * (x - l)
				p.V += v
				p.D += v * x * (x*x - 3*l*x + 2*l*l) / 6
				p.R += v * (3*x*x - 6*l*x + 2*l*l) / 6
			}
		}
	}
}

// lengths are the lengths of column below and above a level about an axis, empty
// beyond the ends of the member.
func (f *Frame) lengths(axis int, z float64) (below, above [2]float64) {
	m := f.Member
	eps := 1e-9 * m.Height
	below, above = [2]float64{0, z}, [2]float64{z, m.Height}
	for _, h := range m.Holds {
		if h.About(model.Axis(axis)) && h.Stiffness == 0 && math.Abs(h.At-z) > eps {
			if h.At < z {
				below[0] = max(below[0], h.At)
			} else {
				above[1] = min(above[1], h.At)
			}
		}
	}
	return below, above
}

// turning is the stiffness against turning of one end of a length of column, the
// other pinned, Nm: 3 E I/L for one section.
func (f *Frame) turning(axis int, from, to float64, upper bool) float64 {
	soft, length := 0.0, to-from
	last := 0.0
	for _, s := range f.steps(axis, from, to) {
		// the moment falls from 1 at the end that is turned to 0 at the other
		cube := func(x float64) float64 { return x * x * x / (3 * length * length) }
		part := cube(s.To) - cube(last)
		if !upper {
			part = cube(length-last) - cube(length-s.To)
		}
		soft += part / s.Stiffness
		last = s.To
	}
	return 1 / soft
}
