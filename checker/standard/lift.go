package standard

import (
	"math"

	"kern/checker/action"
	"kern/checker/model"
	"kern/checker/section"
)

// liftView is what a frame of one lift knows beside the member's own frame.
type liftView struct {
	whole   *Frame
	part    int
	twisted bool // the section changes in the part that is worst for torsional buckling
	it, iw  float64
}

// merged takes neighbouring lifts as one where neither section nor material
// changes: a boundary between equals changes nothing.
func merged(lifts []model.Lift) []model.Lift {
	if len(lifts) < 2 {
		return lifts
	}
	out := []model.Lift{lifts[0]}
	for _, l := range lifts[1:] {
		last := &out[len(out)-1]
		if last.Section.Same(l.Section) && last.Material.Same(l.Material) {
			last.To, last.High = l.To, l.High
			continue
		}
		out = append(out, l)
	}
	return out
}

// Lifts are the parts of the member that have a section and a material of their
// own, from the base up; one for a member of one section.
func (f *Frame) Lifts() []model.Lift { return f.parts }

// Part is the frame of one lift, as if the member had its section, under all
// combinations or, for a combination of at least 0, under that one alone. Where
// the section changes in a stretch between holds, the effective length of the
// lift's part of it depends on the combination; then it must be one.
func (f *Frame) Part(i, combination int) *Frame {
	l := f.parts[i]
	p := *f
	m := *f.Member
	m.Section, m.Material = l.Section, l.Material
	p.Member, p.From, p.To, p.lift = &m, l.From, l.To, &liftView{whole: f, part: i}
	eps := 1e-9 * m.Height
	for p.first < p.last && p.cuts[p.first+1] <= l.From+eps {
		p.first++
	}
	for p.last > p.first && p.cuts[p.last] >= l.To-eps {
		p.last--
	}
	if combination >= 0 {
		p.Combinations = f.Combinations[combination : combination+1]
		p.axial, p.weight = f.axial[combination:combination+1], f.weight[combination:combination+1]
		if f.slope != nil {
			p.slope = f.slope[combination : combination+1]
		}
	}
	p.loadFactor = f.partFactors(i, combination)
	for axis, all := range f.Stretches {
		p.Stretches[axis] = nil
		for _, s := range all {
			if s.From >= l.To-eps || s.To <= l.From+eps {
				continue
			}
			if f.Stepped(s.From, s.To) && combination >= 0 && !f.Exact[axis] {
				var ok bool
				if s, ok = f.within(axis, s, i, combination); !ok {
					p.Stands[axis] = false
				}
			}
			p.Stretches[axis] = append(p.Stretches[axis], s)
		}
	}
	for axis := range p.Exact {
		if p.Exact[axis] {
			p.longest(axis)
		}
	}
	p.Twist = 0
	for _, t := range f.twists {
		if t.From < l.To-eps && t.To > l.From+eps {
			p.Twist = max(p.Twist, t.To-t.From)
		}
	}
	if combination >= 0 && !f.Alone(i) {
		p.twist()
	}
	return &p
}

// Stepped tells whether the section changes between two heights.
func (f *Frame) Stepped(from, to float64) bool {
	eps := 1e-9 * f.Member.Height
	for _, l := range f.parts[1:] {
		if l.From > from+eps && l.From < to-eps {
			return true
		}
	}
	return false
}

// Alone tells whether no stretch, and no part between points held against twist,
// that a lift has a share in goes on into another lift: what the lift carries then
// does not depend on the others.
func (f *Frame) Alone(i int) bool {
	l := f.parts[i]
	eps := 1e-9 * f.Member.Height
	alone := true
	look := func(from, to float64) {
		if from < l.To-eps && to > l.From+eps && f.Stepped(from, to) {
			alone = false
		}
	}
	for _, stretches := range f.Stretches {
		for _, s := range stretches {
			look(s.From, s.To)
		}
	}
	for _, t := range f.twists {
		look(t.From, t.To)
	}
	return alone
}

// Coupled tells of a frame of one lift whether what the lift carries depends on
// other lifts.
func (f *Frame) Coupled() bool { return f.lift != nil && !f.lift.whole.Alone(f.lift.part) }

// bending is E I of a lift about an axis, Nm2.
func bending(l *model.Lift, axis int) float64 {
	return l.Material.E * [...]float64{l.Section.IMajor, l.Section.IMinor}[axis]
}

// Stiffness is E I about an axis at a height, Nm2.
func (f *Frame) Stiffness(axis int, z float64) float64 { return bending(f.partAt(z), axis) }

// steps are the stiffnesses between two heights, counted from the lower one.
func (f *Frame) steps(axis int, from, to float64) []action.Step {
	var out []action.Step
	eps := 1e-9 * f.Member.Height
	for i := range f.parts {
		l := &f.parts[i]
		if l.From < to-eps && l.To > from+eps {
			out = append(out, action.Step{To: min(l.To, to) - from, Stiffness: bending(l, axis)})
		}
	}
	return out
}

