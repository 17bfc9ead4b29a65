package schedule

import (
	"encoding/csv"
	"io"
	"math"
	"strconv"
	"strings"

	"kern/checker/output"
)

// Text writes the schedule for a terminal, or as Markdown.
func (s *Schedule) Text(w io.Writer, markdown bool) error {
	p := output.NewPage(markdown)
	table := func(columns []Column, rows [][]Cell) {
		var head []string
		align := ""
		for _, c := range columns {
			head = append(head, c.Head())
			align += map[bool]string{true: "r", false: "l"}[c.Number]
		}
		var lines [][]output.Line
		for _, row := range rows {
			var line []output.Line
			for i, c := range columns {
				line = append(line, output.Words(c.Shown(row[i])))
			}
			lines = append(lines, line)
		}
		p.Table(head, align, lines)
	}
	if len(s.Rows) == 0 {
		p.Text(output.Words("The files describe no member."))
	} else {
		table(s.lean())
		for _, r := range s.Remarks {
			p.Text(output.Words(r))
		}
		table(steelColumns, s.steelRows())
	}
	p.Text(output.Words(output.Caution))
	_, err := io.WriteString(w, p.String())
	return err
}

// CSV writes the table of members by RFC 4180, for programs: full precision, a point
// for decimals, an empty field for what is not known. The steel is left out: a file
// holds one table.
func (s *Schedule) CSV(w io.Writer) error {
	c := csv.NewWriter(w)
	c.UseCRLF = true
	var head []string
	for _, x := range s.Columns {
		head = append(head, x.Head())
	}
	if err := c.Write(head); err != nil {
		return err
	}
	for _, row := range s.Rows {
		var fields []string
		for i, x := range s.Columns {
			fields = append(fields, field(x, row[i]))
		}
		if err := c.Write(fields); err != nil {
			return err
		}
	}
	c.Flush()
	return c.Error()
}

// field is a cell of CSV. Words never begin with a sign that a spreadsheet takes for
// a formula.
func field(c Column, x Cell) string {
	switch {
	case !c.Number:
		return harmless(x.Text)
	case math.IsNaN(x.Value) || math.IsInf(x.Value, 0):
		return ""
	}
	return strconv.FormatFloat(clear(x.Value), 'g', 15, 64)
}

// clear takes off what a unit's factor adds in the sixteenth digit.
func clear(v float64) float64 {
	if math.Abs(v) < 1e-9 {
		return 0
	}
	r, err := strconv.ParseFloat(strconv.FormatFloat(v, 'g', 12, 64), 64)
	if err != nil {
		return v
	}
	return r
}

func harmless(s string) string {
	switch {
	case s == "–":
		return ""
	case strings.HasPrefix(s, "-"):
		return "−" + s[1:]
	case strings.HasPrefix(s, "=") || strings.HasPrefix(s, "+") || strings.HasPrefix(s, "@"):
		return "'" + s
	}
	return s
}
