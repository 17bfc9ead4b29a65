package aisc360

import (
	"kern/checker/derivation"
	"kern/lang/unit"
)

// Lateral-torsional buckling, F1 to F5, F7 and F9 to F11.
var (
	symLb   = sym("L_b", unit.Length, "laterally unbraced length: between points held against twist")
	symMmax = sym("M_max", unit.Moment, "greatest moment in the unbraced segment, without its sign")
	symMA   = sym("M_A", unit.Moment, "moment at the quarter point, without its sign")
	symMB   = sym("M_B", unit.Moment, "moment at the middle, without its sign")
	symMC   = sym("M_C", unit.Moment, "moment at the three-quarter point, without its sign")
	symCb   = sym("C_b", unit.None, "lateral-torsional buckling modification factor")
	symHo   = sym("h_o", unit.Length, "distance between the flange centroids")
	symRts  = sym("r_ts", unit.Length, "effective radius of gyration")
	symCLT  = sym("c", unit.None, "coefficient of the shape")
	symRt   = sym("r_t", unit.Length, "effective radius of gyration of the compression flange")
	symAwI  = sym("a_w", unit.None, "web over compression flange")
	symRpc  = sym("R_pc", unit.None, "web plastification factor")
	symRpg  = sym("R_pg", unit.None, "bending strength reduction factor")
	symLp   = sym("L_p", unit.Length, "limit of the unbraced length for yielding")
	symLr   = sym("L_r", unit.Length, "limit of the unbraced length for inelastic buckling")
	symFcr  = sym("F_cr_LT", unit.Stress, "critical stress, lateral-torsional buckling")
	symFcrF = sym("F_cr_F", unit.Stress, "critical stress, flange local buckling")
	symFcrW = sym("F_cr_W", unit.Stress, "critical stress, stem local buckling")
	symMcr  = sym("M_cr", unit.Moment, "elastic lateral-torsional buckling moment")
	symBT   = sym("B_T", unit.None, "B of F9.2, stem in compression")
	symBetW = sym("beta_w", unit.Length, "section property for unequal legs, long leg in compression")
	symQ    = sym("q_w", unit.None, "4.4 beta_w r_z / (L_b t)")
	symLdt  = sym("Ldt", unit.None, "L_b d / t^2")
	symMnLT = sym("M_n_LT", unit.Moment, "nominal flexural strength, lateral-torsional buckling")
	symULT  = sym("u_LT", unit.None, "utilisation, lateral-torsional buckling")
	symPey  = sym("P_ey", unit.Force, "elastic critical force y–y over the unbraced length")
	symPt   = sym("P_r_LT", unit.Force, "tension beside the moment")
	symCbT  = sym("C_b_t", unit.None, "C_b without the tension")

	lateral = newAvailable(symMnLT, "M_c_LT", "phi_b", "Omega_b", "F1(a)")

	doCb   = formula(symCb, "12.5 * M_max / (2.5 * M_max + 3 * M_A + 4 * M_B + 3 * M_C)", "F1(c) (F1-1)")
	doCbL  = formula(symCb, "min(1.5, 12.5 * M_max / (2.5 * M_max + 3 * M_A + 4 * M_B + 3 * M_C))", "F1(c) (F1-1), F10.2(b)(1): at most 1.5")
	doCb0  = formula(symCbT, "12.5 * M_max / (2.5 * M_max + 3 * M_A + 4 * M_B + 3 * M_C)", "F1(c) (F1-1)")
	doPey  = formula(symPey, "pi^2 * E * I_y / L_b^2", "H1.2 (H1-2)")
	doCbH  = formula(symCb, "C_b_t * sqrt(1 + alpha * P_r_LT / P_ey)", "H1.2")
	doHo   = formula(symHo, "d - t_f", "F2.2")
	doRts  = formula(symRts, "sqrt(sqrt(I_y * C_w) / S_x)", "F2.2 (F2-7)")
	doCI   = formula(symCLT, "1", "F2.2 (F2-8a)")
	doCU   = formula(symCLT, "h_o / 2 * sqrt(I_y / C_w)", "F2.2 (F2-8b)")
	doLp   = formula(symLp, "1.76 * r_y * sqrt(E / F_y)", "F2.2 (F2-5)")
	doLr   = formula(symLr, "1.95 * r_ts * E / (0.7 * F_y) * sqrt(J * c / (S_x * h_o) + sqrt((J * c / (S_x * h_o))^2 + 6.76 * (0.7 * F_y / E)^2))", "F2.2 (F2-6)")
	doLTp  = formula(symMnLT, "M_p_x", "F2.2(a), L_b ≤ L_p")
	doLTpT = formula(symMnLT, "M_p_x", "F7.4(a), L_b ≤ L_p")
	doLTpB = formula(symMnLT, "M_p_x", "F11.2(a)")
	doLTi  = formula(symMnLT, "min(M_p_x, C_b * (M_p_x - (M_p_x - 0.7 * F_y * S_x) * (L_b - L_p) / (L_r - L_p)))", "F2.2(b) (F2-2)")
	doLTiT = formula(symMnLT, "min(M_p_x, C_b * (M_p_x - (M_p_x - 0.7 * F_y * S_x) * (L_b - L_p) / (L_r - L_p)))", "F7.4(b) (F7-10)")
	doFcr  = formula(symFcr, "C_b * pi^2 * E / (L_b / r_ts)^2 * sqrt(1 + 0.078 * J * c / (S_x * h_o) * (L_b / r_ts)^2)", "F2.2(c) (F2-4)")
	doLTe  = formula(symMnLT, "min(M_p_x, F_cr_LT * S_x)", "F2.2(c) (F2-3)")
	doLTeB = formula(symMnLT, "min(M_p_x, F_cr_LT * S_x)", "F11.2(c) (F11-4)")
	doAwI  = formula(symAwI, "h * t_w / (b_f * t_f)", "F4.2(7) (F4-12), h_c = h")
	doRpc  = formula(symRpc, "min(M_p_x / M_y_x, M_p_x / M_y_x - (M_p_x / M_y_x - 1) * (lambda_w - lambda_pw) / (lambda_rw - lambda_pw))", "F4.2(6) (F4-9b)")
	doRt   = formula(symRt, "b_f / sqrt(12 * (1 + a_w / 6))", "F4.2(7) (F4-11)")
	doLp4  = formula(symLp, "1.1 * r_t * sqrt(E / F_y)", "F4.2(4) (F4-7)")
	doLr4  = formula(symLr, "1.95 * r_t * E / F_L * sqrt(J / (S_x * h_o) + sqrt((J / (S_x * h_o))^2 + 6.76 * (F_L / E)^2))", "F4.2(5) (F4-8)")
	doLTp4 = formula(symMnLT, "R_pc * M_y_x", "F4.2(a): L_b ≤ L_p")
	doLTi4 = formula(symMnLT, "min(R_pc * M_y_x, C_b * (R_pc * M_y_x - (R_pc * M_y_x - F_L * S_x) * (L_b - L_p) / (L_r - L_p)))", "F4.2(b) (F4-2)")
	doFcr4 = formula(symFcr, "C_b * pi^2 * E / (L_b / r_t)^2 * sqrt(1 + 0.078 * J / (S_x * h_o) * (L_b / r_t)^2)", "F4.2(2) (F4-5)")
	doLTe4 = formula(symMnLT, "min(R_pc * M_y_x, F_cr_LT * S_x)", "F4.2(c) (F4-3)")
	doRpg  = formula(symRpg, "min(1, 1 - a_w / (1200 + 300 * a_w) * (lambda_w - 5.7 * sqrt(E / F_y)))", "F5.2 (F5-6)")
	doLr5  = formula(symLr, "pi * r_t * sqrt(E / (0.7 * F_y))", "F5.2 (F5-5)")
	doFp5  = formula(symFcr, "F_y", "F5.2(a): L_b ≤ L_p")
	doFi5  = formula(symFcr, "min(F_y, C_b * (F_y - 0.3 * F_y * (L_b - L_p) / (L_r - L_p)))", "F5.2(b) (F5-3)")
	doFe5  = formula(symFcr, "min(F_y, C_b * pi^2 * E / (L_b / r_t)^2)", "F5.2(c) (F5-4)")
	doLT5  = formula(symMnLT, "R_pg * F_cr_LT * S_x", "F5.2 (F5-2)")
	doLpT  = formula(symLp, "0.13 * E * r_y * sqrt(J * A_g) / M_p_x", "F7.4 (F7-12)")
	doLrT  = formula(symLr, "2 * E * r_y * sqrt(J * A_g) / (0.7 * F_y * S_x)", "F7.4 (F7-13)")
	doLTeT = formula(symMnLT, "min(M_p_x, 2 * E * C_b * sqrt(J * A_g) / (L_b / r_y))", "F7.4(c) (F7-11)")
	doQ    = formula(symQ, "4.4 * beta_w * r_y / (L_b * t)", "F10.2(b)(1)")
	doMcrL = formula(symMcr, "9 * E * A_g * r_y * t * C_b / (8 * L_b) / (sqrt(1 + q_w^2) - q_w)", "F10.2(b)(1) (F10-4), r_z = r_y, written without a difference of near numbers")
	doLTiL = formula(symMnLT, "min(1.5 * M_y_x, (1.92 - 1.17 * sqrt(M_y_x / M_cr)) * M_y_x)", "F10.2(a) (F10-2)")
	doLTeL = formula(symMnLT, "(0.92 - 0.17 * M_cr / M_y_x) * M_cr", "F10.2(b) (F10-3)")
	doLdt  = formula(symLdt, "L_b * d / t^2", "F11.2")
	doLTiB = formula(symMnLT, "min(M_p_x, C_b * (1.52 - 0.274 * Ldt * F_y / E) * M_y_x)", "F11.2(b) (F11-3)")
	doFcrB = formula(symFcr, "1.9 * E * C_b / Ldt", "F11.2(c) (F11-5)")
	doULT  = formula(symULT, "M_max / M_c_LT", "B3")
)

