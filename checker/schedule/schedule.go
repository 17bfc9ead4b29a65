// Package schedule lists the members of a report in a table: what each is made of,
// where it stands, what it hands to its base, and what decides it; and adds up the
// steel.
package schedule

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/lang/unit"
)

// Schedule is a table of members with the steel that they need. Values are in the
// units that the heads of the columns name.
type Schedule struct {
	Columns []Column
	Rows    [][]Cell
	Steel   []Steel
	// Remarks say how the numbers are meant.
	Remarks []string
}

// Column is a column of the table.
type Column struct {
	Name   string
	Unit   string // "" for words and pure numbers
	Number bool
	// Side is set for columns of shear and moment, which people are not shown where
	// they hold nothing.
	Side bool
	// Digits is how many significant digits people are shown; 0 for two decimals.
	Digits int
}

// Head is the head of a column with its unit.
func (c Column) Head() string {
	if c.Unit == "" {
		return c.Name
	}
	return c.Name + " [" + c.Unit + "]"
}

// Cell is a word or a number; a number that is not known is NaN.
type Cell struct {
	Text  string
	Value float64
}

// Steel is what is needed of one section.
type Steel struct {
	Section string
	Pieces  int     // members, or lifts of them
	Length  float64 // m, of all pieces
	Mass    float64 // kg, of all pieces; NaN where a density is not known
}

// Order is how the rows are sorted.
type Order string

// The orders.
const (
	ByFile        Order = "file" // as the files have them
	ByName        Order = "name" // 2 before 10
	ByUtilisation Order = "utilisation"
	BySection     Order = "section"
)

// Orders are all orders, the usual one first.
var Orders = []Order{ByFile, ByName, ByUtilisation, BySection}

// New lists the members of a report. Members that cannot be decided come first
// where rows are sorted by utilisation: they need a person.
func New(r *checker.Report, order Order) *Schedule {
	members := slices.Clone(r.Members)
	sortBy(members, order)
	units := derivation.Units{}
	if len(r.Members) > 0 {
		units = r.Members[0].Units()
	}
	b := builder{units: units, bends: slices.ContainsFunc(members, bends)}
	for _, m := range members {
		for _, c := range m.Env().Cases {
			if c.Name != "" && !slices.Contains(b.cases, c.Name) && carries(members, c.Name) {
				b.cases = append(b.cases, c.Name)
			}
		}
	}
	b.columns()
	for _, m := range members {
		b.row(m)
	}
	b.steel(members)
	b.out.Remarks = []string{"Forces at the base: N is compression on the foundation, pull is negative. Every column of a case has the case by itself, without factors."}
	if b.bends {
		b.out.Remarks = append(b.out.Remarks, "V is the shear force just above the base and M the moment there, first order, of bending about the axis that is named; signs are those of one axis and tell directions that agree or differ.")
	}
	return &b.out
}

func sortBy(members []*checker.Result, order Order) {
	slices.SortStableFunc(members, func(a, b *checker.Result) int {
		switch order {
		case ByName:
			return natural(a.Name, b.Name)
		case ByUtilisation:
			if x, y := math.IsNaN(a.Utilisation), math.IsNaN(b.Utilisation); x != y {
				return map[bool]int{true: -1, false: 1}[x]
			} else if x {
				return 0
			}
			return cmp.Compare(b.Utilisation, a.Utilisation)
		case BySection:
			return cmp.Or(natural(sections(a), sections(b)), natural(a.Name, b.Name))
		}
		return 0
	})
}

// natural compares texts with the numbers in them as numbers: "A2" before "A10".
func natural(a, b string) int {
	for a != "" && b != "" {
		x, y := digits(a), digits(b)
		if x > 0 && y > 0 {
			m, n := strings.TrimLeft(a[:x], "0"), strings.TrimLeft(b[:y], "0")
			if c := cmp.Or(cmp.Compare(len(m), len(n)), strings.Compare(m, n)); c != 0 {
				return c
			}
			a, b = a[x:], b[y:]
			continue
		}
		if a[0] != b[0] {
			return cmp.Compare(a[0], b[0])
		}
		a, b = a[1:], b[1:]
	}
	return cmp.Compare(len(a), len(b))
}

