package sheet

import (
	"fmt"

	"kern/checker/output"
)

// Lengths on the paper, points.
const (
	point      = 72 / 25.4 // a millimetre in points
	leftEdge   = 24 * point
	rightEdge  = 18 * point
	topEdge    = 25 * point
	bottomEdge = 21 * point
)

var (
	body    = look{size: 9.2, leading: 13}
	small   = look{size: 8.2, leading: 11.2}
	aside   = look{size: 8.2, leading: 11.2, ink: quiet}
	title   = look{size: 24, leading: 29, bold: true}
	chapter = look{size: 15, leading: 19, bold: true}
	section = look{size: 10.6, leading: 14, bold: true, ink: accent}
	caption = look{size: 9.2, leading: 13, bold: true}
)

// paged is a page as it is laid out.
type paged struct{ ops []op }

// flow lays blocks out on pages, one below the other.
type flow struct {
	width, height float64 // of the paper
	pages         []paged
	y             float64 // where the next thing begins, from the upper edge
	headings      []placed
}

// placed is a heading with its place.
type placed struct {
	output.Heading
	page int
	y    float64
}

func newFlow(p Paper) *flow {
	f := &flow{width: 210 * point, height: 297 * point}
	if p == Letter {
		f.width, f.height = 612, 792
	}
	f.page()
	return f
}

// measure is the width of the text.
func (f *flow) measure() float64 { return f.width - leftEdge - rightEdge }

func (f *flow) page() {
	f.pages = append(f.pages, paged{})
	f.y = topEdge
}

func (f *flow) fresh() bool { return f.y == topEdge }

// room begins a page where less than h is left.
func (f *flow) room(h float64) {
	if !f.fresh() && f.y+h > f.height-bottomEdge {
		f.page()
	}
}

func (f *flow) draw(ops ...op) {
	p := &f.pages[len(f.pages)-1]
	p.ops = append(p.ops, ops...)
}

// line puts a box on a line of its own.
func (f *flow) line(b box, x float64, l look) {
	h := max(l.leading, b.above+b.below+0.25*l.size)
	f.room(h)
	f.draw(shifted(b.ops, leftEdge+x, f.y+max(0.78*l.leading, b.above+0.1*l.size))...)
	f.y += h
}

func (f *flow) paragraph(t output.Line, x float64, l look) {
	for _, b := range l.lines(t, f.measure()-x) {
		f.line(b, x, l)
	}
}

func (f *flow) gap(h float64) {
	if !f.fresh() {
		f.y += h
	}
}

// blocks lays out blocks.
func (f *flow) blocks(list []output.Block) {
	for i, b := range list {
		switch b := b.(type) {
		case output.Heading:
			var next output.Block
			if i+1 < len(list) {
				next = list[i+1]
			}
			f.heading(b, next)
		case output.Paragraph:
			f.paragraph(b.Text, 0, body)
			f.y += 5
		case output.List:
			for _, l := range b.Items {
				f.item(l)
			}
			f.y += 5
		case output.Table:
			f.table(b)
			f.y += 9
		case output.Equations:
			f.equations(b)
		case Figures:
			f.figures(b)
		case Facts:
			f.facts(b)
		case Verdict:
			f.verdict(b)
		case Signatures:
			f.signatures(b)
		}
	}
}

// start is how much room the beginning of a block needs, to stay with its heading.
func (f *flow) start(b output.Block) float64 {
	switch b := b.(type) {
	case Figures:
		h := 0.0
		if len(b) > 0 {
			h = b[0].Height*point + 20
		}
		return h
	case output.Table:
		return 48
	case output.Heading:
		return 60
	}
	return 30
}

