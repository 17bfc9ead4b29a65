package output

import (
	"math"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// WorkingMarkdown is the working of a member as Markdown: of one check, or, for
// an empty rule, everything: all checks step by step, what was checked and what
// not, what is assumed and what the member departs from.
func WorkingMarkdown(r *checker.Result, rule string) string {
	p := NewPage(true)
	Working(p, r, rule)
	return p.String()
}

// Working writes what WorkingMarkdown gives to a page.
func Working(p *Page, r *checker.Result, rule string) {
	MemberHead(p, r)
	record := r.Derive()
	if rule != "" {
		CheckWorking(p, r, record, rule, 2)
		return
	}
	Checks(p, r)
	Missing(p, r)
	if record != nil {
		p.Head(2, "Loads")
		Loads(p, r)
		Takedown(p, r)
		AllWorking(p, r, record)
	}
	Holds(p, r)
	Coverage(p, r)
	Assumptions(p, r)
	Departures(p, r)
	Notes(p, r)
	p.Text(Words(Caution))
}

// AllWorking writes the working of every check, step by step: first the values
// that they share.
func AllWorking(p *Page, r *checker.Result, record *derivation.Record) {
	for _, lift := range liftsOf(record) {
		title := "Values that the checks share"
		if lift != "" {
			title += ", lift " + lift
		}
		if steps := shared(record, lift); len(steps) > 0 {
			p.Head(2, title)
			Steps(p, record.Set, r.Units(), steps)
		}
	}
	for _, name := range rulesOf(r, record) {
		p.Head(2, name)
		verdictOf(p, r, name)
		Steps(p, record.Set, r.Units(), own(record, name))
	}
}

// CheckWorking writes the working of one check below a heading of the given
// level (0 for none): every value that it rests on, each step, and what it comes
// to.
func CheckWorking(p *Page, r *checker.Result, record *derivation.Record, rule string, level int) {
	if level > 0 {
		p.Head(level, rule)
	}
	verdictOf(p, r, rule)
	if record == nil {
		return
	}
	if rule == "requirement" {
		for _, q := range r.Member.Requires {
			if symbol, ok := r.Symbol(q.Symbol); ok {
				Steps(p, record.Set, r.Units(), record.Leading(symbol))
			}
		}
		return
	}
	Steps(p, record.Set, r.Units(), record.Of(rule))
}

// MemberHead says who the member is, what it is made of, and its verdict.
func MemberHead(p *Page, r *checker.Result) {
	title := r.Name
	if r.Title != "" {
		title += ": " + r.Title
	}
	p.Head(1, title)
	p.Text(VerdictLine(r))
	var facts []Line
	fact := func(name, text string) {
		if text != "" {
			facts = append(facts, Words(name+": "+text))
		}
	}
	basis := r.Env().Basis
	text := r.Standard
	if text != "" && basis.Method != "" {
		text += " by " + basis.Method
	}
	if text != "" && basis.Annex != "" {
		text += ", annex " + basis.Annex
	}
	fact("standard", text)
	if basis.Actions != "" {
		fact("actions", basis.Actions+" ("+basis.Equation+")")
	}
	m := r.Member
	for _, l := range m.Lifts {
		if l.Section != nil && l.Material != nil {
			fact("lift "+l.Name(), SectionTitle(l.Section)+"; "+MaterialTitle(l.Material))
		}
	}
	if m.Section != nil && len(m.Lifts) == 0 {
		fact("section", SectionTitle(m.Section))
	}
	if m.Material != nil && len(m.Lifts) == 0 {
		fact("material", MaterialTitle(m.Material))
	}
	if m.Height > 0 {
		fact(map[bool]string{true: "height", false: "length"}[m.Kind == model.Column], r.Units().Show(m.Height, unit.Length, 4))
	}
	p.List(facts...)
}

// VerdictLine is the verdict with what decides it. What a departure allows and
// what could not be checked is said with it.
func VerdictLine(r *checker.Result) Line {
	out := Strong(r.Verdict.String())
	var departs []string
	for _, d := range r.Departures {
		departs = append(departs, d.Rule)
	}
	if len(departs) > 0 {
		out = Join(out, Words(", departing from "+strings.Join(departs, " and ")))
	}
	if math.IsNaN(r.Utilisation) {
		return out
	}
	out = Join(out, Words(": "))
	if r.Verdict == standard.Undecided {
		out = Join(out, Words("as far as it was checked, "))
	}
	out = Join(out, Words("utilisation "+checker.Ratio(r.Utilisation)+", "+r.Governing))
	if r.Lift != "" {
		out = Join(out, Words(" in lift "+r.Lift))
	}
	if r.Combination != "" {
		out = Join(out, Words(" under "+r.Combination))
	}
	return out
}

// SectionTitle names a section: its designation and product standard, or its name
// and what it is.
func SectionTitle(s *model.Section) string {
	if s.Designation != "" {
		return s.Designation + ", " + s.Standard
	}
	what := lang.Words[s.Shape.Kind.String()]
	if sizes := Sizes(s.Shape); sizes != "" {
		what += " " + sizes
	}
	if s.Name == "section" { // it has no name of its own
		return what
	}
	return s.Name + ", " + what
}

// Sizes writes the main dimensions of a shape as the trade does, in millimetres:
// depth, width, and the thicknesses of web and flange or of the wall.
func Sizes(s section.Shape) string {
	var sizes []string
	for _, v := range []float64{s.Diameter, s.Depth, s.Width, s.Web, s.Flange, s.Wall} {
		if v > 0 {
			sizes = append(sizes, unit.Short(v*1000, 4))
		}
	}
	if len(sizes) == 0 {
		return ""
	}
	return strings.Join(sizes, "×") + " mm"
}

// MaterialTitle names a material: the grade and its product standard, or its
// name.
func MaterialTitle(m *model.Material) string {
	if m.Grade != nil {
		return m.Grade.Name + ", " + m.Grade.Standard
	}
	return m.Name + ", stated values"
}

// Checks writes the table of a member's checks.
func Checks(p *Page, r *checker.Result) {
	var rows [][]Line
	head, align := []string{"check", "utilisation", "demand", "capacity", "verdict", "clause", "under"}, "lnnnlll"
	lifts := slices.ContainsFunc(r.Checks, func(c standard.Check) bool { return c.Lift != "" })
	if lifts {
		head, align = append(head, "lift"), align+"l"
	}
	for _, c := range r.Checks {
		row := []Line{Words(checkName(c)), Words(checker.Ratio(c.Utilisation)), Words(amountText(r.Units(), c.Demand, c.Dim)), Words(amountText(r.Units(), c.Capacity, c.Dim)),
			Words(verdictWord(c)), Words(clauseOf(c)), Words(r.CombinationName(c))}
		if lifts {
			row = append(row, Words(c.Lift))
		}
		rows = append(rows, row)
	}
	p.Table(head, align, rows)
	var why []Line
	for _, c := range r.Checks {
		if c.Verdict == standard.Undecided && c.Why != "" {
			why = append(why, Words(checkName(c)+c.InLift()+": "+c.Why))
		}
	}
	p.List(why...)
}

func checkName(c standard.Check) string {
	if c.Rule == "requirement" {
		return c.Clause // "require N_b_minor"
	}
	return c.Rule
}

func clauseOf(c standard.Check) string {
	if c.Rule == "requirement" {
		return ""
	}
	return c.Clause
}

func verdictWord(c standard.Check) string {
	if c.Departed {
		return c.Verdict.String() + ", departed from"
	}
	return c.Verdict.String()
}

func amountText(units derivation.Units, v float64, dim unit.Dim) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return "–"
	}
	return units.Show(v, dim, 4)
}

