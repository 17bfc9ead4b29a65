package lang

import (
	"errors"
	"fmt"
	"slices"
	"strings"
	"testing"
)

// folder reads files from a map and counts how often.
type folder struct {
	files map[string]string
	reads map[string]int
}

func (f *folder) read(name string) (string, error) {
	if f.reads == nil {
		f.reads = map[string]int{}
	}
	f.reads[name]++
	text, ok := f.files[name]
	if !ok {
		return "", errors.New("there is no such file")
	}
	return text, nil
}

func include(names ...string) string {
	var b strings.Builder
	for _, n := range names {
		fmt.Fprintf(&b, "include \"%s\"\n", n)
	}
	return b.String()
}

// told lists the problems of a project as "file: rule".
func told(p *Project) []string {
	var out []string
	for _, d := range p.Problems {
		out = append(out, d.Decl.File.Name+": "+d.Rule)
	}
	slices.Sort(out)
	return out
}

func closure(p *Project, root string) []string {
	var out []string
	for _, f := range p.Closure(root) {
		out = append(out, f.Name)
	}
	return out
}

func TestLoad(t *testing.T) {
	for _, c := range []struct {
		name    string
		files   map[string]string
		ask     []string
		roots   []string
		told    []string
		closure []string // of the first root
	}{
		{"alone", map[string]string{"a": "x = 1\n"}, []string{"a"}, []string{"a"}, nil, []string{"a"}},
		{"one includes another", map[string]string{"a": include("b"), "b": ""}, []string{"a"}, []string{"a"}, nil, []string{"b", "a"}},
		{"what is included is no root", map[string]string{"a": include("b"), "b": ""}, []string{"b", "a"}, []string{"a"}, nil, []string{"b", "a"}},
		{"chain", map[string]string{"a": include("b"), "b": include("c"), "c": ""}, []string{"a"}, []string{"a"}, nil, []string{"c", "b", "a"}},
		{"diamond", map[string]string{"a": include("b", "c"), "b": include("d"), "c": include("d"), "d": "x = 1\n"}, []string{"a"}, []string{"a"}, nil, []string{"d", "b", "c", "a"}},
		{"twice the same", map[string]string{"a": include("b", "b"), "b": ""}, []string{"a"}, []string{"a"}, nil, []string{"b", "a"}},
		{"two roots share", map[string]string{"a": include("c"), "b": include("c"), "c": ""}, []string{"a", "b", "c"}, []string{"a", "b"}, nil, []string{"c", "a"}},
		{"missing", map[string]string{"a": include("b")}, []string{"a"}, []string{"a"}, []string{"a: include-missing"}, []string{"a"}},
		{"missing below", map[string]string{"a": include("b"), "b": include("c")}, []string{"a"}, []string{"a"}, []string{"b: include-missing"}, []string{"b", "a"}},
		{"itself", map[string]string{"a": include("a")}, []string{"a"}, []string{"a"}, []string{"a: include-loop"}, []string{"a"}},
		{"itself by another name", map[string]string{"d/a": include("../d/./a")}, []string{"d/a"}, []string{"d/a"}, []string{"d/a: include-loop"}, []string{"d/a"}},
		{"loop of two", map[string]string{"a": include("b"), "b": include("a")}, []string{"a", "b"}, []string{"a", "b"}, []string{"a: include-loop", "b: include-loop"}, []string{"b", "a"}},
		{"loop below", map[string]string{"a": include("b"), "b": include("c"), "c": include("b")}, []string{"a"}, []string{"a"}, []string{"b: include-loop", "c: include-loop"}, []string{"c", "b", "a"}},
		{"outside", map[string]string{"a": include("../b"), "b": ""}, []string{"a"}, []string{"a"}, []string{"a: include-outside"}, []string{"a"}},
		{"outside by way of a folder", map[string]string{"d/a": include("x/../../../b")}, []string{"d/a"}, []string{"d/a"}, []string{"d/a: include-outside"}, []string{"d/a"}},
		{"absolute", map[string]string{"a": include("/etc/b")}, []string{"a"}, []string{"a"}, []string{"a: include-outside"}, []string{"a"}},
		{"a drive", map[string]string{"a": include(`C:\b`, "c:b")}, []string{"a"}, []string{"a"}, []string{"a: include-outside", "a: include-outside"}, []string{"a"}},
		{"a network share", map[string]string{"a": include(`\\host\b`)}, []string{"a"}, []string{"a"}, []string{"a: include-outside"}, []string{"a"}},
		{"backslashes", map[string]string{"d/a": include(`..\e\b`), "e/b": ""}, []string{"d/a"}, []string{"d/a"}, nil, []string{"e/b", "d/a"}},
		{"up and down", map[string]string{"d/a": include("../e/b"), "e/b": include("c"), "e/c": ""}, []string{"d/a"}, []string{"d/a"}, nil, []string{"e/c", "e/b", "d/a"}},
		{"no name", map[string]string{"a": "include\ninclude 5\ninclude \"\"\n"}, []string{"a"}, []string{"a"}, []string{"a: include-outside", "a: wrong-form", "a: wrong-form"}, []string{"a"}},
		{"broken include", map[string]string{"a": "include \"b\n", "b": ""}, []string{"a"}, []string{"a"}, nil, []string{"a"}},
		{"a value of that name", map[string]string{"a": "include = 5\n"}, []string{"a"}, []string{"a"}, nil, []string{"a"}},
		{"asked for but missing", map[string]string{"a": ""}, []string{"a", "b"}, []string{"a"}, nil, []string{"a"}},
		{"asked for twice", map[string]string{"a": ""}, []string{"a", "a"}, []string{"a"}, nil, []string{"a"}},
	} {
		t.Run(c.name, func(t *testing.T) {
			f := &folder{files: c.files}
			p := Load(c.ask, f.read, nil)
			if !slices.Equal(p.Roots, c.roots) {
				t.Errorf("roots %q, want %q", p.Roots, c.roots)
			}
			if got := told(p); !slices.Equal(got, c.told) {
				t.Errorf("problems %q, want %q", got, c.told)
			}
			if got := closure(p, c.roots[0]); !slices.Equal(got, c.closure) {
				t.Errorf("closure %q, want %q", got, c.closure)
			}
			for name, n := range f.reads {
				if n > 1 {
					t.Errorf("%s was read %d times", name, n)
				}
				if strings.HasPrefix(name, "/") || strings.HasPrefix(name, "..") || strings.Contains(name, ":") || strings.Contains(name, `\`) {
					t.Errorf("%q was read", name)
				}
			}
			for _, d := range p.Problems {
				if d.Span.Of(d.Decl.Text) == "" || d.Message == "" {
					t.Errorf("%s underlines %v", d.Rule, d.Span)
				}
			}
		})
	}
}

func TestLoadGoesOnFromEarlier(t *testing.T) {
	f := &folder{files: map[string]string{"a": include("b") + "x = 1\n", "b": "y = 1\n"}}
	old := Load([]string{"a"}, f.read, nil)
	f.files["b"] = "y = 2\n"
	p := Load([]string{"a"}, f.read, old)
	if p.Files["a"] != old.Files["a"] {
		t.Error("a file that did not change was read anew")
	}
	if p.Files["b"] == old.Files["b"] || p.Files["b"].Text != "y = 2\n" {
		t.Error("a file that changed was not read anew")
	}
	if p.Files["b"].Decls[0].File != old.Files["b"].Decls[0].File {
		t.Error("a file that changed became another file")
	}
	delete(f.files, "b")
	p = Load([]string{"a"}, f.read, p)
	if got := told(p); !slices.Equal(got, []string{"a: include-missing"}) {
		t.Errorf("after the file has gone: %q", got)
	}
	f.files["b"] = "y = 3\n"
	p = Load([]string{"a"}, f.read, p)
	if got := told(p); got != nil || p.Files["b"] == nil {
		t.Errorf("after the file has come back: %q", got)
	}
	inc := p.Files["a"].Decls[0].Stmts[0]
	if got := p.Included("a", inc); got != "b" {
		t.Errorf("the include leads to %q", got)
	}
	if got := p.Included("b", inc); got != "" {
		t.Errorf("the include of another file leads to %q", got)
	}
}

// Many files that include one another, in a row and crosswise.
func TestLoadManyFiles(t *testing.T) {
	files := map[string]string{}
	for i := range 400 {
		files[fmt.Sprint("f", i)] = include(fmt.Sprint("f", i+1), fmt.Sprint("f", i+2))
	}
	files["f400"], files["f401"] = "", ""
	f := &folder{files: files}
	p := Load([]string{"f0"}, f.read, nil)
	if len(p.Problems) > 0 || len(p.Closure("f0")) != 402 {
		t.Errorf("%d files, problems %q", len(p.Closure("f0")), told(p))
	}
}

func TestResolve(t *testing.T) {
	for _, c := range []struct{ from, include, want string }{
		{"a", "b", "b"}, {"d/a", "b", "d/b"}, {"d/a", "../b", "b"}, {"d/a", "./b", "d/b"}, {"d/e/a", "../../b", "b"}, {"a", "d/../b", "b"},
		{"d/a", `..\b`, "b"}, {"a", `d\b`, "d/b"}, {"a", "d//b", "d/b"}, {"a", "..b", "..b"}, {"a", "b c.kern", "b c.kern"},
		{"a", "", ""}, {"a", "..", ""}, {"a", "../b", ""}, {"d/a", "../../b", ""}, {"a", "/b", ""}, {"a", `\b`, ""}, {"a", "C:b", ""},
		{"a", `C:\b`, ""}, {"a", "b\x00c", ""}, {"a", "d/../../b", ""}, {"a", `..\b`, ""},
	} {
		got, ok := Resolve(c.from, c.include)
		if got != c.want || ok != (c.want != "") {
			t.Errorf("%q from %q leads to %q, %v; want %q", c.include, c.from, got, ok, c.want)
		}
	}
}
