package model

import (
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"math"
	"slices"
	"sort"
	"strings"
	"unicode/utf8"

	"kern/lang"
	"kern/lang/unit"
)

// maxTableProblems bounds what is said about one table.
const maxTableProblems = 50

// column is what a column of a table holds.
type column struct {
	name  string
	dim   unit.Dim
	into  int // 0 N, 1 and 2 M, 3 and 4 V, 5 position
	label string
}

var tableColumns = []column{
	{"N", unit.Force, 0, "the axial force"},
	{"M_major", unit.Moment, 1, "the moment about the major axis"}, {"M_minor", unit.Moment, 2, "the moment about the minor axis"},
	{"V_major", unit.Force, 3, "the shear force that goes with M_major"}, {"V_minor", unit.Force, 4, "the shear force that goes with M_minor"},
	{"position", unit.Length, 5, "the height above the member's base"},
}

// rows are the lines of a table about one member.
type rows struct {
	first        lang.Place
	order        []string // combinations as they come
	combinations map[string][]row
	bad          bool
}

// row is one line of a table.
type row struct {
	at     float64
	value  [5]float64 // as tableColumns counts them
	place  lang.Place // of the line
	placed bool       // it gives a position
}

type tableReader struct {
	b       *builder
	file    *lang.File
	from    lang.Place // the statement's
	sign    float64
	said    int
	members map[string]*rows
	order   []string

	reader *csv.Reader
	starts []int32 // where each line begins
	header []*column
	factor []float64
	member int // columns of what has no unit
	under  int
}

func (t *tableReader) problem(span lang.Span, rule, format string, args ...any) {
	t.said++
	switch {
	case t.said > maxTableProblems+1:
		return
	case t.said == maxTableProblems+1:
		rule, format, args = "wrong-table", "more is wrong in this table than is said here", nil
	}
	t.b.report(lang.Diagnostic{Decl: t.file.Decls[0], Problem: lang.Problem{Rule: rule, Span: span, Message: fmt.Sprintf(format, args...),
		Related: []lang.Related{{Place: t.from, Message: "the table is named here"}}}})
}

// span is where a field stands, without its quotes.
func (t *tableReader) span(field int) lang.Span {
	line, col := t.reader.FieldPos(field)
	start := t.starts[line-1] + int32(col-1)
	text := t.file.Text
	end := start
	if int(start) < len(text) && text[start] == '"' {
		start++
		for end = start; int(end) < len(text) && text[end] != '"'; end++ {
		}
		return lang.Span{Start: start, End: end}
	}
	for int(end) < len(text) && rune(text[end]) != t.reader.Comma && text[end] != '\n' && text[end] != '\r' {
		end++
	}
	for end > start && (text[end-1] == ' ' || text[end-1] == '\t') {
		end--
	}
	return lang.Span{Start: start, End: end}
}

// line is the whole line that the record last read begins on.
func (t *tableReader) line() lang.Span {
	n, _ := t.reader.FieldPos(0)
	return t.lineAt(n)
}

func (t *tableReader) lineAt(n int) lang.Span {
	start := t.starts[min(max(n, 1), len(t.starts))-1]
	end := int32(len(t.file.Text))
	if i := strings.IndexAny(t.file.Text[start:], "\r\n"); i >= 0 {
		end = start + int32(i)
	}
	return lang.Span{Start: start, End: end}
}

// read goes through the table and hands each member its forces. It is false when
// some lines could not be told to belong to a member.
func (t *tableReader) read() bool {
	text := t.file.Text
	t.starts = []int32{0}
	for i := range len(text) {
		if text[i] == '\n' {
			t.starts = append(t.starts, int32(i+1))
		}
	}
	body := text
	if strings.HasPrefix(body, "\ufeff") {
		// the reader counts columns from the mark on
		body = "   " + body[3:]
	}
	if !utf8.ValidString(text) {
		t.problem(lang.Span{}, "not-text", "the table is not UTF-8 text")
		return false
	}
	t.reader = csv.NewReader(strings.NewReader(body))
	t.reader.Comma, t.reader.Comment, t.reader.FieldsPerRecord, t.reader.TrimLeadingSpace = separator(body), '#', -1, true
	record, err := t.reader.Read()
	if errors.Is(err, io.EOF) {
		t.problem(lang.Span{}, "wrong-table", "the table is empty: its first line names the columns, such as member, position [m], combination, N [kN], M_major [kNm]")
		return false
	}
	if t.fault(err) || !t.head(record) {
		return false
	}
	fine := true
	for {
		record, err = t.reader.Read()
		if errors.Is(err, io.EOF) {
			break
		}
		if t.fault(err) {
			return false
		}
		if len(record) == 1 && strings.TrimSpace(record[0]) == "" {
			continue
		}
		fine = t.row(record) && fine
	}
	for _, name := range t.order {
		t.give(name, t.members[name])
	}
	t.tension()
	return fine
}

