package review

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// Loosening is something by which the calculation asks less of itself, or may:
// it stands in a part of the review of its own.
type Loosening struct {
	// What says what it is: "limit utilisation raised".
	What          string
	Before, After string // "" where there is none
	// Because is the reason that the text gives, "" for none.
	Because string
	Members []string // "" for none: it holds for all
	Place   Place
	// Reworded is set when nothing but a reason changed.
	Reworded bool
}

// Unexplained tells whether the text gives no reason.
func (l Loosening) Unexplained() bool { return l.Because == "" }

// loosen adds to the list; what several members have alike stands once.
func (r *Review) loosen(l Loosening) {
	for i := range r.Loosened {
		x := &r.Loosened[i]
		if x.What == l.What && x.Before == l.Before && x.After == l.After && x.Because == l.Because && x.Place == l.Place {
			for _, m := range l.Members {
				if !slices.Contains(x.Members, m) {
					x.Members = append(x.Members, m)
				}
			}
			return
		}
	}
	r.Loosened = append(r.Loosened, l)
}

// loosened looks for limits, requirements, factors and departures.
func (r *Review) loosened(pairs []match, earlier, later map[string]*side) {
	var roots []string
	for root := range later {
		if earlier[root] != nil {
			roots = append(roots, root)
		}
	}
	slices.Sort(roots)
	for _, root := range roots {
		r.basis(earlier[root], later[root])
	}
	for _, p := range pairs {
		r.limits(p)
		r.requires(p)
		r.departs(p)
		r.covers(p)
	}
}

// lowerIsLooser tells of the numbers of a basis of which a smaller one is less safe.
func lowerIsLooser(name string) bool {
	// the other way round with resistance factors, phi_c: these are listed as changed
	return strings.HasPrefix(name, "gamma_") || strings.HasPrefix(name, "factor_") || strings.HasPrefix(name, "xi")
}

func (r *Review) basis(b, a *side) {
	x, y := b.calc.Env.Basis, a.calc.Env.Basis
	words := func(before, after, what string, at lang.Place) {
		if before != after {
			r.loosen(Loosening{What: what, Before: before, After: after, Place: a.lines.at(orElse(at, y.Place))})
		}
	}
	words(x.Standard, y.Standard, "another design standard", y.StandardAt)
	words(x.Annex, y.Annex, "another annex", y.StandardAt)
	words(x.Method, y.Method, "another method of design", y.StandardAt)
	words(strings.TrimSpace(x.Actions+" "+x.Equation), strings.TrimSpace(y.Actions+" "+y.Equation), "other combinations of actions", lang.Place{})
	onOff := func(b bool) string {
		if b {
			return "on"
		}
		return "off"
	}
	if x.SelfWeight && !y.SelfWeight {
		words(onOff(true), onOff(false), "self-weight no longer counts", lang.Place{})
	}
	if !x.Simple && y.Simple {
		words("secant", "simple", "simpler amplification of moments", lang.Place{})
	}
	if x.Direct != y.Direct {
		stability := map[bool]string{true: "direct", false: "effective lengths"}
		words(stability[x.Direct], stability[y.Direct], "another method of stability", y.DirectAt)
	}
	for _, c := range []struct {
		what string
		x, y model.Chosen
	}{{"another method of lateral-torsional buckling", x.Lateral, y.Lateral}, {"another annex of interaction factors", x.Interaction, y.Interaction}} {
		if c.x.Word != c.y.Word {
			words(orAnnex(c.x.Word), orAnnex(c.y.Word), c.what, c.y.Place)
		}
	}
	if x.Exact != y.Exact {
		stability := map[bool]string{true: "critical loads of the whole member", false: "effective lengths"}
		words(stability[x.Exact], stability[y.Exact], "another way to critical loads", lang.Place{})
	}
	if x.Imperfect && !y.Imperfect {
		words("counted", "not counted", "sway imperfections no longer count", lang.Place{})
	}
	if !x.Nominal && y.Nominal {
		words("continuous", "nominal", "nominal moments of loads off the centroid", lang.Place{})
	}
	if x.Recommended && !y.Recommended {
		words("recommended", "theoretical", "shorter effective lengths", lang.Place{})
	}
	if !x.TableFy && y.TableFy {
		words("product standard", "EN 1993-1-1 Table 3.1", "other strengths", lang.Place{})
	}
	names := map[string]bool{}
	for n := range x.Overrides {
		names[n] = true
	}
	for n := range y.Overrides {
		names[n] = true
	}
	var sorted []string
	for n := range names {
		sorted = append(sorted, n)
	}
	slices.Sort(sorted)
	for _, n := range sorted {
		was, had := x.Overrides[n]
		now, has := y.Overrides[n]
		text := func(o model.Override, ok bool) string {
			if !ok {
				return ""
			}
			return unit.Exact(o.Value)
		}
		l := Loosening{Before: text(was, had), After: text(now, has), Because: now.Because, Place: a.lines.at(orElse(now.Place, y.Place))}
		switch {
		case !had:
			l.What = n + " replaces the standard's value"
		case !has:
			l.What, l.Place = n+" is the standard's value again", b.lines.at(was.Place)
		case was.Value == now.Value && was.Because == now.Because:
			continue
		case was.Value == now.Value:
			l.What, l.Reworded = "reason for "+n+" in other words", true
			l.Before, l.After = was.Because, now.Because
		case now.Value < was.Value && lowerIsLooser(n):
			l.What = n + " lowered"
		default:
			l.What = n + " changed"
		}
		r.loosen(l)
	}
	r.cases(b, a)
}

