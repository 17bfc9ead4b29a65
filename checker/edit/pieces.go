package edit

import (
	"strings"

	"kern/lang"
)

// Pieces are a text as parts of the text that it grew out of and what was put
// between them. They join changes that were made one after another into changes
// of the first text.
type Pieces struct{ parts []part }

// part is a kept range of the first text, or a text of its own.
type part struct {
	start, end int
	text       string
	kept       bool
}

func (p part) length() int {
	if p.kept {
		return p.end - p.start
	}
	return len(p.text)
}

// cut gives the part from one of its bytes to another.
func (p part) cut(from, to int) part {
	if p.kept {
		return part{start: p.start + from, end: p.start + to, kept: true}
	}
	return part{text: p.text[from:to]}
}

// Whole is a text that has not changed.
func Whole(text string) *Pieces {
	return &Pieces{parts: []part{{end: len(text), kept: true}}}
}

// Apply makes changes, which are in order and do not overlap, to the text as it
// is now.
func (p *Pieces) Apply(changes []lang.Change) {
	var out []part
	add := func(x part) {
		if x.length() > 0 {
			out = append(out, x)
		}
	}
	i, at := 0, 0 // at is where part i begins in the present text
	// copy takes the present text up to an offset, or leaves it out
	copy := func(from, to int, keep bool) {
		for i < len(p.parts) {
			x := p.parts[i]
			begin, end := max(from, at), min(to, at+x.length())
			if keep && begin < end {
				add(x.cut(begin-at, end-at))
			}
			if at+x.length() > to {
				return
			}
			at += x.length()
			i++
		}
	}
	pos := 0
	for _, c := range changes {
		copy(pos, int(c.Span.Start), true)
		add(part{text: c.New})
		copy(int(c.Span.Start), int(c.Span.End), false)
		pos = int(c.Span.End)
	}
	copy(pos, 1<<31-1, true)
	p.parts = out
}

// Changes gives what was changed, as replacements in the first text, each
// without the bytes that it would only write again.
func (p *Pieces) Changes(text string) []lang.Change {
	var out []lang.Change
	var new strings.Builder
	pos := 0
	flush := func(to int) {
		if c, ok := trim(text, pos, to, new.String()); ok {
			out = append(out, c)
		}
		new.Reset()
	}
	for _, x := range p.parts {
		if !x.kept {
			new.WriteString(x.text)
			continue
		}
		if x.start > pos || new.Len() > 0 {
			flush(x.start)
		}
		pos = x.end
	}
	if pos < len(text) || new.Len() > 0 {
		flush(len(text))
	}
	return out
}

// trim leaves out of a replacement what both texts begin and end with. It is
// false when nothing is left.
func trim(text string, from, to int, new string) (lang.Change, bool) {
	for from < to && new != "" && text[from] == new[0] {
		from, new = from+1, new[1:]
	}
	for from < to && new != "" && text[to-1] == new[len(new)-1] {
		to, new = to-1, new[:len(new)-1]
	}
	// a character is replaced as a whole
	for from > 0 && from < len(text) && text[from]&0xC0 == 0x80 {
		from--
		new = text[from:from+1] + new
	}
	for to < len(text) && text[to]&0xC0 == 0x80 {
		new += text[to : to+1]
		to++
	}
	return lang.Change{Span: lang.Span{Start: int32(from), End: int32(to)}, New: new}, from < to || new != ""
}
