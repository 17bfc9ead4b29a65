package drawing

import (
	"math"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/action"
	"kern/checker/model"
	"kern/lang/unit"
)

// Elevation draws a member to scale, seen so that it bends in the plane of the
// paper, once about each axis: its ends and holds, levels, dimensions and loads.
// A load or offset that is positive pushes to the left. It is nil where the
// height is not known.
func Elevation(r *checker.Result) *Scene {
	s, ok := about(r)
	if !ok {
		return nil
	}
	e := elevation{subject: s, groups: groupLoads(s.m)}
	for _, p := range s.m.Parts() {
		d := depths(p.Section)
		for a := range d {
			d[a] = min(max(d[a]/2*stature/s.m.Height, 0.7), 5)
			e.half[a] = max(e.half[a], d[a])
		}
		e.parts = append(e.parts, d)
	}
	e.layOut()
	e.levels()
	e.chain()
	for a := range e.at {
		e.view(a)
	}
	if own := r.OwnWeight(); own > 0 {
		words := "own weight " + s.show(own, unit.Force)
		if r.Env().Declared() {
			words += " in " + r.Env().Cases[r.Env().SelfWeight].Name
		}
		e.text(Text{At: Point{1, tallSheet - 1.2}, Size: small, Tone: Quiet, Words: clip(words, small, e.width-2, false)})
	}
	if in := s.m.Imported; in != nil {
		e.text(Text{At: Point{1, tallSheet - 1.2}, Size: small, Tone: Quiet, Words: clip("forces from the table "+in.Table, small, e.width-2, false)})
	}
	return &Scene{Width: e.width, Height: tallSheet, Title: s.title("elevation"), Description: e.describe(), Items: e.items}
}

type elevation struct {
	subject
	pen
	half   [2]float64   // half the greatest width of the member in each view, mm
	parts  [][2]float64 // half the width of each lift
	at     [2]float64   // where the views stand
	room   [2]float64   // for the words behind each
	width  float64      // of the sheet
	groups []loadGroup
	left   []entry // words at the left of the first view
}

const (
	beforeWords = 8.0 // from the member to the words about its loads, mm
	beforeHold  = 5.2 // from the member to the words about what holds it
	holdWords   = 9.8
)

// layOut finds out how much room the words of both views need.
func (e *elevation) layOut() {
	least, most := [2]float64{18, 10}, [2]float64{40, 34}
	for a := range e.room {
		e.room[a] = least[a]
		for _, g := range e.groups {
			if !g.said(a) {
				continue
			}
			for _, t := range e.lines(g, a) {
				e.room[a] = max(e.room[a], Width(t.Words, small, false)+0.1)
			}
		}
		for _, s := range e.supports(a) {
			for _, t := range e.springs(s) {
				e.room[a] = max(e.room[a], Width(t.Words, small, false)+0.1)
			}
		}
		e.room[a] = min(e.room[a], most[a])
	}
	e.at[0] = 39
	e.at[1] = e.at[0] + e.half[0] + beforeWords + e.room[0] + 1 + holdWords + beforeHold + e.half[1]
	e.width = e.at[1] + e.half[1] + beforeWords + e.room[1] + 0.5
}

// loadGroup is what acts alike at one place, in several cases.
type loadGroup struct {
	model.Load
	all []model.Load
}

// groupLoads joins loads that differ in case and value alone.
func groupLoads(m *model.Member) []loadGroup {
	var out []loadGroup
next:
	for _, l := range m.Loads {
		for i := range out {
			g := &out[i]
			if g.Kind == l.Kind && g.Axis == l.Axis && g.Offset == l.Offset && math.Abs(g.At-l.At) <= 1e-6*m.Height && math.Abs(g.To-l.To) <= 1e-6*m.Height {
				g.all = append(g.all, l)
				continue next
			}
		}
		out = append(out, loadGroup{l, []model.Load{l}})
	}
	return out
}

