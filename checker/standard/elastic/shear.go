package elastic

import (
	"math"

	"kern/checker/derivation"
	"kern/checker/standard"
	"kern/lang/unit"
)

type formula = derivation.Formula

// Shear: the mean stress over the shear area against the yield strength in
// shear, f_y / sqrt(3) (von Mises). While it stays below half of that, its part
// in first yield of the extreme fibre is left out, as is common practice; above,
// a person must combine the stresses.
var (
	symTauY = set.Symbol("tau_y", unit.Stress, "yield strength in shear")
	doTauY  = set.Formula(symTauY, "f_y / sqrt(3)", "von Mises")
	shears  = [2]shear{newShear("major"), newShear("minor")}
)

type shear struct {
	v, av, tau, u derivation.ID
	doTau, doU    *formula
}

func newShear(name string) shear {
	x := shear{
		v:   set.Symbol("V_"+name, unit.Force, "shear force that goes with bending about the "+name+" axis"),
		av:  set.Symbol("A_v_"+name, unit.Area, "shear area, "+name+" axis"),
		tau: set.Symbol("tau_"+name, unit.Stress, "shear stress under the loads times the factor of safety, "+name+" axis"),
		u:   set.Symbol("u_shear_"+name, unit.None, "utilisation, shear, "+name+" axis"),
	}
	x.doTau = set.Formula(x.tau, "factor_yield * V_"+name+" / A_v_"+name, "stress = force / area")
	x.doU = set.Formula(x.u, "tau_"+name+" / tau_y", "demand / capacity")
	return x
}

func (c *calc) shear() {
	for a, x := range shears {
		rule := "section-shear-" + axes[a].name
		if !c.f.Bends[a] {
			c.cover(rule, standard.NotApplicable, "the loads do not bend the member about this axis")
			continue
		}
		area := []float64{c.f.Member.Section.AvMajor, c.f.Member.Section.AvMinor}[a]
		worst, at := math.Inf(-1), 0
		var pieces = c.pieces
		for k := range c.f.Combinations {
			var ok bool
			if pieces, ok = c.f.Bending(a, c.f.Combinations[k].Factors, pieces); !ok {
				worst = math.NaN()
				break
			}
			for _, p := range pieces {
				p, ok := c.f.Cut(p)
				if !ok {
					continue
				}
				if v := p.GreatestShear(); v > worst {
					worst, at = v, k
				}
			}
		}
		c.pieces = pieces
		if math.IsNaN(worst) || !(area > 0) || math.IsNaN(c.s.At(symFy)) {
			c.cover(rule, standard.NotCovered, "the shear area of the section or the shear force is not known: check shear by hand")
			continue
		}
		c.s.Recording(c.record)
		group(c.record, rule)
		c.s.Do(doTauY)
		c.s.Take(x.v, worst, c.f.Combinations[at].Name)
		c.s.Take(x.av, area, c.f.Member.Section.Title())
		c.s.Do(x.doTau)
		u := c.s.Do(x.doU)
		check := standard.Check{Rule: rule, Clause: "yield in shear", Combination: at, Demand: c.s.At(x.tau), Capacity: c.s.At(symTauY), Dim: unit.Stress, Utilisation: u, Verdict: standard.Utilisation(u, c.f.Limit())}
		c.out.Checks = append(c.out.Checks, check)
		switch {
		case check.Verdict == standard.Passes && u > 0.5:
			c.cover(rule, standard.NotCovered, "the shear stress is more than half of yield: combine it with the stress along the member by hand")
		default:
			c.cover(rule, standard.Checked, "the mean stress over the shear area")
		}
	}
}
