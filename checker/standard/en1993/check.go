package en1993

import (
	"fmt"
	"math"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

type calc struct {
	ed     *edition
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

	settings  settings
	uniform   int // class in uniform compression, also where class is 0 as its effective section is not known
	combs     []comb
	intervals []interval
	tiny      [2]float64
	high      [2]bool // some shear force is more than half of the resistance
	lat       lateral
}

// do computes a formula of the standard.
func (c *calc) do(f *derivation.Formula) float64 {
	if c.ed.own != nil {
		if own, ok := c.ed.own[f]; ok {
			f = own
		}
	}
	return c.s.Do(f)
}

// take sets a symbol from outside the formulas.
func (c *calc) take(id derivation.ID, value float64, source string) {
	if c.ed.renumber != nil && source != "" {
		source = c.ed.renumber(source)
	}
	c.s.Take(id, value, source)
}

func (c *calc) value(symbol string) (unit.Quantity, bool) {
	id, ok := c.ed.set.Find(symbol)
	if !ok {
		return unit.Quantity{}, false
	}
	v := c.s.At(id)
	return unit.Quantity{Value: v, Dim: c.ed.set.At(id).Dim}, !math.IsNaN(v)
}

func (c *calc) cover(rule string, state standard.State, why string) {
	c.out.Cover(rule, state, why)
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
	c.out.Add(rule, clause, combination, demand, capacity, dim, u, limit)
}

func (c *calc) undecided(rule, clause, why string) {
	c.out.Undecided(rule, clause, unit.Force, why)
}

func (c *calc) run() {
	c.s.Recording(c.record)
	c.given()
	c.loads()
	c.local()
	c.compression()
	c.tension()
	if !c.byLeg() {
		c.flexural(0, c.major)
		c.flexural(1, c.minor)
	}
	c.torsional()
	c.bending()
	c.slenderness()
	c.shared()
	c.out.Assumptions = append(c.f.Assumptions(), c.assuming...)
}

// given takes what does not depend on the loads.
func (c *calc) given() {
	m, basis := c.f.Member, &c.f.Env.Basis
	c.group("")
	fy, _, source, ok := m.Material.StrengthOf(m.Section, basis.TableFy)
	if !ok {
		fy = math.NaN()
	}
	if c.beyond = c.ed.outOfScope(m.Material, fy, c.f.Env.Basis.Show); c.beyond != "" {
		fy = math.NaN()
	}
	title := m.Section.Title()
	c.take(symE, standard.Known(m.Material.E), m.Material.Title()+", 3.2.6(1)")
	c.take(symG, standard.Known(m.Material.G), m.Material.Title()+", 3.2.6(1)")
	c.take(symFy, standard.Known(fy), source)
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
		annex, from := c.settings.partial(g.name, 1.0)
		v, overridden := standard.Overridden(basis, g.name, annex)
		source := g.clause + ", " + from
		if overridden {
			source = "basis, because \"" + basis.Overrides[g.name].Because + "\""
		} else {
			c.assume("%s = %s (%s)", g.name, unit.Short(v, 3)+map[bool]string{true: ".00"}[v == 1], from)
		}
		c.take(g.id, v, source)
	}
	c.take(symA, standard.Known(m.Section.Area), title)
	c.take(axes[0].i, standard.Known(m.Section.IMajor), title)
	c.take(axes[1].i, standard.Known(m.Section.IMinor), title)
	c.major, c.minor = c.ed.curves(m.Section, isS460(m.Material))
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
	c.uniform = c.class
	if v := c.s.At(symClass); !math.IsNaN(v) {
		c.uniform = int(v)
	}
	c.slender = c.class == 4
	if math.IsNaN(c.s.At(symFy)) {
		c.uniform = 0
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
			c.do(doNcEff)
		} else {
			c.do(doNc)
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
	c.take(symNEd, worst, c.f.Combinations[at].Name)
	u := c.do(doUc)
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
	c.do(doNpl)
	c.take(symNtEd, n, c.f.Combinations[c.pulled].Name)
	u := c.do(doUt)
	c.add(rule, clause, c.pulled, n, c.s.At(symNpl), unit.Force, u, c.f.Limit())
	c.netSection(n)
}

// netSection is 6.2.3(2)b for the area that the basis says holes leave.
func (c *calc) netSection(n float64) {
	const rule, clause = "net-section", "EN 1993-1-1 6.2.3(2)b"
	m, basis := c.f.Member, &c.f.Env.Basis
	ratio, stated := basis.Overrides["net_ratio"]
	own := !math.IsNaN(m.Net)
	if !stated && !own {
		c.cover(rule, standard.NotCovered, "there is tension: check the net section at holes by hand (6.2.3(2)b), or state the net area: net = …")
		return
	}
	if !own && !(ratio.Value <= 1) {
		c.undecided(rule, clause, "net_ratio is more than 1: holes leave no more than the whole area")
		return
	}
	if m.Leg.Stated() {
		c.cover(rule, standard.NotCovered, "the angle is connected by one leg: find its net section by EN 1993-1-8 3.10.3, by hand (6.2.3(5))")
		return
	}
	c.group(rule)
	_, fu, source, ok := m.Material.StrengthOf(m.Section, basis.TableFy)
	if !ok || !(fu > 0) {
		c.undecided(rule, clause, "the tensile strength of "+m.Material.Title()+" is not known")
		return
	}
	annex, from := c.settings.partial("gamma_M2", 1.25)
	gamma, overridden := standard.Overridden(basis, "gamma_M2", annex)
	if overridden {
		from = "basis, because \"" + basis.Overrides["gamma_M2"].Because + "\""
	}
	c.take(symFu, standard.Known(fu), source)
	c.take(symGM2, gamma, "6.1(1) note 2B, "+from)
	if own {
		c.take(symAnet, standard.Known(m.Net), "given, 6.2.2.2")
	} else {
		c.take(symNet, ratio.Value, "basis, because \""+ratio.Because+"\"")
		c.do(doAnet)
	}
	c.do(doNu)
	c.take(symNtEd, n, c.f.Combinations[c.pulled].Name)
	u := c.do(doUu)
	c.add(rule, clause, c.pulled, n, c.s.At(symNu), unit.Force, u, c.f.Limit())
}

// flexural is 6.3.1 about one axis: every stretch under every combination.
func (c *calc) flexural(a int, curve curve) {
	x := axes[a]
	rule, clause := "flexural-buckling-"+x.word, "EN 1993-1-1 6.3.1"
	c.group(rule)
	switch {
	case !c.f.Stands[a]:
		c.undecided(rule, clause, c.f.NotHeld(a))
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
			if c.f.Exact[a] { // the combination decides the critical force too
				for k := range c.f.Combinations {
					if !(c.f.Compression(k, s.From, s.To) > 0) {
						continue
					}
					c.resistance(x, a, s, k, alpha, "")
					if u := c.do(x.doU); u > best || combination < 0 || math.IsNaN(u) && !math.IsNaN(best) {
						best, governing, combination = u, i, k
					}
				}
				continue
			}
			c.resistance(x, a, s, -1, alpha, "")
			n, k := c.worst(s.From, s.To)
			if n <= 0 {
				if combination < 0 && s.Effective() > c.f.Stretches[a][governing].Effective() {
					governing = i
				}
				continue
			}
			c.take(x.n, n, "")
			if u := c.do(x.doU); u > best || combination < 0 {
				best, governing, combination = u, i, k
			}
		}
	})
	s := c.f.Stretches[a][governing]
	if c.class > 0 && (combination >= 0 || !c.f.Exact[a]) {
		source := ""
		if c.s.Recorded() {
			source = "curve " + curve.letter + ", Table 6.1 and 6.2: " + curve.row
		}
		c.resistance(x, a, s, combination, alpha, source)
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
	c.take(x.n, n, source)
	u := c.do(x.doU)
	c.add(rule, clause, combination, n, c.s.At(x.nb), unit.Force, u, c.f.Limit())
}

