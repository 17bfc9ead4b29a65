package catalogue

import (
	"math"
	"slices"
	"strings"
	"testing"

	"kern/checker/section"
)

func TestFindAmerican(t *testing.T) {
	for _, c := range []struct{ text, want, assumed string }{
		{"W14x90", "W14X90", ""}, {"W14X90", "W14X90", ""}, {"w 14 x 90", "W14X90", ""}, {"W14 × 90", "W14X90", ""}, {"W14*90", "W14X90", ""}, {"W14x90 ASTM A6", "W14X90", ""},
		{"W6x8.5", "W6X8.5", ""}, {"M12.5x12.4", "M12.5X12.4", ""}, {"S24x80", "S24X80", ""}, {"HP12x53", "HP12X53", ""}, {"C12x20.7", "C12X20.7", ""}, {"MC 12 x 31", "MC12X31", ""},
		{"WT7x45", "WT7X45", ""}, {"wt10.5x31", "WT10.5X31", ""}, {"MT6.25x6.2", "MT6.25X6.2", ""}, {"ST7.5x21.45", "ST7.5X21.45", ""}, {"ST3X8.6", "ST3X8.6", ""},
		{"HSS8x8x1/2", "HSS8X8X1/2", assumedA500}, {"HSS8X8X.500", "HSS8X8X1/2", assumedA500}, {"HSS8x8x.5", "HSS8X8X1/2", assumedA500}, {"hss 8 x 8 x 0.5", "HSS8X8X1/2", assumedA500},
		{"HSS8x8x1/2 A500", "HSS8X8X1/2", ""}, {"HSS8x8x1/2 ASTM A500", "HSS8X8X1/2", ""}, {"HSS8x8x1/2 A1085", "HSS8X8X1/2 A1085", ""}, {"HSS8x8x1/2 ASTM A1085/A1085M", "HSS8X8X1/2 A1085", ""},
		{"HSS7x7x0.188", "HSS7X7X3/16", assumedA500}, {"HSS7x7x.1875", "HSS7X7X3/16", assumedA500}, {"HSS5-1/2x5-1/2x1/4", "HSS5-1/2X5-1/2X1/4", assumedA500}, {"HSS5.5x5.5x.25", "HSS5-1/2X5-1/2X1/4", assumedA500},
		{"HSS6x8x3/8", "HSS8X6X3/8", assumedA500 + ", " + assumedUpright},
		{"HSS6.625x0.280", "HSS6.625X0.280", assumedA500}, {"HSS 6.625 x .280", "HSS6.625X0.280", assumedA500}, {"HSS6x3/8", "HSS6.000X0.375", assumedA500},
		{"Pipe 6 STD", "Pipe 6 STD", ""}, {"Pipe6XS", "Pipe 6 XS", ""}, {"PIPE 8 xx-strong", "Pipe 8 XXS", ""}, {"Pipe 1-1/2 Std.", "Pipe 1-1/2 STD", ""}, {"Pipe 1 1/2 STD", "Pipe 1-1/2 STD", ""}, {"Pipe 1½ STD", "Pipe 1-1/2 STD", ""},
		{"pipe 6 extra strong", "Pipe 6 XS", ""}, {"Pipe 6 STD A53", "Pipe 6 STD", ""},
		{"L4x4x1/2", "L4X4X1/2", ""}, {"L4X4X.5", "L4X4X1/2", ""}, {"L 3-1/2 x 3 1/2 x 1/4", "L3-1/2X3-1/2X1/4", ""}, {"L3½x3½x¼", "L3-1/2X3-1/2X1/4", ""}, {"L3x4x1/2", "L4X3X1/2", assumedLeg},
		{"2L4x3x3/8x3/8 LLBB", "2L4X3X3/8X3/8 LLBB", ""}, {"2L4X3X3/8X3/8SLBB", "2L4X3X3/8X3/8 SLBB", ""}, {"2L4x3x3/8", "2L4X3X3/8 LLBB", "the longer legs back to back"}, {"2 L 4x4x1/2x3/4", "2L4X4X1/2X3/4", ""},
		{"2L4x4x1/2x1/2", "2L4X4X1/2X1/2", ""}, {"2L3x4x3/8 SLBB", "2L4X3X3/8 SLBB", ""},
		// What stays European.
		{"HP 305x79", "HP 305x79", ""}, {"L 100x75x10", "L 100x75x10", ""}, {"HEB 200", "HEB 200", ""}, {"1/2 HEB 200", "1/2 HEB 200", ""},
	} {
		e, ok := Find(c.text)
		if !ok || e.Designation != c.want || e.Assumed != c.assumed {
			t.Errorf("Find(%q) = %q, %v, assumed %q; want %q, assumed %q", c.text, e.Designation, ok, e.Assumed, c.want, c.assumed)
		}
	}
	for _, text := range []string{
		"W14x91", "W14", "W", "W14x90x1", "W-14x90", "W14x-90", "14x90", "W14x90 A500", "W14x90 A992", "HSS8x8", "HSS8x8x1/3", "HSS8x8x0", "HSS8x8x4", "HSS8x8x1/2x1", "HSS8x8x1/2 A36", "HSS8x8x1/2 A53",
		"HSS6.6251x.28", "HSS60x60x1", "Pipe 6", "Pipe 6 XXXS", "Pipe 7 STD", "Pipe STD", "Pipe 3-1/2 XXS", "L4x4", "L4x4x1/16", "L4x4x1/2 LLBB", "2L4x3", "2L4x3x1/16", "2L4x4x1/2x12", "WT7x44", "W44X335 STD",
		"HSS8x8x1-", "HSS8x8x-1/2", "HSS8x8x1/2/2", "HSS8x8x1//2", "HSS8x8x+1/2", "HSS8x8x1e0", "HSS1 2 3x8x1/2", "C12x20.7x3", "W14x90\x00", "W14xx90", "X", "2L", "S355", "M", "C30/37",
	} {
		if e, ok := Find(text); ok {
			t.Errorf("Find(%q) found %q", text, e.Designation)
		}
	}
	if e, _ := Find("2L4x4x1/2x1/2"); e.Listed {
		t.Error("a gap of 1/2 in. is listed")
	}
	if e, _ := Find("HSS13x13x1/2"); e.Listed || e.Designation != "HSS13X13X1/2" {
		t.Errorf("HSS13x13x1/2: %+v", e)
	}
}

