package elastic

import (
	"fmt"
	"math"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang/unit"
)

// yield finds the greatest stress over the height and the combinations.
func (c *calc) yield() {
	const rule = "first-yield"
	m := c.f.Member
	bends := c.f.Bends
	c.s.Recording(nil)
	fail := func(why string) {
		c.out.Checks = append(c.out.Checks, standard.Check{Rule: rule, Clause: "first yield", Combination: -1, Dim: unit.Stress, Utilisation: math.NaN(), Demand: math.NaN(), Capacity: math.NaN(), Why: why})
		c.cover(rule, standard.NotCovered, why)
	}
	if math.IsNaN(c.s.At(symFy)) {
		fail(standard.NoStrength(m))
		return
	}
	for a, b := range bends {
		if b && !c.f.Stands[a] {
			fail(c.f.NotHeld(a))
			return
		}
		if b && c.f.Exact[a] && len(c.f.Lifts()) > 1 {
			fail("moments of second order of a member of several sections are not covered: say critical effective lengths")
			return
		}
		if b && c.f.Exact[a] && (m.Imported != nil || m.Nominal) {
			fail("moments of second order need the loads one by one: say critical effective lengths")
			return
		}
	}
	c.s.Take(axes[0].w, standard.Known(m.Section.WelMajor), "")
	c.s.Take(axes[1].w, standard.Known(m.Section.WelMinor), "")
	best, over := point{u: math.Inf(-1)}, buckled{}
	var pieces [2][]action.Piece
	var curves [2][]action.Curve
	for k := range c.f.Combinations {
		amplify := [2]float64{1, 1}
		for a := range axes {
			var ok bool
			if pieces[a], ok = c.f.Bending(a, c.f.Combinations[k].Factors, pieces[a]); !ok {
				fail(c.f.NotHeld(a))
				return
			}
			if bends[a] {
				if amplify[a] = c.amplify(a, k); c.f.Exact[a] && !math.IsNaN(amplify[a]) {
					if curves[a], ok = c.f.SecondOrder(a, k, c.s.At(symNy)); !ok {
						amplify[a] = math.NaN()
					}
				}
				if r := c.s.At(axes[a].ratio); math.IsNaN(amplify[a]) && r >= 1 && r > over.ratio && !math.IsInf(r, 0) {
					over = buckled{r, a, k}
				}
			}
		}
		c.s.Take(axes[0].a, amplify[0], "")
		c.s.Take(axes[1].a, amplify[1], "")
		heights := c.heights(pieces)
		for _, side := range curves {
			for _, curve := range side {
				heights = append(heights, curve.Peaks()...)
			}
		}
		for _, z := range heights {
			p := point{combination: k, z: z, n: math.Abs(c.f.At(k, z))}
			p.n = max(p.n, math.Abs(c.f.Compression(k, max(c.f.From, z-1e-6*m.Height), min(c.f.To, z+1e-6*m.Height))))
			for a := range axes {
				p.m[a], p.peak[a] = c.momentAt(pieces[a], z), c.peakAt(a, pieces[a], z)
				p.second[a] = math.NaN()
				if !math.IsNaN(amplify[a]) {
					p.second[a] = curvesAt(curves[a], z)
				}
			}
			if p.u = c.stress(p); p.u > best.u || math.IsNaN(p.u) {
				best = p
			}
		}
	}
	c.s.Recording(c.record)
	group(c.record, rule)
	if over.ratio >= 1 {
		c.buckles(rule, over)
		return
	}
	for a, b := range bends {
		if b {
			c.s.Take(axes[a].w, standard.Known([]float64{m.Section.WelMajor, m.Section.WelMinor}[a]), m.Section.Title())
			c.amplify(a, best.combination)
		}
	}
	u := c.stress(best)
	check := standard.Check{Rule: rule, Clause: "first yield", Combination: best.combination, Demand: c.s.At(symS), Capacity: c.s.At(symFy), Dim: unit.Stress, Utilisation: u,
		Verdict: standard.Utilisation(u, c.f.Limit())}
	if check.Verdict == standard.Undecided {
		check.Why = "a value that the check needs is missing"
		if (bends[0] || bends[1]) && math.IsNaN(c.s.At(axes[0].a)+c.s.At(axes[1].a)) {
		}
	}
	c.out.Checks = append(c.out.Checks, check)
	c.cover(rule, standard.Checked, "")
}

// buckled is a combination whose factored axial force reaches the critical load.
type buckled struct {
	ratio             float64
	axis, combination int
}

// buckles is the check of first yield for a member that buckles before it
// yields: no stress can be given, and it fails all the same.
func (c *calc) buckles(rule string, b buckled) {
	x := &axes[b.axis]
	c.amplify(b.axis, b.combination)
	c.s.Do(x.doBuckled)
	c.out.Checks = append(c.out.Checks, standard.Check{Rule: rule, Clause: "first yield", Combination: b.combination, Demand: c.s.At(symNy) * c.s.At(x.n), Capacity: c.s.At(x.pcr), Dim: unit.Force,
		Utilisation: b.ratio, Verdict: standard.Fails, Why: "the axial force times the factor of safety reaches the critical load"})
	c.cover(rule, standard.Checked, "")
}

type point struct {
	combination int
	z, n, u     float64
	m, peak     [2]float64
	second      [2]float64 // moments of second order, where critical loads are those of the whole member
}

