package en1993

import (
	"math"

	"kern/checker/derivation"
	"kern/lang/unit"
)

// momentFactor is an equivalent uniform moment factor C_m of Annex B, Table B.3.
type momentFactor struct {
	mh, m2, ms, psi, alpha, c                             derivation.ID
	doPsi, doAlphaS, doAlphaH, doLinear, doSway           *derivation.Formula
	doSpos, doSneg, doSnegPsi, doSnegPoint, doSnegPointPs *derivation.Formula
	doH, doHPsi, doHPoint, doHPointPsi                    *derivation.Formula
}

var (
	factorY  = newMomentFactor("my", "moments about y–y between points held against buckling about y–y")
	factorZ  = newMomentFactor("mz", "moments about z–z between points held against buckling about z–z")
	factorLT = newMomentFactor("mLT", "moments about y–y between points held sideways")
)

func newMomentFactor(id, what string) *momentFactor {
	f := &momentFactor{}
	f.mh = sym("M_h_"+id, unit.Moment, "end moment of greater size, "+what)
	f.m2 = sym("M_h2_"+id, unit.Moment, "the other end moment, "+what)
	f.ms = sym("M_s_"+id, unit.Moment, "moment in the span, "+what)
	f.psi = sym("psi_"+id, unit.None, "ratio of the end moments, "+what)
	f.alpha = sym("alpha_"+id, unit.None, "ratio of the moments at end and in the span, "+what)
	f.c = sym("C_"+id, unit.None, "equivalent uniform moment factor, "+what)
	const table = "Annex B Table B.3"
	f.doPsi = formula(f.psi, "M_h2_"+id+" / M_h_"+id, "definition")
	f.doAlphaS = formula(f.alpha, "M_s_"+id+" / M_h_"+id, "Annex B Table B.3, alpha_s")
	f.doAlphaH = formula(f.alpha, "M_h_"+id+" / M_s_"+id, "Annex B Table B.3, alpha_h")
	f.doLinear = formula(f.c, "max(0.4, 0.6 + 0.4 * psi_"+id+")", table+", linear")
	f.doSpos = formula(f.c, "max(0.4, 0.2 + 0.8 * alpha_"+id+")", table+", 0 ≤ alpha_s")
	f.doSneg = formula(f.c, "max(0.4, 0.1 - 0.8 * alpha_"+id+")", table+", alpha_s < 0, psi ≥ 0, uniform load")
	f.doSnegPsi = formula(f.c, "max(0.4, 0.1 * (1 - psi_"+id+") - 0.8 * alpha_"+id+")", table+", alpha_s < 0, psi < 0, uniform load")
	f.doSnegPoint = formula(f.c, "max(0.4, -0.8 * alpha_"+id+")", table+", alpha_s < 0, psi ≥ 0, point load")
	f.doSnegPointPs = formula(f.c, "max(0.4, -0.2 * psi_"+id+" - 0.8 * alpha_"+id+")", table+", alpha_s < 0, psi < 0, point load")
	f.doH = formula(f.c, "0.95 + 0.05 * alpha_"+id, table+", alpha_h, psi ≥ 0, uniform load")
	f.doHPsi = formula(f.c, "0.95 + 0.05 * alpha_"+id+" * (1 + 2 * psi_"+id+")", table+", alpha_h, psi < 0, uniform load")
	f.doHPoint = formula(f.c, "0.9 + 0.1 * alpha_"+id, table+", alpha_h, psi ≥ 0, point load")
	f.doHPointPsi = formula(f.c, "0.9 + 0.1 * alpha_"+id+" * (1 + 2 * psi_"+id+")", table+", alpha_h, psi < 0, point load")
	if id != "mLT" { // a stretch about z–z whose end moves sideways has no M_cr
		f.doSway = formula(f.c, "0.9", table+", the ends can move sideways")
	}
	return f
}

// tableB3 computes C_m for a diagram. A diagram that is neither of the two loads
// of the table is read as if of a uniform load, whose values are the greater
// ones; its moment in the span is that at mid-height or the greatest local
// extreme.
func (c *calc) tableB3(f *momentFactor, d diagram, sway bool) float64 {
	if sway {
		return c.do(f.doSway)
	}
	mh, m2 := d.first, d.last
	if math.Abs(m2) > math.Abs(mh) {
		mh, m2 = m2, mh
	}
	c.take(f.mh, mh, "")
	c.take(f.m2, m2, "")
	if d.straight {
		c.do(f.doPsi)
		return c.do(f.doLinear)
	}
	c.take(f.ms, d.inner, "")
	psi := 1.0
	if d.lower && d.upper || mh == 0 {
		c.take(f.psi, 1, "no end moments")
	} else {
		psi = c.do(f.doPsi)
	}
	point := !d.line && d.points == 1 && d.pointMiddle
	choose := func(uniform, concentrated *derivation.Formula) float64 {
		if point {
			return c.do(concentrated)
		}
		return c.do(uniform)
	}
	if math.Abs(mh) < math.Abs(d.inner) {
		c.do(f.doAlphaH)
		if psi >= 0 {
			return choose(f.doH, f.doHPoint)
		}
		return choose(f.doHPsi, f.doHPointPsi)
	}
	switch alpha := c.do(f.doAlphaS); {
	case alpha >= 0:
		return c.do(f.doSpos)
	case psi >= 0:
		return choose(f.doSneg, f.doSnegPoint)
	}
	return choose(f.doSnegPsi, f.doSnegPointPs)
}
