package checker

import (
	"kern/checker/model"
	"kern/lang"
)

// CheckAgain is Check for a project that grew out of an earlier one by an edit:
// members that depend on nothing that changed keep their results. The report is
// the same as that of Check.
func CheckAgain(before *Report, project *lang.Project, progress Progress) *Report {
	r := &Report{Project: project}
	for _, root := range project.Roots {
		files := project.Closure(root)
		c := &model.Calculation{Root: root, Files: files, Env: model.NewEnv(files, registry{})}
		r.calculations = append(r.calculations, c)
		r.jobs = append(r.jobs, jobsOf(c, before.of(root))...)
	}
	var todo []*job
	for _, j := range r.jobs {
		if !j.done {
			todo = append(todo, j)
		}
	}
	each(len(todo), progress, func(i int) { todo[i].run() })
	r.gather()
	return r
}

// calculation is what an earlier report knows of a root.
type calculation struct {
	env  *model.Env
	jobs map[*lang.Decl]*job
}

func (r *Report) of(root string) *calculation {
	if r == nil {
		return nil
	}
	for _, c := range r.calculations {
		if c.Root == root {
			old := &calculation{env: c.Env, jobs: make(map[*lang.Decl]*job, len(r.jobs))}
			for _, j := range r.jobs {
				if j.calculation.Root == root {
					old.jobs[j.decl] = j
				}
			}
			return old
		}
	}
	return nil
}

// jobsOf lists the work of a calculation; what an earlier report did already and
// nothing touches is taken over.
func jobsOf(c *model.Calculation, old *calculation) []*job {
	combinations := c.Env.All()
	out := make([]*job, 0, len(c.Env.MemberDecls()))
	shared := old != nil && c.Env.Shares(old.env)
	for _, d := range c.Env.MemberDecls() {
		if shared {
			if j := old.jobs[d]; j != nil && j.holds(c.Env) {
				out = append(out, &job{calculation: c, decl: d, combinations: j.combinations, members: j.members, results: j.results, done: true})
				continue
			}
		}
		out = append(out, &job{calculation: c, decl: d, combinations: combinations})
	}
	return out
}

// holds tells whether an earlier job's results hold in a calculation with the
// same shared declarations: the members still own their names and lean on the
// same other members. Problems can speak of any other member, so a member with
// one is read again every time.
func (j *job) holds(env *model.Env) bool {
	for _, m := range j.members {
		if len(m.Problems) > 0 || m.Name == "" || !env.Owns(m) {
			return false
		}
		for _, n := range m.Uses {
			if n.Kind != model.MemberName {
				continue
			}
			if now, ok := env.Names[n.Name]; !ok || now.Stmt != n.Stmt {
				return false
			}
		}
	}
	return true
}