// cases compares the reasons and the combination values of cases.
func (r *Review) cases(b, a *side) {
	for _, y := range a.calc.Env.Cases {
		i := slices.IndexFunc(b.calc.Env.Cases, func(x *model.Case) bool { return x.Name == y.Name })
		if i < 0 {
			continue
		}
		x := b.calc.Env.Cases[i]
		switch {
		case x.Because == y.Because:
		case x.Because == "":
			r.loosen(Loosening{What: "case " + y.Name + " has psi values of its own", Because: y.Because, Place: a.lines.at(y.Place)})
		case y.Because != "":
			r.loosen(Loosening{What: "reason for the psi values of case " + y.Name + " in other words", Before: x.Because, After: y.Because, Because: y.Because, Place: a.lines.at(y.Place), Reworded: true})
		}
	}
}

func orElse(at, other lang.Place) lang.Place {
	if at.Decl == nil {
		return other
	}
	return at
}

func (r *Review) limits(p match) {
	x, y := p.before.result.Member, p.after.result.Member
	bound := func(what string, was, now float64, before, at lang.Place, u float64, symbol string) {
		text := func(v float64) string {
			if v == 0 {
				return ""
			}
			return strings.TrimSpace(unit.Short(v/u, 3) + " " + symbol)
		}
		l := Loosening{What: "limit " + what, Before: text(was), After: text(now), Members: []string{y.Name}, Place: p.after.side.lines.at(orElse(at, lang.Place{Decl: y.Decl, Span: y.NameSpan}))}
		switch {
		case was > 0 && now == 0:
			l.What += " removed"
			l.Place = p.before.side.lines.at(before)
		case was > 0 && now > was:
			l.What += " raised"
		default:
			return
		}
		r.loosen(l)
	}
	bound("utilisation", x.Limits.Utilisation, y.Limits.Utilisation, x.Limits.UtilisationAt, y.Limits.UtilisationAt, 1, "")
	bound("slenderness", x.Limits.Slenderness, y.Limits.Slenderness, x.Limits.SlendernessAt, y.Limits.SlendernessAt, 1, "")
	r.movement(p, "sway", x.Limits.Sway, y.Limits.Sway)
	r.movement(p, "deflection", x.Limits.Deflection, y.Limits.Deflection)
	name := lang.Place{Decl: y.Decl, Span: y.NameSpan}
	if x.Weight && !y.Weight && p.before.side.calc.Env.Basis.SelfWeight == p.after.side.calc.Env.Basis.SelfWeight {
		r.loosen(Loosening{What: "self-weight no longer counts", Before: "on", After: "off", Members: []string{y.Name}, Place: p.after.side.lines.at(name)})
	}
	if was, now := x.Reduction, y.Reduction; now.Kind != model.NoReduction && (was.Kind != now.Kind || was.Value != now.Value || was.Element != now.Element) {
		text := func(side *side, r model.Reduction) string {
			if r.Kind == model.NoReduction || r.Place.Decl == nil {
				return ""
			}
			return textOf(r.Place.Decl, r.Place.Span)
		}
		r.loosen(Loosening{What: "imposed loads reduced", Before: text(p.before.side, was), After: text(p.after.side, now), Because: now.Because, Members: []string{y.Name},
			Place: p.after.side.lines.at(orElse(now.Place, name))})
	}
	if !x.Nominal && y.Nominal && p.before.side.calc.Env.Basis.Nominal == p.after.side.calc.Env.Basis.Nominal {
		r.loosen(Loosening{What: "nominal moments of loads off the centroid", Before: "continuous", After: "nominal", Members: []string{y.Name}, Place: p.after.side.lines.at(name)})
	}
	if x.Imperfect && !y.Imperfect && p.before.side.calc.Env.Basis.Imperfect == p.after.side.calc.Env.Basis.Imperfect {
		r.loosen(Loosening{What: "sway imperfections no longer count", Before: "on", After: "off", Members: []string{y.Name}, Place: p.after.side.lines.at(name)})
	}
	for i, axis := range []string{"major", "minor", "twist"} {
		was, now := x.Factor[i], y.Factor[i]
		if now > 0 && was != now && (was == 0 || now < was) {
			text := ""
			if was > 0 {
				text = unit.Short(was, 3)
			}
			r.loosen(Loosening{What: "effective length factor about " + axis + " stated", Before: text, After: unit.Short(now, 3), Members: []string{y.Name}, Place: p.after.side.lines.at(name)})
		}
	}
}

