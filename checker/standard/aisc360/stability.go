package aisc360

import (
	"fmt"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/standard"
	"kern/lang/unit"
)

// The method of stability: effective lengths (Appendix 7) or direct analysis
// (chapter C), and what both ask of a single column.
var (
	symPns   = sym("P_ns", unit.Force, "compressive strength of the cross-section")
	symPrTau = sym("P_r_tau", unit.Force, "required compressive strength, greatest in the member")
	symTau   = sym("tau_b", unit.None, "stiffness reduction parameter")
	symYi    = sym("Y_i", unit.Force, "gravity load on the column, the sum of its levels, greatest of the combinations")
	symNi    = sym("N_i", unit.Force, "notional load of the column's share")

	doPns     = formula(symPns, "F_y * A_g", "C2.3(b)")
	doFnYield = formula(symFn, "F_y", "C2.3(b)")
	doPnsEff  = formula(symPns, "F_y * A_e", "C2.3(b), A_e of E7 at F_n = F_y")
	doTauOne  = formula(symTau, "1", "C2.3(b)(1) (C2-2a), alpha P_r/P_ns ≤ 0.5")
	doTau     = formula(symTau, "max(0, 4 * alpha * P_r_tau / P_ns * (1 - alpha * P_r_tau / P_ns))", "C2.3(b)(2) (C2-2b)")
	doNi      = formula(symNi, "0.002 * alpha * Y_i", "C2.2b(a) (C2-1)")
)

// chart is the stiffness ratios of rigid joints, whose effective length factor is the
// root of an equation.
type chart struct {
	base, top, root   derivation.ID
	doSway, doInhibit *derivation.Formula
}

var charts = [2]*chart{newChart("x"), newChart("y")}

func newChart(letter string) *chart {
	c := &chart{
		base: sym("G_base_"+letter, unit.None, "stiffness ratio of the joint at the base, "+letter+"–"+letter),
		top:  sym("G_top_"+letter, unit.None, "stiffness ratio of the joint at the top, "+letter+"–"+letter),
		root: sym("chart_"+letter, unit.None, "1 where K is a root of the equation of the alignment chart, "+letter+"–"+letter),
	}
	f := func(text, clause string) *derivation.Formula {
		return formula(c.root, replaceAxis(text, letter), clause)
	}
	c.doSway = f("1 + (G_base_? * G_top_? * (pi / K_?)^2 - 36) / (6 * (G_base_? + G_top_?)) - pi / K_? / tan(pi / K_?)", "C-A-7-2, sidesway uninhibited")
	c.doInhibit = f("G_base_? * G_top_? / 4 * (pi / K_?)^2 + (G_base_? + G_top_?) / 2 * (1 - pi / K_? / tan(pi / K_?)) + 2 * tan(pi / (2 * K_?)) / (pi / K_?)", "C-A-7-1, sidesway inhibited")
	return c
}

// joints takes the stiffness ratios and puts the factor into the equation of the
// chart.
func (c *calc) joints(a int) {
	j := c.f.Member.Joints[a]
	c.take(charts[a].base, j.Base, "joints of the member")
	c.take(charts[a].top, j.Top, "joints of the member")
	if j.Sway {
		c.do(charts[a].doSway)
	} else {
		c.do(charts[a].doInhibit)
	}
}

// rigidity is the flexural rigidity E I* about an axis.
type rigidity struct {
	ei                 derivation.ID
	doWhole, doReduced *derivation.Formula
}

var rigidities = [2]*rigidity{newRigidity("x"), newRigidity("y")}

func newRigidity(letter string) *rigidity {
	dim, _ := unit.Moment.Mul(unit.Length)
	r := &rigidity{ei: sym("EI_"+letter, dim, "flexural rigidity of the analysis, "+letter+"–"+letter)}
	r.doWhole = formula(r.ei, "E * I_"+letter, "App. 8.1.2, effective length method")
	r.doReduced = formula(r.ei, "0.8 * tau_b * E * I_"+letter, "App. 8.1.2, C2.3, direct analysis")
	return r
}