// Limit states of open sections in the plane of the web, F3 to F6 and F9.
var (
	doF3nc = formula(flexures[0].mnF, "M_p_x - (M_p_x - 0.7 * F_y * S_x) * (lambda_f - lambda_pf) / (lambda_rf - lambda_pf)", "F3.2(a) (F3-1)")
	doF2p  = formula(flexures[0].mp, "F_y * Z_x", "F2.1 (F2-1)")
	doF4p  = formula(flexures[0].mp, "min(F_y * Z_x, 1.6 * F_y * S_x)", "F4.2(6)")
	doF4my = formula(flexures[0].my, "F_y * S_x", "F4.2(1) (F4-4), S_xc = S_x")
	doF6p  = formula(flexures[1].mp, "min(F_y * Z_y, 1.6 * F_y * S_y)", "F6.1 (F6-1)")
	doF11y = formula(flexures[0].my, "F_y * S_x", "F11.2")
	doF3s  = formula(flexures[0].mnF, "0.9 * E * k_c * S_x / lambda_f^2", "F3.2(b) (F3-2)")
	doF4s  = formula(flexures[0].mnF, "0.9 * E * k_c * S_x / lambda_f^2", "F4.3(c) (F4-14)")
	doF4y  = formula(flexures[0].mnY, "R_pc * M_y_x", "F4.1 (F4-1)")
	doF4nc = formula(flexures[0].mnF, "R_pc * M_y_x - (R_pc * M_y_x - F_L * S_x) * (lambda_f - lambda_pf) / (lambda_rf - lambda_pf)", "F4.3(b) (F4-13)")
	doF5y  = formula(flexures[0].mnY, "R_pg * F_y * S_x", "F5.1 (F5-1)")
	doF5nc = formula(symFcrF, "F_y - 0.3 * F_y * (lambda_f - lambda_pf) / (lambda_rf - lambda_pf)", "F5.3(b) (F5-8)")
	doF5s  = formula(symFcrF, "min(F_y, 0.9 * E * k_c / lambda_f^2)", "F5.3(c) (F5-9)")
	doF5f  = formula(flexures[0].mnF, "R_pg * F_cr_F * S_x", "F5.3 (F5-7)")
	doF6nc = formula(flexures[1].mnF, "M_p_y - (M_p_y - 0.70 * F_y * S_y) * (lambda_f - lambda_pf) / (lambda_rf - lambda_pf)", "F6.2(b) (F6-2)")
	doF6s  = formula(flexures[1].mnF, "0.70 * E / lambda_f^2 * S_y", "F6.2(c) (F6-3), (F6-4)")

	doStem     = formula(symFcrW, "F_y", "F9.4(a)(1) (F9-17)")
	doStemMid  = formula(symFcrW, "(1.43 - 0.515 * lambda_w * sqrt(F_y / E)) * F_y", "F9.4(a)(2) (F9-18)")
	doStemLong = formula(symFcrW, "1.52 * E / lambda_w^2", "F9.4(a)(3) (F9-19)")
)

