package sheet

import (
	"regexp"
	"strings"
	"unicode/utf8"

	"kern/checker/output"
)

// ink is a colour of the printed page.
type ink uint8

const (
	black ink = iota
	quiet
	hair // rules between rows
	pale // grounds
	accent
	white
)

var inks = [...][3]int{black: {0x12, 0x16, 0x1a}, quiet: {0x4c, 0x55, 0x5d}, hair: {0xc4, 0xcb, 0xd1}, pale: {0xf1, 0xf3, 0xf5}, accent: {0xa8, 0x45, 0x0c}, white: {255, 255, 255}}

// look is how words of a block are set.
type look struct {
	size, leading float64
	ink           ink
	bold          bool
}

// piece is a part of a word in one face.
type piece struct {
	box   box
	space bool // a blank: dropped at the end of a line
	end   bool // the line ends here, whatever room there is
}

// pieces cuts words where a line may be broken.
func (l look) pieces(line output.Line) []piece {
	var out []piece
	for _, x := range line {
		switch x.Face {
		case output.NewLine:
			out = append(out, piece{end: true})
			continue
		case output.Mono:
			if symbolName.MatchString(x.Text) {
				b := l.inked(set(symbolMark(x.Text), l.size, false, 0))
				if len(b.ops) > 1 || b.ops[0].text != x.Text { // read and copied as the language writes it
					b.ops = append(append([]op{{kind: readOp, text: x.Text}}, b.ops...), op{kind: endOp})
				}
				out = append(out, piece{box: b})
				continue
			}
		}
		f := regular
		switch {
		case x.Face == output.Mono:
			f = mono
		case x.Face == output.Bold || l.bold:
			f = bold
		}
		for _, w := range breakable(clean(x.Text)) {
			if w == " " {
				out = append(out, piece{box: box{width: f.width(" ") * l.size}, space: true})
				continue
			}
			out = append(out, piece{box: l.inked(raisedWords(f, l.size, w))})
		}
	}
	return out
}

func (l look) inked(b box) box {
	for i := range b.ops {
		b.ops[i].ink = l.ink
	}
	return b
}

// mayBreak is where a word may be broken: behind hyphens, strokes and commas.
var mayBreak = regexp.MustCompile(`[^\s/,-]*[/,-]+|[^\s/,-]+|\s+`)

func breakable(s string) []string {
	var out []string
	for _, w := range mayBreak.FindAllString(s, -1) {
		if strings.TrimSpace(w) == "" {
			w = " "
		} else if n := len(out); n > 0 && strings.HasSuffix(out[n-1], "-") && w[0] >= '0' && w[0] <= '9' && (len(out[n-1]) == 1 || digitBefore(out[n-1])) {
			out[n-1] += w // "-12" and "1993-1-1" stay whole
			continue
		}
		out = append(out, w)
	}
	return out
}

// digitBefore tells whether a digit stands before the hyphen at the end.
func digitBefore(s string) bool {
	c := s[len(s)-2]
	return c >= '0' && c <= '9'
}

// raisedWords sets words whose units may have raised powers.
func raisedWords(f face, size float64, s string) box {
	s = raised(s)
	if !strings.ContainsAny(s, "²³⁴⁶") {
		return words(f, size, s)
	}
	var b box
	start := 0
	for i, r := range s {
		if strings.ContainsRune("²³⁴⁶", r) {
			b.put(words(f, size, s[start:i]), b.width, 0)
			b.put(words(f, size*0.68, powers.Replace(string(r))), b.width, -0.33*size)
			start = i + utf8.RuneLen(r)
		}
	}
	if start < len(s) {
		b.put(words(f, size, s[start:]), b.width, 0)
	}
	// read and copied as the language writes units
	b.ops = append(append([]op{{kind: readOp, text: powers.Replace(s)}}, b.ops...), op{kind: endOp})
	return b
}

// lines breaks words into lines of a width.
func (l look) lines(line output.Line, width float64) []box {
	var out []box
	var now box
	used := 0.0 // blanks at the end included
	flush := func() {
		out = append(out, now)
		now, used = box{}, 0
	}
	for _, p := range l.pieces(line) {
		switch {
		case p.end:
			flush()
		case p.space:
			if used > 0 {
				used += p.box.width
			}
		default:
			if used > 0 && used+p.box.width > width+0.01 {
				flush()
			}
			for _, part := range l.cut(p.box, width) {
				if used > 0 && used+part.width > width+0.01 {
					flush()
				}
				now.put(part, used, 0)
				used += part.width
			}
		}
	}
	flush()
	return out
}

// cut parts a word that is wider than the line.
func (l look) cut(b box, width float64) []box {
	if b.width <= width+0.01 || len(b.ops) != 1 || b.ops[0].kind != textOp {
		return []box{b}
	}
	var out []box
	o := b.ops[0]
	start, w := 0, 0.0
	for i, r := range o.text {
		step := o.face.width(string(r)) * o.size
		if w > 0 && w+step > width {
			out = append(out, l.inked(words(o.face, o.size, o.text[start:i])))
			start, w = i, 0
		}
		w += step
	}
	return append(out, l.inked(words(o.face, o.size, o.text[start:])))
}

// natural is the width of words on one line, and of their widest part.
func (l look) natural(line output.Line) (whole, part float64) {
	now := 0.0
	for _, p := range l.pieces(line) {
		if p.end {
			whole, now = max(whole, now), 0
			continue
		}
		now += p.box.width
		if !p.space {
			part = max(part, p.box.width)
		}
	}
	return max(whole, now), part
}
