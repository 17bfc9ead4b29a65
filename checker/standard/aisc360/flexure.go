package aisc360

import (
	"fmt"
	"math"

	"kern/checker/action"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang/unit"
)

// bendingRules and bendingOverrides are what the checks of bending, shear and
// interaction add to the standard's lists.
var (
	bendingRules = []string{"section-bending-major", "section-bending-minor", "section-shear-major", "section-shear-minor",
		"section-interaction", "lateral-torsional-buckling", "member-interaction", "torsion", "bracing"}
	bendingOverrides = []string{"C_b", "C_m", "B_2"}
)

// bendState is what the member is in bending.
type bendState struct {
	combs  []comb
	tiny   [2]float64 // a moment that counts as none, Nm
	why    [2]string  // why the flexural strength about an axis is not known, "" when it is
	lat    lateralState
	twists bool // E4 asks for buckling in torsion
}

// comb is what a combination does to the member.
type comb struct {
	pieces [2][]action.Piece // moments about x–x and y–y
	bends  [2]bool           // more than next to nothing
	peak   [2]float64        // greatest moments in the lift, Nm
	shear  [2]float64        // greatest shear forces in the lift, N
}

var bendingClauses = map[string]struct {
	clause string
	axes   []int
	dim    unit.Dim
}{
	"section-bending-major":      {"ANSI/AISC 360 F2 to F13", []int{0}, unit.Moment},
	"section-bending-minor":      {"ANSI/AISC 360 F6 to F13", []int{1}, unit.Moment},
	"section-shear-major":        {"ANSI/AISC 360 G2 to G6", []int{0}, unit.Force},
	"section-shear-minor":        {"ANSI/AISC 360 G2 to G6", []int{1}, unit.Force},
	"lateral-torsional-buckling": {"ANSI/AISC 360 F2 to F11", []int{0, 1}, unit.Moment},
	"member-interaction":         {"ANSI/AISC 360 H1", []int{0, 1}, unit.None},
}

// bending checks flexure, shear and combined forces (chapters F, G and H).
func (c *calc) bending() {
	const none = "the loads do not bend the member"
	c.cover("section-interaction", standard.NotApplicable, "the standard checks the member as a whole (H1, H2): member-interaction")
	if !c.f.Bends[0] && !c.f.Bends[1] {
		for _, rule := range bendingRules {
			if _, ok := bendingClauses[rule]; ok {
				c.cover(rule, standard.NotApplicable, none)
			}
		}
		c.cover("torsion", standard.NotApplicable, none)
		return
	}
	why := c.why
	for a := range flexures {
		if _, ok := c.f.Bending(a, nil, nil); !ok || c.f.Bends[a] && !c.f.Stands[a] {
			why = c.f.NotHeld(a)
		}
	}
	if why != "" {
		for _, rule := range bendingRules {
			r, ok := bendingClauses[rule]
			switch {
			case !ok:
			case c.bendsOne(r.axes):
				c.undecidedIn(rule, r.clause, r.dim, why)
			default:
				c.cover(rule, standard.NotApplicable, "the loads do not bend the member about this axis")
			}
		}
		c.torsion()
		return
	}
	c.group("")
	c.factor(factorB)
	c.moduli()
	c.combine()
	for a := range flexures {
		if c.f.Bends[a] {
			c.bend.why[a] = c.sectionStrength(a)
		}
	}
	c.bend.lat = c.lateralOf()
	c.shears()
	for a := range flexures {
		c.flexural2(a)
	}
	c.lateralTorsional()
	c.interaction()
	c.torsion()
}

func (c *calc) bendsOne(axes []int) bool {
	for _, a := range axes {
		if c.f.Bends[a] {
			return true
		}
	}
	return false
}

// undecidedIn is undecided for a check of another dimension.
func (c *calc) undecidedIn(rule, clause string, dim unit.Dim, why string) {
	c.out.Undecided(rule, clause, dim, why)
}

// torsion is H3: the language has no load that twists the member.
func (c *calc) torsion() {
	c.out.Untwisted(c.f.Member.Section.Shape.Kind, "H3")
}

// moduli takes the properties that bending asks for.
func (c *calc) moduli() {
	sec := c.f.Member.Section
	title := sec.Title()
	known := standard.Known
	c.take(flexures[0].z, known(sec.WplMajor), title)
	c.take(flexures[0].s, known(sec.WelMajor), title)
	c.take(flexures[1].z, known(sec.WplMinor), title)
	c.take(flexures[1].s, known(sec.WelMinor), title)
	if sh := sec.Shape; sh.Kind == section.Bar {
		c.take(symD, max(sh.Depth, sh.Width), title)
		c.take(symT, min(sh.Depth, sh.Width), title)
	} else if sh.Kind == section.Rod {
		c.take(symDia, sh.Diameter, title)
	}
	c.take(symJ, standard.KnownOrZero(sec.It), title)
	c.take(symCw, standard.KnownOrZero(standard.Warping(sec)), title)
	for a, x := range flexures {
		w := c.s.At(x.s)
		if math.IsNaN(w) {
			w = known(sec.Area) * known([]float64{sec.RMajor, sec.RMinor}[a])
		}
		// moments below this are rounding of the analysis
		c.bend.tiny[a] = 1e-9 * c.s.At(symFy) * w
	}
}

