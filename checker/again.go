package checker

import (
	"slices"

	"kern/checker/model"
	"kern/lang"
)

// work is what there is to do for a calculation: a job for each declaration of
// members, in the order of the files.
type work struct {
	calculation *model.Calculation
	jobs        []*job
	problems    []lang.Diagnostic // of values that lean on results
}

// CheckAgain is Check for a project that grew out of an earlier one by an edit:
// members that depend on nothing that changed keep their results. The report is
// the same as that of Check.
func CheckAgain(before *Report, project *lang.Project, progress Progress) *Report {
	r := &Report{Project: project}
	type task struct {
		env *model.Env
		job *job
	}
	var todo []task
	ran := map[*job]bool{}
	for _, root := range project.Roots {
		w := before.of(root).again(root, project.Closure(root))
		r.calculations = append(r.calculations, w.calculation)
		r.work = append(r.work, w)
		for _, j := range w.jobs {
			if j.done {
				continue
			}
			ran[j] = true
			if j.linked = linked(w.calculation.Env, j.decl); !j.linked {
				todo = append(todo, task{w.calculation.Env, j})
			}
		}
	}
	each(len(todo), progress, func(i int) { todo[i].job.run(todo[i].env, nil) })
	for i := range r.work {
		r.work[i].link(ran)
	}
	r.gather()
	return r
}

// of is the work of an earlier report for a root, nil for none.
func (r *Report) of(root string) *work {
	if r == nil {
		return nil
	}
	for i := range r.work {
		if r.work[i].calculation.Root == root {
			return &r.work[i]
		}
	}
	return nil
}

// again lists the work for the calculation as it is now. What was done before
// and nothing touches is taken over; old may be nil.
func (old *work) again(root string, files []*lang.File) work {
	c := &model.Calculation{Root: root, Files: files}
	if old != nil {
		var changed []model.Change
		if c.Env, changed = old.calculation.Env.Again(old.calculation.Files, files); c.Env != nil {
			return work{calculation: c, jobs: old.replace(c.Env, changed)}
		}
	}
	c.Env = model.NewEnv(files, registry{})
	w := work{calculation: c, jobs: make([]*job, 0, len(c.Env.MemberDecls()))}
	done := map[*lang.Decl]*job{}
	if old != nil && c.Env.Shares(old.calculation.Env) {
		for _, j := range old.jobs {
			done[j.decl] = j
		}
	}
	combinations := c.Env.All()
	for _, d := range c.Env.MemberDecls() {
		j := done[d]
		if j == nil || !j.holds(c.Env) {
			j = &job{decl: d, combinations: combinations}
		}
		w.jobs = append(w.jobs, j)
	}
	return w
}

// replace gives the jobs after changes that left all names as they were: new
// ones for the declarations that changed, and for those that lean on them or
// speak of them.
func (old *work) replace(env *model.Env, changed []model.Change) []*job {
	jobs := slices.Clone(old.jobs)
	if len(changed) == 0 {
		return jobs
	}
	now := map[*lang.Decl]*lang.Decl{}
	for _, c := range changed {
		now[c.Before] = c.Now
	}
	touches := func(j *job) bool {
		for _, n := range j.leans {
			if now[n.Place.Decl] != nil {
				return true
			}
		}
		for _, p := range j.problems {
			for _, r := range p.Related {
				if now[r.Place.Decl] != nil {
					return true
				}
			}
			for _, f := range p.Fixes {
				for _, e := range f.Edits {
					if now[e.Place.Decl] != nil {
						return true
					}
				}
			}
		}
		return false
	}
	for i, j := range jobs {
		d := now[j.decl]
		switch {
		case d != nil:
		case touches(j):
			d = j.decl
		default:
			continue
		}
		jobs[i] = &job{decl: d, combinations: j.combinations}
	}
	return jobs
}

// holds tells whether an earlier job's results hold in a calculation with the
// same shared declarations: the members still own their names and lean on the
// same other members. Problems can speak of any other member, so a member with
// one is read again every time.
func (j *job) holds(env *model.Env) bool {
	if j.nameless {
		return false
	}
	for _, m := range j.members {
		if !env.Owns(m) {
			return false
		}
	}
	for _, n := range j.leans {
		if now, ok := env.Names[n.Name]; !ok || now.Stmt != n.Stmt {
			return false
		}
	}
	return true
}
