package aisc360

import (
	"fmt"
	"math"

	"kern/checker/derivation"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Areas and ratios of the parts that resist shear, chapter G; the axis is that
// about which the force bends.
var (
	symLv   = sym("L_v", unit.Length, "distance from the greatest to no shear force")
	symFcrV = sym("F_cr_V", unit.Stress, "critical stress in shear")

	doFcrV = formula(symFcrV, "min(0.6 * F_y, max(1.60 * E / (sqrt(L_v / D) * (D / t)^1.25), 0.78 * E / (D / t)^1.5))", "G5 (G5-2a), (G5-2b)")

	resisting = [2]*shearParts{newShearParts(0), newShearParts(1)}
)

// shearParts are the texts of A_w and of the width-to-thickness ratio for each
// kind of section.
type shearParts struct {
	web, flanges, stem, leg, tube, round, box, solid              *derivation.Formula
	ratioWeb, ratioFlange, ratioU, ratioStem, ratioLeg, ratioTube *derivation.Formula
	vnWeb, vnFlange, cvWeb, cvWebLong, pipe                       *derivation.Formula
}

func newShearParts(a int) *shearParts {
	x := flexures[a]
	area := func(text, clause string) *derivation.Formula { return formula(x.aw, text, clause) }
	ratio := func(text, clause string) *derivation.Formula { return formula(x.lamV, text, clause) }
	side, outside := "h", "d"
	if x.letter == "y" {
		side, outside = "b", "B"
	}
	p := &shearParts{}
	if a == 0 {
		p.web = area("d * t_w", "G2.1")
		p.ratioWeb = ratio("h / t_w", "G2.1")
		p.vnWeb = formula(x.vn, "0.6 * F_y * A_w_x * C_v_x", "G2.1 (G2-1)")
		p.cvWeb = formula(x.cv, "1.0", "G2.1 (G2-2), (G2-3)")
		p.cvWebLong = formula(x.cv, "1.10 * sqrt(k_v_x * E / F_y) / h_t_x", "G2.1(b) (G2-4)")
	} else {
		p.vnFlange = formula(x.vn, "0.6 * F_y * A_w_y * C_v_y", "G6 (G6-1)")
		p.flanges = area("2 * b_f * t_f", "G6, both flanges")
		p.ratioFlange = ratio("b_f / (2 * t_f)", "G6")
		p.ratioU = ratio("b_f / t_f", "G6")
	}
	p.stem = area("d * t_w", "G3")
	p.ratioStem = ratio("d / t_w", "G3")
	p.leg = area("min(b_1, b_2) * t", "G3, the shorter leg by itself, on the safe side")
	p.ratioLeg = ratio("max(b_1, b_2) / t", "G3, of the longer leg, on the safe side")
	p.tube = area("2 * ("+outside+" - 3 * t) * t", "G4, the corner radius taken as not known")
	p.round = area("2 * ("+outside+" - 2 * t - 2 * r_in) * t", "G4")
	p.box = area("2 * "+side+" * t", "G4")
	p.ratioTube = ratio(side+" / t", "G4")
	p.solid = area("A_g", "J4.2, the gross area")
	p.pipe = formula(x.vn, "F_cr_V * A_g / 2", "G5 (G5-1)")
	return p
}

// shears is chapter G about both axes.
func (c *calc) shears() {
	for a, x := range flexures {
		rule := "section-shear-" + x.word
		clause := "ANSI/AISC 360 " + c.shearClause(a)
		if !c.f.Bends[a] {
			c.cover(rule, standard.NotApplicable, "the loads do not bend the member about this axis")
			continue
		}
		at, worst := c.greatest(c.bend.tiny[a]/c.f.Member.Height, func(b *comb) float64 { return b.shear[a] })
		if at < 0 {
			c.cover(rule, standard.NotApplicable, "the moments come without shear force")
			continue
		}
		c.group(rule)
		if why := c.shearStrength(a); why != "" {
			c.undecidedIn(rule, clause, unit.Force, why)
			continue
		}
		c.available(x.shear)
		c.take(x.v, worst, c.combination(at))
		u := c.do(x.doUv)
		c.add(rule, clause, at, worst, c.s.At(x.shear.c), unit.Force, u, c.f.Limit())
	}
}

// shearClause is the section of chapter G for the force that bends about an axis.
func (c *calc) shearClause(a int) string {
	switch kind := c.f.Member.Section.Shape.Kind; {
	case (kind == section.ISection || kind == section.Channel) && a == 0:
		return "G2.1"
	case kind == section.ISection || kind == section.Channel || (kind == section.Tee || kind == section.DoubleAngle) && a != c.squareToStem():
		return "G6"
	case kind == section.Tee || kind == section.Angle || kind == section.DoubleAngle:
		return "G3"
	case kind == section.Tube:
		return "G4"
	case kind == section.Pipe:
		return "G5"
	case kind == section.Bar || kind == section.Rod:
		return "J4.2"
	}
	return "G1"
}

// shearStrength computes the nominal strength for the force that bends about an
// axis, or says why it cannot.
func (c *calc) shearStrength(a int) string {
	x, p, sec := flexures[a], resisting[a], c.f.Member.Section
	sh := sec.Shape
	c.factor(factorV)
	plate := func(area, ratio, vn *derivation.Formula, kv float64, clause string) {
		c.do(area)
		c.do(ratio)
		c.take(x.kv, kv, clause)
		c.shearBuckling(x)
		c.do(vn)
	}
	switch sh.Kind {
	case section.ISection, section.Channel:
		switch {
		case sec.Turned:
			return "the flanges are so wide that the strong axis is the web's: check chapter G by hand"
		case a == 1 && sh.Kind == section.Channel:
			plate(p.flanges, p.ratioU, p.vnFlange, 1.2, "G6")
		case a == 1:
			plate(p.flanges, p.ratioFlange, p.vnFlange, 1.2, "G6")
		default:
			c.do(doHI)
			c.do(p.web)
			c.webShear(x)
			c.do(p.vnWeb)
		}
	case section.Tee:
		if a == c.squareToStem() {
			plate(p.stem, p.ratioStem, x.doVnLeg, 1.2, "G3")
			return ""
		}
		return "chapter F has no bending of tees across the stem: check bending and shear there by hand"
	case section.DoubleAngle:
		if a == c.squareToStem() {
			plate(pairs[a].area, pairs[a].ratio, x.doVnLeg, 1.2, "G3")
			return ""
		}
		return "F has no bending of double angles across their web legs: check bending and shear there by hand"
	case section.Angle:
		plate(p.leg, p.ratioLeg, x.doVnLeg, 1.2, "G3")
	case section.Tube:
		area := p.tube
		if c.f.Member.Section.CornerStated || sh.InnerRadius > sh.Wall*(1+1e-9) { // known, or more than product standards assume
			area = p.round
		}
		if c.shape == &shapeBox {
			area = p.box
			c.do(doHBox)
			c.do(doBBox)
		} else {
			c.do(doHHSS)
			c.do(doBHSS)
		}
		plate(area, p.ratioTube, x.doVnTube, 5, "G4")
	case section.Pipe:
		c.take(symLv, c.f.Member.Height, "the whole height, on the safe side")
		c.do(doFcrV)
		c.do(p.pipe)
	case section.Bar, section.Rod:
		c.do(p.solid)
		c.do(x.doVnSolid)
	case section.Given:
		return "the web of a section with stated properties is not known: check chapter G by hand"
	default:
		return fmt.Sprintf("chapter G has no section for %ss: check shear by hand", sh.Kind)
	}
	return ""
}

// webShear is G2.1 for the web of an I section or channel without transverse
// stiffeners.
func (c *calc) webShear(x *flexure) {
	sh := c.f.Member.Section.Shape
	ratio := c.do(resisting[0].ratioWeb)
	es := c.s.At(symE) / c.s.At(symFy)
	if sh.Kind == section.ISection && sh.Made != section.Welded && ratio <= 2.24*math.Sqrt(es) {
		id, v := factorV.phi, 1.00
		if c.asd {
			id, v = factorV.omega, 1.50
		}
		c.take(id, v, "G2.1(a), rolled, h/t_w ≤ 2.24 sqrt(E/F_y)")
		c.do(resisting[0].cvWeb)
		return
	}
	c.take(x.kv, 5.34, "G2.1(b)(2), without transverse stiffeners")
	if ratio <= 1.10*math.Sqrt(5.34*es) {
		c.do(resisting[0].cvWeb)
	} else {
		c.do(resisting[0].cvWebLong)
	}
}

// shearBuckling is C_v2 of G2.2.
func (c *calc) shearBuckling(x *flexure) {
	ratio := c.s.At(x.lamV)
	root := math.Sqrt(c.s.At(x.kv) * c.s.At(symE) / c.s.At(symFy))
	switch {
	case ratio <= 1.10*root:
		c.do(x.doCv2)
	case ratio <= 1.37*root:
		c.do(x.doCv2Mid)
	default:
		c.do(x.doCv2Long)
	}
}
