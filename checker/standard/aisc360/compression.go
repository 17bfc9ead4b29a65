package aisc360

import (
	"fmt"
	"math"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/standard"
	"kern/lang/unit"
)

// axis holds the symbols and formulas of flexural buckling about one axis.
type axis struct {
	letter, word                        string
	i, r, l, k, lc, slender, fe, pe, fn derivation.ID
	pn, pr, u, limit, us                derivation.ID
	strength                            *available
	doR, doLc, doSlender, doFe, doPe    *derivation.Formula
	doFn, doFnElastic, doFnOf           *derivation.Formula
	doPn, doPnEffective, doU, doLimitU  *derivation.Formula
}

var axes = [2]*axis{newAxis("x", "major"), newAxis("y", "minor")}

func newAxis(letter, word string) *axis {
	x := &axis{letter: letter, word: word}
	s := func(name string, dim unit.Dim, what string) derivation.ID {
		return sym(name+"_"+letter, dim, what+", "+letter+"–"+letter)
	}
	x.i = s("I", unit.Length4, "moment of inertia")
	x.r = s("r", unit.Length, "radius of gyration")
	x.l = s("L", unit.Length, "laterally unbraced length")
	x.k = s("K", unit.None, "effective length factor")
	x.lc = s("L_c", unit.Length, "effective length")
	x.slender = s("slenderness", unit.None, "effective slenderness ratio L_c/r")
	x.fe = s("F_e", unit.Stress, "elastic buckling stress")
	x.pe = s("P_e", unit.Force, "elastic buckling load")
	x.fn = s("F_n", unit.Stress, "nominal stress, flexural buckling")
	x.pn = s("P_n", unit.Force, "nominal compressive strength, flexural buckling")
	x.pr = s("P_r", unit.Force, "required compressive strength in the stretch")
	x.u = s("u", unit.None, "utilisation, flexural buckling")
	x.limit = s("limit_slenderness", unit.None, "limit of slenderness")
	x.us = s("u_slenderness", unit.None, "utilisation, slenderness")
	x.strength = newAvailable(x.pn, "P_c_"+letter, "phi_c", "Omega_c", "E1")
	f := func(id derivation.ID, text, clause string) *derivation.Formula {
		return formula(id, replaceAxis(text, letter), clause)
	}
	x.doR = f(x.r, "sqrt(I_? / A_g)", "definition")
	x.doLc = f(x.lc, "K_? * L_?", "E2")
	x.doSlender = f(x.slender, "L_c_? / r_?", "E2")
	x.doFe = f(x.fe, "pi^2 * E / slenderness_?^2", "E3 (E3-4)")
	x.doPe = f(x.pe, "F_e_? * A_g", "E3 (E3-4), as a load")
	x.doFn = f(x.fn, "0.658^(F_y / F_e_?) * F_y", "E3(a) (E3-2)")
	x.doFnElastic = f(x.fn, "0.877 * F_e_?", "E3(b) (E3-3)")
	x.doFnOf = f(symFn, "F_n_?", "E7")
	x.doPn = f(x.pn, "F_n_? * A_g", "E3 (E3-1)")
	x.doPnEffective = f(x.pn, "F_n_? * A_e", "E7 (E7-1)")
	x.doU = f(x.u, "P_r_? / P_c_?", "B3")
	x.doLimitU = f(x.us, "slenderness_? / limit_slenderness_?", "demand / limit")
	return x
}

// The member's strength in compression: the least of all modes of buckling.
var (
	symPr       = sym("P_r", unit.Force, "required compressive strength, the greatest in the member")
	symFe       = sym("F_e", unit.Stress, "elastic buckling stress of the mode that governs")
	symPn       = sym("P_n", unit.Force, "nominal compressive strength, the least of all modes of buckling")
	compressive = newAvailable(symPn, "P_c", "phi_c", "Omega_c", "E1")
	inelastic   = 2.25 // greatest F_y/F_e of inelastic buckling, E3(a)
	notPressed  = "no combination compresses the member"
)

// compression is chapter E.
func (c *calc) compression() {
	c.group("")
	c.factor(factorC)
	if !c.byLeg() {
		c.flexural(0)
		c.flexural(1)
	}
	c.torsional()
	c.spacing()
	c.group("")
	source := ""
	if c.s.Recorded() {
		source = "E1, the least: " + c.governing.rule
	}
	c.take(symFe, c.governing.fe, source)
	c.take(symFn, c.governing.fn, source)
	c.take(symPn, c.governing.pn, source)
	c.available(compressive)
	c.advice()
}

