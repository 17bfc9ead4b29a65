package en1993_test

import (
	"fmt"
	"math"
	"math/rand"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/standard"
	"kern/lang"
)

// one works a text with one member out.
func one(t *testing.T, text string) *checker.Result {
	t.Helper()
	return worked(t, map[string]string{"a.kern": text})
}

// TestNamedExceptions pins the places where a member that looks worse is found
// better, or has no utilisation, with the clause or the reason.
func TestNamedExceptions(t *testing.T) {
	tube := func(fy string) *checker.Result {
		return one(t, `basis { standard "EN 1993-1-1:2005"; selfweight off }
material m { E = 210 GPa; fy = `+fy+` }
section s = tube { width = 200 mm; wall = 5 mm; made = hot }
column A1 { section = s; material = m; height = 1 m; load 500 kN }`)
	}
	// c/t = 37 = 42 epsilon at 302.8 N/mm2: Table 5.2 counts the walls in full up
	// to there, EN 1993-1-5 4.4(2) reduces them from 38.2 epsilon on
	weak, strong := tube("302 MPa"), tube("304 MPa")
	if classOf(weak) != 3 || classOf(strong) != 4 {
		t.Fatalf("classes %g and %g, want 3 and 4", classOf(weak), classOf(strong))
	}
	if ratio := weak.Utilisation / strong.Utilisation; !(ratio < 0.97 && ratio > 0.93) {
		t.Errorf("the jump between class 3 and 4 is %.4f, expected 0.93 to 0.97", ratio)
	}
	// A stretch that ends at a hold is taken as pinned there. Close to a clamped
	// end the hold makes the rule worse than no hold, on the safe side.
	clamped := func(hold string) float64 {
		return one(t, `basis { standard "elastic"; selfweight off }
material m { E = 210 GPa; fy = 355 MPa }
section s = rod { diameter = 60 mm }
column A1 { section = s; material = m; height = 4 m; base fixed; top fixed; load 50 kN`+hold+` }`).Utilisation
	}
	if with, without := clamped("; hold both at 3.8 m"), clamped(""); !(with > 1.5*without) {
		t.Errorf("a hold near a clamped end: utilisation %g with it and %g without", with, without)
	}
	// Above the critical load there is no stress to give: the check of first
	// yield fails with the axial force over the critical load, which is less than
	// the stress over yield was just below it.
	column := func(load string) *checker.Result {
		return one(t, `basis { standard "elastic"; selfweight off; factor_yield = 3 }
material m { E = 210 GPa; fy = 250 MPa }
section s = rod { diameter = 60 mm }
column A1 { section = s; material = m; height = 4 m; load `+load+` offset 1 mm about major }`)
	}
	below, above := column("26 kN"), column("28 kN") // P_cr = 82.4 kN
	if below.Verdict != standard.Passes || below.Governing == "" || above.Verdict != standard.Fails || !(above.Utilisation >= 1) {
		t.Errorf("near the critical load: %s %g, above %s %g", below.Verdict, below.Utilisation, above.Verdict, above.Utilisation)
	}
}

// TestImpossibleInput puts what is no number, or cannot be, in every place of a
// calculation: the member never passes.
func TestImpossibleInput(t *testing.T) {
	const eurocode = `basis { standard "EN 1993-1-1:2005"; gamma_M0 = <1 > because "x"; gamma_M1 = <1 > because "x"; actions "EN 1990:2002"; gamma_Q = <1.5 > because "x" }
material m { E = <210 GPa>; fy = <355 MPa>; density = <7850 kg/m3> }
section s = isection { depth = <300 mm>; width = <150 mm>; web = <8 mm>; flange = <12 mm>; made = welded }
case G permanent
case Q imposed "B"
column A1 { section = s; material = m; height = <4 m>; hold minor at <2 m>; effective = <0.9 > about major; load G 100 kN; load Q 50 kN at 3 m; limit slenderness = <200 >; limit utilisation = <0.9 > }`
	const bent = `basis { standard "elastic"; factor_yield = <1.5 >; factor_buckling = <2 > }
material m { E = <210 GPa>; G = <81 GPa>; fy = <355 MPa>; density = <7850 kg/m3> }
section s = tube { width = <150 mm>; depth = <200 mm>; wall = <8 mm>; made = hot }
column A1 { section = s; material = m; height = <4 m>; hold both at <2 m>; load 100 kN offset 20 mm about major; load 1 kN/m about minor from 1 m to <3 m> }`
	const given = `basis { standard "elastic" }
material m { E = <210 GPa>; fy = <355 MPa>; density = <7850 kg/m3> }
section s = given { A = <50 cm2>; I_major = <8000 cm4>; I_minor = <3000 cm4>; W_major = <500 cm3>; W_minor = <300 cm3> }
column A1 { section = s; material = m; height = <4 m>; effective = <1.2 >; load 100 kN }`
	replaced := 0
	for _, text := range []string{eurocode, bent, given} {
		pieces := strings.FieldsFunc(text, func(r rune) bool { return r == '<' || r == '>' })
		good := strings.Join(pieces, "")
		if r := one(t, good); r.Verdict != standard.Passes {
			t.Fatalf("the calculation %s to begin with: %+v %v", r.Verdict, r.Checks, r.Missing)
		}
		for i := 1; i < len(pieces); i += 2 {
			number, unit, _ := strings.Cut(pieces[i], " ")
			for _, bad := range []string{"0 u", "-" + number + " u", "1e999 u", "1e308 u", "-1e308 u", "0 u / 0", "1 u / 0", "sqrt(-1) * 1 u", "1e200 * 1e200 * 1 u", "NaN", "Inf u", "1e-320 u"} {
				value := strings.TrimSpace(strings.ReplaceAll(bad, "u", unit))
				if strings.Contains(bad, "sqrt") { // has a u of its own in no unit
					value = "sqrt(-1) * 1 " + unit
				}
				changed := append([]string(nil), pieces...)
				changed[i] = value
				text := strings.Join(changed, "")
				p := lang.Load([]string{"a.kern"}, func(string) (string, error) { return text, nil }, nil)
				for _, m := range checker.Check(p, nil).Members {
					replaced++
					if m.Verdict == standard.Passes {
						t.Errorf("%s%s: the member passes", pieces[i-1][max(0, len(pieces[i-1])-20):], value)
					}
				}
			}
		}
	}
	if replaced < 250 {
		t.Errorf("%d replacements, want 250", replaced)
	}
}

