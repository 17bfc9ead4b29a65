package en1993

import (
	"math"
	"testing"

	"kern/checker/action"
	"kern/checker/model"
	"kern/checker/section"
	"kern/checker/standard"
)

// webMember is L100x100x10 in S235, 2 m long, with the rounded properties of the
// comparison: A = 1920 mm2, i_v = 19.5 mm, i_y = i_z = 30.4 mm.
func webMember(t *testing.T) *specimen {
	s := shaped(t, section.Shape{Kind: section.Angle, Made: section.Rolled, Depth: 0.1, Width: 0.1, Wall: 0.01, Root: 0.012}, 235e6)
	p := &s.section.Properties
	p.Area = 1920e-6
	p.IMinor, p.IX, p.IY = p.Area*0.0195*0.0195, p.Area*0.0304*0.0304, p.Area*0.0304*0.0304
	s.height, s.force = 2, 80e3
	return s
}

func (s *specimen) byLeg(change func(*model.Member), ed Standard) *standard.Outcome {
	f := s.frame()
	m := *f.Member
	m.Leg = model.Leg{Long: true}
	if change != nil {
		change(&m)
	}
	return ed.Check(standard.NewFrame(f.Env, &m, f.Combinations), nil)
}

// TestWebMember: BB.1.2 against a calculation by hand, made by another person from
// the clause alone (not a published source; none with these clauses was found).
func TestWebMember(t *testing.T) {
	o := webMember(t).byLeg(nil, Standard{})
	for _, c := range []struct {
		symbol     string
		want, step float64
	}{
		{"lambda_z", 1.0921, 1e-4}, {"lambda_eff_z", 1.1145, 1e-4}, {"chi_z", 0.5266, 1e-4}, {"N_b_z_Rd", 237.6e3, 100},
		{"lambda_leg", 0.7005, 1e-4}, {"lambda_eff_leg", 0.9904, 1e-4}, {"chi_leg", 0.6031, 1e-4}, {"N_b_leg_Rd", 272.1e3, 100},
	} {
		if got, ok := o.Value(c.symbol); !ok || !(math.Abs(got.Value-c.want) <= c.step) {
			t.Errorf("%s = %.6g, by hand %g", c.symbol, got.Value, c.want)
		}
	}
	for _, check := range o.Checks {
		want := map[string]float64{"flexural-buckling-major": 80 / 272.1, "flexural-buckling-minor": 80 / 237.6}[check.Rule]
		if want > 0 && (check.Verdict != standard.Passes || !(math.Abs(check.Utilisation/want-1) < 1e-3)) {
			t.Errorf("%s: %+v, want %g", check.Rule, check, want)
		}
	}
}

// TestWebMemberRefused: what is not in BB.1.2 is undecided about both axes.
func TestWebMemberRefused(t *testing.T) {
	other := New(Edition{Name: "another", Renumber: func(s string) string { return s }, Yield: 700e6})
	for name, c := range map[string]struct {
		change func(*model.Member)
		ed     Standard
	}{
		"space":       {func(m *model.Member) { m.Leg.Space = true }, Standard{}},
		"fixed":       {func(m *model.Member) { m.Base[1] = action.Fixed }, Standard{}},
		"factor":      {func(m *model.Member) { m.Factor[0] = 0.9 }, Standard{}},
		"hold":        {func(m *model.Member) { m.Holds = []model.Hold{{At: 1, Major: true, Minor: true}} }, Standard{}},
		"load":        {func(m *model.Member) { m.Loads[0].At = 1 }, Standard{}},
		"bending":     {func(m *model.Member) { m.Loads = append(m.Loads, model.Load{Kind: model.LineLoad, Value: 100, To: 2}) }, Standard{}},
		"the edition": {nil, other},
	} {
		found := 0
		for _, check := range webMember(t).byLeg(c.change, c.ed).Checks {
			if check.Rule == "flexural-buckling-major" || check.Rule == "flexural-buckling-minor" {
				found++
				if check.Verdict != standard.Undecided || check.Why == "" {
					t.Errorf("%s: %+v", name, check)
				}
			}
		}
		if found != 2 {
			t.Errorf("%s: %d checks of flexural buckling", name, found)
		}
	}
}
