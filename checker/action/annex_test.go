package action

import (
	"fmt"
	"math"
	"os"
	"strings"
	"testing"
)

// TestNationalsAreWritten: the reference prints every national number with its
// source, and the numbers are those that are combined with.
func TestNationalsAreWritten(t *testing.T) {
	page, err := os.ReadFile("../../lang/README.md")
	if err != nil {
		t.Fatal(err)
	}
	for _, n := range Nationals() {
		row := fmt.Sprintf("| %s | EN 1990 | %s | %s | %s |", n.Annex, n.What, n.Value, n.Source)
		if !strings.Contains(string(page), row+"\n") {
			t.Errorf("the reference lacks the row\n%s", row)
		}
		v, ok := AnnexOf(n.Annex)
		if !ok {
			t.Fatalf("%q has rows and is no annex", n.Annex)
		}
		if got := valueOf(t, v, n.What); got != n.Value {
			t.Errorf("%s: %s is %s, the row says %s", n.Annex, n.What, got, n.Value)
		}
	}
	for _, name := range Annexes() {
		if len(NationalsOf(name)) == 0 {
			t.Errorf("%s has no row with a source", name)
		}
	}
}

// valueOf writes the number that a row is about as the row does.
func valueOf(t *testing.T, v Values, what string) string {
	t.Helper()
	switch what {
	case "gamma_G_sup, gamma_G_inf":
		return fmt.Sprintf("%.2f, %.2f", v.GSup, v.GInf)
	case "gamma_Q":
		return fmt.Sprintf("%.2f", v.Q)
	case "xi":
		return short(v.Xi)
	}
	head, of, ok := strings.Cut(what, " of ")
	kind, rest, _ := strings.Cut(of, " ")
	k, known := KindNames[kind]
	if !ok || !known {
		t.Fatalf("a row about %q", what)
	}
	out := ""
	for _, category := range strings.Split(rest, ", ") {
		p, ok := v.Psi(Case{Kind: k, Category: category})
		text := p.String()
		if head == "psi_0" {
			text = short(p[0])
		}
		if !ok || out != "" && out != text {
			t.Errorf("%s: %v, %v for %q", what, p, ok, category)
		}
		out = text
	}
	return out
}

// TestAnnexes: what the United Kingdom has as recommended is the same, and a name
// that is no annex is none.
func TestAnnexes(t *testing.T) {
	uk, ok := AnnexOf("United Kingdom")
	if !ok || Annexes()[0] != "recommended" {
		t.Fatal(Annexes())
	}
	differ := 0
	for _, c := range variables() {
		a, _ := Recommended.Psi(c)
		b, ok := uk.Psi(c)
		if !ok || a[1] != b[1] || a[2] != b[2] {
			t.Errorf("%+v: %v, %v", c, a, b)
		}
		if a != b {
			differ++
		}
	}
	if differ != 2 || uk.GSup != Recommended.GSup || uk.GInf != Recommended.GInf || uk.Q != Recommended.Q {
		t.Errorf("%d psi values differ: roofs and wind are expected to", differ)
	}
	for _, name := range []string{"", "Recommended", "France", "united kingdom"} {
		if v, ok := AnnexOf(name); ok || v.GSup != 0 {
			t.Errorf("%q is an annex", name)
		}
	}
}

// variables are one case of every kind and category of variable action.
func variables() []Case {
	out := []Case{{Kind: Wind}, {Kind: Temperature}, {Kind: Snow, Category: SnowLow}, {Kind: Snow, Category: SnowHigh}}
	for _, c := range "ABCDEFGH" {
		out = append(out, Case{Kind: Imposed, Category: string(c)})
	}
	return out
}

