package section

import (
	"fmt"
	"math"
)

// computeEllipse gives the properties of an elliptical hollow section that has
// passed Check, in closed form. As the formulas of EN 10210-2, Annex, have it,
// the inside is an ellipse whose axes are two walls shorter than those of the
// outside. A wall of even thickness all round would have a little more area (3 %
// for 300x150x8), so that the standard's values err on the safe side.
func (s Shape) computeEllipse() (Properties, error) {
	h, b := s.Depth, s.Width
	g, c := h-2*s.Wall, b-2*s.Wall
	// With along the axis that bends and d across it.
	second := func(along, d float64) float64 { return math.Pi / 64 * along * d * d * d }
	plastic := func(along, d float64) float64 { return along * d * d / 6 }
	var p Properties
	p.Area = math.Pi / 4 * (h*b - g*c)
	p.Perimeter = ellipsePerimeter(h/2, b/2)
	p.CX, p.CY = b/2, h/2
	p.IX, p.IY = second(b, h)-second(c, g), second(h, b)-second(g, c)
	p.IMajor, p.IMinor = p.IX, p.IY
	p.WplMajor, p.WplMinor = plastic(b, h)-plastic(c, g), plastic(h, b)-plastic(g, c)
	p.AvMajor, p.AvMinor = s.shearAreas(p.Area)
	deep, wide := h, b
	if b > h {
		p.Angle, p.Turned = math.Pi/2, true
		p.IMajor, p.IMinor = p.IMinor, p.IMajor
		p.WplMajor, p.WplMinor = p.WplMinor, p.WplMajor
		p.AvMajor, p.AvMinor = p.AvMinor, p.AvMajor
		deep, wide = b, h
	}
	p.RMajor, p.RMinor = math.Sqrt(p.IMajor/p.Area), math.Sqrt(p.IMinor/p.Area)
	p.WelMajor, p.WelMinor = 2*p.IMajor/deep, 2*p.IMinor/wide
	p.WelMajorPos, p.WelMajorNeg = p.WelMajor, p.WelMajor
	p.WelMinorPos, p.WelMinorNeg = p.WelMinor, p.WelMinor
	p.It = s.torsionConstant(p.IX + p.IY)
	if err := p.sound(); err != nil {
		return Properties{}, fmt.Errorf("%s: %w", s.Kind, err)
	}
	return p, nil
}

// torsionEllipse is the formula of EN 10210-2, Annex, for elliptical hollow
// sections: the wall's own torsion and that of the closed cell within its
// mid-line, an ellipse whose length is taken by a short series.
func (s Shape) torsionEllipse() float64 {
	t := s.Wall
	sum, difference := s.Depth+s.Width-2*t, s.Depth-s.Width
	ratio := difference / sum
	line := math.Pi / 2 * sum * (1 + ratio*ratio/4)
	cell := math.Pi / 4 * (s.Depth - t) * (s.Width - t)
	return t*t*t*line/3 + 4*cell*cell*t/line
}

// ellipsePerimeter is the length (m) of an ellipse with the half axes a and b
// (m), by Gauss's arithmetic-geometric mean, to machine accuracy.
func ellipsePerimeter(a, b float64) float64 {
	a, b = math.Max(a, b), math.Min(a, b)
	sum, power := a*a-(a*a-b*b)/2, 1.0
	for range 30 {
		difference := (a - b) / 2
		a, b = (a+b)/2, math.Sqrt(a*b)
		sum -= power * difference * difference
		power *= 2
		if difference <= 1e-17*a {
			break
		}
	}
	return 2 * math.Pi * sum / a
}

// ellipseArcs is the number of circular arcs that draw a quarter of an ellipse.
const ellipseArcs = 24

// ellipse draws the ellipse about c with the half axes rx and ry,
// counter-clockwise for a turn of 1 and clockwise for -1. Every circular arc
// meets the ellipse at both ends and in its middle; between them it strays by
// less than a hundred-thousandth of the longer half axis for the proportions of
// EN 10210-2 (2 : 1).
func ellipse(c Point, rx, ry, turn float64) Loop {
	const n = 4 * ellipseArcs
	at := func(i int) Point { // in half arcs
		sin, cos := math.Sincos(turn * float64(i%(2*n)) * math.Pi / n)
		return Point{c.X + rx*cos, c.Y + ry*sin}
	}
	loop := make(Loop, 0, n)
	for i := 0; i < 2*n; i += 2 {
		loop = append(loop, arcThrough(at(i), at(i+1), at(i+2)))
	}
	return loop
}

// arcThrough is the circular arc from one point through another to a third; a
// line if they are in line.
func arcThrough(from, mid, to Point) Segment {
	ax, ay := mid.X-from.X, mid.Y-from.Y
	bx, by := to.X-from.X, to.Y-from.Y
	cross := 2 * (ax*by - ay*bx)
	aa, bb := ax*ax+ay*ay, bx*bx+by*by
	if math.Abs(cross) <= 1e-12*bb {
		return Segment{From: from, To: to}
	}
	ux, uy := (by*aa-ay*bb)/cross, (ax*bb-bx*aa)/cross
	centre := Point{from.X + ux, from.Y + uy}
	start := math.Atan2(-uy, -ux)
	end := math.Atan2(to.Y-centre.Y, to.X-centre.X)
	// Counter-clockwise where the points turn left.
	sweep := math.Mod(end-start, 2*math.Pi)
	switch {
	case cross > 0 && sweep < 0:
		sweep += 2 * math.Pi
	case cross < 0 && sweep > 0:
		sweep -= 2 * math.Pi
	}
	return Segment{From: from, To: to, Centre: centre, Radius: math.Hypot(ux, uy), Start: start, Sweep: sweep}
}
