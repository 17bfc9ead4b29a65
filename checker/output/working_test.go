package output_test

import (
	"flag"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/generate"
	"kern/checker/output"
	"kern/lang"
	"kern/lang/unit"

	"github.com/google/go-cmp/cmp"
	"golang.org/x/tools/txtar"
)

var update = flag.Bool("update", false, "write what the archives want anew")

// check works out a set of files.
func check(files map[string]string) *checker.Report {
	var names []string
	for name := range files {
		names = append(names, name)
	}
	read := func(name string) (string, error) {
		if text, ok := files[name]; ok {
			return text, nil
		}
		return "", os.ErrNotExist
	}
	return checker.Check(lang.Load(names, read, nil), nil)
}

// TestWorking plays testdata/working: each line of "ask" is a member and, if it
// likes, a check; "want" is the pages, plain where the line begins with "plain".
func TestWorking(t *testing.T) {
	paths, err := filepath.Glob("testdata/working/*.txtar")
	if err != nil || len(paths) < 5 {
		t.Fatalf("%d archives: %v", len(paths), err)
	}
	for _, path := range paths {
		t.Run(strings.TrimSuffix(filepath.Base(path), ".txtar"), func(t *testing.T) {
			data, err := os.ReadFile(path)
			if err != nil {
				t.Fatal(err)
			}
			archive := txtar.Parse(data)
			files := map[string]string{}
			ask, want := "", -1
			for i, f := range archive.Files {
				switch f.Name {
				case "ask":
					ask = string(f.Data)
				case "want":
					want = i
				default:
					files[f.Name] = string(f.Data)
				}
			}
			if want < 0 || ask == "" {
				t.Fatal("the archive has no ask or no want")
			}
			r := check(files)
			var got strings.Builder
			for line := range strings.Lines(ask) {
				fields := strings.Fields(line)
				markdown := fields[0] != "plain"
				if !markdown {
					fields = fields[1:]
				}
				rule := ""
				if len(fields) > 1 {
					rule = fields[1]
				}
				found := false
				for _, m := range r.Members {
					if m.Name == fields[0] {
						found = true
						p := output.NewPage(markdown)
						output.Working(p, m, rule)
						fmt.Fprintf(&got, "> %s\n%s\n", strings.TrimSpace(line), p)
						if markdown && p.String() != output.WorkingMarkdown(m, rule) {
							t.Error("WorkingMarkdown says something else")
						}
					}
				}
				if !found {
					t.Errorf("there is no member %s", fields[0])
				}
			}
			if *update {
				archive.Files[want].Data = []byte(got.String())
				if err := os.WriteFile(path, txtar.Format(archive), 0o666); err != nil {
					t.Fatal(err)
				}
				return
			}
			if d := cmp.Diff(string(archive.Files[want].Data), got.String()); d != "" {
				t.Errorf("(-want +got; -update writes it)\n%s", d)
			}
		})
	}
}

// TestEquations reads every equation that the pages of some hundred members print
// back in the language: the numbers give the printed result.
func TestEquations(t *testing.T) {
	files := generate.Project(150, 7)
	for _, name := range []string{"gallery", "hall", "mast", "workshop", "tower", "basis", "steel"} {
		text, err := os.ReadFile("../../testdata/boathouse/" + name + ".kern")
		if err != nil {
			t.Fatal(err)
		}
		files["boathouse/"+name+".kern"] = string(text)
	}
	r := check(files)
	equations := 0
	for _, m := range r.Members {
		record := m.Derive()
		if record == nil {
			continue
		}
		for _, s := range record.Steps {
			if s.Formula == nil || math.IsNaN(s.Value) {
				continue
			}
			printed := printedEquation(t, output.StepLine(record.Set, m.Units(), s))
			i := strings.LastIndex(printed, " = ")
			j := strings.LastIndex(printed[:i], " = ")
			numbers, result := printed[j+3:i], printed[i+3:]
			got, want := value(t, numbers), value(t, result)
			// five digits in, five digits out; a difference of nearly equal values
			// loses some of them
			if math.Abs(got-want) > 2e-3*math.Max(math.Abs(want), 1e-3) {
				t.Errorf("%s: %s is %g, printed as %s", m.Name, numbers, got, result)
			}
			if shown := value(t, result); math.Abs(shown-s.Value) > 1e-4*math.Abs(s.Value) {
				t.Errorf("%s: %s is printed for %g", m.Name, result, s.Value)
			}
			equations++
		}
	}
	if equations < 3000 {
		t.Errorf("only %d equations", equations)
	}
}

