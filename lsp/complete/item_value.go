package complete

import (
	"fmt"
	"math"
	"slices"
	"sort"
	"strings"

	"kern/checker/action"
	"kern/checker/model"
	"kern/lang"
	"kern/lang/unit"
)

// valuesFor gives what the writer puts in without quotes.
func (s *scope) valuesFor(d duty) (list []Item, more bool) {
	switch d.name {
	case "FACTOR CASE":
		return s.cases(), false
	case "UNIT":
		return s.showUnits(), false
	}
	if d.unit {
		return s.units(d), false
	}
	if d.operand {
		return s.operands(d.dims), false
	}
	switch d.name {
	case "NAME":
		switch {
		case d.lead == "as":
			return s.members()
		case (s.in == lang.InMember || s.in == lang.InLift) && s.head == "section":
			return s.sections(), false
		case (s.in == lang.InMember || s.in == lang.InLift) && s.head == "material":
			return s.materials(), false
		}
		return nil, false // a new name
	case "CASE":
		return s.cases(), false
	case "AXIS":
		return s.words(duty{element: &element{kind: wordElement, words: []string{"major", "minor"}}}), false
	case "SHAPE":
		return s.shapes(), false
	case "KIND":
		return s.words(duty{element: &element{kind: wordElement, words: []string{"imposed", "live", "roof", "snow", "rain", "wind", "temperature"}}}), false
	case "SITUATION":
		return s.words(duty{element: &element{kind: wordElement, words: action.SituationNames()}}), false
	case "FAMILY":
		var out []Item
		for _, f := range s.families() {
			if f[0] < '0' || f[0] > '9' { // one that begins with a digit stands in quotes
				out = append(out, Item{Label: f, Kind: WordItem, Text: f, Detail: familyWords[f]})
			}
		}
		return out, false
	case "RESULT":
		return s.results(true), false
	case "RULE":
		return s.rules(), false
	case "PLACE":
		return s.places(), false
	case "LEVEL":
		if s.head == "load" {
			return s.levels(true), false // a floor lies at a level, not at a height
		}
		return append(s.levels(false), s.operands(d.dims)...), false
	}
	return s.operands(d.dims), false
}

// readable are units that people read a dimension in, besides the one that the
// calculation shows it in.
var readable = map[unit.Dim][]string{
	unit.Length: {"m", "mm"}, unit.Area: {"m2", "cm2", "mm2"}, unit.Volume: {"m3", "cm3"}, unit.Length4: {"cm4", "m4"},
	unit.Force: {"kN", "N", "MN"}, unit.Stress: {"MPa", "kN/m2", "GPa"}, unit.ForcePerLength: {"kN/m", "N/m"}, unit.Moment: {"kNm", "Nm"},
}

// show writes a quantity in the unit that the calculation shows it in, or in
// another where the number would have too many digits.
func (s *scope) show(q unit.Quantity) string {
	if q.Dim.IsNone() {
		return unit.Short(q.Value, 4)
	}
	var units []unit.Unit
	if own, ok := s.env.Basis.Show[q.Dim]; ok {
		units = append(units, own)
	}
	for _, symbol := range readable[q.Dim] {
		if u, err := unit.Parse(symbol); err == nil {
			units = append(units, u)
		}
	}
	units = append(units, s.env.Basis.Show.For(q.Dim))
	for _, u := range units {
		if v := math.Abs(q.In(u)); v == 0 || v >= 0.1 && v < 10_000 {
			return unit.Short(q.In(u), 4) + " " + u.Symbol
		}
	}
	return unit.Short(q.In(units[0]), 4) + " " + units[0].Symbol
}

// nameItem is the item of a name of the calculation.
func (s *scope) nameItem(name, detail string, kind Kind, group int) Item {
	return Item{Label: name, Detail: detail, Kind: kind, Group: group, Eager: true, About: About{Of: "name", Name: name}}
}

// fitting tells whether a quantity of a dimension can stand where others are
// due; nil takes any.
func fitting(dims []unit.Dim, dim unit.Dim) bool { return dims == nil || slices.Contains(dims, dim) }

