package model

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"kern/checker/action"
	"kern/lang"
)

// The standards of actions that cases are combined by.
const (
	actionsStandard = "EN 1990:2002"
	basicStandard   = "ASCE/SEI 7-22"
)

// ActionsStandards lists the standards that load cases are combined by.
func ActionsStandards() []string { return []string{actionsStandard, basicStandard} }

// Combining is how the basis wants cases combined.
type Combining struct {
	Values        action.Values // of the annex that is named, overrides left out
	Independent   bool          // every permanent case by itself, not all together
	RoofsTogether bool          // category H acts with snow and wind
	QuasiLeading  bool          // psi_2 of the leading action in accidental situations
}

// actions reads the standard of actions with its annex and its equation.
func (b *builder) actions(r *reader) bool {
	basis := &b.env.Basis
	e := r.peek()
	name, ok := r.text("the standard of actions")
	if !ok {
		return false
	}
	if name == basicStandard {
		return b.basic(r, e)
	}
	if name != actionsStandard {
		p := lang.Problem{Rule: "unknown-standard", Span: e.Span, Message: "'" + name + "' is no standard of actions that kern combines to: \"" + strings.Join(ActionsStandards(), "\", \"") + "\""}
		offers := Closest(name, ActionsStandards(), 1)
		if len(offers) == 0 {
			offers = ActionsStandards()
		}
		for _, n := range offers {
			p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, e.Span, `"`+n+`"`))
		}
		r.problem(p)
		b.env.refuse("the standard of actions is not known")
		return false
	}
	basis.Actions, basis.Equation = name, action.Equation610
	return b.actionsAnnex(r) && b.equation(r)
}

// basic reads by which method ASCE/SEI 7 combines: "by LRFD". at is the standard's
// name.
func (b *builder) basic(r *reader, at *lang.Expr) bool {
	basis := &b.env.Basis
	if !b.methodOf(r, basicStandard, action.Methods(), at) {
		b.env.refuse("the standard of actions has an error")
		return false
	}
	w, ok := r.wordOf("the method", action.Methods()...)
	if !ok {
		b.env.refuse("the standard of actions has an error")
		return false
	}
	basis.Actions, basis.Equation, basis.ActionsAt = basicStandard, w, r.place(at.Span)
	return true
}

// methods holds the method that loads are combined by against the one that
// strengths are found by: to check one with the other is never right.
func (b *builder) methods() {
	basis := &b.env.Basis
	if basis.Actions != basicStandard || basis.Standard == "" || basis.ActionsAt.Decl == nil {
		return
	}
	problem := func(format string, args ...any) {
		b.report(lang.Diagnostic{Decl: basis.ActionsAt.Decl, Problem: lang.Problem{Rule: "methods-differ", Span: basis.ActionsAt.Span, Message: fmt.Sprintf(format, args...),
			Related: []lang.Related{{Place: basis.StandardAt, Message: "the design standard"}}}})
		b.env.refuse("loads are combined by another method than strengths are found by")
	}
	switch {
	case basis.Method != "" && basis.Method != basis.Equation:
		problem("loads are combined by %s and strengths are found by %s: both take the same method", basis.Equation, basis.Method)
	case basis.Method == "" && basis.Equation == string(action.ASD) && strings.HasPrefix(basis.Standard, "EN "):
		problem("%s has resistances with partial factors; loads for allowable stress design (ASD) are not what they are checked with", basis.Standard)
	}
}

func (b *builder) actionsAnnex(r *reader) bool {
	if _, ok := r.word("annex"); !ok {
		return true
	}
	e := r.peek()
	annex, ok := r.text("the annex")
	if !ok {
		return false
	}
	values, ok := action.AnnexOf(annex)
	if !ok {
		p := lang.Problem{Rule: "unknown-annex", Span: e.Span, Message: fmt.Sprintf("the annex '%s' to %s is not known; known is %s. Other national values are given one by one: "+
			"gamma_G_sup = 1.2 because \"…\", and for a case psi_0 0.6, psi_1 0.2 because \"…\"", annex, actionsStandard, lang.OrList(action.Annexes()))}
		for _, n := range Closest(annex, action.Annexes(), 1) {
			p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, e.Span, `"`+n+`"`))
		}
		r.problem(p)
		b.env.refuse("the annex to the standard of actions is not known")
		return false
	}
	b.env.Basis.Combining.Values = values
	return true
}

func (b *builder) equation(r *reader) bool {
	if _, ok := r.word("eq"); !ok {
		return true
	}
	e := r.peek()
	eq, ok := r.text("the equation")
	if !ok {
		return false
	}
	if slices.Contains(action.Equations(), eq) {
		b.env.Basis.Equation = eq
		return true
	}
	p := lang.Problem{Rule: "unknown-standard", Span: e.Span, Message: "equation '" + eq + "' is not known; known is " + lang.OrList(action.Equations()) + ". Other combinations are written out: combination NAME = 1.1 G + 0.5 W"}
	if eq == "6.10a" || eq == "6.10b" {
		p.Message = "(" + eq + ") holds only together with the other of the two: " + action.Equation610ab
		p.Fixes = append(p.Fixes, lang.Replace("Write "+action.Equation610ab, false, e.Span, `"`+action.Equation610ab+`"`))
	}
	r.problem(p)
	b.env.refuse("the equation of the combinations is not known")
	return false
}

