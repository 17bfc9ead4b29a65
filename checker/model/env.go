package model

import (
	"fmt"
	"math"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/lang"
	"kern/lang/unit"
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
var topWords = []string{"include", "basis", "material", "section", "case", "combination", "level", "column", "strut", "tie"}

// NewEnv reads what the members of a calculation share.
func NewEnv(files []*lang.File, standards Standards) *Env {
	b := &builder{env: &Env{Names: map[string]*Named{}}, standards: standards, files: files}
	b.collect()
	b.env.offer = namesOf(b.env.Names)
	b.basis()
	b.cases()
	b.levels()
	b.materials()
	b.sections()
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
		for _, d := range f.Decls {
			member := false
			for _, s := range d.Stmts {
				item := declared{d, s}
				if value, ok := s.Assigned(); ok {
					b.value(item, value)
					b.noBlock(item)
					continue
				}
				if s.Word == "case" || s.Word == "combination" || s.Word == "include" {
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
				case "basis":
					b.stmts = append(b.stmts, item)
				case "include":
				case "":
				default:
					b.unknown(item)
				}
			}
			if member {
				b.env.members = append(b.env.members, d)
			} else if len(d.Stmts) > 0 {
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

func (b *builder) value(d declared, value []*lang.Expr) {
	s := d.stmt
	if contains(topWords, s.Word) {
		if !s.Broken {
			p := lang.Problem{Rule: "wrong-form", Span: s.Head, Message: "a declared " + s.Word + " has a name: " + s.Word + " NAME = …"}
			if s.Word == "include" || s.Word == "basis" {
				p.Message = "'" + s.Word + "' takes no sign ="
			}
			if contains(memberWords, s.Word) {
				p.Notes = append(p.Notes, "what a member is made of is said inside its braces")
			}
			b.report(lang.Diagnostic{Decl: d.decl, Problem: p})
		}
		if s.Word == "combination" {
			b.env.refuse("a combination has an error")
		}
		return
	}
	head := &lang.Expr{Kind: lang.NameExpr, Text: s.Word, Span: s.Head}
	if !b.name(d, head, ValueName, -1) {
		return
	}
	if s.Broken {
		b.env.Names[s.Word].Bad = true
		return
	}
	r := b.reader(d)
	if len(value) == 0 {
		r.fail("missing-value", s.Line, "'%s' has no value: something must stand behind the sign =", s.Word)
		b.env.Names[s.Word].Bad = true
		return
	}
	if k := value[0].Kind; k == lang.EqualsExpr || k == lang.CommaExpr || k == lang.CompareExpr {
		r.fail("wrong-form", value[0].Span, "the value of '%s' is due here", s.Word)
		b.env.Names[s.Word].Bad = true
		return
	}
	r.args = value[1:]
	if !r.end() {
		b.env.Names[s.Word].Bad = true
		return
	}
	b.env.Values.Define(&lang.Value{Name: s.Word, Decl: d.decl, Stmt: s, Expr: value[0]})
}

// ownWords are what every member has of its own. A value of such a name would
// change, unseen, what the members say with it.
var ownWords = map[string]bool{"height": true, "length": true, "top": true, "base": true, "floor": true}

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
		problem(fmt.Sprintf("'%s' is given twice: it is %s already", e.Text, first.Kind), lang.Related{Place: first.Place, Message: "given here first"})
		return false
	}
	b.env.Names[e.Text] = &Named{Name: e.Text, Kind: kind, Place: place, Stmt: d.stmt, Index: index}
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

// lookup finds the value of a name in an expression outside members.
func (env *Env) lookup(e *lang.Expr) (unit.Quantity, *lang.Problem) {
	if d, ok := env.Values.Lookup(e.Text); ok {
		q, p := env.Values.Get(d, env.lookup)
		if p != nil {
			return q, lang.Silent
		}
		return q, nil
	}
	n, ok := env.Names[e.Text]
	switch {
	case ok && (n.Bad || n.Kind == ValueName):
		return unit.Quantity{}, lang.Silent
	case ok && n.Kind == LevelName && n.Index >= 0:
		l := env.Levels[n.Index]
		if l.Bad {
			return unit.Quantity{}, lang.Silent
		}
		return unit.Quantity{Value: l.At, Dim: unit.Length}, nil
	case ok:
		return unit.Quantity{}, &lang.Problem{Rule: "wrong-kind", Span: e.Span, Message: fmt.Sprintf("'%s' is %s, not a value", e.Text, n.Kind),
			Related: []lang.Related{{Place: n.Place, Message: "given here"}}}
	}
	return unit.Quantity{}, env.unknownName(e, "value", []NameKind{ValueName, LevelName})
}

// values evaluates every named value once, so that each problem is reported
// where it lies, used or not.
func (b *builder) values() {
	for _, f := range b.files {
		for _, d := range f.Decls {
			for _, s := range d.Stmts {
				v, ok := b.env.Values.Lookup(s.Word)
				if !ok || v.Stmt != s || v.Decl != d {
					continue
				}
				if _, p := b.env.Values.Get(v, b.env.lookup); p != nil && p.Rule != "" {
					b.report(lang.Diagnostic{Decl: d, Problem: *p})
				}
			}
		}
	}
}

// body reads a block of assignments: what may stand in it and what each takes.
// It reports unknown and repeated properties.
func (b *builder) body(what string, d declared, block *lang.Block, take map[string]func(r *reader)) bool {
	return readBody(b.reader, what, d, block, take)
}

func readBody(newReader func(declared) *reader, what string, d declared, block *lang.Block, take map[string]func(r *reader)) bool {
	ok := true
	seen := map[string]*lang.Stmt{}
	for _, s := range block.Stmts {
		r := newReader(declared{d.decl, s})
		if s.Broken {
			ok = false
			continue
		}
		value, assigned := s.Assigned()
		if assigned {
			r.args = value
		}
		f, known := take[s.Word]
		switch {
		case !known:
			var words []string
			for w := range take {
				words = append(words, w)
			}
			p := lang.Problem{Rule: "unknown-property", Span: s.Head, Message: "'" + s.Word + "' is nothing that " + lang.A(what) + " has"}
			near, sure := nearest(s.Word, words, 1)
			if len(near) > 0 {
				p.Message += "; did you mean " + near[0] + "?"
				p.Fixes = append(p.Fixes, lang.Replace("Write "+near[0], sure, s.Head, near[0]))
			} else {
				sortStrings(words)
				p.Notes = append(p.Notes, "it has "+lang.OrList(words))
			}
			r.problem(p)
		case !assigned:
			noSign(r)
		case seen[s.Word] != nil:
			twice(r, seen[s.Word])
		default:
			f(r)
			r.end()
		}
		if seen[s.Word] == nil {
			seen[s.Word] = s
		}
		ok = ok && !r.failed
	}
	return ok
}

// noSign is the problem of a property without the sign and the value, or the
// sign alone.
func noSign(r *reader) {
	s := r.stmt
	if len(s.Args) == 0 {
		r.problem(lang.Problem{Rule: "missing-value", Span: s.Line, Message: "'" + s.Word + "' has no value: " + s.Word + " = …"})
		return
	}
	if sign := s.Args[0]; sign.Kind == lang.CompareExpr && sign.Text == "==" {
		r.problem(lang.Problem{Rule: "wrong-form", Span: sign.Span, Message: "a value is given with one sign: " + s.Word + " = …",
			Fixes: []lang.Fix{lang.Replace("Write =", true, sign.Span, "=")}})
		return
	}
	r.problem(lang.Problem{Rule: "wrong-form", Span: s.Line, Message: "a sign = is missing: " + s.Word + " = …",
		Fixes: []lang.Fix{lang.Replace("Add the sign", true, lang.Span{Start: s.Head.End, End: s.Head.End}, " =")}})
}

func twice(r *reader, first *lang.Stmt) {
	r.problem(lang.Problem{Rule: "value-given-twice", Span: r.stmt.Line, Message: "'" + r.stmt.Word + "' is given twice",
		Related: []lang.Related{{Place: lang.Place{Decl: r.decl, Span: first.Line}, Message: "given here first"}}})
}

// basis reads the design basis.
func (b *builder) basis() {
	env := b.env
	env.Basis = Basis{Overrides: map[string]Override{}, Show: derivation.Units{}, SelfWeight: true}
	for i, d := range b.of("basis") {
		r := b.reader(d)
		if i > 0 {
			p := lang.Problem{Rule: "value-given-twice", Span: d.stmt.Head, Message: "a calculation has one basis", Related: []lang.Related{{Place: env.Basis.Place, Message: "the first one"}}}
			r.problem(p)
			continue
		}
		env.Basis.Stated = true
		env.Basis.Place = lang.Place{Decl: d.decl, Span: d.stmt.Head}
		r.end()
		if d.stmt.Body == nil {
			r.fail("wrong-form", d.stmt.Line, "basis opens a block: basis { standard \"…\" }")
			continue
		}
		if hurt(d.decl, d.stmt) {
			env.refuse("the basis has an error")
		}
		seen := map[string]*lang.Stmt{}
		for _, s := range d.stmt.Body.Stmts {
			r := b.reader(declared{d.decl, s})
			if first := seen[s.Word]; first != nil && s.Word != "show" {
				twice(r, first)
			} else if !s.Broken {
				seen[s.Word] = s
				b.basisStmt(r)
			}
			if r.failed && s.Word != "show" {
				// what it was to say is not known, so no member can be judged by it
				env.refuse("a line of the basis has an error")
			}
		}
	}
}

var basisWords = []string{"standard", "actions", "show", "effective", "selfweight", "strengths", "amplification",
	"gamma_M0", "gamma_M1", "gamma_M2", "gamma_G_sup", "gamma_G_inf", "gamma_Q", "factor_yield", "factor_buckling"}

func (b *builder) basisStmt(r *reader) {
	basis := &b.env.Basis
	if value, ok := r.stmt.Assigned(); ok {
		r.args = value
		b.override(r)
		return
	}
	switch r.stmt.Word {
	case "standard":
		e := r.peek()
		name, ok := r.text("the design standard")
		if !ok {
			return
		}
		basis.StandardAt = r.place(e.Span)
		if !b.standards.Known(name) {
			p := lang.Problem{Rule: "unknown-standard", Span: e.Span, Message: "'" + name + "' is no standard that kern checks to: " + lang.OrList(b.standards.Names())}
			for _, n := range closest(name, b.standards.Names(), 2) {
				p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, e.Span, `"`+n+`"`))
			}
			r.problem(p)
			return
		}
		basis.Standard = name
		if _, ok := r.word("annex"); ok {
			e := r.peek()
			annex, ok := r.text("the annex")
			if !ok {
				return
			}
			basis.Annex = annex
			known := b.standards.Annexes(name)
			found := false
			for _, k := range known {
				found = found || k == annex
			}
			if !found {
				basis.Standard = ""
				r.fail("unknown-annex", e.Span, "the annex '%s' is not known; known is %s. Other national values are given one by one: gamma_M1 = 1.1 because \"…\"", annex, lang.OrList(known))
				return
			}
		}
	case "actions":
		e := r.peek()
		name, ok := r.text("the standard of actions")
		if !ok {
			return
		}
		if name != "EN 1990:2002" {
			r.problem(lang.Problem{Rule: "unknown-standard", Span: e.Span, Message: "'" + name + "' is no standard of actions that kern combines to: \"EN 1990:2002\"",
				Fixes: []lang.Fix{lang.Replace("Write EN 1990:2002", false, e.Span, `"EN 1990:2002"`)}})
			b.env.refuse("the standard of actions is not known")
			return
		}
		basis.Actions, basis.Equation = name, "6.10"
		if _, ok := r.word("eq"); ok {
			e := r.peek()
			eq, ok := r.text("the equation")
			if ok && eq != "6.10" {
				r.fail("unknown-standard", e.Span, "equation '%s' is not known; known is 6.10. Other combinations are written out: combination NAME = 1.1 G + 0.5 W", eq)
				b.env.refuse("the equation of the combinations is not known")
			}
		}
	case "show":
		b.show(r)
		return
	case "effective":
		if _, ok := r.wordOf("what to set", "lengths"); ok {
			w, _ := r.wordOf("the effective lengths", "theoretical", "recommended")
			basis.Recommended = w == "recommended"
		}
	case "selfweight":
		w, _ := r.wordOf("the setting of self-weight", "on", "off")
		basis.SelfWeight = w != "off"
	case "strengths":
		e := r.peek()
		if from, ok := r.text("where strengths come from"); ok {
			switch from {
			case "product standard":
			case "EN 1993-1-1 Table 3.1":
				basis.TableFy = true
			default:
				r.fail("unknown-word", e.Span, "strengths come from the \"product standard\" or from \"EN 1993-1-1 Table 3.1\"")
			}
		}
	case "amplification":
		w, _ := r.wordOf("the amplification", "secant", "simple")
		basis.Simple = w == "simple"
	case "":
		return
	default:
		p := lang.Problem{Rule: "unknown-statement", Span: r.stmt.Head, Message: "'" + r.stmt.Word + "' is no part of a basis"}
		near, sure := nearest(r.stmt.Word, basisWords, 1)
		for _, n := range near {
			p.Message += "; did you mean " + n + "?"
			p.Fixes = append(p.Fixes, lang.Replace("Write "+n, sure, r.stmt.Head, n))
		}
		r.problem(p)
		return
	}
	r.end()
}

// override reads a number that replaces one of a standard.
func (b *builder) override(r *reader) {
	name := r.stmt.Word
	needs := map[string]bool{"gamma_G_sup": true, "gamma_G_inf": true, "gamma_Q": true}
	for _, s := range b.standards.Names() {
		for k, v := range b.standards.Overrides(s) {
			needs[k] = v
		}
	}
	reason, known := needs[name]
	if !known {
		var words []string
		for w := range needs {
			words = append(words, w)
		}
		sortStrings(words)
		p := lang.Problem{Rule: "unknown-property", Span: r.stmt.Head, Message: "'" + name + "' is no number that a basis can set: " + lang.OrList(words)}
		near, sure := nearest(name, words, 3)
		for _, n := range near {
			p.Fixes = append(p.Fixes, lang.Replace("Write "+n, sure && len(near) == 1, r.stmt.Head, n))
		}
		r.problem(p)
		return
	}
	v, span, ok := r.quantity(want{what: "a factor", min: 0.1, max: 20})
	if !ok {
		return
	}
	o := Override{Value: v, Place: r.place(span)}
	if r.may("because") || reason {
		if o.Because, ok = r.because(); !ok {
			return
		}
	}
	if r.end() {
		b.env.Basis.Overrides[name] = o
	}
}

// show reads the units that results are shown in.
func (b *builder) show(r *reader) {
	for {
		e := r.take()
		if e == nil {
			r.fail("missing-value", r.stmt.Line, "show names units: show kN, kNm, mm, MPa")
			return
		}
		text := e.Span.Of(r.decl.Text)
		u, err := unit.Parse(text)
		if err != nil {
			p := lang.Problem{Rule: "unknown-unit", Span: e.Span, Message: "'" + clip(text) + "' is not a unit"}
			for _, n := range unit.Nearest(text, unit.None, true, 3) {
				p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, e.Span, n))
			}
			r.problem(p)
			return
		}
		b.env.Basis.Show[u.Dim] = u
		if c := r.peek(); c == nil || c.Kind != lang.CommaExpr {
			r.end()
			return
		}
		r.take()
	}
}

