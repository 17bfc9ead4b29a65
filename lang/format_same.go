package lang

// readsAs tells whether a text reads like a file. Declarations that differ in
// the size of their gaps alone need no second look: the parser asks whether
// tokens stick together and whether a line ends between them, never how far they
// are apart. All others are read.
func readsAs(f *File, text string) bool {
	var ranges [][2]int
	cut(text, func(start, end int) { ranges = append(ranges, [2]int{start, end}) })
	whole := func() bool { return sameReading(f, Parse(&FileID{Name: f.Name}, text, nil)) }
	if f.Unreadable != "" || len(ranges) != len(f.Decls) {
		return whole()
	}
	size := 0
	var differ []int
	for i, d := range f.Decls {
		if r := ranges[i]; !sameGaps(d.Text, text[r[0]:r[1]]) {
			differ = append(differ, i)
			size += r[1] - r[0]
		}
	}
	if size > 1<<16 {
		return whole() // on all cores
	}
	for _, i := range differ {
		d := &Decl{Syntax: parseDecl(text[ranges[i][0]:ranges[i][1]])}
		if !sameReading(&File{Decls: f.Decls[i : i+1]}, &File{Decls: []*Decl{d}}) {
			return whole() // one may have been cut where two met
		}
	}
	return true
}

// sameGaps tells whether two texts have the same tokens with gaps and line ends
// at the same places.
func sameGaps(a, b string) bool {
	if a == b {
		return true
	}
	x, y := gapReader{lex: Lexer{text: a}}, gapReader{lex: Lexer{text: b}}
	for {
		s, t := x.next(), y.next()
		if s.Kind != t.Kind || s.Flaw != t.Flaw || x.gap != y.gap || x.line != y.line || s.Span().Of(a) != t.Span().Of(b) {
			return false
		}
		if s.Kind == EOF {
			return true
		}
	}
}

// gapReader reads the tokens that are no gaps.
type gapReader struct {
	lex  Lexer
	gap  bool // a gap stands before the token
	line bool // and a line ends in it
}

func (r *gapReader) next() Token {
	r.gap, r.line = false, false
	for {
		switch t := r.lex.Next(); t.Kind {
		case Newline:
			r.gap, r.line = true, true
		case Blank:
			r.gap = true
		default:
			return t
		}
	}
}

// sameReading tells whether two files say the same: the same statements in the
// same order and nesting with the same parts, texts and values, and the same
// problems. Where a declaration begins may differ.
func sameReading(a, b *File) bool {
	x, y := flatten(a), flatten(b)
	return sameStmts(x.stmts, y.stmts) && sameProblems(x.problems, y.problems)
}

type flat struct {
	stmts    []*Stmt
	problems []string // rules
}

func flatten(f *File) flat {
	var out flat
	for _, d := range f.Decls {
		out.stmts = append(out.stmts, d.Stmts...)
		for i := range d.Problems {
			out.problems = append(out.problems, d.Problems[i].Rule)
		}
	}
	return out
}

func sameProblems(a, b []string) bool {
	if len(a) != len(b) {
		return false
	}
	for i := range a {
		if a[i] != b[i] {
			return false
		}
	}
	return true
}

func sameStmts(a, b []*Stmt) bool {
	if len(a) != len(b) {
		return false
	}
	for i, x := range a {
		y := b[i]
		if x.Word != y.Word || x.Broken != y.Broken || (x.Body == nil) != (y.Body == nil) || !sameExprs(x.Args, y.Args) {
			return false
		}
		if x.Body != nil && !sameStmts(x.Body.Stmts, y.Body.Stmts) {
			return false
		}
	}
	return true
}

func sameExprs(a, b []*Expr) bool {
	if len(a) != len(b) {
		return false
	}
	for i, x := range a {
		y := b[i]
		if x.Kind != y.Kind || x.Op != y.Op || x.Text != y.Text || x.Value != y.Value || x.Unit != y.Unit || !sameExprs(x.Args, y.Args) {
			return false
		}
	}
	return true
}
