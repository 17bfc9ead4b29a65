package drawing

import (
	"math"
	"slices"

	"kern/checker/derivation"
	"kern/checker/section"
	"kern/lang/unit"
)

// outlinePath gives outlines on the paper as a path on a sheet: scale is mm on the
// sheet for a metre, and the origin of the paper comes to the given point.
func outlinePath(style Style, loops []section.Loop, origin Point, scale float64) Path {
	at := func(q section.Point) Point { return Point{origin.X + q.X*scale, origin.Y - q.Y*scale} }
	path := Path{Style: style}
	for _, l := range loops {
		path.Steps = append(path.Steps, Step{Kind: Move, To: at(l[0].From)})
		for _, g := range l {
			if g.Straight() {
				path.Steps = append(path.Steps, Step{Kind: Line, To: at(g.To)})
				continue
			}
			// an arc of half a turn or more has no single meaning as a step
			parts := int(math.Ceil(math.Abs(g.Sweep) / (0.9 * math.Pi)))
			for i := 1; i <= parts; i++ {
				to := g.At(float64(i) / float64(parts))
				if i == parts {
					to = g.To
				}
				path.Steps = append(path.Steps, Step{Kind: Arc, To: at(to), Radius: g.Radius * scale, Clockwise: g.Sweep < 0})
			}
		}
		path.Steps = append(path.Steps, Step{Kind: Close})
	}
	return path
}

// extent is the size of outlines whose lower-left corner is the origin, m.
func extent(loops []section.Loop) (width, height float64) {
	for _, l := range loops {
		for _, g := range l {
			parts := 1
			if !g.Straight() {
				parts = 64
			}
			for i := 0; i <= parts; i++ {
				q := g.At(float64(i) / float64(parts))
				width, height = max(width, q.X), max(height, q.Y)
			}
		}
	}
	return width, height
}

// Sized says how a section is drawn.
type Sized struct {
	Title string
	Side  float64 // of the square that the outline fits, mm
	// Dimensions asks for the overall dimensions and the thicknesses.
	Dimensions bool
	Units      derivation.Units
}

// Section draws a cross-section to scale with its principal axes. It is nil for
// a section whose outline is not known.
func Section(s section.Shape, p section.Properties, how Sized) *Scene {
	loops := s.Outline()
	if len(loops) == 0 || !(how.Side > 0) {
		return nil
	}
	width, height := extent(loops)
	if !(width > 0) || !(height > 0) {
		return nil
	}
	left, right, above, below := 5.0, 12.0, 5.0, 3.5
	if how.Dimensions {
		left, below = 10, 9
	}
	d := sectionDrawing{scale: how.Side / max(width, height), width: width, height: height}
	d.origin = Point{left, above + height*d.scale}
	d.add(Group{"outline", []Item{outlinePath(Fill, loops, d.origin, d.scale)}})
	for _, l := range loops {
		for _, g := range l {
			for i := range 33 {
				q := g.At(float64(i) / 32)
				d.rim = append(d.rim, d.at(q.X, q.Y))
			}
		}
	}
	out := &Scene{Width: left + width*d.scale + right, Height: above + height*d.scale + below, Title: how.Title,
		Description: "Cross-section to scale, " + show(how.Units, width, unit.Length) + " wide and " + show(how.Units, height, unit.Length) + " deep, with its major and minor axes."}
	if how.Dimensions {
		d.dimensions(s, how.Units, out)
	}
	sin, cos := math.Sincos(p.Angle)
	d.axis("major", cos, sin, p)
	d.axis("minor", -sin, cos, p)
	out.Items = d.items
	return out
}

type sectionDrawing struct {
	pen
	scale         float64 // mm of the sheet in a metre
	width, height float64 // of the outline, m
	origin        Point   // the lower left corner on the sheet
	rim           []Point // points of the outline on the sheet, close together
}

// at gives a point of the paper on the sheet.
func (d *sectionDrawing) at(x, y float64) Point {
	return Point{d.origin.X + x*d.scale, d.origin.Y - y*d.scale}
}

