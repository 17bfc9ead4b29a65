package aisc360

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"kern/checker/derivation"
	"kern/checker/standard"
	"kern/lang/unit"
)

type calc struct {
	ed     *edition
	f      *standard.Frame
	s      *derivation.Sheet
	record *derivation.Record
	out    standard.Outcome
	asd    bool // by ASD; else by LRFD

	why      string // why no strength can be found, "" when it can
	pressed  bool   // some combination compresses the member
	pulled   int    // the combination with the greatest tension, -1 for none
	assuming []string

	shape   *shape // the plates that can buckle in compression; nil for solid, round and stated sections
	slender bool   // a plate, or the round wall, has a width-to-thickness ratio above lambda_r
	// governing is the mode of buckling with the least nominal strength; its rule is ""
	// while none was found.
	governing mode
	// compressed are the values after the checks of tension and compression, which
	// those of combined forces compute again for other stretches.
	compressed []float64

	bend bendState
}

// do computes a formula of the standard.
func (c *calc) do(f *derivation.Formula) float64 {
	if c.ed.own != nil {
		f = c.ed.own[f]
	}
	return c.s.Do(f)
}

// take sets a symbol from outside the formulas.
func (c *calc) take(id derivation.ID, value float64, source string) float64 {
	return c.s.Take(id, value, source)
}

func (c *calc) value(symbol string) (unit.Quantity, bool) {
	id, ok := c.ed.set.Find(symbol)
	if !ok {
		return unit.Quantity{}, false
	}
	v := c.s.At(id)
	if int(id) < len(c.compressed) && !math.IsNaN(c.compressed[id]) {
		v = c.compressed[id]
	}
	return unit.Quantity{Value: v, Dim: c.ed.set.At(id).Dim}, !math.IsNaN(v)
}

func (c *calc) cover(rule string, state standard.State, why string) {
	c.out.Cover(rule, state, why)
}

func (c *calc) assume(format string, args ...any) {
	line := fmt.Sprintf(format, args...)
	if !slices.Contains(c.assuming, line) {
		c.assuming = append(c.assuming, line)
	}
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

// combination is the name of a combination as a source, composed only when steps
// are written down.
func (c *calc) combination(k int) string {
	if !c.s.Recorded() || k < 0 || k >= len(c.f.Combinations) {
		return ""
	}
	return c.f.Combinations[k].Name
}

// run makes the checks in the order in which they lean on each other.
func (c *calc) run() {
	c.governing = unknown("")
	c.s.Recording(c.record)
	c.given()
	c.loads()
	c.pair()
	c.local()
	c.tension()
	c.compression()
	c.stability()
	c.compressed = make([]float64, c.ed.set.Len())
	for i := range c.compressed {
		c.compressed[i] = c.s.At(derivation.ID(i))
	}
	c.bending()
	c.bracing()
	c.slenderness()
	c.shared()
	c.out.Assumptions = append(c.f.Assumptions(), c.assuming...)
}

// Moduli of steel, E3 and E4: 29000 and 11200 ksi. The standard prints 200000 and
// 77200 MPa beside them.
const (
	modulusE = 29000 * 4448.2216152605 / (0.0254 * 0.0254)
	modulusG = 11200 * 4448.2216152605 / (0.0254 * 0.0254)
)

// given takes what does not depend on the loads.
func (c *calc) given() {
	m, basis := c.f.Member, &c.f.Env.Basis
	c.group("")
	fy, _, source, ok := m.Material.StrengthOf(m.Section, basis.TableFy)
	if !ok || !(fy > 0) {
		fy = math.NaN()
		c.why = standard.NoStrength(m)
	}
	title := m.Section.Title()
	e, g, from := standard.Known(m.Material.E), standard.Known(m.Material.G), m.Material.Title()
	if m.Material.Grade != nil {
		e, g, from = modulusE, modulusG, "E3, E4"
		c.assume("E = 29000 ksi and G = 11200 ksi, which the standard has for every steel")
	} else if math.Abs(e/modulusE-1) > 1e-3 {
		c.assume("E of %s as it is stated; the standard has 29000 ksi", m.Material.Title())
	}
	c.take(symE, e, from)
	c.take(symG, g, from)
	c.take(symFy, standard.Known(fy), source)
	c.take(symAg, standard.Known(m.Section.Area), title)
	c.take(axes[0].i, standard.Known(m.Section.IMajor), title)
	c.take(axes[1].i, standard.Known(m.Section.IMinor), title)
	c.do(axes[0].doR)
	c.do(axes[1].doR)
	method, alpha := "LRFD", 1.0
	if c.asd {
		method, alpha = "ASD", 1.6
	}
	c.take(symAlphaFactor, alpha, "C2.3, "+method)
	if c.asd {
		c.assume("by ASD: allowable strengths (B3.2), with combinations of ASD")
	} else {
		c.assume("by LRFD: design strengths (B3.1), with combinations of LRFD")
	}
	switch {
	case basis.Actions == "" && len(c.f.Env.Automatic) > 0 && !c.asd && m.Imported == nil:
		c.assume("the loads bear the load factors of LRFD already, as no combinations are stated")
	case strings.HasPrefix(basis.Actions, "EN "):
		c.assume("combinations of %s with strengths of %s: the safety of the two is not of one kind", basis.Actions, c.ed.name)
	}
	if m.Material.Grade != nil {
		c.assume("strengths of %s from its product standard %s", m.Material.Grade.Name, m.Material.Grade.Standard)
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
	if c.pressed {
		n, k := c.worst(0, c.f.Member.Height)
		c.take(symPr, n, c.combination(k))
	}
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

// common are the checks that all standards share.
var common = standard.NewCommon(set)

func (c *calc) shared() {
	common.Check(c.f, c.s, &c.out, c.group, c.do)
}
