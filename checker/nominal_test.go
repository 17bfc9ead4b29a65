package checker_test

import (
	"math"
	"testing"

	"kern/checker"
)

// bent is the moment of a member about major at a height, just below or just above
// it, under the first combination, kNm.
func bent(t *testing.T, m *checker.Result, z float64, above bool) float64 {
	t.Helper()
	pieces, ok := m.Frame().Bending(0, m.Combinations()[0].Factors, nil)
	if !ok {
		t.Fatal("the member cannot stand")
	}
	for i, p := range pieces {
		if above && math.Abs(p.From-z) < 1e-9 {
			return p.M / 1e3
		}
		if !above && (math.Abs(p.To-z) < 1e-9 || i == len(pieces)-1) {
			return p.Moment(p.To-p.From) / 1e3
		}
	}
	t.Fatalf("nothing at %g m", z)
	return 0
}

const nominalColumn = `
level ground at 0 m
level first at 4 m
level second at 8 m
level third at 11 m
column C1 {
    from ground to third; selfweight off
    section = "HEB 200"; material = "S355"
    hold both at first
    hold both at second
`

// TestNominalMoments compares nominal moments with figures by hand, and with the
// exact analysis where the two must agree.
func TestNominalMoments(t *testing.T) {
	check := func(what string, got, want float64) {
		t.Helper()
		if math.Abs(got-want) > 1e-9 {
			t.Errorf("%s: %.9g kNm, by hand %.9g kNm", what, got, want)
		}
	}
	basis := `basis { standard "elastic"; moments nominal }`
	// 100 kN · 0.2 m = 20 kNm at first: lengths of 4 m and 4 m have half each, and
	// second and the ends none
	m := one(t, basis+nominalColumn+"load 100 kN at first offset 0.2 m about major }")
	check("below first", bent(t, m, 4, false), 10)
	check("above first", bent(t, m, 4, true), -10)
	check("at second, below", bent(t, m, 8, false), 0)
	check("at second, above", bent(t, m, 8, true), 0)
	check("at the base", bent(t, m, 0, true), 0)
	// at second 4 m below and 3 m above: I/4 and I/3 differ by 1.33, halves
	m = one(t, basis+nominalColumn+"load 100 kN at second offset 0.2 m about major }")
	check("below second", bent(t, m, 8, false), 10)
	check("above second", bent(t, m, 8, true), -10)
	check("at first", bent(t, m, 4, false), 0)
	// the top has one length alone
	m = one(t, basis+nominalColumn+"load 100 kN at third offset 0.2 m about major }")
	check("at the top", bent(t, m, 11, false), 20)
	check("at second under the top", bent(t, m, 8, true), 0)
	// lifts: HEB 200 (I = 5696 cm4) below, HEA 140 (1033 cm4) above: I/L = 14.24 and
	// 3.444 cm3 differ by more than 1.5, so 20 · 14.24/17.684 go below
	m = one(t, basis+nominalColumn+"lift second to third { section = \"HEA 140\" }\nload 100 kN at second offset 0.2 m about major }")
	low := m.Frame().Lifts()[0].Section.IMajor / 4
	up := m.Frame().Lifts()[1].Section.IMajor / 3
	if math.Abs(low/14.24e-6-1) > 2e-3 || math.Abs(up/3.444e-6-1) > 2e-3 {
		t.Fatalf("I/L is %g and %g m3, by the tables 14.24 and 3.444 cm3", low, up)
	}
	check("below second, by stiffness", bent(t, m, 8, false), 20*low/(low+up))
	check("above second, by stiffness", bent(t, m, 8, true), -20*up/(low+up))
	// a member of two lengths, pinned at both ends, is shared by stiffness exactly:
	// the nominal moments are those of the continuous beam
	two := `column C1 { material = "S355"; height = 7 m; selfweight off; hold both at 4 m; lift base to 4 m { section = "HEB 200" }; lift 4 m to top { section = "HEA 140" }
    load 100 kN at 4 m offset 0.2 m about major }`
	exact, nominal := one(t, `basis { standard "elastic" }`+"\n"+two), one(t, basis+"\n"+two)
	for _, above := range []bool{false, true} {
		check("two lengths", bent(t, nominal, 4, above), bent(t, exact, 4, above))
	}
	// a change of section half a metre above the level: the length above has the
	// stiffness of a stepped bar
	two = `column C1 { material = "S355"; height = 7 m; selfweight off; hold both at 4 m; lift base to 4.5 m { section = "HEB 300" }; lift 4.5 m to top { section = "HEA 140" }
    load 100 kN at 4 m offset 0.2 m about major }`
	exact, nominal = one(t, `basis { standard "elastic" }`+"\n"+two), one(t, basis+"\n"+two)
	for _, above := range []bool{false, true} {
		check("stepped length", bent(t, nominal, 4, above), bent(t, exact, 4, above))
	}
}

// TestNominalDeflection checks that nominal moments bend each length as a bar on
// two pins: the deflection is the same as that of the continuous beam where both
// analyses agree.
func TestNominalDeflection(t *testing.T) {
	two := `column C1 { material = "S355"; section = "HEB 200"; height = 9 m; selfweight off; hold both at 3 m; load 100 kN at 3 m offset 0.2 m about major
    load 2 kN/m about major }`
	// I/3 and I/6 differ by 2, so by stiffness
	exact, nominal := one(t, `basis { standard "elastic" }`+"\n"+two), one(t, `basis { standard "elastic"; moments nominal }`+"\n"+two)
	a, _ := exact.Frame().Bending(0, exact.Combinations()[0].Factors, nil)
	b, _ := nominal.Frame().Bending(0, nominal.Combinations()[0].Factors, nil)
	for i := range a {
		l := (a[i].To - a[i].From) * 0.4
		if math.Abs(a[i].Deflection(l)-b[i].Deflection(l)) > 1e-6*math.Abs(a[i].Deflection(l)) || math.Abs(a[i].Moment(l)-b[i].Moment(l)) > 1e-6 {
			t.Errorf("piece %d: %+v, nominal %+v", i, a[i], b[i])
		}
	}
}
