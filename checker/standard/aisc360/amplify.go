package aisc360

import (
	"math"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/lang/unit"
)

// Approximate second-order analysis, appendix 8.
var symB2 = sym("B_2", unit.None, "multiplier for the translation of the story")

// amplifier holds B_1 about one axis.
type amplifier struct {
	letter                             string
	m1, m2, cm, lc1, pe1, b1           derivation.ID
	doCm, doLc1, doLc1Step, doPe1      *derivation.Formula
	doB1                               *derivation.Formula
	doMr, doMrPart, doMrSway, doMrPull *derivation.Formula
}

var amplifiers = [2]*amplifier{newAmplifier(0), newAmplifier(1)}

func newAmplifier(a int) *amplifier {
	x := flexures[a]
	s := func(name string, dim unit.Dim, what string) derivation.ID {
		return sym(name+"_"+x.letter, dim, what+", "+x.letter+"–"+x.letter)
	}
	f := func(id derivation.ID, text, clause string) *derivation.Formula {
		return formula(id, replaceAxis(text, x.letter), clause)
	}
	m := &amplifier{letter: x.letter}
	m.m1 = s("M_1", unit.Moment, "smaller end moment of the stretch, positive in reverse curvature")
	m.m2 = s("M_2", unit.Moment, "larger end moment of the stretch, without its sign")
	m.cm = s("C_m", unit.None, "equivalent uniform moment factor")
	m.lc1 = s("L_c1", unit.Length, "effective length, no translation of the ends")
	m.pe1 = s("P_e1", unit.Force, "elastic critical buckling strength in the plane of bending, no translation of the ends")
	m.b1 = s("B_1", unit.None, "multiplier for the curvature of the member")
	m.doCm = f(m.cm, "0.6 - 0.4 * M_1_? / M_2_?", "App. 8.1.2(a) (A-8-4)")
	m.doLc1 = f(m.lc1, "min(1, K_?) * L_?", "App. 8.1.2: the factor of ends that stay in place, at most 1")
	m.doLc1Step = f(m.lc1, "K_? * L_?", "App. 8.1.2: of the lift in a stretch in which the section changes")
	m.doPe1 = f(m.pe1, "pi^2 * EI_? / L_c1_?^2", "App. 8.1.2 (A-8-5)")
	m.doB1 = f(m.b1, "max(1, C_m_? / (1 - alpha * P_r_? / P_e1_?))", "App. 8.1.2 (A-8-3)")
	m.doMr = f(x.mrH, "B_1_? * M_nt_?", "App. 8.1.1 (A-8-1)")
	m.doMrPart = f(x.mrH, "min(B_1_? * M_nt_?, M_seg_? + C_m_? * M_nt_? * alpha * P_r_? / (P_e1_? - alpha * P_r_?))", "App. 8.1.1 (A-8-1), in a segment that is a part of the stretch: its own moment and the second-order part of the stretch's")
	m.doMrSway = f(x.mrH, "max(B_1_?, B_2) * M_nt_?", "App. 8.1.1 (A-8-1): the whole moment with the greater multiplier, on the safe side")
	m.doMrPull = f(x.mrH, "M_seg_?", "App. 8.1.1 (A-8-1), B_1 = 1 without compression")
	return m
}

// swaying says which axis of bending can sway without B_2 in the basis, "" for
// none.
func (c *calc) swaying() string {
	if _, ok := c.f.Env.Basis.Overrides["B_2"]; ok {
		return ""
	}
	for a, x := range flexures {
		if c.f.Bends[a] && c.sways(a) {
			return x.word
		}
	}
	return ""
}

// amplified computes the required moment about an axis in a part of a stretch from the
// greatest of first order in the part and in the stretch. It is false where the compression reaches P_e1, and
// nothing can be in equilibrium. P_r, L and K are in the sheet.
func (c *calc) amplified(a, k int, s action.Stretch, d action.Diagram, part float64) bool {
	m := amplifiers[a]
	x := axes[a]
	p := c.s.At(x.pr)
	c.take(flexures[a].seg, part, c.combination(k))
	if !(p > 0) {
		c.do(m.doMrPull)
		return true
	}
	c.take(flexures[a].mnt, d.Peak, c.combination(k))
	c.rigidity(a, p, c.combination(k))
	if s.Stepped {
		c.do(m.doLc1Step)
	} else {
		c.do(m.doLc1)
	}
	if !(c.s.At(symAlphaFactor)*p < c.do(m.doPe1)) {
		return false
	}
	o, stated := c.f.Env.Basis.Overrides["C_m"]
	switch {
	case stated:
		c.take(m.cm, o.Value, "basis, because \""+o.Because+"\"")
	case d.Straight && d.Peak > c.bend.tiny[a]:
		small, large := d.First, d.Last
		if math.Abs(small) > math.Abs(large) {
			small, large = large, small
		}
		c.take(m.m2, math.Abs(large), c.combination(k))
		c.take(m.m1, 0-small*math.Copysign(1, large), c.combination(k)) // no negative zero
		c.do(m.doCm)
	default:
		c.take(m.cm, 1, "App. 8.1.2(b), loads between the points held")
	}
	c.do(m.doB1)
	switch o, ok := c.f.Env.Basis.Overrides["B_2"]; {
	case ok && c.sways(a):
		c.take(symB2, o.Value, "basis, because \""+o.Because+"\"")
		c.do(m.doMrSway)
	case part < d.Peak*(1-1e-9):
		c.do(m.doMrPart)
	default:
		c.do(m.doMr)
	}
	return true
}
