package chart

import (
	"encoding/csv"
	"io"
	"strconv"
)

// CSV writes the points as comma-separated values under a row of names. Lines
// that share their X stand side by side, a row for each; else every point has a
// row with the name of its line or mark. A value that is not known is empty.
func (c *Chart) CSV(w io.Writer) error {
	out := csv.NewWriter(w)
	rows := c.tall()
	if c.shared() {
		rows = c.wide()
	}
	return out.WriteAll(rows)
}

// shared tells whether all lines have their points at the same X.
func (c *Chart) shared() bool {
	if len(c.Lines) < 2 {
		return false
	}
	for _, l := range c.Lines {
		if &l.X[0] != &c.Lines[0].X[0] {
			return false
		}
	}
	return true
}

func (c *Chart) wide() [][]string {
	head := []string{c.X.words()}
	for _, l := range c.Lines {
		name := l.Name
		if c.Y.Unit != "" {
			name += ", " + c.Y.Unit
		}
		head = append(head, name)
	}
	rows := [][]string{head}
	for i, x := range c.Lines[0].X {
		row := []string{digits(x)}
		for _, l := range c.Lines {
			row = append(row, digits(l.Y[i]))
		}
		rows = append(rows, row)
	}
	return rows
}

func (c *Chart) tall() [][]string {
	rows := [][]string{{"of", c.X.words(), c.Y.words()}}
	for _, l := range c.Lines {
		for i, x := range l.X {
			rows = append(rows, []string{l.Name, digits(x), digits(l.Y[i])})
		}
	}
	for _, m := range c.Marks {
		rows = append(rows, []string{m.Name, digits(m.X), digits(m.Y)})
	}
	return rows
}

// digits writes a value so that a program reads it back to nine digits; "" for
// one that is not known.
func digits(v float64) string {
	if !known(v, v) {
		return ""
	}
	return strconv.FormatFloat(v, 'g', 9, 64)
}
