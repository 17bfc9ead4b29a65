package model

import (
	"fmt"
	"math"
	"slices"

	"kern/lang"
)

// Standards are the design standards that a basis can name. The checker fills
// it with those that are registered.
type Standards interface {
	// Known tells whether there is a standard of that name.
	Known(name string) bool
	// Names lists them.
	Names() []string
	// Annexes lists the annexes of a standard that are known; the first is the
	// default.
	Annexes(name string) []string
	// Methods lists the methods of a standard, of which a basis must state one;
	// nil when there is one alone.
	Methods(name string) []string
	// Choices lists the words of a basis that choose a method of the standard.
	Choices(name string) []string
	// Overrides lists the numbers of a standard that a basis may replace, with
	// whether a reason must be given.
	Overrides(name string) map[string]bool
}

// builder makes the Env of a calculation.
type builder struct {
	env       *Env
	standards Standards
	files     []*lang.File
	stmts     []declared
	members   []declared
}

type declared struct {
	decl *lang.Decl
	stmt *lang.Stmt
}

// topWords are the words that may begin a declaration, for offers.
var topWords = slices.DeleteFunc(lang.WordsIn(lang.InFile), func(w string) bool { return w == "" })

// NewEnv reads what the members of a calculation share.
func NewEnv(files []*lang.File, standards Standards) *Env {
	b := &builder{env: &Env{Names: map[string]*Named{}}, standards: standards, files: files}
	b.collect()
	b.late()
	b.env.offer = namesOf(b.env.Names)
	b.basis()
	b.project()
	b.cases()
	b.exclusive()
	b.levels()
	b.materials()
	b.sections()
	b.forces()
	b.values()
	b.combinations()
	return b.env
}

func (b *builder) report(d lang.Diagnostic) { b.env.Problems = append(b.env.Problems, d) }

func (b *builder) reader(d declared) *reader {
	return &reader{env: b.env, decl: d.decl, stmt: d.stmt, args: d.stmt.Args, report: b.report, names: b.env.lookup, failed: d.stmt.Broken}
}

// collect registers every name, so that definitions may stand in any order.
func (b *builder) collect() {
	for _, f := range b.files {
		if f.Data {
			b.env.decls = append(b.env.decls, f.Decls...) // its members lean on it
			continue
		}
		for _, d := range f.Decls {
			member, other := false, false
			for _, s := range d.Stmts {
				item := declared{d, s}
				other = other || !isMember(s)
				if value, ok := s.Assigned(); ok {
					b.value(item, value)
					b.noBlock(item)
					continue
				}
				if s.Word == "case" || s.Word == "combination" || s.Word == "exclusive" || s.Word == "include" || s.Word == "forces" {
					b.noBlock(item)
				}
				switch s.Word {
				case "column", "strut", "tie":
					member = true
					b.members = append(b.members, item)
					for _, e := range memberNames(s) {
						b.name(item, e, MemberName, len(b.env.members))
					}
				case "material", "section", "case", "combination", "level":
					kind := map[string]NameKind{"material": MaterialName, "section": SectionName, "case": CaseName, "combination": CombinationName, "level": LevelName}[s.Word]
					if len(s.Args) > 0 && s.Args[0].Kind == lang.NameExpr {
						b.name(item, s.Args[0], kind, -1)
					}
					b.stmts = append(b.stmts, item)
				case "basis", "exclusive", "forces", "project":
					b.stmts = append(b.stmts, item)
				case "include":
				case "":
				default:
					b.unknown(item)
				}
			}
			if member {
				b.env.members = append(b.env.members, d)
			}
			// a line can hold a member and the basis behind it
			if other {
				b.env.decls = append(b.env.decls, d)
			}
		}
	}
}

// noBlock complains about a block behind a declaration that takes none.
func (b *builder) noBlock(d declared) {
	if s := d.stmt; s.Body != nil && !s.Broken {
		b.report(lang.Diagnostic{Decl: d.decl, Problem: lang.Problem{Rule: "left-over", Span: s.Body.Span, Message: "'" + s.Word + "' takes no block"}})
	}
}

// memberNames are the names before the title or the block of a member.
func memberNames(s *lang.Stmt) []*lang.Expr {
	var out []*lang.Expr
	for i, e := range s.Args {
		if e.Kind == lang.NameExpr && !e.Is("as") {
			out = append(out, e)
			if i+1 < len(s.Args) && s.Args[i+1].Kind == lang.CommaExpr {
				continue
			}
			break
		}
		if e.Kind != lang.CommaExpr {
			break
		}
	}
	return out
}

