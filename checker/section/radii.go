package section

// DefaultRadii gives the corner radii (m) with which the product standards
// compute the properties of square and rectangular hollow sections of wall
// thickness t (m).
//
//	Hot:  EN 10210-2, Annex: outer 1.5 t, inner 1.0 t
//	Cold: EN 10219-2, Annex: outer 2.0 t (t <= 6 mm), 2.5 t (6 < t <= 10 mm),
//	      3.0 t (t > 10 mm); inner = outer - t (from memory)
//
// Every other way of making has no such rule and gives 0, 0: sharp corners.
func DefaultRadii(made Made, t float64) (outer, inner float64) {
	// The bands close at the upper end. A nanometre of slack keeps a thickness
	// that was converted from another unit in the band that its text names.
	const slack = 1e-9
	switch made {
	case Hot:
		return 1.5 * t, 1.0 * t
	case Cold:
		factor := 3.0
		if t <= 0.006+slack {
			factor = 2.0
		} else if t <= 0.010+slack {
			factor = 2.5
		}
		return factor * t, (factor - 1) * t
	}
	return 0, 0
}

// StandardTaper gives the slope of the inner flange faces of a rolled taper
// flange channel (UPN) of the given depth, width and web (m), and the distance
// from the web's back at which its flange thickness is measured (m).
// DIN 1026-1 (from memory, confirmed by the areas that it gives): 8 % up to a
// depth of 300 mm, measured b/2 from the flange's tip; 5 % above, measured
// (b - tw)/2 from the flange's tip.
func StandardTaper(depth, width, web float64) (slope, at float64) {
	if depth <= 0.300+1e-9 {
		return 0.08, width / 2
	}
	return 0.05, (width + web) / 2
}
