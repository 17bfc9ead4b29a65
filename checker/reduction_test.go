package checker_test

import (
	"fmt"
	"math"
	"math/rand"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/action"
)

// force is the greatest compression of a member under a combination between two
// heights, kN.
func force(t *testing.T, m *checker.Result, combination string, from, to float64) float64 {
	t.Helper()
	for k, c := range m.Combinations() {
		if c.Name == combination {
			return m.Frame().Compression(k, from, to) / 1e3
		}
	}
	var names []string
	for _, c := range m.Combinations() {
		names = append(names, c.Name)
	}
	t.Fatalf("there is no combination %s but %v", combination, names)
	return 0
}

func same(t *testing.T, what string, got, want float64) {
	t.Helper()
	if !(math.Abs(got-want) <= 1e-9*math.Abs(want)) {
		t.Errorf("%s: %.10g, by hand %.10g", what, got, want)
	}
}

const fiveFloors = `
case G permanent
case Q imposed "B"
case R imposed "H"
case W wind
level ground at 0 m
level f1 at 4 m  { G 4 kN/m2; Q 3 kN/m2 }
level f2 at 8 m  { G 4 kN/m2; Q 3 kN/m2 }
level f3 at 12 m { G 4 kN/m2; Q 3 kN/m2 }
level f4 at 16 m { G 4 kN/m2; Q 3 kN/m2 }
level f5 at 20 m { G 4 kN/m2; Q 3 kN/m2 }
level roof at 24 m { G 2 kN/m2; R 0.6 kN/m2 }
column C1 {
    section = "HEB 300"; material = "S355"; from ground to roof; selfweight off
    load floor 30 m2 at f1
    load floor 30 m2 at f2
    load floor 30 m2 at f3
    load floor 30 m2 at f4
    load floor 30 m2 at f5
    load floor 30 m2 at roof
    load W 50 kN at top
`

// TestReducedByStoreys takes a building of five floors and a roof down by hand.
// Each floor brings 30 m2 · 4 = 120 kN of G and 90 kN of Q, the roof 60 kN of G and
// 18 kN of R. Recommended, psi_0 = 0.7: alpha_n = (2 + 0.7 (n - 2))/n.
func TestReducedByStoreys(t *testing.T) {
	m := one(t, `basis { standard "EN 1993-1-1:2005"; actions "EN 1990:2002"; reduce imposed by storeys }`+fiveFloors+"}")
	const leading = "1.35 G + 1.5 Q"
	// n = 5: 4.1/5 = 0.82: 1.35 (600 + 60) + 1.5 · 0.82 · 450 = 891 + 553.5
	same(t, "base", force(t, m, leading, 0, 4), 1444.5)
	// n = 3: 0.9: 1.35 (360 + 60) + 1.5 · 0.9 · 270 = 567 + 364.5
	same(t, "below f3", force(t, m, leading, 8, 12), 931.5)
	// n = 2: 1: 1.35 (240 + 60) + 1.5 · 180 = 405 + 270
	same(t, "below f4", force(t, m, leading, 12, 16), 675)
	// psi_0 goes with Q, so alpha_n does not: 891 + 1.5 · 50 + 1.05 · 450
	same(t, "base, wind leading", force(t, m, "1.35 G + 1.05 Q + 1.5 W", 0, 4), 891+75+472.5)
	// the roof is no storey and is not reduced: 891 + 1.5 · 18
	same(t, "base, roof", force(t, m, "1.35 G + 1.5 R", 0, 4), 918)
	found := false
	for _, a := range m.Assumptions {
		found = found || strings.Contains(a, "0.82 below f1 (5 storeys, 150 m2)")
	}
	if !found {
		t.Errorf("the factor is not among the assumptions: %q", m.Assumptions)
	}
}

// TestReducedEightStoreys is the column of eight storeys of the Concrete Centre's
// Worked Examples to Eurocode 2 (C. H. Goodchild), UK National Annex: G_k = 5553.6
// kN, Q_k = 2279.5 kN, of which 42.0 kN on the roof; alpha_n = 0.6. Printed: 9555.3
// kN by (6.10), 9000.0 kN by (6.10b) with xi gamma_G rounded to 1.25; with 1.24875
// it is 9000.0 - 0.00125 · 5553.6. The floors' 2237.5 kN are spread over eight levels.
func TestReducedEightStoreys(t *testing.T) {
	var levels, loads strings.Builder
	for i := 1; i <= 8; i++ {
		fmt.Fprintf(&levels, "level f%d at %d m { Q %.8f kN/m2 }\n", i, 3*i, 2237.5/8/40)
		fmt.Fprintf(&loads, "    load floor 40 m2 at f%d\n", i)
	}
	for _, x := range []struct {
		equation, combination string
		want                  float64
	}{
		{"6.10", "1.35 G + 1.5 Q + 1.05 R", 9555.3},
		{"6.10a/b", "1.24875 G + 1.5 Q + 1.05 R", 9000.0 - 0.00125*5553.6},
	} {
		m := one(t, `basis { standard "EN 1993-1-1:2005"; reduce imposed by storeys
    actions "EN 1990:2002" annex "United Kingdom" eq "`+x.equation+`" }
case G permanent
case Q imposed "B"
case R imposed "H"
level ground at 0 m
`+levels.String()+`
column C1 { section = "HEB 1000"; material = "S460"; from ground to f8 + 3 m; selfweight off
`+loads.String()+"    load G 5553.6 kN at top\n    load R 42 kN at top\n}")
		if got := force(t, m, x.combination, 0, 3); math.Abs(got-x.want) > 0.2 {
			t.Errorf("(%s): %.1f kN, printed %.1f kN", x.equation, got, x.want)
		}
	}
}

