package catalogue

import (
	"math"
	"slices"
	"strings"
	"testing"
)

// Yield and tensile strengths in N/mm2 at nominal thicknesses in mm, at and just
// above the ends of the bands.
//
// Sources: EN 10025-2 Table 7 and EN 10210-1 Table A.3 (read); EN 10219-1, EN
// 10210-1 Table B.3, EN 10025-3, -4 and -6 from memory.
func TestStrengthOfTheProductStandards(t *testing.T) {
	for _, c := range []struct {
		name, standard string
		mm, fy, fu     float64
		row            string
	}{
		{"S235", "EN 10025-2", 2.9, 235, 360, "t <= 16 mm"},
		{"S235JR", "EN 10025-2", 16, 235, 360, "t <= 16 mm"},
		{"S235JR", "EN 10025-2", 16.1, 225, 360, "16 < t <= 40 mm"},
		{"S235JR", "EN 10025-2", 150, 195, 350, "100 < t <= 150 mm"},
		{"S235JR", "EN 10025-2", 250, 175, 340, "200 < t <= 250 mm"},
		{"S275", "EN 10025-2", 2.99, 275, 430, "t <= 16 mm"},
		{"S275", "EN 10025-2", 3, 275, 410, "t <= 16 mm"},
		{"S275J0", "EN 10025-2", 63, 255, 410, "40 < t <= 63 mm"},
		{"S275J0", "EN 10025-2", 63.01, 245, 410, "63 < t <= 80 mm"},
		{"S355J2", "EN 10025-2", 16, 355, 470, "t <= 16 mm"},
		{"S355J2", "EN 10025-2", 20.4, 345, 470, "16 < t <= 40 mm"},
		{"S355J2", "EN 10025-2", 40, 345, 470, "16 < t <= 40 mm"},
		{"S355K2", "EN 10025-2", 100, 315, 470, "80 < t <= 100 mm"},
		{"S355K2", "EN 10025-2", 101, 295, 450, "100 < t <= 150 mm"},
		{"S355", "EN 10025-2", 2, 355, 510, "t <= 16 mm"},
		{"S450J0", "EN 10025-2", 30, 430, 550, "16 < t <= 40 mm"},
		{"S450J0", "EN 10025-2", 150, 380, 530, "100 < t <= 150 mm"},
		{"S460J2", "EN 10025-2", 30, 440, 550, "16 < t <= 40 mm"},
		{"S235JRH", "EN 10210-1", 70, 215, 360, "63 < t <= 80 mm"},
		{"S275J2H", "EN 10210-1", 3, 275, 430, "t <= 16 mm"},
		{"S275J2H", "EN 10210-1", 3.2, 275, 410, "t <= 16 mm"},
		{"S355J2H", "EN 10210-1", 12.5, 355, 470, "t <= 16 mm"},
		{"S355J2H", "EN 10210-1", 20, 345, 470, "16 < t <= 40 mm"},
		{"S355K2H", "EN 10210-1", 120, 295, 450, "100 < t <= 120 mm"},
		{"S420NH", "EN 10210-1", 16, 420, 520, "t <= 16 mm"},
		{"S460NLH", "EN 10210-1", 65, 430, 540, "40 < t <= 65 mm"},
		{"S355J2H", "EN 10219-1", 2.5, 355, 510, "t <= 16 mm"},
		{"S355J2H", "EN 10219-1", 3, 355, 470, "t <= 16 mm"},
		{"S275MLH", "EN 10219-1", 40, 265, 360, "16 < t <= 40 mm"},
		{"S460MLH", "EN 10219-1", 10, 460, 530, "t <= 16 mm"},
		{"S460N", "EN 10025-3", 200, 370, 530, "150 < t <= 200 mm"},
		{"S460M", "EN 10025-4", 41, 430, 530, "40 < t <= 63 mm"},
		{"S460QL", "EN 10025-6", 3, 460, 550, "t <= 50 mm"},
		{"S460QL1", "EN 10025-6", 150, 400, 500, "100 < t <= 150 mm"},
		{"S500Q", "EN 10025-6", 60, 480, 590, "50 < t <= 100 mm"},
		{"S550QL", "EN 10025-6", 110, 490, 590, "100 < t <= 150 mm"},
		{"S620Q", "EN 10025-6", 51, 580, 700, "50 < t <= 100 mm"},
		{"S690", "", 50, 690, 770, "t <= 50 mm"},
		{"S690QL", "", 50.01, 650, 760, "50 < t <= 100 mm"},
		{"S690QL1", "", 100, 650, 760, "50 < t <= 100 mm"},
		{"S690Q", "EN 10025", 100.1, 630, 710, "100 < t <= 150 mm"},
	} {
		g, ok := FindGrade(c.name, c.standard)
		if !ok {
			t.Errorf("%s %s: not found", c.name, c.standard)
			continue
		}
		fy, fu, row, ok := g.Strength(c.mm / 1000)
		if !ok || fy != c.fy*1e6 || fu != c.fu*1e6 || row != c.row {
			t.Errorf("%s %s t = %g: %g/%g %q %v, want %g/%g %q", c.name, c.standard, c.mm, fy/1e6, fu/1e6, row, ok, c.fy, c.fu, c.row)
		}
	}
}

