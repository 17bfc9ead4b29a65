package aisc360

import (
	"math"
	"testing"
)

// TestBetaW holds beta_w against the commentary's table of common angles (Table
// C-F10.1 of the 2016 edition, in inches; from memory). The table has one
// value for all thicknesses of a size.
func TestBetaW(t *testing.T) {
	for _, r := range []struct{ long, short, t, want float64 }{
		{8, 6, 0.5, 3.31}, {8, 4, 0.5, 5.48}, {7, 4, 0.5, 4.37}, {6, 4, 0.5, 3.14}, {6, 3.5, 0.375, 3.69},
		{5, 3.5, 0.375, 2.40}, {5, 3, 0.375, 2.99}, {4, 3.5, 0.375, 0.87}, {4, 3, 0.375, 1.65}, {3, 2, 0.25, 1.56},
	} {
		for _, got := range []float64{betaW(r.long, r.short, r.t), betaW(r.short, r.long, r.t)} {
			if math.Abs(got/r.want-1) > 0.006 {
				t.Errorf("beta_w of L%gx%gx%g is %.3f in, the table has %.2f", r.long, r.short, r.t, got, r.want)
			}
		}
	}
}
