package aisc360

import (
	"kern/checker/derivation"
	"kern/lang/unit"
)

// Factors of chapters F and G.
var (
	factorB = newFactor("b", 0.90, 1.67, "flexure", "F1(a)")
	factorV = newFactor("v", 0.90, 1.67, "shear", "G1(a)")
)

// flexure holds the symbols and formulas of bending about one axis, and of the
// shear force that goes with it.
type flexure struct {
	letter, word string

	// moduli, limit states, and what they come to
	z, s, sc                             derivation.ID
	mp, my, mnY, mnF, mnW, mns           derivation.ID
	doMpTube, doMpPipe, doMpRod, doMpBar *derivation.Formula
	doMyTee, doMyLeg                     *derivation.Formula
	doY, doY15                           *derivation.Formula
	doPipeF, doPipeFSlender              *derivation.Formula
	doLegF, doLegFSlender                *derivation.Formula
	doMns, doMnsF, doMnsW, doMnsFW       *derivation.Formula

	// the check of the section, and the strength beside axial force
	mr, u             derivation.ID
	section           *available
	doU               *derivation.Formula
	mn, mrH, mnt, seg derivation.ID
	whole             *available
	doMnS, doMnLT     *derivation.Formula

	// tubes
	lamF, lamW, areaW, rpg           derivation.ID
	flat, ae, shift, ie, se          derivation.ID
	doLamF, doLamW                   *derivation.Formula
	doTubeF, doTubeFSlender, doTubeW *derivation.Formula
	doTubeWSlender, doAreaW, doRpg   *derivation.Formula
	doBe, doBeBox, doAe, doShift     *derivation.Formula
	doIe, doSe                       *derivation.Formula

	// shear
	v, vn, uv, aw, lamV, kv, cv        derivation.ID
	shear                              *available
	doVnLeg, doVnTube, doVnSolid, doUv *derivation.Formula
	doCv2, doCv2Mid, doCv2Long         *derivation.Formula
}

var flexures = [2]*flexure{newFlexure("x", "major"), newFlexure("y", "minor")}

