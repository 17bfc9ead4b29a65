package checker

import (
	"math"
	"strings"
	"testing"

	"kern/lang"
)

// TestTrial leaves a half-typed line out: the member has the results that it has
// without the line, and the report stays as it was.
func TestTrial(t *testing.T) {
	const good = `basis { standard "EN 1993-1-1:2005" }
column B1 { section = "HEB 160"; material = "S355" }
column B2 as B1 { height = 4 m }
column A1, A2 "Posts" as B2 {
    load 300 kN
    require N_b_minor >=
}
`
	load := func(text string) *Report {
		read := func(string) (string, error) { return text, nil }
		return Check(lang.Load([]string{"a.kern"}, read, nil), nil)
	}
	whole := load(strings.Replace(good, "require N_b_minor >=", "", 1)).Members[2:]
	r := load(good)
	if len(r.Members) != 4 || len(r.Members[2].Missing) == 0 {
		t.Fatalf("a half-typed line does not leave the member undecided: %v", r.Members)
	}
	c := r.AllCalculations()[0]
	decl := r.Members[2].Member.Decl
	line := "require N_b_minor >="
	text := strings.Replace(decl.Text, line, strings.Repeat(" ", len(line)), 1)
	got := Trial(c, decl, text)
	if len(got) != 2 {
		t.Fatalf("%d members", len(got))
	}
	for i, m := range got {
		if m.Name != whole[i].Name || m.Verdict != whole[i].Verdict || m.Utilisation != whole[i].Utilisation || math.IsNaN(m.Utilisation) {
			t.Errorf("%s: %v %v, without the line %v %v", m.Name, m.Verdict, m.Utilisation, whole[i].Verdict, whole[i].Utilisation)
		}
		values := m.Values()
		minor, ok := values("N_b_minor")
		symbol, fine := values("N_b_z_Rd")
		if !ok || !fine || minor != symbol || minor.Value <= 300e3 {
			t.Errorf("N_b_minor is %v %v, N_b_z_Rd %v %v", minor, ok, symbol, fine)
		}
		if u, ok := values("utilisation"); !ok || u.Value != m.Utilisation {
			t.Errorf("utilisation %v %v, the member's is %v", u, ok, m.Utilisation)
		}
		if _, ok := values("N_nothing"); ok {
			t.Error("a symbol that does not exist has a value")
		}
	}
	if n := c.Env.Names["A1"]; n.Place.Decl != decl {
		t.Error("the trial changed the calculation")
	}
	if Trial(c, decl, strings.Replace(text, "A1", "B1", 1)) != nil {
		t.Error("a text with other names was tried")
	}
	if _, ok := r.Members[2].Values()("N_b_minor"); ok {
		t.Error("a member that lacks something has values")
	}
}
