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
}

// Step is one line of a derivation.
type Step struct {
	Symbol  ID
	Formula *Formula // nil for a value that is taken, not computed
	Inputs  []Input  // the values that went into the formula
	Value   float64  // coherent SI units
	Clause  string   // the clause of a computed step, the source of a taken value
	Note    string   // a remark that stands by itself; the other fields are empty
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
		s.record.Steps = append(s.record.Steps, Step{Symbol: id, Value: value, Clause: source})
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
		s.record.Steps = append(s.record.Steps, Step{Symbol: f.Symbol, Formula: f, Inputs: inputs, Value: v, Clause: f.Clause})
	}
	s.values[f.Symbol] = v
	return v
}

// At gives the value of a symbol, NaN when it is not known.
func (s *Sheet) At(id ID) float64 { return s.values[id] }

// Note records a remark.
func (s *Sheet) Note(text string) {
	if s.record != nil {
		s.record.Steps = append(s.record.Steps, Step{Note: text})
	}
}
