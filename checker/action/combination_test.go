package action

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
	"sort"
	"strings"
	"testing"
)

// caseOf reads a kind of action as the second implementation writes it.
func caseOf(t *testing.T, name, kind string) Case {
	t.Helper()
	c := Case{Name: name}
	word, rest, _ := strings.Cut(kind, " ")
	k, ok := KindNames[word]
	if !ok {
		t.Fatalf("no kind %q", kind)
	}
	c.Kind, c.Category = k, rest
	switch rest {
	case "<= 1000 m":
		c.Category = SnowLow
	case "> 1000 m":
		c.Category = SnowHigh
	}
	return c
}

// made are the combinations for ultimate limit states by (6.10), roofs with snow
// and wind; false where there are none.
func made(cases []Case, v Values) ([]Combination, bool) {
	out, err := Ultimate(cases, Rules{Values: v, Equation: Equation610, RoofsTogether: true})
	return out, err == nil
}

// keys writes factor vectors so that they can be compared as a set.
func keys(vectors [][]float64) []string {
	var out []string
	for _, v := range vectors {
		var b strings.Builder
		for _, f := range v {
			fmt.Fprintf(&b, "%.12f ", f)
		}
		out = append(out, b.String())
	}
	sort.Strings(out)
	return out
}

// effects are the largest and least sums of a linear effect.
func effects(combinations []Combination, effect []float64) (high, low float64) {
	high, low = math.Inf(-1), math.Inf(1)
	for _, c := range combinations {
		sum := 0.0
		for i, f := range c.Factors {
			sum += f * effect[i]
		}
		high, low = max(high, sum), min(low, sum)
	}
	return high, low
}

// TestPersistentSecond: the same factors as the second implementation (which is
// no published source) and the same extremes of a random linear effect, in 60
// random sets of cases. Both leave an absent action out; an accompanying roof
// load of category H has the factor 1.5 times zero, the same vector as without
// it, and both count that once.
func TestPersistentSecond(t *testing.T) {
	text, err := os.ReadFile("testdata/combinations-second.json")
	if err != nil {
		t.Fatal(err)
	}
	var file struct {
		Sets []struct {
			Cases []struct {
				Kind   string
				Effect float64
			}
			Max, Min float64
			Vectors  [][]float64
		}
	}
	if err := json.Unmarshal(text, &file); err != nil {
		t.Fatal(err)
	}
	if len(file.Sets) != 60 {
		t.Fatalf("%d sets, want 60", len(file.Sets))
	}
	for n, s := range file.Sets {
		var cases []Case
		var effect []float64
		for i, c := range s.Cases {
			cases = append(cases, caseOf(t, fmt.Sprintf("L%d", i+1), c.Kind))
			effect = append(effect, c.Effect)
		}
		got, ok := made(cases, Recommended)
		if !ok {
			t.Errorf("set %d: no combinations", n+1)
			continue
		}
		high, low := effects(got, effect)
		if !(math.Abs(high-s.Max) <= 1e-12*(1+math.Abs(s.Max))) || !(math.Abs(low-s.Min) <= 1e-12*(1+math.Abs(s.Min))) {
			t.Errorf("set %d: %.15g and %.15g, want %.15g and %.15g", n+1, high, low, s.Max, s.Min)
		}
		var vectors [][]float64
		for _, c := range got {
			vectors = append(vectors, c.Factors)
		}
		ours, theirs := keys(vectors), keys(s.Vectors)
		if strings.Join(ours, "\n") != strings.Join(theirs, "\n") {
			t.Errorf("set %d: %d combinations, want %d", n+1, len(ours), len(theirs))
		}
	}
}

// TestPublishedFactors: snow up to 1000 m and wind on a frame, printed in Steel
// Buildings in Europe, Multi-Storey Steel Buildings, Part 3: Actions, p. 3-5 (EN
// 1990:2002 expression 6.10, recommended factors).
func TestPublishedFactors(t *testing.T) {
	cases := []Case{{Name: "G"}, {Name: "S", Kind: Snow, Category: SnowLow}, {Name: "W", Kind: Wind}}
	got, ok := made(cases, Recommended)
	if !ok {
		t.Fatal("no combinations")
	}
	byName := map[string][]float64{}
	for _, c := range got {
		byName[c.Name] = c.Factors
		if c.Source != "EN 1990:2002 (6.10)" {
			t.Errorf("%s: source %q", c.Name, c.Source)
		}
	}
	near := func(x, y float64) bool { return math.Abs(x-y) <= 1e-12 }
	if f := byName["1.35 G + 1.5 S + 0.9 W"]; f == nil || !near(f[2], 0.9) || !near(f[0]+f[1]+f[2], 3.75) {
		t.Errorf("snow leading: %v in %v", f, byName)
	}
	if f := byName["1.35 G + 0.75 S + 1.5 W"]; f == nil || !near(f[1], 0.75) {
		t.Errorf("wind leading: %v in %v", f, byName)
	}
	if len(got) != 10 {
		t.Errorf("%d combinations, want 2 times (G; S; W; S with W; W with S)", len(got))
	}
}

