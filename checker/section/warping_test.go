package section

import (
	"math"
	"testing"
)

// solid is the St Venant torsion of a section solved on square cells by finite
// volumes: the warping function w that makes the shear flow balance in every
// cell, with no flow through the outline. It gives the torsion constant, the
// shear centre (Trefftz) and the warping constant without any assumption of
// thin walls, and so tests the formulas of the package.
type solid struct{ area, it, sx, sy, iw float64 }

func solveSolid(s Shape, h float64) solid {
	width, depth := s.Width, s.Depth
	if s.Diameter > 0 {
		width, depth = s.Diameter, s.Diameter
	}
	nx, ny := int(math.Round(width/h)), int(math.Round(depth/h))
	index := make([]int, nx*ny)
	var xs, ys []float64
	for i := range nx {
		x := (float64(i) + 0.5) * h
		cuts := chords(s, x)
		for j := range ny {
			y := (float64(j) + 0.5) * h
			index[i*ny+j] = -1
			for _, c := range cuts {
				if y > c.low && y < c.high {
					index[i*ny+j] = len(xs)
					xs, ys = append(xs, x), append(ys, y)
					break
				}
			}
		}
	}
	n := len(xs)
	mx, my := mean(xs), mean(ys)
	for k := range n {
		xs[k] -= mx
		ys[k] -= my
	}
	// Faces between cells: the flow from a to b is (w_b - w_a)/h + c, times h.
	type face struct {
		a, b int
		c    float64
	}
	var faces []face
	for i := range nx {
		for j := range ny {
			a := index[i*ny+j]
			if a < 0 {
				continue
			}
			if i+1 < nx && index[(i+1)*ny+j] >= 0 {
				faces = append(faces, face{a, index[(i+1)*ny+j], -ys[a]})
			}
			if j+1 < ny && index[i*ny+j+1] >= 0 {
				faces = append(faces, face{a, index[i*ny+j+1], xs[a]})
			}
		}
	}
	right := make([]float64, n)
	for _, f := range faces {
		right[f.a] += f.c * h
		right[f.b] -= f.c * h
	}
	times := func(v, out []float64) {
		clear(out)
		for _, f := range faces {
			d := v[f.a] - v[f.b]
			out[f.a] += d
			out[f.b] -= d
		}
	}
	w := conjugate(times, right, 1e-9)

	var m solid
	m.area = float64(n) * h * h
	// The torsion constant by the energy of the flows, a face standing for the
	// two halves of its cells.
	for _, f := range faces {
		g := (w[f.b]-w[f.a])/h + f.c
		m.it += g * f.c * h * h
	}
	w0 := mean(w)
	var ixx, iyy, ixy, iwx, iwy, iww float64
	for k := range n {
		om := w[k] - w0
		x, y := xs[k], ys[k]
		ixx += y * y
		iyy += x * x
		ixy += x * y
		iwx += om * x
		iwy += om * y
		iww += om * om
	}
	// Moving the pole from the centroid to (sx, sy) adds sx y - sy x to the
	// warping: at the shear centre nothing along x and y is left.
	det := ixx*iyy - ixy*ixy
	ax := (iwx*ixx - iwy*ixy) / det // w contains ax x + ay y
	ay := (iwy*iyy - iwx*ixy) / det
	m.sx, m.sy = -ay, ax
	m.iw = (iww - ax*iwx - ay*iwy) * h * h
	return m
}

func mean(v []float64) float64 {
	sum := 0.0
	for _, x := range v {
		sum += x
	}
	return sum / float64(len(v))
}

// conjugate solves the symmetric system by conjugate gradients.
func conjugate(times func(v, out []float64), right []float64, tolerance float64) []float64 {
	n := len(right)
	x, r, p, q := make([]float64, n), make([]float64, n), make([]float64, n), make([]float64, n)
	copy(r, right)
	copy(p, r)
	dot := func(a, b []float64) float64 {
		sum := 0.0
		for i := range a {
			sum += a[i] * b[i]
		}
		return sum
	}
	rr := dot(r, r)
	stop := rr * tolerance * tolerance
	for range 20 * n {
		if rr <= stop {
			break
		}
		times(p, q)
		alpha := rr / dot(p, q)
		for i := range x {
			x[i] += alpha * p[i]
			r[i] -= alpha * q[i]
		}
		next := dot(r, r)
		beta := next / rr
		rr = next
		for i := range p {
			p[i] = r[i] + beta*p[i]
		}
	}
	return x
}

