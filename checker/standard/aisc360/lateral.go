package aisc360

import (
	"fmt"
	"math"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// lateralState is what the member is for lateral-torsional buckling.
type lateralState struct {
	axis     int    // the axis about which it bends: x–x, but for tees of wide flanges
	prone    bool   // to be checked
	unknown  bool   // of a member that is prone: cannot be decided
	why      string // of a member that is not prone, or of one that cannot be decided
	segments []segment
	stated   float64 // C_b of the basis, 0 for none
	because  string
	strength func(c *calc) // M_n_LT of the segment in the sheet, C_b known
	cb       bool          // C_b takes part
}

// segment is an unbraced length.
type segment struct {
	from, to float64
	factor   float64 // on its length, where the section changes in it: Frame.Lateral
	free     bool    // one end is free: a cantilever
}

// lateralOf decides whether and how the member can buckle sideways.
func (c *calc) lateralOf() lateralState {
	sec := c.f.Member.Section
	sh := sec.Shape
	l := lateralState{prone: true, cb: true}
	no := func(why string) lateralState { return lateralState{why: why} }
	square := math.Abs(sh.Depth-sh.Width) <= 1e-6*sh.Depth
	switch sh.Kind {
	case section.Pipe, section.Rod, section.Ellipse:
		return no("round sections do not buckle sideways")
	case section.Tube:
		if square {
			return no("square sections do not buckle sideways (user note of F7.4)")
		}
		l.strength = (*calc).lateralTube
	case section.Bar:
		if square {
			return no("square bars do not buckle sideways")
		}
		l.strength = (*calc).lateralBar
	case section.ISection, section.Channel:
		l.strength = (*calc).lateralOpen
	case section.Tee:
		l.axis, l.cb = c.squareToStem(), false
		l.strength = (*calc).lateralTee
	case section.DoubleAngle:
		l.axis, l.cb = c.squareToStem(), false
		l.strength = (*calc).lateralPair
	case section.Angle:
		l.strength = (*calc).lateralAngle
		c.unequalLegs()
	}
	if !c.f.Bends[l.axis] {
		l.prone, l.why = false, "the loads do not bend the member about the axis in which it buckles sideways"
		return l
	}
	if l.why = c.bend.why[l.axis]; l.why == "" {
		l.segments, l.why = c.unbraced()
	}
	l.unknown = l.why != ""
	if !l.unknown && c.f.Pushed[l.axis] {
		c.assume("loads across the member act at the height of the shear centre; on a flange in compression they lower the lateral-torsional buckling moment, which is for a person")
	}
	if o, ok := c.f.Env.Basis.Overrides["C_b"]; ok {
		l.stated, l.because = o.Value, o.Because
	}
	if !l.unknown && sh.Kind == section.Tube {
		c.do(doLpT)
		c.do(doLrT)
	}
	return l
}

// unbraced cuts the member at its ends and at the holds against twist (F2.2: a
// brace against twist is enough). A hold about the minor axis does not say
// whether it is at the compression flange and counts for nothing.
func (c *calc) unbraced() (out []segment, why string) {
	m := c.f.Member
	from, eps := 0.0, 1e-6*m.Height
	add := func(to float64) {
		if from < c.f.To-eps && to > c.f.From+eps { // the frame has a share in it
			out = append(out, segment{from: from, to: to, factor: 1})
		}
		from = to
	}
	for _, h := range m.Holds {
		if h.Twist && h.At-from > eps {
			add(h.At)
		}
	}
	add(m.Height)
	for i := range out {
		s := &out[i]
		if !c.f.Stepped(s.from, s.to) {
			continue
		}
		s.factor = math.NaN()
		for _, g := range c.f.Lateral() {
			if math.Abs(g.From-s.from) <= eps && math.Abs(g.To-s.to) <= eps {
				s.factor = g.Factor
			}
		}
		if math.IsNaN(s.factor) || m.Section.Shape.Kind != section.ISection {
			return nil, "the section changes between points held against twist: hold the member both sideways and against twist where it changes, or find the lateral-torsional buckling moment by analysis"
		}
	}
	if !c.f.TwistFree {
		return out, ""
	}
	free := func(ends [2]action.End) bool { return ends[0] == action.Free || ends[1] == action.Free }
	base, top := free(m.Base), free(m.Top)
	last := &out[len(out)-1]
	whole := len(out) == 1 && last.from == 0 && last.to == m.Height && last.factor == 1
	switch {
	case base && top:
		return nil, "both ends are free: find the lateral-torsional buckling moment by analysis"
	case top && whole && m.Base[1] == action.Fixed:
		last.free = true
	case base && whole && m.Top[1] == action.Fixed:
		last.free = true
	default:
		return nil, "an end is free and warping is not prevented where the free part begins: F1(c) does not give C_b, find the lateral-torsional buckling moment by analysis"
	}
	c.assume("warping is prevented at the fixed end of the cantilever (F1(c), C_b = 1.0), loads act at the shear centre")
	return out, ""
}

// lateralClause is the section of chapter F for lateral-torsional buckling.
func (c *calc) lateralClause() string {
	switch clause := c.flexureClause(c.bend.lat.axis); clause {
	case "F3":
		return "F2.2"
	case "F7":
		return "F7.4"
	default:
		return clause + ".2"
	}
}

// segmentGiven takes what a segment has whatever the combination.
func (c *calc) segmentGiven(s segment) {
	source := ""
	if c.s.Recorded() {
		source = "held against twist at both ends"
		if s.free {
			source = "from the fixed end to the free end"
		}
		if len(c.bend.lat.segments) > 1 {
			source = fmt.Sprintf("from %s to %s, %s", c.f.Place(s.from), c.f.Place(s.to), source)
		}
	}
	if s.factor != 1 && c.s.Recorded() {
		source += fmt.Sprintf(", times %s: the section changes there, and the least stiffness counts", unit.Number(s.factor, 4))
	}
	c.take(symLb, (s.to-s.from)*s.factor*max(1, c.f.TwistK), source)
}

// factorCb computes C_b of a segment for a combination, with the tension beside the
// moment (H1.2) where it is not zero.
func (c *calc) factorCb(k int, s segment, peak, tension float64) {
	l := &c.bend.lat
	c.take(symMmax, peak, c.combination(k))
	kind := c.f.Member.Section.Shape.Kind
	angle := kind == section.Angle
	switch {
	case !l.cb:
		return
	case l.stated > 0 && !angle:
		c.take(symCb, l.stated, "basis, because \""+l.because+"\"")
		return
	case s.free:
		c.take(symCb, 1, "F1(c), a cantilever")
		return
	case !(peak > c.bend.tiny[l.axis]):
		c.take(symCb, 1, "hardly any moment in the segment")
		return
	}
	pieces := c.bend.combs[k].pieces[l.axis]
	for i, id := range []derivation.ID{symMA, symMB, symMC} {
		below, above := action.MomentsAt(pieces, s.from+(s.to-s.from)*float64(i+1)/4)
		c.take(id, max(math.Abs(below), math.Abs(above)), "")
	}
	switch {
	case angle:
		c.do(doCbL)
	case tension > 0 && kind != section.Channel: // H1.2: doubly symmetric members
		c.do(doCb0)
		c.do(doPey)
		c.take(symPt, tension, c.combination(k))
		c.do(doCbH)
	default:
		c.do(doCb)
	}
}

// lateralTorsional checks every segment under every combination.
func (c *calc) lateralTorsional() {
	const rule = "lateral-torsional-buckling"
	l := &c.bend.lat
	clause := "ANSI/AISC 360 " + c.lateralClause()
	switch {
	case !l.prone:
		c.cover(rule, standard.NotApplicable, l.why)
		return
	case l.unknown:
		c.undecidedIn(rule, clause, unit.Moment, l.why)
		return
	}
	c.group(rule)
	best, comb, seg := math.Inf(-1), -1, 0
	c.silently(func() {
		for i, s := range l.segments {
			c.segmentGiven(s)
			for k := range c.bend.combs {
				if u := c.lateralOne(k, s); u >= 0 && u > best || math.IsNaN(u) {
					best, comb, seg = u, k, i
					if math.IsNaN(u) {
						return
					}
				}
			}
		}
	})
	if comb < 0 {
		c.cover(rule, standard.NotApplicable, "no combination bends the member about this axis")
		return
	}
	s := l.segments[seg]
	c.segmentGiven(s)
	u := c.lateralOne(comb, s)
	c.add(rule, clause, comb, c.s.At(symMmax), c.s.At(lateral.c), unit.Moment, u, c.f.Limit())
}

// lateralOne gives the utilisation of a segment under a combination, or -1 for
// a combination that does not bend it.
func (c *calc) lateralOne(k int, s segment) float64 {
	l := &c.bend.lat
	if !c.bend.combs[k].bends[l.axis] {
		return -1
	}
	d := action.DiagramOf(c.bend.combs[k].pieces[l.axis], s.from, s.to, c.bend.tiny[l.axis])
	if d.Peak <= c.bend.tiny[l.axis] {
		return -1
	}
	c.factorCb(k, s, d.Peak, 0)
	l.strength(c)
	c.available(lateral)
	return c.do(doULT)
}

// lateralOpen is F2.2, F4.2 or F5.2: I sections and channels.
func (c *calc) lateralOpen() {
	lb, lp, lr := c.s.At(symLb), c.s.At(symLp), c.s.At(symLr)
	pick := func(short, middle func(), long func()) {
		switch {
		case lb <= lp:
			short()
		case lb <= lr:
			middle()
		default:
			long()
		}
	}
	switch grade(c.s.At(symLamW), c.s.At(symLamPw), c.s.At(symLamRw)) {
	case compact:
		pick(func() { c.do(doLTp) }, func() { c.do(doLTi) }, func() { c.do(doFcr); c.do(doLTe) })
	case noncompact:
		pick(func() { c.do(doLTp4) }, func() { c.do(doLTi4) }, func() { c.do(doFcr4); c.do(doLTe4) })
	default:
		pick(func() { c.do(doFp5) }, func() { c.do(doFi5) }, func() { c.do(doFe5) })
		c.do(doLT5)
	}
}

// lateralTube is F7.4.
func (c *calc) lateralTube() {
	switch lb := c.s.At(symLb); {
	case lb <= c.s.At(symLp):
		c.do(doLTpT)
	case lb <= c.s.At(symLr):
		c.do(doLTiT)
	default:
		c.do(doLTeT)
	}
}

// lateralBar is F11.2.
func (c *calc) lateralBar() {
	ratio, limit := c.do(doLdt), c.s.At(symE)/c.s.At(symFy)
	switch {
	case ratio <= 0.08*limit:
		c.do(doLTpB)
	case ratio <= 1.9*limit:
		c.do(doLTiB)
	default:
		c.do(doFcrB)
		c.do(doLTeB)
	}
}

// lateralTee is F9.2 with the stem in compression.
func (c *calc) lateralTee() {
	t := tees[c.bend.lat.axis]
	c.do(t.doB)
	c.do(t.doMcr)
	c.do(t.doLT)
}

// lateralAngle is F10.2 about the major principal axis.
func (c *calc) lateralAngle() {
	c.do(doQ)
	if mcr := c.do(doMcrL); c.s.At(flexures[0].my) <= mcr {
		c.do(doLTiL)
	} else {
		c.do(doLTeL)
	}
}

// unequalLegs takes beta_w, with the long leg in compression as a moment's sense is
// not said.
func (c *calc) unequalLegs() {
	sh := c.f.Member.Section.Shape
	if math.Abs(sh.Depth-sh.Width) <= 1e-9 {
		c.take(symBetW, 0, "F10.2, equal legs")
		return
	}
	c.take(symBetW, -betaW(sh.Depth, sh.Width, sh.Wall), "F10.2, commentary's integral on the mid-lines of the legs, the long leg in compression")
}

// betaW is the size of beta_w of an angle (m) on the mid-lines of its legs:
//
//	beta_w = 1/I_w ∫ z (w² + z²) dA - 2 z_0
//
// with w along the major and z along the minor principal axis and z_0 that of the
// shear centre, where the legs meet (commentary of F10.2). The integrand is a cubic
// along a leg, for which Gauss's rule with two points is exact.
func betaW(upright, lying, t float64) float64 {
	type point struct{ x, y, area float64 }
	var points []point
	legs := [2][2]float64{{0, upright - t/2}, {lying - t/2, 0}} // ends, from the corner
	for _, e := range legs {
		length := math.Hypot(e[0], e[1])
		for _, g := range []float64{0.5 - 0.5/math.Sqrt(3), 0.5 + 0.5/math.Sqrt(3)} {
			points = append(points, point{g * e[0], g * e[1], length * t / 2})
		}
	}
	var a, cx, cy float64
	for _, p := range points {
		a, cx, cy = a+p.area, cx+p.area*p.x, cy+p.area*p.y
	}
	cx, cy = cx/a, cy/a
	var ixx, iyy, ixy float64
	for _, p := range points {
		x, y := p.x-cx, p.y-cy
		ixx, iyy, ixy = ixx+p.area*y*y, iyy+p.area*x*x, ixy+p.area*x*y
	}
	angle := math.Atan2(-2*ixy, ixx-iyy) / 2 // of the major axis
	sin, cos := math.Sincos(angle)
	turn := func(x, y float64) (w, z float64) { return x*cos + y*sin, y*cos - x*sin }
	var iw, cubic float64
	for _, p := range points {
		w, z := turn(p.x-cx, p.y-cy)
		iw += p.area * z * z
		cubic += p.area * z * (w*w + z*z)
	}
	_, z0 := turn(-cx, -cy)
	return math.Abs(cubic/iw - 2*z0)
}
