// Package review says what changed between two states of a project: which members
// came, went or changed their verdict, by how much, and which edits brought that
// about. It reads no disk and no repository: both states are reports.
package review

import (
	"cmp"
	"maps"
	"math"
	"runtime"
	"slices"
	"strings"
	"sync"
	"sync/atomic"

	"kern/checker"
	"kern/checker/standard"
	"kern/lang"
)

// Review is all that is to be said about two states of a project. The same
// states give the same review.
type Review struct {
	Before, After checker.Summary
	// Changes are the members of which any result changed, the worst first.
	Changes []Change
	// Added and Removed are members that are in one state alone, by file and place.
	Added, Removed []Member
	// Same is the number of members of which no result changed; Edited are those of
	// them of which the text did, or something that they lean on.
	Same   int
	Edited []Member
	// Shared are the edits of definitions that several members can lean on, in the
	// order of the text.
	Shared []Shared
	// Assumptions are those that came or went.
	Assumptions []Assumption
	// Loosened are limits, requirements and factors that ask less than before, new
	// departures, and reasons in other words.
	Loosened []Loosening
	// Errors are problems of the text that the earlier state did not have; Mended is
	// the number of those that are gone.
	Errors []Problem
	Mended int
}

// State is a member's answer in one of the states.
type State struct {
	Verdict     standard.Verdict
	Utilisation float64 // NaN when not known
	Governing   string  // rule, "" for none
	Combination string
	// Missing says why an undecided member is undecided.
	Missing []string
}

// Member is a member with its answer.
type Member struct {
	Name, Title string
	Place       Place
	State       State
}

// Change is a member of which any result changed.
type Change struct {
	Name, Title string
	// Was is the name that the member had before, "" when it is the same.
	Was           string
	Place         Place
	Before, After State
	// Rows are the checks of which the utilisation or the verdict changed, those
	// that govern apart.
	Rows []Row
	// Causes are the edits that the member depends on, the greatest share first.
	// Shares are NaN where there are none.
	Causes []Cause
	Method Method
	// Why says why there are no shares.
	Why string
	// Orders is the number of orders that were sampled.
	Orders int
}

// Row is a check in both states; NaN for one that was not made.
type Row struct {
	Rule          string
	Before, After float64
	Verdict       [2]standard.Verdict
}

// Shared is an edit outside of members with those that depend on it.
type Shared struct {
	Edit    Edit
	Reaches []string // names of the members that depend on it
	Changed int      // of them, those of which any result changed
}

// Problem is an error in the text.
type Problem struct {
	Rule, Message string
	Place         Place
}

// Worse tells whether the later state has a failing or undecided member, or an
// error, that the earlier one did not have.
func (r *Review) Worse() bool {
	if len(r.Errors) > 0 {
		return true
	}
	for _, c := range r.Changes {
		if c.NewlyFails() || c.NewlyUndecided() {
			return true
		}
	}
	return slices.ContainsFunc(r.Added, func(m Member) bool { return m.State.Verdict != standard.Passes })
}

// Nothing tells whether no result changed.
func (r *Review) Nothing() bool {
	return len(r.Changes) == 0 && len(r.Added) == 0 && len(r.Removed) == 0 && len(r.Errors) == 0 && r.Mended == 0 && len(r.Assumptions) == 0
}

// NewlyFails tells of a member that fails and did not before.
func (c *Change) NewlyFails() bool {
	return c.After.Verdict == standard.Fails && c.Before.Verdict != standard.Fails
}

// NewlyUndecided tells of a member that is undecided and was not before.
func (c *Change) NewlyUndecided() bool {
	return c.After.Verdict == standard.Undecided && c.Before.Verdict != standard.Undecided
}

// Compare reviews the step from one state to the other.
func Compare(before, after *checker.Report) *Review {
	r := &Review{Before: before.Summary, After: after.Summary}
	b, earlier := sides(before, true)
	a, later := sides(after, false)
	pairs, gone, come := pair(b, a)
	for _, f := range gone {
		r.Removed = append(r.Removed, f.member())
	}
	for _, f := range come {
		r.Added = append(r.Added, f.member())
	}
	edits := shared(earlier, later)
	r.changes(pairs, edits)
	r.assumptions(pairs)
	r.loosened(pairs, earlier, later)
	sortLoosened(r.Loosened)
	r.problems(before, after, newLines(after, false))
	return r
}

func (f found) member() Member {
	return Member{f.result.Name, f.result.Title, f.place, stateOf(f.result)}
}

