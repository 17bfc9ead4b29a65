package sheet

import (
	"fmt"
	"math"
	"path"
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/checker/output"
	"kern/checker/standard"
	"kern/lang"
)

// part is one calculation of the sheet with those of its members that are shown.
type part struct {
	calculation *model.Calculation
	results     []*checker.Result
}

type composer struct {
	report  *checker.Report
	options Options
	chosen  []*checker.Result
	parts   []part
	dir     string // the folder that names of files count from
	sheet   *Sheet
}

func (c *composer) add(b ...output.Block) { c.sheet.Blocks = append(c.sheet.Blocks, b...) }

// page adds what a function writes to a page, its headings lowered.
func (c *composer) page(lower int, write func(p *output.Page)) { c.add(blocks(lower, write)...) }

func blocks(lower int, write func(p *output.Page)) []output.Block {
	p := output.NewPage(true)
	write(p)
	out := p.Blocks()
	for i, b := range out {
		if h, ok := b.(output.Heading); ok {
			h.Level += lower
			out[i] = h
		}
	}
	return out
}

func (c *composer) compose() {
	c.head()
	c.cover()
	c.sheet.contentsAt = len(c.sheet.Blocks)
	c.overview()
	c.findings()
	c.bases()
	c.members()
	c.files()
}

// facts puts the words about the project together. Where calculations say different
// things, all stand there: nothing is picked.
func (c *composer) facts() model.Project {
	var out model.Project
	join := func(to *string, s string) {
		if s != "" && !contains(strings.Split(*to, "; "), s) {
			*to = strings.TrimPrefix(*to+"; "+s, "; ")
		}
	}
	for _, p := range c.parts {
		x := p.calculation.Env.Project
		for _, f := range []struct{ to, from *string }{{&out.Name, &x.Name}, {&out.Number, &x.Number}, {&out.PreparedBy, &x.PreparedBy},
			{&out.CheckedBy, &x.CheckedBy}, {&out.Revision, &x.Revision}, {&out.Date, &x.Date}} {
			join(f.to, *f.from)
		}
	}
	return out
}

// head composes title and running lines.
func (c *composer) head() {
	s, p := c.sheet, c.facts()
	s.Project = ProjectFacts{p.Name, p.Number, p.PreparedBy, p.Revision, p.Date}
	name := p.Name
	if name == "" {
		name = c.fallback()
	}
	s.Title = name + ": column calculation"
	s.Running = name
	var right []string
	if p.Number != "" {
		right = append(right, p.Number)
	}
	if p.Revision != "" {
		right = append(right, "revision "+p.Revision)
	}
	if p.Date != "" {
		right = append(right, p.Date)
	}
	s.RunningRight = strings.Join(right, " · ")
	s.Foot = s.Program + " · inputs " + s.Inputs.Digest[:12]
}

// fallback is a title for a calculation without a project: its folder or file.
func (c *composer) fallback() string {
	if len(c.parts) == 1 {
		return strings.TrimSuffix(path.Base(c.parts[0].calculation.Root), path.Ext(c.parts[0].calculation.Root))
	}
	if c.dir != "" {
		return path.Base(c.dir)
	}
	return "calculations"
}

func (c *composer) cover() {
	p := c.facts()
	name := p.Name
	if name == "" {
		name = c.fallback()
	}
	c.add(output.Heading{Level: 1, Text: name})
	kind := "Column calculation"
	if len(c.options.Members) > 0 {
		kind += ", part: " + strings.Join(c.options.Members, ", ")
	}
	c.add(output.Paragraph{Text: output.Words(kind)})
	var facts Facts
	fact := func(name, value string) {
		if value != "" {
			facts = append(facts, Fact{name, output.Words(value)})
		}
	}
	fact("project number", p.Number)
	fact("revision", p.Revision)
	fact("date", p.Date)
	var standards []string
	for _, x := range c.parts {
		text := standardOf(x.calculation.Env)
		if text != "" && !contains(standards, text) {
			standards = append(standards, text)
		}
	}
	fact("design standard", strings.Join(standards, "; "))
	fact("made by", c.options.Program)
	facts = append(facts, Fact{"inputs, SHA-256", output.Code(c.sheet.Inputs.Digest)})
	c.add(facts)
	c.sheet.Tally = c.tally()
	c.add(c.sheet.Tally)
	c.add(Signatures{{"prepared by", output.Words(p.PreparedBy)}, {"checked by", output.Words(p.CheckedBy)}})
	c.add(output.Paragraph{Text: output.Join(output.Strong("Caution."), output.Words(" "+output.Caution+
		" This sheet shows what was checked and lists, member by member, what was not."))})
}

