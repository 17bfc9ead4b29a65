package section

import (
	"fmt"
	"math"
)

// Properties are the properties of a cross-section about its principal axes
// and about centroidal axes parallel to the paper's. The major axis points
// along (cos Angle, sin Angle) on the paper, the minor axis a quarter turn
// counter-clockwise from it; a bending modulus "about" an axis belongs to the
// fibres on either side of that axis.
type Properties struct {
	Area float64 // m2

	IMajor, IMinor float64 // second moments about the principal axes, IMajor >= IMinor, m4
	RMajor, RMinor float64 // radii of gyration, m

	// Elastic moduli, m3: the smaller of the two sides, then each side. The
	// positive side of the major axis is that to which the minor axis points;
	// the positive side of the minor axis is that to which the major axis points.
	WelMajor, WelMinor       float64
	WelMajorPos, WelMajorNeg float64
	WelMinorPos, WelMinorNeg float64

	// Plastic moduli about the axes parallel to the principal axes that halve
	// the area, m3.
	WplMajor, WplMinor float64

	It float64 // St Venant torsion constant, m4; see TorsionPlates, TorsionProducer, TorsionElDarwishJohnston
	Iw float64 // warping constant, m6; 0 for tube, pipe, ellipse, bar and rod, where it is left out

	// Shear areas by EN 1993-1-1:2005, 6.2.6(3), m2: AvMajor resists the shear
	// force that goes with bending about the major axis.
	AvMajor, AvMinor float64

	IX, IY, IXY float64 // about centroidal axes parallel to the paper's x and y, m4
	CX, CY      float64 // centroid from the lower-left corner of the bounding box, m

	SX, SY         float64 // shear centre from the centroid along the paper's axes, signed, m
	SMajor, SMinor float64 // shear centre from the centroid along the major and the minor axis, signed, m

	Angle  float64 // from the paper's x axis to the major axis, rad, (-pi/2, pi/2]
	Turned bool    // the major axis lies closer to the paper's y axis than to its x axis

	Perimeter float64 // length of the outer outline, of both angles of a DoubleAngle, m
}

// symmetry tells about which of the paper's axes a shape is its own mirror
// image.
func (s Shape) symmetry() (aboutX, aboutY bool) {
	switch s.Kind {
	case Tube, Pipe, Ellipse, Bar, Rod, ISection:
		return true, true
	case Channel:
		return true, false
	case Tee, DoubleAngle:
		return false, true
	}
	return false, false
}

// Compute gives the properties of a shape. The error is a *ShapeError if Check
// finds a fault, or tells which property has no finite, positive value.
func Compute(s Shape) (Properties, error) {
	if faults := s.Check(); len(faults) > 0 {
		return Properties{}, &ShapeError{s.Kind, faults}
	}
	if s.Kind == Ellipse {
		return s.computeEllipse()
	}
	loops := s.outline()
	var segments []Segment
	for _, l := range loops {
		segments = append(segments, l...)
	}
	p := Properties{Perimeter: loops[0].Length()}
	if s.Kind == DoubleAngle {
		p.Perimeter += loops[1].Length()
	}

	_, size := extent(segments)
	aboutX, aboutY := s.symmetry()
	m := integrate(segments, Point{size.X / 2, size.Y / 2})
	centroid := Point{size.X/2 + m.x/m.a, size.Y/2 + m.y/m.a}
	if aboutY {
		centroid.X = size.X / 2
	}
	if aboutX {
		centroid.Y = size.Y / 2
	}
	p.CX, p.CY = centroid.X, centroid.Y

	m = integrate(segments, centroid)
	p.Area, p.IX, p.IY, p.IXY = m.a, m.yy, m.xx, m.xy
	if aboutX || aboutY {
		p.IXY = 0
	}
	cos, sin := p.orient(s)

	own := turned(segments, centroid, p.Angle, cos, sin)
	p.bend(own, aboutX, aboutY, s)

	shear, iw := s.sectorial(centroid, p.IY)
	p.It, p.Iw = s.torsionConstant(p.IX+p.IY), iw
	p.SX, p.SY = shear.X-centroid.X, shear.Y-centroid.Y
	p.SMajor, p.SMinor = p.SX*cos+p.SY*sin, p.SY*cos-p.SX*sin

	p.AvMajor, p.AvMinor = s.shearAreas(p.Area)
	if p.Turned {
		p.AvMajor, p.AvMinor = p.AvMinor, p.AvMajor
	}
	if err := p.sound(); err != nil {
		return Properties{}, fmt.Errorf("%s: %w", s.Kind, err)
	}
	return p, nil
}

