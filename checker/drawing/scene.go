package drawing

import "math"

// Scene is a picture on a sheet: the origin is the upper left corner, x to the
// right and y down, in millimetres.
type Scene struct {
	Width, Height float64 // mm
	// Title names the picture; Description says in words what it shows, for those
	// who cannot see it.
	Title, Description string
	Items              []Item
}

// Point is a point on the sheet, mm.
type Point struct{ X, Y float64 }

// Item is a part of a scene: a Path, a Text or a Group.
type Item interface{ item() }

// Path is a line or an area. Several closed runs of steps make an area by the
// even-odd rule.
type Path struct {
	Style Style
	Steps []Step
}

// StepKind is what a step of a path does.
type StepKind uint8

// The steps of a path.
const (
	Move  StepKind = iota // begins a run at To
	Line                  // a straight line to To
	Arc                   // an arc of a circle to To, less than half a turn
	Cubic                 // a cubic Bézier curve to To, by Control
	Close                 // a straight line to where the run began
)

// Step is one step of a path.
type Step struct {
	Kind      StepKind
	To        Point
	Radius    float64  // of an Arc, mm
	Clockwise bool     // of an Arc, as it is seen on the sheet
	Control   [2]Point // of a Cubic
}

// Anchor is the part of a text that stands at its point.
type Anchor uint8

// The anchors.
const (
	Start Anchor = iota
	Middle
	End
)

// Text is one line of words; At is on its baseline.
type Text struct {
	At     Point
	Words  string
	Size   float64 // height of the letters' body, mm
	Anchor Anchor
	Tone   Tone
	Bold   bool
	Upward bool // reads from below to above
}

// Group is a part of the picture with a name, for readers of the file.
type Group struct {
	Name  string
	Items []Item
}

func (Path) item()  {}
func (Text) item()  {}
func (Group) item() {}

// Painter is what a scene is painted on. Items come in the order in which they
// cover each other.
type Painter interface {
	Path(Path)
	Text(Text)
	Open(name string) // a group begins
	Close()           // and ends
}

// Paint gives every item to a painter.
func (s *Scene) Paint(p Painter) { paint(s.Items, p) }

func paint(items []Item, p Painter) {
	for _, it := range items {
		switch it := it.(type) {
		case Path:
			p.Path(it)
		case Text:
			p.Text(it)
		case Group:
			p.Open(it.Name)
			paint(it.Items, p)
			p.Close()
		}
	}
}

// Cubics gives the steps with arcs as cubic curves, for painters that know no
// arcs. The curve leaves a quarter of the circle by less than 0.03 % of its
// radius.
func (p Path) Cubics() []Step {
	var out []Step
	var at, begin Point
	for _, s := range p.Steps {
		switch s.Kind {
		case Move:
			begin = s.To
		case Arc:
			out = append(out, arcCubics(at, s)...)
			at = s.To
			continue
		case Close:
			s.To = begin
		}
		out = append(out, s)
		at = s.To
	}
	return out
}

// centre finds the centre of an arc, and the angles at which it begins and by
// which it turns; angles grow clockwise, as y points down.
func centre(from Point, s Step) (c Point, start, sweep float64) {
	mx, my := (s.To.X-from.X)/2, (s.To.Y-from.Y)/2
	half := math.Hypot(mx, my)
	if half == 0 {
		return from, 0, 0
	}
	off := math.Sqrt(max(0, s.Radius*s.Radius-half*half)) / half
	if !s.Clockwise {
		off = -off
	}
	c = Point{from.X + mx - off*my, from.Y + my + off*mx}
	start = math.Atan2(from.Y-c.Y, from.X-c.X)
	sweep = math.Atan2(s.To.Y-c.Y, s.To.X-c.X) - start
	if s.Clockwise && sweep < 0 {
		sweep += 2 * math.Pi
	}
	if !s.Clockwise && sweep > 0 {
		sweep -= 2 * math.Pi
	}
	return c, start, sweep
}

func arcCubics(from Point, s Step) []Step {
	c, start, sweep := centre(from, s)
	n := int(math.Ceil(math.Abs(sweep) / (math.Pi / 2)))
	var out []Step
	for i := range n {
		a, b := start+sweep*float64(i)/float64(n), start+sweep*float64(i+1)/float64(n)
		k := 4. / 3 * math.Tan((b-a)/4)
		sa, ca := math.Sincos(a)
		sb, cb := math.Sincos(b)
		r := s.Radius
		to := Point{c.X + r*cb, c.Y + r*sb}
		if i == n-1 {
			to = s.To
		}
		out = append(out, Step{Kind: Cubic, To: to, Control: [2]Point{
			{c.X + r*(ca-k*sa), c.Y + r*(sa+k*ca)},
			{c.X + r*(cb+k*sb), c.Y + r*(sb-k*cb)},
		}})
	}
	return out
}
