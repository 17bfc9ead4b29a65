// Package output prints reports: as text for a terminal and as JSON for
// programs. The printings differ in form alone.
package output

import (
	"bufio"
	"encoding/json"
	"io"
	"math"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/record"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// Schema counts up when the keys of the JSON change.
const Schema = 1

// Names turns a file's workspace name into the one that is printed.
type Names func(name string) string

// The JSON object, in the order of its keys.
type (
	document struct {
		Schema      int          `json:"schema"`
		Program     string       `json:"program"`
		Caution     string       `json:"caution"`
		Diagnostics []diagnostic `json:"diagnostics"`
		Members     []member     `json:"members"`
		Summary     summary      `json:"summary"`
		Recorded    *recorded    `json:"recorded,omitempty"`
	}
	recorded struct {
		Blocked     bool         `json:"blocked"`
		Differences []difference `json:"differences"`
		Carried     []carried    `json:"carried"`
	}
	difference struct {
		File    string `json:"file"`
		Member  string `json:"member"`
		Message string `json:"message"`
	}
	carried struct {
		File    string `json:"file"`
		Member  string `json:"member"`
		Verdict string `json:"verdict"`
		Because string `json:"because"`
	}
	position struct {
		Line   int `json:"line"`
		Column int `json:"column"`
	}
	span struct {
		Start position `json:"start"`
		End   position `json:"end"`
	}
	related struct {
		File    string `json:"file"`
		Range   span   `json:"range"`
		Message string `json:"message"`
	}
	diagnostic struct {
		File     string    `json:"file"`
		Range    span      `json:"range"`
		Severity string    `json:"severity"`
		Rule     string    `json:"rule"`
		Message  string    `json:"message"`
		Member   string    `json:"member,omitempty"`
		Notes    []string  `json:"notes,omitempty"`
		Related  []related `json:"related,omitempty"`
		Fixes    []string  `json:"fixes"`
	}
	amount struct {
		Value *float64 `json:"value"`
		Unit  string   `json:"unit"`
	}
	check struct {
		Rule        string   `json:"rule"`
		Clause      string   `json:"clause"`
		Combination string   `json:"combination"`
		Lift        string   `json:"lift,omitempty"`
		Demand      amount   `json:"demand"`
		Capacity    amount   `json:"capacity"`
		Utilisation *float64 `json:"utilisation"`
		Verdict     string   `json:"verdict"`
		Why         string   `json:"why,omitempty"`
		Departed    bool     `json:"departed,omitempty"`
	}
	quantity struct {
		Symbol string   `json:"symbol"`
		Value  *float64 `json:"value"`
		Unit   string   `json:"unit"`
		Clause string   `json:"clause"`
		Lift   string   `json:"lift,omitempty"`
	}
	lift struct {
		Name     string `json:"name"`
		From     amount `json:"from"`
		To       amount `json:"to"`
		Section  string `json:"section"`
		Material string `json:"material"`
	}
	takedown struct {
		Levels []storey `json:"levels"`
		Base   []base   `json:"base"`
	}
	storey struct {
		Level string  `json:"level"`
		At    amount  `json:"at"`
		Cases []share `json:"cases"`
	}
	share struct {
		Case      string   `json:"case"`
		Load      amount   `json:"load"`
		Force     amount   `json:"force"`
		Reduction *float64 `json:"reduction,omitempty"`
	}
	base struct {
		Case  string `json:"case"`
		Axial amount `json:"axial"`
		Major *bent  `json:"major,omitempty"`
		Minor *bent  `json:"minor,omitempty"`
	}
	bent struct {
		Shear  amount `json:"shear"`
		Moment amount `json:"moment"`
	}
	hold struct {
		At              amount `json:"at"`
		Axis            string `json:"axis"`
		Compression     amount `json:"compression"`
		Combination     string `json:"combination"`
		Force           amount `json:"force"`
		Clause          string `json:"clause"`
		Practice        amount `json:"force_common_practice"`
		Stiffness       amount `json:"stiffness"`
		StiffnessSource string `json:"stiffness_source"`
		Stated          amount `json:"stiffness_stated"`
	}
	coverage struct {
		Rule  string `json:"rule"`
		State string `json:"state"`
		Why   string `json:"why"`
	}
	departure struct {
		Rule    string `json:"rule"`
		Because string `json:"because"`
	}
	member struct {
		Name        string      `json:"name"`
		Title       string      `json:"title"`
		File        string      `json:"file"`
		Line        int         `json:"line"`
		Standard    string      `json:"standard"`
		Verdict     string      `json:"verdict"`
		Utilisation *float64    `json:"utilisation"`
		Governing   string      `json:"governing"`
		Combination string      `json:"combination"`
		Lift        string      `json:"lift,omitempty"`
		Lifts       []lift      `json:"lifts,omitempty"`
		Checks      []check     `json:"checks"`
		Takedown    *takedown   `json:"takedown,omitempty"`
		Quantities  []quantity  `json:"quantities"`
		Holds       []hold      `json:"holds,omitempty"`
		Coverage    []coverage  `json:"coverage"`
		Assumptions []string    `json:"assumptions"`
		Departures  []departure `json:"departures"`
		Missing     []string    `json:"missing,omitempty"`
	}
	summary struct {
		Members   int `json:"members"`
		Passes    int `json:"passes"`
		Fails     int `json:"fails"`
		Undecided int `json:"undecided"`
		Errors    int `json:"errors"`
		Warnings  int `json:"warnings"`
	}
)

// Caution goes with every output.
const Caution = "Local codes govern; a licensed engineer decides."

// JSON writes a report as one JSON object. known is what a comparison with
// recorded results came to, nil without one.
func JSON(w io.Writer, r *checker.Report, program string, names Names, known *record.Outcome) error {
	b := bufio.NewWriter(w)
	e := json.NewEncoder(b)
	e.SetEscapeHTML(false)
	e.SetIndent("", " ")
	d := build(r, program, names)
	if known != nil {
		d.Recorded = &recorded{Blocked: known.Blocked, Differences: []difference{}, Carried: []carried{}}
		for _, x := range known.Differences {
			d.Recorded.Differences = append(d.Recorded.Differences, difference{x.File, x.Name, x.Message})
		}
		for _, x := range known.Carried {
			d.Recorded.Carried = append(d.Recorded.Carried, carried{x.File, x.Name, x.Verdict, x.Carried})
		}
	}
	if err := e.Encode(d); err != nil {
		return err
	}
	return b.Flush()
}

func build(r *checker.Report, program string, names Names) document {
	lines := newIndex(r.Project)
	d := document{Schema: Schema, Program: program, Caution: Caution, Diagnostics: []diagnostic{}, Members: []member{},
		Summary: summary{r.Summary.Members, r.Summary.Passes, r.Summary.Fails, r.Summary.Undecided, r.Summary.Errors, r.Summary.Warnings}}
	for _, x := range r.Diagnostics {
		out := diagnostic{File: names(x.File), Range: lines.span(x.File, x.Span), Severity: x.Severity.String(), Rule: x.Rule, Message: x.Message, Member: x.Member,
			Notes: x.Notes, Fixes: []string{}}
		for _, rel := range x.Related {
			out.Related = append(out.Related, related{names(rel.File), lines.span(rel.File, rel.Span), rel.Message})
		}
		for _, f := range x.Fixes {
			out.Fixes = append(out.Fixes, f.Title)
		}
		d.Diagnostics = append(d.Diagnostics, out)
	}
	for _, m := range r.Members {
		d.Members = append(d.Members, buildMember(m, r, lines, names))
	}
	return d
}

func buildMember(m *checker.Result, r *checker.Report, lines *index, names Names) member {
	file, at := r.Place(m)
	units := m.Units()
	out := member{Name: m.Name, Title: m.Title, File: names(file), Line: lines.span(file, at).Start.Line, Standard: m.Standard, Verdict: m.Verdict.String(),
		Utilisation: finite(m.Utilisation), Governing: m.Governing, Combination: m.Combination, Lift: m.Lift,
		Checks: []check{}, Quantities: []quantity{}, Coverage: []coverage{}, Assumptions: m.Assumptions, Departures: []departure{}, Missing: m.Missing}
	if out.Assumptions == nil {
		out.Assumptions = []string{}
	}
	for _, l := range m.Member.Lifts {
		if l.Section != nil && l.Material != nil {
			out.Lifts = append(out.Lifts, lift{l.Name(), amountOf(units, l.From, unit.Length), amountOf(units, l.To, unit.Length), l.Section.Title(), l.Material.Title()})
		}
	}
	for _, c := range m.Checks {
		out.Checks = append(out.Checks, check{Rule: c.Rule, Clause: c.Clause, Combination: m.CombinationName(c), Lift: c.Lift,
			Demand: amountOf(units, c.Demand, c.Dim), Capacity: amountOf(units, c.Capacity, c.Dim), Utilisation: finite(c.Utilisation), Verdict: c.Verdict.String(),
			Why: why(c), Departed: c.Departed})
	}
	if record := m.Derive(); record != nil {
		type key struct {
			symbol derivation.ID
			lift   string
		}
		seen := map[key]bool{}
		for _, s := range record.Steps {
			k := key{s.Symbol, s.Lift}
			if s.Note != "" || seen[k] {
				continue
			}
			seen[k] = true
			sym := record.Set.At(s.Symbol)
			a := amountOf(units, s.Value, sym.Dim)
			out.Quantities = append(out.Quantities, quantity{sym.Name, a.Value, a.Unit, s.Clause, s.Lift})
		}
	}
	out.Takedown = buildTakedown(m)
	for _, h := range m.Holds() {
		stated := h.Stated
		if stated == 0 {
			stated = math.NaN()
		}
		out.Holds = append(out.Holds, hold{At: amountOf(units, h.At, unit.Length), Axis: h.Axis.String(), Compression: amountOf(units, h.Compression, unit.Force),
			Combination: m.Combinations()[h.Combination].Name, Force: amountOf(units, h.Force, unit.Force), Clause: standard.HoldForceClause, Practice: amountOf(units, h.Practice, unit.Force),
			Stiffness: amountOf(units, h.Stiffness, unit.ForcePerLength), StiffnessSource: h.How, Stated: amountOf(units, stated, unit.ForcePerLength)})
	}
	for _, c := range m.Coverage {
		out.Coverage = append(out.Coverage, coverage{c.Rule, c.State.String(), c.Why})
	}
	for _, dep := range m.Departures {
		out.Departures = append(out.Departures, departure{dep.Rule, dep.Because})
	}
	return out
}

func why(c standard.Check) string {
	if c.Verdict == standard.Undecided {
		return c.Why
	}
	return ""
}

// finite is nil, null in JSON, for a value that is not a number.
func finite(v float64) *float64 {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return nil
	}
	return &v
}

func amountOf(units derivation.Units, v float64, dim unit.Dim) amount {
	if dim.IsNone() {
		return amount{finite(v), ""}
	}
	u := units.For(dim)
	return amount{finite(v / u.Factor), u.Symbol}
}

// index finds lines and columns in the files of a project.
type index struct {
	project *lang.Project
	lines   map[string]*lang.Lines
}

func newIndex(p *lang.Project) *index { return &index{p, map[string]*lang.Lines{}} }

func (x *index) of(file string) *lang.Lines {
	l, ok := x.lines[file]
	if !ok {
		text := ""
		if f := x.project.Files[file]; f != nil {
			text = f.Text
		}
		l = lang.NewLines(text)
		x.lines[file] = l
	}
	return l
}

func (x *index) span(file string, s lang.Span) span {
	l := x.of(file)
	var out span
	out.Start.Line, out.Start.Column = l.Position(s.Start)
	out.End.Line, out.End.Column = l.Position(s.End)
	return out
}
