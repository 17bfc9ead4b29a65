package output

import (
	"encoding/json"
	"io"
	"math"

	"kern/checker"
	"kern/checker/review"
)

// ReviewSchema counts up when the keys of a review's JSON change.
const ReviewSchema = 1

// The JSON object of a review, in the order of its keys.
type (
	reviewDocument struct {
		Schema      int                `json:"schema"`
		Program     string             `json:"program"`
		Caution     string             `json:"caution"`
		Before      reviewSide         `json:"before"`
		After       reviewSide         `json:"after"`
		Worse       bool               `json:"worse"`
		Nothing     bool               `json:"nothing"`
		Together    []string           `json:"together"`
		Changes     []reviewChange     `json:"changes"`
		Added       []reviewMember     `json:"added"`
		Removed     []reviewMember     `json:"removed"`
		Edited      []string           `json:"edited"`
		Same        int                `json:"same"`
		Shared      []reviewShared     `json:"shared"`
		Loosened    []reviewLoosening  `json:"loosened"`
		Assumptions []reviewAssumption `json:"assumptions"`
		Errors      []reviewProblem    `json:"errors"`
		Mended      int                `json:"mended"`
	}
	reviewSide struct {
		State   string  `json:"state"`
		Summary summary `json:"summary"`
	}
	reviewState struct {
		Verdict     string   `json:"verdict"`
		Utilisation *float64 `json:"utilisation"`
		Governing   string   `json:"governing"`
		Combination string   `json:"combination"`
		Missing     []string `json:"missing,omitempty"`
	}
	reviewMember struct {
		Name  string      `json:"name"`
		Title string      `json:"title"`
		File  string      `json:"file"`
		Line  int         `json:"line"`
		State reviewState `json:"state"`
	}
	reviewEdit struct {
		Kind   string `json:"kind"`
		Of     string `json:"of"`
		Before string `json:"before"`
		After  string `json:"after"`
		File   string `json:"file"`
		Line   int    `json:"line"`
		In     string `json:"in"`
	}
	reviewCause struct {
		Share   *float64     `json:"share"`
		Without string       `json:"without,omitempty"`
		Turns   bool         `json:"turns"`
		Edits   []reviewEdit `json:"edits"`
	}
	reviewCheck struct {
		Rule          string   `json:"rule"`
		Before        *float64 `json:"before"`
		After         *float64 `json:"after"`
		VerdictBefore string   `json:"verdictBefore"`
		VerdictAfter  string   `json:"verdictAfter"`
	}
	reviewChange struct {
		Name   string        `json:"name"`
		Was    string        `json:"was,omitempty"`
		Title  string        `json:"title"`
		File   string        `json:"file"`
		Line   int           `json:"line"`
		Before reviewState   `json:"before"`
		After  reviewState   `json:"after"`
		Checks []reviewCheck `json:"checks"`
		Method string        `json:"method"`
		Why    string        `json:"why,omitempty"`
		Orders int           `json:"orders,omitempty"`
		Causes []reviewCause `json:"causes"`
	}
	reviewShared struct {
		Edit    reviewEdit `json:"edit"`
		Reaches []string   `json:"reaches"`
		Changed int        `json:"changed"`
	}
	reviewLoosening struct {
		What     string   `json:"what"`
		Before   string   `json:"before"`
		After    string   `json:"after"`
		Because  string   `json:"because"`
		Members  []string `json:"members"`
		File     string   `json:"file"`
		Line     int      `json:"line"`
		Reworded bool     `json:"reworded"`
	}
	reviewAssumption struct {
		Text    string   `json:"text"`
		Added   bool     `json:"added"`
		Members []string `json:"members"`
	}
	reviewProblem struct {
		Rule    string `json:"rule"`
		Message string `json:"message"`
		File    string `json:"file"`
		Line    int    `json:"line"`
	}
)

