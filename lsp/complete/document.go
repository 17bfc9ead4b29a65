package complete

import (
	"fmt"
	"strings"

	"kern/checker"
	"kern/checker/catalogue"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/rule"
	"kern/lang"
	"kern/lang/unit"
)

// Document is what is to be said about an item: forms as code, sentences, a
// table.
type Document struct {
	Code []string
	Text []string
	Rows [][]string // the first is the head of the table
}

// Empty tells whether there is nothing to say.
func (d Document) Empty() bool { return len(d.Code)+len(d.Text)+len(d.Rows) == 0 }

// Markdown writes the document for editors that show Markdown.
func (d Document) Markdown() string {
	var b strings.Builder
	if len(d.Code) > 0 {
		b.WriteString("```kern\n" + strings.Join(d.Code, "\n") + "\n```\n\n")
	}
	for _, t := range d.Text {
		b.WriteString(t + "\n\n")
	}
	for i, row := range d.Rows {
		b.WriteString("| " + strings.Join(row, " | ") + " |\n")
		if i == 0 {
			b.WriteString(strings.Repeat("|---", len(row)) + "|\n")
		}
	}
	return strings.TrimRight(b.String(), "\n")
}

// Plain writes the document as plain text.
func (d Document) Plain() string {
	var b strings.Builder
	for _, c := range d.Code {
		b.WriteString(c + "\n")
	}
	for _, t := range d.Text {
		b.WriteString(strings.NewReplacer("**", "", "`", "").Replace(t) + "\n")
	}
	for _, row := range d.Rows {
		if text := strings.TrimRight(strings.Join(row, "  "), " "); text != "" {
			b.WriteString(text + "\n")
		}
	}
	return strings.TrimRight(b.String(), "\n")
}

// Explain documents an item. The report is that of the document where the item
// was offered; nil when it is not known, which only names need.
func Explain(a About, r *checker.Report, file string) Document {
	switch a.Of {
	case "form":
		for _, f := range lang.FormsIn(lang.Context(a.In)) {
			if f.Word == a.Name {
				return Document{Code: f.Syntax, Text: []string{f.Summary}}
			}
		}
	case "section":
		if e, ok := catalogue.Find(a.Name); ok {
			return aboutSection(&e, unitsOf(r, file))
		}
	case "grade":
		if g, ok := catalogue.FindGrade(a.Name, ""); ok {
			return aboutGrade(&g)
		}
	case "symbol":
		return aboutSymbol(a)
	case "rule":
		if r := rule.Find(a.Name); r != nil {
			page, _, _ := strings.Cut(r.Page, "```kern")
			page = strings.TrimSpace(page)
			if i := strings.LastIndex(page, "\n"); i >= 0 && strings.HasSuffix(page, ":") {
				page = page[:i] // the line before the first example
			}
			return Document{Text: []string{strings.TrimSpace(page)}}
		}
	case "function":
		if lang.Functions[a.Name] != "" {
			x := functionSignature(a.Name)
			return Document{Code: []string{x.Syntax}, Text: []string{x.Summary, capitalised(x.Params[len(x.Params)-1].Words) + "."}}
		}
	case "unit":
		return aboutUnit(a.Name)
	case "name":
		if r != nil {
			return aboutName(a.Name, r, file)
		}
	}
	return Document{}
}

// unitsOf are the units that the calculation of a file shows results in.
func unitsOf(r *checker.Report, file string) derivation.Units {
	if r != nil {
		if list := r.Calculations(file); len(list) > 0 {
			return list[0].Env.Basis.Show
		}
	}
	return nil
}

// quantityIn writes a value in the unit that the calculation states for its
// dimension, or else in another.
func quantityIn(show derivation.Units, value float64, symbol string) string {
	u, err := unit.Parse(symbol)
	if err != nil {
		return "?"
	}
	if own, ok := show[u.Dim]; ok {
		u = own
	}
	return unit.Short(value/u.Factor, 4) + " " + u.Symbol
}

// aboutSection gives a catalogue section's dimensions and properties.
func aboutSection(e *catalogue.Entry, show derivation.Units) Document {
	d := Document{Text: []string{fmt.Sprintf("**%s**, %s, %s", e.Designation, e.Product, e.Standard)}}
	if !e.Listed {
		d.Text = append(d.Text, "Not among the common sizes of "+e.Standard+".")
	}
	p := properties(e)
	if p == nil {
		return d
	}
	d.Rows = [][]string{{"", ""}}
	row := func(name, value string) { d.Rows = append(d.Rows, []string{name, value}) }
	shape := e.Shape
	for _, x := range []struct {
		name  string
		value float64
	}{{"depth", shape.Depth}, {"width", shape.Width}, {"outside", shape.Diameter}, {"web", shape.Web}, {"flange", shape.Flange}, {"wall", shape.Wall}, {"gap", shape.Gap}, {"root", shape.Root}, {"toe", shape.Toe}, {"corner", shape.OuterRadius}} {
		if x.value > 0 {
			row(x.name, quantityIn(show, x.value, "mm"))
		}
	}
	row("mass", quantityIn(show, p.Area*steelDensity, "kg/m"))
	for _, x := range []struct {
		name  string
		value float64
		unit  string
	}{
		{"A", p.Area, "cm2"}, {"I_major", p.IMajor, "cm4"}, {"I_minor", p.IMinor, "cm4"}, {"i_major", p.RMajor, "mm"}, {"i_minor", p.RMinor, "mm"},
		{"W_major", p.WelMajor, "cm3"}, {"W_minor", p.WelMinor, "cm3"}, {"Wpl_major", p.WplMajor, "cm3"}, {"Wpl_minor", p.WplMinor, "cm3"}, {"I_t", p.It, "cm4"}, {"I_w", p.Iw, "cm6"},
	} {
		if x.value > 0 {
			row(x.name, quantityIn(show, x.value, x.unit))
		}
	}
	return d
}