// TestComputedSums: own calculation, not a published one: Gk = 100, offices
// 60, snow up to 1000 m 10, wind 15, all in one direction, expression 6.10 with
// the recommended values.
func TestComputedSums(t *testing.T) {
	cases := []Case{{Name: "G"}, {Name: "Q", Kind: Imposed, Category: "B"}, {Name: "S", Kind: Snow, Category: SnowLow}, {Name: "W", Kind: Wind}}
	effect := []float64{100, 60, 10, 15}
	got, ok := made(cases, Recommended)
	if !ok {
		t.Fatal("no combinations")
	}
	for name, want := range map[string]float64{
		"1.35 G + 1.5 Q + 0.75 S + 0.9 W":  246,
		"1.35 G + 1.05 Q + 1.5 S + 0.9 W":  226.5,
		"1.35 G + 1.05 Q + 0.75 S + 1.5 W": 228,
	} {
		found := false
		for _, c := range got {
			if c.Name == name {
				found = true
				if sum, _ := effects([]Combination{c}, effect); math.Abs(sum-want) > 1e-9 {
					t.Errorf("%s: %.12g, want %g", name, sum, want)
				}
			}
		}
		if !found {
			t.Errorf("%s is missing", name)
		}
	}
	if high, low := effects(got, effect); math.Abs(high-246) > 1e-9 || math.Abs(low-100) > 1e-9 {
		t.Errorf("largest %.12g, least %.12g", high, low)
	}
}

// TestPsi: EN 1990:2002 Table A1.1, recommended values (from memory; the Finnish
// decree of 15 October 2007, annex 1, prints the same for A, B, D to H, wind and
// temperature), and what is no variable action.
func TestPsi(t *testing.T) {
	want := map[Case]Psi{
		{Kind: Imposed, Category: "A"}: {0.7, 0.5, 0.3}, {Kind: Imposed, Category: "B"}: {0.7, 0.5, 0.3}, {Kind: Imposed, Category: "C"}: {0.7, 0.7, 0.6},
		{Kind: Imposed, Category: "D"}: {0.7, 0.7, 0.6}, {Kind: Imposed, Category: "E"}: {1, 0.9, 0.8}, {Kind: Imposed, Category: "F"}: {0.7, 0.7, 0.6},
		{Kind: Imposed, Category: "G"}: {0.7, 0.5, 0.3}, {Kind: Imposed, Category: "H"}: {0, 0, 0},
		{Kind: Snow, Category: SnowLow}: {0.5, 0.2, 0}, {Kind: Snow, Category: SnowHigh}: {0.7, 0.5, 0.2},
		{Kind: Wind}: {0.6, 0.2, 0}, {Kind: Temperature}: {0.6, 0.5, 0},
		{Kind: Wind, Own: Psi{0.3, 0.9, 0.1}, Stated: [3]bool{true, false, true}}: {0.3, 0.2, 0.1},
		{Kind: Imposed, Own: Psi{1, 1, 1}, Stated: [3]bool{true, true, true}}:     {1, 1, 1},
	}
	for c, w := range want {
		if got, ok := Recommended.Psi(c); !ok || got != w {
			t.Errorf("%+v: %v, %v", c, got, ok)
		}
	}
	for _, c := range []Case{
		{Kind: Imposed}, {Kind: Imposed, Category: "I"}, {Kind: Imposed, Category: "a"}, {Kind: Snow}, {Kind: Snow, Category: "A"},
		{Kind: Permanent}, {Kind: Accident}, {Kind: Earthquake}, {Kind: 99}, {Kind: Permanent, Stated: [3]bool{true, true, true}},
		{Kind: Imposed, Own: Psi{1, 1, 1}, Stated: [3]bool{true, true, false}},
	} {
		if got, ok := Recommended.Psi(c); ok || got != (Psi{}) {
			t.Errorf("%+v: %v, %v", c, got, ok)
		}
		if !c.Kind.Variable() {
			continue
		}
		if got, err := Ultimate([]Case{{Name: "G"}, c}, Rules{Values: Recommended}); err != ErrNoPsi || got != nil {
			t.Errorf("%+v: combinations %v, %v", c, got, err)
		}
		if got, err := Service([]Case{{Name: "G"}, c}, Rules{Values: Recommended}); err != ErrNoPsi || got != nil {
			t.Errorf("%+v: combinations %v, %v", c, got, err)
		}
	}
}