// orient finds the principal axes. Where they are those of the paper or its
// diagonal, the cosine and sine are exact.
func (p *Properties) orient(s Shape) (cos, sin float64) {
	switch {
	case p.IXY == 0 && p.IY > p.IX*(1+1e-12):
		p.Angle, cos, sin = math.Pi/2, 0, 1
	case p.IXY == 0:
		p.Angle, cos, sin = 0, 1, 0
	case s.Kind == Angle && s.Depth == s.Width:
		p.Angle, cos, sin = math.Pi/4, math.Sqrt2/2, math.Sqrt2/2
	default:
		p.Angle = math.Atan2(-2*p.IXY, p.IX-p.IY) / 2
		sin, cos = math.Sincos(p.Angle)
	}
	p.Turned = p.Angle > math.Pi/4 || p.Angle < -math.Pi/4
	return cos, sin
}

// bend fills in what belongs to bending about the principal axes; own are the
// segments in those axes.
func (p *Properties) bend(own []Segment, aboutX, aboutY bool, s Shape) {
	m := integrate(own, Point{})
	p.IMajor, p.IMinor = m.yy, m.xx
	if p.IMinor > p.IMajor { // equal but for rounding
		p.IMajor, p.IMinor = p.IMinor, p.IMajor
	}
	p.RMajor, p.RMinor = math.Sqrt(p.IMajor/p.Area), math.Sqrt(p.IMinor/p.Area)

	low, high := extent(own)
	p.WelMajorPos, p.WelMajorNeg = p.IMajor/high.Y, p.IMajor/-low.Y
	p.WelMinorPos, p.WelMinorNeg = p.IMinor/high.X, p.IMinor/-low.X
	p.WelMajor = math.Min(p.WelMajorPos, p.WelMajorNeg)
	p.WelMinor = math.Min(p.WelMinorPos, p.WelMinorNeg)

	majorHalves, minorHalves := aboutX, aboutY
	if p.Turned {
		majorHalves, minorHalves = minorHalves, majorHalves
	}
	if s.Kind == Angle && s.Depth == s.Width {
		majorHalves = true // the diagonal is an axis of symmetry
	}
	p.WplMajor = plasticModulus(own, p.Area, low.Y, high.Y, majorHalves)
	// A quarter turn back brings the minor axis to lie along x.
	across := turned(own, Point{}, -math.Pi/2, 0, -1)
	low, high = extent(across)
	p.WplMinor = plasticModulus(across, p.Area, low.Y, high.Y, minorHalves)
}

// sound tells which property is not a finite number, or not positive where it
// must be.
func (p *Properties) sound() error {
	positive := [...]struct {
		name  string
		value float64
	}{
		{"area", p.Area}, {"second moment about the major axis", p.IMajor}, {"second moment about the minor axis", p.IMinor},
		{"radius of gyration about the major axis", p.RMajor}, {"radius of gyration about the minor axis", p.RMinor},
		{"elastic modulus", p.WelMajorPos}, {"elastic modulus", p.WelMajorNeg},
		{"elastic modulus", p.WelMinorPos}, {"elastic modulus", p.WelMinorNeg},
		{"plastic modulus about the major axis", p.WplMajor}, {"plastic modulus about the minor axis", p.WplMinor},
		{"torsion constant", p.It}, {"shear area", p.AvMajor}, {"shear area", p.AvMinor},
		{"second moment about x", p.IX}, {"second moment about y", p.IY}, {"perimeter", p.Perimeter},
	}
	for _, v := range positive {
		if !(v.value > 0) || math.IsInf(v.value, 1) {
			return fmt.Errorf("the %s comes out as %g", v.name, v.value)
		}
	}
	finite := [...]float64{p.Iw, p.IXY, p.CX, p.CY, p.SX, p.SY, p.SMajor, p.SMinor, p.Angle}
	for _, v := range finite {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return fmt.Errorf("a coordinate or the warping constant comes out as %g", v)
		}
	}
	if p.Iw < 0 {
		return fmt.Errorf("the warping constant comes out as %g", p.Iw)
	}
	return nil
}