func (f *flow) heading(h output.Heading, next output.Block) {
	l := caption
	before, after := 8.0, 3.0
	switch h.Level {
	case 1:
		l = title
		f.y += 40 * point
		f.draw(op{kind: ruleOp, x: leftEdge, y: f.y, w: f.measure(), h: 5, ink: accent})
		f.y += 22
		after = 4
	case 2:
		l = chapter
		if !f.fresh() {
			f.page()
		}
		f.draw(op{kind: ruleOp, x: leftEdge, y: f.y, w: f.measure(), h: 0.9})
		f.y += 7
		before, after = 0, 7
	case 3:
		l = section
		before, after = 13, 4
	}
	lines := l.lines(output.Words(h.Text), f.measure())
	f.gap(before)
	f.room(float64(len(lines))*l.leading + after + f.start(next))
	f.headings = append(f.headings, placed{h, len(f.pages) - 1, f.y})
	for _, b := range lines {
		f.line(b, 0, l)
	}
	f.y += after
}

func (f *flow) item(t output.Line) {
	lines := body.lines(t, f.measure()-10)
	f.room(min(float64(len(lines)), 2) * body.leading)
	f.draw(shifted(words(regular, body.size, "•").ops, leftEdge, f.y+0.78*body.leading)...)
	for _, b := range lines {
		f.line(b, 10, body)
	}
	f.y += 1
}

func (f *flow) facts(facts Facts) {
	const names = 118
	for _, x := range facts {
		lines := body.lines(x.Value, f.measure()-names)
		f.room(float64(len(lines))*body.leading + 4)
		name := look{size: body.size, leading: body.leading, ink: quiet}
		f.draw(shifted(name.inked(words(regular, body.size, x.Name)).ops, leftEdge, f.y+2+0.78*body.leading)...)
		f.y += 2
		for _, b := range lines {
			f.line(b, names, body)
		}
		f.y += 2
		f.draw(op{kind: ruleOp, x: leftEdge, y: f.y, w: f.measure(), h: 0.4, ink: hair})
	}
	f.y += 9
}

// verdict sets a verdict in a frame: full for what fails, broken for what is
// undecided, so that it can be told without colour.
func (f *flow) verdict(v Verdict) {
	label := words(bold, 10, v.Word)
	wide := label.width + 12
	rest := body.lines(output.Words(v.Rest), f.measure()-wide-34)
	h := max(float64(len(rest))*body.leading, 15) + 11
	f.room(h)
	x, y := leftEdge, f.y
	f.draw(op{kind: ruleOp, x: x, y: y, w: f.measure(), h: h, ink: pale})
	side := quiet
	if v.Word == "fails" {
		side = accent
	}
	f.draw(op{kind: ruleOp, x: x, y: y, w: 4.5, h: h, ink: side})
	left, top, bottom := x+14, y+5.5, y+20.5
	if v.Word == "fails" {
		f.draw(op{kind: ruleOp, x: left, y: top, w: wide, h: 15, ink: accent})
		label.ops[0].ink = white
	} else {
		frame := op{kind: strokeOp, size: 0.9, points: []float64{left, top, left + wide, top, left + wide, bottom, left, bottom, left, top}}
		if v.Word == "undecided" {
			frame.text = "dashed"
		}
		f.draw(frame)
	}
	f.draw(shifted(label.ops, left+6, y+16.6)...)
	at := y + 5.5
	for _, b := range rest {
		f.draw(shifted(b.ops, left+wide+8, at+0.83*body.leading)...)
		at += body.leading
	}
	f.y += h + 9
}

func (f *flow) signatures(s Signatures) {
	f.y += 14
	x := []float64{0, 80, 230, 310}
	for i, head := range []string{"", "name", "date", "signature"} {
		f.draw(shifted(aside.inked(words(regular, aside.size, head)).ops, leftEdge+x[i], f.y+9)...)
	}
	f.y += 14
	f.draw(op{kind: ruleOp, x: leftEdge, y: f.y, w: f.measure(), h: 0.8})
	for _, r := range s {
		f.y += 34
		f.draw(shifted(words(regular, body.size, r.Name).ops, leftEdge, f.y-6)...)
		for _, b := range body.lines(r.Value, x[2]-x[1]-8)[:1] {
			f.draw(shifted(b.ops, leftEdge+x[1], f.y-6)...)
		}
		f.draw(op{kind: ruleOp, x: leftEdge, y: f.y, w: f.measure(), h: 0.4, ink: hair})
	}
	f.y += 22
}

