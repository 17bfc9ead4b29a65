// Package aisc360 checks members to ANSI/AISC 360-22, and to the 2016 edition as
// its differences, by LRFD or by ASD. The axes of the standard are x–x, the
// member's major axis, and y–y, its minor axis; of angles these are the
// principal axes.
//
// The standard prints F_n where the edition of 2016 prints F_cr. An available
// strength is phi times the nominal one by LRFD and the nominal one over Omega by
// ASD; P_c, M_c, V_c stand for either.
package aisc360

import (
	"strings"

	"kern/checker/derivation"
	"kern/lang/unit"
)

// set holds the letters of the standard.
var set = derivation.NewSet()

func sym(name string, dim unit.Dim, what string) derivation.ID { return set.Symbol(name, dim, what) }

func formula(id derivation.ID, text, clause string) *derivation.Formula {
	return set.Formula(id, text, clause)
}

// Material, section and dimensions.
var (
	symE  = sym("E", unit.Stress, "modulus of elasticity")
	symG  = sym("G", unit.Stress, "shear modulus of elasticity")
	symFy = sym("F_y", unit.Stress, "specified minimum yield stress")
	symFu = sym("F_u", unit.Stress, "specified minimum tensile strength")

	symAg   = sym("A_g", unit.Area, "gross area")
	symJ    = sym("J", unit.Length4, "torsional constant")
	symCw   = sym("C_w", unit.Length6, "warping constant")
	symD    = sym("d", unit.Length, "depth")
	symB    = sym("B", unit.Length, "overall width of the tube")
	symBf   = sym("b_f", unit.Length, "width of the flange")
	symTw   = sym("t_w", unit.Length, "thickness of the web or stem")
	symTf   = sym("t_f", unit.Length, "thickness of the flange")
	symT    = sym("t", unit.Length, "thickness of the wall or leg")
	symRoot = sym("r_root", unit.Length, "radius of the root fillet")
	symRin  = sym("r_in", unit.Length, "inside corner radius")
	symDia  = sym("D", unit.Length, "outside diameter")
	symLeg1 = sym("b_1", unit.Length, "upright leg")
	symLeg2 = sym("b_2", unit.Length, "lying leg")

	// symAlphaFactor brings forces to the level of strength (C2.3, App. 8): 1.0 by
	// LRFD, 1.6 by ASD.
	symAlphaFactor = sym("alpha", unit.None, "factor to the level of strength")
)

// available is a nominal strength and what is available of it.
type available struct {
	nominal, lrfd, asd, c derivation.ID
	doLRFD, doASD         *derivation.Formula // of phi_P_n and P_n_over_Omega
	doC, doCASD           *derivation.Formula // of P_c from the one or the other
}

// newAvailable declares phi_NAME, NAME_over_Omega and the letter for either (c,
// like P_c_x) of a nominal strength that is declared already. phi and omega are
// the names of the factors.
func newAvailable(nominal derivation.ID, c, phi, omega, clause string) *available {
	n := set.At(nominal)
	a := &available{nominal: nominal}
	what := strings.TrimPrefix(n.What, "nominal ")
	a.lrfd = sym("phi_"+n.Name, n.Dim, "design "+what)
	a.asd = sym(n.Name+"_over_Omega", n.Dim, "allowable "+what)
	a.c = sym(c, n.Dim, "available "+what)
	a.doLRFD = formula(a.lrfd, phi+" * "+n.Name, clause)
	a.doASD = formula(a.asd, n.Name+" / "+omega, clause)
	a.doC = formula(a.c, "phi_"+n.Name, "B3.1, LRFD")
	a.doCASD = formula(a.c, n.Name+"_over_Omega", "B3.2, ASD")
	return a
}

// available computes the available strength from the nominal one.
func (c *calc) available(a *available) float64 {
	if c.asd {
		c.do(a.doASD)
		return c.do(a.doCASD)
	}
	c.do(a.doLRFD)
	return c.do(a.doC)
}

// factor is a resistance factor with its safety factor.
type factor struct {
	phi, omega   derivation.ID
	phiV, omegaV float64
	clause       string
}

func newFactor(letter string, phi, omega float64, what, clause string) *factor {
	return &factor{sym("phi_"+letter, unit.None, "resistance factor, "+what), sym("Omega_"+letter, unit.None, "safety factor, "+what), phi, omega, clause}
}

// Resistance and safety factors, LRFD and ASD.
var (
	factorC = newFactor("c", 0.90, 1.67, "compression", "E1")
	factorT = newFactor("t", 0.90, 1.67, "yielding in tension", "D2(a)")
	factorR = newFactor("r", 0.75, 2.00, "rupture in tension", "D2(b)")
)

// factors takes a factor of the method that is used.
func (c *calc) factor(f *factor) {
	id, v := f.phi, f.phiV
	if c.asd {
		id, v = f.omega, f.omegaV
	}
	c.take(id, v, f.clause)
}

// replaceAxis puts the axis letter for each ? of a formula.
func replaceAxis(text, letter string) string { return strings.ReplaceAll(text, "?", letter) }