// verdictOf writes what a check comes to, in a sentence.
func verdictOf(p *Page, r *checker.Result, rule string) {
	for _, c := range r.Checks {
		if c.Rule == rule {
			l := Words(r.Sentence(c) + ".")
			if c.Departed {
				l = Join(l, Words(" The member departs from this check."))
			}
			p.Text(l)
		}
	}
	for _, c := range r.Coverage {
		if c.Rule == rule && c.Why != "" && c.State != standard.NotCovered {
			p.Text(Words(upper(c.State.String()) + ": " + c.Why + "."))
		}
	}
}

func upper(s string) string {
	if s == "" {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}

// rulesOf lists the checks whose steps belong on the page of a whole member, in
// the order of the steps: those with a row, those that are worked out without one, and
// those that a required value is worked out in. What does not apply is left out.
func rulesOf(r *checker.Result, record *derivation.Record) []string {
	want := map[string]bool{}
	for _, c := range r.Checks {
		want[c.Rule] = c.Rule != "requirement" // its value is a step of another check
	}
	for _, c := range r.Coverage { // worked out, with nothing to compare: what bracing needs
		want[c.Rule] = want[c.Rule] || c.State == standard.Checked
	}
	for _, q := range r.Member.Requires {
		if symbol, ok := r.Symbol(q.Symbol); ok {
			for _, s := range record.Leading(symbol) {
				want[s.Group] = s.Group != ""
			}
		}
	}
	var out []string
	add := func(rule string) {
		if want[rule] {
			want[rule] = false
			out = append(out, rule)
		}
	}
	for _, s := range record.Steps {
		add(s.Group)
	}
	for _, c := range r.Checks {
		add(c.Rule)
	}
	return out
}

// own are the steps of one group alone.
func own(record *derivation.Record, group string) []derivation.Step {
	var out []derivation.Step
	for _, s := range record.Steps {
		if s.Group == group {
			out = append(out, s)
		}
	}
	return out
}

// liftsOf are the lifts that the steps of a record are about; one without a name
// for a member of one section.
func liftsOf(record *derivation.Record) []string {
	var out []string
	for _, s := range record.Steps {
		if !slices.Contains(out, s.Lift) {
			out = append(out, s.Lift)
		}
	}
	return out
}

// shared are the steps of a lift that several checks share.
func shared(record *derivation.Record, lift string) []derivation.Step {
	return slices.DeleteFunc(own(record, ""), func(s derivation.Step) bool { return s.Lift != lift })
}

// Steps writes the steps of a derivation: the values that are taken as a table,
// then what is computed, a step an item.
func Steps(p *Page, set *derivation.Set, units derivation.Units, steps []derivation.Step) {
	var rows [][]Line
	var items []Equation
	for _, s := range steps {
		if s.Note == "" && s.Formula == nil {
			sym := set.At(s.Symbol)
			rows = append(rows, []Line{Code(sym.Name), Words(sym.What), Words(Value(units, s.Value, sym.Dim)), Words(s.Clause)})
			continue
		}
		items = append(items, StepEquation(set, units, s))
	}
	p.Table([]string{"symbol", "is", "value", "from"}, "llnl", rows)
	p.Equations(items)
}

// StepEquation is a step of a derivation in words and in the language's own
// expressions.
func StepEquation(set *derivation.Set, units derivation.Units, s derivation.Step) Equation {
	if s.Note != "" {
		return Equation{Note: s.Note}
	}
	sym := set.At(s.Symbol)
	out := Equation{What: sym.What, Clause: s.Clause, Symbol: sym.Name, Value: Value(units, s.Value, sym.Dim)}
	if s.Formula != nil {
		out.Formula = s.Formula.Text
		if numbers := tidy(s.Numbers(set, units, derivation.Digits)); numbers != s.Formula.Text {
			out.Numbers = numbers
		}
	}
	return out
}

// Line writes an equation: what it is with its clause, then symbol, formula,
// formula with the numbers put in, and result with its unit.
func (e Equation) Line() Line {
	if e.Note != "" {
		return Words(e.Note)
	}
	head := e.What
	if e.Clause != "" {
		head += " · " + e.Clause
	}
	return Join(Words(head), Break(), Code(e.Text()), Words(" = "), Strong(e.Value))
}

// Text is the equation as text of the language, without its result.
func (e Equation) Text() string {
	out := e.Symbol
	if e.Formula != "" {
		out += " = " + e.Formula
		if e.Numbers != "" {
			out += " = " + e.Numbers
		}
	}
	return out
}

// StepLine writes a step of a derivation on a line, as Equation.Line does.
func StepLine(set *derivation.Set, units derivation.Units, s derivation.Step) Line {
	return StepEquation(set, units, s).Line()
}

// Value writes a value as derivations show it: no more digits than it takes.
func Value(units derivation.Units, v float64, dim unit.Dim) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return "not known"
	}
	return tidy(units.Show(v, dim, derivation.Digits))
}

