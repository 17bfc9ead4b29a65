package standard

import (
	"math"
	"slices"

	"kern/checker/action"
	"kern/checker/model"
)

// HoldDemand is what a hold must be able to do about one axis, so that the member
// can count on it.
type HoldDemand struct {
	At          float64 // height above the base, m
	Axis        model.Axis
	Combination int     // index into the frame's combinations
	Compression float64 // greatest compression beside the hold, N
	// Force is the stabilising force of EN 1993-1-1 5.3.3 on the hold, N: of a bow of
	// L/500 (alpha_m = 1 for the one member) and the movement of the hold under it.
	// NaN where an end of the member is not held, which the clause does not have.
	Force float64
	// Practice is 2.5 % of the compression, N: common practice, no clause.
	Practice float64
	// Stiffness is what the hold must have, N/m: twice the ideal stiffness.
	Stiffness float64
	Stated    float64 // stiffness that the hold is given, N/m; 0 for a rigid hold
	How       string  // what Stiffness comes from
	holds     int     // index into the member's holds
}

// The sources of what a hold needs.
const (
	HoldForceClause = "EN 1993-1-1 5.3.3"
	HoldPractice    = "2.5 % of the compression, common practice"
	winter          = "twice the ideal stiffness, by rigid bars with hinges at the holds (Winter)"
	byMember        = "stiffness at which the whole member buckles at twice the forces (eigenvalue)"
	byHolds         = "twice the stiffness at which the whole member has 95 % of its critical load on rigid holds (eigenvalue)"
)

// Holds gives what each hold about each axis must be able to do, from the base
// up: the greatest of all combinations. Holds against twist are left out, and so
// is an axis about which no combination compresses the member.
func (f *Frame) Holds() []HoldDemand {
	if f.lift != nil {
		return f.lift.whole.Holds()
	}
	if f.needs == nil {
		f.needs = f.holdDemands(false)
	}
	return f.needs
}

// statedHolds are those of Holds that a check of stated stiffnesses reads; other
// holds may be without what they need.
func (f *Frame) statedHolds() []HoldDemand {
	switch {
	case f.lift != nil:
		return f.lift.whole.statedHolds()
	case f.needs != nil:
		return f.needs
	}
	if f.stated == nil {
		f.stated = f.holdDemands(true)
	}
	return f.stated
}

// holdDemands finds what the holds need; with stated only what is needed to judge
// those that state a stiffness, which saves most of the work.
func (f *Frame) holdDemands(stated bool) []HoldDemand {
	var out []HoldDemand
	for i, h := range f.Member.Holds {
		for _, a := range []model.Axis{model.Major, model.Minor} {
			if h.About(a) {
				out = append(out, HoldDemand{At: h.At, Axis: a, Combination: -1, Stated: h.Stiffness, holds: i, Force: math.NaN(), Stiffness: math.NaN()})
			}
		}
	}
	for _, a := range []model.Axis{model.Major, model.Minor} {
		var here []*HoldDemand
		for i := range out {
			if out[i].Axis == a {
				here = append(here, &out[i])
			}
		}
		if len(here) > 0 && (!stated || slices.ContainsFunc(here, func(h *HoldDemand) bool { return h.Stated > 0 })) {
			f.demands(a, here, stated)
		}
	}
	pressed := []HoldDemand{}
	for _, d := range out {
		if d.Combination >= 0 {
			pressed = append(pressed, d)
		}
	}
	return pressed
}

