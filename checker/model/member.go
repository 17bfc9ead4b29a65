package model

import (
	"math"
	"strings"

	"kern/lang"
	"kern/lang/unit"
)

// memberWords are the words that may begin a statement in a member's block.
var memberWords = lang.WordsIn(lang.InMember)

// DepartureRules are the rules that a member may depart from; the checker fills
// in the rules of its standards.
type DepartureRules []string

// Members reads the members that a declaration describes. The result depends on
// the Env, the declaration and the declarations it leans on with "as", and
// on the results of the members that it names.
func Members(env *Env, d *lang.Decl, known DepartureRules, results Results) []*Member {
	var out []*Member
	for _, s := range d.Stmts {
		switch s.Word {
		case "column", "strut", "tie":
			if _, assigned := s.Assigned(); !assigned {
				out = append(out, readMembers(env, d, s, known, results)...)
			}
		}
	}
	return out
}

func readMembers(env *Env, d *lang.Decl, s *lang.Stmt, known DepartureRules, results Results) []*Member {
	m := &Member{Decl: d, Stmt: s, NameSpan: s.Head, Kind: map[string]Kind{"column": Column, "strut": Strut, "tie": Tie}[s.Word],
		Height: unknown, Net: unknown, Weight: env.Basis.SelfWeight, Nominal: env.Basis.Nominal, Reduction: env.Basis.Reduction,
		Exact: env.Basis.Exact, Imperfect: env.Basis.Imperfect}
	w := &memberReader{env: env, m: m, known: known, results: results}
	r := w.reader(d, s)
	names := memberNames(s)
	if len(names) == 0 {
		if e := r.peek(); e == nil || e.Kind == lang.StringExpr {
			r.fail("wrong-form", s.Line, "a %s has a name: %s A1 { … }", s.Word, s.Word)
		} else {
			r.fail("wrong-form", e.Span, "'%s' is no name: a name has letters, digits and _, and begins with a letter", clip(e.Span.Of(d.Text)))
		}
		return nil2(m)
	}
	r.args = r.args[2*len(names)-1:]
	if e := r.peek(); e != nil && e.Kind == lang.StringExpr {
		m.Title = e.Text
		r.take()
	}
	stmts := w.inherited(r, s, 0)
	r.end()
	if s.Broken || r.failed {
		w.headless = true
		if len(m.Missing) == 0 {
			m.Missing = append(m.Missing, "its first line has an error")
		}
	}
	if s.Body == nil && m.As == nil && !r.failed {
		r.fail("wrong-form", s.Line, "a %s opens a block that says what it is made of and what it carries: { … }", s.Word)
		m.Missing = append(m.Missing, "it has no block")
		w.headless = true
	}
	w.read(stmts)
	w.complete()
	if len(m.Missing) == 0 && hurt(d, s) {
		m.Missing = append(m.Missing, "its block has an error")
	}
	var out []*Member
	owns := func(e *lang.Expr) bool {
		n := env.Names[e.Text]
		return n != nil && n.Place == lang.Place{Decl: d, Span: e.Span}
	}
	for _, e := range names {
		if !owns(e) { // the first to give a name keeps it
			m.Missing = append(m.Missing, "the name '"+clip(e.Text)+"' in its first line is given already")
		}
	}
	for i, e := range names {
		c := *m
		c.Name, c.NameSpan = e.Text, e.Span
		if i > 0 {
			c.Problems = nil // said once
		}
		if in := env.imported[e.Text]; in != nil {
			c.imports(in, w.env.Basis.Show)
		}
		out = append(out, &c)
	}
	if len(out) == 0 && len(m.Problems) > 0 {
		return nil2(m)
	}
	return out
}

// nil2 keeps the problems of a member that has no name of its own.
func nil2(m *Member) []*Member {
	m.Missing = append(m.Missing, "it has no name")
	return []*Member{m}
}

