package en1993

import (
	"math"
	"testing"

	"kern/checker/section"
)

// TestEffectiveModulus holds the effective section of a welded I 300 x 12 + 800 x
// 6 in S355, welds left out, against figures worked out by hand to EN 1993-1-5
// 4.4 (not published): flange rho 0.9493; in bending psi -0.9697, k_sigma 23.107,
// lambda_p 1.2004, rho 0.7556, I_eff 1.3782e9 mm4, W_eff 3.201e6 mm3.
func TestEffectiveModulus(t *testing.T) {
	s := shaped(t, section.Shape{Kind: section.ISection, Made: section.Welded, Depth: 0.824, Width: 0.3, Web: 0.006, Flange: 0.012}, 355e6)
	s.height, s.force = 4, 1e5
	b := &beamColumn{specimen: s, ly: 4, lz: 4, my: [2]float64{0, 1e5}}
	o := b.check()
	for symbol, want := range map[string]float64{"rho_f": 0.9493, "psi_y_eff": -0.9697, "k_sigma_y": 23.107, "lambda_p_y": 1.2004, "rho_y": 0.7556,
		"I_eff_y": 1.3782e-3, "W_eff_y": 3.201e-3, "M_c_y_Rd": 1136.4e3, "A_eff": 8378.9e-6} {
		if got := o.value("", symbol); !(math.Abs(got/want-1) <= 2e-4) {
			t.Errorf("%s = %.6g, by hand %.6g", symbol, got, want)
		}
	}
}

// TestLowestRoot holds the root of the cubic against closed forms: one axis of
// symmetry (a quadratic), two (the smallest force), and the cubic's own residual.
func TestLowestRoot(t *testing.T) {
	for _, c := range [][4]float64{{800, 460, 200, 0.6}, {500, 900, 300, 0.3}, {1000, 1200, 5000, 0.8}} {
		y, z, tw, e := c[0], c[1], c[2], c[3]
		beta := 1 - e*e
		quadratic := (y + tw - math.Sqrt((y+tw)*(y+tw)-4*beta*y*tw)) / (2 * beta)
		if got, want := lowestRoot(y, z, tw, e, 0), min(quadratic, z); !(math.Abs(got/want-1) <= 1e-12) {
			t.Errorf("symmetric about y: %g, want %g", got, want)
		}
		if got := lowestRoot(y, z, tw, 0, 0); got > min(y, z, tw) || got < min(y, z, tw)*(1-1e-12) {
			t.Errorf("no offset: %g, want %g", got, min(y, z, tw))
		}
		n := lowestRoot(y, z, tw, e, 0.4)
		f := (n-y)*(n-z)*(n-tw) - n*n*(n-z)*e*e - n*n*(n-y)*0.16
		if !(math.Abs(f) <= 1e-9*y*z*tw) || n >= lowestRoot(y, z, tw, e, 0) {
			t.Errorf("unsymmetric: %g leaves %g", n, f)
		}
	}
	if !math.IsNaN(lowestRoot(math.NaN(), 1, 1, 0, 0)) || !math.IsNaN(lowestRoot(0, 1, 1, 0, 0)) {
		t.Error("a force that is not known gives a root")
	}
}
