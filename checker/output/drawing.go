package output

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"kern/checker/section"
)

// Colours that can be read on a light and on a dark ground: a picture in a page
// does not know which it stands on.
const (
	steelColour = "#7f8c99"
	axisColour  = "#c8702a"
)

// Room around the outline for the axes and their names, in pixels.
const left, right, above, below = 16, 44, 18, 12

// Drawing draws a cross-section to scale as an SVG picture that fits a square of
// about the given number of pixels, with its principal axes. It is "" for a
// section whose outline is not known.
func Drawing(s section.Shape, p section.Properties, size float64) string {
	loops := s.Outline()
	if len(loops) == 0 || !(size > 0) {
		return ""
	}
	width, height := extent(loops)
	if !(width > 0) || !(height > 0) {
		return ""
	}
	d := drawing{scale: size / max(width, height), height: height}
	var b strings.Builder
	w, h := width*d.scale+left+right, height*d.scale+above+below
	fmt.Fprintf(&b, `<svg xmlns="http://www.w3.org/2000/svg" width="%s" height="%s" viewBox="%d %d %s %s">`, pixels(w), pixels(h), -left, -above, pixels(w), pixels(h))
	fmt.Fprintf(&b, `<path d="%s" fill="%s" fill-opacity="0.35" fill-rule="evenodd" stroke="%s" stroke-width="1.2"/>`, d.path(loops), steelColour, steelColour)
	sin, cos := math.Sincos(p.Angle)
	for _, axis := range []struct {
		name string
		x, y float64 // direction on the paper
	}{{"major", cos, sin}, {"minor", -sin, cos}} {
		d.axis(&b, axis.name, axis.x, axis.y, p, width)
	}
	b.WriteString(`</svg>`)
	return b.String()
}

type drawing struct {
	scale  float64 // pixels in a metre
	height float64 // of the outline, m
}

// at gives a point of the paper on the picture, whose y axis points down.
func (d drawing) at(p section.Point) string {
	return pixels(p.X*d.scale) + " " + pixels((d.height-p.Y)*d.scale)
}

// path writes outlines as the commands of a path.
func (d drawing) path(loops []section.Loop) string {
	var b strings.Builder
	for _, l := range loops {
		b.WriteString("M" + d.at(l[0].From))
		for _, g := range l {
			if g.Straight() {
				b.WriteString("L" + d.at(g.To))
				continue
			}
			// an arc of half a turn or more has no single meaning as a command
			parts := int(math.Ceil(math.Abs(g.Sweep) / (0.9 * math.Pi)))
			turn := 0 // counter-clockwise on the paper is so on the picture
			if g.Sweep < 0 {
				turn = 1
			}
			r := pixels(g.Radius * d.scale)
			for i := 1; i <= parts; i++ {
				to := g.At(float64(i) / float64(parts))
				if i == parts {
					to = g.To
				}
				fmt.Fprintf(&b, "A%s %s 0 0 %d %s", r, r, turn, d.at(to))
			}
		}
		b.WriteString("Z")
	}
	return b.String()
}

// axis draws an axis through the centroid, a little over the outline, with its
// name at its positive end.
func (d drawing) axis(b *strings.Builder, name string, x, y float64, p section.Properties, width float64) {
	const over = 8 // pixels
	// how far it is to the edge of the box, either way
	reach := func(x, y float64) float64 {
		t := math.Inf(1)
		for _, side := range [...]struct{ from, dir, size float64 }{{p.CX, x, width}, {p.CY, y, d.height}} {
			switch {
			case side.dir > 1e-12:
				t = min(t, (side.size-side.from)/side.dir)
			case side.dir < -1e-12:
				t = min(t, -side.from/side.dir)
			}
		}
		return t + over/d.scale
	}
	end, start := reach(x, y), -reach(-x, -y)
	from := section.Point{X: p.CX + start*x, Y: p.CY + start*y}
	to := section.Point{X: p.CX + end*x, Y: p.CY + end*y}
	fmt.Fprintf(b, `<path d="M%sL%s" fill="none" stroke="%s" stroke-dasharray="7 2 1 2"/>`, d.at(from), d.at(to), axisColour)
	anchor, dx, dy := "start", 2.0, 3.0
	if math.Abs(y) > math.Abs(x) {
		anchor, dx, dy = "middle", 0, -2
	}
	// a name half as wide as this stays inside the picture
	const half = 16
	at := to.X*d.scale + dx
	if anchor == "middle" {
		at = max(at, half-left)
	}
	fmt.Fprintf(b, `<text x="%s" y="%s" font-family="sans-serif" font-size="10" fill="%s" text-anchor="%s">%s</text>`,
		pixels(at), pixels((d.height-to.Y)*d.scale+dy), axisColour, anchor, name)
}

// extent is the size of outlines whose lower-left corner is the origin, m.
func extent(loops []section.Loop) (width, height float64) {
	for _, l := range loops {
		for _, g := range l {
			steps := 1
			if !g.Straight() {
				steps = 64
			}
			for i := 0; i <= steps; i++ {
				p := g.At(float64(i) / float64(steps))
				width, height = max(width, p.X), max(height, p.Y)
			}
		}
	}
	return width, height
}

// pixels writes a length on the picture, to a hundredth.
func pixels(v float64) string {
	s := strconv.FormatFloat(v, 'f', 2, 64)
	s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	if s == "-0" {
		return "0"
	}
	return s
}
