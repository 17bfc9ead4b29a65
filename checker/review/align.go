package review

import (
	"slices"
	"strings"
)

// slot is a fact at its place among those of both states.
type slot struct {
	fact          fact
	before, after bool // in which of the states it stands
	edit          int  // the edit that brings it or takes it away, -1 for none
}

// pairing is one edit within a declaration: a fact that went, a fact that came,
// or one that took the place of another. An index is -1 for none.
type pairing struct{ before, after int }

// align lays the facts of two states of a declaration one beside the other: each
// state is what it was, in its own order, with the facts of the other left out.
func align(before, after []fact) ([]slot, []pairing) {
	head := 0
	for head < len(before) && head < len(after) && before[head].key == after[head].key {
		head++
	}
	tail := 0
	for tail < len(before)-head && tail < len(after)-head && before[len(before)-1-tail].key == after[len(after)-1-tail].key {
		tail++
	}
	b, a := before[head:len(before)-tail], after[head:len(after)-tail]
	same := common(b, a)
	var slots []slot
	both := func(f fact) { slots = append(slots, slot{fact: f, before: true, after: true, edit: -1}) }
	for _, f := range after[:head] {
		both(f)
	}
	var gone, come []int // slots
	i, k := 0, 0
	flush := func(toI, toK int) {
		for ; i < toI; i++ {
			gone = append(gone, len(slots))
			slots = append(slots, slot{fact: b[i], before: true, edit: -1})
		}
		for ; k < toK; k++ {
			come = append(come, len(slots))
			slots = append(slots, slot{fact: a[k], after: true, edit: -1})
		}
	}
	for _, s := range same {
		flush(s[0], s[1])
		both(a[k])
		i, k = i+1, k+1
	}
	flush(len(b), len(a))
	for _, f := range after[len(after)-tail:] {
		both(f)
	}
	var pairs []pairing
	for _, fits := range []func(x, y fact) bool{
		func(x, y fact) bool { return x.key == y.key && x.word == y.word },
		func(x, y fact) bool { return group(x.word) == group(y.word) && about(x) == about(y) },
		func(x, y fact) bool { return group(x.word) == group(y.word) && exchanges[group(x.word)] },
	} {
		for gi := 0; gi < len(gone); gi++ {
			ci := slices.IndexFunc(come, func(c int) bool { return fits(slots[gone[gi]].fact, slots[c].fact) })
			if ci < 0 {
				continue
			}
			pairs = append(pairs, pairing{gone[gi], come[ci]})
			gone, come = slices.Delete(gone, gi, gi+1), slices.Delete(come, ci, ci+1)
			gi--
		}
	}
	for _, g := range gone {
		pairs = append(pairs, pairing{g, -1})
	}
	for _, c := range come {
		pairs = append(pairs, pairing{-1, c})
	}
	slices.SortFunc(pairs, func(x, y pairing) int { return x.first() - y.first() })
	return slots, pairs
}

func (p pairing) first() int {
	if p.before < 0 || p.after >= 0 && p.after < p.before {
		return p.after
	}
	return p.before
}

// exchanges are the words of which one line may have taken the place of another
// that is about something else.
var exchanges = map[string]bool{"load": true, "hold": true, "base": true, "top": true, "effective": true, "lift": true, "height": true, "section": true,
	"material": true, "selfweight": true, "made of": true, "kind": true, "title": true, "as": true, "standard": true, "actions": true, "show": true, "value": true, "note": true,
	"joints": true, "connected": true, "moments": true, "reduce": true, "reduction": true, "net": true, "stability": true, "lateral": true, "interaction": true, "forces": true, "head": true}

// group is the same for words that say the same thing in two ways.
func group(word string) string {
	if word == "from" || word == "length" {
		return "height"
	}
	return word
}

// about is what a fact is about within its word: a load's case, an axis, the
// bound of a limit.
func about(f fact) string {
	if f.stmt == nil {
		return ""
	}
	if _, assigned := f.stmt.Assigned(); assigned {
		return ""
	}
	switch f.word {
	case "load", "hold", "limit", "require", "depart", "permanent", "roofs", "accidental":
		if len(f.stmt.Args) > 0 {
			return strings.TrimSpace(f.stmt.Args[0].Text)
		}
	case "base", "top":
		if n := len(f.stmt.Args); n > 1 {
			return f.stmt.Args[n-1].Text
		}
	}
	return ""
}

// maxTable bounds the table that finds what two lists have in common.
const maxTable = 4 << 20

// common is a longest run of facts that two lists have in the same order, as
// pairs of indices. Lists too long for that have nothing in common but what
// pairs up by itself.
func common(b, a []fact) [][2]int {
	if len(b) == 0 || len(a) == 0 || len(b)*len(a) > maxTable {
		return nil
	}
	width := len(a) + 1
	long := make([]int32, (len(b)+1)*width)
	for i := len(b) - 1; i >= 0; i-- {
		for k := len(a) - 1; k >= 0; k-- {
			if b[i].key == a[k].key {
				long[i*width+k] = long[(i+1)*width+k+1] + 1
			} else {
				long[i*width+k] = max(long[(i+1)*width+k], long[i*width+k+1])
			}
		}
	}
	var out [][2]int
	for i, k := 0, 0; i < len(b) && k < len(a); {
		switch {
		case b[i].key == a[k].key:
			out = append(out, [2]int{i, k})
			i, k = i+1, k+1
		case long[(i+1)*width+k] >= long[i*width+k+1]:
			i++
		default:
			k++
		}
	}
	return out
}
