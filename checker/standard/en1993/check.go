package en1993

import (
	"fmt"
	"math"
	"strings"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Standard is EN 1993-1-1:2005.
type Standard struct{}

// Name implements standard.Standard.
func (Standard) Name() string { return "EN 1993-1-1:2005" }

// Annexes implements standard.Standard.
func (Standard) Annexes() []string { return []string{"recommended"} }

// Overrides implements standard.Standard.
func (Standard) Overrides() map[string]bool {
	return map[string]bool{"gamma_M0": true, "gamma_M1": true}
}

// Rules implements standard.Standard.
func (Standard) Rules() []string {
	return []string{"local-buckling", "section-compression", "section-tension", "net-section", "section-bending-major", "section-bending-minor",
		"section-shear-major", "section-shear-minor", "section-interaction", "flexural-buckling-major", "flexural-buckling-minor",
		"torsional-buckling", "flexural-torsional-buckling", "lateral-torsional-buckling", "member-interaction", "slenderness", "sway"}
}

// Symbols implements standard.Standard.
func (Standard) Symbols() *derivation.Set { return set }

// Alias implements standard.Standard: N_b_major for N_b_y_Rd and so on.
func (Standard) Alias(word string) string {
	switch word {
	case "N_b_major":
		return "N_b_y_Rd"
	case "N_b_minor":
		return "N_b_z_Rd"
	case "N_b_twist":
		return "N_b_T_Rd"
	case "N_c":
		return "N_c_Rd"
	}
	for from, to := range map[string]string{"_major": "_y", "_minor": "_z"} {
		if base, ok := strings.CutSuffix(word, from); ok {
			if _, known := set.Find(base + to); known {
				return base + to
			}
		}
	}
	return ""
}

// Check implements standard.Standard.
func (Standard) Check(f *standard.Frame, record *derivation.Record) *standard.Outcome {
	c := &calc{f: f, s: derivation.NewSheet(set), record: record}
	c.out.Value = c.value
	c.run()
	return &c.out
}

type calc struct {
	f      *standard.Frame
	s      *derivation.Sheet
	record *derivation.Record
	out    standard.Outcome

	class    int    // 0 when it cannot be determined
	why      string // then, why
	beyond   string // why the steel is outside the standard, "" when it is not
	slender  bool   // class 4: resistances with A_eff
	major    curve
	minor    curve
	pressed  bool // some combination compresses the member
	pulled   int  // the combination with the greatest tension, -1 for none
	assuming []string
}

func (c *calc) value(symbol string) (unit.Quantity, bool) {
	id, ok := set.Find(symbol)
	if !ok {
		return unit.Quantity{}, false
	}
	v := c.s.At(id)
	return unit.Quantity{Value: v, Dim: set.At(id).Dim}, !math.IsNaN(v)
}

func (c *calc) cover(rule string, state standard.State, why string) {
	c.out.Coverage = append(c.out.Coverage, standard.Coverage{Rule: rule, State: state, Why: why})
}

func (c *calc) assume(format string, args ...any) {
	c.assuming = append(c.assuming, fmt.Sprintf(format, args...))
}

func (c *calc) group(rule string) {
	if c.record != nil {
		c.record.Group(rule)
	}
}

// silently runs without recording, for the search of what governs.
func (c *calc) silently(f func()) {
	c.s.Recording(nil)
	f()
	c.s.Recording(c.record)
}

func (c *calc) add(rule, clause string, combination int, demand, capacity float64, dim unit.Dim, u, limit float64) {
	check := standard.Check{Rule: rule, Clause: clause, Combination: combination, Demand: demand, Capacity: capacity, Dim: dim, Utilisation: u, Verdict: standard.Utilisation(u, limit)}
	if check.Verdict == standard.Undecided {
		check.Why = "a value that the check needs is missing or out of range"
	}
	c.out.Checks = append(c.out.Checks, check)
	c.cover(rule, standard.Checked, "")
}

func (c *calc) undecided(rule, clause, why string) {
	nan := math.NaN()
	c.out.Checks = append(c.out.Checks, standard.Check{Rule: rule, Clause: clause, Combination: -1, Demand: nan, Capacity: nan, Dim: unit.Force, Utilisation: nan, Why: why})
	c.cover(rule, standard.NotCovered, why)
}

func (c *calc) run() {
	c.s.Recording(c.record)
	c.given()
	c.loads()
	c.local()
	c.compression()
	c.tension()
	c.flexural(0, c.major)
	c.flexural(1, c.minor)
	c.torsional()
	c.bending()
	c.slenderness()
	c.sway()
	c.out.Assumptions = append(c.f.Assumptions(), c.assuming...)
}

// given takes what does not depend on the loads.
func (c *calc) given() {
	m, basis := c.f.Member, &c.f.Env.Basis
	c.group("")
	fy, _, source, ok := m.Material.Strength(m.Section.Thickness, basis.TableFy)
	if !ok {
		fy = math.NaN()
	}
	if c.beyond = outOfScope(m.Material, fy); c.beyond != "" {
		fy = math.NaN()
	}
	title := m.Section.Title()
	c.s.Take(symE, standard.Known(m.Material.E), m.Material.Title()+", 3.2.6(1)")
	c.s.Take(symG, standard.Known(m.Material.G), m.Material.Title()+", 3.2.6(1)")
	c.s.Take(symFy, standard.Known(fy), source)
	if m.Material.Grade != nil {
		if basis.TableFy {
			c.assume("strengths of %s from EN 1993-1-1 Table 3.1", m.Material.Grade.Name)
		} else {
			c.assume("strengths of %s from its product standard %s", m.Material.Grade.Name, m.Material.Grade.Standard)
		}
	}
	for _, g := range []struct {
		id     derivation.ID
		name   string
		clause string
	}{{symGM0, "gamma_M0", "6.1(1) note 2B"}, {symGM1, "gamma_M1", "6.1(1) note 2B"}} {
		v, overridden := standard.Overridden(basis, g.name, 1.0)
		source := g.clause + ", recommended"
		if overridden {
			source = "basis, because \"" + basis.Overrides[g.name].Because + "\""
		} else {
			c.assume("%s = 1.00 (recommended)", g.name)
		}
		c.s.Take(g.id, v, source)
	}
	c.s.Take(symA, standard.Known(m.Section.Area), title)
	c.s.Take(axes[0].i, standard.Known(m.Section.IMajor), title)
	c.s.Take(axes[1].i, standard.Known(m.Section.IMinor), title)
	c.major, c.minor = curves(m.Section, isS460(m.Material))
	if m.Section.Shape.Kind == section.Tube && m.Section.Shape.Made == section.Welded {
		c.assume("welds of the box are not thicker than half its wall (curve b)")
	}
}

// loads finds out whether there is compression and tension.
func (c *calc) loads() {
	c.pulled = -1
	most := 0.0
	for k := range c.f.Combinations {
		if c.f.Compression(k, 0, c.f.Member.Height) > 0 {
			c.pressed = true
		}
		if t := c.f.Tension(k); t > most*(1+1e-12) && t > 1e-6 {
			most, c.pulled = t, k
		}
	}
}

// local determines the class of the section.
func (c *calc) local() {
	const rule = "local-buckling"
	c.class, c.why = c.classify()
	c.slender = c.class == 4
	if math.IsNaN(c.s.At(symFy)) {
		c.class, c.why = 0, standard.NoStrength(c.f.Member)
		if c.beyond != "" {
			c.why = c.beyond
		}
	}
	switch {
	case c.class == 0:
		c.cover(rule, standard.NotCovered, c.why)
	case c.class < 4:
		c.cover(rule, standard.Checked, fmt.Sprintf("class %d: the whole section counts (5.5)", c.class))
	default:
		c.cover(rule, standard.Checked, "class 4: the effective area counts (EN 1993-1-5 4.4)")
	}
}

// compression is 6.2.4, for the greatest compression in the member.
func (c *calc) compression() {
	const rule, clause = "section-compression", "EN 1993-1-1 6.2.4"
	c.group(rule)
	if c.class > 0 {
		if c.slender {
			c.s.Do(doNcEff)
		} else {
			c.s.Do(doNc)
		}
	}
	if !c.pressed {
		c.cover(rule, standard.NotApplicable, "no combination compresses the member")
		return
	}
	if c.class == 0 {
		c.undecided(rule, clause, c.why)
		return
	}
	worst, at := c.worst(0, c.f.Member.Height)
	c.s.Take(symNEd, worst, c.f.Combinations[at].Name)
	u := c.s.Do(doUc)
	c.add(rule, clause, at, worst, c.s.At(symNcRd), unit.Force, u, c.f.Limit())
}

// worst is the greatest compression between two heights and its combination.
func (c *calc) worst(from, to float64) (float64, int) {
	most, at := math.Inf(-1), 0
	for k := range c.f.Combinations {
		if n := c.f.Compression(k, from, to); n > most {
			most, at = n, k
		}
	}
	return most, at
}

// tension is 6.2.3 for the gross section.
func (c *calc) tension() {
	const rule, clause = "section-tension", "EN 1993-1-1 6.2.3"
	c.group(rule)
	if c.pulled < 0 {
		c.cover(rule, standard.NotApplicable, "no combination pulls the member")
		return
	}
	n := c.f.Tension(c.pulled)
	c.s.Do(doNpl)
	c.s.Take(symNtEd, n, c.f.Combinations[c.pulled].Name)
	u := c.s.Do(doUt)
	c.add(rule, clause, c.pulled, n, c.s.At(symNpl), unit.Force, u, c.f.Limit())
	c.cover("net-section", standard.NotCovered, "there is tension: check the net section at holes by hand (6.2.3(2)b)")
}

// flexural is 6.3.1 about one axis: every stretch under every combination.
func (c *calc) flexural(a int, curve curve) {
	x := axes[a]
	rule, clause := "flexural-buckling-"+x.word, "EN 1993-1-1 6.3.1"
	c.group(rule)
	switch {
	case !c.f.Stands[a]:
		c.undecided(rule, clause, "the ends and holds do not keep the member in place about "+x.word)
		return
	case c.class == 0 && c.pressed:
		c.undecided(rule, clause, c.why)
		return
	case curve.letter == "":
		c.undecided(rule, clause, curve.row)
		return
	}
	alpha := alphas[curve.letter]
	governing, combination, best := 0, -1, math.Inf(-1)
	c.silently(func() {
		for i, s := range c.f.Stretches[a] {
			c.resistance(x, a, s, alpha, "")
			n, k := c.worst(s.From, s.To)
			if n <= 0 {
				if combination < 0 && s.Effective() > c.f.Stretches[a][governing].Effective() {
					governing = i
				}
				continue
			}
			c.s.Take(x.n, n, "")
			if u := c.s.Do(x.doU); u > best || combination < 0 {
				best, governing, combination = u, i, k
			}
		}
	})
	s := c.f.Stretches[a][governing]
	if c.class > 0 {
		source := ""
		if c.s.Recorded() {
			source = "curve " + curve.letter + ", Table 6.1 and 6.2: " + curve.row
		}
		c.resistance(x, a, s, alpha, source)
	}
	if combination < 0 {
		c.cover(rule, standard.NotApplicable, "no combination compresses the member")
		return
	}
	n := c.f.Compression(combination, s.From, s.To)
	source := ""
	if c.s.Recorded() {
		source = c.f.Combinations[combination].Name
	}
	c.s.Take(x.n, n, source)
	u := c.s.Do(x.doU)
	c.add(rule, clause, combination, n, c.s.At(x.nb), unit.Force, u, c.f.Limit())
}

// resistance computes the buckling resistance of a stretch. A member in a
// stretch sees one compression, the greatest in it, so the combination with the
// greatest compression governs the stretch.
func (c *calc) resistance(x *axis, a int, s action.Stretch, alpha float64, curveSource string) {
	source := ""
	if c.s.Recorded() {
		source = fmt.Sprintf("%s, %s–%s", c.f.StretchName(a, s), s.Base, s.Top)
	}
	c.s.Take(x.l, s.Length(), source)
	c.s.Take(x.k, s.K, source)
	c.s.Do(x.doLcr)
	c.s.Do(x.doNcr)
	if c.slender {
		c.s.Do(x.doLamEff)
	} else {
		c.s.Do(x.doLam)
	}
	c.s.Take(x.alpha, alpha, curveSource)
	c.s.Do(x.doPhi)
	c.s.Do(x.doChi)
	if c.slender {
		c.s.Do(x.doNbEff)
	} else {
		c.s.Do(x.doNb)
	}
}

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
	case !c.f.Stands[0] || !c.f.Stands[1]:
		c.undecided(rule, clause, "the ends and holds do not keep the member in place")
		return
	case c.minor.letter == "":
		c.undecided(rule, clause, c.minor.row)
		return
	case unequal:
		c.undecided(rule, clause, "sections without an axis of symmetry are not covered: solve the cubic of flexural-torsional buckling by hand")
		return
	}
	c.torsionalResistance(rule)
	n, k := c.worst(0, c.f.Member.Height)
	c.s.Take(symNEdT, n, c.f.Combinations[k].Name)
	u := c.s.Do(doUT)
	c.add(rule, clause, k, n, c.s.At(symNbT), unit.Force, u, c.f.Limit())
}

