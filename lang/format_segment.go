package lang

// segment is a statement's line with the brace behind it, or a closing brace.
type segment struct {
	stmt  *Stmt
	first int // its tokens; none for a block without a statement
	last  int
	brace int // the token of its opening brace, 0 when it has none
	close bool
	depth int  // of blocks around it
	after int  // the segment after its block
	raw   bool // stays as it is
	// semicolon is the token of the one behind the statement that a line end
	// cannot stand for, 0 when there is none.
	semicolon int
}

// end is the index after the last token of the segment.
func (s *segment) end() int {
	if s.brace > 0 {
		return s.brace + 1
	}
	return s.last
}

// scan reads the tokens of a declaration and finds its segments. It gives false
// for a declaration that must be left alone.
func (w *formatter) scan(s *Syntax, base int32) bool {
	w.tokens, w.units = w.tokens[:0], w.units[:0]
	w.tokens = append(w.tokens, placed{}) // so that no index of a brace is 0
	l := NewLexer(s.Text)
	line := int32(0)
	for {
		t := l.Next()
		if t.Kind == EOF {
			break
		}
		t.Start, t.End = t.Start+base, t.End+base
		w.tokens = append(w.tokens, placed{t, line})
		if t.Kind == Newline {
			line++
		}
	}
	if s.found >= maxReport {
		return false
	}
	for _, p := range s.Problems {
		switch p.Rule {
		case "unclosed-block", "stray-brace", "statement-too-long":
			return false
		}
	}
	at := 1
	if !w.collect(s.Stmts, base, 0, &at) {
		return false
	}
	return w.skip(&at, int32(len(s.Text))+base)
}

// collect appends the segments of statements and of their blocks.
func (w *formatter) collect(stmts []*Stmt, base int32, depth int, at *int) bool {
	for _, st := range stmts {
		if !w.skip(at, st.Line.Start+base) {
			return false
		}
		u := len(w.units)
		seg := segment{stmt: st, first: *at, depth: depth, raw: st.Broken}
		for *at < len(w.tokens) && w.tokens[*at].Start < st.Line.End+base {
			if w.tokens[*at].Flaw != Sound {
				seg.raw = true
			}
			*at++
		}
		seg.last = *at
		w.units = append(w.units, seg)
		if st.Body != nil {
			if depth >= maxBlocks || !w.skip(at, st.Body.Span.Start+base) || !w.brace(at, OpenBrace) {
				return false
			}
			w.units[u].brace = *at - 1
			if !w.collect(st.Body.Stmts, base, depth+1, at) || !w.skip(at, st.Body.Span.End-1+base) || !w.brace(at, CloseBrace) {
				return false
			}
			w.units = append(w.units, segment{stmt: st, first: *at - 1, last: *at, close: true, depth: depth})
			w.units[len(w.units)-1].after = len(w.units)
		}
		w.units[u].after = len(w.units)
	}
	return true
}

// brace moves past a brace.
func (w *formatter) brace(at *int, kind Kind) bool {
	if *at >= len(w.tokens) || w.tokens[*at].Kind != kind {
		return false
	}
	*at++
	return true
}

// skip moves to the token that starts at an offset and gives false when
// anything but blanks, comments and semicolons stands before it.
func (w *formatter) skip(at *int, offset int32) bool {
	for ; *at < len(w.tokens) && w.tokens[*at].Start < offset; *at++ {
		switch w.tokens[*at].Kind {
		case Blank, Newline, Comment, Semicolon:
		default:
			return false
		}
	}
	return true
}

// spoil marks what must stay as it is: everything that shares a line with a
// statement that cannot be read, and with one that would begin a declaration if
// it stood on a line of its own.
func (w *formatter) spoil() {
	for i := range w.units {
		w.units[i].semicolon = w.needed(i)
	}
	for i := 0; i < len(w.units); {
		j := i
		raw := false
		for {
			u := &w.units[j]
			raw = raw || u.raw || w.misread(u)
			if j+1 == len(w.units) || w.firstLine(j+1) > w.lastLine(j) {
				break
			}
			j++
		}
		for ; i <= j; i++ {
			w.units[i].raw = raw
		}
	}
}

// misread tells whether a statement in a block begins with a word that would
// start a declaration if it stood first on its line, which it does not yet.
func (w *formatter) misread(u *segment) bool {
	if u.close || u.depth == 0 || u.first == u.last || !StartsDeclaration(w.text[w.tokens[u.first].Start:], true) {
		return false
	}
	i := u.first - 1
	for w.tokens[i].Kind == Blank {
		i--
	}
	return i > 0 && w.tokens[i].Kind != Newline
}

// start is the token that a segment starts with. A block without a statement at
// the start of a declaration keeps the semicolon before it: without one it would
// belong to the declaration before.
func (w *formatter) start(i int) int {
	u := &w.units[i]
	if u.first < u.last {
		return u.first
	}
	if i == 0 {
		for j, t := range w.tokens[1:u.brace] {
			if t.Kind == Semicolon {
				return j + 1
			}
		}
	}
	return u.brace
}

func (w *formatter) firstLine(i int) int32 {
	u := &w.units[i]
	if u.first == u.last {
		return w.tokens[u.brace].line
	}
	return w.tokens[u.first].line
}

func (w *formatter) lastLine(i int) int32 {
	u := &w.units[i]
	return w.tokens[max(u.end()-1, u.semicolon)].line
}

// needed gives the semicolon behind a statement that a line end cannot stand
// for, 0 when there is none: after a comma and inside a bracket that was never
// closed a line goes on, and a brace that begins the next line belongs to the
// line before.
func (w *formatter) needed(i int) int {
	u := &w.units[i]
	if u.close || u.brace > 0 {
		return 0
	}
	brace := i+1 < len(w.units) && w.units[i+1].first == w.units[i+1].last
	if !u.raw && !brace && w.tokens[u.last-1].Kind != Comma {
		return 0
	}
	return w.semicolon(u.last)
}

// semicolon finds the first semicolon behind a statement.
func (w *formatter) semicolon(at int) int {
	for ; at < len(w.tokens); at++ {
		switch w.tokens[at].Kind {
		case Semicolon:
			return at
		case Blank, Newline, Comment:
		default:
			return 0
		}
	}
	return 0
}
