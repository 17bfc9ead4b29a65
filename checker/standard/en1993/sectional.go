package en1993

import (
	"math"

	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// sectionInteraction is 6.2.9 and 6.2.10: axial force, bending and shear in the
// worst section of every combination.
func (c *calc) sectionInteraction() {
	const rule, clause = "section-interaction", "EN 1993-1-1 6.2.9"
	c.group(rule)
	axial := false
	for k := range c.combs {
		axial = axial || c.combs[k].push > 0 || c.f.Tension(k) > 0
	}
	if !axial && !(c.f.Bends[0] && c.f.Bends[1]) {
		c.cover(rule, standard.NotApplicable, "neither axial force nor bending about a second axis")
		return
	}
	best, where := math.Inf(-1), spot{comb: -1}
	c.silently(func() {
		for k := range c.combs {
			b := &c.combs[k]
			if !b.bends[0] && !b.bends[1] {
				continue
			}
			c.sectionGiven(k)
			c.spots(k, true, func(s spot) {
				if u := c.sectionAt(s); u > best || math.IsNaN(u) && !math.IsNaN(best) {
					best, where = u, s
				}
			})
		}
		if where.comb >= 0 && c.combs[where.comb].bends[0] && c.combs[where.comb].bends[1] {
			c.sectionGiven(where.comb)
			best, where = c.refine(best, where)
		}
	})
	if where.comb < 0 {
		c.cover(rule, standard.NotApplicable, "no combination bends the member")
		return
	}
	c.underCombination(where.comb)
	c.sectionGiven(where.comb)
	u := c.sectionAt(where)
	c.add(rule, clause, where.comb, u, 1, unit.None, u, c.f.Limit())
	if math.IsNaN(u) {
		c.out.Checks[len(c.out.Checks)-1].Why = "a section modulus for its class is not known"
	}
}

// refine looks for the top between the points of a line load by halving steps.
func (c *calc) refine(best float64, where spot) (float64, spot) {
	for _, iv := range c.intervals {
		if where.z < iv.from || where.z > iv.to {
			continue
		}
		line := false
		for a := range where.m {
			if p := c.combs[where.comb].pieces[a]; len(p) > 0 {
				line = line || p[iv.piece[a]].Line != 0
			}
		}
		if !line {
			continue
		}
		for step := (iv.to - iv.from) / 32; step > (iv.to-iv.from)/2000; step /= 2 {
			for _, z := range []float64{where.z - step, where.z + step} {
				if z < iv.from || z > iv.to {
					continue
				}
				s := c.spotAt(where.comb, iv, z, where.n)
				if u := c.sectionAt(s); u > best {
					best, where = u, s
				}
			}
		}
	}
	return best, where
}

// sectionGiven finds the resistances that hold for a combination as a whole.
func (c *calc) sectionGiven(k int) {
	b := &c.combs[k]
	for a := range moments {
		if b.bends[a] {
			c.modulus(a, b.class)
			c.do(moments[a].doMc)
		}
	}
	if b.class == 4 {
		c.do(doNRdEff)
	} else {
		c.do(doNRd)
	}
}

// sectionAt gives the utilisation of the section at a place.
func (c *calc) sectionAt(s spot) float64 {
	b := &c.combs[s.comb]
	source := ""
	if c.s.Recorded() {
		source = c.f.Combinations[s.comb].Name
	}
	c.take(symNs, math.Abs(s.n), source)
	high := [2]bool{}
	for a, x := range moments {
		if b.bends[a] {
			c.take(x.ms, math.Abs(s.m[a]), source)
			if c.high[a] {
				high[a] = c.beside(a, s)
			}
		}
	}
	sec := c.f.Member.Section
	kind := sec.Shape.Kind
	plastic := b.class <= 2 && !high[0] && !high[1] && (kind == section.ISection && !sec.Turned || kind == section.Tube || kind == section.Pipe || kind == section.Bar)
	if !plastic {
		for a := range moments {
			if b.bends[a] && !c.high[a] {
				c.do(moments[a].doMvFull)
			}
		}
		if b.class < 4 {
			switch {
			case high[0] && high[1]:
				c.do(doNRdYZ)
			case high[0]:
				c.do(doNRdY)
			case high[1]:
				c.do(doNRdZ)
			case c.high[0] || c.high[1]:
				c.do(doNRd)
			}
		}
		switch {
		case b.bends[0] && b.bends[1]:
			return c.do(doSumYZ)
		case b.bends[0]:
			return c.do(doSumY)
		}
		return c.do(doSumZ)
	}
	n := c.do(doN)
	c.do(doNr)
	if b.bends[0] {
		switch kind {
		case section.ISection:
			c.do(moments[0].doMnWeb)
		case section.Tube:
			c.do(moments[0].doMnTube)
		case section.Pipe:
			c.do(moments[0].doMnPipe)
		default:
			c.do(moments[0].doMnBar)
		}
	}
	if b.bends[1] {
		switch kind {
		case section.ISection:
			if n <= c.s.At(symAw) {
				c.do(moments[1].doMnFlangeFull)
			} else {
				c.do(moments[1].doMnFlange)
			}
		case section.Tube:
			c.do(moments[1].doMnTube)
		case section.Pipe:
			c.do(moments[1].doMnPipe)
		default:
			c.do(moments[1].doMnBar)
		}
	}
	over := n > 0.99
	switch {
	case !b.bends[1] && over:
		return c.do(doNMyOver)
	case !b.bends[1]:
		return c.do(doNMy)
	case !b.bends[0] && over:
		return c.do(doNMzOver)
	case !b.bends[0]:
		return c.do(doNMz)
	}
	switch kind {
	case section.ISection:
		c.do(doTwo)
		c.do(doBeta5)
	case section.Tube:
		c.do(doExpTY)
		c.do(doExpTZ)
	case section.Pipe:
		c.do(doTwo)
		c.do(doTwoZ)
	default:
		c.do(doOneY)
		c.do(doOneZ)
	}
	if over {
		return c.do(doNMyzOver)
	}
	return c.do(doNMyz)
}
