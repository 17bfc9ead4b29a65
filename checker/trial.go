package checker

import (
	"math"
	"slices"

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
	return NewTrials(c, decl).Of(text)
}

// Trials tries texts of one declaration, one after another.
type Trials struct {
	calculation  *model.Calculation
	decl         *lang.Decl
	also         []*lang.Decl
	env          model.Env
	combinations []model.Combination
}

// NewTrials makes ready to try texts of a declaration. The members of the
// declarations named behind it, which lean on it, are worked out too.
func NewTrials(c *model.Calculation, decl *lang.Decl, also ...*lang.Decl) *Trials {
	t := &Trials{calculation: c, decl: decl, also: also, env: *c.Env}
	t.env.Names = map[string]*model.Named{}
	for name, n := range c.Env.Names {
		if n.Kind != model.MemberName {
			t.env.Names[name] = n
		}
	}
	for _, d := range append([]*lang.Decl{decl}, also...) {
		for _, name := range leaning(c.Env, d) {
			t.env.Names[name] = c.Env.Names[name]
		}
	}
	t.combinations = t.env.All()
	return t
}

// Of works out the members with another text: those of the declaration, then
// those that lean on it.
func (t *Trials) Of(text string) []*Result {
	decl := t.decl
	f := lang.Parse(decl.File, text, nil)
	if len(f.Decls) != 1 || f.Unreadable != "" {
		return nil
	}
	d := f.Decls[0]
	for i, s := range decl.Stmts {
		if i >= len(d.Stmts) || d.Stmts[i].Word != s.Word {
			return nil
		}
		for _, e := range s.Args {
			n := t.calculation.Env.Names[e.Text]
			if n == nil || n.Place != (lang.Place{Decl: decl, Span: e.Span}) {
				continue
			}
			if e.Span.Of(text) != e.Text {
				return nil
			}
			moved := *n
			moved.Place.Decl, moved.Stmt = d, d.Stmts[i]
			t.env.Names[e.Text] = &moved
		}
	}
	var out []*Result
	for _, d := range append([]*lang.Decl{d}, t.also...) {
		for _, m := range model.Members(&t.env, d, departable, t.env.Results()) {
			if m.Name != "" {
				out = append(out, evaluate(&t.env, m, t.combinations))
			}
		}
	}
	return out
}

// Leaners are the declarations of a calculation whose members are "as" one of a
// declaration, themselves or through others, in the order of the files.
func Leaners(c *model.Calculation, decl *lang.Decl) []*lang.Decl {
	on := map[*lang.Decl]bool{decl: true}
	var out []*lang.Decl
	for again := true; again; {
		again = false
		for _, d := range c.Env.MemberDecls() {
			if on[d] {
				continue
			}
			for _, s := range d.Stmts {
				i := slices.IndexFunc(s.Args, func(e *lang.Expr) bool { return e.Is("as") })
				if i < 0 || i+1 >= len(s.Args) {
					continue
				}
				if n := c.Env.Names[s.Args[i+1].Text]; n != nil && n.Kind == model.MemberName && on[n.Place.Decl] && !on[d] {
					on[d], again = true, true
					out = append(out, d)
				}
			}
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