// operands are what a calculation can be made of where one of some dimensions is
// due: values and levels that fit, functions, constants; and the other values,
// of which a product could be made, once a letter has been typed.
func (s *scope) operands(dims []unit.Dim) []Item {
	var out []Item
	if name, _, dot := strings.Cut(s.typed(), "."); dot {
		return s.resultsOfMember(name, dims)
	}
	if s.takesResults() && s.typed() != "" {
		list, _ := s.members()
		for _, x := range list {
			x.Detail, x.Text, x.Group, x.Eager = "a result of "+x.Detail, x.Label+".", 8, false
			out = append(out, x)
		}
	}
	var names []string
	for name, n := range s.env.Names {
		if n.Kind == model.ValueName && name != s.head {
			names = append(names, name)
		}
	}
	sort.Strings(names)
	for _, name := range names {
		q, ok := s.named(name)
		switch {
		case !ok:
			out = append(out, Item{Label: name, Detail: "has no value yet", Kind: ValueItem, Group: 6, About: About{Of: "name", Name: name}})
		case fitting(dims, q.Dim):
			out = append(out, s.nameItem(name, s.show(q), ValueItem, 2))
		case s.typed() != "":
			x := s.nameItem(name, s.show(q), ValueItem, 7)
			x.Eager = false
			out = append(out, x)
		}
	}
	if fitting(dims, unit.Length) && s.head != "from" && s.head != "level" {
		for _, x := range s.levels(false) {
			x.Group = 3
			out = append(out, x)
		}
	}
	if s.member != nil && s.in == lang.InMember && dims != nil && fitting(dims, unit.Length) && s.head != "height" && s.head != "length" && s.head != "from" {
		out = append(out, Item{Label: "height", Detail: "the member's own height", Kind: WordItem, Group: 3, Eager: true})
		if s.head == "limit" && len(s.before) > 0 && s.before[0].Is("deflection") && s.env.Names["span"] == nil {
			out = append(out, Item{Label: "span", Detail: lang.Words["span"], Kind: WordItem, Group: 3, Eager: true})
		}
	}
	for _, f := range functionNames() {
		group := 5
		if f == "sin" || f == "cos" || f == "tan" {
			if dims != nil && !fitting(dims, unit.None) && s.typed() == "" {
				continue
			}
			group = 6
		}
		out = append(out, Item{Label: f, Detail: lang.Functions[f], Kind: FunctionItem, Text: f + "(", Snippet: f + "($1)", Group: group, About: About{Of: "function", Name: f}})
	}
	constants := make([]string, 0, len(lang.Constants))
	for c := range lang.Constants {
		constants = append(constants, c)
	}
	sort.Strings(constants)
	for _, c := range constants {
		q := lang.Constants[c]
		if fitting(dims, q.Dim) || s.typed() != "" {
			detail := unit.Short(q.Value, 7)
			if !q.Dim.IsNone() {
				detail += " " + q.Dim.Base()
			}
			out = append(out, Item{Label: c, Detail: detail, Kind: ConstantItem, Group: 6})
		}
	}
	return out
}

// cases are the load cases that the calculation declares.
func (s *scope) cases() []Item {
	var out []Item
	for _, c := range s.env.Cases {
		if c.Place.Decl == nil {
			continue
		}
		out = append(out, s.nameItem(c.Name, s.caseWords(c), CaseItem, 0))
	}
	return out
}

// caseWords says what a load case is.
func (s *scope) caseWords(c *model.Case) string {
	if c.Bad {
		return "has an error"
	}
	words := c.Kind.String()
	if c.Given != "" {
		words += ` "` + c.Given + `"`
	}
	return words + s.psiWords(c.Case)
}

// psiWords are the factors of a variable action by the annex of the calculation.
func (s *scope) psiWords(c action.Case) string {
	if s.env.Basis.Basic() {
		return ""
	}
	values := action.Recommended
	if s.env.Basis.Combining.Values.Annex != "" {
		values = s.env.Basis.Combining.Values
	}
	if psi, ok := values.Psi(c); ok {
		return ", psi " + psi.String()
	}
	return ""
}

// levels are the levels of the calculation; with loads alone, those that have
// any come first.
func (s *scope) levels(loads bool) []Item {
	var out []Item
	for _, l := range s.env.Levels {
		detail, group := "at "+s.show(unit.Quantity{Value: l.At, Dim: unit.Length}), 0
		var floor []string
		for _, p := range l.Pressures {
			floor = append(floor, s.env.Cases[p.Case].Name+" "+s.show(unit.Quantity{Value: p.Value, Dim: unit.Stress}))
		}
		switch {
		case l.Bad:
			detail = "has an error"
		case loads && len(floor) > 0:
			detail += ", " + strings.Join(floor, ", ")
		case loads:
			detail, group = detail+", no loads on its floor", 1
		}
		out = append(out, s.nameItem(l.Name, detail, LevelItem, group))
	}
	return out
}

// pressed tells whether a level has loads on its floor.
func (s *scope) pressed() bool {
	return slices.ContainsFunc(s.env.Levels, func(l *model.Level) bool { return len(l.Pressures) > 0 })
}

// places are the places on a member.
func (s *scope) places() []Item {
	out := []Item{
		{Label: "top", Detail: lang.Words["top"], Kind: WordItem, Eager: true},
		{Label: "base", Detail: "the lower end", Kind: WordItem, Eager: true},
	}
	if s.head == "hold" {
		out = out[:0] // the ends are held by base and top
	}
	if s.betweenLevels() {
		for _, x := range s.levels(false) {
			x.Group = 1
			out = append(out, x)
		}
	}
	group := 2
	if s.head == "hold" {
		group = 0
	}
	out = append(out, Item{Label: "height / 2", Detail: "half way up", Kind: WordItem, Group: group, Eager: true})
	for _, x := range s.operands([]unit.Dim{unit.Length}) {
		if x.Kind != LevelItem {
			x.Group++
			out = append(out, x)
		}
	}
	return out
}