// tension warns where nothing in the table is compressed: columns are, as a rule.
func (t *tableReader) tension() {
	pulled := false
	for _, name := range t.order {
		for _, list := range t.members[name].combinations {
			for _, r := range list {
				if !(r.value[0] < 0) {
					return
				}
				pulled = true
			}
		}
	}
	if pulled {
		t.b.report(lang.Diagnostic{Decl: t.from.Decl, Problem: lang.Problem{Rule: "implausible-load", Severity: lang.Warning, Span: t.from.Span,
			Message: "all members of this table are in tension throughout: is the sign of compression meant?"}})
	}
}

// separator guesses what parts the columns from the first line that is no
// comment.
func separator(text string) rune {
	for _, line := range strings.Split(text[:min(len(text), 1<<16)], "\n") {
		if line = strings.TrimSpace(line); line == "" || line[0] == '#' {
			continue
		}
		switch {
		case strings.Contains(line, "\t"):
			return '\t'
		case strings.Contains(line, ";"):
			return ';'
		}
		break
	}
	return ','
}

// fault reports what is no table of values.
func (t *tableReader) fault(err error) bool {
	if err == nil {
		return false
	}
	var p *csv.ParseError
	if errors.As(err, &p) {
		t.problem(t.lineAt(p.Line), "wrong-table", "this is no line of a table: a quotation mark stands where none can (%v)", p.Err)
	} else {
		t.problem(lang.Span{}, "wrong-table", "the table cannot be read: %v", err)
	}
	return true
}

// head reads the first line: which column holds what, in which unit.
func (t *tableReader) head(record []string) bool {
	t.member, t.under = -1, -1
	t.header, t.factor = make([]*column, len(record)), make([]float64, len(record))
	fine := true
	seen := map[string]int{}
	for i, field := range record {
		name, symbol, hasUnit := strings.Cut(strings.TrimSpace(field), "[")
		name, symbol = strings.TrimSpace(name), strings.TrimSuffix(strings.TrimSpace(symbol), "]")
		if first, twice := seen[name]; twice && name != "" {
			t.problem(t.span(i), "value-given-twice", "the column %s is given twice, as column %d and %d", clip(name), first+1, i+1)
			fine = false
			continue
		}
		seen[name] = i
		switch name {
		case "member":
			t.member = i
			continue
		case "combination":
			t.under = i
			continue
		}
		k := slices.IndexFunc(tableColumns, func(c column) bool { return c.name == name })
		if k < 0 {
			names := []string{"member", "combination"}
			for _, c := range tableColumns {
				names = append(names, c.name)
			}
			if near, _ := nearest(name, names, 1); len(near) > 0 {
				t.problem(t.span(i), "wrong-table", "there is no column '%s'; did you mean %s?", clip(name), near[0])
				fine = false
			}
			continue // figures that are of no use here
		}
		c := &tableColumns[k]
		u, err := unit.Parse(symbol)
		switch {
		case !hasUnit:
			t.problem(t.span(i), "missing-unit", "%s needs a unit of %s in its header: %s [%s]", c.label, c.dim.Name(), c.name, unit.For(c.dim)[0].Symbol)
			fine = false
		case err != nil:
			t.problem(t.span(i), "unknown-unit", "'%s' is no unit", clip(symbol))
			fine = false
		case u.Dim != c.dim:
			t.problem(t.span(i), "wrong-unit", "%s needs a unit of %s; '%s' is one of %s", c.label, c.dim.Name(), clip(symbol), u.Dim.Name())
			fine = false
		}
		t.header[i], t.factor[i] = c, u.Factor
	}
	for _, need := range []string{"member", "combination", "N"} {
		if _, ok := seen[need]; !ok && fine {
			t.problem(t.line(), "wrong-table", "the table has no column '%s'; its first line names the columns, such as member, position [m], combination, N [kN], M_major [kNm]", need)
			fine = false
		}
	}
	return fine
}

