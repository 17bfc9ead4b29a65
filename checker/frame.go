package checker

import (
	"math"
	"slices"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang/unit"
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

// Holds is what each hold of the member must be able to do; nil for a member that
// could not be checked.
func (r *Result) Holds() []standard.HoldDemand {
	if len(r.Member.Holds) == 0 || len(r.Checks) == 0 {
		return nil
	}
	if f := r.Frame(); f != nil {
		return f.Holds()
	}
	return nil
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
		if c.Rule == r.Governing && c.Lift == r.Lift && c.Utilisation == r.Utilisation {
			return c, true
		}
	}
	return standard.Check{}, false
}

// Critical is the elastic critical force of a stretch of the member about an
// axis (0 major, 1 minor), N: Euler's load for its effective length, and for a
// stretch in which the section changes that of the stepped bar under one force
// throughout. It is NaN when a value that it needs is not known.
func (r *Result) Critical(axis int, s action.Stretch) float64 {
	if f := r.Frame(); f != nil {
		return f.Critical(axis, s)
	}
	return math.NaN()
}

// Symbol finds a symbol of the member's standard by its name or by the trade's
// word for it ("N_b_minor").
func (r *Result) Symbol(word string) (derivation.ID, bool) {
	s := find(r.Standard)
	if s == nil {
		return 0, false
	}
	if id, ok := s.Symbols().Find(word); ok {
		return id, true
	}
	return s.Symbols().Find(s.Alias(word))
}

// Rules are the checks that a design standard makes; nil for a name that is no
// standard.
func Rules(name string) []string {
	if s := find(name); s != nil {
		return s.Rules()
	}
	return nil
}

// Annexes are the sets of national values of a design standard, the default
// first.
func Annexes(name string) []string {
	if s := find(name); s != nil {
		return s.Annexes()
	}
	return nil
}

// Nationals are the numbers and methods of a national annex to a design standard,
// with their sources.
func Nationals(standard, annex string) []action.National {
	s, ok := find(standard).(interface{ Nationals() []action.National })
	if !ok {
		return nil
	}
	return slices.DeleteFunc(s.Nationals(), func(n action.National) bool { return n.Annex != annex })
}

// Overrides are the numbers of a design standard that a basis may replace, by
// name.
func Overrides(name string) []string {
	s := find(name)
	if s == nil {
		return nil
	}
	var out []string
	for n := range s.Overrides() {
		out = append(out, n)
	}
	slices.Sort(out)
	return out
}

// OwnWeight is the whole weight of the member where it counts, N; 0 where it
// does not, NaN where it is not known.
func (r *Result) OwnWeight() float64 {
	m := r.Member
	if !m.Weight {
		return 0
	}
	w := 0.0
	for _, l := range m.Parts() {
		if l.Section == nil || l.Material == nil {
			return math.NaN()
		}
		w += l.Material.Density * l.Section.Area * unit.StandardGravity * (l.To - l.From)
	}
	return w
}
