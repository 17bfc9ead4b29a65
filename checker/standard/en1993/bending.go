package en1993

import (
	"math"

	"kern/checker/action"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// comb is what a combination does to the member.
type comb struct {
	pieces [2][]action.Piece // moments about y–y and z–z
	bends  [2]bool           // more than next to nothing
	inside [2]bool           // the same of what lies within the frame
	peak   [2]float64        // greatest moments, Nm
	shear  [2]float64        // greatest shear forces with them, N
	push   float64           // greatest compression, at least 0, N
	class  int               // under the combination
	c1     []float64         // C_1 in each segment of lateral-torsional buckling, 0 until it is found
}

// interval is a part of the member in which neither axis has a load.
type interval struct {
	from, to float64
	piece    [2]int
}

// spot is a place of a member under a combination.
type spot struct {
	comb int
	z    float64
	n    float64 // compression, with its sign
	m, v [2]float64
}

var bendingRules = []struct {
	rule, clause string
	axes         []int
	dim          unit.Dim
}{
	{"section-bending-major", "EN 1993-1-1 6.2.5", []int{0}, unit.Moment},
	{"section-bending-minor", "EN 1993-1-1 6.2.5", []int{1}, unit.Moment},
	{"section-shear-major", "EN 1993-1-1 6.2.6", []int{0}, unit.Force},
	{"section-shear-minor", "EN 1993-1-1 6.2.6", []int{1}, unit.Force},
	{"section-interaction", "EN 1993-1-1 6.2.9", []int{0, 1}, unit.None},
	{"lateral-torsional-buckling", "EN 1993-1-1 6.3.2", []int{0}, unit.Moment},
	{"member-interaction", "EN 1993-1-1 6.3.3", []int{0, 1}, unit.None},
}

// bending makes the checks of a member that its loads bend.
func (c *calc) bending() {
	bends := c.f.Bends
	if !bends[0] && !bends[1] {
		for _, r := range bendingRules {
			c.cover(r.rule, standard.NotApplicable, "the loads do not bend the member")
		}
		c.cover("torsion", standard.NotApplicable, "the loads do not bend the member")
		return
	}
	why := c.why
	if c.uniform > 0 {
		why = ""
	}
	for a := range bends {
		if _, ok := c.f.Bending(a, nil, nil); !ok || bends[a] && !c.f.Stands[a] {
			why = c.f.NotHeld(a)
		}
	}
	if why == "" && c.uniform == 4 && c.class == 0 {
		why = c.why // class 4 without effective moduli
	}
	if why != "" {
		for _, r := range bendingRules {
			if c.bendsOne(r.axes) {
				c.undecidedIn(r.rule, r.clause, r.dim, why)
			} else {
				c.cover(r.rule, standard.NotApplicable, "the loads do not bend the member about this axis")
			}
		}
		c.torsion()
		return
	}
	c.moduli()
	c.combine()
	c.lat = c.lateralOf()
	c.shearChecks()
	c.bendingChecks()
	c.sectionInteraction()
	c.lateralTorsional()
	c.memberInteraction()
	c.torsion()
}

func (c *calc) bendsOne(axes []int) bool {
	for _, a := range axes {
		if c.f.Bends[a] {
			return true
		}
	}
	return false
}

// undecidedIn is undecided for a check of another dimension.
func (c *calc) undecidedIn(rule, clause string, dim unit.Dim, why string) {
	c.out.Undecided(rule, clause, dim, why)
}

// torsion is 6.2.7: the language has no load that twists the member.
func (c *calc) torsion() {
	c.out.Untwisted(c.f.Member.Section.Shape.Kind, "6.2.7")
}

// moduli takes the properties that bending asks for.
func (c *calc) moduli() {
	sec := c.f.Member.Section
	title := sec.Title()
	c.group("")
	known := standard.Known
	c.take(moments[0].wpl, known(sec.WplMajor), title)
	c.take(moments[0].wel, known(sec.WelMajor), title)
	c.take(moments[1].wpl, known(sec.WplMinor), title)
	c.take(moments[1].wel, known(sec.WelMinor), title)
	c.take(moments[0].av, known(sec.AvMajor), title)
	c.take(moments[1].av, known(sec.AvMinor), title)
	c.take(symIt, standard.KnownOrZero(sec.It), title)
	iw := sec.Iw
	if math.IsNaN(iw) {
		iw = 0
	}
	c.take(symIw, standard.KnownOrZero(iw), title)
	fy := c.s.At(symFy)
	for a, w := range []float64{sec.WelMajor, sec.WelMinor} {
		if math.IsNaN(w) {
			w = []float64{sec.WplMajor, sec.WplMinor}[a]
		}
		if math.IsNaN(w) {
			w = sec.Area * []float64{sec.RMajor, sec.RMinor}[a]
		}
		// moments below this are rounding of the analysis
		c.tiny[a] = 1e-9 * fy * w
	}
	c.do(doNpl)
	switch {
	case sec.Shape.Kind == section.ISection && !sec.Turned:
		c.do(doHwI)
		c.do(doAI)
	case sec.Shape.Kind == section.Tube:
		c.do(doHwTube)
		c.do(doHwB)
		c.do(doAtw)
		c.do(doAtf)
	}
	if c.slender {
		c.effectiveModuli()
	}
}

// combine works out what each combination does.
func (c *calc) combine() {
	c.combs = make([]comb, len(c.f.Combinations))
	var slab []action.Piece // one piece of memory for all
	c.silently(func() {
		for k := range c.combs {
			b := &c.combs[k]
			for a := range b.pieces {
				b.pieces[a], _ = c.f.Bending(a, c.f.Combinations[k].Factors, slab)
				if n := len(b.pieces[a]); n > 0 {
					if k == 0 {
						slab = make([]action.Piece, 0, 2*n*len(c.combs))
					} else if cap(slab) >= n {
						slab = slab[n:n:cap(slab)]
					}
					b.pieces[a] = b.pieces[a][:n:n]
				}
				beyond := 0.0 // in other lifts: a stretch can go on there
				for _, p := range b.pieces[a] {
					m, _ := p.Largest()
					beyond = max(beyond, math.Abs(m))
					if p, ok := c.f.Cut(p); ok {
						m, _ := p.Largest()
						b.peak[a] = max(b.peak[a], math.Abs(m))
						b.shear[a] = max(b.shear[a], p.GreatestShear())
					}
				}
				b.bends[a], b.inside[a] = !(beyond <= c.tiny[a]), !(b.peak[a] <= c.tiny[a])
			}
			b.push = max(0, c.f.Compression(k, 0, c.f.Member.Height))
			b.class = c.classUnder(b.push, b.inside, "")
		}
	})
	c.intervals = c.intervals[:0]
	m := c.f.Member
	var cuts []float64
	cuts = append(cuts, c.f.Heights()...)
	for a := range c.f.Bends {
		if len(c.combs) > 0 {
			for _, p := range c.combs[0].pieces[a] {
				if p, ok := c.f.Cut(p); ok {
					cuts = append(cuts, p.From, p.To)
				}
			}
		}
	}
	for i := 1; i < len(cuts); i++ {
		for j := i; j > 0 && cuts[j] < cuts[j-1]; j-- {
			cuts[j], cuts[j-1] = cuts[j-1], cuts[j]
		}
	}
	var at [2]int
	for i := 1; i < len(cuts); i++ {
		if cuts[i]-cuts[i-1] <= 1e-9*m.Height {
			continue
		}
		iv := interval{from: cuts[i-1], to: cuts[i]}
		middle := (iv.from + iv.to) / 2
		for a := range at {
			if len(c.combs) == 0 {
				continue
			}
			p := c.combs[0].pieces[a]
			for at[a] < len(p)-1 && p[at[a]].To < middle {
				at[a]++
			}
			iv.piece[a] = at[a]
		}
		c.intervals = append(c.intervals, iv)
	}
}

// underCombination writes the class of a combination down for the check that it
// governs.
func (c *calc) underCombination(k int) {
	if c.s.Recorded() {
		c.classUnder(c.combs[k].push, c.combs[k].inside, c.f.Combinations[k].Name)
	}
}

// modulus chooses the section modulus of the class.
func (c *calc) modulus(a, class int) {
	x := moments[a]
	switch {
	case class <= 2 && !math.IsNaN(c.s.At(x.wpl)):
		c.do(x.doPl)
	case class <= 3:
		c.do(x.doEl)
	default:
		c.do(x.doEff)
	}
}

// shearChecks is 6.2.6 about both axes.
func (c *calc) shearChecks() {
	for a, x := range moments {
		rule, clause := "section-shear-"+x.word, "EN 1993-1-1 6.2.6"
		c.high[a] = false
		if !c.f.Bends[a] {
			c.cover(rule, standard.NotApplicable, "the loads do not bend the member about this axis")
			continue
		}
		worst, at := 0.0, -1
		for k := range c.combs {
			if v := c.combs[k].shear[a]; !(v <= worst) {
				worst, at = v, k
			}
		}
		if at < 0 || worst*c.f.Member.Height <= c.tiny[a] {
			c.cover(rule, standard.NotApplicable, "the moments come without shear force")
			continue
		}
		c.group(rule)
		if math.IsNaN(c.s.At(x.av)) {
			c.undecidedIn(rule, clause, unit.Force, "the shear area of a stated section is not known: check 6.2.6 and 6.2.8 by hand")
			continue
		}
		if c.slenderWeb(a) {
			c.undecidedIn(rule, clause, unit.Force, "shear buckling: the web is more slender than 72 epsilon, check it to EN 1993-1-5 section 5 by hand")
			continue
		}
		c.do(x.doVpl)
		c.take(x.v, worst, c.f.Combinations[at].Name)
		u := c.do(x.doUv)
		c.high[a] = !(u <= 0.5)
		c.add(rule, clause, at, worst, c.s.At(x.vpl), unit.Force, u, c.f.Limit())
	}
}

// slenderWeb tells whether the plates that carry the shear force can buckle.
func (c *calc) slenderWeb(a int) bool {
	sec := c.f.Member.Section
	switch {
	case sec.Shape.Kind == section.ISection && !sec.Turned && a == 0:
		c.do(doHwtI)
	case sec.Shape.Kind == section.Tube && a == 0:
		c.do(doHwtH)
	case sec.Shape.Kind == section.Tube:
		c.do(doHwtB)
	case sec.Shape.Kind == section.Channel:
		// along the web, whichever axis that is
		return (sec.Shape.Depth-2*sec.Shape.Flange)/sec.Shape.Web > 72*c.s.At(symEps)
	default:
		return false
	}
	return !(c.s.At(symHwt) <= c.do(doHwt0))
}

// at gives what a combination does at a height of an interval; the axial force
// is that of the interval that is worse.
func (c *calc) spotAt(k int, iv interval, z, n float64) spot {
	s := spot{comb: k, z: z, n: n}
	for a := range s.m {
		if p := c.combs[k].pieces[a]; len(p) > 0 {
			q := p[iv.piece[a]]
			s.m[a], s.v[a] = q.Moment(z-q.From), q.Shear(z-q.From)
		}
	}
	return s
}

// spots calls f for every place of a combination where a check of the section
// can have its extreme: the ends of each part without loads, the tops of its
// moments, and where line loads act and more than one effect counts, points in
// between.
func (c *calc) spots(k int, both bool, f func(s spot)) {
	b := &c.combs[k]
	for _, iv := range c.intervals {
		bottom, top := c.f.Between(k, iv.from, iv.to)
		n := bottom
		if math.Abs(top) > math.Abs(bottom) {
			n = top
		}
		f(c.spotAt(k, iv, iv.from, n))
		f(c.spotAt(k, iv, iv.to, n))
		lines := false
		for a := range b.pieces {
			if len(b.pieces[a]) == 0 {
				continue
			}
			p := b.pieces[a][iv.piece[a]]
			if p.Line == 0 {
				continue
			}
			lines = true
			if z := p.From - p.V/p.Line; z > iv.from && z < iv.to {
				f(c.spotAt(k, iv, z, n))
			}
		}
		if lines && (both && b.bends[0] && b.bends[1] || c.high[0] || c.high[1]) {
			const parts = 8
			for i := 1; i < parts; i++ {
				f(c.spotAt(k, iv, iv.from+(iv.to-iv.from)*float64(i)/parts, n))
			}
		}
	}
}

// bendingChecks is 6.2.5 with 6.2.8 about both axes.
func (c *calc) bendingChecks() {
	for a, x := range moments {
		rule, clause := "section-bending-"+x.word, "EN 1993-1-1 6.2.5"
		if !c.f.Bends[a] {
			c.cover(rule, standard.NotApplicable, "the loads do not bend the member about this axis")
			continue
		}
		c.group(rule)
		best, where := math.Inf(-1), spot{comb: -1}
		c.silently(func() {
			for k := range c.combs {
				if !c.combs[k].bends[a] {
					continue
				}
				c.modulus(a, c.combs[k].class)
				c.do(x.doMc)
				try := func(s spot) {
					if u := c.bendingAt(a, s); u > best || math.IsNaN(u) && !math.IsNaN(best) {
						best, where = u, s
					}
				}
				if c.high[a] {
					c.spots(k, false, try)
				} else {
					s := spot{comb: k}
					s.m[a] = c.combs[k].peak[a]
					try(s)
				}
			}
		})
		if where.comb < 0 {
			c.cover(rule, standard.NotApplicable, "no combination bends the member about this axis")
			continue
		}
		c.underCombination(where.comb)
		c.modulus(a, c.combs[where.comb].class)
		c.do(x.doMc)
		u := c.bendingAt(a, where)
		c.add(rule, clause, where.comb, c.s.At(x.ms), c.s.At(x.mv), unit.Moment, u, c.f.Limit())
		if math.IsNaN(u) {
			c.out.Checks[len(c.out.Checks)-1].Why = "the section modulus for its class is not known"
		}
	}
}

// bendingAt is 6.2.5 at a place; M_c_Rd has been found.
func (c *calc) bendingAt(a int, s spot) float64 {
	x := moments[a]
	source := ""
	if c.s.Recorded() {
		source = c.f.Combinations[s.comb].Name
	}
	c.beside(a, s)
	c.take(x.ms, math.Abs(s.m[a]), source)
	return c.do(x.doU)
}

// beside is 6.2.8: the bending resistance beside the shear force.
func (c *calc) beside(a int, s spot) bool {
	x := moments[a]
	if c.high[a] {
		source := ""
		if c.s.Recorded() {
			source = c.f.Combinations[s.comb].Name
		}
		c.take(x.vs, math.Abs(s.v[a]), source)
		if vpl := c.do(x.doVpl); !(math.Abs(s.v[a]) <= 0.5*vpl) {
			c.do(x.doRho)
			sec := c.f.Member.Section
			if a == 0 && sec.Shape.Kind == section.ISection && !sec.Turned && c.combs[s.comb].class <= 2 {
				c.do(x.doMvWeb)
			} else {
				c.do(x.doMv)
			}
			return true
		}
	}
	c.do(x.doMvFull)
	return false
}