// sign is 1 when the group is drawn in its positive direction, -1 when all of it
// is negative.
func (g loadGroup) sign() float64 {
	for _, l := range g.all {
		if l.Value >= 0 {
			return 1
		}
	}
	return -1
}

// said tells whether a view has words about the group.
func (g loadGroup) said(axis int) bool {
	if g.Kind == model.AxialLoad {
		return axis == 0 || g.Offset[axis] != 0
	}
	return int(g.Axis) == axis
}

// lines are the words about a group in a view: the value of each load, but for
// loads along the member in the first view alone, and their offset.
func (e *elevation) lines(g loadGroup, axis int) []Text {
	dim := map[model.LoadKind]unit.Dim{model.AxialLoad: unit.Force, model.PointLoad: unit.Force, model.LineLoad: unit.ForcePerLength, model.EndMoment: unit.Moment}[g.Kind]
	var out []Text
	for _, l := range g.all {
		if g.Kind == model.AxialLoad && axis == 1 {
			break
		}
		v := l.Value
		if g.sign() < 0 {
			v = -v
		}
		w := e.show(v, dim)
		if e.r.Env().Declared() {
			w += " " + e.r.Env().Cases[l.Case].Name // the value stays where the name is too long
		}
		out = append(out, Text{Words: w, Size: small})
	}
	if off := g.Offset[axis]; off != 0 {
		w := e.show(math.Abs(off), unit.Length) + " off"
		if axis == 0 {
			w = "at " + w
		}
		out = append(out, Text{Words: w, Size: small, Tone: Quiet})
	}
	return out
}

// levels draws the levels that the member stands between, and notes their names.
func (e *elevation) levels() {
	if !e.m.Levels {
		return
	}
	for _, l := range e.r.Env().Levels {
		z := l.At - e.m.From
		if l.Bad || z < -1e-9*e.m.Height || z > e.m.Height*(1+1e-9) {
			continue
		}
		y := e.y(z)
		for _, x := range [][2]float64{{12, e.at[0] + e.half[0] + 3}, {e.at[1] - e.half[1] - 8, e.at[1] + e.half[1] + 3}} {
			e.line(Dashed, x[0], y, x[1], y)
		}
		e.left = append(e.left, entry{want: y - 2.2, lines: []Text{{Words: l.Name, Size: small, Tone: Quiet}}, to: Point{-1, -1}})
	}
}

// chain draws the dimensions: the whole height, and the distances of holds.
func (e *elevation) chain() {
	top, base := e.y(e.m.Height), e.y(0)
	e.upright(4, base, top, e.show(e.m.Height, unit.Length))
	z := []float64{0, e.m.Height}
	for _, h := range e.m.Holds {
		z = append(z, h.At)
	}
	slices.Sort(z)
	z = slices.CompactFunc(z, func(a, b float64) bool { return math.Abs(a-b) <= 1e-6*e.m.Height })
	if len(z) < 3 {
		return
	}
	for i := 0; i+1 < len(z); {
		j := i + 1
		for j+1 < len(z) && math.Abs(z[j+1]-z[j]-(z[i+1]-z[i])) <= 1e-6*e.m.Height {
			j++
		}
		text := e.show(z[i+1]-z[i], unit.Length)
		if n := j - i; n > 2 { // many alike are said once
			text = decimal(n) + " × " + text
			e.upright(9.5, e.y(z[i]), e.y(z[j]), text)
			for _, m := range z[i+1 : j] {
				e.line(Outline, 8.8, e.y(m)+0.7, 10.2, e.y(m)-0.7)
			}
			i = j
			continue
		}
		e.upright(9.5, e.y(z[i]), e.y(z[i+1]), text)
		i++
	}
}

// upright is a dimension line with its words turned upwards, or beside it where
// they are longer than the line.
func (e *elevation) upright(x, from, to float64, text string) {
	e.line(Faint, x, from, x, to)
	for _, y := range []float64{from, to} {
		e.line(Outline, x-0.7, y+0.7, x+0.7, y-0.7)
	}
	t := Text{Words: text, Size: small, Anchor: Middle, Upward: true, At: Point{x - 0.8, (from + to) / 2}}
	if Width(text, small, false) < from-to-1 {
		e.text(t)
		return
	}
	e.left = append(e.left, entry{want: (from + to) / 2, lines: []Text{{Words: text, Size: small}}, to: Point{x, (from + to) / 2}})
}

