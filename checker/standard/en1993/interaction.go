package en1993

import (
	"math"

	"kern/checker/action"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Members under compression and bending, 6.3.3 with Annex B.
var (
	symNy  = sym("n_y", unit.None, "N_Ed over the buckling resistance y–y")
	symNz  = sym("n_z", unit.None, "N_Ed over the buckling resistance z–z")
	symKyy = sym("k_yy", unit.None, "interaction factor")
	symKyz = sym("k_yz", unit.None, "interaction factor")
	symKzy = sym("k_zy", unit.None, "interaction factor")
	symKzz = sym("k_zz", unit.None, "interaction factor")
	symU61 = sym("u_61", unit.None, "left side of (6.61)")
	symU62 = sym("u_62", unit.None, "left side of (6.62)")
	symUMI = sym("u_NMb", unit.None, "utilisation, buckling with bending")

	doNy = formula(symNy, "N_Ed_y / N_b_y_Rd", "6.3.3(4)")
	doNz = formula(symNz, "N_Ed_z / N_b_z_Rd", "6.3.3(4)")

	doKyy12      = formula(symKyy, "C_my * (1 + min(lambda_y - 0.2, 0.8) * n_y)", "Annex B Table B.1, class 1 and 2")
	doKyy34      = formula(symKyy, "C_my * (1 + 0.6 * min(lambda_y, 1) * n_y)", "Annex B Table B.1, class 3 and 4")
	doKzzI       = formula(symKzz, "C_mz * (1 + min(2 * lambda_z - 0.6, 1.4) * n_z)", "Annex B Table B.1, I sections, class 1 and 2")
	doKzzH       = formula(symKzz, "C_mz * (1 + min(lambda_z - 0.2, 0.8) * n_z)", "Annex B Table B.1, hollow sections, class 1 and 2")
	doKzzSolid   = formula(symKzz, "C_mz * (1 + max(min(2 * lambda_z - 0.6, 1.4), min(lambda_z - 0.2, 0.8)) * n_z)", "Annex B Table B.1, class 1 and 2, the greater of I and hollow sections")
	doKzz34      = formula(symKzz, "C_mz * (1 + 0.6 * min(lambda_z, 1) * n_z)", "Annex B Table B.1, class 3 and 4")
	doKyz12      = formula(symKyz, "0.6 * k_zz", "Annex B Table B.1, class 1 and 2")
	doKyz34      = formula(symKyz, "k_zz", "Annex B Table B.1, class 3 and 4")
	doKzyStiff12 = formula(symKzy, "0.6 * k_yy", "Annex B Table B.1, class 1 and 2")
	doKzyStiff34 = formula(symKzy, "0.8 * k_yy", "Annex B Table B.1, class 3 and 4")
	doKzyLow     = formula(symKzy, "min(0.6 + lambda_z, 1 - 0.1 * lambda_z * min(n_z, 1) / (C_mLT - 0.25))", "Annex B Table B.2, class 1 and 2, lambda_z < 0.4")
	doKzy12      = formula(symKzy, "1 - 0.1 * min(lambda_z, 1) * min(n_z, 1) / (C_mLT - 0.25)", "Annex B Table B.2, class 1 and 2")
	doKzy34      = formula(symKzy, "1 - 0.05 * min(lambda_z, 1) * min(n_z, 1) / (C_mLT - 0.25)", "Annex B Table B.2, class 3 and 4")

	doU61  = formula(symU61, "n_y + k_yy * M_y_Ed / M_b_Rd + k_yz * M_z_Ed / (M_z_Rk / gamma_M1)", "6.3.3(4) (6.61)")
	doU61y = formula(symU61, "n_y + k_yy * M_y_Ed / M_b_Rd", "6.3.3(4) (6.61)")
	doU61z = formula(symU61, "n_y + k_yz * M_z_Ed / (M_z_Rk / gamma_M1)", "6.3.3(4) (6.61)")
	doU62  = formula(symU62, "n_z + k_zy * M_y_LT / M_b_Rd + k_zz * M_z_Ed / (M_z_Rk / gamma_M1)", "6.3.3(4) (6.62)")
	doU62y = formula(symU62, "n_z + k_zy * M_y_LT / M_b_Rd", "6.3.3(4) (6.62)")
	doU62z = formula(symU62, "n_z + k_zz * M_z_Ed / (M_z_Rk / gamma_M1)", "6.3.3(4) (6.62)")
	doUMI  = formula(symUMI, "max(u_61, u_62)", "6.3.3(4)")
)

// strip is a stretch about y–y, one about z–z and a segment of lateral-torsional
// buckling that overlap: (6.61) and (6.62) are checked for each.
type strip struct {
	y, z int
	lt   int // -1 when there is none
}

func (c *calc) strips() []strip {
	var out []strip
	eps := 1e-9 * c.f.Member.Height
	overlap := func(a, b, from, to float64) bool { return min(b, to)-max(a, from) > eps }
	for i, y := range c.f.Stretches[0] {
		for j, z := range c.f.Stretches[1] {
			if !overlap(y.From, y.To, z.From, z.To) {
				continue
			}
			if len(c.lat.segments) == 0 {
				out = append(out, strip{i, j, -1})
			}
			for s, g := range c.lat.segments {
				if overlap(max(y.From, z.From), min(y.To, z.To), g.from, g.to) {
					out = append(out, strip{i, j, s})
				}
			}
		}
	}
	return out
}

// chis holds what does not depend on the combination: the slenderness and the
// resistance of a stretch, for the whole section and the effective one.
type chis struct{ lam, chi, nb, ncr float64 }

// memberInteraction is 6.3.3 for every strip and combination.
func (c *calc) memberInteraction() {
	const rule, clause = "member-interaction", "EN 1993-1-1 6.3.3"
	pressed := false
	for k := range c.combs {
		pressed = pressed || c.combs[k].push > 0 && (c.combs[k].bends[0] || c.combs[k].bends[1])
	}
	both := c.f.Bends[0] && c.f.Bends[1]
	sec := c.f.Member.Section
	undecided := func(why string) { c.undecidedIn(rule, clause, unit.None, why) }
	switch {
	case !pressed && !both:
		c.cover(rule, standard.NotApplicable, "no combination presses and bends the member at once")
		return
	case sec.Shape.Kind == section.Channel || sec.Shape.Kind == section.Tee || sec.Shape.Kind == section.Angle || sec.Shape.Kind == section.DoubleAngle || sec.Shape.Kind == section.Ellipse:
		undecided("6.3.3 is for doubly symmetric sections: check compression with bending by hand (6.3.4 or second order)")
		return
	case c.f.Bends[0] && c.lat.prone && c.lat.unknown:
		undecided(c.lat.why)
		return
	case !c.f.Stands[0]:
		undecided(c.f.NotHeld(0))
		return
	case !c.f.Stands[1]:
		undecided(c.f.NotHeld(1))
		return
	case c.major.letter == "" || c.minor.letter == "":
		undecided("the standard gives no buckling curve for this section")
		return
	case c.lat.zgh > 0 && c.lat.c2 == 0 && c.f.Bends[0]:
		undecided("the basis states z_g_h: state C_2 with it")
		return
	case c.settings.annexA && c.f.Coupled():
		undecided("Annex A is for members of one section between points held: use Annex B, or change the section at a point held both ways and against twist")
		return
	case c.settings.annexA && c.swayAny():
		undecided("Annex A is for members whose ends stay in place: use Annex B, or second-order moments")
		return
	}
	c.group(rule)
	strips := c.strips()
	best, comb, at := math.Inf(-1), -1, 0
	c.silently(func() {
		for i, s := range strips {
			var ready [2]bool
			var cache [2][2]chis // [whole, effective][axis]
			c.stripGiven(s)
			for k := range c.combs {
				b := &c.combs[k]
				if !b.bends[0] && !b.bends[1] {
					continue
				}
				e := 0
				if b.class == 4 {
					e = 1
				}
				if !ready[e] || c.f.Exact[0] || c.f.Exact[1] {
					c.stripResistance(s, k, e == 1)
					for a, x := range axes {
						cache[e][a] = chis{c.s.At(x.lam), c.s.At(x.chi), c.s.At(x.nb), c.s.At(x.ncr)}
					}
					ready[e] = true
				} else {
					for a, x := range axes {
						r := cache[e][a]
						c.take(x.lam, r.lam, "")
						c.take(x.chi, r.chi, "")
						c.take(x.nb, r.nb, "")
						c.take(x.ncr, r.ncr, "")
					}
				}
				if u := c.stripAt(s, k); u > best || math.IsNaN(u) && !math.IsNaN(best) {
					best, comb, at = u, k, i
				}
			}
		}
	})
	if comb < 0 {
		c.cover(rule, standard.NotApplicable, "no combination bends the member")
		return
	}
	s := strips[at]
	c.underCombination(comb)
	c.stripResistance(s, comb, c.combs[comb].class == 4)
	c.stripGiven(s)
	u := c.stripAt(s, comb)
	c.add(rule, clause, comb, u, 1, unit.None, u, c.f.Limit())
	if math.IsNaN(u) {
		c.out.Checks[len(c.out.Checks)-1].Why = "a value that 6.3.3 needs is missing or out of range"
	}
}

// swayAny tells whether a stretch has an end that can move sideways.
func (c *calc) swayAny() bool {
	for a := range axes {
		for _, s := range c.f.Stretches[a] {
			if c.f.Bends[a] && sways(s) {
				return true
			}
		}
	}
	return false
}

func sways(s action.Stretch) bool {
	held := func(e action.End) bool { return e == action.Pinned || e == action.Fixed }
	return s.Exact || s.Sway || s.Sprung || !held(s.Base) || !held(s.Top)
}

// stripGiven is what a strip has whatever the combination.
func (c *calc) stripGiven(s strip) {
	if s.lt >= 0 && c.f.Bends[0] {
		c.segmentGiven(c.lat.segments[s.lt])
	}
}

// stripResistance computes slenderness and resistance to flexural buckling about
// both axes.
func (c *calc) stripResistance(s strip, k int, effective bool) {
	slender := c.slender
	c.slender = effective
	for a, i := range []int{s.y, s.z} {
		cv := []curve{c.major, c.minor}[a]
		source := ""
		if c.s.Recorded() {
			source = "curve " + cv.letter + ", Table 6.1 and 6.2: " + cv.row
		}
		c.resistance(axes[a], a, c.f.Stretches[a][i], k, alphas[cv.letter], source)
	}
	c.slender = slender
}

// stripAt gives the greater of (6.61) and (6.62) for a combination.
func (c *calc) stripAt(s strip, k int) float64 {
	b := &c.combs[k]
	y, z := c.f.Stretches[0][s.y], c.f.Stretches[1][s.z]
	source := ""
	if c.s.Recorded() {
		source = c.f.Combinations[k].Name
	}
	c.take(axes[0].n, max(0, c.f.Compression(k, y.From, y.To)), source)
	c.take(axes[1].n, max(0, c.f.Compression(k, z.From, z.To)), source)
	c.do(doNy)
	c.do(doNz)

	var dy, dz, dl diagram
	my, mz, ml := 0.0, 0.0, 0.0
	if b.bends[0] {
		dy = diagramOf(b.pieces[0], y.From, y.To, c.tiny[0])
		my, ml = dy.peak, dy.peak
		if s.lt >= 0 {
			g := c.lat.segments[s.lt]
			dl = diagramOf(b.pieces[0], g.from, g.to, c.tiny[0])
			ml = dl.peak
		} else {
			ml = greatest(b.pieces[0], z.From, z.To)
		}
	}
	if b.bends[1] {
		dz = diagramOf(b.pieces[1], z.From, z.To, c.tiny[1])
		mz = dz.peak
	}
	withY, withZ := max(my, ml) > c.tiny[0], mz > c.tiny[1]
	if withY {
		c.modulus(0, b.class)
		switch {
		case s.lt >= 0 && dl.peak > c.tiny[0]:
			c.lateralResistance(k, s.lt, dl)
		case s.lt >= 0:
			// hardly any moment in the segment: uniform moment, on the safe side
			c.take(symC1, 1, "no moment in the segment, on the safe side")
			c.do(doMcr)
			c.lateralReduction(diagram{straight: true, first: 1, last: 1})
		default:
			c.do(doMbFull)
		}
		c.take(moments[0].mEd, my, source)
		c.take(symMLT, ml, source)
	}
	if withZ {
		c.modulus(1, b.class)
		c.do(moments[1].doMrk)
		c.take(moments[1].mEd, mz, source)
	}
	if c.settings.annexA {
		c.annexA(s, k, dy, dz, withY, withZ)
	} else {
		c.annexB(s, k, dy, dz, withY, withZ, y, z)
	}
	switch {
	case withY && withZ:
		c.do(doU61)
		c.do(doU62)
	case withY:
		c.do(doU61y)
		c.do(doU62y)
	case withZ:
		c.do(doU61z)
		c.do(doU62z)
	default:
		return -1
	}
	return c.do(doUMI)
}

// equivalent takes the equivalent uniform moment factor of a stretch about an axis
// under a combination. Table B.3 has none for a stretch that a spring holds: there it
// is what the factor stands for, so that 1/(1 - N_Ed/N_cr) times it gives the
// greatest moment of second order, and no less than 1.
func (c *calc) equivalent(f *momentFactor, d diagram, s action.Stretch, axis, k int) {
	if !s.Sprung {
		c.tableB3(f, d, sways(s))
		return
	}
	factor := 1.0
	if alpha := c.f.Factor(axis, k); !(alpha <= 1) { // beyond it the member has buckled
		curves, ok := c.f.SecondOrder(axis, k, 1)
		most := 0.0
		for _, curve := range curves {
			for _, z := range curve.Peaks() {
				if z >= s.From-1e-9 && z <= s.To+1e-9 {
					most = max(most, math.Abs(curve.Moment(z-curve.From)))
				}
			}
		}
		factor = max(1, (1-1/alpha)*most/d.peak)
		if !ok || math.IsNaN(alpha) {
			factor = math.NaN() // of a member of several sections, or forces from a table
		}
	}
	c.take(f.c, factor, "a spring holds the stretch: the greatest moment of second order (stiffness matrix) over that of first order, times 1 - N_Ed/N_cr, at least 1")
}

// annexB computes the factors of Tables B.1 to B.3.
func (c *calc) annexB(s strip, k int, dy, dz diagram, withY, withZ bool, y, z action.Stretch) {
	b := &c.combs[k]
	kind := c.f.Member.Section.Shape.Kind
	compact := b.class <= 2
	hollow := kind == section.Tube || kind == section.Pipe || kind == section.Rod
	if withY {
		if dy.peak > c.tiny[0] {
			c.equivalent(factorY, dy, y, 0, k)
		} else {
			c.take(factorY.c, 1, "hardly any moment in the stretch")
		}
		if compact {
			c.do(doKyy12)
		} else {
			c.do(doKyy34)
		}
	}
	if withZ {
		c.equivalent(factorZ, dz, z, 1, k)
		switch {
		case !compact:
			c.do(doKzz34)
		case hollow:
			c.do(doKzzH)
		case kind == section.ISection:
			c.do(doKzzI)
		default:
			c.do(doKzzSolid)
		}
		if compact {
			c.do(doKyz12)
		} else {
			c.do(doKyz34)
		}
	}
	if !withY {
		return
	}
	switch {
	case hollow && compact:
		c.do(doKzyStiff12)
	case hollow:
		c.do(doKzyStiff34)
	default:
		d := diagramOf(b.pieces[0], z.From, z.To, c.tiny[0])
		if d.peak > c.tiny[0] {
			if z.Sprung {
				c.take(factorLT.c, 1, "a spring holds the stretch")
			} else {
				c.tableB3(factorLT, d, false) // it knows no sway
			}
		} else {
			c.take(factorLT.c, 1, "hardly any moment in the stretch")
		}
		switch {
		case !compact:
			c.do(doKzy34)
		case c.s.At(axes[1].lam) < 0.4:
			c.do(doKzyLow)
		default:
			c.do(doKzy12)
		}
	}
}
