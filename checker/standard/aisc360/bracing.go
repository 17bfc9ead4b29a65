package aisc360

import (
	"strings"

	"kern/checker/action"
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

// fewHolds is up to how many holds are listed one by one.
const fewHolds = 4

// bracing works out what appendix 6 asks of the holds. The calculation knows
// nothing of what holds the member: a person compares.
func (c *calc) bracing() {
	const rule = "bracing"
	held := [2]bool{}
	for a := range held {
		for _, s := range c.f.Stretches[a] { // one that ends at a hold
			held[a] = held[a] || c.f.Stands[a] && s.Length() < c.f.Member.Height*(1-1e-9)
		}
	}
	switch {
	case !held[0] && !held[1] && len(c.f.Member.Holds) > 0 && (c.whole(0) || c.whole(1)):
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
		if most, _ := c.worst(stretches[fullest].From, stretches[fullest].To); most <= 0 {
			continue
		}
		work := func(fullest, steepest action.Stretch) string {
			most, k := c.worst(fullest.From, fullest.To)
			c.take(b.pr, most, c.combination(k))
			c.do(b.doPbr)
			n, k := c.worst(steepest.From, steepest.To)
			c.take(b.prs, n, c.combination(k))
			c.take(b.lbr, steepest.Length(), c.f.StretchName(a, steepest))
			if c.asd {
				c.do(b.doBetaASD)
			} else {
				c.do(b.doBetaLRFD)
			}
			return "a strength of at least " + show.Show(c.s.At(b.pbr), unit.Force, 3) + " and a stiffness of at least " + show.Show(c.s.At(b.beta), unit.ForcePerLength, 3)
		}
		if n := len(stretches) - 1; n > 1 && n <= fewHolds {
			c.silently(func() {
				for i := range n {
					below, above := stretches[i], stretches[i+1]
					full, steep := above, above
					p, _ := c.worst(below.From, below.To)
					q, _ := c.worst(above.From, above.To)
					if p > q {
						full = below
					}
					if p/below.Length() > q/above.Length() {
						steep = below
					}
					c.assume("the hold %s at %s has %s (point bracing, App. 6.2.2)", flexures[a].word, c.f.Place(below.To), work(full, steep))
				}
			})
		}
		need := "each hold " + flexures[a].word + " has " + work(stretches[fullest], stretches[steepest])
		if n := len(stretches) - 1; n <= 1 || n > fewHolds {
			c.assume("%s (point bracing, App. 6.2.2)", need)
		}
		needs = append(needs, need)
	}
	why := "worked out, to be compared with what holds the member: " + strings.Join(needs, "; ")
	if c.f.Bends[0] {
		why += "; what flexure asks of them (App. 6.3, 6.4) is to be added by hand"
	}
	c.cover(rule, standard.Checked, why)
}

// whole tells whether a column beyond a hold is worked out as one.
func (c *calc) whole(a int) bool { return len(c.f.Stretches[a]) == 1 && c.f.Stretches[a][0].Exact }