// demands works out what the holds about an axis need.
func (f *Frame) demands(a model.Axis, holds []*HoldDemand, stated bool) {
	m := f.Member
	cuts := []float64{0}
	for _, h := range holds {
		cuts = append(cuts, h.At)
	}
	cuts = append(cuts, m.Height)
	spans, forces := make([]float64, len(holds)+1), make([]float64, len(holds)+1)
	for i := range spans {
		spans[i] = cuts[i+1] - cuts[i]
	}
	both := m.Base[a].Held() && m.Top[a].Held()
	stiffness := 0.0
	for k := range f.Combinations {
		for i := range forces {
			forces[i] = f.Compression(k, cuts[i], cuts[i+1])
		}
		for i, h := range holds {
			if n := max(forces[i], forces[i+1]); n > 0 && n > h.Compression {
				h.Compression, h.Combination = n, k
			}
		}
		if both {
			stiffness = max(stiffness, 2*action.IdealStiffness(spans, forces))
		}
	}
	how := winter
	if !both {
		stiffness, how = math.NaN(), byHolds // of the rigid ones
		if !stated {
			stiffness = 2 * f.enough(a)
		}
	}
	scale := math.NaN()
	for i, h := range holds {
		h.Practice, h.Stiffness, h.How = 0.025*h.Compression, stiffness, how
		if h.Stated > 0 {
			if math.IsNaN(scale) {
				scale = f.scale(a)
			}
			if v := scale * h.Stated; !both || v < h.Stiffness || math.IsNaN(h.Stiffness) {
				h.Stiffness, h.How = v, byMember
			}
		}
		if !both {
			continue
		}
		// q_d = 8 N (e_0 + delta_q)/L² over the halves of the spans beside the hold,
		// delta_q = force / stiffness
		k := h.Stated
		if k == 0 {
			k = h.Stiffness
		}
		per := 8 * h.Compression * (spans[i] + spans[i+1]) / 2 / (m.Height * m.Height)
		if grows := 1 - per/k; grows > 0 {
			h.Force = per * m.Height / 500 / grows
		}
	}
}

// pressedOnly are the combinations that compress the member anywhere.
func (f *Frame) pressedOnly() []int {
	var out []int
	for k := range f.Combinations {
		if f.Compression(k, 0, f.Member.Height) > 0 {
			out = append(out, k)
		}
	}
	return out
}

// enough is the least common stiffness of the rigid holds about an axis at which
// the critical load of the whole member is 95 % of that on rigid holds, N/m: for
// a member of which an end can move, where rigid bars would fall over.
func (f *Frame) enough(a model.Axis) float64 {
	most := 0.0
	for _, k := range f.pressedOnly() {
		rigid := f.Bar(int(a), k)
		full := rigid.Critical()
		if !(full > 0) || math.IsInf(full, 1) {
			return math.NaN()
		}
		reached := func(beta float64) bool {
			b := *rigid
			b.Held = make([]bool, len(b.Nodes))
			b.Lateral = make([]float64, len(b.Nodes))
			copy(b.Lateral, rigid.Lateral)
			for i := range b.Nodes {
				if rigid.Held[i] {
					b.Lateral[i] = beta
				}
			}
			return b.Critical() >= 0.95*full
		}
		low, high := 0.0, rigid.Stiffness[0]/math.Pow(f.Member.Height, 3)
		for range 60 {
			if reached(high) {
				break
			}
			low, high = high, 4*high
		}
		for range 40 {
			if mid := (low + high) / 2; reached(mid) {
				high = mid
			} else {
				low = mid
			}
		}
		most = max(most, high)
	}
	if most == 0 {
		return math.NaN()
	}
	return most
}

// scale is the least factor on the stated stiffnesses of the holds about an axis
// at which the whole member buckles at no less than twice the forces of any
// combination; NaN where no stiffness does.
func (f *Frame) scale(a model.Axis) float64 {
	most := 0.0
	for _, k := range f.pressedOnly() {
		bar := f.Bar(int(a), k)
		reached := func(s float64) bool {
			b := *bar
			b.Lateral = make([]float64, len(b.Nodes))
			copy(b.Lateral, bar.Lateral)
			for _, h := range f.Member.Holds {
				if !h.About(a) || h.Stiffness == 0 {
					continue
				}
				for i, z := range b.Nodes {
					if math.Abs(z-h.At) <= 1e-9*f.Member.Height {
						b.Lateral[i] = max(0, b.Lateral[i]+(s-1)*h.Stiffness)
					}
				}
			}
			return b.Critical() >= 2
		}
		if reached(most) {
			continue
		}
		low, high := most, max(1, 2*most)
		for i := 0; !reached(high); i++ {
			if i == 20 {
				return math.NaN()
			}
			low, high = high, 4*high
		}
		for range 40 {
			if mid := (low + high) / 2; reached(mid) {
				high = mid
			} else {
				low = mid
			}
		}
		most = high
	}
	return most
}
