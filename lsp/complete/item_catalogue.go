package complete

import (
	"slices"
	"strings"
	"sync"

	"kern/checker/catalogue"
	"kern/checker/model"
	"kern/checker/section"
	"kern/lang"
	"kern/lang/unit"
)

// familyWords say in words what the letters of a family stand for.
var familyWords = map[string]string{
	"IPE": "I beams, parallel flanges", "HEAA": "wide flange, extra light", "HEA": "wide flange, light", "HEB": "wide flange", "HEM": "wide flange, heavy",
	"HL": "extra wide flange beams", "HD": "wide flange columns", "HP": "wide flange bearing piles", "UB": "universal beams", "UC": "universal columns",
	"UBP": "universal bearing piles", "UPN": "channels, tapered flanges", "UPE": "channels, parallel flanges", "PFC": "channels, parallel flanges (UK)",
	"L": "angles", "T": "tees cut from I and H sections", "SHS": "square hollow sections", "RHS": "rectangular hollow sections",
	"CHS": "circular hollow sections", "EHS": "elliptical hollow sections",
	"W": "wide flange (ASTM A6)", "M": "miscellaneous beams (ASTM A6)", "S": "standard beams, tapered flanges (ASTM A6)", "C": "standard channels (ASTM A6)",
	"MC": "miscellaneous channels (ASTM A6)", "WT": "tees cut from W (ASTM A6)", "MT": "tees cut from M (ASTM A6)", "ST": "tees cut from S (ASTM A6)",
	"2L": "double angles (ASTM A6)", "HSS": "hollow structural sections (ASTM A500, A1085)", "PIPE": "steel pipe (ASTM A53)",
}

// familyOrder is the order in which families are offered: sections of columns
// first.
var familyOrder = []string{"HEA", "HEB", "HEM", "SHS", "RHS", "CHS", "UC", "IPE", "UB", "UPE", "UPN", "PFC", "L", "HEAA", "HD", "HL", "HP", "UBP", "T", "EHS",
	"W", "HSS", "PIPE", "WT", "2L", "C", "MC", "S", "M", "ST", "MT"}

// americanFirst is the first of them that has American sections alone.
const americanFirst = "W"

// american tells whether the calculation is one with American sections: by its
// standard, or else by what it has already, or by the unit of its lengths.
func (s *scope) american() bool {
	standard := strings.ToUpper(s.env.Basis.Standard)
	switch {
	case strings.Contains(standard, "AISC"):
		return true
	case strings.HasPrefix(standard, "EN"):
		return false
	}
	score := 0
	for _, x := range s.env.Sections {
		switch {
		case strings.HasPrefix(x.Standard, "ASTM "):
			score++
		case x.Standard != "":
			score--
		}
	}
	if score != 0 {
		return score > 0
	}
	u, ok := s.env.Basis.Show[unit.Length]
	return ok && (u.Symbol == "in" || u.Symbol == "ft")
}

// families are the families in the order in which they are offered, those of the
// calculation's part of the world first.
func (s *scope) families() []string {
	if !s.american() {
		return familyOrder
	}
	i := slices.Index(familyOrder, americanFirst)
	return append(slices.Clone(familyOrder[i:]), append([]string{"HP", "L"}, slices.DeleteFunc(slices.Clone(familyOrder[:i]), func(f string) bool { return f == "HP" || f == "L" })...)...)
}

// familyText is how a designation of the family begins.
func familyText(f string) string {
	switch {
	case f == "PIPE":
		return "Pipe "
	case slices.Index(familyOrder, f) >= slices.Index(familyOrder, americanFirst):
		return f
	}
	return f + " "
}

// computed keeps the properties of catalogue sections: they never change while
// the program runs.
var computed sync.Map // designation -> *section.Properties

// properties are the computed properties of a catalogue section; nil when it has
// none.
func properties(e *catalogue.Entry) *section.Properties {
	if p, ok := computed.Load(e.Designation); ok {
		return p.(*section.Properties)
	}
	p, err := section.Compute(e.Shape)
	if err != nil {
		return nil
	}
	computed.Store(e.Designation, &p)
	return &p
}

