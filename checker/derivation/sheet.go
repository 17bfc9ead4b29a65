package derivation

import "math"

// Sheet holds the values of one calculation: every symbol of a set, NaN until
// it is known, so that a value that was forgotten can never turn into a pass.
// Without a record it computes and nothing else.
type Sheet struct {
	set    *Set
	values []float64
	record *Record
}

// Record collects the steps of a calculation as it runs.
type Record struct {
	Set   *Set
	Steps []Step
	group string
}

// Group says which check the steps that follow belong to; "" for those that
// several checks share.
func (r *Record) Group(rule string) { r.group = rule }

// Of gives the steps that a check rests on: those that are shared and its own,
// leaving out what nothing of it leads to. An empty rule gives all.
func (r *Record) Of(rule string) []Step {
	if rule == "" {
		return r.Steps
	}
	lift := ""
	for _, s := range r.Steps {
		if s.Group == rule {
			lift = s.Lift
		}
	}
	var out []Step
	for _, s := range r.Steps {
		if (s.Group == rule || s.Group == "") && s.Lift == lift {
			out = append(out, s)
		}
	}
	// walk back from the check's own steps to what they read
	need := map[ID]bool{}
	keep := make([]bool, len(out))
	for i := len(out) - 1; i >= 0; i-- {
		s := out[i]
		if s.Group == rule || need[s.Symbol] && s.Note == "" {
			keep[i] = true
			if s.Note == "" {
				for _, in := range s.Inputs {
					need[in.Symbol] = true
				}
			}
		}
	}
	kept := out[:0]
	for i, s := range out {
		if keep[i] {
			kept = append(kept, s)
		}
	}
	return kept
}

// Step is one line of a derivation.
type Step struct {
	Symbol  ID
	Formula *Formula // nil for a value that is taken, not computed
	Inputs  []Input  // the values that went into the formula
	Value   float64  // coherent SI units
	Clause  string   // the clause of a computed step, the source of a taken value
	Note    string   // a remark that stands by itself; the other fields are empty
	Group   string   // the rule of the check that it belongs to, "" for shared steps
	Lift    string   // the lift of the member that it is about, "" for a member of one section
}

// Input is a value that a formula read.
type Input struct {
	Symbol ID
	Value  float64
}

// NewSheet returns a sheet with nothing known.
func NewSheet(set *Set) *Sheet {
	s := &Sheet{set: set, values: make([]float64, set.Len())}
	s.Clear()
	return s
}

// Clear forgets every value and stops recording.
func (s *Sheet) Clear() {
	for i := range s.values {
		s.values[i] = math.NaN()
	}
	s.record = nil
}

// Recording starts to collect steps in r; nil stops.
func (s *Sheet) Recording(r *Record) { s.record = r }

// Recorded tells whether steps are collected: only then is it worth composing
// words.
func (s *Sheet) Recorded() bool { return s.record != nil }

// Take sets a symbol to a value that comes from outside the formulas: a
// dimension, a table, a load.
func (s *Sheet) Take(id ID, value float64, source string) float64 {
	s.values[id] = value
	if s.record != nil {
		s.record.Steps = append(s.record.Steps, Step{Symbol: id, Value: value, Clause: source, Group: s.record.group})
	}
	return value
}

// Do computes a formula and keeps the result under its symbol.
func (s *Sheet) Do(f *Formula) float64 {
	v := f.run(s.values)
	if s.record != nil {
		inputs := make([]Input, len(f.uses))
		for i, u := range f.uses {
			inputs[i] = Input{u, s.values[u]}
		}
		s.record.Steps = append(s.record.Steps, Step{Symbol: f.Symbol, Formula: f, Inputs: inputs, Value: v, Clause: f.Clause, Group: s.record.group})
	}
	s.values[f.Symbol] = v
	return v
}

// At gives the value of a symbol, NaN when it is not known.
func (s *Sheet) At(id ID) float64 { return s.values[id] }

// Note records a remark.
func (s *Sheet) Note(text string) {
	if s.record != nil {
		s.record.Steps = append(s.record.Steps, Step{Note: text, Group: s.record.group})
	}
}
