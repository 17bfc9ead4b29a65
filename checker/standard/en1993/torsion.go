package en1993

import (
	"math"

	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// torsional is 6.3.1.4: torsional buckling of doubly symmetric open sections
// and solid bars, flexural-torsional buckling of sections whose shear centre is
// not their centroid.
func (c *calc) torsional() {
	const clause = "EN 1993-1-1 6.3.1.4"
	sec := c.f.Member.Section
	torsion, coupled := "torsional-buckling", "flexural-torsional-buckling"
	rule := torsion
	switch sec.Shape.Kind {
	case section.Tube, section.Pipe, section.Rod:
		c.cover(torsion, standard.NotApplicable, "closed and round sections do not buckle in torsion")
		c.cover(coupled, standard.NotApplicable, "the shear centre is the centroid")
		return
	case section.ISection, section.Bar:
		c.cover(coupled, standard.NotApplicable, "the shear centre is the centroid")
	case section.Given:
		if math.IsNaN(sec.It) {
			if c.pressed {
				c.undecided(torsion, clause, "state I_t and I_w of the section, or check torsional buckling by hand")
			} else {
				c.cover(torsion, standard.NotApplicable, "no combination compresses the member")
			}
			return
		}
		c.cover(coupled, standard.NotApplicable, "taken as doubly symmetric")
		c.assume("the section '%s' is doubly symmetric", sec.Name)
	default:
		rule = coupled
		c.cover(torsion, standard.NotApplicable, "torsion goes with bending: see "+coupled)
	}
	c.group(rule)
	unequal := sec.Shape.Kind == section.Angle && math.Abs(sec.Shape.Depth-sec.Shape.Width) > 1e-9
	switch {
	case !c.pressed:
		c.cover(rule, standard.NotApplicable, "no combination compresses the member")
		return
	case c.class == 0:
		c.undecided(rule, clause, c.why)
		return
	case !c.f.Stands[0]:
		c.undecided(rule, clause, c.f.NotHeld(0))
		return
	case !c.f.Stands[1]:
		c.undecided(rule, clause, c.f.NotHeld(1))
		return
	case c.minor.letter == "":
		c.undecided(rule, clause, c.minor.row)
		return
	}
	c.torsionalResistance(rule, unequal)
	n, k := c.worst(0, c.f.Member.Height)
	c.take(symNEdT, n, c.f.Combinations[k].Name)
	u := c.do(doUT)
	c.add(rule, clause, k, n, c.s.At(symNbT), unit.Force, u, c.f.Limit())
}

// torsionalResistance computes N_b_T_Rd; unequal says that the section has no
// axis of symmetry.
func (c *calc) torsionalResistance(rule string, unequal bool) {
	sec := c.f.Member.Section
	title := sec.Title()
	it, iw, from := c.f.Twisting()
	if math.IsNaN(iw) {
		iw = 0
		c.assume("I_w = 0, as it is not stated")
	}
	c.take(symIt, standard.KnownOrZero(it), from)
	c.take(symIw, standard.KnownOrZero(iw), from)
	offset := math.Hypot(sec.SMajor, sec.SMinor)
	if rule == "torsional-buckling" {
		offset = 0
	}
	if unequal {
		c.take(symY0, sec.SMajor, title)
		c.take(symZ0, sec.SMinor, title)
		c.do(doI0Both)
	} else {
		c.take(symY0, offset, title)
		c.do(doI0)
	}
	if c.f.TwistFree {
		c.assume("an end is free to twist: warping not counted")
		c.do(doNTFree)
	} else {
		held := "twist held at both ends"
		for _, h := range c.f.Member.Holds {
			if h.Twist {
				held = "twist held at both ends and at the holds against twist"
			}
		}
		switch {
		case c.f.TwistK != 1:
			c.assume("K = %s for twist (stated)", unit.Number(c.f.TwistK, 3))
		default:
			c.assume("%s, warping free", held)
		}
		c.take(symLT, c.f.Twist*c.f.TwistK, held)
		c.do(doNT)
	}
	switch {
	case unequal:
		c.criticalOf(0)
		c.criticalOf(1)
		root := lowestRoot(c.s.At(axes[0].ncr), c.s.At(axes[1].ncr), c.s.At(symNT), c.s.At(symY0)/c.s.At(symI0), c.s.At(symZ0)/c.s.At(symI0))
		c.take(symNTF, root, "smallest root of (N - N_cr_y)(N - N_cr_z)(N - N_cr_T) - N²(N - N_cr_z)(y_0/i_0)² - N²(N - N_cr_y)(z_0/i_0)² = 0, by halving")
		c.do(doCubic)
		c.do(doNcrTF)
	case rule == "flexural-torsional-buckling":
		// the shear centre lies on an axis of symmetry: buckling about that axis
		// goes with torsion
		c.do(doBeta)
		if math.Abs(sec.SMajor) >= math.Abs(sec.SMinor) {
			c.criticalOf(0)
			c.do(doNTFy)
		} else {
			c.criticalOf(1)
			c.do(doNTFz)
		}
		c.do(doNcrTF)
	default:
		c.do(doNcrT)
	}
	if c.slender {
		c.do(doLamTEff)
	} else {
		c.do(doLamT)
	}
	c.take(symAlT, alphas[c.minor.letter], "curve "+c.minor.letter+" of z–z, 6.3.1.4(3)")
	c.do(doPhiT)
	c.do(doChiT)
	if c.slender {
		c.do(doNbTEff)
	} else {
		c.do(doNbT)
	}
}

// lowestRoot is the smallest root of the cubic of flexural-torsional buckling:
// y, z and t are the critical forces (N), ey and ez the offsets of the shear
// centre over i_0. It lies between 0 and the smallest of the three, where the
// cubic rises from below zero.
func lowestRoot(y, z, t, ey, ez float64) float64 {
	f := func(n float64) float64 {
		return (n-y)*(n-z)*(n-t) - n*n*(n-z)*ey*ey - n*n*(n-y)*ez*ez
	}
	low, high := 0.0, min(y, z, t)
	if !(high > 0) || !(f(high) >= 0) {
		return math.NaN()
	}
	for range 200 {
		middle := (low + high) / 2
		if f(middle) < 0 {
			low = middle
		} else {
			high = middle
		}
	}
	return low
}
