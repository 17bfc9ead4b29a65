package section

import (
	"math"
	"testing"
)

func same(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance*math.Abs(want)) {
		t.Errorf("%s: %.15g, want %.15g", what, got, want)
	}
}

func TestBarClosedForms(t *testing.T) {
	b, h := 0.06, 0.09
	p := compute(t, Shape{Kind: Bar, Width: b, Depth: h})
	same(t, "A", p.Area, b*h, 1e-14)
	same(t, "I major", p.IMajor, b*h*h*h/12, 1e-14)
	same(t, "I minor", p.IMinor, h*b*b*b/12, 1e-14)
	same(t, "Wel", p.WelMajor, b*h*h/6, 1e-14)
	same(t, "Wpl major", p.WplMajor, b*h*h/4, 1e-14)
	same(t, "Wpl minor", p.WplMinor, h*b*b/4, 1e-14)
	same(t, "perimeter", p.Perimeter, 2*(b+h), 1e-14)
	if p.Turned || p.Angle != 0 || p.Iw != 0 || p.SX != 0 || p.SY != 0 {
		t.Errorf("%+v", p)
	}
}

// Timoshenko and Goodier, Theory of Elasticity, the table of k1 for rectangles.
func TestRectangleTorsion(t *testing.T) {
	for _, c := range []struct{ ratio, k float64 }{
		{1, 0.1406}, {1.2, 0.166}, {1.5, 0.196}, {2, 0.229}, {2.5, 0.249}, {3, 0.263}, {4, 0.281}, {5, 0.291}, {10, 0.312},
	} {
		if got := TorsionRectangle(c.ratio, 1) / c.ratio; math.Abs(got-c.k) > 6e-4 {
			t.Errorf("b/t %g: k1 = %.5f, table %g", c.ratio, got, c.k)
		}
		same(t, "the sides the other way", TorsionRectangle(1, c.ratio), TorsionRectangle(c.ratio, 1), 0)
	}
	same(t, "a thin plate", TorsionRectangle(1, 1e-6), 1e-18/3*(1-0.63025e-6), 1e-10)
}

func TestRoundClosedForms(t *testing.T) {
	d, w := 0.1683, 0.008
	in := d - 2*w
	p := compute(t, Shape{Kind: Pipe, Made: Hot, Diameter: d, Wall: w})
	same(t, "pipe A", p.Area, math.Pi/4*(d*d-in*in), 1e-13)
	same(t, "pipe I", p.IMajor, math.Pi/64*(math.Pow(d, 4)-math.Pow(in, 4)), 1e-13)
	same(t, "pipe I", p.IMinor, p.IMajor, 1e-13)
	same(t, "pipe It", p.It, 2*p.IMajor, 1e-13)
	same(t, "pipe Wel", p.WelMinor, 2*p.IMajor/d, 1e-13)
	same(t, "pipe Wpl", p.WplMinor, (d*d*d-in*in*in)/6, 1e-13)
	same(t, "pipe Wpl", p.WplMajor, (d*d*d-in*in*in)/6, 1e-13)
	same(t, "pipe Av", p.AvMajor, 2*p.Area/math.Pi, 1e-13)
	same(t, "pipe perimeter", p.Perimeter, math.Pi*d, 1e-13)
	p = compute(t, Shape{Kind: Rod, Diameter: d})
	same(t, "rod A", p.Area, math.Pi/4*d*d, 1e-13)
	same(t, "rod I", p.IMajor, math.Pi/64*math.Pow(d, 4), 1e-13)
	same(t, "rod It", p.It, math.Pi/32*math.Pow(d, 4), 1e-13)
	same(t, "rod Wpl", p.WplMajor, d*d*d/6, 1e-13)
}

func TestTubeClosedForms(t *testing.T) {
	h, b, w := 0.2, 0.1, 0.008
	s := tube(Hot, h, b, w)
	p := compute(t, s)
	ro, ri := 1.5*w, w
	// EN 10210-2, Annex: corner areas and their moments.
	same(t, "A", p.Area, 2*w*(b+h-2*w)-(4-math.Pi)*(ro*ro-ri*ri), 1e-13)
	ag, aq := (1-math.Pi/4)*ro*ro, (1-math.Pi/4)*ri*ri
	hg := h/2 - (10-3*math.Pi)/(12-3*math.Pi)*ro
	hq := (h-2*w)/2 - (10-3*math.Pi)/(12-3*math.Pi)*ri
	own := 1.0/3 - math.Pi/16 - 1/(3*(12-3*math.Pi))
	i := b*h*h*h/12 - (b-2*w)*math.Pow(h-2*w, 3)/12 - 4*(own*math.Pow(ro, 4)+ag*hg*hg) + 4*(own*math.Pow(ri, 4)+aq*hq*hq)
	same(t, "I", p.IMajor, i, 1e-12)
	wpl := b*h*h/4 - (b-2*w)*(h-2*w)*(h-2*w)/4 - 4*ag*hg + 4*aq*hq
	same(t, "Wpl", p.WplMajor, wpl, 1e-12)
	same(t, "Av", p.AvMajor, p.Area*h/(b+h), 1e-13)
	same(t, "Av", p.AvMinor, p.Area*b/(b+h), 1e-13)
	lying := compute(t, tube(Hot, b, h, w))
	if !lying.Turned || lying.Angle != math.Pi/2 || p.Turned {
		t.Errorf("turned: %v upright, %v lying at %g", p.Turned, lying.Turned, lying.Angle)
	}
}

