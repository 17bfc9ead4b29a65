package section

import "math"

// moments are the integrals of 1, x, y, x2, y2 and xy over an area.
type moments struct{ a, x, y, xx, yy, xy float64 }

// integrate gives the moments of the area within closed segments about the
// point o. By Green's theorem the area is the polygon through the joints, plus
// a circular segment (between arc and chord) for every arc: both have closed
// forms.
func integrate(segments []Segment, o Point) moments {
	var m moments
	for i := range segments {
		g := &segments[i]
		x0, y0, x1, y1 := g.From.X-o.X, g.From.Y-o.Y, g.To.X-o.X, g.To.Y-o.Y
		cross := x0*y1 - x1*y0
		m.a += cross / 2
		m.x += (x0 + x1) * cross / 6
		m.y += (y0 + y1) * cross / 6
		m.xx += (x0*x0 + x0*x1 + x1*x1) * cross / 12
		m.yy += (y0*y0 + y0*y1 + y1*y1) * cross / 12
		m.xy += (x0*y1 + 2*x0*y0 + 2*x1*y1 + x1*y0) * cross / 24
		if !g.Straight() {
			m.addCap(g, o)
		}
	}
	return m
}

// addCap adds the area between an arc and its chord: it counts where the arc
// turns counter-clockwise and is taken away where it turns clockwise.
func (m *moments) addCap(g *Segment, o Point) {
	half := math.Abs(g.Sweep) / 2
	sin, cos := math.Sincos(half)
	r := math.Copysign(1, g.Sweep)
	r2 := r * g.Radius * g.Radius
	r3, r4 := r2*g.Radius, r2*g.Radius*g.Radius
	// About the circle's centre, p along the bisector of the arc, q across it.
	area := r2 * (half - sin*cos)
	p := r3 * 2 / 3 * sin * sin * sin
	pp := r4 / 4 * (half - sin*cos + 2*sin*sin*sin*cos)
	qq := r4 / 12 * (3*half - 3*sin*cos - 2*sin*sin*sin*cos)
	s, c := math.Sincos(g.Start + g.Sweep/2)
	cx, cy := g.Centre.X-o.X, g.Centre.Y-o.Y
	m.a += area
	m.x += cx*area + c*p
	m.y += cy*area + s*p
	m.xx += cx*cx*area + 2*cx*c*p + c*c*pp + s*s*qq
	m.yy += cy*cy*area + 2*cy*s*p + s*s*pp + c*c*qq
	m.xy += cx*cy*area + (cx*s+cy*c)*p + s*c*(pp-qq)
}

// turned gives the segments in axes through o that are turned by the angle
// whose cosine and sine are given.
func turned(segments []Segment, o Point, angle, cos, sin float64) []Segment {
	out := make([]Segment, len(segments))
	move := func(p Point) Point {
		x, y := p.X-o.X, p.Y-o.Y
		return Point{cos*x + sin*y, cos*y - sin*x}
	}
	for i, g := range segments {
		out[i] = Segment{move(g.From), move(g.To), move(g.Centre), g.Radius, g.Start - angle, g.Sweep}
		if g.Straight() {
			out[i].Centre, out[i].Start = Point{}, 0
		}
	}
	return out
}

// extent gives the bounding box of segments.
func extent(segments []Segment) (low, high Point) {
	low = Point{math.Inf(1), math.Inf(1)}
	high = Point{math.Inf(-1), math.Inf(-1)}
	grow := func(p Point) {
		low = Point{math.Min(low.X, p.X), math.Min(low.Y, p.Y)}
		high = Point{math.Max(high.X, p.X), math.Max(high.Y, p.Y)}
	}
	for _, g := range segments {
		grow(g.From)
		grow(g.To)
		if g.Straight() {
			continue
		}
		// The four outermost points of the circle, those that lie on the arc.
		a, z := g.Start, g.Start+g.Sweep
		if a > z {
			a, z = z, a
		}
		for k := math.Ceil(a / (math.Pi / 2)); k*(math.Pi/2) <= z; k++ {
			switch int(k) & 3 {
			case 0:
				grow(Point{g.Centre.X + g.Radius, g.Centre.Y})
			case 1:
				grow(Point{g.Centre.X, g.Centre.Y + g.Radius})
			case 2:
				grow(Point{g.Centre.X - g.Radius, g.Centre.Y})
			case 3:
				grow(Point{g.Centre.X, g.Centre.Y - g.Radius})
			}
		}
	}
	return low, high
}
