package output

import (
	"bufio"
	"fmt"
	"io"
	"strings"
	"unicode/utf8"

	"kern/checker"
	"kern/checker/model"
	"kern/checker/record"
	"kern/checker/standard"
	"kern/lang"

	"github.com/fatih/color"
	"github.com/mattn/go-runewidth"
)

// Style says how text may look.
type Style struct {
	Colour bool
	Width  int // columns of the terminal, 0 when it is none
}

type printer struct {
	w     *bufio.Writer
	style Style
	lines *index
	names Names
}

func (p *printer) paint(s string, a ...color.Attribute) string {
	if !p.style.Colour {
		return s
	}
	c := color.New(a...)
	c.EnableColor()
	return c.Sprint(s)
}

// Text writes a report for people: each diagnostic with the line it is about,
// then a table of the members. known is what a comparison with recorded results
// came to, nil without one.
func Text(w io.Writer, r *checker.Report, style Style, names Names, known *record.Outcome) error {
	p := &printer{w: bufio.NewWriter(w), style: style, lines: newIndex(r.Project), names: names}
	for i, d := range r.Diagnostics {
		// several failing checks of one member share its line
		again := i > 0 && d.Member != "" && d.File == r.Diagnostics[i-1].File && d.Span == r.Diagnostics[i-1].Span
		if i > 0 && !again {
			fmt.Fprintln(p.w)
		}
		p.diagnostic(d, again)
	}
	if len(r.Diagnostics) > 0 {
		fmt.Fprintln(p.w)
	}
	p.table(r)
	p.summary(r, known)
	return p.w.Flush()
}

func (p *printer) severity(s lang.Severity) string {
	word := s.String()
	switch s {
	case lang.Error:
		return p.paint(word, color.FgRed, color.Bold)
	case lang.Warning:
		return p.paint(word, color.FgYellow, color.Bold)
	}
	return p.paint(word, color.FgCyan)
}

func (p *printer) diagnostic(d checker.Diagnostic, again bool) {
	at := p.lines.span(d.File, d.Span)
	fmt.Fprintf(p.w, "%s:%d:%d: %s %s\n", p.names(d.File), at.Start.Line, at.Start.Column, p.severity(d.Severity), p.paint(d.Rule, color.Faint))
	if !again {
		p.source(d, at)
	}
	p.wrapped("    ", d.Message)
	for _, n := range d.Notes {
		p.wrapped("    ", n)
	}
	for _, rel := range d.Related {
		if again {
			break
		}
		where := p.lines.span(rel.File, rel.Span).Start
		fmt.Fprintf(p.w, "    %s:%d:%d: %s\n", p.names(rel.File), where.Line, where.Column, rel.Message)
	}
	if len(d.Fixes) > 0 {
		var titles []string
		for _, f := range d.Fixes {
			titles = append(titles, strings.ToLower(f.Title[:1])+f.Title[1:])
		}
		fmt.Fprintf(p.w, "    %s %s\n", p.paint("to mend:", color.FgGreen), strings.Join(titles, ", or "))
	}
}

// source shows the line of a diagnostic with a mark under what it is about. A
// long line is shown around the mark.
func (p *printer) source(d checker.Diagnostic, at span) {
	f := p.lines.project.Files[d.File]
	if f == nil || f.Unreadable != "" {
		return
	}
	l := p.lines.of(d.File)
	line := l.Line(d.Span.Start)
	text := l.Text(line)
	from := int(d.Span.Start - l.Start(line))
	to := min(int(d.Span.End-l.Start(line)), len(text))
	if from > len(text) {
		from = len(text)
	}
	to = max(to, from)
	const room = 100
	cutLeft, cutRight := "", ""
	if len(text) > room {
		start := max(0, from-room/3)
		for start > 0 && !utf8.RuneStart(text[start]) {
			start--
		}
		end := min(len(text), max(start+room, min(to, start+room)))
		for end < len(text) && !utf8.RuneStart(text[end]) {
			end++
		}
		if start > 0 {
			cutLeft = "…"
		}
		if end < len(text) {
			cutRight = "…"
		}
		text = text[start:end]
		from, to = from-start, min(to-start, len(text))
	}
	visible := func(s string) string {
		return strings.Map(func(r rune) rune {
			switch {
			case r == '\t':
				return ' '
			case r < 32 || r == 127 || r == utf8.RuneError || r >= 0x80 && r < 0xa0 || r == 0x202e || r == 0x202d || r >= 0x2066 && r <= 0x2069:
				return '·' // control characters would let a file write on the terminal
			}
			return r
		}, s)
	}
	before, marked, after := visible(text[:from]), visible(text[from:to]), visible(text[to:])
	trimmed := strings.TrimLeft(before, " ")
	if cutLeft == "" {
		before = trimmed
	}
	fmt.Fprintf(p.w, "        %s%s%s%s%s\n", cutLeft, before, marked, strings.TrimRight(after, " "), cutRight)
	width := max(1, runewidth.StringWidth(marked))
	fmt.Fprintf(p.w, "        %s%s\n", strings.Repeat(" ", runewidth.StringWidth(cutLeft+before)), p.paint(strings.Repeat("~", width), color.FgRed))
}