// within gives a stretch in which the section changes as the lift has it: with
// the effective length of a uniform bar of the lift's section that buckles under
// the force in the lift when the whole stretch does, under the forces of the
// combination (a weaker lift of a member that bends is taken as uniform). The
// factor keeps what the ends' tabulated factor adds to that of
// ideal ends. It is false for a stretch that cannot stand or whose stiffness is not
// known.
func (f *Frame) within(axis int, s action.Stretch, part, combination int) (action.Stretch, bool) {
	eps := 1e-9 * f.Member.Height
	l := &f.parts[part]
	bar := &action.Bar{Base: s.Base, Top: s.Top, Nodes: []float64{0}, Held: []bool{false}}
	own, most := math.Inf(-1), math.Inf(-1)
	for seg := range f.own {
		if f.cuts[seg+1] <= s.From+eps || f.cuts[seg] >= s.To-eps {
			continue
		}
		n := max(f.axial[combination][seg], f.top(combination, seg))
		in := f.partAt((f.cuts[seg] + f.cuts[seg+1]) / 2)
		if in == l {
			own = max(own, n)
		}
		most = max(most, n)
		held := s.Exact && f.cuts[seg+1] < s.To-eps && f.holds(axis, f.cuts[seg+1])
		bar.Nodes, bar.Held = append(bar.Nodes, f.cuts[seg+1]-s.From), append(bar.Held, held)
		bar.Force, bar.Stiffness = append(bar.Force, n), append(bar.Stiffness, bending(in, axis))
	}
	stated := s.K
	if !(most > 0) || !(own > 0) {
		return s, true // nothing in the lift to buckle
	}
	var holds []float64
	if s.Exact {
		for _, h := range f.Member.Holds {
			if f.holds(axis, h.At) {
				holds = append(holds, h.At-s.From)
			}
		}
	}
	ideal := action.CriticalUniform(s.Base, s.Top, holds, s.Length()) * bending(l, axis)
	critical := bar.Critical() * own
	switch {
	case ideal > 0 && critical > 0:
		s.K *= math.Sqrt(ideal / critical)
	case s.Overridden && f.mechanism(s):
		// The stated factor is all that is known: with the least stiffness in the
		// stretch and its greatest force it is on the safe side.
		least := math.Inf(1)
		for _, ei := range bar.Stiffness {
			least = min(least, ei)
		}
		s.K *= math.Sqrt(bending(l, axis) / least * most / own)
	default:
		s.K = math.NaN()
	}
	// Interaction with bending is known for uniform members: there a lift gets no
	// help from a stiffer one. A stated factor is never made smaller either.
	if s.Overridden || s.Joints || s.Direct || f.Bends[0] || f.Bends[1] {
		s.K = max(s.K, stated)
	}
	s.Stepped = true
	return s, s.K > 0
}

// mechanism tells whether a bar with the ends of a stretch has no critical load.
func (f *Frame) mechanism(s action.Stretch) bool {
	_, ok := action.Factor(s.Base, s.Top, false)
	return !ok
}

// holds tells whether a rigid hold about an axis is at a height.
func (f *Frame) holds(axis int, z float64) bool {
	for _, h := range f.Member.Holds {
		if h.About(model.Axis(axis)) && h.Stiffness == 0 && math.Abs(h.At-z) <= 1e-9*f.Member.Height {
			return true
		}
	}
	return false
}

// Critical is the elastic critical force of a stretch about an axis (0 major, 1
// minor), N: that of a bar of its effective length; where the section changes in it,
// of the stepped bar under one force throughout. NaN when a value that it needs is
// not known.
func (f *Frame) Critical(axis int, s action.Stretch) float64 {
	l := s.Effective()
	steps := f.steps(axis, s.From, s.To)
	ei := steps[0].Stiffness
	if len(steps) > 1 && !s.Stepped {
		var holds []float64
		if s.Exact {
			for _, h := range f.Member.Holds {
				if f.holds(axis, h.At) {
					holds = append(holds, h.At-s.From)
				}
			}
		}
		ideal := action.CriticalUniform(s.Base, s.Top, holds, s.Length())
		l *= math.Sqrt(ideal * ei / action.CriticalStepped(s.Base, s.Top, holds, steps))
	}
	return Known(math.Pi * math.Pi * Known(ei) / (l * l))
}

// Twisting gives the torsion constant (m4) and the warping constant (m6) that a
// check of torsional buckling over the length Twist may count on, under the
// greatest compression in the frame, and where they come from: the section's own,
// or what stands for a part between points held against twist in which the section
// changes, where that is worse.
func (f *Frame) Twisting() (it, iw float64, source string) {
	if f.lift != nil && f.lift.twisted {
		return f.lift.it, f.lift.iw, f.Member.Section.Title() + ", times what the change of section leaves of it"
	}
	return f.Member.Section.It, Warping(f.Member.Section), f.Member.Section.Title()
}

