package checker

import (
	"math"

	"kern/checker/model"
	"kern/checker/standard"
)

// Probe judges the member under one of its combinations, by its index, with the
// forces along the member times axial and all that bends it times bending. The
// diagrams keep their form. It gives the greatest utilisation of the checks that
// depend on loads and that check's rule; NaN where the standard cannot decide
// one of them, or for a member that could not be checked.
func (r *Result) Probe(combination int, axial, bending float64) (utilisation float64, rule string) {
	s := find(r.Standard)
	if s == nil || len(r.Missing) > 0 || combination < 0 || combination >= len(r.combinations) {
		return math.NaN(), ""
	}
	m := *r.Member
	if m.Imported != nil {
		m.Imported = m.Imported.Scaled(axial, bending)
	}
	m.Loads = nil
	for _, l := range r.Member.Loads {
		if l.Kind != model.AxialLoad {
			if l.Value *= bending; l.Value != 0 {
				m.Loads = append(m.Loads, l)
			}
			continue
		}
		for a, e := range l.Offset {
			if moment := l.Value * e * bending; moment != 0 {
				m.Loads = append(m.Loads, model.Load{Case: l.Case, Kind: model.EndMoment, Value: moment, At: l.At, Axis: model.Axis(a), Place: l.Place})
			}
		}
		l.Offset = [2]float64{}
		if l.Value *= axial; l.Value != 0 {
			m.Loads = append(m.Loads, l)
		}
	}
	if m.Weight {
		material := *m.Material
		material.Density *= axial
		m.Material = &material
		m.Weight = material.Density > 0
	}
	out := s.Check(standard.NewFrame(r.env, &m, r.combinations[combination:combination+1]), nil)
	return r.worst(out.Checks)
}

// worst is the greatest utilisation of checks that depend on loads, but for
// those that the member departs from and those that it has no answer to anyway.
func (r *Result) worst(checks []standard.Check) (utilisation float64, rule string) {
	for _, c := range checks {
		switch {
		case r.departs(c.Rule) || r.silentOn(c.Rule):
		case c.Combination < 0 && c.Verdict != standard.Undecided:
		case c.Verdict == standard.Undecided && math.IsNaN(c.Utilisation):
			return math.NaN(), c.Rule
		case c.Utilisation > utilisation:
			utilisation, rule = c.Utilisation, c.Rule
		}
	}
	return utilisation, rule
}

// silentOn tells whether the member's own check of a rule is undecided.
func (r *Result) silentOn(rule string) bool {
	for _, c := range r.Checks {
		if c.Rule == rule && c.Verdict == standard.Undecided {
			return true
		}
	}
	return false
}
