package en1993

import (
	"math"

	"kern/checker/derivation"
	"kern/checker/section"
	"kern/lang/unit"
)

// The class of a section under bending and compression (Table 5.2). The share
// alpha of a web in compression and the ratio psi of its edge stresses follow
// from the axial force alone: alpha of the plastic stresses that the force and
// the moment that goes with it make, psi of the elastic ones when the far edge
// is at yield. Both grow with the compression, so that the greatest compression
// of the combination gives the worst class of the member.
var (
	symNc     = sym("N_Ed_c", unit.Force, "greatest compression of the combination in the member")
	symClassB = sym("class_NM", unit.None, "class of the cross-section under the combination")

	symNw = sym("n_w", unit.None, "axial force over the resistance; psi = 2 n_w - 1 when the far edge is at yield")
	doNw  = formula(symNw, "min(1, N_Ed_c * gamma_M0 / (A * f_y))", "Table 5.2 sheet 1, elastic stresses")

	webI     = newWeb("w", "c_w", "t_w", 1)
	webSideH = newWeb("h", "c_h", "t", 2)
	webSideB = newWeb("b", "c_b", "t", 2)
	webBoxH  = newWeb("hs", "c_hs", "t", 2)
	webBoxB  = newWeb("bs", "c_bs", "t", 2)
)

// web is an internal part under bending and compression.
type web struct {
	ratio, classed                   derivation.ID
	doAlpha                          *derivation.Formula
	do1, do2, do3, do1Low, do2Low    *derivation.Formula
	do3Low                           *derivation.Formula
	alpha, lim1, lim2, lim3, classNM derivation.ID
}

func newWeb(id, c, t string, count int) *web {
	w := &web{}
	name := map[string]string{"w": "web", "h": "side", "b": "flange", "hs": "side", "bs": "flange"}[id]
	w.alpha = sym("alpha_"+id, unit.None, "share of the "+name+" in compression, plastic")
	w.lim1 = sym("ct1_NM_"+id, unit.None, "limit of class 1 under the combination, "+name)
	w.lim2 = sym("ct2_NM_"+id, unit.None, "limit of class 2 under the combination, "+name)
	w.lim3 = sym("ct3_NM_"+id, unit.None, "limit of class 3 under the combination, "+name)
	w.classNM = sym("class_NM_"+id, unit.None, "class of the "+name+" under the combination")
	text := "min(1, 0.5 * (1 + N_Ed_c * gamma_M0 / (" + c + " * " + t + " * f_y)))"
	if count == 2 {
		text = "min(1, 0.5 * (1 + N_Ed_c * gamma_M0 / (2 * " + c + " * " + t + " * f_y)))"
	}
	w.doAlpha = formula(w.alpha, text, "Table 5.2 sheet 1, plastic stresses")
	w.do1 = formula(w.lim1, "396 * epsilon / (13 * alpha_"+id+" - 1)", "Table 5.2 sheet 1, alpha > 0.5")
	w.do1Low = formula(w.lim1, "36 * epsilon / alpha_"+id, "Table 5.2 sheet 1, alpha ≤ 0.5")
	w.do2 = formula(w.lim2, "456 * epsilon / (13 * alpha_"+id+" - 1)", "Table 5.2 sheet 1, alpha > 0.5")
	w.do2Low = formula(w.lim2, "41.5 * epsilon / alpha_"+id, "Table 5.2 sheet 1, alpha ≤ 0.5")
	w.do3 = formula(w.lim3, "42 * epsilon / (0.67 + 0.33 * (2 * n_w - 1))", "Table 5.2 sheet 1, psi = 2 n_w - 1 > -1")
	w.do3Low = formula(w.lim3, "124 * epsilon", "Table 5.2 sheet 1, bending alone, psi = -1")
	return w
}

// classUnder gives the class of the section under bending about the axes that
// bends tells and the given compression (N, at least 0). Where the parts of a
// section are not told apart it is the class in uniform compression, which is
// never the better one.
func (c *calc) classUnder(compression float64, bends [2]bool, source string) int {
	sec := c.f.Member.Section
	c.take(symNc, compression, source)
	uniform := c.uniform
	switch {
	case sec.Class > 0:
		uniform = sec.Class
	case sec.Shape.Kind == section.ISection && !sec.Turned:
		c.do(doNw)
		return c.classed(max(c.partClass(webI, shapeI.parts[0]), c.classOfPart(shapeI.parts[1])))
	case sec.Shape.Kind == section.Tube:
		kind, h, b := &shapeTube, webSideH, webSideB
		if sec.Shape.OuterRadius == 0 {
			kind, h, b = &shapeBox, webBoxH, webBoxB
		}
		if bends[0] && bends[1] {
			break // each side is at the edge of the other's bending
		}
		c.do(doNw)
		if bends[0] {
			return c.classed(max(c.partClass(h, kind.parts[0]), c.classOfPart(kind.parts[1])))
		}
		if bends[1] {
			return c.classed(max(c.partClass(b, kind.parts[1]), c.classOfPart(kind.parts[0])))
		}
	}
	return c.classed(uniform)
}

func (c *calc) classed(class int) int {
	c.take(symClassB, float64(class), "Table 5.2, the worst of its parts")
	return class
}

// classOfPart is the class of a part in uniform compression, found before.
func (c *calc) classOfPart(p *part) int {
	v := c.s.At(p.class)
	if math.IsNaN(v) {
		return 4
	}
	return int(v)
}

func (c *calc) partClass(w *web, p *part) int {
	alpha := c.do(w.doAlpha)
	if alpha > 0.5 {
		c.do(w.do1)
		c.do(w.do2)
	} else {
		c.do(w.do1Low)
		c.do(w.do2Low)
	}
	if c.s.At(symNw) > 0 {
		c.do(w.do3)
	} else {
		c.do(w.do3Low)
	}
	class := c.classOf(c.s.At(p.ratio), c.s.At(w.lim1), c.s.At(w.lim2), c.s.At(w.lim3))
	c.take(w.classNM, float64(class), "Table 5.2 sheet 1")
	return class
}
