package aisc360

import (
	"math"
	"sync"

	"kern/checker/derivation"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Pairs of angles back to back, E6. Buckling about the axis of symmetry shears the
// connectors, which makes the pair more slender than one piece.
var (
	symApart = sym("a", unit.Length, "distance between connectors")
	symRi    = sym("r_i", unit.Length, "least radius of gyration of one angle")
	symComp  = sym("a_over_r_i", unit.None, "slenderness of one angle between connectors")
	symCompR = sym("limit_a_over_r_i", unit.None, "limit of the slenderness of one angle")
	symUComp = sym("u_a", unit.None, "utilisation, spacing of connectors")

	doComp  = formula(symComp, "a / r_i", "E6.1")
	doCompR = formula(symCompR, "0.75 * max(slenderness_x, slenderness_y)", "E6.2(a)")
	doUComp = formula(symUComp, "a_over_r_i / limit_a_over_r_i", "E6.2(a)")

	shapePair      = shape{[]*element{leg1.with(nil, legLimit, "3"), leg2.with(nil, legLimit, "3")}, doAreaPair}
	shapePairClose = shape{[]*element{leg1.with(nil, legLimit, "3"), leg2.with(nil, outstand, "1")}, doAreaPair}
	doAreaPair     = formula(symAe, "A_g - 2 * (b_1 - b_1_e) * t - 2 * (b_2 - b_2_e) * t", ofParts)

	apart = [2]*pairAxis{newPairAxis("x"), newPairAxis("y")}
)

// pairAxis is the slenderness of a pair about one axis.
type pairAxis struct {
	doOne, doSnug, doClose, doFirm *derivation.Formula
}

func newPairAxis(letter string) *pairAxis {
	id := sym("slenderness_o_"+letter, unit.None, "slenderness of the pair as one piece, "+letter+"–"+letter)
	slender := axes[map[string]int{"x": 0, "y": 1}[letter]].slender
	f := func(id derivation.ID, text, clause string) *derivation.Formula {
		return formula(id, replaceAxis(text, letter), clause)
	}
	return &pairAxis{
		doOne:   f(id, "L_c_? / r_?", "E6.1"),
		doSnug:  f(slender, "sqrt(slenderness_o_?^2 + a_over_r_i^2)", "E6.1(a) (E6-1), snug-tight bolts"),
		doClose: f(slender, "slenderness_o_?", "E6.1(b)(1) (E6-2a), a/r_i ≤ 40"),
		doFirm:  f(slender, "sqrt(slenderness_o_?^2 + (0.50 * a_over_r_i)^2)", "E6.1(b)(2) (E6-2b), K_i = 0.50 for angles"),
	}
}

// closeUp is the greatest a/r_i at which firm connectors make one piece of a pair.
const closeUp = 40

// pairAxisOf is the axis of symmetry of a pair (0 x–x, 1 y–y), -1 for other
// sections.
func (c *calc) pairAxisOf() int {
	sec := c.f.Member.Section
	switch {
	case sec.Shape.Kind != section.DoubleAngle:
		return -1
	case sec.Turned:
		return 0
	}
	return 1
}

// connectorsNotStated says what a pair lacks, with an example.
func (c *calc) connectorsNotStated() string {
	every := "600 mm"
	if c.f.Env.Basis.Show.American() {
		every = "24 in"
	}
	return "how the two angles are connected is not stated: connectors every " + every + " welded (or pretensioned, or snug)"
}

// pair takes what the two angles are, and refuses a pair whose connectors are not
// known.
func (c *calc) pair() {
	m := c.f.Member
	if m.Section.Shape.Kind != section.DoubleAngle {
		return
	}
	if m.Connectors.Every == 0 {
		if c.why == "" {
			c.why = c.connectorsNotStated()
		}
		return
	}
	c.take(symApart, standard.Known(m.Connectors.Every), m.Connectors.Kind)
	c.take(symRi, leastRadius(m.Section.Shape), "one angle")
	c.do(doComp)
	c.assume("the ends of the pair are welded or have pretensioned bolts (E6.1); connectors every %s, %s", c.f.Env.Basis.Show.Short(m.Connectors.Every, unit.Length, 4), m.Connectors.Kind)
}

// leastRadius is the least radius of gyration of one angle of a pair, m.
func leastRadius(pair section.Shape) float64 {
	one := pair
	one.Kind, one.Gap = section.Angle, 0
	if r, ok := radii.Load(one); ok {
		return r.(float64)
	}
	r := math.NaN()
	if p, err := section.Compute(one); err == nil {
		r = p.RMinor
	}
	radii.Store(one, r)
	return r
}

// radii are the results of leastRadius, which never change.
var radii sync.Map

// pairSlenderness computes the slenderness about an axis that shears the
// connectors.
func (c *calc) pairSlenderness(a int) {
	p := apart[a]
	c.do(p.doOne)
	switch {
	case c.f.Member.Connectors.Snug():
		c.do(p.doSnug)
	case c.s.At(symComp) <= closeUp:
		c.do(p.doClose)
	default:
		c.do(p.doFirm)
	}
}

// spacing is E6.2(a): one angle between connectors is not much more slender than
// the pair.
func (c *calc) spacing() {
	const rule, clause = "connector-spacing", "ANSI/AISC 360 E6.2(a)"
	if c.f.Member.Section.Shape.Kind != section.DoubleAngle {
		return
	}
	c.group(rule)
	switch {
	case !c.pressed:
		c.cover(rule, standard.NotApplicable, notPressed)
		return
	case c.f.Member.Connectors.Every == 0:
		c.undecided(rule, clause, c.connectorsNotStated())
		return
	case !c.f.Stands[0]:
		c.undecided(rule, clause, c.f.NotHeld(0))
		return
	case !c.f.Stands[1]:
		c.undecided(rule, clause, c.f.NotHeld(1))
		return
	}
	c.elasticOf(0)
	c.elasticOf(1)
	c.do(doCompR)
	u := c.do(doUComp)
	c.add(rule, clause, -1, c.s.At(symComp), c.s.At(symCompR), unit.None, u, 1)
}
