package elastic

import (
	"math"
	"testing"

	"kern/checker/action"
	"kern/checker/model"
	"kern/checker/standard"
)

// TestUnsoundValues gives the standard values that the language would refuse,
// one at a time: first yield or buckling must stay undecided or fail.
func TestUnsoundValues(t *testing.T) {
	sound := func() bent {
		return bent{area: 5e-3, inertia: 3e-5, modulus: 3e-4, height: 3, base: action.Pinned, top: action.Pinned, loads: []model.Load{
			{Kind: model.AxialLoad, Value: 1e5, At: 3, Offset: [2]float64{0.02}}, {Kind: model.PointLoad, Value: 1000, At: 1}}}
	}
	passes := func(b bent) bool {
		o, _ := b.check(355e6)
		for _, c := range o.Checks {
			if c.Verdict != standard.Passes {
				return false
			}
		}
		return len(o.Checks) > 0
	}
	if o, _ := sound().check(355e6); !passes(sound()) {
		t.Fatalf("the column does not pass to begin with: %+v", o.Checks)
	}
	fields := map[string]func(b *bent) *float64{
		"area": func(b *bent) *float64 { return &b.area }, "inertia": func(b *bent) *float64 { return &b.inertia },
		"modulus": func(b *bent) *float64 { return &b.modulus }, "height": func(b *bent) *float64 { return &b.height },
		"axial load": func(b *bent) *float64 { return &b.loads[0].Value }, "offset": func(b *bent) *float64 { return &b.loads[0].Offset[0] },
		"load across": func(b *bent) *float64 { return &b.loads[1].Value },
	}
	for name, field := range fields {
		for _, bad := range []float64{math.NaN(), math.Inf(1), math.Inf(-1), 0, -1} {
			if signed := name == "axial load" || name == "offset" || name == "load across"; signed && (bad == 0 || bad == -1) {
				continue // sound
			}
			b := sound()
			*field(&b) = bad
			if passes(b) {
				t.Errorf("%s = %g: first yield and buckling pass", name, bad)
			}
		}
	}
	for _, fy := range []float64{math.NaN(), math.Inf(1), 0, -1} {
		b := bent{area: 5e-3, inertia: 3e-5, modulus: 3e-4, height: 3, loads: []model.Load{{Kind: model.AxialLoad, Value: 1e5, At: 3}}}
		if o, _ := b.check(fy); firstYield(t, o).Verdict == standard.Passes {
			t.Errorf("f_y = %g: first yield passes", fy)
		}
	}
}