// Limits of Table B4.1b that do not depend on the axis of bending.
var (
	symLamPf = sym("lambda_pf", unit.None, "limit of a compact flange or leg")
	symLamRf = sym("lambda_rf", unit.None, "limit of a noncompact flange or leg")
	symLamPw = sym("lambda_pw", unit.None, "limit of a compact web or stem")
	symLamRw = sym("lambda_rw", unit.None, "limit of a noncompact web or stem")
	symLamF  = sym("lambda_f", unit.None, "width-to-thickness ratio of the flange or leg")
	symLamW  = sym("lambda_w", unit.None, "width-to-thickness ratio of the web or stem")

	symH  = sym("h", unit.Length, "clear depth of the web less fillets or corner radii")
	symBF = sym("b", unit.Length, "flat width of the tube's shorter side")
	symKc = sym("k_c", unit.None, "coefficient for slender unstiffened elements")
	symFL = sym("F_L", unit.Stress, "compression stress above which buckling is inelastic")

	doHI   = formula(symH, "d - 2 * t_f - 2 * r_root", "B4.1b(a), (b)")
	doHBox = formula(symH, "d - 2 * t", "B4.1b(e)")
	doHHSS = formula(symH, "d - 2 * t - 2 * min(r_in, 0.5 * t)", "B4.1b(d)")
	doBBox = formula(symBF, "B - 2 * t", "B4.1b(e)")
	doBHSS = formula(symBF, "B - 2 * t - 2 * min(r_in, 0.5 * t)", "B4.1b(d)")
	doKc   = formula(symKc, "min(0.76, max(0.35, 4 / sqrt(h / t_w)))", "Table B4.1b note [a]")
	doFL   = formula(symFL, "0.7 * F_y", "Table B4.1b note [b], F4.2(3)")

	doLamFI  = formula(symLamF, "b_f / (2 * t_f)", "B4.1a(a)")
	doLamFC  = formula(symLamF, "b_f / t_f", "B4.1a(b)")
	doLamFL  = formula(symLamF, "max(b_1, b_2) / t", "B4.1a(b)")
	doLamWI  = formula(symLamW, "h / t_w", "B4.1b")
	doLamWT  = formula(symLamW, "d / t_w", "B4.1a(d)")
	doLamDt  = formula(symLamW, "D / t", "B4.1b(g)")
	doPf     = formula(symLamPf, "0.38 * sqrt(E / F_y)", "Table B4.1b cases 10, 11, 13")
	doRf     = formula(symLamRf, "1.0 * sqrt(E / F_y)", "Table B4.1b cases 10, 13")
	doRfWeld = formula(symLamRf, "0.95 * sqrt(k_c * E / F_L)", "Table B4.1b case 11")
	doPLeg   = formula(symLamPf, "0.54 * sqrt(E / F_y)", "Table B4.1b case 12")
	doRLeg   = formula(symLamRf, "0.91 * sqrt(E / F_y)", "Table B4.1b case 12")
	doPStem  = formula(symLamPw, "0.84 * sqrt(E / F_y)", "Table B4.1b case 14")
	doRStem  = formula(symLamRw, "1.52 * sqrt(E / F_y)", "Table B4.1b case 14")
	doPw     = formula(symLamPw, "3.76 * sqrt(E / F_y)", "Table B4.1b case 15")
	doRw     = formula(symLamRw, "5.70 * sqrt(E / F_y)", "Table B4.1b case 15")
	doPfHSS  = formula(symLamPf, "1.12 * sqrt(E / F_y)", "Table B4.1b cases 17, 21")
	doRfHSS  = formula(symLamRf, "1.40 * sqrt(E / F_y)", "Table B4.1b case 17")
	doRfBox  = formula(symLamRf, "1.49 * sqrt(E / F_y)", "Table B4.1b case 21")
	doPwHSS  = formula(symLamPw, "2.42 * sqrt(E / F_y)", "Table B4.1b case 19")
	doRwHSS  = formula(symLamRw, "5.70 * sqrt(E / F_y)", "Table B4.1b case 19")
	doPDt    = formula(symLamPw, "0.07 * E / F_y", "Table B4.1b case 20")
	doRDt    = formula(symLamRw, "0.31 * E / F_y", "Table B4.1b case 20")
)

func newFlexure(letter, word string) *flexure {
	x := &flexure{letter: letter, word: word}
	about := ", " + letter + "–" + letter
	s := func(name string, dim unit.Dim, what string) derivation.ID {
		return sym(name+"_"+letter, dim, what+about)
	}
	f := func(id derivation.ID, text, clause string) *derivation.Formula {
		return formula(id, replaceAxis(text, letter), clause)
	}
	x.moduli(s, f)
	x.tube(s, f)
	x.shears(s, f)
	return x
}

type declare func(name string, dim unit.Dim, what string) derivation.ID
type define func(id derivation.ID, text, clause string) *derivation.Formula