type memberReader struct {
	env       *Env
	m         *Member
	known     DepartureRules
	results   Results
	first     map[string]declared // the first statement of each word that may stand once
	said      map[string]bool     // the words of all statements, with an error or not
	chain     []*lang.Stmt        // the members that it is "as", nearest first
	asSpan    lang.Span           // the name behind "as"
	spans     func()              // works out the limits of deflection once all holds are known; nil for none
	ownHeight bool                // the member says its height itself, though it is "as" another
	// headless is set when the first line could not be read: what the member
	// lacks cannot be told then.
	headless bool
}

func (w *memberReader) reader(d *lang.Decl, s *lang.Stmt) *reader {
	return &reader{env: w.env, decl: d, stmt: s, args: s.Args, names: w.lookup, failed: s.Broken,
		report: func(diag lang.Diagnostic) {
			diag.Member = ""
			if diag.Decl != w.m.Decl {
				var news bool
				if diag, news = w.takenOver(diag); !news {
					return
				}
			}
			w.m.Problems = append(w.m.Problems, diag)
		}}
}

// lookup finds names in the member's block: its own height, then those of the
// calculation.
func (w *memberReader) lookup(e *lang.Expr) (unit.Quantity, *lang.Problem) {
	if e.Text == "height" || e.Text == "length" {
		if _, defined := w.env.Names[e.Text]; !defined {
			if math.IsNaN(w.m.Height) {
				return unit.Quantity{}, &lang.Problem{Rule: "unknown-name", Span: e.Span, Message: "the " + e.Text + " of the member is not known here"}
			}
			return unit.Quantity{Value: w.m.Height, Dim: unit.Length}, nil
		}
	}
	if strings.Contains(e.Text, ".") {
		q, p, n := w.env.Result(e, w.results)
		if n != nil {
			w.m.Uses = append(w.m.Uses, n)
		}
		if p == lang.Silent {
			w.m.Missing = append(w.m.Missing, "'"+clip(e.Text)+"' is not known")
		}
		return q, p
	}
	if n, ok := w.env.Names[e.Text]; ok {
		w.m.Uses = append(w.m.Uses, n)
	}
	if v, ok := w.env.Values.Lookup(e.Text); ok && v.Late && w.results != nil {
		q, p := w.env.lateOf(e, v, w.results)
		if p == lang.Silent {
			w.m.Missing = append(w.m.Missing, "'"+clip(e.Text)+"' is not known")
		}
		return q, p
	}
	return w.env.lookup(e)
}

// sameWord groups words that say the same thing in two ways.
func sameWord(word string) string {
	switch word {
	case "from", "length":
		return "height"
	case "reduction":
		return "reduce"
	}
	return word
}

// read goes through the statements: first what fixes the height, then the rest.
func (w *memberReader) read(stmts []declared) {
	w.first, w.said = map[string]declared{}, map[string]bool{}
	for _, d := range stmts {
		w.said[sameWord(d.stmt.Word)] = true
	}
	for _, pass := range []bool{true, false} {
		for _, d := range stmts {
			height := sameWord(d.stmt.Word) == "height"
			if height == pass {
				w.statement(d)
			}
		}
	}
}

