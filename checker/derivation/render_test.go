package derivation

import (
	"testing"

	"kern/lang/unit"
)

// TestUnits: what a basis does not name is shown in the units that go with what it
// does name.
func TestUnits(t *testing.T) {
	parse := func(texts ...string) Units {
		u := Units{}
		for _, s := range texts {
			p, err := unit.Parse(s)
			if err != nil {
				t.Fatal(err)
			}
			u[p.Dim] = p
		}
		return u
	}
	for _, c := range []struct {
		show Units
		dim  unit.Dim
		want string
	}{
		{parse(), unit.Area, "mm2"},
		{parse("kN", "m"), unit.Area, "mm2"},
		{parse("in"), unit.Area, "in2"}, {parse("in"), unit.Length4, "in4"}, {parse("in"), unit.Length6, "in6"}, {parse("in"), unit.Stress, "ksi"}, {parse("ft"), unit.Volume, "in3"},
		{parse("kip"), unit.Length, "in"}, {parse("kip"), unit.Moment, "kip-ft"}, {parse("lbf"), unit.ForcePerLength, "klf"},
		{parse("kip", "mm"), unit.Area, "mm2"}, {parse("in", "cm2"), unit.Area, "cm2"},
	} {
		if got := c.show.For(c.dim).Symbol; got != c.want {
			t.Errorf("%v of a %s: %s, want %s", c.show, c.dim.Name(), got, c.want)
		}
	}
	for dim, text := range customary {
		if u, err := unit.Parse(text); err != nil || u.Dim != dim {
			t.Errorf("%s is no unit of a %s: %v", text, dim.Name(), err)
		}
	}
}
