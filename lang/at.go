package lang

import "sort"

// At is what stands at a place in a file. Offsets and spans count from the start
// of the declaration.
type At struct {
	Decl   *Decl
	Start  int32   // of the declaration in the file
	Offset int32   // the place in the declaration
	Stmts  []*Stmt // from the declaration's own statement to the innermost one
	Exprs  []*Expr // from a part of the innermost statement to the innermost expression
	// Inside is set when the place lies in the block of the innermost statement
	// and in no statement of that block: where a new one can be written.
	Inside bool
}

// Stmt is the innermost statement, nil for none.
func (a At) Stmt() *Stmt {
	if len(a.Stmts) == 0 {
		return nil
	}
	return a.Stmts[len(a.Stmts)-1]
}

// Expr is the innermost expression, nil for none.
func (a At) Expr() *Expr {
	if len(a.Exprs) == 0 {
		return nil
	}
	return a.Exprs[len(a.Exprs)-1]
}

// DeclAt is the number of the declaration in which an offset lies, -1 in a file
// without any. Offsets outside the text count as its ends.
func (f *File) DeclAt(offset int32) int {
	if len(f.Starts) == 0 {
		return -1
	}
	return max(0, sort.Search(len(f.Starts), func(i int) bool { return f.Starts[i] > offset })-1)
}

// At finds what stands at an offset. A cursor behind the last letter of a word
// still sees the word, and one behind a statement on its line the statement. It
// is false in a file without declarations.
func (f *File) At(offset int32) (At, bool) {
	i := f.DeclAt(offset)
	if i < 0 {
		return At{}, false
	}
	a := At{Decl: f.Decls[i], Start: f.Starts[i], Offset: offset - f.Starts[i]}
	stmts := a.Decl.Stmts
	for {
		// of two statements that meet, the one that begins here counts
		var found *Stmt
		for _, s := range stmts {
			if s.reaches(a.Decl.Text, a.Offset) {
				found = s
			}
		}
		if found == nil {
			break
		}
		a.Stmts = append(a.Stmts, found)
		a.Inside = false
		if found.Body == nil || a.Offset <= found.Body.Span.Start || closed(a.Decl.Text, found) && a.Offset >= found.Body.Span.End {
			break
		}
		a.Inside = true
		stmts = found.Body.Stmts
	}
	if s := a.Stmt(); s != nil && !a.Inside {
		a.Exprs = exprsAt(s.Args, a.Offset)
	}
	return a, true
}

// reaches tells whether a place belongs to a statement: it lies in it, or behind
// it with blanks alone between, as where somebody types on, or behind an opening
// brace that nothing closes.
func (s *Stmt) reaches(text string, offset int32) bool {
	switch {
	case offset < s.Span.Start:
		return false
	case offset <= s.Span.End, s.Body != nil && !closed(text, s):
		return true
	}
	return trimBlank(Span{s.Span.End, min(offset, int32(len(text)))}.Of(text)) == ""
}

// closed tells whether the block of a statement has its closing brace.
func closed(text string, s *Stmt) bool {
	end := s.Body.Span.End
	return end > s.Body.Span.Start+1 && int(end) <= len(text) && text[end-1] == '}'
}

func exprsAt(args []*Expr, offset int32) []*Expr {
	var out []*Expr
	for {
		var found *Expr
		for _, e := range args {
			if e.Span.Contains(offset) {
				found = e
			}
		}
		if found == nil {
			return out
		}
		out = append(out, found)
		args = found.Args
	}
}