func (x *flexure) moduli(s declare, f define) {
	x.z = s("Z", unit.Volume, "plastic section modulus")
	x.s = s("S", unit.Volume, "elastic section modulus")
	x.sc = s("S_c", unit.Volume, "elastic section modulus referred to the toes")
	x.mp = s("M_p", unit.Moment, "plastic moment")
	x.my = s("M_y", unit.Moment, "yield moment")
	x.mnY = s("M_n_Y", unit.Moment, "nominal flexural strength, yielding")
	x.mnF = s("M_n_F", unit.Moment, "nominal flexural strength, local buckling of the flange, leg or wall")
	x.mnW = s("M_n_W", unit.Moment, "nominal flexural strength, local buckling of the web or stem")
	x.mns = s("M_n_s", unit.Moment, "nominal flexural strength of the section, yielding and local buckling")
	x.mn = s("M_n", unit.Moment, "nominal flexural strength")
	x.section = newAvailable(x.mns, "M_c_s_"+x.letter, "phi_b", "Omega_b", "F1(a)")
	x.whole = newAvailable(x.mn, "M_c_"+x.letter, "phi_b", "Omega_b", "F1(a)")
	x.mr = s("M", unit.Moment, "greatest moment, first order, without its sign")
	x.u = s("u_M", unit.None, "utilisation, flexure")
	x.mnt = s("M_nt", unit.Moment, "greatest moment in the stretch, first order, without its sign")
	x.seg = s("M_seg", unit.Moment, "greatest moment in the unbraced segment, first order, without its sign")
	x.mrH = s("M_r", unit.Moment, "required flexural strength, second order")

	x.doMpTube = f(x.mp, "F_y * Z_?", "F7.1 (F7-1)")
	x.doMpPipe = f(x.mp, "F_y * Z_?", "F8.1 (F8-1)")
	x.doMpRod = f(x.mp, "min(F_y * Z_?, 1.6 * F_y * S_?)", "F11.1 (F11-2)")
	x.doMpBar = f(x.mp, "min(F_y * Z_?, 1.5 * F_y * S_?)", "F11.1 (F11-1)")
	x.doMyTee = f(x.my, "F_y * S_?", "F9.1 (F9-3)")
	x.doMyLeg = f(x.my, "F_y * S_?", "F10, about the principal axis")
	x.doY = f(x.mnY, "M_p_?", "limit state of yielding")
	x.doY15 = f(x.mnY, "1.5 * M_y_?", "F10.1 (F10-1)")
	x.doMns = f(x.mns, "M_n_Y_?", "chapter F, the least of its limit states")
	x.doMnsF = f(x.mns, "min(M_n_Y_?, M_n_F_?)", "chapter F, the least of its limit states")
	x.doMnsW = f(x.mns, "min(M_n_Y_?, M_n_W_?)", "chapter F, the least of its limit states")
	x.doMnsFW = f(x.mns, "min(M_n_Y_?, M_n_F_?, M_n_W_?)", "chapter F, the least of its limit states")
	x.doU = f(x.u, "M_? / M_c_s_?", "B3")
	x.doMnS = f(x.mn, "M_n_s_?", "chapter F, no lateral-torsional buckling about this axis")
	x.doMnLT = f(x.mn, "min(M_n_s_?, M_n_LT)", "chapter F, the least of its limit states")

	x.doPipeF = f(x.mnF, "(0.021 * E / lambda_w + F_y) * S_?", "F8.2(b) (F8-2)")
	x.doPipeFSlender = f(x.mnF, "0.33 * E / lambda_w * S_?", "F8.2(c) (F8-3), (F8-4)")
	x.doLegF = f(x.mnF, "F_y * S_c_? * (2.43 - 1.72 * lambda_f * sqrt(F_y / E))", "F10.3(b) (F10-6)")
	x.doLegFSlender = f(x.mnF, "0.71 * E / lambda_f^2 * S_c_?", "F10.3(c) (F10-7), (F10-8)")
}

