package chart

import (
	"math"
)

// Chart is lines over one quantity.
type Chart struct {
	Title string
	X, Y  Scale
	Lines []Line
	Marks []Mark
	Limit float64  // a level line at this height; 0 for none
	Notes []string // sentences that say what was found and what was assumed
}

// Scale is what is measured along a side.
type Scale struct {
	Name, Unit  string
	Least, Most float64 // the part that is shown
}

// words are the name with its unit.
func (s Scale) words() string {
	if s.Unit == "" {
		return s.Name
	}
	return s.Name + ", " + s.Unit
}

// Line is one line of a chart. All lines of a chart have their points at the same
// X, but for those of an Outline; Y is NaN where nothing is known.
type Line struct {
	Name string
	X, Y []float64
	// Main is the line that decides, which is drawn thick.
	Main bool
}

// Mark is a point of its own: the member as it is, or a combination.
type Mark struct {
	Name string
	X, Y float64
	Main bool
}

// known tells whether a point can be drawn.
func known(x, y float64) bool {
	return !math.IsNaN(x) && !math.IsNaN(y) && !math.IsInf(x, 0) && !math.IsInf(y, 0)
}

// fit sets what is shown to the main line and the marks, with some room above,
// and at least to a height.
func (c *Chart) fit(atLeast float64) {
	c.Y.Most = atLeast
	for _, l := range c.Lines {
		if len(l.X) == 0 {
			continue
		}
		for i, x := range l.X {
			if known(x, l.Y[i]) && l.Main {
				c.Y.Most = max(c.Y.Most, l.Y[i])
			}
		}
	}
	for _, m := range c.Marks {
		if known(m.X, m.Y) {
			c.Y.Most = max(c.Y.Most, m.Y)
		}
	}
	c.Y.Most *= 1.08
}

// lowest is the least of the lines at every point, of those that are known.
func lowest(lines []Line) Line {
	out := Line{Main: true, X: lines[0].X, Y: make([]float64, len(lines[0].X))}
	for i := range out.X {
		best := lines[0].Y[i]
		for _, l := range lines[1:] {
			if math.IsNaN(best) || l.Y[i] < best {
				best = l.Y[i]
			}
		}
		out.Y[i] = best
	}
	return out
}
