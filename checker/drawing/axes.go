package drawing

import (
	"math"
)

// axes are a pair of scales with a field between them.
type axes struct {
	field        Box     // mm
	xMost, yMost float64 // at the right and the upper edge, in units of the labels; both begin at 0
	xLeast       float64 // at the left edge
}

// at is the place of a point.
func (a axes) at(x, y float64) Point {
	return Point{a.field.Left + (x-a.xLeast)/(a.xMost-a.xLeast)*(a.field.Right-a.field.Left), a.field.Bottom - y/a.yMost*(a.field.Bottom-a.field.Top)}
}

// draw draws the scales with round numbers and their names.
func (a axes) draw(p *pen, xName, yName string) {
	f := a.field
	xs, ys := Ticks(a.xLeast, a.xMost, 6), Ticks(0, a.yMost, 5)
	for _, v := range xs {
		q := a.at(v, 0)
		p.line(Faint, q.X, f.Bottom, q.X, f.Bottom+1)
		p.place(Box{f.Left - 12, 0, f.Right + 12, math.Inf(1)}, Text{Words: tick(v), Size: small, Tone: Quiet}, spot{Point{q.X, q.Y + 3.6}, Middle})
	}
	for _, v := range ys {
		q := a.at(a.xLeast, v)
		p.line(Faint, f.Left-1, q.Y, f.Left, q.Y)
		p.place(Box{0, 0, f.Right, math.Inf(1)}, Text{Words: tick(v), Size: small, Tone: Quiet}, spot{Point{q.X - 1.6, q.Y + 0.9}, End})
	}
	p.line(Outline, f.Left, f.Top, f.Left, f.Bottom)
	p.line(Outline, f.Left, f.Bottom, f.Right, f.Bottom)
	p.text(Text{At: Point{f.Right, f.Bottom + 7.4}, Words: xName, Size: small, Anchor: End})
	p.text(Text{At: Point{f.Left - 10, f.Top - 2.6}, Words: yName, Size: small})
}

// Ticks are round numbers from low to high, about n of them.
func Ticks(low, high float64, n int) []float64 {
	if !(high > low) || math.IsInf(high-low, 0) {
		return nil
	}
	rough := (high - low) / float64(n)
	step := math.Pow(10, math.Floor(math.Log10(rough)))
	for _, m := range []float64{1, 2, 5, 10} {
		if m*step >= rough*(1-1e-9) {
			step *= m
			break
		}
	}
	var out []float64
	for i := math.Ceil(low/step - 1e-9); i*step <= high*(1+1e-9); i++ {
		out = append(out, i*step)
	}
	return out
}
