package lsp

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/action"
	"kern/checker/model"
	"kern/checker/output"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// line writes what a line of a member's block does to the member.
func (h *hovering) line(s *lang.Stmt) {
	r := h.result()
	if r == nil {
		return
	}
	switch s.Word {
	case "load":
		h.load(r, lang.Place{Decl: h.at.Decl, Span: s.Line})
	case "hold":
		h.hold(r, lang.Place{Decl: h.at.Decl, Span: s.Line})
	case "height", "length", "from":
		h.height(r)
	case "base", "top":
		h.end(r, s.Word)
	case "effective":
		h.stretches(r, func(_ int, t action.Stretch) bool { return t.Overridden })
	case "joints":
		h.stretches(r, func(axis int, t action.Stretch) bool {
			return t.Joints && slices.ContainsFunc(s.Args, func(e *lang.Expr) bool { return e.Is(model.Axis(axis).String()) })
		})
	case "section":
		if sec := r.Member.Section; sec != nil {
			h.page.Text(output.Strong(output.SectionTitle(sec)), output.Words(": "+sectionShort(r.Units(), sec, densityFor(r))))
		}
	case "material":
		h.strength(r)
	case "lift":
		for _, l := range r.Member.Lifts {
			if l.Place == (lang.Place{Decl: h.at.Decl, Span: s.Line}) && l.Section != nil && l.Material != nil {
				h.page.Text(output.Strong(output.SectionTitle(l.Section)), output.Words(": "+output.MaterialTitle(l.Material)+", from "+display(r.Units(), l.From, unit.Length)+" to "+display(r.Units(), l.To, unit.Length)))
				h.sentences(r, func(c standard.Check) bool { return c.Lift == l.Name() })
			}
		}
	case "limit":
		h.limit(r, s)
	case "require":
		h.sentences(r, func(c standard.Check) bool { return len(s.Args) > 0 && c.Clause == "require "+s.Args[0].Text })
	case "depart":
		if len(s.Args) > 0 {
			rule := strings.Join(strings.Fields(s.Args[0].Span.Of(h.at.Decl.Text)), "")
			h.sentences(r, func(c standard.Check) bool { return c.Rule == rule })
		}
	case "selfweight":
		if w := r.OwnWeight(); w > 0 {
			h.page.Text(output.Words(fmt.Sprintf("%s weighs %s, in case %s", r.Name, display(r.Units(), w, unit.Force), r.Env().Cases[r.Env().SelfWeight].Name)))
		} else if w == 0 {
			h.page.Text(output.Words("The weight of " + r.Name + " is not counted."))
		}
	}
}

// sentences writes what some checks come to.
func (h *hovering) sentences(r *checker.Result, which func(standard.Check) bool) {
	for _, c := range r.Checks {
		if which(c) {
			h.page.Text(output.Words(r.Sentence(c)))
		}
	}
}

// load writes what a line of loads brings: each load with its case, and its part
// in the combination that governs.
func (h *hovering) load(r *checker.Result, at lang.Place) {
	var own []model.Load
	for _, l := range r.Member.Loads {
		if l.Place == at {
			own = append(own, l)
		}
	}
	if len(own) == 0 {
		return
	}
	units, cases := r.Units(), r.Env().Cases
	var rows [][]output.Line
	for _, l := range own {
		rows = append(rows, []output.Line{output.Words(cases[l.Case].Name), output.Words(output.Acts(units, l)), output.Words(output.LoadValue(units, l)), output.Words(output.LoadPlace(units, r.Member, l))})
	}
	h.page.Table([]string{"case", "acts", "value", "at"}, "llrl", rows)
	for axis := range 2 {
		for _, l := range own {
			if m := l.Value * l.Offset[axis]; l.Kind == model.AxialLoad && m != 0 {
				h.page.Text(output.Words(fmt.Sprintf("Off the centroid, it bends the member about %s with %s (case %s).", model.Axis(axis), display(units, m, unit.Moment), cases[l.Case].Name)))
			}
		}
	}
	h.share(r, own)
}

