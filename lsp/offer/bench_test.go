package offer

import (
	"fmt"
	"strings"
	"testing"

	"kern/checker/generate"
	"kern/lang"
)

// BenchmarkAt is what a list of offers costs while somebody moves about: at a
// member's name, at a height, at a load and at a section, in a file of many
// columns.
func BenchmarkAt(b *testing.B) {
	for _, n := range []int{20, 1_000, 10_000} {
		report := check(map[string]string{"a.kern": generate.Shared + generate.Columns(n, 1)})
		text := report.Project.Files["a.kern"].Text
		middle := strings.Index(text, fmt.Sprintf("column C%d ", n/2))
		for _, at := range []string{"C", "height", "m\n    base", "load G", "section"} {
			place := int32(middle + strings.Index(text[middle:], at))
			if at == "load G" {
				place += int32(len("load G 1"))
			}
			b.Run(fmt.Sprintf("%d/%s", n, strings.Fields(at)[0]), func(b *testing.B) {
				offers := 0
				for b.Loop() {
					offers = len(At(Request{Report: report, File: "a.kern", Span: lang.Span{Start: place, End: place}}))
				}
				b.ReportMetric(float64(offers), "offers")
			})
		}
	}
}

// BenchmarkEdits is what an offer costs when it is taken: a value that many
// columns have is named.
func BenchmarkEdits(b *testing.B) {
	for _, n := range []int{20, 1_000, 10_000} {
		text := generate.Shared + generate.Columns(n, 1)
		report := check(map[string]string{"a.kern": text})
		place := int32(strings.Index(text, "height   = ") + len("height   = "))
		for _, o := range At(Request{Report: report, File: "a.kern", Span: lang.Span{Start: place, End: place}}) {
			if o.Kind != Extract {
				continue
			}
			b.Run(fmt.Sprint(n), func(b *testing.B) {
				edits := 0
				for b.Loop() {
					edits = len(o.Edits())
				}
				b.ReportMetric(float64(edits), "edits")
			})
			break
		}
	}
}
