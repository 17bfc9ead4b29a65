package checker

import (
	"slices"
	"sort"

	"kern/checker/model"
	"kern/checker/rule"
	"kern/checker/standard"
	"kern/lang"
)

// gather collects the results in the order of the files. It looks at each job
// once: with many members, going to where each lies takes longer than anything
// that is done there.
func (r *Report) gather() {
	r.places = places{r.Project}
	p := r.places
	var files []string
	for name := range r.Project.Files {
		files = append(files, name)
	}
	sort.Strings(files)
	add := func(d lang.Diagnostic) { r.Diagnostics = append(r.Diagnostics, p.resolve(d)) }
	for _, name := range files {
		f := r.Project.Files[name]
		if f.Unreadable != "" {
			add(lang.Diagnostic{Decl: f.Decls[0], Problem: lang.Problem{Rule: "not-text", Message: f.Unreadable + "; it was not read"}})
		}
		for _, i := range f.Flawed {
			for _, problem := range f.Decls[i].Problems {
				add(lang.Diagnostic{Decl: f.Decls[i], Problem: problem})
			}
		}
	}
	for _, d := range r.Project.Problems {
		add(d)
	}
	crops := make([]crop, len(r.work))
	found := 0
	for i, w := range r.work {
		crops[i] = w.reap()
		found += len(w.calculation.Env.Problems) + len(crops[i].problems)
	}
	r.Diagnostics = slices.Grow(r.Diagnostics, found)
	for i, w := range r.work {
		for _, d := range w.calculation.Env.Problems {
			add(d)
		}
		for _, d := range w.problems {
			add(d)
		}
		for _, d := range crops[i].problems {
			add(d)
		}
	}
	r.unused(crops, add)
	for i := range r.Diagnostics {
		if r.Diagnostics[i].Severity == lang.Error {
			r.Diagnostics[i].Severity = rule.SeverityOf(r.Diagnostics[i].Rule)
		}
	}
	r.Diagnostics = sortDiagnostics(r.Diagnostics)
	r.collect(files, crops)
	r.count(crops)
}

// crop is what the jobs of a calculation came to.
type crop struct {
	results             []*Result // of all jobs
	ends                []int32   // where each job's end in it
	problems            []lang.Diagnostic
	sections, materials []bool // which are used, by their number
	unnumbered          []lang.Place
	tally               tally
}

// reap goes through the jobs and lists the calculation's members.
func (w *work) reap() crop {
	env := w.calculation.Env
	c := crop{results: make([]*Result, 0, len(w.jobs)), ends: make([]int32, 0, len(w.jobs)),
		sections: make([]bool, len(env.Sections)), materials: make([]bool, len(env.Materials))}
	members := make([]*model.Member, 0, len(w.jobs))
	for _, j := range w.jobs {
		c.results = append(c.results, j.results...)
		c.ends = append(c.ends, int32(len(c.results)))
		c.problems = append(c.problems, j.problems...)
		members = append(members, j.members...)
		c.tally.add(j.tally)
		for _, n := range j.uses {
			// a name has the same number in every reading that shares it
			switch {
			case n.Index < 0:
				c.unnumbered = append(c.unnumbered, n.Place)
			case n.Kind == model.SectionName:
				c.sections[n.Index] = true
			default:
				c.materials[n.Index] = true
			}
		}
	}
	w.calculation.Members = members
	return c
}

// tally counts verdicts.
type tally struct{ passes, fails, undecided, departures int }

func (t *tally) add(u tally) {
	t.passes += u.passes
	t.fails += u.fails
	t.undecided += u.undecided
	t.departures += u.departures
}

func (t *tally) count(m *Result) {
	switch m.Verdict {
	case standard.Passes:
		t.passes++
	case standard.Fails:
		t.fails++
	default:
		t.undecided++
	}
	t.departures += len(m.Departures)
}

// collect lists the results by file and place. In each calculation they come in
// that order within a file; only files that several calculations read need
// sorting, and say the same in each as a rule.
func (r *Report) collect(files []string, crops []crop) {
	readers := map[string]int{}
	results := map[string][]*Result{}
	all := 0
	for i, w := range r.work {
		decls, job := w.calculation.Env.MemberDecls(), 0
		all += len(crops[i].results)
		for _, f := range w.calculation.Files {
			readers[f.Name]++
			first := job
			for _, d := range f.Decls {
				if job < len(decls) && decls[job] == d {
					job++
				}
			}
			start, end := int32(0), int32(0)
			if first > 0 {
				start = crops[i].ends[first-1]
			}
			if job > 0 {
				end = crops[i].ends[job-1]
			}
			if part := crops[i].results[start:end]; readers[f.Name] == 1 {
				results[f.Name] = part[:len(part):len(part)]
			} else {
				results[f.Name] = append(results[f.Name], part...)
			}
		}
	}
	r.Members = make([]*Result, 0, all)
	for _, name := range files {
		if list := results[name]; readers[name] > 1 {
			r.merge(list)
		} else {
			r.Members = append(r.Members, list...)
		}
	}
}

// merge lists the results of a file that several calculations read.
func (r *Report) merge(list []*Result) {
	start := func(m *Result) int32 {
		_, span := r.Place(m)
		return span.Start
	}
	sort.SliceStable(list, func(i, j int) bool { return start(list[i]) < start(list[j]) })
	var last *Result
	for _, m := range list {
		if last != nil && start(last) == start(m) && last.Verdict == m.Verdict && (last.Utilisation == m.Utilisation || last.Utilisation != last.Utilisation) {
			continue // it says the same in both
		}
		last = m
		r.Members = append(r.Members, m)
	}
}

func (r *Report) count(crops []crop) {
	var t tally
	all := 0
	for i := range crops {
		t.add(crops[i].tally)
		all += len(crops[i].results)
	}
	if all != len(r.Members) { // some were said twice
		t = tally{}
		for _, m := range r.Members {
			t.count(m)
		}
	}
	r.Summary = Summary{Members: len(r.Members), Passes: t.passes, Fails: t.fails, Undecided: t.undecided, Departures: t.departures}
	for i := range r.Diagnostics {
		switch r.Diagnostics[i].Severity {
		case lang.Error:
			r.Summary.Errors++
		case lang.Warning:
			r.Summary.Warnings++
		}
	}
}

// unused warns of sections, materials and values that no calculation uses. A
// file with definitions alone, that nothing includes, is left in peace, and so
// is one that was read only because another includes it.
func (r *Report) unused(crops []crop, add func(lang.Diagnostic)) {
	used := map[lang.Place]bool{}
	where := map[lang.Place]*model.Named{}
	for i, w := range r.work {
		env := w.calculation.Env
		if len(w.calculation.Members) == 0 {
			for _, n := range env.Names {
				used[n.Place] = true
			}
			continue
		}
		for _, at := range crops[i].unnumbered {
			used[at] = true
		}
		for _, n := range env.Definitions() {
			list := crops[i].sections
			if n.Kind == model.MaterialName {
				list = crops[i].materials
			}
			if n.Index >= 0 && list[n.Index] {
				used[n.Place] = true
			}
			if r.Project.Asked[n.Place.Decl.File.Name] && !env.Bad(n) {
				where[n.Place] = n
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