func (b *builder) unknown(d declared) {
	if d.stmt.Broken {
		return
	}
	p := lang.Problem{Rule: "unknown-statement", Span: d.stmt.Head, Message: "'" + d.stmt.Word + "' begins no declaration"}
	if contains(memberWords, d.stmt.Word) {
		p.Message = "'" + d.stmt.Word + "' stands outside of a member: it is said inside the braces of one"
	} else if near, sure := nearest(d.stmt.Word, topWords, 1); len(near) > 0 {
		p.Message += "; did you mean " + near[0] + "?"
		p.Fixes = append(p.Fixes, lang.Replace("Write "+near[0], sure, d.stmt.Head, near[0]))
	} else {
		p.Notes = append(p.Notes, "a declaration begins with "+lang.OrList(topWords)+", or gives a name a value: name = 5 m")
	}
	b.report(lang.Diagnostic{Decl: d.decl, Problem: p})
}

// name registers a name; the first to give it keeps it.
func (b *builder) name(d declared, e *lang.Expr, kind NameKind, index int) bool {
	place := lang.Place{Decl: d.decl, Span: e.Span}
	problem := func(message string, related ...lang.Related) {
		b.report(lang.Diagnostic{Decl: d.decl, Problem: lang.Problem{Rule: "name-given-twice", Span: e.Span, Message: message, Related: related}})
	}
	if _, taken := lang.Constants[e.Text]; taken {
		problem("'" + e.Text + "' is a constant of the language and cannot be given another meaning")
		return false
	}
	if _, taken := lang.Functions[e.Text]; taken {
		problem("'" + e.Text + "' is a function of the language and cannot be given another meaning")
		return false
	}
	if kind == ValueName && ownWords[e.Text] {
		problem("'" + e.Text + "' is a word of the language: every member has its own, and it cannot be given another meaning")
		return false
	}
	if first, twice := b.env.Names[e.Text]; twice {
		first.Twice = first.Kind != MemberName
		problem(fmt.Sprintf("'%s' is given twice: it is %s already", e.Text, first.Kind), lang.Related{Place: first.Place, Message: "given here first"})
		return false
	}
	n := &Named{Name: e.Text, Kind: kind, Place: place, Stmt: d.stmt, Index: index}
	b.env.Names[e.Text] = n
	if kind == SectionName || kind == MaterialName {
		b.env.definitions = append(b.env.definitions, n)
	}
	return true
}

// of gives the statements that begin with a word, in order.
func (b *builder) of(word string) []declared {
	var out []declared
	for _, d := range b.stmts {
		if d.stmt.Word == word {
			out = append(out, d)
		}
	}
	return out
}

// name takes the name that a declaration gives.
func (r *reader) name(what string) *lang.Expr {
	e := r.take()
	if e == nil || e.Kind != lang.NameExpr {
		span := r.stmt.Line
		if e != nil {
			span = e.Span
		}
		if e != nil && e.Kind != lang.EqualsExpr && e.Kind != lang.StringExpr {
			r.fail("wrong-form", span, "'%s' is no name: a name has letters, digits and _, and begins with a letter", clip(span.Of(r.decl.Text)))
			return nil
		}
		r.fail("wrong-form", span, "%s has a name behind the word '%s'", what, r.stmt.Word)
		return nil
	}
	return e
}

func sortStrings(s []string) {
	for i := 1; i < len(s); i++ {
		for j := i; j > 0 && s[j] < s[j-1]; j-- {
			s[j], s[j-1] = s[j-1], s[j]
		}
	}
}

// known is NaN for a value that was not given.
var unknown = math.NaN()

// refuse notes why no member can be judged; the first reason stays.
func (env *Env) refuse(why string) {
	if env.Refused == "" {
		env.Refused = why
	}
}

// MemberDecls are the declarations that describe members.
func (env *Env) MemberDecls() []*lang.Decl { return env.members }

// MarkNamed calls f for every name that the text of a member mentions. A member
// with an error was not read to its end, yet what it names is not unused.
func (env *Env) MarkNamed(m *Member, f func(*Named)) {
	if m.Stmt == nil {
		return
	}
	var stmts func(s *lang.Stmt)
	stmts = func(s *lang.Stmt) {
		for _, a := range s.Args {
			a.Walk(func(e *lang.Expr) {
				if n, ok := env.Names[e.Text]; ok && e.Kind == lang.NameExpr {
					f(n)
				}
			})
		}
		if s.Body != nil {
			for _, b := range s.Body.Stmts {
				stmts(b)
			}
		}
	}
	stmts(m.Stmt)
}
