package en1993

import (
	"math"
	"testing"

	"kern/checker/section"
	"kern/checker/standard"
)

// TestUnsoundValues gives the standard values that the language would refuse,
// one at a time: something must stay undecided or fail, whatever the value. The
// dimensions of the shape are left out: package section refuses them.
func TestUnsoundValues(t *testing.T) {
	fields := map[string]func(s *specimen) *float64{
		"A": func(s *specimen) *float64 { return &s.section.Area }, "I_y": func(s *specimen) *float64 { return &s.section.IMajor },
		"I_z": func(s *specimen) *float64 { return &s.section.IMinor }, "I_t": func(s *specimen) *float64 { return &s.section.It },
		"I_w": func(s *specimen) *float64 { return &s.section.Iw },
		"E":   func(s *specimen) *float64 { return &s.material.E }, "G": func(s *specimen) *float64 { return &s.material.G },
		"f_y": func(s *specimen) *float64 { return &s.material.Fy }, "height": func(s *specimen) *float64 { return &s.height },
		"force": func(s *specimen) *float64 { return &s.force },
	}
	sound := func() *specimen {
		s := shaped(t, section.Shape{Kind: section.ISection, Made: section.Welded, Depth: 0.3, Width: 0.15, Web: 0.008, Flange: 0.012}, 355e6)
		s.height, s.force = 3, 1e5
		return s
	}
	if !passesEverything(sound()) {
		t.Fatalf("the member does not pass to begin with")
	}
	for name, field := range fields {
		for _, bad := range []float64{math.NaN(), math.Inf(1), math.Inf(-1), 0, -1} {
			s := sound()
			*field(s) = bad
			// without a part of its resistance to torsion a member may still pass
			if passesEverything(s) && !(bad == 0 && (name == "I_t" || name == "I_w") || name == "I_w" && math.IsNaN(bad)) {
				t.Errorf("%s = %g: every check passes", name, bad)
			}
		}
	}
}

// passesEverything tells whether a member would get the verdict "passes".
func passesEverything(s *specimen) bool {
	o := s.check()
	passed := 0
	for _, c := range o.Checks {
		if c.Verdict != standard.Passes {
			return false
		}
		passed++
	}
	for _, c := range o.Coverage {
		if c.State == standard.NotCovered {
			return false
		}
	}
	return passed > 0
}