// figures puts pictures side by side while there is room.
func (f *flow) figures(list Figures) {
	const between, shrink = 12, 0.88 // pictures may be made a little smaller to stand side by side
	for len(list) > 0 {
		n, w, h := 0, 0.0, 0.0
		for n < len(list) && (n == 0 || (w+between+list[n].Width*point)*shrink <= f.measure()) {
			if n > 0 {
				w += between
			}
			w += list[n].Width * point
			h = max(h, list[n].Height*point)
			n++
		}
		by := min(1, f.measure()/w)
		h *= by
		f.room(h + aside.leading + 8)
		x := leftEdge
		for _, s := range list[:n] {
			f.draw(op{kind: sceneOp, x: x, y: f.y + h - s.Height*point*by, w: by, scene: s})
			for _, b := range aside.lines(output.Words(s.Title), max(s.Width*point*by, 60))[:1] {
				f.draw(shifted(b.ops, x, f.y+h+aside.leading)...)
			}
			x += (s.Width*point + between) * by
		}
		f.y += h + aside.leading + 9
		list = list[n:]
	}
}

func (f *flow) equations(e output.Equations) {
	const indent = 9
	f.y += 2
	for _, x := range e.Steps {
		head := x.What
		if x.Clause != "" {
			head += " · " + x.Clause
		}
		if x.Note != "" {
			head = x.Note
		}
		what := aside.lines(output.Words(head), f.measure()-indent)
		var lines []box
		if x.Note == "" {
			groups := []mark{symbolMark(x.Symbol)}
			for i, text := range []string{x.Formula, x.Numbers, x.Value} {
				switch {
				case text == "" || i == 1 && text == x.Value: // "W = W_pl = 5 cm3" says it once
				case i == 0: // the symbol stays with its formula
					groups[0] = row(groups[0], mark{kind: operatorMark, text: "="}, expression(text))
				default:
					groups = append(groups, row(mark{kind: operatorMark, text: "="}, expression(text)))
				}
			}
			lines = equationLines(groups, 9.8, f.measure()-indent)
		}
		h := float64(len(what)) * aside.leading
		for _, b := range lines {
			h += max(body.leading, b.above+b.below+4)
		}
		f.room(min(h, f.height/3) + 4)
		bar, page := f.y, len(f.pages)
		for _, b := range what {
			f.line(b, indent, aside)
		}
		for i, b := range lines {
			if i == 0 {
				f.draw(op{kind: readOp, text: fmt.Sprintf("%s = %s", x.Text(), x.Value)})
			}
			f.line(box{width: b.width, above: b.above + 1.5, below: b.below + 1.5, ops: b.ops}, indent, body)
			if i == len(lines)-1 {
				f.draw(op{kind: endOp})
			}
		}
		if page == len(f.pages) {
			f.draw(op{kind: ruleOp, x: leftEdge, y: bar + 1, w: 1.2, h: f.y - bar - 1, ink: hair})
		}
		f.y += 5.5
	}
	f.y += 3
}

// contents lists the chapters with their pages.
func (f *flow) contents(list []placed) {
	f.headings = nil
	f.heading(output.Heading{Level: 2, Text: "Contents"}, nil)
	f.headings = nil
	for i, h := range list {
		if h.Level != 2 {
			continue
		}
		number := words(regular, body.size, fmt.Sprint(h.page+1))
		lines := body.lines(output.Words(h.Text), f.measure()-40)
		f.room(float64(len(lines)) * body.leading)
		f.draw(op{kind: linkOp, x: leftEdge, y: f.y, w: f.measure(), h: body.leading * float64(len(lines)), target: i})
		f.draw(shifted(number.ops, leftEdge+f.measure()-number.width, f.y+0.78*body.leading)...)
		for _, b := range lines {
			f.line(b, 0, body)
		}
		f.y += 1.5
		f.draw(op{kind: ruleOp, x: leftEdge, y: f.y, w: f.measure(), h: 0.4, ink: hair})
		f.y += 1.5
	}
}
