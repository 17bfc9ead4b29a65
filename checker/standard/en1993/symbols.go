// Package en1993 checks members to EN 1993-1-1:2005, with EN 1993-1-5:2006 for
// slender plates. The axes of the standard are y–y, the member's major axis,
// and z–z, its minor axis (for angles u–u and v–v).
package en1993

import (
	"kern/checker/derivation"
	"kern/lang/unit"
)

// set holds the letters of the standard.
var set = derivation.NewSet()

func sym(name string, dim unit.Dim, what string) derivation.ID { return set.Symbol(name, dim, what) }

func formula(id derivation.ID, text, clause string) *derivation.Formula {
	return set.Formula(id, text, clause)
}

// Material, factors and section.
var (
	symE   = sym("E", unit.Stress, "modulus of elasticity")
	symG   = sym("G", unit.Stress, "shear modulus")
	symFy  = sym("f_y", unit.Stress, "yield strength")
	symGM0 = sym("gamma_M0", unit.None, "partial factor for the resistance of cross-sections")
	symGM1 = sym("gamma_M1", unit.None, "partial factor for the resistance of members to instability")
	symEps = sym("epsilon", unit.None, "coefficient for the yield strength")

	symA    = sym("A", unit.Area, "gross area")
	symAeff = sym("A_eff", unit.Area, "effective area in compression")
	symIt   = sym("I_t", unit.Length4, "torsion constant")
	symIw   = sym("I_w", unit.Length6, "warping constant")
	symZ0   = sym("z_0", unit.Length, "distance of the shear centre from the centroid along z–z")
	symY0   = sym("y_0", unit.Length, "distance of the shear centre from the centroid")
	symH    = sym("h", unit.Length, "depth")
	symB    = sym("b", unit.Length, "width")
	symTw   = sym("t_w", unit.Length, "web thickness")
	symTf   = sym("t_f", unit.Length, "flange thickness")
	symT    = sym("t", unit.Length, "wall thickness")
	symR    = sym("r", unit.Length, "root radius")
	symD    = sym("d", unit.Length, "outside diameter")

	symClass = sym("class", unit.None, "class of the cross-section in compression")

	symNEd  = sym("N_Ed", unit.Force, "design compression")
	symNtEd = sym("N_t_Ed", unit.Force, "design tension")
	symNcRd = sym("N_c_Rd", unit.Force, "design resistance to compression")
	symNpl  = sym("N_pl_Rd", unit.Force, "design plastic resistance to axial force")
	symUc   = sym("u_c", unit.None, "utilisation, cross-section in compression")
	symUt   = sym("u_t", unit.None, "utilisation, cross-section in tension")

	symFu   = sym("f_u", unit.Stress, "tensile strength")
	symGM2  = sym("gamma_M2", unit.None, "partial factor for the resistance to fracture")
	symNet  = sym("net_ratio", unit.None, "area that holes leave over the gross area")
	symAnet = sym("A_net", unit.Area, "net area")
	symNu   = sym("N_u_Rd", unit.Force, "design ultimate resistance of the net section")
	symUu   = sym("u_u", unit.None, "utilisation, net section in tension")
	doAnet  = formula(symAnet, "net_ratio * A", "6.2.2.2")
	doNu    = formula(symNu, "0.9 * A_net * f_u / gamma_M2", "6.2.3(2) (6.7)")
	doUu    = formula(symUu, "N_t_Ed / N_u_Rd", "6.2.3(1) (6.5)")

	doEps   = formula(symEps, "sqrt(235 N/mm2 / f_y)", "Table 5.2")
	doNc    = formula(symNcRd, "A * f_y / gamma_M0", "6.2.4(2) (6.10)")
	doNcEff = formula(symNcRd, "A_eff * f_y / gamma_M0", "6.2.4(2) (6.11)")
	doNpl   = formula(symNpl, "A * f_y / gamma_M0", "6.2.3(2) (6.6)")
	doUc    = formula(symUc, "N_Ed / N_c_Rd", "6.2.4(1) (6.9)")
	doUt    = formula(symUt, "N_t_Ed / N_pl_Rd", "6.2.3(1) (6.5)")
)

// axis holds the symbols and formulas of flexural buckling about one axis.
type axis struct {
	letter, word                                 string
	i, r, l, k, lcr, ncr, lam, alpha, phi, chi   derivation.ID
	nb, u, n                                     derivation.ID
	slender, limit, us, acr                      derivation.ID
	doLcr, doNcr, doLam, doLamEff, doPhi, doChi  *derivation.Formula
	doNb, doNbEff, doU, doR, doSlender, doLimitU *derivation.Formula
	doNcrWhole, doLcrWhole                       *derivation.Formula
}

