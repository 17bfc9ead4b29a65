package en1993

import (
	"math"
	"testing"

	"kern/checker/section"
)

// TestFlexuralTorsionalPublished holds the critical loads of a thin-walled
// channel against T. H. G. Megson, An Introduction to Aircraft Structural
// Analysis (2010), Example 8.4: three significant figures, SEEN; E, G and the
// length are inferred from its loads. Its torsion and warping constants are put
// in: the latter, 2488e6 mm6, is not that of the channel that its other values
// describe (1190e6 mm6), so that only the equations are checked here.
func TestFlexuralTorsionalPublished(t *testing.T) {
	s := shaped(t, section.Shape{Kind: section.Channel, Made: section.Welded, Depth: 0.102, Width: 0.101, Web: 0.002, Flange: 0.002}, 1e6)
	s.material.E, s.material.G = 70e9, 30e9
	s.section.It, s.section.Iw = 800e-12, 2488e6*1e-18
	o := s.check()
	const rule = "flexural-torsional-buckling"
	for symbol, want := range map[string]float64{"N_cr_T": 197e3, "N_cr_TF": 168e3, "N_cr_y": 808e3} {
		if got := o.value(rule, symbol); !(math.Abs(got/want-1) <= 0.006) {
			t.Errorf("%s = %.4g N, published %.3g", symbol, got, want)
		}
	}
	if got := o.value("flexural-buckling-minor", "N_cr_z"); !(math.Abs(got/463e3-1) <= 0.006) {
		t.Errorf("N_cr_z = %.4g N, published 463e3", got)
	}
	// the published coefficient of the quadratic is 1 - A xS2/I0
	if got := o.value(rule, "beta_0"); !(math.Abs(got/0.345138-1) <= 0.006) {
		t.Errorf("beta_0 = %.4g, from the published values 0.3451", got)
	}
}
