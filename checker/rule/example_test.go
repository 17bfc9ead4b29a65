package rule_test

import (
	"errors"
	"slices"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/rule"
	"kern/checker/standard"
	"kern/lang"
)

const exampleFile = "example.kern"

func check(files map[string]string) *checker.Report {
	read := func(name string) (string, error) {
		if text, ok := files[name]; ok {
			return text, nil
		}
		return "", errors.New("no such file")
	}
	return checker.Check(lang.Load([]string{exampleFile}, read, nil), nil)
}

func filesOf(e rule.Example) map[string]string {
	files := map[string]string{exampleFile: e.Text}
	for name, text := range e.Files {
		files[name] = text
	}
	return files
}

// TestExamples runs every example of every page. A bad example meets its rule,
// a good one does not; neither meets anything that its page does not name. That
// a member is undecided is a consequence of an error in it and needs no naming.
func TestExamples(t *testing.T) {
	for _, r := range rule.All() {
		t.Run(r.Name, func(t *testing.T) {
			met := map[string]bool{}
			first := true
			for i, e := range r.Examples {
				report := check(filesOf(e))
				for _, d := range report.Diagnostics {
					met[d.Rule] = true
					allowed := d.Rule == r.Name && e.Kind == "bad" || d.Rule == "undecided" && (e.Kind == "bad" || len(r.Also) > 0) || slices.Contains(r.Also, d.Rule)
					if !allowed {
						t.Errorf("example %d (%s) meets %s %s: %s", i+1, e.Kind, d.Severity, d.Rule, d.Message)
					}
					if d.Rule == r.Name && d.Severity != r.Severity {
						t.Errorf("example %d: the diagnostic is %s, the page says %s", i+1, d.Severity, r.Severity)
					}
				}
				for _, m := range report.Members {
					for _, c := range m.Coverage {
						met[c.Rule] = met[c.Rule] || c.State == standard.NotCovered
					}
				}
				switch {
				case r.Check && e.Kind == "bad":
					checkBad(t, r, report)
				case r.Check:
					checkGood(t, r, report)
				case e.Kind == "bad":
					languageBad(t, r, report, e, first)
				}
				if e.Kind == "bad" {
					first = false
				}
			}
			for _, also := range r.Also {
				if !met[also] {
					t.Errorf("no example meets %s, which the page names", also)
				}
			}
		})
	}
}

// languageBad looks for the rule's diagnostic, the fixes that its page promises
// and, for safe ones, whether they mend it.
func languageBad(t *testing.T, r *rule.Rule, report *checker.Report, e rule.Example, first bool) {
	t.Helper()
	fix := "none"
	found := 0
	for _, d := range report.Diagnostics {
		if d.Rule != r.Name {
			continue
		}
		found++
		if d.Message == "" {
			t.Error("the diagnostic has no message")
		}
		for _, f := range d.Fixes {
			if f.Safe {
				fix = "safe"
			} else if fix == "none" {
				fix = "offer"
			}
			if !f.Safe {
				continue
			}
			for _, after := range check(apply(filesOf(e), f)).Diagnostics {
				if after.Rule == r.Name {
					t.Errorf("after the safe fix %q there is still: %s", f.Title, after.Message)
				}
			}
		}
	}
	if found == 0 {
		t.Errorf("the bad example does not meet the rule; it meets %v", rulesOf(report))
	}
	if first && fix != r.Fix {
		t.Errorf("the diagnostic offers fix: %s, the page says %s", fix, r.Fix)
	}
}

// apply makes the edits of a fix, the last first.
func apply(files map[string]string, f checker.Fix) map[string]string {
	edits := slices.Clone(f.Edits)
	slices.SortFunc(edits, func(a, b checker.Edit) int { return int(b.Span.Start) - int(a.Span.Start) })
	for _, e := range edits {
		text := files[e.File]
		files[e.File] = text[:e.Span.Start] + e.New + text[e.Span.End:]
	}
	return files
}

// checkBad wants a member that fails the check, or that the check leaves
// undecided where the page says that a person has to make it.
func checkBad(t *testing.T, r *rule.Rule, report *checker.Report) {
	t.Helper()
	if len(report.Members) == 0 {
		t.Fatal("the example has no member")
	}
	for _, m := range report.Members {
		outcome := "none"
		for _, c := range m.Coverage {
			if c.Rule == r.Name && c.State == standard.NotCovered && m.Verdict == standard.Undecided {
				outcome = "undecided"
			}
		}
		for _, c := range m.Checks {
			if c.Rule == r.Name && c.Verdict == standard.Fails && m.Verdict == standard.Fails {
				outcome = "fails"
				if !strings.Contains(r.Page, strings.TrimPrefix(c.Clause, "EN 1993-1-1 ")) && r.Name != "requirement" {
					t.Errorf("the check cites %q, which the page does not", c.Clause)
				}
			}
		}
		if outcome != r.Outcome {
			t.Errorf("member %s comes to %q in this check, the page says %q: bring the page up to date", m.Name, outcome, r.Outcome)
		}
		reported := slices.Contains(rulesOf(report), r.Name)
		if reported != (r.Outcome == "fails") {
			t.Errorf("outcome %s, and a diagnostic of the rule: %v", r.Outcome, reported)
		}
	}
}

// checkGood wants members that pass the check, and altogether, unless another
// check that the page names is left to a person.
func checkGood(t *testing.T, r *rule.Rule, report *checker.Report) {
	t.Helper()
	if len(report.Members) == 0 {
		t.Fatal("the example has no member")
	}
	for _, m := range report.Members {
		for _, c := range m.Checks {
			if c.Rule == r.Name && c.Verdict != standard.Passes {
				t.Errorf("member %s is %s in the check", m.Name, c.Verdict)
			}
			if c.Verdict != standard.Passes {
				t.Errorf("member %s is %s in %s", m.Name, c.Verdict, c.Rule)
			}
		}
		left := false
		for _, c := range m.Coverage {
			if c.State == standard.NotCovered {
				left = true
				if c.Rule == r.Name || !slices.Contains(r.Also, c.Rule) {
					t.Errorf("member %s is left undecided by %s: %s", m.Name, c.Rule, c.Why)
				}
			}
		}
		if m.Verdict != standard.Passes && !(left && m.Verdict == standard.Undecided) {
			t.Errorf("member %s is %s", m.Name, m.Verdict)
		}
	}
}

func rulesOf(report *checker.Report) []string {
	var out []string
	for _, d := range report.Diagnostics {
		out = append(out, d.Rule)
	}
	return out
}
