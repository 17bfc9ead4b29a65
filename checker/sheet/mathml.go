package sheet

import (
	"html"
	"strings"
)

// mathml writes marks as MathML Core.
func mathml(b *strings.Builder, m mark) {
	tag := func(name, text string) {
		b.WriteString("<" + name + ">" + html.EscapeString(text) + "</" + name + ">")
	}
	group := func(name string, parts ...mark) {
		b.WriteString("<" + name + ">")
		for _, p := range parts {
			mathml(b, p)
		}
		b.WriteString("</" + name + ">")
	}
	switch m.kind {
	case emptyMark:
		b.WriteString("<mrow></mrow>")
	case letterMark:
		tag("mi", m.text)
	case wordMark:
		if len([]rune(m.text)) == 1 {
			b.WriteString(`<mi mathvariant="normal">` + html.EscapeString(m.text) + "</mi>")
			return
		}
		tag("mi", m.text)
	case numberMark:
		tag("mn", m.text)
	case operatorMark:
		b.WriteString(`<mo form="infix">` + m.text + "</mo>")
	case prefixMark:
		b.WriteString(`<mo form="prefix">` + m.text + "</mo>")
	case commaMark:
		b.WriteString(`<mo separator="true" rspace="0.15em">` + m.text + "</mo>")
	case spaceMark:
		b.WriteString(`<mspace width="0.18em"/>`)
	case rowMark:
		group("mrow", m.parts...)
	case fractionMark:
		group("mfrac", m.parts...)
	case rootMark:
		group("msqrt", m.parts...)
	case scriptMark:
		base, below, above := m.parts[0], m.parts[1], m.parts[2]
		switch {
		case above.kind == emptyMark:
			group("msub", base, below)
		case below.kind == emptyMark:
			group("msup", base, above)
		default:
			group("msubsup", base, below, above)
		}
	case fenceMark:
		b.WriteString("<mrow>")
		if m.text != "" {
			b.WriteString(`<mo form="prefix" stretchy="true">` + m.text[:1] + "</mo>")
		}
		mathml(b, m.parts[0])
		if m.text != "" {
			b.WriteString(`<mo form="postfix" stretchy="true">` + m.text[1:] + "</mo>")
		}
		b.WriteString("</mrow>")
	}
}

// chunks cuts a formula where its line may be broken: before the signs of its
// outermost row.
func chunks(m mark) []mark {
	if m.kind != rowMark {
		return []mark{m}
	}
	var out []mark
	start := 0
	for i, p := range m.parts {
		if p.kind == operatorMark && i > start {
			out = append(out, row(m.parts[start:i]...))
			start = i
		}
	}
	return append(out, row(m.parts[start:]...))
}