// solidShapes are shapes whose faces lie on the cells, with the cell's size.
func solidShapes() []struct {
	name string
	s    Shape
	cell float64
} {
	const mm = 1e-3
	return []struct {
		name string
		s    Shape
		cell float64
	}{
		{"bar", Shape{Kind: Bar, Depth: 40 * mm, Width: 40 * mm}, 1 * mm},
		{"flat", Shape{Kind: Bar, Depth: 20 * mm, Width: 100 * mm}, 1 * mm},
		{"tube", tube(Hot, 100*mm, 60*mm, 8*mm), 0.5 * mm},
		{"EHS 150x75x6", Shape{Kind: Ellipse, Made: Hot, Depth: 150 * mm, Width: 75 * mm, Wall: 6 * mm}, 0.5 * mm},
		{"sharp tube", Shape{Kind: Tube, Made: Welded, Depth: 80 * mm, Width: 80 * mm, Wall: 10 * mm}, 1 * mm},
		{"UPE 200", Shape{Kind: Channel, Made: Rolled, Depth: 200 * mm, Width: 80 * mm, Web: 6 * mm, Flange: 11 * mm, Root: 13 * mm}, 0.5 * mm},
		{"UPN 200", taperChannel(200*mm, 75*mm, 8.5*mm, 11.5*mm, 11.5*mm, 6*mm), 0.5 * mm},
		{"stout channel", Shape{Kind: Channel, Made: Rolled, Depth: 160 * mm, Width: 160 * mm, Web: 18 * mm, Flange: 12 * mm, Root: 12 * mm}, 1 * mm},
		{"C10X15.3", americanTaper(Channel, 10, 2.6, 0.24, 0.436, 0.24), 0.024 * 25.4 * mm},
		{"S10X25.4, nearly", americanTaper(ISection, 10.008, 4.656, 0.312, 0.491, 0.311), 0.024 * 25.4 * mm},
		{"HE 300 B, nearly", Shape{Kind: ISection, Made: Rolled, Depth: 300 * mm, Width: 300 * mm, Web: 12 * mm, Flange: 19 * mm, Root: 27 * mm}, 1 * mm},
		{"IPE, nearly", Shape{Kind: ISection, Made: Rolled, Depth: 300 * mm, Width: 150 * mm, Web: 7 * mm, Flange: 10.5 * mm, Root: 15 * mm}, 0.5 * mm},
		{"stout web, large root", Shape{Kind: ISection, Made: Rolled, Depth: 160 * mm, Width: 160 * mm, Web: 12 * mm, Flange: 12 * mm, Root: 30 * mm}, 1 * mm},
		{"stouter web", Shape{Kind: ISection, Made: Rolled, Depth: 160 * mm, Width: 160 * mm, Web: 18 * mm, Flange: 12 * mm, Root: 12 * mm}, 1 * mm},
		{"thin web, large root", Shape{Kind: ISection, Made: Rolled, Depth: 160 * mm, Width: 160 * mm, Web: 4 * mm, Flange: 12 * mm, Root: 30 * mm}, 1 * mm},
		{"tee", Shape{Kind: Tee, Made: Rolled, Depth: 150 * mm, Width: 300 * mm, Web: 12 * mm, Flange: 19 * mm, Root: 27 * mm}, 1 * mm},
		{"L100x100x10", Shape{Kind: Angle, Made: Rolled, Depth: 100 * mm, Width: 100 * mm, Wall: 10 * mm, Root: 12 * mm, Toe: 6 * mm}, 0.5 * mm},
		{"L120x80x10", Shape{Kind: Angle, Made: Rolled, Depth: 120 * mm, Width: 80 * mm, Wall: 10 * mm, Root: 11 * mm}, 0.5 * mm},
		{"welded I", Shape{Kind: ISection, Made: Welded, Depth: 200 * mm, Width: 120 * mm, Web: 6 * mm, Flange: 10 * mm}, 0.5 * mm},
		{"welded channel", Shape{Kind: Channel, Made: Welded, Depth: 120 * mm, Width: 60 * mm, Web: 6 * mm, Flange: 8 * mm}, 0.5 * mm},
		{"welded tee", Shape{Kind: Tee, Made: Welded, Depth: 100 * mm, Width: 80 * mm, Web: 6 * mm, Flange: 8 * mm}, 0.5 * mm},
		{"welded angle", Shape{Kind: Angle, Made: Welded, Depth: 100 * mm, Width: 80 * mm, Wall: 8 * mm}, 0.5 * mm},
	}
}

