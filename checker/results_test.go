package checker

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"kern/lang"
	"kern/lang/unit"
)

const linkedShared = `basis { standard "EN 1993-1-1:2005"; actions "EN 1990:2002" eq "6.10"; selfweight off }
case G permanent
case Q imposed "B"
`

func linkedReport(text string) *Report {
	read := func(string) (string, error) { return linkedShared + text, nil }
	return Check(lang.Load([]string{"a.kern"}, read, nil), nil)
}

func resultOf(t *testing.T, r *Report, name string) *Result {
	t.Helper()
	for _, m := range r.Members {
		if m.Name == name {
			return m
		}
	}
	t.Fatalf("no member %s", name)
	return nil
}

// TestResultsOfMembers holds what one member takes from another against sums
// done by hand: 1.35 * 180 + 1.5 * 120 = 423 kN at the base of A1.
func TestResultsOfMembers(t *testing.T) {
	r := linkedReport(`bearing = 200 kPa
pad = (A1.base.G + A1.base.Q) / bearing
side = sqrt(pad)
column A1 { section = "HEB 160"; material = "S355"; height = 4 m; load G 180 kN at top; load Q 120 kN at top; load W1 0 kN }
`)
	if r.Summary.Errors == 0 {
		t.Fatal("a load of an unknown case must be an error")
	}
	r = linkedReport(`bearing = 200 kPa
pad = (A1.base.G + A1.base.Q) / bearing
side = sqrt(pad)
column A1 { section = "HEB 160"; material = "S355"; height = 4 m; load G 180 kN at top; load Q 120 kN at top }
column A2 { section = "HEB 160"; material = "S355"; height = side; load G A1.base.G at top; load Q A1.base.Q; require N_b_minor >= A1.base.N }
column A3 { section = "HEB 160"; material = "S355"; height = A1.height; load G A1.base.N / 1.35; require utilisation <= A1.utilisation }
column A4 as A1 { load G -50 kN; load Q 10 kN at top }
column A5 as A1 { load G 1 kN; load Q A4.base.uplift }
`)
	for _, d := range r.Diagnostics {
		if d.Severity == lang.Error && d.Rule != "requirement" {
			t.Errorf("%s: %s", d.Rule, d.Message)
		}
	}
	late := map[string]unit.Quantity{}
	env := r.AllCalculations()[0].Env
	for _, v := range env.LateValues() {
		late[v.Name], _ = env.Value(v)
	}
	near := func(what string, got, want float64) {
		t.Helper()
		if math.Abs(got-want) > 1e-9*math.Abs(want) {
			t.Errorf("%s is %g, want %g", what, got, want)
		}
	}
	near("pad", late["pad"].Value, 300e3/200e3)
	near("side", late["side"].Value, math.Sqrt(1.5))
	near("height of A2", resultOf(t, r, "A2").Member.Height, math.Sqrt(1.5))
	value := func(name, symbol string) float64 {
		q, ok := resultOf(t, r, name).Values()(symbol)
		if !ok {
			t.Fatalf("%s has no %s", name, symbol)
		}
		return q.Value
	}
	near("N_Ed of A1", value("A1", "N_Ed"), 423e3)
	near("N_Ed of A2", value("A2", "N_Ed"), 423e3)
	near("N_Ed of A3", value("A3", "N_Ed"), 423e3)
	near("utilisation of A3", resultOf(t, r, "A3").Utilisation, resultOf(t, r, "A1").Utilisation)
	// greatest tension at the base of A4: 1.35 * 50, the imposed load being of help
	near("load of A5", resultOf(t, r, "A5").Member.Loads[1].Value, 67.5e3)
}

// TestResultsInCircles: members in a circle are undecided, one place says why,
// and whoever leans on them is undecided too.
func TestResultsInCircles(t *testing.T) {
	member := func(name, load string) string {
		return "column " + name + ` { section = "HEB 160"; material = "S355"; height = 4 m; load G ` + load + " }\n"
	}
	for name, text := range map[string]string{
		"two":       member("A", "B.N_Ed") + member("B", "A.N_Ed"),
		"itself":    member("A", "A.N_Ed"),
		"a value":   "v = A.N_Ed\n" + member("A", "v"),
		"two steps": "v = w\nw = A.N_Ed\n" + member("A", "v"),
		"values":    "v = w + A.N_Ed\nw = v\n" + member("A", "1 kN") + member("B", "w"),
		"as":        member("A", "B.N_Ed") + "column B as A { height = 3 m }\n",
	} {
		r := linkedReport(text + member("Z", "B.N_Ed") + member("Y", "1 kN"))
		said := 0
		for _, d := range r.Diagnostics {
			if d.Rule == "defined-by-itself" {
				said++
				if !strings.Contains(d.Message, "→") {
					t.Errorf("%s: %s", name, d.Message)
				}
			}
		}
		if said != 1 {
			t.Errorf("%s: the circle is told of %d times", name, said)
		}
		for _, m := range r.Members {
			free := m.Name == "Y" || name == "values" && m.Name == "A"
			if (m.Verdict == 0) == free {
				t.Errorf("%s: %s %s", name, m.Name, m.Verdict)
			}
		}
	}
}

// TestLongChains works out members that lean on one another in a row, in either
// order of the text.
func TestLongChains(t *testing.T) {
	const n = 1500
	for _, down := range []bool{true, false} {
		var b strings.Builder
		for i := range n {
			k := i
			if down {
				k = n - 1 - i
			}
			load := "10 kN"
			if k > 0 {
				load = fmt.Sprintf("A%d.base.G", k-1)
			}
			fmt.Fprintf(&b, "column A%d { section = \"HEB 160\"; material = \"S355\"; height = 4 m; load G %s }\n", k, load)
		}
		r := linkedReport(b.String())
		if r.Summary.Passes != n {
			t.Errorf("%v: %+v", down, r.Summary)
		}
	}
}
