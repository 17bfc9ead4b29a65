package sheet

import (
	"sync"

	"golang.org/x/image/font/gofont/gobold"
	"golang.org/x/image/font/gofont/goitalic"
	"golang.org/x/image/font/gofont/gomono"
	"golang.org/x/image/font/gofont/goregular"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"
)

// face is one of the fonts of a PDF: the Go fonts, which have Greek letters and the
// signs of formulas.
type face uint8

const (
	regular face = iota
	bold
	italic
	mono
	faces
)

// family and style are what the PDF library calls a face.
var faceNames = [faces]struct {
	family, style string
	data          []byte
}{{"go", "", goregular.TTF}, {"go", "B", gobold.TTF}, {"go", "I", goitalic.TTF}, {"gomono", "", gomono.TTF}}

// metrics are the widths of a face's letters in ems; 0 for a letter that it lacks.
type metrics struct {
	low   [0x2700]float32
	known bool
}

var faceMetrics = sync.OnceValue(func() *[faces]metrics {
	var out [faces]metrics
	const em = 2048
	for i := range out {
		f, err := sfnt.Parse(faceNames[i].data)
		if err != nil {
			panic("sheet: a font that is part of the program cannot be read: " + err.Error())
		}
		var b sfnt.Buffer
		for r := range out[i].low {
			g, err := f.GlyphIndex(&b, rune(r))
			if err != nil || g == 0 {
				continue
			}
			if w, err := f.GlyphAdvance(&b, g, fixed.I(em), 0); err == nil {
				out[i].low[r] = float32(w) / 64 / em
			}
		}
	}
	return &out
})

// missing stands for a letter that the fonts lack.
const missing = '□'

// fit replaces letters that a face lacks, so that none vanishes without a trace.
func (f face) fit(s string) string {
	m := &faceMetrics()[f]
	ok := true
	for _, r := range s {
		if r >= rune(len(m.low)) || m.low[r] == 0 {
			ok = false
			break
		}
	}
	if ok {
		return s
	}
	out := make([]rune, 0, len(s))
	for _, r := range s {
		switch {
		case r < rune(len(m.low)) && m.low[r] > 0:
			out = append(out, r)
		case r >= 0x300 && r < 0x370: // an accent that stands over the letter before
		default:
			out = append(out, missing)
		}
	}
	return string(out)
}

// width is the width of a text in ems.
func (f face) width(s string) float64 {
	m := &faceMetrics()[f]
	w := 0.0
	for _, r := range s {
		if r < rune(len(m.low)) {
			w += float64(m.low[r])
		}
	}
	return w
}