// americanTaper is an American standard channel or beam, inches: flanges with
// the slope 1 : 6, root and toe radii of 0.10 + t and 0.6 t, t the web of the
// lightest of its depth.
func americanTaper(k Kind, d, b, tw, tf, t float64) Shape {
	const in = 25.4e-3
	s := Shape{Kind: k, Made: Rolled, Depth: d * in, Width: b * in, Web: tw * in, Flange: tf * in,
		Root: (0.1 + t) * in, Toe: 0.6 * t * in, Taper: 1.0 / 6, TaperAt: (b + tw) / 2 * in}
	if k == ISection {
		s.TaperAt /= 2
	}
	return s
}

// The cells take about 1 % from the torsion constant (a wall has some twelve of
// them), more where an outline is round.
func TestTorsionAndWarpingBySolids(t *testing.T) {
	for _, c := range solidShapes() {
		p := compute(t, c.s)
		m := solveSolid(c.s, c.cell)
		size := math.Max(c.s.Depth, c.s.Width)
		edj, _ := c.s.TorsionElDarwishJohnston()
		t.Logf("%s: A %+.2f %%, It %+.1f %%, El Darwish %+.1f %%, plates %+.1f %%, thin %+.1f %%, shear centre off by %.1f %% of the size",
			c.name, 100*(p.Area/m.area-1), 100*(p.It/m.it-1), 100*(edj/m.it-1), 100*(c.s.TorsionPlates()/m.it-1),
			100*(c.s.TorsionThinWalled()/m.it-1), 100*math.Hypot(p.SX-m.sx, p.SY-m.sy)/size)
		if math.Abs(p.Area/m.area-1) > 0.005 {
			t.Errorf("%s: area %g, by cells %g", c.name, p.Area, m.area)
		}
		low, high := -0.005, 0.05
		switch {
		case c.s.Made == Welded && c.s.Kind != Tube: // a lower bound
			low, high = -0.08, 0.01
		case c.s.Kind == Tube: // the closed formula leaves the corners' gain out
			low = -0.06
		case c.s.Kind == Ellipse:
			// The standard's formula counts a wall of even thickness, the solid has
			// the standard's inside, thinner between the axes: 3 % on ever smaller
			// cells (5.6 % at 0.25 mm, 4.4 % at 0.125 mm).
			high = 0.09
		case c.s.Root > 2*c.s.Flange && c.s.Kind == ISection: // the root's excess is left out
			low = -0.3
		case c.s.Kind == Channel && c.s.Taper > 0:
			low = -0.01
		case c.s.Kind == ISection: // as the producers publish
			high = 0.1
		}
		if q := p.It/m.it - 1; q < low || q > high {
			t.Errorf("%s: It is %+.1f %% off the solid", c.name, 100*q)
		}
		if d := math.Hypot(p.SX-m.sx, p.SY-m.sy); d > 0.025*size {
			t.Errorf("%s: shear centre (%g, %g), by the solid (%g, %g)", c.name, p.SX, p.SY, m.sx, m.sy)
		}
		if c.s.Kind == ISection || c.s.Kind == Channel {
			most := 0.05
			if c.s.Kind == ISection && (c.s.Root > 1.5*c.s.Flange || c.s.Web > c.s.Flange) {
				most = 0.12 // Iz counts the web and the roots, which hardly warp
			}
			if c.s.Kind == ISection && c.s.Taper > 0 {
				most = 0.06
			}
			if q := p.Iw/m.iw - 1; math.Abs(q) > most {
				t.Errorf("%s: Iw is %+.1f %% off the solid", c.name, 100*q)
			} else {
				t.Logf("%s: Iw %+.1f %%", c.name, 100*q)
			}
		} else if p.Iw > 0 && math.Abs(p.Iw/m.iw-1) > 0.2 {
			t.Errorf("%s: Iw %g, by the solid %g", c.name, p.Iw, m.iw)
		}
	}
}