// betweenLevels tells whether the member stands between levels: only then can
// one be a place on it.
func (s *scope) betweenLevels() bool {
	for m, seen := s.member, 0; m != nil && seen < 100; seen++ {
		if m.Body != nil {
			for _, b := range m.Body.Stmts {
				switch b.Word {
				case "from":
					return true
				case "height", "length":
					return false
				}
			}
		}
		i := slices.IndexFunc(m.Args, func(e *lang.Expr) bool { return e.Is("as") })
		if i < 0 || i+1 >= len(m.Args) {
			return false
		}
		n := s.env.Names[m.Args[i+1].Text]
		if n == nil || n.Kind != model.MemberName {
			return false
		}
		m = n.Stmt
	}
	return false
}

// members are the members that another can be like, the nearest first.
func (s *scope) members() (out []Item, more bool) {
	own := map[string]bool{}
	if s.stmt != nil {
		for _, e := range s.stmt.Args {
			own[e.Text] = !e.Is("as")
		}
	}
	typed := strings.ToLower(s.typed())
	take := func(decl *lang.Decl, group int) bool {
		for _, stmt := range decl.Stmts {
			if stmt.Word != "column" && stmt.Word != "strut" && stmt.Word != "tie" {
				continue
			}
			title := ""
			var names []string
			for _, e := range stmt.Args {
				switch {
				case e.Kind == lang.StringExpr:
					title = e.Text
				case e.Is("as"), e.Kind != lang.NameExpr && e.Kind != lang.CommaExpr:
				case e.Kind == lang.NameExpr && s.env.Names[e.Text] != nil && s.env.Names[e.Text].Place == (lang.Place{Decl: decl, Span: e.Span}):
					names = append(names, e.Text)
				}
			}
			for _, name := range names {
				if own[name] || !begins(name, typed) {
					continue
				}
				if len(out) == maxItems {
					more = true
					return false
				}
				out = append(out, s.nameItem(name, strings.TrimSpace(stmt.Word+" "+title), MemberItem, group))
			}
		}
		return true
	}
	here := max(0, s.tree.DeclAt(s.offset))
	for i := here; i >= 0 && i < len(s.tree.Decls); i-- {
		if !take(s.tree.Decls[i], 0) {
			return out, true
		}
	}
	for i := here + 1; i < len(s.tree.Decls); i++ {
		if !take(s.tree.Decls[i], 1) {
			return out, true
		}
	}
	if s.calc != nil {
		for _, f := range s.calc.Files {
			if f == s.tree {
				continue
			}
			for _, d := range f.Decls {
				if !take(d, 2) {
					return out, true
				}
			}
		}
	}
	return out, more
}

// shapes are the shapes of sections with the properties that each needs.
func (s *scope) shapes() []Item {
	var out []Item
	for _, shape := range shapeOrder {
		x := Item{Label: shape, Detail: lang.Words[shape], Kind: WordItem, Group: 2, Eager: true}
		if len(s.after) == 0 && !s.opensBlock() {
			x.Text, x.Snippet = shape+" { ", s.shapeSnippet(shape)
		}
		out = append(out, x)
	}
	return out
}

// sections are the sections that the calculation declares.
func (s *scope) sections() []Item {
	var out []Item
	for _, x := range s.env.Sections {
		detail := "has an error"
		if !x.Bad {
			detail = s.sectionWords(x)
		}
		out = append(out, s.nameItem(x.Name, detail, SectionItem, 0))
	}
	return out
}

func (s *scope) sectionWords(x *model.Section) string {
	words := s.keyValues(x.Area, x.IMinor)
	if x.Designation != "" {
		return x.Designation + ", " + words
	}
	return x.Shape.Kind.String() + ", " + words
}

// keyValues are what a section is chosen by: its mass, area and second moment
// about the minor axis, in SI units.
func (s *scope) keyValues(area, minor float64) string {
	in := func(value float64, dim unit.Dim, symbol string) string {
		u, ok := s.env.Basis.Show[dim]
		if !ok || symbol == "cm2" && u.Symbol == "mm2" {
			u, _ = unit.Parse(symbol)
		}
		return unit.Short(value/u.Factor, 4) + " " + u.Symbol
	}
	return fmt.Sprintf("%s, A %s, I_minor %s", in(area*steelDensity, unit.MassPerLength, "kg/m"), in(area, unit.Area, "cm2"), in(minor, unit.Length4, "cm4"))
}

// steelDensity is the density that the product standards compute masses with,
// kg/m3 (EN 10365, EN 10210-2).
const steelDensity = 7850