// combine works out what each combination does.
func (c *calc) combine() {
	c.bend.combs = make([]comb, len(c.f.Combinations))
	var slab []action.Piece // one piece of memory for all
	for k := range c.bend.combs {
		b := &c.bend.combs[k]
		for a := range b.pieces {
			b.pieces[a], _ = c.f.Bending(a, c.f.Combinations[k].Factors, slab)
			if n := len(b.pieces[a]); n > 0 {
				if k == 0 {
					slab = make([]action.Piece, 0, 2*n*len(c.bend.combs))
				} else if cap(slab) >= n {
					slab = slab[n:n:cap(slab)]
				}
				b.pieces[a] = b.pieces[a][:n:n]
			}
			beyond := 0.0 // in other lifts: a stretch can go on there
			for _, p := range b.pieces[a] {
				m, _ := p.Largest()
				beyond = max(beyond, math.Abs(m))
				if p, ok := c.f.Cut(p); ok {
					m, _ := p.Largest()
					b.peak[a] = max(b.peak[a], math.Abs(m))
					b.shear[a] = max(b.shear[a], p.GreatestShear())
				}
			}
			b.bends[a] = !(beyond <= c.bend.tiny[a])
		}
	}
}

// greatest is the combination with the greatest of a value, and the value; -1
// when none is above the floor.
func (c *calc) greatest(floor float64, of func(*comb) float64) (int, float64) {
	at, most := -1, floor
	for k := range c.bend.combs {
		if v := of(&c.bend.combs[k]); !(v <= most) {
			at, most = k, v
		}
	}
	return at, most
}

// flexural2 is chapter F about one axis for the section: yielding and local
// buckling. Its strength has been found.
func (c *calc) flexural2(a int) {
	x := flexures[a]
	rule := "section-bending-" + x.word
	clause := "ANSI/AISC 360 " + c.flexureClause(a)
	if !c.f.Bends[a] {
		c.cover(rule, standard.NotApplicable, "the loads do not bend the member about this axis")
		return
	}
	at, worst := c.greatest(c.bend.tiny[a], func(b *comb) float64 { return b.peak[a] })
	if at < 0 {
		c.cover(rule, standard.NotApplicable, "no combination bends the member about this axis")
		return
	}
	if c.bend.why[a] != "" {
		c.undecidedIn(rule, clause, unit.Moment, c.bend.why[a])
		return
	}
	c.group(rule)
	c.take(x.mr, worst, c.combination(at))
	c.available(x.section)
	u := c.do(x.doU)
	c.add(rule, clause, at, worst, c.s.At(x.section.c), unit.Moment, u, c.f.Limit())
}

// flexureClause is the section of chapter F for bending about an axis.
func (c *calc) flexureClause(a int) string {
	sec := c.f.Member.Section
	switch sec.Shape.Kind {
	case section.ISection, section.Channel:
		if a == 1 {
			return "F6"
		}
		switch grade(c.s.At(symLamW), c.s.At(symLamPw), c.s.At(symLamRw)) {
		case noncompact:
			return "F4"
		case slender:
			return "F5"
		}
		if grade(c.s.At(symLamF), c.s.At(symLamPf), c.s.At(symLamRf)) == compact {
			return "F2"
		}
		return "F3"
	case section.Tube:
		return "F7"
	case section.Pipe:
		return "F8"
	case section.Tee, section.DoubleAngle:
		return "F9"
	case section.Angle:
		return "F10"
	case section.Bar, section.Rod:
		return "F11"
	}
	return "F12"
}

// sectionStrength computes the nominal strength of the section about an axis, by
// yielding and local buckling; or says why it cannot.
func (c *calc) sectionStrength(a int) string {
	sec := c.f.Member.Section
	sh := sec.Shape
	switch sh.Kind {
	case section.ISection, section.Channel:
		if sec.Turned {
			return "the flanges are so wide that the strong axis is the web's: check chapter F by hand"
		}
		if a == 0 {
			return c.openMajor()
		}
		return c.openMinor()
	case section.Tube:
		return c.tubeStrength(a)
	case section.Pipe:
		return c.pipeStrength(a)
	case section.Tee:
		return c.teeStrength(a)
	case section.DoubleAngle:
		return c.pairStrength(a)
	case section.Angle:
		c.angleStrength(a)
	case section.Bar:
		x := flexures[a]
		c.do(x.doMpBar)
		if a == 0 {
			c.do(doF11y)
		}
		c.do(x.doY)
		c.do(x.doMns)
	case section.Rod:
		x := flexures[a]
		c.do(x.doMpRod)
		c.do(x.doY)
		c.do(x.doMns)
	case section.Given:
		return "the plates of a section with stated properties are not known: chapter F needs them, by hand"
	default:
		return fmt.Sprintf("chapter F has no section for %ss: check bending by hand (F12)", sh.Kind)
	}
	return ""
}