func TestWeldedISectionClosedForms(t *testing.T) {
	h, b, tw, tf := 0.4, 0.2, 0.008, 0.014
	p := compute(t, Shape{Kind: ISection, Made: Welded, Depth: h, Width: b, Web: tw, Flange: tf})
	hw := h - 2*tf
	same(t, "A", p.Area, 2*b*tf+hw*tw, 1e-13)
	same(t, "I major", p.IMajor, (b*h*h*h-(b-tw)*hw*hw*hw)/12, 1e-13)
	same(t, "I minor", p.IMinor, (2*tf*b*b*b+hw*tw*tw*tw)/12, 1e-13)
	same(t, "Wpl major", p.WplMajor, b*tf*(h-tf)+tw*hw*hw/4, 1e-13)
	same(t, "Wpl minor", p.WplMinor, tf*b*b/2+hw*tw*tw/4, 1e-13)
	same(t, "Iw", p.Iw, p.IMinor*(h-tf)*(h-tf)/4, 1e-13)
	same(t, "Av", p.AvMajor, hw*tw, 1e-13)
	same(t, "Av", p.AvMinor, 2*b*tf, 1e-13)

	// A wide and shallow one: the flanges bend about the paper's y axis, which is
	// then the major one; warping stays with the web's axis.
	p = compute(t, Shape{Kind: ISection, Made: Welded, Depth: 0.1, Width: 0.3, Web: tw, Flange: tf})
	if !p.Turned || p.IMajor != p.IY {
		t.Errorf("a wide H is not turned: %+v", p)
	}
	same(t, "Iw, wide", p.Iw, p.IY*(0.1-tf)*(0.1-tf)/4, 1e-12)
	same(t, "Av, wide", p.AvMajor, 2*0.3*tf, 1e-13)
}

func TestRootFillets(t *testing.T) {
	s := Shape{Kind: ISection, Made: Rolled, Depth: 0.3, Width: 0.3, Web: 0.011, Flange: 0.019, Root: 0.027}
	p := compute(t, s)
	same(t, "A", p.Area, 2*s.Width*s.Flange+(s.Depth-2*s.Flange)*s.Web+(4-math.Pi)*s.Root*s.Root, 1e-13)
	// EN 1993-1-1, 6.2.6(3)a; HEB 300: 47.43 cm2 (producers' tables, from memory).
	same(t, "Av", p.AvMajor, p.Area-2*s.Width*s.Flange+(s.Web+2*s.Root)*s.Flange, 1e-13)
	same(t, "Av, printed", p.AvMajor/cm2, 47.43, 2e-4)
}

func TestTeeClosedForms(t *testing.T) {
	h, b, tw, tf := 0.15, 0.12, 0.008, 0.012
	p := compute(t, Shape{Kind: Tee, Made: Welded, Depth: h, Width: b, Web: tw, Flange: tf})
	af, as := b*tf, (h-tf)*tw
	cy := (af*(h-tf/2) + as*(h-tf)/2) / (af + as)
	same(t, "centroid", p.CY, cy, 1e-13)
	same(t, "CX", p.CX, b/2, 0)
	ix := b*tf*tf*tf/12 + tw*math.Pow(h-tf, 3)/12 + af*math.Pow(h-tf/2-cy, 2) + as*math.Pow((h-tf)/2-cy, 2)
	same(t, "Ix", p.IX, ix, 1e-12)
	same(t, "shear centre", p.SY, h-tf/2-cy, 1e-12)
	// More than half of the area is in the flange: the plastic axis lies there.
	y := (af + as) / 2 / b // from the top
	wpl := b*y*y/2 + b*(tf-y)*(tf-y)/2 + as*((h-tf)/2+tf-y)
	major := p.WplMajor
	if p.Turned {
		major = p.WplMinor
	}
	same(t, "Wpl", major, wpl, 1e-9)
	same(t, "Iw", p.Iw, math.Pow(b*tf, 3)/144+math.Pow((h-tf/2)*tw, 3)/36, 1e-13)
	same(t, "Av", math.Min(p.AvMajor, p.AvMinor), tw*(h-tf/2), 1e-13)
}

