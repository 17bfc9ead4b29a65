package sheet

import (
	"kern/checker/output"
)

// grid is a table on paper: its columns with what they need.
type grid struct {
	table   output.Table
	cells   look
	columns []gridColumn
	gap     float64
}

// gridColumn is a column on paper. A column of numbers has fixed parts: before the
// point, from the point on, and the unit.
type gridColumn struct {
	number                bool
	whole, decimals, unit float64
	least, most, width    float64
}

func newGrid(t output.Table, cells look) *grid {
	g := &grid{table: t, cells: cells, gap: 9, columns: make([]gridColumn, len(t.Head))}
	heads := look{size: cells.size, leading: cells.leading, ink: quiet}
	for i, h := range t.Head {
		c := &g.columns[i]
		c.number = t.Align[i] == 'n'
		for _, row := range t.Rows {
			if i >= len(row) {
				continue
			}
			if c.number {
				q := quantityOf(row[i].String())
				if q.numeric {
					c.whole = max(c.whole, regular.width(q.whole)*cells.size)
					c.decimals = max(c.decimals, regular.width(q.decimals)*cells.size)
					c.unit = max(c.unit, raisedWords(regular, cells.size, raisedUnit(q.unit)).width)
					continue
				}
			}
			whole, part := cells.natural(row[i])
			c.most, c.least = max(c.most, whole), max(c.least, part)
		}
		if c.number {
			w := c.whole + c.decimals
			if c.unit > 0 {
				w += c.unit + 2.6
			}
			c.least, c.most = max(c.least, w), max(c.most, w)
		}
		whole, part := heads.natural(headLine(h))
		c.least = max(c.least, min(part, 60))
		c.most = max(c.most, min(whole, max(c.most, 60)))
	}
	return g
}

// headLine is the head of a column as words: a symbol as formulas set it.
func headLine(h string) output.Line {
	if headSymbol.MatchString(h) {
		return output.Code(h)
	}
	return output.Words(h)
}

// share gives each column its width; false where the table is too wide.
func (g *grid) share(width float64) bool {
	width -= g.gap * float64(len(g.columns)-1)
	least, most := 0.0, 0.0
	for _, c := range g.columns {
		least, most = least+c.least, most+c.most
	}
	switch {
	case most <= width:
		spare := (width - most) / float64(len(g.columns))
		for i := range g.columns {
			g.columns[i].width = g.columns[i].most + spare
		}
	case least <= width:
		g.fill(width)
	default:
		for i := range g.columns {
			g.columns[i].width = g.columns[i].least * width / least
		}
		return false
	}
	return true
}

// fill gives narrow columns all that they ask for and lets the wide ones share the
// rest, none less than it needs.
func (g *grid) fill(width float64) {
	var wide []int
	for i := range g.columns {
		g.columns[i].width = 0
		wide = append(wide, i)
	}
	for more := true; more; {
		more = false
		for k, i := range wide {
			c := &g.columns[i]
			least := 0.0 // of the others
			for _, j := range wide {
				if j != i {
					least += g.columns[j].least
				}
			}
			if c.most <= width/float64(len(wide)) && least <= width-c.most {
				c.width = c.most
				width -= c.most
				wide = append(wide[:k:k], wide[k+1:]...)
				more = true
				break
			}
		}
	}
	least, most := 0.0, 0.0
	for _, i := range wide {
		least, most = least+g.columns[i].least, most+g.columns[i].most
	}
	by := 0.0
	if most > least {
		by = min((width-least)/(most-least), 1)
	}
	for _, i := range wide {
		c := &g.columns[i]
		c.width = c.least + (c.most-c.least)*by
	}
}

func (f *flow) table(t output.Table) {
	g := newGrid(t, small)
	if !g.share(f.measure()) {
		tight := look{size: 7, leading: 9.6}
		g = newGrid(t, tight)
		g.gap = 6
		g.share(f.measure())
	}
	first := g.row(nil)
	if len(t.Rows) > 0 {
		first += g.row(t.Rows[0])
	}
	f.room(first + 8)
	f.head(g)
	for _, row := range t.Rows {
		h := g.row(row)
		if f.y+h > f.height-bottomEdge && !f.fresh() {
			f.page()
			f.head(g)
		}
		f.row(g, row, h)
	}
}

// row is the height of a row; of the head for nil.
func (g *grid) row(cells []output.Line) float64 {
	h := g.cells.leading
	for i := range g.columns {
		switch {
		case cells == nil:
			h = max(h, g.cells.leading*float64(len(g.cells.lines(headLine(g.table.Head[i]), g.columns[i].width))))
		case i < len(cells) && !g.columns[i].number:
			h = max(h, g.cells.leading*float64(len(g.cells.lines(cells[i], g.columns[i].width))))
		}
	}
	return h + 4
}

func (f *flow) head(g *grid) {
	h := g.row(nil)
	heads := look{size: g.cells.size, leading: g.cells.leading, ink: quiet}
	x := leftEdge
	for i, c := range g.columns {
		lines := heads.lines(headLine(g.table.Head[i]), c.width)
		y := f.y + h - 3 - heads.leading*float64(len(lines)-1)
		for _, b := range lines {
			at := x
			switch {
			case c.number: // over the point
				at = x + min(max(c.point()-b.width/2, 0), max(c.width-b.width, 0))
			case g.table.Align[i] == 'r':
				at = x + c.width - b.width
			}
			f.draw(shifted(b.ops, at, y-0.2*heads.size)...)
			y += heads.leading
		}
		x += c.width + g.gap
	}
	f.y += h
	f.draw(op{kind: ruleOp, x: leftEdge, y: f.y, w: f.measure(), h: 0.7})
}

// point is where the decimal point of a column of numbers stands, from its left.
func (c gridColumn) point() float64 {
	w := c.whole + c.decimals
	if c.unit > 0 {
		w += c.unit + 2.6
	}
	return (c.width-w)/2 + c.whole
}

func (f *flow) row(g *grid, cells []output.Line, h float64) {
	x := leftEdge
	base := f.y + 2 + 0.78*g.cells.leading
	for i, c := range g.columns {
		if i < len(cells) {
			f.cell(g, cells[i], c, g.table.Align[i], x, base)
		}
		x += c.width + g.gap
	}
	f.y += h
	f.draw(op{kind: ruleOp, x: leftEdge, y: f.y, w: f.measure(), h: 0.35, ink: hair})
}

func (f *flow) cell(g *grid, l output.Line, c gridColumn, align byte, x, base float64) {
	if c.number {
		q := quantityOf(l.String())
		b := words(regular, g.cells.size, q.number())
		at := x + c.point() - regular.width(q.whole)*g.cells.size
		if !q.numeric {
			at = x + c.point() - b.width/2
		}
		f.draw(shifted(b.ops, at, base)...)
		if q.unit != "" {
			f.draw(shifted(raisedWords(regular, g.cells.size, raisedUnit(q.unit)).ops, x+c.point()+c.decimals+2.6, base)...)
		}
		return
	}
	for _, b := range g.cells.lines(l, c.width) {
		at := x
		if align == 'r' {
			at = x + c.width - b.width
		}
		f.draw(shifted(b.ops, at, base)...)
		base += g.cells.leading
	}
}
