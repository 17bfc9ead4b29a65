package chart

import (
	"strings"

	"kern/checker/drawing"
)

// Scene draws the chart.
func (c *Chart) Scene() *drawing.Scene {
	g := drawing.Graph{Title: c.Title, Description: strings.Join(c.Notes, " "), XName: c.X.words(), YName: c.Y.words(), XLeast: c.X.Least, XMost: c.X.Most, YMost: c.Y.Most, Limit: c.Limit, Notes: c.Notes}
	for _, l := range c.Lines {
		g.Lines = append(g.Lines, drawing.GraphLine(l))
	}
	for _, m := range c.Marks {
		g.Marks = append(g.Marks, drawing.GraphMark(m))
	}
	return g.Scene()
}
