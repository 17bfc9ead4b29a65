package chart

import (
	"fmt"
	"strings"

	"kern/checker"
	"kern/lang/unit"
)

// Interaction is compression against bending: the line at which the member's own
// standard reaches the limit, and the points of all combinations.
func Interaction(r *checker.Result) (*Chart, error) {
	if len(r.Missing) > 0 {
		return nil, fmt.Errorf("%s has no result: %s", r.Name, r.Missing[0])
	}
	i, ok := r.Interaction()
	if !ok {
		return nil, fmt.Errorf("%s has no interaction to show: its deciding combination does not both compress and bend it, or a check of it is undecided", r.Name)
	}
	units := r.Units()
	force, moment := units.For(unit.Force), units.For(unit.Moment)
	c := &Chart{Title: r.Member.Kind.String() + " " + r.Name + ": compression and bending by " + r.Standard,
		X: Scale{Name: "moment about " + i.Axis.String(), Unit: moment.Symbol}, Y: Scale{Name: "compression", Unit: force.Symbol}}
	line := Line{Name: "limit", Main: true}
	for _, p := range i.Line() {
		line.X, line.Y = append(line.X, p.Moment/moment.Factor), append(line.Y, p.Compression/force.Factor)
	}
	c.Lines = []Line{line}
	for k, p := range i.Points {
		c.Marks = append(c.Marks, Mark{Name: r.Combinations()[k].Name, X: p.Moment / moment.Factor, Y: p.Compression / force.Factor, Main: k == i.Combination})
	}
	c.fit(0)
	for _, x := range append(append([]float64{}, line.X...), marksX(c.Marks)...) {
		if x > c.X.Most {
			c.X.Most = x
		}
	}
	c.X.Most *= 1.08
	c.Notes = []string{
		fmt.Sprintf("Without moments: %s of compression; without compression: %s.", units.Show(i.Envelope.Axial*i.Force, unit.Force, 4), units.Show(i.Envelope.Bending*i.Moments[i.Axis], unit.Moment, 4)),
		fmt.Sprintf("%s has %s and %s: utilisation %s, by %s.", r.Combinations()[i.Combination].Name, units.Show(i.Force, unit.Force, 4), units.Show(i.Moments[i.Axis], unit.Moment, 4), checker.Ratio(r.Utilisation), words(r.Governing)),
		"The line is for the moment diagrams of this combination; the points of others lie beside it for comparison.",
	}
	if len(i.Undecided) > 0 {
		c.Lines[0].Name = "limit of the checks that are decided"
		c.Notes = append(c.Notes, "Undecided, and left out of the line: "+words(strings.Join(i.Undecided, ", "))+".")
	}
	if other := 1 - i.Axis; i.Moments[other] > 0 {
		c.Notes = append(c.Notes, fmt.Sprintf("The moment about %s grows with it, %s times as large.", other.String(), unit.Short(i.Moments[other]/i.Moments[i.Axis], 3)))
	}
	return c, nil
}

func marksX(marks []Mark) []float64 {
	var out []float64
	for _, m := range marks {
		out = append(out, m.X)
	}
	return out
}
