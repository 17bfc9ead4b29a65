package schedule_test

import (
	"io"
	"os"
	"path/filepath"
	"testing"

	"kern/checker/schedule"

	"golang.org/x/tools/txtar"
)

// TestBrokenFiles lists the broken files of the language: nothing stops it.
func TestBrokenFiles(t *testing.T) {
	paths, err := filepath.Glob("../../testdata/broken/*.txtar")
	if err != nil || len(paths) < 100 {
		t.Fatal(len(paths), err)
	}
	for _, p := range paths {
		data, err := os.ReadFile(p)
		if err != nil {
			t.Fatal(err)
		}
		files := map[string]string{}
		for _, f := range txtar.Parse(data).Files {
			if f.Name != "want" {
				files[f.Name] = string(f.Data)
			}
		}
		r := check(files)
		for _, order := range schedule.Orders {
			s := schedule.New(r, order)
			if len(s.Rows) != len(r.Members) {
				t.Errorf("%s: %d rows of %d members", p, len(s.Rows), len(r.Members))
			}
			if err := s.Text(io.Discard, order == schedule.ByName); err != nil {
				t.Error(err)
			}
			if err := s.CSV(io.Discard); err != nil {
				t.Error(err)
			}
		}
	}
}
