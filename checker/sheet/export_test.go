package sheet

import "strings"

// WidthOf is the width of words in the upright face, points.
func WidthOf(s string, size float64) float64 { return regular.width(s) * size }

// MathML is an expression of the language as the sheet sets it.
func MathML(text string) string {
	var b strings.Builder
	b.WriteString("<math>")
	mathml(&b, expression(text))
	b.WriteString("</math>")
	return b.String()
}