// resistance computes the buckling resistance of a stretch under a combination,
// which counts where critical forces are those of the whole member. Else a stretch
// sees one compression, the greatest in it, so the combination with the greatest
// compression governs the stretch.
func (c *calc) resistance(x *axis, a int, s action.Stretch, k int, alpha float64, curveSource string) {
	c.criticalForce(x, a, s, k)
	if c.slender {
		c.do(x.doLamEff)
	} else {
		c.do(x.doLam)
	}
	c.take(x.alpha, alpha, curveSource)
	c.do(x.doPhi)
	c.do(x.doChi)
	if c.slender {
		c.do(x.doNbEff)
	} else {
		c.do(x.doNb)
	}
}

// criticalForce computes the elastic critical force of a stretch under a
// combination: by its effective length, or from the load factor of the whole member.
func (c *calc) criticalForce(x *axis, a int, s action.Stretch, k int) {
	source := ""
	if c.s.Recorded() {
		source = fmt.Sprintf("%s, %s–%s", c.f.StretchName(a, s), s.Base, s.Top)
	}
	c.take(x.l, s.Length(), source)
	n := 0.0
	if c.f.Exact[a] && k >= 0 {
		n = c.f.Compression(k, s.From, s.To)
	}
	if c.f.Exact[a] && !(n <= 0) {
		if c.s.Recorded() {
			source = c.f.Combinations[k].Name
		}
		c.take(x.acr, standard.Known(c.f.Factor(a, k)), "eigenvalue of the stiffness matrix with holds, springs and stepped forces")
		c.take(x.n, n, source)
		c.do(x.doNcrWhole)
		c.do(x.doLcrWhole)
		return
	}
	if c.f.Exact[a] {
		s.K, source = 1, "not compressed: its own length"
	}
	c.take(x.k, s.K, source)
	c.do(x.doLcr)
	c.do(x.doNcr)
}

// criticalOf computes the critical force about an axis for its longest
// effective length, which is on the safe side where stretches differ.
func (c *calc) criticalOf(a int) {
	x := axes[a]
	if c.f.Exact[a] {
		c.criticalForce(x, a, c.f.Whole(a), c.f.Weakest(a))
		return
	}
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
	c.take(x.l, longest.Length(), source)
	c.take(x.k, longest.K, source)
	c.do(x.doLcr)
	c.do(x.doNcr)
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
		c.do(x.doR)
		c.do(x.doSlender)
		c.take(x.limit, limit, "limit of the member")
		return c.do(x.doLimitU)
	}
	worst, at := math.Inf(-1), 0
	for a := range axes {
		if !c.f.Stands[a] {
			c.undecided(rule, "limit of the member", c.f.NotHeld(a))
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

// common are the checks that all standards share.
var common = standard.NewCommon(set)

func (c *calc) shared() {
	common.Check(c.f, c.s, &c.out, c.group, c.do)
}

var _ standard.Standard = Standard{}

func init() { set.Seal() }
