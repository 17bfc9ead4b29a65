package en1993

import (
	"flag"
	"os"
	"slices"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "write the table of clauses")

// TestClauses holds the table of clauses against its page, and every rule that
// it names against those of the standard.
func TestClauses(t *testing.T) {
	const page = "CLAUSES.md"
	var b strings.Builder
	b.WriteString("# EN 1993-1-1:2005, sections 5, 6 and annex BB: what is checked\n\nGenerated from `clauses.go`: `go test ./checker/standard/en1993 -run Clauses -update`.\n\n| clause | about | state | how |\n|---|---|---|---|\n")
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
		if !ok && r != "slenderness" && r != "sway" && r != "deflection" { // limits of the member's own
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