// share writes which part of the greatest axial force some loads make, under the
// combination that governs.
func (h *hovering) share(r *checker.Result, own []model.Load) {
	at, most := -1, math.Inf(-1) // the check that governs, of those under a combination
	for i, c := range r.Checks {
		if _, under := r.CombinationOf(c); under && c.Utilisation > most {
			at, most = i, c.Utilisation
		}
	}
	frame := r.Frame()
	if at < 0 || frame == nil {
		return
	}
	c := r.Checks[at]
	combination, _ := r.CombinationOf(c)
	sum, axial := 0.0, false
	for _, l := range own {
		if l.Kind == model.AxialLoad {
			axial = true
			sum += combination.Factors[l.Case] * l.Value * frame.Reduced(c.Combination, l)
		}
	}
	if !axial {
		return
	}
	units := r.Units()
	total, what := frame.Compression(c.Combination, 0, r.Member.Height), "compression"
	if t := frame.Tension(c.Combination); t > total {
		total, what, sum = t, "tension", -sum
	}
	h.page.Text(output.Words(fmt.Sprintf("Under %s, which governs %s, it makes %s of the %s %s.", combination.Name, c.Rule, display(units, sum, unit.Force), display(units, total, unit.Force), what)))
}

// hold writes the stretches that a hold makes.
func (h *hovering) hold(r *checker.Result, at lang.Place) {
	for _, hold := range r.Member.Holds {
		if hold.Place != at {
			continue
		}
		against := "buckling about minor"
		switch {
		case hold.Twist:
			against = "twist"
		case hold.Major && hold.Minor:
			against = "buckling about both axes"
		case hold.Major:
			against = "buckling about major"
		}
		with := ""
		if hold.Stiffness > 0 {
			with = ", with a stiffness of " + display(r.Units(), hold.Stiffness, unit.ForcePerLength)
		}
		h.page.Text(output.Words(fmt.Sprintf("Holds %s against %s at %s above its base%s.", r.Name, against, display(r.Units(), hold.At, unit.Length), with)))
		h.stretches(r, func(axis int, t action.Stretch) bool {
			held := axis == 0 && hold.Major || axis == 1 && hold.Minor
			return held && (t.From == hold.At || t.To == hold.At || t.Exact)
		})
	}
}

// height writes the height and what follows from it.
func (h *hovering) height(r *checker.Result) {
	m := r.Member
	if !(m.Height > 0) {
		return
	}
	text := fmt.Sprintf("%s is %s high", r.Name, display(r.Units(), m.Height, unit.Length))
	if m.Kind != model.Column {
		text = fmt.Sprintf("%s is %s long", r.Name, display(r.Units(), m.Height, unit.Length))
	}
	if m.From != 0 {
		text += fmt.Sprintf(", from %s to %s above datum", display(r.Units(), m.From, unit.Length), display(r.Units(), m.From+m.Height, unit.Length))
	}
	if w := r.OwnWeight(); w > 0 {
		text += " and weighs " + display(r.Units(), w, unit.Force)
	}
	h.page.Text(output.Words(text + "."))
	h.stretches(r, func(int, action.Stretch) bool { return true })
}

// end writes how an end is held and the stretches that begin or end there.
func (h *hovering) end(r *checker.Result, word string) {
	m := r.Member
	ends := m.Base
	if word == "top" {
		ends = m.Top
	}
	if ends[0] == ends[1] {
		h.page.Text(output.Words(fmt.Sprintf("The %s of %s is %s about both axes: %s.", word, r.Name, ends[0], lang.Words[ends[0].String()])))
	} else {
		h.page.Text(output.Words(fmt.Sprintf("The %s of %s is %s about major and %s about minor.", word, r.Name, ends[0], ends[1])))
	}
	springs := m.BaseSpring
	if word == "top" {
		springs = m.TopSpring
	}
	for a, s := range springs {
		if s.Turning > 0 {
			h.page.Text(output.Words(fmt.Sprintf("A spring of %s about %s works against turning.", display(r.Units(), s.Turning, unit.RotationalStiffness), model.Axis(a))))
		}
		if s.Lateral > 0 {
			h.page.Text(output.Words(fmt.Sprintf("A spring of %s about %s works against moving sideways.", display(r.Units(), s.Lateral, unit.ForcePerLength), model.Axis(a))))
		}
	}
	h.stretches(r, func(_ int, t action.Stretch) bool {
		return word == "base" && t.From == 0 || word == "top" && t.To == m.Height
	})
}

