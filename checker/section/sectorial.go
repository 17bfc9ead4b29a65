package section

import "math"

// sectorial gives the shear centre, measured from the lower-left corner of the
// bounding box, and the warping constant Iw (m6) of a shape that has passed
// Check, with the centroid and the second moment about the paper's y axis
// given. All of it is thin-walled theory on the mid-lines of the plates.
//
//	Tube, Pipe, Ellipse, Bar, Rod  shear centre in the centroid; Iw = 0: closed and
//	                      solid sections hardly warp, and leaving it out
//	                      lowers a torsional load
//	ISection  Iw = Iz hs2/4, Iz about the web and hs between the flanges'
//	          mid-lines; see WarpingFlanges
//	Channel   sectorial integrals, the flange's taper included
//	Tee       shear centre where the mid-lines meet;
//	          Iw = b3 tf3/144 + h'3 tw3/36 (warping of the plates across their
//	          thickness, Bleich), h' from the flange's mid-line to the stem's end
//	Angle     shear centre where the mid-lines meet;
//	          Iw = t3 (h'3 + b'3)/36, h' and b' from that point to the toes
//	DoubleAngle  shear centre where its axis of symmetry meets the mid-line of
//	          the outstanding legs; Iw twice that of one angle, a lower bound
func (s Shape) sectorial(centroid Point, iy float64) (shear Point, iw float64) {
	cube := func(v float64) float64 { return v * v * v }
	switch s.Kind {
	case ISection:
		hs := s.Depth - s.Flange
		return centroid, iy * hs * hs / 4
	case Channel:
		e, iw := s.channelSectorial()
		return Point{s.Web/2 - e, centroid.Y}, iw
	case Tee:
		stem := s.Depth - s.Flange/2
		return Point{centroid.X, stem}, cube(s.Width)*cube(s.Flange)/144 + cube(stem)*cube(s.Web)/36
	case Angle:
		m := s.Wall / 2
		return Point{m, m}, cube(s.Wall) * (cube(s.Depth-m) + cube(s.Width-m)) / 36
	case DoubleAngle:
		_, iw := s.oneAngle().sectorial(Point{}, 0)
		return Point{centroid.X, s.Depth - s.Wall/2}, 2 * iw
	}
	return centroid, 0
}

// WarpingFlanges gives the warping constant of an I section from its flanges
// alone, tf b3 hs2/24 (m6). It is up to 1.3 % less than Iz hs2/4 for listed
// sections, and more for a stout web or large roots, whose share of Iz hardly
// warps. 0 for other kinds.
func (s Shape) WarpingFlanges() float64 {
	if s.Kind != ISection {
		return 0
	}
	hs := s.Depth - s.Flange
	return s.Flange * s.Width * s.Width * s.Width * hs * hs / 24
}

// channelSectorial gives the distance of a channel's shear centre from the
// web's mid-line, away from the flanges (m), and the warping constant (m6). A
// flange runs from the web's mid-line (x = 0) to its tip; its thickness t(x)
// and so the height y(x) of its mid-line are linear, the integrands are cubics,
// for which Gauss's rule with two points is exact.
func (s Shape) channelSectorial() (e, iw float64) {
	length := s.Width - s.Web/2
	gauss := [2]float64{length / 2 * (1 - 1/math.Sqrt(3)), length / 2 * (1 + 1/math.Sqrt(3))}
	flange := func(x float64) (t, y float64) {
		t = s.Flange
		if s.Taper > 0 {
			t = s.flangeAt(s.Web/2 + x)
		}
		return t, (s.Depth - t) / 2
	}
	// With the pole on the web's mid-line the sectorial coordinate of the
	// flange is y0 x, wherever its slope takes it.
	_, y0 := flange(0)
	ix := s.Web * 2 * y0 * y0 * y0 / 3
	product := 0.0
	for _, x := range gauss {
		t, y := flange(x)
		ix += length * t * y * y
		product += length * t * y0 * x * y
	}
	e = product / ix
	iw = s.Web * 2 * y0 * y0 * y0 / 3 * e * e
	for _, x := range gauss {
		t, y := flange(x)
		omega := y0*x - e*y
		iw += length * t * omega * omega
	}
	return e, iw
}