// tidy takes the zeros off the ends of decimal fractions: 1.0000 is 1.
func tidy(text string) string {
	var b strings.Builder
	for _, t := range lang.Tokens(text) {
		piece := t.Span().Of(text)
		if t.Kind == lang.Number && strings.Contains(piece, ".") && !strings.ContainsAny(piece, "eE") {
			piece = strings.TrimRight(strings.TrimRight(piece, "0"), ".")
		}
		b.WriteString(piece)
	}
	return b.String()
}

// Missing says why a member could not be checked at all.
func Missing(p *Page, r *checker.Result) {
	if len(r.Missing) == 0 {
		return
	}
	p.Text(Words("It could not be checked:"))
	var list []string
	for _, why := range r.Missing {
		if !slices.Contains(list, why) {
			list = append(list, why)
		}
	}
	p.List(plainLines(list)...)
}

// Holds writes what each hold must be able to do so that the member can count on
// it.
func Holds(p *Page, r *checker.Result) {
	list := r.Holds()
	if len(list) == 0 {
		return
	}
	p.Head(2, "What the holds need")
	var rows [][]Line
	var from []string
	units := r.Units()
	for _, h := range list {
		stated := "rigid"
		if h.Stated > 0 {
			stated = amountText(units, h.Stated, unit.ForcePerLength)
		}
		rows = append(rows, []Line{Words(amountText(units, h.At, unit.Length)), Words(h.Axis.String()), Words(amountText(units, h.Compression, unit.Force)), Words(amountText(units, h.Force, unit.Force)),
			Words(amountText(units, h.Practice, unit.Force)), Words(amountText(units, h.Stiffness, unit.ForcePerLength)), Words(stated), Words(r.Combinations()[h.Combination].Name)})
		if s := "stiffness: " + h.How; !slices.Contains(from, s) {
			from = append(from, s)
		}
	}
	p.Table([]string{"at", "about", "compression", "force", "2.5 %", "stiffness needed", "stiffness", "under"}, "llrrrrrl", rows)
	p.List(plainLines(append([]string{"force: " + standard.HoldForceClause + ", of a bow of L/500 for the one member and the movement of the hold under it; what else pushes on the hold is added",
		"2.5 %: " + standard.HoldPractice}, from...))...)
}

