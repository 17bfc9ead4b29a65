package catalogue

import (
	"math"
	"slices"
	"testing"

	"kern/checker/section"
)

// The strengths in ksi by form and thickness in inches, from memory (see
// americanSteels).
func TestAmericanStrengths(t *testing.T) {
	shape := map[string]section.Shape{}
	for name, text := range map[string]string{"W": "W14x90", "box": "HSS8x8x1/2", "round": "HSS6.625x0.280", "pipe": "Pipe 6 STD", "pair": "2L4x4x1/2", "tee": "WT7x45"} {
		e, ok := Find(text)
		if !ok {
			t.Fatal(text)
		}
		shape[name] = e.Shape
	}
	shape["plate"] = section.Shape{Kind: section.Bar, Depth: 1, Width: 1}
	shape["built"] = section.Shape{Kind: section.ISection, Made: section.Welded}
	shape["given"] = section.Shape{Kind: section.Given}
	for _, c := range []struct {
		name, form string
		in         float64
		fy, fu     float64
		row        string
	}{
		{"A992", "W", 0.71, 50, 65, "any thickness"}, {"A992", "W", 5, 50, 65, "any thickness"}, {"A992", "tee", 0.71, 50, 65, "any thickness"}, {"A992", "box", 0.5, 0, 0, ""},
		{"A36", "W", 4, 36, 58, "any thickness"}, {"A36", "pair", 0.5, 36, 58, "any thickness"}, {"A36", "plate", 8, 36, 58, "t <= 8 in"}, {"A36", "plate", 8.01, 32, 58, "t > 8 in"}, {"A36", "round", 0.3, 0, 0, ""},
		{"A53 Gr B", "pipe", 0.28, 35, 60, "any thickness"}, {"A53 Gr B", "W", 0.28, 0, 0, ""},
		{"A242", "W", 1.5, 50, 70, "t <= 1.5 in"}, {"A242", "W", 1.51, 46, 67, "1.5 < t <= 2 in"}, {"A242", "W", 2.1, 42, 63, "t > 2 in"}, {"A242", "plate", 0.75, 50, 70, "t <= 0.75 in"}, {"A242", "plate", 4.1, 0, 0, ""},
		{"A500 Gr B", "box", 0.5, 46, 58, "any thickness"}, {"A500 Gr B", "round", 0.28, 42, 58, "any thickness"}, {"A500 Gr C", "box", 0.5, 50, 62, "any thickness"}, {"A500 Gr C", "round", 0.28, 46, 62, "any thickness"},
		{"A500 Gr C", "given", 0.5, 46, 62, "any thickness"},
		{"A501 Gr B", "box", 0.5, 50, 70, "any thickness"}, {"A529 Gr 50", "W", 1.5, 50, 65, "t <= 1.5 in"}, {"A529 Gr 55", "W", 1.6, 0, 0, ""},
		{"A572 Gr 50", "W", 5, 50, 65, "any thickness"}, {"A572 Gr 50", "built", 4, 50, 65, "t <= 4 in"}, {"A572 Gr 50", "built", 4.1, 0, 0, ""}, {"A572 Gr 65", "W", 2, 65, 80, "t <= 2 in"}, {"A572 Gr 65", "W", 2.1, 0, 0, ""},
		{"A588", "plate", 4.5, 46, 67, "4 < t <= 5 in"}, {"A847", "round", 0.3, 50, 70, "any thickness"}, {"A913 Gr 65", "W", 4.9, 65, 80, "any thickness"}, {"A913 Gr 70", "W", 1, 70, 90, "any thickness"},
		{"A1065 Gr 50", "box", 0.5, 50, 60, "any thickness"}, {"A1065 Gr 50", "round", 0.5, 0, 0, ""}, {"A1085", "box", 0.5, 50, 65, "any thickness"}, {"A1085", "round", 0.5, 50, 65, "any thickness"},
	} {
		g, ok := FindGrade(c.name, "")
		if !ok || g.Name != c.name || !g.American() || !g.Recalled || g.Eurocode != "" {
			t.Errorf("%s: %+v, %v", c.name, g, ok)
			continue
		}
		own, fits := g.For(shape[c.form])
		fy, fu, row, ok := own.Strength(c.in * 0.0254)
		ok = ok && fits
		if c.fy == 0 {
			if ok {
				t.Errorf("%s in %s of %g in: %g ksi, want none", c.name, c.form, c.in, fy/ksi)
			}
			continue
		}
		if !ok || math.Abs(fy/ksi-c.fy) > 1e-9 || math.Abs(fu/ksi-c.fu) > 1e-9 || row != c.row {
			t.Errorf("%s in %s of %g in: %g and %g ksi, %q, %v; want %g and %g, %q", c.name, c.form, c.in, fy/ksi, fu/ksi, row, ok, c.fy, c.fu, c.row)
		}
		if _, _, _, table := own.Table31(c.in * 0.0254); table {
			t.Errorf("%s has a value in EN 1993-1-1 Table 3.1", c.name)
		}
	}
	g, _ := FindGrade("A992", "")
	// 29 000 ksi = 199 948 N/mm2; 490 lb/ft3 = 7849.0 kg/m3 (GNU units).
	if math.Abs(g.E-199947961502.17) > 1 || math.Abs(g.G-77221281683.5) > 1 || math.Abs(g.Density-7849.047) > 1e-3 {
		t.Errorf("E %f, G %f, density %f", g.E, g.G, g.Density)
	}
}

