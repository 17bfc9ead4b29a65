package unit

import (
	"slices"
	"strings"
	"testing"
)

func TestNearest(t *testing.T) {
	for _, c := range []struct {
		text string
		dim  Dim
		any  bool
		want string // the first suggestions
	}{
		{"KN", None, true, "kN"},
		{"Kn", None, true, "kN"},
		{"kn", None, true, "kN"},
		{"KN", Force, false, "kN"},
		{"kN", Moment, false, "kNm"},
		{"MM", None, true, "mm"},
		{"MM", Length, false, "mm"},
		{"M", None, true, "m"},
		{"mpa", None, true, "MPa"},
		{"mpa", Stress, false, "MPa"},
		{"Mpa", Stress, false, "MPa"},
		{"KPA", Stress, false, "kPa"},
		{"gpa", Stress, false, "GPa"},
		{"mN", Force, false, "MN"},
		{"nm", Moment, false, "Nm"},
		{"KNM", None, true, "kNm"},
		{"Knm", Moment, false, "kNm"},
		{"kN-m", None, true, "kNm"},
		{"kN.m", Moment, false, "kNm"},
		{"KIP", None, true, "kip"},
		{"PSI", None, true, "psi"},
		{"KSI", None, true, "ksi"},
		{"KN/m2", None, true, "kN/m2"},
		{"KN/m²", Stress, false, "kN/m² kN/m2"},
		{"kN/M2", None, true, "kN/m2"},
		{"n/mm2", Stress, false, "N/mm2"},
		{"KN/deg/MM2", None, true, "kN/deg/mm2"},
		{"MM4", Length4, false, "mm4"},
		{"MM^4", Length4, false, "mm^4 mm4"},
		{"kN/m", Stress, false, "kN/m2"},
		{"m", Area, false, "m2"},
		{"kg", Force, false, "kgf"},
		{"lb", Force, false, "lbf"},
		{"t", Force, false, "kN N MN"}, // not ft: t is a unit, only not of force
		{"kN/m2", Moment, false, "kNm"},
		{"kip", Moment, false, "kip-ft kip-in"},
		{"kip", ForcePerLength, false, "kip/ft kip/in"},
		{"kN", Stress, false, "kN/m2"},
		{"kg/m", ForcePerLength, false, "kgf/m"},
		{"kg/m3", WeightDensity, false, "kgf/m3"},
		{"lb/ft", ForcePerLength, false, "lbf/ft"},
		{"lb/ft2", Stress, false, "lbf/ft2"},
		{"lbf/ft3", Density, false, "lb/ft3"},
		{"lbs", Force, false, "lbf"},
		{"lbs", Mass, false, "lb"},
		{"feet", None, true, "ft"},
		{"inches", None, true, "in"},
		{"inch", Length, false, "in"},
		{"millimetres", None, true, "mm"},
		{"kilonewton", None, true, "kN"},
		{"kilonewtons/metre", None, true, "kN/m"},
		{"kip/foot", None, true, "kip/ft"},
		{"k", Force, false, "kip"},
		{"k/ft", ForcePerLength, false, "kip/ft"},
		{"k-ft", Moment, false, "kip-ft"},
		{"ft-kip", Moment, false, "kip-ft"},
		{"ft-lb", Moment, false, "lbf-ft"},
		{"kNm/radian", RotationalStiffness, false, "kNm/rad"},
		{"sqft", Area, false, "ft2"},
		{"hr", Time, false, "h"},
		{"sec", Time, false, "s"},
		{"degrees", Angle, false, "deg"},
		{"g", Mass, false, "kg"},
		{"tonnes", Mass, false, "t"},
		// Nothing near: the usual units of the dimension that is due.
		{"bananas", Length, false, "mm m cm"},
		{"", Force, false, "kN N MN"},
		{strings.Repeat("x", 1000), Stress, false, "MPa GPa kPa"},
		{"bananas", None, true, ""},
		{"x", None, true, ""},
		{"", None, true, ""},
	} {
		got := strings.Join(Nearest(c.text, c.dim, c.any, 3), " ")
		if c.want == "" && got != "" || !strings.HasPrefix(got+" ", c.want+" ") && c.want != "" {
			t.Errorf("%.20q (%s, any %v): %q, want %q", c.text, c.dim.Name(), c.any, got, c.want)
		}
	}
	if Nearest("KN", Force, false, 0) != nil || Nearest("KN", Force, false, -1) != nil {
		t.Error("suggestions though none are wanted")
	}
}

// Whatever is suggested is a unit, is not what was written, stands once, and
// those of the dimension that is due come first.
func TestNearestProperties(t *testing.T) {
	texts := []string{"KN", "kN", "mm", "m/m", "kn/M", "N*mm", "1/M", "KN/m/m/M", "lb/ft^3", "(", "kN/(m)", "m^(1/2)", "%%", "\xff/\xff"}
	for name := range words {
		texts = append(texts, name)
	}
	for _, text := range texts {
		for dim := range namings {
			list := Nearest(text, dim, false, 8)
			if len(list) == 0 || len(list) > 8 {
				t.Errorf("%q as a %s: %d suggestions", text, dim.Name(), len(list))
			}
			other := false
			for i, symbol := range list {
				u, err := Parse(symbol)
				if err != nil || symbol == text || slices.Index(list, symbol) != i {
					t.Errorf("%q as a %s: suggestion %q: %v", text, dim.Name(), symbol, err)
				}
				if u.Dim == dim && other {
					t.Errorf("%q as a %s: %q", text, dim.Name(), list)
				}
				other = other || u.Dim != dim
			}
		}
	}
}

// No other name may be a unit of its own, since then nobody would be asked.
func TestOtherNames(t *testing.T) {
	for name, symbols := range otherNames {
		if name != strings.ToLower(name) {
			t.Errorf("%q is not in lower case", name)
		}
		if _, err := Parse(name); err == nil {
			t.Errorf("%q is a unit", name)
		}
		for symbol := range strings.FieldsSeq(symbols) {
			if _, err := Parse(symbol); err != nil {
				t.Errorf("%q: %v", name, err)
			}
		}
	}
}
