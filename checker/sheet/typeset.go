package sheet

import (
	"math"

	"kern/checker/drawing"
)

// box is something set on a line: its size around the base line, and what is drawn
// in it, from its left end on the base line, y down. Lengths are points.
type box struct {
	width, above, below float64
	ops                 []op
}

// op is something drawn.
type op struct {
	kind   opKind
	x, y   float64
	w, h   float64   // of a rule, a link
	face   face      // of words
	size   float64   // of words; the width of a stroke
	ink    ink       // of all
	text   string    // words, or the words that a formula is read as
	points []float64 // of a stroke: x, y, …; a cubic curve has four points
	cubic  bool
	target int // of a link: the heading that it leads to
	scene  *drawing.Scene
}

type opKind uint8

const (
	textOp opKind = iota
	ruleOp
	strokeOp
	linkOp
	sceneOp
	readOp // what follows is read as the text
	endOp
)

// shifted gives the ops of a box moved.
func shifted(ops []op, dx, dy float64) []op {
	out := make([]op, len(ops))
	for i, o := range ops {
		o.x += dx
		o.y += dy
		if o.points != nil {
			moved := make([]float64, len(o.points))
			for k := range moved {
				moved[k] = o.points[k] + [2]float64{dx, dy}[k%2]
			}
			o.points = moved
		}
		out[i] = o
	}
	return out
}

func (b *box) put(c box, dx, dy float64) {
	b.ops = append(b.ops, shifted(c.ops, dx, dy)...)
	b.above = max(b.above, c.above-dy)
	b.below = max(b.below, c.below+dy)
	b.width = max(b.width, dx+c.width)
}

func words(f face, size float64, s string) box {
	s = f.fit(s)
	return box{width: f.width(s) * size, above: 0.74 * size, below: 0.2 * size, ops: []op{{kind: textOp, face: f, size: size, text: s}}}
}

// scripts are set smaller, but never so small that they cannot be read.
func scriptSize(size float64) float64 { return max(size*0.72, 6) }

// set sets marks in a size. inner counts the fractions around them.
func set(m mark, size float64, heavy bool, inner int) box {
	upright, slanted := regular, italic
	if heavy {
		upright, slanted = bold, bold
	}
	switch m.kind {
	case letterMark:
		return words(slanted, size, m.text)
	case wordMark, numberMark:
		return words(upright, size, m.text)
	case prefixMark:
		return words(upright, size, m.text)
	case operatorMark:
		b := words(upright, size, m.text)
		space, down := 0.22*size, 0.0
		if m.text == "·" { // it stands high in this font
			space, down = 0.14*size, 0.09*size
		}
		if m.text == "/" {
			space = 0.06 * size
		}
		return box{width: b.width + 2*space, above: b.above, below: b.below, ops: shifted(b.ops, space, down)}
	case commaMark:
		b := words(upright, size, m.text)
		b.width += 0.18 * size
		return b
	case spaceMark:
		return box{width: 0.2 * size}
	case rowMark:
		var b box
		for _, p := range m.parts {
			b.put(set(p, size, heavy, inner), b.width, 0)
		}
		return b
	case fractionMark:
		return fraction(m, size, heavy, inner)
	case rootMark:
		return root(m, size, heavy, inner)
	case scriptMark:
		return script(m, size, heavy, inner)
	case fenceMark:
		return fence(m, size, heavy, inner)
	}
	return box{}
}

// axis is how high the middle of signs stands over the base line.
func axis(size float64) float64 { return 0.29 * size }

func fraction(m mark, size float64, heavy bool, inner int) box {
	part := size
	if inner > 0 {
		part = max(size*0.8, 6)
	}
	over, under := set(m.parts[0], part, heavy, inner+1), set(m.parts[1], part, heavy, inner+1)
	side, gap, thick := 0.12*size, 0.16*size, 0.055*size
	w := max(over.width, under.width) + 2*side
	var b box
	b.put(over, (w-over.width)/2, -axis(size)-gap-over.below)
	b.put(under, (w-under.width)/2, -axis(size)+gap+under.above)
	b.ops = append(b.ops, op{kind: ruleOp, x: 0.04 * size, y: -axis(size) - thick/2, w: w - 0.08*size, h: thick})
	b.width = w
	return b
}

