package review

import (
	"slices"
	"strconv"
	"strings"

	"kern/lang"
)

// readTable takes a table of forces apart: its head, and the lines of each member.
func (s *state) readTable(f *lang.File) {
	head, column, separator := "", -1, ","
	start := int32(0)
	for raw := range strings.Lines(f.Text) {
		at := lang.Place{Decl: f.Decls[0], Span: lang.Span{Start: start, End: start + int32(len(raw))}}
		start += int32(len(raw))
		line := strings.TrimSpace(strings.TrimPrefix(raw, "\ufeff"))
		if line == "" || line[0] == '#' {
			continue
		}
		x := fact{word: "head", text: line, key: line, place: at, table: f.Name}
		if head == "" {
			head = line
			for _, c := range []string{"\t", ";"} {
				if strings.Contains(line, c) {
					separator = c
					break
				}
			}
			column = slices.IndexFunc(cells(line, separator), func(c string) bool {
				name, _, _ := strings.Cut(c, "[")
				return strings.TrimSpace(name) == "member"
			})
			s.addFact("table", f.Name, f.Decls[0], x)
			continue
		}
		x.word = "forces"
		if c := cells(line, separator); column >= 0 && column < len(c) {
			s.addFact("rows", c[column], f.Decls[0], x)
		}
	}
}

// cells are the fields of a line of a table.
func cells(line, separator string) []string {
	out := strings.Split(line, separator)
	for i, c := range out {
		out[i] = strings.Trim(strings.TrimSpace(c), `"`)
	}
	return out
}

// addFact puts a fact into a declaration that no statement makes.
func (s *state) addFact(kind, name string, d *lang.Decl, x fact) {
	id := kind + " " + name
	of := s.all[id]
	if of == nil {
		of = &declared{id: id, kind: kind, name: name, decls: []*lang.Decl{d}}
		s.all[id] = of
		s.order = append(s.order, id)
	}
	of.facts = append(of.facts, x)
}

// alias is what a table is called in a mixture.
func alias(table string) string {
	return strings.NewReplacer("/", "_", "\\", "_").Replace(table)
}

// written is the fact as a mixture has it: tables have other names there.
func (f fact) written() string {
	if f.table == "" || f.stmt == nil || len(f.stmt.Args) == 0 {
		return f.text
	}
	head, rest, _ := strings.Cut(f.text, strconv.Quote(f.stmt.Args[0].Text))
	return head + strconv.Quote(alias(f.table)) + rest
}