// movement compares limits of movements. One that follows the height is not
// raised by a taller member.
func (r *Review) movement(p match, what string, was, now model.Movement) {
	if was.Place.Decl == nil {
		return
	}
	l := Loosening{What: "limit " + what, Before: strings.TrimPrefix(textOf(was.Place.Decl, was.Place.Span), "limit "+what+" = "), Members: []string{p.after.result.Name}}
	if now.Place.Decl == nil {
		l.What += " removed"
		l.Place = p.before.side.lines.at(was.Place)
		r.loosen(l)
		return
	}
	l.After = strings.TrimPrefix(textOf(now.Place.Decl, now.Place.Span), "limit "+what+" = ")
	l.Place = p.after.side.lines.at(now.Place)
	raised := now.Limit > was.Limit
	for a := range now.Spans {
		for i := range min(len(now.Spans[a]), len(was.Spans[a])) {
			raised = raised || now.Spans[a][i] > was.Spans[a][i]
		}
	}
	switch {
	case l.Before == l.After:
		return
	case now.Under != was.Under:
		l.What += " under other combinations"
	case raised:
		l.What += " raised"
	default:
		return
	}
	r.loosen(l)
}

// requires compares the conditions that members set on their results.
func (r *Review) requires(p match) {
	x, y := p.before.result.Member, p.after.result.Member
	text := func(side *side, q model.Require) string {
		return strings.TrimPrefix(textOf(q.Place.Decl, q.Place.Span), "require ")
	}
	direction := func(q model.Require) string { return q.Symbol + " " + q.Compare[:1] }
	used := make([]bool, len(y.Requires))
	for _, was := range x.Requires {
		best := -1
		for i, now := range y.Requires {
			if !used[i] && direction(now) == direction(was) && (best < 0 || now.Quantity == was.Quantity) {
				best = i
			}
		}
		l := Loosening{Before: text(p.before.side, was), Members: []string{y.Name}}
		if best < 0 {
			l.What, l.Place = "requirement removed", p.before.side.lines.at(was.Place)
			r.loosen(l)
			continue
		}
		used[best] = true
		now := y.Requires[best]
		l.After, l.Because, l.Place = text(p.after.side, now), now.Because, p.after.side.lines.at(now.Place)
		weaker := now.Quantity.Value < was.Quantity.Value
		if strings.HasPrefix(was.Compare, "<") {
			weaker = now.Quantity.Value > was.Quantity.Value
		}
		switch {
		case weaker:
			l.What = "requirement loosened"
		case was.Quantity == now.Quantity && was.Because != now.Because:
			l.What, l.Reworded = "reason of a requirement in other words", true
			l.Before, l.After = was.Because, now.Because
		default:
			continue
		}
		r.loosen(l)
	}
}

// departs compares the departures of members.
func (r *Review) departs(p match) {
	x, y := p.before.result.Member, p.after.result.Member
	for _, now := range y.Departs {
		i := slices.IndexFunc(x.Departs, func(d model.Departure) bool { return d.Rule == now.Rule })
		l := Loosening{Because: now.Because, Members: []string{y.Name}, Place: p.after.side.lines.at(now.Place)}
		switch {
		case i < 0:
			l.What = "departs from " + now.Rule
			for _, c := range p.after.result.Checks {
				if c.Rule == now.Rule && c.Verdict != standard.Passes {
					l.After = c.Verdict.String()
					if c.Utilisation > 0 {
						l.After = fmt.Sprintf("%s with %.2f", c.Verdict, c.Utilisation)
					}
				}
			}
		case x.Departs[i].Because != now.Because:
			l.What, l.Reworded = "reason for departing from "+now.Rule+" in other words", true
			l.Before, l.After = x.Departs[i].Because, now.Because
		default:
			continue
		}
		r.loosen(l)
	}
	for _, was := range x.Departs {
		if !slices.ContainsFunc(y.Departs, func(d model.Departure) bool { return d.Rule == was.Rule }) {
			r.loosen(Loosening{What: "no longer departs from " + was.Rule, Before: was.Because, Because: "the departure is gone", Members: []string{y.Name}, Place: p.before.side.lines.at(was.Place), Reworded: true})
		}
	}
}

// covers lists checks that were made and are left to a person now.
func (r *Review) covers(p match) {
	for _, was := range p.before.result.Coverage {
		if was.State != standard.Checked {
			continue
		}
		for _, now := range p.after.result.Coverage {
			if now.Rule == was.Rule && now.State == standard.NotCovered {
				r.loosen(Loosening{What: was.Rule + " is no longer checked", After: now.Why, Members: []string{p.after.result.Name},
					Place: p.after.side.lines.at(lang.Place{Decl: p.after.result.Member.Decl, Span: p.after.result.Member.NameSpan})})
			}
		}
	}
}

// sortLoosened puts what changes something before what is only worded otherwise.
func sortLoosened(list []Loosening) {
	slices.SortStableFunc(list, func(x, y Loosening) int {
		rank := func(l Loosening) int {
			if l.Reworded {
				return 1
			}
			return 0
		}
		return cmp.Compare(rank(x), rank(y))
	})
}

// orAnnex is the word of a choice, or who chooses without one.
func orAnnex(word string) string {
	if word == "" {
		return "that of the annex"
	}
	return word
}