func (w *memberReader) statement(d declared) {
	s := d.stmt
	r := w.reader(d.decl, s)
	fault := "a line in its block has an error"
	if d.decl != w.m.Decl {
		fault = "a line that it takes over has an error"
	}
	if s.Broken {
		w.m.Missing = append(w.m.Missing, fault)
		return
	}
	value, assigned := s.Assigned()
	if assigned {
		r.args = value
	}
	switch s.Word {
	case "load", "hold", "lift", "require", "depart", "note", "limit", "effective", "joints", "base", "top":
	default:
		key := sameWord(s.Word)
		if first, again := w.first[key]; again && key == "reduce" {
			r.reducedTwice(first)
			w.m.Missing = append(w.m.Missing, "how its imposed loads are reduced is said twice")
			return
		} else if again {
			r.problem(lang.Problem{Rule: "value-given-twice", Span: s.Line, Message: "'" + s.Word + "' is given twice",
				Related: []lang.Related{{Place: lang.Place{Decl: first.decl, Span: first.stmt.Line}, Message: "given here first"}}})
			w.m.Missing = append(w.m.Missing, "'"+s.Word+"' is given twice")
			return
		}
		w.first[key] = d
	}
	needsSign := map[string]bool{"section": true, "material": true, "height": true, "length": true, "effective": true, "net": true, "reduction": true}
	if needsSign[s.Word] != assigned {
		if needsSign[s.Word] {
			noSign(r)
		} else if contains(memberWords, s.Word) {
			r.problem(lang.Problem{Rule: "wrong-form", Span: s.Args[0].Span, Message: "'" + s.Word + "' takes no sign ="})
		} else {
			w.unknown(r)
		}
		w.m.Missing = append(w.m.Missing, fault)
		return
	}
	switch s.Word {
	case "section":
		w.m.Section, w.m.SectionAt = w.section(r, d)
	case "choose":
		w.choose(r)
	case "material":
		w.m.Material, w.m.MaterialAt = w.material(r)
	case "lift":
		w.lift(r, d)
	case "height", "length":
		w.m.Height, _, _ = w.height(r)
		w.m.HeightAt = r.place(s.Line)
	case "from":
		w.fromTo(r)
	case "base", "top":
		w.end(r)
	case "hold":
		w.hold(r)
	case "effective":
		w.effective(r)
	case "joints":
		w.joints(r)
	case "connected":
		w.connected(r)
	case "connectors":
		w.connectors(r)
	case "load":
		w.load(r)
	case "limit":
		w.limit(r)
	case "require":
		w.require(r)
	case "net":
		w.m.Net, _, _ = r.quantity(want{what: "the net area", dim: unit.Area, unit: "cm2", max: 10})
		w.m.NetAt = r.place(s.Line)
	case "depart":
		w.depart(r)
	case "note":
		if text, ok := r.text("the note"); ok {
			w.m.Notes = append(w.m.Notes, text)
		}
	case "moments":
		w.m.Nominal = r.moments()
	case "reduce":
		w.m.Reduction, _ = r.reduce()
	case "reduction":
		w.m.Reduction, _ = r.reduction()
	case "selfweight":
		word, _ := r.wordOf("the setting of self-weight", "on", "off")
		w.m.Weight = word != "off"
	case "critical":
		w.m.Exact = r.critical()
	case "imperfection":
		word, _ := r.wordOf("the setting of the sway imperfection", "on", "off")
		w.m.Imperfect = word == "on"
	case "":
		w.m.Missing = append(w.m.Missing, fault)
		return
	default:
		w.unknown(r)
	}
	if s.Body != nil && s.Word != "section" && s.Word != "lift" && !r.failed {
		r.fail("left-over", s.Body.Span, "'%s' takes no block", s.Word)
	}
	r.end()
	switch {
	case r.failed && r.silent && len(w.m.Missing) == 0:
		w.m.Missing = append(w.m.Missing, "what its '"+s.Word+"' line leans on has an error")
	case r.failed && !r.silent:
		w.m.Missing = append(w.m.Missing, fault)
	}
}

func (w *memberReader) unknown(r *reader) {
	p := lang.Problem{Rule: "unknown-statement", Span: r.stmt.Head, Message: "'" + r.stmt.Word + "' is nothing that a " + w.m.Kind.String() + " says"}
	if near, sure := nearest(r.stmt.Word, memberWords, 1); len(near) > 0 {
		p.Message += "; did you mean " + near[0] + "?"
		p.Fixes = append(p.Fixes, lang.Replace("Write "+near[0], sure, r.stmt.Head, near[0]))
	} else {
		p.Notes = append(p.Notes, "a "+w.m.Kind.String()+" says "+lang.OrList(memberWords))
	}
	r.problem(p)
}

func contains(list []string, s string) bool {
	for _, x := range list {
		if x == s {
			return true
		}
	}
	return false
}