// ReviewJSON writes a review as one JSON object.
func ReviewJSON(out io.Writer, r *review.Review, f ReviewForm) error {
	e := json.NewEncoder(out)
	e.SetEscapeHTML(false)
	e.SetIndent("", " ")
	return e.Encode(buildReview(r, f))
}

func buildReview(r *review.Review, f ReviewForm) reviewDocument {
	total := func(s checker.Summary) summary {
		return summary{s.Members, s.Passes, s.Fails, s.Undecided, s.Errors, s.Warnings}
	}
	file := func(p review.Place) string {
		if p.File == "" {
			return ""
		}
		return f.Names(p.File)
	}
	state := func(s review.State) reviewState {
		return reviewState{s.Verdict.String(), finite(s.Utilisation), s.Governing, s.Combination, s.Missing}
	}
	edit := func(e review.Edit) reviewEdit {
		in := "after"
		if e.Place.Before {
			in = "before"
		}
		return reviewEdit{e.Kind, e.Of, e.Before, e.After, file(e.Place), e.Place.Line, in}
	}
	member := func(m review.Member) reviewMember {
		return reviewMember{m.Name, m.Title, file(m.Place), m.Place.Line, state(m.State)}
	}
	d := reviewDocument{Schema: ReviewSchema, Program: f.Program, Caution: Caution, Before: reviewSide{f.Before, total(r.Before)}, After: reviewSide{f.After, total(r.After)},
		Worse: r.Worse(), Nothing: r.Nothing(), Together: noNull(f.Together), Changes: []reviewChange{}, Added: []reviewMember{}, Removed: []reviewMember{}, Edited: []string{},
		Same: r.Same, Shared: []reviewShared{}, Loosened: []reviewLoosening{}, Assumptions: []reviewAssumption{}, Errors: []reviewProblem{}, Mended: r.Mended}
	for i := range r.Changes {
		c := &r.Changes[i]
		x := reviewChange{Name: c.Name, Was: c.Was, Title: c.Title, File: file(c.Place), Line: c.Place.Line, Before: state(c.Before), After: state(c.After),
			Checks: []reviewCheck{}, Method: c.Method.String(), Why: c.Why, Orders: c.Orders, Causes: []reviewCause{}}
		for _, row := range c.Rows {
			x.Checks = append(x.Checks, reviewCheck{row.Rule, finite(row.Before), finite(row.After), row.Verdict[0].String(), row.Verdict[1].String()})
		}
		for _, cause := range c.Causes {
			y := reviewCause{Share: finite(cause.Share), Turns: cause.Turns, Edits: []reviewEdit{}}
			if !math.IsNaN(cause.Share) {
				y.Without = cause.Without.String()
			}
			for _, e := range cause.Edits {
				y.Edits = append(y.Edits, edit(e))
			}
			x.Causes = append(x.Causes, y)
		}
		d.Changes = append(d.Changes, x)
	}
	for _, m := range r.Added {
		d.Added = append(d.Added, member(m))
	}
	for _, m := range r.Removed {
		d.Removed = append(d.Removed, member(m))
	}
	for _, m := range r.Edited {
		d.Edited = append(d.Edited, m.Name)
	}
	for _, s := range r.Shared {
		d.Shared = append(d.Shared, reviewShared{edit(s.Edit), noNull(s.Reaches), s.Changed})
	}
	for _, l := range r.Loosened {
		d.Loosened = append(d.Loosened, reviewLoosening{l.What, l.Before, l.After, l.Because, noNull(l.Members), file(l.Place), l.Place.Line, l.Reworded})
	}
	for _, a := range r.Assumptions {
		d.Assumptions = append(d.Assumptions, reviewAssumption{a.Text, a.Added, noNull(a.Members)})
	}
	for _, e := range r.Errors {
		d.Errors = append(d.Errors, reviewProblem{e.Rule, e.Message, file(e.Place), e.Place.Line})
	}
	return d
}

// noNull is never null in JSON.
func noNull(s []string) []string {
	if s == nil {
		return []string{}
	}
	return s
}