// A checker by EN 1993-1-1 has to know which grades are beyond it, and that no
// rolled section is made of plate.
func TestScopeOfTheGrades(t *testing.T) {
	beyond, flat := 0, 0
	for _, g := range Grades() {
		if g.American() {
			continue // grade_american_test.go
		}
		fy, _, _, _ := g.Strength(0.010)
		want := "EN 1993-1-1"
		if fy > 460e6 {
			want = "EN 1993-1-12"
			beyond++
		}
		if g.Eurocode != want {
			t.Errorf("%s: %s, want %s", g.Name, g.Eurocode, want)
		}
		if _, _, _, ok := g.Table31(0.010); ok && g.Eurocode != "EN 1993-1-1" {
			t.Errorf("%s is in Table 3.1 of EN 1993-1-1 and beyond it", g.Name)
		}
		if g.Flat != (g.Standard == "EN 10025-6") {
			t.Errorf("%s %s: flat %v", g.Name, g.Standard, g.Flat)
		}
		if g.Flat {
			flat++
		}
	}
	if beyond != 16 || flat != 19 {
		t.Errorf("%d grades beyond EN 1993-1-1, %d of flat products", beyond, flat)
	}
}

func TestStrengthOutOfRange(t *testing.T) {
	for _, c := range []struct {
		name, standard string
		mm             float64
	}{
		{"S355", "EN 10025-2", 0}, {"S355", "EN 10025-2", -1}, {"S355", "EN 10025-2", math.NaN()}, {"S355", "EN 10025-2", math.Inf(1)},
		{"S355", "EN 10025-2", 1e-9}, {"S355", "EN 10025-2", 250.1}, {"S450", "EN 10025-2", 151}, {"S450", "EN 10025-2", 2.9},
		{"S355H", "EN 10210-1", 120.1}, {"S355NH", "EN 10210-1", 65.1}, {"S355H", "EN 10219-1", 40.1}, {"S460N", "EN 10025-3", 201},
		{"S690QL", "EN 10025-6", 2.9}, {"S690QL", "EN 10025-6", 150.1}, {"S460Q", "EN 10025-6", 151},
	} {
		g, ok := FindGrade(c.name, c.standard)
		if !ok {
			t.Errorf("%s %s: not found", c.name, c.standard)
		}
		if fy, fu, row, ok := g.Strength(c.mm / 1000); ok || fy != 0 || fu != 0 || row != "" {
			t.Errorf("%s t = %g: %g %g %q %v", c.name, c.mm, fy, fu, row, ok)
		}
	}
	if _, _, _, ok := (Grade{}).Strength(0.01); ok {
		t.Error("a grade that was not found has a strength")
	}
	if _, _, _, ok := (Grade{}).Table31(0.01); ok {
		t.Error("a grade that was not found has a strength")
	}
}

