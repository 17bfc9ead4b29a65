package section

import (
	"math"
	"math/rand/v2"
	"testing"
)

// This file is a second way to the properties: a shape as the vertical chords
// that it cuts from the line at x, written down from the dimensions without the
// outlines, and integrated numerically.

// interval is a chord from low to high.
type interval struct{ low, high float64 }

// fillet is the height of a fillet of radius r at the distance d from the face
// that it runs up to.
func fillet(r, d float64) float64 {
	if d >= r {
		return 0
	}
	return r - math.Sqrt(math.Max(0, r*r-(r-d)*(r-d)))
}

// chords gives the chords at x and, for panels, the places where their course
// changes.
func chords(s Shape, x float64) []interval {
	h, b, tw, t := s.Depth, s.Width, s.Web, s.Wall
	switch s.Kind {
	case Bar:
		return []interval{{0, h}}
	case Rod, Pipe:
		r := s.Diameter / 2
		y := math.Sqrt(math.Max(0, r*r-(x-r)*(x-r)))
		if q := r - s.Wall; s.Kind == Pipe && math.Abs(x-r) < q {
			z := math.Sqrt(q*q - (x-r)*(x-r))
			return []interval{{r - y, r - z}, {r + z, r + y}}
		}
		return []interval{{r - y, r + y}}
	case Ellipse:
		height := func(half, a float64) float64 { // of half an ellipse with the half axes a along x and half
			u := (x - b/2) / a
			return half * math.Sqrt(math.Max(0, 1-u*u))
		}
		y := height(h/2, b/2)
		if a := b/2 - t; math.Abs(x-b/2) < a {
			z := height(h/2-t, a)
			return []interval{{h/2 - y, h/2 - z}, {h/2 + z, h/2 + y}}
		}
		return []interval{{h/2 - y, h/2 + y}}
	case Tube:
		low := fillet(s.OuterRadius, math.Min(x, b-x))
		if x <= t || x >= b-t {
			return []interval{{low, h - low}}
		}
		in := t + fillet(s.InnerRadius, math.Min(x, b-x)-t)
		return []interval{{low, in}, {h - in, h - low}}
	case ISection:
		d := math.Abs(x-b/2) - tw/2
		if d <= 0 {
			return []interval{{0, h}}
		}
		f := channelFace(halfFlange(s), math.Abs(x-b/2))
		return []interval{{0, f}, {h - f, h}}
	case Tee:
		d := math.Abs(x-b/2) - tw/2
		if d <= 0 {
			return []interval{{0, h}}
		}
		return []interval{{h - channelFace(halfFlange(s), math.Abs(x-b/2)), h}}
	case Angle:
		if x <= t {
			return []interval{{0, h - fillet(s.Toe, t-x)}}
		}
		return []interval{{0, t + fillet(s.Root, x-t) - fillet(s.Toe, b-x)}}
	case DoubleAngle:
		x = math.Abs(x-b-s.Gap/2) - s.Gap/2
		switch {
		case x < 0:
			return nil
		case x <= t:
			return []interval{{fillet(s.Toe, t-x), h}}
		}
		return []interval{{h - t - fillet(s.Root, x-t) + fillet(s.Toe, b-x), h}}
	case Channel:
		if x <= tw {
			return []interval{{0, h}}
		}
		f := channelFace(s, x)
		return []interval{{0, f}, {h - f, h}}
	}
	return nil
}

// halfFlange is the half of an I or a tee as a channel whose web has half the
// thickness.
func halfFlange(s Shape) Shape {
	s.Web, s.Width = s.Web/2, s.Width/2
	return s
}

// channelFace is the height of the lower flange's inner face at x, its root and
// toe rounded by circles that touch the sloping face.
func channelFace(s Shape, x float64) float64 {
	p := s.Taper
	line := func(x float64) float64 { return s.Flange + p*(s.TaperAt-x) }
	if p == 0 {
		line = func(float64) float64 { return s.Flange }
	}
	slant := math.Sqrt(1 + p*p)
	if cx := s.Web + s.Root; x < cx-s.Root*p/slant {
		cy := line(cx) + s.Root*slant
		return cy - math.Sqrt(math.Max(0, s.Root*s.Root-(x-cx)*(x-cx)))
	}
	if cx := s.Width - s.Toe; x > cx+s.Toe*p/slant {
		cy := line(cx) - s.Toe*slant
		return cy + math.Sqrt(math.Max(0, s.Toe*s.Toe-(x-cx)*(x-cx)))
	}
	return line(x)
}

