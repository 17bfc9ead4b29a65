package drawing

import (
	"math"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang/unit"
)

// The pictures of a member stand beside each other, with one height and one
// place of base and top.
const (
	headroom  = 25.0 // above the top, for loads and titles, mm
	stature   = 80.0 // of the member
	footroom  = 17.0 // below the base
	tallSheet = headroom + stature + footroom
	// SheetWidth is the width of the text on a page, which no picture exceeds.
	SheetWidth = 170.0
)

// subject is the member that pictures are made of.
type subject struct {
	r     *checker.Result
	m     *model.Member
	f     *standard.Frame // nil for a member that lacks something
	units derivation.Units
}

// about is false for a member whose height is not known.
func about(r *checker.Result) (subject, bool) {
	s := subject{r: r, m: r.Member}
	if r.Member == nil || !(s.m.Height > 0) || math.IsInf(s.m.Height, 0) || r.Env() == nil {
		return s, false
	}
	s.units, s.f = r.Units(), r.Frame()
	return s, true
}

// y is the place of a height above the base on the sheet.
func (s *subject) y(z float64) float64 { return headroom + stature*(1-z/s.m.Height) }

// show writes a quantity in the units of the calculation.
func (s *subject) show(v float64, dim unit.Dim) string { return show(s.units, v, dim) }

// combination is the index of the combination that pictures show: that of the
// governing check, or else the one that compresses the member most; -1 without
// any.
func (s *subject) combination() int {
	if c, ok := s.r.GoverningCheck(); ok && c.Combination >= 0 {
		return c.Combination
	}
	return s.pressed()
}

// pressed is the combination with the greatest compression, -1 without any.
func (s *subject) pressed() int {
	best, at := math.Inf(-1), -1
	for k := range s.r.Combinations() {
		if n := s.f.Compression(k, 0, s.m.Height); n > best {
			best, at = n, k
		}
	}
	return at
}

// title names a picture of the member.
func (s *subject) title(what string) string { return s.m.Kind.String() + " " + s.r.Name + ": " + what }

// Pictures are all the pictures of a member that can be drawn, in the order of a
// sheet.
func Pictures(r *checker.Result) []*Scene {
	var out []*Scene
	for _, draw := range []func(*checker.Result) *Scene{Elevation, Buckling, Diagrams} {
		if s := draw(r); s != nil {
			out = append(out, s)
		}
	}
	out = append(out, Sections(r)...)
	for _, draw := range []func(*checker.Result) *Scene{Interaction, Bars} {
		if s := draw(r); s != nil {
			out = append(out, s)
		}
	}
	return out
}

// SectionOf draws the member's cross-section with axes and dimensions, that of
// the lowest lift where it has several; nil for one without a shape.
func SectionOf(r *checker.Result) *Scene {
	if s := Sections(r); len(s) > 0 {
		return s[0]
	}
	return nil
}

// Sections draws every cross-section of the member once, from the base up.
func Sections(r *checker.Result) []*Scene {
	if r.Member == nil || r.Env() == nil {
		return nil
	}
	var out []*Scene
	var drawn []*model.Section
	for _, p := range r.Member.Parts() {
		s := p.Section
		if s == nil || slices.ContainsFunc(drawn, s.Same) {
			continue
		}
		drawn = append(drawn, s)
		if scene := Section(s.Shape, s.Properties, Sized{Title: "section " + s.Title(), Side: 40, Dimensions: true, Units: r.Units()}); scene != nil {
			out = append(out, scene)
		}
	}
	return out
}

// words turns the name of a rule into words.
func words(name string) string { return strings.ReplaceAll(name, "-", " ") }

// depths are the sizes of the section that are seen where the member bends about
// the major and the minor axis, m; zero for a section without a shape.
func depths(s *model.Section) [2]float64 {
	if s == nil {
		return [2]float64{}
	}
	loops := s.Shape.Outline()
	if len(loops) == 0 {
		return [2]float64{}
	}
	sin, cos := math.Sincos(s.Angle)
	low, high := [2]float64{math.Inf(1), math.Inf(1)}, [2]float64{math.Inf(-1), math.Inf(-1)}
	for _, l := range loops {
		for _, g := range l {
			for i := range 17 {
				q := g.At(float64(i) / 16)
				// across the major axis, and along it
				for a, v := range [2]float64{-sin*q.X + cos*q.Y, cos*q.X + sin*q.Y} {
					low[a], high[a] = min(low[a], v), max(high[a], v)
				}
			}
		}
	}
	return [2]float64{high[0] - low[0], high[1] - low[1]}
}

// support is what holds the member at a height about an axis.
type support struct {
	at               float64 // m
	rigid            bool
	lateral, turning float64 // stiffness of springs, N/m and Nm/rad; 0 for none
}

// supports are those about an axis besides Base and Top.
func (s *subject) supports(axis int) []support {
	var out []support
	for _, h := range s.m.Holds {
		if h.About(model.Axis(axis)) {
			out = append(out, support{at: h.At, rigid: h.Stiffness == 0, lateral: h.Stiffness})
		}
	}
	for _, e := range []support{
		{at: 0, lateral: s.m.BaseSpring[axis].Lateral, turning: s.m.BaseSpring[axis].Turning},
		{at: s.m.Height, lateral: s.m.TopSpring[axis].Lateral, turning: s.m.TopSpring[axis].Turning},
	} {
		if e.lateral > 0 || e.turning > 0 {
			out = append(out, e)
		}
	}
	return out
}

// springs are the words about the springs of a support.
func (s *subject) springs(p support) []Text {
	var out []Text
	if p.lateral > 0 {
		out = append(out, Text{Words: "spring " + s.show(p.lateral, unit.ForcePerLength), Size: small})
	}
	if p.turning > 0 {
		out = append(out, Text{Words: "spring " + s.show(p.turning, unit.RotationalStiffness), Size: small})
	}
	return out
}

// support draws a support at a side of the member whose half width is w.
func (p *pen) support(s support, x, y, w, side float64) {
	switch {
	case s.rigid:
		p.hold(x+side*w, y, side)
	case s.lateral > 0:
		p.spring(x+side*w, y, side)
	}
	if s.turning > 0 {
		p.coil(x, y)
	}
}
