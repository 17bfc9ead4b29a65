package sheet

import (
	"fmt"
	"maps"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/drawing"
	"kern/checker/model"
	"kern/checker/output"
	"kern/checker/rule"
	"kern/lang/unit"
)

func checked(name string) bool {
	r := rule.Find(name)
	return r != nil && r.Check
}

// bases writes what the members of the calculations share. Calculations that share
// one basis, as those do that include the same files, have it written once.
func (c *composer) bases() {
	type group struct {
		names []string
		all   part
		text  string // the basis as it is written, for comparison
	}
	var groups []*group
	for _, p := range c.parts {
		name, text := relative(c.dir, p.calculation.Root), fmt.Sprintf("%#v", c.shared(p))
		i := slices.IndexFunc(groups, func(g *group) bool { return g.text == text && agree(g.all.results, p.results) })
		if i < 0 {
			groups = append(groups, &group{[]string{name}, part{p.calculation, slices.Clone(p.results)}, text})
			continue
		}
		groups[i].names = append(groups[i].names, name)
		groups[i].all.results = append(groups[i].all.results, p.results...)
	}
	for _, g := range groups {
		c.add(output.Heading{Level: 2, Text: "Basis of " + strings.Join(g.names, ", ")})
		shared := c.shared(g.all)
		c.add(shared[0]...)
		c.add(materials(g.all)...)
		c.add(sections(g.all)...)
		c.add(shared[1]...)
	}
}

// shared are the blocks of a basis that do not depend on the members: those before
// the materials, and those behind the sections.
func (c *composer) shared(p part) [2][]output.Block {
	env := p.calculation.Env
	var after []output.Block
	for _, b := range [][]output.Block{cases(env), levels(env), combinations(p)} {
		after = append(after, b...)
	}
	return [2][]output.Block{basis(env), after}
}

// agree tells whether names of sections and materials mean the same to the members of
// two calculations.
func agree(a, b []*checker.Result) bool {
	for _, x := range made(a) {
		for _, y := range made(b) {
			if x.section != nil && y.section != nil && x.section != y.section && x.section.Title() == y.section.Title() && !x.section.Same(y.section) {
				return false
			}
			// stated values are known by their name alone; a value that is not known (NaN)
			// is like no other
			if m, n := x.material, y.material; m != nil && n != nil && m != n && m.Title() == n.Title() &&
				(output.MaterialTitle(m) != output.MaterialTitle(n) || m.E != n.E || m.G != n.G || m.Density != n.Density || m.Grade == nil && m.Fy != n.Fy) {
				return false
			}
		}
	}
	return true
}

func basis(env *model.Env) (out []output.Block) {
	b := env.Basis
	var facts Facts
	fact := func(name, value string) { facts = append(facts, Fact{name, output.Words(value)}) }
	if s := standardOf(env); s != "" {
		fact("design standard", s)
	} else {
		fact("design standard", "none is stated: no member can be checked")
	}
	if b.Actions == "" {
		fact("actions", "no standard of actions is stated")
	}
	lengths := "theoretical, of ideal ends"
	if b.Recommended {
		lengths = "those recommended for design"
	}
	fact("effective length factors", lengths)
	if b.Exact {
		fact("critical loads", "of whole members with their holds, springs and stepped forces, where a member does not say otherwise")
	}
	if b.Imperfect {
		fact("sway imperfections", "to EN 1993-1-1 5.3.2, on members that can sway")
	}
	if w := b.Lateral.Word; w != "" {
		fact("lateral-torsional buckling", map[string]string{"general": "the general case, 6.3.2.2", "rolled": "rolled and equivalent welded sections, 6.3.2.3"}[w])
	}
	if w := b.Interaction.Word; w != "" {
		fact("interaction factors", "Annex "+w)
	}
	strengths := "by product standard and thickness"
	if b.TableFy {
		strengths = "EN 1993-1-1 Table 3.1"
	}
	fact("strengths of grades", strengths)
	weight := "counted where a member does not say otherwise"
	if !b.SelfWeight {
		weight = "not counted where a member does not say otherwise"
	}
	fact("self-weight of columns", weight)
	if b.Simple {
		fact("amplification of moments", "1/(1 - n) for every moment diagram")
	}
	out = append(out, facts)
	var rows [][]output.Line
	for _, name := range slices.Sorted(maps.Keys(b.Overrides)) {
		o := b.Overrides[name]
		rows = append(rows, []output.Line{output.Code(name), output.Words(unit.Exact(o.Value)), output.Words(o.Because)})
	}
	if len(rows) > 0 {
		out = append(out, output.Heading{Level: 3, Text: "Numbers that the calculation sets itself"}, output.Table{Head: []string{"number", "value", "because"}, Align: "lnl", Rows: rows})
	}
	if env.Refused != "" {
		out = append(out, output.Paragraph{Text: output.Join(output.Strong("No member can be judged: "), output.Words(env.Refused+"."))})
	}
	return out
}

// value writes a value to four digits; a dash for one that is not known.
func value(units derivation.Units, v float64, dim unit.Dim) output.Line {
	if !finite(v) {
		return output.Words("–")
	}
	u := units.For(dim)
	return output.Words(strings.TrimSpace(unit.Short(v/u.Factor, 4) + " " + u.Symbol))
}