// standardOf names the standards of a calculation.
func standardOf(env *model.Env) string {
	b := env.Basis
	if b.Standard == "" {
		return ""
	}
	out := b.Standard
	if b.Annex != "" {
		out += ", annex " + b.Annex
	}
	if b.Actions != "" {
		out += ", with " + b.Actions + " (" + b.Equation + ")"
	}
	return out
}

func contains(list []string, s string) bool {
	for _, x := range list {
		if x == s {
			return true
		}
	}
	return false
}

// tally sums the verdicts up.
func (c *composer) tally() Verdict {
	count := map[standard.Verdict]int{}
	departs := 0
	for _, r := range c.chosen {
		count[r.Verdict]++
		if len(r.Departures) > 0 {
			departs++
		}
	}
	worst := standard.Passes
	switch {
	case count[standard.Fails] > 0:
		worst = standard.Fails
	case count[standard.Undecided] > 0 || len(c.chosen) == 0:
		worst = standard.Undecided
	}
	rest := fmt.Sprintf("%s: %d pass, %d fail, %d undecided", plural(len(c.chosen), "member"), count[standard.Passes], count[standard.Fails], count[standard.Undecided])
	if departs > 0 {
		rest += fmt.Sprintf("; %s", plural(departs, "departure"))
	}
	if n := c.errors(); n > 0 && len(c.options.Members) == 0 {
		rest += fmt.Sprintf("; %s in the files", plural(n, "error"))
		if worst == standard.Passes {
			worst = standard.Undecided
		}
	}
	return Verdict{worst.String(), rest}
}

// errors counts the errors in the files of the sheet, failing checks apart, which
// stand with their members.
func (c *composer) errors() int {
	n := 0
	for _, d := range c.report.Diagnostics {
		if d.Severity == lang.Error && c.has(d.File) && !(d.Member != "" && checked(d.Rule)) {
			n++
		}
	}
	return n
}

// has tells whether the sheet follows from a file.
func (c *composer) has(file string) bool {
	for _, p := range c.parts {
		for _, f := range p.calculation.Files {
			if f.Name == file {
				return true
			}
		}
	}
	return false
}

func plural(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}

// overview is the table of all members.
func (c *composer) overview() {
	c.add(output.Heading{Level: 2, Text: "Results"})
	if len(c.chosen) == 0 {
		c.add(output.Paragraph{Text: output.Words("The files describe no member.")})
		return
	}
	var rows [][]output.Line
	for _, r := range c.chosen {
		var titles []string
		for _, x := range made([]*checker.Result{r}) {
			if x.section != nil && !contains(titles, x.section.Title()) {
				titles = append(titles, x.section.Title())
			}
		}
		section := "–"
		if len(titles) > 0 {
			section = strings.Join(titles, ", ")
		}
		verdict := output.Words(r.Verdict.String())
		if r.Verdict != standard.Passes {
			verdict = output.Strong(r.Verdict.String())
		}
		if len(r.Departures) > 0 {
			verdict = output.Join(verdict, output.Words(", departs"))
		}
		rows = append(rows, []output.Line{output.Words(r.Name), output.Words(r.Title), output.Words(section), verdict, output.Words(checker.Ratio(r.Utilisation)),
			output.Words(r.Governing), output.Words(r.Combination)})
	}
	c.add(output.Table{Head: []string{"member", "title", "section", "verdict", "utilisation", "governing check", "under"}, Align: "llllnll", Rows: rows})
	c.open()
}

