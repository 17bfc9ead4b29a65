package catalogue

import (
	"slices"
	"testing"
)

func TestNearest(t *testing.T) {
	for _, c := range []struct {
		text string
		n    int
		want []string
	}{
		{"HEB 210", 2, []string{"HEB 200", "HEB 220"}},
		{"HE 210 B", 2, []string{"HEB 200", "HEB 220"}},
		{"IPE 310", 2, []string{"IPE 300", "IPE 330"}},
		{"HBE 200", 1, []string{"HEB 200"}},
		{"HE 200", 3, []string{"HEA 200", "HEB 200", "HEM 200"}},
		{"HEC 200", 3, []string{"HEA 200", "HEB 200", "HEM 200"}},
		{"HEB 2000", 2, []string{"HEB 1000", "HEB 900"}},
		{"UPN 210", 2, []string{"UPN 200", "UPN 220"}},
		{"IEP 300", 1, []string{"IPE 300"}},
		{"SHS 100x", 3, []string{"SHS 100x100x4", "SHS 100x100x5", "SHS 100x100x6.3"}},
		{"SHS 100x100", 2, []string{"SHS 100x100x4", "SHS 100x100x5"}},
		{"SHS 100x100x60", 1, []string{"SHS 100x100x10"}},
		{"SHS 100x cold", 2, []string{"SHS 100x100x3 cold", "SHS 100x100x4 cold"}},
		{"SSH 100x100x5", 1, []string{"SHS 100x100x5"}},
		{"RHS 200x100", 1, []string{"RHS 200x100x4"}},
		{"RHS 100x200", 1, []string{"RHS 200x100x4"}},
		{"CHS 114.3", 1, []string{"CHS 114.3x3.2"}},
		{"CHS 114x5x", 1, []string{"CHS 114.3x5"}},
		{"SHS", 1, []string{"SHS 40x40x2.6"}},
		{"HEB", 1, []string{"HEB 100"}},
		{"HEB 210", 0, nil},
		{"HEB 210", -1, nil},
		{"concrete", 3, nil},
		{"", 3, nil},
		{"\xff", 3, nil},
	} {
		if got := Nearest(c.text, c.n); !slices.Equal(got, c.want) {
			t.Errorf("Nearest(%q, %d) = %q, want %q", c.text, c.n, got, c.want)
		}
	}
	if got := Nearest("HEB 210", 1000); len(got) != 24 {
		t.Errorf("all of the family: %d", len(got))
	}
}

func TestSearch(t *testing.T) {
	names := func(es []Entry) (out []string) {
		for _, e := range es {
			out = append(out, e.Designation)
		}
		return out
	}
	for _, c := range []struct {
		text string
		want []string
	}{
		{"IPE 3", []string{"IPE 300", "IPE 330", "IPE 360"}},
		{"ipe 300", []string{"IPE 300"}},
		{"HE 200", []string{"HEAA 200", "HEA 200", "HEB 200", "HEM 200"}},
		{"SHS 400", []string{"SHS 400x400x10", "SHS 400x400x12.5", "SHS 400x400x16", "SHS 400x400x20",
			"SHS 400x400x10 cold", "SHS 400x400x12 cold", "SHS 400x400x12.5 cold", "SHS 400x400x16 cold"}},
		{"cold square 400", []string{"SHS 400x400x10 cold", "SHS 400x400x12 cold", "SHS 400x400x12.5 cold", "SHS 400x400x16 cold"}},
		{"EN 10210 25x", nil},
		{"SHS 100x100x5.5", []string{"SHS 100x100x5.5"}},
		{"channel 400", []string{"UPN 400", "UPE 400"}},
		{"nothing of the sort", nil},
		{"\xff", nil},
	} {
		if got := names(Search(c.text)); !slices.Equal(got, c.want) {
			t.Errorf("Search(%q) = %q, want %q", c.text, got, c.want)
		}
	}
	if got := Search(" "); len(got) != len(All()) {
		t.Errorf("empty text: %d", len(got))
	}
	for _, e := range Search("EN 10219") {
		if e.Product != ColdHollow {
			t.Errorf("EN 10219 gives %s", e.Designation)
		}
	}
	if n := len(Search("EN 10219")); n < 100 {
		t.Errorf("EN 10219: %d", n)
	}
}
