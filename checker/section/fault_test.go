package section

import (
	"errors"
	"math"
	"testing"
)

func TestFaults(t *testing.T) {
	const mm = 1e-3
	hea := Shape{Kind: ISection, Made: Rolled, Depth: 190 * mm, Width: 200 * mm, Web: 6.5 * mm, Flange: 10 * mm, Root: 18 * mm}
	upn := taperChannel(200*mm, 75*mm, 8.5*mm, 11.5*mm, 11.5*mm, 6*mm)
	leg := Shape{Kind: Angle, Made: Rolled, Depth: 100 * mm, Width: 80 * mm, Wall: 10 * mm}
	with := func(s Shape, change func(*Shape)) Shape { change(&s); return s }
	for _, c := range []struct {
		name  string
		s     Shape
		field string // "" for a sound shape
		limit float64
	}{
		{"sound I", hea, "", 0},
		{"sound channel", upn, "", 0},
		{"unknown", Shape{}, "kind", 0},
		{"given", Shape{Kind: Given}, "kind", 0},
		{"no kind", Shape{Kind: 77}, "kind", 0},
		{"missing", with(hea, func(s *Shape) { s.Web = 0 }), "web", 0},
		{"negative", with(hea, func(s *Shape) { s.Depth = -1 }), "depth", 0},
		{"not a number", with(hea, func(s *Shape) { s.Flange = math.NaN() }), "flange", 0},
		{"infinite", with(hea, func(s *Shape) { s.Width = math.Inf(1) }), "width", 0},
		{"root not a number", with(hea, func(s *Shape) { s.Root = math.NaN() }), "root", 0},
		{"root negative", with(hea, func(s *Shape) { s.Root = -1 * mm }), "root", 0},
		{"millimetres as metres", with(hea, func(s *Shape) { s.Depth = 190 }), "depth", 100},
		{"metres as kilometres", with(hea, func(s *Shape) { s.Web = 6.5e-6 }), "web", 1e-5},
		{"web as wide as the flange", with(hea, func(s *Shape) { s.Web = 200 * mm }), "web", 200 * mm},
		{"flanges meet", with(hea, func(s *Shape) { s.Flange = 95 * mm }), "flange", 95 * mm},
		{"flange thicker than wide", Shape{Kind: Tee, Depth: 100 * mm, Width: 20 * mm, Web: 5 * mm, Flange: 30 * mm}, "flange", 20 * mm},
		{"roots meet", with(hea, func(s *Shape) { s.Root = 90 * mm }), "root", 85 * mm},
		{"roots just fit", with(hea, func(s *Shape) { s.Root = 85 * mm }), "", 0},
		{"root wider than the outstand", with(hea, func(s *Shape) { s.Depth, s.Root = 900*mm, 100*mm }), "root", 96.75 * mm},
		{"welded with a root", with(hea, func(s *Shape) { s.Made = Welded }), "root", 0},
		{"taper nowhere on an I", with(hea, func(s *Shape) { s.Taper = 0.08 }), "taper at", 0},
		{"taper beyond the tip of an I", with(hea, func(s *Shape) { s.Taper, s.TaperAt = 0.08, 101*mm }), "taper at", 100 * mm},
		{"taper to nothing on an I", with(hea, func(s *Shape) { s.Taper, s.TaperAt = 0.25, 60*mm }), "taper", 0.25},
		{"taper that fills the web of an I", with(hea, func(s *Shape) { s.Depth, s.Root, s.Taper, s.TaperAt = 30*mm, 0, 0.2, 53.25*mm }), "taper", 0.1},
		{"taper that leaves the stem of a tee", with(hea, func(s *Shape) { s.Kind, s.Depth, s.Root, s.Taper, s.TaperAt = Tee, 30*mm, 0, 0.1, 53.25*mm }), "", 0},
		{"welded with a taper", with(hea, func(s *Shape) { s.Made, s.Root, s.Taper, s.TaperAt = Welded, 0, 0.08, 50*mm }), "taper", 0},
		{"toe thicker than the flange of an I", with(hea, func(s *Shape) { s.Toe = 11 * mm }), "toe", 10 * mm},
		{"gap in an I", with(hea, func(s *Shape) { s.Gap = 5 * mm }), "gap", 0},
		{"wall on an I", with(hea, func(s *Shape) { s.Wall = 5 * mm }), "wall", 0},
		{"taper not a number", with(upn, func(s *Shape) { s.Taper = math.NaN() }), "taper", 0},
		{"taper nowhere", with(upn, func(s *Shape) { s.TaperAt = 0 }), "taper at", 0},
		{"taper beyond the tip", with(upn, func(s *Shape) { s.TaperAt = 80 * mm }), "taper at", 75 * mm},
		{"taper to nothing", with(upn, func(s *Shape) { s.Taper = 0.4 }), "taper", 11.5 / 37.5},
		{"taper that fills the web", with(upn, func(s *Shape) { s.Depth, s.Root, s.Toe, s.Taper, s.TaperAt = 30*mm, 0, 0, 0.25, 60*mm }), "taper", 3.5 / 51.5},
		{"toe thicker than the tip", with(upn, func(s *Shape) { s.Toe = 12 * mm }), "toe", 0},
		{"tube walls meet", Shape{Kind: Tube, Depth: 100 * mm, Width: 40 * mm, Wall: 20 * mm}, "wall", 20 * mm},
		{"tube corner too round", Shape{Kind: Tube, Depth: 100 * mm, Width: 40 * mm, Wall: 8 * mm, OuterRadius: 21 * mm, InnerRadius: 12 * mm}, "outer", 20 * mm},
		{"tube without a wall at the corner", Shape{Kind: Tube, Depth: 100 * mm, Width: 100 * mm, Wall: 5 * mm, OuterRadius: 12 * mm}, "outer", 10 * mm},
		{"tube inside too round", Shape{Kind: Tube, Depth: 100 * mm, Width: 40 * mm, Wall: 8 * mm, OuterRadius: 16 * mm, InnerRadius: 13 * mm}, "inner", 12 * mm},
		{"sound ellipse", Shape{Kind: Ellipse, Made: Hot, Depth: 300 * mm, Width: 150 * mm, Wall: 16 * mm}, "", 0},
		{"ellipse too thick for its tightest bend", Shape{Kind: Ellipse, Made: Hot, Depth: 300 * mm, Width: 150 * mm, Wall: 37.5 * mm}, "wall", 37.5 * mm},
		{"lying ellipse too thick", Shape{Kind: Ellipse, Made: Hot, Depth: 100 * mm, Width: 200 * mm, Wall: 30 * mm}, "wall", 25 * mm},
		{"ellipse without a wall", Shape{Kind: Ellipse, Depth: 300 * mm, Width: 150 * mm}, "wall", 0},
		{"ellipse with a root", Shape{Kind: Ellipse, Depth: 300 * mm, Width: 150 * mm, Wall: 8 * mm, Root: 8 * mm}, "root", 0},
		{"pipe walls meet", Shape{Kind: Pipe, Diameter: 40 * mm, Wall: 20 * mm}, "wall", 20 * mm},
		{"pipe without a diameter", Shape{Kind: Pipe, Wall: 2 * mm}, "outside", 0},
		{"rod without a diameter", Shape{Kind: Rod}, "diameter", 0},
		{"angle as thick as a leg", with(leg, func(s *Shape) { s.Wall = 80 * mm }), "wall", 80 * mm},
		{"root longer than a leg", with(leg, func(s *Shape) { s.Root = 75 * mm }), "root", 70 * mm},
		{"toe thicker than the leg", with(leg, func(s *Shape) { s.Toe = 11 * mm }), "toe", 10 * mm},
		{"toe as thick as the leg", with(leg, func(s *Shape) { s.Toe = 10 * mm }), "", 0},
		{"sound double angle", with(leg, func(s *Shape) { s.Kind, s.Gap = DoubleAngle, 10*mm }), "", 0},
		{"double angle that touches", with(leg, func(s *Shape) { s.Kind = DoubleAngle }), "", 0},
		{"double angle that overlaps", with(leg, func(s *Shape) { s.Kind, s.Gap = DoubleAngle, -1*mm }), "gap", 0},
		{"double angle as thick as a leg", with(leg, func(s *Shape) { s.Kind, s.Wall = DoubleAngle, 80*mm }), "wall", 80 * mm},
		{"gap in an angle", with(leg, func(s *Shape) { s.Gap = 10 * mm }), "gap", 0},
	} {
		faults := c.s.Check()
		_, err := Compute(c.s)
		if c.field == "" {
			if faults != nil || err != nil {
				t.Errorf("%s: %v, %v", c.name, faults, err)
			}
			continue
		}
		if len(faults) != 1 {
			t.Errorf("%s: %+v, want one fault of %q", c.name, faults, c.field)
			continue
		}
		f := faults[0]
		if f.Field != c.field || f.Message == "" || math.IsNaN(f.Limit) || f.Limit < 0 {
			t.Errorf("%s: %+v, want %q", c.name, f, c.field)
		}
		if c.limit > 0 && math.Abs(f.Limit-c.limit) > 1e-9 {
			t.Errorf("%s: limit %g, want %g", c.name, f.Limit, c.limit)
		}
		var shape *ShapeError
		if !errors.As(err, &shape) || shape.Kind != c.s.Kind || len(shape.Faults) != 1 || err.Error() == "" {
			t.Errorf("%s: error %v", c.name, err)
		}
	}
}

