package unit

import (
	"math"
	"math/rand/v2"
	"testing"
)

// A value that was entered in a unit comes back in that unit to within one
// rounding.
func TestInRoundTrip(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 5))
	for _, row := range usualTexts {
		for _, u := range For(row.dim) {
			for range 500 {
				v := math.Round(r.NormFloat64()*1e6) / 1e3
				q := Quantity{v * u.Factor, u.Dim}
				if back := q.In(u); math.Abs(back-v) > 2.3e-16*math.Abs(v) {
					t.Fatalf("%v %s = %v in SI, which is %v %s", v, u.Symbol, q.Value, back, u.Symbol)
				}
			}
		}
	}
}

func TestInRefusesAnotherDimension(t *testing.T) {
	kN, _ := Parse("kN")
	for _, q := range []Quantity{{1000, Moment}, {1000, Mass}, {1000, None}} {
		if v := q.In(kN); !math.IsNaN(v) {
			t.Errorf("a %s in kN is %v", q.Dim.Name(), v)
		}
	}
	if v := (Quantity{1, None}).In(Unit{}); !math.IsNaN(v) {
		t.Errorf("in no unit: %v", v)
	}
	if v := (Quantity{1500, Force}).In(kN); v != 1.5 {
		t.Errorf("1500 N = %v kN", v)
	}
}