// TestPublishedColumn: the column of eight storeys in Worked Examples to Eurocode
// 2 (The Concrete Centre), by the UK National Annex: Gk = 5553.6 kN, imposed load
// 2279.5 kN of which 42.0 kN on the roof, alpha_n = 0.6 on the floors. Printed are
// 9555.3 kN by (6.10), and 9000.0 kN by (6.10b) with 0.925 times 1.35 rounded to
// 1.25. By (6.10a) the source reduces the roof as well, 8933.4 kN; with the roof
// as in its other two sums it is 8951.1 kN (own calculation).
func TestPublishedColumn(t *testing.T) {
	uk, _ := AnnexOf("United Kingdom")
	cases := []Case{{Name: "G"}, {Name: "Q", Kind: Imposed, Category: "B"}, {Name: "R", Kind: Imposed, Category: "H"}}
	const floors = 0.6 * (2279.5 - 42.0)
	find := func(equation, name string, xi float64, effect ...float64) float64 {
		v := uk
		v.Xi = xi
		for _, r := range []Rules{{Values: v, Equation: Equation610}, {Values: v, Equation: Equation610ab}} {
			made, err := Ultimate(cases, r)
			if err != nil {
				t.Fatal(err)
			}
			for _, c := range made {
				if c.Source == "EN 1990:2002 ("+equation+")" && c.Name == name {
					sum, _ := effects([]Combination{c}, effect)
					return sum
				}
			}
		}
		t.Fatalf("(%s): no %s", equation, name)
		return math.NaN()
	}
	for _, c := range []struct {
		equation, name string
		xi             float64
		roof           float64
		printed        float64
	}{
		{"6.10", "1.35 G + 1.5 Q + 1.05 R", 0.925, 42, 9555.3},
		{"6.10b", "1.25 G + 1.5 Q + 1.05 R", 1.25 / 1.35, 42, 9000.0},
		{"6.10a", "1.35 G + 1.05 Q + 1.05 R", 0.925, 0.6 * 42, 8933.4},
		{"6.10a", "1.35 G + 1.05 Q + 1.05 R", 0.925, 42, 8951.085},
	} {
		// five figures are printed, from parts that are rounded to a tenth
		if got := find(c.equation, c.name, c.xi, 5553.6, floors, c.roof); math.Abs(got-c.printed) > 0.15 {
			t.Errorf("(%s) %s: %.2f kN, printed %.1f", c.equation, c.name, got, c.printed)
		}
	}
	if got := find("6.10b", "1.24875 G + 1.5 Q + 1.05 R", 0.925, 5553.6, floors, 42); math.Abs(got-8992.908) > 1e-3 {
		t.Errorf("(6.10b) with xi = 0.925: %.3f kN", got)
	}
}

// TestPublishedReduced: the factor of permanent actions in (6.10b), 0.85 times
// 1.35, printed in Steel Buildings in Europe, Multi-Storey Steel Buildings, Part
// 3: Actions, p. 3-5.
func TestPublishedReduced(t *testing.T) {
	cases := []Case{{Name: "G"}, {Name: "S", Kind: Snow, Category: SnowLow}, {Name: "W", Kind: Wind}}
	made, err := Ultimate(cases, Rules{Values: Recommended, Equation: Equation610ab})
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range made {
		if c.Name == "1.1475 G + 1.5 S + 0.9 W" && c.Source == "EN 1990:2002 (6.10b)" {
			if math.Abs(c.Factors[0]-0.85*1.35) > 1e-15 {
				t.Error(c.Factors)
			}
			return
		}
	}
	t.Errorf("none of %d has 1.1475 G", len(made))
}

// TestComputedSets: own calculation, not a published one: Gk = 100, offices 60,
// snow up to 1000 m 10, wind 15, all in one direction, by other values and
// equations. The countries that are no annex here stand for values that a
// calculation states.
func TestComputedSets(t *testing.T) {
	uk, _ := AnnexOf("United Kingdom")
	with := func(sup, xi float64) Values {
		v := Recommended
		v.GSup, v.Xi = sup, xi
		return v
	}
	stated := func(psi0 ...float64) []Case {
		cases := []Case{{Name: "G"}, {Name: "Q", Kind: Imposed, Category: "B"}, {Name: "S", Kind: Snow, Category: SnowLow}, {Name: "W", Kind: Wind}}
		for i, p := range psi0 {
			cases[i+1].Own[0], cases[i+1].Stated[0] = p, true
		}
		return cases
	}
	for _, c := range []struct {
		name     string
		cases    []Case
		values   Values
		equation string
		want     float64
	}{
		{"recommended", stated(), Recommended, Equation610, 246},
		{"recommended", stated(), Recommended, Equation610ab, 225.75},
		{"United Kingdom", stated(), uk, Equation610, 243.75},
		{"United Kingdom", stated(), uk, Equation610ab, 233.625},
		{"snow 0.7, wind 0.3, xi 0.89", stated(0.7, 0.7, 0.3), with(1.35, 0.89), Equation610ab, 227.4},
		{"offices 0.5, snow and wind 0, 1.35 and 1.20", stated(0.5, 0, 0), with(1.35, 1.2/1.35), Equation610ab, 210},
		{"permanent 1.30", stated(), with(1.30, 0.85), Equation610, 241},
	} {
		made, err := Ultimate(c.cases, Rules{Values: c.values, Equation: c.equation})
		if err != nil {
			t.Fatal(err)
		}
		if high, _ := effects(made, []float64{100, 60, 10, 15}); math.Abs(high-c.want) > 1e-9 {
			t.Errorf("%s, %s: %.12g, want %g", c.name, c.equation, high, c.want)
		}
	}
}
