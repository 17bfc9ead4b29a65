package en1993

import (
	"fmt"

	"kern/checker/derivation"
	"kern/checker/section"
	"kern/lang/unit"
)

// part is a plate of a cross-section that can buckle in compression: an
// internal part between two others, or an outstand with a free edge.
type part struct {
	name                             string
	internal                         bool
	ratio, c, lim1, lim2, lim3       derivation.ID
	class, lamP, rho                 derivation.ID
	doC, doRatio, do1, do2, do3      *derivation.Formula
	doLamP, doRho, doRhoFull, doArea *derivation.Formula
}

// newPart declares the symbols of a plate: c is the text of its width, t that
// of its thickness. Limits: Table 5.2 sheets 1 and 2 for uniform compression.
// Effective widths: EN 1993-1-5 4.4 with psi = 1.
func newPart(id, name string, internal bool, c, t string) *part {
	p := &part{name: name, internal: internal}
	p.c = sym("c_"+id, unit.Length, "width of the "+name)
	p.ratio = sym("ct_"+id, unit.None, "slenderness c/t of the "+name)
	p.lim1 = sym("ct1_"+id, unit.None, "limit of class 1, "+name)
	p.lim2 = sym("ct2_"+id, unit.None, "limit of class 2, "+name)
	p.lim3 = sym("ct3_"+id, unit.None, "limit of class 3, "+name)
	p.class = sym("class_"+id, unit.None, "class of the "+name)
	p.lamP = sym("lambda_p_"+id, unit.None, "plate slenderness, "+name)
	p.rho = sym("rho_"+id, unit.None, "reduction factor for plate buckling, "+name)
	p.doC = formula(p.c, c, "Table 5.2")
	p.doRatio = formula(p.ratio, "c_"+id+" / "+t, "Table 5.2")
	if internal {
		p.do1 = formula(p.lim1, "33 * epsilon", "Table 5.2 sheet 1")
		p.do2 = formula(p.lim2, "38 * epsilon", "Table 5.2 sheet 1")
		p.do3 = formula(p.lim3, "42 * epsilon", "Table 5.2 sheet 1")
		// k_sigma = 4.0
		p.doLamP = formula(p.lamP, "ct_"+id+" / (28.4 * epsilon * sqrt(4))", "EN 1993-1-5 4.4(2), k_sigma = 4 (Table 4.1)")
		p.doRho = formula(p.rho, "min(1, (lambda_p_"+id+" - 0.055 * (3 + 1)) / lambda_p_"+id+"^2)", "EN 1993-1-5 4.4(2) (4.2), psi = 1")
	} else {
		p.do1 = formula(p.lim1, "9 * epsilon", "Table 5.2 sheet 2")
		p.do2 = formula(p.lim2, "10 * epsilon", "Table 5.2 sheet 2")
		p.do3 = formula(p.lim3, "14 * epsilon", "Table 5.2 sheet 2")
		p.doLamP = formula(p.lamP, "ct_"+id+" / (28.4 * epsilon * sqrt(0.43))", "EN 1993-1-5 4.4(2), k_sigma = 0.43 (Table 4.2)")
		p.doRho = formula(p.rho, "min(1, (lambda_p_"+id+" - 0.188) / lambda_p_"+id+"^2)", "EN 1993-1-5 4.4(2) (4.3)")
	}
	p.doRhoFull = formula(p.rho, "1", "EN 1993-1-5 4.4(2)")
	return p
}

// shape is how a kind of section is divided into plates.
type shape struct {
	parts  []*part
	doArea *derivation.Formula // effective area from the reduction factors
}

var (
	shapeI = shape{[]*part{
		newPart("w", "web", true, "h - 2 * t_f - 2 * r", "t_w"),
		newPart("f", "flange", false, "(b - t_w - 2 * r) / 2", "t_f"),
	}, formula(symAeff, "A - (1 - rho_w) * c_w * t_w - 4 * (1 - rho_f) * c_f * t_f", "EN 1993-1-5 4.3(3), 4.4(2)")}
	shapeTube = shape{[]*part{
		newPart("h", "side", true, "h - 3 * t", "t"),
		newPart("b", "flange", true, "b - 3 * t", "t"),
	}, formula(symAeff, "A - 2 * (1 - rho_h) * c_h * t - 2 * (1 - rho_b) * c_b * t", "EN 1993-1-5 4.3(3), 4.4(2)")}
	shapeBox = shape{[]*part{
		newPart("hs", "side", true, "h - 2 * t", "t"),
		newPart("bs", "flange", true, "b - 2 * t", "t"),
	}, formula(symAeff, "A - 2 * (1 - rho_hs) * c_hs * t - 2 * (1 - rho_bs) * c_bs * t", "EN 1993-1-5 4.3(3), 4.4(2)")}
	shapeChannel = shape{[]*part{
		newPart("cw", "web", true, "h - 2 * t_f - 2 * r", "t_w"),
		newPart("cf", "flange", false, "b - t_w - r", "t_f"),
	}, formula(symAeff, "A - (1 - rho_cw) * c_cw * t_w - 2 * (1 - rho_cf) * c_cf * t_f", "EN 1993-1-5 4.3(3), 4.4(2)")}
	shapeTee = shape{[]*part{
		newPart("ts", "stem", false, "h - t_f - r", "t_w"),
		newPart("tf", "flange", false, "(b - t_w - 2 * r) / 2", "t_f"),
	}, formula(symAeff, "A - (1 - rho_ts) * c_ts * t_w - 2 * (1 - rho_tf) * c_tf * t_f", "EN 1993-1-5 4.3(3), 4.4(2)")}
)

