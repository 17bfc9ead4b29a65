package standard

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"kern/checker/derivation"
	"kern/lang/unit"
)

// LiftOutcome is what a standard says of one lift.
type LiftOutcome struct {
	Lift string
	*Outcome
}

// Run checks a member with a standard: lift by lift where it has several, each
// as a member of that section, and of each check shows the lift that governs.
func Run(s Standard, f *Frame, record *derivation.Record) *Outcome {
	if len(f.parts) < 2 {
		return s.Check(f, record)
	}
	r := &lifts{standard: s, frame: f, rows: map[string]*row{}}
	for i := range f.parts {
		r.lift(i)
	}
	if record != nil {
		r.derive(record)
	}
	return r.outcome()
}

// lifts collects what a standard says of the lifts of a member.
type lifts struct {
	standard Standard
	frame    *Frame
	order    []string // the rules, in the order of the checks
	rows     map[string]*row
	main     []int // of each lift, the combination that its outcome in out.Lifts is of, -1 for all
	out      Outcome
}

// row is what became of one check.
type row struct {
	worst, open *run // the governing one and the first that is undecided
	state       State
	covered     bool
	why         string
	whyLift     bool // why is about one lift
}

// run is one check of one lift under a combination, -1 for all.
type run struct {
	Check
	part, combination int
}

// lift checks one lift: under all combinations at once when nothing that it
// carries depends on other lifts, else under each by itself.
func (r *lifts) lift(i int) {
	f := r.frame
	name := f.parts[i].Name()
	if f.Alone(i) || len(f.Combinations) == 0 {
		out := r.standard.Check(f.Part(i, -1), nil)
		r.add(out, i, -1, true)
		r.out.Lifts, r.main = append(r.out.Lifts, LiftOutcome{name, out}), append(r.main, -1)
		r.assume(out.Assumptions)
		return
	}
	p := f.Part(i, -1)
	most, at := math.Inf(-1), 0
	for k := range f.Combinations {
		if n := p.Compression(k, 0, f.Member.Height); n > most {
			most, at = n, k
		}
	}
	for k := range f.Combinations {
		out := r.standard.Check(f.Part(i, k), nil)
		r.add(out, i, k, k == at)
		if k == at {
			r.out.Lifts, r.main = append(r.out.Lifts, LiftOutcome{name, out}), append(r.main, k)
			r.assume(out.Assumptions)
			r.assumeLengths(i, at)
		}
	}
}

// add takes the checks of a lift. The slenderness of a lift whose effective length
// depends on the combination is that under the combination that compresses it
// most, which main tells.
func (r *lifts) add(out *Outcome, part, combination int, main bool) {
	name := r.frame.parts[part].Name()
	coupled := combination >= 0
	for _, c := range out.Checks {
		if c.Rule == "slenderness" && !main {
			continue
		}
		if coupled && c.Rule == "flexural-torsional-buckling" && c.Verdict != Undecided {
			nan := math.NaN()
			c.Demand, c.Capacity, c.Utilisation, c.Verdict, c.Combination = nan, nan, nan, Undecided, -1
			c.Why = steppedTwist
		}
		own := c.Combination // of checks of the whole member
		if c.Combination >= 0 && combination >= 0 {
			c.Combination = combination
		}
		c.Lift = name
		if slices.Contains(CommonRules, c.Rule) {
			c.Lift, c.Combination = "", own
		}
		w := r.row(c.Rule)
		one := &run{c, part, combination}
		switch {
		case c.Verdict == Undecided && (w.open == nil || math.IsNaN(c.Utilisation) && !math.IsNaN(w.open.Utilisation)):
			w.open = one
		case c.Verdict == Undecided:
		case w.worst == nil || c.Utilisation > w.worst.Utilisation:
			w.worst = one
		}
	}
	for _, c := range out.Coverage {
		if c.Rule == "slenderness" && !main {
			continue
		}
		if coupled && c.Rule == "flexural-torsional-buckling" && c.State == Checked {
			c.State, c.Why = NotCovered, steppedTwist
		}
		w := r.row(c.Rule)
		rank := map[State]int{NotApplicable: 0, Checked: 1, NotCovered: 2}
		if w.covered && rank[c.State] <= rank[w.state] {
			w.whyLift = w.whyLift || c.Why != w.why
			continue
		}
		w.whyLift = w.covered || part > 0
		w.state, w.why, w.covered = c.State, c.Why, true
		if w.why != "" && c.State == NotCovered && !slices.Contains(CommonRules, c.Rule) {
			w.why = "lift " + name + ": " + w.why
		}
	}
}

// steppedTwist is why a lift is undecided in flexural-torsional buckling.
const steppedTwist = "the section changes between points held, and flexural-torsional buckling of a stepped member is not covered: hold the member both ways and against twist where it changes, or check it by hand"

func (r *lifts) row(rule string) *row {
	w := r.rows[rule]
	if w == nil {
		w = &row{}
		r.rows[rule] = w
		r.order = append(r.order, rule)
	}
	return w
}

// assume takes the assumptions of a lift; what was said before is not said again.
func (r *lifts) assume(list []string) {
	for _, a := range list {
		if !slices.Contains(r.out.Assumptions, a) {
			r.out.Assumptions = append(r.out.Assumptions, a)
		}
	}
}

