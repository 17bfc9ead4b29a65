package lsp

import (
	"unicode/utf16"
	"unicode/utf8"

	"go.lsp.dev/protocol"
)

// The protocol's positions once more, written for plainness: what the server's
// own converter is held against, and what the test client reads answers with.

// slowLines cuts a text into lines with their ends.
func slowLines(text string) []string {
	var out []string
	line := ""
	for i := 0; i < len(text); i++ {
		line += text[i : i+1]
		if text[i] == '\n' || text[i] == '\r' && !(i+1 < len(text) && text[i+1] == '\n') {
			out = append(out, line)
			line = ""
		}
	}
	return append(out, line)
}

// slowUnits counts the units of a text that is whole characters.
func slowUnits(text string, unit encoding) int {
	n := 0
	for text != "" {
		r, width := utf8.DecodeRuneInString(text)
		switch {
		case unit == utf8Units:
			n += width
		case unit == utf16Units && !(r == utf8.RuneError && width == 1):
			n += len(utf16.Encode([]rune{r}))
		default:
			n++
		}
		text = text[width:]
	}
	return n
}

// slowEnds gives the places of a line at which a character begins, and the end.
func slowPlaces(line string) []int {
	for len(line) > 0 && (line[len(line)-1] == '\n' || line[len(line)-1] == '\r') {
		line = line[:len(line)-1]
	}
	var out []int
	for i := 0; i < len(line); {
		out = append(out, i)
		_, width := utf8.DecodeRuneInString(line[i:])
		i += width
	}
	return append(out, len(line))
}

func slowOffset(text string, at protocol.Position, unit encoding) int32 {
	lines := slowLines(text)
	if int64(at.Line) >= int64(len(lines)) {
		return int32(len(text))
	}
	start := 0
	for _, l := range lines[:at.Line] {
		start += len(l)
	}
	best := 0
	for _, p := range slowPlaces(lines[at.Line]) {
		if int64(slowUnits(lines[at.Line][:p], unit)) <= int64(at.Character) {
			best = p
		}
	}
	return int32(start + best)
}

func slowPosition(text string, offset int32, unit encoding) protocol.Position {
	offset = min(max(offset, 0), int32(len(text)))
	start := 0
	lines := slowLines(text)
	for n, l := range lines {
		if int(offset) < start+len(l) || n == len(lines)-1 {
			best := 0
			for _, p := range slowPlaces(l) {
				if start+p <= int(offset) {
					best = p
				}
			}
			return protocol.Position{Line: uint32(n), Character: uint32(slowUnits(l[:best], unit))}
		}
		start += len(l)
	}
	return protocol.Position{}
}
