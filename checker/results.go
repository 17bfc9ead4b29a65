package checker

import (
	"math"
	"slices"
	"strings"
	"sync"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// linking works out the members that use results of others, one after another,
// each after those that it uses. It is what such members ask for results.
type linking struct {
	work   *work
	values map[*lang.Value]*late
	mu     sync.Mutex // of of: editors ask while nothing is worked out any more
	of     map[*Result]func(string) (unit.Quantity, bool)
	chain  []link // what is being worked out, outermost first
}

// link is a member's declaration or a value on its way.
type link struct {
	job   *job // nil for a value
	value *lang.Value
}

func (l link) name() string {
	if l.job != nil {
		return l.job.named
	}
	return l.value.Name
}

// late is a value that leans on results.
type late struct {
	quantity unit.Quantity
	problem  *lang.Problem
	running  bool
	uses     []string // the members that it leans on, through other values too
}

// maxLinks bounds how many members and values may lean on results in a row.
const maxLinks = 500

// linked tells whether a declaration of members uses results, itself or by a
// line that it takes over.
func linked(env *model.Env, d *lang.Decl) bool {
	if !env.Linked {
		return false
	}
	for _, d := range withParents(env, d) {
		if d.Dotted {
			return true
		}
		if len(env.LateValues()) == 0 {
			continue
		}
		found := false
		for _, s := range d.Stmts {
			model.Mentioned(s, func(e *lang.Expr) {
				if v, ok := env.Values.Lookup(e.Text); ok && v.Late {
					found = true
				}
			})
		}
		if found {
			return true
		}
	}
	return false
}

// withParents are a declaration and those that it leans on with "as".
func withParents(env *model.Env, decl *lang.Decl) []*lang.Decl {
	out := []*lang.Decl{decl}
	for i := 0; i < len(out); i++ {
		for _, s := range out[i].Stmts {
			for k, e := range s.Args {
				if !e.Is("as") || k+1 >= len(s.Args) {
					continue
				}
				if n := env.Names[s.Args[k+1].Text]; n != nil && n.Kind == model.MemberName && !slices.Contains(out, n.Place.Decl) {
					out = append(out, n.Place.Decl)
				}
			}
		}
	}
	return out
}

// link works out the members that use results and are not done, and the values
// that lean on results. ran are the jobs that have been worked out anew.
func (w *work) link(ran map[*job]bool) {
	env := w.calculation.Env
	if !env.Linked {
		return
	}
	l := &linking{work: w, values: map[*lang.Value]*late{}, of: map[*Result]func(string) (unit.Quantity, bool){}}
	w.stale(ran)
	for _, i := range w.order() {
		if j := w.jobs[i]; !j.done {
			l.run(j)
		}
	}
	settled := map[*lang.Value]unit.Quantity{}
	w.problems = nil
	for _, v := range env.LateValues() {
		q, p := l.Late(v)
		if p == nil {
			settled[v] = q
		} else if p.Rule != "" {
			w.problems = append(w.problems, lang.Diagnostic{Decl: v.Decl, Problem: *p})
		}
	}
	w.calculation.Env = env.WithResults(settled, l)
}

// stale replaces the jobs whose members use results that may have changed.
func (w *work) stale(ran map[*job]bool) {
	env := w.calculation.Env
	const unseen, open, fresh, old = 0, 1, 2, 3
	state := make([]uint8, len(w.jobs))
	at := func(name string) int {
		if n := env.Names[name]; n != nil && n.Kind == model.MemberName && n.Index < len(w.jobs) {
			return n.Index
		}
		return -1
	}
	var judge func(i, depth int) uint8
	judge = func(i, depth int) uint8 {
		j := w.jobs[i]
		switch {
		case state[i] == open, depth > maxLinks:
			return old // in a circle, or too long: always anew
		case state[i] != unseen:
			return state[i]
		}
		state[i] = open
		s := uint8(fresh)
		if !j.done || ran[j] {
			s = old
		}
		for _, name := range j.refs {
			if k := at(name); k < 0 || judge(k, depth+1) == old {
				s = old
			}
		}
		state[i] = s
		return s
	}
	for i, j := range w.jobs {
		if len(j.refs) > 0 && judge(i, 0) == old && j.done {
			w.jobs[i] = &job{decl: j.decl, combinations: j.combinations, linked: true}
		}
	}
}

// order lists the jobs that use results, each behind those that it names as far
// as there is no circle.
func (w *work) order() []int {
	env := w.calculation.Env
	var out []int
	seen := make([]bool, len(w.jobs))
	names := func(i int) []int {
		var list []int
		var values []*lang.Value
		known := map[*lang.Value]bool{}
		note := func(e *lang.Expr) {
			name, _, dot := strings.Cut(e.Text, ".")
			if n := env.Names[name]; dot && n != nil && n.Kind == model.MemberName {
				list = append(list, n.Index)
			}
			if v, ok := env.Values.Lookup(e.Text); ok && v.Late && !known[v] {
				known[v] = true
				values = append(values, v)
			}
		}
		for _, d := range withParents(env, w.jobs[i].decl) {
			for _, s := range d.Stmts {
				model.Mentioned(s, note)
			}
		}
		for k := 0; k < len(values); k++ {
			values[k].Expr.Walk(func(e *lang.Expr) {
				if e.Kind == lang.NameExpr {
					note(e)
				}
			})
		}
		return list
	}
	type step struct {
		job  int
		todo []int
	}
	for i, j := range w.jobs {
		if !j.linked || seen[i] {
			continue
		}
		seen[i] = true
		stack := []step{{i, names(i)}}
		for len(stack) > 0 {
			top := &stack[len(stack)-1]
			if len(top.todo) == 0 {
				out = append(out, top.job)
				stack = stack[:len(stack)-1]
				continue
			}
			k := top.todo[0]
			top.todo = top.todo[1:]
			if k < len(w.jobs) && w.jobs[k].linked && !seen[k] {
				seen[k] = true
				stack = append(stack, step{k, names(k)})
			}
		}
	}
	return out
}

func (l *linking) run(j *job) {
	l.chain = append(l.chain, link{job: j})
	j.run(l.work.calculation.Env, l)
	l.chain = l.chain[:len(l.chain)-1]
}

// uses notes that what is being worked out leans on a member.
func (l *linking) uses(name string) {
	for i := len(l.chain) - 1; i >= 0; i-- {
		c := l.chain[i]
		if c.job != nil {
			if !slices.Contains(c.job.refs, name) {
				c.job.refs = append(c.job.refs, name)
			}
			return
		}
		if v := l.values[c.value]; !slices.Contains(v.uses, name) {
			v.uses = append(v.uses, name)
		}
	}
}

// Late implements [model.Results].
func (l *linking) Late(v *lang.Value) (unit.Quantity, *lang.Problem) {
	known := l.values[v]
	switch {
	case known == nil:
	case known.running:
		return unit.Quantity{}, l.circle(v.Name)
	default:
		for _, name := range known.uses {
			l.uses(name)
		}
		return known.quantity, known.problem
	}
	if len(l.chain) >= maxLinks {
		return unit.Quantity{}, l.tooLong()
	}
	known = &late{running: true}
	l.values[v] = known
	l.chain = append(l.chain, link{value: v})
	known.quantity, known.problem = l.work.calculation.Env.EvaluateLate(v, l)
	l.chain = l.chain[:len(l.chain)-1]
	known.running = false
	return known.quantity, known.problem
}

// Result implements [model.Results].
func (l *linking) Result(n *model.Named, what string) (unit.Quantity, *lang.Problem) {
	l.uses(n.Name)
	if n.Index < 0 || n.Index >= len(l.work.jobs) {
		return unit.Quantity{}, lang.Silent
	}
	j := l.work.jobs[n.Index]
	if !j.done {
		if slices.ContainsFunc(l.chain, func(c link) bool { return c.job == j }) {
			return unit.Quantity{}, l.circle(n.Name)
		}
		if len(l.chain) >= maxLinks {
			return unit.Quantity{}, l.tooLong()
		}
		l.run(j)
	}
	i := slices.IndexFunc(j.results, func(r *Result) bool { return r.Name == n.Name })
	if i < 0 || len(j.results[i].Missing) > 0 {
		return unit.Quantity{}, lang.Silent
	}
	r := j.results[i]
	l.mu.Lock()
	defer l.mu.Unlock()
	if l.of[r] == nil {
		l.of[r] = r.Values()
	}
	return r.linkedValue(what, l.of[r])
}

// circle is the problem of what leans on itself, by the name at which the circle
// closes.
func (l *linking) circle(name string) *lang.Problem {
	var names []string
	for _, c := range l.chain {
		if c.job != nil && model.Gives(c.job.decl, name) || c.name() == name || len(names) > 0 {
			names = append(names, c.name())
		}
	}
	if len(names) > 6 {
		names = append(names[:6], "…")
	}
	return &lang.Problem{Rule: "defined-by-itself", Message: "'" + name + "' depends on itself: " + strings.Join(append(names, name), " → ")}
}

func (l *linking) tooLong() *lang.Problem {
	return &lang.Problem{Rule: "defined-by-itself", Message: "too many members and values lean on one another's results in a row"}
}

// BaseResults are the results of a member's base, with what they are.
var BaseResults = map[string]string{
	"base.N":      "the greatest compression at the base in any ultimate combination",
	"base.uplift": "the greatest tension at the base in any ultimate combination, 0 for none",
}

// linkedValue gives a result by what stands behind the dot: a symbol of the
// standard or the trade's word for it, "utilisation", or a force at the base.
func (r *Result) linkedValue(what string, of func(string) (unit.Quantity, bool)) (unit.Quantity, *lang.Problem) {
	none := unit.Quantity{}
	force := func(v float64) (unit.Quantity, *lang.Problem) {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return none, lang.Silent
		}
		return unit.Quantity{Value: v, Dim: unit.Force}, nil
	}
	if end, name, ok := strings.Cut(what, "."); ok && end == "base" {
		switch {
		case name == "N":
			return force(r.baseForce(1))
		case name == "uplift":
			return force(r.baseForce(-1))
		}
		for i, c := range r.env.Cases {
			if c.Name == name {
				return force(r.baseOf(i))
			}
		}
		return none, r.noResult(what)
	}
	if what == "height" || what == "length" {
		return unit.Quantity{Value: r.Member.Height, Dim: unit.Length}, nil
	}
	q, ok := of(what)
	switch {
	case ok:
		return q, nil
	case what == "utilisation":
		return none, lang.Silent
	}
	s := find(r.Standard)
	if s == nil {
		return none, lang.Silent
	}
	if _, known := s.Symbols().Find(what); known || s.Alias(what) != "" {
		return none, lang.Silent // the calculation does not come to it
	}
	return none, r.noResult(what)
}