// designations are the sections of the catalogue that what is typed can mean:
// those that are used nearby and the families while nothing is typed, then the
// sizes.
func (s *scope) designations() (out []Item, more bool) {
	typed := strings.TrimLeft(s.typed(), " ")
	if !s.quoted {
		typed = "" // an editor compares what is typed without quotes with the names first
	}
	add := func(e *catalogue.Entry, group int) {
		if slices.ContainsFunc(out, func(x Item) bool { return x.Label == e.Designation }) {
			return
		}
		x := Item{Label: e.Designation, Kind: SectionItem, Group: group, Eager: true, About: About{Of: "section", Name: e.Designation}}
		if p := properties(e); p != nil {
			x.Detail = s.keyValues(p.Area, p.IMinor)
		}
		if !begins(x.Label, strings.ToLower(typed)) {
			x.Filter = typed // it was meant by another way of writing it
		}
		out = append(out, x)
	}
	upper := strings.ToUpper(typed)
	exact := slices.Contains(familyOrder, strings.TrimRight(upper, " "))
	if typed == "" {
		for _, name := range s.usedSections() {
			if e, ok := catalogue.Find(name); ok {
				add(&e, 1)
			}
		}
	}
	order := s.families()
	for _, f := range order {
		if strings.HasPrefix(f, upper) && f != upper {
			out = append(out, Item{Label: strings.TrimSpace(familyText(f)), Detail: familyWords[f], Kind: FamilyItem, Text: familyText(f), Group: 3, Eager: true})
		}
	}
	if typed == "" {
		return out, true
	}
	found := catalogue.Search(typed)
	if exact {
		found = slices.DeleteFunc(found, func(e catalogue.Entry) bool { return e.Family != strings.TrimRight(upper, " ") })
	}
	if near := catalogue.Nearest(typed, 1); len(found) == 0 && len(near) > 0 {
		// a slip in the letters of the family: the sizes that begin with the digits
		if e, ok := catalogue.Find(near[0]); ok {
			if i := strings.IndexAny(typed, "0123456789"); i > 0 {
				found = catalogue.Search(e.Family + " " + typed[i:])
			}
		}
	}
	if len(found) == 0 {
		for _, name := range catalogue.Nearest(typed, 8) {
			if e, ok := catalogue.Find(name); ok {
				found = append(found, e)
			}
		}
	}
	home := s.american()
	rank := func(e *catalogue.Entry) int {
		n := slices.Index(order, e.Family)
		if e.American() != home {
			n += len(order)
		}
		return n
	}
	slices.SortStableFunc(found, func(a, b catalogue.Entry) int { return rank(&a) - rank(&b) })
	group := 4
	if exact || len(out) == 0 {
		group = 2
	}
	for i := range found {
		if len(out) >= maxItems {
			break
		}
		add(&found[i], group)
	}
	return out, true
}

// usedSections are the designations that are used nearby and in the
// calculation's sections, each once.
func (s *scope) usedSections() []string {
	const most = 8
	var out []string
	add := func(name string) {
		if len(out) < most && !slices.Contains(out, name) {
			if e, ok := catalogue.Find(name); ok && !slices.Contains(out, e.Designation) {
				out = append(out, e.Designation)
			}
		}
	}
	s.near(func(stmt *lang.Stmt) {
		if stmt.Word == "section" {
			for _, e := range stmt.Args {
				if e.Kind == lang.StringExpr {
					add(e.Text)
				}
			}
		}
	})
	for _, x := range s.env.Sections {
		if x.Designation != "" {
			add(x.Designation)
		}
	}
	return out
}

// ownSection is the section of the member that the place lies in, nil where it
// is not known.
func (s *scope) ownSection() *model.Section {
	if s.member == nil || s.decl == nil {
		return nil
	}
	for _, r := range s.report.Results(s.decl) {
		if r.Member.Stmt == s.member && r.Member.Section != nil && !r.Member.Section.Bad {
			return r.Member.Section
		}
	}
	return nil
}