// panels are the ends of the pieces of x in which the chords run smoothly.
func panels(s Shape) []float64 {
	b, tw := s.Width, s.Web
	switch s.Kind {
	case Bar:
		return []float64{0, b}
	case Rod:
		return []float64{0, s.Diameter}
	case Pipe:
		return []float64{0, s.Wall, s.Diameter - s.Wall, s.Diameter}
	case Ellipse:
		return []float64{0, s.Wall, b - s.Wall, b}
	case Tube:
		return ordered(0, s.OuterRadius, s.Wall, s.Wall+s.InnerRadius, b-s.Wall-s.InnerRadius, b-s.Wall, b-s.OuterRadius, b)
	case ISection, Tee:
		slant := s.Taper / math.Sqrt(1+s.Taper*s.Taper)
		l, r := (b-tw)/2, (b+tw)/2
		root, toe := s.Root*(1-slant), s.Toe*(1-slant)
		return ordered(0, toe, l-root, l, r, r+root, b-toe, b)
	case DoubleAngle:
		var all []float64
		for _, x := range []float64{0, s.Wall - s.Toe, s.Wall, s.Wall + s.Root, b - s.Toe, b} {
			all = append(all, b-x, b+s.Gap+x)
		}
		return ordered(all...)
	case Angle:
		return ordered(0, s.Wall-s.Toe, s.Wall, s.Wall+s.Root, b-s.Toe, b)
	}
	slant := s.Taper / math.Sqrt(1+s.Taper*s.Taper)
	return ordered(0, tw, tw+s.Root*(1-slant), b-s.Toe*(1-slant), b)
}

func ordered(v ...float64) []float64 {
	for i := range v {
		for j := i; j > 0 && v[j] < v[j-1]; j-- {
			v[j], v[j-1] = v[j-1], v[j]
		}
	}
	return v
}

// strip is a chord at x with the width that it stands for.
type strip struct{ x, width, low, high float64 }

// legendre gives the nodes and weights of Gauss and Legendre's rule on (0, 1).
func legendre(n int) (nodes, weights []float64) {
	for i := range n {
		x := math.Cos(math.Pi * (float64(i) + 0.75) / (float64(n) + 0.5))
		slope := 0.0
		for range 20 {
			p, q := 1.0, 0.0
			for k := 1; k <= n; k++ {
				p, q = (float64(2*k-1)*x*p-float64(k-1)*q)/float64(k), p
			}
			slope = float64(n) * (x*p - q) / (x*x - 1)
			x -= p / slope
		}
		nodes = append(nodes, (1+x)/2)
		weights = append(weights, 1/((1-x*x)*slope*slope))
	}
	return nodes, weights
}

// strips cuts a shape. The substitution x = (1 - cos u)/2 within a panel takes
// the square roots at its ends away. A cut within the shape parts a panel.
func strips(s Shape, nodes, weights []float64, cut ...float64) []strip {
	var out []strip
	ends := panels(s)
	for _, x := range cut {
		if x > ends[0] && x < ends[len(ends)-1] {
			ends = ordered(append(ends, x)...)
		}
	}
	for i := 1; i < len(ends); i++ {
		a, length := ends[i-1], ends[i]-ends[i-1]
		if length <= 0 {
			continue
		}
		for k := range nodes {
			sin, cos := math.Sincos(nodes[k] * math.Pi)
			x := a + length*(1-cos)/2
			for _, c := range chords(s, x) {
				out = append(out, strip{x, length / 2 * sin * math.Pi * weights[k], c.low, c.high})
			}
		}
	}
	return out
}

// slow holds the properties that the strips give.
type slow struct{ area, cx, cy, ix, iy, ixy float64 }

func integrateStrips(all []strip) slow {
	var m slow
	for _, c := range all {
		w := c.width * (c.high - c.low)
		m.area += w
		m.cx += w * c.x
		m.cy += w * (c.low + c.high) / 2
	}
	m.cx /= m.area
	m.cy /= m.area
	for _, c := range all {
		x, lo, hi := c.x-m.cx, c.low-m.cy, c.high-m.cy
		m.ix += c.width * (hi*hi*hi - lo*lo*lo) / 3
		m.iy += c.width * (hi - lo) * x * x
		m.ixy += c.width * x * (hi*hi - lo*lo) / 2
	}
	return m
}