// wrapped writes a paragraph within the width of the terminal.
func (p *printer) wrapped(indent, s string) {
	width := p.style.Width
	if width <= 0 || width > 110 {
		width = 110
	}
	width = max(40, width) - len(indent)
	line := ""
	flush := func() {
		if line != "" {
			fmt.Fprintln(p.w, indent+line)
			line = ""
		}
	}
	for _, word := range strings.Fields(s) {
		if line != "" && runewidth.StringWidth(line)+1+runewidth.StringWidth(word) > width {
			flush()
		}
		if line != "" {
			line += " "
		}
		line += word
	}
	flush()
}

// table lists the members with their utilisation and governing check.
func (p *printer) table(r *checker.Report) {
	if len(r.Members) == 0 {
		return
	}
	head := []string{"member", "section", "verdict", "utilisation", "governing check", "under"}
	rows := make([][]string, len(r.Members))
	for i, m := range r.Members {
		governing := m.Governing
		if m.Lift != "" {
			governing += ", " + m.Lift
		}
		rows[i] = []string{m.Name, sectionsOf(m.Member), m.Verdict.String(), checker.Ratio(m.Utilisation), dash(governing), dash(m.Combination)}
		if len(m.Departures) > 0 {
			rows[i][2] += ", departs"
		}
	}
	width := make([]int, len(head))
	for i, h := range head {
		width[i] = runewidth.StringWidth(h)
	}
	for _, row := range rows {
		for i, c := range row {
			width[i] = max(width[i], runewidth.StringWidth(c))
		}
	}
	line := func(row []string, paint func(i int, s string) string) {
		var b strings.Builder
		for i, c := range row {
			gap := strings.Repeat(" ", width[i]-runewidth.StringWidth(c))
			if i > 0 {
				b.WriteString("  ")
			}
			if head[i] == "utilisation" {
				b.WriteString(gap + paint(i, c))
			} else {
				b.WriteString(paint(i, c) + gap)
			}
		}
		fmt.Fprintln(p.w, strings.TrimRight(b.String(), " "))
	}
	line(head, func(_ int, s string) string { return p.paint(s, color.Underline) })
	for k, row := range rows {
		line(row, func(i int, s string) string {
			if i != 2 {
				return s
			}
			switch r.Members[k].Verdict {
			case standard.Passes:
				return p.paint(s, color.FgGreen)
			case standard.Fails:
				return p.paint(s, color.FgRed, color.Bold)
			}
			return p.paint(s, color.FgYellow)
		})
	}
	fmt.Fprintln(p.w)
}

// sectionsOf names the sections of a member from the base up.
func sectionsOf(m *model.Member) string {
	var names []string
	for _, l := range m.Parts() {
		if l.Section != nil && (len(names) == 0 || names[len(names)-1] != l.Section.Title()) {
			names = append(names, l.Section.Title())
		}
	}
	return dash(strings.Join(names, ", "))
}

func dash(s string) string {
	if s == "" {
		return "–"
	}
	return s
}

func (p *printer) summary(r *checker.Report, known *record.Outcome) {
	fmt.Fprintln(p.w, Counts(r.Summary))
	if known != nil {
		for _, e := range known.Carried {
			fmt.Fprintf(p.w, "%s %s %s: %s\n", p.paint("carried:", color.FgYellow), e.Name, e.Verdict, e.Carried)
		}
		for _, d := range known.Differences {
			fmt.Fprintf(p.w, "%s %s: %s %s\n", p.paint("not as recorded:", color.FgRed, color.Bold), d.File, d.Name, d.Message)
		}
		switch n := len(known.Differences); {
		case n == 0:
			fmt.Fprintln(p.w, "all results are as recorded")
		case n == 1:
			fmt.Fprintln(p.w, "1 result is not as recorded; if that is meant, run kern record")
		default:
			fmt.Fprintf(p.w, "%d results are not as recorded; if that is meant, run kern record\n", n)
		}
		if n := len(known.Carried); n > 0 {
			fmt.Fprintln(p.w, carriedCount(n))
		}
	}
	fmt.Fprintln(p.w, p.paint(Caution, color.Faint))
}

// Counts says how many members there are, and how they do.
func Counts(s checker.Summary) string {
	var parts []string
	count := func(n int, one, many string) {
		if n == 1 {
			parts = append(parts, "1 "+one)
		} else if n > 1 {
			parts = append(parts, fmt.Sprintf("%d %s", n, many))
		}
	}
	if s.Members == 0 {
		parts = append(parts, "no members")
	} else {
		count(s.Members, "member", "members")
		parts[0] += fmt.Sprintf(": %d passes, %d fails, %d undecided", s.Passes, s.Fails, s.Undecided)
		if s.Passes != 1 {
			parts[0] = strings.Replace(parts[0], "passes", "pass", 1)
		}
		if s.Fails != 1 {
			parts[0] = strings.Replace(parts[0], "fails", "fail", 1)
		}
	}
	count(s.Departures, "departure", "departures")
	count(s.Errors, "error", "errors")
	count(s.Warnings, "warning", "warnings")
	return strings.Join(parts, "; ")
}
