package lang

// declaration adds the rows of a declaration and of the comments behind it.
func (w *formatter) declaration(s *Syntax, base int32) {
	if !w.scan(s, base) {
		w.add(row{kind: aloneRow}, piece{start: base, end: base + int32(len(s.Text))})
		w.newlines, w.blank, w.onLine = 0, false, false
		return
	}
	w.spoil()
	w.next = 1
	w.onLine = false
	for i := 0; i < len(w.units); {
		u := &w.units[i]
		w.between(w.start(i))
		switch {
		case u.raw:
			i = w.raw(i)
		case u.close:
			w.add(row{kind: closeRow, level: int16(u.depth), closes: u.depth == 0}, w.piece(u.first))
			w.next = u.last
			i++
		case u.brace > 0 && w.inline(i):
			i = u.after
		default:
			w.statement(i)
			i++
		}
		w.onLine = true
	}
	w.between(len(w.tokens))
}

func (w *formatter) piece(i int) piece {
	t := w.tokens[i]
	return piece{start: t.Start, end: t.End, kind: t.Kind}
}

// add appends a row of the pieces given, which stand behind those that the row
// has already.
func (w *formatter) add(r row, pieces ...piece) {
	if r.last == 0 {
		r.first = int32(len(w.pieces))
	}
	w.pieces = append(w.pieces, pieces...)
	r.last = int32(len(w.pieces))
	r.blank = w.blank || w.newlines > 1
	if n := len(w.rows); n == 0 || w.rows[n-1].opens || w.rows[n-1].kind == aloneRow || r.kind == closeRow {
		r.blank = false
	}
	w.newlines, w.blank = 0, false
	w.rows = append(w.rows, r)
}

// between goes over the comments and line ends before a token.
func (w *formatter) between(to int) {
	depth := 0
	if n := len(w.rows); n > 0 {
		if last := &w.rows[n-1]; last.kind != aloneRow {
			depth = int(last.level)
			if last.opens {
				depth++
			}
		}
	}
	for ; w.next < to; w.next++ {
		switch t := w.tokens[w.next]; t.Kind {
		case Newline:
			w.newlines++
			w.onLine = false
		case Semicolon:
			// it stands for a line end, and those are written anyway
			w.blank = w.blank || w.newlines > 1
			w.newlines = 0
		case Comment:
			if w.onLine {
				w.trail(w.next)
				continue
			}
			w.add(row{kind: commentRow, level: int16(depth)}, w.piece(w.next))
		}
	}
}

// trail puts a comment behind the last row.
func (w *formatter) trail(token int) {
	p := w.piece(token)
	p.gap = commentGap
	w.pieces = append(w.pieces, p)
	w.rows[len(w.rows)-1].last = int32(len(w.pieces))
}

// raw adds the lines of the segments that stay as they are, from i on, and
// gives the index of the segment behind them.
func (w *formatter) raw(i int) int {
	first := &w.units[i]
	from := w.start(i)
	for from > 1 && w.tokens[from-1].Kind != Newline {
		from--
	}
	j := i + 1
	for j < len(w.units) && w.firstLine(j) <= w.lastLine(j-1) {
		j++
	}
	last := &w.units[j-1]
	to := max(last.end(), last.semicolon+1)
	for to < len(w.tokens) && w.tokens[to].Kind != Newline {
		to++
	}
	inside := first.depth > 0 || first.close // of a block that began before
	r := row{kind: rawRow, level: int16(last.depth), opens: last.brace > 0}
	ends := r.opens || last.depth > 0 // inside a block that goes on
	r.heads = ends && !inside
	r.closes = !ends && inside
	if first.close {
		w.newlines, w.blank = 0, false
	}
	w.add(r, piece{start: w.tokens[from].Start, end: w.tokens[to-1].End})
	w.next = to
	return j
}

