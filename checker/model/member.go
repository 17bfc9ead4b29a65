package model

import (
	"fmt"
	"math"
	"slices"
	"sort"
	"strings"

	"kern/checker/action"
	"kern/lang"
	"kern/lang/unit"
)

// memberWords are the words that may begin a statement in a member's block.
var memberWords = []string{"section", "material", "height", "length", "from", "base", "top", "hold", "effective", "load", "limit",
	"require", "depart", "note", "selfweight"}

// DepartureRules are the rules that a member may depart from; the checker fills
// in the rules of its standards.
type DepartureRules []string

// Members reads the members that a declaration describes. The result depends on
// the Env, the declaration and the declarations it leans on with "as", and on
// nothing else.
func Members(env *Env, d *lang.Decl, known DepartureRules) []*Member {
	var out []*Member
	for _, s := range d.Stmts {
		switch s.Word {
		case "column", "strut", "tie":
			if _, assigned := s.Assigned(); !assigned {
				out = append(out, readMembers(env, d, s, known)...)
			}
		}
	}
	return out
}

func readMembers(env *Env, d *lang.Decl, s *lang.Stmt, known DepartureRules) []*Member {
	m := &Member{Decl: d, Stmt: s, NameSpan: s.Head, Kind: map[string]Kind{"column": Column, "strut": Strut, "tie": Tie}[s.Word],
		Height: unknown, Weight: env.Basis.SelfWeight}
	w := &memberReader{env: env, m: m, known: known}
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
	first     map[string]declared // the first statement of each word that may stand once
	said      map[string]bool     // the words of all statements, with an error or not
	chain     []*lang.Stmt        // the members that it is "as", nearest first
	asSpan    lang.Span           // the name behind "as"
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

// takenOver moves a problem of a line that the member takes over to where it
// says so: the line is right where it stands. It is false when the line's own
// member has the same problem and reports it.
func (w *memberReader) takenOver(d lang.Diagnostic) (lang.Diagnostic, bool) {
	if !w.ownHeight || d.Rule != "level-without-levels" && d.Rule != "outside-the-member" {
		return d, false
	}
	p := lang.Problem{Rule: d.Rule, Span: w.asSpan, Message: "a line that is taken over does not fit: " + d.Message,
		Related: []lang.Related{{Place: lang.Place{Decl: d.Decl, Span: d.Span}, Message: "the line"}}}
	return lang.Diagnostic{Decl: w.m.Decl, Problem: p}, true
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
	if n, ok := w.env.Names[e.Text]; ok {
		w.m.Uses = append(w.m.Uses, n)
	}
	return w.env.lookup(e)
}

// inherited gives the statements of the member: its own, and those of the
// member it is "as", unless it says anything with the same word.
func (w *memberReader) inherited(r *reader, s *lang.Stmt, depth int) []declared {
	var own []declared
	said := map[string]bool{}
	if s.Body != nil {
		for _, b := range s.Body.Stmts {
			own = append(own, declared{r.decl, b})
			said[sameWord(b.Word)] = true
		}
	}
	if _, ok := r.word("as"); !ok {
		return own
	}
	e := r.take()
	if e == nil || e.Kind != lang.NameExpr {
		r.fail("wrong-form", r.after(), "'as' names the member to be like")
		w.m.Missing = append(w.m.Missing, "the member to be like is not named")
		return own
	}
	n, ok := w.env.Names[e.Text]
	switch {
	case !ok || n.Kind != MemberName:
		r.problem(*w.env.unknownName(e, "member", []NameKind{MemberName}))
	case depth == 0 && w.circle(s) != "":
		r.fail("defined-by-itself", e.Span, "a member cannot be like itself: %s", w.circle(s))
	case slices.Contains(w.chain, n.Stmt):
		r.problem(*lang.Silent) // the circle is reported where it closes
	case depth >= maxLikeness:
		r.fail("defined-by-itself", e.Span, "more than %d members lean on one another in a row", maxLikeness)
	default:
		w.chain = append(w.chain, n.Stmt)
		if depth == 0 {
			w.asSpan, w.ownHeight = e.Span, said["height"]
		}
		w.m.Uses = append(w.m.Uses, n)
		if w.m.As == nil {
			w.m.As = n.Place.Decl
		}
		base := *r
		base.decl, base.stmt = n.Place.Decl, n.Stmt
		base.args = n.Stmt.Args[2*len(memberNames(n.Stmt))-1:]
		if len(base.args) > 0 && base.args[0].Kind == lang.StringExpr {
			base.args = base.args[1:]
		}
		from := w.inherited(&base, n.Stmt, depth+1)
		if n.Stmt.Broken || hurt(n.Place.Decl, n.Stmt) {
			w.m.Missing = append(w.m.Missing, "'"+e.Text+"' has an error")
		}
		if base.failed {
			r.failed = true
		}
		var out []declared
		for _, b := range from {
			if !said[sameWord(b.stmt.Word)] {
				out = append(out, b)
			}
		}
		return append(out, own...)
	}
	w.m.Missing = append(w.m.Missing, "the member to be like is not known")
	return own
}

// maxLikeness bounds how many members may lean on one another in a row.
const maxLikeness = 100

// circle writes the chain of members that leads from a member back to itself,
// "A → B → A"; "" when it does not.
func (w *memberReader) circle(s *lang.Stmt) string {
	seen := []*lang.Stmt{s}
	var names []string
	for len(seen) <= maxLikeness {
		last := seen[len(seen)-1]
		own := memberNames(last)
		i := slices.IndexFunc(last.Args, func(e *lang.Expr) bool { return e.Is("as") })
		if len(own) == 0 || i < 0 || i+1 >= len(last.Args) {
			return ""
		}
		if len(names) == 0 {
			names = append(names, own[0].Text)
		}
		n := w.env.Names[last.Args[i+1].Text]
		switch {
		case n == nil || n.Kind != MemberName:
			return ""
		case n.Stmt == s:
			if len(names) > 6 {
				names = append(names[:6], "…")
			}
			return strings.Join(append(names, names[0]), " → ")
		case slices.Contains(seen, n.Stmt):
			return "" // the circle lies further on
		}
		seen, names = append(seen, n.Stmt), append(names, n.Name)
	}
	return ""
}

// sameWord groups words that say the same thing in two ways.
func sameWord(word string) string {
	if word == "from" || word == "length" {
		return "height"
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
	case "load", "hold", "require", "depart", "note", "limit", "effective", "base", "top":
	default:
		key := sameWord(s.Word)
		if first, again := w.first[key]; again {
			r.problem(lang.Problem{Rule: "value-given-twice", Span: s.Line, Message: "'" + s.Word + "' is given twice",
				Related: []lang.Related{{Place: lang.Place{Decl: first.decl, Span: first.stmt.Line}, Message: "given here first"}}})
			w.m.Missing = append(w.m.Missing, "'"+s.Word+"' is given twice")
			return
		}
		w.first[key] = d
	}
	needsSign := map[string]bool{"section": true, "material": true, "height": true, "length": true, "effective": true}
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
		w.section(r, d)
	case "material":
		w.material(r)
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
	case "load":
		w.load(r)
	case "limit":
		w.limit(r)
	case "require":
		w.require(r)
	case "depart":
		w.depart(r)
	case "note":
		if text, ok := r.text("the note"); ok {
			w.m.Notes = append(w.m.Notes, text)
		}
	case "selfweight":
		word, _ := r.wordOf("the setting of self-weight", "on", "off")
		w.m.Weight = word != "off"
	case "":
		w.m.Missing = append(w.m.Missing, fault)
		return
	default:
		w.unknown(r)
	}
	if s.Body != nil && s.Word != "section" && !r.failed {
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

func (w *memberReader) section(r *reader, d declared) {
	w.m.SectionAt = r.place(r.stmt.Line)
	e := r.peek()
	if e != nil && e.Kind == lang.NameExpr && (d.stmt.Body == nil || w.env.Names[e.Text] != nil) {
		if contains(shapeWords, e.Text) && w.env.Names[e.Text] == nil {
			r.fail("wrong-form", r.stmt.Line, "a %s has a block with its dimensions: %s", e.Text, shapeForms[e.Text])
			return
		}
		n, ok := w.env.Names[e.Text]
		if p, found := r.inQuotes("a section of the catalogue", inCatalogue); found && !ok {
			r.problem(p)
			return
		}
		r.take()
		w.m.SectionAt = r.place(e.Span)
		if !ok || n.Kind != SectionName || n.Index < 0 {
			w.wrongName(r, e, n, "section", SectionName)
			return
		}
		if d.stmt.Body != nil {
			r.fail("left-over", d.stmt.Body.Span, "a section that is given by its name takes no block")
			return
		}
		w.m.Uses = append(w.m.Uses, n)
		w.m.Section = w.env.Sections[n.Index]
		if w.m.Section.Bad {
			w.m.Missing = append(w.m.Missing, "its section '"+e.Text+"' has an error")
		}
		return
	}
	s := &Section{Name: w.m.Name, Place: r.place(r.stmt.Line)}
	if s.Name == "" {
		s.Name = "section"
	}
	if readSection(r, func(d declared) *reader { return w.reader(d.decl, d.stmt) }, d, s) {
		w.m.Section = s
	}
}

// wrongName reports a name that is unknown or stands for something else.
func (w *memberReader) wrongName(r *reader, e *lang.Expr, n *Named, what string, kind NameKind) {
	if n != nil && (n.Bad || n.Kind == kind) {
		r.problem(*lang.Silent)
		return
	}
	if n != nil {
		r.problem(lang.Problem{Rule: "wrong-kind", Span: e.Span, Message: fmt.Sprintf("'%s' is %s, not a %s", e.Text, n.Kind, what),
			Related: []lang.Related{{Place: n.Place, Message: "given here"}}})
		return
	}
	r.problem(*w.env.unknownName(e, what, []NameKind{kind}))
}

func (w *memberReader) material(r *reader) {
	w.m.MaterialAt = r.place(r.stmt.Line)
	e := r.peek()
	if e != nil && e.Kind == lang.StringExpr {
		m := &Material{Name: e.Text, Place: r.place(e.Span)}
		if readGrade(r, m) {
			w.m.Material = m
		}
		return
	}
	if e == nil || e.Kind != lang.NameExpr {
		r.fail("wrong-form", r.after(), "a material is a name or a grade in quotes: material = s355, or material = \"S355\"")
		return
	}
	n, ok := w.env.Names[e.Text]
	if p, found := r.inQuotes("a steel grade", isGrade); found && !ok {
		r.problem(p)
		return
	}
	r.take()
	w.m.MaterialAt = r.place(e.Span)
	if !ok || n.Kind != MaterialName || n.Index < 0 {
		w.wrongName(r, e, n, "material", MaterialName)
		return
	}
	w.m.Uses = append(w.m.Uses, n)
	w.m.Material = w.env.Materials[n.Index]
	if w.m.Material.Bad {
		w.m.Missing = append(w.m.Missing, "its material '"+e.Text+"' has an error")
	}
}

func (w *memberReader) height(r *reader) (float64, lang.Span, bool) {
	return r.quantity(want{what: "the " + r.stmt.Word, dim: unit.Length, unit: "m", min: 0.05, max: 200})
}

// level gives the height above datum of a level or of an expression.
func (w *memberReader) fromTo(r *reader) {
	w.m.HeightAt = r.place(r.stmt.Line)
	place := want{what: "a level or height", dim: unit.Length, unit: "m", max: 2000, signed: true, zero: true}
	from, _, ok := r.quantity(place)
	if !ok {
		return
	}
	if _, ok := r.wordOf("the upper end", "to"); !ok {
		return
	}
	to, span, ok := r.quantity(place)
	if !ok {
		return
	}
	if h := to - from; h < 0.05 || h > 200 {
		r.fail("impossible-value", span, "from %s m to %s m is no height of a member", unit.Short(from, 4), unit.Short(to, 4))
		return
	}
	w.m.From, w.m.Height = from, to-from
}

func (w *memberReader) axis(r *reader) (Axis, bool) {
	word, ok := r.wordOf("the axis", "major", "minor")
	return map[string]Axis{"major": Major, "minor": Minor}[word], ok
}

func (w *memberReader) end(r *reader) {
	word, ok := r.wordOf("the end condition", "pinned", "fixed", "free", "guided")
	if !ok {
		return
	}
	end := action.EndNames[word]
	axes := []Axis{Major, Minor}
	key := r.stmt.Word
	if _, about := r.word("about"); about {
		a, ok := w.axis(r)
		if !ok {
			return
		}
		axes = []Axis{a}
	}
	for _, a := range axes {
		k := key + " about " + a.String()
		if first, again := w.first[k]; again {
			r.problem(lang.Problem{Rule: "value-given-twice", Span: r.stmt.Line, Message: "the end condition " + k + " is given twice",
				Related: []lang.Related{{Place: lang.Place{Decl: first.decl, Span: first.stmt.Line}, Message: "given here first"}}})
			return
		}
		w.first[k] = declared{r.decl, r.stmt}
		if key == "base" {
			w.m.Base[a] = end
		} else {
			w.m.Top[a] = end
		}
	}
}

// placeOf names the height at which something stands.
func placeOf(what string) string {
	if strings.HasPrefix(what, "a ") {
		return "the place of " + what
	}
	return what
}

// place reads a height on the member: "top", "base", a level, a height above
// the base. A level counts from datum, everything else from the base.
func (w *memberReader) place(r *reader, what string) (float64, lang.Span, bool) {
	if e := r.peek(); e != nil && e.Kind == lang.NameExpr {
		if (e.Is("top") || e.Is("base")) && w.env.Names[e.Text] == nil {
			r.take()
			if math.IsNaN(w.m.Height) {
				return 0, e.Span, true // reported where the height is missing
			}
			return map[bool]float64{true: w.m.Height}[e.Is("top")], e.Span, true
		}
	}
	e := r.peek()
	if e != nil && e.Kind == lang.NameExpr && w.env.Names[e.Text] == nil {
		if _, constant := lang.Constants[e.Text]; !constant && e.Text != "height" && e.Text != "length" {
			r.problem(*w.env.unknownName(e, "level or place", []NameKind{ValueName, LevelName}, "top", "base"))
			return 0, e.Span, false
		}
	}
	v, span, ok := r.quantity(want{what: placeOf(what), dim: unit.Length, unit: "m", max: 2000, signed: true, zero: true})
	if !ok {
		return 0, span, false
	}
	fromDatum := false
	e.Walk(func(x *lang.Expr) {
		if n := w.env.Names[x.Text]; x.Kind == lang.NameExpr && n != nil && n.Kind == LevelName {
			fromDatum = true
		}
	})
	if fromDatum {
		if d, ok := w.first["height"]; !ok || d.stmt.Word != "from" {
			r.fail("level-without-levels", span, "a level can be named only in a member that stands between levels: from … to …")
			return 0, span, false
		}
		v -= w.m.From
	}
	if math.IsNaN(w.m.Height) {
		return v, span, true
	}
	if h := w.m.Height; v < -1e-9*h || v > h*(1+1e-9) {
		r.fail("outside-the-member", span, "%s at %s m lies outside the member, which is %s m high", what, unit.Short(v, 4), unit.Short(h, 4))
		return 0, span, false
	}
	return min(max(v, 0), w.m.Height), span, true
}

func (w *memberReader) hold(r *reader) {
	word, ok := r.wordOf("what the hold restrains", "major", "minor", "both", "twist")
	if !ok {
		return
	}
	if _, ok := r.wordOf("the place of the hold", "at"); !ok {
		return
	}
	at, span, ok := w.place(r, "a hold")
	if !ok || math.IsNaN(w.m.Height) {
		return
	}
	if at < 1e-6*w.m.Height || at > w.m.Height*(1-1e-6) {
		r.fail("outside-the-member", span, "a hold stands between the ends; what holds an end is said by base and top")
		return
	}
	for _, h := range w.m.Holds {
		if math.Abs(h.At-at) < 1e-6*w.m.Height && (h.Major && word != "minor" && word != "twist" || h.Minor && word != "major" && word != "twist" || h.Twist && word == "twist") {
			r.problem(lang.Problem{Rule: "value-given-twice", Span: r.stmt.Line, Message: "the member is held here already",
				Related: []lang.Related{{Place: h.Place, Message: "by this hold"}}})
			return
		}
	}
	w.m.Holds = append(w.m.Holds, Hold{At: at, Major: word == "major" || word == "both", Minor: word == "minor" || word == "both", Twist: word == "twist", Place: r.place(r.stmt.Line)})
}

func (w *memberReader) effective(r *reader) {
	k, span, ok := r.quantity(want{what: "an effective length factor", min: 0.1, max: 10})
	if !ok {
		return
	}
	axes := []int{0, 1}
	if _, about := r.word("about"); about {
		word, ok := r.wordOf("the axis", "major", "minor", "twist")
		if !ok {
			return
		}
		axes = []int{map[string]int{"major": 0, "minor": 1, "twist": 2}[word]}
	}
	for _, a := range axes {
		if w.m.Factor[a] != 0 {
			r.fail("value-given-twice", span, "the effective length factor about this axis is given twice")
			return
		}
		w.m.Factor[a] = k
	}
}

func (w *memberReader) limit(r *reader) {
	e := r.peek()
	word, ok := r.wordOf("what to limit", "utilisation", "slenderness", "sway")
	if !ok {
		return
	}
	at := r.place(r.stmt.Line)
	if s := r.take(); s == nil || s.Kind != lang.EqualsExpr {
		r.fail("wrong-form", e.Span, "a limit has a value: limit %s = …", word)
		return
	}
	double := false
	switch word {
	case "utilisation":
		double = w.m.Limits.Utilisation != 0
		w.m.Limits.Utilisation, _, _ = r.quantity(want{what: "the limit of utilisation", min: 0.01, max: 1})
		w.m.Limits.UtilisationAt = at
	case "slenderness":
		double = w.m.Limits.Slenderness != 0
		w.m.Limits.Slenderness, _, _ = r.quantity(want{what: "the limit of slenderness", min: 5, max: 1000})
		w.m.Limits.SlendernessAt = at
	case "sway":
		double = w.m.Limits.Sway != 0
		w.m.Limits.Sway, _, _ = r.quantity(want{what: "the limit of sway", dim: unit.Length, unit: "mm", max: 10})
		w.m.Limits.SwayAt = at
	}
	if double {
		r.fail("value-given-twice", r.stmt.Line, "the limit of %s is given twice", word)
	}
}

func (w *memberReader) require(r *reader) {
	e := r.take()
	if e == nil || e.Kind != lang.NameExpr {
		r.fail("wrong-form", r.after(), "require names a result: require N_b_minor >= 400 kN because \"…\"")
		return
	}
	q := Require{Symbol: e.Text, SymbolAt: e.Span, Place: r.place(r.stmt.Line)}
	c := r.take()
	if c == nil || c.Kind != lang.CompareExpr || c.Text == "==" || c.Text == "!=" {
		span := e.Span
		if c != nil {
			span = c.Span
		}
		r.fail("wrong-form", span, "require compares with < <= > or >=: require N_b_minor >= 400 kN because \"…\"")
		return
	}
	q.Compare = c.Text
	v := r.take()
	if v == nil {
		r.fail("missing-value", r.stmt.Line, "require lacks the value to compare with")
		return
	}
	val, p := lang.Eval(v, w.lookup)
	if p != nil {
		r.problem(*p)
		return
	}
	q.Quantity, q.Value = val, v
	if r.may("because") {
		var ok bool
		if q.Because, ok = r.because(); !ok {
			return
		}
	}
	if r.end() {
		w.m.Requires = append(w.m.Requires, q)
	}
}

func (w *memberReader) depart(r *reader) {
	e := r.take()
	if e == nil || e.Is("because") {
		r.fail("wrong-form", r.stmt.Line, "depart names a check: depart slenderness because \"…\"")
		return
	}
	span := e.Span
	written := e.Span.Of(r.decl.Text)
	if e.Kind == lang.StringExpr {
		written = e.Text
	}
	// a rule's name has hyphens, which read as minus signs
	rule := strings.Join(strings.Fields(written), "")
	if e.Kind == lang.StringExpr && contains(w.known, rule) {
		r.problem(unquoted(e, "a check"))
		return
	}
	if !contains(w.known, rule) {
		p := lang.Problem{Rule: "unknown-rule", Span: span, Message: "'" + clip(rule) + "' is no check that a member can depart from"}
		near := closest(rule, w.known, 2)
		if len(near) > 0 {
			p.Message += "; did you mean " + lang.OrList(near) + "?"
		}
		for _, n := range near {
			p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, span, n))
		}
		p.Notes = append(p.Notes, "`kern rules` lists the checks")
		r.problem(p)
		return
	}
	because, ok := r.because()
	if ok && r.end() {
		w.m.Departs = append(w.m.Departs, Departure{Rule: rule, Because: because, Place: r.place(r.stmt.Line)})
	}
}

