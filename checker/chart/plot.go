package chart

import (
	"fmt"
	"math"
	"strings"
	"unicode/utf8"

	"kern/checker/drawing"
)

// The signs of a plot of characters: plain ones, which every terminal has.
const (
	mainSign  = '*'
	limitSign = '-'
	markSign  = 'o'
	nowSign   = 'O'
)

// lineSigns are those of the lines that do not decide.
const lineSigns = "abcdefghijklmnop"

// Text writes the chart for a terminal of a width and height in characters: what
// was found in sentences, a plot, and some of the values in a table. Who cannot
// see the plot has the sentences and the table.
func (c *Chart) Text(width, height int) string {
	width, height = max(width, 40), max(height, 8)
	var b strings.Builder
	b.WriteString(c.Title + "\n\n")
	for _, n := range c.Notes {
		b.WriteString(fold(n, width) + "\n")
	}
	b.WriteString("\n" + c.plot(width, height) + "\n" + c.values())
	return b.String()
}

// plot draws the lines with characters.
func (c *Chart) plot(width, height int) string {
	left := 0
	scale := make([]string, height)
	for _, v := range ticks(0, c.Y.Most, 5) {
		label := short(v)
		scale[height-1-int(math.Round(v/c.Y.Most*float64(height-1)))] = label
		left = max(left, len(label))
	}
	columns := max(width-left-3, 20)
	grid := make([][]rune, height)
	for i := range grid {
		grid[i] = []rune(strings.Repeat(" ", columns))
	}
	set := func(x, y float64, sign rune) {
		if !known(x, y) {
			return
		}
		column := int(math.Round((x - c.X.Least) / (c.X.Most - c.X.Least) * float64(columns-1)))
		row := height - 1 - int(math.Round(y/c.Y.Most*float64(height-1)))
		if column >= 0 && column < columns && row >= 0 && row < height {
			grid[row][column] = sign
		}
	}
	trace := func(l Line, sign rune) {
		for i := range l.X {
			set(l.X[i], l.Y[i], sign)
			if i == 0 || !known(l.X[i-1], l.Y[i-1]) || !known(l.X[i], l.Y[i]) {
				continue
			}
			const steps = 24 // between points, so that the line has no holes
			for s := 1; s < steps; s++ {
				t := float64(s) / steps
				set(l.X[i-1]+t*(l.X[i]-l.X[i-1]), l.Y[i-1]+t*(l.Y[i]-l.Y[i-1]), sign)
			}
		}
	}
	var legend []string
	if c.Limit > 0 {
		for i := range columns {
			set(c.X.Least+(c.X.Most-c.X.Least)*float64(i)/float64(columns-1), c.Limit, limitSign)
		}
		legend = append(legend, string(limitSign)+" limit")
	}
	n := 0
	for _, l := range c.Lines {
		if !l.Main {
			sign := rune(lineSigns[min(n, len(lineSigns)-1)])
			trace(l, sign)
			legend = append(legend, string(sign)+" "+l.Name)
			n++
		}
	}
	for _, l := range c.Lines {
		if l.Main {
			trace(l, mainSign)
			legend = append([]string{string(mainSign) + " " + l.Name}, legend...)
		}
	}
	others := 0
	for _, m := range c.Marks {
		if !m.Main {
			set(m.X, m.Y, markSign)
			others++
		}
	}
	for _, m := range c.Marks {
		if m.Main {
			set(m.X, m.Y, nowSign)
			legend = append(legend, string(nowSign)+" "+m.Name)
		}
	}
	if others > 0 {
		legend = append(legend, string(markSign)+" the other combinations")
	}
	var b strings.Builder
	b.WriteString(c.Y.words() + "\n")
	for i, row := range grid {
		edge := "|"
		if scale[i] != "" {
			edge = "+"
		}
		b.WriteString(strings.TrimRight(fmt.Sprintf("%*s %s%s", left, scale[i], edge, string(row)), " ") + "\n")
	}
	b.WriteString(strings.Repeat(" ", left+1) + "+" + strings.Repeat("-", columns) + "\n")
	b.WriteString(strings.TrimRight(c.below(left+2, columns), " ") + "\n")
	name := c.X.words()
	b.WriteString(strings.Repeat(" ", max(left+2+columns-utf8.RuneCountInString(name), 0)) + name + "\n")
	b.WriteString(fold(strings.Join(legend, ", "), width) + "\n")
	return b.String()
}

// values are some points of the main line as a table.
func (c *Chart) values() string {
	var l Line
	for _, m := range c.Lines {
		if m.Main {
			l = m
		}
	}
	if len(l.X) == 0 {
		return ""
	}
	const rows = 9
	var x, y []string
	for i := range rows {
		at := i * (len(l.X) - 1) / (rows - 1)
		if i > 0 && at == (i-1)*(len(l.X)-1)/(rows-1) {
			continue
		}
		x, y = append(x, short(l.X[at])), append(y, short(l.Y[at]))
	}
	var b strings.Builder
	first, second := c.X.words(), c.Y.words()
	w := max(utf8.RuneCountInString(first), 8)
	fmt.Fprintf(&b, "%*s  %s\n", w, first, second)
	for i := range x {
		fmt.Fprintf(&b, "%*s  %s\n", w, x[i], y[i])
	}
	return b.String()
}

// below is the line of numbers below the plot, each under its place.
func (c *Chart) below(left, columns int) string {
	line := []rune(strings.Repeat(" ", left+columns+12))
	end := 0
	for _, v := range ticks(c.X.Least, c.X.Most, 6) {
		label := []rune(short(v))
		at := left + int(math.Round((v-c.X.Least)/(c.X.Most-c.X.Least)*float64(columns-1))) - (len(label)-1)/2
		if at < end {
			continue
		}
		copy(line[at:], label)
		end = at + len(label) + 1
	}
	return string(line)
}

// ticks are round numbers from low to high, about n of them.
func ticks(low, high float64, n int) []float64 { return drawing.Ticks(low, high, n) }

// fold breaks words into lines of a width in characters.
func fold(words string, width int) string {
	var b strings.Builder
	n := 0
	for word := range strings.FieldsSeq(words) {
		k := utf8.RuneCountInString(word)
		switch {
		case n == 0:
		case n+1+k > width:
			b.WriteByte('\n')
			n = 0
		default:
			b.WriteByte(' ')
			n++
		}
		b.WriteString(word)
		n += k
	}
	return b.String()
}
