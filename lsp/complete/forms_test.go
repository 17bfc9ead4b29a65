package complete

import (
	"fmt"
	"regexp"
	"slices"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/catalogue"
	"kern/checker/model"
	"kern/lang"
)

// proposed takes the places out of a snippet: what it proposes stands there.
func proposed(snippet string) string {
	return placeholder.ReplaceAllStringFunc(snippet, func(m string) string {
		p := placeholder.FindStringSubmatch(m)
		first, _, _ := strings.Cut(p[4], ",")
		return p[2] + first
	})
}

// TestPatterns holds every form of the language against the statement that its
// snippet writes: the form follows it to its end.
func TestPatterns(t *testing.T) {
	for _, f := range lang.Forms {
		text := proposed(f.Snippet)
		block := strings.Contains(text, "{")
		head, _, _ := strings.Cut(text, "{")
		s := &scope{caret: &caret{in: f.In, head: f.Word}, env: envWith(t)}
		stmt := lineOf(head)
		if stmt == nil {
			t.Fatalf("%q is no statement", head)
		}
		s.before = stmt.Args
		found := false
		for _, p := range s.patterns() {
			followed, complete := p.next(stmt.Args, s.accepts, func(e *element) { found = found || block && e.kind == blockElement })
			found = found || followed == len(stmt.Args) && complete
		}
		if !found {
			t.Errorf("no form of %s in %s follows %q", f.Word, f.In, head)
		}
		for _, p := range s.patterns() {
			for i, span := range p.params {
				if span.Start < 0 || span.End > int32(len(p.syntax)) || span.Start >= span.End || i > 0 && span.Start < p.params[i-1].End {
					t.Errorf("%s: the parameters %v overlap", p.syntax, p.params)
				}
				if p.paramWords(i) == "" && !strings.HasPrefix(span.Of(p.syntax), "psi_") {
					t.Errorf("%s: nothing is said about %s", p.syntax, span.Of(p.syntax))
				}
			}
			for _, name := range p.placeholders() {
				if placeholderWords[name] == "" {
					t.Errorf("%s: nothing is known of %s", p.syntax, name)
				}
			}
		}
	}
}

// envWith has the names that the snippets use.
func envWith(t *testing.T) *model.Env {
	t.Helper()
	text := "case G permanent\ncase W1 wind\ncase W2 wind\nlevel ground at 0 m\nlevel roof at 3 m\ncolumn A1 { height = 3 m }\n"
	r := reportOf(map[string]string{"a.kern": text})
	return r.AllCalculations()[0].Env
}

// rulesOf are the rules of the diagnostics of a text.
func rulesOf(text string) []string {
	var out []string
	for _, d := range reportOf(map[string]string{"a.kern": text}).Diagnostics {
		out = append(out, d.Rule)
	}
	return out
}

// TestShapes holds the properties of shapes against what the checker reads.
func TestShapes(t *testing.T) {
	if len(shapeOrder) != len(shapeWords) {
		t.Error("the order of shapes lacks some")
	}
	for _, shape := range shapeOrder {
		var needed []string
		for _, f := range lang.FormsIn(lang.InSection) {
			i := slices.IndexFunc(shapeWords[shape], func(p shapeProperty) bool { return p.word == f.Word })
			rules := rulesOf(fmt.Sprintf("section x = %s { %s }\n", shape, proposed(f.Snippet)))
			if unknown := slices.Contains(rules, "unknown-property"); unknown != (i < 0) {
				t.Errorf("%s in %s: the checker says %v", f.Word, shape, rules)
			}
			if i >= 0 && shapeWords[shape][i].needed {
				needed = append(needed, proposed(f.Snippet))
			}
		}
		for i := range needed {
			rules := rulesOf(fmt.Sprintf("section x = %s { %s }\n", shape, strings.Join(slices.Delete(slices.Clone(needed), i, i+1), "; ")))
			if !slices.Contains(rules, "missing-value") {
				t.Errorf("%s does without %s: %v", shape, needed[i], rules)
			}
		}
		for _, word := range []string{"hot", "cold", "welded", "rolled"} {
			rules := rulesOf(fmt.Sprintf("section x = %s { made = %s }\n", shape, word))
			bad := slices.Contains(rules, "unknown-word") || slices.Contains(rules, "unknown-property")
			if offered := slices.Contains(madeWords(shape), word); offered == bad {
				t.Errorf("made = %s in %s: the checker says %v", word, shape, rules)
			}
		}
	}
}

// TestFamilies looks for families that are not offered or not explained.
func TestFamilies(t *testing.T) {
	for _, f := range catalogue.Families() {
		if familyWords[f] == "" || !slices.Contains(familyOrder, f) {
			t.Errorf("the family %s is not offered", f)
		}
	}
	for _, g := range catalogue.Grades() {
		if productWords[g.Standard] == "" {
			t.Errorf("nothing is said about %s", g.Standard)
		}
	}
}

