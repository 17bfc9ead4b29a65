package rule_test

import (
	"go/ast"
	"go/parser"
	"go/token"
	"io/fs"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"kern/checker/rule"
	"kern/checker/standard/aisc360"
	"kern/checker/standard/elastic"
	"kern/checker/standard/en1993"
)

// TestEmitted reads the sources of the language and of the checker and holds the
// rules that they name against the pages: each rule has a page, and each page a
// place in the sources that names its rule.
func TestEmitted(t *testing.T) {
	s := scan(t, filepath.Join("..", "..", "lang"), "..")
	for name, at := range s.found {
		if rule.Find(name) == nil {
			t.Errorf("%s: rule %q has no page", at, name)
		}
	}
	for _, r := range rule.All() {
		if _, ok := s.found[r.Name]; !ok {
			t.Errorf("pages/%s.md: nothing in the sources names this rule", r.Name)
		}
	}
	for name, severity := range s.severities {
		if got := rule.SeverityOf(name).String(); !strings.EqualFold(got, severity) {
			t.Errorf("%s is made with severity %s, its page says %s", name, severity, got)
		}
	}
	if len(s.found) < 70 || len(s.severities) < 6 {
		t.Errorf("only %d rules and %d severities found: the scan does not see the sources", len(s.found), len(s.severities))
	}
}

// TestStandardsRules wants a page of topic check for every rule that a standard
// lists.
func TestStandardsRules(t *testing.T) {
	for _, name := range slices.Concat(elastic.Standard{}.Rules(), en1993.Standard{}.Rules(), aisc360.Standard{}.Rules()) {
		if r := rule.Find(name); r == nil || !r.Check {
			t.Errorf("%s has no page as a check", name)
		}
	}
}

// TestScan shows the scan sources of its own, so that it is known to see each
// form in which a rule can be named, and not to see what is no rule.
func TestScan(t *testing.T) {
	s := newSources(t)
	s.parse("form.go", `package p
func (r *reader) fail(rule string, span int) {}
func (p *project) include(what int, rule string) {}
type row struct{ rule, hand string }
func f() {
	const rule, clause = "by-constant", "6.2.4"
	_ = Problem{Rule: "by-field", Severity: Warning}
	p.Rule, p.Message = "by-assignment", "no-rule"
	r.fail("by-call", 1)
	x.include(1, "by-second-argument")
	_ = []row{{"by-position", "no-rule"}}
	problem := func(rule, message string) {}
	problem("by-closure", "no-rule")
	for _, rule := range []string{"by-range"} { r.fail(rule, 2) }
}
func g(x axis) {
	rule, clause := "by-axis-"+x.word, "no-rule"
	problem := func(message string) {}
	problem("no-rule")
	first, second := "by-variable", "by-other"
	rule = first
	rule = second
	r.fail(d.Rule, 1)
	q := Problem{Rule: rule}
}
`)
	s.collect()
	var got []string
	for name := range s.found {
		got = append(got, name)
	}
	slices.Sort(got)
	want := []string{"by-assignment", "by-axis-major", "by-axis-minor", "by-call", "by-closure", "by-constant", "by-field", "by-other",
		"by-position", "by-range", "by-second-argument", "by-variable"}
	if !slices.Equal(got, want) {
		t.Errorf("got  %v\nwant %v", got, want)
	}
	if s.severities["by-field"] != "Warning" || len(s.severities) != 1 {
		t.Errorf("severities %v", s.severities)
	}
}

// sources looks through Go files for the names of rules. A rule is named by a
// string that goes into something called rule or Rule: a field, a variable, a
// constant, or the parameter of a function.
type sources struct {
	t          *testing.T
	set        *token.FileSet
	files      []source
	found      map[string]token.Position
	severities map[string]string      // of literals with a rule and a severity
	functions  map[string][]ruleParam // by folder and name
	fields     map[string]int         // of declared structs, by folder and name: which field is a rule
}

type source struct {
	*ast.File
	folder string
}

// ruleParam tells which parameter of a function is a rule, -1 for none.
type ruleParam struct {
	at, count int
	variadic  bool
}

func (p ruleParam) takes(args int) bool { return args == p.count || p.variadic && args >= p.count-1 }

func ruleParamOf(f *ast.FuncType) ruleParam {
	p := ruleParam{at: ruleAt(f.Params), count: f.Params.NumFields()}
	if n := len(f.Params.List); n > 0 {
		_, p.variadic = f.Params.List[n-1].Type.(*ast.Ellipsis)
	}
	return p
}

func newSources(t *testing.T) *sources {
	return &sources{t: t, set: token.NewFileSet(), found: map[string]token.Position{}, severities: map[string]string{},
		functions: map[string][]ruleParam{}, fields: map[string]int{}}
}