// A shape whose radius is at the limit that a fault names passes.
func TestLimitsAreTrue(t *testing.T) {
	s := taperChannel(0.2, 0.075, 0.0085, 0.0115, 0.0115, 0.012)
	faults := s.Check()
	if len(faults) != 1 || faults[0].Field != "toe" {
		t.Fatalf("%+v", faults)
	}
	s.Toe = faults[0].Limit
	if _, err := Compute(s); err != nil {
		t.Errorf("at the limit: %v", err)
	}
	s.Toe = faults[0].Limit * 1.001
	if _, err := Compute(s); err == nil {
		t.Error("beyond the limit: no error")
	}
}

func FuzzCompute(f *testing.F) {
	for _, c := range solidShapes() {
		s := c.s
		f.Add(uint8(s.Kind), uint8(s.Made), s.Depth, s.Width, s.Web, s.Flange, s.Wall, s.Diameter, s.Root, s.Toe, s.OuterRadius, s.InnerRadius, s.Taper, s.TaperAt)
	}
	nan, inf := math.NaN(), math.Inf(1)
	f.Add(uint8(1), uint8(2), nan, inf, 0.0, 0.0, 1e-300, 0.0, 0.0, 0.0, -inf, 5e-324, 0.0, 0.0)
	f.Add(uint8(5), uint8(1), 1e308, 1e308, 1e-308, 1e-308, 0.0, 0.0, 1e300, 0.0, 0.0, 0.0, nan, 0.0)
	f.Add(uint8(2), uint8(1), 0.0, 0.0, 0.0, 0.0, 1e-5, 100.0, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0)
	f.Add(uint8(5), uint8(1), 100.0, 100.0, 1e-5, 1e-5, 0.0, 0.0, 49.99, 0.0, 0.0, 0.0, 0.0, 0.0)
	f.Add(uint8(6), uint8(1), 100.0, 1e-3, 1e-5, 1e-5, 0.0, 0.0, 1e-300, 1e-18, 0.0, 0.0, 1e-20, 1e-9)
	f.Add(uint8(8), uint8(4), 100.0, 1.1e-5, 0.0, 0.0, 1e-5, 0.0, 0.0, 1e-5, 0.0, 0.0, 0.0, 0.0)
	f.Fuzz(func(t *testing.T, kind, made uint8, depth, width, web, flange, wall, diameter, root, toe, outer, inner, taper, at float64) {
		s := Shape{Kind: Kind(kind % 13), Made: Made(made % 6), Depth: depth, Width: width, Web: web, Flange: flange, Wall: wall,
			Diameter: diameter, Root: root, Toe: toe, OuterRadius: outer, InnerRadius: inner, Taper: taper, TaperAt: at}
		faults := s.Check()
		loops := s.Outline()
		p, err := Compute(s)
		if len(faults) > 0 {
			if err == nil || loops != nil {
				t.Fatalf("faults %v without an error\n%+v", faults, s)
			}
			for _, x := range faults {
				if x.Field == "" || x.Message == "" || math.IsNaN(x.Limit) || math.IsInf(x.Limit, 0) {
					t.Fatalf("an empty fault: %+v", x)
				}
			}
			return
		}
		if err != nil {
			if p != (Properties{}) {
				t.Fatal("properties beside an error")
			}
			return
		}
		for _, v := range values(p) {
			if math.IsNaN(v.value) || math.IsInf(v.value, 0) {
				t.Fatalf("%s is %g\n%+v", v.name, v.value, s)
			}
			switch v.name {
			case "SX", "SY", "SMajor", "SMinor", "Iw":
			default:
				if v.value <= 0 {
					t.Fatalf("%s is %g\n%+v", v.name, v.value, s)
				}
			}
		}
		if p.IMajor < p.IMinor {
			t.Fatalf("IMajor %g below IMinor %g\n%+v", p.IMajor, p.IMinor, s)
		}
	})
}