// stretches writes a table of stretches between holds: effective length factor,
// effective length and critical force.
func (h *hovering) stretches(r *checker.Result, which func(axis int, t action.Stretch) bool) {
	frame := r.Frame()
	if frame == nil {
		return
	}
	units := r.Units()
	var rows [][]output.Line
	for axis := range frame.Stretches {
		if !frame.Stands[axis] {
			h.page.Text(output.Words(fmt.Sprintf("Buckling of %s about %s is not known: %s.", r.Name, model.Axis(axis), frame.NotHeld(axis))))
			continue
		}
		if frame.Exact[axis] {
			h.whole(r, frame, axis)
		}
		for _, t := range frame.Stretches[axis] {
			if !which(axis, t) || frame.Exact[axis] {
				continue
			}
			k, effective := factor(t.K), display(units, t.Effective(), unit.Length)
			if frame.Stepped(t.From, t.To) {
				k, effective = "–", "by lift" // the section changes in it
			}
			rows = append(rows, []output.Line{output.Words(model.Axis(axis).String()), output.Words(display(units, t.From, unit.Length) + " to " + display(units, t.To, unit.Length)),
				output.Words(t.Base.String() + "–" + t.Top.String()), output.Words(k), output.Words(effective), output.Words(display(units, frame.Critical(axis, t), unit.Force))})
		}
	}
	h.page.Table([]string{"axis", "stretch", "ends", "K", "L_cr", "N_cr"}, "lllrrr", rows)
}

// whole writes the critical load of a whole member about an axis, under the
// combination that brings it nearest to it.
func (h *hovering) whole(r *checker.Result, frame *standard.Frame, axis int) {
	at, least := -1, math.Inf(1)
	for k := range frame.Combinations {
		if v := frame.Factor(axis, k); v < least {
			at, least = k, v
		}
	}
	if at < 0 {
		return
	}
	units := r.Units()
	n := frame.Compression(at, 0, r.Member.Height)
	whole := frame.Under(axis, frame.Whole(axis), at)
	h.page.Text(output.Words(fmt.Sprintf("%s as a whole buckles about %s at %s times %s: N_cr = %s where it is pressed most, which is a buckling length of %s.", r.Name, model.Axis(axis),
		unit.Short(least, 4), frame.Combinations[at].Name, display(units, least*n, unit.Force), display(units, whole.Effective(), unit.Length))))
}

// factor writes an effective length factor with two decimals, more where they
// count.
func factor(k float64) string {
	if math.Abs(k*100-math.Round(k*100)) < 1e-9 {
		return fmt.Sprintf("%.2f", k)
	}
	return fmt.Sprintf("%.3f", k)
}

// strength writes the strength that a member's material has for its section.
func (h *hovering) strength(r *checker.Result) {
	m := r.Member
	if m.Material == nil || m.Section == nil {
		return
	}
	fy, fu, source, ok := m.Material.StrengthOf(m.Section, r.Env().Basis.TableFy)
	if !ok {
		h.page.Text(output.Words(standard.NoStrength(m) + "."))
		return
	}
	text := "fy = " + display(r.Units(), fy, unit.Stress)
	if fu > 0 {
		text += ", fu = " + display(r.Units(), fu, unit.Stress)
	}
	if m.Material.Grade != nil && m.Section.Thickness > 0 {
		text += " for the thickest part of " + m.Section.Title() + ", " + display(r.Units(), m.Section.Thickness, unit.Length)
	}
	h.page.Text(output.Words(text + " (" + source + ")."))
}

// limit writes what a limit of the member's own bounds.
func (h *hovering) limit(r *checker.Result, s *lang.Stmt) {
	if len(s.Args) == 0 {
		return
	}
	switch s.Args[0].Text {
	case "utilisation":
		if !math.IsNaN(r.Utilisation) && r.Member.Limits.Utilisation > 0 {
			h.page.Text(output.Words(fmt.Sprintf("%s comes to %s (%s); its limit is %s.", r.Name, checker.Ratio(r.Utilisation), r.Governing, unit.Short(r.Member.Limits.Utilisation, 4))))
		}
	default:
		h.sentences(r, func(c standard.Check) bool { return c.Rule == s.Args[0].Text })
	}
}

// override writes what a number of the basis replaces.
func (h *hovering) override(s *lang.Stmt) {
	if h.context() != lang.InBasis || h.calc == nil {
		return
	}
	if o, ok := h.calc.Env.Basis.Overrides[s.Word]; ok {
		text := " = " + unit.Short(o.Value, 6)
		if o.Because != "" {
			text += ", because \"" + o.Because + "\""
		}
		h.page.Text(output.Strong(s.Word), output.Words(text))
	}
}