// combining reads a setting of the combinations.
func (b *builder) combining(r *reader) {
	c := &b.env.Basis.Combining
	switch r.stmt.Word {
	case "permanent":
		if _, ok := r.wordOf("what to set", "cases"); ok {
			w, _ := r.wordOf("how permanent cases are combined", "together", "independent")
			c.Independent = w == "independent"
		}
	case "roofs":
		w, _ := r.wordOf("how imposed loads on roofs are combined", "alone", "together")
		c.RoofsTogether = w == "together"
	case "accidental":
		w, _ := r.wordOf("the value of the leading variable action", "psi_1", "psi_2")
		c.QuasiLeading = w == "psi_2"
	}
}

// exclusive reads the groups of cases of which one acts at a time.
func (b *builder) exclusive() {
	env := b.env
	for _, d := range b.of("exclusive") {
		r := b.reader(d)
		group, ok := b.group(r)
		if !ok {
			// with more together than was meant, or less, a verdict would be about
			// something else
			env.refuse("an 'exclusive' statement has an error")
			continue
		}
		env.Exclusive = append(env.Exclusive, group)
	}
}

// group reads the names of cases, with commas between them.
func (b *builder) group(r *reader) ([]int, bool) {
	var group []int
	for {
		e := r.take()
		if e == nil || e.Kind != lang.NameExpr {
			span := r.stmt.Line
			if e != nil {
				span = e.Span
			}
			r.fail("wrong-form", span, "cases that exclude each other stand with commas between them: exclusive W1, W2")
			return nil, false
		}
		n := b.env.Names[e.Text]
		switch {
		case n == nil:
			r.problem(*b.env.unknownName(e, "load case", []NameKind{CaseName}))
			return nil, false
		case n.Kind != CaseName:
			r.problem(lang.Problem{Rule: "wrong-kind", Span: e.Span, Message: fmt.Sprintf("'%s' is %s, not a load case", e.Text, n.Kind),
				Related: []lang.Related{{Place: n.Place, Message: "given here"}}})
			return nil, false
		case n.Index < 0 || n.Twice:
			r.failed = true // reported where it lies
			return nil, false
		case slices.Contains(group, n.Index):
			r.fail("wrong-form", e.Span, "'%s' stands twice in the group", e.Text)
			return nil, false
		case b.env.Cases[n.Index].Kind == action.Permanent && !b.env.Cases[n.Index].Bad:
			r.problem(lang.Problem{Rule: "wrong-kind", Span: e.Span, Message: "'" + e.Text + "' is permanent: it acts always, and excludes nothing",
				Related: []lang.Related{{Place: n.Place, Message: "given here"}}})
			return nil, false
		}
		group = append(group, n.Index)
		c := r.peek()
		if c == nil || c.Kind != lang.CommaExpr && c.Kind != lang.NameExpr {
			break
		}
		if c.Kind == lang.NameExpr {
			fix := lang.Replace("Put a comma between them", false, lang.Span{Start: e.Span.End, End: e.Span.End}, ",")
			if c.Is("and") {
				fix = lang.Replace("Put a comma between them", false, lang.Span{Start: e.Span.End, End: c.Span.End}, ",")
			}
			r.problem(lang.Problem{Rule: "wrong-form", Span: c.Span, Message: "cases that exclude each other stand with commas between them: exclusive W1, W2", Fixes: []lang.Fix{fix}})
			return nil, false
		}
		r.take()
	}
	if !r.end() {
		return nil, false
	}
	if len(group) < 2 {
		r.fail("wrong-form", r.stmt.Line, "it takes two cases at least to exclude each other: exclusive W1, W2")
		return nil, false
	}
	return group, true
}

// rules are how the cases at some indices of the Env are combined.
func (env *Env) rules(at []int) action.Rules {
	c := env.Basis.Combining
	r := action.Rules{Values: c.Values, Equation: env.Basis.Equation, Independent: c.Independent, QuasiLeading: c.QuasiLeading, RoofsTogether: c.RoofsTogether}
	for name, to := range map[string]*float64{"gamma_G_sup": &r.GSup, "gamma_G_inf": &r.GInf, "gamma_Q": &r.Q, "xi": &r.Xi} {
		if o, ok := env.Basis.Overrides[name]; ok {
			*to = o.Value
		}
	}
	for _, group := range env.Exclusive {
		var among []int
		for _, i := range group {
			if k := slices.Index(at, i); k >= 0 {
				among = append(among, k)
			}
		}
		r.Exclusive = append(r.Exclusive, among)
	}
	return r
}

