package drawing

import (
	"math"

	"kern/checker/action"
)

// hatch draws the ground: a line with strokes behind it. It is level, with the
// strokes below (or above), or upright with them at the left.
func (p *pen) hatch(from, to Point, dx, dy float64) {
	p.line(Outline, from.X, from.Y, to.X, to.Y)
	const step = 1.5
	length := max(to.X-from.X, to.Y-from.Y)
	for at := step / 2; at < length; at += step {
		x, y := from.X, from.Y
		if to.X > from.X {
			x += at
		} else {
			y += at
		}
		p.line(Faint, x, y, x+dx, y+dy)
	}
}

// base draws what stands below the foot of a member of half width w.
func (p *pen) base(end action.End, x, y, w float64) {
	switch end {
	case action.Pinned:
		p.polygon(Outline, Point{x, y}, Point{x - 2.4, y + 3.8}, Point{x + 2.4, y + 3.8})
		p.hatch(Point{x - 4, y + 3.8}, Point{x + 4, y + 3.8}, -1.1, 1.3)
	case action.Fixed:
		p.line(Strong, x-w-2.4, y, x+w+2.4, y)
		p.hatch(Point{x - w - 2.4, y}, Point{x + w + 2.4, y}, -1.1, 1.3)
	case action.Guided:
		p.line(Strong, x-w-2, y, x+w+2, y)
		p.circle(Outline, Point{x - 1.6, y + 1.3}, 0.9)
		p.circle(Outline, Point{x + 1.6, y + 1.3}, 0.9)
		p.hatch(Point{x - w - 3, y + 2.5}, Point{x + w + 3, y + 2.5}, -1.1, 1.3)
	}
}

// top draws what holds the head of a member of half width w. The head can move
// down, so nothing stands above it.
func (p *pen) top(end action.End, x, y, w float64) {
	switch end {
	case action.Pinned:
		p.hold(x-w, y, -1)
	case action.Fixed: // a sleeve
		p.line(Strong, x-w-0.6, y-0.5, x-w-0.6, y+4)
		p.line(Strong, x+w+0.6, y-0.5, x+w+0.6, y+4)
		p.hatch(Point{x - w - 0.6, y - 0.5}, Point{x - w - 0.6, y + 4}, -1.3, 1.1)
		p.hatch(Point{x + w + 0.6, y - 0.5}, Point{x + w + 0.6, y + 4}, 1.3, -1.1)
	case action.Guided: // a plate that cannot turn, on rollers that let it move
		p.line(Strong, x-w-2.4, y, x+w+2.4, y)
		p.circle(Outline, Point{x - w - 1.4, y - 1.2}, 0.9)
		p.circle(Outline, Point{x + w + 1.4, y - 1.2}, 0.9)
		p.line(Outline, x-w-3, y-2.4, x-w, y-2.4)
		p.line(Outline, x+w, y-2.4, x+w+3, y-2.4)
	}
}

// hold draws a point kept from moving sideways, at the left (side -1) or at the
// right (side 1) of the member.
func (p *pen) hold(x, y, side float64) {
	p.polygon(Outline, Point{x, y}, Point{x + side*2.9, y - 1.7}, Point{x + side*2.9, y + 1.7})
	p.hatch(Point{x + side*3.5, y - 2.2}, Point{x + side*3.5, y + 2.2}, side*1.1, 1.1)
}

// spring draws a point kept from moving sideways by a spring, at the left (side
// -1) or at the right (side 1) of the member.
func (p *pen) spring(x, y, side float64) {
	pts := []Point{{x, y}, {x + side*0.5, y}}
	for i := range 5 {
		pts = append(pts, Point{x + side*(0.8+0.5*float64(i)), y + 1.1*float64(1-2*(i%2))})
	}
	p.polyline(Outline, append(pts, Point{x + side*3.1, y}, Point{x + side*3.5, y})...)
	p.hatch(Point{x + side*3.5, y - 2.2}, Point{x + side*3.5, y + 2.2}, side*1.1, 1.1)
}

// coil draws a spring against turning about an end: two turns around it, held to
// the ground at the right.
func (p *pen) coil(x, y float64) {
	at := func(r, turn float64) Point {
		sin, cos := math.Sincos(turn * math.Pi / 2)
		return Point{x + r*cos, y + r*sin}
	}
	path := Path{Style: Outline, Steps: []Step{{Kind: Move, To: at(0.9, 0)}}}
	for i := 1; i <= 6; i++ {
		r := 0.9 + 0.25*float64(i)
		path.Steps = append(path.Steps, Step{Kind: Arc, To: at(r, float64(i)), Radius: r, Clockwise: true})
	}
	p.add(path)
}