func digits(s string) int {
	n := 0
	for n < len(s) && s[n] >= '0' && s[n] <= '9' {
		n++
	}
	return n
}

// made lists the parts of a member: its lifts, or the whole of it.
func made(r *checker.Result) []model.Lift {
	if len(r.Member.Lifts) > 0 {
		return r.Member.Lifts
	}
	return []model.Lift{{From: 0, To: r.Member.Height, Section: r.Member.Section, Material: r.Member.Material}}
}

func joined(r *checker.Result, name func(model.Lift) string) string {
	var out []string
	for _, l := range made(r) {
		if s := name(l); s != "" && !slices.Contains(out, s) {
			out = append(out, s)
		}
	}
	return strings.Join(out, ", ")
}

func sections(r *checker.Result) string {
	return joined(r, func(l model.Lift) string {
		if l.Section == nil {
			return ""
		}
		return l.Section.Title()
	})
}

func grades(r *checker.Result) string {
	return joined(r, func(l model.Lift) string {
		if l.Material == nil {
			return ""
		}
		return l.Material.Title()
	})
}

type builder struct {
	units derivation.Units
	cases []string
	bends bool
	out   Schedule
}

// forces are the columns of forces at the base, of a case or a combination.
func (b *builder) forces(of string) {
	force, moment := b.units.For(unit.Force).Symbol, b.units.For(unit.Moment).Symbol
	b.out.Columns = append(b.out.Columns, Column{Name: "N " + of, Unit: force, Number: true, Digits: 4})
	if b.bends {
		for _, axis := range []string{"major", "minor"} {
			b.out.Columns = append(b.out.Columns, Column{Name: "V " + axis + " " + of, Unit: force, Number: true, Digits: 4, Side: true}, Column{Name: "M " + axis + " " + of, Unit: moment, Number: true, Digits: 4, Side: true})
		}
	}
}

func (b *builder) columns() {
	length := b.units.For(unit.Length).Symbol
	b.out.Columns = []Column{{Name: "member"}, {Name: "section"}, {Name: "grade"}, {Name: "from", Unit: length, Number: true, Digits: 5}, {Name: "to", Unit: length, Number: true, Digits: 5}, {Name: "length", Unit: length, Number: true, Digits: 5}}
	for _, c := range b.cases {
		b.forces(c)
	}
	b.out.Columns = append(b.out.Columns, Column{Name: "governing combination"})
	b.forces("governing")
	b.out.Columns = append(b.out.Columns, Column{Name: "governing check"}, Column{Name: "utilisation", Number: true}, Column{Name: "verdict"})
}

// carries tells whether some member carries a case, so that a case that nothing
// uses has no column.
func carries(members []*checker.Result, name string) bool {
	return slices.ContainsFunc(members, func(m *checker.Result) bool {
		env := m.Env()
		if m.OwnWeight() > 0 && env.Cases[env.SelfWeight].Name == name {
			return true
		}
		return slices.ContainsFunc(m.Member.Loads, func(l model.Load) bool { return env.Cases[l.Case].Name == name })
	})
}

func (b *builder) row(r *checker.Result) {
	words := func(s string) Cell {
		if s == "" {
			s = "–"
		}
		return Cell{Text: s, Value: math.NaN()}
	}
	value := func(v float64, dim unit.Dim) Cell { return Cell{Value: v / b.units.For(dim).Factor} }
	m := r.Member
	from, to := math.NaN(), math.NaN()
	if m.Levels {
		from, to = m.From, m.From+m.Height
	}
	row := []Cell{words(r.Name), words(sections(r)), words(grades(r)), value(from, unit.Length), value(to, unit.Length), value(m.Height, unit.Length)}
	add := func(x reaction) {
		row = append(row, value(x.n, unit.Force))
		if b.bends {
			for axis := range x.v {
				row = append(row, value(x.v[axis], unit.Force), value(x.m[axis], unit.Moment))
			}
		}
	}
	of := reactionsOf(r)
	for _, name := range b.cases {
		add(of.ofCase(r, name))
	}
	combination, _ := governing(r)
	row = append(row, words(combination.Name))
	add(of.governing)
	row = append(row, words(r.Governing), Cell{Value: r.Utilisation}, words(r.Verdict.String()))
	b.out.Rows = append(b.out.Rows, row)
}

