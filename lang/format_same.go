package lang

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