// complete looks for what the member lacks and states what is assumed.
func (w *memberReader) complete() {
	m := w.m
	missing := func(fix, what string) {
		if len(m.Missing) > 0 && (w.headless || w.said[what]) {
			return // reported where it lies
		}
		if len(m.Missing) == 0 {
			p := lang.Problem{Rule: "missing-value", Span: m.Stmt.Line, Message: "the " + m.Kind.String() + " has no " + what}
			if m.Stmt.Body != nil && fix != "" {
				at := lang.Span{Start: m.Stmt.Body.Span.Start + 1, End: m.Stmt.Body.Span.Start + 1}
				p.Fixes = append(p.Fixes, lang.Replace("Add "+what, false, at, "\n    "+fix))
			}
			m.Problems = append(m.Problems, lang.Diagnostic{Decl: m.Decl, Problem: p})
		}
		m.Missing = append(m.Missing, "it has no "+what)
	}
	if m.Section == nil {
		missing("section = \"HEB 160\"", "section")
	}
	if m.Material == nil {
		missing("material = \"S355\"", "material")
	}
	if math.IsNaN(m.Height) || m.Height == 0 {
		m.Height = unknown
		missing("height = 3 m", "height")
	}
	sort.SliceStable(m.Holds, func(i, j int) bool { return m.Holds[i].At < m.Holds[j].At })
	for _, a := range []Axis{Major, Minor} {
		_, base := w.first["base about "+a.String()]
		_, top := w.first["top about "+a.String()]
		switch {
		case !base && !top:
			m.Assumed = append(m.Assumed, "pinned at both ends about "+a.String())
		case !base:
			m.Assumed = append(m.Assumed, "pinned at the base about "+a.String())
		case !top:
			m.Assumed = append(m.Assumed, "pinned at the top about "+a.String())
		}
	}
	if len(m.Assumed) == 2 && strings.TrimSuffix(m.Assumed[0], "major") == strings.TrimSuffix(m.Assumed[1], "minor") {
		m.Assumed = []string{strings.TrimSuffix(m.Assumed[0], " about major")}
	}
	if m.Kind != Column && m.Weight {
		m.Weight = false
		m.Assumed = append(m.Assumed, "self-weight of the "+m.Kind.String()+" not counted (its slope is not known)")
	}
	if len(m.Loads) == 0 && len(m.Missing) == 0 {
		m.Problems = append(m.Problems, lang.Diagnostic{Decl: m.Decl, Problem: lang.Problem{Rule: "member-without-load", Severity: lang.Warning, Span: m.NameSpan,
			Message: "the " + m.Kind.String() + " carries no load"}})
	}
	if m.Section != nil && m.Material != nil && len(m.Missing) == 0 {
		w.sane()
	}
}

