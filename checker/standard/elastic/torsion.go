package elastic

import (
	"math"

	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Torsional and flexural-torsional buckling of open sections, by the theory of
// thin-walled bars (Timoshenko and Gere, Theory of Elastic Stability, chapter
// 5): ends held against twist and free to warp.
var (
	symG   = set.Symbol("G", unit.Stress, "shear modulus")
	symIt  = set.Symbol("I_t", unit.Length4, "torsion constant")
	symIw  = set.Symbol("I_w", unit.Length6, "warping constant")
	symE0  = set.Symbol("y_0", unit.Length, "distance of the shear centre from the centroid")
	symI0  = set.Symbol("i_0", unit.Length, "polar radius of gyration about the shear centre")
	symLT  = set.Symbol("L_T", unit.Length, "length between points held against twist")
	symPT  = set.Symbol("P_cr_T", unit.Force, "critical load, torsional buckling")
	symB0  = set.Symbol("beta_0", unit.None, "1 - (y_0 / i_0)^2")
	symPTF = set.Symbol("P_cr_TF", unit.Force, "critical load, flexural-torsional buckling")
	symNT  = set.Symbol("N_T", unit.Force, "greatest compression")
	symUT  = set.Symbol("u_torsion", unit.None, "utilisation, torsional buckling")

	doI0     = set.Formula(symI0, "sqrt((I_major + I_minor) / A + y_0^2)", "definition")
	doPT     = set.Formula(symPT, "(G * I_t + pi^2 * E * I_w / L_T^2) / i_0^2", "torsional buckling, twist held at the ends, warping free")
	doPTFree = set.Formula(symPT, "G * I_t / i_0^2", "torsional buckling, an end free to twist, warping left out")
	doB0     = set.Formula(symB0, "1 - (y_0 / i_0)^2", "definition")
	doPTFMaj = set.Formula(symPTF, "(P_cr_major + P_cr_T - sqrt((P_cr_major + P_cr_T)^2 - 4 * beta_0 * P_cr_major * P_cr_T)) / (2 * beta_0)", "flexural-torsional buckling, one axis of symmetry")
	doPTFMin = set.Formula(symPTF, "(P_cr_minor + P_cr_T - sqrt((P_cr_minor + P_cr_T)^2 - 4 * beta_0 * P_cr_minor * P_cr_T)) / (2 * beta_0)", "flexural-torsional buckling, one axis of symmetry")
	doUT     = set.Formula(symUT, "factor_buckling * N_T / P_cr_T", "demand / capacity")
	doUTF    = set.Formula(symUT, "factor_buckling * N_T / P_cr_TF", "demand / capacity")
)

// torsion checks open sections; closed and round ones do not buckle in torsion.
func (c *calc) torsion() {
	const torsional, coupled = "torsional-buckling", "flexural-torsional-buckling"
	sec := c.f.Member.Section
	sh := sec.Shape
	rule, other := torsional, coupled
	switch sh.Kind {
	case section.Tube, section.Pipe, section.Rod:
		c.cover(torsional, standard.NotApplicable, "closed and round sections do not buckle in torsion")
		c.cover(coupled, standard.NotApplicable, "the shear centre is the centroid")
		return
	case section.Given:
		if math.IsNaN(sec.It) || math.IsNaN(sec.Iw) {
			c.cover(torsional, standard.NotApplicable, "the section states no I_t and I_w: it is taken as closed or stocky")
			c.cover(coupled, standard.NotApplicable, "the section is taken as doubly symmetric")
			return
		}
	case section.Channel, section.Tee, section.Angle, section.DoubleAngle:
		rule, other = coupled, torsional
	}
	c.cover(other, standard.NotApplicable, map[string]string{torsional: "torsion goes with bending: see " + coupled, coupled: "the shear centre is the centroid"}[other])
	worst, at := math.Inf(-1), 0
	for k := range c.f.Combinations {
		if n := c.f.Compression(k, 0, c.f.Member.Height); n > worst {
			worst, at = n, k
		}
	}
	if worst <= 0 {
		c.cover(rule, standard.NotApplicable, "no combination compresses the member")
		return
	}
	undecided := func(why string) {
		c.out.Checks = append(c.out.Checks, standard.Check{Rule: rule, Clause: "theory of thin-walled bars", Combination: -1, Dim: unit.Force, Utilisation: math.NaN(), Demand: math.NaN(), Capacity: math.NaN(), Why: why})
		c.cover(rule, standard.NotCovered, why)
	}
	if sh.Kind == section.Angle && math.Abs(sh.Depth-sh.Width) > 1e-9 {
		undecided("sections without an axis of symmetry are not covered: solve the cubic of flexural-torsional buckling by hand")
		return
	}
	for a := range c.f.Stands {
		if !c.f.Stands[a] {
			undecided(c.f.NotHeld(a))
			return
		}
	}
	c.s.Recording(c.record)
	group(c.record, rule)
	title := sec.Title()
	c.s.Take(symG, standard.Known(c.f.Member.Material.G), c.f.Member.Material.Title())
	it, iw, from := c.f.Twisting()
	c.s.Take(symIt, standard.KnownOrZero(it), from)
	c.s.Take(symIw, standard.KnownOrZero(iw), from)
	offset := 0.0
	if rule == coupled {
		offset = math.Hypot(sec.SMajor, sec.SMinor)
	}
	c.s.Take(symE0, offset, title)
	c.s.Do(doI0)
	if c.f.TwistFree {
		c.s.Do(doPTFree)
	} else {
		c.s.Take(symLT, c.f.Twist*c.f.TwistK, "between points held against twist")
		c.s.Do(doPT)
	}
	c.s.Take(symNT, worst, c.f.Combinations[at].Name)
	var u float64
	capacity := symPT
	if rule == coupled {
		a := 0
		if math.Abs(sec.SMinor) > math.Abs(sec.SMajor) {
			a = 1
		}
		c.weakest(a)
		c.s.Do(doB0)
		c.s.Do([]*formula{doPTFMaj, doPTFMin}[a])
		u, capacity = c.s.Do(doUTF), symPTF
	} else {
		u = c.s.Do(doUT)
	}
	check := standard.Check{Rule: rule, Clause: "theory of thin-walled bars", Combination: at, Demand: worst, Capacity: c.s.At(capacity) / c.s.At(symNb), Dim: unit.Force, Utilisation: u, Verdict: standard.Utilisation(u, c.f.Limit())}
	if check.Verdict == standard.Undecided {
		check.Why = "a value that the check needs is missing"
	}
	c.out.Checks = append(c.out.Checks, check)
	c.cover(rule, standard.Checked, "")
}