// The shear centre and warping constant of a channel of parallel plates, as in
// textbooks, on mid-lines.
func TestChannelClosedForms(t *testing.T) {
	h, b, tw, tf := 0.2, 0.08, 0.006, 0.011
	p := compute(t, Shape{Kind: Channel, Made: Welded, Depth: h, Width: b, Web: tw, Flange: tf})
	hm, bm := h-tf, b-tw/2
	e := 3 * bm * bm * tf / (hm*tw + 6*bm*tf)
	same(t, "shear centre", -(p.SX + p.CX - tw/2), e, 1e-12)
	iw := bm * bm * bm * hm * hm * tf / 12 * (3*bm*tf + 2*hm*tw) / (6*bm*tf + hm*tw)
	same(t, "Iw", p.Iw, iw, 1e-12)
	same(t, "SMajor", p.SMajor, p.SX, 1e-13)
	if p.SY != 0 || p.SMinor != 0 {
		t.Errorf("the shear centre leaves the axis of symmetry: %+v", p)
	}
	// A taper whose slope vanishes is no taper.
	flat := Shape{Kind: Channel, Made: Rolled, Depth: h, Width: b, Web: tw, Flange: tf, Root: 0.013, Taper: 1e-12, TaperAt: b / 2}
	p, q := compute(t, flat), compute(t, Shape{Kind: Channel, Made: Rolled, Depth: h, Width: b, Web: tw, Flange: tf, Root: 0.013})
	for i, v := range values(q) {
		if math.Abs(values(p)[i].value-v.value) > 1e-9*math.Abs(v.value)+1e-15 {
			t.Errorf("%s: %g with no slope to speak of, %g without", v.name, values(p)[i].value, v.value)
		}
	}
}

func TestAngleClosedForms(t *testing.T) {
	a, w := 0.1, 0.01
	p := compute(t, Shape{Kind: Angle, Made: Welded, Depth: a, Width: a, Wall: w})
	same(t, "A", p.Area, w*(2*a-w), 1e-13)
	c := (a*w*w/2 + (a-w)*w*(a+w)/2) / p.Area
	same(t, "centroid", p.CX, c, 1e-13)
	same(t, "angle", p.Angle, math.Pi/4, 0)
	// About its axis of symmetry and across it, by the square of side a less the
	// square of side a - w.
	in := a - w
	same(t, "I major", p.IMajor, (math.Pow(a, 4)-math.Pow(in, 4))/12, 1e-12)
	cross := math.Pow(a, 4)/12 - math.Pow(in, 4)/12
	off := math.Sqrt2 * (a/2 - c)
	inner := math.Sqrt2 * (w + in/2 - c)
	same(t, "I minor", p.IMinor, cross+a*a*off*off-in*in*inner*inner, 1e-11)
	same(t, "SMajor", math.Abs(p.SMajor), math.Sqrt2*(c-w/2), 1e-12)
	if math.Abs(p.SMinor) > 1e-15 {
		t.Errorf("the shear centre leaves the axis of symmetry: %g", p.SMinor)
	}
	same(t, "Iw", p.Iw, math.Pow(w, 3)*math.Pow(a-w/2, 3)/18, 1e-13)
}

func TestDefaultRadii(t *testing.T) {
	for _, c := range []struct {
		made            Made
		t, outer, inner float64
	}{
		{Hot, 0.008, 0.012, 0.008},
		{Cold, 0.006, 0.012, 0.006}, {Cold, 0.0061, 0.01525, 0.00915},
		{Cold, 0.010, 0.025, 0.015}, {Cold, 0.0101, 0.0303, 0.0202},
		{Welded, 0.01, 0, 0}, {Rolled, 0.01, 0, 0}, {MadeUnknown, 0.01, 0, 0},
	} {
		outer, inner := DefaultRadii(c.made, c.t)
		if math.Abs(outer-c.outer) > 1e-15 || math.Abs(inner-c.inner) > 1e-15 {
			t.Errorf("%s %g: %g, %g", c.made, c.t, outer, inner)
		}
	}
}

func TestNames(t *testing.T) {
	for k, want := range []string{"unknown", "tube", "pipe", "bar", "rod", "isection", "channel", "tee", "angle", "ellipse", "doubleangle", "given", "unknown"} {
		if got := Kind(k).String(); got != want {
			t.Errorf("kind %d is %q, want %q", k, got, want)
		}
	}
	for m, want := range []string{"unknown", "rolled", "hot", "cold", "welded", "unknown"} {
		if got := Made(m).String(); got != want {
			t.Errorf("made %d is %q, want %q", m, got, want)
		}
	}
}