func scan(t *testing.T, roots ...string) *sources {
	t.Helper()
	s := newSources(t)
	for _, root := range roots {
		err := filepath.WalkDir(root, func(path string, d fs.DirEntry, err error) error {
			switch {
			case err != nil:
				return err
			case d.IsDir() && slices.Contains([]string{"rule", "testdata", "output", "drawing", "review", "record", "sheet", "schedule", "chart"}, d.Name()): // they print what others emit
				return filepath.SkipDir
			case !d.IsDir() && strings.HasSuffix(path, ".go") && !strings.HasSuffix(path, "_test.go"):
				s.parse(path, nil)
			}
			return nil
		})
		if err != nil {
			t.Fatal(err)
		}
	}
	s.collect()
	return s
}

func (s *sources) parse(name string, text any) {
	f, err := parser.ParseFile(s.set, name, text, parser.SkipObjectResolution)
	if err != nil {
		s.t.Fatal(err)
	}
	s.files = append(s.files, source{f, filepath.Dir(name)})
}

func isRule(name string) bool { return name == "rule" || name == "Rule" }

// ruleAt finds the field or parameter that is a rule, -1 for none.
func ruleAt(list *ast.FieldList) int {
	i := 0
	for _, f := range list.List {
		for _, n := range f.Names {
			if isRule(n.Name) {
				return i
			}
			i++
		}
		if len(f.Names) == 0 {
			i++
		}
	}
	return -1
}

func (s *sources) collect() {
	for _, f := range s.files {
		ast.Inspect(f.File, func(n ast.Node) bool {
			switch n := n.(type) {
			case *ast.FuncDecl:
				// Record.Of looks a rule up and names none; a span's Of has the same form
				if p := ruleParamOf(n.Type); p.at >= 0 && n.Name.Name != "Of" {
					key := f.folder + " " + n.Name.Name
					s.functions[key] = append(s.functions[key], p)
				}
			case *ast.TypeSpec:
				if st, ok := n.Type.(*ast.StructType); ok {
					if i := ruleAt(st.Fields); i >= 0 {
						s.fields[f.folder+" "+n.Name.Name] = i
					}
				}
			}
			return true
		})
	}
	for _, f := range s.files {
		for _, d := range f.Decls {
			s.declaration(d, f.folder)
		}
	}
}

// scope is what the strings of one top-level declaration can hold.
type scope struct {
	*sources
	folder   string
	values   map[string][]ast.Expr // what is assigned to each variable
	closures map[string]ruleParam  // the function literals that have a name
}

func (s *sources) declaration(d ast.Decl, folder string) {
	c := scope{s, folder, map[string][]ast.Expr{}, map[string]ruleParam{}}
	assign := func(to []ast.Expr, from []ast.Expr) {
		for i, e := range to {
			if i >= len(from) {
				break
			}
			if id, ok := e.(*ast.Ident); ok {
				c.values[id.Name] = append(c.values[id.Name], from[i])
				if f, ok := from[i].(*ast.FuncLit); ok {
					c.closures[id.Name] = ruleParamOf(f.Type)
				}
			}
		}
	}
	names := func(list []*ast.Ident) []ast.Expr {
		var out []ast.Expr
		for _, n := range list {
			out = append(out, n)
		}
		return out
	}
	ast.Inspect(d, func(n ast.Node) bool {
		switch n := n.(type) {
		case *ast.AssignStmt:
			assign(n.Lhs, n.Rhs)
		case *ast.ValueSpec:
			assign(names(n.Names), n.Values)
		case *ast.RangeStmt:
			if list, ok := n.X.(*ast.CompositeLit); ok && n.Value != nil {
				for _, e := range list.Elts {
					assign([]ast.Expr{n.Value}, []ast.Expr{e})
				}
			}
		}
		return true
	})
	ast.Inspect(d, func(n ast.Node) bool {
		switch n := n.(type) {
		case *ast.CompositeLit:
			c.literal(n)
		case *ast.AssignStmt:
			c.assigned(n.Lhs, n.Rhs)
		case *ast.ValueSpec:
			c.assigned(names(n.Names), n.Values)
		case *ast.RangeStmt:
			if list, ok := n.X.(*ast.CompositeLit); ok && n.Value != nil {
				for _, e := range list.Elts {
					c.assigned([]ast.Expr{n.Value}, []ast.Expr{e})
				}
			}
		case *ast.CallExpr:
			c.call(n)
		}
		return true
	})
}

// take notes the rules that an expression can be.
func (c scope) take(e ast.Expr) []string {
	names := c.strings(e, 0)
	for _, name := range names {
		if name == "" {
			continue // not set yet
		}
		if !kebab.MatchString(name) {
			c.t.Errorf("%s: %q stands where a rule is due", c.set.Position(e.Pos()), name)
			continue
		}
		if _, ok := c.found[name]; !ok {
			c.found[name] = c.set.Position(e.Pos())
		}
	}
	return names
}

