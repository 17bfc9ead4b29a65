package section

import "math"

// The proportions for which the junction formulas of rolled sections are used.
// They were set by the numerical solutions in the tests of this package.
const (
	// Above this tw/tf the junctions are left out, which is on the safe side.
	junctionWebMax = 1.5
	// A root radius counts up to this multiple of tf: the fitted polynomials
	// exaggerate beyond it, by up to a quarter at 2.5.
	junctionRootMax = 2.0
	// The producers' formula is up to 7.2 % above that of El Darwish and
	// Johnston for IPE, HE and most HP sections, but 20 % above the numerical
	// solution for a few (HP 220x57, HP 260x75, HE 100 AA) and 40 % and more
	// where a stout web meets a large root. It counts up to this multiple of the
	// other, so that those few come out below their printed value.
	producerExcessMax = 1.075
)

// torsionConstant gives the St Venant torsion constant It (m4) of a shape that
// has passed Check, whose polar second moment about the centroid is given (m4).
//
//	Tube      EN 10210-2 and EN 10219-2, Annexes: t3 h/3 + 2 K Ah, and never
//	          more than the solid rectangle or the polar second moment, which
//	          it would be for thick walls with very round corners
//	Ellipse   EN 10210-2, Annex, with the same bounds
//	Pipe, Rod the polar second moment, exact
//	Bar       St Venant's series, exact
//	ISection  rolled: as Shape.Junction says TorsionProducer, at most 1.075
//	          times TorsionElDarwishJohnston, or the latter, as for taper
//	          flanges always; welded: TorsionPlates
//	Channel, Tee, Angle  rolled: TorsionElDarwishJohnston; welded: TorsionPlates
//	DoubleAngle  twice that of one angle: the connectors are left out
//
// "Rolled" is what was made so, has a root fillet or has a taper. A rolled
// shape with tw/tf above 1.5 is treated as welded.
func (s Shape) torsionConstant(polar float64) float64 {
	switch s.Kind {
	case DoubleAngle:
		one := s.oneAngle()
		return 2 * one.torsionConstant(polar)
	case Tube:
		return min(s.torsionTube(), TorsionRectangle(s.Depth, s.Width), polar)
	case Ellipse:
		a, b := s.Depth/2, s.Width/2
		return min(s.torsionEllipse(), math.Pi*a*a*a*b*b*b/(a*a+b*b), polar)
	case Pipe:
		r, q := s.Diameter/2, s.Diameter/2-s.Wall
		return math.Pi / 2 * (r*r + q*q) * (r + q) * s.Wall
	case Rod:
		r := s.Diameter / 2
		return math.Pi / 2 * r * r * r * r
	case Bar:
		return TorsionRectangle(s.Depth, s.Width)
	}
	plates := s.TorsionPlates()
	rolled := s.Made == Rolled || s.Root > 0 || s.Taper > 0
	if !rolled {
		return plates
	}
	formula, ok := s.TorsionElDarwishJohnston()
	if !ok {
		return plates
	}
	if s.Kind == ISection && s.Junction != ByElDarwishJohnston && s.Taper == 0 {
		producer := TorsionProducer(s.Depth, s.Width, s.Web, s.Flange, s.Root)
		formula = math.Min(producer, producerExcessMax*formula)
	}
	// The plates alone are a lower bound of the exact value.
	return math.Max(formula, plates)
}

// oneAngle is one of the angles of a DoubleAngle.
func (s Shape) oneAngle() Shape {
	s.Kind, s.Gap = Angle, 0
	return s
}

// torsionTube is the formula of EN 10210-2 and EN 10219-2 for hollow sections:
// the wall's own torsion and that of the closed cell along its mid-line, whose
// corners have the mean of the two radii.
func (s Shape) torsionTube() float64 {
	t := s.Wall
	mean := (s.OuterRadius + s.InnerRadius) / 2
	p, q := s.Depth-t, s.Width-t
	round := (4 - math.Pi) * mean
	line := 2*(p+q) - 2*round
	cell := p*q - mean*round
	k := 2 * cell * t / line
	return t*t*t*line/3 + 2*k*cell
}

