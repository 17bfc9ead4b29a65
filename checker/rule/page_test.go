package rule_test

import (
	"regexp"
	"slices"
	"strings"
	"testing"

	"kern/checker/derivation"
	"kern/checker/rule"
	"kern/checker/standard/aisc360"
	"kern/checker/standard/elastic"
	"kern/checker/standard/en1993"
	"kern/lang"
)

var kebab = regexp.MustCompile(`^[a-z]+(-[a-z]+)*$`)

// TestPages wants every page complete: an example of each kind, and the parts
// that its kind of rule has.
func TestPages(t *testing.T) {
	for _, r := range rule.All() {
		t.Run(r.Name, func(t *testing.T) {
			if !kebab.MatchString(r.Name) {
				t.Error("the name is not in kebab case")
			}
			kinds := map[string]int{}
			for _, e := range r.Examples {
				kinds[e.Kind]++
			}
			if kinds["good"] == 0 || (kinds["bad"] == 0) != (r.Outcome == "none") {
				t.Errorf("examples: %v, outcome %q", kinds, r.Outcome)
			}
			if !strings.HasSuffix(r.Summary, ".") || strings.Count(r.Summary, ". ") > 0 {
				t.Errorf("the summary is not one sentence: %q", r.Summary)
			}
			parts := []string{"To mend it, "}
			if r.Check {
				parts = []string{"**Question.** ", "**Clause.** ", "```equation\n", "**Symbols.** ", "**Not covered.** "}
			}
			for _, p := range parts {
				if !strings.Contains(r.Page, p) {
					t.Errorf("the page lacks %q", p)
				}
			}
			if strings.HasPrefix(r.Page, "---") || strings.Contains(r.Page, "severity:") {
				t.Error("the page still has its front matter")
			}
			for _, also := range r.Also {
				if rule.Find(also) == nil {
					t.Errorf("also names %q, which has no page", also)
				}
			}
		})
	}
}

// TestEquations reads every equation of the pages with the language's own
// reader. The equation of a symbol that a standard of the program computes must
// be, letter for letter, one that it computes it by.
func TestEquations(t *testing.T) {
	sets := []*derivation.Set{elastic.Standard{}.Symbols(), en1993.Standard{}.Symbols(), aisc360.Standard{}.Symbols()}
	equations, computed := 0, 0
	for _, r := range rule.All() {
		for _, block := range strings.Split(r.Page, "```equation\n")[1:] {
			block, _, _ = strings.Cut(block, "```")
			for line := range strings.SplitSeq(strings.TrimSpace(block), "\n") {
				symbol, text, ok := strings.Cut(line, " = ")
				if !ok {
					t.Errorf("%s: %q is no equation", r.Name, line)
					continue
				}
				equations++
				if _, err := lang.ParseExpr(text); err != nil {
					t.Errorf("%s: %q: %v", r.Name, line, err)
				}
				known := false
				var texts []string
				for _, set := range sets {
					id, found := set.Find(symbol)
					known = known || found
					for _, f := range set.Formulas() {
						if found && f.Symbol == id {
							texts = append(texts, f.Text)
						}
					}
				}
				if known {
					computed++
					if !slices.Contains(texts, text) {
						t.Errorf("%s: %s is computed by %q, the page has %q", r.Name, symbol, texts, text)
					}
				}
			}
		}
	}
	if equations < 30 || computed < 20 {
		t.Errorf("%d equations, %d of them computed: too few to be all", equations, computed)
	}
}

func TestSeverities(t *testing.T) {
	want := map[string]lang.Severity{
		"unused-definition": lang.Warning, "member-without-load": lang.Warning, "implausible-load": lang.Warning,
		"departure-not-needed": lang.Warning, "design-wall": lang.Warning, "undecided": lang.Warning, "departure": lang.Information, "lighter-section": lang.Information, "section-not-permitted": lang.Warning,
		"there-is-no-such-rule": lang.Error,
	}
	for _, r := range rule.All() {
		if got := rule.SeverityOf(r.Name); got != want[r.Name] { // the zero value is Error
			t.Errorf("%s is %s, not %s", r.Name, got, want[r.Name])
		}
	}
	if got := rule.SeverityOf("there-is-no-such-rule"); got != lang.Error {
		t.Errorf("an unknown rule is %s", got)
	}
}

func TestFind(t *testing.T) {
	all := rule.All()
	if !slices.IsSortedFunc(all, func(a, b *rule.Rule) int { return strings.Compare(a.Name, b.Name) }) {
		t.Error("the rules are not in order")
	}
	all[0] = nil // the list is the caller's own
	for _, r := range rule.All() {
		if rule.Find(r.Name) != r {
			t.Errorf("%s is not found by its name", r.Name)
		}
	}
	if rule.Find("Slenderness") != nil || rule.Find("") != nil {
		t.Error("a name that no rule has is found")
	}
}

func TestNearest(t *testing.T) {
	for _, c := range []struct {
		name, first string
		n, count    int
	}{
		{"slendernes", "slenderness", 1, 1},
		{"Decimal_Comma", "decimal-comma", 3, -1},
		{"decimal comma!", "decimal-comma", 1, 1},
		{"lateral-torsional", "lateral-torsional-buckling", 2, -1},
		{"buckling", "elastic-buckling-major", 3, 3},
		{"qqqqqqqqqqqqqqqq", "", 3, 0},
		{"", "", 3, 0},
		{strings.Repeat("x", 10_000), "", 3, 0},
	} {
		got := rule.Nearest(c.name, c.n)
		if len(got) > c.n || c.count >= 0 && len(got) != c.count || c.first != "" && (len(got) == 0 || got[0] != c.first) {
			t.Errorf("nearest of %.30q: %v, want %d with %q first", c.name, got, c.count, c.first)
		}
	}
}

func BenchmarkSeverityOf(b *testing.B) {
	for b.Loop() {
		rule.SeverityOf("flexural-buckling-minor")
	}
}
