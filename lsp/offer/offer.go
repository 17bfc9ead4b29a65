// Package offer finds the changes of text that can be offered at a place of a
// file: fixes of what is wrong there, and rewritings that say the same in
// another way. It knows no protocol, reads no disk and changes nothing; whoever
// shows an offer asks for its edits when somebody takes it.
//
// Two promises, held by tests on every file below testdata: what an offer writes
// can be read, and a rewriting leaves every number of the report as it was, bit
// for bit. The one exception is a quantity in another unit: it is the same up to
// the last bits of a float64, or kept to 12 significant digits, and then the title
// says "rounded".
package offer

import (
	"sort"

	"kern/checker"
	"kern/checker/edit"
	"kern/checker/model"
	"kern/checker/size"
	"kern/lang"
)

// Kind sorts offers, by the names that editors know.
type Kind string

// The kinds of offers.
const (
	QuickFix Kind = "quickfix"
	Rewrite  Kind = "refactor.rewrite"
	Extract  Kind = "refactor.extract"
	Inline   Kind = "refactor.inline"
	FixAll   Kind = "source.fixAll.kern"
)

// Kinds are all kinds of offers.
func Kinds() []Kind { return []Kind{QuickFix, Rewrite, Extract, Inline, FixAll} }

// Offer is a change that can be made.
type Offer struct {
	Kind Kind
	// Title says what is done, as a sentence without its full stop.
	Title string
	// Preferred is set for the one safe fix of a diagnostic.
	Preferred bool
	// Mends is the diagnostic that goes away, nil for none.
	Mends *checker.Diagnostic

	edits func() []checker.Edit
	last  bool // a departure: what mends comes first
}

// Edits computes the change: edits in the order of files and places, which do
// not overlap, each as small as it can be. It is nil when nothing would change.
func (o Offer) Edits() []checker.Edit { return o.edits() }

// Request is a place for which offers are wanted.
type Request struct {
	Report *checker.Report
	File   string
	Span   lang.Span
	// Want tells which kinds are wanted; nil for all.
	Want func(Kind) bool
	// Mends finds what makes a member pass; nil to offer none of it.
	Mends func(*checker.Result) []size.Mend
}

// At gives the offers at a place: fixes first, the likeliest in front, then
// rewritings, then what mends the whole file, and departures last.
func At(q Request) []Offer {
	f := q.Report.Project.Files[q.File]
	if f == nil || f.Unreadable != "" {
		return nil
	}
	q.Span.Start = min(max(q.Span.Start, 0), int32(len(f.Text)))
	q.Span.End = min(max(q.Span.End, q.Span.Start), int32(len(f.Text)))
	l := &list{Request: q, file: f, seen: map[string]bool{}, calculations: q.Report.Calculations(q.File), layout: edit.NewLayout(q.Report.Project)}
	if l.wants(QuickFix) {
		l.fixes()
	}
	if s, ok := l.site(); ok {
		if l.wants(QuickFix) {
			l.sizedAt(s)
		}
		if l.wants(Rewrite) {
			l.convert(s)
			l.state(s)
			l.levels(s)
		}
		if l.wants(Extract) {
			l.literal(s)
			l.made(s)
		}
		if l.wants(Inline) {
			l.inline(s)
		}
	}
	if l.wants(FixAll) {
		l.all()
	}
	rank := func(o Offer) int {
		switch {
		case o.last:
			return 4
		case o.Kind == FixAll:
			return 3
		case o.Kind != QuickFix:
			return 2
		case !o.Preferred:
			return 1
		}
		return 0
	}
	sort.SliceStable(l.out, func(i, j int) bool { return rank(l.out[i]) < rank(l.out[j]) })
	return l.out
}

// list collects the offers of a request.
type list struct {
	Request
	file         *lang.File
	calculations []*model.Calculation
	out          []Offer
	seen         map[string]bool
	faults       *faults  // nil until somebody asks
	sizes        []string // titles of mends offered already
	layout       *edit.Layout
}

func (l *list) wants(k Kind) bool { return l.Want == nil || l.Want(k) }

// add adds an offer; the first of those with the same words counts.
func (l *list) add(o Offer) {
	key := string(o.Kind) + o.Title
	if o.Mends != nil {
		key += o.Mends.Rule + o.Mends.Message
	}
	if l.seen[key] {
		return
	}
	l.seen[key] = true
	edits := o.edits
	o.edits = func() []checker.Edit { return l.layout.Tidy(edits()) }
	l.out = append(l.out, o)
}

// site is what stands at the place of a request.
type site struct {
	lang.At
	stmt *lang.Stmt // the innermost statement
	top  *lang.Stmt // the declaration's own
}

// site finds what the place of the request stands in. It is false where there is
// no statement, or one that cannot be read.
func (l *list) site() (site, bool) {
	at, ok := l.file.At(l.Span.Start)
	if !ok || at.Stmt() == nil {
		return site{}, false
	}
	s := site{At: at, stmt: at.Stmt(), top: at.Stmts[0]}
	end := l.Span.End - at.Start
	if s.stmt.Broken || s.top.Broken || end > s.top.Span.End && end > at.Offset {
		return site{}, false
	}
	return s, true
}

// edit makes an edit of the file from a span of a declaration.
func (l *list) edit(start int32, span lang.Span, text string) checker.Edit {
	return checker.Edit{File: l.File, Span: lang.Span{Start: start + span.Start, End: start + span.End}, New: text}
}

// editAt makes an edit at a place of any file of the report.
func (l *list) editAt(at lang.Place, text string) checker.Edit {
	file, span := l.Report.Where(at)
	return checker.Edit{File: file, Span: span, New: text}
}

// diagnostics are those of the file, by place.
func (l *list) diagnostics() []checker.Diagnostic { return diagnosticsOf(l.Report, l.File) }

func diagnosticsOf(r *checker.Report, file string) []checker.Diagnostic {
	all := r.Diagnostics
	first := sort.Search(len(all), func(i int) bool { return all[i].File >= file })
	last := first + sort.Search(len(all)-first, func(i int) bool { return all[first+i].File > file })
	return all[first:last]
}

// faults are the places of errors in a file, in order, for a quick look.
type faults struct {
	starts []int32
	ends   []int32 // the greatest end of this one and those before it
}

// sound tells whether no error was reported in a span of the file: what cannot
// be understood is not rewritten. That a member fails is no such error.
func (l *list) sound(span lang.Span) bool {
	if l.faults == nil {
		l.faults = &faults{}
		end := int32(-1)
		all := l.diagnostics()
		for i := range all {
			if d := &all[i]; d.Severity == lang.Error && d.Member == "" {
				end = max(end, d.Span.End, d.Span.Start+1)
				l.faults.starts, l.faults.ends = append(l.faults.starts, d.Span.Start), append(l.faults.ends, end)
			}
		}
	}
	i := sort.Search(len(l.faults.starts), func(i int) bool { return l.faults.starts[i] >= span.End })
	return i == 0 || l.faults.ends[i-1] <= span.Start
}
