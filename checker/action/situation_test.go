package action

import (
	"slices"
	"strings"
	"testing"
)

// names lists the names of combinations, in order.
func names(made []Combination) []string {
	var out []string
	for _, c := range made {
		out = append(out, c.Name)
	}
	return out
}

// TestSituations: every situation with one case of each kind, written out by hand
// from EN 1990 6.4.3 and 6.5.3.
func TestSituations(t *testing.T) {
	cases := []Case{{Name: "G"}, {Name: "Q", Kind: Imposed, Category: "B"}, {Name: "W", Kind: Wind}, {Name: "A", Kind: Accident}, {Name: "E", Kind: Earthquake}}
	r := Rules{Values: Recommended, Equation: Equation610ab}
	ultimate, err := Ultimate(cases, r)
	if err != nil {
		t.Fatal(err)
	}
	service, err := Service(cases, r)
	if err != nil {
		t.Fatal(err)
	}
	quasi := r
	quasi.QuasiLeading = true
	other, err := Ultimate(cases, quasi)
	if err != nil {
		t.Fatal(err)
	}
	of := func(made []Combination, s Situation) string {
		var out []string
		for _, c := range made {
			if c.Situation == s {
				out = append(out, strings.TrimPrefix(c.Source, "EN 1990:2002 ")+" "+c.Name)
			}
		}
		return strings.Join(out, "\n")
	}
	for _, c := range []struct {
		made []Combination
		s    Situation
		want []string
	}{
		{ultimate, Persistent, []string{
			"(6.10a) 1.35 G", "(6.10a) 1.35 G + 1.05 Q", "(6.10a) 1.35 G + 0.9 W", "(6.10a) 1.35 G + 1.05 Q + 0.9 W",
			"(6.10a) 1.0 G", "(6.10a) 1.0 G + 1.05 Q", "(6.10a) 1.0 G + 0.9 W", "(6.10a) 1.0 G + 1.05 Q + 0.9 W",
			"(6.10b) 1.1475 G", "(6.10b) 1.1475 G + 1.5 Q", "(6.10b) 1.1475 G + 1.5 W", "(6.10b) 1.1475 G + 1.5 Q + 0.9 W", "(6.10b) 1.1475 G + 1.05 Q + 1.5 W",
			"(6.10b) 1.0 G + 1.5 Q", "(6.10b) 1.0 G + 1.5 W", "(6.10b) 1.0 G + 1.5 Q + 0.9 W", "(6.10b) 1.0 G + 1.05 Q + 1.5 W"}},
		{ultimate, Accidental, []string{"(6.11b) 1.0 G + 1.0 A", "(6.11b) 1.0 G + 0.5 Q + 1.0 A", "(6.11b) 1.0 G + 0.2 W + 1.0 A", "(6.11b) 1.0 G + 0.3 Q + 0.2 W + 1.0 A"}},
		{other, Accidental, []string{"(6.11b) 1.0 G + 1.0 A", "(6.11b) 1.0 G + 0.3 Q + 1.0 A"}},
		{ultimate, Seismic, []string{"(6.12b) 1.0 G + 1.0 E", "(6.12b) 1.0 G + 0.3 Q + 1.0 E", "(6.12b) 1.0 G - 1.0 E", "(6.12b) 1.0 G + 0.3 Q - 1.0 E"}},
		{service, Characteristic, []string{"(6.14b) 1.0 G", "(6.14b) 1.0 G + 1.0 Q", "(6.14b) 1.0 G + 1.0 W", "(6.14b) 1.0 G + 1.0 Q + 0.6 W", "(6.14b) 1.0 G + 0.7 Q + 1.0 W"}},
		{service, Frequent, []string{"(6.15b) 1.0 G", "(6.15b) 1.0 G + 0.5 Q", "(6.15b) 1.0 G + 0.2 W", "(6.15b) 1.0 G + 0.3 Q + 0.2 W"}},
		{service, QuasiPermanent, []string{"(6.16b) 1.0 G", "(6.16b) 1.0 G + 0.3 Q"}},
	} {
		if got, want := of(c.made, c.s), strings.Join(c.want, "\n"); got != want {
			t.Errorf("%s: got\n%s\nwant\n%s", c.s, got, want)
		}
	}
}

// TestSituationWords: every situation has its word, and the ultimate ones are
// told from the others.
func TestSituationWords(t *testing.T) {
	for i, n := range SituationNames() {
		s, ok := SituationOf(n)
		if !ok || int(s) != i || s.String() != n || s.Ultimate() != slices.Contains([]string{"persistent", "accidental", "seismic"}, n) {
			t.Errorf("%s is %v, %v", n, s, ok)
		}
	}
	if _, ok := SituationOf("unknown"); ok || len(SituationNames()) != 6 || Situation(9).String() != "unknown" {
		t.Error("a word that is no situation is one")
	}
}