func (c *calc) torsionalResistance(rule string) {
	sec := c.f.Member.Section
	title := sec.Title()
	iw := standard.Warping(sec)
	if math.IsNaN(iw) {
		iw = 0
		c.assume("I_w = 0, as it is not stated")
	}
	c.s.Take(symIt, standard.KnownOrZero(sec.It), title)
	c.s.Take(symIw, standard.KnownOrZero(iw), title)
	offset := math.Hypot(sec.SMajor, sec.SMinor)
	if rule == "torsional-buckling" {
		offset = 0
	}
	c.s.Take(symY0, offset, title)
	c.s.Do(doI0)
	if c.f.TwistFree {
		c.assume("an end is free to twist: warping not counted")
		c.s.Do(doNTFree)
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
		c.s.Take(symLT, c.f.Twist*c.f.TwistK, held)
		c.s.Do(doNT)
	}
	if rule == "flexural-torsional-buckling" {
		// the shear centre lies on an axis of symmetry: buckling about that axis
		// goes with torsion
		c.s.Do(doBeta)
		if math.Abs(sec.SMajor) >= math.Abs(sec.SMinor) {
			c.criticalOf(0)
			c.s.Do(doNTFy)
		} else {
			c.criticalOf(1)
			c.s.Do(doNTFz)
		}
		c.s.Do(doNcrTF)
	} else {
		c.s.Do(doNcrT)
	}
	if c.slender {
		c.s.Do(doLamTEff)
	} else {
		c.s.Do(doLamT)
	}
	c.s.Take(symAlT, alphas[c.minor.letter], "curve "+c.minor.letter+" of z–z, 6.3.1.4(3)")
	c.s.Do(doPhiT)
	c.s.Do(doChiT)
	if c.slender {
		c.s.Do(doNbTEff)
	} else {
		c.s.Do(doNbT)
	}
}

