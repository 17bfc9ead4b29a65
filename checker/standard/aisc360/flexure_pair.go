package aisc360

import (
	"kern/checker/derivation"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Double angles, F9: the web legs are back to back, the flange legs stand out.
var (
	symLamWeb = sym("lambda_wl", unit.None, "width-to-thickness ratio of the web legs")
	symLamOut = sym("lambda_fl", unit.None, "width-to-thickness ratio of the flange legs")
	doLamWeb  = formula(symLamWeb, "b_1 / t", "B4.1a(b)")
	doLamOut  = formula(symLamOut, "b_2 / t", "B4.1a(b)")

	pairs = [2]*pair{newPair("x", "y"), newPair("y", "x")}
)

// pair holds what F9 asks of double angles, about whichever axis is square to the
// web legs.
type pair struct {
	doY                      *derivation.Formula
	doFnc, doFs, doWnc, doWs *derivation.Formula
	doB, doMcr, doLTi, doLTe *derivation.Formula
	area, ratio              *derivation.Formula
}

func newPair(about, other string) *pair {
	x := flexures[map[string]int{"x": 0, "y": 1}[about]]
	t := tees[map[string]int{"x": 0, "y": 1}[about]]
	f := func(id derivation.ID, text, clause string) *derivation.Formula {
		return formula(id, replaceAxis(text, about), clause)
	}
	p := &pair{}
	p.doY = f(x.mnY, "1.5 * M_y_?", "F9.1(c) (F9-5), web legs in compression")
	p.doFnc = f(x.mnF, "F_y * S_xc_? * (2.43 - 1.72 * lambda_fl * sqrt(F_y / E))", "F9.3(b), F10.3(b) (F10-6)")
	p.doFs = f(x.mnF, "0.71 * E / lambda_fl^2 * S_xc_?", "F9.3(b), F10.3(c) (F10-7), (F10-8)")
	p.doWnc = f(x.mnW, "F_y * S_? * (2.43 - 1.72 * lambda_wl * sqrt(F_y / E))", "F9.4(b), F10.3(b) (F10-6)")
	p.doWs = f(x.mnW, "0.71 * E / lambda_wl^2 * S_?", "F9.4(b), F10.3(c) (F10-7), (F10-8)")
	p.doB = formula(symBT, "-2.3 * b_1 / L_b * sqrt(I_"+other+" / J)", "F9.2(b) (F9-12)")
	p.doMcr = t.doMcr
	p.doLTi = f(symMnLT, "min(1.5 * M_y_?, (1.92 - 1.17 * sqrt(M_y_? / M_cr)) * M_y_?)", "F9.2(b)(2), F10.2(a) (F10-2)")
	p.doLTe = f(symMnLT, "(0.92 - 0.17 * M_cr / M_y_?) * M_cr", "F9.2(b)(2), F10.2(b) (F10-3)")
	p.area = f(x.aw, "2 * b_1 * t", "G3, the web legs")
	p.ratio = f(x.lamV, "b_1 / t", "G3")
	return p
}

// pairStrength is F9 of double angles about the axis square to their web legs. Which
// side a moment compresses is not said: both legs are taken in compression.
func (c *calc) pairStrength(a int) string {
	if a != c.squareToStem() {
		return "F9 is for double angles bent in the plane of the web legs: check bending across it by hand (F12)"
	}
	x, p, sec := flexures[a], pairs[a], c.f.Member.Section
	c.do(x.doMyTee)
	c.do(p.doY)
	limit, most := c.do(doPLeg), c.do(doRLeg)
	web, flange := grade(c.do(doLamWeb), limit, most), grade(c.do(doLamOut), limit, most)
	switch web {
	case noncompact:
		c.do(p.doWnc)
	case slender:
		c.do(p.doWs)
	}
	if flange != compact {
		c.take(tees[a].sxc, standard.Known(flangeModulus(sec, a)), sec.Title())
	}
	switch flange {
	case noncompact:
		c.do(p.doFnc)
	case slender:
		c.do(p.doFs)
	}
	switch {
	case web != compact && flange != compact:
		c.do(x.doMnsFW)
	case web != compact:
		c.do(x.doMnsW)
	case flange != compact:
		c.do(x.doMnsF)
	default:
		c.do(x.doMns)
	}
	return ""
}

// lateralPair is F9.2 of double angles with the web legs in compression.
func (c *calc) lateralPair() {
	a := c.bend.lat.axis
	p := pairs[a]
	c.do(p.doB)
	if mcr := c.do(p.doMcr); c.s.At(flexures[a].my) <= mcr {
		c.do(p.doLTi)
	} else {
		c.do(p.doLTe)
	}
}
