package output_test

import (
	"bytes"
	"encoding/json"
	"os"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/output"
	"kern/checker/record"
	"kern/lang"

	"github.com/santhosh-tekuri/jsonschema/v6"
)

const reported = `basis { standard "elastic" }
section spare = "HEB 120"
column A1 "Post" { section = "HEB 100"; material = "S235"; height = 3 m; load 900 kN }
column A2 "Post" { section = "HEB 100"; material = "S235"; height = 3,2 m; load 1 kN }
column A3 "Post" { section = "HEB 100"; material = "S235"; height = 9 m; load 1 kN; limit slenderness = 100; depart slenderness because "old, 'kept'" }
column A4 as A1 { load 10 kN }
`

func reportOf(files map[string]string) *checker.Report {
	var names []string
	for name := range files {
		names = append(names, name)
	}
	return checker.Check(lang.Load(names, func(name string) (string, error) { return files[name], nil }, nil), nil)
}

func same(name string) string { return name }

// logged is what the tests look at in a log.
type logged struct {
	Runs []struct {
		Tool struct {
			Driver struct{ Rules []struct{ ID string } }
		}
		Results []struct {
			RuleID              string
			RuleIndex           int
			PartialFingerprints map[string]string
			Suppressions        []struct{ Kind, Justification string }
			Fixes               []struct {
				ArtifactChanges []struct {
					Replacements []struct {
						DeletedRegion   struct{ StartLine, StartColumn, EndLine, EndColumn int }
						InsertedContent struct{ Text string }
					}
				}
			}
			Locations []struct {
				PhysicalLocation struct {
					ArtifactLocation struct{ URI string }
					Region           struct{ StartLine int }
				}
			}
		}
	}
}

func sarif(t *testing.T, files map[string]string, known *record.Outcome) logged {
	t.Helper()
	var b bytes.Buffer
	if err := output.SARIF(&b, reportOf(files), "kern 0.1.0", known, same); err != nil {
		t.Fatal(err)
	}
	text, err := os.ReadFile("testdata/schema/sarif-2.1.0.json")
	if err != nil {
		t.Fatal(err)
	}
	schema, err := jsonschema.UnmarshalJSON(bytes.NewReader(text))
	if err != nil {
		t.Fatal(err)
	}
	c := jsonschema.NewCompiler()
	c.AssertFormat()
	c.AssertVocabs()
	if err := c.AddResource("https://example.org/sarif.json", schema); err != nil {
		t.Fatal(err)
	}
	compiled, err := c.Compile("https://example.org/sarif.json")
	if err != nil {
		t.Fatal(err)
	}
	instance, err := jsonschema.UnmarshalJSON(bytes.NewReader(b.Bytes()))
	if err != nil {
		t.Fatal(err)
	}
	if err := compiled.Validate(instance); err != nil {
		t.Fatalf("the log is not SARIF 2.1.0 (schema of OASIS): %v", err)
	}
	var out logged
	if err := json.Unmarshal(b.Bytes(), &out); err != nil {
		t.Fatal(err)
	}
	return out
}

// TestSARIF holds a log against the published schema, and what it says against the
// report.
func TestSARIF(t *testing.T) {
	files := map[string]string{"frame/odd name & é.kern": reported}
	r := reportOf(files)
	recorded := record.Of(r, same)
	recorded.Carry(nil, "known")
	known := record.Compare(r, recorded, -1, same)
	log := sarif(t, files, known)
	run := log.Runs[0]
	if len(run.Results) != len(r.Diagnostics) {
		t.Fatalf("%d results of %d diagnostics", len(run.Results), len(r.Diagnostics))
	}
	kept, carried, fixed := 0, 0, 0
	for i, x := range run.Results {
		d := r.Diagnostics[i]
		if x.RuleID != d.Rule || x.RuleIndex < 0 || run.Tool.Driver.Rules[x.RuleIndex].ID != d.Rule {
			t.Errorf("result %d is of %s at %d, want %s", i, x.RuleID, x.RuleIndex, d.Rule)
		}
		if uri := x.Locations[0].PhysicalLocation.ArtifactLocation.URI; uri != "frame/odd%20name%20&%20%C3%A9.kern" {
			t.Errorf("the file is %q", uri)
		}
		for _, s := range x.Suppressions {
			switch {
			case s.Kind == "inSource" && s.Justification == "old, 'kept'":
				kept++
			case s.Kind == "external" && s.Justification == "known":
				carried++
			default:
				t.Errorf("%s is suppressed: %+v", x.RuleID, s)
			}
		}
		fixed += len(x.Fixes)
		for _, f := range x.Fixes {
			for _, c := range f.ArtifactChanges {
				for _, p := range c.Replacements {
					if p.DeletedRegion.StartLine != 4 || p.InsertedContent.Text == "" {
						t.Errorf("fix %+v", p)
					}
				}
			}
		}
	}
	if kept != 1 || carried < 3 || fixed < 1 {
		t.Errorf("%d departures, %d carried, %d fixes", kept, carried, fixed)
	}
	sarif(t, map[string]string{"empty.kern": ""}, nil)

	// a result that is not the recorded one is a result of the log
	recorded.Entries[0].Utilisation = 0.001
	known = record.Compare(r, recorded, -1, same)
	log = sarif(t, files, known)
	if n := len(log.Runs[0].Results) - len(r.Diagnostics); n != len(known.Differences) || n != 1 || log.Runs[0].Results[len(r.Diagnostics)].RuleID != "recorded-result" {
		t.Errorf("%d differences of %d", n, len(known.Differences))
	}
}

// TestFingerprints: a comment on top of a file, a line put in between and blanks
// leave the fingerprints as they are; another load does not.
func TestFingerprints(t *testing.T) {
	prints := func(text string) []string {
		var out []string
		for _, x := range sarif(t, map[string]string{"a.kern": text}, nil).Runs[0].Results {
			out = append(out, x.PartialFingerprints["kernStatement/v1"])
		}
		return out
	}
	want := strings.Join(prints(reported), " ")
	moved := "# a comment\n# of two lines\n\n" + strings.Replace(reported, "column A4", "unused = 3 m\ncolumn A4", 1)
	if got := strings.Join(prints(moved), " "); got != want {
		t.Errorf("%s\nwas %s", got, want)
	}
	if got := strings.Join(prints(strings.Replace(reported, "900 kN", "800 kN", 1)), " "); got == want {
		t.Error("another load has the same fingerprints")
	}
	seen := map[string]bool{}
	for _, p := range prints(reported) {
		if seen[p] {
			t.Error("two results share a fingerprint")
		}
		seen[p] = true
	}
}
