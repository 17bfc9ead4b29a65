package drawing

import "slices"

// entry is a block of lines that wants to stand beside a point.
type entry struct {
	want  float64 // y of the middle, mm
	lines []Text  // without their places
	to    Point   // where a leader ends, when the block had to move
}

const pitch = 3.2 // between lines, mm

func (e entry) height() float64 { return float64(len(e.lines)) * pitch }

// spread moves blocks apart so that none overlaps another and all stay between
// two heights, as near as possible to where they want to be. Lines that find no
// room are left out, and the last line says how many.
func spread(list []entry, from, to float64) []entry {
	slices.SortStableFunc(list, func(a, b entry) int {
		switch {
		case a.want < b.want:
			return -1
		case a.want > b.want:
			return 1
		}
		return 0
	})
	room, dropped := int((to-from)/pitch), 0
	lines := 0
	for _, e := range list {
		lines += len(e.lines)
	}
	if lines > room { // one line is kept for the words about the rest
		kept := list[:0:0]
		lines = 1
		for _, e := range list {
			if n := min(len(e.lines), room-lines); n < len(e.lines) {
				dropped += len(e.lines) - n
				e.lines = e.lines[:n]
			}
			lines += len(e.lines)
			if len(e.lines) > 0 {
				kept = append(kept, e)
			}
		}
		list = append(kept, entry{want: to, lines: []Text{{Words: "and " + count(dropped, "more line"), Size: small, Tone: Quiet}}, to: Point{-1, -1}})
	}
	// blocks that touch form a run that stands at the mean of what they want
	type run struct {
		first, last, n int
		sum, height    float64
	}
	var runs []run
	top := func(r run) float64 {
		return min(max(r.sum/float64(r.n), from), to-r.height)
	}
	for i, e := range list {
		r := run{i, i, 1, e.want - e.height()/2, e.height()}
		for len(runs) > 0 {
			last := runs[len(runs)-1]
			if top(last)+last.height <= top(r) {
				break
			}
			// what the blocks of the later run want, as the top of the joint one
			r = run{last.first, r.last, last.n + r.n, last.sum + r.sum - float64(r.n)*last.height, last.height + r.height}
			runs = runs[:len(runs)-1]
		}
		runs = append(runs, r)
	}
	for _, r := range runs {
		y := top(r)
		for i := r.first; i <= r.last; i++ {
			list[i].want = y + list[i].height()/2
			y += list[i].height()
		}
	}
	return list
}

// column writes blocks at one x, each line no wider than width, and draws a
// leader to the point of a block that had to move.
func (p *pen) column(list []entry, x, width, from, to float64, anchor Anchor) {
	for _, e := range spread(list, from, to) {
		y := e.want - e.height()/2
		for _, t := range e.lines {
			if t.Size == 0 {
				t.Size = small
			}
			t.Words = clip(t.Words, t.Size, width, t.Bold)
			t.At, t.Anchor = Point{x, y + pitch/2 + 0.35*t.Size}, anchor
			p.text(t)
			y += pitch
		}
		edge := x - 0.6
		if anchor == End {
			edge = x + 0.6
		}
		if d := e.to.Y - e.want; e.to.X >= 0 && (d > 0.3 || d < -0.3 || e.to.X-edge > 1 || edge-e.to.X > 1) {
			p.line(Faint, e.to.X, e.to.Y, edge, e.want)
		}
	}
}

// count writes a number of things.
func count(n int, thing string) string {
	if n == 1 {
		return "1 " + thing
	}
	return decimal(n) + " " + thing + "s"
}