// tube is F7: about x–x the longer sides are the webs, about y–y the shorter.
func (x *flexure) tube(s declare, f define) {
	x.lamF = s("lambda_f", unit.None, "width-to-thickness ratio of the sides that are flanges")
	x.lamW = s("lambda_w", unit.None, "width-to-thickness ratio of the sides that are webs")
	x.flat = s("b_e", unit.Length, "effective width of the compression flange")
	x.ae = s("A_e_b", unit.Area, "effective area in flexure")
	x.shift = s("e_e", unit.Length, "shift of the neutral axis to the effective section")
	x.ie = s("I_e", unit.Length4, "moment of inertia of the effective section")
	x.se = s("S_e", unit.Volume, "effective section modulus")
	if x.letter == "x" {
		x.areaW = s("a_w", unit.None, "webs over compression flange")
		x.rpg = s("R_pg", unit.None, "bending strength reduction factor")
	}
	flange, web, depth := "b", "h", "d"
	if x.letter == "y" {
		flange, web, depth = "h", "b", "B"
	}
	x.doLamF = f(x.lamF, flange+" / t", "B4.1b(d), (e)")
	x.doLamW = f(x.lamW, web+" / t", "B4.1b(d), (e)")
	x.doTubeF = f(x.mnF, "min(M_p_?, M_p_? - (M_p_? - F_y * S_?) * (lambda_f_? - lambda_pf) / (lambda_rf - lambda_pf))", "F7.2(b) (F7-2)")
	x.doBe = f(x.flat, "min("+flange+", 1.92 * t * sqrt(E / F_y) * (1 - 0.38 / lambda_f_? * sqrt(E / F_y)))", "F7.2(c) (F7-4)")
	x.doBeBox = f(x.flat, "min("+flange+", 1.92 * t * sqrt(E / F_y) * (1 - 0.34 / lambda_f_? * sqrt(E / F_y)))", "F7.2(c) (F7-5)")
	gone := "(" + flange + " - b_e_?) * t"
	x.doAe = f(x.ae, "A_g - "+gone, "F7.2(c)")
	x.doShift = f(x.shift, gone+" * ("+depth+" - t) / 2 / A_e_b_?", "F7.2(c)")
	x.doIe = f(x.ie, "I_? - ("+flange+" - b_e_?) * t^3 / 12 - "+gone+" * (("+depth+" - t) / 2)^2 - A_e_b_? * e_e_?^2", "F7.2(c)")
	x.doSe = f(x.se, "I_e_? / ("+depth+" / 2 + e_e_?)", "F7.2(c)")
	x.doTubeFSlender = f(x.mnF, "F_y * S_e_?", "F7.2(c) (F7-3)")
	x.doTubeW = f(x.mnW, "min(M_p_?, M_p_? - (M_p_? - F_y * S_?) * (lambda_w_? - lambda_pw) / (lambda_rw - lambda_pw))", "F7.3(b) (F7-6)")
	if x.letter == "y" {
		return // a shorter side that is slender goes with slender flanges, which F7 does not have
	}
	x.doAreaW = f(x.areaW, "min(10, 2 * "+web+" / "+flange+")", "F7.3(c), F5.2")
	x.doRpg = f(x.rpg, "min(1, 1 - a_w_? / (1200 + 300 * a_w_?) * (lambda_w_? - 5.70 * sqrt(E / F_y)))", "F5.2 (F5-6)")
	x.doTubeWSlender = f(x.mnW, "R_pg_? * F_y * S_?", "F7.3(c) (F7-7)")
}

// shears is chapter G for the force that goes with bending about the axis.
func (x *flexure) shears(s declare, f define) {
	plane := "the shear force that bends about " + x.letter + "–" + x.letter
	t := func(name string, dim unit.Dim, what string) derivation.ID {
		return sym(name+"_"+x.letter, dim, what+", "+plane)
	}
	x.v = t("V_r", unit.Force, "greatest shear force, without its sign")
	x.vn = t("V_n", unit.Force, "nominal shear strength")
	x.aw = t("A_w", unit.Area, "area that resists")
	x.lamV = t("h_t", unit.None, "width-to-thickness ratio of the part that resists")
	x.kv = t("k_v", unit.None, "shear buckling coefficient")
	x.cv = t("C_v", unit.None, "shear strength coefficient")
	x.uv = t("u_V", unit.None, "utilisation")
	x.shear = newAvailable(x.vn, "V_c_"+x.letter, "phi_v", "Omega_v", "G1")
	x.doVnLeg = f(x.vn, "0.6 * F_y * A_w_? * C_v_?", "G3 (G3-1)")
	x.doVnTube = f(x.vn, "0.6 * F_y * A_w_? * C_v_?", "G4 (G4-1)")
	x.doUv = f(x.uv, "V_r_? / V_c_?", "B3")
	x.doCv2 = f(x.cv, "1.0", "G2.2 (G2-9)")
	x.doCv2Mid = f(x.cv, "1.10 * sqrt(k_v_? * E / F_y) / h_t_?", "G2.2 (G2-10)")
	x.doCv2Long = f(x.cv, "1.51 * k_v_? * E / (h_t_?^2 * F_y)", "G2.2 (G2-11)")
	x.doVnSolid = f(x.vn, "0.6 * F_y * A_w_?", "J4.2(a) (J4-3), with the factors of G1")
}
