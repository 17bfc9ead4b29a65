package lang

import "strings"

// Change replaces a range of a file's text; offsets count from the start of the
// file.
type Change struct {
	Span Span
	New  string
}

// FormatEdits gives what Format changes, as the smallest replacements: each
// covers blanks, line ends and semicolons between two tokens and nothing else.
// They are in order, do not touch and must be applied together.
func FormatEdits(f *File) []Change {
	return changes(f.Text, FormatFile(f))
}

// FormatRange gives the changes that touch the lines of a range of bytes. It
// gives none when the lines cannot be laid out alone.
func FormatRange(f *File, within Span) []Change {
	start, end := lineStart(f.Text, int(within.Start)), len(f.Text)
	if int(within.End) < len(f.Text) {
		end, _ = lineEnd(f.Text, max(int(within.End), start))
	}
	var kept []Change
	for _, c := range FormatEdits(f) {
		if int(c.Span.End) >= start && int(c.Span.Start) <= end {
			kept = append(kept, c)
		}
	}
	if len(kept) > 0 && !readsAs(f, Apply(f.Text, kept)) {
		return nil
	}
	return kept
}

func lineStart(text string, pos int) int {
	pos = min(max(pos, 0), len(text))
	return strings.LastIndexAny(text[:pos], "\r\n") + 1
}

// Apply carries out changes that are in order and do not overlap.
func Apply(text string, changes []Change) string {
	var b strings.Builder
	pos := 0
	for _, c := range changes {
		b.WriteString(text[pos:c.Span.Start])
		b.WriteString(c.New)
		pos = int(c.Span.End)
	}
	b.WriteString(text[pos:])
	return b.String()
}

// changes compares a text with its layout. Both are the same but for the gaps
// between tokens; inside texts and comments the gaps are the same too.
func changes(old, laid string) []Change {
	var out []Change
	if old == laid {
		return nil
	}
	i, j := 0, 0
	for i < len(old) || j < len(laid) {
		m, n := gapLength(old[i:]), gapLength(laid[j:])
		if old[i:i+m] != laid[j:j+n] {
			out = append(out, Change{Span{int32(i), int32(i + m)}, laid[j : j+n]})
		}
		i, j = i+m, j+n
		from := i
		for i < len(old) && j < len(laid) && old[i] == laid[j] && gapLength(old[i:]) == 0 && gapLength(laid[j:]) == 0 {
			i, j = i+1, j+1
		}
		if m+n == 0 && i == from {
			// cannot be: the texts differ in more than gaps
			return []Change{{Span{0, int32(len(old))}, laid}}
		}
	}
	return out
}

// gapLength is the length of the blanks, line ends and semicolons at the start
// of s.
func gapLength(s string) int {
	i := 0
	for i < len(s) {
		if c := s[i]; c == '\n' || c == '\r' || c == ';' {
			i++
			continue
		}
		n := blankLength(s[i:])
		if n == 0 {
			break
		}
		i += n
	}
	return i
}
