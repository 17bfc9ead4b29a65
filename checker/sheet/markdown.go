package sheet

import (
	"fmt"
	"io"
	"strings"
	"unicode"

	"kern/checker/output"
)

// Markdown writes the sheet for places where text is read: pictures in words,
// formulas as text of the language.
func (s *Sheet) Markdown(w io.Writer) error {
	var b strings.Builder
	b.WriteString(plainPage(s.Blocks[:s.contentsAt]))
	b.WriteString("\n## Contents\n\n")
	used := map[string]int{"contents": 1}
	for _, h := range s.headings() {
		anchor := slug(h.Text)
		n := used[anchor]
		used[anchor]++
		if n > 0 {
			anchor = fmt.Sprintf("%s-%d", anchor, n)
		}
		if h.Level == 2 {
			p := output.NewPage(true)
			p.Text(output.Words(h.Text))
			words := strings.NewReplacer("[", `\[`, "]", `\]`).Replace(strings.ReplaceAll(strings.TrimSpace(p.String()), `\[`, "["))
			fmt.Fprintf(&b, "- [%s](#%s)\n", words, anchor)
		}
	}
	b.WriteByte('\n')
	b.WriteString(plainPage(s.Blocks[s.contentsAt:]))
	fmt.Fprintf(&b, "\n<!-- %s -->\n", s.mark("markdown"))
	_, err := io.WriteString(w, b.String())
	return err
}

// slug is the anchor that hosts of Markdown give a heading.
func slug(s string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r == ' ':
			return '-'
		case r == '-' || r == '_' || unicode.IsLetter(r) || unicode.IsDigit(r):
			return unicode.ToLower(r)
		}
		return -1
	}, clean(s))
}

// plainPage writes blocks as Markdown; those that are the sheet's own become
// tables and words.
func plainPage(list []output.Block) string {
	p := output.NewPage(true)
	for _, b := range list {
		switch b := b.(type) {
		case Figures:
			for _, f := range b {
				what := f.Title
				if f.Description != "" {
					what += ": " + strings.TrimSuffix(f.Description, ".") + "."
				}
				p.Text(output.Words("Picture, " + what))
			}
		case Facts:
			p.Table([]string{"", ""}, "ll", factRows(b))
		case Signatures:
			p.Table([]string{"", "name"}, "ll", factRows(Facts(b)))
		case Verdict:
			p.Text(output.Strong(b.Word), output.Words(": "+b.Rest))
		default:
			p.Add(b)
		}
	}
	return p.String()
}

func factRows(facts Facts) [][]output.Line {
	var rows [][]output.Line
	for _, f := range facts {
		rows = append(rows, []output.Line{output.Words(f.Name), f.Value})
	}
	return rows
}
