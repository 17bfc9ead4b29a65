package section

import "math"

// Point is a point of the paper, x to the right and y up (m). The lower-left
// corner of a shape's bounding box is the origin.
type Point struct{ X, Y float64 }

// Segment is a piece of an outline: a straight line, or, where Radius is not
// zero, an arc of a circle about Centre that begins at the angle Start and
// turns by Sweep (rad, counter-clockwise positive, up to 2 pi either way).
type Segment struct {
	From, To     Point
	Centre       Point
	Radius       float64 // m; 0 for a straight line
	Start, Sweep float64 // rad; 0 for a straight line
}

// Straight tells whether the segment is a line.
func (g Segment) Straight() bool { return g.Radius == 0 }

// Length is the length of the segment in metres.
func (g Segment) Length() float64 {
	if g.Straight() {
		return math.Hypot(g.To.X-g.From.X, g.To.Y-g.From.Y)
	}
	return g.Radius * math.Abs(g.Sweep)
}

// At is the point at the fraction f of the segment's length, 0 <= f <= 1.
func (g Segment) At(f float64) Point {
	if g.Straight() {
		return Point{g.From.X + f*(g.To.X-g.From.X), g.From.Y + f*(g.To.Y-g.From.Y)}
	}
	sin, cos := math.Sincos(g.Start + f*g.Sweep)
	return Point{g.Centre.X + g.Radius*cos, g.Centre.Y + g.Radius*sin}
}

// Loop is a closed outline: every segment begins where the one before it ends,
// the first where the last ends. An outer loop runs counter-clockwise, a hole
// clockwise.
type Loop []Segment

// Length is the length of the loop in metres.
func (l Loop) Length() float64 {
	sum := 0.0
	for _, g := range l {
		sum += g.Length()
	}
	return sum
}

// Outline gives the closed outlines of the shape, the outer one first (a double
// angle has two outer ones and no holes). It is
// nil for a shape that fails Check, and for a kind that has no geometry. The
// outlines are exact but for those of an Ellipse, which are drawn with circular
// arcs, see ellipse.
func (s Shape) Outline() []Loop {
	if len(s.Check()) > 0 {
		return nil
	}
	return s.outline()
}

// outline draws a shape that has passed Check.
func (s Shape) outline() []Loop {
	switch s.Kind {
	case Pipe:
		r := s.Diameter / 2
		c := Point{r, r}
		return []Loop{circle(c, r, 2*math.Pi), circle(c, r-s.Wall, -2*math.Pi)}
	case Rod:
		r := s.Diameter / 2
		return []Loop{circle(Point{r, r}, r, 2*math.Pi)}
	case Ellipse:
		c := Point{s.Width / 2, s.Depth / 2}
		return []Loop{
			ellipse(c, s.Width/2, s.Depth/2, 1),
			ellipse(c, s.Width/2-s.Wall, s.Depth/2-s.Wall, -1),
		}
	}
	var loops []Loop
	for _, polygon := range s.corners() {
		loops = append(loops, round(polygon))
	}
	return loops
}

// circle is a whole circle as one segment that begins at its right.
func circle(c Point, radius, sweep float64) Loop {
	p := Point{c.X + radius, c.Y}
	return Loop{{From: p, To: p, Centre: c, Radius: radius, Sweep: sweep}}
}

// corner is a vertex of a polygon that is to be rounded with a radius; name is
// the language's word for that radius.
type corner struct {
	x, y   float64
	radius float64
	name   string
}

// corners gives the polygons of the shape before rounding, the outer one
// counter-clockwise and first, holes clockwise. A double angle has two outer ones.
func (s Shape) corners() [][]corner {
	h, b, tw, t := s.Depth, s.Width, s.Web, s.Wall
	at := func(x, y float64) corner { return corner{x: x, y: y} }
	root := func(x, y float64) corner { return corner{x, y, s.Root, "root"} }
	toe := func(x, y float64) corner { return corner{x, y, s.Toe, "toe"} }
	left, right := (b-tw)/2, (b+tw)/2

	switch s.Kind {
	case Bar:
		return [][]corner{{at(0, 0), at(b, 0), at(b, h), at(0, h)}}
	case Tube:
		outer := func(x, y float64) corner { return corner{x, y, s.OuterRadius, "outer"} }
		inner := func(x, y float64) corner { return corner{x, y, s.InnerRadius, "inner"} }
		return [][]corner{
			{outer(0, 0), outer(b, 0), outer(b, h), outer(0, h)},
			{inner(t, t), inner(t, h-t), inner(b-t, h-t), inner(b-t, t)},
		}
	case ISection:
		tip, heel := s.flangeAt(b/2), s.flangeAt(tw/2)
		return [][]corner{{
			at(0, 0), at(b, 0), toe(b, tip), root(right, heel), root(right, h-heel), toe(b, h-tip),
			at(b, h), at(0, h), toe(0, h-tip), root(left, h-heel), root(left, heel), toe(0, tip),
		}}
	case Channel:
		tip, heel := s.flangeAt(b), s.flangeAt(tw)
		return [][]corner{{
			at(0, 0), at(b, 0), toe(b, tip), root(tw, heel), root(tw, h-heel), toe(b, h-tip), at(b, h), at(0, h),
		}}
	case Tee:
		tip, heel := s.flangeAt(b/2), s.flangeAt(tw/2)
		return [][]corner{{
			at(left, 0), at(right, 0), root(right, h-heel), toe(b, h-tip),
			at(b, h), at(0, h), toe(0, h-tip), root(left, h-heel),
		}}
	case Angle:
		return [][]corner{{at(0, 0), at(b, 0), toe(b, t), root(t, t), toe(t, h), at(0, h)}}
	case DoubleAngle:
		// The outstanding legs are on top, as the flange of a tee is.
		l, r := b, b+s.Gap // the backs
		return [][]corner{
			{at(r, 0), toe(r+t, 0), root(r+t, h-t), toe(r+b, h-t), at(r+b, h), at(r, h)},
			{at(l, 0), at(l, h), at(0, h), toe(0, h-t), root(l-t, h-t), toe(l-t, 0)},
		}
	}
	return nil
}

