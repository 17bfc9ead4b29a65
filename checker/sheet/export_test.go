package sheet

// WidthOf is the width of words in the upright face, points.
func WidthOf(s string, size float64) float64 { return regular.width(s) * size }