// criticalOf computes the critical force about an axis for its longest
// effective length, which is on the safe side where stretches differ.
func (c *calc) criticalOf(a int) {
	x := axes[a]
	longest := c.f.Stretches[a][0]
	for _, s := range c.f.Stretches[a] {
		if s.Effective() > longest.Effective() {
			longest = s
		}
	}
	source := ""
	if c.s.Recorded() {
		source = c.f.StretchName(a, longest)
	}
	c.s.Take(x.l, longest.Length(), source)
	c.s.Take(x.k, longest.K, source)
	c.s.Do(x.doLcr)
	c.s.Do(x.doNcr)
}

// bending says what is left to a person when the member bends.
func (c *calc) bending() {
	type line struct {
		rule, hand string
		axes       []int
	}
	lines := []line{
		{"section-bending-major", "bending about y–y: check 6.2.5 by hand", []int{0}},
		{"section-bending-minor", "bending about z–z: check 6.2.5 by hand", []int{1}},
		{"section-shear-major", "shear with bending about y–y: check 6.2.6 by hand", []int{0}},
		{"section-shear-minor", "shear with bending about z–z: check 6.2.6 by hand", []int{1}},
		{"section-interaction", "bending with axial force: check 6.2.9 by hand", []int{0, 1}},
		{"lateral-torsional-buckling", "bending about y–y: check 6.3.2 by hand", []int{0}},
		{"member-interaction", "bending with axial force: check 6.3.3 by hand", []int{0, 1}},
	}
	for _, l := range lines {
		bends := false
		for _, a := range l.axes {
			bends = bends || c.f.Bends[a]
		}
		if bends {
			c.cover(l.rule, standard.NotCovered, l.hand)
		} else {
			c.cover(l.rule, standard.NotApplicable, "the loads do not bend the member")
		}
	}
}

