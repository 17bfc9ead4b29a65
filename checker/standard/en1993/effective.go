package en1993

import (
	"kern/checker/derivation"
	"kern/checker/section"
	"kern/lang/unit"
)

// The effective section of class 4 in bending alone, EN 1993-1-5 4.4: the flange
// in compression first, with uniform stress, then the web with the stresses of
// the section that the flange leaves. What is lost is taken off the gross
// section, so that fillets and corners count as they are. The sections are
// doubly symmetric, so that the effective area in compression keeps its
// centroid, e_N = 0.
type effective struct {
	steps            []*derivation.Formula // up to lambda_p
	lambda           derivation.ID
	psi              derivation.ID
	doRho, doRhoFull *derivation.Formula
	after            []*derivation.Formula
}

var (
	effectiveIY   = newEffective("y", "2 * c_f", "t_f", "rho_f", "h", "t_f", "c_w", "t_w", 1, "ct_w")
	effectiveIZ   = newEffectiveFlanges()
	effectiveTubY = newEffective("y", "c_b", "t", "rho_b", "h", "t", "c_h", "t", 2, "ct_h")
	effectiveTubZ = newEffective("z", "c_h", "t", "rho_h", "b", "t", "c_b", "t", 2, "ct_b")
	effectiveBoxY = newEffective("y", "c_bs", "t", "rho_bs", "h", "t", "c_hs", "t", 2, "ct_hs")
	effectiveBoxZ = newEffective("z", "c_hs", "t", "rho_hs", "b", "t", "c_bs", "t", 2, "ct_bs")
)

// effectiveSymbols are declared once for each axis and shared by the shapes.
type effectiveSymbols struct{ lossF, armF, shiftF, zc, psi, k, lam, rho, lost, lossW, armW, area, shift, i derivation.ID }

var effectiveOf = map[string]*effectiveSymbols{"y": newEffectiveSymbols("y"), "z": newEffectiveSymbols("z")}

func newEffectiveSymbols(a string) *effectiveSymbols {
	about := ", effective section in bending " + a + "–" + a
	return &effectiveSymbols{
		lossF:  sym("dA_f_"+a, unit.Area, "area lost in the flange in compression"+about),
		armF:   sym("d_f_"+a, unit.Length, "its distance from the centroid"+about),
		shiftF: sym("e_f_"+a, unit.Length, "shift of the centroid by the flange"+about),
		zc:     sym("c_c_"+a, unit.Length, "width of the web in compression"+about),
		psi:    sym("psi_"+a+"_eff", unit.None, "ratio of the edge stresses of the web"+about),
		k:      sym("k_sigma_"+a, unit.None, "buckling factor of the web"+about),
		lam:    sym("lambda_p_"+a, unit.None, "plate slenderness of the web"+about),
		rho:    sym("rho_"+a, unit.None, "reduction factor of the web"+about),
		lost:   sym("c_l_"+a, unit.Length, "width lost in the web"+about),
		lossW:  sym("dA_w_"+a, unit.Area, "area lost in the web"+about),
		armW:   sym("d_w_"+a, unit.Length, "its distance from the centroid"+about),
		area:   sym("A_eff_"+a, unit.Area, "area"+about),
		shift:  sym("e_"+a, unit.Length, "shift of the centroid"+about),
		i:      sym("I_eff_"+a, unit.Length4, "second moment of area"+about),
	}
}

