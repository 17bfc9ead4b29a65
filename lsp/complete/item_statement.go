package complete

import (
	"slices"
	"strings"

	"kern/checker"
	"kern/lang"
)

// once are the words that a member says once; those that say the same thing
// stand under one of them.
var once = map[string]string{"section": "section", "material": "material", "height": "height", "length": "height", "from": "height", "selfweight": "selfweight", "net": "net",
	"critical": "critical", "imperfection": "imperfection", "moments": "moments", "reduce": "reduce", "reduction": "reduce"}

// statements are what can be said where a statement begins.
func (s *scope) statements() []Item {
	said := s.said()
	var out []Item
	add := func(f lang.Form, group int) {
		x := Item{Label: f.Word, Kind: StatementItem, Detail: f.Summary, Group: group, About: About{Of: "form", Name: f.Word, In: string(f.In)}}
		if len(s.after) == 0 && !s.opensBlock() {
			x.Text, x.Snippet = start(f), s.snippet(f.Snippet, f.Word)
		}
		out = append(out, x)
	}
	switch s.in {
	case lang.InLevel:
		return s.pressures(said)
	case lang.InSection:
		if properties := shapeWords[s.shape()]; properties != nil {
			for _, p := range properties {
				for _, f := range lang.FormsIn(s.in) {
					if f.Word == p.word && !said[f.Word] {
						if p.words != nil {
							f.Snippet = f.Word + " = ${1|" + strings.Join(p.words, ",") + "|}"
						}
						add(f, 0)
					}
				}
			}
			return out
		}
	}
	known := map[string]bool{}
	for w := range said {
		known[once[w]] = known[once[w]] || once[w] != ""
	}
	for _, f := range lang.FormsIn(s.in) {
		group := 0
		switch {
		case s.in == lang.InMember && known[once[f.Word]], s.in != lang.InMember && s.in != lang.InFile && said[f.Word] && f.Word != "show":
			continue
		case s.in == lang.InFile && (f.Word == "basis" && s.env.Basis.Stated || f.Word == "project" && s.env.Project.Stated):
			continue
		case s.in == lang.InMember && (f.Word == "base" || f.Word == "top") && said[f.Word]:
			group = 1 // once more, about the other axis
		case s.in == lang.InBasis:
			group = s.ofBasis(f.Word)
		}
		add(f, group)
	}
	return out
}

// ofBasis ranks the statements of a basis by what its standard has a use for.
func (s *scope) ofBasis(word string) int {
	standard := checker.StandardNamed(s.env.Basis.Standard)
	if standard == nil {
		return 0
	}
	_, own := standard.Overrides()[word]
	switch {
	case own:
		return 0
	case strings.HasPrefix(word, "factor_"), word == "gamma_M0", word == "gamma_M1":
		return 2
	case word == "amplification" && standard.Name() != "elastic":
		return 2
	case word == "strengths" && standard.Name() == "elastic":
		return 1
	}
	return 0
}

// opensBlock tells whether the statement has a block already.
func (s *scope) opensBlock() bool {
	return s.stmt != nil && s.stmt.Body != nil && s.stmt.Body.Span.Start >= s.whole.End-s.declStart()
}

func (s *scope) declStart() int32 {
	if i := s.tree.DeclAt(s.offset); i >= 0 {
		return s.tree.Starts[i]
	}
	return 0
}

// pressures are the load cases that a level can still have.
func (s *scope) pressures(said map[string]bool) []Item {
	var out []Item
	for _, x := range s.cases() {
		if said[x.Label] {
			continue
		}
		if len(s.after) == 0 {
			x.Text = x.Label + " "
			x.Snippet = s.snippet(x.Label+" ${1:1 kN/m2}", x.Label)
		}
		out = append(out, x)
	}
	return out
}

// start is how a statement begins, for editors without places to fill in: no
// number is written that nobody chose.
func start(f lang.Form) string {
	if slices.ContainsFunc(f.Syntax, func(s string) bool { return strings.HasPrefix(s, f.Word+" = ") }) {
		return f.Word + " = "
	}
	return f.Word + " "
}
