// Package standard is what every design standard is to the checker: a small
// interface, and the mechanics that all of them start from.
package standard

import (
	"math"

	"kern/checker/catalogue"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/section"
	"kern/lang/unit"
)

// Standard checks members by one design standard.
type Standard interface {
	// Name is the name that a basis states.
	Name() string
	// Methods are the methods of which a basis must state one ("LRFD"); nil when
	// there is one alone.
	Methods() []string
	// Annexes are the sets of national values, the first is the default; nil when
	// there are none.
	Annexes() []string
	// Choices are the words of a basis that choose a method which the standard
	// leaves open ("lateral"); nil for none.
	Choices() []string
	// Overrides are the numbers that a basis may replace, with whether it must
	// say why.
	Overrides() map[string]bool
	// Rules are the checks that the standard makes.
	Rules() []string
	// Symbols are the letters that its derivations use.
	Symbols() *derivation.Set
	// Alias turns the trade's words into a symbol ("N_b_minor"); "" when it is
	// none.
	Alias(word string) string
	// Check judges a member. With a record the steps of the governing checks are
	// written down; without, nothing is composed that is not needed.
	Check(f *Frame, record *derivation.Record) *Outcome
}

// Verdict is the answer of a check or a member.
type Verdict uint8

// The three verdicts. Undecided is never a pass.
const (
	Undecided Verdict = iota
	Passes
	Fails
)

// String is the word that every output prints.
func (v Verdict) String() string { return [...]string{"undecided", "passes", "fails"}[v] }

// Check is one row of a member's results.
type Check struct {
	Rule        string
	Clause      string
	Combination int     // index into the frame's combinations, -1 when it does not depend on one
	Under       string  // the name of a combination that is none of the frame's, such as one of serviceability
	Demand      float64 // SI units of Dim
	Capacity    float64
	Dim         unit.Dim
	Utilisation float64 // NaN when undecided
	Verdict     Verdict
	Why         string // of an undecided check, or what a failing one is about
	Departed    bool   // the member departs from this rule
	Lift        string // the lift that it is about, "" for a member of one section
}

// State says whether a check that the standard asks for was made.
type State uint8

// The states of coverage.
const (
	Checked State = iota
	NotApplicable
	NotCovered
)

// String is the words that every output prints.
func (s State) String() string { return [...]string{"checked", "not applicable", "not covered"}[s] }

// Coverage is one line of what was checked and what not.
type Coverage struct {
	Rule  string
	State State
	Why   string // why it does not apply, or what a person must do by hand
}

// Outcome is what a standard says of a member.
type Outcome struct {
	Checks      []Check
	Coverage    []Coverage
	Assumptions []string
	// Value gives the result of a symbol for requirements; false when the
	// calculation did not come to it.
	Value func(symbol string) (unit.Quantity, bool)
	// Lifts are the outcomes of the lifts that a requirement must hold in, under
	// the combination that compresses each most; none for a member of one section.
	Lifts []LiftOutcome
}

// Cover notes whether a check was made.
func (o *Outcome) Cover(rule string, state State, why string) {
	o.Coverage = append(o.Coverage, Coverage{Rule: rule, State: state, Why: why})
}

// Add notes a check that was made: demand and capacity in SI units of dim, the
// utilisation u judged against a limit.
func (o *Outcome) Add(rule, clause string, combination int, demand, capacity float64, dim unit.Dim, u, limit float64) {
	check := Check{Rule: rule, Clause: clause, Combination: combination, Demand: demand, Capacity: capacity, Dim: dim, Utilisation: u, Verdict: Utilisation(u, limit)}
	if check.Verdict == Undecided {
		check.Why = "a value that the check needs is missing or out of range"
	}
	o.Checks = append(o.Checks, check)
	o.Cover(rule, Checked, "")
}

// Undecided notes a check that could not be made, of quantities of dim, and why.
func (o *Outcome) Undecided(rule, clause string, dim unit.Dim, why string) {
	nan := math.NaN()
	o.Checks = append(o.Checks, Check{Rule: rule, Clause: clause, Combination: -1, Demand: nan, Capacity: nan, Dim: dim, Utilisation: nan, Why: why})
	o.Cover(rule, NotCovered, why)
}

// Untwisted covers torsion, whose clause is given: the language has no load that
// twists a member.
func (o *Outcome) Untwisted(kind section.Kind, clause string) {
	switch kind {
	case section.Channel, section.Tee, section.Angle, section.DoubleAngle:
		o.Cover("torsion", NotApplicable, "loads across the member and eccentric loads are taken to act through the shear centre: what they twist is for a person ("+clause+")")
	default:
		o.Cover("torsion", NotApplicable, "loads act in the planes of symmetry: nothing twists the member ("+clause+")")
	}
}

// Known gives a value that must be finite and positive, NaN for any other: what
// depends on it is then undecided. The language refuses such values; this is the
// last gate before a verdict.
func Known(v float64) float64 {
	if v > 0 && !math.IsInf(v, 1) {
		return v
	}
	return math.NaN()
}

// KnownOrZero is Known for a value that may be zero.
func KnownOrZero(v float64) float64 {
	if v == 0 {
		return 0
	}
	return Known(v)
}

// Overridden gives a number of the standard and whether the basis replaces it.
func Overridden(basis *model.Basis, name string, standard float64) (float64, bool) {
	if o, ok := basis.Overrides[name]; ok {
		return o.Value, true
	}
	return standard, false
}

// Warping is the warping constant that a torsional check may count on, m6. The
// plates of tees and angles meet in one line and warp across their thickness
// alone; by common practice that little is left out.
func Warping(s *model.Section) float64 {
	switch s.Shape.Kind {
	case section.Tee, section.Angle, section.DoubleAngle:
		return 0
	}
	return s.Iw
}

// NoStrength says why the yield strength of a member is not known.
func NoStrength(m *model.Member) string {
	switch {
	case m.Material.Grade == nil:
		return "the material '" + m.Material.Title() + "' states no yield strength: fy = …"
	case math.IsNaN(m.Section.Thickness):
		return "the strength of " + m.Material.Title() + " follows the thickness, which the section does not state: thickness = …"
	}
	if _, ok := m.Material.Grade.For(m.Section.Shape); !ok {
		return m.Material.Grade.Standard + " is not a standard of " + catalogue.FormOf(m.Section.Shape).String() + ": name another grade"
	}
	return "the yield strength of " + m.Material.Title() + " is not known for this thickness"
}