// Circular tubes and angles have limits of their own.
var (
	symDt   = sym("dt", unit.None, "slenderness d/t of the tube")
	symDt1  = sym("dt1", unit.None, "limit of class 1")
	symDt2  = sym("dt2", unit.None, "limit of class 2")
	symDt3  = sym("dt3", unit.None, "limit of class 3")
	doDt    = formula(symDt, "d / t", "Table 5.2 sheet 3")
	doDt1   = formula(symDt1, "50 * epsilon^2", "Table 5.2 sheet 3")
	doDt2   = formula(symDt2, "70 * epsilon^2", "Table 5.2 sheet 3")
	doDt3   = formula(symDt3, "90 * epsilon^2", "Table 5.2 sheet 3")
	symHt   = sym("ht", unit.None, "slenderness h/t of the longer leg")
	symHt3  = sym("ht3", unit.None, "limit of class 3 on h/t")
	symBht  = sym("bht", unit.None, "(b + h)/(2 t)")
	symBht3 = sym("bht3", unit.None, "limit of class 3 on (b + h)/(2 t)")
	doHt    = formula(symHt, "max(h, b) / t", "Table 5.2 sheet 3")
	doHt3   = formula(symHt3, "15 * epsilon", "Table 5.2 sheet 3")
	doBht   = formula(symBht, "(b + h) / (2 * t)", "Table 5.2 sheet 3")
	doBht3  = formula(symBht3, "11.5 * epsilon", "Table 5.2 sheet 3")
)

// classify determines the class in uniform compression and the effective area.
// It gives 0 and why when the standard does not say. Inclusive limits: at the
// limit the better class holds.
func (c *calc) classify() (int, string) {
	m := c.f.Member
	sh := m.Section.Shape
	title := m.Section.Title()
	if stated := m.Section.Class; stated > 0 {
		c.take(symClass, float64(stated), "stated with the section")
		if stated == 4 {
			return 0, "the section is stated as class 4, whose effective area cannot be found without its plates"
		}
		return stated, ""
	}
	c.do(doEps)
	var kind *shape
	switch sh.Kind {
	case section.Bar, section.Rod:
		c.take(symClass, 1, "a solid section has no plates that could buckle")
		return 1, ""
	case section.Pipe:
		c.take(symD, sh.Diameter, title)
		c.take(symT, sh.Wall, title)
		class := c.classOf(c.do(doDt), c.do(doDt1), c.do(doDt2), c.do(doDt3))
		c.take(symClass, float64(class), "Table 5.2 sheet 3")
		if class == 4 {
			return 0, "circular hollow sections of class 4 are outside EN 1993-1-1; see EN 1993-1-6"
		}
		return class, ""
	case section.Angle:
		c.take(symH, sh.Depth, title)
		c.take(symB, sh.Width, title)
		c.take(symT, sh.Wall, title)
		ht, bht := c.do(doHt), c.do(doBht)
		class := 4
		if ht <= c.do(doHt3) && bht <= c.do(doBht3) {
			class = 3
		}
		c.take(symClass, float64(class), "Table 5.2 sheet 3")
		if class == 4 {
			return 0, "angles of class 4: the effective section shifts its centroid, which brings bending"
		}
		return class, ""
	case section.DoubleAngle:
		return 0, "a pair of angles is a built-up member, which is not covered: check it by EN 1993-1-1 6.4 by hand"
	case section.Tube:
		kind = &shapeTube
		if sh.OuterRadius == 0 {
			kind = &shapeBox
		}
		c.take(symT, sh.Wall, title)
	case section.ISection:
		kind = &shapeI
	case section.Channel:
		kind = &shapeChannel
	case section.Tee:
		kind = &shapeTee
	default:
		return 0, "the class of a section whose plates are not known must be stated: class = 1, 2 or 3"
	}
	c.take(symH, sh.Depth, title)
	c.take(symB, sh.Width, title)
	if sh.Kind != section.Tube {
		c.take(symTw, sh.Web, title)
		c.take(symTf, sh.Flange, title)
		c.take(symR, sh.Root, title)
	}
	worst := 1
	for _, p := range kind.parts {
		c.do(p.doC)
		class := c.classOf(c.do(p.doRatio), c.do(p.do1), c.do(p.do2), c.do(p.do3))
		c.take(p.class, float64(class), "Table 5.2")
		worst = max(worst, class)
	}
	c.take(symClass, float64(worst), "5.5.2(6)")
	if worst < 4 {
		return worst, ""
	}
	for _, p := range kind.parts {
		lam := c.do(p.doLamP)
		// no reduction up to 0.673 (internal, psi = 1) and 0.748 (outstand)
		limit := 0.748
		if p.internal {
			limit = 0.5 + 0.173205080756887729 // 0.5 + sqrt(0.085 - 0.055)
		}
		if lam <= limit {
			c.do(p.doRhoFull)
		} else {
			c.do(p.doRho)
		}
	}
	c.do(kind.doArea)
	if sh.Kind == section.Channel || sh.Kind == section.Tee {
		return 0, fmt.Sprintf("%ss of class 4: the effective section shifts its centroid, which brings bending (6.2.4(4))", sh.Kind)
	}
	return 4, ""
}

func (c *calc) classOf(ratio, one, two, three float64) int {
	switch {
	case ratio <= one:
		return 1
	case ratio <= two:
		return 2
	case ratio <= three:
		return 3
	}
	return 4 // also when a value is not a number
}
