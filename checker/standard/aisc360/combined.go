package aisc360

import (
	"math"
	"strings"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Combined forces, H1 and H2.
var (
	symRatio = sym("P_ratio", unit.None, "P_r over P_c, of the mode of buckling in which it is greatest")
	symUH    = sym("u_PM", unit.None, "utilisation, combined forces")

	doRatio     = formula(symRatio, "max(P_r_x / P_c_x, P_r_y / P_c_y)", "H1.1")
	doRatioT    = formula(symRatio, "max(P_r_x / P_c_x, P_r_y / P_c_y, P_r_T / P_c_T)", "H1.1")
	doRatioPull = formula(symRatio, "P_r_t / P_c_t", "H1.2")
	doOver      = formula(symUH, "P_ratio", "App. 8.1.2: alpha P_r reaches P_e1, where no moment can be carried")

	doHigh = interactions("P_ratio + 8 / 9 * (?)", "H1.1(a) (H1-1a), P_r/P_c ≥ 0.2")
	doLow  = interactions("P_ratio / 2 + (?)", "H1.1(b) (H1-1b), P_r/P_c < 0.2")
	doSum  = interactions("P_ratio + (?)", "H2 (H2-1), all terms added, on the safe side")
)

// interactions are an equation with moments about x–x, about y–y and about both.
func interactions(text, clause string) [3]*derivation.Formula {
	var out [3]*derivation.Formula
	for i, m := range []string{"M_r_x / M_c_x", "M_r_y / M_c_y", "M_r_x / M_c_x + M_r_y / M_c_y"} {
		out[i] = formula(symUH, strings.ReplaceAll(text, "?", m), clause)
	}
	return out
}

// strip is a stretch about x–x and one about y–y that meet, or a segment of
// lateral-torsional buckling with one of each that meet it: H1 is checked for each.
type strip struct {
	of  [2]int // the stretches
	seg int    // -1 when there is none
}

func (c *calc) strips() []strip {
	var out []strip
	eps := 1e-9 * c.f.Member.Height
	for i, x := range c.f.Stretches[0] {
		for j, y := range c.f.Stretches[1] {
			meet := func(from, to float64, s action.Stretch) bool {
				return min(s.To, to, c.f.To)-max(s.From, from, c.f.From) > eps
			}
			if len(c.bend.lat.segments) == 0 && meet(x.From, x.To, y) {
				out = append(out, strip{[2]int{i, j}, -1})
			}
			// the least P_c in the whole of a segment goes with the M_c of it (H1.1, E1)
			for s, g := range c.bend.lat.segments {
				if meet(g.from, g.to, x) && meet(g.from, g.to, y) {
					out = append(out, strip{[2]int{i, j}, s})
				}
			}
		}
	}
	return out
}

// interaction is H1, and H2 for single angles, for every strip and combination.
func (c *calc) interaction() {
	const rule = "member-interaction"
	clause := bendingClauses[rule].clause
	angle := c.f.Member.Section.Shape.Kind == section.Angle
	if angle {
		clause = "ANSI/AISC 360 H2"
	}
	refuse := func(why string) { c.undecidedIn(rule, clause, unit.None, why) }
	bent, pressed, pulled := false, false, false
	for k := range c.bend.combs {
		b := &c.bend.combs[k]
		if b.bends[0] || b.bends[1] {
			bent = true
			pressed = pressed || !(c.f.Compression(k, 0, c.f.Member.Height) <= 0)
			pulled = pulled || !(c.f.Tension(k) <= 0)
		}
	}
	switch {
	case !bent:
		c.cover(rule, standard.NotApplicable, "no combination bends the member")
		return
	case !pressed && !pulled && !(c.f.Bends[0] && c.f.Bends[1]):
		c.cover(rule, standard.NotApplicable, "neither axial force nor bending about a second axis")
		return
	case !c.f.Stands[0]:
		refuse(c.f.NotHeld(0))
		return
	case !c.f.Stands[1]:
		refuse(c.f.NotHeld(1))
		return
	case c.f.Bends[0] && c.bend.why[0] != "":
		refuse(c.bend.why[0])
		return
	case c.f.Bends[1] && c.bend.why[1] != "":
		refuse(c.bend.why[1])
		return
	case c.bend.lat.prone && c.bend.lat.unknown:
		refuse(c.bend.lat.why)
		return
	case pressed && c.swaying() != "":
		refuse("an end can move sideways about " + c.swaying() + ": state B_2 of the story (App. 8.1.3) in the basis, B_2 = … because \"…\"")
		return
	}
	c.group(rule)
	strips := c.strips()
	best, comb, at, pulling := math.Inf(-1), -1, 0, false
	c.silently(func() {
		c.tensionStrength()
		for i, s := range strips {
			c.stripGiven(s, false)
			for k := range c.bend.combs {
				b := &c.bend.combs[k]
				if !b.bends[0] && !b.bends[1] {
					continue
				}
				try := func(pull bool) {
					if u := c.interactionAt(s, k, pull); u > best || math.IsNaN(u) && !math.IsNaN(best) {
						best, comb, at, pulling = u, k, i, pull
					}
				}
				t := c.f.Tension(k)
				if !(t > 0) || c.pressure(s, k) > 0 {
					try(false)
				}
				if t > 0 {
					try(true)
				}
			}
		}
	})
	if comb < 0 || best < 0 {
		c.cover(rule, standard.NotApplicable, "no combination bends the member")
		return
	}
	if pulling {
		c.tensionStrength()
	}
	c.stripGiven(strips[at], pulling)
	u := c.interactionAt(strips[at], comb, pulling)
	c.add(rule, clause, comb, u, 1, unit.None, u, c.f.Limit())
	if math.IsNaN(u) {
		c.out.Checks[len(c.out.Checks)-1].Why = "a value that chapter H needs is missing or out of range"
	}
}

// pressure is the greatest compression in the stretches of a strip.
func (c *calc) pressure(s strip, k int) float64 {
	most := 0.0
	for a, i := range s.of {
		g := c.f.Stretches[a][i]
		most = max(most, c.f.Compression(k, g.From, g.To))
	}
	return most
}

// stripGiven is what a strip has whatever the combination.
func (c *calc) stripGiven(s strip, pull bool) {
	if !pull {
		for a, i := range s.of {
			c.flexuralStrength(axes[a], a, c.f.Stretches[a][i])
		}
		mode, _ := c.torsionRule()
		rule := "flexural-torsional-buckling"
		if mode == "torsional-buckling" {
			rule = "torsional-buckling"
		}
		if c.bend.twists = mode != ""; c.bend.twists {
			c.torsionalStrength(rule)
		}
	}
	if s.seg >= 0 {
		c.segmentGiven(c.bend.lat.segments[s.seg])
	}
}

// interactionAt gives the left side of H1-1 or H2-1 for a combination, -1 where
// hardly anything bends the strip.
func (c *calc) interactionAt(s strip, k int, pull bool) float64 {
	b, l := &c.bend.combs[k], &c.bend.lat
	var stretch [2]action.Stretch
	var d [2]action.Diagram
	var peak [2]float64
	for a, i := range s.of {
		stretch[a] = c.f.Stretches[a][i]
		if !b.bends[a] {
			continue
		}
		d[a] = action.DiagramOf(b.pieces[a], stretch[a].From, stretch[a].To, c.bend.tiny[a])
		peak[a] = d[a].Peak
		if a == l.axis && s.seg >= 0 {
			g := l.segments[s.seg]
			peak[a] = action.DiagramOf(b.pieces[a], max(g.from, stretch[a].From), min(g.to, stretch[a].To), c.bend.tiny[a]).Peak
		}
	}
	// compression spreads the moment of a stretch over all of its segments
	with := [2]bool{peak[0] > c.bend.tiny[0], peak[1] > c.bend.tiny[1]}
	if !pull {
		with = [2]bool{d[0].Peak > c.bend.tiny[0], d[1].Peak > c.bend.tiny[1]}
	}
	if !with[0] && !with[1] {
		return -1
	}
	source := c.combination(k)
	tension := 0.0
	var ratio float64
	if pull {
		tension = c.f.Tension(k)
		c.take(symPrt, tension, source)
		c.take(axes[0].pr, 0, "tension")
		c.take(axes[1].pr, 0, "tension")
		ratio = c.do(doRatioPull)
	} else {
		for a, x := range axes {
			c.take(x.pr, max(0, c.f.Compression(k, stretch[a].From, stretch[a].To)), source)
		}
		if c.bend.twists {
			c.take(symPrT, max(0, c.f.Compression(k, 0, c.f.Member.Height)), source)
			ratio = c.do(doRatioT)
		} else {
			ratio = c.do(doRatio)
		}
	}
	for a, x := range flexures {
		if !with[a] {
			continue
		}
		if !c.amplified(a, k, stretch[a], d[a], peak[a]) {
			if ratio > 1 {
				return c.do(doOver)
			}
			return math.NaN()
		}
		if a == l.axis && s.seg >= 0 {
			g := l.segments[s.seg]
			c.factorCb(k, g, action.DiagramOf(b.pieces[a], g.from, g.to, c.bend.tiny[a]).Peak, tension)
			l.strength(c)
			c.do(x.doMnLT)
		} else {
			c.do(x.doMnS)
		}
		c.available(x.whole)
	}
	form := doLow
	switch {
	case c.f.Member.Section.Shape.Kind == section.Angle:
		form = doSum
	case ratio >= 0.2:
		form = doHigh
	}
	switch {
	case with[0] && with[1]:
		return c.do(form[2])
	case with[0]:
		return c.do(form[0])
	}
	return c.do(form[1])
}
