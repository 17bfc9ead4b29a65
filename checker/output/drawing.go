package output

import (
	"kern/checker/drawing"
	"kern/checker/section"
)

// pixel is a pixel in millimetres.
const pixel = 25.4 / 96

// Drawing draws a cross-section to scale as an SVG picture that fits a square of
// about the given number of pixels, with its principal axes, in colours for any
// ground. It is "" for a section whose outline is not known.
func Drawing(s section.Shape, p section.Properties, size float64) string {
	scene := drawing.Section(s, p, drawing.Sized{Side: size * pixel})
	if scene == nil {
		return ""
	}
	return scene.SVG(drawing.OnAnyGround)
}
