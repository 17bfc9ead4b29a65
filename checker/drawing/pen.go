package drawing

import "math"

// Sizes of words, mm.
const (
	small  = 2.5
	normal = 2.9
)

// pen collects the items of a scene.
type pen struct {
	items []Item
	// taken are the boxes of the texts so far, which later ones keep clear of.
	taken []Box
	// ink are points on lines, close together, which words found by place keep
	// clear of where they can.
	ink []Point
}

func (p *pen) add(it Item) { p.items = append(p.items, it) }

func (p *pen) polyline(s Style, pts ...Point) {
	p.add(Path{Style: s, Steps: steps(pts, false)})
}

func (p *pen) polygon(s Style, pts ...Point) {
	p.add(Path{Style: s, Steps: steps(pts, true)})
}

func (p *pen) line(s Style, x1, y1, x2, y2 float64) { p.polyline(s, Point{x1, y1}, Point{x2, y2}) }

func (p *pen) rect(s Style, b Box) {
	p.polygon(s, Point{b.Left, b.Top}, Point{b.Right, b.Top}, Point{b.Right, b.Bottom}, Point{b.Left, b.Bottom})
}

// circle is a whole circle.
func (p *pen) circle(s Style, c Point, r float64) {
	at := func(i int) Point {
		sin, cos := math.Sincos(float64(i) * 2 * math.Pi / 3)
		return Point{c.X + r*cos, c.Y + r*sin}
	}
	path := Path{Style: s, Steps: []Step{{Kind: Move, To: at(0)}}}
	for i := 1; i <= 3; i++ {
		path.Steps = append(path.Steps, Step{Kind: Arc, To: at(i), Radius: r, Clockwise: true})
	}
	path.Steps = append(path.Steps, Step{Kind: Close})
	p.add(path)
}

// arrow is a line with a head at its end.
func (p *pen) arrow(s Style, from, to Point) {
	head := Solid
	if s == Accent {
		head = AccentFill
	}
	p.polyline(s, from, to)
	p.head(head, from, to)
}

// head is an arrow head at the end of a line.
func (p *pen) head(s Style, from, to Point) {
	const long, wide = 1.9, 0.62
	l := math.Hypot(to.X-from.X, to.Y-from.Y)
	if l == 0 {
		return
	}
	x, y := (to.X-from.X)/l, (to.Y-from.Y)/l
	back := Point{to.X - long*x, to.Y - long*y}
	p.polygon(s, to, Point{back.X - wide*y, back.Y + wide*x}, Point{back.X + wide*y, back.Y - wide*x})
}

// text writes words where they are told to be.
func (p *pen) text(t Text) {
	if t.Words == "" {
		return
	}
	if t.Size == 0 {
		t.Size = normal
	}
	p.taken = append(p.taken, t.Box())
	p.add(t)
}

// clear tells whether nothing is written in a box.
func (p *pen) clear(b Box) bool {
	for _, t := range p.taken {
		if t.Overlaps(b) {
			return false
		}
	}
	return true
}

// place writes words at the first of several places that keeps inside the
// bounds, clear of all words so far and, if there is such a place, of lines. It
// is false when there is none.
func (p *pen) place(bounds Box, t Text, places ...spot) bool {
	if t.Size == 0 {
		t.Size = normal
	}
	for _, strict := range []bool{true, false} {
		for _, s := range places {
			t.At, t.Anchor = s.at, s.anchor
			if b := t.Box(); b.Inside(bounds) && p.clear(b.grow(0.2)) && !(strict && p.crossed(b)) {
				p.text(t)
				return true
			}
		}
	}
	return false
}

// crossed tells whether a line runs through a box.
func (p *pen) crossed(b Box) bool {
	for _, q := range p.ink {
		if q.X > b.Left && q.X < b.Right && q.Y > b.Top && q.Y < b.Bottom {
			return true
		}
	}
	return false
}

// mind notes the points of a line for place.
func (p *pen) mind(pts ...Point) {
	for i := range len(pts) - 1 {
		a, b := pts[i], pts[i+1]
		n := 1 + int(math.Hypot(b.X-a.X, b.Y-a.Y))
		if n > 1000 {
			continue
		}
		for j := range n + 1 {
			t := float64(j) / float64(n)
			p.ink = append(p.ink, Point{a.X + t*(b.X-a.X), a.Y + t*(b.Y-a.Y)})
		}
	}
}

// spot is a place for words.
type spot struct {
	at     Point
	anchor Anchor
}

func steps(pts []Point, closed bool) []Step {
	out := make([]Step, 0, len(pts)+1)
	for i, q := range pts {
		k := Line
		if i == 0 {
			k = Move
		}
		out = append(out, Step{Kind: k, To: q})
	}
	if closed {
		out = append(out, Step{Kind: Close})
	}
	return out
}
