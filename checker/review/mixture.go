package review

import (
	"cmp"
	"maps"
	"math"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
)

// part is a declaration in both states, laid side by side.
type part struct {
	before, after *declared // nil where it is not there
	name          string    // that the mixture gives it
	slots         []slot
}

// player is what is brought about as one: an edit, or several that make no sense
// apart.
type player struct {
	edits []Edit
	of    []int // parts that it changes
	order string
	slots [][2]int // part and slot
}

// mixture is a member between two states: any of the edits may have been made.
type mixture struct {
	name    string
	parts   []part
	players []player
	idle    []Edit // edits that cannot matter
	known   map[string]outcome
}

// outcome is what the member comes to in one state of the mixture.
type outcome struct {
	utilisation float64 // NaN when not known
	verdict     standard.Verdict
	found       bool
}

// pairOf are the ids of one member in both states.
type pairOf struct{ before, after string }

// mix lays out everything that a member depends on in either state. With coupled,
// definitions that came or went are edits too, bound to those that speak of
// them; else they are there all the time, which changes nothing as long as
// nobody speaks of them.
func mix(earlier, later *side, member pairOf, coupled bool) *mixture {
	m := &mixture{known: map[string]outcome{}, name: strings.TrimPrefix(member.after, "member ")}
	b, a := earlier.closure(member.before), later.closure(member.after)
	ids := map[string]bool{}
	maps.Copy(ids, b)
	maps.Copy(ids, a)
	rows := pairOf{strings.Replace(member.before, "member ", "rows ", 1), strings.Replace(member.after, "member ", "rows ", 1)}
	if member.before != member.after {
		delete(ids, member.before)
		delete(ids, rows.before)
		if b[rows.before] {
			ids[rows.after] = true
		}
	}
	same := map[[2]*lang.Stmt]int{} // several members of one block are edited as one
	order := inOrder(ids, later.rank(earlier))
	slices.SortStableFunc(order, func(x, y string) int { // the head of a table stands before its lines
		return strings.Compare(kindFirst(x), kindFirst(y))
	})
	for _, id := range order {
		p := part{before: earlier.parts.all[id], after: later.parts.all[id]}
		switch id {
		case member.after:
			p.before = earlier.parts.all[member.before]
		case rows.after:
			p.before = earlier.parts.all[rows.before]
		}
		d := p.after
		if d == nil {
			d = p.before
		}
		p.name = d.name
		at := len(m.parts)
		var was, now []fact
		if p.before != nil {
			was = p.before.facts
		}
		if p.after != nil {
			now = p.after.facts
		}
		slots, pairs := align(was, now)
		whole := p.before == nil || p.after == nil
		if whole && !coupled && defines(d.kind) {
			for i := range slots {
				slots[i].before, slots[i].after = true, true
			}
			pairs = nil
		}
		if whole && len(pairs) > 0 && defines(d.kind) {
			pl := player{of: []int{at}}
			text := d.write(p.name, d.facts)
			e := Edit{Kind: kindOf(d, "made of"), Of: d.title(), Place: later.lines.at(d.facts[0].place)}
			if p.after != nil {
				e.After = text
			} else {
				e.Before, e.Place = text, earlier.lines.at(d.facts[0].place)
			}
			pl.edits = []Edit{e}
			for i := range slots {
				pl.slots = append(pl.slots, [2]int{at, i})
			}
			m.players = append(m.players, pl)
			pairs = nil
		}
		p.slots = slots
		m.parts = append(m.parts, p)
		if d.kind == "rows" { // the lines of a table were written as one
			m.table(at, pairs, earlier, later)
			continue
		}
		for _, pair := range pairs {
			var x, y *fact
			var key [2]*lang.Stmt
			pl := player{of: []int{at}}
			if pair.before >= 0 {
				x = &slots[pair.before].fact
				key[0] = x.stmt
				pl.slots = append(pl.slots, [2]int{at, pair.before})
			}
			if pair.after >= 0 {
				y = &slots[pair.after].fact
				key[1] = y.stmt
				pl.slots = append(pl.slots, [2]int{at, pair.after})
			}
			e := editOf(p.before, p.after, x, y, earlier.lines, later.lines)
			if carries := d.kind == "cases" && (x == nil || y == nil); carries && !coupled {
				for _, s := range pl.slots {
					slots[s[1]].before, slots[s[1]].after = true, true
				}
				continue
			}
			if f := cmp.Or(y, x); cannotMatter(d, f.word) {
				m.idle = append(m.idle, e)
				for _, s := range pl.slots { // the later words stand in every state
					slots[s[1]].before = slots[s[1]].after
				}
				continue
			}
			if i, ok := same[key]; ok && key != [2]*lang.Stmt{} {
				m.players[i].slots = append(m.players[i].slots, pl.slots...)
				m.players[i].of = append(m.players[i].of, at)
				continue
			}
			same[key] = len(m.players)
			pl.edits = []Edit{e}
			m.players = append(m.players, pl)
		}
	}
	if coupled {
		m.couple()
	}
	m.settle()
	return m
}

// table makes one player of all lines of a table that a member has.
func (m *mixture) table(at int, pairs []pairing, earlier, later *side) {
	p := m.parts[at]
	pl := player{of: []int{at}}
	for _, pair := range pairs {
		var x, y *fact
		for _, s := range []int{pair.before, pair.after} {
			if s >= 0 {
				pl.slots = append(pl.slots, [2]int{at, s})
			}
		}
		if pair.before >= 0 {
			x = &p.slots[pair.before].fact
		}
		if pair.after >= 0 {
			y = &p.slots[pair.after].fact
		}
		pl.edits = append(pl.edits, editOf(p.before, p.after, x, y, earlier.lines, later.lines))
	}
	if len(pairs) > 0 {
		m.players = append(m.players, pl)
	}
}

