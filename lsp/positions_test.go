package lsp

import (
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"go.lsp.dev/protocol"
)

// pieces make texts in which everything that can go wrong with positions does.
var pieces = []string{"a", "column A1 {", "ä", "β", "→", "𝄞", "👩‍🏗️", "\n", "\r\n", "\r", "\n\r", " ", "\t", "", "\xff", "\xe2\x82", "\ufeff", "m²"}

func randomText(r *rand.Rand, n int) string {
	var b strings.Builder
	for range n {
		b.WriteString(pieces[r.IntN(len(pieces))])
	}
	return b.String()
}

// checkPositions holds the converter against the slow one, at every byte and at
// places that do not exist.
func checkPositions(t *testing.T, text string) {
	t.Helper()
	for unit := range encoding(3) {
		p := positions{NewText(text), unit}
		for offset := int32(-1); offset <= int32(len(text))+1; offset++ {
			got, want := p.position(offset), slowPosition(text, offset, unit)
			if got != want {
				t.Fatalf("%q, unit %d: offset %d is %v, want %v", text, unit, offset, got, want)
			}
		}
		lines := slowLines(text)
		for line := range len(lines) + 1 {
			longest := 3
			if line < len(lines) {
				longest += len(lines[line])
			}
			for column := range longest {
				at := protocol.Position{Line: uint32(line), Character: uint32(column)}
				if got, want := p.offset(at), slowOffset(text, at, unit); got != want {
					t.Fatalf("%q, unit %d: %v is offset %d, want %d", text, unit, at, got, want)
				}
			}
		}
		far := protocol.Position{Line: 1<<32 - 1, Character: 1<<32 - 1}
		if got := p.offset(far); got != int32(len(text)) {
			t.Fatalf("%q: the farthest place is offset %d", text, got)
		}
	}
}

func TestPositions(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 2))
	for range 150 {
		checkPositions(t, randomText(r, r.IntN(20)))
	}
}

func FuzzPositions(f *testing.F) {
	for _, s := range []string{"", "a\r\nb", "𝄞\rä\n", "\xff𝄞"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, text string) {
		if len(text) < 200 {
			checkPositions(t, text)
		}
	})
}

// TestReplace holds the line starts of an edited text against those of the same
// text read anew.
func TestReplace(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 4))
	for range 200 {
		text := NewText(randomText(r, r.IntN(15)))
		for range 30 {
			start := r.Int32N(text.Len() + 1)
			end := start + r.Int32N(text.Len()-start+1)
			with := randomText(r, r.IntN(4))
			want := NewText(text.s[:start] + with + text.s[end:])
			next := text.Replace(start, end, with)
			if next.s != want.s || !slices.Equal(next.starts, want.starts) {
				t.Fatalf("%q with %d to %d replaced by %q: %q %v, want %q %v", text.s, start, end, with, next.s, next.starts, want.s, want.starts)
			}
			text = next
			if text.Len() > 200 {
				text = NewText("")
			}
		}
	}
}

func TestNegotiate(t *testing.T) {
	for _, c := range []struct {
		client []protocol.PositionEncodingKind
		want   encoding
	}{
		{nil, utf16Units}, {[]protocol.PositionEncodingKind{"utf-16"}, utf16Units}, {[]protocol.PositionEncodingKind{"utf-16", "utf-8"}, utf8Units},
		{[]protocol.PositionEncodingKind{"utf-32", "utf-8"}, utf8Units}, {[]protocol.PositionEncodingKind{"utf-32"}, utf32Units},
		{[]protocol.PositionEncodingKind{"utf-32", "utf-16"}, utf16Units}, {[]protocol.PositionEncodingKind{"utf-7"}, utf16Units},
	} {
		if got := negotiate(c.client); got != c.want {
			t.Errorf("%v: %v, want %v", c.client, got, c.want)
		}
	}
}

// TestSync edits a document through the protocol in each encoding, clamped
// places among the edits, and holds the server's text against the client's.
func TestSync(t *testing.T) {
	for unit, name := range map[encoding]string{utf16Units: "utf-16", utf8Units: "utf-8", utf32Units: "utf-32"} {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			s := start(t, t.TempDir())
			s.initialize(`{"general": {"positionEncodings": ["`+name+`"]}}`, "", ".")
			if s.unit != unit {
				t.Fatalf("the server counts in %v", encodingKinds[s.unit])
			}
			r := rand.New(rand.NewPCG(5, uint64(unit)))
			// what a client can hold is text: the library mends what is not
			clean := func(n int) string { return strings.ToValidUTF8(randomText(r, n), "?") }
			s.openText("a.kern", clean(30))
			for i := range 400 {
				var changes []protocol.TextDocumentContentChangeEvent
				text := s.texts["a.kern"]
				for range 1 + r.IntN(3) {
					if r.IntN(40) == 0 || len(text) > 600 {
						text = clean(20)
						changes = append(changes, &protocol.TextDocumentContentChangeWholeDocument{Text: text})
						continue
					}
					places := []protocol.Position{{Line: uint32(r.IntN(8)), Character: uint32(r.IntN(12))}, {Line: uint32(r.IntN(8)), Character: uint32(r.IntN(12))}}
					if i%7 == 0 {
						places[1] = protocol.Position{Line: 1 << 31, Character: 1 << 31}
					}
					a, b := slowOffset(text, places[0], unit), slowOffset(text, places[1], unit)
					if a > b {
						a, b, places[0], places[1] = b, a, places[1], places[0]
					}
					with := clean(r.IntN(4))
					text = text[:a] + with + text[b:]
					changes = append(changes, &protocol.TextDocumentContentChangePartial{Range: protocol.Range{Start: places[0], End: places[1]}, Text: with})
				}
				s.texts["a.kern"] = text
				s.change("a.kern", changes...)
				if i%10 != 0 {
					continue
				}
				s.settle()
				s.server.mu.Lock()
				d := s.server.docs[s.uri("a.kern")]
				s.server.mu.Unlock()
				if d.lost || d.text.s != text || d.version != s.versions["a.kern"] {
					t.Fatalf("after %d changes: %q (version %d, lost %v), want %q", i, d.text.s, d.version, d.lost, text)
				}
			}
		})
	}
}