// TestUnitsChangeNothing writes the same members in SI and in US customary
// units: every check gives the same.
func TestUnitsChangeNothing(t *testing.T) {
	r := rand.New(rand.NewSource(6))
	worst := 0.0
	for i := range 400 {
		c := randomColumn(r, []string{eurocode, euler}[i%2])
		a := one(t, strings.Join(c.decls(si), "\n"))
		b := one(t, strings.Join(c.decls(us), "\n"))
		worst = max(worst, sameResult(t, a, b, 1e-12, strings.Join(c.decls(us), "\n")))
	}
	t.Logf("greatest deviation %.2g", worst)
}

// sameResult compares two results of one member.
func sameResult(t *testing.T, a, b *checker.Result, tolerance float64, text string) float64 {
	t.Helper()
	worst := 0.0
	if a.Verdict != b.Verdict || len(a.Checks) != len(b.Checks) || a.Governing != b.Governing {
		t.Errorf("%s by %s and %s by %s:\n%s", a.Verdict, a.Governing, b.Verdict, b.Governing, text)
		return worst
	}
	for i, c := range a.Checks {
		d := b.Checks[i]
		if c.Rule != d.Rule || c.Verdict != d.Verdict || math.IsNaN(c.Utilisation) != math.IsNaN(d.Utilisation) {
			t.Errorf("%s %s %g and %s %s %g:\n%s", c.Rule, c.Verdict, c.Utilisation, d.Rule, d.Verdict, d.Utilisation, text)
			continue
		}
		if math.IsNaN(c.Utilisation) {
			continue
		}
		for _, pair := range [][2]float64{{c.Utilisation, d.Utilisation}, {c.Demand, d.Demand}, {c.Capacity, d.Capacity}} {
			dev := math.Abs(pair[0]-pair[1]) / max(math.Abs(pair[0]), 1e-300)
			if math.Abs(c.Utilisation) < 1e-9 {
				continue // a difference that should be zero
			}
			worst = max(worst, dev)
			if !(dev <= tolerance) {
				t.Errorf("%s: %.15g and %.15g (%.2g):\n%s", c.Rule, pair[0], pair[1], dev, text)
			}
		}
	}
	return worst
}

// TestOrderChangesNothing shuffles the declarations of a calculation and deals
// them out to files.
func TestOrderChangesNothing(t *testing.T) {
	r := rand.New(rand.NewSource(7))
	for i := range 200 {
		c := randomColumn(r, []string{eurocode, euler}[i%2])
		decls := c.decls(si)
		a := one(t, strings.Join(decls, "\n"))
		shuffled := append([]string(nil), decls...)
		r.Shuffle(len(shuffled), func(i, j int) { shuffled[i], shuffled[j] = shuffled[j], shuffled[i] })
		text := strings.Join(shuffled, "\n")
		sameResult(t, a, one(t, text), 1e-12, text)
		files := map[string]string{"a.kern": "include \"z.kern\"\ninclude \"b.kern\"\n", "b.kern": "", "z.kern": "include \"b.kern\"\n"}
		for k, d := range shuffled {
			name := []string{"a.kern", "b.kern", "z.kern"}[k%3]
			files[name] += d + "\n"
		}
		sameResult(t, a, worked(t, files), 1e-12, fmt.Sprint(files))
	}
}