// slenderness compares L_cr/i with the limit that the member sets itself.
func (c *calc) slenderness() {
	const rule = "slenderness"
	limit := c.f.Member.Limits.Slenderness
	if limit == 0 {
		c.cover(rule, standard.NotApplicable, "the member sets no limit")
		return
	}
	c.group(rule)
	run := func(a int) float64 {
		x := axes[a]
		c.criticalOf(a)
		c.s.Do(x.doR)
		c.s.Do(x.doSlender)
		c.s.Take(x.limit, limit, "limit of the member")
		return c.s.Do(x.doLimitU)
	}
	worst, at := math.Inf(-1), 0
	for a := range axes {
		if !c.f.Stands[a] {
			c.undecided(rule, "limit of the member", "the ends and holds do not keep the member in place about "+axes[a].word)
			return
		}
		c.silently(func() {
			if u := run(a); u > worst {
				worst, at = u, a
			}
		})
	}
	u := run(at)
	c.add(rule, "limit of the member", -1, c.s.At(axes[at].slender), limit, unit.None, u, 1)
}

func (c *calc) sway() {
	if c.f.Member.Limits.Sway > 0 {
		c.undecided("sway", "limit of the member", "sway is not worked out: compare the frame's sway with the limit by hand")
		return
	}
	c.cover("sway", standard.NotApplicable, "the member sets no limit")
}

var _ standard.Standard = Standard{}

func init() { set.Seal() }
