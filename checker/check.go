package checker

import (
	"fmt"
	"runtime"
	"runtime/debug"
	"slices"
	"strconv"
	"strings"
	"sync"
	"sync/atomic"

	"kern/checker/model"
	"kern/checker/standard"
	"kern/checker/standard/aisc360"
	"kern/checker/standard/elastic"
	"kern/checker/standard/en1993"
	"kern/checker/standard/en1993_2022"
	"kern/lang"
)

// standards are the design standards that a basis can name; one line adds one.
var standards = []standard.Standard{
	elastic.Standard{},
	en1993.Standard{},
	en1993_2022.Standard,
	aisc360.Standard{},
	aisc360.Edition2016,
}

func find(name string) standard.Standard {
	for _, s := range standards {
		if s.Name() == name {
			return s
		}
	}
	return nil
}

// registry shows the standards to the model.
type registry struct{}

func (registry) Known(name string) bool { return find(name) != nil }

func (registry) Names() []string {
	var out []string
	for _, s := range standards {
		out = append(out, s.Name())
	}
	return out
}

func (registry) Annexes(name string) []string { return find(name).Annexes() }

func (registry) Methods(name string) []string { return find(name).Methods() }

func (registry) Choices(name string) []string { return find(name).Choices() }

func (registry) Overrides(name string) map[string]bool { return find(name).Overrides() }

// departable are the checks that a member may depart from.
var departable = func() model.DepartureRules {
	out := model.DepartureRules{"requirement"}
	for _, s := range standards {
		for _, r := range s.Rules() {
			if !slices.Contains(out, r) {
				out = append(out, r)
			}
		}
	}
	return out
}()

// Standards lists the names of the design standards.
func Standards() []string { return registry{}.Names() }

// Stated lists how a basis can state the design standards, one for each of their
// methods: "ANSI/AISC 360-22" by LRFD, with the quotes.
func Stated() []string {
	var out []string
	for _, s := range standards {
		name := strconv.Quote(s.Name())
		if len(s.Methods()) == 0 {
			out = append(out, name)
		}
		for _, m := range s.Methods() {
			out = append(out, name+" by "+m)
		}
	}
	return out
}

// Progress is told how many of the members have been worked out. It is called
// from several goroutines.
type Progress func(done, all int)

// Check works out a project. The same files give the same report, whatever the
// order of the files and the number of cores. progress may be nil.
func Check(project *lang.Project, progress Progress) *Report {
	return CheckAgain(nil, project, progress)
}

// job is one declaration of members in one calculation. When it has run it is
// immutable, and later reports take it over.
type job struct {
	decl         *lang.Decl
	combinations []model.Combination
	members      []*model.Member
	results      []*Result
	linked       bool     // uses results of other members
	refs         []string // the members whose results were asked for
	named        string   // its first member

	problems []lang.Diagnostic // of members and results
	nameless bool              // a member has no name, or problems
	done     bool
	uses     []*model.Named // the sections and materials that are used, each once
	leans    []*model.Named // the members that are leaned on
	tally    tally
}

func (j *job) run(env *model.Env, results model.Results) {
	j.named = model.FirstName(j.decl)
	j.members = model.Members(env, j.decl, departable, results)
	j.done = true
	for _, m := range j.members {
		if m.Name != "" {
			j.results = append(j.results, evaluate(env, m, j.combinations))
		}
		j.problems = append(j.problems, m.Problems...)
		j.nameless = j.nameless || m.Name == "" || len(m.Problems) > 0
		for _, n := range m.Uses {
			j.use(n)
		}
		if len(m.Missing) > 0 {
			env.MarkNamed(m, j.use)
		}
	}
	for _, r := range j.results {
		j.problems = append(j.problems, r.problems...)
		j.tally.count(r)
	}
}

// use notes a name that a member uses.
func (j *job) use(n *model.Named) {
	list := &j.uses
	switch n.Kind {
	case model.SectionName, model.MaterialName:
	case model.MemberName:
		list = &j.leans
	default:
		return
	}
	if !slices.Contains(*list, n) {
		*list = append(*list, n)
	}
}

// each runs n tasks on all cores. A panic in one of them is the caller's, who can
// recover from it.
func each(n int, progress Progress, task func(i int)) {
	var next, done atomic.Int64
	var once sync.Once
	fault := ""
	work := func() {
		defer func() {
			if p := recover(); p != nil {
				once.Do(func() { fault = fmt.Sprintf("%v\n%s", p, debug.Stack()) })
			}
		}()
		for {
			i := int(next.Add(1)) - 1
			if i >= n {
				return
			}
			task(i)
			if d := done.Add(1); progress != nil {
				progress(int(d), n)
			}
		}
	}
	var wait sync.WaitGroup
	for range min(runtime.GOMAXPROCS(0)-1, n-1) {
		wait.Go(work)
	}
	work()
	wait.Wait()
	if fault != "" {
		panic(fault)
	}
}

// Place is where a member's name stands.
func (r *Report) Place(m *Result) (string, lang.Span) {
	return r.places.span(m.Member.Decl, m.Member.NameSpan)
}

// maxMessage bounds the length of a message in bytes.
const maxMessage = 1600

// places knows where declarations stand.
type places struct{ project *lang.Project }

// of gives the file of a declaration and where it begins there; false for one
// that the project does not have.
func (p places) of(d *lang.Decl) (string, int32, bool) {
	if d == nil || d.File == nil {
		return "", 0, false
	}
	f := p.project.Files[d.File.Name]
	if f == nil {
		return "", 0, false
	}
	i := f.Index(d)
	if i < 0 {
		return "", 0, false
	}
	return f.Name, f.Starts[i], true
}

func (p places) span(decl *lang.Decl, s lang.Span) (string, lang.Span) {
	file, start, _ := p.of(decl)
	return file, lang.Span{Start: start + s.Start, End: start + s.End}
}

func (p places) resolve(d lang.Diagnostic) Diagnostic {
	out := Diagnostic{Problem: d.Problem}
	if len(out.Message) > maxMessage {
		// a text can hold a word of any length
		out.Message = strings.ToValidUTF8(out.Message[:maxMessage/2], "") + " … " + strings.ToValidUTF8(out.Message[len(out.Message)-maxMessage/4:], "")
	}
	out.File, out.Span = p.span(d.Decl, d.Span)
	out.Problem.Span = out.Span
	of := func(at lang.Place) (string, lang.Span) {
		if at.Decl == nil {
			at.Decl = d.Decl
		}
		return p.span(at.Decl, at.Span)
	}
	for _, rel := range d.Problem.Related {
		file, span := of(rel.Place)
		out.Related = append(out.Related, Related{file, span, rel.Message})
	}
	for _, f := range d.Problem.Fixes {
		fix := Fix{Title: f.Title, Safe: f.Safe}
		for _, e := range f.Edits {
			file, span := of(e.Place)
			fix.Edits = append(fix.Edits, Edit{file, span, e.New})
		}
		out.Fixes = append(out.Fixes, fix)
	}
	return out
}