// suits ranks a grade for a section: 0 where the product standard is one of such
// sections.
func suits(standard string, x *model.Section) int {
	if american := strings.HasPrefix(standard, "ASTM "); american || x != nil && strings.HasPrefix(x.Standard, "ASTM ") {
		return suitsAmerican(standard, x)
	}
	if x == nil {
		return map[string]int{"EN 10025-2": 0, "EN 10210-1": 1, "EN 10219-1": 1, "EN 10025-3": 2, "EN 10025-4": 2, "EN 10025-6": 3}[standard]
	}
	hollow := x.Shape.Kind == section.Tube || x.Shape.Kind == section.Pipe || x.Shape.Kind == section.Ellipse
	switch {
	case standard == "EN 10025-6":
		return 3 // plate alone
	case strings.HasPrefix(standard, "EN 10025"):
		return map[bool]int{true: 2, false: map[bool]int{true: 0, false: 1}[standard == "EN 10025-2"]}[hollow]
	case !hollow:
		return 2
	}
	return map[bool]int{true: 0, false: 1}[standard == "EN 10219-1" == (x.Shape.Made == section.Cold)]
}

// usualSteels are the ASTM standards that sections are usually made to.
var usualSteels = map[string]catalogue.Form{"ASTM A992": catalogue.RolledShape, "ASTM A500": catalogue.SquareHollow, "ASTM A36": catalogue.Plate}

// suitsAmerican is suits where the grade or the section is American.
func suitsAmerican(standard string, x *model.Section) int {
	american := strings.HasPrefix(standard, "ASTM ")
	switch {
	case x == nil:
		return 3
	case american != strings.HasPrefix(x.Standard, "ASTM ") && x.Standard != "":
		return 3
	case !american:
		return 2
	}
	form := catalogue.FormOf(x.Shape)
	for _, g := range catalogue.Grades() {
		if g.Standard != standard {
			continue
		}
		if _, ok := g.For(x.Shape); !ok {
			return 2
		}
		usual, known := usualSteels[standard]
		named := x.Standard == standard || standard == "ASTM A500" && form == catalogue.RoundHollow && x.Standard != "ASTM A53"
		if named || known && usual == form && (form != catalogue.SquareHollow || x.Standard == "") {
			return 0
		}
		return 1
	}
	return 3
}

// grades are the steel grades of the catalogue, those first that the member's
// section is made of. A grade that several product standards have stands once,
// as the one that it means without saying which.
func (s *scope) grades() []Item {
	x, home := s.ownSection(), s.american()
	var out []Item
	seen := map[string]bool{}
	for _, g := range catalogue.Grades() {
		if seen[g.Name] {
			continue
		}
		seen[g.Name] = true
		item := Item{Label: g.Name, Kind: MaterialItem, About: About{Of: "grade", Name: g.Name}}
		if own, ok := catalogue.FindGrade(g.Name, "EN 10219-1"); ok && suits(g.Standard, x) == 1 && suits("EN 10219-1", x) == 0 && x != nil && !s.quoted {
			// without its standard it would be taken as hot finished
			g, item.Text = own, `"`+g.Name+`" per "EN 10219-1"`
		}
		fit := suits(g.Standard, x)
		if x == nil && home { // no section to go by
			fit = map[bool]int{true: 0, false: 3}[g.American()]
		}
		item.Detail, item.Group, item.Eager = s.gradeWords(&g, x), 1+fit, fit < 3
		out = append(out, item)
	}
	return out
}

// gradeWords says where a grade comes from and how strong it is: for the
// member's section, or as thin as it is listed.
func (s *scope) gradeWords(g *catalogue.Grade, x *model.Section) string {
	if g.American() {
		return s.americanWords(g, x)
	}
	t, at := 0.01, " in 10 mm"
	if x != nil && x.Thickness > 0 {
		t, at = x.Thickness, " in "+s.showAs(unit.Quantity{Value: x.Thickness, Dim: unit.Length}, "mm")
	}
	fy, _, _, ok := g.Strength(t)
	from := g.Standard
	if s.env.Basis.TableFy {
		fy, _, _, ok = g.Table31(t)
		from += ", by EN 1993-1-1 Table 3.1"
	}
	if !ok {
		return from + ", no strength" + at
	}
	return from + ", fy " + s.show(unit.Quantity{Value: fy, Dim: unit.Stress}) + at
}

