package aisc360

import (
	"math"

	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Tension, chapter D.
var (
	symPnY  = sym("P_n_Y", unit.Force, "nominal tensile strength, yielding of the gross section")
	symPnR  = sym("P_n_R", unit.Force, "nominal tensile strength, rupture of the net section")
	symNet  = sym("net_ratio", unit.None, "area that holes leave over the gross area")
	symU    = sym("U", unit.None, "shear lag factor")
	symAn   = sym("A_n", unit.Area, "net area")
	symAet  = sym("A_e_t", unit.Area, "effective net area")
	symPrt  = sym("P_r_t", unit.Force, "required tensile strength")
	symUY   = sym("u_Y", unit.None, "utilisation, yielding in tension")
	symUR   = sym("u_R", unit.None, "utilisation, rupture in tension")
	symPct  = sym("P_c_t", unit.Force, "available tensile strength")
	yielded = newAvailable(symPnY, "P_c_Y", "phi_t", "Omega_t", "D2(a)")
	rupture = newAvailable(symPnR, "P_c_R", "phi_r", "Omega_r", "D2(b)")

	doPnY  = formula(symPnY, "F_y * A_g", "D2(a) (D2-1)")
	doAn   = formula(symAn, "net_ratio * A_g", "B4.3b")
	doAet  = formula(symAet, "A_n * U", "D3 (D3-1)")
	doPnR  = formula(symPnR, "F_u * A_e_t", "D2(b) (D2-2)")
	doUY   = formula(symUY, "P_r_t / P_c_Y", "B3")
	doUR   = formula(symUR, "P_r_t / P_c_R", "B3")
	doPct  = formula(symPct, "min(P_c_Y, P_c_R)", "D2")
	doPctY = formula(symPct, "P_c_Y", "D2")
)

// tension is chapter D.
func (c *calc) tension() {
	const rule, clause = "section-tension", "ANSI/AISC 360 D2(a)"
	if c.pulled < 0 {
		c.cover(rule, standard.NotApplicable, "no combination pulls the member")
		c.cover("net-section", standard.NotApplicable, "no combination pulls the member")
		return
	}
	c.group(rule)
	n := c.f.Tension(c.pulled)
	c.yielding()
	c.take(symPrt, n, c.combination(c.pulled))
	u := c.do(doUY)
	if c.s.At(symPnY) > 0 {
		c.add(rule, clause, c.pulled, n, c.s.At(yielded.c), unit.Force, u, c.f.Limit())
	} else {
		c.undecided(rule, clause, standard.NoStrength(c.f.Member))
	}
	c.netSection(n)
	if r := c.f.Member.Section; r.Shape.Kind != section.Rod && c.f.Member.Height/min(r.RMajor, r.RMinor) > 300 {
		c.assume("length over least radius of gyration = %s is above 300, which the user note of D1 prefers not to exceed", unit.Short(c.f.Member.Height/min(r.RMajor, r.RMinor), 3))
	}
}

func (c *calc) yielding() {
	c.factor(factorT)
	c.do(doPnY)
	c.available(yielded)
}

// netSection is D2(b), for the area that the basis says holes leave and its shear
// lag factor.
func (c *calc) netSection(n float64) {
	const rule, clause = "net-section", "ANSI/AISC 360 D2(b)"
	c.group(rule)
	if why := c.ruptureStrength(); why != "" {
		if _, stated := c.f.Env.Basis.Overrides["net_ratio"]; stated || !math.IsNaN(c.f.Member.Net) {
			c.undecided(rule, clause, why)
		} else {
			c.cover(rule, standard.NotCovered, why)
		}
		return
	}
	c.take(symPrt, n, c.combination(c.pulled))
	u := c.do(doUR)
	c.add(rule, clause, c.pulled, n, c.s.At(rupture.c), unit.Force, u, c.f.Limit())
}

// ruptureStrength computes P_c_R in the group that is open, or says why not.
func (c *calc) ruptureStrength() string {
	m, basis := c.f.Member, &c.f.Env.Basis
	ratio, stated := basis.Overrides["net_ratio"]
	lag, lagStated := basis.Overrides["U"]
	own := !math.IsNaN(m.Net)
	switch {
	case !stated && !own:
		return "there is tension: check rupture of the net section by hand (D2(b), D3), or state the net area, net = …, and U in the basis"
	case !lagStated:
		return "the shear lag factor is not stated: U = … because \"Table D3.1, case …\" (1.0 where each part of the section is connected)"
	case !own && !(ratio.Value <= 1):
		return "net_ratio is more than 1: holes leave no more than the whole area"
	case !(lag.Value <= 1):
		return "U is more than 1: the shear lag factor is at most 1 (Table D3.1)"
	}
	_, fu, source, ok := m.Material.StrengthOf(m.Section, basis.TableFy)
	if !ok || !(fu > 0) {
		return "the tensile strength of " + m.Material.Title() + " is not known"
	}
	c.factor(factorR)
	c.take(symFu, standard.Known(fu), source)
	if own {
		c.take(symAn, standard.Known(m.Net), "given, B4.3b")
	} else {
		c.take(symNet, ratio.Value, "basis, because \""+ratio.Because+"\"")
		c.do(doAn)
	}
	c.take(symU, lag.Value, "basis, because \""+lag.Because+"\"")
	c.do(doAet)
	c.do(doPnR)
	c.available(rupture)
	return ""
}

// tensionStrength computes P_c_t in the group that is open: the lower of yielding
// and, where it is known, rupture.
func (c *calc) tensionStrength() float64 {
	c.yielding()
	if c.ruptureStrength() == "" {
		return c.do(doPct)
	}
	return c.do(doPctY)
}
