package aisc360

import (
	"kern/checker/model"
	"kern/checker/section"
	"kern/checker/standard"
)

// web is the slenderness of a web by Table B4.1b.
type slenderness uint8

const (
	compact slenderness = iota
	noncompact
	slender
)

func grade(ratio, p, r float64) slenderness {
	switch {
	case ratio <= p:
		return compact
	case ratio <= r:
		return noncompact
	}
	return slender // also when a value is not a number
}

// flange finds the slenderness of the flange of an I section, channel or tee.
func (c *calc) flange() slenderness {
	sh := c.f.Member.Section.Shape
	if sh.Kind == section.Channel {
		c.do(doLamFC)
	} else {
		c.do(doLamFI)
	}
	p := c.do(doPf)
	if sh.Kind == section.ISection && sh.Made == section.Welded {
		c.do(doFL)
		c.do(doKc)
		c.do(doRfWeld)
	} else {
		c.do(doRf)
	}
	return grade(c.s.At(symLamF), p, c.s.At(symLamRf))
}

// openMajor is F2 to F5: I sections and channels about their major axis.
func (c *calc) openMajor() string {
	x, sh := flexures[0], c.f.Member.Section.Shape
	c.do(doHI)
	c.do(doHo)
	flange := c.flange()
	web := grade(c.do(doLamWI), c.do(doPw), c.do(doRw))
	if sh.Kind == section.Channel && (flange != compact || web != compact) {
		return "F2 is for channels with compact flanges and a compact web: check bending by hand"
	}
	if flange == slender {
		c.do(doKc)
	}
	switch web {
	case compact:
		c.do(doF2p)
		c.do(x.doY)
		c.openLimits()
		switch flange {
		case compact:
			c.do(x.doMns)
			return ""
		case noncompact:
			c.do(doF3nc)
		default:
			c.do(doF3s)
		}
		c.do(x.doMnsF)
	case noncompact:
		c.do(doF4p)
		c.do(doF4my)
		c.do(doFL)
		c.do(doRpc)
		c.do(doF4y)
		c.flangeRadius()
		c.do(doLp4)
		c.do(doLr4)
		switch flange {
		case compact:
			c.do(x.doMns)
			return ""
		case noncompact:
			c.do(doF4nc)
		default:
			c.do(doF4s)
		}
		c.do(x.doMnsF)
	default:
		// F13.2, without transverse stiffeners
		if ratio := c.s.At(symLamW); !(ratio <= 260) || !(ratio <= 0.40*c.s.At(symE)/c.s.At(symFy)) {
			return "the web is more slender than F13.2 allows without stiffeners"
		}
		if !(c.do(doAwI) <= 10) {
			return "the web is more than ten times the compression flange, which F13.2 does not allow"
		}
		c.do(doRpg)
		c.do(doF5y)
		c.flangeRadius()
		c.do(doLp4)
		c.do(doLr5)
		switch flange {
		case compact:
			c.do(x.doMns)
			return ""
		case noncompact:
			c.do(doF5nc)
		default:
			c.do(doF5s)
		}
		c.do(doF5f)
		c.do(x.doMnsF)
	}
	return ""
}

// openLimits finds L_p and L_r of F2.2.
func (c *calc) openLimits() {
	if c.f.Member.Section.Shape.Kind == section.Channel {
		c.do(doCU)
	} else {
		c.do(doCI)
	}
	c.do(doRts)
	c.do(doLp)
	c.do(doLr)
}

func (c *calc) flangeRadius() {
	c.do(doAwI)
	c.do(doRt)
}

// openMinor is F6: I sections and channels about their minor axis.
func (c *calc) openMinor() string {
	x, sh := flexures[1], c.f.Member.Section.Shape
	if sh.Kind == section.Channel {
		c.do(doLamFC)
	} else {
		c.do(doLamFI)
	}
	c.do(doF6p)
	c.do(x.doY)
	switch grade(c.s.At(symLamF), c.do(doPf), c.do(doRf)) {
	case compact:
		c.do(x.doMns)
		return ""
	case noncompact:
		c.do(doF6nc)
	default:
		c.do(doF6s)
	}
	c.do(x.doMnsF)
	return ""
}

// teeStrength is F9 about the axis square to the stem. Which side a moment
// compresses is not said, so that the stem is taken in compression, and the
// flange as well.
func (c *calc) teeStrength(a int) string {
	if a != c.squareToStem() {
		return "F9 is for tees bent in the plane of the stem: check bending across it by hand (F12)"
	}
	x, t, sec := flexures[a], tees[a], c.f.Member.Section
	c.do(x.doMyTee)
	c.do(t.doY)
	stem := grade(c.do(doLamWT), c.do(doPStem), c.do(doRStem))
	switch stem {
	case compact:
		c.do(doStem)
	case noncompact:
		c.do(doStemMid)
	default:
		c.do(doStemLong)
	}
	c.do(t.doW)
	flange := c.flange()
	if flange == compact {
		c.do(x.doMnsW)
		return ""
	}
	c.take(t.sxc, standard.Known(flangeModulus(sec, a)), sec.Title())
	if flange == noncompact {
		c.do(t.doFnc)
	} else {
		c.do(t.doFs)
	}
	c.do(x.doMnsFW)
	return ""
}

// flangeModulus is the elastic modulus of the flange's side of a tee or of double
// angles, whose centroid is nearer to the flange, m3.
func flangeModulus(sec *model.Section, a int) float64 {
	if a == 1 {
		return max(sec.WelMinorPos, sec.WelMinorNeg)
	}
	return max(sec.WelMajorPos, sec.WelMajorNeg)
}

// squareToStem is the axis about which a tee, or double angles, bend in the plane of
// the stem or web legs.
func (c *calc) squareToStem() int {
	if c.f.Member.Section.Turned {
		return 1
	}
	return 0
}