// cases reads the load cases.
func (b *builder) cases() {
	env := b.env
	for _, d := range b.of("case") {
		r := b.reader(d)
		name := r.name("a load case")
		if name == nil {
			continue
		}
		c := &Case{Place: r.place(name.Span)}
		c.Name = name.Text
		n := env.Names[c.Name]
		if n == nil || n.Stmt != d.stmt {
			continue // given twice, or a word that the language has taken
		}
		n.Index = len(env.Cases)
		env.Cases = append(env.Cases, c)
		kind, ok := r.wordOf("the kind of action", "permanent", "imposed", "snow", "wind", "temperature")
		if !ok {
			c.Bad = true
			continue
		}
		c.Kind = action.KindNames[kind]
		if e := r.peek(); e != nil && e.Kind == lang.StringExpr {
			r.take()
			c.Given = e.Text
			c.Category, ok = category(c.Kind, e.Text)
			switch {
			case ok:
			case c.Kind == action.Imposed || c.Kind == action.Snow:
				r.fail("unknown-category", e.Span, "'%s' is no category of %s action: %s", e.Text, lang.A(kind), categories[c.Kind])
			default:
				r.problem(lang.Problem{Rule: "unknown-category", Span: e.Span, Message: lang.A(kind) + " action has no category",
					Fixes: []lang.Fix{lang.Replace("Remove it", false, e.Span, "")}})
			}
		}
		r.end()
		c.Bad = r.failed
		if env.Basis.Actions != "" && !c.Bad && c.Kind != action.Permanent {
			if _, ok := c.Psi0(); !ok {
				c.Bad = true
				r.problem(lang.Problem{Rule: "missing-category", Span: name.Span, Message: fmt.Sprintf("the case '%s' needs a category for the combinations of %s: %s", c.Name, env.Basis.Actions, categories[c.Kind]),
					Fixes: []lang.Fix{lang.Replace("Add a category", false, lang.Span{Start: d.stmt.Line.End, End: d.stmt.Line.End}, map[action.Kind]string{action.Imposed: ` "B"`, action.Snow: ` "below 1000 m"`}[c.Kind])}})
			}
		}
	}
	if len(env.Cases) == 0 {
		c := &Case{}
		c.Name = "load"
		env.Cases = append(env.Cases, c)
	}
	env.caseNames = make([]*Named, len(env.Cases)+1)
	for i, c := range env.Cases {
		env.caseNames[i] = env.Names[c.Name]
	}
	env.SelfWeight = -1
	for i, c := range env.Cases {
		if c.Kind == action.Permanent && !c.Bad {
			env.SelfWeight = i
			break
		}
	}
	if env.SelfWeight < 0 {
		c := &Case{}
		c.Name = "selfweight"
		env.SelfWeight = len(env.Cases)
		env.Cases = append(env.Cases, c)
	}
}

