package complete

import (
	"path"
	"sort"
	"strings"

	"kern/checker"
	"kern/checker/action"
	"kern/lang"
)

// texts are the quoted texts at a place. Outside of quotes they are written with
// them, inside they close what is open.
func (s *scope) texts(d duty) (out []Item, more bool) {
	switch {
	case d.words != nil:
		out = []Item{{Label: d.words[0], Detail: fixedWords[d.words[0]], Kind: TextItem, Eager: true}}
	case d.name == "DESIGNATION":
		out, more = s.designations()
	case d.name == "GRADE":
		out = s.grades()
	case d.name == "STANDARD":
		out = s.productStandards()
	case d.name == "FILE":
		out = s.files()
	case d.name == "CATEGORY":
		for _, e := range s.before {
			if kind, ok := action.KindNames[e.Text]; ok && e.Kind == lang.NameExpr && (kind == action.Imposed || kind == action.Snow) {
				out = s.categories(kind)
			}
		}
	case d.name == "PLACE":
		out = s.categories(action.Snow)
	case d.name == "NAME" && d.lead == "annex" && s.head == "actions":
		for _, a := range action.Annexes() {
			out = append(out, Item{Label: a, Detail: annexWords(a), Kind: TextItem, Eager: true})
		}
	case d.name == "NAME" && d.lead == "annex":
		if standard := checker.StandardNamed(s.text1()); standard != nil {
			for _, a := range standard.Annexes() {
				out = append(out, Item{Label: a, Detail: annexWords(a), Kind: TextItem, Eager: true})
			}
		}
	case d.name == "NAME" && s.head == "standard":
		for _, name := range checker.Standards() {
			out = append(out, Item{Label: name, Detail: standardWords[name], Kind: TextItem, Eager: true})
		}
	}
	for i := range out {
		x := &out[i]
		text := x.written()
		switch {
		case !s.quoted && x.Kind == FamilyItem:
			x.Text, x.Snippet = `"`+text, `"`+text+`$1"`
		case !s.quoted && !strings.HasPrefix(text, `"`):
			x.Text = `"` + text + `"`
		case s.quoted && !s.closed && x.Kind != FamilyItem:
			x.Text = text + `"`
		}
	}
	return out, more
}

// text1 is the first quoted text of the statement.
func (s *scope) text1() string {
	for _, e := range s.before {
		if e.Kind == lang.StringExpr {
			return e.Text
		}
	}
	return ""
}

// annexWords say what a set of values is.
func annexWords(name string) string {
	if strings.HasPrefix(name, "recommended") {
		return "the values that the standard recommends"
	}
	return "national values"
}

// standardWords say what a design standard is.
var standardWords = map[string]string{
	"elastic":          "first yield and Euler buckling, with factors of safety of the calculation",
	"EN 1993-1-1:2005": "Eurocode 3, steel structures, general rules",
	"ANSI/AISC 360-22": "specification for structural steel buildings, by LRFD or ASD",
	"ANSI/AISC 360-16": "the edition of 2016, by LRFD or ASD",
}

// fixedWords explain the texts that stand as they are.
var fixedWords = map[string]string{
	"EN 1990:2002": "Eurocode, basis of structural design", "ASCE/SEI 7-22": "minimum design loads, United States", "6.10": "one leading action, the others with psi_0",
	"6.10a/b":          "the less favourable of (6.10a) and (6.10b)",
	"product standard": "by the thickness, as the grade's product standard has it", "EN 1993-1-1 Table 3.1": "two thickness ranges, as Eurocode 3 simplifies them",
}

// category is a category of EN 1990 Table A1.1 with the subdivisions of EN
// 1991-1-1 Tables 6.1, 6.3 and 6.7; their words are from memory.
type category struct{ name, words string }

var imposed = []category{
	{"A", "homes"}, {"B", "offices"}, {"C1", "congregation: tables"}, {"C2", "congregation: fixed seats"}, {"C3", "congregation: people moving about"},
	{"C4", "congregation: physical activities"}, {"C5", "congregation: crowds"}, {"D1", "shops: retail"}, {"D2", "shops: department stores"},
	{"E1", "storage"}, {"E2", "industry"}, {"F", "vehicles up to 30 kN"}, {"G", "vehicles from 30 to 160 kN"}, {"H", "roofs, access for upkeep alone"},
}

// categories are the categories of an action with the factor that they bring.
func (s *scope) categories(kind action.Kind) []Item {
	list := imposed
	if s.env.Basis.Basic() {
		list = []category{{action.Assembly, "places of public assembly, not reduced"}, {action.Garage, "passenger vehicles, not reduced"}}
	}
	if kind == action.Snow {
		list = []category{{action.SnowLow, "sites up to 1000 m above sea level"}, {action.SnowHigh, "sites above 1000 m"}}
	}
	var out []Item
	for _, c := range list {
		name := c.name
		if kind == action.Imposed {
			name = name[:1]
		}
		x := Item{Label: c.name, Detail: c.words, Kind: TextItem, Eager: true}
		x.Detail += s.psiWords(action.Case{Kind: kind, Category: name})
		out = append(out, x)
	}
	return out
}

// files are the files of the workspace that the file can include: none that
// leads back to it, and none that it includes already. Files that others include
// come first.
func (s *scope) files() []Item {
	p := s.report.Project
	included, reached := map[string]bool{}, map[string]bool{}
	for _, d := range s.tree.Decls {
		for _, stmt := range d.Stmts {
			if stmt != s.stmt {
				reached[p.Included(s.tree.Name, stmt)] = true
			}
		}
	}
	var out []Item
	for name, f := range p.Files {
		if name == s.tree.Name || reached[name] || f.Unreadable != "" || f.Data != (s.head == "forces") {
			continue
		}
		back := false
		for _, g := range p.Closure(name) {
			back = back || g.Name == s.tree.Name
		}
		if back {
			continue
		}
		for _, d := range f.Decls {
			for _, stmt := range d.Stmts {
				included[p.Included(name, stmt)] = true
			}
		}
		out = append(out, Item{Label: relative(path.Dir(s.tree.Name), name), Detail: fileWords(f), Kind: FileItem, Filter: name, Eager: true})
	}
	for i := range out {
		if !included[out[i].Filter] {
			out[i].Group = 1
		}
		out[i].Filter = ""
	}
	sort.Slice(out, func(i, j int) bool { return out[i].Label < out[j].Label })
	return out
}

// relative is the path from a folder to a file, with slashes.
func relative(from, to string) string {
	if from == "." {
		return to
	}
	a, b := strings.Split(from, "/"), strings.Split(to, "/")
	for len(a) > 0 && len(b) > 1 && a[0] == b[0] {
		a, b = a[1:], b[1:]
	}
	return strings.Repeat("../", len(a)) + strings.Join(b, "/")
}

// fileWords says what a file brings.
func fileWords(f *lang.File) string {
	var parts []string
	count := map[string]int{}
	for _, d := range f.Decls {
		for _, s := range d.Stmts {
			word := s.Word
			if _, ok := s.Assigned(); ok {
				word = "value"
			}
			count[word]++
		}
	}
	for _, word := range []string{"basis", "material", "section", "case", "combination", "level", "value", "column", "strut", "tie"} {
		switch n := count[word]; {
		case n == 0:
		case word == "basis":
			parts = append(parts, word)
		default:
			parts = append(parts, counted(n, word))
		}
	}
	return strings.Join(parts, ", ")
}
