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
	letter, word                            string
	i, r, l, k, lc, slender, fe, fn, ae     derivation.ID
	pn, pr, u, limit, us                    derivation.ID
	strength                                *available
	doR, doLc, doSlender, doFe, doFn, doFn2 *derivation.Formula
	doAe                                    *derivation.Formula
	doPn, doPnEff, doU, doLimitU            *derivation.Formula
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
	x.fn = s("F_n", unit.Stress, "nominal stress, flexural buckling")
	x.ae = s("A_e", unit.Area, "effective area at the nominal stress")
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
	x.doFn = f(x.fn, "0.658^(F_y / F_e_?) * F_y", "E3(a) (E3-2), F_y/F_e ≤ 2.25")
	x.doFn2 = f(x.fn, "0.877 * F_e_?", "E3(b) (E3-3), F_y/F_e > 2.25")
	x.doPn = f(x.pn, "F_n_? * A_g", "E3 (E3-1)")
	x.doPnEff = f(x.pn, "F_n_? * A_e_?", "E7 (E7-1)")
	x.doU = f(x.u, "P_r_? / P_c_?", "B3")
	x.doLimitU = f(x.us, "slenderness_? / limit_slenderness_?", "demand / limit")
	return x
}

// compression is chapter E.
func (c *calc) compression() {
	c.group("")
	c.factor(factorC)
	c.flexural(0)
	c.flexural(1)
}

// flexural is E3 about one axis, with E7 for slender elements: every stretch
// under every combination.
func (c *calc) flexural(a int) {
	x := axes[a]
	rule, clause := "flexural-buckling-"+x.word, "ANSI/AISC 360 E3"
	c.group(rule)
	switch {
	case !c.f.Stands[a]:
		c.undecided(rule, clause, "the ends and holds do not keep the member in place about "+x.word)
		return
	case c.why != "":
		if c.pressed {
			c.undecided(rule, clause, c.why)
		} else {
			c.cover(rule, standard.NotApplicable, "no combination compresses the member")
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
	c.least(c.s.At(x.pn), rule)
	if combination < 0 {
		c.cover(rule, standard.NotApplicable, "no combination compresses the member")
		return
	}
	n := c.f.Compression(combination, s.From, s.To)
	c.take(x.pr, n, c.combination(combination))
	u := c.do(x.doU)
	c.add(rule, clause, combination, n, c.s.At(x.strength.c), unit.Force, u, c.f.Limit())
}

// least keeps the least nominal strength of all modes of buckling.
func (c *calc) least(pn float64, rule string) {
	if math.IsNaN(c.nominal) && c.nominalRule == "" || pn < c.nominal || math.IsNaN(pn) {
		c.nominal, c.nominalRule = pn, rule
	}
}

// flexuralStrength computes the strength of a stretch.
func (c *calc) flexuralStrength(x *axis, a int, s action.Stretch) {
	source := ""
	if c.s.Recorded() {
		source = fmt.Sprintf("%s, %s–%s", c.f.StretchName(a, s), s.Base, s.Top)
	}
	c.take(x.l, s.Length(), source)
	c.take(x.k, s.K, source)
	c.do(x.doLc)
	c.do(x.doSlender)
	fe := c.do(x.doFe)
	if c.s.At(symFy) <= 2.25*fe {
		c.do(x.doFn)
	} else {
		c.do(x.doFn2)
	}
	c.do(x.doPn)
	c.available(x.strength)
}
