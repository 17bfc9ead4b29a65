package lsp

import (
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/output"
	"kern/checker/review"
	"kern/lang"
	"kern/lang/unit"
)

// hintKind is what a hint tells; each kind has its setting.
type hintKind string

// The kinds of hint.
const (
	resultHint     hintKind = "result"
	sectionHint    hintKind = "section"
	strengthHint   hintKind = "strength"
	valueHint      hintKind = "value"
	unitHint       hintKind = "unit"
	assumptionHint hintKind = "assumption"
)

// hint is a short remark at a place of a file.
type hint struct {
	offset int32
	kind   hintKind
	label  string
	// tip makes the tooltip, in Markdown or plain; nil for none.
	tip func(markdown bool) string
}

// collector gathers the hints of a part of a file.
type collector struct {
	f        *File
	report   *checker.Report
	calc     *model.Calculation
	settings Settings
	within   lang.Span
	out      []hint

	past     *review.Past    // nil where nothing is to be said of it
	used     *usage          // nil until somebody asks
	familiar map[string]bool // whether a unit is a customary one, by symbol

	decl  *lang.Decl // the one being read
	start int32      // where it begins in the file
}

// hintsIn gives the hints of the declarations in a part of a file, in the order
// of the text.
func hintsIn(f *File, within lang.Span, settings Settings) []hint {
	c := &collector{f: f, report: f.Report(), settings: settings, within: within}
	if c.report == nil {
		return nil
	}
	if all := c.report.Calculations(f.Name); len(all) > 0 {
		c.calc = all[0]
	}
	if settings.HintResults && settings.HintHistory {
		c.past, _ = f.past() // once: it looks at the disk
	}
	first, last := f.Tree.DeclAt(within.Start), f.Tree.DeclAt(within.End)
	for i := first; i >= 0 && i <= last; i++ {
		c.decl, c.start = f.Tree.Decls[i], f.Tree.Starts[i]
		for _, s := range c.decl.Stmts {
			c.statement(s)
		}
	}
	slices.SortStableFunc(c.out, func(a, b hint) int { return int(a.offset - b.offset) })
	return c.out
}

// add adds a hint at an offset of the declaration, if it lies in the part that
// was asked for.
func (c *collector) add(at int32, kind hintKind, label string, tip func(p *output.Page)) {
	offset := c.start + at
	if !c.shows(kind) || label == "" || offset < c.within.Start || offset > c.within.End {
		return
	}
	h := hint{offset: offset, kind: kind, label: label}
	if tip != nil {
		h.tip = func(markdown bool) string {
			p := output.NewPage(markdown)
			tip(p)
			return p.String()
		}
	}
	c.out = append(c.out, h)
}

// shows tells whether the settings want a kind of hint.
func (c *collector) shows(kind hintKind) bool {
	switch kind {
	case resultHint:
		return c.settings.HintResults
	case sectionHint:
		return c.settings.HintSections
	case strengthHint:
		return c.settings.HintStrengths
	case valueHint:
		return c.settings.HintValues
	case unitHint:
		return c.settings.HintUnits
	}
	return c.settings.HintAssumptions
}

// units are the units that results of the file are shown in.
func (c *collector) units() derivation.Units {
	if c.calc == nil {
		return nil
	}
	return c.calc.Env.Basis.Show
}

// behind is where the hint of a statement goes: at the end of its line when
// nothing but a brace or a comment follows there, else right behind it.
func (c *collector) behind(s *lang.Stmt) int32 {
	end := s.Line.End
	text := c.decl.Text
	if s.Body != nil && !strings.ContainsAny(lang.Span{Start: s.Body.Span.Start, End: min(s.Body.Span.End, int32(len(text)))}.Of(text), "\r\n") {
		end = min(s.Body.Span.End, int32(len(text))) // a block on one line goes with its statement
	}
	rest := text[end:]
	if i := strings.IndexAny(rest, "\r\n"); i >= 0 {
		rest = rest[:i]
	}
	follows := strings.TrimLeft(rest, " \t{")
	if follows == "" || follows[0] == '#' {
		return end + int32(len(strings.TrimRight(rest, " \t")))
	}
	return end
}

// statement gathers the hints of a declaration's statement.
func (c *collector) statement(s *lang.Stmt) {
	c.mixed(s)
	if value, ok := s.Assigned(); ok {
		c.named(s, value)
		return
	}
	switch s.Word {
	case "column", "strut", "tie":
		c.member(s)
	case "section":
		c.declaredSection(s)
	case "material":
		c.declaredMaterial(s)
	case "basis":
		c.basis(s)
	}
}

// own is the name that a declaration gives, if it is the statement's own and has
// no error.
func (c *collector) own(s *lang.Stmt) *model.Named {
	if c.calc == nil || len(s.Args) == 0 {
		return nil
	}
	n := c.calc.Env.Names[s.Args[0].Text]
	if n == nil || n.Stmt != s || n.Index < 0 || n.Twice || c.calc.Env.Bad(n) {
		return nil
	}
	return n
}

