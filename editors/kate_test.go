package editors_test

import "fmt"

// Kate's lists of words, and entities for the patterns that need them inside.

func kateParts() []part {
	const syntax = "kate/kern.xml"
	list := func(name string, words []string) part {
		lines := []string{`<list name="` + name + `">`}
		for _, w := range words {
			lines = append(lines, `  <item>`+w+`</item>`)
		}
		return part{syntax, name, append(lines, `</list>`)}
	}
	atom := fmt.Sprintf(`(?:%s)(?:\^?[0-9]|[⁰¹²³⁴⁵⁶⁷⁸⁹])?`, alternation(units()))
	return []part{
		{syntax, "patterns", []string{
			// A percent sign begins a parameter entity in a DTD.
			fmt.Sprintf(`<!ENTITY unit "%s">`, escapePercent(atom+`(?:[*/·]`+atom+`)*(?![\p{L}\p{N}_])`)),
			fmt.Sprintf(`<!ENTITY property "(?:%s)(?=\s*=)">`, alternation(properties())),
			fmt.Sprintf(`<!ENTITY function "(?:%s)(?=\s*\()">`, alternation(functions())),
		}},
		list("declarations", declarations()),
		list("statements", statements()),
		list("shapes", shapes()),
		list("particles", particles()),
		list("constants", constants()),
	}
}

func escapePercent(text string) string {
	out := ""
	for _, r := range text {
		if r == '%' {
			out += "&#37;"
			continue
		}
		out += string(r)
	}
	return out
}
