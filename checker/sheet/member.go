package sheet

import (
	"fmt"
	"math"
	"strings"

	"kern/checker"
	"kern/checker/drawing"
	"kern/checker/output"
	"kern/checker/standard"
)

// member writes the chapter of a member, or of several that are alike.
func (c *composer) member(group []*checker.Result) []output.Block {
	r := group[0]
	title := names(group)
	if r.Title != "" {
		title += ": " + r.Title
	}
	out := []output.Block{output.Heading{Level: 2, Text: title}}
	add := func(lower int, write func(p *output.Page)) { out = append(out, blocks(lower, write)...) }

	line := output.VerdictLine(r).String()
	word := r.Verdict.String()
	out = append(out, Verdict{word, strings.TrimLeft(line[len(word):], ":, ")})
	if len(group) > 1 {
		out = append(out, output.Paragraph{Text: output.Words("These members differ in nothing but their names. The working is written for " + r.Name + ".")})
	}
	// the facts without heading and verdict line, which stand above
	head := blocks(0, func(p *output.Page) { output.MemberHead(p, r) })
	for _, b := range head {
		if l, ok := b.(output.List); ok {
			out = append(out, factsOf(l))
		}
	}
	add(1, func(p *output.Page) { output.Missing(p, r) })
	if figures := pictures(r); len(figures) > 0 {
		out = append(out, figures)
	}
	if len(r.Missing) == 0 {
		add(1, func(p *output.Page) {
			p.Head(2, "Loads")
			output.Loads(p, r)
			output.Takedown(p, r)
		})
		out = append(out, c.forces(r)...)
	}
	if len(r.Checks) > 0 {
		add(1, func(p *output.Page) {
			p.Head(2, "Checks")
			output.Checks(p, r)
		})
	}
	if record := r.Derive(); record != nil {
		add(1, func(p *output.Page) {
			switch {
			case c.options.Full:
				output.AllWorking(p, r, record)
			case r.Governing != "":
				p.Head(2, "Working of the governing check: "+r.Governing)
				output.CheckWorking(p, r, record, r.Governing, 0)
			}
		})
	}
	add(1, func(p *output.Page) {
		output.Coverage(p, r)
		assumptions(p, r)
		output.Departures(p, r)
		output.Notes(p, r)
		output.Holds(p, r)
	})
	return out
}

// greatestMoment is the first-order moment of greatest size about an axis, Nm; NaN
// where the member cannot stand.
func greatestMoment(f *standard.Frame, axis int, factors []float64) float64 {
	pieces, ok := f.Bending(axis, factors, nil)
	if !ok {
		return math.NaN()
	}
	most := 0.0
	for _, p := range pieces {
		if m, _ := p.Largest(); math.Abs(m) > math.Abs(most) {
			most = m
		}
	}
	return most
}

// pictures are those of the member; its section is drawn with the basis.
func pictures(r *checker.Result) Figures {
	var out Figures
	for _, draw := range []func(*checker.Result) *drawing.Scene{drawing.Elevation, drawing.Buckling, drawing.Diagrams, drawing.Interaction, drawing.Bars} {
		if s := draw(r); s != nil {
			out = append(out, s)
		}
	}
	return out
}

// factsOf turns items of the form "name: value" into facts.
func factsOf(l output.List) Facts {
	var out Facts
	for _, x := range l.Items {
		name, value, _ := strings.Cut(x.String(), ": ")
		out = append(out, Fact{name, output.Words(value)})
	}
	return out
}

// assumptions lists what is assumed of a member. What is assumed of the combinations
// stands with the basis, once.
func assumptions(p *output.Page, r *checker.Result) {
	var own []output.Line
	shared := 0
	for _, a := range r.Assumptions {
		if contains(r.Env().Assumed, a) {
			shared++
			continue
		}
		own = append(own, output.Words(a))
	}
	if shared > 0 {
		own = append(own, output.Words(fmt.Sprintf("what the combinations assume: %s, below the combinations of the basis", plural(shared, "line"))))
	}
	if len(own) > 0 {
		p.Head(2, "Assumptions")
		p.List(own...)
	}
}