// statement adds the rows of a statement without the contents of its block.
func (w *formatter) statement(i int) {
	u := &w.units[i]
	r := row{kind: statementRow, level: int16(u.depth), first: int32(len(w.pieces)), single: u.brace == 0, heads: u.brace > 0 && u.depth == 0}
	w.spread(u, &r)
	w.next = u.last
	switch {
	case u.brace > 0 && !w.apart(u):
		p := w.piece(u.brace)
		p.gap = 1
		w.pieces = append(w.pieces, p)
		r.opens = true
		w.next = u.brace + 1
	case u.semicolon > 0:
		// a comment before it comes to stand behind it
		w.pieces = append(w.pieces, w.piece(u.semicolon))
	}
	r.last = int32(len(w.pieces))
	w.add(r)
	w.onLine = true
	if u.brace > 0 && !r.opens {
		// the brace stays on a line of its own, behind the comments before it
		for ; w.next < u.brace; w.next++ {
			switch w.tokens[w.next].Kind {
			case Newline:
				w.onLine = false
			case Comment:
				if w.onLine {
					w.trail(w.next)
					continue
				}
				w.add(row{kind: commentRow, level: int16(u.depth)}, w.piece(w.next))
			}
		}
		w.newlines, w.blank = 0, false
		w.add(row{kind: braceRow, level: int16(u.depth), opens: true}, w.piece(u.brace))
		w.next = u.brace + 1
	}
}

// apart tells whether the brace of a statement must stay on a line of its own: a
// comment stands before it, or with the brace behind it the line would begin a
// declaration wherever it stands ("section mast {" in a block).
func (w *formatter) apart(u *segment) bool {
	for _, t := range w.tokens[u.last:u.brace] {
		if t.Kind == Comment {
			return true
		}
	}
	if w.tokens[u.brace].line == w.tokens[u.last-1].line || u.depth == 0 {
		return false
	}
	line := w.text[w.tokens[u.first].Start:w.tokens[u.last-1].End]
	return !StartsDeclaration(line, true) && StartsDeclaration(line+" {", true)
}

// inline adds a statement with its block as one row, when it stood on one line
// and fits.
func (w *formatter) inline(i int) bool {
	u := &w.units[i]
	if w.firstLine(i) != w.lastLine(u.after-1) {
		return false
	}
	start := len(w.pieces)
	r := row{kind: statementRow, level: int16(u.depth), first: int32(start), single: true}
	for j := i; j < u.after; j++ {
		s := &w.units[j]
		before := len(w.pieces)
		if s.close {
			w.pieces = append(w.pieces, w.piece(s.first))
		} else {
			w.spread(s, &r)
		}
		if j > i {
			w.pieces[before].gap = 1
			if s.close && w.units[j-1].brace > 0 {
				w.pieces[before].gap = 0 // {}
			}
		}
		if s.brace > 0 {
			p := w.piece(s.brace)
			p.gap = 1
			w.pieces = append(w.pieces, p)
		} else if j+1 < u.after && !w.units[j+1].close {
			if semicolon := w.semicolon(s.end()); semicolon > 0 {
				w.pieces = append(w.pieces, w.piece(semicolon))
			}
		}
	}
	if u.depth*indentWidth+w.width(start, len(w.pieces)) > inlineWidth {
		w.pieces = w.pieces[:start]
		return false
	}
	r.last = int32(len(w.pieces))
	w.add(r)
	w.next = w.units[u.after-1].last
	return true
}

// separate sets a block of several lines at the top level off from its
// neighbours by a blank line. The comments right above a declaration belong to
// it.
func (w *formatter) separate() {
	for i := range w.rows {
		r := &w.rows[i]
		if i > 0 && w.rows[i-1].closes && (r.kind != commentRow || w.sticks(i)) {
			r.blank = true
		}
		if !r.heads {
			continue
		}
		first := i
		for first > 0 && !w.rows[first].blank && w.rows[first-1].kind == commentRow {
			first--
		}
		if first > 0 && w.rows[first-1].kind != aloneRow {
			w.rows[first].blank = true
		}
	}
}

// sticks tells whether a declaration follows the comments without a blank line.
func (w *formatter) sticks(i int) bool {
	for i++; i < len(w.rows); i++ {
		if w.rows[i].blank {
			return false
		}
		if w.rows[i].kind != commentRow {
			return true
		}
	}
	return false
}