// americanWords is gradeWords for an American grade.
func (s *scope) americanWords(g *catalogue.Grade, x *model.Section) string {
	if x != nil && x.Thickness > 0 {
		if own, ok := g.For(x.Shape); !ok {
			return g.Standard + ", not for " + catalogue.FormOf(x.Shape).String()
		} else if fy, _, _, ok := own.Strength(x.Thickness); ok {
			return g.Standard + ", fy " + s.showAs(unit.Quantity{Value: fy, Dim: unit.Stress}, "ksi") + " in " + s.showAs(unit.Quantity{Value: x.Thickness, Dim: unit.Length}, "in")
		}
		return g.Standard + ", no strength in " + s.showAs(unit.Quantity{Value: x.Thickness, Dim: unit.Length}, "in")
	}
	first := g.Forms()[0]
	return g.Standard + ", fy " + s.showAs(unit.Quantity{Value: first.Fy, Dim: unit.Stress}, "ksi") + " in " + first.Form.String()
}

// showAs writes a quantity in the calculation's unit of its dimension, or in
// another when it states none.
func (s *scope) showAs(q unit.Quantity, symbol string) string {
	if u, err := unit.Parse(symbol); err == nil {
		if own, ok := s.env.Basis.Show[q.Dim]; ok {
			u = own
		}
		return unit.Short(q.In(u), 4) + " " + u.Symbol
	}
	return s.show(q)
}

// materials are the materials that the calculation declares.
func (s *scope) materials() []Item {
	x := s.ownSection()
	var out []Item
	for _, m := range s.env.Materials {
		item := s.nameItem(m.Name, "has an error", MaterialItem, 0)
		switch {
		case m.Bad:
		case m.Grade != nil:
			item.Detail = m.Grade.Name + ", " + s.gradeWords(m.Grade, x)
			if x != nil && suits(m.Grade.Standard, x) > 1 {
				item.Group = 1
			}
		case m.Fy > 0:
			item.Detail = "fy " + s.show(unit.Quantity{Value: m.Fy, Dim: unit.Stress}) + ", E " + s.showAs(unit.Quantity{Value: m.E, Dim: unit.Stress}, "GPa")
		default:
			item.Detail = "E " + s.showAs(unit.Quantity{Value: m.E, Dim: unit.Stress}, "GPa") + ", no yield strength"
		}
		out = append(out, item)
	}
	return out
}

// productStandards are the product standards that have the grade that was typed.
func (s *scope) productStandards() []Item {
	grade := ""
	for _, e := range s.before {
		if e.Kind == lang.StringExpr {
			grade = e.Text
			break
		}
	}
	var out []Item
	seen := map[string]bool{}
	for _, g := range catalogue.Grades() {
		if seen[g.Standard] {
			continue
		}
		seen[g.Standard] = true
		if own, ok := catalogue.FindGrade(grade, g.Standard); ok {
			out = append(out, Item{Label: g.Standard, Detail: own.Name + productWords[g.Standard], Kind: TextItem, Eager: true})
		}
	}
	return out
}

// productWords say what a product standard is of.
var productWords = map[string]string{
	"EN 10025-2": ", hot rolled, non-alloy", "EN 10025-3": ", hot rolled, normalised fine grain", "EN 10025-4": ", hot rolled, thermomechanical fine grain",
	"ASTM A36": ", shapes, plate and bar", "ASTM A53": ", pipe", "ASTM A242": ", weathering", "ASTM A500": ", cold formed hollow sections", "ASTM A501": ", hot formed hollow sections",
	"ASTM A529": ", shapes, plate and bar", "ASTM A572": ", shapes, plate and bar", "ASTM A588": ", weathering", "ASTM A847": ", cold formed hollow sections, weathering",
	"ASTM A913": ", shapes, quenched and self-tempered", "ASTM A992": ", shapes", "ASTM A1065": ", hollow sections welded of two halves", "ASTM A1085": ", cold formed hollow sections, full wall",
	"EN 10025-6": ", plate, quenched and tempered", "EN 10210-1": ", hot finished hollow sections", "EN 10219-1": ", cold formed hollow sections",
}