var axes = [2]*axis{newAxis("y", "major"), newAxis("z", "minor")}

func newAxis(letter, word string) *axis {
	x := &axis{letter: letter, word: word}
	s := func(name string, dim unit.Dim, what string) derivation.ID {
		return sym(name+"_"+letter, dim, what+", "+letter+"–"+letter)
	}
	x.i = s("I", unit.Length4, "second moment of area")
	x.r = s("i", unit.Length, "radius of gyration")
	x.l = s("L", unit.Length, "length between points held")
	x.k = s("K", unit.None, "effective length factor")
	x.lcr = s("L_cr", unit.Length, "buckling length")
	x.ncr = s("N_cr", unit.Force, "elastic critical force")
	x.lam = s("lambda", unit.None, "non-dimensional slenderness")
	x.alpha = s("alpha", unit.None, "imperfection factor")
	x.phi = s("phi", unit.None, "value to determine the reduction factor")
	x.chi = s("chi", unit.None, "reduction factor for buckling")
	x.nb = sym("N_b_"+letter+"_Rd", unit.Force, "design buckling resistance, "+letter+"–"+letter)
	x.n = sym("N_Ed_"+letter, unit.Force, "design compression in the stretch, "+letter+"–"+letter)
	x.u = sym("u_b_"+letter, unit.None, "utilisation, flexural buckling "+letter+"–"+letter)
	x.slender = s("slenderness", unit.None, "slenderness")
	x.limit = s("limit_slenderness", unit.None, "limit of slenderness")
	x.acr = s("alpha_cr", unit.None, "factor by which the design loads of the combination reach elastic buckling of the whole member")
	x.us = s("u_slenderness", unit.None, "utilisation, slenderness")
	f := func(id derivation.ID, text, clause string) *derivation.Formula {
		return formula(id, replaceAxis(text, letter), clause)
	}
	x.doR = f(x.r, "sqrt(I_? / A)", "definition")
	x.doLcr = f(x.lcr, "K_? * L_?", "effective length")
	x.doNcrWhole = f(x.ncr, "alpha_cr_? * N_Ed_?", "6.3.1.2(1), 5.2.1(3)")
	x.doLcrWhole = f(x.lcr, "pi * sqrt(E * I_? / N_cr_?)", "buckling length that gives N_cr")
	x.doNcr = f(x.ncr, "pi^2 * E * I_? / L_cr_?^2", "6.3.1.2(1)")
	x.doLam = f(x.lam, "sqrt(A * f_y / N_cr_?)", "6.3.1.3(1) (6.50)")
	x.doLamEff = f(x.lam, "sqrt(A_eff * f_y / N_cr_?)", "6.3.1.3(1) (6.51)")
	x.doPhi = f(x.phi, "0.5 * (1 + alpha_? * (lambda_? - 0.2) + lambda_?^2)", "6.3.1.2(1)")
	x.doChi = f(x.chi, "min(1, 1 / (phi_? + sqrt(phi_?^2 - lambda_?^2)))", "6.3.1.2(1) (6.49)")
	x.doNb = f(x.nb, "chi_? * A * f_y / gamma_M1", "6.3.1.1(3) (6.47)")
	x.doNbEff = f(x.nb, "chi_? * A_eff * f_y / gamma_M1", "6.3.1.1(3) (6.48)")
	x.doU = f(x.u, "N_Ed_? / N_b_?_Rd", "6.3.1.1(1) (6.46)")
	x.doSlender = f(x.slender, "L_cr_? / i_?", "definition")
	x.doLimitU = f(x.us, "slenderness_? / limit_slenderness_?", "demand / limit")
	return x
}

// replaceAxis puts the axis letter for each ? of a formula.
func replaceAxis(text, letter string) string {
	out := make([]byte, 0, len(text)+8)
	for i := 0; i < len(text); i++ {
		if text[i] == '?' {
			out = append(out, letter...)
		} else {
			out = append(out, text[i])
		}
	}
	return string(out)
}