// newEffective: cf, tf width and thickness of what may be lost in the flange,
// rf its reduction factor; depth the overall depth; cw, tw, count the webs.
func newEffective(a, cf, tf, rf, depth, td, cw, tw string, count int, ct string) *effective {
	s := effectiveOf[a]
	const plate = "EN 1993-1-5 4.4"
	n := map[int]string{1: "", 2: "2 * "}[count]
	e := &effective{lambda: s.lam, psi: s.psi}
	e.steps = []*derivation.Formula{
		formula(s.lossF, "(1 - "+rf+") * "+cf+" * "+tf, plate),
		formula(s.armF, "("+depth+" - "+td+") / 2", plate),
		formula(s.shiftF, "dA_f_"+a+" * d_f_"+a+" / (A - dA_f_"+a+")", plate),
		formula(s.zc, cw+" / 2 + e_f_"+a, plate),
		formula(s.psi, "-("+cw+" - c_c_"+a+") / c_c_"+a, plate),
		formula(s.k, "7.81 - 6.29 * psi_"+a+"_eff + 9.78 * psi_"+a+"_eff^2", "EN 1993-1-5 Table 4.1"),
		formula(s.lam, ct+" / (28.4 * epsilon * sqrt(k_sigma_"+a+"))", "EN 1993-1-5 4.4(2)"),
	}
	e.doRho = formula(s.rho, "min(1, (lambda_p_"+a+" - 0.055 * (3 + psi_"+a+"_eff)) / lambda_p_"+a+"^2)", "EN 1993-1-5 4.4(2) (4.2)")
	e.doRhoFull = formula(s.rho, "1", "EN 1993-1-5 4.4(2)")
	e.after = []*derivation.Formula{
		formula(s.lost, "(1 - rho_"+a+") * c_c_"+a, "EN 1993-1-5 Table 4.1"),
		formula(s.lossW, n+"c_l_"+a+" * "+tw, "EN 1993-1-5 Table 4.1"),
		// b_e1 = 0.4 b_eff stands at the edge in compression
		formula(s.armW, cw+" / 2 - 0.4 * rho_"+a+" * c_c_"+a+" - c_l_"+a+" / 2", "EN 1993-1-5 Table 4.1"),
		formula(s.area, "A - dA_f_"+a+" - dA_w_"+a, plate),
		formula(s.shift, "(dA_f_"+a+" * d_f_"+a+" + dA_w_"+a+" * d_w_"+a+") / A_eff_"+a, plate),
		formula(s.i, "I_"+a+" - dA_f_"+a+" * (d_f_"+a+"^2 + "+tf+"^2 / 12) - dA_w_"+a+" * (d_w_"+a+"^2 + c_l_"+a+"^2 / 12) - A_eff_"+a+" * e_"+a+"^2", plate),
		formula(moments[map[string]int{"y": 0, "z": 1}[a]].weff, "I_eff_"+a+" / ("+depth+" / 2 + e_"+a+")", plate),
	}
	return e
}

// newEffectiveFlanges is an I section bent about z–z: the halves of its flanges
// in compression, each reduced as for uniform stress, which is on the safe side.
func newEffectiveFlanges() *effective {
	s := effectiveOf["z"]
	const plate = "EN 1993-1-5 4.4, the tips in uniform compression, on the safe side"
	return &effective{after: []*derivation.Formula{
		formula(s.lost, "(1 - rho_f) * c_f", plate),
		formula(s.lossF, "2 * c_l_z * t_f", plate),
		formula(s.armF, "b / 2 - c_l_z / 2", plate),
		formula(s.area, "A - dA_f_z", plate),
		formula(s.shift, "dA_f_z * d_f_z / A_eff_z", plate),
		formula(s.i, "I_z - dA_f_z * (d_f_z^2 + c_l_z^2 / 12) - A_eff_z * e_z^2", plate),
		formula(moments[1].weff, "I_eff_z / max(b / 2 - c_l_z + e_z, b / 2 - e_z)", plate),
	}}
}

// effectiveModuli computes W_eff about the axes that are bent.
func (c *calc) effectiveModuli() {
	sh := c.f.Member.Section.Shape
	var both [2]*effective
	switch {
	case sh.Kind == section.ISection && !c.f.Member.Section.Turned:
		both = [2]*effective{effectiveIY, effectiveIZ}
	case sh.Kind == section.Tube && sh.OuterRadius > 0:
		both = [2]*effective{effectiveTubY, effectiveTubZ}
	case sh.Kind == section.Tube:
		both = [2]*effective{effectiveBoxY, effectiveBoxZ}
	default:
		return
	}
	for a, e := range both {
		if !c.f.Bends[a] {
			continue
		}
		for _, f := range e.steps {
			c.do(f)
		}
		if e.doRho != nil {
			// no reduction up to 0.5 + sqrt(0.085 - 0.055 psi)
			lam, psi := c.s.At(e.lambda), c.s.At(e.psi)
			if lam <= 0.5 || (lam-0.5)*(lam-0.5) <= 0.085-0.055*psi {
				c.do(e.doRhoFull)
			} else {
				c.do(e.doRho)
			}
		}
		for _, f := range e.after {
			c.do(f)
		}
	}
	c.assume("class 4: the effective section of the doubly symmetric section keeps its centroid in compression, e_N = 0")
}
