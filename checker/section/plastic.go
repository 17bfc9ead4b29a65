package section

import "math"

// above gives the area of the part of closed segments that lies above the
// line y = c, and its first moment about that line. By Green's theorem both
// are integrals along the outline, exact for lines and arcs.
func above(segments []Segment, c float64) (area, moment float64) {
	for i := range segments {
		var a, m float64
		if g := &segments[i]; g.Straight() {
			a, m = lineAbove(g, c)
		} else {
			a, m = arcAbove(g, c)
		}
		area += a
		moment += m
	}
	return area, moment
}

func lineAbove(g *Segment, c float64) (area, moment float64) {
	run := g.From.X - g.To.X // against x, as the outline runs counter-clockwise
	p, q := g.From.Y-c, g.To.Y-c
	switch {
	case p >= 0 && q >= 0:
		return run * (p + q) / 2, run * (p*p + p*q + q*q) / 6
	case p <= 0 && q <= 0:
		return 0, 0
	case p > 0:
		part := p / (p - q)
		return run * part * p / 2, run * part * p * p / 6
	default:
		part := q / (q - p)
		return run * part * q / 2, run * part * q * q / 6
	}
}

func arcAbove(g *Segment, c float64) (area, moment float64) {
	d, r := g.Centre.Y-c, g.Radius
	if d <= -r {
		return 0, 0
	}
	from, to, sign := g.Start, g.Start+g.Sweep, 1.0
	if from > to {
		from, to, sign = to, from, -1
	}
	// Split at the angles where the circle crosses the line.
	cuts := [8]float64{from}
	n := 1
	if d < r {
		phi := math.Asin(-d / r)
		for turn := math.Floor(from/(2*math.Pi)) - 1; turn*2*math.Pi < to+math.Pi && n < len(cuts)-1; turn++ {
			// In rising order within one turn: phi is at most pi - phi.
			for _, cut := range [2]float64{phi + turn*2*math.Pi, math.Pi - phi + turn*2*math.Pi} {
				if cut > from && cut < to && n < len(cuts)-1 {
					cuts[n] = cut
					n++
				}
			}
		}
	}
	cuts[n] = to
	n++
	s0, c0 := math.Sincos(cuts[0])
	for i := 1; i < n; i++ {
		a, z := cuts[i-1], cuts[i]
		s1, c1 := math.Sincos(z)
		if d+r*math.Sin((a+z)/2) > 0 {
			sin1 := c0 - c1
			sin2 := (z-a)/2 - (s1*c1-s0*c0)/2
			sin3 := sin1 - (c0*c0*c0-c1*c1*c1)/3
			area += sign * (r*d*sin1 + r*r*sin2)
			moment += sign * (r*d*d*sin1 + 2*r*r*d*sin2 + r*r*r*sin3) / 2
		}
		s0, c0 = s1, c1
	}
	return area, moment
}

// plasticModulus gives the plastic modulus about the axis parallel to x that
// halves the area. The origin must be the centroid; low and high bound the
// segments in y. It is NaN if no axis halves the area, which sound segments
// cannot bring about.
func plasticModulus(segments []Segment, area, low, high float64, symmetric bool) float64 {
	c := 0.0
	if !symmetric {
		c = equalAreaAxis(segments, area, low, high)
	}
	// integral |y - c| dA = 2 integral (y - c)+ dA - integral (y - c) dA,
	// and the last is -c A about the centroid.
	_, moment := above(segments, c)
	return 2*moment + c*area
}

// equalAreaAxis finds the height that halves the area between two brackets, by
// false position with the Illinois rule and, where that is slow, bisection. An
// error e in the height is of the order e2 in the plastic modulus, because the
// modulus is least at that height.
func equalAreaAxis(segments []Segment, area, low, high float64) float64 {
	excess := func(c float64) float64 {
		a, _ := above(segments, c)
		return a - area/2
	}
	depth := high - low
	a, z := low, high
	fa, fz := area/2, -area/2
	side := 0
	for i := range 200 {
		c := (a*fz - z*fa) / (fz - fa)
		if i%8 == 7 || !(c > a && c < z) {
			c = (a + z) / 2
		}
		f := excess(c)
		if math.Abs(f) <= 1e-13*area || z-a <= 1e-14*depth {
			return c
		}
		if f > 0 {
			a, fa = c, f
			if side == 1 {
				fz /= 2
			}
			side = 1
		} else if f < 0 {
			z, fz = c, f
			if side == -1 {
				fa /= 2
			}
			side = -1
		} else {
			return math.NaN()
		}
	}
	return (a + z) / 2
}
