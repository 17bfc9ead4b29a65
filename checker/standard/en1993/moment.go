package en1993

import (
	"strings"

	"kern/checker/derivation"
	"kern/lang/unit"
)

// moment holds the symbols and formulas of bending about one axis and of the
// shear force that goes with it: V_z with M_y, V_y with M_z.
type moment struct {
	letter, shear, word string

	wpl, wel, weff, w, mc, mv, mn, mrk derivation.ID
	ms, mEd, u                         derivation.ID
	av, v, vpl, uv, rho, vs            derivation.ID

	doPl, doEl, doEff                    *derivation.Formula // the modulus of the class
	doMc, doMv, doMvWeb, doMvFull, doMrk *derivation.Formula
	doU, doVpl, doUv, doRho              *derivation.Formula
	doMnWeb, doMnFlange, doMnFlangeFull  *derivation.Formula
	doMnTube, doMnPipe, doMnBar          *derivation.Formula
}

var moments = [2]*moment{newMoment("y", "z", "major"), newMoment("z", "y", "minor")}

func newMoment(letter, shear, word string) *moment {
	x := &moment{letter: letter, shear: shear, word: word}
	about := ", " + letter + "–" + letter
	in := func(text string) string {
		return strings.ReplaceAll(strings.ReplaceAll(text, "?", letter), "!", shear)
	}
	s := func(name string, dim unit.Dim, what string) derivation.ID { return sym(in(name), dim, what+about) }
	f := func(id derivation.ID, text, clause string) *derivation.Formula {
		return formula(id, in(text), in(clause))
	}

	x.wpl = s("W_pl_?", unit.Volume, "plastic section modulus")
	x.wel = s("W_el_?", unit.Volume, "elastic section modulus")
	x.weff = s("W_eff_?", unit.Volume, "elastic modulus of the effective section in bending")
	x.w = s("W_?", unit.Volume, "section modulus of the class")
	x.mc = s("M_c_?_Rd", unit.Moment, "design resistance to bending")
	x.mv = s("M_V_?_Rd", unit.Moment, "design resistance to bending beside the shear force")
	x.mn = s("M_N_?_Rd", unit.Moment, "design plastic moment reduced for the axial force")
	if letter == "z" {
		x.mrk = s("M_?_Rk", unit.Moment, "characteristic resistance to bending")
	}
	x.mEd = s("M_?_Ed", unit.Moment, "greatest design moment, first order, without its sign")
	x.ms = s("M_?_s", unit.Moment, "design moment in the section, first order, without its sign")
	x.u = s("u_M_?", unit.None, "utilisation, bending")
	x.av = sym(in("A_v_!"), unit.Area, "shear area for a force along "+shear+"–"+shear)
	x.v = sym(in("V_!_Ed"), unit.Force, "greatest design shear force along "+shear+"–"+shear+", without its sign")
	x.vs = sym(in("V_!_s"), unit.Force, "shear force in the section along "+shear+"–"+shear+", without its sign")
	x.vpl = sym(in("V_pl_!_Rd"), unit.Force, "design plastic shear resistance along "+shear+"–"+shear)
	x.uv = sym(in("u_V_!"), unit.None, "utilisation, shear along "+shear+"–"+shear)
	x.rho = sym(in("rho_V_!"), unit.None, "reduction of the yield strength for shear along "+shear+"–"+shear)

	x.doPl = f(x.w, "W_pl_?", "6.2.5(2), class 1 and 2")
	x.doEl = f(x.w, "W_el_?", "6.2.5(2), class 3")
	x.doEff = f(x.w, "W_eff_?", "6.2.5(2), class 4")
	x.doMc = f(x.mc, "W_? * f_y / gamma_M0", "6.2.5(2) (6.13) to (6.15)")
	if letter == "z" {
		x.doMrk = f(x.mrk, "W_? * f_y", "6.3.3(4) Table 6.7")
	}
	x.doMvFull = f(x.mv, "M_c_?_Rd", "6.2.8(2), V_!_Ed ≤ 0.5 V_pl_!_Rd")
	x.doRho = f(x.rho, "min(0.9999, (2 * V_!_s / V_pl_!_Rd - 1)^2)", "6.2.8(3)")
	x.doMv = f(x.mv, "(1 - rho_V_!) * M_c_?_Rd", "6.2.8(3) (6.29), for the whole section, on the safe side")
	if letter == "y" {
		x.doMvWeb = f(x.mv, "min(M_c_y_Rd, (W_y - rho_V_z * (h_w * t_w)^2 / (4 * t_w)) * f_y / gamma_M0)", "6.2.8(5) (6.30)")
		x.doMnWeb = f(x.mn, "min(M_c_y_Rd, M_c_y_Rd * (1 - n_r) / (1 - 0.5 * a))", "6.2.9.1(5) (6.36)")
	} else {
		x.doMnFlange = f(x.mn, "M_c_z_Rd * (1 - ((n_r - a) / (1 - a))^2)", "6.2.9.1(5) (6.38)")
		x.doMnFlangeFull = f(x.mn, "M_c_z_Rd", "6.2.9.1(5) (6.37)")
	}
	side := map[string]string{"y": "a_w", "z": "a_f"}[letter]
	x.doMnTube = f(x.mn, "min(M_c_?_Rd, M_c_?_Rd * (1 - n_r) / (1 - 0.5 * "+side+"))", "6.2.9.1(5) (6.39), (6.40)")
	x.doMnPipe = f(x.mn, "M_c_?_Rd * min(1 - n_r^1.7, cos(pi / 2 * n_r))", "6.2.9.1(2): the 2005 text has no formula for circular tubes; the smaller of 1 - n^1.7 (2022 edition, from memory) and plastic theory of a thin ring")
	x.doMnBar = f(x.mn, "M_c_?_Rd * (1 - n_r^2)", "6.2.9.1(3) (6.32)")
	x.doU = f(x.u, "M_?_s / M_V_?_Rd", "6.2.5(1) (6.12)")
	x.doVpl = f(x.vpl, "A_v_! * (f_y / sqrt(3)) / gamma_M0", "6.2.6(2) (6.18)")
	x.doUv = f(x.uv, "V_!_Ed / V_pl_!_Rd", "6.2.6(1) (6.17)")
	return x
}

