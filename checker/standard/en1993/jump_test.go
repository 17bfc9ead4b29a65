package en1993

import (
	"math"
	"testing"

	"kern/checker/action"
)

// TestDiagramFactorJump: C_1 of a moment that is one constant up to a height and
// another one above it, as moments applied between the ends make it, against the
// closed solution: sines in both parts that meet with one value and one slope,
// tan(k a)/k + tan(k r (1 - a))/(k r) = 0 with k = pi C_1. A moment that jumps
// between two points of the grid must not count as if it jumped at one of them.
func TestDiagramFactorJump(t *testing.T) {
	for _, r := range []float64{1e-6, 0.3, 0.7, -0.5, -1} {
		for i := range 60 {
			a := 0.3 + 0.5*float64(i)/60
			size := math.Abs(r)
			slope := func(k float64) float64 { // of the meeting parts, without poles
				return math.Sin(k*a)*math.Cos(k*size*(1-a))*size + math.Cos(k*a)*math.Sin(k*size*(1-a))
			}
			low, high := 1.0, 1.0
			for slope(high) > 0 {
				low, high = high, high+0.01
			}
			for range 60 {
				if middle := (low + high) / 2; slope(middle) > 0 {
					low = middle
				} else {
					high = middle
				}
			}
			pieces := []action.Piece{{From: 0, To: a, M: 1}, {From: a, To: 1, M: r}}
			got, want := diagramFactor(pieces, diagram{from: 0, to: 1, peak: 1}), low/math.Pi
			if math.Abs(got/want-1) > 0.006 {
				t.Errorf("a jump to %g at %g: C_1 = %.4f, want %.4f (%+.2f %%)", r, a, got, want, 100*(got/want-1))
			}
		}
	}
}
