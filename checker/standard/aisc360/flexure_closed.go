package aisc360

import "kern/checker/standard"

// tubeStrength is F7: rectangular hollow sections and boxes about either axis.
func (c *calc) tubeStrength(a int) string {
	x := flexures[a]
	box := c.shape == &shapeBox
	if box {
		c.do(doHBox)
		c.do(doBBox)
	} else {
		c.do(doHHSS)
		c.do(doBHSS)
	}
	c.do(x.doMpTube)
	c.do(x.doY)
	limit := doRfHSS
	if box {
		limit = doRfBox
	}
	flange := grade(c.do(x.doLamF), c.do(doPfHSS), c.do(limit))
	web := grade(c.do(x.doLamW), c.do(doPwHSS), c.do(doRwHSS))
	if flange == slender && web == slender {
		return "tubes with slender webs and slender flanges are not addressed by F7"
	}
	switch flange {
	case noncompact:
		c.do(x.doTubeF)
	case slender:
		if box {
			c.do(x.doBeBox)
		} else {
			c.do(x.doBe)
		}
		c.do(x.doAe)
		c.do(x.doShift)
		c.do(x.doIe)
		c.do(x.doSe)
		c.do(x.doTubeFSlender)
	}
	switch web {
	case noncompact:
		c.do(x.doTubeW)
	case slender:
		c.do(x.doAreaW)
		c.do(x.doRpg)
		c.do(x.doTubeWSlender)
	}
	switch {
	case flange != compact && web != compact:
		c.do(x.doMnsFW)
	case flange != compact:
		c.do(x.doMnsF)
	case web != compact:
		c.do(x.doMnsW)
	default:
		c.do(x.doMns)
	}
	return ""
}

// pipeStrength is F8.
func (c *calc) pipeStrength(a int) string {
	x := flexures[a]
	ratio := c.do(doLamDt)
	if !(ratio < 0.45*c.s.At(symE)/c.s.At(symFy)) {
		return "F8 is for round tubes with D/t below 0.45 E/F_y"
	}
	c.do(x.doMpPipe)
	c.do(x.doY)
	switch grade(ratio, c.do(doPDt), c.do(doRDt)) {
	case compact:
		c.do(x.doMns)
		return ""
	case noncompact:
		c.do(x.doPipeF)
	default:
		c.do(x.doPipeFSlender)
	}
	c.do(x.doMnsF)
	return ""
}

// angleStrength is F10.1 and F10.3 about a principal axis. Which side a moment
// compresses is not said, so that the toes are taken in compression. About the
// major axis they are on both sides; about the minor axis on that away from the
// heel, near which the shear centre lies.
func (c *calc) angleStrength(a int) {
	x, sec := flexures[a], c.f.Member.Section
	toes := sec.WelMajor
	switch {
	case a == 1 && sec.SMajor < 0:
		toes = sec.WelMinorPos
	case a == 1:
		toes = sec.WelMinorNeg
	}
	c.do(x.doMyLeg)
	c.do(x.doY15)
	leg := grade(c.do(doLamFL), c.do(doPLeg), c.do(doRLeg))
	if leg != compact {
		c.take(x.sc, standard.Known(toes), sec.Title())
	}
	switch leg {
	case compact:
		c.do(x.doMns)
		return
	case noncompact:
		c.do(x.doLegF)
	default:
		c.do(x.doLegFSlender)
	}
	c.do(x.doMnsF)
}
