package review_test

import (
	"fmt"
	"maps"
	"slices"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/generate"
	"kern/checker/review"
	"kern/lang"

	"github.com/google/go-cmp/cmp"
	"github.com/google/go-cmp/cmp/cmpopts"
)

// again reviews two states as the command does: what is the same in both is worked
// out once.
func again(before, after map[string]string) *review.Review {
	load := func(files map[string]string, other *lang.Project) *lang.Project {
		return lang.Load(slices.Sorted(maps.Keys(files)), func(name string) (string, error) { return files[name], nil }, other)
	}
	b := load(before, nil)
	report := checker.Check(b, nil)
	return review.Compare(report, checker.CheckAgain(report, load(after, b), nil))
}

// TestSharedWork holds a review of states that share work against one of states
// that do not.
func TestSharedWork(t *testing.T) {
	before := generate.Project(30, 4)
	after := map[string]string{}
	for name, text := range before {
		after[name] = strings.Replace(text, "load G", "load Q", 2)
	}
	one, other := again(before, after), review.Compare(check(before), check(after))
	if d := cmp.Diff(one, other, cmpopts.EquateNaNs()); d != "" || len(one.Changes) == 0 {
		t.Error(d)
	}
}

// BenchmarkReview reviews 2,000 members: one edit of one member, an edit of the
// basis that reaches all of them, and three edits that reach all of them.
func BenchmarkReview(b *testing.B) {
	before := generate.Project(2000, 1)
	with := func(old, new string) map[string]string {
		out := map[string]string{}
		for name, text := range before {
			out[name] = text
		}
		for i := 0; i < strings.Count(old, "|")+1; i++ {
			o, n := strings.Split(old, "|")[i], strings.Split(new, "|")[i]
			for name, text := range out {
				if strings.Contains(text, o) {
					out[name] = strings.Replace(text, o, n, 1)
				}
			}
		}
		return out
	}
	for _, c := range []struct{ name, old, new string }{
		{"one member", "column C7 \"Column on grid 7\" {", "column C7 \"Column on grid 7\" {\n    load G 10 kN"},
		{"basis", "show     kN, mm, MPa", "show     kN, mm, MPa\n    gamma_M1 = 1.05 because \"site\""},
		{"three shared edits", "show     kN, mm, MPa|\"E1\"|case S snow \"below 1000 m\"", "show     kN, mm, MPa\n    gamma_M1 = 1.05 because \"site\"\n    gamma_Q = 1.4 because \"site\"|\"E1\"|case S snow \"above 1000 m\""},
	} {
		after := with(c.old, c.new)
		b.Run(c.name, func(b *testing.B) {
			changes := 0
			for b.Loop() {
				changes = len(again(before, after).Changes)
			}
			b.ReportMetric(float64(changes), "changes")
			if changes == 0 {
				b.Fatal(fmt.Sprint("nothing changed"))
			}
		})
	}
}
