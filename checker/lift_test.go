package checker_test

import (
	"fmt"
	"math"
	"math/rand"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/standard"
)

const liftBasis = `
case G permanent
case Q imposed "B"
level ground at 0 m
level first at 3.5 m
level second at 7 m
level third at 10.5 m
`

// one works out a calculation with one column C1.
func one(t *testing.T, text string) *checker.Result {
	t.Helper()
	r := checkFiles(map[string]string{"a.kern": text})
	for _, d := range r.Diagnostics {
		if d.Severity == 0 && d.Member == "" {
			t.Fatalf("%s: %s\n%s", d.Rule, d.Message, text)
		}
	}
	m := member(r, "C1")
	if m == nil {
		t.Fatalf("no C1 in\n%s", text)
	}
	return m
}

func row(m *checker.Result, rule string) standard.Check {
	for _, c := range m.Checks {
		if c.Rule == rule {
			return c
		}
	}
	return standard.Check{Utilisation: math.NaN()}
}

var liftStandards = map[string]string{
	"elastic": `basis { standard "elastic"; factor_yield = 1.5; factor_buckling = 2 }`,
	"2005":    `basis { standard "EN 1993-1-1:2005"; actions "EN 1990:2002" eq "6.10" }`,
	"aisc":    `basis { standard "ANSI/AISC 360-22" by LRFD }`,
	"2022":    `basis { standard "EN 1993-1-1:2022"; actions "EN 1990:2002" eq "6.10" }`,
}

// TestLiftsBetweenHolds compares lifts that change where the column is held about
// both axes and against twist with columns of one storey that carry what comes from
// above: each check of a lift is that of the storey alone.
func TestLiftsBetweenHolds(t *testing.T) {
	for name, basis := range liftStandards {
		m := one(t, basis+liftBasis+`
column C1 {
    from ground to third
    selfweight off
    material = "S355"
    lift ground to first { section = "HEB 200" }
    lift first to second { section = "HEB 160"; material = "S275" }
    lift second to third { section = "HEA 120" }
    hold both at first
    hold twist at first
    hold both at second
    hold twist at second
    load G 400 kN at first
    load Q 200 kN at first
    load G 300 kN at second
    load G 90 kN at third
    load Q 60 kN at third
}`)
		worst := map[string]float64{}
		for _, storey := range []string{
			`section = "HEB 200"; material = "S355"; load G 790 kN; load Q 260 kN`,
			`section = "HEB 160"; material = "S275"; load G 390 kN; load Q 60 kN`,
			`section = "HEA 120"; material = "S355"; load G 90 kN; load Q 60 kN`,
		} {
			s := one(t, basis+liftBasis+"column C1 { height = 3.5 m; selfweight off; "+storey+" }")
			for _, c := range s.Checks {
				worst[c.Rule] = max(worst[c.Rule], c.Utilisation)
			}
		}
		if len(worst) < 2 {
			t.Fatalf("%s: only %v", name, worst)
		}
		for rule, want := range worst {
			if c := row(m, rule); !(math.Abs(c.Utilisation-want) <= 1e-9) || c.Lift == "" {
				t.Errorf("%s: %s is %g in %q, the storeys by themselves give %g", name, rule, c.Utilisation, c.Lift, want)
			}
		}
	}
}

// random makes the lines of a random column of three lifts; cut adds a boundary
// between equal lifts.
func randomLifts(r *rand.Rand, cut bool) string {
	sections := []string{"HEB 260", "HEB 200", "HEA 160"}
	var b strings.Builder
	b.WriteString("    material = \"S355\"; from ground to third\n")
	low, high := "first", "second"
	if r.Intn(2) == 0 {
		low, high = "first + 0.5 m", "second + 0.4 m"
	}
	if cut {
		fmt.Fprintf(&b, "    lift ground to 1.3 m { section = %q }\n    lift 1.3 m to %s { section = %q }\n", sections[0], low, sections[0])
	} else {
		fmt.Fprintf(&b, "    lift ground to %s { section = %q }\n", low, sections[0])
	}
	fmt.Fprintf(&b, "    lift %s to %s { section = %q }\n    lift %s to third { section = %q }\n", low, high, sections[1], high, sections[2])
	if r.Intn(2) == 0 {
		b.WriteString("    base fixed\n")
	}
	for _, l := range []string{"first", "second"} {
		if r.Intn(3) > 0 {
			fmt.Fprintf(&b, "    hold both at %s\n", l)
		}
		if r.Intn(2) > 0 {
			fmt.Fprintf(&b, "    hold twist at %s\n", l)
		}
	}
	return b.String()
}

