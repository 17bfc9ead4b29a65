package drawing

import (
	"math"
	"strings"

	"kern/checker"
	"kern/lang/unit"
)

// Interaction draws compression against bending: the point of every
// combination, and the line at which the checks of the member's own standard
// reach the limit when the forces along and the moments of the governing
// combination grow in any proportion, the diagrams keeping their form. It is nil
// for a member that is not both compressed and bent.
func Interaction(r *checker.Result) *Scene {
	s, ok := about(r)
	if !ok {
		return nil
	}
	data, ok := r.Interaction()
	if !ok {
		return nil
	}
	i := interaction{subject: s, Interaction: data}
	return i.draw()
}

type interaction struct {
	subject
	pen
	*checker.Interaction
}

func (i *interaction) draw() *Scene {
	force, moment := i.units.For(unit.Force), i.units.For(unit.Moment)
	a := axes{field: Box{14, 9, 92, 69}}
	for _, list := range [][]checker.Forces{i.Line(), i.Points} {
		for _, p := range list {
			if p.Moment >= 0 { // false for NaN
				a.yMost, a.xMost = max(a.yMost, p.Compression), max(a.xMost, p.Moment)
			}
		}
	}
	a.yMost, a.xMost = 1.08*a.yMost/force.Factor, 1.08*a.xMost/moment.Factor
	at := func(n, m float64) Point { return a.at(m/moment.Factor, n/force.Factor) }
	a.draw(&i.pen, "moment about "+i.Axis.String()+", "+moment.Symbol, "compression, "+force.Symbol)

	i.line(at)
	governing := at(i.Force, i.Moments[i.Axis])
	i.polyline(Dashed, at(0, 0), governing)
	i.mind(at(0, 0), governing)
	drawn := map[Point]bool{}
	round := func(q Point) Point { return Point{math.Round(q.X * 5), math.Round(q.Y * 5)} }
	drawn[round(governing)] = true
	var named []int
	for k, p := range i.Points {
		q := at(max(p.Compression, 0), p.Moment)
		if !math.IsNaN(p.Moment) && !drawn[round(q)] && k != i.Combination {
			drawn[round(q)] = true
			i.circle(Outline, q, 0.7)
			i.taken = append(i.taken, Box{q.X - 0.8, q.Y - 0.8, q.X + 0.8, q.Y + 0.8})
			named = append(named, k)
		}
	}
	i.circle(AccentFill, governing, 1.1)
	i.taken = append(i.taken, Box{governing.X - 1.2, governing.Y - 1.2, governing.X + 1.2, governing.Y + 1.2})
	label := Text{Words: "utilisation " + checker.Ratio(i.r.Utilisation), Size: small, Bold: true, Tone: Loud}
	i.place(a.field, label, beside(governing, 2)...)
	if len(named) <= 6 {
		for _, k := range named {
			i.place(a.field, Text{Words: i.r.Combinations()[k].Name, Size: 2.1, Tone: Quiet}, beside(at(max(i.Points[k].Compression, 0), i.Points[k].Moment), 1.6)...)
		}
	}
	name := i.r.Combinations()[i.Combination].Name
	y := a.field.Bottom + 12
	note := func(words string) {
		i.text(Text{At: Point{1, y}, Words: clip(words, small, 94, false), Size: small, Tone: Quiet})
		y += 3.6
	}
	note("the full point is " + name)
	if len(i.Points) > 1 {
		note("the rings are the other combinations")
	}
	if len(i.Undecided) > 0 {
		var list []string
		for _, u := range i.Undecided {
			list = append(list, words(u))
		}
		for _, line := range wrap("undecided: "+strings.Join(list, ", "), small, 94) {
			note(line)
		}
	}
	other := 1 - i.Axis
	if i.Moments[other] > 0 {
		note("the moment about " + other.String() + " grows with it, " + unit.Short(i.Moments[other]/i.Moments[i.Axis], 3) + " times as large")
	}
	return &Scene{Width: 96, Height: y - 2, Title: i.title("compression and bending"),
		Description: "The governing combination " + name + " has " + i.show(i.Force, unit.Force) + " and " + i.show(i.Moments[i.Axis], unit.Moment) +
			" about " + i.Axis.String() + "; without moments the member carries " + i.show(i.Envelope.Axial*i.Force, unit.Force) + ", without compression " + i.show(i.Envelope.Bending*i.Moments[i.Axis], unit.Moment) + "." + i.open(),
		Items: i.items}
}

// line draws the envelope, interrupted where the standard cannot decide, and
// writes on it what it is.
func (i *interaction) line(at func(n, m float64) Point) {
	style, words := Strong, "inside this line all checks pass"
	if l := i.Envelope.Limit; l != 1 {
		words = "all checks reach the limit " + checker.Ratio(l) + " here"
	}
	if len(i.Undecided) > 0 { // what is not decided is no pass
		style, words = Dashed, "inside this line the other checks pass"
	}
	var run []Point
	flush := func() {
		if len(run) > 1 {
			i.polyline(style, run...)
			i.mind(run...)
		}
		run = nil
	}
	line := i.Line()
	for _, p := range line {
		if math.IsNaN(p.Compression) || math.IsNaN(p.Moment) {
			flush()
			continue
		}
		run = append(run, at(p.Compression, p.Moment))
	}
	flush()
	var spots []spot
	for _, k := range []int{7, 5, 9, 3, 12, 15} {
		if q := at(line[k].Compression, line[k].Moment); !math.IsNaN(q.X) && !math.IsNaN(q.Y) {
			spots = append(spots, spot{Point{q.X + 1.5, q.Y - 1}, Start})
		}
	}
	i.place(Box{14, 9, 92, 69}, Text{Words: words, Size: small}, spots...)
}

// open says what is undecided.
func (i *interaction) open() string {
	if len(i.Undecided) == 0 {
		return ""
	}
	return " Left out, as it is undecided: " + words(strings.Join(i.Undecided, ", ")) + "."
}

// beside are the places around a point.
func beside(q Point, gap float64) []spot {
	return []spot{
		{Point{q.X + gap, q.Y + 0.9}, Start}, {Point{q.X - gap, q.Y + 0.9}, End},
		{Point{q.X, q.Y - gap}, Middle}, {Point{q.X, q.Y + gap + 2}, Middle},
		{Point{q.X + gap, q.Y - gap}, Start}, {Point{q.X + gap, q.Y + gap + 1.6}, Start},
		{Point{q.X - gap, q.Y - gap}, End}, {Point{q.X - gap, q.Y + gap + 1.6}, End},
		{Point{q.X, q.Y + gap + 6}, Start}, {Point{q.X, q.Y - gap - 4}, Start},
	}
}
