package drawing

import (
	"math"

	"kern/checker"
	"kern/checker/action"
	"kern/checker/model"
	"kern/lang/unit"
)

// Interaction draws compression against bending: the point of every
// combination, and the line at which the checks of the member's own standard
// reach the limit when the forces along and the moments of the governing
// combination grow in any proportion, the diagrams keeping their form. It is nil
// for a member that is not both compressed and bent.
func Interaction(r *checker.Result) *Scene {
	s, ok := about(r)
	if !ok || s.f == nil {
		return nil
	}
	k := s.combination()
	if k < 0 {
		return nil
	}
	i := interaction{subject: s, combination: k}
	i.force = s.f.Compression(k, 0, s.m.Height)
	for a := range i.moments {
		i.moments[a] = i.moment(a, k)
	}
	if relative(s, i.moments) > 0 {
		i.axis = 1
	}
	if !(i.force > 0) || !(i.moments[i.axis] > 0) {
		return nil
	}
	e, ok := newEnvelope(r, k)
	if !ok {
		return nil
	}
	return i.draw(e)
}

// relative is positive when the minor axis is bent harder for its modulus.
func relative(s subject, m [2]float64) float64 {
	p := s.m.Section.Properties
	if !(p.WelMajor > 0) || !(p.WelMinor > 0) {
		return m[1] - m[0]
	}
	return m[1]/p.WelMinor - m[0]/p.WelMajor
}

type interaction struct {
	subject
	pen
	combination int
	axis        int // that the moments are drawn about
	force       float64
	moments     [2]float64
}

// moment is the greatest first-order moment about an axis, without its sign.
func (i *interaction) moment(axis, combination int) float64 {
	pieces, ok := i.f.Bending(axis, i.r.Combinations()[combination].Factors, nil)
	if !ok {
		return math.NaN()
	}
	return largest(pieces)
}

func largest(pieces []action.Piece) float64 {
	most := 0.0
	for _, p := range pieces {
		m, _ := p.Largest()
		most = max(most, math.Abs(m))
	}
	return most
}

// load is the point of a combination.
type loadPoint struct {
	n, m        float64
	combination int
}

func (i *interaction) draw(e *envelope) *Scene {
	force, moment := i.units.For(unit.Force), i.units.For(unit.Moment)
	var points []loadPoint
	for k := range i.r.Combinations() {
		points = append(points, loadPoint{i.f.Compression(k, 0, i.m.Height), i.moment(i.axis, k), k})
	}
	a := axes{field: Box{14, 9, 92, 69}}
	for _, p := range e.points {
		if p.axial > 0 || p.bending > 0 { // false for NaN
			a.yMost, a.xMost = max(a.yMost, p.axial*i.force), max(a.xMost, p.bending*i.moments[i.axis])
		}
	}
	for _, p := range points {
		if p.m > 0 || p.n > 0 {
			a.yMost, a.xMost = max(a.yMost, p.n), max(a.xMost, p.m)
		}
	}
	a.yMost, a.xMost = 1.08*a.yMost/force.Factor, 1.08*a.xMost/moment.Factor
	at := func(n, m float64) Point { return a.at(m/moment.Factor, n/force.Factor) }
	a.draw(&i.pen, "moment about "+model.Axis(i.axis).String()+", "+moment.Symbol, "compression, "+force.Symbol)

	i.line(e, at)
	governing := at(i.force, i.moments[i.axis])
	i.add(Path{Style: Dashed, Steps: steps([]Point{at(0, 0), governing}, false)})
	drawn := map[Point]bool{}
	round := func(q Point) Point { return Point{math.Round(q.X * 5), math.Round(q.Y * 5)} }
	drawn[round(governing)] = true
	var named []loadPoint
	for _, p := range points {
		q := at(max(p.n, 0), p.m)
		if !math.IsNaN(p.m) && !drawn[round(q)] && p.combination != i.combination {
			drawn[round(q)] = true
			i.circle(Outline, q, 0.7)
			i.taken = append(i.taken, Box{q.X - 0.8, q.Y - 0.8, q.X + 0.8, q.Y + 0.8})
			named = append(named, p)
		}
	}
	i.circle(AccentFill, governing, 1.1)
	i.taken = append(i.taken, Box{governing.X - 1.2, governing.Y - 1.2, governing.X + 1.2, governing.Y + 1.2})
	label := Text{Words: "utilisation " + checker.Ratio(i.r.Utilisation), Size: small, Bold: true, Tone: Loud}
	i.place(a.field, label, beside(governing, 2)...)
	if len(named) <= 6 {
		for _, p := range named {
			i.place(a.field, Text{Words: i.r.Combinations()[p.combination].Name, Size: 2.1, Tone: Quiet}, beside(at(max(p.n, 0), p.m), 1.6)...)
		}
	}
	name := i.r.Combinations()[i.combination].Name
	y := a.field.Bottom + 12
	note := func(words string) {
		i.text(Text{At: Point{1, y}, Words: clip(words, small, 94, false), Size: small, Tone: Quiet})
		y += 3.6
	}
	note("the full point is " + name)
	if len(points) > 1 {
		note("the rings are the other combinations")
	}
	other := 1 - i.axis
	if i.moments[other] > 0 {
		note("the moment about " + model.Axis(other).String() + " grows in proportion, " + unit.Short(i.moments[other]/i.moments[i.axis], 3) + " of this one")
	}
	return &Scene{Width: 96, Height: y - 2, Title: i.title("compression and bending"),
		Description: "The governing combination " + name + " has " + i.show(i.force, unit.Force) + " and " + i.show(i.moments[i.axis], unit.Moment) +
			" about " + model.Axis(i.axis).String() + "; without moments the member carries " + i.show(e.axial*i.force, unit.Force) + ", without compression " + i.show(e.bending*i.moments[i.axis], unit.Moment) + ".",
		Items: i.items}
}

// line draws the envelope, interrupted where the standard cannot decide, and
// writes on it what it is.
func (i *interaction) line(e *envelope, at func(n, m float64) Point) {
	var run []Point
	flush := func() {
		if len(run) > 1 {
			i.polyline(Strong, run...)
			i.mind(run...)
		}
		run = nil
	}
	for _, p := range e.points {
		if math.IsNaN(p.axial) || math.IsNaN(p.bending) {
			flush()
			continue
		}
		run = append(run, at(p.axial*i.force, p.bending*i.moments[i.axis]))
	}
	flush()
	for _, k := range []int{7, 5, 9, 3, 12, 15} {
		p := e.points[k]
		if q := at(p.axial*i.force, p.bending*i.moments[i.axis]); !math.IsNaN(q.X) && !math.IsNaN(q.Y) {
			words := "inside this line all checks pass"
			if e.limit != 1 {
				words = "all checks reach the limit " + checker.Ratio(e.limit) + " here"
			}
			if i.place(Box{14, 9, 92, 69}, Text{Words: words, Size: small}, spot{Point{q.X + 1.5, q.Y - 1}, Start}) {
				return
			}
		}
	}
}

// beside are the places around a point.
func beside(q Point, gap float64) []spot {
	return []spot{
		{Point{q.X + gap, q.Y + 0.9}, Start}, {Point{q.X - gap, q.Y + 0.9}, End},
		{Point{q.X, q.Y - gap}, Middle}, {Point{q.X, q.Y + gap + 2}, Middle},
		{Point{q.X + gap, q.Y - gap}, Start}, {Point{q.X + gap, q.Y + gap + 1.6}, Start},
	}
}