// flexural is E3 about one axis, with E7 for slender elements: every stretch
// under every combination.
func (c *calc) flexural(a int) {
	x := axes[a]
	rule, clause := "flexural-buckling-"+x.word, "ANSI/AISC 360 E3"
	if c.slender {
		clause = "ANSI/AISC 360 E7"
	}
	c.group(rule)
	switch {
	case !c.f.Stands[a]:
		c.least(unknown(rule))
		c.undecided(rule, clause, c.f.NotHeld(a))
		return
	case c.why != "":
		c.least(unknown(rule))
		if c.pressed {
			c.undecided(rule, clause, c.why)
		} else {
			c.cover(rule, standard.NotApplicable, notPressed)
		}
		return
	}
	governing, combination, best := 0, -1, math.Inf(-1)
	c.silently(func() {
		for i, s := range c.f.Stretches[a] {
			n, k := c.worst(s.From, s.To)
			if n <= 0 {
				if combination < 0 && s.Effective() > c.f.Stretches[a][governing].Effective() {
					governing = i
				}
				continue
			}
			c.flexuralStrength(x, a, s)
			c.take(x.pr, n, "")
			if u := c.do(x.doU); u > best || combination < 0 {
				best, governing, combination = u, i, k
			}
		}
	})
	s := c.f.Stretches[a][governing]
	c.flexuralStrength(x, a, s)
	c.least(c.of(x, rule))
	if combination < 0 {
		c.cover(rule, standard.NotApplicable, notPressed)
		return
	}
	n := c.f.Compression(combination, s.From, s.To)
	c.take(x.pr, n, c.combination(combination))
	u := c.do(x.doU)
	c.add(rule, clause, combination, n, c.s.At(x.strength.c), unit.Force, u, c.f.Limit())
}

// mode is a mode of buckling.
type mode struct {
	rule       string
	pn, fe, fn float64
}

// least keeps the mode with the least nominal strength; one that is not known makes
// it unknown for good.
func (c *calc) least(m mode) {
	g := &c.governing
	switch {
	case g.rule != "" && math.IsNaN(g.pn):
	case g.rule == "" || !(m.pn >= g.pn):
		*g = m
	}
}

// unknown is a mode of buckling whose strength is not known.
func unknown(rule string) mode {
	nan := math.NaN()
	return mode{rule, nan, nan, nan}
}

// of is the mode of flexural buckling that was computed last about an axis.
func (c *calc) of(x *axis, rule string) mode {
	return mode{rule, c.s.At(x.pn), c.s.At(x.fe), c.s.At(x.fn)}
}

// elastic computes the elastic buckling stress of a stretch.
func (c *calc) elasticStress(a int, s action.Stretch) float64 {
	x := axes[a]
	source := ""
	if c.s.Recorded() {
		source = fmt.Sprintf("%s, %s–%s", c.f.StretchName(a, s), s.Base, s.Top)
	}
	c.take(x.l, standard.Known(s.Length()), source)
	if s.Whole {
		source = "from the critical load of the whole member, the greatest of all combinations"
	}
	c.take(x.k, standard.Known(s.K), source)
	if s.Joints {
		c.joints(a)
	}
	c.do(x.doLc)
	if a == c.pairAxisOf() {
		c.pairSlenderness(a)
	} else {
		c.do(x.doSlender)
	}
	fe := c.do(x.doFe)
	c.do(x.doPe)
	return fe
}

// elasticOf is elasticStress for the longest effective length about an axis,
// which is on the safe side where stretches differ.
func (c *calc) elasticOf(a int) float64 { return c.elasticStress(a, c.longest(a)) }

func (c *calc) longest(a int) action.Stretch {
	longest := c.f.Stretches[a][0]
	for _, s := range c.f.Stretches[a] {
		if s.Effective() > longest.Effective() {
			longest = s
		}
	}
	return longest
}

// flexuralStrength computes the strength of a stretch.
func (c *calc) flexuralStrength(x *axis, a int, s action.Stretch) {
	c.elasticStress(a, s)
	c.nominalStrength(x)
}

// nominalStrength computes the strength from the elastic buckling stress.
func (c *calc) nominalStrength(x *axis) {
	if c.s.At(symFy) <= inelastic*c.s.At(x.fe) {
		c.do(x.doFn)
	} else {
		c.do(x.doFnElastic)
	}
	if c.slender {
		c.do(x.doFnOf)
		c.effectiveArea()
		c.do(x.doPnEffective)
	} else {
		c.do(x.doPn)
	}
	c.available(x.strength)
}

// advice are the bounds of slenderness that the user notes of E2 and D1 give. They
// are no checks.
func (c *calc) advice() {
	m := c.f.Member
	least := min(m.Section.RMajor, m.Section.RMinor)
	for a, x := range axes {
		if !c.pressed || !c.f.Stands[a] {
			continue
		}
		r := [2]float64{m.Section.RMajor, m.Section.RMinor}[a]
		if s := c.longest(a).Effective() / r; s > 200 {
			c.assume("L_c/r = %s about %s is above 200, which the user note of E2 prefers not to exceed", unit.Short(s, 3), x.word)
		}
	}
	if s := m.Height / least; c.pressed && s > 300 {
		c.assume("length over least radius of gyration = %s is above 300, which the user note of E2 prefers not to exceed", unit.Short(s, 3))
	}
}

// slenderness compares L_c/r with the limit that the member sets itself.
func (c *calc) slenderness() {
	const rule = "slenderness"
	limit := c.f.Member.Limits.Slenderness
	if limit == 0 {
		c.cover(rule, standard.NotApplicable, "the member sets no limit")
		return
	}
	c.group(rule)
	run := func(a int) float64 {
		x := axes[a]
		c.elasticOf(a)
		c.take(x.limit, limit, "limit of the member")
		return c.do(x.doLimitU)
	}
	worst, at := math.Inf(-1), 0
	for a := range axes {
		if !c.f.Stands[a] {
			c.undecided(rule, "limit of the member", c.f.NotHeld(a))
			return
		}
		c.silently(func() {
			if u := run(a); u > worst {
				worst, at = u, a
			}
		})
	}
	u := run(at)
	c.add(rule, "limit of the member", -1, c.s.At(axes[at].slender), limit, unit.None, u, 1)
}
