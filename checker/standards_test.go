package checker_test

import (
	"math"
	"testing"

	"kern/checker"
)

// tenColumns are common columns that are checked by two standards with one line of
// the basis changed. The loads are design loads for both.
const tenColumns = `
material s355 = "S355"
section tube = pipe { outside = 168.3 mm; wall = 8 mm; made = cold }
section built = isection { depth = 300 mm; width = 250 mm; web = 10 mm; flange = 15 mm; made = welded }
section ell = angle { depth = 100 mm; wall = 12 mm; root = 12 mm; toe = 6 mm }
column C1 { section = "HEB 200"; material = s355; height = 4 m; load 1500 kN }
column C2 { section = "HEA 300"; material = s355; height = 3 m; load 1500 kN }
column C3 { section = "SHS 120x120x8"; material = s355; height = 5 m; load 500 kN }
column C4 { section = tube; material = s355; height = 4 m; load 500 kN }
column C5 { section = "IPE 300"; material = s355; height = 6 m; hold minor at 2 m; hold minor at 4 m; load 800 kN }
column C6 { section = built; material = s355; height = 6 m; load 1200 kN }
column C7 { section = "UPN 200"; material = s355; height = 2.5 m; load 300 kN }
column C8 { section = ell; material = s355; height = 2 m; load 200 kN }
column C9 { section = "HEB 240"; material = s355; height = 9 m; base fixed; top free; load 300 kN }
column C10 { section = "HEB 200"; material = s355; height = 4 m; load 600 kN; load 60 kNm about major at top }
`

// curvePart is what chi of a buckling curve is of the one curve of ANSI/AISC 360 at
// the same slenderness, and modulusPart what the strength of the latter gains when E
// is 210 GPa and not 29000 ksi.
func curvePart(lambda, alpha float64) (curve, modulus float64) {
	one := func(l float64) float64 {
		if l*l <= 2.25 {
			return math.Pow(0.658, l*l)
		}
		return 0.877 / (l * l)
	}
	phi := 0.5 * (1 + alpha*(lambda-0.2) + lambda*lambda)
	chi := min(1, 1/(phi+math.Sqrt(phi*phi-lambda*lambda)))
	return chi / one(lambda), one(lambda) / one(lambda*math.Sqrt(210/199.948))
}

// TestTwoStandards holds the utilisations of ten columns by EN 1993-1-1 and by
// ANSI/AISC 360-22, LRFD, against each other. Of those that flexural buckling
// governs the ratio is the product of three parts, which this test finds from the
// slenderness alone: 1/0.9 of phi_c against gamma_M1 = 1.00, the buckling curve of EN
// against the one curve of AISC, and the modulus of elasticity, 5 % lower to AISC.
// Why a ratio is beyond 5 %:
//
//   - C1, C6, C7 (0.93, 0.91, 0.95): curve c lies 19 to 21 % below the one curve at
//     slendernesses from 1.0 to 1.5, more than phi_c and the modulus make up for.
//   - C3 (1.10): a hot-finished tube has curve a, within 5 % of the one curve: what
//     is left is phi_c and the modulus.
//   - C4 (0.95): a cold-formed tube has curve c, 16 % below, where AISC has one curve
//     for both ways of making.
//   - C9 (1.18): far in the elastic range curve c and the one curve are alike, both
//     0.88 of Euler's load: phi_c and the whole of the modulus are left.
//
// C2, C5 (torsional buckling), C8 and C10 (bending and compression, H1-1 against 6.3.3)
// differ by less.
func TestTwoStandards(t *testing.T) {
	results := func(basis string) map[string]*checker.Result {
		out := map[string]*checker.Result{}
		for _, m := range derivedReport(t, "basis { standard "+basis+"; selfweight off }"+tenColumns, true) {
			out[m.Name] = m
		}
		return out
	}
	value := func(m *checker.Result, symbol string) float64 {
		record := m.Derive()
		v := math.NaN()
		for _, s := range record.Steps {
			if s.Note == "" && record.Set.At(s.Symbol).Name == symbol {
				v = s.Value
			}
		}
		return v
	}
	en, us := results(`"EN 1993-1-1:2005"`), results(`"ANSI/AISC 360-22" by LRFD`)
	for _, c := range []struct {
		name, rule string
		ratio      float64
		curve      float64 // part of the curve, 0 where other things than flexural buckling govern
	}{
		{"C1", "flexural-buckling-minor", 0.925, 0.814}, {"C2", "flexural-buckling-minor", 1.040, 0.93}, {"C3", "flexural-buckling-minor", 1.103, 0.95},
		{"C4", "flexural-buckling-minor", 0.947, 0.837}, {"C5", "torsional-buckling", 0.996, 0}, {"C6", "flexural-buckling-minor", 0.907, 0.789},
		{"C7", "flexural-buckling-minor", 0.949, 0.813}, {"C8", "flexural-buckling-minor", 0.999, 0.865}, {"C9", "flexural-buckling-minor", 1.178, 1.01},
		{"C10", "member-interaction", 0.961, 0},
	} {
		a, b := en[c.name], us[c.name]
		if a.Governing != c.rule || b.Governing != c.rule {
			t.Errorf("%s: governed by %s and %s, want %s", c.name, a.Governing, b.Governing, c.rule)
		}
		ratio := b.Utilisation / a.Utilisation
		if !(math.Abs(ratio/c.ratio-1) <= 0.002) {
			t.Errorf("%s: AISC over EN %.4f, was %g", c.name, ratio, c.ratio)
		}
		if c.curve == 0 {
			continue
		}
		curve, modulus := curvePart(value(a, "lambda_z"), value(a, "alpha_z"))
		if want := curve * modulus / 0.9; !(math.Abs(ratio/want-1) <= 0.003) {
			t.Errorf("%s: AISC over EN %.4f, by curve (%.3f), modulus (%.3f) and phi_c %.4f", c.name, ratio, curve, modulus, want)
		}
		if !(math.Abs(curve/c.curve-1) <= 0.01) {
			t.Errorf("%s: the curve of EN is %.3f of that of AISC, the comment rests on %g", c.name, curve, c.curve)
		}
	}
}