// flangeAt is the flange thickness at the distance x from where TaperAt counts.
func (s Shape) flangeAt(x float64) float64 { return s.Flange + s.Taper*(s.TaperAt-x) }

// tangent describes vertex i of a polygon: the unit direction of the edge that
// comes in, the angle by which the outline turns (left positive) and the
// length that a fillet of unit radius takes from either edge.
func tangent(polygon []corner, i int) (dx, dy, turn, reach float64) {
	n := len(polygon)
	a, p, z := polygon[(i+n-1)%n], polygon[i], polygon[(i+1)%n]
	dx, dy = p.x-a.x, p.y-a.y
	length := math.Hypot(dx, dy)
	dx, dy = dx/length, dy/length
	ex, ey := z.x-p.x, z.y-p.y
	turn = math.Atan2(dx*ey-dy*ex, dx*ex+dy*ey)
	return dx, dy, turn, math.Tan(math.Abs(turn) / 2)
}

// round draws a polygon with its corners rounded. The radii must fit: see
// crowded.
func round(polygon []corner) Loop {
	loop := make(Loop, 0, 2*len(polygon))
	var first, last Point
	size := 0.0
	for _, c := range polygon {
		size = math.Max(size, math.Max(math.Abs(c.x), math.Abs(c.y)))
	}
	line := func(to Point) {
		// Radii that meet leave no straight piece between them.
		if math.Hypot(to.X-last.X, to.Y-last.Y) > 1e-13*size {
			loop = append(loop, Segment{From: last, To: to})
			last = to
		}
	}
	for i, c := range polygon {
		p := Point{c.x, c.y}
		if c.radius <= 1e-12*size {
			if i == 0 {
				first = p
				last = p
			} else {
				line(p)
			}
			continue
		}
		dx, dy, turn, reach := tangent(polygon, i)
		side := math.Copysign(1, turn)
		from := Point{p.X - c.radius*reach*dx, p.Y - c.radius*reach*dy}
		centre := Point{from.X - side*c.radius*dy, from.Y + side*c.radius*dx}
		start := math.Atan2(from.Y-centre.Y, from.X-centre.X)
		sin, cos := math.Sincos(start + turn)
		to := Point{centre.X + c.radius*cos, centre.Y + c.radius*sin}
		if i == 0 {
			first = from
		} else {
			line(from)
			if len(loop) > 0 {
				from = last
			}
		}
		loop = append(loop, Segment{From: from, To: to, Centre: centre, Radius: c.radius, Start: start, Sweep: turn})
		last = to
	}
	line(first)
	// The joints agree to rounding; make them agree exactly.
	loop[len(loop)-1].To = loop[0].From
	return loop
}

// crowded looks for radii that do not fit between the corners of a polygon and
// gives the largest radius of that name that would.
func crowded(polygon []corner) []Fault {
	var faults []Fault
	n := len(polygon)
	reach := make([]float64, n)
	for i, c := range polygon {
		if c.radius > 0 {
			_, _, _, reach[i] = tangent(polygon, i)
		}
	}
	for i := range polygon {
		j := (i + 1) % n
		p, q := polygon[i], polygon[j]
		edge := math.Hypot(q.x-p.x, q.y-p.y)
		if p.radius*reach[i]+q.radius*reach[j] <= edge*(1+1e-9) {
			continue
		}
		name, limit := p.name, 0.0
		switch {
		case p.radius > 0 && q.radius > 0 && p.name == q.name:
			limit = edge / (reach[i] + reach[j])
		case p.radius >= q.radius:
			limit = math.Max(0, (edge-q.radius*reach[j])/reach[i])
		default:
			name = q.name
			limit = math.Max(0, (edge-p.radius*reach[i])/reach[j])
		}
		faults = addTightest(faults, Fault{
			Field:   name,
			Message: "the " + radiusWords[name] + " is too big to fit: at most " + millimetres(limit),
			Limit:   limit,
		})
	}
	return faults
}

// addTightest keeps one fault a field, the one with the smallest limit.
func addTightest(faults []Fault, f Fault) []Fault {
	for i := range faults {
		if faults[i].Field == f.Field {
			if f.Limit < faults[i].Limit {
				faults[i] = f
			}
			return faults
		}
	}
	return append(faults, f)
}