// printedEquation is the second line of a step as plain text.
func printedEquation(t *testing.T, l output.Line) string {
	t.Helper()
	p := output.NewPage(false)
	p.Text(l)
	_, equation, ok := strings.Cut(strings.TrimRight(p.String(), "\n"), "\n")
	if !ok {
		t.Fatalf("a step of one line: %s", p)
	}
	return equation
}

func value(t *testing.T, text string) float64 {
	t.Helper()
	e, err := lang.ParseExpr(text)
	if err != nil {
		t.Fatalf("%s cannot be read: %v", text, err)
	}
	q, p := lang.Eval(e, func(n *lang.Expr) (unit.Quantity, *lang.Problem) {
		t.Fatalf("%s: the name %s is left", text, n.Text)
		return unit.Quantity{}, lang.Silent
	})
	if p != nil {
		t.Fatalf("%s has no value: %s", text, p.Message)
	}
	return q.Value
}

// TestWholeWorking holds that the page of a whole member has every value of its
// derivation and each check's own page is complete: a symbol that an equation
// reads stands on the page.
func TestWholeWorking(t *testing.T) {
	for _, m := range check(generate.Project(40, 3)).Members {
		whole := output.WorkingMarkdown(m, "")
		record := m.Derive()
		applies := map[string]bool{"": true}
		for _, c := range m.Checks {
			applies[c.Rule] = true
		}
		for _, s := range record.Steps {
			if !applies[s.Group] {
				continue
			}
			if name := record.Set.At(s.Symbol).Name; s.Note == "" && !strings.Contains(whole, "`"+name) {
				t.Errorf("%s: the page of all lacks %s", m.Name, name)
			}
		}
		for _, c := range m.Checks {
			page := output.WorkingMarkdown(m, c.Rule)
			for _, s := range record.Of(c.Rule) {
				for _, in := range s.Inputs {
					if name := record.Set.At(in.Symbol).Name; !strings.Contains(page, "`"+name+"` ") && !strings.Contains(page, "`"+name+" = ") {
						t.Errorf("%s: the page of %s does not say where %s comes from", m.Name, c.Rule, name)
					}
				}
			}
			if !strings.Contains(page, m.Sentence(c)) {
				t.Errorf("%s: the page of %s does not say what it comes to", m.Name, c.Rule)
			}
		}
	}
}

// TestLeading holds that the steps which lead to a symbol stand by themselves.
func TestLeading(t *testing.T) {
	for _, m := range check(generate.Project(20, 5)).Members {
		record := m.Derive()
		for id := range derivation.ID(record.Set.Len()) {
			steps := record.Leading(id)
			known := map[derivation.ID]float64{}
			for _, s := range steps {
				for _, in := range s.Inputs {
					if v, ok := known[in.Symbol]; !ok || v != in.Value {
						t.Errorf("%s: %s reads %s = %g, which stands there as %g", m.Name, record.Set.At(s.Symbol).Name, record.Set.At(in.Symbol).Name, in.Value, v)
					}
				}
				known[s.Symbol] = s.Value
			}
			if n := len(steps); n > 0 && steps[n-1].Symbol != id {
				t.Errorf("%s: the steps to %s end with another", m.Name, record.Set.At(id).Name)
			}
		}
	}
}
