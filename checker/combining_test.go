package checker

import (
	"slices"
	"strings"
	"testing"

	"kern/checker/action"
	"kern/checker/model"
	"kern/checker/standard"
)

// combined checks one column that carries a load of every case and gives its
// result.
func combined(t *testing.T, basis, rest string) *Result {
	t.Helper()
	text := "basis {\n standard \"elastic\"\n" + basis + "\n}\n" + rest + "\ncolumn X1 { section = \"HEB 160\"; material = \"S355\"; height = 3 m; selfweight off\n"
	for line := range strings.Lines(rest) {
		if words := strings.Fields(line); len(words) > 1 && words[0] == "case" {
			text += " load " + words[1] + " 10 kN\n"
		}
	}
	r := Check(load(map[string]string{"a.kern": text + "}\n"}), nil)
	if len(r.Members) != 1 {
		t.Fatalf("%d members of\n%s", len(r.Members), text)
	}
	for _, d := range r.Diagnostics {
		if d.Severity == 0 && !strings.HasPrefix(d.Rule, "elastic") && d.Rule != "first-yield" {
			t.Fatalf("%s: %s\n%s", d.Rule, d.Message, text)
		}
	}
	return r.Members[0]
}

func titles(list []model.Combination) []string {
	var out []string
	for _, c := range list {
		out = append(out, c.Name)
	}
	return out
}

const frameCases = "case G permanent\ncase Q imposed \"B\"\ncase W1 wind\ncase W2 wind\ncase A accidental\n"

// TestServiceStaysApart: resistances are checked in ultimate situations alone,
// and those of serviceability are there beside them.
func TestServiceStaysApart(t *testing.T) {
	r := combined(t, `actions "EN 1990:2002"`, frameCases+"combination lift = 0.9 G - 1.5 W1\ncombination drift frequent = G + 0.3 W1\ncombination blast accidental = G + A\n")
	for _, list := range [][]model.Combination{r.Combinations(), r.Env().All(), r.Frame().Combinations} {
		for _, c := range list {
			if !c.Situation.Ultimate() {
				t.Errorf("%s (%s) is among those for resistances", c.Name, c.Situation)
			}
		}
		if !slices.Contains(titles(list), "lift: 0.9 G - 1.5 W1") || !slices.Contains(titles(list), "blast: 1.0 G + 1.0 A") || !slices.Contains(titles(list), "1.35 G + 1.05 Q + 1.5 W1 + 0.9 W2") {
			t.Errorf("missing among %q", titles(list))
		}
	}
	service := r.Env().Service()
	situations := map[action.Situation]int{}
	for _, c := range service {
		situations[c.Situation]++
		if c.Situation.Ultimate() || len(c.Factors) != len(r.Env().Cases) || c.Factors[4] != 0 {
			t.Errorf("%s (%s) %v", c.Name, c.Situation, c.Factors)
		}
	}
	if len(situations) != 3 || !slices.Contains(titles(service), "drift: 1.0 G + 0.3 W1") || !slices.Contains(titles(service), "1.0 G + 1.0 Q + 0.6 W1 + 0.6 W2") {
		t.Errorf("%v: %q", situations, titles(service))
	}
	for _, c := range r.Checks {
		if k, ok := r.CombinationOf(c); ok && !k.Situation.Ultimate() {
			t.Errorf("%s is checked under %s", c.Rule, k.Name)
		}
	}
}

// TestExclusiveCases: with an exclusive statement no combination has both, with a
// standard of actions and without one.
func TestExclusiveCases(t *testing.T) {
	group := "exclusive W1, W2\n"
	r := combined(t, `actions "EN 1990:2002" eq "6.10a/b"`, frameCases+group)
	for _, c := range append(r.Env().All(), r.Env().Service()...) {
		if c.Factors[2] != 0 && c.Factors[3] != 0 {
			t.Errorf("%s has both", c.Name)
		}
	}
	if !slices.Contains(r.Assumptions, "of W1, W2 one acts at a time") {
		t.Errorf("%q", r.Assumptions)
	}
	r = combined(t, "", "exclusive W1, W2\n"+frameCases)
	want := []string{"1.0 G + 1.0 Q + 1.0 W1 + 1.0 A", "1.0 G + 1.0 Q + 1.0 W2 + 1.0 A"}
	if got := titles(r.Env().All()); !slices.Equal(got, want) {
		t.Errorf("%q", got)
	}
	if got := titles(r.Env().Service()); !slices.Equal(got, want) {
		t.Errorf("%q", got)
	}
}

