package section

import (
	"math"
	"math/rand/v2"
	"testing"
)

// values lists the properties with the power of the length that each has.
func values(p Properties) []struct {
	name  string
	value float64
	power int
} {
	return []struct {
		name  string
		value float64
		power int
	}{
		{"Area", p.Area, 2}, {"IMajor", p.IMajor, 4}, {"IMinor", p.IMinor, 4}, {"RMajor", p.RMajor, 1}, {"RMinor", p.RMinor, 1},
		{"WelMajor", p.WelMajor, 3}, {"WelMinor", p.WelMinor, 3}, {"WplMajor", p.WplMajor, 3}, {"WplMinor", p.WplMinor, 3},
		{"It", p.It, 4}, {"Iw", p.Iw, 6}, {"AvMajor", p.AvMajor, 2}, {"AvMinor", p.AvMinor, 2},
		{"IX", p.IX, 4}, {"IY", p.IY, 4}, {"CX", p.CX, 1}, {"CY", p.CY, 1}, {"SX", p.SX, 1}, {"SY", p.SY, 1},
		{"SMajor", p.SMajor, 1}, {"SMinor", p.SMinor, 1}, {"Perimeter", p.Perimeter, 1},
	}
}

func scaled(s Shape, k float64) Shape {
	for _, f := range []*float64{&s.Depth, &s.Width, &s.Web, &s.Flange, &s.Wall, &s.Gap, &s.Diameter, &s.Root, &s.Toe, &s.OuterRadius, &s.InnerRadius, &s.TaperAt} {
		*f *= k
	}
	return s
}

func TestScaling(t *testing.T) {
	r := rand.New(rand.NewPCG(2, 20))
	for range 200 {
		s := randomShape(r)
		k := math.Exp(4*r.Float64() - 2)
		small, big := values(compute(t, s)), values(compute(t, scaled(s, k)))
		for i, v := range small {
			want := v.value * math.Pow(k, float64(v.power))
			if math.Abs(big[i].value-want) > 1e-10*math.Abs(want)+1e-13*math.Pow(k, float64(v.power)) {
				t.Errorf("%s %s scaled by %g: %g, want %g\n%+v", s.Kind, v.name, k, big[i].value, want, s)
			}
		}
	}
}

// A bar, a tube and an angle that lie down keep what belongs to the principal
// axes.
func TestQuarterTurn(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 20))
	for seen := 0; seen < 200; {
		s := randomShape(r)
		if s.Kind != Bar && s.Kind != Tube && s.Kind != Ellipse && s.Kind != Angle || s.Depth == s.Width {
			continue
		}
		seen++
		lying := s
		lying.Depth, lying.Width = s.Width, s.Depth
		p, q := compute(t, s), compute(t, lying)
		if p.Turned == q.Turned {
			t.Errorf("%s: turned before and after\n%+v", s.Kind, s)
		}
		for i, v := range values(p) {
			switch v.name {
			case "IX", "IY", "CX", "CY", "SX", "SY", "SMajor", "SMinor":
				continue // belong to the paper, or have a side
			}
			if got := values(q)[i].value; math.Abs(got-v.value) > 1e-10*v.value {
				t.Errorf("%s %s: %g lying, %g upright\n%+v", s.Kind, v.name, got, v.value, s)
			}
		}
		near(t, s, "IX", q.IX, p.IY, p.IY, 1e-10)
		near(t, s, "CX", q.CX, p.CY, p.CY, 1e-10)
		near(t, s, "SMajor", math.Abs(q.SMajor), math.Abs(p.SMajor), p.CX+p.CY, 1e-10)
		near(t, s, "SMinor", math.Abs(q.SMinor), math.Abs(p.SMinor), p.CX+p.CY, 1e-10)
	}
}

