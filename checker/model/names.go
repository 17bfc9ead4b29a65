package model

import (
	"sort"

	"kern/lang"
	"kern/lang/unit"
)

// maxOffers bounds among how many names the nearest are looked for: a text with
// as many unknown names as known ones must not take the square of their number.
const maxOffers = 2000

// namesOf sorts the names of a calculation by their kind; a kind that has more
// than maxOffers has none.
func namesOf(names map[string]*Named) map[NameKind][]string {
	out := map[NameKind][]string{}
	for name, n := range names {
		out[n.Kind] = append(out[n.Kind], name)
	}
	for kind, list := range out {
		if len(list) > maxOffers {
			delete(out, kind)
			continue
		}
		sort.Strings(list)
	}
	return out
}

// unknownName is the problem of a name that nobody gave, with the nearest names
// of the kinds that are due.
func (env *Env) unknownName(e *lang.Expr, what string, kinds []NameKind, more ...string) *lang.Problem {
	p := &lang.Problem{Rule: "unknown-name", Span: e.Span, Message: "there is no " + what + " '" + clip(e.Text) + "'"}
	if _, function := lang.Functions[e.Text]; function {
		p.Message = "'" + e.Text + "' is a function: its values stand in brackets behind it"
		return p
	}
	if unit.Known(e.Text) && what == "value" {
		p.Notes = append(p.Notes, "a unit is written without blanks inside: kNm, kN/m")
	}
	names := more
	for _, k := range kinds {
		names = append(names, env.offer[k]...)
	}
	near := Closest(e.Text, names, 3)
	if len(near) > 0 {
		p.Message += "; did you mean " + lang.OrList(near) + "?"
	}
	for _, n := range near {
		p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, e.Span, n))
	}
	return p
}
