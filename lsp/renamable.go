package lsp

import (
	"fmt"
	"maps"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/lang"
)

// isWord tells whether a name is a word of the language, which no name should
// be: some would change what statements say, the others how they are read.
// Properties (E, depth) and the kinds of action (wind) are no such words: they
// stand where no name can.
func isWord(name string) bool {
	switch name {
	case "permanent", "dead", "imposed", "live", "roof", "snow", "rain", "wind", "temperature":
		return false
	}
	if _, ok := lang.Words[name]; ok || lang.Joins(name) || lang.StartsDeclaration(name, false) {
		return true
	}
	return slices.ContainsFunc(lang.Forms, func(f lang.Form) bool {
		return f.Word == name && f.In != lang.InMaterial && f.In != lang.InSection
	})
}

// badName says why a text cannot be a name; "" when it can.
func badName(name string) string {
	tokens := lang.Tokens(name)
	switch {
	case name == "":
		return "a name cannot be empty"
	case len(tokens) != 1 || tokens[0].Kind != lang.Name || tokens[0].Flaw != lang.Sound || strings.Contains(name, "."):
		return "'" + clip(name) + "' is no name: a name has letters, digits and _, and begins with a letter"
	case isWord(name):
		return "'" + name + "' is a word of the language"
	}
	if _, ok := lang.Functions[name]; ok {
		return "'" + name + "' is a function of the language"
	}
	if _, ok := lang.Constants[name]; ok {
		return "'" + name + "' is a constant of the language"
	}
	return ""
}

// clip shortens what somebody typed for a message.
func clip(s string) string {
	if len(s) > 40 {
		return strings.ToValidUTF8(s[:40], "") + "…"
	}
	return s
}

// bound gives the names that have to be renamed together: where a file that
// several calculations include says a name, each of them gives it its own
// meaning.
func bound(r *checker.Report, names []*model.Named) []*model.Named {
	names = slices.Clone(names)
	for i := 0; i < len(names); i++ {
		seen := map[string]bool{}
		for _, m := range r.References(names[i]) {
			file, _ := r.Where(m.Place)
			if seen[file] || claims(m.Place.Decl, m.Place.Span) {
				continue
			}
			seen[file] = true
			for _, c := range r.Calculations(file) {
				n := c.Env.Names[names[i].Name]
				if n != nil && !slices.ContainsFunc(names, func(o *model.Named) bool { return o.Place == n.Place }) {
					names = append(names, n)
				}
			}
		}
	}
	return names
}

// taken says why a name is not free in a calculation; "" when it is.
func (s *Snapshot) taken(c *model.Calculation, name string) string {
	if n := c.Env.Names[name]; n != nil {
		return fmt.Sprintf("'%s' is given already: it is %s (%s)", name, n.Kind, s.placeName(n.Place))
	}
	// where the name stands without a meaning it would get one
	env := *c.Env
	env.Names = maps.Clone(c.Env.Names)
	env.Names[name] = &model.Named{Name: name}
	with := &model.Calculation{Root: c.Root, Files: c.Files, Env: &env}
	why := ""
	for _, f := range c.Files {
		for _, d := range f.Decls {
			if why != "" || !strings.Contains(d.Text, name) {
				continue
			}
			checker.Mentions(with, d, func(m checker.Mention) {
				if m.Named.Name == name {
					why = fmt.Sprintf("'%s' stands already where it has no meaning (%s): it would get this one", name, s.placeName(m.Place))
				}
			})
		}
	}
	return why
}

// placeName is a place for a message: file and line.
func (s *Snapshot) placeName(at lang.Place) string {
	file, span := s.report.Where(at)
	return fmt.Sprintf("%s:%d", file, s.textOf(file).Line(span.Start)+1)
}

// readsAlike tells whether a file reads the same when spans of it, in order, are
// replaced by another name: "0.5Q" is half of a case, "0.5e3" a number.
func readsAlike(f *lang.File, spans []lang.Span, name string) bool {
	var changes []lang.Change
	for _, s := range spans {
		changes = append(changes, lang.Change{Span: s, New: name})
	}
	after := lang.Parse(&lang.FileID{Name: f.Name}, lang.Apply(f.Text, changes), f)
	if len(after.Decls) != len(f.Decls) {
		return false
	}
	for i, d := range after.Decls {
		if d != f.Decls[i] && !alike(f.Decls[i].Stmts, d.Stmts, name) {
			return false
		}
	}
	return true
}

func alike(before, after []*lang.Stmt, name string) bool {
	return slices.EqualFunc(before, after, func(a, b *lang.Stmt) bool {
		if a.Word != b.Word && b.Word != name || a.Broken != b.Broken || (a.Body == nil) != (b.Body == nil) || !alikeParts(a.Args, b.Args, name) {
			return false
		}
		return a.Body == nil || alike(a.Body.Stmts, b.Body.Stmts, name)
	})
}

// sameResult tells whether two names with dots speak of the same result of a
// member that was renamed.
func sameResult(before, after, name string) bool {
	_, what, was := strings.Cut(before, ".")
	head, now, is := strings.Cut(after, ".")
	return was && is && head == name && what == now
}

func alikeParts(before, after []*lang.Expr, name string) bool {
	return slices.EqualFunc(before, after, func(a, b *lang.Expr) bool {
		return a.Kind == b.Kind && a.Op == b.Op && a.Value == b.Value && (a.Text == b.Text || b.Text == name || sameResult(a.Text, b.Text, name)) && alikeParts(a.Args, b.Args, name)
	})
}