// TestLiftCut checks that a boundary between two equal lifts changes nothing.
func TestLiftCut(t *testing.T) {
	for name, basis := range liftStandards {
		for seed := range int64(6) {
			loads := fmt.Sprintf("    load G %d kN at first offset %d mm about major\n    load Q 80 kN at second\n    load G 70 kN at third\n}", 100+seed*37, seed*30)
			whole := one(t, basis+liftBasis+"column C1 {\n"+randomLifts(rand.New(rand.NewSource(seed)), false)+loads)
			cut := one(t, basis+liftBasis+"column C1 {\n"+randomLifts(rand.New(rand.NewSource(seed)), true)+loads)
			if len(whole.Checks) != len(cut.Checks) {
				t.Fatalf("%s: %d checks, cut %d", name, len(whole.Checks), len(cut.Checks))
			}
			for i, c := range whole.Checks {
				d := cut.Checks[i]
				if c.Rule != d.Rule || c.Verdict != d.Verdict || !(math.Abs(c.Utilisation-d.Utilisation) <= 1e-9*c.Utilisation) && !math.IsNaN(c.Utilisation) {
					t.Errorf("%s, column %d: %s is %g, cut %s %g", name, seed, c.Rule, c.Utilisation, d.Rule, d.Utilisation)
				}
			}
		}
	}
}

// TestLiftLoadMoved checks that a load which comes in lower spares the lifts above:
// no check of theirs is used more.
func TestLiftLoadMoved(t *testing.T) {
	for name, basis := range liftStandards {
		for seed := range int64(6) {
			at := func(level string) *checker.Result {
				return one(t, basis+liftBasis+"column C1 {\n"+randomLifts(rand.New(rand.NewSource(seed)), false)+
					"    load G 120 kN at first\n    load Q 80 kN at "+level+"\n    load G 70 kN at third\n}")
			}
			high, low := at("third"), at("first")
			// the upper two lifts are above the first level in every column
			s := checker.StandardNamed(high.Standard)
			for lift := 1; lift < 3; lift++ {
				used := func(m *checker.Result) map[string]float64 {
					worst := map[string]float64{}
					for k := range m.Combinations() {
						for _, c := range s.Check(m.Frame().Part(lift, k), nil).Checks {
							worst[c.Rule] = max(worst[c.Rule], c.Utilisation)
						}
					}
					return worst
				}
				before, after := used(high), used(low)
				if len(before) < 2 {
					t.Fatalf("%s: only %v", name, before)
				}
				for rule, u := range after {
					if !(u <= before[rule]*(1+1e-9)) {
						t.Errorf("%s, column %d, lift %d: %s is %g, with the load at the top %g", name, seed, lift, rule, u, before[rule])
					}
				}
			}
			if low.Utilisation > high.Utilisation*(1+1e-9) {
				t.Errorf("%s, column %d: %g, with the load at the top %g", name, seed, low.Utilisation, high.Utilisation)
			}
		}
	}
}

// TestLiftStepped is a column of two lifts between its ends alone, under a load at
// the change and one at the top. The critical factor follows from the differential
// equations of the two parts, whose slopes meet at the change; N_cr of each lift is
// its force times the factor.
func TestLiftStepped(t *testing.T) {
	// Pinned ends, E = 210 GPa, lower 4 m HEB 200 (I_z = 2003 cm4), upper 3 m
	// HEB 140 (I_z = 550 cm4), N = 500 kN below and 200 kN above.
	m := one(t, `basis { standard "elastic" }
column C1 { material = "S355"; height = 7 m; selfweight off
    lift base to 4 m { section = "HEB 200" }
    lift 4 m to top { section = "HEB 140" }
    load 300 kN at 4 m
    load 200 kN at top
}`)
	f := m.Frame()
	lower, upper := f.Part(0, 0), f.Part(1, 0)
	e := 210e9
	i1, i2 := lower.Member.Section.IMinor, upper.Member.Section.IMinor
	det := func(a float64) float64 {
		n1, n2 := 500e3*a, 200e3*a
		k1, k2 := math.Sqrt(n1/(e*i1)), math.Sqrt(n2/(e*i2))
		l1, l2 := 4.0, 3.0
		// Where y(4 m) = 1, moments about the top pin give the horizontal force at
		// both pins: H · 7 = 300 a. Below, E I y'' + N y = H x, so that
		// y = A sin(k x) + H x / N; above, counted from the top, with -H.
		h := 300e3 * a / 7
		aa := (1 - h/n1*l1) / math.Sin(k1*l1)
		bb := (1 + h/n2*l2) / math.Sin(k2*l2)
		return aa*k1*math.Cos(k1*l1) + h/n1 + bb*k2*math.Cos(k2*l2) - h/n2
	}
	low, high := 0.01, 0.0
	for a := 0.05; a < 50; a += 0.01 {
		if det(a) < 0 {
			low, high = a-0.01, a
			break
		}
	}
	for range 100 {
		mid := (low + high) / 2
		if det(mid) > 0 {
			low = mid
		} else {
			high = mid
		}
	}
	for i, want := range []float64{500e3 * low, 200e3 * low} {
		p := []*standard.Frame{lower, upper}[i]
		s := p.Stretches[1][0]
		got := math.Pi * math.Pi * e * p.Member.Section.IMinor / (s.Effective() * s.Effective())
		if math.Abs(got/want-1) > 1e-6 {
			t.Errorf("lift %d: N_cr = %.6g N, want %.6g N", i, got, want)
		}
	}
	if c := row(m, "elastic-buckling-minor"); math.Abs(c.Utilisation*low-1) > 1e-6 {
		t.Errorf("the utilisation is %g, one over the critical factor %g", c.Utilisation, 1/low)
	}
}