func (c scope) assigned(to, from []ast.Expr) {
	for i, e := range to {
		if i >= len(from) {
			break
		}
		switch e := e.(type) {
		case *ast.Ident:
			if isRule(e.Name) {
				c.take(from[i])
			}
		case *ast.SelectorExpr:
			if isRule(e.Sel.Name) {
				c.take(from[i])
			}
		}
	}
}

func (c scope) call(n *ast.CallExpr) {
	var candidates []ruleParam
	switch f := n.Fun.(type) {
	case *ast.Ident:
		candidates = c.functions[c.folder+" "+f.Name]
		if p, ok := c.closures[f.Name]; ok {
			candidates = []ruleParam{p}
		}
	case *ast.SelectorExpr:
		candidates = c.functions[c.folder+" "+f.Sel.Name]
	}
	for _, p := range candidates {
		if p.at >= 0 && p.at < len(n.Args) && p.takes(len(n.Args)) {
			c.take(n.Args[p.at])
			return
		}
	}
}

func (c scope) literal(n *ast.CompositeLit) {
	var rules []string
	severity := ""
	for _, e := range n.Elts {
		kv, ok := e.(*ast.KeyValueExpr)
		if !ok {
			continue
		}
		key, ok := kv.Key.(*ast.Ident)
		switch {
		case ok && isRule(key.Name):
			rules = c.take(kv.Value)
		case ok && key.Name == "Severity":
			switch v := kv.Value.(type) {
			case *ast.Ident:
				severity = v.Name
			case *ast.SelectorExpr:
				severity = v.Sel.Name
			}
		}
	}
	if severity != "" {
		for _, r := range rules {
			c.severities[r] = severity
		}
	}
	// fields by position, of the literal itself and of the elements of a list
	position := func(of ast.Expr, list []ast.Expr) {
		id, ok := of.(*ast.Ident)
		if !ok || len(list) == 0 {
			return
		}
		if _, keyed := list[0].(*ast.KeyValueExpr); keyed {
			return
		}
		if i, ok := c.fields[c.folder+" "+id.Name]; ok && i < len(list) {
			c.take(list[i])
		}
	}
	position(n.Type, n.Elts)
	if array, ok := n.Type.(*ast.ArrayType); ok {
		for _, e := range n.Elts {
			if element, ok := e.(*ast.CompositeLit); ok && element.Type == nil {
				position(array.Elt, element.Elts)
			}
		}
	}
}

// strings gives the texts that an expression can be: those of a literal, of
// what was assigned to a variable, of a sum of them. The word or name of an
// axis is major or minor. What comes from elsewhere (a parameter, a field
// called rule) was looked at where it was made; anything else is refused, so
// that no rule hides from the scan.
func (c scope) strings(e ast.Expr, depth int) []string {
	if depth > 8 {
		c.t.Errorf("%s: too deep", c.set.Position(e.Pos()))
		return nil
	}
	switch e := e.(type) {
	case *ast.BasicLit:
		if text, err := strconv.Unquote(e.Value); err == nil {
			return []string{text}
		}
	case *ast.ParenExpr:
		return c.strings(e.X, depth+1)
	case *ast.BinaryExpr:
		var out []string
		for _, a := range c.strings(e.X, depth+1) {
			for _, b := range c.axisWords(e.Y, depth+1) {
				out = append(out, a+b)
			}
		}
		return out
	case *ast.Ident:
		values := c.values[e.Name]
		var out []string
		for _, v := range values {
			if id, ok := v.(*ast.Ident); ok && id.Name == e.Name {
				continue
			}
			out = append(out, c.strings(v, depth+1)...)
		}
		if len(values) > 0 || isRule(e.Name) {
			return out // nothing: a parameter
		}
	case *ast.SelectorExpr:
		if isRule(e.Sel.Name) {
			return nil
		}
	case *ast.CallExpr:
		// a rule that a member's text names is looked up among the known ones
		if f, ok := e.Fun.(*ast.SelectorExpr); ok && (f.Sel.Name == "Of" || f.Sel.Name == "Join") {
			return nil
		}
	}
	c.t.Errorf("%s: a rule is named in a way that this test cannot follow", c.set.Position(e.Pos()))
	return nil
}

func (c scope) axisWords(e ast.Expr, depth int) []string {
	if s, ok := e.(*ast.SelectorExpr); ok && (s.Sel.Name == "word" || s.Sel.Name == "name") {
		return []string{"major", "minor"}
	}
	return c.strings(e, depth)
}