// TestSameNames: what is combined does not depend on what the cases are called.
func TestSameNames(t *testing.T) {
	count := func(names ...string) int {
		out, ok := made([]Case{{Name: names[0]}, {Name: names[1], Kind: Imposed, Category: "A"}, {Name: names[2], Kind: Imposed, Category: "A"}}, Recommended)
		if !ok {
			t.Fatalf("%q: none", names)
		}
		return len(out)
	}
	want := count("G", "P", "Q")
	if want != 10 {
		t.Errorf("%d combinations, want 10", want)
	}
	for _, names := range [][]string{{"G", "Q", "Q"}, {"", "", ""}, {"Q", "Q", "Q"}} {
		if got := count(names...); got != want {
			t.Errorf("%q: %d combinations, want %d", names, got, want)
		}
	}
}

// TestPersistentLimits: the number of variable cases is limited, no permanent
// case and equal factors make no doubles.
func TestPersistentLimits(t *testing.T) {
	cases := []Case{{Name: "G"}}
	for i := range MaxVariable {
		cases = append(cases, Case{Name: fmt.Sprintf("Q%d", i), Kind: Imposed, Category: "A"})
	}
	// every non-empty selection once for each of its members as the leading one
	if got, ok := made(cases, Recommended); !ok || len(got) != 2*(MaxVariable<<(MaxVariable-1)+1) {
		t.Errorf("%d combinations, %v", len(got), ok)
	}
	if _, ok := made(append(cases, Case{Name: "W", Kind: Wind}), Recommended); ok {
		t.Error("one case too many is taken")
	}
	equal := Recommended
	equal.GSup, equal.GInf, equal.Q = 1, 1, 1.3
	if got, ok := made([]Case{{Name: "W", Kind: Wind}}, Recommended); !ok || len(got) != 1 || got[0].Name != "1.5 W" {
		t.Errorf("%+v, %v", got, ok)
	}
	if got, ok := made([]Case{{Name: "G"}, {Name: "W", Kind: Wind}}, equal); !ok || len(got) != 2 {
		t.Errorf("%+v, %v", got, ok)
	}
	if got, ok := made(nil, Recommended); !ok || len(got) != 0 {
		t.Errorf("%+v, %v", got, ok)
	}
	two, ok := made([]Case{{Name: "G1"}, {Name: "G2"}}, Recommended)
	if !ok || len(two) != 2 || two[0].Name != "1.35 G1 + 1.35 G2" || two[1].Name != "1.0 G1 + 1.0 G2" {
		t.Errorf("%+v, %v", two, ok)
	}
}

// TestSum: the name of a combination.
func TestSum(t *testing.T) {
	cases := []Case{{Name: "G"}, {Name: "Q"}, {Name: "W"}}
	for _, c := range []struct {
		factors []float64
		want    string
	}{
		{[]float64{1.35, 1.5, 0}, "1.35 G + 1.5 Q"},
		{[]float64{-1, 0, 1.5 * 0.6}, "-1.0 G + 0.9 W"},
		{[]float64{1, -1.5, 0}, "1.0 G - 1.5 Q"},
		{[]float64{0, 0, 0}, ""},
	} {
		if got := Sum(cases, c.factors); got != c.want {
			t.Errorf("%v: %q, want %q", c.factors, got, c.want)
		}
	}
}

// TestKindNames: every kind of action has its word, and some another one.
func TestKindNames(t *testing.T) {
	for name, k := range KindNames {
		if k.String() != name && name != "dead" && name != "live" {
			t.Errorf("%q is %q", name, k)
		}
	}
	if len(KindNames) != 11 || Kind(99).String() != "unknown" {
		t.Errorf("%v", KindNames)
	}
}