// absolute is the integral of |v| from v0 to v1 where v is linear over a length.
func absolute(v0, v1, length float64) float64 {
	if v0*v1 >= 0 {
		return length * math.Abs(v0+v1) / 2
	}
	v0, v1 = math.Abs(v0), math.Abs(v1)
	return length * (v0*v0 + v1*v1) / (2 * (v0 + v1))
}

// slowPlastic is the least value over c of the integral of |v - c| over the
// area, v across an axis at the angle given. The integral is convex in c, so
// that golden sections find it: no equal-area axis is asked for. The
// panels are parted where an axis that is not level meets the horizontal faces.
func slowPlastic(s Shape, nodes, weights []float64, m slow, angle, reach float64) float64 {
	sin, cos := math.Sincos(angle)
	all := strips(s, nodes, weights)
	at := func(c float64) float64 {
		if math.Abs(sin) > 1e-9 {
			meets := func(y float64) float64 { return m.cx + ((y-m.cy)*cos-c)/sin }
			all = strips(s, nodes, weights, meets(0), meets(s.Wall), meets(s.Depth))
		}
		sum := 0.0
		for _, q := range all {
			across := -(q.x-m.cx)*sin - c
			sum += q.width * absolute(across+(q.low-m.cy)*cos, across+(q.high-m.cy)*cos, q.high-q.low)
		}
		return sum
	}
	const g = 0.6180339887498949
	a, z := -reach, reach
	p, q := z-g*(z-a), a+g*(z-a)
	fp, fq := at(p), at(q)
	for range 40 {
		if fp < fq {
			z, q, fq = q, p, fp
			p = z - g*(z-a)
			fp = at(p)
		} else {
			a, p, fp = p, q, fq
			q = a + g*(z-a)
			fq = at(q)
		}
	}
	return math.Min(fp, fq)
}

// randomShape draws a shape that passes Check, of any kind that has geometry.
func randomShape(r *rand.Rand) Shape {
	u := func(a, z float64) float64 { return a + (z-a)*r.Float64() }
	maybe := func(v float64) float64 {
		if r.IntN(3) == 0 {
			return 0
		}
		return v
	}
	for {
		h, b := u(0.03, 1), u(0.03, 0.6)
		side := math.Min(h, b)
		s := Shape{Depth: h, Width: b}
		switch Kind(1 + r.IntN(int(Given)-1)) {
		case Tube:
			t := side * u(0.01, 0.45)
			in := maybe(u(0, side/2-t))
			s = Shape{Kind: Tube, Made: Hot, Depth: h, Width: b, Wall: t, InnerRadius: in, OuterRadius: maybe(in + t*u(0, 1.5))}
		case Pipe:
			s = Shape{Kind: Pipe, Made: Cold, Diameter: b, Wall: b * u(0.005, 0.45)}
		case Ellipse:
			s.Kind, s.Made = Ellipse, Hot
			s.Wall = side * side / (2 * math.Max(h, b)) * u(0.01, 0.95)
		case Bar:
			s.Kind = Bar
		case Rod:
			s = Shape{Kind: Rod, Diameter: b}
		case ISection, Tee:
			s.Kind, s.Made = ISection, Rolled
			if r.IntN(2) == 0 {
				s.Kind = Tee
			}
			s.Web, s.Flange = b*u(0.02, 0.4), side*u(0.02, 0.4)
			s.Root = maybe(side * u(0, 0.2))
			if r.IntN(2) == 0 {
				s.Taper, s.TaperAt, s.Toe = u(0.01, 0.18), b*u(0.1, 0.45), maybe(s.Flange*u(0, 0.6))
			}
		case Channel:
			s.Kind, s.Made = Channel, Rolled
			s.Web, s.Flange = b*u(0.02, 0.3), side*u(0.05, 0.3)
			s.Root, s.Toe = maybe(side*u(0, 0.15)), maybe(s.Flange*u(0, 0.6))
			if r.IntN(2) == 0 {
				s.Taper, s.TaperAt = u(0.01, 0.18), b*u(0.3, 0.9)
			}
		case Angle, DoubleAngle:
			s.Kind, s.Made, s.Wall = Angle, Rolled, side*u(0.03, 0.4)
			if r.IntN(2) == 0 {
				s.Kind, s.Gap = DoubleAngle, maybe(side*u(0, 0.5))
			}
			s.Root, s.Toe = maybe(s.Wall*u(0, 1.5)), maybe(s.Wall*u(0, 1))
			if r.IntN(3) == 0 {
				s.Width = s.Depth
			}
		}
		if s.Kind != Unknown && s.Check() == nil {
			return s
		}
	}
}