// twist chooses the part between points held against twist that is worst for a
// frame of one lift and one combination. Where the section changes in it the
// critical force is a lower bound for the stepped member: the least G I_t and E I_w of
// the lifts there, over the greatest product of axial force and squared polar radius.
// The force in that part may be less than the greatest in the lift, which the check
// is made with; the constants grow by the quotient, which is on the safe side, as the
// resistance grows less than the critical force.
func (f *Frame) twist() {
	w, me := f.lift.whole, &f.parts[f.lift.part]
	eps := 1e-9 * f.Member.Height
	sec := f.Member.Section
	most := f.Compression(0, f.From, f.To)
	critical := func(it, iw, length float64) float64 {
		if f.TwistFree {
			return me.Material.G * it
		}
		return me.Material.G*it + math.Pi*math.Pi*me.Material.E*iw/(length*length)
	}
	plain := 0.0 // the longest part of one section
	for _, t := range w.twists {
		if t.From < f.To-eps && t.To > f.From+eps && !w.Stepped(t.From, t.To) {
			plain = max(plain, t.To-t.From)
		}
	}
	worst := math.Inf(1)
	if plain > 0 {
		worst, f.Twist = critical(sec.It, warping(sec), plain), plain
	}
	for _, t := range w.twists {
		if t.From >= f.To-eps || t.To <= f.From+eps || !w.Stepped(t.From, t.To) {
			continue
		}
		gi, ew, load, own := math.Inf(1), math.Inf(1), 0.0, 0.0
		for seg := range w.own {
			if w.cuts[seg+1] <= t.From+eps || w.cuts[seg] >= t.To-eps {
				continue
			}
			l := w.partAt((w.cuts[seg] + w.cuts[seg+1]) / 2)
			gi = math.Min(gi, l.Material.G*doubly(l.Section)*l.Section.It)
			ew = math.Min(ew, l.Material.E*warping(l.Section))
			n := max(f.axial[0][seg], f.top(0, seg), 0)
			load = max(load, n*polar2(l.Section))
			if l == me {
				own = max(own, n)
			}
		}
		if !(own > 0) {
			continue // nothing in the lift to buckle here
		}
		share := most * polar2(sec) / load
		it, iw := gi/me.Material.G*share, ew/me.Material.E*share
		if c := critical(it, iw, t.To-t.From); !(c >= worst) {
			worst, f.Twist = c, t.To-t.From
			f.lift.it, f.lift.iw, f.lift.twisted = it, iw, true
		}
	}
}

// doubly is 1 for a section with two axes of symmetry, NaN for any other: what
// twists the one bends the other, and no bound is known for a member of both.
func doubly(s *model.Section) float64 {
	switch s.Shape.Kind {
	case section.Channel, section.Tee, section.Angle:
		return math.NaN()
	}
	return 1
}

// warping is the warping constant of a section, m6, 0 where it is not stated.
func warping(s *model.Section) float64 {
	if math.IsNaN(s.Iw) {
		return 0
	}
	return s.Iw
}

// polar2 is the square of the polar radius of gyration about the shear centre, m2.
func polar2(s *model.Section) float64 {
	return (s.IMajor+s.IMinor)/s.Area + s.SMajor*s.SMajor + s.SMinor*s.SMinor
}

// Lateral are the parts of the member between points that are held sideways and
// against twist, for lateral-torsional buckling, those alone that the frame has a
// share in. Where the section changes in one, its length times the factor gives a
// member of the frame's section the critical moment of one with the least
// stiffness of all lifts in it, which is a lower bound.
func (f *Frame) Lateral() []Segment {
	m := f.Member
	var out []Segment
	last := 0.0
	add := func(to float64) {
		eps := 1e-9 * m.Height
		if last < f.To-eps && to > f.From+eps {
			out = append(out, Segment{last, to, f.lateralFactor(last, to)})
		}
		last = to
	}
	for _, h := range m.Holds {
		if h.At <= last {
			continue
		}
		var minor, twist bool
		for _, o := range m.Holds {
			if math.Abs(o.At-h.At) <= 1e-6*m.Height {
				minor, twist = minor || o.Minor && o.Stiffness == 0, twist || o.Twist
			}
		}
		if minor && twist && h.At-last > 1e-6*m.Height {
			add(h.At)
		}
	}
	add(m.Height)
	return out
}

func (f *Frame) lateralFactor(from, to float64) float64 {
	if f.lift == nil || !f.Stepped(from, to) {
		return 1
	}
	eps := 1e-9 * f.Member.Height
	me := &f.parts[f.lift.part]
	a, b, g := math.Inf(1), math.Inf(1), math.Inf(1)
	for i := range f.parts {
		l := &f.parts[i]
		if l.From < to-eps && l.To > from+eps {
			a, b, g = math.Min(a, bending(l, 1)), math.Min(b, l.Material.E*warping(l.Section)), math.Min(g, l.Material.G*doubly(l.Section)*l.Section.It)
		}
	}
	// M_cr² = E I_z x (E I_w x + G I_t) with x = (pi/L)²; solved for the length of
	// a member of the lift's section
	length := to - from
	x := math.Pi * math.Pi / (length * length)
	square := a * x * (b*x + g)
	ai, bi, gi := bending(me, 1), me.Material.E*warping(me.Section), me.Material.G*me.Section.It
	y := square / ai / gi
	if bi > 0 {
		y = 2 * square / ai / (gi + math.Sqrt(gi*gi+4*bi*square/ai))
	}
	return math.Max(1, math.Sqrt(x/y))
}
