package unit

import (
	"math"
	"slices"
	"strconv"
	"strings"
	"testing"
)

// Factors printed in NIST Special Publication 811 (2008), Appendix B.8, with
// seven significant digits, or all of them where the factor is exact (bold in
// the table). Known from memory; in4, ft4, in2, ft2, ft, in and yd were also
// seen in a copy of the table, and TestGNUUnits holds all of them
// against another source.
var nist = []struct {
	texts   string
	printed string
	exact   bool
}{
	{"in", "2.54E-02", true},
	{"ft", "3.048E-01", true},
	{"yd", "9.144E-01", true},
	{"in2", "6.4516E-04", true},
	{"ft2", "9.290304E-02", true},
	{"in3", "1.638706E-05", false},
	{"ft3", "2.831685E-02", false},
	{"in4", "4.162314E-07", false},
	{"ft4", "8.630975E-03", false},
	{"lb", "4.535924E-01", false}, // printed rounded; 0.45359237 exactly by a footnote
	{"slug", "1.459390E+01", false},
	{"t", "1.0E+03", true},
	{"kgf", "9.80665E+00", true},
	{"lbf", "4.448222E+00", false},
	{"kip", "4.448222E+03", false},
	{"psi lbf/in2", "6.894757E+03", false},
	{"ksi kip/in2", "6.894757E+06", false},
	{"psf lbf/ft2", "4.788026E+01", false},
	{"plf lbf/ft", "1.459390E+01", false},
	{"lbf/in", "1.751268E+02", false},
	{"lbf-ft lbf*ft", "1.355818E+00", false},
	{"lbf-in lbf*in", "1.129848E-01", false},
	{"lb/ft", "1.488164E+00", false},
	{"lb/in", "1.785797E+01", false},
	{"lb/ft2", "4.882428E+00", false},
	{"pcf lb/ft3", "1.601846E+01", false},
	{"lb/in3", "2.767990E+04", false},
	{"slug/ft3", "5.153788E+02", false},
	{"ft/s2", "3.048E-01", true},
	{"in/s2", "2.54E-02", true},
	{"ft/s", "3.048E-01", true},
	{"km/h", "2.777778E-01", false},
	{"kgf*m", "9.80665E+00", true},
	{"kgf/cm2", "9.80665E+04", true},
	{"kgf/mm2", "9.80665E+06", true},
	{"deg °", "1.745329E-02", false},
	{"min", "6.0E+01", true},
	{"h", "3.6E+03", true},
	{"%", "1.0E-02", true},
}

func TestNIST(t *testing.T) {
	for _, row := range nist {
		printed, err := strconv.ParseFloat(row.printed, 64)
		if err != nil {
			t.Fatal(err)
		}
		for text := range strings.FieldsSeq(row.texts) {
			u, err := Parse(text)
			if err != nil {
				t.Errorf("%s: %v", text, err)
				continue
			}
			got := u.Factor
			if !row.exact {
				rounded, err := strconv.ParseFloat(strconv.FormatFloat(got, 'e', 6, 64), 64)
				if err != nil {
					t.Fatal(err)
				}
				got = rounded
			}
			if got != printed {
				t.Errorf("%s = %v, NIST SP 811 prints %s", text, u.Factor, row.printed)
			}
		}
	}
}

func TestExactMark(t *testing.T) {
	for text, want := range map[string]bool{
		"m": true, "mm": true, "in": true, "ft": true, "lb": true, "lbf": true, "kip": true, "kgf": true, "h": true,
		"kip-ft": true, "mrad": true, "‰": true,
		"psi": false, "ksi": false, "psf": false, "plf": false, "pcf": false, "slug": false, "deg": false, "°": false,
	} {
		if got := atoms[text].Exact; got != want {
			t.Errorf("%s: exact %v", text, got)
		}
	}
	if StandardGravity != atoms["kgf"].Factor {
		t.Error("kilogram-force is the standard gravity times a kilogram")
	}
	if atoms["deg"].Factor != math.Pi/180 {
		t.Error("degree is not pi/180")
	}
}

func TestAtoms(t *testing.T) {
	list := Atoms()
	if !slices.IsSortedFunc(list, func(a, b Atom) int { return strings.Compare(a.Symbol, b.Symbol) }) {
		t.Error("not sorted")
	}
	if len(list) != len(definitions)+4 {
		t.Errorf("%d atoms, want %d", len(list), len(definitions)+4)
	}
	for _, a := range list {
		u, err := Parse(a.Symbol)
		if err != nil || u.Factor != a.Factor || u.Dim != a.Dim || !Known(a.Symbol) {
			t.Errorf("%s parses to %+v, %v", a.Symbol, u, err)
		}
		if a.Name == "" || a.Source == "" || !(a.Factor > 0) {
			t.Errorf("incomplete: %+v", a)
		}
	}
	// The language's constant of gravity, and symbols with two meanings.
	for _, text := range []string{"g", "gram", "mN", "tf", "ton", "bar", "", "1", "mm2", "kN/m", "KN"} {
		if Known(text) {
			t.Errorf("%q is an atom", text)
		}
	}
	list[0].Symbol = "changed"
	if Atoms()[0].Symbol == "changed" {
		t.Error("Atoms shares its memory")
	}
}

func TestFor(t *testing.T) {
	for dim := range namings {
		list := For(dim)
		if len(list) == 0 {
			t.Errorf("no unit for a %s", dim.Name())
		}
		seen := map[string]bool{}
		for _, u := range list {
			if p, err := Parse(u.Symbol); err != nil || p != u || u.Dim != dim || seen[u.Symbol] {
				t.Errorf("a %s in %+v: %+v, %v", dim.Name(), u, p, err)
			}
			seen[u.Symbol] = true
		}
	}
	for dim, first := range map[Dim]string{
		Length: "mm", Force: "kN", Stress: "MPa", Moment: "kNm", ForcePerLength: "kN/m", Mass: "kg", Density: "kg/m3",
		Length4: "cm4", RotationalStiffness: "kNm/rad",
	} {
		if got := For(dim)[0].Symbol; got != first {
			t.Errorf("first unit of a %s is %s, want %s", dim.Name(), got, first)
		}
	}
	odd := Dim{L: 3, M: 1}
	if list := For(odd); len(list) != 1 || list[0].Dim != odd || list[0].Factor != 1 {
		t.Errorf("For(%v) = %v", odd, list)
	}
	For(Force)[0].Symbol = "changed"
	if For(Force)[0].Symbol == "changed" {
		t.Error("For shares its memory")
	}
}