// stress computes the utilisation at a point.
func (c *calc) stress(p point) float64 {
	source := ""
	if c.s.Recorded() {
		source = fmt.Sprintf("%s, at %s", c.f.Combinations[p.combination].Name, c.f.Place(p.z))
	}
	c.s.Take(symNs, p.n, source)
	formula := doAxial
	switch c.f.Bends {
	case [2]bool{true, false}:
		formula = doMajor
	case [2]bool{false, true}:
		formula = doMinor
	case [2]bool{true, true}:
		formula = doBoth
	}
	second := c.f.Bends[0] && c.f.Exact[0] || c.f.Bends[1] && c.f.Exact[1]
	if second {
		formula = map[*derivation.Formula]*derivation.Formula{doMajor: doMajor2, doMinor: doMinor2, doBoth: doBoth2}[formula]
	}
	for a, b := range c.f.Bends {
		if b && c.f.Exact[a] {
			c.s.Take(axes[a].m2, p.second[a], source+second2)
			continue
		}
		if b {
			c.s.Take(axes[a].m, p.m[a], source)
			c.s.Take(axes[a].peak, p.peak[a], source)
		}
		if b && second {
			c.s.Do(axes[a].doSecond)
		}
	}
	c.s.Do(formula)
	return c.s.Do(doUy)
}

const second2 = ", stiffness matrix with exact stability functions"

// curvesAt is the size of the moment of second order at a height: the larger of the
// two sides where it jumps.
func curvesAt(curves []action.Curve, z float64) float64 {
	m := 0.0
	for _, c := range curves {
		if z >= c.From-1e-12 && z <= c.To+1e-12 {
			m = max(m, math.Abs(c.Moment(z-c.From)))
		}
	}
	return m
}

// amplify computes the amplification of the moments about an axis: NaN when the
// factored axial force reaches the critical load.
func (c *calc) amplify(a, combination int) float64 {
	x := &axes[a]
	worst, at, n := math.Inf(-1), -1, 0.0
	recording := c.s.Recorded()
	c.s.Recording(nil)
	stretches := c.f.Stretches[a]
	if c.f.Exact[a] {
		stretches = []action.Stretch{c.f.Whole(a)}
	}
	for i, s := range stretches {
		c.stretch(a, s, combination)
		c.s.Take(x.n, c.f.Compression(combination, s.From, s.To), "")
		if r := c.s.Do(x.doRatio); r > worst || math.IsNaN(r) {
			worst, at, n = r, i, c.s.At(x.n)
		}
	}
	if recording {
		c.s.Recording(c.record)
	}
	if worst <= 0 {
		return c.s.Do(x.tension)
	}
	s := stretches[at]
	c.stretch(a, s, combination)
	source := ""
	if recording {
		source = c.f.Combinations[combination].Name
	}
	c.s.Take(x.n, n, source)
	if r := c.s.Do(x.doRatio); !(r < 1) {
		return c.s.Take(x.a, math.NaN(), "the factored axial force reaches the critical load")
	}
	switch {
	case c.f.Exact[a]: // the moments are those of second order
		return c.s.Take(x.a, 1, "in the moment of second order")
	case c.f.Env.Basis.Simple:
		return c.s.Do(x.sine)
	case c.f.Pushed[a] && !c.ends(a) && c.pushedOnce(a):
		return c.s.Do(x.sway)
	}
	return c.s.Do(x.secant)
}

// ends tells whether moments about the axis come from anything but loads across
// the member.
func (c *calc) ends(a int) bool {
	for _, l := range c.f.Member.Loads {
		if l.Offset[a] != 0 || l.Kind == model.EndMoment && int(l.Axis) == a {
			return true
		}
	}
	return false
}

// pushedOnce tells whether the loads across the member make a moment diagram
// with one peak, like that of a single load: line loads over the whole height,
// or one load alone. Two loads near the ends make a moment that is even between
// them, and a load near a guided end does so alone: these grow as fast as equal
// end moments. So can the remainder of loads that act against each other.
func (c *calc) pushedOnce(a int) bool {
	m := c.f.Member
	loads, full := 0, true
	for _, l := range m.Loads {
		if l.Kind != model.PointLoad && l.Kind != model.LineLoad || int(l.Axis) != a || l.Value == 0 {
			continue
		}
		loads++
		full = full && l.Kind == model.LineLoad && l.At <= 1e-9*m.Height && l.To >= m.Height*(1-1e-9)
	}
	guided := m.Base[a] == action.Guided || m.Top[a] == action.Guided
	return full || loads == 1 && !guided
}

// heights are the places where the stress can be greatest.
func (c *calc) heights(pieces [2][]action.Piece) []float64 {
	z := append([]float64(nil), c.f.Heights()...)
	for _, side := range pieces {
		for _, p := range side {
			p, ok := c.f.Cut(p)
			if !ok {
				continue
			}
			z = append(z, p.From, p.To)
			if _, h := p.Largest(); h > p.From && h < p.To {
				z = append(z, h)
			}
		}
	}
	return z
}

// momentAt is the size of the moment at a height: the larger of the two sides
// where it jumps.
func (c *calc) momentAt(pieces []action.Piece, z float64) float64 {
	m := 0.0
	for _, p := range pieces {
		p, ok := c.f.Cut(p)
		if !ok {
			continue
		}
		if z >= p.From-1e-12 && z <= p.To+1e-12 {
			m = max(m, math.Abs(p.Moment(z-p.From)))
		}
	}
	return m
}

// peakAt is the size of the greatest moment in the stretch that a height lies
// in, of both stretches at a hold.
func (c *calc) peakAt(a int, pieces []action.Piece, z float64) float64 {
	hair := 1e-9 * c.f.Member.Height
	most := 0.0
	for _, s := range c.f.Stretches[a] {
		if z < s.From-hair || z > s.To+hair {
			continue
		}
		for _, p := range pieces {
			if p.From >= s.From-hair && p.To <= s.To+hair {
				m, _ := p.Largest()
				most = max(most, math.Abs(m))
			}
		}
	}
	return most
}
