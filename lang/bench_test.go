package lang

import (
	"fmt"
	"strings"
	"testing"
)

// columnsText is a calculation of n columns as people write them, laid out by
// hand: about 600 bytes a column.
func columnsText(n int) string {
	var b strings.Builder
	b.WriteString(`basis {
    standard "EN 1993-1-1:2005" annex "recommended"
    actions "EN 1990:2002" eq "6.10"
    show kN, kNm, mm, MPa
}

eaves = 4.80 m   # from the survey
material s355 = "S355" per "EN 10025-2"
section mast = "HEB 160"
section leg = tube { width = 90 mm; wall = 6.3 mm; made = cold }
case G permanent
case Q imposed "C3"
case W wind
level ground at 0 m
level gallery at 4.20 m { G 4.1 kN/m2; Q 5.0 kN/m2 }

`)
	for i := range n {
		fmt.Fprintf(&b, `# grid line %d
column A%d "Gallery edge post %d" {
    section = mast
    material = s355
    height = %d.%d m   # from drawing 12
    base pinned
    top pinned
    hold both at %d.2 m
    effective = 0.85 about minor
    load G %d.5 kN at top
    load Q %d kN at top offset 180 mm about major
    load W 1.8 kN/m about major   # suction
    load Q %d * 2.5 kN - 3 kN at top
    limit utilisation = 0.95
    limit sway = height / 300
    require N_b_minor >= %d kN because "room for one more floor"
    depart slenderness because "existing post, load unchanged"
}

`, i, i, i, 3+i%5, i%10, 1+i%2, 40+i%400, 30+i%200, 1+i%50, 100+i%300)
	}
	return b.String()
}

func BenchmarkParse(b *testing.B) {
	text := columnsText(2000)
	b.SetBytes(int64(len(text)))
	b.ReportAllocs()
	for b.Loop() {
		Parse(&FileID{}, text, nil)
	}
}

// One number of one column changes.
func BenchmarkParseEdit(b *testing.B) {
	text := columnsText(2000)
	id := &FileID{}
	old := Parse(id, text, nil)
	edited := strings.Replace(text, "load G 140.5 kN", "load G 140.75 kN", 1)
	b.ReportAllocs()
	for b.Loop() {
		Parse(id, edited, old)
	}
}

func BenchmarkLexer(b *testing.B) {
	text := columnsText(2000)
	b.SetBytes(int64(len(text)))
	for b.Loop() {
		for l := NewLexer(text); l.Next().Kind != EOF; {
		}
	}
}

// A text that is laid out by hand: it is parsed, laid out, and read again.
func BenchmarkFormat(b *testing.B) {
	text := columnsText(2000)
	b.SetBytes(int64(len(text)))
	b.ReportAllocs()
	for b.Loop() {
		Format(text)
	}
}

// A text that is laid out already.
func BenchmarkFormatAgain(b *testing.B) {
	text := Format(columnsText(2000))
	b.SetBytes(int64(len(text)))
	for b.Loop() {
		Format(text)
	}
}

func TestColumnsTextIsSound(t *testing.T) {
	f := Parse(&FileID{}, columnsText(20), nil)
	for _, d := range f.Decls {
		for _, p := range d.Problems {
			t.Errorf("%s: %s", p.Rule, p.Message)
		}
	}
	checkLayout(t, f.Text)
}
