package drawing

import (
	"math"
	"strings"

	"kern/checker"
	"kern/lang/unit"
)

// Diagrams draws the axial force and, about each axis that is bent, moments and
// shear of the combination that governs, first order, over the height. Moments
// stand on the side that is in tension. It is nil for a member without forces.
func Diagrams(r *checker.Result) *Scene {
	s, ok := about(r)
	if !ok || s.f == nil {
		return nil
	}
	k := s.combination()
	if k < 0 {
		return nil
	}
	d := diagrams{subject: s, combination: k}
	list := d.list()
	if len(list) == 0 {
		return nil
	}
	var said []string
	for i, g := range list {
		d.draw(g, 17+34*float64(i))
		said = append(said, g.name+" up to "+d.show(g.greatest(), g.dim))
	}
	width := max(34*float64(len(list)), 60)
	sheet := d.y(0) + 10
	d.text(Text{At: Point{1, sheet - 1.2}, Words: clip("under "+r.Combinations()[k].Name, small, width-2, false), Size: small, Tone: Quiet})
	return &Scene{Width: width, Height: sheet, Title: s.title("axial force, moments and shear"),
		Description: "Under " + r.Combinations()[k].Name + ": " + strings.Join(said, "; ") + ".", Items: d.items}
}

type diagrams struct {
	subject
	pen
	combination int
}

// y is the place of a height on a sheet that has no loads above the top.
func (d *diagrams) y(z float64) float64 { return d.subject.y(z) - headroom + 14 }

// diagram is a quantity over the height: it may jump where two values stand at
// one height.
type diagram struct {
	name  string
	dim   unit.Dim
	z, v  []float64
	signs bool   // the sign is said
	note  string // behind the unit
}

// greatest is the value of greatest size.
func (g *diagram) greatest() float64 {
	best := 0.0
	for _, v := range g.v {
		if math.Abs(v) > math.Abs(best) {
			best = v
		}
	}
	return best
}

// list works out the diagrams that are not zero throughout.
func (d *diagrams) list() []diagram {
	n := diagram{name: "axial force", dim: unit.Force, signs: true, note: ", compression +"}
	cuts := d.f.Heights()
	for i := range len(cuts) - 1 {
		bottom, top := d.f.Between(d.combination, cuts[i], cuts[i+1])
		n.z, n.v = append(n.z, cuts[i], cuts[i+1]), append(n.v, bottom, top)
	}
	out := []diagram{n}
	for a, name := range []string{"major", "minor"} {
		pieces, ok := d.f.Bending(a, d.r.Combinations()[d.combination].Factors, nil)
		if !ok || len(pieces) == 0 {
			continue
		}
		m, v := diagram{name: "moment, " + name, dim: unit.Moment}, diagram{name: "shear, " + name, dim: unit.Force}
		for _, p := range pieces {
			l := p.To - p.From
			parts := 1
			if p.Line != 0 {
				parts = 24
			}
			at := func(x float64) {
				m.z, m.v = append(m.z, p.From+x), append(m.v, p.Moment(x))
				v.z, v.v = append(v.z, p.From+x), append(v.v, p.Shear(x))
			}
			for i := range parts + 1 {
				x := l * float64(i) / float64(parts)
				// the top of a parabola lies between the points
				if _, z := p.Largest(); i > 0 && z-p.From > l*float64(i-1)/float64(parts) && z-p.From < x*(1-1e-9) && z > p.From && z < p.To {
					at(z - p.From)
				}
				at(x)
			}
		}
		out = append(out, m, v)
	}
	kept := out[:0]
	for _, g := range out {
		if v := g.greatest(); math.Abs(v) > 1e-6 && !math.IsInf(v, 0) {
			kept = append(kept, g)
		}
	}
	return kept
}

// draw draws a diagram about an upright line at x.
func (d *diagrams) draw(g diagram, x float64) {
	const reach = 17.0 // of the whole diagram
	top, base := d.y(d.m.Height), d.y(0)
	most := g.greatest()
	low, high := 0.0, 0.0
	for _, v := range g.v {
		low, high = min(low, v), max(high, v)
	}
	scale := reach / (high - low)
	u := d.units.For(g.dim)
	d.text(Text{At: Point{x, 4}, Words: g.name, Bold: true, Anchor: Middle, Size: normal})
	d.text(Text{At: Point{x, 7.4}, Words: u.Symbol + g.note, Anchor: Middle, Size: small, Tone: Quiet})
	room := Box{x - 16.9, 8.4, x + 16.9, base + 6}
	x -= (low + high) / 2 * scale // the diagram stands in the middle of its room
	at := func(i int) Point { return Point{x + g.v[i]*scale, d.y(g.z[i])} }
	pts := []Point{{x, base}}
	for i := range g.z {
		pts = append(pts, at(i))
	}
	d.polygon(AccentPale, append(pts, Point{x, top})...)
	d.polyline(Outline, append(pts, Point{x, top})...)
	d.line(Strong, x, top, x, base)
	d.mind(append(pts, Point{x, top}, Point{x, base})...)
	for _, i := range g.marked() {
		p := at(i)
		v := g.v[i]
		if !g.signs {
			v = math.Abs(v)
		}
		t := Text{Words: unit.Short(v/u.Factor, 4), Size: small}
		if g.v[i] == most {
			t.Bold = true
			d.circle(AccentFill, p, 0.7)
		}
		side, other := spot{Point{p.X + 1.2, p.Y + 0.9}, Start}, spot{Point{p.X - 1.2, p.Y + 0.9}, End}
		if p.X < x {
			side, other = other, side
		}
		// above and below the point where the sides are full
		over, under := spot{Point{p.X, p.Y - 1.4}, Middle}, spot{Point{p.X, p.Y + 3.3}, Middle}
		half := Width(t.Words, small, t.Bold) / 2
		for _, s := range []*spot{&over, &under} {
			s.at.X = min(max(s.at.X, room.Left+half+0.1), room.Right-half-0.1)
		}
		spots := []spot{side, other, over, under}
		switch {
		case g.z[i] <= 1e-9*d.m.Height:
			spots = []spot{under, side, other}
		case g.z[i] >= d.m.Height*(1-1e-9):
			spots = []spot{over, side, other}
		}
		d.place(room, t, spots...)
	}
}

// marked are the points that have their value written: the greatest, the ends,
// and those where the diagram turns or jumps, the large ones first.
func (g *diagram) marked() []int {
	most := math.Abs(g.greatest())
	n := len(g.v)
	taken := make([]bool, n)
	var out []int
	add := func(i int) {
		if taken[i] || math.Abs(g.v[i]) < 0.02*most {
			return
		}
		for _, j := range out { // said already
			if math.Abs(g.v[i]-g.v[j]) < 0.015*most {
				return
			}
		}
		taken[i] = true
		out = append(out, i)
	}
	for i := range n {
		if math.Abs(g.v[i]) == most {
			add(i)
			break
		}
	}
	add(0)
	add(n - 1)
	for i := 1; i+1 < n; i++ {
		d1, d2 := g.v[i]-g.v[i-1], g.v[i+1]-g.v[i]
		if d1*d2 < 0 || g.z[i] == g.z[i-1] && math.Abs(d1) > 1e-6*most || g.z[i] == g.z[i+1] && math.Abs(d2) > 1e-6*most {
			add(i)
		}
	}
	if len(out) > 10 {
		out = out[:10]
	}
	return out
}
