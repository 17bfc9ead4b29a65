package action

import (
	"math"
	"testing"
)

// TestSecondOrder: the beam-column of Timoshenko and Gere, Theory of Elastic
// Stability, chapter 1 (from memory): with u = sqrt(N L²/(E I))/2 the greatest moment
// of a bar on two pins is w L²/8 times 2 (1/cos u - 1)/u² under a line load, P L/4 times
// tan(u)/u under a force at mid-height, and M/cos u under equal end moments; under
// tension with the hyperbolic functions. A fixed base beside a free top under a force
// H there has H L tan(2u)/(2u).
func TestSecondOrder(t *testing.T) {
	const l, ei = 4.2, 2.3e6
	for _, n := range []float64{-8, -0.7, 0, 0.3, 0.8, 0.97} { // of the critical load on pins
		force := n * pi * pi * ei / (l * l)
		x := math.Sqrt(math.Abs(n)) * pi / 2
		line, point, equal, tip := 1.0, 1.0, 1.0, 1.0
		switch {
		case n > 0:
			line, point, equal, tip = 2*(1/math.Cos(x)-1)/(x*x), math.Tan(x)/x, 1/math.Cos(x), math.Tan(2*x)/(2*x)
		case n < 0:
			line, point, equal, tip = 2*(1-1/math.Cosh(x))/(x*x), math.Tanh(x)/x, 1/math.Cosh(x), math.Tanh(2*x)/(2*x)
		}
		bar := func(base, top End) *Bar {
			return &Bar{Base: base, Top: top, Nodes: []float64{0, l / 2, l}, Held: make([]bool, 3), Force: []float64{force, force}, Stiffness: []float64{ei, ei}}
		}
		for i, c := range []struct {
			bar   *Bar
			loads []Push
			at    float64 // height
			want  float64
			only  bool // below a quarter of the critical load on pins
		}{
			{bar(Pinned, Pinned), []Push{{Line: 900, To: l}}, l / 2, 900 * l * l / 8 * line, false},
			{bar(Pinned, Pinned), []Push{{Force: 900, From: l / 2}}, l / 2, 900 * l / 4 * point, false},
			{bar(Pinned, Pinned), []Push{{Moment: 700}, {Moment: -700, From: l}}, l / 2, 700 * equal, false},
			{bar(Fixed, Free), []Push{{Force: 900, From: l}}, 0, 900 * l * tip, true},
		} {
			if c.only && n >= 0.25 {
				if _, ok := c.bar.SecondOrder(c.loads); ok {
					t.Errorf("case %d at %g: solved beyond the critical load", i, n)
				}
				continue
			}
			curves, ok := c.bar.SecondOrder(c.loads)
			if !ok {
				t.Fatalf("case %d at %g: no solution", i, n)
			}
			got := 0.0
			for _, k := range curves {
				if c.at >= k.From && c.at <= k.To {
					got = math.Max(got, math.Abs(k.Moment(c.at-k.From)))
				}
			}
			if !(math.Abs(got/c.want-1) < 1e-9) {
				t.Errorf("case %d at %g of the critical load: %.12g, want %.12g", i, n, got, c.want)
			}
			for _, k := range curves {
				for _, z := range k.Peaks() {
					if m := math.Abs(k.Moment(z - k.From)); m > got*(1+1e-9) && i != 2 {
						t.Errorf("case %d at %g: %.9g at %g m is more than the greatest, %.9g", i, n, m, z, got)
					}
				}
			}
		}
	}
}
