package section

import "math"

// shearAreas gives the shear areas (m2) for a shear force along the paper's y
// and along its x axis, for a shape that has passed Check, of area a (m2).
// EN 1993-1-1:2005, 6.2.6(3), with eta = 1.0:
//
//	rolled I, along the web     A - 2 b tf + (tw + 2 r) tf, at least hw tw
//	welded I, channel           hw tw
//	rolled channel, along web   A - 2 b tf + (tw + r) tf, at least hw tw
//	rolled tee, along the stem  A - b tf + (tw + 2 r) tf/2
//	welded tee, along the stem  tw (h - tf/2)
//	I, channel, tee, along the flanges   the area of the flanges alone
//	tube                        A h/(b + h) and A b/(b + h)
//	pipe                        2 A/pi
//	ellipse                     2 (h - t) A/U and 2 (b - t) A/U, U the mid-line's length
//	bar, rod                    A
//	double angle                the area of the two legs along the force
//
// The clause has no line for an angle: the area of its shorter leg is taken for
// both directions. Nor has it one for an elliptical hollow section: what its wall
// of the mean thickness A/U projects onto the direction of the force is taken,
// which for a circle is the clause's 2 A/pi. Published tests of such sections use
// the full thickness t (from memory), 3 % more at 2 : 1.
func (s Shape) shearAreas(a float64) (alongY, alongX float64) {
	h, b, tw, tf, r := s.Depth, s.Width, s.Web, s.Flange, s.Root
	rolled := s.Made == Rolled || s.Root > 0 || s.Taper > 0
	switch s.Kind {
	case Tube:
		return a * h / (b + h), a * b / (b + h)
	case Pipe:
		return 2 * a / math.Pi, 2 * a / math.Pi
	case Ellipse:
		p, q := h-s.Wall, b-s.Wall
		mean := a / ellipsePerimeter(p/2, q/2)
		return 2 * p * mean, 2 * q * mean
	case ISection, Channel:
		alongY = (h - 2*tf) * tw
		if rolled {
			roots := 2 * r
			if s.Kind == Channel {
				roots = r
			}
			alongY = math.Max(alongY, a-2*b*tf+(tw+roots)*tf)
		}
		return alongY, 2 * b * tf
	case Tee:
		if rolled {
			return a - b*tf + (tw+2*r)*tf/2, b * tf
		}
		return tw * (h - tf/2), b * tf
	case DoubleAngle:
		return 2 * h * s.Wall, 2 * b * s.Wall
	case Angle:
		leg := math.Min(h, b) * s.Wall
		return leg, leg
	}
	return a, a
}