// row reads one line. It is false when nobody can tell which member it is about.
func (t *tableReader) row(record []string) bool {
	line := t.line()
	name := ""
	if t.member < len(record) {
		name = strings.TrimSpace(record[t.member])
	}
	if name == "" {
		t.problem(line, "wrong-table", "this line names no member")
		return false
	}
	m := t.members[name]
	if m == nil {
		m = &rows{first: lang.Place{Decl: t.file.Decls[0], Span: line}, combinations: map[string][]row{}}
		t.members[name] = m
		t.order = append(t.order, name)
		if n := t.b.env.Names[name]; n == nil || n.Kind != MemberName {
			p := t.b.env.unknownName(&lang.Expr{Text: name, Span: t.span(t.member)}, "member", []NameKind{MemberName})
			t.problem(p.Span, p.Rule, "%s", p.Message)
			m.bad = true
		}
	}
	if len(record) != len(t.header) {
		t.problem(line, "wrong-table", "this line has %d columns, and the first has %d", len(record), len(t.header))
		m.bad = true
		return true
	}
	out := row{place: lang.Place{Decl: t.file.Decls[0], Span: line}, value: [5]float64{math.NaN(), 0, 0, 0, 0}}
	for i, c := range t.header {
		if c == nil {
			continue
		}
		v, why := number(record[i])
		if why != "" {
			t.problem(t.span(i), "bad-number", "%s is due here: %s", c.label, why)
			m.bad = true
			continue
		}
		v *= t.factor[i]
		if c.into == 5 {
			out.at, out.placed = v, true
		} else {
			out.value[c.into] = v
		}
	}
	out.value[0] *= t.sign
	under := strings.TrimSpace(record[t.under])
	if under == "" {
		t.problem(line, "wrong-table", "this line names no combination")
		m.bad = true
		return true
	}
	if _, known := m.combinations[under]; !known {
		m.order = append(m.order, under)
	}
	m.combinations[under] = append(m.combinations[under], out)
	return true
}

// number reads a figure as strictly as the language: a decimal point, no unit, no
// spaces within.
func number(s string) (float64, string) {
	s = strings.TrimSpace(s)
	if s == "" {
		return math.NaN(), "there is none"
	}
	tokens := lang.Tokens(strings.TrimPrefix(strings.TrimPrefix(s, "-"), "+"))
	tree := lang.Parse(&lang.FileID{}, "x = "+strings.TrimPrefix(s, "+"), nil)
	if len(tokens) == 1 && tokens[0].Kind == lang.Number && len(tree.Decls) == 1 && len(tree.Decls[0].Problems) == 0 && len(tree.Decls[0].Stmts) == 1 {
		if value, ok := tree.Decls[0].Stmts[0].Assigned(); ok && len(value) == 1 {
			if q, p := lang.Eval(value[0], nil); p == nil {
				return q.Value, ""
			}
		}
	}
	if strings.Count(s, ",") == 1 && !strings.Contains(s, ".") {
		return math.NaN(), "'" + clip(s) + "' has a decimal comma; write " + clip(strings.Replace(s, ",", ".", 1))
	}
	return math.NaN(), "'" + clip(s) + "' is no number"
}