// TestCombiningSettings: every setting changes the combinations and is listed
// with the member.
func TestCombiningSettings(t *testing.T) {
	const cases = "case G permanent\ncase G2 permanent\ncase R imposed \"H\"\ncase W wind psi_0 0.5 because \"annex\"\ncase A accidental\ncase E seismic\n"
	plain := combined(t, `actions "EN 1990:2002"`, cases)
	for _, c := range []struct{ basis, has, hasNot, says, notSaid string }{
		{`actions "EN 1990:2002"`, "1.35 G + 1.35 G2 + 1.5 W", "1.35 G + 1.0 G2 + 1.5 W", "permanent cases together, all with the upper or all with the lower factor (Table A1.2(B), note 3)", "annex United Kingdom"},
		{`actions "EN 1990:2002"`, "1.0 G + 1.0 G2 + 0.2 W + 1.0 A", "1.35 G + 1.35 G2 + 1.5 R + 0.75 W", "imposed loads on roofs (category H) not together with snow or wind (EN 1991-1-1 3.3.2(1))", "act together"},
		{`actions "EN 1990:2002"`, "1.0 G + 1.0 G2 - 1.0 E", "1.35 G + 1.35 G2 + 1.5 W + 1.0 E", "psi_0, psi_1, psi_2: R 0, 0, 0; W 0.5, 0.2, 0 (because \"annex\")", "xi"},
		{`actions "EN 1990:2002"` + "\npermanent cases independent", "1.35 G + 1.0 G2 + 1.5 W", "", "permanent cases independent, each with its upper or its lower factor", "permanent cases together"},
		{`actions "EN 1990:2002"` + "\nroofs together", "1.35 G + 1.35 G2 + 1.5 R + 0.75 W", "", "imposed loads on roofs act together with snow and wind", "not together"},
		{`actions "EN 1990:2002"` + "\naccidental psi_2", "1.0 G + 1.0 G2 + 1.0 A", "1.0 G + 1.0 G2 + 0.2 W + 1.0 A", "accidental situations: the leading variable action with psi_2 (6.11b)", "psi_1 (6.11b)"},
		{`actions "EN 1990:2002" eq "6.10a/b"` + "\nxi = 0.9 because \"x\"", "1.215 G + 1.215 G2 + 1.5 W", "1.35 G + 1.35 G2 + 1.5 W", "actions by EN 1990:2002 (6.10a/b), annex recommended: gamma_G_sup = 1.35, gamma_G_inf = 1, gamma_Q = 1.5, xi = 0.9 (because \"x\")", ""},
		{`actions "EN 1990:2002" annex "United Kingdom" eq "6.10a/b"`, "1.24875 G + 1.24875 G2 + 1.5 W", "1.1475 G + 1.1475 G2 + 1.5 W", "actions by EN 1990:2002 (6.10a/b), annex United Kingdom: gamma_G_sup = 1.35, gamma_G_inf = 1, gamma_Q = 1.5, xi = 0.925", ""},
	} {
		r := combined(t, c.basis, cases)
		got := titles(r.Env().All())
		if !slices.Contains(got, c.has) || slices.Contains(got, c.hasNot) {
			t.Errorf("%s: %q has not %q, or has %q", c.basis, got, c.has, c.hasNot)
		}
		said := strings.Join(r.Assumptions, "\n")
		if !slices.Contains(r.Assumptions, c.says) || c.notSaid != "" && strings.Contains(said, c.notSaid) {
			t.Errorf("%s: %q lacks %q or has %q", c.basis, r.Assumptions, c.says, c.notSaid)
		}
	}
	if plain.Verdict == standard.Undecided {
		t.Error(plain.Missing)
	}
}

// TestStatedPsi: a case with all of its psi values needs no category.
func TestStatedPsi(t *testing.T) {
	r := combined(t, `actions "EN 1990:2002"`, "case G permanent\ncase Q imposed psi_0 0.4, psi_1 0.3, psi_2 0.1 because \"agreed\"\ncase W wind\n")
	if got := titles(r.Env().All()); !slices.Contains(got, "1.35 G + 0.6 Q + 1.5 W") {
		t.Errorf("%q", got)
	}
}

// TestServiceAgain: after an edit of one member the combinations are the same.
func TestServiceAgain(t *testing.T) {
	text := "basis { standard \"elastic\"; actions \"EN 1990:2002\" }\n" + frameCases + "column X1 { section = \"HEB 160\"; material = \"S355\"; height = 3 m; load G 10 kN }\n"
	before := Check(load(map[string]string{"a.kern": text}), nil)
	after := CheckAgain(before, load(map[string]string{"a.kern": strings.Replace(text, "3 m", "4 m", 1)}), nil)
	a, b := titles(before.Members[0].Env().Service()), titles(after.Members[0].Env().Service())
	if len(a) < 20 || !slices.Equal(a, b) {
		t.Errorf("%d and %d combinations", len(a), len(b))
	}
}
