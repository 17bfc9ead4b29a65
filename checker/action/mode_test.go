package action

import (
	"math"
	"math/rand"
	"testing"
)

// evenBar is a bar of one part or cut at its holds, E I = 1 under a force of 1.
func evenBar(base, top End, holds []float64, height float64) *Bar {
	b := &Bar{Base: base, Top: top, Nodes: append(append([]float64{0}, holds...), height)}
	for i := range len(b.Nodes) - 1 {
		b.Held = append(b.Held, i > 0)
		b.Force, b.Stiffness = append(b.Force, 1), append(b.Stiffness, 1)
	}
	b.Held = append(b.Held, false)
	return b
}

// TestModeClosed compares shapes with the closed ones of Euler's cases, which
// any textbook on stability derives (Timoshenko and Gere, Theory of Elastic
// Stability, chapter 2, from memory).
func TestModeClosed(t *testing.T) {
	const u = 4.493409457909064 // tan u = u
	fixedPinned := func(x float64) float64 {
		return (math.Sin(u*x)/u - math.Cos(u*x) + 1 - x)
	}
	for _, c := range []struct {
		name      string
		base, top End
		shape     func(x float64) float64 // not scaled
	}{
		{"pinned pinned", Pinned, Pinned, func(x float64) float64 { return math.Sin(pi * x) }},
		{"fixed free", Fixed, Free, func(x float64) float64 { return 1 - math.Cos(pi/2*x) }},
		{"fixed fixed", Fixed, Fixed, func(x float64) float64 { return 1 - math.Cos(2*pi*x) }},
		{"fixed guided", Fixed, Guided, func(x float64) float64 { return 1 - math.Cos(pi*x) }},
		{"guided pinned", Guided, Pinned, func(x float64) float64 { return math.Cos(pi / 2 * x) }},
		{"fixed pinned", Fixed, Pinned, fixedPinned},
	} {
		const height = 3.7
		m, ok := evenBar(c.base, c.top, nil, height).Buckled()
		if !ok {
			t.Errorf("%s: no shape", c.name)
			continue
		}
		most := 0.0
		for i := range 2001 {
			if v := c.shape(float64(i) / 2000); math.Abs(v) > math.Abs(most) {
				most = v
			}
		}
		for i := range 21 {
			x := float64(i) / 20
			if got, want := m.Deflection(x*height), c.shape(x)/most; math.Abs(got-want) > 1e-4 {
				t.Errorf("%s: %g at %g of the height, want %g", c.name, got, x, want)
			}
		}
	}
}

// TestModeEquation: the shape of random bars satisfies the differential equation
// of the beam-column, its holds and its springs, whose forces balance: at every
// height the moment E I v” and the axial forces are in equilibrium with the
// forces of the supports below. What is tested is computed from the deflection
// alone.
func TestModeEquation(t *testing.T) {
	r := rand.New(rand.NewSource(11))
	tried := 0
	for tried < 200 {
		b := &Bar{Base: End(r.Intn(4)), Top: End(r.Intn(4)), Nodes: []float64{0}}
		for range 1 + r.Intn(4) {
			b.Nodes = append(b.Nodes, b.Nodes[len(b.Nodes)-1]+0.5+r.Float64())
			b.Force = append(b.Force, r.Float64()*2-0.4)
			b.Stiffness = append(b.Stiffness, 0.5+r.Float64())
		}
		b.Held = make([]bool, len(b.Nodes))
		b.Lateral, b.Turning = make([]float64, len(b.Nodes)), make([]float64, len(b.Nodes))
		for i := range b.Nodes {
			b.Held[i] = i > 0 && i < len(b.Nodes)-1 && r.Intn(3) == 0
			if r.Intn(3) == 0 {
				b.Lateral[i], b.Turning[i] = r.Float64(), r.Float64()
			}
		}
		m, ok := b.Buckled()
		if !ok || m.part >= 0 {
			continue
		}
		tried++
		for i, n := range b.Force {
			l := b.Nodes[i+1] - b.Nodes[i]
			h := l / 40
			// v'''' + k² v'' = 0 by differences of the second derivative
			second := func(z float64) float64 {
				return (m.Deflection(z-h) - 2*m.Deflection(z) + m.Deflection(z+h)) / (h * h)
			}
			z := b.Nodes[i] + l/2
			fourth := (second(z-h*3) - 2*second(z) + second(z+h*3)) / (9 * h * h)
			k := m.Factor * n / b.Stiffness[i]
			if rest := fourth + k*second(z); math.Abs(rest) > 0.06*(math.Abs(fourth)+math.Abs(k*second(z)))+0.01 {
				t.Errorf("bar %d part %d: v'''' %g against k2 v'' %g", tried, i, fourth, k*second(z))
			}
			if b.holds(i) && math.Abs(m.Deflection(b.Nodes[i])) > 1e-9 {
				t.Errorf("bar %d: a hold moves by %g", tried, m.Deflection(b.Nodes[i]))
			}
			if i > 0 { // neither a step nor a kink at a node
				z, e := b.Nodes[i], 1e-5
				if kink := (m.Deflection(z+e) - 2*m.Deflection(z) + m.Deflection(z-e)) / e; math.Abs(kink) > 1e-3 {
					t.Errorf("bar %d: a kink of %g at node %d", tried, kink, i)
				}
			}
		}
		// energy: what bending and springs take up is what the forces give
		// (Rayleigh's quotient at the shape itself)
		bend, give := 0.0, 0.0
		for i := range b.Force {
			l := b.Nodes[i+1] - b.Nodes[i]
			const cuts = 400
			h := l / cuts
			for j := range cuts {
				z := b.Nodes[i] + (float64(j)+0.5)*h
				slope := (m.Deflection(z+h/2) - m.Deflection(z-h/2)) / h
				give += b.Force[i] * slope * slope * h
				if j > 0 && j < cuts-1 {
					curve := (m.Deflection(z-h) - 2*m.Deflection(z) + m.Deflection(z+h)) / (h * h)
					bend += b.Stiffness[i] * curve * curve * h
				} else { // without looking into the neighbour
					s := h
					if j > 0 {
						s = -h
					}
					curve := (m.Deflection(z) - 2*m.Deflection(z+s) + m.Deflection(z+2*s)) / (h * h)
					bend += b.Stiffness[i] * curve * curve * h
				}
			}
		}
		for i, z := range b.Nodes {
			e := 1e-5
			if i == len(b.Nodes)-1 {
				e = -e
			}
			slope := (m.Deflection(z+e) - m.Deflection(z)) / e
			bend += b.Lateral[i]*m.Deflection(z)*m.Deflection(z) + b.Turning[i]*slope*slope
		}
		if got := bend / give; math.Abs(got/m.Factor-1) > 5e-3 {
			t.Errorf("bar %d: the shape buckles at %g, the bar at %g: %+v", tried, got, m.Factor, b)
		}
	}
}

// TestModeNone: what does not buckle has no shape.
func TestModeNone(t *testing.T) {
	if _, ok := evenBar(Pinned, Free, nil, 3).Buckled(); ok {
		t.Error("a mechanism has a shape")
	}
	b := evenBar(Pinned, Pinned, nil, 3)
	b.Force[0] = -1
	if _, ok := b.Buckled(); ok {
		t.Error("a tie has a shape")
	}
}
