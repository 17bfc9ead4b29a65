// Package elastic checks members by elastic theory alone: first yield of the
// extreme fibre, and Euler's critical load about both axes, each with a factor
// of safety that the user sets.
package elastic

import (
	"fmt"
	"math"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Standard is the standard "elastic".
type Standard struct{}

// The symbols and formulas. Sources: Euler 1744 for the critical load; the
// secant formula and the amplification of a sinusoidal moment are standard
// results of the theory of beam-columns (Timoshenko and Gere, Theory of Elastic
// Stability, chapter 1).
var (
	set = derivation.NewSet()

	symE  = set.Symbol("E", unit.Stress, "Young's modulus")
	symFy = set.Symbol("f_y", unit.Stress, "yield strength")
	symA  = set.Symbol("A", unit.Area, "area of the section")
	symN  = set.Symbol("N", unit.Force, "axial force, compression positive")
	symPy = set.Symbol("P_y", unit.Force, "force at which the section yields, axial force alone")
	symNy = set.Symbol("factor_yield", unit.None, "factor of safety against first yield")
	symNb = set.Symbol("factor_buckling", unit.None, "factor of safety against buckling")
	symS  = set.Symbol("sigma", unit.Stress, "greatest stress under the loads times the factor of safety")
	symUy = set.Symbol("u_yield", unit.None, "utilisation, first yield")
	symNs = set.Symbol("N_s", unit.Force, "axial force where the stress is greatest, without its sign")

	axes = [2]axis{newAxis("major"), newAxis("minor")}

	doPy = set.Formula(symPy, "f_y * A", "stress = force / area")
	// The axial force adds to a moment no more than it adds to the greatest moment
	// of the stretch, wherever that is: where the axial force is greatest the
	// moment of first order may be small, and yet the deflection is not.
	doAxial = set.Formula(symS, "factor_yield * N_s / A", "stress = force / area")
	doMajor = set.Formula(symS, "factor_yield * (N_s / A + (M_major + (a_major - 1) * M_max_major) / W_major)", "axial force and bending, second order")
	doMinor = set.Formula(symS, "factor_yield * (N_s / A + (M_minor + (a_minor - 1) * M_max_minor) / W_minor)", "axial force and bending, second order")
	doBoth  = set.Formula(symS, "factor_yield * (N_s / A + (M_major + (a_major - 1) * M_max_major) / W_major + (M_minor + (a_minor - 1) * M_max_minor) / W_minor)", "axial force and bending, second order")
	// The same with moments of second order of the whole member, found under the loads
	// times the factor of safety.
	doMajor2 = set.Formula(symS, "factor_yield * N_s / A + M_2_major / W_major", "axial force and bending, second order")
	doMinor2 = set.Formula(symS, "factor_yield * N_s / A + M_2_minor / W_minor", "axial force and bending, second order")
	doBoth2  = set.Formula(symS, "factor_yield * N_s / A + M_2_major / W_major + M_2_minor / W_minor", "axial force and bending, second order")
	doUy     = set.Formula(symUy, "sigma / f_y", "demand / capacity")
)

// common are the checks that all standards share.
var common = standard.NewCommon(set)

type axis struct {
	name                                        string
	i, w, r, l, k, le, pcr, n, u, slender, m, a derivation.ID
	peak, acr, m2                               derivation.ID
	ratio, uSlender, limit                      derivation.ID
	doLe, doPcr, doU, doR, doSlender, doRatio   *derivation.Formula
	doBuckled                                   *derivation.Formula
	secant, sine, sway, tension, doUSlender     *derivation.Formula
	doPcrWhole, doLeWhole, doSecond             *derivation.Formula
}

func newAxis(name string) axis {
	x := axis{name: name}
	sym := func(letter string, dim unit.Dim, what string) derivation.ID {
		return set.Symbol(letter+"_"+name, dim, what+", "+name+" axis")
	}
	x.i = sym("I", unit.Length4, "second moment of area")
	x.w = sym("W", unit.Volume, "elastic section modulus")
	x.r = sym("i", unit.Length, "radius of gyration")
	x.l = sym("L", unit.Length, "length of the stretch between holds")
	x.k = sym("K", unit.None, "effective length factor")
	x.le = sym("L_cr", unit.Length, "effective length")
	x.pcr = sym("P_cr", unit.Force, "Euler's critical load")
	x.n = sym("N", unit.Force, "greatest compression in the stretch")
	x.u = sym("u_buckling", unit.None, "utilisation, buckling")
	x.slender = sym("slenderness", unit.None, "slenderness")
	x.m = sym("M", unit.Moment, "bending moment, first order, without its sign")
	x.peak = sym("M_max", unit.Moment, "greatest bending moment in the stretch, first order, without its sign")
	x.m2 = sym("M_2", unit.Moment, "bending moment of second order under the loads times the factor of safety, without its sign")
	x.a = sym("a", unit.None, "amplification of the moment by the axial force")
	x.ratio = sym("n", unit.None, "factored axial force over the critical load")
	x.uSlender = sym("u_slenderness", unit.None, "utilisation, slenderness")
	x.acr = sym("alpha_cr", unit.None, "factor by which the loads of the combination reach elastic buckling of the whole member")
	x.limit = sym("limit_slenderness", unit.None, "limit of slenderness")
	f := func(id derivation.ID, text, clause string) *derivation.Formula { return set.Formula(id, text, clause) }
	x.doLe = f(x.le, "K_"+name+" * L_"+name, "effective length")
	x.doR = f(x.r, "sqrt(I_"+name+" / A)", "definition")
	x.doPcrWhole = f(x.pcr, "alpha_cr_"+name+" * N_"+name, "elastic buckling of the whole member")
	x.doLeWhole = f(x.le, "pi * sqrt(E * I_"+name+" / P_cr_"+name+")", "effective length that gives P_cr")
	x.doPcr = f(x.pcr, "pi^2 * E * I_"+name+" / L_cr_"+name+"^2", "Euler")
	x.doU = f(x.u, "factor_buckling * N_"+name+" / P_cr_"+name, "demand / capacity")
	x.doSlender = f(x.slender, "L_cr_"+name+" / i_"+name, "definition")
	x.doUSlender = f(x.uSlender, "slenderness_"+name+" / limit_slenderness_"+name, "demand / limit")
	x.doSecond = f(x.m2, "factor_yield * (M_"+name+" + (a_"+name+" - 1) * M_max_"+name+")", "amplification")
	x.doRatio = f(x.ratio, "factor_yield * N_"+name+" / P_cr_"+name, "definition")
	x.doBuckled = f(symUy, "n_"+name, "beyond the critical load no stress can be given")
	x.secant = f(x.a, "1 / cos(pi / 2 * sqrt(n_"+name+"))", "secant formula (equal end moments; an upper bound for others)")
	// For a line load over the height of a column on two pins the exact factor
	// grows to 32/pi3/(1 - n) = 1.0321/(1 - n), for a single point load to no more
	// than 0.82/(1 - n). 0.0325 covers both for every n.
	x.sway = f(x.a, "(1 + 0.0325 * n_"+name+") / (1 - n_"+name+")", "amplification of the moment of one load across the member")
	x.sine = f(x.a, "1 / (1 - n_"+name+")", "amplification of a sinusoidal moment, as the basis asks")
	x.tension = f(x.a, "1", "tension does not amplify moments")
	return x
}

// Name implements standard.Standard.
func (Standard) Name() string { return "elastic" }

// Annexes implements standard.Standard.
func (Standard) Annexes() []string { return nil }

// Methods implements standard.Standard: there is one alone.
func (Standard) Methods() []string { return nil }

// Overrides implements standard.Standard: the two factors of safety. They
// replace no published value, so they need no reason.
func (Standard) Overrides() map[string]bool {
	return map[string]bool{"factor_yield": false, "factor_buckling": false}
}

// Rules implements standard.Standard.
func (Standard) Rules() []string {
	return append([]string{"first-yield", "elastic-buckling-major", "elastic-buckling-minor", "torsional-buckling", "flexural-torsional-buckling",
		"section-shear-major", "section-shear-minor", "lateral-torsional-buckling", "slenderness"}, standard.CommonRules...)
}

// Symbols implements standard.Standard.
func (Standard) Symbols() *derivation.Set { return set }

// Alias implements standard.Standard.
func (Standard) Alias(word string) string {
	return map[string]string{"N_cr_major": "P_cr_major", "N_cr_minor": "P_cr_minor", "N_c": "P_y"}[word]
}

// Check implements standard.Standard.
func (Standard) Check(f *standard.Frame, record *derivation.Record) *standard.Outcome {
	c := &calc{f: f, s: derivation.NewSheet(set), record: record}
	c.out.Value = c.value
	c.given()
	for a := range axes {
		c.buckling(a)
		c.critical[a] = c.s.At(axes[a].pcr)
	}
	if c.f.Member.Leg.Stated() {
		c.cover("elastic-buckling-minor", standard.NotCovered, standard.ByLeg)
	}
	c.torsion()
	c.yield()
	c.shear()
	c.slenderness()
	c.out.Assumptions = c.assumptions()
	c.cover("local-buckling", standard.NotApplicable, "elastic theory of bars has no such check: where walls are thin, use a design standard")
	if c.f.Bends[0] {
		c.cover("lateral-torsional-buckling", standard.NotApplicable, "elastic theory of bars has no such check here: where the section is open and its flange not held, use a design standard")
	} else {
		c.cover("lateral-torsional-buckling", standard.NotApplicable, "the loads do not bend the member about its major axis")
	}
	common.Check(c.f, c.s, &c.out, func(rule string) { group(c.record, rule) }, c.s.Do)
	return &c.out
}

type calc struct {
	f      *standard.Frame
	s      *derivation.Sheet
	record *derivation.Record
	out    standard.Outcome
	pieces []action.Piece // kept for its room

	critical [2]float64 // critical load that decided the check of buckling, N; NaN for none
}

func (c *calc) value(symbol string) (unit.Quantity, bool) {
	id, ok := set.Find(symbol)
	if !ok {
		return unit.Quantity{}, false
	}
	v := c.s.At(id)
	for a, x := range axes {
		if c.f.Exact[a] && id == x.pcr {
			v = c.critical[a] // what amplifies moments may be less
		}
	}
	return unit.Quantity{Value: v, Dim: set.At(id).Dim}, !math.IsNaN(v)
}

func (c *calc) cover(rule string, state standard.State, why string) {
	c.out.Coverage = append(c.out.Coverage, standard.Coverage{Rule: rule, State: state, Why: why})
}

func (c *calc) assumptions() []string {
	out := c.f.Assumptions()
	for _, name := range []string{"factor_yield", "factor_buckling"} {
		if _, set := c.f.Env.Basis.Overrides[name]; !set {
			out = append(out, name+" = 1")
		}
	}
	if c.f.Member.Section.Shape.Kind == section.DoubleAngle {
		out = append(out, "the two angles act as one piece: that their connectors are close enough and do not give is for a person")
	}
	if c.f.Bends[0] || c.f.Bends[1] {
		if (!c.f.Bends[0] || c.f.Exact[0]) && (!c.f.Bends[1] || c.f.Exact[1]) {
			out = append(out, "moments of second order of the whole member on its ends, holds and springs")
		} else if c.f.Env.Basis.Simple {
			out = append(out, "moments amplified by 1/(1 - N/N_cr), as the basis asks; for equal end moments this is up to 22 % too low")
		} else {
			out = append(out, "moments amplified for the axial force: (1 + 0.0325 n)/(1 - n) for one load across the member or line loads over its height, the secant for all others")
		}
	}
	return out
}

// given takes the values that do not depend on the loads.
func (c *calc) given() {
	m, basis := c.f.Member, &c.f.Env.Basis
	c.s.Recording(c.record)
	group(c.record, "")
	fy, _, source, ok := m.Material.StrengthOf(m.Section, basis.TableFy)
	if !ok {
		fy = math.NaN()
	}
	c.s.Take(symE, standard.Known(m.Material.E), m.Material.Title())
	c.s.Take(symFy, standard.Known(fy), source)
	c.s.Take(symA, standard.Known(m.Section.Area), m.Section.Title())
	c.s.Take(axes[0].i, standard.Known(m.Section.IMajor), m.Section.Title())
	c.s.Take(axes[1].i, standard.Known(m.Section.IMinor), m.Section.Title())
	for _, o := range []struct {
		id   derivation.ID
		name string
	}{{symNy, "factor_yield"}, {symNb, "factor_buckling"}} {
		v, set := standard.Overridden(basis, o.name, 1)
		source := "assumed"
		if set {
			source = "basis"
		}
		c.s.Take(o.id, v, source)
	}
	c.s.Do(doPy)
}

func group(r *derivation.Record, rule string) {
	if r != nil {
		r.Group(rule)
	}
}

// buckling checks every stretch about one axis under every combination.
func (c *calc) buckling(a int) {
	x := &axes[a]
	rule := "elastic-buckling-" + x.name
	if !c.f.Stands[a] {
		c.out.Checks = append(c.out.Checks, standard.Check{Rule: rule, Clause: "Euler", Combination: -1, Dim: unit.Force, Utilisation: math.NaN(), Demand: math.NaN(), Capacity: math.NaN(),
			Why: c.f.NotHeld(a)})
		c.cover(rule, standard.NotCovered, c.f.NotHeld(a))
		return
	}
	worst, most, at, combination, compressed := math.Inf(-1), 0.0, 0, -1, false
	c.s.Recording(nil)
	for i, s := range c.f.Stretches[a] {
		if !c.f.Exact[a] {
			c.stretch(a, s, -1)
		}
		for k := range c.f.Combinations {
			n := c.f.Compression(k, s.From, s.To)
			if n <= 0 {
				continue
			}
			compressed = true
			if c.f.Exact[a] {
				c.stretch(a, s, k)
			}
			c.s.Take(x.n, n, "")
			u := c.s.Do(x.doU)
			more := u > worst
			if c.f.Exact[a] && math.Abs(u-worst) <= 1e-12*worst {
				more = n > most // all of the member buckles at once: rounding must not say which part is shown
			}
			if more || math.IsNaN(u) {
				worst, most, at, combination = u, n, i, k
				if math.IsNaN(u) {
					break
				}
			}
		}
	}
	c.s.Recording(c.record)
	group(c.record, rule)
	if !compressed {
		at = c.longest(a)
	}
	s := c.f.Stretches[a][at]
	c.stretch(a, s, combination)
	if !compressed {
		c.cover(rule, standard.NotApplicable, "no combination compresses the member")
		return
	}
	c.s.Take(x.n, c.f.Compression(combination, s.From, s.To), c.f.Combinations[combination].Name)
	u := c.s.Do(x.doU)
	check := standard.Check{Rule: rule, Clause: "Euler", Combination: combination, Demand: c.s.At(x.n), Capacity: c.s.At(x.pcr) / c.s.At(symNb), Dim: unit.Force, Utilisation: u,
		Verdict: standard.Utilisation(u, c.f.Limit())}
	if check.Verdict == standard.Undecided {
		check.Why = "a value that the check needs is missing"
	}
	c.out.Checks = append(c.out.Checks, check)
	c.cover(rule, standard.Checked, "")
}

// longest is the stretch with the greatest effective length.
func (c *calc) longest(a int) int {
	best := 0
	for i, s := range c.f.Stretches[a] {
		if s.Effective() > c.f.Stretches[a][best].Effective() {
			best = i
		}
	}
	return best
}

// weakest computes the least critical load about an axis.
func (c *calc) weakest(a int) {
	if c.f.Exact[a] {
		c.stretch(a, c.f.Whole(a), c.f.Weakest(a))
		return
	}
	c.stretch(a, c.f.Stretches[a][c.longest(a)], -1)
}

// stretch computes the critical load of a stretch: by its effective length, or
// where critical loads are those of the whole member, from the load factor of the
// combination.
func (c *calc) stretch(a int, s action.Stretch, k int) {
	x := &axes[a]
	whole := c.f.Exact[a] && s.Whole
	if n := 0.0; whole && k >= 0 {
		if n = c.f.Compression(k, s.From, s.To); !(n <= 0) {
			source := ""
			if c.s.Recorded() {
				source = c.f.Combinations[k].Name
			}
			c.s.Take(x.acr, standard.Known(c.f.Factor(a, k)), "eigenvalue of the stiffness matrix with holds, springs and stepped forces")
			c.s.Take(x.n, n, source)
			c.s.Do(x.doPcrWhole)
			c.s.Do(x.doLeWhole)
			return
		}
	}
	if whole {
		s.K = 1 // not compressed
	}
	source := ""
	if c.s.Recorded() {
		source = fmt.Sprintf("%s, %s–%s", c.f.StretchName(a, s), s.Base, s.Top)
	}
	c.s.Take(x.l, s.Length(), source)
	c.s.Take(x.k, s.K, source)
	c.s.Do(x.doLe)
	c.s.Do(x.doPcr)
}

// slenderness compares with the limit that the member sets itself.
func (c *calc) slenderness() {
	const rule = "slenderness"
	limit := c.f.Member.Limits.Slenderness
	if limit == 0 {
		c.cover(rule, standard.NotApplicable, "the member sets no limit")
		return
	}
	worst, axis := math.Inf(-1), -1
	c.s.Recording(nil)
	run := func(a int) float64 {
		x := &axes[a]
		c.weakest(a)
		c.s.Do(x.doR)
		c.s.Do(x.doSlender)
		c.s.Take(x.limit, limit, "limit of the member")
		return c.s.Do(x.doUSlender)
	}
	for a := range axes {
		if !c.f.Stands[a] {
			c.cover(rule, standard.NotCovered, c.f.NotHeld(a))
			return
		}
		if u := run(a); u > worst {
			worst, axis = u, a
		}
	}
	c.s.Recording(c.record)
	group(c.record, rule)
	if axis < 0 {
		axis = 0
	}
	u := run(axis)
	c.out.Checks = append(c.out.Checks, standard.Check{Rule: rule, Clause: "limit of the member", Combination: -1, Demand: c.s.At(axes[axis].slender), Capacity: limit, Dim: unit.None, Utilisation: u,
		Verdict: standard.Utilisation(u, 1)})
	c.cover(rule, standard.Checked, "")
}

var _ standard.Standard = Standard{}

func init() { set.Seal() }
