package complete

import (
	"cmp"
	"regexp"
	"slices"
	"strings"

	"kern/lang"
	"kern/lang/unit"
)

// commonDims are the dimensions of calculations, the most usual first.
var commonDims = []unit.Dim{unit.Length, unit.Force, unit.Stress, unit.ForcePerLength, unit.Moment, unit.Area, unit.Volume, unit.Length4, unit.Mass,
	unit.Density, unit.WeightDensity, unit.MassPerLength, unit.MassPerArea, unit.Angle, unit.Time, unit.Velocity, unit.Acceleration, unit.Length6, unit.RotationalStiffness}

// units are the units that fit behind a number: those that are used nearby,
// then those that results are shown in, then the usual ones.
func (s *scope) units(d duty) []Item {
	dims := d.dims
	if dims == nil {
		dims = commonDims
	}
	var out []Item
	seen := map[string]bool{}
	typed := strings.ToLower(s.typed())
	add := func(u unit.Unit, group int) {
		if seen[u.Symbol] || !begins(u.Symbol, typed) {
			return
		}
		seen[u.Symbol] = true
		out = append(out, Item{Label: u.Symbol, Detail: factorWords(u), Kind: UnitItem, Group: group, Eager: !u.Dim.IsNone(), About: About{Of: "unit", Name: u.Symbol}})
	}
	if n := len(s.before); n > 1 && s.before[n-2].Kind == lang.QuantExpr && s.before[n-2].Text == "ft" {
		u, _ := unit.Parse("in")
		add(u, 0)
		return out // inches alone follow feet
	}
	used := s.usedUnits(dims, s.head)
	if d.lead == "offset" {
		used = usage{others: append(append(used.same, used.block...), used.others...)} // the places of a load have other units
	}
	for i, symbols := range [][]string{used.same, used.block, {s.placeUnit(d)}, used.others} {
		for _, symbol := range symbols {
			if u, err := unit.Parse(symbol); err == nil && slices.Contains(dims, u.Dim) {
				add(u, i)
			}
		}
	}
	for _, dim := range dims {
		if u, ok := s.env.Basis.Show[dim]; ok {
			add(u, 4)
		}
	}
	for i, dim := range dims {
		for j, u := range unit.For(dim) {
			group := 5
			if j > 0 {
				group = 6 + min(i, 1)
			}
			add(u, group)
		}
	}
	return out
}

// factorWords says how much a unit is.
func factorWords(u unit.Unit) string {
	name := ""
	for _, a := range unit.Atoms() {
		if a.Symbol == u.Symbol {
			name = a.Name
		}
	}
	size := unit.Exact(u.Factor)
	if !u.Dim.IsNone() {
		size += " " + u.Dim.Base()
	}
	switch {
	case name != "" && name != u.Symbol && u.Factor != 1:
		return name + ", " + size
	case name != "" && u.Factor == 1:
		return name
	case u.Factor == 1 && strings.ReplaceAll(u.Dim.Base(), "*", "") == u.Symbol:
		return u.Dim.Name()
	}
	return size
}

// nearby is how many declarations before and behind the place are looked at for
// what is used there.
const nearby = 20

// near calls f for the statements of the declarations near the place.
func (s *scope) near(f func(stmt *lang.Stmt)) {
	here := max(0, s.tree.DeclAt(s.offset))
	var visit func(list []*lang.Stmt)
	visit = func(list []*lang.Stmt) {
		for _, x := range list {
			if x != s.stmt {
				f(x)
			}
			if x.Body != nil {
				visit(x.Body.Stmts)
			}
		}
	}
	for i := max(0, here-nearby); i < min(len(s.tree.Decls), here+nearby+1); i++ {
		visit(s.tree.Decls[i].Stmts)
	}
}

// placeUnit is the unit that the trade uses at a place; "" for none of its own.
func (s *scope) placeUnit(d duty) string {
	usual := ""
	switch {
	case d.lead == "offset", s.head == "limit":
		usual = "mm"
	case d.name == "AREA" && s.head == "load":
		usual = "m2"
	default:
		if m := quantityPlaceholder.FindStringSubmatch(d.pattern.form.Snippet); m != nil {
			usual = m[1]
		}
	}
	return s.inSystem(usual)
}

// quantityPlaceholder matches a quantity that a snippet proposes.
var quantityPlaceholder = regexp.MustCompile(`\$\{\d+:-?[\d.]+ ([^}]+)\}`)

// usage is the units that are used around a place, the most used first.
type usage struct {
	same   []string // in statements with the same word, nearby
	block  []string // in the same block
	others []string // in other statements nearby
}