// changed2016 is the text in the edition of 2016 of formulas that it writes
// otherwise: F6.2 (from memory), F7.2 and F7.3 with their coefficients rounded, which
// for boxes are those of HSS (from memory; (F7-2) seen in print).
var changed2016 = map[*derivation.Formula]string{
	doF6s:               "0.69 * E / lambda_f^2 * S_y",
	flexures[0].doTubeF: "min(M_p_x, M_p_x - (M_p_x - F_y * S_x) * (3.57 * lambda_f_x * sqrt(F_y / E) - 4.0))",
	flexures[1].doTubeF: "min(M_p_y, M_p_y - (M_p_y - F_y * S_y) * (3.57 * lambda_f_y * sqrt(F_y / E) - 4.0))",
	flexures[0].doTubeW: "min(M_p_x, M_p_x - (M_p_x - F_y * S_x) * (0.305 * lambda_w_x * sqrt(F_y / E) - 0.738))",
	flexures[1].doTubeW: "min(M_p_y, M_p_y - (M_p_y - F_y * S_y) * (0.305 * lambda_w_y * sqrt(F_y / E) - 0.738))",
}

// tee holds what F9 asks of a tee, about whichever axis is square to its stem.
type tee struct {
	doY, doFnc, doFs, doW *derivation.Formula
	sxc                   derivation.ID
	doB, doMcr, doLT      *derivation.Formula
}