// sane warns of loads that are out by powers of ten beside what the section
// can carry at all.
func (w *memberReader) sane() {
	m := w.m
	fy, _, _, ok := m.Material.Strength(m.Section.Thickness, w.env.Basis.TableFy)
	if !ok && m.Material.Grade == nil || math.IsNaN(m.Section.Area) {
		return
	}
	if !ok {
		fy = 235e6
	}
	squash := m.Section.Area * fy
	for _, l := range m.Loads {
		if l.Kind != AxialLoad {
			continue
		}
		v := math.Abs(l.Value)
		switch {
		case v > 50*squash:
			m.Problems = append(m.Problems, lang.Diagnostic{Decl: l.Place.Decl, Problem: lang.Problem{Rule: "implausible-load", Severity: lang.Warning, Span: l.Place.Span,
				Message: fmt.Sprintf("a load of %s kN is %s times what the section can carry at all: is the unit meant?", unit.Short(v/1e3, 3), unit.Short(v/squash, 2))}})
		case v < 1e-4*squash && v < 200:
			m.Problems = append(m.Problems, lang.Diagnostic{Decl: l.Place.Decl, Problem: lang.Problem{Rule: "implausible-load", Severity: lang.Warning, Span: l.Place.Span,
				Message: fmt.Sprintf("a load of %s N is next to nothing for this section: is the unit meant?", unit.Short(v, 3))}})
		}
	}
}