// The section under axial force and bending.
var (
	symNs    = sym("N_s", unit.Force, "axial force in the section, without its sign")
	symNRd   = sym("N_Rd", unit.Force, "design resistance of the section to axial force")
	symNn    = sym("n", unit.None, "axial force over the plastic resistance")
	symNr    = sym("n_r", unit.None, "n, held below 1 so that a moment resistance is left")
	symAw    = sym("a", unit.None, "share of the web in the area")
	symAtw   = sym("a_w", unit.None, "share of the sides in the area")
	symAtf   = sym("a_f", unit.None, "share of the flanges in the area")
	symExpY  = sym("alpha_NM", unit.None, "exponent of the moment about y–y")
	symExpZ  = sym("beta_NM", unit.None, "exponent of the moment about z–z")
	symUNM   = sym("u_NM", unit.None, "utilisation, axial force and bending")
	symHw    = sym("h_w", unit.Length, "depth of the web between the flanges")
	symHwt   = sym("hwt", unit.None, "slenderness h_w/t_w of the web")
	symHwt0  = sym("hwt_limit", unit.None, "limit of h_w/t_w for shear buckling")
	symWb    = sym("b_w", unit.Length, "width of the flange between the sides")
	doHwI    = formula(symHw, "h - 2 * t_f", "6.2.6(3)")
	doHwTube = formula(symHw, "h - 2 * t", "6.2.6(6)")
	doHwB    = formula(symWb, "b - 2 * t", "6.2.6(6)")
	doHwtI   = formula(symHwt, "h_w / t_w", "6.2.6(6) (6.22)")
	doHwtH   = formula(symHwt, "h_w / t", "6.2.6(6) (6.22)")
	doHwtB   = formula(symHwt, "b_w / t", "6.2.6(6) (6.22)")
	doHwt0   = formula(symHwt0, "72 * epsilon", "6.2.6(6) (6.22), eta = 1.0")

	doN     = formula(symNn, "N_s / N_pl_Rd", "6.2.9.1(5)")
	doNr    = formula(symNr, "min(n, 0.99)", "6.2.9.1(5)")
	doAI    = formula(symAw, "min(0.5, (A - 2 * b * t_f) / A)", "6.2.9.1(5)")
	doAtw   = formula(symAtw, "min(0.5, (A - 2 * b * t) / A)", "6.2.9.1(5)")
	doAtf   = formula(symAtf, "min(0.5, (A - 2 * h * t) / A)", "6.2.9.1(5)")
	doTwo   = formula(symExpY, "2", "6.2.9.1(6)")
	doTwoZ  = formula(symExpZ, "2", "6.2.9.1(6), circular hollow sections")
	doBeta5 = formula(symExpZ, "max(1, 5 * n_r)", "6.2.9.1(6), I and H sections")
	doExpTY = formula(symExpY, "min(6, 1.66 / (1 - 1.13 * min(n, 0.85)^2))", "6.2.9.1(6), rectangular hollow sections")
	doExpTZ = formula(symExpZ, "alpha_NM", "6.2.9.1(6), rectangular hollow sections")
	doOneY  = formula(symExpY, "1", "6.2.9.1(6), on the safe side")
	doOneZ  = formula(symExpZ, "1", "6.2.9.1(6), on the safe side")

	doNRd    = formula(symNRd, "A * f_y / gamma_M0", "6.2.4(2) (6.10)")
	doNRdEff = formula(symNRd, "A_eff * f_y / gamma_M0", "6.2.4(2) (6.11)")
	doNRdY   = formula(symNRd, "(A - rho_V_z * A_v_z) * f_y / gamma_M0", "6.2.10(3) (6.45)")
	doNRdZ   = formula(symNRd, "(A - rho_V_y * A_v_y) * f_y / gamma_M0", "6.2.10(3) (6.45)")
	doNRdYZ  = formula(symNRd, "(A - rho_V_z * A_v_z - rho_V_y * A_v_y) * f_y / gamma_M0", "6.2.10(3) (6.45)")

	// u is also held at n and at each ratio by itself: what (6.41) raises to a
	// power may not look better than it is.
	doNMy  = formula(symUNM, "max(n, M_y_s / M_N_y_Rd)", "6.2.9.1(1) (6.31)")
	doNMz  = formula(symUNM, "max(n, M_z_s / M_N_z_Rd)", "6.2.9.1(1) (6.31)")
	doNMyz = formula(symUNM, "max(n, M_y_s / M_N_y_Rd, M_z_s / M_N_z_Rd, (M_y_s / M_N_y_Rd)^alpha_NM + (M_z_s / M_N_z_Rd)^beta_NM)", "6.2.9.1(6) (6.41)")
	// beyond n = 0.99 the sum (6.2) decides, where it is the greater
	doNMyOver  = formula(symUNM, "max(n + M_y_s / M_c_y_Rd, M_y_s / M_N_y_Rd)", "6.2.1(7) (6.2), n > 0.99")
	doNMzOver  = formula(symUNM, "max(n + M_z_s / M_c_z_Rd, M_z_s / M_N_z_Rd)", "6.2.1(7) (6.2), n > 0.99")
	doNMyzOver = formula(symUNM, "max(n + M_y_s / M_c_y_Rd + M_z_s / M_c_z_Rd, (M_y_s / M_N_y_Rd)^alpha_NM + (M_z_s / M_N_z_Rd)^beta_NM)", "6.2.1(7) (6.2), n > 0.99")
	doSumY     = formula(symUNM, "N_s / N_Rd + M_y_s / M_V_y_Rd", "6.2.1(7) (6.2); class 3: 6.2.9.2 (6.42); class 4: 6.2.9.3 (6.44), e_N = 0")
	doSumZ     = formula(symUNM, "N_s / N_Rd + M_z_s / M_V_z_Rd", "6.2.1(7) (6.2); class 3: 6.2.9.2 (6.42); class 4: 6.2.9.3 (6.44), e_N = 0")
	doSumYZ    = formula(symUNM, "N_s / N_Rd + M_y_s / M_V_y_Rd + M_z_s / M_V_z_Rd", "6.2.1(7) (6.2); class 3: 6.2.9.2 (6.42); class 4: 6.2.9.3 (6.44), e_N = 0")
)
