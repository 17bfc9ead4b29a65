package review

import (
	"cmp"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/model"
)

// found is a member of one state.
type found struct {
	result *checker.Result
	side   *side
	root   string
	id     string
	place  Place
}

// sides takes the calculations of a report apart.
func sides(r *checker.Report, before bool) ([]found, map[string]*side) {
	l := newLines(r, before)
	of := map[*model.Member]*side{}
	all := map[string]*side{}
	for _, c := range r.AllCalculations() {
		s := newSide(r, c, l)
		all[c.Root] = s
		for _, m := range c.Members {
			of[m] = s
		}
	}
	var out []found
	for _, m := range r.Members {
		s := of[m.Member]
		if s == nil {
			continue
		}
		file, span := r.Place(m)
		out = append(out, found{m, s, s.calc.Root, "member " + m.Name, l.of(file, span)})
	}
	return out, all
}

// match is a member in both states.
type match struct{ before, after found }

// pair finds each member of the later state in the earlier one: by calculation and
// name, by a name that is left over once on both sides (its file was renamed), and
// by what it says (it was renamed).
func pair(before, after []found) (pairs []match, gone, come []found) {
	taken := make([]bool, len(before))
	partner := make([]int, len(after))
	for i := range partner {
		partner[i] = -1
	}
	by := func(key func(f found) string) {
		left := map[string][]int{}
		for i, f := range before {
			if !taken[i] {
				left[key(f)] = append(left[key(f)], i)
			}
		}
		right := map[string][]int{}
		for i, f := range after {
			if partner[i] < 0 {
				right[key(f)] = append(right[key(f)], i)
			}
		}
		for i, f := range after {
			k := key(f)
			if partner[i] < 0 && k != "" && len(left[k]) == 1 && len(right[k]) == 1 {
				partner[i] = left[k][0]
				taken[left[k][0]] = true
			}
		}
	}
	by(func(f found) string { return f.root + "\x00" + f.result.Name })
	by(func(f found) string { return f.result.Name })
	by(func(f found) string { return f.root + "\x00" + f.contents() })
	by(func(f found) string { return f.contents() })
	resemble(before, after, taken, partner)
	for i, f := range after {
		if partner[i] < 0 {
			come = append(come, f)
		} else {
			pairs = append(pairs, match{before[partner[i]], f})
		}
	}
	for i, f := range before {
		if !taken[i] {
			gone = append(gone, f)
		}
	}
	return pairs, gone, come
}

// contents is what a member says, its name and title apart; "" for one that says
// too little to be known again by it.
func (f found) contents() string {
	d := f.side.parts.all[f.id]
	if d == nil || len(d.facts) < 4 {
		return ""
	}
	var b strings.Builder
	for _, x := range d.facts {
		if x.word != "title" && x.word != "note" {
			b.WriteString(x.key + "\n")
		}
	}
	return b.String()
}

// maxResemble bounds among how many members of a side a renamed and edited one is
// looked for.
const maxResemble = 300

// resemble pairs members of which two thirds of the lines are the same, the most
// alike first.
func resemble(before, after []found, taken []bool, partner []int) {
	var left, right []int
	for i := range before {
		if !taken[i] {
			left = append(left, i)
		}
	}
	for i := range after {
		if partner[i] < 0 {
			right = append(right, i)
		}
	}
	if len(left) > maxResemble || len(right) > maxResemble {
		return
	}
	type like struct {
		i, k  int
		share float64
	}
	var all []like
	for _, k := range right {
		for _, i := range left {
			if before[i].root != after[k].root {
				continue
			}
			if s := likeness(before[i], after[k]); s >= 2.0/3 {
				all = append(all, like{i, k, s})
			}
		}
	}
	slices.SortStableFunc(all, func(x, y like) int { return cmp.Compare(y.share, x.share) })
	for _, l := range all {
		if !taken[l.i] && partner[l.k] < 0 {
			taken[l.i], partner[l.k] = true, l.i
		}
	}
}

// likeness is the share of the lines of two members that are the same; 0 for
// members that say too little.
func likeness(b, a found) float64 {
	x, y := b.side.parts.all[b.id], a.side.parts.all[a.id]
	if x == nil || y == nil || min(len(x.facts), len(y.facts)) < 4 {
		return 0
	}
	count := map[string]int{}
	for _, f := range x.facts {
		count[f.key]++
	}
	same := 0
	for _, f := range y.facts {
		if count[f.key] > 0 {
			count[f.key]--
			same++
		}
	}
	return float64(same) / float64(max(len(x.facts), len(y.facts)))
}
