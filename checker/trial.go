package checker

import (
	"math"

	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// StandardNamed gives the design standard of a name, nil for none: its rules,
// symbols, annexes and the numbers that a basis may replace.
func StandardNamed(name string) standard.Standard { return find(name) }

// Trial works out the members of a declaration as if its text were another one,
// in a calculation that stays as it is. It is for text that is half typed: with
// the line that cannot be read yet left out, the others have results. The text
// must have the declaration's names where the declaration has them; nil
// otherwise.
func Trial(c *model.Calculation, decl *lang.Decl, text string) []*Result {
	f := lang.Parse(decl.File, text, nil)
	if len(f.Decls) != 1 || f.Unreadable != "" {
		return nil
	}
	d := f.Decls[0]
	env := *c.Env
	env.Names = map[string]*model.Named{}
	for name, n := range c.Env.Names {
		if n.Kind != model.MemberName {
			env.Names[name] = n
		}
	}
	for _, name := range leaning(c.Env, decl) {
		env.Names[name] = c.Env.Names[name]
	}
	for i, s := range decl.Stmts {
		if i >= len(d.Stmts) || d.Stmts[i].Word != s.Word {
			return nil
		}
		for _, e := range s.Args {
			n := env.Names[e.Text]
			if n == nil || n.Place != (lang.Place{Decl: decl, Span: e.Span}) {
				continue
			}
			if e.Span.Of(text) != e.Text {
				return nil
			}
			moved := *n
			moved.Place.Decl, moved.Stmt = d, d.Stmts[i]
			env.Names[e.Text] = &moved
		}
	}
	var out []*Result
	combinations := env.All()
	for _, m := range model.Members(&env, d, departable, env.Results()) {
		if m.Name != "" {
			out = append(out, evaluate(&env, m, combinations))
		}
	}
	return out
}

// leaning are the members of a declaration and those that they are like, which
// are all the members that matter to it.
func leaning(env *model.Env, decl *lang.Decl) []string {
	var out []string
	seen := map[*lang.Decl]bool{}
	for queue := []*lang.Decl{decl}; len(queue) > 0; {
		d := queue[0]
		queue = queue[1:]
		if seen[d] {
			continue
		}
		seen[d] = true
		for _, s := range d.Stmts {
			for _, e := range s.Args {
				if n := env.Names[e.Text]; n != nil && e.Kind == lang.NameExpr && n.Kind == model.MemberName {
					out = append(out, n.Name)
					queue = append(queue, n.Place.Decl)
				}
			}
		}
	}
	return out
}

// Values gives the results of a member by symbol or by the trade's word for it,
// as a requirement names them. The function that it returns is false for what
// the calculation does not come to, and for everything when the member could not
// be checked.
func (r *Result) Values() func(symbol string) (unit.Quantity, bool) {
	s := find(r.Standard)
	if s == nil || len(r.Missing) > 0 {
		return func(string) (unit.Quantity, bool) { return unit.Quantity{}, false }
	}
	out := standard.Run(s, standard.NewFrame(r.env, r.Member, r.combinations), nil)
	return func(symbol string) (unit.Quantity, bool) {
		if symbol == "utilisation" {
			u := r.greatest()
			return unit.Quantity{Value: u}, !math.IsNaN(u)
		}
		if _, ok := s.Symbols().Find(symbol); !ok {
			symbol = s.Alias(symbol)
		}
		return out.Value(symbol)
	}
}