// TestReducedByArea takes a building of two floors down by hand, 60 m2 each, with
// a hall (C), a store (E) and an office (B).
func TestReducedByArea(t *testing.T) {
	text := func(basis string) string {
		return `basis { standard "EN 1993-1-1:2005"; actions "EN 1990:2002"` + basis + ` }
case G permanent
case H imposed "C3"
case E imposed "E1"
case B imposed "B"
level ground at 0 m
level f1 at 4 m { H 5 kN/m2; E 7.5 kN/m2 }
level f2 at 8 m { H 5 kN/m2; B 3 kN/m2 }
column C1 { section = "HEB 300"; material = "S355"; from ground to f2; selfweight off
    load G 100 kN at top
    load floor 60 m2 at f1
    load floor 60 m2 at f2
}`
	}
	m := one(t, text("; reduce imposed by area"))
	// 135 + 1.5 H: below f1 A = 120 m2: 0.5 + 10/120 = 0.583, at least 0.6: 600 kN
	same(t, "hall at the base", force(t, m, "1.35 G + 1.5 H", 0, 4), 135+1.5*0.6*600)
	// below f2 A = 60 m2: 0.5 + 10/60 = 2/3
	same(t, "hall below f2", force(t, m, "1.35 G + 1.5 H", 4, 8), 135+1.5*2./3*300)
	// storage is not reduced: 450 kN
	same(t, "store", force(t, m, "1.35 G + 1.5 E", 0, 4), 135+1.5*450)
	// the office has 60 m2: 180 kN; alpha_A goes with psi_0 too
	same(t, "office", force(t, m, "1.35 G + 1.5 E + 1.05 B", 0, 4), 135+675+1.05*2./3*180)

	// United Kingdom: 1 - 120/1000 = 0.88 (from memory)
	m = one(t, strings.Replace(text("; reduce imposed by area"), `"EN 1990:2002"`, `"EN 1990:2002" annex "United Kingdom"`, 1))
	same(t, "hall, United Kingdom", force(t, m, "1.35 G + 1.5 H", 0, 4), 135+1.5*0.88*600)
	m = one(t, text(`; reduction = 0.7 because "agreed"`))
	same(t, "stated", force(t, m, "1.35 G + 1.5 H", 0, 4), 135+1.5*0.7*600)
	m = one(t, text("; reduce imposed off"))
	same(t, "off", force(t, m, "1.35 G + 1.5 H", 0, 4), 135+900)
}

// TestLiveFactor works (4.7-1) of ASCE/SEI 7 out by hand: the numbers are chosen so
// that the root is whole.
func TestLiveFactor(t *testing.T) {
	const foot2, psf = 0.3048 * 0.3048, 47.88025898
	for _, x := range []struct {
		element, area float64 // square feet
		floors        int
		pressure      float64 // psf
		want          float64
	}{
		{4, 625, 1, 50, 0.55},        // 0.25 + 15/50
		{4, 2500, 1, 50, 0.5},        // 0.40, but one floor
		{4, 2500, 4, 50, 0.4},        // 0.25 + 15/100
		{4, 10000, 8, 50, 0.4},       // 0.325, at least 0.4
		{2, 450, 1, 50, 0.75},        // 0.25 + 15/30
		{2, 199, 1, 50, 1},           // below 400 square feet
		{4, 625, 1, 125, 1},          // heavy, one floor
		{4, 2500, 4, 125, 0.8},       // heavy, a fifth
		{4, 2500, 4, 100, 0.4},       // 100 psf is not above 100 psf
		{1, 625, 2, 60, 0.85},        // 0.25 + 15/25
		{4, 625, 0, 50, 1},           // nothing above
		{2, 200, 1, 50, 0.25 + 0.75}, // at the limit: 0.25 + 15/20
	} {
		if got := action.LiveFactor(x.element, x.area*foot2*(1+1e-12), x.floors, x.pressure*psf); math.Abs(got-x.want) > 1e-9 {
			t.Errorf("K_LL %g, %g square feet, %d floors, %g psf: %g, by hand %g", x.element, x.area, x.floors, x.pressure, got, x.want)
		}
	}
}

