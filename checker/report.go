// Package checker turns the files of a project into a report: the one way in
// for the command line, the language server, the sheet and the review.
package checker

import (
	"cmp"
	"math"
	"slices"
	"strings"

	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// Report is all that is to be said about a project.
type Report struct {
	Project     *lang.Project
	Diagnostics []Diagnostic // by file, place and rule
	Members     []*Result    // by file and place
	Summary     Summary

	calculations []*model.Calculation
	work         []work // of each calculation
	places       places
}

// Diagnostic is a diagnostic with its file and its span in the file's text.
type Diagnostic struct {
	File string
	Span lang.Span
	lang.Problem
	Related []Related // resolved to files
	Fixes   []Fix     // resolved to files
}

// Related is another place that takes part.
type Related struct {
	File    string
	Span    lang.Span
	Message string
}

// Fix is a change of text, in files.
type Fix struct {
	Title string
	Safe  bool
	Edits []Edit
}

// Edit replaces a span of a file.
type Edit struct {
	File string
	Span lang.Span
	New  string
}

// Summary counts.
type Summary struct {
	Members, Passes, Fails, Undecided int
	Errors, Warnings                  int
	Departures                        int
}

// Failed tells whether the project is anything but right: the exit status of
// the command line is 1 then.
func (s Summary) Failed() bool { return s.Fails > 0 || s.Undecided > 0 || s.Errors > 0 }

// Result is the answer for one member. It is immutable.
type Result struct {
	Name, Title string
	Member      *model.Member
	Standard    string
	Verdict     standard.Verdict
	// Utilisation is the greatest of the member's checks, NaN when none could be
	// made; Governing is its rule.
	Utilisation float64
	Governing   string
	Lift        string // the lift that governs, "" for a member of one section
	Combination string
	Checks      []standard.Check
	Coverage    []standard.Coverage
	Assumptions []string
	Departures  []model.Departure
	// Missing is why the member could not be checked at all.
	Missing []string

	env          *model.Env
	given        []model.Combination // without the forces of imperfections
	combinations []model.Combination
	problems     []lang.Diagnostic
}

// Units are the units that the member's results are shown in.
func (r *Result) Units() derivation.Units { return r.env.Basis.Show }

// CombinationName names the combination of a check, "" for none.
func (r *Result) CombinationName(c standard.Check) string {
	if c.Under != "" {
		return c.Under
	}
	if c.Combination < 0 || c.Combination >= len(r.combinations) {
		return ""
	}
	return r.combinations[c.Combination].Name
}

// Symbols are the letters of the member's standard; nil when it has none.
func (r *Result) Symbols() *derivation.Set {
	s := find(r.Standard)
	if s == nil {
		return nil
	}
	return s.Symbols()
}

// Derive works the member out again with every step written down.
func (r *Result) Derive() *derivation.Record {
	s := find(r.Standard)
	if s == nil || len(r.Missing) > 0 {
		return nil
	}
	record := &derivation.Record{Set: s.Symbols()}
	standard.Run(s, standard.NewFrame(r.env, r.Member, r.combinations), record)
	return record
}

// evaluate judges one member.
func evaluate(env *model.Env, m *model.Member, combinations []model.Combination) *Result {
	if m.Imported != nil {
		combinations = m.Imported.List()
	}
	given := combinations
	combinations = standard.Imperfections(env, m, combinations)
	r := &Result{Name: m.Name, Title: m.Title, Member: m, Standard: env.Basis.Standard, Utilisation: math.NaN(),
		env: env, given: given, combinations: combinations, Departures: m.Departs, Missing: m.Missing}
	s := find(env.Basis.Standard)
	switch {
	case len(r.Missing) > 0:
	case s == nil && env.Basis.StandardAt.Decl != nil:
		r.Missing = append(r.Missing, "its design standard is not known")
	case s == nil:
		r.Missing = append(r.Missing, "the calculation states no design standard")
	case env.Refused != "" && m.Imported == nil:
		r.Missing = append(r.Missing, env.Refused)
	case m.Weight && weightless(m) != nil:
		r.Missing = append(r.Missing, "the density of '"+weightless(m).Name+"' is not known, so its self-weight is not either: state it, or say selfweight off")
		at := m.MaterialAt
		if at.Decl != m.Decl { // a line that is taken over is right where it stands
			at = lang.Place{Decl: m.Decl, Span: m.NameSpan}
		}
		r.problems = append(r.problems, lang.Diagnostic{Decl: at.Decl, Problem: lang.Problem{Rule: "missing-value", Span: at.Span,
			Message: "the material has no density, which self-weight needs: density = 7850 kg/m3, or selfweight off"}})
	}
	if len(r.Missing) > 0 {
		r.Verdict = standard.Undecided
		r.undecided()
		return r
	}
	out := standard.Run(s, standard.NewFrame(env, m, combinations), nil)
	r.Checks, r.Coverage, r.Assumptions = out.Checks, out.Coverage, out.Assumptions
	if m.Imported == nil {
		r.Assumptions = append(r.Assumptions, env.Assumed...)
	}
	r.require(s, out)
	r.depart()
	r.judge()
	r.diagnose()
	return r
}

// weightless is a material of the member whose density is not known, nil for none.
func weightless(m *model.Member) *model.Material {
	for _, l := range m.Parts() {
		if math.IsNaN(l.Material.Density) {
			return l.Material
		}
	}
	return nil
}

// require checks the conditions that the member sets on its results. A member of
// several lifts must meet them in each.
func (r *Result) require(s standard.Standard, out *standard.Outcome) {
	lifts := out.Lifts
	if len(lifts) == 0 {
		lifts = []standard.LiftOutcome{{Outcome: out}}
	}
	for _, q := range r.Member.Requires {
		var worst standard.Check
		var problem *lang.Problem
		for i, l := range lifts {
			c, p := r.requirement(s, l, q)
			if i == 0 || c.Verdict == standard.Undecided && worst.Verdict != standard.Undecided || worst.Verdict != standard.Undecided && c.Utilisation > worst.Utilisation {
				worst, problem = c, p
			}
		}
		if problem != nil {
			problem.Member, worst.Why = r.Name, problem.Message
			r.problems = append(r.problems, lang.Diagnostic{Decl: q.Place.Decl, Problem: *problem})
		}
		r.Checks = append(r.Checks, worst)
	}
}

// requirement checks one condition in one lift; the problem is that of a condition
// that makes no sense.
func (r *Result) requirement(s standard.Standard, l standard.LiftOutcome, q model.Require) (standard.Check, *lang.Problem) {
	symbol := q.Symbol
	v, ok := l.Value(symbol)
	known := false
	if _, found := s.Symbols().Find(symbol); found {
		known = true
	} else if alias := s.Alias(symbol); alias != "" {
		symbol = alias
		v, ok = l.Value(symbol)
		known = true
	} else if symbol == "utilisation" {
		v, ok, known = unit.Quantity{Value: r.greatest()}, !math.IsNaN(r.greatest()), true
	}
	check := standard.Check{Rule: "requirement", Clause: "require " + q.Symbol, Combination: -1, Demand: q.Quantity.Value, Capacity: v.Value, Dim: q.Quantity.Dim, Utilisation: math.NaN(), Lift: l.Lift}
	switch {
	case !known:
		return check, &lang.Problem{Rule: "unknown-name", Span: q.SymbolAt, Message: "'" + q.Symbol + "' is no result of " + s.Name()}
	case !ok:
		check.Why = "the calculation does not come to " + q.Symbol
		check.Capacity = math.NaN()
	case v.Dim != q.Quantity.Dim:
		p := model.Unlike(q.Symbol, q.Value, q.Quantity, v.Dim)
		return check, &p
	default:
		holds := map[string]bool{"<": v.Value < q.Quantity.Value, "<=": v.Value <= q.Quantity.Value, ">": v.Value > q.Quantity.Value, ">=": v.Value >= q.Quantity.Value}[q.Compare]
		check.Verdict = standard.Fails
		if holds {
			check.Verdict = standard.Passes
		}
		check.Utilisation = q.Quantity.Value / v.Value
		if strings.HasPrefix(q.Compare, "<") {
			check.Demand, check.Capacity = v.Value, q.Quantity.Value
			check.Utilisation = v.Value / q.Quantity.Value
		}
		if math.IsInf(check.Utilisation, 0) || check.Utilisation < 0 {
			check.Utilisation = math.NaN()
		}
		check.Why = q.Because
	}
	return check, nil
}

func (r *Result) greatest() float64 {
	u := math.NaN()
	for _, c := range r.Checks {
		if c.Rule != "requirement" && !math.IsNaN(c.Utilisation) && !(c.Utilisation <= u) {
			u = c.Utilisation
		}
	}
	return u
}

// depart marks the checks that the member is allowed to break.
func (r *Result) depart() {
	for _, d := range r.Departures {
		needed := false
		for i := range r.Checks {
			if r.Checks[i].Rule == d.Rule {
				r.Checks[i].Departed = true
				needed = needed || r.Checks[i].Verdict != standard.Passes
			}
		}
		for _, c := range r.Coverage {
			needed = needed || c.Rule == d.Rule && c.State == standard.NotCovered
		}
		if !needed {
			r.problems = append(r.problems, lang.Diagnostic{Decl: d.Place.Decl, Problem: lang.Problem{Rule: "departure-not-needed", Severity: lang.Warning, Span: d.Place.Span,
				Message: r.Name + " departs from " + d.Rule + ", which it does not break", Member: r.Name}})
		}
	}
}

// judge forms the verdict: a failing check fails the member, anything undecided
// or not covered leaves it undecided, unless the member departs from it.
func (r *Result) judge() {
	r.Verdict = standard.Passes
	worse := func(v standard.Verdict) {
		if v == standard.Fails || v == standard.Undecided && r.Verdict == standard.Passes {
			r.Verdict = v
		}
	}
	best := -1
	for i, c := range r.Checks {
		if !c.Departed {
			worse(c.Verdict)
		}
		if !math.IsNaN(c.Utilisation) && (best < 0 || c.Utilisation > r.Checks[best].Utilisation) && c.Rule != "requirement" {
			best = i
		}
	}
	for _, c := range r.Coverage {
		if c.State == standard.NotCovered && !r.departs(c.Rule) {
			worse(standard.Undecided)
		}
	}
	if best >= 0 {
		c := r.Checks[best]
		r.Utilisation, r.Governing, r.Lift, r.Combination = c.Utilisation, c.Rule, c.Lift, r.CombinationName(c)
	} else if len(r.Checks) == 0 {
		worse(standard.Undecided) // nothing was checked, so nothing passes
		if len(r.Member.Loads) == 0 && !r.Member.Weight {
			r.Missing = append(r.Missing, "it carries no load")
		}
	}
}

func (r *Result) departs(rule string) bool {
	for _, d := range r.Departures {
		if d.Rule == rule {
			return true
		}
	}
	return false
}

// sortDiagnostics orders diagnostics and drops those said twice, as happens
// when two calculations include one file.
func sortDiagnostics(list []Diagnostic) []Diagnostic {
	order := make([]int, len(list)) // a diagnostic is too big to be moved about
	for i := range order {
		order[i] = i
	}
	slices.SortFunc(order, func(i, j int) int {
		a, b := &list[i], &list[j]
		return cmp.Or(strings.Compare(a.File, b.File), cmp.Compare(a.Span.Start, b.Span.Start), cmp.Compare(a.Severity, b.Severity),
			strings.Compare(a.Rule, b.Rule), cmp.Compare(a.Span.End, b.Span.End), strings.Compare(a.Message, b.Message), cmp.Compare(i, j))
	})
	out := make([]Diagnostic, 0, len(list))
	for _, i := range order {
		d := list[i]
		if len(out) > 0 {
			l := &out[len(out)-1]
			if l.File == d.File && l.Span == d.Span && l.Rule == d.Rule && l.Message == d.Message && l.Member == d.Member {
				continue
			}
		}
		out = append(out, d)
	}
	return out
}
