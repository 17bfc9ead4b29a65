package lang

import "github.com/mattn/go-runewidth"

// alignWidth is the widest beginning of a line that takes part in a column: one
// line that is far longer than its neighbours must not push them all aside.
const alignWidth = 60

// columns measures text as a terminal shows it, the same on every machine.
var columns = &runewidth.Condition{StrictEmojiNeutral: true}

// width is the number of columns of pieces on one line, without the gap before
// the first.
func (w *formatter) width(from, to int) int {
	n := 0
	for i := from; i < to; i++ {
		p := &w.pieces[i]
		if i > from {
			n += int(p.gap)
		}
		text := w.text[p.start:p.end]
		if ascii(text) {
			n += len(text)
		} else {
			n += columns.StringWidth(text)
		}
	}
	return n
}

func ascii(s string) bool {
	for i := 0; i < len(s); i++ {
		if s[i] >= 0x80 {
			return false
		}
	}
	return true
}

// align puts what belongs together into columns, run by run: lines of one
// statement each that follow one another without a blank line or a comment
// between them.
func (w *formatter) align() {
	for i := 0; i < len(w.rows); {
		j := i + 1
		if w.rows[i].single {
			for j < len(w.rows) && w.rows[j].single && !w.rows[j].blank {
				j++
			}
			run := w.rows[i:j]
			w.alignRun(run, w.sign, true)
			w.alignRun(run, w.number, false)
			w.alignComments(run)
		}
		i = j
	}
}

// shape tells which rows may share a column: those of the same word and form.
type shape struct {
	word string
	form int8
}

const (
	assignment int8 = iota + 1 // name = …
	named                      // word name = …
	placed2                    // level name at …, case name kind
	bareLoad                   // load quantity …
	caseLoad                   // load case quantity …
)

// alignRun aligns the cells that find gives for consecutive rows of one shape:
// a piece that a cell starts with and the piece that is its last. left aligns
// the beginnings of the cells, otherwise the ends are aligned.
func (w *formatter) alignRun(run []row, find func(*row) (shape, int, int), left bool) {
	for i := 0; i < len(run); {
		s, start, end := find(&run[i])
		widest, j := 0, i
		for s.form > 0 {
			to := end
			if left {
				to = start - 1
			}
			n := w.width(int(run[j].first), to+1)
			if n > alignWidth {
				break
			}
			widest = max(widest, n)
			j++
			if j == len(run) {
				break
			}
			var next shape
			if next, start, end = find(&run[j]); next != s {
				break
			}
		}
		for k := i; k < j; k++ {
			_, start, end := find(&run[k])
			to := end
			if left {
				to = start - 1
			}
			w.pieces[start].gap += int32(widest - w.width(int(run[k].first), to+1))
		}
		i = max(j, i+1)
	}
}

func (w *formatter) textOf(i int) string { return w.text[w.pieces[i].start:w.pieces[i].end] }

// sign finds the sign = of a row, and what stands in its place in others.
func (w *formatter) sign(r *row) (s shape, start, end int) {
	p := w.pieces[r.first:r.last]
	first := int(r.first)
	switch {
	case len(p) > 1 && p[1].kind == Equals:
		return shape{form: assignment}, first + 1, first + 1
	case len(p) > 2 && p[1].kind == Name && p[2].kind == Equals:
		return shape{w.textOf(first), named}, first + 2, first + 2
	case len(p) > 2 && p[1].kind == Name && p[2].kind == Name:
		word := w.textOf(first)
		if word == "case" || word == "level" && w.textOf(first+2) == "at" {
			return shape{word, placed2}, first + 2, first + 2
		}
	}
	return shape{}, 0, 0
}

// number finds the number of a row that assigns a plain quantity or is a load.
// The language allows one blank before a unit, no more: units come to stand in
// one column because the numbers end in one.
func (w *formatter) number(r *row) (s shape, start, end int) {
	s, start, _ = w.sign(r)
	plain := s.form == assignment || s.form == named
	last := int(r.last)
	switch {
	case plain:
		start++
		if w.pieces[last-1].kind == Comment {
			last--
		}
	case w.textOf(int(r.first)) == "load":
		start = int(r.first) + 1
		s = shape{"load", bareLoad}
		if start < last && w.pieces[start].kind == Name {
			start++
			s.form = caseLoad
		}
	default:
		return shape{}, 0, 0
	}
	end = start
	if end+1 < last && w.pieces[end].kind == Operator && w.pieces[end+1].gap == 0 {
		end++
	}
	if end+1 >= last || w.pieces[end].kind != Number || w.pieces[end+1].kind != Unit || w.pieces[end+1].gap != 1 || plain && end+2 != last {
		return shape{}, 0, 0
	}
	return s, start, end
}

// alignComments puts the comments of a run into one column behind its longest
// line.
func (w *formatter) alignComments(run []row) {
	any, widest := false, 0
	length := func(r *row) (n int, comment bool) {
		last := int(r.last)
		if comment = w.pieces[last-1].kind == Comment; comment {
			last--
		}
		return w.width(int(r.first), last), comment
	}
	for i := range run {
		any = any || w.pieces[run[i].last-1].kind == Comment
	}
	if !any {
		return
	}
	for i := range run {
		if n, _ := length(&run[i]); n <= inlineWidth {
			widest = max(widest, n)
		}
	}
	for i := range run {
		if n, comment := length(&run[i]); comment {
			w.pieces[run[i].last-1].gap = int32(commentGap + max(0, widest-n))
		}
	}
}