// TestReductionNeverAdds checks with random buildings that no reduction makes the
// force anywhere greater, under any combination.
func TestReductionNeverAdds(t *testing.T) {
	r := rand.New(rand.NewSource(3))
	for range 12 {
		var levels, loads strings.Builder
		categories := []string{"A", "B", "C1", "D1", "E1", "H"}
		n := 1 + r.Intn(7)
		for i := 1; i <= n; i++ {
			fmt.Fprintf(&levels, "level f%d at %d m { G %.2f kN/m2; Q %.2f kN/m2; P %.2f kN/m2 }\n", i, 3*i, 1+4*r.Float64(), 5*r.Float64(), 5*r.Float64())
			fmt.Fprintf(&loads, "    load floor %.1f m2 at f%d\n", 5+80*r.Float64(), i)
		}
		first, second := categories[r.Intn(4)], categories[r.Intn(6)]
		text := func(reduce string) string {
			return `basis { standard "elastic"; actions "EN 1990:2002"; ` + reduce + " }\ncase G permanent\ncase Q imposed \"" + first + "\"\ncase P imposed \"" + second +
				"\"\ncase W wind\nlevel ground at 0 m\n" + levels.String() + fmt.Sprintf("column C1 { section = \"HEB 300\"; material = \"S355\"; from ground to f%d\n load W -40 kN\n", n) + loads.String() + "}"
		}
		plain := one(t, text("reduce imposed off"))
		for _, reduce := range []string{"reduce imposed by storeys", "reduce imposed by area", "reduce live by tributary area K_LL 4", `reduction = 0.6 because "test"`} {
			m := one(t, text(reduce))
			for k := range m.Combinations() {
				if m.Combinations()[k].Name != plain.Combinations()[k].Name {
					t.Fatalf("the combinations differ")
				}
				for z := range n {
					a, b := m.Frame().Compression(k, float64(3*z), float64(3*z+3)), plain.Frame().Compression(k, float64(3*z), float64(3*z+3))
					if a > b*(1+1e-12) && b > 0 {
						t.Errorf("%s: %g N, unreduced %g N", reduce, a, b)
					}
				}
			}
		}
	}
}

// TestTakedown adds up the building of five floors by hand.
func TestTakedown(t *testing.T) {
	m := one(t, `basis { standard "EN 1993-1-1:2005"; actions "EN 1990:2002"; reduce imposed by storeys }`+fiveFloors+"    load W 3 kN across major at f2\n}")
	down := m.Takedown()
	if len(down.Levels) != 6 || len(down.Cases) != 4 || down.Levels[0].Name != "roof" || down.Levels[5].Name != "f1" {
		t.Fatalf("%+v", down)
	}
	// G: 60 from the roof, 120 from each floor; Q: 90 from each floor
	for i := range 6 {
		same(t, "G below "+down.Levels[i].Name, down.Levels[i].Force[0], 1e3*float64(60+120*i))
		same(t, "Q below "+down.Levels[i].Name, down.Levels[i].Force[1], 1e3*float64(90*i))
	}
	same(t, "G that comes in at f1", down.Levels[5].Load[0], 120e3)
	same(t, "alpha_n at the base", down.Levels[5].Factor[1], 0.82)
	same(t, "alpha_n below f3", down.Levels[3].Factor[1], 0.9)
	same(t, "alpha_n below f4", down.Levels[2].Factor[1], 1)
	same(t, "R is not reduced", down.Levels[5].Factor[2], 1)
	same(t, "G at the base", down.Base[0].Axial, 660e3)
	same(t, "W at the base", down.Base[3].Axial, 50e3)
	// 3 kN at 8 m of 24 m on two pins: 2 kN at the base
	if got := math.Abs(down.Base[3].Shear[0]); math.Abs(got-2e3) > 1e-6 {
		t.Errorf("the shear force at the base is %g N, by hand 2000 N", got)
	}
	// own weight: 24 m of HEB 300, A = 149.1 cm2 by the tables
	m = one(t, `basis { standard "elastic" }`+strings.Replace(fiveFloors, "selfweight off", "", 1)+"}")
	weight := m.Takedown().Base[0].Axial - 660e3
	if want := 24 * 149.1e-4 * 7850 * 9.80665; math.Abs(weight/want-1) > 2e-3 {
		t.Errorf("the column weighs %g N, by hand %g N", weight, want)
	}
}