// assume lists what the combinations of a standard of actions rest on.
func (env *Env) assume(r action.Rules) {
	say := func(format string, args ...any) { env.Assumed = append(env.Assumed, fmt.Sprintf(format, args...)) }
	number := func(x float64) string { return strconv.FormatFloat(x, 'f', -1, 64) }
	stated := func(name string, x float64) string {
		if o, ok := env.Basis.Overrides[name]; ok {
			return name + " = " + number(x) + " (because \"" + o.Because + "\")"
		}
		return name + " = " + number(x)
	}
	factors := []string{stated("gamma_G_sup", r.GSup), stated("gamma_G_inf", r.GInf), stated("gamma_Q", r.Q)}
	if _, ok := env.Basis.Overrides["xi"]; ok || r.Equation == action.Equation610ab {
		factors = append(factors, stated("xi", r.Xi))
	}
	say("actions by %s (%s), annex %s: %s", actionsStandard, r.Equation, r.Annex, strings.Join(factors, ", "))
	var psi []string
	roof, climate, accident, quake, permanent := false, false, false, false, 0
	for _, c := range env.Cases {
		if c.Bad {
			continue
		}
		if p, ok := r.Psi(c.Case); ok {
			text := c.Name + " " + p.String()
			if c.Because != "" {
				text += " (because \"" + c.Because + "\")"
			}
			psi = append(psi, text)
		}
		switch {
		case c.Kind == action.Permanent:
			permanent++
		case c.Kind == action.Imposed && c.Category == "H":
			roof = true
		case c.Kind == action.Snow || c.Kind == action.Wind:
			climate = true
		case c.Kind == action.Accident:
			accident = true
		case c.Kind == action.Earthquake:
			quake = true
		}
	}
	if len(psi) > 0 {
		say("psi_0, psi_1, psi_2: %s", strings.Join(psi, "; "))
	}
	if r.Annex != action.Recommended.Annex {
		say("annex %s: %s; all else as recommended", r.Annex, sourced(action.NationalsOf(r.Annex)))
	}
	switch {
	case permanent > 1 && r.Independent:
		say("permanent cases independent, each with its upper or its lower factor")
	case permanent > 1:
		say("permanent cases together, all with the upper or all with the lower factor (Table A1.2(B), note 3)")
	}
	switch {
	case roof && climate && r.RoofsTogether:
		say("imposed loads on roofs act together with snow and wind")
	case roof && climate:
		say("imposed loads on roofs (category H) not together with snow or wind (EN 1991-1-1 3.3.2(1))")
	}
	if accident {
		leading := "psi_1"
		if r.QuasiLeading {
			leading = "psi_2"
		}
		say("accidental situations: the leading variable action with %s (6.11b)", leading)
	}
	if quake {
		say("seismic cases are design values and act to either side (6.12b); the rules of EN 1998 for ductility and detailing are not checked")
	}
	env.assumeExclusive()
}

// assumeBasic lists what the combinations of ASCE/SEI 7 rest on.
func (env *Env) assumeBasic(r action.BasicRules) {
	say := func(format string, args ...any) { env.Assumed = append(env.Assumed, fmt.Sprintf(format, args...)) }
	where := "2.3.1 and 2.3.6"
	if r.Method == action.ASD {
		where = "2.4.1 and 2.4.5"
	}
	say("actions by %s, basic combinations for %s (%s); snow and wind are its strength-level loads", basicStandard, r.Method, where)
	live, quake := false, false
	for _, c := range env.Cases {
		live = live || c.Kind == action.Imposed && !c.Bad
		quake = quake || c.Kind == action.Earthquake && !c.Bad
	}
	if live && r.Method == action.LRFD {
		if o, ok := env.Basis.Overrides["companion_live"]; ok {
			say("live loads beside others with %s in (3), (4) and (6), because \"%s\"", strconv.FormatFloat(r.Companion, 'f', -1, 64), o.Because)
		} else {
			say("live loads beside others in full in (3), (4) and (6): companion_live = 0.5 where 2.3.1 exception 1 allows it")
		}
	}
	if quake {
		say("seismic cases are the whole effect E, the vertical one in it, and act to either side; the detailing that they ask for is not checked")
	}
	env.assumeExclusive()
}

// sourced writes national values, those of one source together.
func sourced(rows []action.National) string {
	var sources []string
	values := map[string][]string{}
	for _, n := range rows {
		if values[n.Source] == nil {
			sources = append(sources, n.Source)
		}
		values[n.Source] = append(values[n.Source], n.What+" "+n.Value)
	}
	for i, s := range sources {
		sources[i] = strings.Join(values[s], ", ") + " (" + s + ")"
	}
	return strings.Join(sources, "; ")
}

// assumeExclusive lists the groups of which one acts at a time.
func (env *Env) assumeExclusive() {
	for _, group := range env.Exclusive {
		var names []string
		for _, i := range group {
			names = append(names, env.Cases[i].Name)
		}
		env.Assumed = append(env.Assumed, "of "+strings.Join(names, ", ")+" one acts at a time")
	}
}