// aboutGrade gives the strengths of a grade by thickness.
func aboutGrade(g *catalogue.Grade) Document {
	d := Document{Text: []string{fmt.Sprintf("**%s**, %s: E = %s, G = %s, density %s kg/m3", g.Name, g.Standard,
		quantityIn(nil, g.E, "GPa"), quantityIn(nil, g.G, "GPa"), unit.Short(g.Density, 4))}}
	if g.American() {
		d.Text = append(d.Text, "Strengths from memory: compare them with "+g.Standard+".")
		d.Rows = [][]string{{"product", "thickness", "fy ksi", "fu ksi"}}
		for _, f := range g.Forms() {
			d.Rows = append(d.Rows, []string{f.Form.String(), f.Row, quantityIn(nil, f.Fy, "ksi"), quantityIn(nil, f.Fu, "ksi")})
		}
		return d
	}
	if g.Eurocode != "EN 1993-1-1" {
		d.Text = append(d.Text, "A steel of "+g.Eurocode+": the checks of EN 1993-1-1 leave it undecided.")
	}
	if g.Recalled {
		d.Text = append(d.Text, "Strengths from memory: compare them with the product standard.")
	}
	d.Rows = [][]string{{"thickness", "fy MPa", "fu MPa"}}
	last := ""
	for mm := 0.5; mm <= 250; mm += 0.5 {
		fy, fu, row, ok := g.Strength(mm / 1000)
		if line := row + quantityIn(nil, fu, "MPa"); ok && line != last {
			if last = line; mm > 3 || len(d.Rows) > 1 && d.Rows[len(d.Rows)-1][0] != row || len(d.Rows) == 1 {
				d.Rows = append(d.Rows, []string{row, unit.Short(fy/1e6, 4), unit.Short(fu/1e6, 4)})
			}
		}
	}
	return d
}

// aboutSymbol gives the meaning and the equations of a result.
func aboutSymbol(a About) Document {
	x := checker.StandardNamed(a.In)
	if x == nil {
		return Document{}
	}
	set := x.Symbols()
	id, ok := set.Find(a.Name)
	if !ok {
		if id, ok = set.Find(x.Alias(a.Name)); !ok {
			return Document{}
		}
	}
	symbol := set.At(id)
	d := Document{Text: []string{fmt.Sprintf("`%s`: %s, %s", symbol.Name, symbol.What, x.Name())}}
	for _, f := range set.Formulas() {
		if f.Symbol == id {
			d.Code = append(d.Code, symbol.Name+" = "+f.Text+"  # "+f.Clause)
		}
	}
	return d
}

func aboutUnit(symbol string) Document {
	u, err := unit.Parse(symbol)
	if err != nil {
		return Document{}
	}
	d := Document{Text: []string{fmt.Sprintf("A unit of %s: 1 %s = %s %s", u.Dim.Name(), symbol, unit.Exact(u.Factor), u.Dim.Base())}}
	if u.Dim.IsNone() {
		d.Text[0] = fmt.Sprintf("A pure number: 1 %s = %s", symbol, unit.Exact(u.Factor))
	}
	for _, a := range unit.Atoms() {
		if a.Symbol == symbol {
			d.Text = append(d.Text, a.Name+"; "+a.Source)
		}
	}
	return d
}

// aboutName says where a name of the calculation comes from.
func aboutName(name string, r *checker.Report, file string) Document {
	list := r.Calculations(file)
	if len(list) == 0 {
		return Document{}
	}
	env := list[0].Env
	n := env.Names[name]
	if n == nil {
		return Document{}
	}
	from, _ := r.Where(n.Place)
	line := n.Stmt.Line.Of(n.Place.Decl.Text)
	if n.Stmt.Body != nil && n.Kind != model.MemberName {
		line = n.Stmt.Span.Of(n.Place.Decl.Text)
	}
	d := Document{Code: []string{line}}
	if from != file {
		d.Text = append(d.Text, "From `"+from+"`.")
	}
	switch {
	case n.Index < 0 || n.Bad:
	case n.Kind == model.SectionName && env.Sections[n.Index].Designation != "":
		if e, ok := catalogue.Find(env.Sections[n.Index].Designation); ok {
			section := aboutSection(&e, env.Basis.Show)
			d.Text, d.Rows = append(d.Text, section.Text...), section.Rows
		}
	case n.Kind == model.MaterialName && env.Materials[n.Index].Grade != nil:
		grade := aboutGrade(env.Materials[n.Index].Grade)
		d.Text, d.Rows = append(d.Text, grade.Text...), grade.Rows
	}
	return d
}
