package checker

import (
	"math"

	"kern/checker/action"
	"kern/checker/model"
	"kern/checker/standard"
)

// Frame works out again what every standard starts from: stretches between
// holds, axial forces and moments. It is nil for a member that lacks something
// that this needs.
func (r *Result) Frame() *standard.Frame {
	if len(r.Missing) > 0 || r.Member.Section == nil || r.Member.Material == nil || !(r.Member.Height > 0) {
		return nil
	}
	return standard.NewFrame(r.env, r.Member, r.combinations)
}

// Env is what the member shares with the others of its calculation.
func (r *Result) Env() *model.Env { return r.env }

// Combinations are those that the member was checked under. They are not to be
// changed.
func (r *Result) Combinations() []model.Combination { return r.combinations }

// CombinationOf is the combination of a check; false when it depends on none.
func (r *Result) CombinationOf(c standard.Check) (model.Combination, bool) {
	if c.Combination < 0 || c.Combination >= len(r.combinations) {
		return model.Combination{}, false
	}
	return r.combinations[c.Combination], true
}

// GoverningCheck is the check that decides the member's utilisation; false when
// none could be made.
func (r *Result) GoverningCheck() (standard.Check, bool) {
	for _, c := range r.Checks {
		if c.Rule == r.Governing && c.Utilisation == r.Utilisation {
			return c, true
		}
	}
	return standard.Check{}, false
}

// Critical is the elastic critical force of a stretch of the member about an
// axis (0 major, 1 minor), N: Euler's load for its effective length. It is NaN
// when a value that it needs is not known.
func (r *Result) Critical(axis int, s action.Stretch) float64 {
	m := r.Member
	if m.Section == nil || m.Material == nil {
		return math.NaN()
	}
	i := [...]float64{m.Section.IMajor, m.Section.IMinor}[axis]
	l := s.Effective()
	return standard.Known(math.Pi * math.Pi * standard.Known(m.Material.E) * standard.Known(i) / (l * l))
}