// tees are the tee whose strong axis is square to its stem, and that whose weak
// one is.
var tees = [2]*tee{newTee("x", "y"), newTee("y", "x")}

func newTee(about, other string) *tee {
	x := flexures[map[string]int{"x": 0, "y": 1}[about]]
	f := func(id derivation.ID, text, clause string) *derivation.Formula {
		return formula(id, replaceAxis(text, about), clause)
	}
	t := &tee{sxc: sym("S_xc_"+about, unit.Volume, "elastic section modulus referred to the flange, "+about+"–"+about)}
	const plastic = "min(F_y * Z_?, 1.6 * M_y_?)"
	t.doY = f(x.mnY, "M_y_?", "F9.1(b) (F9-4), stem in compression")
	t.doFnc = f(x.mnF, "min(1.6 * M_y_?, "+plastic+" - ("+plastic+" - 0.7 * F_y * S_xc_?) * (lambda_f - lambda_pf) / (lambda_rf - lambda_pf))", "F9.3(a)(2) (F9-14)")
	t.doFs = f(x.mnF, "0.7 * E * S_xc_? / lambda_f^2", "F9.3(a)(3) (F9-15)")
	t.doW = f(x.mnW, "F_cr_W * S_?", "F9.4(a) (F9-16)")
	t.doB = formula(symBT, "-2.3 * d / L_b * sqrt(I_"+other+" / J)", "F9.2(b) (F9-12)")
	t.doMcr = formula(symMcr, "1.95 * E / L_b * sqrt(I_"+other+" * J) / (sqrt(1 + B_T^2) - B_T)", "F9.2 (F9-10), written without a difference of near numbers")
	t.doLT = f(symMnLT, "min(M_cr, M_y_?)", "F9.2(b)(1) (F9-13)")
	return t
}