// defines tells of declarations that change nothing unless something speaks of
// them.
func defines(kind string) bool {
	switch kind {
	case "value", "section", "material", "level", "member":
		return true
	}
	return false
}

// settle orders the players by what they say, so that the order of edits in the
// text has no influence on anything, and numbers their slots.
func (m *mixture) settle() {
	for i := range m.players {
		var b strings.Builder
		for _, e := range m.players[i].edits {
			b.WriteString(e.Of + "\x00" + e.Before + "\x00" + e.After + "\x00")
		}
		m.players[i].order = b.String()
	}
	slices.SortStableFunc(m.players, func(a, b player) int { return strings.Compare(a.order, b.order) })
	for i, p := range m.players {
		for _, s := range p.slots {
			m.parts[s[0]].slots[s[1]].edit = i
		}
	}
	clear(m.known)
}

// couple makes one player of a definition that came or went and the edits that
// speak of it.
func (m *mixture) couple() {
	root := make([]int, len(m.players))
	for i := range root {
		root[i] = i
	}
	find := func(i int) int {
		for root[i] != i {
			i = root[i]
		}
		return i
	}
	gives := map[string][]int{}
	for i, p := range m.players {
		for _, s := range p.slots {
			x := m.parts[s[0]]
			switch f := x.slots[s[1]].fact; {
			case strings.HasPrefix(f.word, "case "):
				gives[strings.TrimPrefix(f.word, "case ")] = append(gives[strings.TrimPrefix(f.word, "case ")], i)
			case x.before == nil || x.after == nil:
				gives[x.name] = append(gives[x.name], i)
			}
		}
	}
	for i, p := range m.players {
		for _, s := range p.slots {
			if f := m.parts[s[0]].slots[s[1]].fact; f.stmt != nil {
				model.Mentioned(f.stmt, func(e *lang.Expr) {
					name, _, _ := strings.Cut(e.Text, ".")
					for _, k := range gives[name] {
						root[find(k)] = find(i)
					}
				})
			}
		}
	}
	m.merge(func(i int) int { return find(i) })
}

// merge makes one player of all with the same number.
func (m *mixture) merge(number func(i int) int) {
	var out []player
	at := map[int]int{}
	for i, p := range m.players {
		n := number(i)
		k, ok := at[n]
		if !ok {
			at[n] = len(out)
			out = append(out, p)
			continue
		}
		out[k].edits = append(out[k].edits, p.edits...)
		out[k].of = append(out[k].of, p.of...)
		out[k].slots = append(out[k].slots, p.slots...)
	}
	m.players = out
	m.settle()
}

// write writes a declaration with some of its facts.
func (d *declared) write(name string, facts []fact) string {
	var head, body []string
	kind, title, as := "column", "", ""
	for _, f := range facts {
		switch {
		case d.kind == "member" && f.word == "kind":
			kind = f.text
		case d.kind == "member" && f.word == "title":
			title = " " + f.text
		case d.kind == "member" && f.word == "as":
			as = " " + f.text
		case f.word == "made of":
			head = append(head, f.text)
		default:
			body = append(body, f.written())
		}
	}
	switch d.kind {
	case "member":
		return kind + " " + name + title + as + " {\n" + strings.Join(body, "\n") + "\n}\n"
	case "basis":
		return "basis {\n" + strings.Join(body, "\n") + "\n}\n"
	case "section", "material", "level":
		text := d.kind + " " + name + " " + strings.Join(head, " ")
		if len(body) > 0 {
			text += " { " + strings.Join(body, "; ") + " }"
		}
		return text + "\n"
	}
	return strings.Join(body, "\n") + "\n"
}

// text is the calculation with some of the edits made, and the tables that it
// reads, by name.
func (m *mixture) text(made []bool) (string, map[string]string) {
	var b strings.Builder
	var tables map[string]string
	var facts []fact
	for _, p := range m.parts {
		facts = facts[:0]
		there := p.before != nil && p.after != nil
		for _, s := range p.slots {
			in := s.before
			if s.edit >= 0 && made[s.edit] {
				in = s.after
			}
			if in {
				facts = append(facts, s.fact)
			}
			there = there || in
		}
		if !there {
			continue
		}
		d := p.after
		if d == nil {
			d = p.before
		}
		if d.kind == "table" || d.kind == "rows" {
			if tables == nil {
				tables = map[string]string{}
			}
			for _, f := range facts {
				tables[alias(f.table)] += p.row(f) + "\n"
			}
			continue
		}
		b.WriteString(d.write(p.name, facts))
	}
	return b.String(), tables
}

// row is a line of a table under the name that the member has in the mixture.
func (p *part) row(f fact) string {
	if p.before != nil && p.after != nil && p.before.name != p.after.name && f.word == "forces" {
		return strings.Replace(f.text, p.before.name, p.after.name, 1)
	}
	return f.text
}

// check works the member out with some of the edits made.
func (m *mixture) check(made []bool) outcome {
	key := setKey(made)
	if o, ok := m.known[key]; ok {
		return o
	}
	text, tables := m.text(made)
	project := lang.Load([]string{"m.kern"}, func(name string) (string, error) {
		if t, ok := tables[name]; ok {
			return t, nil
		}
		return text, nil
	}, nil)
	o := outcome{utilisation: math.NaN()}
	for _, r := range checker.Check(project, nil).Members {
		if r.Name == m.name {
			o = outcome{r.Utilisation, r.Verdict, true}
		}
	}
	m.known[key] = o
	return o
}

func setKey(made []bool) string {
	b := make([]byte, len(made))
	for i, x := range made {
		if x {
			b[i] = 1
		}
	}
	return string(b)
}
