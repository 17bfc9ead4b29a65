package aisc360

import (
	"math"

	"kern/checker/derivation"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Torsional and flexural-torsional buckling, E4.
var (
	symX0  = sym("x_o", unit.Length, "shear centre from the centroid along x–x")
	symY0  = sym("y_o", unit.Length, "shear centre from the centroid along y–y")
	symR0  = sym("r_o", unit.Length, "polar radius of gyration about the shear centre")
	symHH  = sym("H", unit.None, "flexural constant")
	symLz  = sym("L_z", unit.Length, "length between points held against twist")
	symKz  = sym("K_z", unit.None, "effective length factor for torsional buckling")
	symLcz = sym("L_c_z", unit.Length, "effective length for torsional buckling")
	symFez = sym("F_e_z", unit.Stress, "elastic torsional buckling stress")
	symFeT = sym("F_e_T", unit.Stress, "elastic buckling stress, torsional or flexural-torsional")
	symFnT = sym("F_n_T", unit.Stress, "nominal stress, torsional or flexural-torsional buckling")
	symPnT = sym("P_n_T", unit.Force, "nominal compressive strength, torsional or flexural-torsional buckling")
	symPrT = sym("P_r_T", unit.Force, "required compressive strength of the member")
	symUT  = sym("u_T", unit.None, "utilisation, torsional or flexural-torsional buckling")
	symE4  = sym("cubic", unit.None, "1 where F_e_T is a root of the cubic of E4(c)")

	torsional = newAvailable(symPnT, "P_c_T", "phi_c", "Omega_c", "E1")

	doR0       = formula(symR0, "sqrt(x_o^2 + y_o^2 + (I_x + I_y) / A_g)", "E4 (E4-9)")
	doHH       = formula(symHH, "1 - (x_o^2 + y_o^2) / r_o^2", "E4 (E4-8)")
	doLcz      = formula(symLcz, "K_z * L_z", "E4")
	doFez      = formula(symFez, "(pi^2 * E * C_w / L_c_z^2 + G * J) / (A_g * r_o^2)", "E4 (E4-7)")
	doFezFree  = formula(symFez, "G * J / (A_g * r_o^2)", "E4 (E4-7) without warping, as an end is free to twist")
	doFeT2     = formula(symFeT, "(pi^2 * E * C_w / L_c_z^2 + G * J) / (I_x + I_y)", "E4(a) (E4-2)")
	doFeT2Free = formula(symFeT, "G * J / (I_x + I_y)", "E4(a) (E4-2) without warping, as an end is free to twist")
	doFeTx     = formula(symFeT, "(F_e_x + F_e_z) / (2 * H) * (1 - sqrt(1 - 4 * F_e_x * F_e_z * H / (F_e_x + F_e_z)^2))", "E4(b) (E4-3), x the axis of symmetry")
	doFeTy     = formula(symFeT, "(F_e_y + F_e_z) / (2 * H) * (1 - sqrt(1 - 4 * F_e_y * F_e_z * H / (F_e_y + F_e_z)^2))", "E4(b) (E4-3), y the axis of symmetry")
	doE4       = formula(symE4, "1 + ((F_e_T - F_e_x) * (F_e_T - F_e_y) * (F_e_T - F_e_z) - F_e_T^2 * (F_e_T - F_e_y) * (x_o / r_o)^2 - F_e_T^2 * (F_e_T - F_e_x) * (y_o / r_o)^2) / (F_e_x * F_e_y * F_e_z)", "E4(c) (E4-4)")
	doFnT      = formula(symFnT, "0.658^(F_y / F_e_T) * F_y", "E4, E3 (E3-2)")
	doFnTel    = formula(symFnT, "0.877 * F_e_T", "E4, E3 (E3-3)")
	doFnOfT    = formula(symFn, "F_n_T", "E7")
	doPnT      = formula(symPnT, "F_n_T * A_g", "E4 (E4-1)")
	doPnTEff   = formula(symPnT, "F_n_T * A_e", "E7 (E7-1)")
	doUT       = formula(symUT, "P_r_T / P_c_T", "B3")

	symBt  = sym("bt_max", unit.None, "ratio of the longer leg")
	symBtE = sym("bt_E4", unit.None, "ratio up to which a single angle does not buckle in torsion")
	doBt   = formula(symBt, "max(b_1, b_2) / t", "E4")
	doBtE  = formula(symBtE, "0.71 * sqrt(E / F_y)", "E4, E5")
)

// torsionRule says by which rule a section buckles in torsion, "" where E4 does not
// ask for it, and then why.
func (c *calc) torsionRule() (rule, why string) {
	const torsion, coupled = "torsional-buckling", "flexural-torsional-buckling"
	sec := c.f.Member.Section
	longer := c.f.TwistFree || !c.f.Stands[1] || c.f.Twist*c.f.TwistK > c.longest(1).Effective()*(1+1e-9)
	const shorter = "the torsional effective length is not longer than the lateral one about y–y (E4)"
	switch sec.Shape.Kind {
	case section.Tube, section.Pipe, section.Rod:
		return "", "closed and round sections do not buckle in torsion"
	case section.Bar:
		if !longer {
			return "", shorter
		}
		return torsion, ""
	case section.ISection:
		if sec.Shape.Made != section.Welded && !longer {
			return "", shorter
		}
		return torsion, ""
	case section.Given:
		return torsion, ""
	case section.Angle:
		if c.do(doBt) <= c.do(doBtE) {
			return "", "the longer leg has b/t ≤ 0.71 sqrt(E/F_y) (E5)"
		}
	}
	return coupled, ""
}

// torsional is E4 for the member as a whole.
func (c *calc) torsional() {
	const clause, torsion, coupled = "ANSI/AISC 360 E4", "torsional-buckling", "flexural-torsional-buckling"
	sec := c.f.Member.Section
	c.group(coupled)
	kind, why := c.torsionRule()
	rule := coupled
	switch kind {
	case "":
		c.cover(torsion, standard.NotApplicable, why)
		c.cover(coupled, standard.NotApplicable, why)
		return
	case torsion:
		rule = torsion
		c.cover(coupled, standard.NotApplicable, "the shear centre is the centroid")
	default:
		c.cover(torsion, standard.NotApplicable, "torsion goes with bending: see "+coupled)
	}
	c.group(rule)
	refuse := func(why string) {
		c.least(unknown(rule))
		if c.pressed {
			c.undecided(rule, clause, why)
		} else {
			c.cover(rule, standard.NotApplicable, notPressed)
		}
	}
	switch {
	case c.why != "":
		refuse(c.why)
		return
	case sec.Shape.Kind == section.Given && math.IsNaN(sec.It):
		refuse("state I_t and I_w of the section, or check torsional buckling by hand")
		return
	case !c.f.Stands[0]:
		refuse(c.f.NotHeld(0))
		return
	case !c.f.Stands[1]:
		refuse(c.f.NotHeld(1))
		return
	}
	if sec.Shape.Kind == section.Given {
		c.assume("the section '%s' is doubly symmetric", sec.Name)
	}
	c.torsionalStrength(rule)
	c.least(mode{rule, c.s.At(symPnT), c.s.At(symFeT), c.s.At(symFnT)})
	if !c.pressed {
		c.cover(rule, standard.NotApplicable, notPressed)
		return
	}
	n, k := c.worst(0, c.f.Member.Height)
	c.take(symPrT, n, c.combination(k))
	u := c.do(doUT)
	c.add(rule, clause, k, n, c.s.At(torsional.c), unit.Force, u, c.f.Limit())
}

// torsionalStrength computes P_c_T in the group that is open.
func (c *calc) torsionalStrength(rule string) {
	sec := c.f.Member.Section
	j, cw, title := c.f.Twisting()
	if math.IsNaN(cw) {
		cw = 0
		c.assume("C_w = 0, as it is not stated")
	}
	c.take(symJ, standard.KnownOrZero(j), title)
	c.take(symCw, standard.KnownOrZero(cw), title)
	if !c.f.TwistFree {
		held := "twist held at both ends"
		for _, h := range c.f.Member.Holds {
			if h.Twist {
				held = "twist held at both ends and at the holds against twist"
			}
		}
		if c.f.TwistK != 1 {
			c.assume("K_z = %s for twist (stated)", unit.Number(c.f.TwistK, 3))
		} else {
			c.assume("%s, warping free", held)
		}
		c.take(symLz, standard.Known(c.f.Twist), held)
		c.take(symKz, c.f.TwistK, held)
		c.do(doLcz)
	} else {
		c.assume("an end is free to twist: warping not counted")
	}
	pick := func(held, free *derivation.Formula) {
		if c.f.TwistFree {
			held = free
		}
		c.do(held)
	}
	if rule == "torsional-buckling" {
		pick(doFeT2, doFeT2Free)
	} else {
		c.coupled(pick)
	}
	if c.s.At(symFy) <= inelastic*c.s.At(symFeT) {
		c.do(doFnT)
	} else {
		c.do(doFnTel)
	}
	// of single angles E7 takes F_n from E3 alone; E4 has the gross area
	if c.slender && sec.Shape.Kind != section.Angle {
		c.do(doFnOfT)
		c.effectiveArea()
		c.do(doPnTEff)
	} else {
		c.do(doPnT)
	}
	c.available(torsional)
}

// coupled computes F_e_T of sections whose shear centre is not their centroid.
func (c *calc) coupled(pick func(held, free *derivation.Formula)) {
	sec := c.f.Member.Section
	title := sec.Title()
	x, y := sec.SMajor, sec.SMinor
	unsymmetric := sec.Shape.Kind == section.Angle && math.Abs(sec.Shape.Depth-sec.Shape.Width) > 1e-9
	if !unsymmetric { // the shear centre lies on the axis of symmetry
		if math.Abs(x) >= math.Abs(y) {
			y = 0
		} else {
			x = 0
		}
	}
	c.take(symX0, x, title)
	c.take(symY0, y, title)
	c.do(doR0)
	pick(doFez, doFezFree)
	switch {
	case unsymmetric:
		fx, fy := c.elasticOf(0), c.elasticOf(1)
		r := c.s.At(symR0)
		c.take(symFeT, lowestRoot(fx, fy, c.s.At(symFez), x/r, y/r), "E4(c) (E4-4), the lowest root, by halving")
		c.do(doE4)
	case x != 0:
		c.do(doHH)
		c.elasticOf(0)
		c.do(doFeTx)
	default:
		c.do(doHH)
		c.elasticOf(1)
		c.do(doFeTy)
	}
}

// lowestRoot is the lowest root of the cubic of E4(c): x, y and z are the elastic
// stresses, ex and ey the offsets of the shear centre over r_o. It lies between 0
// and the least of the three, where the cubic rises from below zero.
func lowestRoot(x, y, z, ex, ey float64) float64 {
	f := func(n float64) float64 {
		return (n-x)*(n-y)*(n-z) - n*n*(n-y)*ex*ex - n*n*(n-x)*ey*ey
	}
	low, high := 0.0, min(x, y, z)
	if !(high > 0) || !(f(high) >= 0) {
		return math.NaN()
	}
	for range 200 {
		middle := (low + high) / 2
		if f(middle) < 0 {
			low = middle
		} else {
			high = middle
		}
	}
	return low
}
