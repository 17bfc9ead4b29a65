package drawing

import (
	"math"
	"strings"

	"kern/checker"
	"kern/lang/unit"
)

// Graph is lines over one quantity, to be drawn as a picture.
type Graph struct {
	Title, Description string
	XName, YName       string // with their units
	XLeast, XMost      float64
	YMost              float64 // Y begins at 0; what is above is cut off
	Limit              float64 // a level line, 0 for none
	Lines              []GraphLine
	Marks              []GraphMark
	Notes              []string // beneath
}

// GraphLine is a line of a graph; NaN interrupts it.
type GraphLine struct {
	Name string
	X, Y []float64
	Main bool // drawn thick
}

// GraphMark is a point of its own.
type GraphMark struct {
	Name string
	X, Y float64
	Main bool
}

// Scene draws the graph, 140 mm wide. The name of a line stands on it.
func (g Graph) Scene() *Scene {
	var p pen
	a := axes{field: Box{14, 16, 136, 90}, xLeast: g.XLeast, xMost: g.XMost, yMost: g.YMost}
	a.draw(&p, g.XName, g.YName)
	p.text(Text{At: Point{1, 4.6}, Words: clip(g.Title, normal, 138, true), Bold: true, Size: normal})
	from, to := a.at(g.XLeast, g.Limit), a.at(g.XMost, g.Limit)
	limited := g.Limit > 0 && g.Limit < g.YMost
	if limited {
		p.polyline(Dashed, from, to)
		p.mind(from, to)
	}
	var runs [][][]Point
	for _, main := range []bool{false, true} {
		for _, l := range g.Lines {
			if l.Main != main {
				continue
			}
			style := Outline
			if main {
				style = Strong
			}
			r := a.runs(l)
			for _, pts := range r {
				p.polyline(style, pts...)
				p.mind(pts...)
			}
			runs = append(runs, r)
		}
	}
	var marks []GraphMark
	for _, m := range g.Marks {
		if math.IsNaN(m.X) || math.IsNaN(m.Y) || m.X < g.XLeast || m.X > g.XMost || m.Y < 0 || m.Y > g.YMost {
			continue
		}
		q := a.at(m.X, m.Y)
		if m.Main {
			p.line(Dashed, q.X, q.Y, q.X, a.field.Bottom)
			p.mind(Point{q.X, q.Y + 1.2}, Point{q.X, a.field.Bottom})
			p.circle(AccentFill, q, 1.1)
		} else {
			p.circle(Outline, q, 0.7)
		}
		p.taken = append(p.taken, Box{q.X - 1.2, q.Y - 1.2, q.X + 1.2, q.Y + 1.2})
		marks = append(marks, m)
	}
	for _, m := range marks {
		t := Text{Words: m.Name, Size: small}
		if m.Main {
			t.Bold, t.Tone = true, Loud
		}
		p.place(a.field, t, beside(a.at(m.X, m.Y), 2)...)
	}
	if limited {
		p.place(a.field, Text{Words: "limit " + checker.Ratio(g.Limit), Size: small}, spot{Point{to.X - 0.5, to.Y - 1}, End}, spot{Point{from.X + 1, from.Y - 1}, Start}, spot{Point{to.X - 0.5, to.Y + 3.2}, End}, spot{Point{from.X + 1, from.Y + 3.2}, Start})
	}
	i := 0
	for _, main := range []bool{false, true} {
		for _, l := range g.Lines {
			if l.Main == main {
				p.nameLine(a.field, l.Name, main, runs[i])
				i++
			}
		}
	}
	y := a.field.Bottom + 12
	for _, n := range g.Notes {
		for _, line := range wrap(n, small, 134) {
			p.text(Text{At: Point{1, y}, Words: line, Size: small, Tone: Quiet})
			y += 3.6
		}
	}
	return &Scene{Width: 140, Height: y - 2, Title: g.Title, Description: g.Description, Items: p.items}
}

// runs are the parts of a line that can be seen, cut at the upper edge.
func (a axes) runs(l GraphLine) [][]Point {
	var out [][]Point
	var run []Point
	flush := func() {
		if len(run) > 1 {
			out = append(out, run)
		}
		run = nil
	}
	inside := func(i int) bool {
		return i >= 0 && i < len(l.X) && l.Y[i] >= 0 && l.Y[i] <= a.yMost && l.X[i] >= a.xLeast-1e-12 && l.X[i] <= a.xMost*(1+1e-12)
	}
	edge := func(i, j int) (Point, bool) { // where the line from i to j leaves above
		if math.IsNaN(l.Y[j]) || math.IsInf(l.Y[j], 0) || l.Y[j] <= a.yMost || l.Y[i] == l.Y[j] {
			return Point{}, false
		}
		t := (a.yMost - l.Y[i]) / (l.Y[j] - l.Y[i])
		return a.at(l.X[i]+t*(l.X[j]-l.X[i]), a.yMost), true
	}
	for i := range l.X {
		if !inside(i) {
			flush()
			continue
		}
		if !inside(i-1) && i > 0 {
			if q, ok := edge(i, i-1); ok {
				run = append(run, q)
			}
		}
		run = append(run, a.at(l.X[i], l.Y[i]))
		if !inside(i+1) && i+1 < len(l.X) {
			if q, ok := edge(i, i+1); ok {
				run = append(run, q)
			}
		}
	}
	flush()
	return out
}

// nameLine writes the name of a line on it, where there is room.
func (p *pen) nameLine(field Box, name string, main bool, runs [][]Point) {
	t := Text{Words: name, Size: small, Bold: main}
	var spots []spot
	for _, run := range runs {
		n := len(run)
		for _, part := range []float64{0.8, 0.6, 0.9, 0.4, 0.7, 0.5, 0.3, 0.95, 0.2, 0.1, 0.05} {
			q := run[min(int(part*float64(n)), n-1)]
			spots = append(spots, spot{Point{q.X + 1, q.Y - 1.2}, Start}, spot{Point{q.X - 1, q.Y - 1.2}, End}, spot{Point{q.X - 1, q.Y + 3.2}, End}, spot{Point{q.X + 1, q.Y + 3.2}, Start})
		}
	}
	p.place(field, t, spots...)
}

// wrap breaks words into lines of a width, mm.
func wrap(words string, size, width float64) []string {
	var out []string
	line := ""
	for word := range strings.FieldsSeq(words) {
		switch {
		case line == "":
			line = word
		case Width(line+" "+word, size, false) <= width:
			line += " " + word
		default:
			out = append(out, line)
			line = word
		}
	}
	out = append(out, line)
	for i := range out {
		out[i] = clip(out[i], size, width, false)
	}
	return out
}

// tick writes a number of a scale.
func tick(v float64) string { return unit.Short(v, 4) }
