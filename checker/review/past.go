package review

import (
	"math"
	"slices"
	"sync"

	"kern/checker"
	"kern/checker/model"
)

// Past is an earlier state of a project that later ones are held against, member
// by member. It may be used from several goroutines.
type Past struct {
	report *checker.Report
	byName map[[2]string]*checker.Result // file and name
	mu     sync.Mutex
	sides  map[*model.Calculation]*side
	lines  *lines
}

// NewPast prepares an earlier state.
func NewPast(r *checker.Report) *Past {
	p := &Past{report: r, byName: map[[2]string]*checker.Result{}, sides: map[*model.Calculation]*side{}}
	for _, m := range r.Members {
		file, _ := r.Place(m)
		p.byName[[2]string{file, m.Name}] = m
	}
	return p
}

// Of is the result that a member of a file had; nil for one that was not there.
func (p *Past) Of(file, name string) *checker.Result { return p.byName[[2]string{file, name}] }

// oneMember is about the number of states that are worked out to explain one
// member.
const oneMember = 600

// Explain says what changed about a member and which edits did it. It is false
// when the member was not there or no result changed.
func (p *Past) Explain(after *checker.Report, m *checker.Result) (Change, bool) {
	file, span := after.Place(m)
	before := p.Of(file, m.Name)
	if before == nil || sameResults(before, m) {
		return Change{}, false
	}
	l := newLines(after, false)
	c := Change{Name: m.Name, Title: m.Title, Place: l.of(file, span), Before: stateOf(before), After: stateOf(m), Rows: rowsOf(before, m)}
	earlier, later := p.calculation(before), sideOf(after, m, l)
	if earlier == nil || later == nil {
		c.take(attribution{why: "its calculation was not there"})
		return c, true
	}
	p.mu.Lock() // a side remembers what it was asked
	defer p.mu.Unlock()
	id := "member " + m.Name
	c.take(attribute(earlier, later, pairOf{id, id}, before.Utilisation, m.Utilisation, oneMember))
	return c, true
}

// calculation is the earlier side that a result belongs to.
func (p *Past) calculation(m *checker.Result) *side {
	p.mu.Lock()
	defer p.mu.Unlock()
	if p.lines == nil {
		p.lines = newLines(p.report, true)
	}
	for c, s := range p.sides {
		if slices.Contains(c.Members, m.Member) {
			return s
		}
	}
	s := sideOf(p.report, m, p.lines)
	if s != nil {
		p.sides[s.calc] = s
	}
	return s
}

// sideOf takes the calculation of a result apart; nil when no calculation has it.
func sideOf(r *checker.Report, m *checker.Result, l *lines) *side {
	for _, c := range r.AllCalculations() {
		if slices.Contains(c.Members, m.Member) {
			return newSide(r, c, l)
		}
	}
	return nil
}

// Differs tells whether two answers read differently with two decimals.
func Differs(before, after State) bool {
	return before.Verdict != after.Verdict || checker.Ratio(before.Utilisation) != checker.Ratio(after.Utilisation) && !(math.IsNaN(before.Utilisation) && math.IsNaN(after.Utilisation))
}

// StateOf is the answer of a result.
func StateOf(r *checker.Result) State { return stateOf(r) }