// give hands a member what the table says of it.
func (t *tableReader) give(name string, m *rows) {
	show := t.b.env.Basis.Show
	env := t.b.env
	if env.imported == nil {
		env.imported = map[string]*Imported{}
	}
	if twice := env.imported[name]; twice != nil {
		t.problem(m.first.Span, "value-given-twice", "the forces of %s stand in '%s' already", name, twice.Table)
		twice.Combinations = nil
		return
	}
	in := &Imported{Table: t.file.Name, Place: m.first}
	env.imported[name] = in // without combinations when something is wrong: its forces are not known
	if m.bad {
		return
	}
	for _, c := range t.header {
		if c != nil && c.into >= 1 && c.into <= 2 {
			in.Bends[c.into-1] = true
		}
		if c != nil && (c.into == 3 || c.into == 4) {
			in.Sheared[c.into-3] = true
		}
	}
	in.Single = true
	var heights []float64
	for _, under := range m.order {
		list := m.combinations[under]
		sort.SliceStable(list, func(i, j int) bool { return list[i].at < list[j].at })
		in.Single = in.Single && len(list) == 1
		for _, r := range list {
			heights = append(heights, r.at)
		}
	}
	slices.Sort(heights)
	for _, z := range heights {
		if n := len(in.Positions); n == 0 || z-in.Positions[n-1] > 1e-6 {
			in.Positions = append(in.Positions, z)
		}
	}
	if in.Single {
		in.Positions = []float64{0, math.Inf(1)} // up to the top, wherever that is
	}
	for _, under := range m.order {
		list := m.combinations[under]
		c := ImportedCombination{Name: under}
		for i := range len(in.Positions) - 1 {
			span, ok := between(list, in, i)
			if !ok {
				t.problem(list[0].place.Span, "wrong-table", "%s under '%s' has forces from %s to %s, and under another combination from %s to %s: all combinations go from the base to the top",
					name, clip(under), show.Place(list[0].at), show.Place(list[len(list)-1].at), show.Place(in.Positions[0]), show.Place(in.Positions[len(in.Positions)-1]))
				in.Combinations = nil
				return
			}
			c.Spans = append(c.Spans, span)
		}
		in.Combinations = append(in.Combinations, c)
	}
	for a := range 2 {
		if in.Sheared[a] && in.Bends[a] && !in.Single {
			t.slopes(name, in, a)
		}
	}
}

// between gives the forces between two neighbouring positions; two lines at one
// position are just below and just above it.
func between(list []row, in *Imported, i int) (ImportedSpan, bool) {
	var out ImportedSpan
	if in.Single {
		r := list[0]
		out.N = [2]float64{r.value[0], r.value[0]}
		for a := range 2 {
			out.M[a] = [2]float64{r.value[1+a], r.value[1+a]}
			out.V[a] = [2]float64{r.value[3+a], r.value[3+a]}
		}
		return out, true
	}
	const eps = 1e-6
	lower, upper := in.Positions[i], in.Positions[i+1]
	below := -1 // the last line at or below the lower position
	for k, r := range list {
		if r.at <= lower+eps {
			below = k
		}
	}
	if below < 0 || below+1 >= len(list) {
		return out, false
	}
	a, b := list[below], list[below+1]
	at := func(z float64, k int) float64 {
		if b.at-a.at <= eps {
			return a.value[k]
		}
		return a.value[k] + (b.value[k]-a.value[k])*(z-a.at)/(b.at-a.at)
	}
	out.N = [2]float64{at(lower, 0), at(upper, 0)}
	for axis := range 2 {
		out.M[axis] = [2]float64{at(lower, 1+axis), at(upper, 1+axis)}
		out.V[axis] = [2]float64{at(lower, 3+axis), at(upper, 3+axis)}
	}
	return out, true
}

// slopes holds the shear forces against the slope of the moments. They are that,
// in one sign or the other; where they are not, a load acts between the positions
// and the moment between them is not known.
func (t *tableReader) slopes(name string, in *Imported, axis int) {
	show := t.b.env.Basis.Show
	off := func(sign float64, c *ImportedCombination, i int) float64 {
		s, l := c.Spans[i], in.Positions[i+1]-in.Positions[i]
		size := math.Max(math.Max(math.Abs(s.M[axis][0]), math.Abs(s.M[axis][1])), l*math.Max(math.Abs(s.V[axis][0]), math.Abs(s.V[axis][1])))
		return math.Abs(s.M[axis][1]-s.M[axis][0]-sign*l*(s.V[axis][0]+s.V[axis][1])/2) / math.Max(size, 1)
	}
	total := map[float64]float64{}
	for _, sign := range []float64{1, -1} {
		for k := range in.Combinations {
			for i := range in.Combinations[k].Spans {
				total[sign] += off(sign, &in.Combinations[k], i)
			}
		}
	}
	sign := 1.0
	if total[-1] < total[1] {
		sign = -1
	}
	for k := range in.Combinations {
		c := &in.Combinations[k]
		for i := range c.Spans {
			if off(sign, c, i) > 0.02 {
				t.problem(t.members[name].combinations[c.Name][0].place.Span, "wrong-table",
					"under '%s', between %s and %s, %s is not the slope of %s: give the forces where loads act too", clip(c.Name),
					show.Place(in.Positions[i]), show.Place(in.Positions[i+1]), tableColumns[3+axis].name, tableColumns[1+axis].name)
				in.Combinations = nil
				return
			}
			for e := range c.Spans[i].V[axis] {
				c.Spans[i].V[axis][e] *= sign
			}
		}
	}
}
