package aisc360

import (
	"fmt"
	"math"

	"kern/checker/derivation"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Single angles that are connected by one leg, E5: a slenderness that allows for
// the eccentricity.
var (
	symLen = sym("L", unit.Length, "length of the member between work points")
	symRa  = sym("r_a", unit.Length, "radius of gyration about the axis parallel to the connected leg")
	symRz  = sym("r_z", unit.Length, "radius of gyration about the minor principal axis")
	symBl  = sym("b_l", unit.Length, "longer leg")
	symBs  = sym("b_s", unit.Length, "shorter leg")

	// by connection (long or short leg), truss (planar or space) and whether L/r_a is
	// small
	legs = newLegs()

	doBl = formula(symBl, "max(b_1, b_2)", "E5")
	doBs = formula(symBs, "min(b_1, b_2)", "E5")
)

const (
	eccentric = "ANSI/AISC 360 E5"
	mostRatio = 1.7 // of legs, E5(5)
	mostSlope = 200 // L_c/r, E5(4)
)

// legKey is short, space, small.
type legKey [3]bool

func newLegs() map[legKey]*derivation.Formula {
	out := map[legKey]*derivation.Formula{}
	for _, f := range []struct {
		key          legKey
		text, clause string
	}{
		{legKey{false, false, true}, "72 + 0.75 * L / r_a", "E5(a)(1) (E5-1)"},
		{legKey{false, false, false}, "32 + 1.25 * L / r_a", "E5(a)(1) (E5-2)"},
		{legKey{false, true, true}, "60 + 0.8 * L / r_a", "E5(b)(1) (E5-3)"},
		{legKey{false, true, false}, "45 + L / r_a", "E5(b)(1) (E5-4)"},
		{legKey{true, false, true}, "max(0.95 * L / r_z, 72 + 0.75 * L / r_a + 4 * ((b_l / b_s)^2 - 1))", "E5(a)(2)"},
		{legKey{true, false, false}, "max(0.95 * L / r_z, 32 + 1.25 * L / r_a + 4 * ((b_l / b_s)^2 - 1))", "E5(a)(2)"},
		{legKey{true, true, true}, "max(0.82 * L / r_z, 60 + 0.8 * L / r_a + 6 * ((b_l / b_s)^2 - 1))", "E5(b)(2)"},
		{legKey{true, true, false}, "max(0.82 * L / r_z, 45 + L / r_a + 6 * ((b_l / b_s)^2 - 1))", "E5(b)(2)"},
	} {
		out[f.key] = formula(axes[1].slender, f.text, f.clause)
	}
	return out
}

// byLeg is E5 for a member that is connected by one leg; false when it is none.
func (c *calc) byLeg() bool {
	m := c.f.Member
	if !m.Leg.Stated() {
		return false
	}
	const major, rule = "flexural-buckling-major", "flexural-buckling-minor"
	c.group(rule)
	c.cover(major, standard.NotApplicable, "connected by one leg: see "+rule+" (E5)")
	if !c.pressed {
		c.least(unknown(rule))
		c.cover(rule, standard.NotApplicable, notPressed)
		return true
	}
	if why := c.legRefused(); why != "" {
		c.least(unknown(rule))
		c.undecided(rule, eccentric, why)
		return true
	}
	sec, title := m.Section, m.Section.Title()
	c.take(symLen, m.Height, "the whole length")
	parallel := sec.IX // to a lying leg
	if (sec.Shape.Depth >= sec.Shape.Width) == m.Leg.Long {
		parallel = sec.IY
	}
	if sec.Shape.Depth == sec.Shape.Width {
		parallel = min(sec.IX, sec.IY)
	}
	c.take(symRa, math.Sqrt(parallel/sec.Area), title)
	c.take(symRz, sec.RMinor, title)
	unequal := math.Abs(sec.Shape.Depth-sec.Shape.Width) > 1e-9
	if unequal {
		c.do(doBl)
		c.do(doBs)
	}
	bound := 80.0
	if m.Leg.Space {
		bound = 75
	}
	x := axes[1]
	slope := c.do(legs[legKey{m.Leg.Short && unequal, m.Leg.Space, c.s.At(symLen)/c.s.At(symRa) <= bound}])
	if !(slope <= mostSlope) {
		c.least(unknown(rule))
		c.undecided(rule, eccentric, fmt.Sprintf("L_c/r by E5 is %s, above 200: the eccentricity is to be counted as bending (chapter H), by hand", unit.Short(slope, 3)))
		return true
	}
	c.assume("connected by one leg at both ends, the same one, by welds or at least two bolts (E5)")
	c.do(x.doFe)
	c.do(x.doPe)
	c.nominalStrength(x)
	c.least(c.of(x, rule))
	n, k := c.worst(0, m.Height)
	c.take(x.pr, n, c.combination(k))
	u := c.do(x.doU)
	c.add(rule, eccentric, k, n, c.s.At(x.strength.c), unit.Force, u, c.f.Limit())
	return true
}

// legRefused says why E5 does not hold for the member, "" when it does.
func (c *calc) legRefused() string {
	m := c.f.Member
	sh := m.Section.Shape
	switch {
	case c.why != "":
		return c.why
	case max(sh.Depth, sh.Width) >= mostRatio*min(sh.Depth, sh.Width):
		return "the longer leg is not shorter than 1.7 times the other: count the eccentricity as bending (E5(5), chapter H), by hand"
	case c.f.Pushed[0] || c.f.Pushed[1]:
		return "there are loads across the member: count the eccentricity as bending (E5(3), chapter H), by hand"
	}
	if m.Imported != nil {
		return "its forces come from a table: whether they come in at the ends is not known, count the eccentricity as bending (E5(1), chapter H), by hand"
	}
	for _, l := range m.Loads {
		if l.At > 1e-6*m.Height && l.At < m.Height*(1-1e-6) {
			return "there are loads between the ends: count the eccentricity as bending (E5(1), chapter H), by hand"
		}
	}
	return ""
}