// open lists what is left to a person: what was not checked or could not be, and what
// members depart from. What several members share stands once.
func (c *composer) open() {
	var hand, departures gathered
	for _, r := range c.chosen {
		for _, x := range r.Coverage {
			if x.State == standard.NotCovered {
				hand.add(r.Name, x.Rule+": "+x.Why)
			}
		}
		for _, x := range r.Checks {
			if x.Verdict == standard.Undecided && x.Why != "" {
				hand.add(r.Name, x.Rule+": "+x.Why)
			}
		}
		for _, why := range r.Missing {
			hand.add(r.Name, why)
		}
		for _, d := range r.Departures {
			departures.add(r.Name, d.Rule+", because \""+d.Because+"\"")
		}
	}
	if items := hand.items(": ", ": "); len(items) > 0 {
		c.add(output.Heading{Level: 3, Text: "Left to be checked by hand"}, output.List{Items: items})
	}
	if items := departures.items(" departs from ", " depart from "); len(items) > 0 {
		c.add(output.Heading{Level: 3, Text: "Departures"}, output.List{Items: items})
	}
}

// gathered are texts with the members that they are said of.
type gathered struct {
	texts []string
	names [][]string
}

func (g *gathered) add(name, text string) {
	for i, t := range g.texts {
		if t == text {
			if !contains(g.names[i], name) {
				g.names[i] = append(g.names[i], name)
			}
			return
		}
	}
	g.texts, g.names = append(g.texts, text), append(g.names, []string{name})
}

// items writes the texts behind their members, with the words between for one
// member and for several.
func (g *gathered) items(one, several string) []output.Line {
	var out []output.Line
	for i, t := range g.texts {
		between := one
		if len(g.names[i]) > 1 {
			between = several
		}
		out = append(out, output.Join(output.Strong(strings.Join(g.names[i], ", ")), output.Words(between+t)))
	}
	return out
}

// findings lists what was reported about the files themselves, failing checks
// apart.
func (c *composer) findings() {
	if len(c.options.Members) > 0 {
		return
	}
	lines := map[string]*lang.Lines{}
	var items []output.Line
	for _, d := range c.report.Diagnostics {
		if d.Severity > lang.Warning || !c.has(d.File) || d.Member != "" && (checked(d.Rule) || d.Rule == "undecided") {
			continue
		}
		at := placeOf(lines, c.report, d.File, d.Span, func(name string) string { return relative(c.dir, name) })
		items = append(items, output.Join(output.Strong(d.Severity.String()), output.Words(" "+at+": "+d.Message)))
	}
	if len(items) > 0 {
		c.add(output.Heading{Level: 2, Text: "What is wrong in the files"}, output.List{Items: items})
	}
}

// members writes a chapter for each member, or for several that are alike.
func (c *composer) members() {
	var groups [][]*checker.Result
	for _, p := range c.parts {
		groups = append(groups, alike(p.results)...)
	}
	out := make([][]output.Block, len(groups))
	each(len(groups), c.options.Progress, func(i int) { out[i] = c.member(groups[i]) })
	for _, b := range out {
		c.add(b...)
	}
}

// files lists the inputs.
func (c *composer) files() {
	in := c.sheet.Inputs
	c.add(output.Heading{Level: 2, Text: "Inputs"})
	c.add(output.Paragraph{Text: output.Words("This sheet follows from these files and no others. Names count from the folder that holds them all; digests are SHA-256 with line ends counted as one byte. " +
		"Whether a sheet still follows from its files: kern sheet --verify FILE.")})
	var rows [][]output.Line
	for _, f := range in.Files {
		how := "included"
		if f.Asked {
			how = "calculation"
		}
		rows = append(rows, []output.Line{output.Words(f.Name), output.Words(how), output.Words(fmt.Sprint(f.Bytes)), output.Code(f.Digest)})
	}
	c.add(output.Table{Head: []string{"file", "read as", "bytes", "SHA-256"}, Align: "llnl", Rows: rows})
	c.add(output.Paragraph{Text: output.Join(output.Words("All together: "), output.Code(in.Digest))})
}

// finite tells whether a value can be printed.
func finite(v float64) bool { return !math.IsNaN(v) && !math.IsInf(v, 0) }