func root(m mark, size float64, heavy bool, inner int) box {
	c := set(m.parts[0], size, heavy, inner)
	gap, thick, hook := 0.14*size, 0.055*size, 0.62*size
	top, bottom := -c.above-gap, c.below
	b := box{width: hook + c.width + 0.1*size, above: c.above + gap + thick, below: c.below + thick}
	middle := bottom - (bottom-top)*0.45
	b.ops = append(b.ops, op{kind: strokeOp, size: thick, points: []float64{0.04 * size, middle + 0.06*size, 0.18 * size, middle, 0.36 * size, bottom, hook - 0.04*size, top, b.width, top}})
	b.ops = append(b.ops, shifted(c.ops, hook, 0)...)
	return b
}

func script(m mark, size float64, heavy bool, inner int) box {
	base := set(m.parts[0], size, heavy, inner)
	small := scriptSize(size)
	b := base
	b.ops = append([]op(nil), base.ops...)
	at := base.width + 0.03*size
	if m.parts[1].kind != emptyMark {
		b.put(set(m.parts[1], small, heavy, inner+1), at, 0.2*size)
	}
	if m.parts[2].kind != emptyMark {
		above := set(m.parts[2], small, heavy, inner+1)
		b.put(above, at, -max(0.38*size, base.above-0.45*small))
	}
	return b
}

func fence(m mark, size float64, heavy bool, inner int) box {
	c := set(m.parts[0], size, heavy, inner)
	if m.text == "" {
		return c
	}
	upright := regular
	if heavy {
		upright = bold
	}
	open, end := m.text[:1], m.text[1:]
	if c.above+c.below < 1.25*size && open != "|" {
		var b box
		b.put(words(upright, size, open), 0, 0)
		b.put(c, b.width, 0)
		b.put(words(upright, size, end), b.width, 0)
		return b
	}
	thick := 0.06 * size
	top, bottom := -c.above-0.05*size, c.below+0.05*size
	side := 0.34*size + 0.03*(bottom-top)
	curve := func(near, far float64) op {
		if open == "|" {
			return op{kind: strokeOp, size: thick, points: []float64{(near + far) / 2, top, (near + far) / 2, bottom}}
		}
		h := bottom - top
		return op{kind: strokeOp, size: thick * 1.3, cubic: true, points: []float64{near, top, far, top + 0.28*h, far, bottom - 0.28*h, near, bottom}}
	}
	b := box{width: c.width + 2*side, above: -top, below: bottom}
	b.ops = append(b.ops, curve(side*0.8, side*0.22))
	b.ops = append(b.ops, shifted(c.ops, side, 0)...)
	b.ops = append(b.ops, curve(side+c.width+side*0.2, side+c.width+side*0.78))
	return b
}

// equationLines sets a formula in lines of a width: "symbol = formula", "= numbers"
// and "= result" each stay together where they can.
func equationLines(groups []mark, size, width float64) []box {
	const indent = 14
	var lines []box
	var now box
	flush := func() {
		if now.width > 0 {
			lines = append(lines, now)
		}
		now = box{}
	}
	place := func(b box) {
		if now.width > 0 && now.width+b.width > width {
			flush()
		}
		at := now.width
		if at == 0 && len(lines) > 0 {
			at = indent
		}
		now.put(b, at, 0)
	}
	for i, g := range groups {
		last := i == len(groups)-1
		whole := set(g, size, last, 0)
		if whole.width <= width-indent {
			place(whole)
			continue
		}
		for _, c := range chunks(g) {
			b := set(c, size, last, 0)
			if most := width - indent; b.width > most {
				b = set(c, size*max(most/b.width, 0.5), last, 0)
			}
			if b.width > width-indent {
				b = squeezed(b, (width-indent)/b.width)
			}
			place(b)
		}
	}
	flush()
	return lines
}

// squeezed makes a box smaller as a whole: the last way to keep a line on the
// paper.
func squeezed(b box, by float64) box {
	out := box{width: b.width * by, above: b.above * by, below: b.below * by}
	for _, o := range b.ops {
		o.x, o.y, o.w, o.h, o.size = o.x*by, o.y*by, o.w*by, o.h*by, o.size*by
		points := make([]float64, len(o.points))
		for i, p := range o.points {
			points[i] = p * by
		}
		o.points = points
		out.ops = append(out.ops, o)
	}
	return out
}

// round takes the noise off a length, so that the same sheet has the same bytes on
// every machine.
func round(v float64) float64 { return math.Round(v*1000) / 1000 }
