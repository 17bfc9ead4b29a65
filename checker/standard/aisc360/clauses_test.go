package aisc360

import (
	"flag"
	"os"
	"slices"
	"strings"
	"testing"

	"kern/checker/derivation"
)

var update = flag.Bool("update", false, "write the table of clauses")

// TestClauses holds the table of clauses against its page, and every rule that
// it names against those of the standard.
func TestClauses(t *testing.T) {
	const page = "CLAUSES.md"
	var b strings.Builder
	b.WriteString("# ANSI/AISC 360-22, chapters B to H and appendices 6 to 8: what is checked\n\nGenerated from `clauses.go`: `go test ./checker/standard/aisc360 -run Clauses -update`.\n\n| clause | about | state | how |\n|---|---|---|---|\n")
	named := map[string]bool{}
	for _, c := range Clauses {
		if !slices.Contains([]string{"checked", "not applicable", "not covered"}, c.State) || c.How == "" || c.State == "not covered" && !strings.Contains(c.How, "by hand") {
			t.Errorf("%s: %q, %q", c.Number, c.State, c.How)
		}
		for _, r := range (Standard{}).Rules() {
			named[r] = named[r] || strings.Contains(c.How, r)
		}
		b.WriteString("| " + c.Number + " | " + c.Title + " | " + c.State + " | " + c.How + " |\n")
	}
	for r, ok := range named {
		if !ok && r != "slenderness" && r != "sway" { // limits of the member's own
			t.Errorf("no clause names %s", r)
		}
	}
	if *update {
		if err := os.WriteFile(page, []byte(b.String()), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	got, err := os.ReadFile(page)
	if err != nil || string(got) != b.String() {
		t.Errorf("%s is out of date (%v): -update writes it", page, err)
	}
}

// TestDifferences holds the page of differences between the editions against its
// table, and the two sets of formulas against what it says: a formula that differs
// in more than the letter of the stress is one of changed2016.
func TestDifferences(t *testing.T) {
	const page = "DIFFERENCES.md"
	var b strings.Builder
	b.WriteString("# ANSI/AISC 360-16 against 360-22\n\nWhat 2016 has is from memory. Generated from `differences.go`: `go test ./checker/standard/aisc360 -run Differences -update`.\n\n| clause | 2016 | 2022 | certainty | what kern does |\n|---|---|---|---|---|\n")
	for _, d := range Differences {
		b.WriteString("| " + d.Clause + " | " + d.Was + " | " + d.Is + " | " + d.Certainty + " | " + d.Choice + " |\n")
	}
	if *update {
		if err := os.WriteFile(page, []byte(b.String()), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	got, err := os.ReadFile(page)
	if err != nil || string(got) != b.String() {
		t.Errorf("%s is out of date (%v): -update writes it", page, err)
	}
	old := Edition2016.edition()
	changed := 0
	for f, own := range old.own {
		if _, ok := changed2016[f]; ok {
			changed++
		} else if own.Text != old.letter(f.Text) {
			t.Errorf("%s is %s in 2016", f.Text, own.Text)
		}
	}
	if changed != len(changed2016) {
		t.Errorf("%d of %d changed formulas are there", changed, len(changed2016))
	}
	for i := range set.Len() {
		if name := old.set.At(derivation.ID(i)).Name; strings.HasPrefix(name, "F_n") {
			t.Errorf("the edition of 2016 writes %s", name)
		}
	}
}