// EN 1993-1-1:2005 Table 3.1, from memory.
func TestTable31(t *testing.T) {
	for _, c := range []struct {
		name, standard string
		thin, thick    [2]float64
	}{
		{"S235", "EN 10025-2", [2]float64{235, 360}, [2]float64{215, 360}},
		{"S275", "EN 10025-2", [2]float64{275, 430}, [2]float64{255, 410}},
		{"S355", "EN 10025-2", [2]float64{355, 490}, [2]float64{335, 470}},
		{"S450", "EN 10025-2", [2]float64{440, 550}, [2]float64{410, 550}},
		{"S235H", "EN 10210-1", [2]float64{235, 360}, [2]float64{215, 340}},
		{"S355H", "EN 10210-1", [2]float64{355, 510}, [2]float64{335, 490}},
		{"S420NH", "EN 10210-1", [2]float64{420, 540}, [2]float64{390, 520}},
		{"S460NLH", "EN 10210-1", [2]float64{460, 560}, [2]float64{430, 550}},
		{"S355H", "EN 10219-1", [2]float64{355, 510}, [2]float64{}},
		{"S460MLH", "EN 10219-1", [2]float64{460, 530}, [2]float64{}},
		{"S460M", "EN 10025-4", [2]float64{460, 540}, [2]float64{430, 530}},
		{"S460", "EN 10025-2", [2]float64{}, [2]float64{}},
		{"S460QL", "EN 10025-6", [2]float64{460, 570}, [2]float64{440, 550}},
		{"S690QL", "EN 10025-6", [2]float64{}, [2]float64{}},
	} {
		g, ok := FindGrade(c.name, c.standard)
		if !ok {
			t.Fatalf("%s %s: not found", c.name, c.standard)
		}
		for _, p := range []struct {
			mm   float64
			want [2]float64
			row  string
		}{{3, c.thin, "t <= 40 mm"}, {40, c.thin, "t <= 40 mm"}, {40.1, c.thick, "40 < t <= 80 mm"}, {80, c.thick, "40 < t <= 80 mm"}, {80.1, [2]float64{}, ""}} {
			fy, fu, row, ok := g.Table31(p.mm / 1000)
			if p.want[0] == 0 {
				if ok || fy != 0 || fu != 0 {
					t.Errorf("%s t = %g: %g %g %v, want none", c.name, p.mm, fy, fu, ok)
				}
				continue
			}
			if !ok || fy != p.want[0]*1e6 || fu != p.want[1]*1e6 || row != p.row {
				t.Errorf("%s t = %g: %g %g %q %v, want %v", c.name, p.mm, fy, fu, row, ok, p.want)
			}
		}
	}
}

// No grade may gain yield or tensile strength with thickness, and no minimum
// yield strength may reach the tensile strength.
func TestStrengthFallsWithThickness(t *testing.T) {
	for _, g := range Grades() {
		if g.American() {
			continue // grade_american_test.go
		}
		lastY, lastU, any := math.Inf(1), math.Inf(1), false
		for um := 500; um <= 300000; um += 500 {
			fy, fu, row, ok := g.Strength(float64(um) / 1e6)
			if !ok {
				continue
			}
			any = true
			if fy > lastY || fu > lastU || fy >= fu || row == "" {
				t.Errorf("%s %s t = %g mm: fy %g after %g, fu %g after %g", g.Name, g.Standard, float64(um)/1000, fy, lastY, fu, lastU)
			}
			lastY, lastU = fy, fu
		}
		if !any {
			t.Errorf("%s %s has no strength", g.Name, g.Standard)
		}
		// The name gives the yield strength of the thinnest band (EN 10027-1).
		if fy, _, _, ok := g.Strength(0.010); !ok || !strings.HasPrefix(g.Name, "S"+itoa(fy/1e6)) {
			t.Errorf("%s: fy %g at 10 mm", g.Name, fy)
		}
		if g.E != 210e9 || g.G != 81e9 || g.Density != 7850 {
			t.Errorf("%s: %+v", g.Name, g)
		}
	}
}