// axis draws an axis through the centroid, a little over the outline, with its
// name at its positive end.
func (d *sectionDrawing) axis(name string, x, y float64, p section.Properties) {
	const over = 2.0 // mm
	// how far it is to the edge of the box, either way
	reach := func(x, y float64) float64 {
		t := math.Inf(1)
		for _, side := range [...]struct{ from, dir, size float64 }{{p.CX, x, d.width}, {p.CY, y, d.height}} {
			switch {
			case side.dir > 1e-12:
				t = min(t, (side.size-side.from)/side.dir)
			case side.dir < -1e-12:
				t = min(t, -side.from/side.dir)
			}
		}
		return t + over/d.scale
	}
	end, start := reach(x, y), -reach(-x, -y)
	from, to := d.at(p.CX+start*x, p.CY+start*y), d.at(p.CX+end*x, p.CY+end*y)
	d.add(Path{Style: Axis, Steps: steps([]Point{from, to}, false)})
	d.place(Box{0, 0, math.Inf(1), math.Inf(1)}, Text{Words: name, Size: small, Tone: Quiet}, d.free(name, from, to)...)
}

// free lists the places for an axis's name at its ends that keep clear of the
// outline.
func (d *sectionDrawing) free(name string, from, to Point) []spot {
	var out []spot
	for _, s := range []spot{
		{Point{to.X + 0.8, to.Y + 0.8}, Start}, {Point{to.X, to.Y - 0.8}, Middle},
		{Point{from.X + 0.8, from.Y + 1.4}, Start}, {Point{from.X - 0.8, from.Y + 0.8}, End}, {Point{from.X, from.Y + 2.8}, Middle},
	} {
		upright := math.Abs(to.Y-from.Y) > math.Abs(to.X-from.X)
		if s.at.Y == to.Y+0.8 && upright || s.at.Y == to.Y-0.8 && !upright {
			continue
		}
		b := Text{Words: name, Size: small, At: s.at, Anchor: s.anchor}.Box().grow(0.2)
		if !slices.ContainsFunc(d.rim, func(q Point) bool { return q.X > b.Left && q.X < b.Right && q.Y > b.Top && q.Y < b.Bottom }) {
			out = append(out, s)
		}
	}
	return out
}

// dimensions adds the width below, the depth at the left and the thicknesses in
// words beneath, and makes room for them on the sheet.
func (d *sectionDrawing) dimensions(s section.Shape, units derivation.Units, out *Scene) {
	low, high := d.at(0, 0), d.at(d.width, d.height)
	words := func(v float64) Text {
		return Text{Words: show(units, v, unit.Length), Size: small, Anchor: Middle}
	}
	t := words(d.width)
	t.At = Point{(low.X + high.X) / 2, low.Y + 7.2}
	d.measure(Point{low.X, low.Y + 4}, Point{high.X, low.Y + 4}, 3)
	if over := Width(t.Words, small, false)/2 - t.At.X + 0.5; over > 0 { // a narrow bar
		t.At.X += over
	}
	out.Width = max(out.Width, t.Box().Right+0.5)
	d.text(t)
	t = words(d.height)
	t.Upward, t.At = true, Point{low.X - 5.8, (low.Y + high.Y) / 2}
	d.measure(Point{low.X - 4.6, low.Y}, Point{low.X - 4.6, high.Y}, -3)
	d.text(t)
	var parts []string
	for _, x := range []struct {
		name  string
		value float64
	}{{"web", s.Web}, {"flange", s.Flange}, {"wall", s.Wall}, {"root radius", s.Root}, {"toe radius", s.Toe}, {"corner radius", s.OuterRadius}} {
		if x.value > 0 {
			parts = append(parts, x.name+" "+show(units, x.value, unit.Length))
		}
	}
	y := out.Height
	for _, p := range parts {
		y += 3.4
		t := Text{At: Point{low.X - 4, y - 0.8}, Words: p, Size: small, Tone: Quiet}
		out.Width = max(out.Width, t.Box().Right+0.5)
		d.text(t)
	}
	out.Height = y + 0.5
}

// measure draws a dimension line with its ticks; back reaches towards what is
// measured, mm, below the line when positive.
func (p *pen) measure(from, to Point, back float64) {
	p.line(Faint, from.X, from.Y, to.X, to.Y)
	for _, q := range []Point{from, to} {
		p.line(Outline, q.X-0.7, q.Y+0.7, q.X+0.7, q.Y-0.7)
		if from.Y == to.Y {
			p.line(Faint, q.X, q.Y+0.9, q.X, q.Y-back)
		} else {
			p.line(Faint, q.X-0.9, q.Y, q.X-back, q.Y)
		}
	}
}