// steel adds the steel up by section, in the order of the catalogue's names.
func (b *builder) steel(members []*checker.Result) {
	at := map[string]int{}
	for _, r := range members {
		for _, l := range made(r) {
			if l.Section == nil || !(l.To > l.From) {
				continue
			}
			name := l.Section.Title()
			i, ok := at[name]
			if !ok {
				i = len(b.out.Steel)
				at[name] = i
				b.out.Steel = append(b.out.Steel, Steel{Section: name})
			}
			s := &b.out.Steel[i]
			density := math.NaN()
			if l.Material != nil {
				density = l.Material.Density
			}
			s.Pieces++
			s.Length += l.To - l.From
			s.Mass += (l.To - l.From) * l.Section.Area * density
		}
	}
	slices.SortFunc(b.out.Steel, func(x, y Steel) int { return natural(x.Section, y.Section) })
}

// Total is the steel of all sections; its mass is NaN where one is not known.
func (s *Schedule) Total() Steel {
	total := Steel{Section: "all"}
	for _, x := range s.Steel {
		total.Pieces += x.Pieces
		total.Length += x.Length
		total.Mass += x.Mass
	}
	return total
}

// Shown is a cell as people read it.
func (c Column) Shown(x Cell) string {
	switch {
	case !c.Number:
		return x.Text
	case math.IsNaN(x.Value) || math.IsInf(x.Value, 0):
		return "–"
	case c.Digits == 0:
		return checker.Ratio(x.Value)
	case math.Abs(x.Value) < 1e-9:
		return "0"
	}
	return unit.Short(x.Value, c.Digits)
}

// steelColumns are the columns of the table of steel.
var steelColumns = []Column{{Name: "section"}, {Name: "pieces", Number: true, Digits: 9}, {Name: "length", Unit: "m", Number: true, Digits: 5}, {Name: "mass", Unit: "kg", Number: true, Digits: 5}}

func steelRow(s Steel) []Cell {
	return []Cell{{Text: s.Section}, {Value: float64(s.Pieces)}, {Value: s.Length}, {Value: s.Mass}}
}

// steelRows are the rows of that table, the total last.
func (s *Schedule) steelRows() [][]Cell {
	var out [][]Cell
	for _, x := range s.Steel {
		out = append(out, steelRow(x))
	}
	if len(s.Steel) > 1 {
		out = append(out, steelRow(s.Total()))
	}
	return out
}

// ParseOrder finds an order by its word.
func ParseOrder(word string) (Order, error) {
	if slices.Contains(Orders, Order(word)) {
		return Order(word), nil
	}
	var words []string
	for _, o := range Orders {
		words = append(words, string(o))
	}
	return "", fmt.Errorf("--sort is %s or %s, not '%s'", strings.Join(words[:len(words)-1], ", "), words[len(words)-1], word)
}

// lean leaves out the columns of shear and moment that hold nothing but zeros and
// what is not known.
func (s *Schedule) lean() ([]Column, [][]Cell) {
	var columns []Column
	rows := make([][]Cell, len(s.Rows))
	for i, c := range s.Columns {
		if c.Side && !slices.ContainsFunc(s.Rows, func(row []Cell) bool { return math.Abs(row[i].Value) > 1e-9 }) {
			continue
		}
		columns = append(columns, c)
		for r := range s.Rows {
			rows[r] = append(rows[r], s.Rows[r][i])
		}
	}
	return columns, rows
}