// writtenOut tells whether an expression says its value itself.
func writtenOut(e *lang.Expr) bool {
	switch e.Kind {
	case lang.QuantExpr, lang.NumberExpr, lang.StringExpr:
		return true
	case lang.UnaryExpr, lang.ParenExpr:
		return writtenOut(e.Args[0])
	case lang.BinaryExpr:
		return e.Text == "ft-in"
	}
	return false
}

// named gives the value of a named expression.
func (c *collector) named(s *lang.Stmt, value []*lang.Expr) {
	if c.calc == nil || len(value) != 1 || writtenOut(value[0]) {
		return
	}
	n := c.calc.Env.Names[s.Word]
	if n == nil || n.Stmt != s || n.Twice {
		return
	}
	q, ok := c.calc.Env.Quantity(s.Word)
	if !ok {
		return
	}
	decl, e := c.decl, value[0]
	c.add(c.behind(s), valueHint, "= "+quantityText(c.units(), q), func(p *output.Page) {
		text, names := withNumbers(c.calc, decl, e, c.units())
		p.Text(output.Code(s.Word), output.Words(" = "), output.Code(e.Span.Of(decl.Text)))
		if names > 0 {
			p.Text(output.Words("= "), output.Code(text))
		}
		p.Text(output.Words("= "), output.Strong(quantityText(c.units(), q)))
	})
}

// mixed converts quantities whose units are of the other system than those that
// results are shown in.
func (c *collector) mixed(s *lang.Stmt) {
	if !c.shows(unitHint) {
		return
	}
	units := c.units()
	var look func(s *lang.Stmt)
	look = func(s *lang.Stmt) {
		for _, a := range s.Args {
			inches := false // the second part of feet and inches
			a.Walk(func(e *lang.Expr) {
				switch {
				case e.Kind == lang.BinaryExpr && e.Text == "ft-in":
					inches = true
					if target := units.For(unit.Length); !c.customary(target) {
						if q, p := lang.Eval(e, nil); p == nil {
							c.converted(e, q, target)
						}
					}
				case e.Kind == lang.QuantExpr && e.Unit.Symbol != "" && !inches:
					q := unit.Quantity{Value: e.Value * e.Unit.Factor, Dim: e.Unit.Dim}
					if target := suitable(units, q); c.customary(e.Unit) != c.customary(target) && target.Dim == e.Unit.Dim {
						c.converted(e, q, target)
					}
				case e.Kind == lang.QuantExpr && e.Text == "in":
					inches = false
				}
			})
		}
		if s.Body != nil {
			for _, b := range s.Body.Stmts {
				look(b)
			}
		}
	}
	look(s)
}

// customary is the function of that name, with a memory.
func (c *collector) customary(u unit.Unit) bool {
	is, known := c.familiar[u.Symbol]
	if !known {
		if c.familiar == nil {
			c.familiar = map[string]bool{}
		}
		is = customary(u)
		c.familiar[u.Symbol] = is
	}
	return is
}

// converted gives a quantity in a unit of the results' system.
func (c *collector) converted(e *lang.Expr, q unit.Quantity, target unit.Unit) {
	c.add(e.Span.End, unitHint, "= "+unit.Short(q.Value/target.Factor, 4)+" "+target.Symbol, func(p *output.Page) {
		written := c.decl.Text[e.Span.Start:e.Span.End]
		p.Text(output.Code(written), output.Words(" = "+unit.Short(q.Value/target.Factor, 9)+" "+target.Symbol))
	})
}

// basis gives the numbers of the standard that are taken as recommended.
func (c *collector) basis(s *lang.Stmt) {
	if c.calc == nil || s.Body == nil || c.calc.Env.Basis.Place.Decl != c.decl {
		return
	}
	for _, b := range s.Body.Stmts {
		if b.Word != "standard" {
			continue
		}
		var labels []string
		for _, a := range c.assumedOfAll() {
			// "gamma_M0 = 1.00 (recommended)"
			name, _, assigned := strings.Cut(a, " = ")
			if assigned && slices.Contains(checker.Overrides(c.calc.Env.Basis.Standard), name) {
				labels = append(labels, strings.TrimSuffix(a, " (recommended)"))
			}
		}
		c.add(c.behind(b), assumptionHint, strings.Join(labels, ", "), func(p *output.Page) {
			p.Text(output.Words("The calculation does not replace these numbers of its standard: " + strings.Join(labels, ", ") + "."))
		})
	}
}

// assumedOfAll are the assumptions of the first member of the calculation that
// was checked.
func (c *collector) assumedOfAll() []string {
	for _, r := range c.report.Members {
		own := slices.ContainsFunc(c.calc.Files, func(f *lang.File) bool { return f.Name == r.Member.Decl.File.Name })
		if own && len(r.Assumptions) > 0 {
			return r.Assumptions
		}
	}
	return nil
}
