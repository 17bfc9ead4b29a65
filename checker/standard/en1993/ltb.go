package en1993

import (
	"fmt"
	"math"

	"kern/checker/action"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Lateral-torsional buckling, 6.3.2.
var (
	symLLT   = sym("L_LT", unit.Length, "length between points held sideways and against twist")
	symM1    = sym("M_1", unit.Moment, "end moment of greater size")
	symM2    = sym("M_2", unit.Moment, "the other end moment")
	symPsi   = sym("psi_LT", unit.None, "ratio of the end moments")
	symC1a   = sym("C_1_a", unit.None, "C_1 for the next smaller ratio in the table")
	symC1b   = sym("C_1_b", unit.None, "C_1 for the next greater ratio in the table")
	symPsiA  = sym("psi_a", unit.None, "the next smaller ratio in the table")
	symC1    = sym("C_1", unit.None, "factor of the moment diagram")
	symC2    = sym("C_2", unit.None, "factor of the height of the load")
	symZg    = sym("z_g", unit.Length, "height of the load above the shear centre, towards the compressed flange")
	symZgh   = sym("z_g_h", unit.None, "z_g over the depth")
	symMcr0  = sym("M_cr_0", unit.Moment, "elastic critical moment for uniform moment")
	symMcr   = sym("M_cr", unit.Moment, "elastic critical moment")
	symMLT   = sym("M_y_LT", unit.Moment, "greatest moment between the points held")
	symLamLT = sym("lambda_LT", unit.None, "non-dimensional slenderness, lateral-torsional buckling")
	symAlLT  = sym("alpha_LT", unit.None, "imperfection factor, lateral-torsional buckling")
	symPhiLT = sym("phi_LT", unit.None, "value to determine the reduction factor")
	symChiLT = sym("chi_LT", unit.None, "reduction factor for lateral-torsional buckling")
	symLam0  = sym("lambda_LT_0", unit.None, "length of the plateau, 6.3.2.3")
	symBetaL = sym("beta_LT", unit.None, "factor of 6.3.2.3")
	symKc    = sym("k_c", unit.None, "correction for the moment diagram")
	symFLT   = sym("f", unit.None, "modification for the moment diagram")
	symChiM  = sym("chi_LT_mod", unit.None, "modified reduction factor")
	symMb    = sym("M_b_Rd", unit.Moment, "design buckling resistance moment")
	symULT   = sym("u_LT", unit.None, "utilisation, lateral-torsional buckling")

	doPsi    = formula(symPsi, "M_2 / M_1", "definition")
	doC1     = formula(symC1, "C_1_a + (C_1_b - C_1_a) * (psi_LT - psi_a) / 0.25", "NCCI SN003 Table 3.1 (from memory; lower bound without warping)")
	doMcr0   = formula(symMcr0, "pi^2 * E * I_z / L_LT^2 * sqrt(I_w / I_z + L_LT^2 * G * I_t / (pi^2 * E * I_z))", "6.3.2.2(2), NCCI SN003 (2), k = k_w = 1")
	doMcr    = formula(symMcr, "C_1 * M_cr_0", "6.3.2.2(2), NCCI SN003 (2), loads at the shear centre")
	doZg     = formula(symZg, "z_g_h * h", "basis")
	doMcrZg  = formula(symMcr, "C_1 * pi^2 * E * I_z / L_LT^2 * (sqrt(I_w / I_z + L_LT^2 * G * I_t / (pi^2 * E * I_z) + (C_2 * z_g)^2) - C_2 * z_g)", "6.3.2.2(2), NCCI SN003 (1), k = k_w = 1")
	doLamLT  = formula(symLamLT, "sqrt(W_y * f_y / M_cr)", "6.3.2.2(1)")
	doPhiLT  = formula(symPhiLT, "0.5 * (1 + alpha_LT * (lambda_LT - 0.2) + lambda_LT^2)", "6.3.2.2(1)")
	doChiLT  = formula(symChiLT, "min(1, 1 / (phi_LT + sqrt(phi_LT^2 - lambda_LT^2)))", "6.3.2.2(1) (6.56)")
	doPhiL3  = formula(symPhiLT, "0.5 * (1 + alpha_LT * (lambda_LT - lambda_LT_0) + beta_LT * lambda_LT^2)", "6.3.2.3(1)")
	doChiL3  = formula(symChiLT, "min(1, 1 / lambda_LT^2, 1 / (phi_LT + sqrt(phi_LT^2 - beta_LT * lambda_LT^2)))", "6.3.2.3(1) (6.57)")
	doKc     = formula(symKc, "1 / (1.33 - 0.33 * psi_LT)", "6.3.2.3(2) Table 6.6")
	doKcLoad = formula(symKc, "max(0.94, 1 / sqrt(C_1))", "6.3.2.3(2) Table 6.6, no less than for a uniform load, nor than the moment diagram asks")
	doFLT    = formula(symFLT, "min(1, 1 - 0.5 * (1 - k_c) * (1 - 2 * (lambda_LT - 0.8)^2))", "6.3.2.3(2)")
	doChiMod = formula(symChiM, "min(1, 1 / lambda_LT^2, chi_LT / f)", "6.3.2.3(2) (6.58)")
	doMb     = formula(symMb, "chi_LT * W_y * f_y / gamma_M1", "6.3.2.1(3) (6.55)")
	doMb3    = formula(symMb, "chi_LT_mod * W_y * f_y / gamma_M1", "6.3.2.1(3) (6.55)")
	doMbFull = formula(symMb, "W_y * f_y / gamma_M1", "6.3.2.1(2), not prone to lateral-torsional buckling")
	doULT    = formula(symULT, "M_y_LT / M_b_Rd", "6.3.2.1(1) (6.54)")
)

// tableC1 is C_1 for end moments in the ratio -1, -0.75, … 1: NCCI SN003 Table
// 3.1, k = 1 (from memory; each value agrees with the eigenvalue of the problem
// without warping to 0.4 %).
var tableC1 = [9]float64{2.55, 2.57, 2.33, 2.05, 1.77, 1.52, 1.31, 1.14, 1.00}

// segment is a part of the member between points that are held sideways and
// against twist.
type segment struct{ from, to, factor float64 }

// lateral is what the member is for lateral-torsional buckling.
type lateral struct {
	prone    bool   // to be checked
	why      string // of a member that is not prone, or of one that cannot be decided
	unknown  bool
	segments []segment
	alpha    float64
	source   string  // of alpha
	rolled   bool    // 6.3.2.3 may be used
	waive    bool    // no reduction up to lambda_LT,0: rectangular hollow sections
	c1, c2   float64 // stated in the basis, 0 otherwise
	zgh, kc  float64
	l3       bool // 6.3.2.3
	lam0     float64
	beta     float64
}

// lateralOf decides whether and how the member can buckle sideways.
func (c *calc) lateralOf() lateral {
	m, sec := c.f.Member, c.f.Member.Section
	l := lateral{prone: true}
	sh := sec.Shape
	no := func(why string) lateral { return lateral{why: why} }
	cannot := func(why string) lateral { return lateral{prone: true, unknown: true, why: why} }
	switch sh.Kind {
	case section.Pipe, section.Rod:
		return no("round sections do not buckle sideways (6.3.2.1(2))")
	case section.Tube:
		if math.Abs(sh.Depth-sh.Width) <= 1e-6*sh.Depth {
			return no("square hollow sections do not buckle sideways (6.3.2.1(2))")
		}
		l.waive = true
	case section.Bar:
		if math.Abs(sh.Depth-sh.Width) <= 1e-6*sh.Depth {
			return no("square bars do not buckle sideways")
		}
	case section.ISection, section.Given:
	default:
		return cannot(fmt.Sprintf("the critical moment of %ss is not covered: sections that are not doubly symmetric need their own M_cr, by hand", sh.Kind))
	}
	held := func(e action.End) bool { return e == action.Pinned || e == action.Fixed }
	if c.f.TwistFree || !held(m.Base[1]) || !held(m.Top[1]) {
		return cannot("an end is not held sideways and against twist: the critical moment of a member that is free there is not covered, find M_cr by hand")
	}
	if sh.Kind == section.Given && math.IsNaN(sec.It) {
		return cannot("state I_t and I_w of the section, or check lateral-torsional buckling by hand")
	}
	for _, g := range c.f.Lateral() {
		l.segments = append(l.segments, segment{g.From, g.To, g.Factor})
		if g.Factor != 1 && c.settings.number("z_g_h") > 0 {
			return cannot("the section changes between points held sideways and against twist: z_g_h is for members of one section, check lateral-torsional buckling by hand")
		}
	}
	c.lateralCurve(&l)
	return l
}

// lateralCurve chooses the curve, Tables 6.4 and 6.5.
func (c *calc) lateralCurve(l *lateral) {
	sec := c.f.Member.Section
	sh := sec.Shape
	s := c.settings
	l.c1, l.c2, l.zgh, l.kc = s.number("C_1"), s.number("C_2"), s.number("z_g_h"), s.number("k_c")
	letter, row := "d", "other cross-sections, Table 6.4"
	const hair = 1 + 1e-9
	if sh.Kind == section.ISection && !sec.Turned {
		l.rolled = true
		slim := sh.Depth > 2*sh.Width*hair
		very := sh.Depth > 3.1*sh.Width*hair
		l.l3 = s.special
		pick := func(stocky, slender string) string {
			if slim {
				return slender
			}
			return stocky
		}
		kind, limit := "rolled", "h/b ≤ 2"
		if slim {
			limit = "h/b > 2"
		}
		if sh.Made == section.Welded {
			kind = "welded"
		}
		switch {
		case l.l3 && s.national.british && kind == "rolled":
			letter, row = "b", "rolled I section, UK National Annex (from memory)"
			if slim {
				letter = "c"
			}
			if very {
				letter = "d"
			}
		case l.l3 && s.national.british:
			letter, row = pick("c", "d"), "welded I section, UK National Annex (from memory)"
		case l.l3 && kind == "rolled":
			letter, row = pick("b", "c"), "rolled I section, "+limit+", Table 6.5"
		case l.l3:
			letter, row = pick("c", "d"), "welded I section, "+limit+", Table 6.5"
		case kind == "rolled":
			letter, row = pick("a", "b"), "rolled I section, "+limit+", Table 6.4"
		default:
			letter, row = pick("c", "d"), "welded I section, "+limit+", Table 6.4"
		}
	}
	l.alpha, l.source = alphas[letter], "curve "+letter+", Table 6.3: "+row
	l.lam0, l.beta = s.numberOr("lambda_LT_0", 0.4), s.numberOr("beta_LT", 0.75)
}

// segmentGiven takes what a segment has whatever the combination: the critical
// moment for uniform moment.
func (c *calc) segmentGiven(s segment) {
	source := ""
	if c.s.Recorded() {
		source = "held sideways and against twist at both ends"
		if c.lat.segments[0].to < c.f.Member.Height || s.from > 0 {
			source = fmt.Sprintf("from %s to %s, %s", c.f.Place(s.from), c.f.Place(s.to), source)
		}
	}
	if s.factor != 1 && c.s.Recorded() {
		source += fmt.Sprintf(", times %s: the section changes there, and the least stiffness counts", unit.Number(s.factor, 4))
	}
	c.take(symLLT, (s.to-s.from)*s.factor*max(1, c.f.TwistK), source)
	c.do(doMcr0)
}

// criticalMoment computes M_cr of a segment for the moment diagram of a
// combination; segmentGiven has gone before.
func (c *calc) criticalMoment(k, i int, d diagram) {
	l := &c.lat
	recorded := c.s.Recorded()
	switch {
	case l.c1 > 0:
		c.take(symC1, l.c1, "basis, because \""+c.settings.because("C_1")+"\"")
		if (l.l3 && l.kc == 0 || c.ed.extra["f_M linear"] != nil) && d.straight {
			c.endRatio(d)
		}
	case d.straight:
		psi := c.endRatio(d)
		i := min(7, max(0, int(math.Floor((psi+1)/0.25))))
		source := ""
		if recorded {
			source = "NCCI SN003 Table 3.1"
		}
		c.take(symPsiA, -1+0.25*float64(i), source)
		c.take(symC1a, tableC1[i], source)
		c.take(symC1b, tableC1[i+1], source)
		c.do(doC1)
	default:
		source := ""
		if recorded {
			source = "smallest eigenvalue of phi'' + (C_1 pi M / (M_max L))² phi = 0 for the moment diagram, fork ends, a lower bound without warping (as NCCI SN003 Table 3.2)"
		}
		c.take(symC1, c.factorOf(k, i, d), source)
	}
	if l.zgh > 0 && !d.straight {
		c.take(symZgh, l.zgh, "basis, because \""+c.settings.because("z_g_h")+"\"")
		c.do(doZg)
		if l.c2 > 0 {
			c.take(symC2, l.c2, "basis, because \""+c.settings.because("C_2")+"\"")
		} else {
			c.take(symC2, math.NaN(), "not stated")
		}
		c.do(doMcrZg)
		return
	}
	c.do(doMcr)
}

// endRatio takes the end moments and gives their ratio.
func (c *calc) endRatio(d diagram) float64 {
	big, small := d.first, d.last
	if math.Abs(small) > math.Abs(big) {
		big, small = small, big
	}
	c.take(symM1, big, "")
	c.take(symM2, small, "")
	return c.do(doPsi)
}

// factorOf is C_1 of a combination in a segment, found once.
func (c *calc) factorOf(k, i int, d diagram) float64 {
	b := &c.combs[k]
	if b.c1 == nil {
		b.c1 = make([]float64, len(c.lat.segments))
	}
	if b.c1[i] == 0 {
		b.c1[i] = diagramFactor(b.pieces[0], d)
	}
	return b.c1[i]
}

// lateralResistance computes M_b_Rd of a segment for the moment diagram of a
// combination.
func (c *calc) lateralResistance(k, i int, d diagram) {
	c.criticalMoment(k, i, d)
	c.lateralReduction(d)
}

// lateralReduction goes on from M_cr to M_b_Rd.
func (c *calc) lateralReduction(d diagram) {
	l := &c.lat
	lam := c.do(doLamLT)
	if l.waive && lam <= 0.4 {
		c.s.Note("lambda_LT is at most 0.4: lateral-torsional buckling of the hollow section need not be counted (6.3.2.2(4))")
		c.do(doMbFull)
		return
	}
	if c.ed.extra["phi_LT"] != nil && l.rolled {
		c.lateralOfEdition(d)
		return
	}
	c.take(symAlLT, l.alpha, l.source)
	if !l.l3 {
		c.do(doPhiLT)
		c.do(doChiLT)
		c.do(doMb)
		return
	}
	c.take(symLam0, l.lam0, "6.3.2.3(1), or the basis")
	c.take(symBetaL, l.beta, "6.3.2.3(1), or the basis")
	c.do(doPhiL3)
	c.do(doChiL3)
	switch {
	case l.kc > 0:
		c.take(symKc, l.kc, "basis, because \""+c.settings.because("k_c")+"\"")
	case d.straight:
		c.do(doKc)
	default:
		c.do(doKcLoad)
	}
	c.do(doFLT)
	c.do(doChiMod)
	c.do(doMb3)
}

// lateral checks every segment under every combination.
func (c *calc) lateralTorsional() {
	const rule, clause = "lateral-torsional-buckling", "EN 1993-1-1 6.3.2"
	l := &c.lat
	switch {
	case !c.f.Bends[0]:
		c.cover(rule, standard.NotApplicable, "the loads do not bend the member about y–y")
		return
	case !l.prone:
		c.cover(rule, standard.NotApplicable, l.why)
		return
	case l.unknown:
		c.undecidedIn(rule, clause, unit.Moment, l.why)
		return
	}
	c.group(rule)
	if l.zgh > 0 && l.c2 == 0 {
		c.undecidedIn(rule, clause, unit.Moment, "the basis states z_g_h: state C_2 with it")
		return
	}
	best, comb, seg := math.Inf(-1), -1, 0
	c.silently(func() {
		for i, s := range l.segments {
			c.segmentGiven(s)
			for k := range c.combs {
				if u := c.lateralOne(k, i); u >= 0 && u > best || math.IsNaN(u) {
					best, comb, seg = u, k, i
					if math.IsNaN(u) {
						return
					}
				}
			}
		}
	})
	if comb < 0 {
		c.cover(rule, standard.NotApplicable, "no combination bends the member about y–y")
		return
	}
	c.underCombination(comb)
	c.segmentGiven(l.segments[seg])
	u := c.lateralOne(comb, seg)
	c.add(rule, clause, comb, c.s.At(symMLT), c.s.At(symMb), unit.Moment, u, c.f.Limit())
}

// lateralOne gives the utilisation of a segment under a combination, or -1 for
// a combination that does not bend it.
func (c *calc) lateralOne(k, i int) float64 {
	s := c.lat.segments[i]
	comb := &c.combs[k]
	if !comb.bends[0] {
		return -1
	}
	pieces := comb.pieces[0]
	d := diagramOf(pieces, s.from, s.to, c.tiny[0])
	if d.peak <= c.tiny[0] {
		return -1
	}
	c.modulus(0, comb.class)
	c.lateralResistance(k, i, d)
	source := ""
	if c.s.Recorded() {
		source = c.f.Combinations[k].Name
	}
	c.take(symMLT, d.peak, source)
	return c.do(doULT)
}

// lateralOfEdition is the reduction of doubly symmetric I sections in editions
// that tie it to flexural buckling about z–z.
func (c *calc) lateralOfEdition(d diagram) {
	sh := c.f.Member.Section.Shape
	own := func(name string) { c.s.Do(c.ed.extra[name]) }
	own("N_cr_z_LT")
	if c.slenderNow() {
		own("lambda_z_LT class 4")
	} else {
		own("lambda_z_LT")
	}
	thick := sh.Flange > 0.040*(1+1e-9)
	slim := sh.Depth > 1.2*sh.Width*(1+1e-9)
	switch {
	case sh.Made == section.Welded && thick:
		own("alpha_LT welded thick")
	case sh.Made == section.Welded:
		own("alpha_LT welded")
	case slim && !thick:
		own("alpha_LT rolled slim")
	default:
		own("alpha_LT rolled")
	}
	switch {
	case d.straight:
		own("f_M linear")
	case d.lower && d.upper && d.uniform:
		own("f_M uniform")
	case d.lower && d.upper && !d.line && d.points == 1 && d.pointMiddle:
		own("f_M point")
	default:
		own("f_M other")
	}
	own("phi_LT")
	own("chi_LT")
	c.do(doMb)
}

// slenderNow tells whether the modulus in use is that of class 4.
func (c *calc) slenderNow() bool {
	w := c.s.At(moments[0].w)
	return w == c.s.At(moments[0].weff)
}
