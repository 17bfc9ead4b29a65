package checker

import (
	"math"
	"slices"

	"kern/checker/model"
	"kern/checker/standard"
)

// With judges the member as it would be after a change. The change is given a
// copy whose loads, holds and lifts it may alter, and nothing else that is shared. A
// member that lacks something is judged as it is.
func (r *Result) With(change func(m *model.Member)) *Result {
	return evaluate(r.env, r.changed(change), r.given)
}

func (r *Result) changed(change func(m *model.Member)) *model.Member {
	m := *r.Member
	m.Loads, m.Holds, m.Lifts = slices.Clone(m.Loads), slices.Clone(m.Holds), slices.Clone(m.Lifts)
	if len(m.Missing) == 0 {
		change(&m)
	}
	return &m
}

// FailsUnder tells whether the member fails after a change under one of its
// combinations alone, by its index: then it fails under all of them together. It
// is false where that cannot be told, as for a member that lacks something.
func (r *Result) FailsUnder(combination int, change func(m *model.Member)) bool {
	s := find(r.Standard)
	if s == nil || len(r.Missing) > 0 || combination < 0 || combination >= len(r.combinations) {
		return false
	}
	out := standard.Run(s, standard.NewFrame(r.env, r.changed(change), r.combinations[combination:combination+1]), nil)
	for _, c := range out.Checks {
		if c.Verdict == standard.Fails && !r.departs(c.Rule) {
			return true
		}
	}
	return false
}

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
		if m.Nominal { // the moment must stay with its level
			axial = max(axial, 1e-9)
			l.Value *= axial
			l.Offset[0], l.Offset[1] = l.Offset[0]*bending/axial, l.Offset[1]*bending/axial
			m.Loads = append(m.Loads, l)
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
		m.Material = heavier(m.Material, axial)
		m.Lifts = slices.Clone(m.Lifts)
		for i := range m.Lifts {
			m.Lifts[i].Material = heavier(m.Lifts[i].Material, axial)
		}
		m.Weight = axial > 0
	}
	out := standard.Run(s, standard.NewFrame(r.env, &m, r.combinations[combination:combination+1]), nil)
	return r.worst(out.Checks)
}

// heavier is a material of so many times the density.
func heavier(m *model.Material, times float64) *model.Material {
	out := *m
	out.Density *= times
	return &out
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
