package sheet_test

import (
	"io"
	"testing"

	"kern/checker/generate"
	"kern/checker/sheet"
)

// BenchmarkSheet writes a sheet of 500 members, pictures and all.
func BenchmarkSheet(b *testing.B) {
	r := check(generate.Project(500, 1))
	for _, form := range forms {
		b.Run(form, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				s, err := sheet.New(r, sheet.Options{Program: "kern test"})
				if err != nil {
					b.Fatal(err)
				}
				if err := s.Write(io.Discard, form, nil); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
