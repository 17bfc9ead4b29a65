package en1993

import (
	"math"
	"strings"
	"testing"

	"kern/checker/model"
	"kern/checker/section"
)

// TestReductionFactors holds chi against the tables of the European buckling
// curves that ENV 1993-1-1 Table 5.5.2 prints to four places (curve a0: ECCS).
// The figures were set down from MEMORY, not read in a copy of the table: they
// are a check against slips of the formula, no more.
func TestReductionFactors(t *testing.T) {
	seen := map[string]int{}
	for _, r := range table(t, "chi-memory.csv") {
		for letter := range alphas {
			want := number(t, r[letter])
			lambda := number(t, r["lambda"])
			o := slender(t, letter, lambda)
			if got := o.value("flexural-buckling-major", "lambda_y"); math.Abs(got-lambda) > 1e-12 {
				t.Fatalf("the specimen has lambda %g, want %g", got, lambda)
			}
			seen[letter]++
			// half a unit of the last printed place
			if got := o.value("flexural-buckling-major", "chi_y"); math.Abs(got-want) > 0.5e-4*1.0001 {
				t.Errorf("curve %s, lambda = %g: chi = %.6f, table %g", letter, lambda, got, want)
			}
		}
	}
	for letter := range alphas {
		if seen[letter] != 29 {
			t.Errorf("curve %s: %d values, want 29", letter, seen[letter])
		}
	}
}

// slender is a section of a stated curve whose slenderness is lambda.
func slender(t *testing.T, letter string, lambda float64) outcome {
	t.Helper()
	s := shaped(t, section.Shape{Kind: section.Rod, Diameter: 0.1}, 355e6)
	s.section.CurveMajor, s.section.CurveMinor = letter, letter
	p := s.section.Properties
	s.height = math.Pi * math.Sqrt(s.material.E*p.IMajor/(p.Area*s.material.Fy)) * lambda
	return s.check()
}

// TestReductionFactorBounds walks every curve from no slenderness to a great
// one: chi is 1 up to 0.2, never rises with slenderness, stays below Euler's
// curve, and the curves never cross.
func TestReductionFactorBounds(t *testing.T) {
	order := []string{"a0", "a", "b", "c", "d"}
	before := map[string]float64{}
	for lambda := 0.01; lambda < 8; lambda *= 1.02 {
		better := 1.0
		for _, letter := range order {
			chi := slender(t, letter, lambda).value("flexural-buckling-major", "chi_y")
			switch {
			case !(chi > 0 && chi <= 1):
				t.Fatalf("curve %s, lambda = %g: chi = %g", letter, lambda, chi)
			case lambda <= 0.2 && chi != 1:
				t.Errorf("curve %s, lambda = %g: chi = %g, want 1 up to 0.2", letter, lambda, chi)
			case lambda > 0.2 && chi >= 1/(lambda*lambda):
				t.Errorf("curve %s, lambda = %g: chi = %g is above Euler's curve", letter, lambda, chi)
			case chi > better:
				t.Errorf("curve %s, lambda = %g: chi = %g is above the curve before it", letter, lambda, chi)
			case before[letter] > 0 && chi > before[letter]:
				t.Errorf("curve %s: chi rises at lambda = %g", letter, lambda)
			}
			before[letter], better = chi, chi
		}
	}
}

// TestTable62 holds the buckling curves of Table 6.2 row by row. The table was
// set down from MEMORY (facts of the project); b/c and a/a for h/b <= 1.2, and
// a/b for IPE, are confirmed by the published resistances of EU-02 and EU-05.
func TestTable62(t *testing.T) {
	i := func(made section.Made, h, b, tf float64) section.Shape {
		return section.Shape{Kind: section.ISection, Made: made, Depth: h / 1000, Width: b / 1000, Web: tf / 2000, Flange: tf / 1000}
	}
	kind := func(k section.Kind, m section.Made) section.Shape {
		return section.Shape{Kind: k, Made: m, Depth: 0.1, Width: 0.1, Web: 0.005, Flange: 0.005, Wall: 0.005, Diameter: 0.1}
	}
	for _, c := range []struct {
		name      string
		shape     section.Shape
		low, high string // "major minor" of S235 to S420 and of S460
	}{
		{"rolled I, h/b 2, t_f 40", i(section.Rolled, 600, 300, 40), "a b", "a0 a0"},
		{"rolled I, h/b 2, t_f 40.1", i(section.Rolled, 600, 300, 40.1), "b c", "a a"},
		{"rolled I, h/b 2, t_f 100", i(section.Rolled, 600, 300, 100), "b c", "a a"},
		{"rolled I, h/b 2, t_f 100.1", i(section.Rolled, 600, 300, 100.1), " ", " "},
		{"rolled I, h/b 1.2, t_f 40", i(section.Rolled, 360, 300, 40), "b c", "a a"},
		{"rolled I, h/b 1.2 in inches", i(section.Rolled, 1.2*11*25.4, 11*25.4, 40), "b c", "a a"},
		{"rolled I, h/b 1.21, t_f 40", i(section.Rolled, 363, 300, 40), "a b", "a0 a0"},
		{"rolled I, h/b 1.2, t_f 100", i(section.Rolled, 540, 450, 100), "b c", "a a"},
		{"rolled I, h/b 1.2, t_f 100.1", i(section.Rolled, 540, 450, 100.1), "d d", "c c"},
		{"welded I, t_f 40", i(section.Welded, 600, 300, 40), "b c", "b c"},
		{"welded I, t_f 40.1", i(section.Welded, 600, 300, 40.1), "c d", "c d"},
		{"hot tube", kind(section.Tube, section.Hot), "a a", "a0 a0"},
		{"cold tube", kind(section.Tube, section.Cold), "c c", "c c"},
		{"hot pipe", kind(section.Pipe, section.Hot), "a a", "a0 a0"},
		{"cold pipe", kind(section.Pipe, section.Cold), "c c", "c c"},
		{"welded box", kind(section.Tube, section.Welded), "b b", "b b"},
		{"channel", kind(section.Channel, section.Rolled), "c c", "c c"},
		{"tee", kind(section.Tee, section.Rolled), "c c", "c c"},
		{"bar", kind(section.Bar, section.MadeUnknown), "c c", "c c"},
		{"rod", kind(section.Rod, section.MadeUnknown), "c c", "c c"},
		{"rolled angle", kind(section.Angle, section.Rolled), "b b", "b b"},
	} {
		for high, want := range map[bool]string{false: c.low, true: c.high} {
			major, minor := curves(&model.Section{Shape: c.shape}, high)
			if got := major.letter + " " + minor.letter; got != want {
				t.Errorf("%s, S460 column %v: curves %q, want %q", c.name, high, got, want)
			}
			if major.row == "" || minor.row == "" {
				t.Errorf("%s: no row named", c.name)
			}
		}
	}
	// a shallow I section: its strong axis lies along the web, so the curves
	// change places
	s := shaped(t, i(section.Rolled, 100, 300, 20), 355e6)
	if major, minor := curves(&s.section, false); !s.section.Turned || major.letter+minor.letter != "cb" {
		t.Errorf("shallow I section: curves %s and %s, want c about the major axis and b about the minor", major.letter, minor.letter)
	}
	if _, minor := curves(&model.Section{Shape: kind(section.Angle, section.Welded)}, false); minor.letter != "c" || !strings.Contains(minor.row, "not in Table 6.2") {
		t.Errorf("welded angle: curve %s (%s)", minor.letter, minor.row)
	}
}