// TestExclusive: cases that exclude each other never stand in one combination,
// each of them still stands in some, and nothing else is lost.
func TestExclusive(t *testing.T) {
	cases := []Case{{Name: "G"}, {Name: "W1", Kind: Wind}, {Name: "W2", Kind: Wind}, {Name: "Q", Kind: Imposed, Category: "A"}, {Name: "T", Kind: Temperature}, {Name: "A", Kind: Accident}}
	r := Rules{Values: Recommended, Equation: Equation610}
	all, err := Ultimate(cases, r)
	if err != nil {
		t.Fatal(err)
	}
	r.Exclusive = [][]int{{1, 2}, {4, 5}, {3}, nil}
	some, err := Ultimate(cases, r)
	if err != nil {
		t.Fatal(err)
	}
	kept := map[string]bool{}
	for _, c := range some {
		kept[c.Name] = true
	}
	for _, c := range all {
		if clash := c.Factors[1] != 0 && c.Factors[2] != 0 || c.Factors[4] != 0 && c.Factors[5] != 0; kept[c.Name] == clash {
			t.Errorf("%s: kept %v", c.Name, kept[c.Name])
		}
	}
	if len(some) >= len(all) || !kept["1.35 G + 1.5 W1"] || !kept["1.35 G + 1.5 W2 + 1.05 Q"] {
		t.Errorf("%d of %d: %v", len(some), len(all), names(some))
	}
}

// TestRoofs: an imposed load on a roof acts alone with snow and wind left out
// (EN 1991-1-1 3.3.2(1)), and with them when the calculation says so.
func TestRoofs(t *testing.T) {
	uk, _ := AnnexOf("United Kingdom")
	cases := []Case{{Name: "G"}, {Name: "R", Kind: Imposed, Category: "H"}, {Name: "S", Kind: Snow, Category: SnowLow}, {Name: "W", Kind: Wind}, {Name: "Q", Kind: Imposed, Category: "B"}}
	for _, together := range []bool{false, true} {
		made, err := Ultimate(cases, Rules{Values: uk, Equation: Equation610, RoofsTogether: together})
		if err != nil {
			t.Fatal(err)
		}
		both := 0
		for _, c := range made {
			if c.Factors[1] != 0 && (c.Factors[2] != 0 || c.Factors[3] != 0) {
				both++
			}
		}
		if (both > 0) != together || !slices.Contains(names(made), "1.35 G + 1.05 R + 1.5 Q") {
			t.Errorf("together %v: %d with both among %v", together, both, names(made))
		}
	}
}

// TestIndependent: permanent cases that are independent have each factor in each
// mixture; the number of them is limited, as is that of variable cases.
func TestIndependent(t *testing.T) {
	r := Rules{Values: Recommended, Equation: Equation610, Independent: true}
	made, err := Ultimate([]Case{{Name: "G1"}, {Name: "G2"}}, r)
	want := []string{"1.35 G1 + 1.35 G2", "1.0 G1 + 1.35 G2", "1.35 G1 + 1.0 G2", "1.0 G1 + 1.0 G2"}
	if err != nil || !slices.Equal(names(made), want) {
		t.Errorf("%v, %v", names(made), err)
	}
	var many []Case
	for range MaxIndependent {
		many = append(many, Case{})
	}
	if made, err = Ultimate(many, r); err != nil || len(made) != 1<<MaxIndependent {
		t.Errorf("%d, %v", len(made), err)
	}
	many = append(many, Case{})
	if _, err = Ultimate(many, r); err != ErrManyIndependent {
		t.Error(err)
	}
	r.Independent = false
	if made, err = Ultimate(many, r); err != nil || len(made) != 2 {
		t.Errorf("%d, %v", len(made), err)
	}
	var windy []Case
	for range MaxVariable + 1 {
		windy = append(windy, Case{Kind: Wind})
	}
	if _, err = Service(windy, r); err != ErrManyVariable {
		t.Error(err)
	}
}

// TestTogether: the largest selections of cases that no standard combines.
func TestTogether(t *testing.T) {
	cases := make([]Case, 5)
	for _, c := range []struct {
		exclusive [][]int
		want      []string
	}{
		{nil, []string{"11111"}},
		{[][]int{{2}}, []string{"11111"}},
		{[][]int{{1, 2}}, []string{"11011", "10111"}},
		{[][]int{{1, 2, 4}}, []string{"11010", "10110", "10011"}},
		{[][]int{{0, 1}, {1, 2}}, []string{"10111", "01011"}},
		{[][]int{{0, 1}, {3, 4}}, []string{"10110", "10101", "01110", "01101"}},
	} {
		made, ok := Together(cases, c.exclusive)
		var got []string
		for _, f := range made {
			s := ""
			for _, x := range f {
				s += short(x)
			}
			got = append(got, s)
		}
		slices.Sort(got)
		slices.Sort(c.want)
		if !ok || !slices.Equal(got, c.want) {
			t.Errorf("%v: %v, want %v", c.exclusive, got, c.want)
		}
	}
	if _, ok := Together(make([]Case, 9), [][]int{{0, 1, 2, 3, 4, 5, 6, 7, 8}}); ok {
		t.Error("too many are taken")
	}
}
