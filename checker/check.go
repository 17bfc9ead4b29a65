package checker

import (
	"runtime"
	"slices"
	"sort"
	"strings"
	"sync"
	"sync/atomic"

	"kern/checker/model"
	"kern/checker/rule"
	"kern/checker/standard"
	"kern/checker/standard/elastic"
	"kern/checker/standard/en1993"
	"kern/lang"
)

// standards are the design standards that a basis can name; one line adds one.
var standards = []standard.Standard{
	elastic.Standard{},
	en1993.Standard{},
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

// Progress is told how many of the members have been worked out. It is called
// from several goroutines.
type Progress func(done, all int)

// Check works out a project. The same files give the same report, whatever the
// order of the files and the number of cores. progress may be nil.
func Check(project *lang.Project, progress Progress) *Report {
	return CheckAgain(nil, project, progress)
}

// job is one declaration of members in one calculation.
type job struct {
	calculation  *model.Calculation
	decl         *lang.Decl
	combinations []model.Combination
	members      []*model.Member
	results      []*Result
	done         bool // taken over from an earlier report
}

func (j *job) run() {
	j.members = model.Members(j.calculation.Env, j.decl, departable)
	for _, m := range j.members {
		if m.Name != "" {
			j.results = append(j.results, evaluate(j.calculation.Env, m, j.combinations))
		}
	}
}

// each runs n tasks on all cores.
func each(n int, progress Progress, task func(i int)) {
	var next, done atomic.Int64
	work := func() {
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
}

// gather collects the results in the order of the files.
func (r *Report) gather() {
	r.places = places{starts: map[*lang.Decl]place{}}
	p := r.places
	var files []string
	for name := range r.Project.Files {
		files = append(files, name)
	}
	sort.Strings(files)
	for _, name := range files {
		f := r.Project.Files[name]
		for i, d := range f.Decls {
			p.starts[d] = place{name, f.Starts[i]}
		}
	}
	found := len(r.Project.Problems)
	for _, f := range r.Project.Files {
		for _, d := range f.Decls {
			found += len(d.Problems)
		}
	}
	r.Diagnostics = make([]Diagnostic, 0, found)
	add := func(d lang.Diagnostic) { r.Diagnostics = append(r.Diagnostics, p.resolve(d)) }
	for _, name := range files {
		f := r.Project.Files[name]
		if f.Unreadable != "" {
			add(lang.Diagnostic{Decl: f.Decls[0], Problem: lang.Problem{Rule: "not-text", Message: f.Unreadable + "; it was not read"}})
		}
		for _, d := range f.Decls {
			for _, problem := range d.Problems {
				add(lang.Diagnostic{Decl: d, Problem: problem})
			}
		}
	}
	for _, d := range r.Project.Problems {
		add(d)
	}
	for _, c := range r.calculations {
		for _, d := range c.Env.Problems {
			add(d)
		}
	}
	type row struct {
		file   string
		offset int32
	}
	seen := map[row]*Result{}
	for _, j := range r.jobs {
		for _, m := range j.members {
			for _, d := range m.Problems {
				add(d)
			}
			j.calculation.Members = append(j.calculation.Members, m)
		}
		for _, res := range j.results {
			for _, d := range res.problems {
				add(d)
			}
			at := p.starts[res.Member.Decl]
			key := row{at.file, at.start + res.Member.NameSpan.Start}
			if first := seen[key]; first != nil && first.Verdict == res.Verdict && (first.Utilisation == res.Utilisation || first.Utilisation != first.Utilisation) {
				continue // a file that two calculations include says the same in both
			}
			seen[key] = res
			r.Members = append(r.Members, res)
		}
	}
	r.unused(add)
	for i := range r.Diagnostics {
		if r.Diagnostics[i].Severity == lang.Error {
			r.Diagnostics[i].Severity = rule.SeverityOf(r.Diagnostics[i].Rule)
		}
	}
	r.Diagnostics = sortDiagnostics(r.Diagnostics)
	sort.SliceStable(r.Members, func(i, j int) bool {
		a, b := p.starts[r.Members[i].Member.Decl], p.starts[r.Members[j].Member.Decl]
		if a.file != b.file {
			return a.file < b.file
		}
		return a.start+r.Members[i].Member.NameSpan.Start < b.start+r.Members[j].Member.NameSpan.Start
	})
	r.count()
}

func (r *Report) count() {
	s := &r.Summary
	s.Members = len(r.Members)
	for _, m := range r.Members {
		switch m.Verdict {
		case standard.Passes:
			s.Passes++
		case standard.Fails:
			s.Fails++
		default:
			s.Undecided++
		}
		s.Departures += len(m.Departures)
	}
	for _, d := range r.Diagnostics {
		switch d.Severity {
		case lang.Error:
			s.Errors++
		case lang.Warning:
			s.Warnings++
		}
	}
}

// unused warns of sections, materials and values that no calculation uses. A
// file with definitions alone, that nothing includes, is left in peace, and so
// is one that was read only because another includes it.
func (r *Report) unused(add func(lang.Diagnostic)) {
	used := map[lang.Place]bool{}
	where := map[lang.Place]*model.Named{}
	for _, c := range r.calculations {
		if len(c.Members) == 0 {
			for _, n := range c.Env.Names {
				used[n.Place] = true
			}
			continue
		}
		for _, n := range c.Env.Names {
			if (n.Kind == model.SectionName || n.Kind == model.MaterialName) && r.Project.Asked[n.Place.Decl.File.Name] && !c.Env.Bad(n) {
				where[n.Place] = n
			}
		}
		for _, m := range c.Members {
			for _, n := range m.Uses {
				used[n.Place] = true
			}
			if len(m.Missing) > 0 {
				c.Env.MarkNamed(m, func(n *model.Named) { used[n.Place] = true })
			}
		}
	}
	for at, n := range where {
		if !used[at] {
			add(lang.Diagnostic{Decl: at.Decl, Problem: lang.Problem{Rule: "unused-definition", Severity: lang.Warning, Span: at.Span, Unused: true,
				Message: "nothing uses " + map[model.NameKind]string{model.SectionName: "the section", model.MaterialName: "the material"}[n.Kind] + " '" + n.Name + "'"}})
		}
	}
}

// Place is where a member's name stands.
func (r *Report) Place(m *Result) (string, lang.Span) {
	return r.places.span(m.Member.Decl, m.Member.NameSpan)
}

// maxMessage bounds the length of a message in bytes.
const maxMessage = 1600

// places knows where declarations stand.
type places struct{ starts map[*lang.Decl]place }

type place struct {
	file  string
	start int32
}

func (p places) span(decl *lang.Decl, s lang.Span) (string, lang.Span) {
	at := p.starts[decl]
	return at.file, lang.Span{Start: at.start + s.Start, End: at.start + s.End}
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
