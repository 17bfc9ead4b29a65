package review

import (
	"cmp"
	"slices"
	"strings"

	"kern/checker"
)

// sharedEdit is an edit of a declaration outside of members, in one calculation.
type sharedEdit struct {
	edit Edit
	id   string
	from *side // the earlier side of the calculation; nil for one that is new
	to   *side
}

// shared lists the edits of declarations outside of members.
func shared(earlier, later map[string]*side) []sharedEdit {
	var roots []string
	for root := range later {
		roots = append(roots, root)
	}
	slices.Sort(roots)
	var out []sharedEdit
	for _, root := range roots {
		b, a := earlier[root], later[root]
		if b == nil {
			continue // nothing to compare with
		}
		ids := map[string]bool{}
		for _, s := range []*side{b, a} {
			for id, d := range s.parts.all {
				ids[id] = ids[id] || d.kind != "member" && d.kind != "rows"
			}
		}
		for _, id := range inOrder(ids, a.rank(b)) {
			x, y := b.parts.all[id], a.parts.all[id]
			if sameDeclared(x, y) {
				continue
			}
			d := y
			if d == nil {
				d = x
			}
			if (x == nil || y == nil) && defines(d.kind) {
				e := Edit{Kind: "definition", Of: d.title()}
				if text := textOf(d.decls[0], d.stmts[0].Span); y == nil {
					e.Before, e.Place = text, b.lines.at(d.facts[0].place)
				} else {
					e.After, e.Place = text, a.lines.at(d.facts[0].place)
				}
				out = append(out, sharedEdit{e, id, b, a})
				continue
			}
			var was, now []fact
			if x != nil {
				was = x.facts
			}
			if y != nil {
				now = y.facts
			}
			slots, pairs := align(was, now)
			for _, p := range pairs {
				var before, after *fact
				if p.before >= 0 {
					before = &slots[p.before].fact
				}
				if p.after >= 0 {
					after = &slots[p.after].fact
				}
				out = append(out, sharedEdit{editOf(x, y, before, after, b.lines, a.lines), id, b, a})
			}
		}
	}
	return out
}

// reach lists the shared edits with the members that depend on them. What several
// calculations include is listed once.
func (r *Review) reach(pairs []match, edits []sharedEdit, changed func(i int) bool) {
	if len(edits) == 0 {
		return
	}
	at := map[Edit]int{}
	of := map[*side]map[string][]int{} // the edits of a side's declarations
	for _, e := range edits {
		i, ok := at[e.edit]
		if !ok {
			i = len(r.Shared)
			at[e.edit] = i
			r.Shared = append(r.Shared, Shared{Edit: e.edit})
		}
		for _, s := range []*side{e.from, e.to} {
			if of[s] == nil {
				of[s] = map[string][]int{}
			}
			of[s][e.id] = append(of[s][e.id], i)
		}
	}
	seen := make([]int, len(r.Shared)) // the last member that counted, from 1
	for i, p := range pairs {
		for _, f := range []found{p.before, p.after} {
			if of[f.side] == nil {
				continue
			}
			for id := range f.side.closure(f.id) {
				for _, k := range of[f.side][id] {
					if seen[k] == i+1 {
						continue
					}
					seen[k] = i + 1
					r.Shared[k].Reaches = append(r.Shared[k].Reaches, p.after.result.Name)
					if changed(i) {
						r.Shared[k].Changed++
					}
				}
			}
		}
	}
}

// Assumption is something that is assumed about members of one state alone.
type Assumption struct {
	Text    string
	Added   bool // it was not assumed before
	Members []string
}

// alikeButNumbers tells whether two assumptions differ in their numbers alone,
// which follow from edits that are listed.
func alikeButNumbers(x, y string) bool {
	bare := func(s string) string {
		return strings.Map(func(r rune) rune {
			if r >= '0' && r <= '9' || r == '.' {
				return -1
			}
			return r
		}, s)
	}
	return bare(x) == bare(y)
}

// assumptions compares what is assumed about the members of both states.
func (r *Review) assumptions(pairs []match) {
	type key struct {
		text  string
		added bool
	}
	at := map[key]int{}
	for _, p := range pairs {
		compare := func(one, other *checker.Result, added bool) {
			for _, text := range one.Assumptions {
				if slices.ContainsFunc(other.Assumptions, func(x string) bool { return x == text || alikeButNumbers(x, text) }) {
					continue
				}
				k := key{text, added}
				i, ok := at[k]
				if !ok {
					i = len(r.Assumptions)
					at[k] = i
					r.Assumptions = append(r.Assumptions, Assumption{Text: text, Added: added})
				}
				r.Assumptions[i].Members = append(r.Assumptions[i].Members, p.after.result.Name)
			}
		}
		compare(p.after.result, p.before.result, true)
		compare(p.before.result, p.after.result, false)
	}
	slices.SortStableFunc(r.Assumptions, func(x, y Assumption) int {
		return cmp.Or(-cmp.Compare(len(x.Members), len(y.Members)), cmp.Compare(x.Text, y.Text))
	})
}