func stateOf(r *checker.Result) State {
	s := State{Verdict: r.Verdict, Utilisation: r.Utilisation, Governing: r.Governing, Combination: r.Combination}
	if r.Verdict != standard.Undecided {
		return s
	}
	seen := map[string]bool{}
	add := func(text string) {
		if text != "" && !seen[text] {
			seen[text] = true
			s.Missing = append(s.Missing, text)
		}
	}
	for _, m := range r.Missing {
		add(m)
	}
	for _, c := range r.Checks {
		if c.Verdict == standard.Undecided && !c.Departed {
			add(c.Rule + ": " + c.Why)
		}
	}
	for _, c := range r.Coverage {
		if c.State == standard.NotCovered {
			add(c.Rule + ": " + c.Why)
		}
	}
	return s
}

// sameResults tells whether nothing that is said of a member changed.
func sameResults(b, a *checker.Result) bool {
	if b.Verdict != a.Verdict || b.Governing != a.Governing || !sameNumber(b.Utilisation, a.Utilisation) || b.Standard != a.Standard ||
		!slices.Equal(b.Coverage, a.Coverage) || len(b.Departures) != len(a.Departures) || len(b.Checks) != len(a.Checks) {
		return false
	}
	for i, d := range b.Departures {
		if d.Rule != a.Departures[i].Rule {
			return false
		}
	}
	return len(rowsOf(b, a)) == 0
}

func sameNumber(x, y float64) bool { return x == y || math.IsNaN(x) && math.IsNaN(y) || alike(x, y) }

// rowsOf are the checks of which the utilisation or the verdict differs.
func rowsOf(b, a *checker.Result) []Row {
	key := func(c standard.Check, n map[string]int) string {
		k := c.Rule + "\x00" + c.Lift
		if c.Rule == "requirement" {
			k += "\x00" + c.Clause
		}
		n[k]++
		return k + strings.Repeat("+", n[k])
	}
	rows := map[string]*Row{}
	var order []string
	counts := map[string]int{}
	for _, c := range b.Checks {
		k := key(c, counts)
		rows[k] = &Row{Rule: nameOf(c), Before: c.Utilisation, After: math.NaN(), Verdict: [2]standard.Verdict{c.Verdict, standard.Undecided}}
		order = append(order, k)
	}
	counts = map[string]int{}
	for _, c := range a.Checks {
		k := key(c, counts)
		if rows[k] == nil {
			rows[k] = &Row{Rule: nameOf(c), Before: math.NaN()}
			order = append(order, k)
		}
		rows[k].After, rows[k].Verdict[1] = c.Utilisation, c.Verdict
	}
	var out []Row
	for _, k := range order {
		if r := rows[k]; !sameNumber(r.Before, r.After) || r.Verdict[0] != r.Verdict[1] {
			out = append(out, *r)
		}
	}
	return out
}

func nameOf(c standard.Check) string {
	if c.Rule == "requirement" {
		return c.Clause
	}
	return c.Rule
}

// changes works out what changed of the members that are in both states, on all
// cores.
func (r *Review) changes(pairs []match, edits []sharedEdit) {
	type answer struct {
		changed bool
		change  Change
		touched bool
	}
	answers := make([]answer, len(pairs))
	// the members of one block differ in their names alone
	type block struct {
		before, after *lang.Stmt
		from, to      *side
	}
	first := map[block]int{}
	leader := make([]int, len(pairs))
	for i, p := range pairs {
		k := block{p.before.result.Member.Stmt, p.after.result.Member.Stmt, p.before.side, p.after.side}
		if f, ok := first[k]; ok {
			leader[i] = f
		} else {
			first[k], leader[i] = i, i
		}
	}
	differ := 0
	for i, p := range pairs {
		if leader[i] == i && !sameResults(p.before.result, p.after.result) {
			differ++
		}
	}
	states := max(leastStates, maxStates/max(1, differ))
	work := func(i int) {
		p := pairs[i]
		b, a := p.before.result, p.after.result
		answers[i].touched = p.touched()
		if sameResults(b, a) {
			return
		}
		answers[i].changed = true
		c := Change{Name: a.Name, Title: a.Title, Place: p.after.place, Before: stateOf(b), After: stateOf(a), Rows: rowsOf(b, a)}
		if a.Name != b.Name {
			c.Was = b.Name
		}
		if leader[i] == i {
			at := attribute(p.before.side, p.after.side, pairOf{p.before.id, p.after.id}, b.Utilisation, a.Utilisation, states)
			c.take(at)
		}
		answers[i].change = c
	}
	// what a side remembers is written here, before it is read on all cores
	for _, p := range pairs {
		p.before.side.closure(p.before.id)
		p.after.side.closure(p.after.id)
		p.after.side.rank(p.before.side)
	}
	each(len(pairs), work)
	for i := range answers {
		if l := leader[i]; answers[i].changed && l != i {
			c, from := &answers[i].change, &answers[l].change
			c.Causes, c.Method, c.Why, c.Orders = from.Causes, from.Method, from.Why, from.Orders
		}
	}
	for i, p := range pairs {
		switch {
		case answers[i].changed:
			r.Changes = append(r.Changes, answers[i].change)
		case answers[i].touched || p.before.result.Name != p.after.result.Name:
			r.Edited = append(r.Edited, p.after.member())
			r.Same++
		default:
			r.Same++
		}
	}
	slices.SortStableFunc(r.Changes, func(x, y Change) int {
		return cmp.Or(cmp.Compare(x.rank(), y.rank()), compareDown(x.After.Utilisation, y.After.Utilisation))
	})
	r.reach(pairs, edits, func(i int) bool { return answers[i].changed })
}