// view draws the member about an axis.
func (e *elevation) view(axis int) {
	x, w := e.at[axis], e.half[axis]
	top, base := e.y(e.m.Height), e.y(0)
	e.text(Text{At: Point{x, 4}, Words: "about " + model.Axis(axis).String(), Bold: true, Anchor: Middle, Size: normal})
	for i, p := range e.m.Parts() {
		e.rect(Fill, Box{x - e.parts[i][axis], e.y(p.To), x + e.parts[i][axis], e.y(p.From)})
	}
	e.base(e.m.Base[axis], x, base, w)
	e.top(e.m.Top[axis], x, top, w)
	foot := map[action.End]float64{action.Pinned: 8, action.Fixed: 4.6, action.Guided: 7, action.Free: 3.4}[e.m.Base[axis]]
	e.text(Text{At: Point{x, base + foot}, Words: e.m.Base[axis].String(), Size: small, Anchor: Middle})
	near := []entry{{want: top + 3.4, lines: []Text{{Words: e.m.Top[axis].String(), Size: small}}, to: Point{-1, -1}}}
	var right []entry
	for _, s := range e.supports(axis) {
		side := -1.0
		if e.hangs(axis, s.at) {
			side = 1
		}
		e.support(s, x, e.y(s.at), w, side)
		if lines := e.springs(s); len(lines) > 0 {
			right = append(right, entry{want: e.y(s.at), lines: lines, to: Point{x + w + 0.4, e.y(s.at)}})
		}
	}
	for _, h := range e.m.Holds {
		y := e.y(h.At)
		if h.Twist {
			e.rect(Outline, Box{x - w - 0.8, y - 0.9, x + w + 0.8, y + 0.9})
			near = append(near, entry{want: y + 3, lines: []Text{{Words: "twist", Size: small}}, to: Point{-1, -1}})
		}
	}
	edge := x - w - beforeHold
	e.column(near, edge, holdWords, 8, tallSheet-6, End)
	if axis == 0 {
		for _, l := range e.m.Lifts {
			if l.Section == nil { // its line has an error
				continue
			}
			e.left = append(e.left, entry{want: (e.y(l.From) + e.y(l.To)) / 2, lines: []Text{{Words: l.Section.Title(), Size: small}}, to: Point{-1, -1}})
		}
		e.column(e.left, 11.5, edge-holdWords-1-11.5, 8, tallSheet-6, Start)
	}
	for _, g := range e.groups {
		if l, drawn := e.load(g, axis, x, w); drawn && len(l.lines) > 0 {
			right = append(right, l)
		}
	}
	e.column(right, x+w+beforeWords, e.room[axis], 8, tallSheet-6, Start)
}

// hangs tells whether a load hangs at the left of a view near a height.
func (e *elevation) hangs(axis int, z float64) bool {
	for _, g := range e.groups {
		if g.Kind == model.AxialLoad && g.Offset[axis] > 0 && g.At > z-1e-9*e.m.Height && e.y(z)-e.y(g.At) < 11 {
			return true
		}
	}
	return false
}

