package complete

import (
	"math/rand/v2"
	"strings"
	"testing"
	"unicode/utf8"

	"kern/checker/generate"
)

// TestAnywhere asks at random places of calculations that are cut, joined and
// littered at random. Whatever the text, the ranges lie on one line around the
// place, and nothing panics.
func TestAnywhere(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 7))
	litter := []string{"{", "}", "\"", "(", ")", "=", ",", ";", " ", "\n", "\r\n", "load ", "section = ", "80 ", "kN", "#", "ä", "𝄞", "“", "”", "at ", "…", "-", "\u00a0", "14 ft 6 ", "as ", "1.1 G + ", "\x00", "\xff"}
	var texts []string
	for _, files := range written(t) {
		for _, text := range files {
			texts = append(texts, text)
		}
	}
	for range 1500 {
		text := texts[r.IntN(len(texts))]
		if len(text) > 700 {
			from := r.IntN(len(text) - 600)
			text = text[from : from+600]
		}
		for range r.IntN(6) {
			i := r.IntN(len(text) + 1)
			j := min(len(text), i+r.IntN(8))
			text = text[:i] + litter[r.IntN(len(litter))] + text[j:]
		}
		report := reportOf(map[string]string{"a.kern": text})
		for range 6 {
			offset := int32(r.IntN(len(text) + 1))
			for offset > 0 && int(offset) < len(text) && !utf8.RuneStart(text[offset]) {
				offset--
			}
			for _, how := range []Asking{ByUser, ByBlank, BySign, ByCatching} {
				l := At(report, "a.kern", offset, how)
				if len(l.Items) > 0 && (l.Word.Start > offset || l.Word.End != offset || l.Whole.Start != l.Word.Start || l.Whole.End < offset || int(l.Whole.End) > len(text) ||
					strings.ContainsAny(l.Whole.Of(text), "\r\n")) {
					t.Fatalf("%q at %d: word %v, whole %v", text, offset, l.Word, l.Whole)
				}
				if len(l.Items) > maxItems {
					t.Fatalf("%d items", len(l.Items))
				}
			}
			if h, ok := SignatureAt(report, "a.kern", offset); ok && (h.Active >= len(h.Forms) || h.Param >= len(h.Forms[h.Active].Params)) {
				t.Fatalf("%q at %d: %+v", text, offset, h)
			}
		}
	}
}

// giant is a calculation of 10,000 columns with a statement that is being typed
// in the middle of it.
func giant(tb testing.TB, typed string) (text string, offset int32) {
	tb.Helper()
	columns := generate.Columns(10_000, 1)
	i := strings.Index(columns, "column C5000 ")
	i += strings.Index(columns[i:], "\n}") + 1
	before := generate.Shared + columns[:i] + "    " + typed
	return before + "\n" + columns[i:], int32(len(before))
}

// measured runs something for a benchmark and reports the processor time, which
// counts on a machine that does other things too.
func measured(b *testing.B, ask func() bool) {
	b.ResetTimer()
	start := spent(b)
	for b.Loop() {
		if !ask() {
			b.Fatal("nothing")
		}
	}
	b.ReportMetric(float64(spent(b)-start)/float64(b.N), "cpu-ns/op")
}

// BenchmarkAt measures completion in a file of 10,000 columns.
func BenchmarkAt(b *testing.B) {
	for _, typed := range []string{"", "section = ", `section = "HEB 1`, `section = "W14x`, `section = "HSS8x`, `section = "100x`, "load G 80 ", "load G ", "require ", "depart ", "hold minor at ", `material = "`} {
		name := strings.TrimSpace(typed)
		if name == "" {
			name = "statement"
		}
		b.Run(name, func(b *testing.B) {
			text, offset := giant(b, typed)
			r := reportOf(map[string]string{"a.kern": text})
			measured(b, func() bool { return len(At(r, "a.kern", offset, ByUser).Items) > 0 })
		})
	}
	b.Run("as", func(b *testing.B) {
		text, _ := giant(b, "")
		i := strings.Index(text, "column C5001 ")
		i += strings.Index(text[i:], " {")
		text = text[:i] + " as " + text[i:]
		r := reportOf(map[string]string{"a.kern": text})
		measured(b, func() bool { return len(At(r, "a.kern", int32(i+4), ByUser).Items) > 0 })
	})
	b.Run("signature", func(b *testing.B) {
		text, offset := giant(b, "load G 80 kN at ")
		r := reportOf(map[string]string{"a.kern": text})
		measured(b, func() bool { _, ok := SignatureAt(r, "a.kern", offset); return ok })
	})
}