// madeOf is what a member, or a lift of it, is made of; either may be unknown.
type madeOf struct {
	section  *model.Section
	material *model.Material
}

func made(results []*checker.Result) []madeOf {
	var out []madeOf
	for _, r := range results {
		if len(r.Member.Lifts) == 0 {
			out = append(out, madeOf{r.Member.Section, r.Member.Material})
		}
		for _, l := range r.Member.Lifts {
			out = append(out, madeOf{l.Section, l.Material})
		}
	}
	return out
}

func materials(p part) (out []output.Block) {
	units := p.calculation.Env.Basis.Show
	var rows [][]output.Line
	var seen []string
	for _, x := range made(p.results) {
		m := x.material
		if m == nil || contains(seen, output.MaterialTitle(m)) {
			continue
		}
		seen = append(seen, output.MaterialTitle(m))
		rows = append(rows, []output.Line{output.Words(output.MaterialTitle(m)), value(units, m.E, unit.Stress), value(units, m.G, unit.Stress), value(units, m.Density, unit.Density)})
	}
	if len(rows) == 0 {
		return nil
	}
	out = append(out, output.Heading{Level: 3, Text: "Materials"}, output.Table{Head: []string{"material", "E", "G", "density"}, Align: "lnnn", Rows: rows})
	seen, rows = nil, nil
	for _, x := range made(p.results) {
		m, s := x.material, x.section
		if m == nil || s == nil {
			continue
		}
		fy, fu, source, ok := m.Strength(s.Thickness, p.calculation.Env.Basis.TableFy)
		key := output.MaterialTitle(m) + "\x00" + s.Title()
		if !ok || contains(seen, key) {
			continue
		}
		seen = append(seen, key)
		rows = append(rows, []output.Line{output.Words(m.Title()), output.Words(s.Title()), value(units, s.Thickness, unit.Length), value(units, fy, unit.Stress), value(units, fu, unit.Stress), output.Words(source)})
	}
	if len(rows) > 0 {
		out = append(out, output.Table{Head: []string{"strength of", "in section", "thickest part", "f_y", "f_u", "from"}, Align: "llnnnl", Rows: rows})
	}
	return out
}

func sections(p part) (out []output.Block) {
	units := p.calculation.Env.Basis.Show
	var list []*model.Section
	density := map[string]float64{}
	for _, x := range made(p.results) {
		s := x.section
		if s == nil {
			continue
		}
		title := output.SectionTitle(s)
		if !slices.ContainsFunc(list, func(x *model.Section) bool { return output.SectionTitle(x) == title }) {
			list = append(list, s)
			if x.material != nil {
				density[title] = x.material.Density
			}
		}
	}
	if len(list) == 0 {
		return nil
	}
	out = append(out, output.Heading{Level: 3, Text: "Sections"})
	var pictures Figures
	var general, axes [][]output.Line
	var assumed []output.Line
	for _, s := range list {
		title := output.SectionTitle(s)
		if scene := drawing.Section(s.Shape, s.Properties, drawing.Sized{Title: "section " + s.Title(), Side: 34, Dimensions: true, Units: units}); scene != nil {
			pictures = append(pictures, scene)
		}
		mass := output.Words("–")
		if d, ok := density[title]; ok {
			mass = value(units, s.Area*d, unit.MassPerLength)
		}
		general = append(general, []output.Line{output.Words(title), value(units, s.Area, unit.Area), mass, value(units, s.It, unit.Length4), value(units, s.Iw, unit.Length6)})
		for _, a := range []struct {
			name               string
			i, r, wel, wpl, av float64
		}{{"major", s.IMajor, s.RMajor, s.WelMajor, s.WplMajor, s.AvMajor}, {"minor", s.IMinor, s.RMinor, s.WelMinor, s.WplMinor, s.AvMinor}} {
			axes = append(axes, []output.Line{output.Words(s.Title()), output.Words(a.name), value(units, a.i, unit.Length4), value(units, a.r, unit.Length),
				value(units, a.wel, unit.Volume), value(units, a.wpl, unit.Volume), value(units, a.av, unit.Area)})
		}
		for _, a := range s.Assumed {
			assumed = append(assumed, output.Words(s.Title()+": "+a))
		}
	}
	if len(pictures) > 0 {
		out = append(out, pictures)
	}
	out = append(out, output.Table{Head: []string{"section", "area A", "mass", "I_t", "I_w"}, Align: "lnnnn", Rows: general},
		output.Table{Head: []string{"section", "axis", "I", "i", "W elastic", "W plastic", "A_v"}, Align: "llnnnnn", Rows: axes})
	if len(assumed) > 0 {
		out = append(out, output.List{Items: assumed})
	}
	return out
}