// load draws a group of loads in a view and gives the words about it.
func (e *elevation) load(g loadGroup, axis int, x, w float64) (entry, bool) {
	y := e.y(g.At)
	switch g.Kind {
	case model.AxialLoad:
		return e.axial(g, axis, x, w), true
	default:
		if int(g.Axis) != axis {
			return entry{}, false
		}
	}
	from, to := Point{x + w + 6.5, y}, Point{x + w + 0.3, y}
	if g.sign() < 0 {
		from, to = to, from
	}
	out := entry{want: y, lines: e.lines(g, axis), to: Point{x + w + 6.5, y}}
	switch g.Kind {
	case model.PointLoad:
		e.arrow(Outline, from, to)
	case model.LineLoad:
		y2 := e.y(g.To)
		e.rect(Bar, Box{x + w + 0.3, y2, x + w + 5.5, y})
		e.line(Outline, x+w+5.5, y, x+w+5.5, y2)
		from.X, to.X = min(from.X, x+w+5.5), min(to.X, x+w+5.5)
		n := max(1, int((y-y2)/7))
		for i := range n + 1 {
			at := y2 + (y-y2)*float64(i)/float64(n)
			e.arrow(Outline, Point{from.X, at}, Point{to.X, at})
		}
		out.want, out.to = (y+y2)/2, Point{x + w + 5.5, (y + y2) / 2}
	case model.EndMoment:
		const r = 4.2
		low, high := Point{x + 0.5*r, y + 0.866*r}, Point{x + 0.5*r, y - 0.866*r}
		e.add(Path{Style: Outline, Steps: []Step{{Kind: Move, To: low}, {Kind: Arc, To: high, Radius: r}}})
		if g.sign() > 0 {
			e.head(Solid, Point{high.X + 0.866, high.Y - 0.2}, high)
		} else {
			e.head(Solid, Point{low.X + 0.866, low.Y + 0.2}, low)
		}
		out.to = Point{x + r, y}
	}
	return out, true
}

// axial draws loads along the member; only the first view says their values.
func (e *elevation) axial(g loadGroup, axis int, x, w float64) entry {
	y := e.y(g.At)
	out := entry{lines: e.lines(g, axis)}
	at := x
	atTop := g.At >= e.m.Height*(1-1e-9)
	if off := g.Offset[axis]; off != 0 {
		at = x - math.Copysign(min(max(math.Abs(off)*stature/e.m.Height, w+1.4), 9), off)
		e.line(Outline, x, y, at, y)
	} else if !atTop {
		at = x + w + 1.6
		e.line(Outline, x+w, y, at, y)
	}
	// loads at one place stand beside each other
	if n := e.before(g, axis); n > 0 {
		at += 2.6 * float64(n)
		e.line(Outline, x, y, at, y)
	}
	lift := 0.0
	if atTop && e.m.Top[axis].String() == "guided" && g.Offset[axis] == 0 {
		lift = 0.4
	}
	from, to := Point{at, y - 9 - lift}, Point{at, y - lift}
	if g.sign() < 0 {
		from, to = to, from
	}
	e.arrow(Outline, from, to)
	out.want, out.to = y-5, Point{at + 0.6, y - 5}
	return out
}

// before is how many groups of loads along the member come before one and are
// drawn at the same place in a view.
func (e *elevation) before(g loadGroup, axis int) int {
	n := 0
	for _, o := range e.groups {
		if o.Kind != model.AxialLoad || math.Abs(o.At-g.At) > 1e-6*e.m.Height || math.Abs(o.Offset[axis]-g.Offset[axis]) > 1e-9 {
			continue
		}
		if o.Offset == g.Offset {
			break
		}
		n++
	}
	return min(n, 2)
}

// describe says in words what the picture shows.
func (e *elevation) describe() string {
	var b strings.Builder
	b.WriteString(e.m.Kind.String() + " of " + e.show(e.m.Height, unit.Length))
	for a, name := range []string{"major", "minor"} {
		b.WriteString("; about " + name + ": base " + e.m.Base[a].String() + ", top " + e.m.Top[a].String())
		for _, s := range e.supports(a) {
			if s.rigid {
				b.WriteString(", held at " + e.show(s.at, unit.Length))
			}
			for _, t := range e.springs(s) {
				b.WriteString(", " + t.Words + " at " + e.show(s.at, unit.Length))
			}
		}
	}
	if e.m.Imported != nil {
		return b.String() + "; its forces come from a table."
	}
	b.WriteString("; " + count(len(e.m.Loads), "load") + ".")
	return b.String()
}
