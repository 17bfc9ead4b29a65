package drawing

import (
	"sync"

	"golang.org/x/image/font"
	"golang.org/x/image/font/gofont/gobold"
	"golang.org/x/image/font/gofont/goregular"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"
)

// slack is what other sans-serif fonts are wider than the Go fonts at most, of
// those that readers' machines are likely to have: DejaVu Sans by 15 % in the
// words of pictures (Liberation Sans and its like are 1 to 2 % narrower).
const slack = 1.15

// lastRune bounds the table of widths.
const lastRune = 0x2300

// advances are the widths of letters in the regular and the bold face, in parts
// of the size.
var advances = sync.OnceValue(func() *[2][lastRune]float32 {
	out := new([2][lastRune]float32)
	for face, data := range [...][]byte{goregular.TTF, gobold.TTF} {
		f, err := sfnt.Parse(data)
		if err != nil {
			panic(err) // the font is part of this program
		}
		var b sfnt.Buffer
		for r := range rune(lastRune) {
			out[face][r] = 1
			i, err := f.GlyphIndex(&b, r)
			if err != nil || i == 0 {
				continue
			}
			const em = 1000
			if w, err := f.GlyphAdvance(&b, i, fixed.I(em), font.HintingNone); err == nil {
				out[face][r] = float32(w) / 64 / em
			}
		}
	}
	return out
})

// Width is the width of words in millimetres, for a font size in millimetres.
// It is an upper estimate: which font a reader has is not known.
func Width(words string, size float64, bold bool) float64 {
	table := &advances()[0]
	if bold {
		table = &advances()[1]
	}
	sum := 0.0
	for _, r := range words {
		if r < lastRune {
			sum += float64(table[r])
		} else {
			sum++
		}
	}
	return sum * size * slack
}

// Letters above and below the baseline, in parts of the size.
const ascent, descent = 0.78, 0.22

// Box is a rectangle on the sheet, mm.
type Box struct{ Left, Top, Right, Bottom float64 }

// Overlaps tells whether two boxes share an area.
func (b Box) Overlaps(c Box) bool {
	return b.Left < c.Right && c.Left < b.Right && b.Top < c.Bottom && c.Top < b.Bottom
}

// Inside tells whether the box lies in another one.
func (b Box) Inside(c Box) bool {
	return b.Left >= c.Left && b.Right <= c.Right && b.Top >= c.Top && b.Bottom <= c.Bottom
}

// grow makes the box larger on all sides.
func (b Box) grow(by float64) Box {
	return Box{b.Left - by, b.Top - by, b.Right + by, b.Bottom + by}
}

// Box is the room that the text takes.
func (t Text) Box() Box {
	w := Width(t.Words, t.Size, t.Bold)
	before := [...]float64{Start: 0, Middle: w / 2, End: w}[t.Anchor]
	up, down := ascent*t.Size, descent*t.Size
	if t.Upward {
		return Box{t.At.X - up, t.At.Y + before - w, t.At.X + down, t.At.Y + before}
	}
	return Box{t.At.X - before, t.At.Y - up, t.At.X - before + w, t.At.Y + down}
}