func cases(env *model.Env) (out []output.Block) {
	var rows [][]output.Line
	for _, x := range env.Cases {
		kind, category := x.Kind.String(), x.Given
		row := []output.Line{output.Words(x.Name), output.Words(kind), output.Words(category)}
		v, ok := env.Basis.Combining.Values.Psi(x.Case)
		for i := range v {
			psi := output.Words("–")
			if ok && x.Kind.Variable() && env.Basis.Actions != "" && !env.Basis.Basic() {
				psi = output.Words(unit.Exact(v[i]))
			}
			row = append(row, psi)
		}
		rows = append(rows, append(row, output.Words(x.Because)))
	}
	if len(rows) > 0 {
		out = append(out, output.Heading{Level: 3, Text: "Load cases"}, lean(output.Table{Head: []string{"case", "kind", "category", "psi_0", "psi_1", "psi_2", "because"}, Align: "lllnnnl", Rows: rows}))
	}
	var items []output.Line
	for _, g := range env.Exclusive {
		var list []string
		for _, i := range g {
			list = append(list, env.Cases[i].Name)
		}
		items = append(items, output.Words("of "+strings.Join(list, ", ")+" one acts at a time"))
	}
	if len(items) > 0 {
		out = append(out, output.List{Items: items})
	}
	return out
}

func levels(env *model.Env) (out []output.Block) {
	units := env.Basis.Show
	pressure := units.Pressure()
	var rows [][]output.Line
	for _, l := range env.Levels {
		if l.Bad {
			continue
		}
		var loads []string
		for _, p := range l.Pressures {
			loads = append(loads, env.Cases[p.Case].Name+" "+unit.Short(p.Value/pressure.Factor, 4)+" "+pressure.Symbol)
		}
		rows = append(rows, []output.Line{output.Words(l.Name), output.Words(units.Show(l.At, unit.Length, 5)), output.Words(strings.Join(loads, "; "))})
	}
	if len(rows) > 0 {
		out = append(out, output.Heading{Level: 3, Text: "Levels"}, lean(output.Table{Head: []string{"level", "height", "loads on its floor"}, Align: "lnl", Rows: rows}))
	}
	return out
}

// combinations lists those that members were checked under.
func combinations(p part) (out []output.Block) {
	var list []model.Combination
	for _, r := range p.results {
		if len(r.Combinations()) > 0 && r.Member.Imported == nil {
			list = r.Combinations()
			break
		}
	}
	var rows [][]output.Line
	for _, x := range list {
		name := x.Name
		if x.Label != "" && x.Label != name {
			name = x.Label + ": " + name
		}
		rows = append(rows, []output.Line{output.Words(name), output.Words(x.Situation.String()), output.Words(x.Source)})
	}
	if len(rows) > 0 {
		out = append(out, output.Heading{Level: 3, Text: "Combinations"}, output.Table{Head: []string{"combination", "situation", "from"}, Align: "lll", Rows: rows})
	}
	if len(p.calculation.Env.Assumed) > 0 {
		var items []output.Line
		for _, a := range p.calculation.Env.Assumed {
			items = append(items, output.Words(a))
		}
		out = append(out, output.List{Items: items})
	}
	return out
}

// forces writes what the combinations come to in a member: of all of them, or of
// those that decide a check.
func (c *composer) forces(r *checker.Result) []output.Block {
	f := r.Frame()
	if f == nil {
		return nil
	}
	units := r.Units()
	wanted := map[int]bool{}
	for _, x := range r.Checks {
		wanted[x.Combination] = true
	}
	bends := f.Bends[0] || f.Bends[1]
	var rows [][]output.Line
	for i, x := range r.Combinations() {
		if !x.Situation.Ultimate() || !c.options.Full && !wanted[i] {
			continue
		}
		cells := []output.Line{output.Words(x.Name), value(units, f.Compression(i, 0, r.Member.Height), unit.Force), value(units, f.At(i, 0), unit.Force)}
		if bends {
			for axis := range 2 {
				cells = append(cells, value(units, greatestMoment(f, axis, x.Factors), unit.Moment))
			}
		}
		rows = append(rows, cells)
	}
	if len(rows) == 0 {
		return nil
	}
	head, align := []string{"combination", "greatest axial force", "at the base"}, "lnn"
	if bends {
		head, align = append(head, "moment, major", "moment, minor"), align+"nn"
	}
	title := "Forces in the combinations that decide a check"
	if c.options.Full {
		title = "Forces in the combinations"
	}
	return []output.Block{output.Heading{Level: 4, Text: title}, output.Table{Head: head, Align: align, Rows: rows},
		output.Paragraph{Text: output.Words("Compression is positive. Moments are the greatest of first order, as they act on the straight member.")}}
}

// lean leaves out the columns of a table that hold nothing, the first apart.
func lean(t output.Table) output.Table {
	out := output.Table{Rows: make([][]output.Line, len(t.Rows))}
	for i, head := range t.Head {
		if i > 0 && !slices.ContainsFunc(t.Rows, func(row []output.Line) bool {
			return i < len(row) && row[i].String() != "" && row[i].String() != "–"
		}) {
			continue
		}
		out.Head, out.Align = append(out.Head, head), out.Align+t.Align[i:i+1]
		for r, row := range t.Rows {
			out.Rows[r] = append(out.Rows[r], row[i])
		}
	}
	return out
}
