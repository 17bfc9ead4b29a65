package model

import (
	"slices"

	"kern/lang"
)

// Imported are the forces of a member that come from the table of an analysis
// elsewhere, in place of loads.
type Imported struct {
	Table        string // the file
	Place        lang.Place
	Positions    []float64 // from the base up, m, those of all combinations
	Combinations []ImportedCombination
	// Bends tells about which axes a moment is given; Sheared whether shear forces
	// are.
	Bends   [2]bool
	Sheared [2]bool
	Single  bool // one position a combination: the forces are taken as the same all along
}

// ImportedCombination are the forces under one combination of the analysis.
type ImportedCombination struct {
	Name string
	// Spans are the forces between neighbouring positions, from the base up.
	Spans []ImportedSpan
}

// ImportedSpan are the forces just above a position and just below the next: N
// (compression positive) in N, M in Nm by axis (major, minor), V in N.
type ImportedSpan struct {
	N    [2]float64
	M, V [2][2]float64 // [axis][below, above]
}

// forces reads the tables that the calculation names.
func (b *builder) forces() {
	for _, d := range b.stmts {
		if d.stmt.Word == "forces" && !b.table(d) {
			name := "forces"
			if len(d.stmt.Args) > 0 {
				name = d.stmt.Args[0].Span.Of(d.decl.Text)
			}
			b.env.unread = append(b.env.unread, name)
		}
	}
}

// table reads what a forces statement names. It is false when the table could not
// be read to its end: any member may then have forces that are not known.
func (b *builder) table(d declared) bool {
	if d.stmt.Broken {
		return false
	}
	r := b.reader(d)
	e := r.take()
	if e == nil || e.Kind != lang.StringExpr {
		return false // reported with the file that it does not name
	}
	if !r.may("compression") {
		if !r.slip() {
			end := lang.Span{Start: d.stmt.Line.End, End: d.stmt.Line.End}
			r.problem(lang.Problem{Rule: "wrong-form", Span: d.stmt.Line, Message: "which sign compression has in the table must be said: forces \"" + e.Text + "\" compression positive",
				Fixes: []lang.Fix{lang.Replace("Compression is positive", false, end, " compression positive"), lang.Replace("Compression is negative", false, end, " compression negative")}})
		}
		return false
	}
	r.take()
	sign, ok := r.wordOf("the sign of compression", "positive", "negative")
	if !ok || !r.end() {
		return false
	}
	name, _ := lang.Resolve(d.decl.File.Name, e.Text)
	i := slices.IndexFunc(b.files, func(f *lang.File) bool { return f.Data && f.Name == name })
	if i < 0 || b.files[i].Unreadable != "" {
		return false // reported where it lies
	}
	t := &tableReader{b: b, file: b.files[i], from: r.place(e.Span), members: map[string]*rows{}, sign: 1}
	if sign == "negative" {
		t.sign = -1
	}
	return t.read()
}