// Declared tells whether the calculation declares load cases of its own.
func (env *Env) Declared() bool {
	return len(env.Cases) > 0 && env.Cases[0].Place.Decl != nil
}

var categories = map[action.Kind]string{
	action.Permanent: "it has none",
	action.Imposed:   `"A" homes, "B" offices, "C1" to "C5" congregation, "D1", "D2" shops, "E1", "E2" storage, "F", "G" vehicles, "H" roofs (EN 1990 Table A1.1)`,
	action.Snow:      `"below 1000 m" or "above 1000 m" (height above sea level, EN 1990 Table A1.1)`,
	action.Wind:      "it has none", action.Temperature: "it has none",
}

// category reads a category of EN 1990 Table A1.1, with the subdivisions of EN
// 1991-1-1 Tables 6.1 and 6.3.
func category(kind action.Kind, text string) (string, bool) {
	switch kind {
	case action.Imposed:
		switch text {
		case "A", "B", "C", "C1", "C2", "C3", "C4", "C5", "D", "D1", "D2", "E", "E1", "E2", "F", "G", "H":
			return text[:1], true
		}
	case action.Snow:
		if text == action.SnowLow || text == action.SnowHigh {
			return text, true
		}
	}
	return "", false
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

// levels reads the levels of the building.
func (b *builder) levels() {
	env := b.env
	for _, d := range b.of("level") {
		r := b.reader(d)
		name := r.name("a level")
		if name == nil {
			continue
		}
		n := env.Names[name.Text]
		if n == nil || n.Stmt != d.stmt {
			continue // given twice, or a word that the language has taken
		}
		l := &Level{Name: name.Text, Place: r.place(name.Span)}
		if _, ok := r.wordOf("the height of the level", "at"); ok {
			l.At, _, _ = r.quantity(want{what: "the height of a level", dim: unit.Length, unit: "m", max: 1000, signed: true, zero: true})
		}
		r.end()
		l.Bad = r.failed || hurt(d.decl, d.stmt)
		n.Index = len(env.Levels)
		env.Levels = append(env.Levels, l)
		if d.stmt.Body == nil {
			continue
		}
		for _, s := range d.stmt.Body.Stmts {
			r := b.reader(declared{d.decl, s})
			c, known := env.Names[s.Word]
			if s.Broken {
				l.Bad = true
				continue
			}
			if !known || c.Kind != CaseName || c.Index < 0 {
				e := &lang.Expr{Kind: lang.NameExpr, Text: s.Word, Span: s.Head}
				r.problem(*env.unknownName(e, "load case", []NameKind{CaseName}))
				l.Bad = true
				continue
			}
			v, _, ok := r.quantity(want{what: "a load on a floor", dim: unit.Stress, unit: "kN/m2", max: 1e7, min: 0.1, signed: true, zero: true})
			if ok && r.end() {
				l.Pressures = append(l.Pressures, Pressure{Case: c.Index, Value: v, Place: r.place(s.Line)})
			} else {
				l.Bad = true
			}
		}
	}
}

// combinations reads the combinations that are written out and makes those of
// the basis.
func (b *builder) combinations() {
	env := b.env
	plain := make([]action.Case, len(env.Cases))
	for i, c := range env.Cases {
		plain[i] = c.Case
	}
	for _, d := range b.of("combination") {
		r := b.reader(d)
		name := r.name("a combination")
		if name == nil {
			env.refuse("a combination has an error")
			continue
		}
		n := env.Names[name.Text]
		if n == nil || n.Stmt != d.stmt {
			continue // given twice, or a word that the language has taken
		}
		// a combination that was meant and cannot be read leaves members
		// undecided: without it they would be checked for less than was asked
		refused := "the combination '" + name.Text + "' has an error"
		if e := r.take(); e == nil || e.Kind != lang.EqualsExpr {
			r.fail("wrong-form", r.stmt.Line, "a combination is a sum of cases: combination %s = 1.1 G + 0.5 W", name.Text)
			env.refuse(refused)
			continue
		}
		e := r.take()
		if e == nil {
			r.fail("missing-value", r.stmt.Line, "a combination is a sum of cases: combination %s = 1.1 G + 0.5 W", name.Text)
			env.refuse(refused)
			continue
		}
		factors := make([]float64, len(env.Cases))
		if !b.sum(r, e, 1, factors) || !r.end() {
			env.refuse(refused)
			continue
		}
		c := Combination{Label: name.Text, Place: r.place(name.Span)}
		c.Factors, c.Source = factors, "combination "+name.Text
		if env.Cases[env.SelfWeight].Place.Decl == nil && factors[env.SelfWeight] == 0 {
			factors[env.SelfWeight] = 1
		}
		c.Name = name.Text + ": " + action.Sum(plain, factors)
		n.Index = len(env.Combinations)
		env.Combinations = append(env.Combinations, c)
	}
	if env.Basis.Actions == "" {
		if len(env.Combinations) > 0 || env.Refused != "" {
			return
		}
		factors := make([]float64, len(plain))
		for i := range factors {
			factors[i] = 1
		}
		c := Combination{}
		c.Name, c.Factors, c.Source = action.Sum(plain, factors), factors, "sum of all cases"
		if !env.Declared() {
			c.Name = "all loads"
		}
		env.Automatic = []Combination{c}
		return
	}
	if env.Refused != "" {
		return
	}
	if !env.Declared() {
		env.Refused = "the calculation names no load cases"
		return
	}
	f := action.Recommended
	for name, at := range map[string]*float64{"gamma_G_sup": &f.GSup, "gamma_G_inf": &f.GInf, "gamma_Q": &f.Q} {
		if o, ok := env.Basis.Overrides[name]; ok {
			*at = o.Value
		}
	}
	// a case with an error takes no part: a member that has a load of it is
	// undecided for that load, and the others are what they are without it
	var good []action.Case
	var at []int
	for i, c := range env.Cases {
		if !c.Bad {
			good, at = append(good, c.Case), append(at, i)
		}
	}
	made, ok := action.Persistent(good, f)
	if !ok {
		env.Refused = fmt.Sprintf("there are more than %d variable cases", action.MaxVariable)
		c := env.Cases[len(env.Cases)-1]
		b.report(lang.Diagnostic{Decl: env.Cases[0].Place.Decl, Problem: lang.Problem{Rule: "too-many-cases", Span: env.Cases[0].Place.Span,
			Message: fmt.Sprintf("the calculation has more than %d variable cases: combinations are made for so many only; write them out", action.MaxVariable),
			Related: []lang.Related{{Place: c.Place, Message: "the last case"}}}})
		return
	}
	for _, m := range made {
		factors := make([]float64, len(env.Cases))
		for i, factor := range m.Factors {
			factors[at[i]] = factor
		}
		m.Factors = factors
		env.Automatic = append(env.Automatic, Combination{Combination: m})
	}
}

// hurt tells whether the text of a statement has a problem that belongs to none
// of its lines, such as a block that is not closed: what it was to say is then
// not known for certain.
func hurt(d *lang.Decl, s *lang.Stmt) bool {
	for _, p := range d.Problems {
		if p.Severity == lang.Error && s.Span.Start <= p.Span.Start && p.Span.Start < s.Span.End {
			return true
		}
	}
	return false
}

// sum reads "1.1 G + 0.5 W - Q": a name after a number is a case, not a unit.
func (b *builder) sum(r *reader, e *lang.Expr, sign float64, factors []float64) bool {
	caseAt := func(name string, span lang.Span) (int, bool) {
		n, ok := b.env.Names[name]
		if ok && n.Kind == CaseName && n.Index >= 0 {
			if b.env.Cases[n.Index].Bad {
				r.failed = true
				return 0, false
			}
			return n.Index, true
		}
		r.problem(*b.env.unknownName(&lang.Expr{Kind: lang.NameExpr, Text: name, Span: span}, "load case", []NameKind{CaseName}))
		return 0, false
	}
	switch e.Kind {
	case lang.ParenExpr:
		return b.sum(r, e.Args[0], sign, factors)
	case lang.UnaryExpr:
		if e.Op == '-' {
			sign = -sign
		}
		return b.sum(r, e.Args[0], sign, factors)
	case lang.NameExpr:
		i, ok := caseAt(e.Text, e.Span)
		if ok {
			factors[i] += sign
		}
		return ok
	case lang.QuantExpr:
		i, ok := caseAt(e.Text, e.UnitSpan())
		if ok {
			factors[i] += sign * e.Value
		}
		return ok
	case lang.BinaryExpr:
		switch e.Op {
		case '+':
			return b.sum(r, e.Args[0], sign, factors) && b.sum(r, e.Args[1], sign, factors)
		case '-':
			return b.sum(r, e.Args[0], sign, factors) && b.sum(r, e.Args[1], -sign, factors)
		case '*':
			if name := e.Args[1]; name.Kind == lang.NameExpr {
				q, p := lang.Eval(e.Args[0], b.env.lookup)
				if p != nil {
					r.problem(*p)
					return false
				}
				i, ok := caseAt(name.Text, name.Span)
				if ok && q.Dim.IsNone() {
					factors[i] += sign * q.Value
					return true
				}
				if !ok {
					return false
				}
			}
		}
	}
	r.fail("wrong-form", e.Span, "a combination is a sum of cases with their factors: 1.1 G + 0.5 W")
	return false
}

// All are the combinations that members are checked for.
func (env *Env) All() []Combination {
	return append(append([]Combination(nil), env.Automatic...), env.Combinations...)
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
