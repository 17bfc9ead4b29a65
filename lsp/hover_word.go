package lsp

import (
	"fmt"
	"regexp"
	"strings"

	"kern/checker/output"
	"kern/lang"
	"kern/lang/unit"
)

// form writes how the statement is written, what it says, and an example.
func (h *hovering) form(s *lang.Stmt) {
	context := h.context()
	for _, f := range lang.Forms {
		if f.Word != s.Word || f.In != context {
			continue
		}
		said := !h.page.Empty() // what this line does is more than an example
		h.page.Text(output.Strong(f.Word), output.Words(": "+f.Summary))
		h.page.Block(strings.Join(f.Syntax, "\n"))
		if said {
			return
		}
		if example := exampleOf(f.Snippet); example != "" && !strings.Contains(strings.Join(f.Syntax, "\n"), example) {
			h.page.Text(output.Words("For example:"))
			h.page.Block(example)
		}
		return
	}
}

var (
	choice      = regexp.MustCompile(`\$\{\d+\|([^,|]*)[^|]*\|\}`)
	placeholder = regexp.MustCompile(`\$\{\d+:([^}]*)\}`)
	tabStop     = regexp.MustCompile(`\$\d+`)
)

// exampleOf fills the placeholders of a snippet in.
func exampleOf(snippet string) string {
	s := choice.ReplaceAllString(snippet, "$1")
	s = placeholder.ReplaceAllString(s, "$1")
	s = tabStop.ReplaceAllString(s, "")
	var lines []string
	for line := range strings.SplitSeq(s, "\n") {
		if strings.TrimSpace(line) != "" {
			lines = append(lines, line)
		}
	}
	return strings.Join(lines, "\n")
}

// ordinary writes about words of the language that begin no statement.
func (h *hovering) ordinary() {
	word := h.word()
	m := h.result()
	switch {
	case h.context() == lang.InMember && (word == "height" || word == "length") && m != nil && m.Member.Height > 0:
		h.page.Text(output.Strong(word), output.Words(" of "+m.Name+": "+output.Value(m.Units(), m.Member.Height, unit.Length)))
		return
	case lang.Constants[word] != unit.Quantity{}:
		c := lang.Constants[word]
		text := " = " + unit.Exact(c.Value)
		if !c.Dim.IsNone() {
			text += " " + c.Dim.Base() + ", the standard acceleration of free fall"
		}
		h.page.Text(output.Strong(word), output.Words(text))
		return
	case lang.Functions[word] != "":
		if e, _ := h.expr(lang.CallExpr); e != nil {
			h.page.Text(output.Strong(word), output.Words(": "+lang.Functions[word]))
			if q, ok := h.eval(e); ok {
				h.page.Text(output.Code(e.Span.Of(h.at.Decl.Text)), output.Words(" = "), output.Strong(quantityText(h.units(), q)))
			}
			return
		}
	}
	text, ok := lang.Words[word]
	if word == "base" {
		text, ok = "the lower end", true
	}
	if !ok {
		return
	}
	if (word == "top" || word == "base") && m != nil && m.Member.Height > 0 {
		z := 0.0
		if word == "top" {
			z = m.Member.Height
		}
		text += fmt.Sprintf(" of %s, %s above its base", m.Name, output.Value(m.Units(), z, unit.Length))
	}
	h.page.Text(output.Strong(word), output.Words(": "+text))
}

// eval computes an expression of the innermost statement, in a member's block
// with the member's own height.
func (h *hovering) eval(e *lang.Expr) (unit.Quantity, bool) {
	if h.calc == nil {
		return unit.Quantity{}, false
	}
	if r := h.result(); r != nil && h.context() == lang.InMember {
		return h.calc.Env.EvalIn(r.Member, e)
	}
	return h.calc.Env.Eval(e)
}
