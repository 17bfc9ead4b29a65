package standard

import (
	"math"

	"kern/checker/action"
	"kern/checker/model"
)

// stiffness is E I about an axis, Nm2, of the lift of the frame or of the lowest
// one; NaN where it is not known.
func (f *Frame) stiffness(axis int) float64 {
	if f.lift != nil {
		return Known(bending(&f.parts[f.lift.part], axis))
	}
	return Known(bending(&f.parts[0], axis))
}

// root is the frame of the whole member.
func (f *Frame) root() *Frame {
	if f.lift != nil {
		return f.lift.whole
	}
	return f
}

// springs are the elastic supports about an axis, divided by E I of the lowest
// lift.
func (f *Frame) springs(axis int) []action.Spring {
	m, a := f.Member, model.Axis(axis)
	if !m.Sprung(a) {
		return nil
	}
	ei := f.stiffness(axis)
	var out []action.Spring
	for _, h := range m.Holds {
		if h.About(a) && h.Stiffness > 0 {
			out = append(out, action.Spring{At: h.At, Lateral: h.Stiffness / ei})
		}
	}
	for _, e := range []struct {
		at float64
		s  model.Spring
	}{{0, m.BaseSpring[axis]}, {m.Height, m.TopSpring[axis]}} {
		if e.s != (model.Spring{}) {
			out = append(out, action.Spring{At: e.at, Lateral: e.s.Lateral / ei, Turning: e.s.Turning / ei})
		}
	}
	return out
}

// spans are the stretches of a member whose critical load is that of the whole.
func (f *Frame) spans(axis int) []action.Stretch {
	m, a := f.Member, model.Axis(axis)
	out := action.Spans(m.Base[a], m.Top[a], m.RigidHolds(a), m.Height)
	moves := func(s action.Stretch, z float64) bool { return z >= s.From-1e-9*m.Height && z <= s.To+1e-9*m.Height }
	for i := range out {
		s := &out[i]
		s.Sprung = m.BaseSpring[a].Lateral > 0 && moves(*s, 0) || m.TopSpring[a].Lateral > 0 && moves(*s, m.Height)
		for _, h := range m.Holds {
			s.Sprung = s.Sprung || h.About(a) && h.Stiffness > 0 && moves(*s, h.At)
		}
	}
	return out
}

// weightParts is how many parts of the whole height a member is cut into where
// its own weight makes the axial force grow all along, for a critical load within
// 0.03 %: few where the weight is next to nothing beside the greatest force.
func weightParts(grows, most float64) float64 {
	if math.Abs(grows) < 0.02*most {
		return 6
	}
	return 40
}

// Bar is the whole member about an axis under a combination, on its ends, holds
// and springs: what its critical load and its buckled shape are found from.
func (f *Frame) Bar(axis, combination int) *action.Bar { return f.bar(axis, combination, nil) }

// bar is Bar with nodes at more heights.
func (f *Frame) bar(axis, combination int, more []float64) *action.Bar {
	m, a := f.Member, model.Axis(axis)
	cuts := f.cuts
	if len(more) > 0 {
		cuts = action.Merge(append(append([]float64(nil), cuts...), more...), m.Height)
	}
	holds, most := m.RigidHolds(a), 0.0
	if combination >= 0 {
		most = math.Max(f.Compression(combination, 0, m.Height), f.Tension(combination))
	}
	b := &action.Bar{Base: m.Base[a], Top: m.Top[a], Nodes: []float64{0}, Held: []bool{false}}
	for i := range len(cuts) - 1 {
		n := 1
		bottom, top := 0.0, 0.0
		if combination >= 0 {
			bottom, top = f.Between(combination, cuts[i], cuts[i+1])
		}
		if bottom != top {
			n = 1 + int(weightParts((bottom-top)*m.Height/(cuts[i+1]-cuts[i]), most)*(cuts[i+1]-cuts[i])/m.Height)
		}
		for j := range n {
			t := (float64(j) + 1) / float64(n)
			z := cuts[i] + t*(cuts[i+1]-cuts[i])
			if j == n-1 {
				z = cuts[i+1]
			}
			held := false
			for _, h := range holds {
				held = held || j == n-1 && math.Abs(h-z) <= 1e-9*m.Height
			}
			b.Nodes, b.Held = append(b.Nodes, z), append(b.Held, held)
			b.Force = append(b.Force, bottom+(top-bottom)*(t-0.5/float64(n)))
			b.Stiffness = append(b.Stiffness, Known(bending(f.partAt(z-(cuts[i+1]-cuts[i])/float64(2*n)), axis)))
		}
	}
	ei := f.stiffness(axis)
	for _, s := range f.springs(axis) {
		if b.Lateral == nil {
			b.Lateral, b.Turning = make([]float64, len(b.Nodes)), make([]float64, len(b.Nodes))
		}
		for i, z := range b.Nodes {
			if math.Abs(z-s.At) <= 1e-9*m.Height {
				b.Lateral[i] += s.Lateral * ei
				b.Turning[i] += s.Turning * ei
				break
			}
		}
	}
	return b
}

