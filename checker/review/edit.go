package review

import (
	"strings"

	"kern/checker"
	"kern/lang"
)

// Place is a line of one of the two states.
type Place struct {
	File string
	Line int // from 1
	// Before is set for a line of the earlier state: it is not there any more.
	Before bool
}

// Edit is one difference between two states of a calculation: a statement that
// was added, removed or changed.
type Edit struct {
	// Kind says what sort of thing was edited: load, length, hold, section, grade,
	// factor, standard, limit, definition and so on.
	Kind string
	// Of is the declaration that it stands in: "member A1", "basis", "section mast".
	Of string
	// Before and After are the statements on one line, "" for one that is not there.
	Before, After string
	Place         Place
}

// String says the edit in words.
func (e Edit) String() string {
	of := e.Of + ": "
	switch {
	case e.Before == "":
		return of + "added " + e.After
	case e.After == "":
		return of + "removed " + e.Before
	case e.Before == e.After:
		return of + "moved " + e.After
	}
	return of + e.Before + " → " + e.After
}

// kindOf is the kind of an edit, by the declaration and the word that it is about.
func kindOf(d *declared, word string) string {
	switch d.kind {
	case "member":
		switch word {
		case "load":
			return "load"
		case "height", "length", "from":
			return "length"
		case "base", "top", "hold", "effective":
			return "hold"
		case "section", "lift", "net":
			return "section"
		case "material":
			return "grade"
		case "selfweight", "kind":
			return "self-weight"
		case "joints", "connected":
			return "hold"
		case "moments", "reduce", "reduction":
			return "load"
		case "limit", "require", "depart":
			return "limit"
		case "as":
			return "likeness"
		}
		return "note"
	case "basis":
		switch {
		case word == "standard":
			return "standard"
		case word == "show":
			return "note"
		case word == "actions" || word == "permanent" || word == "roofs" || word == "accidental":
			return "combination"
		case word == "selfweight":
			return "self-weight"
		case word == "effective":
			return "hold"
		case word == "strengths":
			return "grade"
		}
		return "factor"
	case "section":
		return "section"
	case "material":
		return "grade"
	case "cases", "combinations", "exclusives":
		return "combination"
	case "forces", "table", "rows":
		return "load"
	}
	return "definition"
}

// cannotMatter tells of facts that no result depends on.
func cannotMatter(d *declared, word string) bool {
	return d.kind == "member" && (word == "title" || word == "note") || d.kind == "basis" && word == "show"
}

// lines finds lines in the files of a report. It does not change.
type lines struct {
	report *checker.Report
	before bool
	files  map[string]*lang.Lines
}

func newLines(r *checker.Report, before bool) *lines {
	l := &lines{report: r, before: before, files: map[string]*lang.Lines{}}
	for name, f := range r.Project.Files {
		l.files[name] = lang.NewLines(f.Text) // now, as several cores read them later
	}
	return l
}

func (l *lines) at(p lang.Place) Place {
	file, span := l.report.Where(p)
	return l.of(file, span)
}

func (l *lines) of(file string, span lang.Span) Place {
	if file == "" {
		return Place{}
	}
	line, _ := l.files[file].Position(span.Start)
	return Place{File: file, Line: line, Before: l.before}
}

// shown is a fact as an edit shows it.
func (d *declared) shown(f fact) string {
	switch {
	case d.kind == "member" && f.word == "kind":
		return f.text
	case f.word == "made of":
		return strings.TrimPrefix(f.text, "= ")
	}
	return f.text
}

// editOf is the edit of a pair of facts; either may be nil.
func editOf(b, a *declared, before, after *fact, earlier, later *lines) Edit {
	d := a
	if d == nil {
		d = b
	}
	e := Edit{Of: d.title()}
	if before != nil {
		e.Before, e.Kind = d.shown(*before), kindOf(d, before.word)
		e.Place = earlier.at(before.place)
	}
	if after != nil {
		e.After, e.Kind = d.shown(*after), kindOf(d, after.word)
		e.Place = later.at(after.place)
	}
	return e
}

// title is how people call the declaration.
func (d *declared) title() string {
	switch d.kind {
	case "cases", "combinations", "exclusives":
		return strings.TrimSuffix(d.kind, "s")
	case "rows":
		return "forces of " + d.name
	case "member":
		for _, f := range d.facts {
			if f.word == "kind" {
				return f.text + " " + d.name
			}
		}
	}
	return d.id
}
