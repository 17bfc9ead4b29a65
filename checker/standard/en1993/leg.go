package en1993

import (
	"fmt"
	"math"

	"kern/checker/action"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Angles as web members that are connected by one leg, BB.1.2: effective
// slendernesses allow for the eccentricity and for the fixity of the ends. The
// texts of the clause are from memory. About v–v the symbols are those of the minor
// axis; about the axes along the legs those of "leg", for the axis with the smaller
// radius of gyration, which governs as L is the same about both.
var (
	symLegL     = sym("L_leg", unit.Length, "length between the joints of the web member")
	symLegI     = sym("I_leg", unit.Length4, "second moment of area about the weaker of the axes along the legs")
	symLegNcr   = sym("N_cr_leg", unit.Force, "elastic critical force about the axis along a leg")
	symLegLam   = sym("lambda_leg", unit.None, "non-dimensional slenderness about the axis along a leg")
	symLegEff   = sym("lambda_eff_leg", unit.None, "effective slenderness about the axis along a leg")
	symLegAlpha = sym("alpha_leg", unit.None, "imperfection factor, axis along a leg")
	symLegPhi   = sym("phi_leg", unit.None, "value to determine the reduction factor, axis along a leg")
	symLegChi   = sym("chi_leg", unit.None, "reduction factor for buckling about the axis along a leg")
	symLegNb    = sym("N_b_leg_Rd", unit.Force, "design buckling resistance about the axis along a leg")
	symLegN     = sym("N_Ed_leg", unit.Force, "design compression of the web member")
	symLegU     = sym("u_b_leg", unit.None, "utilisation, flexural buckling about the axis along a leg")
	symEffZ     = sym("lambda_eff_z", unit.None, "effective slenderness about v–v")

	doLegNcr = formula(symLegNcr, "pi^2 * E * I_leg / L_leg^2", "6.3.1.2(1)")
	doLegLam = formula(symLegLam, "sqrt(A * f_y / N_cr_leg)", "6.3.1.3(1) (6.50)")
	doLegEff = formula(symLegEff, "0.5 + 0.7 * lambda_leg", "BB.1.2(1) (BB.1) (from memory)")
	doLegPhi = formula(symLegPhi, "0.5 * (1 + alpha_leg * (lambda_eff_leg - 0.2) + lambda_eff_leg^2)", "6.3.1.2(1)")
	doLegChi = formula(symLegChi, "min(1, 1 / (phi_leg + sqrt(phi_leg^2 - lambda_eff_leg^2)))", "6.3.1.2(1) (6.49)")
	doLegNb  = formula(symLegNb, "chi_leg * A * f_y / gamma_M1", "6.3.1.1(3) (6.47)")
	doLegU   = formula(symLegU, "N_Ed_leg / N_b_leg_Rd", "6.3.1.1(1) (6.46)")
	doEffZ   = formula(symEffZ, "0.35 + 0.7 * lambda_z", "BB.1.2(1) (BB.1) (from memory)")
	doPhiEff = formula(axes[1].phi, "0.5 * (1 + alpha_z * (lambda_eff_z - 0.2) + lambda_eff_z^2)", "6.3.1.2(1)")
	doChiEff = formula(axes[1].chi, "min(1, 1 / (phi_z + sqrt(phi_z^2 - lambda_eff_z^2)))", "6.3.1.2(1) (6.49)")
)

// byLeg is flexural buckling of an angle that is connected by one leg; false when
// the member is none.
func (c *calc) byLeg() bool {
	m := c.f.Member
	if !m.Leg.Stated() {
		return false
	}
	const legs, minor, clause = "flexural-buckling-major", "flexural-buckling-minor", "EN 1993-1-1 BB.1.2"
	if !c.pressed {
		for _, rule := range []string{legs, minor} {
			c.cover(rule, standard.NotApplicable, "no combination compresses the member")
		}
		return true
	}
	if why := c.legRefused(); why != "" {
		for _, rule := range []string{legs, minor} {
			c.group(rule)
			c.undecided(rule, clause, why)
		}
		return true
	}
	c.assume("web member of a truss whose chords hold its ends; connected by one leg at both ends, by welds or at least two bolts (BB.1.2(1))")
	title, curve := m.Section.Title(), c.minor
	n, k := c.worst(0, m.Height)
	alpha, from := alphas[curve.letter], "curve "+curve.letter+", Table 6.1 and 6.2: "+curve.row
	under := c.f.Combinations[k].Name

	c.group(legs)
	c.take(symLegL, m.Height, "the whole length")
	c.take(symLegI, min(m.Section.IX, m.Section.IY), title)
	c.do(doLegNcr)
	c.do(doLegLam)
	c.do(doLegEff)
	c.take(symLegAlpha, alpha, from)
	c.do(doLegPhi)
	c.do(doLegChi)
	c.do(doLegNb)
	c.take(symLegN, n, under)
	u := c.do(doLegU)
	c.add(legs, clause, k, n, c.s.At(symLegNb), unit.Force, u, c.f.Limit())

	c.group(minor)
	x := axes[1]
	c.take(x.l, m.Height, "the whole length")
	c.take(x.k, 1, "the fixity of the ends is in lambda_eff")
	c.do(x.doLcr)
	c.do(x.doNcr)
	c.do(x.doLam)
	c.do(doEffZ)
	c.take(x.alpha, alpha, from)
	c.do(doPhiEff)
	c.do(doChiEff)
	c.do(x.doNb)
	c.take(x.n, n, under)
	u = c.do(x.doU)
	c.add(minor, clause, k, n, c.s.At(x.nb), unit.Force, u, c.f.Limit())
	return true
}

// legRefused says why BB.1.2 is not used for the member, "" when it is.
func (c *calc) legRefused() string {
	m := c.f.Member
	switch {
	case c.ed.own != nil:
		return standard.ByLeg + " (the clause of " + c.ed.name + " is not held)"
	case c.class == 0:
		return c.why
	case c.minor.letter == "":
		return c.minor.row
	case m.Leg.Space:
		return standard.ByLeg + ": BB.1.2 is for trusses; of lattice towers see EN 1993-3-1 Annex G"
	case c.f.Bends[0] || c.f.Bends[1]:
		return "there is bending beside the eccentricity of the leg: count both by 6.3.3, by hand"
	case m.Imported != nil:
		return "its forces come from a table: whether they come in at the ends is not known, " + standard.ByLeg
	case len(m.Holds) > 0:
		return "the member is held between its ends, where BB.1.2 counts the length between the joints: write a member for each length, or " + standard.ByLeg
	}
	for a, name := range []string{"major", "minor"} {
		if m.Factor[a] > 0 || m.Joints[a] != nil || m.Base[a] != action.Pinned || m.Top[a] != action.Pinned || !c.f.Stands[a] {
			return fmt.Sprintf("BB.1.2 counts the fixity of the ends itself: leave the ends pinned about %s, without an effective length factor or joints", name)
		}
	}
	for _, l := range m.Loads {
		if l.At > 1e-6*m.Height && l.At < m.Height*(1-1e-6) {
			return "there are loads between the ends: " + standard.ByLeg
		}
	}
	if math.IsNaN(m.Section.IX) || math.IsNaN(m.Section.IY) {
		return "the second moments of area about the axes along the legs are not known"
	}
	return ""
}