func TestFindAmericanGrades(t *testing.T) {
	for _, c := range []struct{ name, standard, want string }{
		{"A992", "", "A992"}, {"a992", "", "A992"}, {"ASTM A992", "", "A992"}, {"A992/A992M", "", "A992"}, {"ASTM A992/A992M", "ASTM A992", "A992"}, {"A992", "ASTM A992-20", "A992"}, {"A992", "A992/A992M-2020", "A992"},
		{"A572 Grade 50", "", "A572 Gr 50"}, {"A572 Gr. 50", "", "A572 Gr 50"}, {"A572 Gr 50", "", "A572 Gr 50"}, {"A572-50", "", "A572 Gr 50"}, {"A572 50", "", "A572 Gr 50"}, {"A572/A572M Grade 50", "", "A572 Gr 50"}, {"a572gr50", "", "A572 Gr 50"},
		{"Grade 50", "ASTM A572", "A572 Gr 50"}, {"50", "ASTM A572", "A572 Gr 50"}, {"Gr B", "ASTM A500", "A500 Gr B"}, {"A500 Gr C", "", "A500 Gr C"}, {"A500C", "", "A500 Gr C"}, {"A53 Gr B", "", "A53 Gr B"}, {"A53 Grade B", "ASTM A53", "A53 Gr B"},
		{"A1085 Gr A", "", "A1085"}, {"A36", "", "A36"}, {"ASTM A36", "ASTM A36", "A36"},
	} {
		if g, ok := FindGrade(c.name, c.standard); !ok || g.Name != c.want {
			t.Errorf("FindGrade(%q, %q) = %q, %v; want %q", c.name, c.standard, g.Name, ok, c.want)
		}
	}
	for _, c := range [][2]string{
		{"A572", ""}, {"A500", ""}, {"A500 Gr E", ""}, {"A993", ""}, {"A36 Gr 50", ""}, {"A992", "ASTM A572"}, {"A992", "EN 10025-2"}, {"S355", "ASTM A992"}, {"A992/A36M", ""}, {"A992/A992", ""}, {"A", ""}, {"ASTM", ""},
		{"A572 Gr 50 x", ""}, {"A9999999", ""}, {"Grade 50", ""}, {"50", ""}, {"A992", "ASTM A992 twice"}, {"A500 Gr C", "A5"}, {"", "ASTM A992"},
	} {
		if g, ok := FindGrade(c[0], c[1]); ok {
			t.Errorf("FindGrade(%q, %q) found %q", c[0], c[1], g.Name)
		}
	}
	for _, c := range []struct {
		name string
		want []string
	}{
		{"A572", []string{"A572 Gr 42", "A572 Gr 50", "A572 Gr 55"}}, {"A500", []string{"A500 Gr B", "A500 Gr C", "A501 Gr A"}}, {"A572 Gr 52", []string{"A572 Gr 42", "A572 Gr 50", "A572 Gr 55"}}, {"A993", []string{"A992", "A913 Gr 50", "A913 Gr 60"}},
	} {
		if got := NearestGrades(c.name, 3); !slices.Equal(got, c.want) {
			t.Errorf("NearestGrades(%q) = %q, want %q", c.name, got, c.want)
		}
	}
	if got := NearestGrades("S356", 2); slices.ContainsFunc(got, func(n string) bool { return n[0] == 'A' }) {
		t.Errorf("S356: %q", got)
	}
}