// Coverage writes what the standard asks for and what became of it.
func Coverage(p *Page, r *checker.Result) {
	if len(r.Coverage) == 0 {
		return
	}
	p.Head(2, "What was checked")
	var rows [][]Line
	for _, c := range r.Coverage {
		rows = append(rows, []Line{Words(c.Rule), Words(c.State.String()), Words(c.Why)})
	}
	p.Table([]string{"check", "state", "why"}, "lll", rows)
}

// Assumptions lists what is assumed.
func Assumptions(p *Page, r *checker.Result) {
	if len(r.Assumptions) > 0 {
		p.Head(2, "Assumptions")
		p.List(plainLines(r.Assumptions)...)
	}
}

// Departures lists the checks that the member may break, with the reasons.
func Departures(p *Page, r *checker.Result) {
	var items []Line
	for _, d := range r.Departures {
		items = append(items, Words(d.Rule+", because \""+d.Because+"\""))
	}
	if len(items) > 0 {
		p.Head(2, "Departures")
		p.List(items...)
	}
}

// Notes lists the remarks that go with the member.
func Notes(p *Page, r *checker.Result) {
	if len(r.Member.Notes) > 0 {
		p.Head(2, "Notes")
		p.List(plainLines(r.Member.Notes)...)
	}
}

func plainLines(list []string) []Line {
	out := make([]Line, len(list))
	for i, s := range list {
		out[i] = Words(s)
	}
	return out
}