// each runs n tasks on all cores.
func each(n int, task func(i int)) {
	var next atomic.Int64
	var wait sync.WaitGroup
	for range min(runtime.GOMAXPROCS(0), n) {
		wait.Go(func() {
			for i := int(next.Add(1)) - 1; i < n; i = int(next.Add(1)) - 1 {
				task(i)
			}
		})
	}
	wait.Wait()
}

func (c *Change) take(a attribution) {
	c.Causes, c.Method, c.Why, c.Orders = a.causes, a.method, a.why, a.orders
	for _, e := range a.idle {
		share := 0.0
		if a.method == None {
			share = math.NaN()
		}
		c.Causes = append(c.Causes, Cause{Edits: []Edit{e}, Share: share, Without: c.After.Verdict})
	}
}

// rank orders changes: what newly fails, what fails still and more, what is newly
// undecided, what passes and is more used, the rest.
func (c *Change) rank() int {
	more := c.After.Utilisation > c.Before.Utilisation
	switch {
	case c.NewlyFails():
		return 0
	case c.After.Verdict == standard.Fails && more:
		return 1
	case c.NewlyUndecided():
		return 2
	case c.After.Verdict == standard.Fails:
		return 3
	case c.After.Verdict == standard.Undecided:
		return 4
	case more:
		return 5
	case c.Before.Verdict == c.After.Verdict:
		return 6
	}
	return 7
}

func compareDown(x, y float64) int {
	switch {
	case x > y || math.IsNaN(y) && !math.IsNaN(x):
		return -1
	case y > x || math.IsNaN(x) && !math.IsNaN(y):
		return 1
	}
	return 0
}

// touched tells whether anything that the member depends on was edited.
func (p match) touched() bool {
	b, a := p.before.side.closure(p.before.id), p.after.side.closure(p.after.id)
	if p.before.id != p.after.id {
		delete(b, p.before.id)
		delete(a, p.after.id)
		if !sameDeclared(p.before.side.parts.all[p.before.id], p.after.side.parts.all[p.after.id]) {
			return true
		}
	}
	ids := maps.Clone(b)
	maps.Copy(ids, a)
	for id := range ids {
		if !sameDeclared(p.before.side.parts.all[id], p.after.side.parts.all[id]) {
			return true
		}
	}
	return false
}

func sameDeclared(b, a *declared) bool {
	if b == nil || a == nil {
		return b == a
	}
	return slices.EqualFunc(b.facts, a.facts, func(x, y fact) bool { return x.word == y.word && x.key == y.key })
}

// problems lists the errors that came, and counts those that went. A message
// counts as the same wherever it stands in its file.
func (r *Review) problems(before, after *checker.Report, l *lines) {
	count := map[string]int{}
	key := func(d checker.Diagnostic) string { return d.File + "\x00" + d.Rule + "\x00" + d.Message }
	ours := func(d checker.Diagnostic) bool { return d.Severity == lang.Error && d.Member == "" }
	for _, d := range before.Diagnostics {
		if ours(d) {
			count[key(d)]++
		}
	}
	for _, d := range after.Diagnostics {
		if !ours(d) {
			continue
		}
		if count[key(d)] > 0 {
			count[key(d)]--
			continue
		}
		r.Errors = append(r.Errors, Problem{d.Rule, d.Message, l.of(d.File, d.Span)})
	}
	for _, n := range count {
		r.Mended += n
	}
}
