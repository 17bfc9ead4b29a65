package action

import (
	"math"
	"math/rand"
	"testing"
)

// FuzzCritical: a bar has a critical force that is zero, finite or infinite, and
// holding one more node never lowers it. The random bar is spoilt with the two
// numbers as they come.
func FuzzCritical(f *testing.F) {
	f.Add(int64(1), uint8(0), 1.0, 1.0)
	f.Add(int64(2), uint8(1), 0.0, -1.0)
	f.Add(int64(3), uint8(2), math.Inf(1), math.NaN())
	f.Add(int64(4), uint8(3), 1e-9, 1e300)
	f.Add(int64(5), uint8(4), 1e-300, -1e300)
	for start := int64(6); start < 200; start++ {
		f.Add(start, uint8(start), math.Exp(float64(start%40)-20), 1.0)
	}
	f.Fuzz(func(t *testing.T, start int64, what uint8, x, y float64) {
		r := rand.New(rand.NewSource(start))
		b := randomBar(r)
		part := r.Intn(len(b.Force))
		switch what % 6 {
		case 0:
			b.Force[part] = x
		case 1:
			b.Stiffness[part] = x
		case 2:
			b.Lateral[part], b.Turning[part] = x, y
		case 3:
			b.Nodes[part] = x
		case 4:
			b.Force[part], b.Stiffness[part] = x, y
		}
		before := b.Critical()
		if math.IsNaN(before) || before < 0 {
			t.Fatalf("%g: %+v", before, b)
		}
		for i := 1; i < len(b.Held)-1; i++ {
			if b.Held[i] {
				continue
			}
			b.Held[i] = true
			after := b.Critical()
			// The rounding of a stiffness matrix: the shortest part's share in
			// the whole, to the third power; springs and stiffnesses add theirs.
			if tolerance := rounding(b); before > 0 && tolerance < 1e-3 && !(after >= before*(1-tolerance)) {
				t.Fatalf("%.12g, with a hold at node %d %.12g: %+v", before, i, after, b)
			}
			before = after
		}
	})
}

// rounding estimates the relative error of a bar's critical force.
func rounding(b *Bar) float64 {
	stiff, soft := 0.0, math.Inf(1)
	height := b.Nodes[len(b.Nodes)-1] - b.Nodes[0]
	for i, ei := range b.Stiffness {
		l := b.Nodes[i+1] - b.Nodes[i]
		stiff = max(stiff, ei/(l*l*l), math.Abs(b.Force[i])/l, b.Lateral[i], b.Turning[i]/(l*l))
		soft = min(soft, ei/(height*height*height))
		if n := math.Abs(b.Force[i]); n > 0 {
			soft = min(soft, n/height)
		}
	}
	last := len(b.Nodes) - 1
	l := height / float64(last)
	stiff = max(stiff, b.Lateral[last], b.Turning[last]/(l*l))
	return 1e-9 + 1e-14*stiff/soft
}

// FuzzBeam: a beam under any loads has finite pieces or an error.
func FuzzBeam(f *testing.F) {
	f.Add(int64(1), 10.0, 3.0, 7.0, 1000.0, 10.0)
	f.Add(int64(2), 0.0, 0.0, 0.0, 0.0, 0.0)
	f.Add(int64(3), math.NaN(), 1.0, 2.0, math.Inf(1), 1.0)
	f.Add(int64(4), 1e-300, 1e-301, 1e-302, 1.0, 1.0)
	f.Add(int64(5), 1e300, 1e299, 1e200, 1e300, -1e300)
	f.Add(int64(6), 10.0, 5.0, 5.000000001, 1.0, 1.0)
	f.Add(int64(7), 10.0, -5.0, 50.0, 1.0, 1.0)
	for start := int64(8); start < 200; start++ {
		f.Add(start, 10.0, 3.0, 3+math.Exp(-float64(start%30)), 1e4, -1e3)
	}
	f.Fuzz(func(t *testing.T, start int64, height, x, y, load, line float64) {
		r := rand.New(rand.NewSource(start))
		b := Beam{Base: End(r.Intn(4)), Top: End(r.Intn(4)), Height: height}
		for _, z := range []float64{x, y, height * r.Float64()} {
			if r.Intn(2) == 0 {
				b.Holds = append(b.Holds, z)
			}
		}
		loadings := [][]Push{
			{{Force: load, From: x}, {Moment: line, From: y}},
			{{Line: line, From: x, To: y}},
			{},
		}
		out, err := b.Solve(loadings)
		if err != nil {
			return
		}
		if len(out) != len(loadings) {
			t.Fatalf("%d loadings, want %d", len(out), len(loadings))
		}
		for j, pieces := range out {
			for i, p := range pieces {
				m, z := p.Largest()
				if !finite(p.From, p.To, p.M, p.V, p.Line, p.D, p.R, m, z) {
					t.Fatalf("loading %d, piece %d: %+v of %+v", j, i, p, b)
				}
				if p.To <= p.From || i > 0 && p.From != pieces[i-1].To {
					t.Fatalf("loading %d, piece %d: from %g to %g", j, i, p.From, p.To)
				}
			}
		}
	})
}