// Every American section is found by its own designation, by that in small
// letters with blanks, and by no European name.
func TestAmericanNamesAreOwn(t *testing.T) {
	for _, e := range All() {
		if !e.American() {
			continue
		}
		for _, text := range []string{e.Designation, strings.ToLower(e.Designation), strings.ReplaceAll(e.Designation, "X", " x ")} {
			if strings.Contains(text, "S ") || strings.Contains(text, "  x ") {
				continue // the X of XS and XXS
			}
			got, ok := Find(text)
			if !ok || got.Designation != e.Designation || got.Shape != e.Shape || got.Listed != e.Listed {
				t.Errorf("Find(%q) = %q, %v", text, got.Designation, ok)
			}
		}
		if _, taken := catalogue().names[e.Designation]; taken {
			t.Errorf("%s is also a European name", e.Designation)
		}
	}
}

// The mass in the name of a rolled shape is that of its area, at 490 lb/ft3
// (ASTM A6: the nominal mass is that of the theoretical area). A few light shapes
// are heavier by their published area than by name.
func TestAmericanMasses(t *testing.T) {
	heavier := map[string]float64{
		"M3X2.9": 8, "M4X4.08": 7, "MT3X1.85": 1.2, "M6X3.7": 1.2, "C3X3.5": 6.5, "HP8X36": 1, "ST1.5X2.85": 1,
	}
	seen := 0
	for _, e := range All() {
		switch e.Family {
		case "W", "M", "S", "C", "MC", "WT", "MT", "ST":
		case "HP":
			if !e.American() {
				continue
			}
		default:
			continue
		}
		seen++
		p, err := section.Compute(e.Shape)
		n, _ := parseAmerican(e.Designation)
		if err != nil {
			t.Fatal(err)
		}
		mass := float64(n.size[1]) / inchUnits
		got := p.Area / inch / inch * 490 / 144
		most := 2.2
		if m, ok := heavier[e.Designation]; ok {
			most = m
		}
		if d := 100 * (got/mass - 1); math.Abs(d) > most {
			t.Errorf("%s: %.2f lb/ft by its area (%+.2f %%)", e.Designation, got, d)
		}
	}
	if seen != 289+16+28+22+32+40+287+14+28 {
		t.Errorf("%d shapes", seen)
	}
}

