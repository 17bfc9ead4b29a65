package lsp

import (
	"slices"

	"kern/checker"
	"kern/checker/model"
	"kern/lang"
)

// mentionsAt gives the name at an offset of a file in each of its meanings: a
// file that several calculations include may mean something else in each.
func mentionsAt(f *File, offset int32) []checker.Mention {
	i := f.Tree.DeclAt(offset)
	if i < 0 {
		return nil
	}
	decl, at := f.Tree.Decls[i], offset-f.Tree.Starts[i]
	var out []checker.Mention
	for _, c := range f.report.Calculations(f.Name) {
		checker.Mentions(c, decl, func(m checker.Mention) {
			if m.Place.Span.Contains(at) && !slices.ContainsFunc(out, func(o checker.Mention) bool { return o.Named.Place == m.Named.Place }) {
				out = append(out, m)
			}
		})
	}
	return out
}

// claims tells whether a declaration gives a name at a span of its text, be it
// the first to give it or not.
func claims(d *lang.Decl, span lang.Span) bool {
	for _, s := range d.Stmts {
		for _, given := range givenNames(s) {
			if given == span {
				return true
			}
		}
	}
	return false
}

// givenNames are the spans of the names that a statement declares.
func givenNames(s *lang.Stmt) []lang.Span {
	if _, assigned := s.Assigned(); assigned {
		if formWords[lang.InFile][s.Word] {
			return nil // "section = …" between declarations gives no name
		}
		return []lang.Span{s.Head}
	}
	several := false
	switch s.Word {
	case "column", "strut", "tie":
		several = true
	case "material", "section", "case", "level", "combination":
	default:
		return nil
	}
	var out []lang.Span
	// the names stand at every other place, a comma between each two
	for i := 0; i < len(s.Args); i += 2 {
		e := s.Args[i]
		if e.Kind != lang.NameExpr || several && e.Is("as") {
			break
		}
		out = append(out, e.Span)
		if !several || i+1 >= len(s.Args) || s.Args[i+1].Kind != lang.CommaExpr {
			break
		}
	}
	return out
}

// includeAt gives the quoted path of the include statement at an offset of a
// file, as a span of the file, and the file that it leads to; false where there
// is none. The file may not exist.
func includeAt(f *File, offset int32) (lang.Span, string, bool) {
	at, ok := f.Tree.At(offset)
	if !ok {
		return lang.Span{}, "", false
	}
	for _, s := range at.Stmts {
		name := f.project.Included(f.Tree.Name, s)
		if name == "" || !s.Args[0].Span.Contains(at.Offset) {
			continue
		}
		return moved(s.Args[0].Span, at.Start), name, true
	}
	return lang.Span{}, "", false
}

// ownHeight gives the lines that state the height of the member in whose block
// "height" or "length" stands at an offset, and where the word stands; false
// where it means something else.
func ownHeight(f *File, offset int32) (lang.Span, []lang.Place, bool) {
	at, ok := f.Tree.At(offset)
	if !ok || len(at.Stmts) < 2 {
		return lang.Span{}, nil, false
	}
	e := at.Expr()
	if !e.Is("height") && !e.Is("length") {
		return lang.Span{}, nil, false
	}
	for _, c := range f.report.Calculations(f.Name) {
		if c.Env.Names[e.Text] != nil {
			return lang.Span{}, nil, false
		}
	}
	var out []lang.Place
	for _, r := range f.report.Results(at.Decl) {
		p := r.Member.HeightAt
		if r.Member.Stmt == at.Stmts[0] && p.Decl != nil && !slices.Contains(out, p) {
			out = append(out, p)
		}
	}
	return moved(e.Span, at.Start), out, len(out) > 0
}

// moved is a span of a declaration's text as one of the file's.
func moved(s lang.Span, start int32) lang.Span {
	return lang.Span{Start: s.Start + start, End: s.End + start}
}

// nameds are what mentions stand for.
func nameds(mentions []checker.Mention) []*model.Named {
	out := make([]*model.Named, len(mentions))
	for i, m := range mentions {
		out[i] = m.Named
	}
	return out
}
