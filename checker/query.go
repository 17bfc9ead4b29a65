package checker

import (
	"slices"
	"sort"

	"kern/checker/model"
	"kern/lang"
)

// Calculations gives the calculations that read a file, by root.
func (r *Report) Calculations(file string) []*model.Calculation {
	var out []*model.Calculation
	for _, c := range r.calculations {
		if slices.ContainsFunc(c.Files, func(f *lang.File) bool { return f.Name == file }) {
			out = append(out, c)
		}
	}
	return out
}

// AllCalculations gives every calculation, by root.
func (r *Report) AllCalculations() []*model.Calculation { return r.calculations }

// Results gives the results of the members that a declaration describes, in the
// order of their names. What two calculations say alike stands once.
func (r *Report) Results(decl *lang.Decl) []*Result {
	file, start, ok := r.places.of(decl)
	if !ok {
		return nil
	}
	return r.between(file, start, start+int32(len(decl.Text)))
}

// ResultsIn gives the results of the members of a file, in the order of their
// names.
func (r *Report) ResultsIn(file string) []*Result { return r.between(file, 0, 1<<31-1) }

// between gives the results whose names stand in a part of a file; Members is
// sorted by that.
func (r *Report) between(file string, start, end int32) []*Result {
	place := func(i int) (string, int32) {
		name, span := r.Place(r.Members[i])
		return name, span.Start
	}
	find := func(offset int32) int {
		return sort.Search(len(r.Members), func(i int) bool {
			name, at := place(i)
			return name > file || name == file && at >= offset
		})
	}
	return r.Members[find(start):find(end)]
}

// Where gives a place as a span of a file; "" for a declaration that the report
// does not have.
func (r *Report) Where(at lang.Place) (file string, span lang.Span) {
	if _, _, ok := r.places.of(at.Decl); !ok {
		return "", lang.Span{}
	}
	return r.places.span(at.Decl, at.Span)
}

// Users gives the results of the members that use a name, in the order of the
// report.
func (r *Report) Users(n *model.Named) []*Result {
	var out []*Result
	for _, m := range r.Members {
		if slices.ContainsFunc(m.Member.Uses, func(u *model.Named) bool { return u.Place == n.Place }) {
			out = append(out, m)
		}
	}
	return out
}

// Mention is a place where a name stands.
type Mention struct {
	Named *model.Named
	Place lang.Place
	// Declares is set where the name is given its meaning.
	Declares bool
	// Calculation is one in which the name has that meaning.
	Calculation *model.Calculation
}

// NameAt finds the name at an offset of a file. A cursor behind the last letter
// still sees it. It is false where no name stands, or one that nobody gave.
func (r *Report) NameAt(file string, offset int32) (Mention, bool) {
	f := r.Project.Files[file]
	if f == nil {
		return Mention{}, false
	}
	i := f.DeclAt(offset)
	if i < 0 {
		return Mention{}, false
	}
	decl, at := f.Decls[i], offset-f.Starts[i]
	for _, c := range r.Calculations(file) {
		var found Mention
		Mentions(c, decl, func(m Mention) {
			if m.Place.Span.Contains(at) {
				found = m
			}
		})
		if found.Named != nil {
			return found, true
		}
	}
	return Mention{}, false
}

// References gives every place where a name stands, its declaration too, by
// file and place. A file that several calculations include counts in each of
// those in which the name has this meaning.
func (r *Report) References(n *model.Named) []Mention {
	var out []Mention
	seen := map[lang.Place]bool{}
	for _, c := range r.calculations {
		if now := c.Env.Names[n.Name]; now == nil || now.Place != n.Place {
			continue
		}
		for _, f := range c.Files {
			for _, d := range f.Decls {
				Mentions(c, d, func(m Mention) {
					if m.Named.Place == n.Place && !seen[m.Place] {
						seen[m.Place] = true
						out = append(out, m)
					}
				})
			}
		}
	}
	sort.Slice(out, func(i, j int) bool {
		a, x := r.Where(out[i].Place)
		b, y := r.Where(out[j].Place)
		return a < b || a == b && x.Start < y.Start
	})
	return out
}