func TestBounds(t *testing.T) {
	r := rand.New(rand.NewPCG(4, 20))
	for range 1000 {
		s := randomShape(r)
		p := compute(t, s)
		polar := p.IX + p.IY
		size := math.Max(s.Depth+s.Width, 2*s.Diameter)
		if p.IMajor < p.IMinor {
			t.Errorf("IMajor %g below IMinor %g\n%+v", p.IMajor, p.IMinor, s)
		}
		near(t, s, "trace of the second moments", p.IMajor+p.IMinor, polar, polar, 1e-12)
		near(t, s, "their determinant", p.IMajor*p.IMinor, p.IX*p.IY-p.IXY*p.IXY, p.IX*p.IY, 1e-11)
		sin, cos := math.Sincos(p.Angle)
		about := p.IX*cos*cos + p.IY*sin*sin - 2*p.IXY*sin*cos
		near(t, s, "second moment about the axis at Angle", about, p.IMajor, p.IMajor, 1e-10)
		if p.Angle <= -math.Pi/2 || p.Angle > math.Pi/2 {
			t.Errorf("angle %g\n%+v", p.Angle, s)
		}
		near(t, s, "distance of the shear centre", math.Hypot(p.SMajor, p.SMinor), math.Hypot(p.SX, p.SY), size, 1e-12)
		// A section is no stiffer in torsion than its polar second moment, a solid
		// one no stiffer than the circle of its area (St Venant, Polya).
		if p.It > polar*(1+1e-12) {
			t.Errorf("It %g above the polar second moment %g\n%+v", p.It, polar, s)
		}
		if s.Kind != Tube && s.Kind != Pipe && s.Kind != Ellipse && p.It > p.Area*p.Area/(2*math.Pi)*(1+1e-12) {
			t.Errorf("It %g above the circle's\n%+v", p.It, s)
		}
		for _, w := range [][2]float64{{p.WplMajor, p.WelMajor}, {p.WplMinor, p.WelMinor}} {
			if w[0] < w[1] {
				t.Errorf("plastic modulus %g below the elastic %g\n%+v", w[0], w[1], s)
			}
		}
		if p.AvMajor > p.Area*(1+1e-12) || p.AvMinor > p.Area*(1+1e-12) {
			t.Errorf("shear areas %g, %g of %g\n%+v", p.AvMajor, p.AvMinor, p.Area, s)
		}
	}
}

// The parallel axis theorem and additivity hold the integrator against itself:
// moments about any point follow from those about the centroid.
func TestParallelAxes(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 20))
	for range 200 {
		s := randomShape(r)
		if s.Kind == Ellipse {
			continue // its outline is drawn and not integrated, see ellipse_test.go
		}
		var segments []Segment
		for _, l := range s.Outline() {
			segments = append(segments, l...)
		}
		p := compute(t, s)
		x, y := 3*r.Float64()-1, 3*r.Float64()-1
		m := integrate(segments, Point{p.CX - x, p.CY - y})
		scale := p.Area * (x*x + y*y + p.CX*p.CX + p.CY*p.CY)
		near(t, s, "Ix", m.yy, p.IX+p.Area*y*y, scale, 1e-11)
		near(t, s, "Iy", m.xx, p.IY+p.Area*x*x, scale, 1e-11)
		near(t, s, "Ixy", m.xy, p.IXY+p.Area*x*y, scale, 1e-11)
	}
}

func TestOutlineIsClosed(t *testing.T) {
	r := rand.New(rand.NewPCG(6, 20))
	for range 500 {
		s := randomShape(r)
		size := math.Max(s.Depth+s.Width, s.Diameter)
		for i, loop := range s.Outline() {
			for k, g := range loop {
				next := loop[(k+1)%len(loop)]
				if g.To != next.From {
					t.Errorf("a joint is open: %v, %v\n%+v", g.To, next.From, s)
				}
				a, z := g.At(0), g.At(1)
				if math.Hypot(a.X-g.From.X, a.Y-g.From.Y)+math.Hypot(z.X-g.To.X, z.Y-g.To.Y) > 1e-11*size {
					t.Errorf("a segment misses its ends: %+v\n%+v", g, s)
				}
			}
			if area := integrate(loop, Point{}).a; (area > 0) != (i == 0 || s.Kind == DoubleAngle) {
				t.Errorf("loop %d turns the wrong way\n%+v", i, s)
			}
		}
	}
	if (Shape{Kind: Bar, Depth: -1, Width: 1}).Outline() != nil || (Shape{Kind: Given}).Outline() != nil {
		t.Error("a shape that cannot be has an outline")
	}
}

var benchmarked Properties

func BenchmarkCompute(b *testing.B) {
	for _, c := range solidShapes() {
		b.Run(c.name, func(b *testing.B) {
			for b.Loop() {
				benchmarked, _ = Compute(c.s)
			}
		})
	}
}
