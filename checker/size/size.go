// Package size finds what makes a member pass, and how much more one that passes
// may take. Every finding is a change of text that was checked as if it stood in
// the calculation: nothing is offered by rule of thumb.
package size

import (
	"cmp"
	"math"
	"slices"
	"sync"

	"kern/checker"
	"kern/checker/edit"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// Kind is what a mend changes.
type Kind string

// The kinds of mends.
const (
	Section Kind = "section"
	Group   Kind = "group" // one section for all members that share it
	Grade   Kind = "grade"
	Hold    Kind = "hold"
	Turn    Kind = "turn" // the section turned by a right angle
	Height  Kind = "height"
	Load    Kind = "load"
)

var kindOrder = []Kind{Section, Group, Grade, Turn, Hold, Height, Load}

// Mend is a change with which a member passes.
type Mend struct {
	Kind Kind
	// Change says what there would be: "HEB 180", "S460", "hold minor at 2.4 m",
	// "height = 4.35 m", "load G 83.2 kN at top".
	Change string
	// Family is that of a section.
	Family string
	// Utilisation, Governing and Combination are those of the member after the
	// change; of a group, of the member that is used most.
	Utilisation            float64
	Governing, Combination string
	MassPerLength          float64 // after the change, kg/m
	Added                  float64 // mass per length that the change adds, kg/m
	// Needs is what a new hold must be able to do, by axis.
	Needs []standard.HoldDemand
	// Serves are the members of a group, in the order of the report.
	Serves []string
	// Value is the greatest height or load, or the height of a hold, in SI units of
	// Dim; Now is what the height or the load is at present. NaN of other kinds.
	Value, Now float64
	Dim        unit.Dim
	// Place is the line of the load, or of the height or section, in the member's text;
	// of lines that are not there or are taken over, no declaration.
	Place lang.Place
	// Note is what the change does not look after, "" for nothing.
	Note string

	edits func() []checker.Edit
}

// Edits is the change as text: edits in order that do not overlap and leave a file
// that was laid out laid out. It is nil where nothing can be written.
func (m Mend) Edits() []checker.Edit { return m.edits() }

// Options bound the sections that are looked at.
type Options struct {
	// Families are the families of the catalogue that are allowed; nil for those of
	// the kind that the member has.
	Families []string
	// MaxDepth and MaxWidth are the greatest outside dimensions, m; 0 for none.
	MaxDepth, MaxWidth float64
	// Kinds are the kinds that are wanted; nil for all.
	Kinds []Kind
}

func (o Options) wants(k Kind) bool { return o.Kinds == nil || slices.Contains(o.Kinds, k) }

// subject is a member with all that a change of its text touches.
type subject struct {
	report *checker.Report
	r      *checker.Result
	file   string
	calcs  []*model.Calculation
	line   edit.Line
	layout *edit.Layout
	before map[string]bool // the members of the declaration and of those that lean on it: whether they pass
	stated bool            // the member can be changed at all
}

func newSubject(report *checker.Report, r *checker.Result, layout *edit.Layout) *subject {
	s := &subject{report: report, r: r, line: edit.Line{Decl: r.Member.Decl, Stmt: r.Member.Stmt}, layout: layout, before: map[string]bool{}}
	if r.Member.Decl == nil || r.Member.Stmt == nil || len(r.Missing) > 0 {
		return s
	}
	s.file, _ = report.Place(r)
	for _, c := range report.Calculations(s.file) {
		if n := c.Env.Names[r.Name]; n != nil && n.Stmt == r.Member.Stmt {
			s.calcs = append(s.calcs, c)
		}
	}
	s.stated = len(s.calcs) > 0
	for _, c := range s.calcs {
		for _, d := range append([]*lang.Decl{r.Member.Decl}, checker.Leaners(c, r.Member.Decl)...) {
			for _, m := range report.Results(d) {
				s.before[m.Name] = m.Verdict == standard.Passes
			}
		}
	}
	return s
}

// trial tries texts of the subject's declaration in each of its calculations.
type trial struct {
	s      *subject
	trials []*checker.Trials
}

func (s *subject) trial() *trial {
	t := &trial{s: s}
	for _, c := range s.calcs {
		t.trials = append(t.trials, checker.NewTrials(c, s.r.Member.Decl, checker.Leaners(c, s.r.Member.Decl)...))
	}
	return t
}

// passes checks the text of the declaration after changes: the members of the
// statement must pass, and no other that passed may fail for it. It gives the
// subject as it is then; nil where it has no result.
func (t *trial) passes(changes []lang.Change) (*checker.Result, bool) {
	text := lang.Apply(t.s.r.Member.Decl.Text, changes)
	var own *checker.Result
	fine := true
	for _, k := range t.trials {
		found := false
		for _, r := range k.Of(text) {
			passes := r.Verdict == standard.Passes
			switch {
			case r.Name == t.s.r.Name:
				found = true
				if own == nil || !(r.Utilisation <= own.Utilisation) {
					own = r
				}
				fine = fine && passes && len(r.Missing) == 0
			case t.s.sibling(r.Name):
				fine = fine && passes
			default:
				fine = fine && (passes || !t.s.before[r.Name])
			}
		}
		if !found {
			return nil, false
		}
	}
	return own, fine && own != nil
}

// sibling tells whether a member is another one of the same statement.
func (s *subject) sibling(name string) bool {
	for _, e := range s.r.Member.Stmt.Args {
		if e.Kind != lang.NameExpr && e.Kind != lang.CommaExpr || e.Is("as") {
			return false
		}
		if e.Text == name {
			return true
		}
	}
	return false
}

// own finds the line of a word in the member's own block.
func (s *subject) own(word string) *lang.Stmt {
	if s.line.Stmt.Body == nil {
		return nil
	}
	for _, b := range s.line.Stmt.Body.Stmts {
		if edit.Same(b.Word) == word {
			return b
		}
	}
	return nil
}

// say gives the changes that make the member say a line: in place of its own line
// of the word, or as a new one.
func (s *subject) say(word, line string) ([]lang.Change, bool) {
	if b := s.own(word); b != nil {
		return []lang.Change{{Span: b.Span, New: line}}, !b.Broken
	}
	c, ok := edit.Insert(s.line.Decl.Text, s.line.Stmt, line)
	return []lang.Change{c}, ok
}

// mend makes the mend of a result.
func (s *subject) mend(k Kind, change string, r *checker.Result, changes []lang.Change) Mend {
	mass := Mass(r)
	var at lang.Place
	word := map[Kind]string{Section: "section", Grade: "material", Height: "height"}[k]
	if b := s.own(word); word != "" && b != nil {
		at = lang.Place{Decl: s.line.Decl, Span: b.Line}
	}
	used, governing, under := Used(r)
	return Mend{Kind: k, Place: at, Change: change, Utilisation: used, Governing: governing, Combination: under,
		MassPerLength: mass, Added: mass - Mass(s.r), Value: nan, Now: nan,
		edits: func() []checker.Edit { return s.layout.TidyIn(s.file, s.line.Decl, changes) }}
}

// Used is the greatest utilisation of the checks that the member does not depart
// from, with the check's rule and combination; NaN where there is none.
func Used(r *checker.Result) (utilisation float64, governing, combination string) {
	if len(r.Departures) == 0 {
		return r.Utilisation, r.Governing, r.Combination
	}
	utilisation = nan
	for _, c := range r.Checks {
		if !c.Departed && c.Rule != "requirement" && !math.IsNaN(c.Utilisation) && !(c.Utilisation <= utilisation) {
			utilisation, governing, combination = c.Utilisation, c.Rule, r.CombinationName(c)
		}
	}
	return utilisation, governing, combination
}

// Mass is the mass per length of a member of one section, kg/m; of several lifts
// the mean. It is NaN where it is not known.
func Mass(r *checker.Result) float64 {
	if r.Member.Section == nil && len(r.Member.Lifts) == 0 || r.Member.Material == nil || !(r.Member.Height > 0) {
		return math.NaN()
	}
	sum := 0.0
	for _, l := range r.Member.Parts() {
		if l.Section == nil || l.Material == nil {
			return math.NaN()
		}
		sum += l.Section.Area * l.Material.Density * (l.To - l.From)
	}
	return sum / r.Member.Height
}

// Mends gives the changes with which a member passes: those that add the least
// mass first. For a member that passes already they are what it could do with
// less, or take more: a lighter section, a greater height, a greater load. It is
// empty for a member that cannot be checked at all.
func Mends(report *checker.Report, r *checker.Result, o Options) []Mend {
	return mends(report, r, o, edit.NewLayout(report.Project))
}

func mends(report *checker.Report, r *checker.Result, o Options, layout *edit.Layout) []Mend {
	s := newSubject(report, r, layout)
	if !s.stated {
		return nil
	}
	passes := r.Verdict == standard.Passes
	var tasks []func() []Mend
	add := func(k Kind, task func() []Mend) {
		if o.wants(k) {
			tasks = append(tasks, task)
		}
	}
	add(Section, func() []Mend { return s.sections(o) })
	add(Group, func() []Mend { return s.group(o) })
	if !passes {
		add(Grade, s.grades)
		add(Turn, s.turns)
		add(Hold, s.holds)
	}
	add(Height, s.heights)
	add(Load, s.loads)
	found := make([][]Mend, len(tasks))
	var wait sync.WaitGroup
	for i, task := range tasks {
		wait.Go(func() { found[i] = task() })
	}
	wait.Wait()
	out := slices.Concat(found...)
	slices.SortStableFunc(out, func(a, b Mend) int {
		return cmp.Or(cmp.Compare(math.Round(a.Added*1e6), math.Round(b.Added*1e6)), cmp.Compare(slices.Index(kindOrder, a.Kind), slices.Index(kindOrder, b.Kind)))
	})
	return out
}

// judge checks changes of a member, most quickly those that fail: the combination
// that decided last is tried alone first.
type judge struct {
	r      *checker.Result
	killer int
}

func newJudge(r *checker.Result) *judge {
	j := &judge{r: r, killer: -1}
	if c, ok := r.GoverningCheck(); ok {
		j.killer = c.Combination
	}
	if len(r.Member.Requires) > 0 || r.Member.Imported != nil {
		j.r, j.killer = r, -2 // conditions may speak of any combination
	}
	return j
}

// passes checks the member after a change; the result is nil where one
// combination was enough to see that it fails.
func (j *judge) passes(change func(m *model.Member)) (*checker.Result, bool) {
	if j.killer >= 0 && j.r.FailsUnder(j.killer, change) {
		return nil, false
	}
	out := j.r.With(change)
	if out.Verdict == standard.Passes && len(out.Missing) == 0 {
		return out, true
	}
	for _, c := range out.Checks {
		if j.killer != -2 && c.Verdict == standard.Fails && !c.Departed && c.Combination >= 0 {
			j.killer = c.Combination
		}
	}
	return out, false
}