// critical finds the load factor of each combination where critical loads are
// those of the whole member.
func (f *Frame) critical() {
	for axis := range f.Exact {
		if !f.Exact[axis] {
			continue
		}
		f.loadFactor[axis] = make([]float64, len(f.Combinations))
		f.Stands[axis] = true
		known := true
		for i := range f.parts {
			known = known && !math.IsNaN(Known(bending(&f.parts[i], axis)))
		}
		if !known {
			for k := range f.loadFactor[axis] {
				f.loadFactor[axis][k] = math.NaN()
			}
			continue
		}
		if f.Bar(axis, -1).Critical() == 0 {
			f.Stands[axis] = false
			continue
		}
		for k := range f.Combinations {
			f.loadFactor[axis][k] = f.Bar(axis, k).Critical()
			f.Stands[axis] = f.Stands[axis] && f.loadFactor[axis][k] > 0
		}
		f.longest(axis)
	}
}

// longest gives stretches of a member whose critical load is that of the whole the
// greatest factor of all combinations, which is on the safe side under any.
func (f *Frame) longest(axis int) {
	for i, s := range f.Stretches[axis] {
		k := math.Inf(-1)
		for c := range f.Combinations {
			if n := f.Compression(c, s.From, s.To); n > 0 {
				k = math.Max(k, f.Under(axis, s, c).K) // NaN stays
			}
		}
		if math.IsInf(k, -1) {
			k = 1 // nothing compresses it
		}
		f.Stretches[axis][i].K = k
	}
}

// SecondOrder gives the bending moments of second order of the whole member about
// an axis under a combination with all its loads times a factor, from the base up.
// It is false at and beyond the critical load, and where the loads are not known
// one by one: for forces from a table and nominal moments.
func (f *Frame) SecondOrder(axis, combination int, factor float64) ([]action.Curve, bool) {
	if f.lift != nil || f.Member.Imported != nil || f.Member.Nominal {
		return nil, false // of one lift the combination is another one
	}
	var loads []action.Push
	var at []float64
	for k, share := range f.Combinations[combination].Factors {
		if share == 0 || k >= len(f.pushes[axis]) {
			continue
		}
		for _, p := range f.pushes[axis][k] {
			p.Force, p.Moment, p.Line = p.Force*share*factor, p.Moment*share*factor, p.Line*share*factor
			loads = append(loads, p)
			at = append(at, p.From)
			if p.Line != 0 {
				at = append(at, p.To)
			}
		}
	}
	bar := f.bar(axis, combination, at)
	for i := range bar.Force {
		bar.Force[i] *= factor
	}
	return bar.SecondOrder(loads)
}

// partFactors are the load factors that the frame of a lift counts with under all
// combinations, or under one (of at least 0). Interaction with bending is known for
// uniform members: in a member that bends a lift gets no help from a stiffer one.
func (f *Frame) partFactors(part, combination int) (out [2][]float64) {
	for axis := range f.Exact {
		if !f.Exact[axis] {
			continue
		}
		out[axis] = f.loadFactor[axis]
		from := 0
		if combination >= 0 {
			from = combination
			out[axis] = out[axis][combination : combination+1]
		}
		if !f.Bends[0] && !f.Bends[1] {
			continue
		}
		own := make([]float64, len(out[axis]))
		for k := range own {
			b := f.Bar(axis, from+k)
			for i := range b.Stiffness {
				b.Stiffness[i] = Known(bending(&f.parts[part], axis))
			}
			own[k] = min(out[axis][k], b.Critical())
		}
		out[axis] = own
	}
	return out
}

// Factor is the factor by which the axial forces of a combination must grow
// until the whole member buckles about an axis; +Inf where nothing is
// compressed, NaN where it was not asked for or is not known.
func (f *Frame) Factor(axis, combination int) float64 {
	if !f.Exact[axis] || combination < 0 || combination >= len(f.loadFactor[axis]) {
		return math.NaN()
	}
	return f.loadFactor[axis][combination]
}

// Under is a stretch as it counts under a combination: where critical loads are
// those of the whole member, with the effective length factor that gives its part
// of the critical load, the load factor times its greatest compression. A stretch
// that is not compressed there counts with its own length.
func (f *Frame) Under(axis int, s action.Stretch, combination int) action.Stretch {
	if !f.Exact[axis] {
		return s
	}
	n := f.Compression(combination, s.From, s.To)
	if !(n > 0) {
		s.K = 1
		return s
	}
	s.Stepped = f.root().Stepped(s.From, s.To)
	s.K = math.Pi * math.Sqrt(f.stiffness(axis)/(f.Factor(axis, combination)*n)) / s.Length()
	return s
}

// Weakest is the combination under which the critical load about an axis, the
// load factor times the greatest compression, is least, where critical loads are
// those of the whole member; -1 where no combination compresses it.
func (f *Frame) Weakest(axis int) int {
	at, least := -1, math.Inf(1)
	for k := range f.Combinations {
		n := f.Compression(k, 0, f.Member.Height)
		if !(n > 0) {
			continue
		}
		if v := f.Factor(axis, k) * n; at < 0 || v < least || math.IsNaN(v) {
			at, least = k, v
		}
	}
	return at
}

// Whole is the member as one stretch about an axis.
func (f *Frame) Whole(axis int) action.Stretch {
	m := f.Member
	return action.Stretch{To: m.Height, Base: m.Base[axis], Top: m.Top[axis], K: math.NaN(), Whole: true}
}

// NotHeld says why a member does not stand about an axis.
func (f *Frame) NotHeld(axis int) string {
	name := model.Axis(axis).String()
	if f.sprung[axis] && f.Env.Basis.Direct {
		return "the direct analysis method is not covered for members with springs: say stability effective and critical exact"
	}
	if f.sprung[axis] {
		return "effective lengths do not count the springs about " + name + ": say critical exact, or effective = … about " + name
	}
	return "the ends and holds do not keep the member in place about " + name
}
