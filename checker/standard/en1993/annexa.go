package en1993

import (
	"math"
	"strings"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Interaction factors of Annex A (method 1).
var (
	symMuY   = sym("mu_y", unit.None, "factor of Annex A")
	symMuZ   = sym("mu_z", unit.None, "factor of Annex A")
	symWy    = sym("w_y", unit.None, "plastic over elastic modulus y–y")
	symWz    = sym("w_z", unit.None, "plastic over elastic modulus z–z")
	symNplA  = sym("n_pl", unit.None, "axial force over the characteristic resistance")
	symALT   = sym("a_LT", unit.None, "1 - I_t / I_y")
	symLam00 = sym("lambda_0", unit.None, "slenderness for lateral-torsional buckling under uniform moment")
	symLamL  = sym("lambda_0_lim", unit.None, "limit of lambda_0 up to which torsion does not count")
	symEy    = sym("e_y_A", unit.None, "epsilon_y of Annex A")
	symCmLT  = sym("C_mLT_A", unit.None, "C_mLT of Annex A")
	symLamM  = sym("lambda_max", unit.None, "greater slenderness")
	symCyy   = sym("C_yy", unit.None, "factor of Annex A")
	symCyz   = sym("C_yz", unit.None, "factor of Annex A")
	symCzy   = sym("C_zy", unit.None, "factor of Annex A")
	symCzz   = sym("C_zz", unit.None, "factor of Annex A")
	symBLT   = sym("b_LT", unit.None, "factor of Annex A")
	symCLT   = sym("c_LT", unit.None, "factor of Annex A")
	symDLT   = sym("d_LT", unit.None, "factor of Annex A")
	symELT   = sym("e_LT", unit.None, "factor of Annex A")

	doMuY   = formula(symMuY, "(1 - N_Ed / N_cr_y) / (1 - chi_y * N_Ed / N_cr_y)", "Annex A Table A.1")
	doMuZ   = formula(symMuZ, "(1 - N_Ed / N_cr_z) / (1 - chi_z * N_Ed / N_cr_z)", "Annex A Table A.1")
	doWy    = formula(symWy, "min(1.5, W_pl_y / W_el_y)", "Annex A Table A.1")
	doWz    = formula(symWz, "min(1.5, W_pl_z / W_el_z)", "Annex A Table A.1")
	doNplA  = formula(symNplA, "N_Ed / (A * f_y / gamma_M1)", "Annex A Table A.1")
	doALT   = formula(symALT, "max(0, 1 - I_t / I_y)", "Annex A Table A.1")
	doLam00 = formula(symLam00, "sqrt(W_y * f_y / M_cr_0)", "Annex A Table A.1")
	doLamL  = formula(symLamL, "0.2 * sqrt(C_1) * ((1 - N_Ed / N_cr_z) * (1 - N_Ed / N_cr_T))^0.25", "Annex A Table A.1")
	doEy    = formula(symEy, "M_y_Ed / N_Ed * A / W_el_y", "Annex A Table A.1, class 1 to 3")
	doEy4   = formula(symEy, "M_y_Ed / N_Ed * A_eff / W_eff_y", "Annex A Table A.1, class 4")
	doLamM  = formula(symLamM, "max(lambda_y, lambda_z)", "Annex A Table A.1")

	doCmyA    = formula(factorY.c, "C_my_0 + (1 - C_my_0) * sqrt(e_y_A) * a_LT / (1 + sqrt(e_y_A) * a_LT)", "Annex A Table A.1")
	doCmyLow  = formula(factorY.c, "C_my_0", "Annex A Table A.1, lambda_0 below its limit")
	doCmyOne  = formula(factorY.c, "1", "Annex A Table A.1, no axial force")
	doCmzA    = formula(factorZ.c, "C_mz_0", "Annex A Table A.1")
	doCmLTA   = formula(symCmLT, "max(1, C_my^2 * a_LT / sqrt((1 - N_Ed / N_cr_z) * (1 - N_Ed / N_cr_T)))", "Annex A Table A.1")
	doCmLTLow = formula(symCmLT, "1", "Annex A Table A.1, lambda_0 below its limit")

	doBLT = formula(symBLT, "0.5 * a_LT * lambda_0^2 * M_y_Ed / M_b_Rd * M_z_Ed / M_c_z_Rd", "Annex A Table A.1")
	doCLT = formula(symCLT, "10 * a_LT * lambda_0^2 / (5 + lambda_z^4) * M_y_Ed / (C_my * M_b_Rd)", "Annex A Table A.1")
	doDLT = formula(symDLT, "2 * a_LT * lambda_0 / (0.1 + lambda_z^4) * M_y_Ed / (C_my * M_b_Rd) * M_z_Ed / (C_mz * M_c_z_Rd)", "Annex A Table A.1")
	doELT = formula(symELT, "1.7 * a_LT * lambda_0 / (0.1 + lambda_z^4) * M_y_Ed / (C_my * M_b_Rd)", "Annex A Table A.1")
	doB0  = formula(symBLT, "0", "Annex A Table A.1, bending about one axis alone or torsion does not count")
	doC0  = formula(symCLT, "0", "Annex A Table A.1, no bending about y–y or torsion does not count")
	doD0  = formula(symDLT, "0", "Annex A Table A.1, bending about one axis alone or torsion does not count")
	doE0  = formula(symELT, "0", "Annex A Table A.1, no bending about y–y or torsion does not count")

	doCyy = formula(symCyy, "max(W_el_y / W_pl_y, 1 + (w_y - 1) * ((2 - 1.6 / w_y * C_my^2 * lambda_max - 1.6 / w_y * C_my^2 * lambda_max^2) * n_pl - b_LT))", "Annex A Table A.1")
	doCyz = formula(symCyz, "max(0.6 * sqrt(w_z / w_y) * W_el_z / W_pl_z, 1 + (w_z - 1) * ((2 - 14 * C_mz^2 * lambda_max^2 / w_z^5) * n_pl - c_LT))", "Annex A Table A.1")
	doCzy = formula(symCzy, "max(0.6 * sqrt(w_y / w_z) * W_el_y / W_pl_y, 1 + (w_y - 1) * ((2 - 14 * C_my^2 * lambda_max^2 / w_y^5) * n_pl - d_LT))", "Annex A Table A.1")
	doCzz = formula(symCzz, "max(W_el_z / W_pl_z, 1 + (w_z - 1) * (2 - 1.6 / w_z * C_mz^2 * lambda_max - 1.6 / w_z * C_mz^2 * lambda_max^2 - e_LT) * n_pl)", "Annex A Table A.1")

	doKyyA12 = formula(symKyy, "C_my * C_mLT_A * mu_y / (1 - N_Ed / N_cr_y) / C_yy", "Annex A Table A.1, class 1 and 2")
	doKyzA12 = formula(symKyz, "C_mz * mu_y / (1 - N_Ed / N_cr_z) / C_yz * 0.6 * sqrt(w_z / w_y)", "Annex A Table A.1, class 1 and 2")
	doKzyA12 = formula(symKzy, "C_my * C_mLT_A * mu_z / (1 - N_Ed / N_cr_y) / C_zy * 0.6 * sqrt(w_y / w_z)", "Annex A Table A.1, class 1 and 2")
	doKzzA12 = formula(symKzz, "C_mz * mu_z / (1 - N_Ed / N_cr_z) / C_zz", "Annex A Table A.1, class 1 and 2")
	doKyyA34 = formula(symKyy, "C_my * C_mLT_A * mu_y / (1 - N_Ed / N_cr_y)", "Annex A Table A.1, class 3 and 4")
	doKyzA34 = formula(symKyz, "C_mz * mu_y / (1 - N_Ed / N_cr_z)", "Annex A Table A.1, class 3 and 4")
	doKzyA34 = formula(symKzy, "C_my * C_mLT_A * mu_z / (1 - N_Ed / N_cr_y)", "Annex A Table A.1, class 3 and 4")
	doKzzA34 = formula(symKzz, "C_mz * mu_z / (1 - N_Ed / N_cr_z)", "Annex A Table A.1, class 3 and 4")
	doKOver  = [4]*derivation.Formula{overloaded(symKyy), overloaded(symKyz), overloaded(symKzy), overloaded(symKzz)}

	tableA2 = [2]*momentA{newMomentA("y", "my", 0), newMomentA("z", "mz", 1)}
)

func overloaded(id derivation.ID) *derivation.Formula {
	return formula(id, "1", "N_Ed is more than the buckling resistance: the member fails whatever the factor")
}

// momentA is C_mi,0 of Table A.2 about one axis.
type momentA struct {
	c, delta                               derivation.ID
	doLinear, doUniform, doPoint, doCommon *derivation.Formula
}

func newMomentA(letter, id string, a int) *momentA {
	m := &momentA{}
	in := func(text string) string {
		return strings.ReplaceAll(strings.ReplaceAll(text, "?", letter), "#", id)
	}
	m.c = sym(in("C_#_0"), unit.None, "equivalent uniform moment factor of Table A.2, "+letter+"–"+letter)
	m.delta = sym(in("delta_?"), unit.Length, "greatest deflection of the stretch, first order, "+letter+"–"+letter)
	m.doLinear = formula(m.c, in("0.79 + 0.21 * psi_# + 0.36 * (psi_# - 0.33) * N_Ed / N_cr_?"), "Annex A Table A.2, linear")
	m.doUniform = formula(m.c, in("1 + 0.03 * N_Ed / N_cr_?"), "Annex A Table A.2, uniform load")
	m.doPoint = formula(m.c, in("1 - 0.18 * N_Ed / N_cr_?"), "Annex A Table A.2, load at mid-height")
	m.doCommon = formula(m.c, in("1 + (pi^2 * E * I_? * delta_? / (L_?^2 * M_?_Ed) - 1) * N_Ed / N_cr_?"), "Annex A Table A.2, any diagram")
	return m
}

// cm0 computes C_mi,0 for the diagram of a stretch.
func (c *calc) cm0(a int, d diagram, pieces []action.Piece) {
	t, f := tableA2[a], []*momentFactor{factorY, factorZ}[a]
	switch {
	case d.straight:
		mh, m2 := d.first, d.last
		if math.Abs(m2) > math.Abs(mh) {
			mh, m2 = m2, mh
		}
		c.take(f.mh, mh, "")
		c.take(f.m2, m2, "")
		c.do(f.doPsi)
		c.do(t.doLinear)
	case d.lower && d.upper && d.uniform:
		c.do(t.doUniform)
	case d.lower && d.upper && !d.line && d.points == 1 && d.pointMiddle:
		c.do(t.doPoint)
	default:
		ei := c.s.At(symE) * c.s.At(axes[a].i)
		c.take(t.delta, standard.FromChord(pieces, d.from, d.to, func(float64) float64 { return ei }), "beam analysis")
		c.do(t.doCommon)
	}
}

// annexA computes the factors of Tables A.1 and A.2.
func (c *calc) annexA(s strip, k int, dy, dz diagram, withY, withZ bool) {
	b := &c.combs[k]
	if c.s.At(symNy) >= 1 || c.s.At(symNz) >= 1 {
		for _, f := range doKOver {
			c.do(f)
		}
		return
	}
	n := max(c.s.At(axes[0].n), c.s.At(axes[1].n))
	source := ""
	if c.s.Recorded() {
		source = c.f.Combinations[k].Name + ", the greater of both stretches"
	}
	c.take(symNEd, n, source)
	c.do(doMuY)
	c.do(doMuZ)
	compact := b.class <= 2
	torsion := false // whether torsion counts
	if withY {
		if dy.peak > c.tiny[0] {
			c.cm0(0, dy, b.pieces[0])
		} else {
			c.take(tableA2[0].c, 1, "hardly any moment in the stretch")
		}
		c.do(doALT)
		if s.lt >= 0 {
			c.polar()
			c.do(doLam00)
			torsion = !(c.s.At(symLam00) <= c.do(doLamL))
		}
		switch {
		case !torsion:
			c.do(doCmyLow)
			c.do(doCmLTLow)
		case n <= 0:
			c.do(doCmyOne)
			c.do(doCmLTA)
		default:
			if b.class == 4 {
				c.do(doEy4)
			} else {
				c.do(doEy)
			}
			c.do(doCmyA)
			c.do(doCmLTA)
		}
	}
	if withZ {
		c.cm0(1, dz, b.pieces[1])
		c.do(doCmzA)
	}
	if compact {
		c.do(doWy)
		c.do(doWz)
		c.do(doNplA)
		c.do(doLamM)
		if withZ {
			c.do(moments[1].doMc)
		}
		c.annexALT(withY && s.lt >= 0, withZ)
	}
	pick := func(a12, a34 *derivation.Formula) {
		if compact {
			c.do(a12)
		} else {
			c.do(a34)
		}
	}
	if withY {
		if compact {
			c.do(doCyy)
			c.do(doCzy)
		}
		pick(doKyyA12, doKyyA34)
		pick(doKzyA12, doKzyA34)
	}
	if withZ {
		if compact {
			c.do(doCyz)
			c.do(doCzz)
		}
		pick(doKyzA12, doKyzA34)
		pick(doKzzA12, doKzzA34)
	}
}

// annexALT computes b_LT to e_LT.
func (c *calc) annexALT(withY, withZ bool) {
	if withY && withZ {
		for _, f := range []*derivation.Formula{doBLT, doCLT, doDLT, doELT} {
			c.do(f)
		}
		return
	}
	for _, f := range []*derivation.Formula{doB0, doC0, doD0, doE0} {
		c.do(f)
	}
}

// polar computes the critical force of torsional buckling about the centroid.
func (c *calc) polar() {
	c.take(symY0, 0, "doubly symmetric")
	c.do(doI0)
	if c.f.TwistFree {
		c.do(doNTFree)
		return
	}
	c.take(symLT, c.f.Twist*c.f.TwistK, "points held against twist")
	c.do(doNT)
}
