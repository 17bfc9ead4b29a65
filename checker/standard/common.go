package standard

import (
	"math"

	"kern/checker/derivation"
	"kern/lang/unit"
)

// Common are the symbols and formulas of the checks that every standard makes in
// the same way: sway and deflection against the limits that a member sets, and the
// stiffness of its holds. Each standard has its own set of letters.
type Common struct {
	sway, deflection movement
	stiffness        movement

	phi0, height, alphaH, alphaM, phi derivation.ID
	doAlphaH, doPhi                   *derivation.Formula
}

type movement struct {
	rule            string
	value, limit, u derivation.ID
	do              *derivation.Formula
}

// CommonRules are the checks that every standard makes in the same way.
var CommonRules = []string{"sway", "deflection", "hold-stiffness"}

// NewCommon registers the letters of the common checks.
func NewCommon(set *derivation.Set) *Common {
	one := func(rule, what string) movement {
		m := movement{rule: rule}
		m.value = set.Symbol(rule, unit.Length, what)
		m.limit = set.Symbol("limit_"+rule, unit.Length, "limit of the "+rule)
		m.u = set.Symbol("u_"+rule, unit.None, "utilisation, "+rule)
		m.do = set.Formula(m.u, rule+" / limit_"+rule, "demand / limit")
		return m
	}
	stiffness := movement{rule: "hold-stiffness"}
	stiffness.value = set.Symbol("k_needed", unit.ForcePerLength, "stiffness that the hold needs")
	stiffness.limit = set.Symbol("k_hold", unit.ForcePerLength, "stiffness of the hold")
	stiffness.u = set.Symbol("u_hold", unit.None, "utilisation, stiffness of the hold")
	stiffness.do = set.Formula(stiffness.u, "k_needed / k_hold", "demand / stiffness")
	x := &Common{
		stiffness:  stiffness,
		sway:       one("sway", "sideways movement of the top, first order"),
		deflection: one("deflection", "sideways movement from the line between neighbouring holds, first order"),
	}
	x.phi0 = set.Symbol("phi_0", unit.None, "basic value of the sway imperfection")
	x.height = set.Symbol("h_sway", unit.Length, "height of the column that sways")
	x.alphaH = set.Symbol("alpha_h_phi", unit.None, "reduction for the height")
	x.alphaM = set.Symbol("alpha_m_phi", unit.None, "reduction for the number of columns in a row")
	x.phi = set.Symbol("phi", unit.None, "sway imperfection")
	x.doAlphaH = set.Formula(x.alphaH, "min(1, max(2 / 3, 2 / sqrt(h_sway / 1 m)))", "EN 1993-1-1 5.3.2(3)")
	x.doPhi = set.Formula(x.phi, "phi_0 * alpha_h_phi * alpha_m_phi", "EN 1993-1-1 5.3.2(3) (5.5)")
	return x
}

// Check makes the common checks. do computes a formula of the standard, and group
// begins the working of a rule.
// They are made of the whole member, whatever lift the frame is of.
func (x *Common) Check(f *Frame, s *derivation.Sheet, out *Outcome, group func(rule string), do func(*derivation.Formula) float64) {
	f = f.root()
	if f.Imperfect() {
		group("")
		s.Take(x.phi0, swayBasic, "EN 1993-1-1 5.3.2(3)")
		s.Take(x.height, f.Member.Height, "the member")
		do(x.doAlphaH)
		s.Take(x.alphaM, 1, "one column by itself")
		do(x.doPhi)
	}
	x.movements(f, s, out, group, do)
	x.holds(f, s, out, group, do)
}

// holds judges the stiffness of the holds that state one.
func (x *Common) holds(f *Frame, s *derivation.Sheet, out *Outcome, group func(rule string), do func(*derivation.Formula) float64) {
	const rule = "hold-stiffness"
	stated := false
	for _, h := range f.Member.Holds {
		stated = stated || h.Stiffness > 0
	}
	if !stated {
		out.Coverage = append(out.Coverage, Coverage{Rule: rule, State: NotApplicable, Why: "no hold states its stiffness: what each must have is listed"})
		return
	}
	group(rule)
	var worst HoldDemand
	best := math.Inf(-1)
	for _, d := range f.statedHolds() {
		if u := d.Stiffness / d.Stated; d.Stated > 0 && !(u <= best) && !math.IsNaN(best) {
			best, worst = u, d
		}
	}
	if math.IsInf(best, -1) {
		out.Coverage = append(out.Coverage, Coverage{Rule: rule, State: NotApplicable, Why: "no combination compresses the member"})
		return
	}
	where := "hold at " + f.Place(worst.At) + " about " + worst.Axis.String()
	s.Take(x.stiffness.value, worst.Stiffness, f.Combinations[worst.Combination].Name+", "+worst.How)
	s.Take(x.stiffness.limit, worst.Stated, where)
	u := do(x.stiffness.do)
	c := Check{Rule: rule, Clause: "Stiffness of holds", Combination: worst.Combination, Dim: unit.ForcePerLength, Demand: worst.Stiffness, Capacity: worst.Stated, Utilisation: u, Verdict: Utilisation(u, 1)}
	switch c.Verdict {
	case Undecided:
		c.Why = "no stiffness of the " + where + " lets the member buckle at twice its forces: find what the hold needs by hand, with second-order moments"
	case Fails:
		c.Why = "the " + where + " is too soft to count on: " + worst.How
	}
	out.Checks = append(out.Checks, c)
	out.Coverage = append(out.Coverage, Coverage{Rule: rule, State: Checked})
}

// movements judges a member's limits of sway and deflection: movements of first
// order in the serviceability combinations that the limit names.
func (x *Common) movements(f *Frame, s *derivation.Sheet, out *Outcome, group func(rule string), do func(*derivation.Formula) float64) {
	for _, m := range []movement{x.sway, x.deflection} {
		l := f.Member.Limits.Sway
		if m.rule == "deflection" {
			l = f.Member.Limits.Deflection
		}
		if !l.Set() {
			out.Coverage = append(out.Coverage, Coverage{Rule: m.rule, State: NotApplicable, Why: "the member sets no limit"})
			continue
		}
		group(m.rule)
		most, why := f.greatest(m.rule, l)
		nan := math.NaN()
		c := Check{Rule: m.rule, Clause: "limit of the member", Combination: -1, Dim: unit.Length, Demand: nan, Capacity: nan, Utilisation: nan, Why: why}
		if why != "" {
			out.Checks = append(out.Checks, c)
			out.Coverage = append(out.Coverage, Coverage{Rule: m.rule, State: NotCovered, Why: why})
			continue
		}
		s.Take(m.value, most.size, most.under+", "+most.where)
		s.Take(m.limit, most.limit, "limit of the member, "+most.where)
		c.Under, c.Demand, c.Capacity, c.Utilisation = most.under, most.size, most.limit, do(m.do)
		if c.Verdict = Utilisation(c.Utilisation, 1); c.Verdict == Undecided {
			c.Why = "a value that the check needs is missing"
		}
		out.Checks = append(out.Checks, c)
		out.Coverage = append(out.Coverage, Coverage{Rule: m.rule, State: Checked, Why: most.without})
	}
}
