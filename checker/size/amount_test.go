package size

import (
	"math"
	"testing"

	"kern/lang/unit"
)

// TestGreatest looks for the greatest value below which all passes, where more
// passes again further up: teeth, as of a table row that ends, are not jumped
// over.
func TestGreatest(t *testing.T) {
	between := func(v, from, to float64) bool { return v > from && v <= to }
	for _, c := range []struct {
		name string
		at   func(v float64) state
		want float64
		open bool
	}{
		{"one crossing", func(v float64) state { return map[bool]state{true: passes, false: fails}[v <= 0.731] }, 0.731, false},
		{"a gap", func(v float64) state {
			return map[bool]state{true: fails, false: passes}[between(v, 0.4, 0.45) || v > 0.8]
		}, 0.4, false},
		{"no result below", func(v float64) state {
			switch {
			case v < 0.3:
				return unknown
			case v <= 0.62:
				return passes
			}
			return fails
		}, 0.62, false},
		{"fails at first", func(v float64) state { return map[bool]state{true: passes, false: fails}[between(v, 0.2, 0.5)] }, math.NaN(), false},
		{"no end", func(float64) state { return passes }, 1, true},
	} {
		got, open := greatest(grid(1, false), c.at)
		if open != c.open || math.Abs(got-c.want) > 2e-5 || got > c.want || math.IsNaN(got) != math.IsNaN(c.want) {
			t.Errorf("%s: %v %v, want %v %v", c.name, got, open, c.want, c.open)
		}
	}
}

func TestDown(t *testing.T) {
	kN := unit.For(unit.Force)[0]
	for _, c := range []struct {
		si   float64
		want string
	}{{12_345.9, "12.34 kN"}, {-12_345.9, "-12.34 kN"}, {200_000, "200 kN"}, {0, "0 kN"}, {199_999.99, "199.9 kN"}, {8_700, "8.7 kN"}} {
		if got := Down(c.si, kN, 4); got != c.want || math.Abs(read(got, kN)) > math.Abs(c.si)*(1+1e-12) {
			t.Errorf("%v: %s, want %s", c.si, got, c.want)
		}
	}
}