func near(t *testing.T, s Shape, what string, got, want, scale, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance*scale) {
		t.Errorf("%s %s: %.10g, want %.10g (%.2g)\n%+v", s.Kind, what, got, want, math.Abs(got-want)/scale, s)
	}
}

func TestRandomShapesByStrips(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 20))
	count := map[Kind]int{}
	nodes, weights := legendre(60)
	for range 500 {
		s := randomShape(r)
		count[s.Kind]++
		p := compute(t, s)
		all := strips(s, nodes, weights)
		m := integrateStrips(all)
		size := math.Max(s.Depth+s.Width, 2*s.Diameter)
		near(t, s, "area", p.Area, m.area, m.area, 1e-5)
		near(t, s, "cx", p.CX, m.cx, size, 1e-6)
		near(t, s, "cy", p.CY, m.cy, size, 1e-6)
		near(t, s, "Ix", p.IX, m.ix, m.ix, 1e-5)
		near(t, s, "Iy", p.IY, m.iy, m.iy, 1e-5)
		near(t, s, "Ixy", p.IXY, m.ixy, m.ix+m.iy, 1e-6)
		mean, radius := (m.ix+m.iy)/2, math.Hypot((m.ix-m.iy)/2, m.ixy)
		near(t, s, "I major", p.IMajor, mean+radius, mean+radius, 1e-5)
		near(t, s, "I minor", p.IMinor, mean-radius, mean-radius, 1e-5)
		near(t, s, "Wpl major", p.WplMajor, slowPlastic(s, nodes, weights, m, p.Angle, size/2), p.WplMajor, 1e-5)
		near(t, s, "Wpl minor", p.WplMinor, slowPlastic(s, nodes, weights, m, p.Angle+math.Pi/2, size/2), p.WplMinor, 1e-5)
		elasticByChords(t, s, p)
	}
	for k := Tube; k < Given; k++ {
		if count[k] < 20 {
			t.Errorf("only %d shapes of kind %s", count[k], k)
		}
	}
}

// elasticByChords finds the outermost fibres from the ends of many chords.
func elasticByChords(t *testing.T, s Shape, p Properties) {
	t.Helper()
	sin, cos := math.Sincos(p.Angle)
	var up, down, right, left float64
	ends := panels(s)
	for i := 1; i < len(ends); i++ {
		const n = 400
		for k := range n + 1 {
			x := ends[i-1] + (ends[i]-ends[i-1])*(1-math.Cos(float64(k)/n*math.Pi))/2
			for _, c := range chords(s, x) {
				for _, y := range [2]float64{c.low, c.high} {
					dx, dy := x-p.CX, y-p.CY
					u, v := dx*cos+dy*sin, dy*cos-dx*sin
					up, down = math.Max(up, v), math.Max(down, -v)
					right, left = math.Max(right, u), math.Max(left, -u)
				}
			}
		}
	}
	near(t, s, "Wel major, positive side", p.WelMajorPos, p.IMajor/up, p.WelMajorPos, 2e-5)
	near(t, s, "Wel major, negative side", p.WelMajorNeg, p.IMajor/down, p.WelMajorNeg, 2e-5)
	near(t, s, "Wel minor, positive side", p.WelMinorPos, p.IMinor/right, p.WelMinorPos, 2e-5)
	near(t, s, "Wel minor, negative side", p.WelMinorNeg, p.IMinor/left, p.WelMinorNeg, 2e-5)
	if p.WelMajor != math.Min(p.WelMajorPos, p.WelMajorNeg) || p.WelMinor != math.Min(p.WelMinorPos, p.WelMinorNeg) {
		t.Errorf("%s: the elastic modulus is not the smaller of its sides", s.Kind)
	}
}
