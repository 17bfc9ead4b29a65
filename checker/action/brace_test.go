package action

import (
	"math"
	"testing"
)

// TestIdealStiffness: Winter's closed form for equal spans, beta = N/a times
// 2 (1 + cos(pi/m)) with m spans: 2 for one hold, 3 for two, 3.41 for three, 3.62 for
// four, up to 4 (J. A. Yura, Winter's bracing approach revisited, Engineering
// Structures 18, 1996, gives 2 P/L for one hold; the series from memory).
func TestIdealStiffness(t *testing.T) {
	printed := map[int]float64{2: 2, 3: 3, 4: 3.41, 5: 3.62}
	for m := 2; m <= 30; m++ {
		spans, forces := make([]float64, m), make([]float64, m)
		for i := range spans {
			spans[i], forces[i] = 1.7, 430e3
		}
		got := IdealStiffness(spans, forces) * 1.7 / 430e3
		if want := 2 * (1 + math.Cos(pi/float64(m))); !(math.Abs(got-want) < 1e-9) {
			t.Errorf("%d spans: %.12g, want %.12g", m, got, want)
		}
		if p, ok := printed[m]; ok && math.Abs(got-p) > 0.005 {
			t.Errorf("%d spans: %.4g, printed %g", m, got, p)
		}
	}
	// one hold anywhere: N (1/a + 1/b)
	if got := IdealStiffness([]float64{2, 3}, []float64{600, 600}); math.Abs(got-500) > 1e-9 {
		t.Errorf("unequal spans: %g, want 500", got)
	}
	if got := IdealStiffness([]float64{2, 3}, []float64{600, -1e9}); math.Abs(got-300) > 1e-9 {
		t.Errorf("tension in one span: %g, want 300", got)
	}
	for _, bad := range []float64{math.NaN(), math.Inf(1), 0, -1} {
		if got := IdealStiffness([]float64{2, bad}, []float64{1, 1}); !math.IsNaN(got) {
			t.Errorf("a span of %g: %g", bad, got)
		}
	}
}

// TestIdealStiffnessIsEnough: at Winter's stiffness for the load of one span, the
// exact critical load of the continuous column is that of the span pinned at both
// ends, and not below it just under the stiffness (Timoshenko and Gere 2.6, from
// memory: 16 pi² E I/L³ for one hold at mid-height).
func TestIdealStiffnessIsEnough(t *testing.T) {
	for m := 2; m <= 8; m++ {
		spans, forces := make([]float64, m), make([]float64, m)
		for i := range spans {
			spans[i], forces[i] = 1, pi*pi
		}
		ideal := IdealStiffness(spans, forces)
		if m == 2 && math.Abs(ideal-16*pi*pi/8) > 1e-9 {
			t.Errorf("one hold: %.12g, want 16 pi²/L³", ideal)
		}
		for _, x := range []float64{0.999, 1.0001} {
			b := uniform(Pinned, Pinned, float64(m), m)
			b.Lateral = make([]float64, m+1)
			for i := 1; i < m; i++ {
				b.Lateral[i] = x * ideal
			}
			n := b.Critical() / (pi * pi)
			if x > 1 && math.Abs(n-1) > 1e-9 || x < 1 && !(n < 1-1e-5) {
				t.Errorf("%d spans, %g of the ideal stiffness: %.9g of the span's load", m, x, n)
			}
		}
	}
}