// TestCategories holds the categories that are offered against the checker.
func TestCategories(t *testing.T) {
	for _, kind := range []string{"imposed", "snow"} {
		l, _ := at(t, "case Q "+kind+" \"¦\"", ByUser)
		if len(l.Items) < 2 {
			t.Fatal(l.Items)
		}
		for _, x := range l.Items {
			if rules := rulesOf("case Q " + kind + " \"" + x.Label + "\"\n"); slices.Contains(rules, "unknown-category") {
				t.Errorf("%s %s: %v", kind, x.Label, rules)
			}
			if !strings.Contains(x.Detail, "psi ") {
				t.Errorf("%s %s: %s", kind, x.Label, x.Detail)
			}
		}
	}
}

// TestResults requires every result that is offered.
func TestResults(t *testing.T) {
	for _, standard := range checker.Standards() {
		by := ""
		if methods := checker.StandardNamed(standard).Methods(); methods != nil {
			by = " by " + methods[0]
		}
		text := fmt.Sprintf("basis { standard %q"+by+" }\ncolumn A1 { section = \"HEB 160\"; material = \"S355\"; height = 4 m; load 300 kN; require ¦ }\n", standard)
		l, _ := at(t, text, ByUser)
		if len(l.Items) < 40 {
			t.Fatalf("%s: %d results", standard, len(l.Items))
		}
		now := 0
		for _, x := range l.Items {
			if rules := rulesOf(strings.Replace(text, "¦", x.Label+" >= 0", 1)); slices.Contains(rules, "unknown-name") {
				t.Errorf("%s: %s is offered and not known", standard, x.Label)
			}
			if strings.Contains(x.Detail, "now ") {
				now++
			}
		}
		if now < 20 {
			t.Errorf("%s: %d results have a value", standard, now)
		}
		l, _ = at(t, strings.Replace(text, "require", "depart", 1), ByUser)
		for _, x := range l.Items {
			if rules := rulesOf(strings.Replace(text, "require ¦", "depart "+x.Label+` because "x"`, 1)); slices.Contains(rules, "unknown-rule") {
				t.Errorf("%s: %s is offered and not known", standard, x.Label)
			}
		}
	}
}

// TestHalfFilledIn takes every statement that is offered and fills nothing in:
// where a number, a designation or a reason belongs, an error says so. Nothing
// stands in a calculation that nobody chose.
func TestHalfFilledIn(t *testing.T) {
	const before = `basis { standard "EN 1993-1-1:2005"; actions "EN 1990:2002" }
case G permanent
case Q imposed "B"
level ground at 0 m
level roof at 3.6 m
section post = "HEB 160"
section prop = "HEB 180"
material steel = "S355"
material iron = "S235"
`
	number := regexp.MustCompile(`:-?[\d.]+|"\$\{\d+:(HEB|S355|CHS)|\{\d+:"`)
	texts := map[lang.Context]string{
		lang.InFile: "¦\n", lang.InBasis: "basis {\n¦\n}\n", lang.InMember: "column A1 {\n¦\n}\n", lang.InMaterial: "material x {\n¦\n}\n",
		lang.InSection: "section x = given {\n¦\n}\n", lang.InLevel: "level x at 3 m {\n¦\n}\n",
	}
	tried := 0
	for in, text := range texts {
		shared := before
		if in == lang.InBasis {
			shared = strings.SplitN(before, "\n", 2)[1]
		}
		l, _ := at(t, shared+text, ByUser)
		for _, x := range l.Items {
			if x.Snippet == "" {
				t.Errorf("%s: %s has no snippet", in, x.Label)
				continue
			}
			var form lang.Form
			for _, f := range lang.FormsIn(in) {
				if f.Word == x.Label {
					form = f
				}
			}
			if strings.Contains(proposed(x.Snippet), "reason") {
				t.Errorf("%s proposes a reason", x.Label)
			}
			if !number.MatchString(form.Snippet) && in != lang.InLevel || x.Label == "actions" {
				continue // there is one standard of actions
			}
			tried++
			whole := shared + strings.Replace(text, "¦", proposed(x.Snippet), 1)
			failed := false
			for _, d := range reportOf(map[string]string{"a.kern": whole}).Diagnostics {
				failed = failed || d.Severity == lang.Error && d.Span.End >= int32(len(shared)) && d.Rule != "undecided" && d.Rule != "missing-statement"
			}
			if !failed {
				t.Errorf("%s: %q is taken without an error", in, proposed(x.Snippet))
			}
		}
	}
	if tried < 40 {
		t.Errorf("%d statements were tried", tried)
	}
}