// Torsional and flexural-torsional buckling.
var (
	symI0   = sym("i_0", unit.Length, "polar radius of gyration about the shear centre")
	symLT   = sym("L_T", unit.Length, "torsional buckling length")
	symNT   = sym("N_cr_T", unit.Force, "elastic critical force, torsional buckling")
	symBeta = sym("beta_0", unit.None, "1 - (y_0 / i_0)^2")
	symNTF  = sym("N_cr_TF", unit.Force, "elastic critical force, flexural-torsional buckling")
	symNcrT = sym("N_cr", unit.Force, "elastic critical force that counts for torsion")
	symLamT = sym("lambda_T", unit.None, "non-dimensional slenderness for torsion")
	symAlT  = sym("alpha_T", unit.None, "imperfection factor, curve of the z–z axis")
	symPhiT = sym("phi_T", unit.None, "value to determine the reduction factor")
	symChiT = sym("chi_T", unit.None, "reduction factor for torsional buckling")
	symNbT  = sym("N_b_T_Rd", unit.Force, "design resistance to torsional buckling")
	symNEdT = sym("N_Ed_T", unit.Force, "design compression")
	symUT   = sym("u_b_T", unit.None, "utilisation, torsional buckling")

	doI0      = formula(symI0, "sqrt((I_y + I_z) / A + y_0^2)", "EN 1993-1-3 6.2.3(5)")
	doNT      = formula(symNT, "(G * I_t + pi^2 * E * I_w / L_T^2) / i_0^2", "6.3.1.4(2), EN 1993-1-3 (6.33a)")
	doNTFree  = formula(symNT, "G * I_t / i_0^2", "6.3.1.4(2), EN 1993-1-3 (6.33a) without warping, as an end is free to twist")
	doI0Both  = formula(symI0, "sqrt((I_y + I_z) / A + y_0^2 + z_0^2)", "EN 1993-1-3 6.2.3(5)")
	symCubic  = sym("cubic", unit.None, "1 where N_cr_TF is a root of the cubic of flexural-torsional buckling")
	doCubic   = formula(symCubic, "1 + ((N_cr_TF - N_cr_y) * (N_cr_TF - N_cr_z) * (N_cr_TF - N_cr_T) - N_cr_TF^2 * (N_cr_TF - N_cr_z) * (y_0 / i_0)^2 - N_cr_TF^2 * (N_cr_TF - N_cr_y) * (z_0 / i_0)^2) / (N_cr_y * N_cr_z * N_cr_T)", "6.3.1.4(2), theory of thin-walled bars")
	doBeta    = formula(symBeta, "1 - (y_0 / i_0)^2", "EN 1993-1-3 6.2.3(7)")
	doNTFy    = formula(symNTF, "N_cr_y / (2 * beta_0) * (1 + N_cr_T / N_cr_y - sqrt((1 - N_cr_T / N_cr_y)^2 + 4 * (y_0 / i_0)^2 * N_cr_T / N_cr_y))", "6.3.1.4(2), EN 1993-1-3 (6.35)")
	doNTFz    = formula(symNTF, "N_cr_z / (2 * beta_0) * (1 + N_cr_T / N_cr_z - sqrt((1 - N_cr_T / N_cr_z)^2 + 4 * (y_0 / i_0)^2 * N_cr_T / N_cr_z))", "6.3.1.4(2), EN 1993-1-3 (6.35)")
	doNcrT    = formula(symNcrT, "N_cr_T", "6.3.1.4(2)")
	doNcrTF   = formula(symNcrT, "min(N_cr_TF, N_cr_T)", "6.3.1.4(2)")
	doLamT    = formula(symLamT, "sqrt(A * f_y / N_cr)", "6.3.1.4(2) (6.52)")
	doLamTEff = formula(symLamT, "sqrt(A_eff * f_y / N_cr)", "6.3.1.4(2) (6.53)")
	doPhiT    = formula(symPhiT, "0.5 * (1 + alpha_T * (lambda_T - 0.2) + lambda_T^2)", "6.3.1.4(3), 6.3.1.2(1)")
	doChiT    = formula(symChiT, "min(1, 1 / (phi_T + sqrt(phi_T^2 - lambda_T^2)))", "6.3.1.4(3), (6.49)")
	doNbT     = formula(symNbT, "chi_T * A * f_y / gamma_M1", "6.3.1.1(3) (6.47)")
	doNbTEff  = formula(symNbT, "chi_T * A_eff * f_y / gamma_M1", "6.3.1.1(3) (6.48)")
	doUT      = formula(symUT, "N_Ed_T / N_b_T_Rd", "6.3.1.1(1) (6.46)")
)
