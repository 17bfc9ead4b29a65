package action

import (
	"math"
	"math/rand"
	"testing"
)

// TestSteppedCantilever compares the critical load of a cantilever of two
// stiffnesses with its stability equation tan(k1 l1) tan(k2 l2) = k1/k2, k² = P/EI
// (Timoshenko and Gere, Theory of Elastic Stability, 2.14; derived anew from the
// differential equations of the two parts).
func TestSteppedCantilever(t *testing.T) {
	r := rand.New(rand.NewSource(5))
	for range 200 {
		low, up := 0.5+5*r.Float64(), 0.5+5*r.Float64()
		ei2, ei1 := math.Exp(6*r.Float64()-3), math.Exp(6*r.Float64()-3)
		p := CriticalStepped(Fixed, Free, nil, []Step{{low, ei2}, {low + up, ei1}})
		k1, k2 := math.Sqrt(p/ei1), math.Sqrt(p/ei2)
		// multiplied out, so that no tangent is infinite
		left, right := math.Sin(k1*up)*math.Sin(k2*low)*k2, math.Cos(k1*up)*math.Cos(k2*low)*k1
		if math.Abs(left-right) > 1e-9*(k1+k2) || !(k1*up < math.Pi/2 && k2*low < math.Pi/2) {
			t.Errorf("lower %g m of %g, upper %g m of %g: P = %g leaves %g", low, ei2, up, ei1, p, left-right)
		}
	}
}

// TestSteppedEqual checks that a step between equal stiffnesses changes nothing,
// wherever it lies.
func TestSteppedEqual(t *testing.T) {
	ends := []End{Pinned, Fixed, Free, Guided}
	holds := []float64{2, 5}
	for _, base := range ends {
		for _, top := range ends {
			for _, h := range [][]float64{nil, holds} {
				want := 7 * CriticalUniform(base, top, h, 9)
				for _, z := range []float64{1, 2, 4.3, 8.9} {
					got := CriticalStepped(base, top, h, []Step{{z, 7}, {9, 7}})
					if math.Abs(got-want) > 1e-9*want {
						t.Errorf("%s–%s, holds %v, step at %g: %g, uniform %g", base, top, h, z, got, want)
					}
				}
			}
		}
	}
}

// TestSteppedTip compares a cantilever of two stiffnesses under a force at its
// tip with the work of its moments: v = F/3 ((L³ - l³)/EI_low + l³/EI_up).
func TestSteppedTip(t *testing.T) {
	const force, height, low = 3e3, 7.0, 4.0
	b := Beam{Base: Fixed, Top: Free, Height: height, Steps: []Step{{low, 8e6}, {height, 2e6}}}
	pieces, err := b.Solve([][]Push{{{Force: force, From: height}}})
	if err != nil {
		t.Fatal(err)
	}
	l := height - low
	want := force / 3 * ((height*height*height-l*l*l)/8e6 + l*l*l/2e6)
	last := pieces[0][len(pieces[0])-1]
	if got := last.Deflection(last.To-last.From) / 2e6; math.Abs(got/want-1) > 1e-9 {
		t.Errorf("the tip moves %g m, want %g m", got, want)
	}
}

// TestSteppedForceMethod compares random propped columns of several stiffnesses
// under moments and line loads with the force method: the moment at the base is
// what makes the slope there zero, by numerical integration of the work.
func TestSteppedForceMethod(t *testing.T) {
	r := rand.New(rand.NewSource(8))
	for n := range 40 {
		h := 3 + 6*r.Float64()
		steps := []Step{{h * 0.3, math.Exp(2 * r.Float64())}, {h * (0.4 + 0.4*r.Float64()), math.Exp(2 * r.Float64())}, {h, math.Exp(2 * r.Float64())}}
		m, z, q := 10*r.NormFloat64(), h*r.Float64(), r.NormFloat64()
		b := Beam{Base: Fixed, Top: Pinned, Height: h, Steps: steps}
		pieces, err := b.Solve([][]Push{{{Moment: m, From: z}, {Line: q, To: h}}})
		if err != nil {
			t.Fatal(err)
		}
		ei := func(x float64) float64 {
			for _, s := range steps {
				if x < s.To {
					return s.Stiffness
				}
			}
			return steps[2].Stiffness
		}
		// simply supported moments in the beam's sign: M'' = q, a jump of -m at z
		simple := func(x float64) float64 {
			v := q*x*x/2 - q*h*x/2 + m/h*x
			if x > z {
				v -= m
			}
			return v
		}
		var up, down float64
		const parts = 200000
		for i := range parts {
			x := (float64(i) + 0.5) / parts * h
			s := 1 - x/h
			up += simple(x) * s / ei(x)
			down += s * s / ei(x)
		}
		want := -up / down
		if got := pieces[0][0].M; math.Abs(got-want) > 1e-4*(math.Abs(want)+math.Abs(m)) {
			t.Errorf("column %d: the moment at the base is %g, want %g", n, got, want)
		}
	}
}
