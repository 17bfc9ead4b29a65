package aisc360

import (
	"fmt"
	"math"
	"strings"

	"kern/checker/derivation"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// element is a plate of a cross-section that can buckle in compression, with its
// effective width by E7.1.
type element struct {
	name                       string
	width, lambda, limit, bent derivation.ID
	doWidth, doLambda          *derivation.Formula
	doLimit                    *derivation.Formula // Table B4.1a
	doBound, doElastic         *derivation.Formula
	doFull, doReduced          *derivation.Formula
	effective, bound, elastic  derivation.ID
}

// part declares the letters of a plate: its width (with the formula of it, "" for
// a dimension that is taken), thickness and imperfection factors c1 and c2 of
// Table E7.1. The limits of Table B4.1a are added for each shape.
type part struct {
	id, name, width, effective, t string
	c1, c2                        string
}

// letters are the symbols of a plate, which several shapes share.
type letters struct {
	part
	b, be, lambda, limit, bound, elastic derivation.ID
	doLambda, doBound, doElastic         *derivation.Formula
	doFull, doReduced                    *derivation.Formula
}

func newLetters(b derivation.ID, p part) *letters {
	l := &letters{part: p, b: b}
	l.be = sym(p.effective, unit.Length, "effective width of the "+p.name)
	l.lambda = sym("lambda_c_"+p.id, unit.None, "width-to-thickness ratio of the "+p.name)
	l.limit = sym("lambda_r_"+p.id, unit.None, "limit of the ratio in compression, "+p.name)
	l.bound = sym("lambda_e_"+p.id, unit.None, "ratio up to which the whole width counts, "+p.name)
	l.elastic = sym("F_el_"+p.id, unit.Stress, "elastic local buckling stress of the "+p.name)
	l.doLambda = formula(l.lambda, p.width+" / "+p.t, "B4.1")
	l.doBound = formula(l.bound, "lambda_r_"+p.id+" * sqrt(F_y / F_n)", "E7.1")
	l.doElastic = formula(l.elastic, "("+p.c2+" * lambda_r_"+p.id+" / lambda_c_"+p.id+")^2 * F_y", "E7.1 (E7-5), Table E7.1")
	l.doFull = formula(l.be, p.width, "E7.1(a) (E7-2)")
	l.doReduced = formula(l.be, fmt.Sprintf("min(%s, %[1]s * (1 - %s * sqrt(F_el_%s / F_n)) * sqrt(F_el_%[3]s / F_n))", p.width, p.c1, p.id), "E7.1(b) (E7-3), Table E7.1")
	return l
}

// of makes the plate of a shape: the text of its width and of its limit by a case
// of Table B4.1a.
func (l *letters) of(width, clause, limit, tableCase string) *element {
	return l.with(formula(l.b, width, clause), limit, tableCase)
}

// with is of for a width that has a formula already, or nil for one that is taken.
func (l *letters) with(width *derivation.Formula, limit, tableCase string) *element {
	e := &element{doWidth: width, name: l.name, width: l.b, lambda: l.lambda, limit: l.limit, effective: l.be, bound: l.bound, elastic: l.elastic,
		doLambda: l.doLambda, doBound: l.doBound, doElastic: l.doElastic, doFull: l.doFull, doReduced: l.doReduced}
	e.doLimit = formula(l.limit, limit, "Table B4.1a case "+tableCase)
	return e
}

// The stress at which a plate is looked at, and what is effective of the section.
var (
	symFn = sym("F_n", unit.Stress, "nominal stress")
	symAe = sym("A_e", unit.Area, "effective area at the nominal stress")

	symOut  = sym("b_out", unit.Length, "width of the flange that stands out")
	symUp   = sym("h_up", unit.Length, "flat width of the upright wall")
	symLie  = sym("b_lie", unit.Length, "flat width of the lying wall")
	symUpB  = sym("h_plate", unit.Length, "clear width of the upright plate")
	symLieB = sym("b_plate", unit.Length, "clear width of the lying plate")

	flange = newLetters(symOut, part{"f", "flange", "b_out", "b_e", "t_f", "0.22", "1.49"})
	web    = newLetters(symH, part{"w", "web", "h", "h_e", "t_w", "0.18", "1.31"})
	stem   = newLetters(symD, part{"s", "stem", "d", "d_e", "t_w", "0.22", "1.49"})
	leg1   = newLetters(symLeg1, part{"1", "upright leg", "b_1", "b_1_e", "t", "0.22", "1.49"})
	leg2   = newLetters(symLeg2, part{"2", "lying leg", "b_2", "b_2_e", "t", "0.22", "1.49"})
	wallH  = newLetters(symUp, part{"h", "upright wall", "h_up", "h_up_e", "t", "0.20", "1.38"})
	wallB  = newLetters(symLie, part{"b", "lying wall", "b_lie", "b_lie_e", "t", "0.20", "1.38"})
	plateH = newLetters(symUpB, part{"hp", "upright plate", "h_plate", "h_plate_e", "t", "0.18", "1.31"})
	plateB = newLetters(symLieB, part{"bp", "lying plate", "b_plate", "b_plate_e", "t", "0.18", "1.31"})
)

// shape is how a kind of section is divided into plates.
type shape struct {
	elements []*element
	doArea   *derivation.Formula // effective area from the effective widths
}

const (
	legLimit = "0.45 * sqrt(E / F_y)"
	outstand = "0.56 * sqrt(E / F_y)"
	webLimit = "1.49 * sqrt(E / F_y)"
	hssLimit = "1.40 * sqrt(E / F_y)"
	ofParts  = "E7, A_g less what the plates lose"
)

var (
	webOfI      = web.with(doHI, webLimit, "5")
	shapeRolled = shape{[]*element{webOfI, flange.of("b_f / 2", "B4.1a(a)", outstand, "1")}, doAreaI}
	shapeBuilt  = shape{[]*element{webOfI, flange.of("b_f / 2", "B4.1a(a)", "0.64 * sqrt(k_c * E / F_y)", "2")}, doAreaI}
	doAreaI     = formula(symAe, "A_g - 4 * (b_out - b_e) * t_f - (h - h_e) * t_w", ofParts)

	shapeChannel = shape{[]*element{webOfI, flange.of("b_f", "B4.1a(b)", outstand, "1")},
		formula(symAe, "A_g - 2 * (b_out - b_e) * t_f - (h - h_e) * t_w", ofParts)}
	shapeTee = shape{[]*element{stem.with(nil, "0.75 * sqrt(E / F_y)", "4"), flange.of("b_f / 2", "B4.1a(a)", outstand, "1")},
		formula(symAe, "A_g - 2 * (b_out - b_e) * t_f - (d - d_e) * t_w", ofParts)}
	shapeAngle = shape{[]*element{leg1.with(nil, legLimit, "3"), leg2.with(nil, legLimit, "3")},
		formula(symAe, "A_g - (b_1 - b_1_e) * t - (b_2 - b_2_e) * t", ofParts)}
	// A corner radius counts as far as half the wall, as where it is not known.
	shapeTube = shape{[]*element{
		wallH.of("d - 2 * t - 2 * min(r_in, 0.5 * t)", "B4.1b(d)", hssLimit, "6"),
		wallB.of("B - 2 * t - 2 * min(r_in, 0.5 * t)", "B4.1b(d)", hssLimit, "6")},
		formula(symAe, "A_g - 2 * (h_up - h_up_e) * t - 2 * (b_lie - b_lie_e) * t", ofParts)}
	shapeBox = shape{[]*element{plateH.of("d - 2 * t", "B4.1b(e)", webLimit, "8"), plateB.of("B - 2 * t", "B4.1b(e)", webLimit, "8")},
		formula(symAe, "A_g - 2 * (h_plate - h_plate_e) * t - 2 * (b_plate - b_plate_e) * t", ofParts)}

	symDt    = sym("lambda_c_D", unit.None, "ratio D/t of the round tube")
	symDtR   = sym("lambda_r_D", unit.None, "limit of the ratio in compression")
	symDtMax = sym("lambda_max_D", unit.None, "greatest ratio in the scope of E7.2")
	doDt     = formula(symDt, "D / t", "B4.1b(g)")
	doDtR    = formula(symDtR, "0.11 * E / F_y", "Table B4.1a case 9")
	doDtMax  = formula(symDtMax, "0.45 * E / F_y", "E7.2")
	doAeD    = formula(symAe, "min(1, 0.038 * E / (F_y * lambda_c_D) + 2 / 3) * A_g", "E7.2(b) (E7-7), no more than A_g, which it passes by 1 % at its lower end")
)

// local compares the plates with Table B4.1a.
func (c *calc) local() {
	const rule = "local-buckling"
	m := c.f.Member
	sh, title := m.Section.Shape, m.Section.Title()
	whole := func(why string) { c.cover(rule, standard.Checked, why) }
	refuse := func(why string) {
		if c.why == "" {
			c.why = why
		}
		c.cover(rule, standard.NotCovered, c.why)
	}
	c.group("")
	c.designWall()
	switch sh.Kind {
	case section.Bar, section.Rod:
		whole("a solid section has no plates that could buckle")
		return
	case section.Pipe:
		c.take(symDia, sh.Diameter, title)
		c.take(symT, sh.Wall, title)
		dt, limit, most := c.do(doDt), c.do(doDtR), c.do(doDtMax)
		switch {
		case c.why != "":
			refuse(c.why)
		case dt <= limit:
			whole("no slender elements: the whole section counts (Table B4.1a)")
		case dt < most:
			c.slender = true
			whole("D/t above lambda_r: the effective area counts (E7.2)")
		default:
			refuse("D/t is not below 0.45 E/F_y, the end of the scope of E7.2: find the strength of the shell by hand")
		}
		return
	case section.ISection:
		c.shape = &shapeRolled
		if sh.Made == section.Welded {
			c.shape = &shapeBuilt
		}
	case section.Channel:
		c.shape = &shapeChannel
	case section.Tee:
		c.shape = &shapeTee
	case section.Angle, section.DoubleAngle:
		c.shape = &shapeAngle
		if sh.Kind == section.DoubleAngle {
			c.shape = &shapePair
			if sh.Gap == 0 {
				c.shape = &shapePairClose
			}
		}
		c.take(symLeg1, sh.Depth, title)
		c.take(symLeg2, sh.Width, title)
		c.take(symT, sh.Wall, title)
	case section.Tube:
		c.shape = &shapeTube
		if sh.Made == section.Welded {
			c.shape = &shapeBox
		}
		c.take(symD, max(sh.Depth, sh.Width), title) // the longer side is upright, whichever way it was written
		c.take(symB, min(sh.Depth, sh.Width), title)
		c.take(symT, sh.Wall, title)
		c.take(symRin, sh.InnerRadius, title)
	case section.Given:
		switch m.Section.Class {
		case 1, 2, 3:
			c.assume("stated class %d of '%s' read as: no slender elements in compression (Table B4.1a)", m.Section.Class, m.Section.Name)
			if c.why != "" {
				refuse(c.why)
				return
			}
			whole("stated with the section: no slender elements")
		case 4:
			refuse("the section is stated as class 4, whose effective area cannot be found without its plates")
		default:
			refuse("whether a section whose plates are not known has slender elements must be stated: class = 1, 2 or 3 for none")
		}
		return
	default:
		refuse("a section of this kind is outside of Table B4.1a: find its strength by hand")
		return
	}
	switch sh.Kind {
	case section.ISection, section.Channel, section.Tee:
		c.take(symD, sh.Depth, title)
		c.take(symBf, sh.Width, title)
		c.take(symTw, sh.Web, title)
		c.take(symTf, sh.Flange, title)
		c.take(symRoot, sh.Root, title)
	}
	worst := ""
	for _, e := range c.shape.elements {
		if e.doWidth != nil {
			c.do(e.doWidth)
		}
		ratio := c.do(e.doLambda)
		if c.shape == &shapeBuilt && e != webOfI {
			c.do(doKc)
		}
		limit := c.do(e.doLimit)
		if !(ratio <= limit) {
			c.slender, worst = true, e.name
		}
	}
	switch {
	case c.why != "":
		refuse(c.why)
	case c.slender:
		whole("slender elements (" + worst + "): the effective area counts (E7)")
	default:
		whole("no slender elements: the whole section counts (Table B4.1a)")
	}
}

// designWall says what the wall of a tube is taken for (B4.2). American catalogue
// tubes have their design wall.
func (c *calc) designWall() {
	sec := c.f.Member.Section
	switch sec.Shape.Kind {
	case section.Tube, section.Pipe:
	default:
		return
	}
	switch {
	case sec.Shape.Made == section.Welded:
	case strings.HasPrefix(sec.Standard, "EN "):
		c.assume("the wall of %s counts with its nominal thickness; B4.2 takes 0.93 of it for tubes to other standards than ASTM A1065 and A1085", sec.Title())
	case sec.Standard == "":
		c.assume("the wall of '%s' is its design wall thickness (B4.2)", sec.Title())
	}
}

// effectiveArea computes A_e at the nominal stress that stands under F_n.
func (c *calc) effectiveArea() {
	if c.shape == nil {
		c.do(doAeD)
		return
	}
	fn := c.s.At(symFn)
	for _, e := range c.shape.elements {
		bound := c.do(e.doBound)
		if c.s.At(e.lambda) <= bound {
			c.do(e.doFull)
		} else {
			c.do(e.doElastic)
			c.do(e.doReduced)
		}
	}
	c.do(c.shape.doArea)
	if math.IsNaN(fn) {
		c.take(symAe, math.NaN(), "")
	}
}