func itoa(v float64) string {
	digits := ""
	for n := int(v); n > 0; n /= 10 {
		digits = string(rune('0'+n%10)) + digits
	}
	return digits
}

func TestFindGrade(t *testing.T) {
	for _, c := range []struct{ name, standard, want, wantStandard string }{
		{"S355", "", "S355", "EN 10025-2"},
		{"s355 j2", "", "S355J2", "EN 10025-2"},
		{"S355J2+N", "", "S355J2", "EN 10025-2"},
		{"S355H", "", "S355H", "EN 10210-1"},
		{"S355J2H", "", "S355J2H", "EN 10210-1"},
		{"S355J2H", "EN 10219-1", "S355J2H", "EN 10219-1"},
		{"S355J2H", "EN 10219", "S355J2H", "EN 10219-1"},
		{"S355J2H", "BS EN 10219-1:2006", "S355J2H", "EN 10219-1"},
		{"S355", "EN 10210", "S355H", "EN 10210-1"},
		{"S355J2", "en 10219", "S355J2H", "EN 10219-1"},
		{"S275MLH", "", "S275MLH", "EN 10219-1"},
		{"S355N", "EN 10025", "S355N", "EN 10025-3"},
		{"S460M", "", "S460M", "EN 10025-4"},
		{"S450", "", "S450", "EN 10025-2"},
		{"S460", "", "S460", "EN 10025-2"},
		{"S460Q", "", "S460Q", "EN 10025-6"},
		{"s690 ql", "", "S690QL", "EN 10025-6"},
		{"S690QL1", "BS EN 10025-6:2004", "S690QL1", "EN 10025-6"},
	} {
		g, ok := FindGrade(c.name, c.standard)
		if !ok || g.Name != c.want || g.Standard != c.wantStandard {
			t.Errorf("FindGrade(%q, %q) = %s %s %v", c.name, c.standard, g.Name, g.Standard, ok)
		}
	}
	for _, c := range [][2]string{
		{"", ""}, {"S356", ""}, {"S355J3", ""}, {"355", ""}, {"S355H", "EN 10025-2"}, {"S420MLH", "EN 10210-1"}, {"S355", "EN 10088"},
		{"S355", "ASTM A992"}, {"S355", "EN"}, {"S355J2", "EN 10025-3"}, {"S355\x00", ""}, {strings.Repeat("S", 100), ""}, {"S355", strings.Repeat("EN", 100)},
	} {
		if g, ok := FindGrade(c[0], c[1]); ok {
			t.Errorf("FindGrade(%q, %q) = %s %s", c[0], c[1], g.Name, g.Standard)
		}
	}
	for _, g := range Grades() {
		got, ok := FindGrade(g.Name, g.Standard)
		if !ok || got != g {
			t.Errorf("%s %s does not find itself", g.Name, g.Standard)
		}
	}
}

func TestNearestGrades(t *testing.T) {
	for _, c := range []struct {
		name  string
		first string
	}{{"S350", "S355"}, {"S355J3", "S355JR"}, {"S353J2", "S355J2"}, {"355", "S355"}, {"S280", "S275"}, {"S460NHL", "S460NH"}, {"S335H", "S355H"}} {
		if got := NearestGrades(c.name, 3); len(got) != 3 || got[0] != c.first {
			t.Errorf("NearestGrades(%q) = %q, want %s first", c.name, got, c.first)
		}
	}
	if got := NearestGrades("S350", 1000); len(slices.Compact(slices.Sorted(slices.Values(got)))) != len(got) {
		t.Errorf("a grade is named twice: %q", got)
	}
	for _, text := range []string{"", "x", "\xff"} {
		if got := NearestGrades(text, 3); got != nil {
			t.Errorf("NearestGrades(%q) = %q", text, got)
		}
	}
	if NearestGrades("S350", 0) != nil {
		t.Error("n = 0")
	}
}

func BenchmarkFindGrade(b *testing.B) {
	for b.Loop() {
		FindGrade("S355J2", "EN 10025-2")
	}
}
