package aisc360

import (
	"strings"

	"kern/checker/derivation"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Point bracing of columns, appendix 6.2.2.
var (
	factorBr = newFactor("br", 0.75, 2.00, "stiffness of bracing", "App. 6.2.2")
	braces   = [2]*brace{newBrace("x"), newBrace("y")}
)

// brace holds what the holds against buckling about one axis need.
type brace struct {
	pr, prs, lbr, pbr, beta      derivation.ID
	doPbr, doBetaLRFD, doBetaASD *derivation.Formula
}

func newBrace(letter string) *brace {
	about := ", buckling about " + letter + "–" + letter
	b := &brace{}
	b.pr = sym("P_r_br_"+letter, unit.Force, "greatest required axial strength beside a hold"+about)
	b.prs = sym("P_r_s_"+letter, unit.Force, "required axial strength of the stretch with the greatest P_r/L_br"+about)
	b.lbr = sym("L_br_"+letter, unit.Length, "its length"+about)
	b.pbr = sym("P_br_"+letter, unit.Force, "required strength of the holds"+about)
	b.beta = sym("beta_br_"+letter, unit.ForcePerLength, "required stiffness of the holds"+about)
	f := func(id derivation.ID, text, clause string) *derivation.Formula {
		return formula(id, replaceAxis(text, letter), clause)
	}
	b.doPbr = f(b.pbr, "0.01 * P_r_br_?", "App. 6.2.2 (A-6-3)")
	b.doBetaLRFD = f(b.beta, "8 * P_r_s_? / L_br_? / phi_br", "App. 6.2.2 (A-6-4a)")
	b.doBetaASD = f(b.beta, "Omega_br * 8 * P_r_s_? / L_br_?", "App. 6.2.2 (A-6-4b)")
	return b
}

// bracing works out what appendix 6 asks of the holds. The calculation knows
// nothing of what holds the member: a person compares.
func (c *calc) bracing() {
	const rule = "bracing"
	held, whole := [2]bool{}, false
	for a := range held {
		whole = whole || len(c.f.Stretches[a]) > 0 && c.f.Stretches[a][0].Exact // none of a mechanism
		for _, s := range c.f.Stretches[a] {                                    // one that ends at a hold
			held[a] = held[a] || c.f.Stands[a] && s.Length() < c.f.Member.Height*(1-1e-9)
		}
	}
	switch {
	case !held[0] && !held[1] && len(c.f.Member.Holds) > 0 && whole:
		c.cover(rule, standard.NotApplicable, "beside a free end the column is worked out as a whole: what its holds need is to be found by analysis (App. 6.1)")
		return
	case !held[0] && !held[1]:
		c.cover(rule, standard.NotApplicable, "there are no holds between the ends")
		return
	case !c.pressed:
		c.cover(rule, standard.NotApplicable, notPressed)
		return
	}
	c.group(rule)
	c.factor(factorBr)
	show := c.f.Env.Basis.Show
	var needs []string
	for a, b := range braces {
		if !held[a] {
			continue
		}
		stretches := c.f.Stretches[a]
		steepest, fullest := 0, 0
		for i, s := range stretches {
			n, _ := c.worst(s.From, s.To)
			m, _ := c.worst(stretches[steepest].From, stretches[steepest].To)
			if n/s.Length() > m/stretches[steepest].Length() {
				steepest = i
			}
			if m, _ := c.worst(stretches[fullest].From, stretches[fullest].To); n > m {
				fullest = i
			}
		}
		most, k := c.worst(stretches[fullest].From, stretches[fullest].To)
		if most <= 0 {
			continue
		}
		c.take(b.pr, most, c.combination(k))
		c.do(b.doPbr)
		n, k := c.worst(stretches[steepest].From, stretches[steepest].To)
		c.take(b.prs, n, c.combination(k))
		c.take(b.lbr, stretches[steepest].Length(), c.f.StretchName(a, stretches[steepest]))
		if c.asd {
			c.do(b.doBetaASD)
		} else {
			c.do(b.doBetaLRFD)
		}
		need := "each hold " + flexures[a].word + " has a strength of at least " + show.Show(c.s.At(b.pbr), unit.Force, 3) +
			" and a stiffness of at least " + show.Show(c.s.At(b.beta), unit.ForcePerLength, 3)
		needs = append(needs, need)
		c.assume("%s (point bracing, App. 6.2.2)", need)
	}
	why := "worked out, to be compared with what holds the member: " + strings.Join(needs, "; ")
	if c.f.Bends[0] {
		why += "; what flexure asks of them (App. 6.3, 6.4) is to be added by hand"
	}
	c.cover(rule, standard.Checked, why)
}