// use is a unit in a statement near the place.
type use struct {
	word   string // of the statement
	block  bool   // in the same block
	symbol string
	dim    unit.Dim
}

// uses are the units in the statements near the place; they are collected once.
func (s *scope) uses() []use {
	if s.collected != nil {
		return s.collected
	}
	s.collected = []use{}
	var own []*lang.Stmt
	if s.parent != nil && s.parent.Body != nil {
		own = s.parent.Body.Stmts
	}
	s.near(func(stmt *lang.Stmt) {
		block := slices.Contains(own, stmt)
		for _, a := range stmt.Args {
			a.Walk(func(e *lang.Expr) {
				if e.Kind == lang.QuantExpr && e.Unit.Symbol != "" {
					s.collected = append(s.collected, use{stmt.Word, block, e.Unit.Symbol, e.Unit.Dim})
				}
			})
		}
	})
	return s.collected
}

// usedUnits are the units of some dimensions that are used nearby; nil for all
// dimensions.
func (s *scope) usedUnits(dims []unit.Dim, word string) usage {
	same, block, others := map[string]int{}, map[string]int{}, map[string]int{}
	for _, u := range s.uses() {
		if dims != nil && !slices.Contains(dims, u.dim) {
			continue
		}
		switch {
		case u.word == word:
			same[u.symbol]++
		case u.block:
			block[u.symbol]++
		default:
			others[u.symbol]++
		}
	}
	ordered := func(count map[string]int) []string {
		var out []string
		for symbol := range count {
			out = append(out, symbol)
		}
		slices.SortFunc(out, func(a, b string) int { return cmp.Or(count[b]-count[a], strings.Compare(a, b)) })
		return out
	}
	return usage{ordered(same), ordered(block), ordered(others)}
}

// likelyUnit is the unit for a statement: that of such statements nearby, or of
// its block, or the usual one in the system of units that is used there.
func (s *scope) likelyUnit(usual, word string) string {
	u, err := unit.Parse(usual)
	if err != nil {
		return usual
	}
	used := s.usedUnits([]unit.Dim{u.Dim}, word)
	if list := append(used.same, used.block...); len(list) > 0 {
		return list[0]
	}
	return s.inSystem(usual)
}

// customary are the US customary units that stand for SI units.
var customary = map[string]string{
	"m": "ft", "mm": "in", "m2": "ft2", "cm2": "in2", "cm3": "in3", "cm4": "in4", "cm6": "in6", "kN": "kip", "kN/m": "klf", "kNm": "kip-ft",
	"MPa": "ksi", "GPa": "ksi", "kN/m2": "psf", "kg/m3": "pcf",
}

// inSystem is a unit in the system of units that is used nearby.
func (s *scope) inSystem(si string) string {
	other, ok := customary[si]
	if !ok {
		return si
	}
	balance := 0
	weigh := func(symbol string) {
		for _, c := range customary {
			if symbol == c || symbol == "psi" || symbol == "plf" || symbol == "kip-in" || symbol == "lbf" || symbol == "lb" {
				balance += 2
				break
			}
		}
		balance--
	}
	used := s.usedUnits(nil, "")
	for _, symbol := range slices.Concat(used.block, used.others) {
		weigh(symbol)
	}
	if balance == 0 {
		for _, u := range s.env.Basis.Show {
			weigh(u.Symbol)
		}
	}
	if balance > 0 {
		return other
	}
	return si
}

// showUnits are the units that results can be shown in; one of a dimension that
// the statement has already comes last.
func (s *scope) showUnits() []Item {
	has := map[unit.Dim]bool{}
	for _, e := range slices.Concat(s.before, s.after) {
		for _, part := range []string{e.Span.Of(s.text[s.start:]), e.Text} {
			if u, err := unit.Parse(part); err == nil {
				has[u.Dim] = true
			}
		}
	}
	var out []Item
	for _, dim := range []unit.Dim{unit.Force, unit.Moment, unit.Length, unit.Stress, unit.ForcePerLength, unit.Area, unit.Volume, unit.Length4, unit.Length6, unit.MassPerLength} {
		group := 0
		if has[dim] {
			group = 1
		}
		for _, u := range unit.For(dim) {
			if !begins(u.Symbol, strings.ToLower(s.typed())) {
				continue
			}
			out = append(out, Item{Label: u.Symbol, Detail: dim.Name(), Kind: UnitItem, Group: group, Eager: true, About: About{Of: "unit", Name: u.Symbol}})
		}
	}
	return out
}
