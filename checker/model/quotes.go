package model

import (
	"kern/checker/catalogue"
	"kern/lang"
)

// unquoted is the problem of a name of the calculation that stands in quotes,
// which name the outside world.
func unquoted(e *lang.Expr, what string) lang.Problem {
	return lang.Problem{Rule: "wrong-form", Span: e.Span, Message: what + " is named without quotes: " + e.Text,
		Fixes: []lang.Fix{lang.Replace("Remove the quotes", false, e.Span, e.Text)}}
}

// inQuotes is the problem of a designation of the catalogue that stands without
// quotes; it reads the parts up to the end, as a designation has several. It is
// false when the catalogue has nothing of the kind.
func (r *reader) inQuotes(what string, known func(string) bool) (lang.Problem, bool) {
	if len(r.args) == 0 || r.args[0].Kind != lang.NameExpr {
		return lang.Problem{}, false
	}
	span := r.args[0].Span
	for _, e := range r.args[1:] {
		if e.Kind == lang.NameExpr && lang.Joins(e.Text) {
			break
		}
		span = span.Join(e.Span)
	}
	text := span.Of(r.decl.Text)
	if !known(text) {
		return lang.Problem{}, false
	}
	return lang.Problem{Rule: "wrong-form", Span: span, Message: what + " stands in quotes: \"" + text + "\"",
		Fixes: []lang.Fix{lang.Replace("Put it in quotes", false, span, `"`+text+`"`)}}, true
}

func inCatalogue(text string) bool {
	_, ok := catalogue.Find(text)
	return ok
}

func isGrade(text string) bool {
	_, ok := catalogue.FindGrade(text, "")
	return ok
}
