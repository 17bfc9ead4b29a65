package lang

import (
	"strings"
	"testing"
)

func TestFormatProperties(t *testing.T) {
	for seed := range uint64(4000) {
		checkLayout(t, random(seed))
	}
}

// The generator would be of no use if nothing that it makes could be read.
func TestGeneratorMakesReadableText(t *testing.T) {
	statements, broken, blocks, flawless := 0, 0, 0, 0
	for seed := range uint64(1000) {
		f := Parse(&FileID{}, random(2*seed), nil)
		fine := true
		for _, d := range f.Decls {
			fine = fine && len(d.Problems) == 0
			for _, s := range d.Stmts {
				statements++
				if s.Broken {
					broken++
				}
				if s.Body != nil && len(s.Body.Stmts) > 0 {
					blocks++
				}
			}
		}
		if fine {
			flawless++
		}
	}
	t.Logf("%d statements, %d broken, %d with a block; %d of 1000 files without a problem", statements, broken, blocks, flawless)
	if statements < 2000 || broken*4 > statements || broken == 0 || blocks < 300 || flawless < 300 {
		t.Errorf("%d statements, %d broken, %d with a block; %d of 1000 files without a problem", statements, broken, blocks, flawless)
	}
}

// A range of lines can be laid out alone, wherever it lies, and reads the same.
func TestFormatRangeProperties(t *testing.T) {
	for seed := range uint64(1500) {
		text := random(seed)
		f := Parse(&FileID{}, text, nil)
		g := newGenerator(seed)
		start := g.IntN(len(text) + 1)
		end := start + g.IntN(len(text)-start+1)
		edits := FormatRange(f, Span{int32(start), int32(end)})
		got := Apply(text, edits)
		if x, y := reading(f), reading(Parse(&FileID{}, got, nil)); x != y {
			t.Fatalf("%q from %d to %d became %q", text, start, end, got)
		}
		from := lineStart(text, start)
		if before := strings.TrimRight(text[:from], " \t\r\n;\u00a0\u2009\ufeff"); !strings.HasPrefix(got, before) {
			t.Fatalf("%q from %d to %d changed what lies before: %q", text, start, end, got)
		}
	}
}

func FuzzFormat(f *testing.F) {
	for _, s := range seeds {
		f.Add(s)
	}
	for seed := range uint64(20) {
		f.Add(random(seed))
	}
	f.Fuzz(func(t *testing.T, text string) {
		if len(text) > 1<<14 {
			return
		}
		checkLayout(t, text)
	})
}