// TorsionRectangle gives St Venant's torsion constant (m4) of a solid
// rectangle with the sides a and b (m), in any order: the exact series, to
// machine accuracy.
func TorsionRectangle(a, b float64) float64 {
	t := math.Min(a, b)
	b = math.Max(a, b)
	sum := 0.0
	// The terms fall as 1/n5, and tanh is 1 for all but the first of them: what
	// is left beyond n = 39 is the tail of the sum of 1/n5 over odd n.
	for n := 1.0; n < 40; n += 2 {
		sum += (math.Tanh(n*math.Pi*b/(2*t)) - 1) / (n * n * n * n * n)
	}
	const odd = 1.0045237627951384 // sum of 1/n5 over odd n: 31/32 zeta(5)
	sum += odd
	return b * t * t * t * (1.0/3 - 64/(math.Pi*math.Pi*math.Pi*math.Pi*math.Pi)*t/b*sum)
}

// TorsionPlates gives the torsion constant (m4) of an open section as the sum
// of its plates, each a rectangle of its own with both ends free: b t3/3 less
// the loss of its two ends, 0.21 t4 for a long plate. The plates do not overlap (flanges
// of full width, the web between them) and a taper flange counts with the
// thickness of its tip. Torsional rigidity never falls when area is added
// (Prandtl's stress function), so that this sum is a lower bound of the exact
// value: the gain at the junctions is left out. 0 for kinds that have no
// plates.
func (s Shape) TorsionPlates() float64 {
	h, b, tw, tf, t := s.Depth, s.Width, s.Web, s.Flange, s.Wall
	switch s.Kind {
	case ISection:
		if s.Taper > 0 {
			tf = s.flangeAt(b / 2)
		}
		return 2*TorsionRectangle(b, tf) + TorsionRectangle(h-2*tf, tw)
	case Channel:
		if s.Taper > 0 {
			tf = s.flangeAt(b)
		}
		return 2*TorsionRectangle(b, tf) + TorsionRectangle(h-2*tf, tw)
	case Tee:
		if s.Taper > 0 {
			tf = s.flangeAt(b / 2)
		}
		return TorsionRectangle(b, tf) + TorsionRectangle(h-tf, tw)
	case Angle:
		return TorsionRectangle(b, t) + TorsionRectangle(h-t, t)
	}
	return 0
}

// TorsionThinWalled gives the plain sum of b t3/3 (m4) over the plates of an
// open section, without loss at ends or gain at junctions: the value of
// thin-walled theory and of most hand calculations. A taper flange counts with
// the integral of t3/3 from the web's face to its tip. 0 for kinds that have no
// plates.
func (s Shape) TorsionThinWalled() float64 {
	h, b, tw, tf, t := s.Depth, s.Width, s.Web, s.Flange, s.Wall
	cube := func(b, t float64) float64 { return b * t * t * t / 3 }
	// outstand is the integral over a piece of the flange.
	outstand := func(from, to float64) float64 {
		a, z := s.flangeAt(from), s.flangeAt(to)
		return (to - from) * (a + z) * (a*a + z*z) / 12
	}
	switch s.Kind {
	case ISection:
		if s.Taper > 0 {
			heel := s.flangeAt(tw / 2)
			return 4*outstand(tw/2, b/2) + 2*cube(tw, heel) + cube(h-2*heel, tw)
		}
		return 2*cube(b, tf) + cube(h-2*tf, tw)
	case Channel:
		if s.Taper > 0 {
			heel := s.flangeAt(tw)
			return 2*outstand(tw, b) + 2*cube(tw, heel) + cube(h-2*heel, tw)
		}
		return 2*cube(b, tf) + cube(h-2*tf, tw)
	case Tee:
		if s.Taper > 0 {
			heel := s.flangeAt(tw / 2)
			return 2*outstand(tw/2, b/2) + cube(tw, heel) + cube(h-heel, tw)
		}
		return cube(b, tf) + cube(h-tf, tw)
	case Angle:
		return cube(b, t) + cube(h-t, t)
	}
	return 0
}

// TorsionProducer gives the torsion constant (m4) of a rolled I or H section
// by the formula that reproduces the tables of the European producers; all
// lengths in metres. The tables for UK sections follow another one, see
// TorsionElDarwishJohnston; for
// the sections in the tests the two differ by -7 to +4 %. It exaggerates where a
// stout web meets a large root.
func TorsionProducer(h, b, tw, tf, r float64) float64 {
	// d is the diameter of the circle inscribed in the junction of web and flange.
	d := ((r+tw/2)*(r+tw/2) + (r+tf)*(r+tf) - r*r) / (2*r + tf)
	return 2.0/3*(b-0.63*tf)*tf*tf*tf + (h-2*tf)*tw*tw*tw/3 + 2*tw/tf*(0.145+0.1*r/tf)*d*d*d*d
}

