package action

import (
	"encoding/csv"
	"os"
	"strconv"
	"strings"
	"testing"
)

// records reads a file of testdata: the records by column name.
func records(t testing.TB, name string, want int) []map[string]string {
	t.Helper()
	f, err := os.Open("testdata/" + name)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	r := csv.NewReader(f)
	r.Comment = '#'
	lines, err := r.ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var out []map[string]string
	for _, l := range lines[1:] {
		m := map[string]string{}
		for i, head := range lines[0] {
			m[head] = l[i]
		}
		out = append(out, m)
	}
	if len(out) != want {
		t.Fatalf("%s: %d records, want %d", name, len(out), want)
	}
	return out
}

// numbers reads numbers with spaces between; nil when there are none.
func numbers(t testing.TB, s string) []float64 {
	t.Helper()
	var out []float64
	for _, w := range strings.Fields(s) {
		out = append(out, number(t, w))
	}
	return out
}

func number(t testing.TB, s string) float64 {
	t.Helper()
	x, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return x
}

// end reads an end condition.
func end(t testing.TB, s string) End {
	t.Helper()
	e, ok := EndNames[s]
	if !ok {
		t.Fatalf("no end condition %q", s)
	}
	return e
}
