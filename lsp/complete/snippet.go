package complete

import (
	"fmt"
	"regexp"
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/lang"
)

// placeholder matches the places of a snippet: ${1:text}, ${1|a,b|} and $0.
var placeholder = regexp.MustCompile(`\$\{(\d+):([^}]*)\}|\$\{(\d+)\|([^|]*)\|\}|\$(\d+)`)

// snippet fits the snippet of a statement to the place. No number and no
// designation is proposed: what is left to fill in by mistake must be an error
// and not a value that somebody seems to have chosen. Units are those that are
// used nearby, and names those that the calculation has.
func (s *scope) snippet(text, word string) string {
	if word == "load" {
		if names := s.namesOf(model.CaseName); len(names) > 0 {
			text = strings.Replace(text, "load ", "load "+chosen(9, names)+" ", 1)
		}
	}
	var b strings.Builder
	stop, levels := 0, s.namesOf(model.LevelName)
	next := func() int { stop++; return stop }
	for rest := text; rest != ""; {
		m := placeholder.FindStringSubmatchIndex(rest)
		if m == nil {
			b.WriteString(rest)
			break
		}
		b.WriteString(rest[:m[0]])
		inQuotes := strings.HasSuffix(rest[:m[0]], `"`)
		switch {
		case m[2] >= 0:
			standard := text[:len(text)-len(rest)+m[0]]
			s.stop(&b, rest[m[4]:m[5]], word, inQuotes, lastWord(standard), levels, next)
		case m[6] >= 0:
			b.WriteString(choice(next(), strings.Split(rest[m[8]:m[9]], ",")))
		default:
			b.WriteString("$" + rest[m[10]:m[11]])
		}
		rest = rest[m[1]:]
	}
	return b.String()
}

// lastWord is the word before a place.
func lastWord(text string) string {
	fields := strings.FieldsFunc(text, func(r rune) bool { return r == ' ' || r == '"' || r == '\n' || r == '=' })
	if len(fields) == 0 {
		return ""
	}
	return fields[len(fields)-1]
}

// stop writes one place to fill in.
func (s *scope) stop(b *strings.Builder, proposed, word string, inQuotes bool, before string, levels []string, next func() int) {
	value, symbol, _ := strings.Cut(proposed, " ")
	number := strings.Trim(value, "-0123456789.") == "" && value != ""
	names := map[string]model.NameKind{"section": model.SectionName, "material": model.MaterialName}
	switch {
	case number && symbol != "" && !inQuotes:
		fmt.Fprintf(b, "${%d} ${%d:%s}", next(), next(), s.likelyUnit(symbol, word))
	case number && !inQuotes:
		fmt.Fprintf(b, "${%d}", next())
	case proposed == "reason":
		fmt.Fprintf(b, "${%d:…}", next()) // refused as a reason until it is one
	case strings.HasPrefix(proposed, `"`):
		if list := s.namesOf(names[before]); names[before] != 0 && len(list) > 0 {
			b.WriteString(chosen(next(), list))
			return
		}
		fmt.Fprintf(b, `"${%d}"`, next())
	case inQuotes && before == "standard":
		b.WriteString(chosen(next(), checker.Standards()))
	case inQuotes && before == "actions":
		fmt.Fprintf(b, "${%d:%s}", next(), proposed)
	case inQuotes && proposed != "title":
		fmt.Fprintf(b, "${%d}", next())
	case word == "from" && len(levels) > 1:
		b.WriteString(chosen(next(), levels))
	case word == "combination" && proposed != "name", word == "exclusive":
		if list := s.namesOf(model.CaseName); len(list) > 0 {
			b.WriteString(chosen(next(), list))
			return
		}
		fmt.Fprintf(b, "${%d}", next())
	case word == "require":
		if results := s.results(false); len(results) > 0 {
			proposed = results[0].Label
		}
		fmt.Fprintf(b, "${%d:%s}", next(), proposed)
	default:
		fmt.Fprintf(b, "${%d:%s}", next(), proposed)
	}
}

// maxChoice bounds the names that a place to fill in chooses from.
const maxChoice = 12

// choice is a place to fill in with one of several words.
func choice(n int, words []string) string {
	if len(words) > maxChoice {
		words = words[:maxChoice]
	}
	if len(words) == 1 {
		return fmt.Sprintf("${%d:%s}", n, words[0])
	}
	return fmt.Sprintf("${%d|%s|}", n, strings.Join(words, ","))
}

// chosen is a place to fill in with one of several names. The first of them is
// none, so that nothing stands there that nobody chose.
func chosen(n int, names []string) string {
	if len(names) == 1 {
		return choice(n, names)
	}
	return choice(n, append([]string{"…"}, names...))
}

// namesOf are the names of a kind that the calculation gives, in its order; of
// values none.
func (s *scope) namesOf(kind model.NameKind) []string {
	var out []string
	switch kind {
	case model.CaseName:
		for _, c := range s.env.Cases {
			if c.Place.Decl != nil {
				out = append(out, c.Name)
			}
		}
	case model.LevelName:
		for _, l := range s.env.Levels {
			out = append(out, l.Name)
		}
	case model.SectionName:
		for _, x := range s.env.Sections {
			out = append(out, x.Name)
		}
	case model.MaterialName:
		for _, m := range s.env.Materials {
			out = append(out, m.Name)
		}
	}
	return out
}

// shapeSnippet is a shape with the properties that it needs.
func (s *scope) shapeSnippet(shape string) string {
	var parts []string
	stop := 0
	for _, p := range shapeWords[shape] {
		switch {
		case p.words != nil:
			stop++
			parts = append(parts, p.word+" = "+choice(stop, p.words))
		case p.needed:
			symbol := "mm"
			for _, f := range lang.FormsIn(lang.InSection) {
				if f.Word == p.word {
					if i := strings.LastIndex(f.Snippet, " "); i > 0 {
						symbol = strings.TrimSuffix(f.Snippet[i+1:], "}")
					}
				}
			}
			parts = append(parts, fmt.Sprintf("%s = ${%d} ${%d:%s}", p.word, stop+1, stop+2, s.likelyUnit(symbol, p.word)))
			stop += 2
		}
	}
	return shape + " { " + strings.Join(parts, "; ") + " }"
}