// The design wall: 0.93 of the nominal for A500, A501, A847 and A53, all of it for
// A1085 and A1065 (AISC 360 B4.2, from memory).
func TestDesignWalls(t *testing.T) {
	for text, want := range map[string]float64{
		"HSS8x8x1/2": 0.465, "HSS8x8x1/2 A500": 0.465, "HSS8x8x1/2 A501": 0.465, "HSS8x8x1/2 A847": 0.465, "HSS8x8x1/2 A1085": 0.5, "HSS8x8x1/2 A1065": 0.5,
		"HSS6.625x0.280": 0.2604, "HSS6.625x0.280 A1085": 0.28, "HSS6.625x0.188": 0.174375, "HSS16x.312": 0.290625, "HSS18x.313": 0.290625, "Pipe 6 STD": 0.2604,
	} {
		e, ok := Find(text)
		if !ok || math.Abs(e.Shape.Wall/inch-want) > 1e-12 {
			t.Errorf("%s: wall %.6f in, want %g", text, e.Shape.Wall/inch, want)
		}
		if e.Shape.Kind == section.Tube && (math.Abs(e.Shape.OuterRadius-2*e.Shape.Wall) > 1e-15 || e.Shape.InnerRadius != e.Shape.Wall) {
			t.Errorf("%s: corners %g and %g", text, e.Shape.OuterRadius, e.Shape.InnerRadius)
		}
	}
}

func TestNearestAmerican(t *testing.T) {
	for _, c := range []struct {
		text string
		want []string
	}{
		{"W14x91", []string{"W14X90", "W14X99"}}, {"W15x90", []string{"W16X89", "W14X90"}}, {"WF14x90", []string{"W14X90", "W14X82"}}, {"W14", []string{"W14X22", "W14X26"}},
		{"HSS8x8x1/3", []string{"HSS8X8X5/16", "HSS8X8X3/8"}}, {"HSS8x8", []string{"HSS8X8X1/8", "HSS8X8X3/16"}}, {"TS8x8x1/2", []string{"HSS8X8X1/2", "HSS8X8X5/8"}},
		{"HSS6.5x.2801", []string{"HSS6.625X0.280", "HSS6.625X0.312"}}, {"Pipe 6", []string{"Pipe 6 STD", "Pipe 6 XS"}}, {"Pipe 7 XS", []string{"Pipe 8 XS", "Pipe 8 STD"}},
		{"L4x4", []string{"L4X4X1/4", "L4X4X5/16"}}, {"HP12x50", []string{"HP12X53", "HP12X63"}}, {"C12x21", []string{"C12X20.7", "C12X25"}}, {"2L4x3x7/16 SLBB", []string{"2L4X3X1/2 SLBB", "2L4X3X1/2X3/8 SLBB"}},
		{"HP 300x80", []string{"HP 305x79", "HP 305x88"}}, {"L 100x76x10", []string{"L 100x75x10", "L 100x75x12"}},
	} {
		if got := Nearest(c.text, 2); !slices.Equal(got, c.want) {
			t.Errorf("Nearest(%q) = %q, want %q", c.text, got, c.want)
		}
	}
}

// AISC's design guide on torsion gives the polar radius and the flexural constant
// of pairs as they are here; a pair is symmetric about the axis between the backs.
func TestPairsAreSymmetric(t *testing.T) {
	for _, text := range []string{"2L4x3x3/8x3/8 LLBB", "2L4x3x3/8x3/8 SLBB", "2L6x6x1/2"} {
		e, _ := Find(text)
		p, err := section.Compute(e.Shape)
		if err != nil || p.IXY != 0 || math.Abs(p.SX) > 1e-12 || p.SY <= 0 {
			t.Errorf("%s: %+v, %v", text, p, err)
		}
		one, _ := section.Compute(section.Shape{Kind: section.Angle, Made: section.Rolled, Depth: e.Shape.Depth, Width: e.Shape.Width, Wall: e.Shape.Wall, Root: e.Shape.Root, Toe: e.Shape.Toe})
		// Steiner: the pair from one angle.
		arm := one.CX + e.Shape.Gap/2
		if math.Abs(p.Area/(2*one.Area)-1) > 1e-12 || math.Abs(p.IX/(2*one.IX)-1) > 1e-12 || math.Abs(p.IY/(2*(one.IY+one.Area*arm*arm))-1) > 1e-12 || math.Abs(p.It/(2*one.It)-1) > 1e-12 {
			t.Errorf("%s is not twice its angle", text)
		}
	}
}

// AISC's list prints the pipes XS from 14 in. up for 0.90 of the nominal wall.
func TestLargePipes(t *testing.T) {
	for text, want := range map[string]float64{"Pipe 14 XS": 0.45, "Pipe 26 XS": 0.45, "Pipe 12 XS": 0.465, "Pipe 26 STD": 0.34875} {
		if e, ok := Find(text); !ok || math.Abs(e.Shape.Wall/inch-want) > 1e-12 {
			t.Errorf("%s: wall %.5f in, want %g", text, e.Shape.Wall/inch, want)
		}
	}
}