// assumeLengths says how the effective lengths of a lift were found in stretches
// in which the section changes.
func (r *lifts) assumeLengths(part, combination int) {
	whole, f := r.frame, r.frame.Part(part, combination)
	for axis, name := range []string{"major", "minor"} {
		for _, s := range f.Stretches[axis] {
			if !whole.Stepped(s.From, s.To) {
				continue
			}
			text := fmt.Sprintf("L_cr = %s %s in lift %s for %s, in which the section changes (%s–%s)", f.Env.Basis.Show.Long(s.Effective(), 4), name, whole.parts[part].Name(), f.StretchName(axis, s), s.Base, s.Top)
			switch {
			case !s.Stepped:
				text += ": taken as uniform, as nothing compresses it"
			case s.Overridden:
				text += ": the stated factor, or that of the stepped stretch where it is greater"
			case f.Bends[0] || f.Bends[1]:
				text += ": from the critical load of the stepped stretch, but no less than for this section throughout, as the member bends"
			default:
				text += ": from the critical load of the stepped stretch, solved under the forces of each combination; this is the one that compresses the lift most"
			}
			r.assume([]string{text})
		}
	}
	for _, t := range whole.twists {
		if l := whole.parts[part]; t.From < l.To && t.To > l.From && whole.Stepped(t.From, t.To) {
			r.assume([]string{fmt.Sprintf("torsional and lateral-torsional buckling between %s and %s, where the section changes: with the least stiffness of the lifts there, a lower bound", f.Place(t.From), f.Place(t.To))})
		}
	}
}

// outcome lists each check once with the lift that governs, and besides it the
// first lift that could not be decided.
func (r *lifts) outcome() *Outcome {
	for _, rule := range r.order {
		w := r.rows[rule]
		if w.worst != nil {
			r.out.Checks = append(r.out.Checks, w.worst.Check)
		}
		if w.open != nil {
			r.out.Checks = append(r.out.Checks, w.open.Check)
		}
		if w.covered {
			c := Coverage{Rule: rule, State: w.state, Why: w.why}
			if c.State == Checked && c.Why != "" && w.whyLift && !slices.Contains(CommonRules, rule) {
				c.Why = "each lift by itself"
			}
			r.out.Coverage = append(r.out.Coverage, c)
		}
	}
	r.out.Coverage = append(r.out.Coverage, Coverage{Rule: "splices", State: NotApplicable,
		Why: "no such check is made: lifts are taken to go on stiffly into one another, their centroids in one line and their major axes parallel; a splice must carry the forces and moments there, and a pinned one is not covered"})
	// a result of the member is what all its lifts agree on
	r.out.Value = func(symbol string) (unit.Quantity, bool) {
		var out unit.Quantity
		for i, l := range r.out.Lifts {
			v, ok := l.Value(symbol)
			if !ok || i > 0 && !(math.Abs(v.Value-out.Value) <= 1e-12*math.Abs(out.Value)) {
				return unit.Quantity{}, false
			}
			out = v
		}
		return out, len(r.out.Lifts) > 0
	}
	return &r.out
}

// derive writes down the steps of the checks that govern, each with its lift.
func (r *lifts) derive(record *derivation.Record) {
	type key struct{ part, combination int }
	var keys []key
	rules := map[key][]string{}
	for _, rule := range r.order {
		w := r.rows[rule]
		one := w.worst
		if one == nil {
			one = w.open
		}
		if one == nil {
			continue
		}
		k := key{one.part, one.combination}
		if rules[k] == nil {
			keys = append(keys, k)
		}
		rules[k] = append(rules[k], rule)
	}
	slices.SortStableFunc(keys, func(a, b key) int { return a.part - b.part })
	shared := map[int]bool{}
	for _, k := range keys {
		one := &derivation.Record{Set: record.Set}
		r.standard.Check(r.frame.Part(k.part, k.combination), one)
		for _, s := range one.Steps {
			if s.Group == "" && shared[k.part] || s.Group != "" && !slices.Contains(rules[k], s.Group) {
				continue
			}
			if s.Lift = r.frame.parts[k.part].Name(); slices.Contains(CommonRules, s.Group) {
				s.Lift = ""
			}
			record.Steps = append(record.Steps, s)
		}
		shared[k.part] = true
	}
	r.deriveRequired(record)
}

// deriveRequired writes down what leads to the values that the member requires, in
// the lift where each is worst.
func (r *lifts) deriveRequired(record *derivation.Record) {
	for _, q := range r.frame.Member.Requires {
		name := q.Symbol
		if alias := r.standard.Alias(name); alias != "" {
			name = alias
		}
		id, ok := record.Set.Find(name)
		worst, value := -1, 0.0
		for i, l := range r.out.Lifts {
			v, known := l.Value(name)
			if known && (worst < 0 || (v.Value < value) == strings.HasPrefix(q.Compare, ">")) {
				worst, value = i, v.Value
			}
		}
		if !ok || worst < 0 {
			continue
		}
		one := &derivation.Record{Set: record.Set}
		r.standard.Check(r.frame.Part(worst, r.main[worst]), one)
		for _, s := range one.Leading(id) {
			s.Group, s.Lift = "requirement", r.frame.parts[worst].Name()
			record.Steps = append(record.Steps, s)
		}
	}
}

// InLift says where a check was made, for sentences; "" for a member of one
// section.
func (c Check) InLift() string {
	if c.Lift == "" {
		return ""
	}
	return " in lift " + strings.TrimSpace(c.Lift)
}
