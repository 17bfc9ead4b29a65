package lsp

import (
	"fmt"
	"strings"
	"testing"

	"kern/checker/generate"

	"go.lsp.dev/protocol"
)

// BenchmarkEdit is the work of one key in a large file, from the change to the
// diagnostics, within one process. lsp/bench measures the built program.
func BenchmarkEdit(b *testing.B) {
	for _, n := range []int{20, 1_000, 10_000} {
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			s := start(b, b.TempDir())
			s.initialize(`{}`, "", ".")
			text := generate.Shared + generate.Columns(n, 1)
			at := strings.Index(text, fmt.Sprintf("column C%d ", n/2))
			at += strings.Index(text[at:], "load G ") + len("load G ")
			text = text[:at] + "99" + text[at:]
			s.openText("a.kern", text)
			s.settle()
			place := slowPosition(text, int32(at), s.unit)
			next := place
			next.Character++
			for i := 0; b.Loop(); i++ {
				change := &protocol.TextDocumentContentChangePartial{Range: protocol.Range{Start: place, End: place}, Text: "9"}
				if i%2 == 1 {
					change.Range.End, change.Text = next, ""
				}
				s.change("a.kern", change)
				s.settle()
			}
		})
	}
}