// Linked gives a result of the member by what would stand behind its name and a
// dot; false when it has none.
func (r *Result) Linked(what string) (unit.Quantity, bool) {
	if len(r.Missing) > 0 {
		return unit.Quantity{}, false
	}
	q, p := r.linkedValue(what, r.Values())
	return q, p == nil
}

// noResult is the problem of a result that the standard does not have.
func (r *Result) noResult(what string) *lang.Problem {
	p := &lang.Problem{Rule: "unknown-name", Message: "'" + clipped(what) + "' is no result of " + r.Name + " by " + r.Standard}
	near := model.Closest(what, r.ResultNames(), 3)
	if len(near) > 0 {
		p.Message += "; did you mean " + lang.OrList(near) + "?"
	}
	for _, n := range near {
		p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, lang.Span{}, n))
	}
	return p
}

func clipped(s string) string {
	if len(s) > 40 {
		return strings.ToValidUTF8(s[:40], "") + "…"
	}
	return s
}

// ResultNames are what may stand behind the member's name and a dot.
func (r *Result) ResultNames() []string {
	out := []string{"utilisation", "height"}
	for name := range BaseResults {
		out = append(out, name)
	}
	slices.Sort(out)
	for _, c := range r.env.Cases {
		out = append(out, "base."+c.Name)
	}
	if s := find(r.Standard); s != nil {
		for _, word := range []string{"N_b_minor", "N_b_major", "N_b_twist", "N_c", "N_cr_minor", "N_cr_major"} {
			if s.Alias(word) != "" {
				out = append(out, word)
			}
		}
		for i := range s.Symbols().Len() {
			out = append(out, s.Symbols().At(derivation.ID(i)).Name)
		}
	}
	return out
}

// baseForce is the greatest axial force at the base, with the sign of
// compression (1) or tension (-1), N; 0 for none of that sign.
func (r *Result) baseForce(sign float64) float64 {
	f := standard.NewFrame(r.env, r.Member, r.combinations)
	most := 0.0
	for c := range r.combinations {
		n := sign * f.At(c, 0)
		if math.IsNaN(n) {
			return n
		}
		most = max(most, n)
	}
	if len(r.combinations) == 0 {
		return math.NaN()
	}
	return most
}

// baseOf is the axial force at the base from one case without a factor, N,
// compression positive; self-weight counts in its case.
func (r *Result) baseOf(index int) float64 {
	if r.Member.Imported != nil {
		return math.NaN() // its forces are known by combination alone
	}
	factors := make([]float64, len(r.env.Cases))
	factors[index] = 1
	one := []model.Combination{{Combination: action.Combination{Name: r.env.Cases[index].Name, Factors: factors}}}
	return standard.NewFrame(r.env, r.Member, one).At(0, 0)
}
