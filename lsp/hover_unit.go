package lsp

import (
	"math"
	"strings"

	"kern/checker/derivation"
	"kern/checker/output"
	"kern/lang"
	"kern/lang/unit"
)

// quantity writes about a number with its unit: with the cursor on the unit what
// the unit is, and in any case what the value is in other units.
func (h *hovering) quantity() {
	e, parent := h.expr(lang.QuantExpr)
	if e == nil {
		return
	}
	h.span = e.Span
	if e.Unit.Symbol == "" {
		return // reported as an error
	}
	q := unit.Quantity{Value: e.Value * e.Unit.Factor, Dim: e.Unit.Dim}
	if h.token.Kind == lang.Unit {
		h.span = h.token.Span()
		h.unit(e.Text, &q)
		return
	}
	if parent != nil && parent.Text == "ft-in" { // feet and inches are one length
		if whole, ok := h.eval(parent); ok {
			q, h.span = whole, parent.Span
		}
	}
	h.page.Text(output.Code(h.span.Of(h.at.Decl.Text)), output.Words(" is "+lang.A(q.Dim.Name())))
	h.conversions(q, e.Unit)
}

// unit writes what a unit is, its factor, and a value given in it, if there is
// one, in other units.
func (h *hovering) unit(text string, q *unit.Quantity) {
	u, err := unit.Parse(text)
	if err != nil {
		return
	}
	what := lang.A(u.Dim.Name())
	if name := unitName(text); name != "" {
		what = name + ", unit of " + u.Dim.Name()
	}
	h.page.Text(output.Strong(text), output.Words(": "+what))
	if base := u.Dim.Base(); u.Dim.IsNone() || base != text {
		line := "1 " + text + " = " + unit.Exact(u.Factor)
		if !u.Dim.IsNone() {
			line += " " + base
		}
		if source, exact := unitSource(text); source != "" {
			if exact {
				line += ", exactly"
			}
			line += " (" + source + ")"
		}
		h.page.Text(output.Words(line))
	}
	if q != nil {
		h.conversions(*q, u)
	}
}

// conversions writes a value in SI, in the unit that results are shown in, and in
// the usual ones that suit its size.
func (h *hovering) conversions(q unit.Quantity, written unit.Unit) {
	if q.Dim.IsNone() {
		h.page.Text(output.Words(unit.Short(q.Value/written.Factor, 12) + " " + written.Symbol + " = " + unit.Short(q.Value, 12)))
		return
	}
	var rows [][]output.Line
	seen := map[float64]bool{}
	add := func(u unit.Unit, why string) {
		if !(u.Factor > 0) || seen[u.Factor] {
			return
		}
		seen[u.Factor] = true
		rows = append(rows, []output.Line{output.Words(unit.Short(q.Value/u.Factor, 7)), output.Code(u.Symbol), output.Words(why)})
	}
	add(written, "as written")
	show := h.units()
	if stated, ok := show[q.Dim]; ok {
		add(stated, "shown in results")
	} else {
		add(show.For(q.Dim), "shown in results")
	}
	if base, err := unit.Parse(q.Dim.Base()); err == nil {
		add(base, "SI")
	}
	for _, u := range unit.For(q.Dim) {
		if a := math.Abs(q.Value / u.Factor); len(rows) < 7 && (q.Value == 0 || a >= 0.1 && a < 1e5) {
			add(u, "")
		}
	}
	h.page.Table([]string{"value", "unit", ""}, "rll", rows)
}

// atoms are the units that others are made of, by symbol.
var atoms = func() map[string]unit.Atom {
	out := map[string]unit.Atom{}
	for _, a := range unit.Atoms() {
		out[a.Symbol] = a
	}
	return out
}()

// unitParts cuts a unit into its atoms, each with the sign before it ('*' or '/')
// and its exponent as written. It is nil for a text with something else in it.
func unitParts(text string) []unitPart {
	var out []unitPart
	sign := byte('*')
	for text != "" {
		end := strings.IndexAny(text, "*/·")
		piece, rest, next := text, "", byte(0)
		if end >= 0 {
			piece, next = text[:end], text[end]
			rest = text[end+1:]
			if strings.HasPrefix(text[end:], "·") {
				rest, next = text[end+len("·"):], '*'
			}
		}
		atom := strings.TrimRight(piece, "0123456789^²³⁴⁵⁶()")
		if a, ok := atoms[atom]; ok {
			out = append(out, unitPart{sign, a, strings.Trim(piece[len(atom):], "^")})
		} else if piece != "1" {
			return nil
		}
		sign, text = next, rest
	}
	return out
}

type unitPart struct {
	sign     byte
	atom     unit.Atom
	exponent string
}

var powers = map[string]string{"2": "square ", "²": "square ", "3": "cubic ", "³": "cubic "}

// unitName is the name of a unit in words, "" for one that has none.
func unitName(text string) string {
	var b strings.Builder
	for i, p := range unitParts(text) {
		switch {
		case p.sign == '/':
			b.WriteString(" per ")
		case i > 0:
			b.WriteString(" ")
		}
		if p.exponent != "" && strings.Contains(p.atom.Name, " ") {
			return "" // the exponent belongs to the second half of the name
		}
		power, known := powers[p.exponent]
		b.WriteString(power + p.atom.Name)
		if p.exponent != "" && !known {
			b.WriteString(" to the power of " + p.exponent)
		}
	}
	return strings.TrimSpace(b.String())
}

// unitSource is where the factor of a unit is defined and whether it is written
// without rounding; "" for a unit made of several.
func unitSource(text string) (string, bool) {
	if a, ok := atoms[text]; ok {
		return a.Source, a.Exact
	}
	return "", false
}

// customary tells whether a unit is one of the US customary ones, alone or in
// part.
func customary(u unit.Unit) bool {
	for _, p := range unitParts(u.Symbol) {
		if strings.HasPrefix(p.atom.Source, "NIST SP 811, B.8") {
			return true
		}
	}
	return false
}

// quantityText writes a value in the unit that the basis states for it, or in a
// usual one that suits its size.
func quantityText(units derivation.Units, q unit.Quantity) string {
	if q.Dim.IsNone() {
		return unit.Short(q.Value, 5)
	}
	u := suitable(units, q)
	return unit.Short(q.Value/u.Factor, 5) + " " + u.Symbol
}

// plainUnits are the units that a value without a stated one is shown in, where
// the usual ones would be more than an engineer thinks in.
var plainUnits = map[unit.Dim]string{unit.Length: "mm m", unit.Area: "mm2 m2", unit.Volume: "cm3 m3", unit.Force: "kN N MN", unit.Stress: "N/mm2 kN/m2", unit.Moment: "kNm", unit.Mass: "kg t"}

// suitable is the unit to show a value in.
func suitable(units derivation.Units, q unit.Quantity) unit.Unit {
	if u, stated := units[q.Dim]; stated {
		if a := math.Abs(q.Value / u.Factor); a == 0 || a >= 0.01 && a < 1e6 {
			return u
		}
	}
	size := func(u unit.Unit) bool {
		a := math.Abs(q.Value / u.Factor)
		return a == 0 || a >= 0.1 && a < 1e5
	}
	if text, ok := plainUnits[q.Dim]; ok {
		for symbol := range strings.FieldsSeq(text) {
			if u, err := unit.Parse(symbol); err == nil && size(u) {
				return u
			}
		}
	}
	return units.For(q.Dim)
}
