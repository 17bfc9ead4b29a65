package section

import (
	"math"
	"math/rand/v2"
	"testing"
)

// ellipseRows holds hot finished elliptical hollow sections (EN 10210-2), mm
// and cm, read in a public copy of the table.
const ellipseRows = `
name h b t A Iy Iz iy iz Wel.y Wel.z Wpl.y Wpl.z It
300x150x8 300 150 8 54.5 4810 1620 9.39 5.44 321 215 449 275 4850
300x150x10 300 150 10 67.5 5870 1950 9.32 5.37 391 260 551 336 5870
300x150x12.5 300 150 12.5 83.4 7120 2330 9.24 5.29 475 311 674 409 7050
300x150x16 300 150 16 105 8730 2810 9.12 5.17 582 374 837 503 8530
400x200x8 400 200 8 73.4 11700 3970 12.6 7.35 584 397 811 500 11900
500x250x16 500 250 16 180 43700 14500 15.6 8.98 1750 1160 2460 1500 43700
`

func TestPublishedEllipses(t *testing.T) {
	for _, r := range rows(t, ellipseRows, 6) {
		s := Shape{Kind: Ellipse, Made: Hot, Depth: r.mm(t, "h"), Width: r.mm(t, "b"), Wall: r.mm(t, "t")}
		p := compute(t, s)
		r.bendingAgrees(t, p)
		r.agrees(t, "It", p.It/cm4, 0.5)
		if p.Turned || p.Iw != 0 || p.SX != 0 || p.SY != 0 {
			t.Errorf("%s: %+v", r["name"], p)
		}
		s.Depth, s.Width = s.Width, s.Depth
		lying := compute(t, s)
		r.bendingAgrees(t, lying)
		if !lying.Turned || lying.Angle != math.Pi/2 || lying.AvMajor != p.AvMajor {
			t.Errorf("%s lying: %+v", r["name"], lying)
		}
	}
}

// An ellipse with equal axes is a pipe; its torsion by the standard's formula is
// then bounded by the exact value.
func TestRoundEllipseIsAPipe(t *testing.T) {
	p := compute(t, Shape{Kind: Ellipse, Made: Hot, Depth: 0.2, Width: 0.2, Wall: 0.01})
	q := compute(t, Shape{Kind: Pipe, Made: Hot, Diameter: 0.2, Wall: 0.01})
	for i, v := range values(q) {
		if math.Abs(values(p)[i].value-v.value) > 1e-12*math.Abs(v.value) {
			t.Errorf("%s: %.15g, of the pipe %.15g", v.name, values(p)[i].value, v.value)
		}
	}
}

func TestEllipsePerimeter(t *testing.T) {
	for _, b := range []float64{1, 0.999, 0.7, 0.5, 0.1, 1e-3} {
		// The trapezoidal rule over a period converges faster than any power.
		const n = 200000
		sum := 0.0
		for i := range n {
			sin, cos := math.Sincos((float64(i) + 0.5) * 2 * math.Pi / n)
			sum += math.Hypot(sin, b*cos)
		}
		same(t, "perimeter", ellipsePerimeter(1, b), sum*2*math.Pi/n, 1e-11)
		same(t, "the axes the other way", ellipsePerimeter(b, 1), ellipsePerimeter(1, b), 0)
	}
	same(t, "a needle", ellipsePerimeter(1, 1e-9), 4, 1e-12)
}

// The drawing strays from the ellipse by less than it says, and its area and
// second moments are those of the section.
func TestEllipseOutline(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 20))
	worst := 0.0
	for range 100 {
		s := Shape{Kind: Ellipse, Made: Hot, Depth: 0.1 + r.Float64()}
		s.Width, s.Wall = s.Depth/2, s.Depth*(0.01+0.1*r.Float64())
		if r.IntN(2) == 0 {
			s.Depth, s.Width = s.Width, s.Depth
		}
		p := compute(t, s)
		loops := s.Outline()
		if len(loops) != 2 {
			t.Fatalf("%d loops", len(loops))
		}
		long := math.Max(s.Depth, s.Width) / 2
		for k, loop := range loops {
			a, b := s.Width/2-float64(k)*s.Wall, s.Depth/2-float64(k)*s.Wall
			for _, g := range loop {
				for i := range 20 {
					q := g.At(float64(i) / 20)
					u, v := (q.X-s.Width/2)/a, (q.Y-s.Depth/2)/b
					// Of first order: the value of the implicit equation by its slope.
					stray := math.Abs(u*u+v*v-1) / (2 * math.Hypot(u/a, v/b)) / long
					worst = math.Max(worst, stray)
				}
			}
		}
		var all []Segment
		for _, l := range loops {
			all = append(all, l...)
		}
		m := integrate(all, Point{p.CX, p.CY})
		near(t, s, "area", m.a, p.Area, p.Area, 1e-5)
		near(t, s, "Ix", m.yy, p.IX, p.IX, 1e-5)
		near(t, s, "Iy", m.xx, p.IY, p.IY, 1e-5)
		near(t, s, "first moment", m.x, 0, p.Area*s.Width, 1e-12)
		near(t, s, "length", loops[0].Length(), p.Perimeter, p.Perimeter, 1e-6)
	}
	t.Logf("strays by %.2g of the longer half axis", worst)
	if worst > 1e-5 {
		t.Errorf("strays by %.2g of the longer half axis", worst)
	}
}

// Both published families of torsion constants come out of Compute.
func TestJunctionChoosesTheTorsionConstant(t *testing.T) {
	tables := append(rows(t, columnTable, 20), rows(t, beamTable, 13)...)
	apart := 0
	for _, r := range tables {
		s := r.rolledISection(t)
		european := compute(t, s).It
		s.Junction = ByElDarwishJohnston
		p := compute(t, s)
		r.agrees(t, "Itedj", p.It/cm4, 0.5)
		if math.Abs(european/p.It-1) > 0.01 {
			apart++
		}
		s.Junction = 77 // no formula: the default
		if compute(t, s).It != european {
			t.Errorf("%s: an unknown junction formula changes It", r["name"])
		}
	}
	if apart < 5 {
		t.Errorf("the two formulas differ for %d sections only", apart)
	}
}