// TorsionElDarwishJohnston gives the torsion constant (m4) of a rolled open
// section by the junction factors that El Darwish and Johnston fitted (1965),
// as the UK and American section tables use them. ok is false for kinds without
// such a formula and for tw/tf above 1.5; a root radius counts up to 2 tf. The
// formula for I sections is that of the published tables; those for channels,
// tees, angles and taper flanges are from memory and hold against published
// values and a numerical solution in the tests of this package.
//
// A taper flange counts with the integral of t3/3 over its width, the junction
// with the thickness at the web's face. Its factors were fitted for a slope of
// 1 : 6; for a lesser slope they are interpolated to those of parallel flanges,
// in a channel the constant itself.
func (s Shape) TorsionElDarwishJohnston() (it float64, ok bool) {
	tw, tf := s.Web, s.Flange
	if s.Kind == Angle {
		tw, tf = s.Wall, s.Wall
	}
	tip := tf
	if s.Taper > 0 {
		face, end := s.Web/2, s.Width/2
		if s.Kind == Channel {
			face, end = s.Web, s.Width
		}
		tf, tip = s.flangeAt(face), s.flangeAt(end)
	}
	if tw > junctionWebMax*tf {
		return 0, false
	}
	r := math.Min(s.Root, junctionRootMax*tf)
	pow4 := func(v float64) float64 { return v * v * v * v }
	// share is where the slope stands between parallel flanges and 1 : 6.
	share := math.Min(6*s.Taper, 1)
	factor := func(parallel, taper [5]float64) float64 {
		w, f := tw/tf, r/tf
		sum := 0.0
		for i, v := range [5]float64{1, w, f, w * f, w * w} {
			sum += (parallel[i] + share*(taper[i]-parallel[i])) * v
		}
		return sum
	}
	through := func() (alpha, d float64) {
		alpha = factor([5]float64{-0.042, 0.2204, 0.1355, -0.0865, -0.0725}, [5]float64{-0.0836, 0.2536, 0.1268, -0.0806, -0.0858})
		// f is r for parallel flanges, where the inscribed circle touches the roots.
		f := r
		if p := s.Taper; p > 0 {
			f = r*(math.Sqrt(1+p*p)-p) - p*tw/2
		}
		d = ((tf+f)*(tf+f) + (r+0.25*tw)*tw) / (f + r + tf)
		return alpha, d
	}
	// end is what a free end takes away, for the thinner end of a taper.
	p := s.Taper
	end := (0.105 - 0.1*p + 0.0848*p*p - 0.06746*p*p*p) * pow4(tip)
	switch s.Kind {
	case ISection:
		alpha, d := through()
		it = s.TorsionThinWalled() + 2*alpha*pow4(d) - 4*end
	case Tee:
		alpha, d := through()
		it = s.TorsionThinWalled() + alpha*pow4(d) - 2*end - 0.105*pow4(tw)
	case Channel:
		parallel, taper := [5]float64{-0.0908, 0.2621, 0.1231, -0.0752, -0.0945}, [5]float64{-0.1325, 0.3015, 0.1400, -0.1070, -0.0956}
		if s.Taper == 0 {
			d := 2 * (3*r + tw + tf - math.Sqrt(2*(2*r+tw)*(2*r+tf)))
			it = s.TorsionThinWalled() + 2*factor(parallel, parallel)*pow4(d) - 4*end
			break
		}
		// The circle that touches the back, the outer face and the root's arc.
		x, y := tw+r, s.flangeAt(tw+r)+r*math.Sqrt(1+p*p)
		d := 2 * (x + y + r - math.Sqrt((x+y+r)*(x+y+r)-x*x-y*y+r*r))
		// Here the web counts with the full depth and the flanges without it.
		flanges := 2 * (s.Width - tw) * (tf + tip) * (tf*tf + tip*tip) / 12
		it = flanges + s.Depth*tw*tw*tw/3 + 2*factor(taper, taper)*pow4(d) - 4*end
		if share < 1 {
			s.Taper, s.TaperAt = 0, 0
			level, _ := s.TorsionElDarwishJohnston()
			it = level + share*(it-level)
		}
	case Angle:
		t := s.Wall
		alpha := 0.0768 + 0.0479*r/t
		d := 2 * (3*r + 2*t - math.Sqrt2*(2*r+t))
		it = s.TorsionThinWalled() + alpha*pow4(d) - 0.210*pow4(t)
	default:
		return 0, false
	}
	return it, it > 0
}
