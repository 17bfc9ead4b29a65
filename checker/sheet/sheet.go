package sheet

import (
	"fmt"
	"runtime"
	"slices"
	"strings"
	"sync"

	"kern/checker"
	"kern/checker/drawing"
	"kern/checker/output"
	"kern/lang"
)

// Paper is a size of paper for PDF.
type Paper string

// The papers.
const (
	A4     Paper = "a4"
	Letter Paper = "letter"
)

// Options are what a sheet shows.
type Options struct {
	Program string   // name and version of the program
	Asked   []string // the files that were asked for, as the project names them
	Roots   []string // the calculations to show, by their first files; all when empty
	Members []string // the members to show, all when empty
	Full    bool     // the working of every check, not of the governing one alone
	Paper   Paper
	// Progress is told how many of the members have been written; it may be nil and
	// is called from several goroutines.
	Progress checker.Progress
}

// Sheet is a printed calculation, ready to be written. It is immutable.
type Sheet struct {
	Title   string
	Program string
	// Running and RunningRight stand at the head of every page, Foot at its foot
	// beside the number of the page.
	Running, RunningRight, Foot string
	Project                     ProjectFacts
	Blocks                      []output.Block
	Inputs                      Inputs
	Tally                       Verdict
	Results                     string // digest of the verdicts and utilisations

	options    Options
	contentsAt int // the block before which the contents stand
}

// ProjectFacts are what the document's properties say.
type ProjectFacts struct{ Name, Number, PreparedBy, Revision, Date string }

// The blocks that a sheet has besides those of package output.
type (
	// Figures are pictures that stand side by side where there is room.
	Figures []*drawing.Scene
	// Facts are names with values.
	Facts []Fact
	// Verdict is a verdict that stands out, with what decides it.
	Verdict struct{ Word, Rest string }
	// Signatures is a table to sign in.
	Signatures []Fact
)

// Fact is a name with its value.
type Fact struct {
	Name  string
	Value output.Line
}

// New composes the sheet of a report. The error names a member that the report
// does not have, or says that there is nothing to print.
func New(r *checker.Report, o Options) (*Sheet, error) {
	if o.Paper == "" {
		o.Paper = A4
	}
	c := composer{report: r, options: o, sheet: &Sheet{Program: o.Program, options: o}}
	var err error
	if c.parts, err = partsOf(r); err != nil {
		return nil, err
	}
	if len(o.Roots) > 0 {
		c.parts = slices.DeleteFunc(c.parts, func(p part) bool { return !slices.Contains(o.Roots, p.calculation.Root) })
	}
	if err := c.choose(); err != nil {
		return nil, err
	}
	if len(o.Members) > 0 {
		c.parts = slices.DeleteFunc(c.parts, func(p part) bool { return len(p.results) == 0 })
	}
	c.inputs()
	c.compose()
	return c.sheet, nil
}

// partsOf puts every result with a calculation that has it. Results that an edit
// left alone were worked out in an earlier state of their calculation: those are
// known by their file.
func partsOf(r *checker.Report) ([]part, error) {
	var out []part
	for _, x := range r.AllCalculations() {
		out = append(out, part{calculation: x})
	}
	for _, m := range r.Members {
		i := slices.IndexFunc(out, func(p part) bool { return p.calculation.Env == m.Env() })
		if i < 0 {
			file, _ := r.Place(m)
			i = slices.IndexFunc(out, func(p part) bool {
				return slices.ContainsFunc(p.calculation.Files, func(f *lang.File) bool { return f.Name == file })
			})
		}
		if i < 0 { // a sheet that leaves a member out must not be
			return nil, fmt.Errorf("the member '%s' belongs to no calculation of the report", m.Name)
		}
		out[i].results = append(out[i].results, m)
	}
	return out, nil
}

// choose keeps the members that are asked for, and lists them in the order of the
// report.
func (c *composer) choose() error {
	here := map[*checker.Result]bool{}
	known := map[string]bool{}
	for i, p := range c.parts {
		c.parts[i].results = nil
		for _, m := range p.results {
			known[m.Name] = true
			if len(c.options.Members) == 0 || slices.Contains(c.options.Members, m.Name) {
				here[m] = true
				c.parts[i].results = append(c.parts[i].results, m)
			}
		}
	}
	if len(c.options.Members) > 0 {
		c.parts = slices.DeleteFunc(c.parts, func(p part) bool { return len(p.results) == 0 })
	}
	var names []string
	for _, m := range c.report.Members {
		if here[m] {
			c.chosen = append(c.chosen, m)
		}
		if known[m.Name] && !slices.Contains(names, m.Name) && len(names) < 13 {
			names = append(names, m.Name)
		}
	}
	for _, n := range c.options.Members {
		switch {
		case known[n]:
		case len(names) == 0:
			return fmt.Errorf("there is no member '%s': the files describe none", n)
		default:
			if len(names) > 12 {
				names[12] = "…"
			}
			return fmt.Errorf("there is no member '%s'; the files have %s", n, strings.Join(names, ", "))
		}
	}
	return nil
}

// headings are the headings of the sheet, in order.
func (s *Sheet) headings() []output.Heading {
	var out []output.Heading
	for _, b := range s.Blocks {
		if h, ok := b.(output.Heading); ok {
			out = append(out, h)
		}
	}
	return out
}

// alike puts members together that one declaration describes with several names:
// they differ in nothing else.
func alike(results []*checker.Result) [][]*checker.Result {
	var out [][]*checker.Result
	for _, r := range results {
		if n := len(out); n > 0 {
			if first := out[n-1][0]; first.Member.Stmt == r.Member.Stmt && first.Member.Decl == r.Member.Decl && first.Env() == r.Env() && sameChecks(first, r) {
				out[n-1] = append(out[n-1], r)
				continue
			}
		}
		out = append(out, []*checker.Result{r})
	}
	return out
}

func sameChecks(a, b *checker.Result) bool {
	return a.Verdict == b.Verdict && a.Governing == b.Governing && a.Combination == b.Combination && checker.Ratio(a.Utilisation) == checker.Ratio(b.Utilisation) &&
		len(a.Checks) == len(b.Checks) && slices.Equal(a.Missing, b.Missing)
}

// names lists the names of members that are alike.
func names(group []*checker.Result) string {
	var out []string
	for _, r := range group {
		out = append(out, r.Name)
	}
	return strings.Join(out, ", ")
}

// each runs n tasks on all cores; progress is told of each.
func each(n int, progress checker.Progress, task func(i int)) {
	var mu sync.Mutex
	next, done := 0, 0
	var wait sync.WaitGroup
	for range min(max(runtime.GOMAXPROCS(0), 1), n) {
		wait.Go(func() {
			for {
				mu.Lock()
				i := next
				next++
				mu.Unlock()
				if i >= n {
					return
				}
				task(i)
				mu.Lock()
				done++
				d := done
				mu.Unlock()
				if progress != nil {
					progress(d, n)
				}
			}
		})
	}
	wait.Wait()
}

// placeOf says where a span of a file is, as "file, line n".
func placeOf(lines map[string]*lang.Lines, r *checker.Report, file string, at lang.Span, name func(string) string) string {
	l := lines[file]
	if l == nil {
		text := ""
		if f := r.Project.Files[file]; f != nil {
			text = f.Text
		}
		l = lang.NewLines(text)
		lines[file] = l
	}
	n, _ := l.Position(at.Start)
	return fmt.Sprintf("%s, line %d", name(file), n)
}
