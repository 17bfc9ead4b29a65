package sheet

import (
	"regexp"
	"strings"

	"kern/checker/output"
)

// clean turns what is no letter and would steer the reader's program into blanks:
// control characters and those that turn the direction of writing.
func clean(s string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r < 32 || r == 127 || r >= 0x80 && r < 0xa0,
			r == 0x202d || r == 0x202e || r >= 0x2066 && r <= 0x2069 || r == 0x2028 || r == 0x2029:
			return ' '
		}
		return r
	}, s)
}

// power is a unit with a power behind a number or a stroke.
var power = regexp.MustCompile(`(\d\s|/)(mm|cm|m|in|ft)([2346])\b`)

// raised sets the powers of units as raised digits.
func raised(s string) string {
	if !strings.ContainsAny(s, "2346") {
		return s
	}
	return power.ReplaceAllStringFunc(s, func(m string) string {
		return m[:len(m)-1] + map[byte]string{'2': "²", '3': "³", '4': "⁴", '6': "⁶"}[m[len(m)-1]]
	})
}

// quantity is a cell of a column of numbers in its parts.
type quantity struct {
	whole    string // the digits before the point, with the sign; all of a cell that is no number
	decimals string // the point and what follows
	unit     string
	numeric  bool
}

var quantityForm = regexp.MustCompile(`^(-?[\d_]+)(\.\d+)?(e[-+]?\d+)?(?: (\S.*))?$`)

func quantityOf(s string) quantity {
	m := quantityForm.FindStringSubmatch(s)
	if m == nil {
		return quantity{whole: s}
	}
	return quantity{whole: strings.Replace(m[1], "-", "−", 1), decimals: m[2] + strings.Replace(m[3], "-", "−", 1), unit: m[4], numeric: true}
}

func (q quantity) number() string { return q.whole + q.decimals }

// column is what the cells of a column of numbers need.
type column struct {
	decimals int  // letters behind the whole number, the point counted
	units    bool // some cells have a unit
}

func columnsOf(t output.Table) []column {
	out := make([]column, len(t.Head))
	for i := range t.Head {
		if t.Align[i] != 'n' {
			continue
		}
		for _, cells := range t.Rows {
			if i < len(cells) {
				q := quantityOf(cells[i].String())
				out[i].decimals = max(out[i].decimals, len(q.decimals))
				out[i].units = out[i].units || q.unit != ""
			}
		}
	}
	return out
}

// raisedUnit is a unit by itself with raised powers.
func raisedUnit(s string) string { return strings.TrimPrefix(raised("1 "+s), "1 ") }
