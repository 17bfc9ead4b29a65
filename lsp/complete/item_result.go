package complete

import (
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/rule"
	"kern/checker/standard"
	"kern/lang/unit"
)

// standards are the design standard of the calculation, or all that there are
// while it states none.
func (s *scope) standards() []standard.Standard {
	if x := checker.StandardNamed(s.env.Basis.Standard); x != nil {
		return []standard.Standard{x}
	}
	var out []standard.Standard
	for _, name := range checker.Standards() {
		out = append(out, checker.StandardNamed(name))
	}
	return out
}

// tradeWords are words of the trade for results, whatever the standard calls
// them.
var tradeWords = []string{"N_b_minor", "N_b_major", "N_b_twist", "N_c", "N_cr_minor", "N_cr_major", "utilisation"}

// aliases are the words of the trade that a standard has a symbol for.
func aliases(x standard.Standard) []string {
	var out []string
	add := func(word string) {
		if word == "utilisation" || x.Alias(word) != "" && !slices.Contains(out, word) {
			out = append(out, word)
		}
	}
	for _, w := range tradeWords {
		add(w)
	}
	set := x.Symbols()
	for _, axis := range []struct{ of, trade string }{{"_z", "_minor"}, {"_y", "_major"}} {
		for i := range set.Len() {
			if base, ok := strings.CutSuffix(x.Symbols().At(derivation.ID(i)).Name, axis.of); ok {
				add(base + axis.trade)
			}
		}
	}
	return out
}

// symbolDim is the dimension of a result by symbol or by the trade's word.
func (s *scope) symbolDim(word string) (unit.Dim, bool) {
	if word == "utilisation" {
		return unit.None, true
	}
	for _, x := range s.standards() {
		id, ok := x.Symbols().Find(word)
		if !ok {
			id, ok = x.Symbols().Find(x.Alias(word))
		}
		if ok {
			return x.Symbols().At(id).Dim, true
		}
	}
	return unit.None, false
}

// tried works the member out without the statement that is being typed; nil
// where it has no result even so.
func (s *scope) tried() *checker.Result {
	if s.calc == nil || s.decl == nil || s.member == nil {
		return nil
	}
	text := s.decl.Text
	if s.stmt != nil {
		line := s.stmt.Line
		text = text[:line.Start] + strings.Repeat(" ", line.Len()) + text[line.End:]
	}
	for _, r := range checker.Trial(s.calc, s.decl, text) {
		if r.Member.Stmt != nil && r.Member.Stmt.Span.Start == s.member.Span.Start && len(r.Missing) == 0 {
			return r
		}
	}
	return nil
}

// results are what can be required: the words of the trade first, then the
// symbols of the standard, each with the value that the member has now.
func (s *scope) results(values bool) []Item {
	value := func(string) (unit.Quantity, bool) { return unit.Quantity{}, false }
	if values {
		if r := s.tried(); r != nil {
			value = r.Values()
		}
	}
	var out []Item
	for _, x := range s.standards() {
		out = append(out, s.resultsOf(x, value, values)...)
	}
	return out
}

// resultsOf are the results of one standard.
func (s *scope) resultsOf(x standard.Standard, value func(string) (unit.Quantity, bool), values bool) []Item {
	set := x.Symbols()
	var out []Item
	add := func(word, symbol string, group int) {
		item := Item{Label: word, Kind: ResultItem, Group: group, Eager: group == 0, About: About{Of: "symbol", Name: word, In: x.Name()}}
		if symbol == "utilisation" {
			item.Detail = "the greatest utilisation of the member's checks"
			item.About = About{}
		} else if id, ok := set.Find(symbol); ok {
			item.Detail = set.At(id).What
		}
		if q, ok := value(word); ok {
			item.Detail += ", now " + s.show(q)
		} else if values && group > 0 {
			item.Group++ // the member does not come to it
		}
		out = append(out, item)
	}
	for _, w := range aliases(x) {
		symbol := x.Alias(w)
		if symbol == "" {
			symbol = w
		}
		group := 0
		if !slices.Contains(tradeWords, w) {
			group = 1
		}
		add(w, symbol, group)
	}
	for i := range set.Len() {
		name := x.Symbols().At(derivation.ID(i)).Name
		add(name, name, 3)
	}
	return out
}

// rules are the checks that the member can depart from, those first that it
// fails or that are left to a person.
func (s *scope) rules() []Item {
	group, state := map[string]int{}, map[string]string{}
	r := s.tried()
	if r != nil {
		for _, c := range r.Checks {
			switch c.Verdict {
			case standard.Fails:
				group[c.Rule], state[c.Rule] = -2, "fails, utilisation "+unit.Number(c.Utilisation, 3)
			case standard.Undecided:
				group[c.Rule], state[c.Rule] = -1, "undecided"
			default:
				state[c.Rule] = "passes, utilisation " + unit.Number(c.Utilisation, 3)
			}
		}
		for _, c := range r.Coverage {
			switch {
			case c.State == standard.NotCovered && state[c.Rule] == "":
				group[c.Rule], state[c.Rule] = -1, "not covered"
			case c.State == standard.NotApplicable && state[c.Rule] == "":
				group[c.Rule], state[c.Rule] = 1, "does not apply"
			}
		}
	}
	var names []string
	for _, x := range s.standards() {
		names = append(names, x.Rules()...)
	}
	var out []Item
	for _, name := range append(names, "requirement") {
		item := Item{Label: name, Kind: RuleItem, Group: group[name], Eager: true, About: About{Of: "rule", Name: name}}
		if page := rule.Find(name); page != nil {
			item.Detail = page.Summary
		}
		if r != nil && state[name] == "" {
			item.Group = 1
		}
		if state[name] != "" {
			item.Detail = state[name] + " · " + item.Detail
		}
		if len(s.after) == 0 {
			item.Snippet = name + ` because "${1}"`
		}
		out = append(out, item)
	}
	return out
}