// rigidity computes E I* about an axis (0 x–x, 1 y–y) in the group that is open;
// pr is the required compressive strength, N, at least 0.
func (c *calc) rigidity(a int, pr float64, source string) float64 {
	if !c.f.Env.Basis.Direct {
		return c.do(rigidities[a].doWhole)
	}
	c.reduction(max(0, pr), source)
	return c.do(rigidities[a].doReduced)
}

// reduction computes tau_b in the group that is open.
func (c *calc) reduction(pr float64, source string) {
	if c.slender {
		c.do(doFnYield)
		c.effectiveArea()
		c.do(doPnsEff)
	} else {
		c.do(doPns)
	}
	c.take(symPrTau, pr, source)
	if c.s.At(symAlphaFactor)*pr <= 0.5*c.s.At(symPns) {
		c.do(doTauOne)
	} else {
		c.do(doTau)
	}
}

// sways tells whether the column can move sideways about an axis by itself or with
// its frame.
func (c *calc) sways(a int) bool {
	m := c.f.Member
	if j := m.Joints[a]; j != nil {
		return j.Sway
	}
	loose := func(e action.End) bool { return e == action.Free || e == action.Guided }
	return loose(m.Base[a]) || loose(m.Top[a])
}

// stability says what the method of stability leaves to the frame.
func (c *calc) stability() {
	const rule = "frame-stability"
	direct := c.f.Env.Basis.Direct
	if !c.pressed {
		c.cover(rule, standard.NotApplicable, notPressed)
		return
	}
	c.group(rule)
	most, k := c.worst(0, c.f.Member.Height)
	if direct {
		c.reduction(most, c.combination(k))
	}
	c.take(symYi, most, c.combination(k))
	n := c.do(doNi)
	show := c.f.Env.Basis.Show.Show(n, unit.Force, 3)
	axes, frame := "", false // frame: it sways with a frame, not by itself
	for a, word := range [2]string{"major", "minor"} {
		if c.sways(a) {
			if axes != "" {
				axes += " and "
			}
			axes += word
			frame = frame || c.f.Member.Joints[a] != nil
		}
	}
	const limits = "gravity loads go mainly through vertical members"
	switch {
	case axes != "" && !frame && c.f.Imperfect():
		// 1/200 times at least 2/3 is more than 0.002, and the analysis of ASD loads is
		// brought to 1.6 of them in B_1 and B_2
		c.assume("the forces of the sway imperfection of EN 1993-1-1 5.3.2, at least 1/300 of the gravity loads, stand for the notional loads of 0.002 (C2.2b)")
		c.cover(rule, standard.Checked, "the column carries the forces of a sway imperfection, which are more than the notional loads")
	case direct && axes != "":
		c.cover(rule, standard.NotCovered, fmt.Sprintf("the column can sway about %s: direct analysis asks for notional loads, 0.002 alpha Y_i = %s across it (C2.2b): say imperfection on, whose forces are greater, or give them as loads of a case by hand and depart from this rule", axes, show))
	case direct:
		c.assume("direct analysis (C1.1): lengths without factors; notional loads, 0.002 alpha Y_i = %s of this column, go to what holds its ends (C2.2b)", show)
		c.cover(rule, standard.Checked, "direct analysis: K = 1, 0.8 tau_b E I; the ends are held in place")
	case axes != "":
		c.assume("effective length method (App. 7.2): %s; second-order over first-order drift at most 1.5; notional loads, 0.002 alpha Y_i = %s of this column, are among the loads where they bend it (imperfection on has greater ones)", limits, show)
		c.cover(rule, standard.NotApplicable, "the frame is outside of the calculation: the assumptions say what it has to meet (App. 7.2.1)")
	default:
		c.assume("effective length method (App. 7.2): %s; a factor K below 1 rests on the ends being as they are said (App. 7.2.3(a)); notional loads, 0.002 alpha Y_i = %s of this column, go to what holds its ends (C2.2b)", limits, show)
		c.cover(rule, standard.NotApplicable, "the frame is outside of the calculation: the assumptions say what it has to meet (App. 7.2.1)")
	}
}
