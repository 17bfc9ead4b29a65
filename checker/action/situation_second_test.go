package action

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
	"slices"
	"strconv"
	"strings"
	"testing"
)

// secondSet is a list of cases with what the second implementation says of it.
type secondSet struct {
	ID     int
	Cases  [][2]any // kind and effect
	Values map[string]map[string]struct {
		Max, Min   float64
		HMax, HMin float64 // without category H beside snow or wind
		Count      int
		Vectors    string
	}
}

// TestSituationsSecond: every equation of every situation in 40 random lists of
// cases, with the recommended values and those of the United Kingdom, permanent
// cases together and independent: the same factors and the same extremes of a
// linear effect as a second implementation, which is no published source. Its
// author had not seen this code; of the 100 lists that were compared, the 40 that
// are kept have all kinds of action.
func TestSituationsSecond(t *testing.T) {
	text, err := os.ReadFile("testdata/situations-second.json")
	if err != nil {
		t.Fatal(err)
	}
	var sets []secondSet
	if err := json.Unmarshal(text, &sets); err != nil {
		t.Fatal(err)
	}
	if len(sets) < 40 {
		t.Fatalf("%d sets, want 40", len(sets))
	}
	compared := 0
	for _, s := range sets {
		var cases []Case
		var effect []float64
		accident := false
		for i, c := range s.Cases {
			cases = append(cases, caseOf(t, fmt.Sprintf("L%d", i+1), c[0].(string)))
			effect = append(effect, c[1].(float64))
			accident = accident || cases[i].Kind == Accident
		}
		if !accident {
			// there the other program takes (6.11b) with no accidental action; here one
			// without effect stands for it
			cases, effect = append(cases, Case{Name: "A", Kind: Accident}), append(effect, 0)
		}
		for set, annex := range map[string]string{"recommended": "recommended", "uk": "United Kingdom"} {
			values, ok := AnnexOf(annex)
			if !ok {
				t.Fatal(annex)
			}
			for name, want := range s.Values[set] {
				at := fmt.Sprintf("set %d, %s, %s", s.ID, annex, name)
				var r Rules
				var equation string
				r.Values, r.RoofsTogether = values, true
				words := strings.Fields(name)
				equation = words[0]
				r.Independent = slices.Contains(words, "independent")
				r.QuasiLeading = slices.Contains(words, "psi2")
				if equation == "6.10a" || equation == "6.10b" {
					r.Equation = Equation610ab
				}
				if equation >= "6.11" && equation < "6.12" || equation > "6.13" {
					equation += "b"
				}
				got := ofEquation(t, cases, r, equation)
				var vectors [][]float64
				for _, c := range got {
					v := c.Factors
					if !accident {
						v = v[:len(v)-1]
					}
					vectors = append(vectors, v)
				}
				var theirs [][]float64
				for _, line := range strings.Split(want.Vectors, "; ") {
					var v []float64
					for _, f := range strings.Fields(line) {
						x, err := strconv.ParseFloat(f, 64)
						if err != nil {
							t.Fatal(err)
						}
						v = append(v, x)
					}
					theirs = append(theirs, v)
				}
				if len(theirs) != want.Count {
					t.Fatalf("%s: %d vectors for a count of %d", at, len(theirs), want.Count)
				}
				if ours, other := keys(vectors), keys(theirs); !slices.Equal(ours, other) {
					t.Errorf("%s: %d combinations, want %d", at, len(ours), len(other))
				}
				near := func(what string, got, want float64) {
					if !(math.Abs(got-want) <= 1e-10*(1+math.Abs(want))) {
						t.Errorf("%s: %s %.15g, want %.15g", at, what, got, want)
					}
				}
				high, low := effects(got, effect)
				near("largest", high, want.Max)
				near("least", low, want.Min)
				r.RoofsTogether = false
				high, low = effects(ofEquation(t, cases, r, equation), effect)
				near("largest, roofs alone", high, want.HMax)
				near("least, roofs alone", low, want.HMin)
				compared++
			}
		}
	}
	if compared < 22*len(sets) {
		t.Errorf("only %d equations compared", compared)
	}
}

// ofEquation gives the combinations that come from one equation; those of
// (6.10b) also where (6.10a) makes them too.
func ofEquation(t *testing.T, cases []Case, r Rules, equation string) []Combination {
	t.Helper()
	u, err := Ultimate(cases, r)
	if err != nil {
		t.Fatal(err)
	}
	s, err := Service(cases, r)
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range u {
		if !c.Situation.Ultimate() {
			t.Errorf("%s is for %s among the ultimate ones", c.Name, c.Situation)
		}
	}
	for _, c := range s {
		if c.Situation.Ultimate() {
			t.Errorf("%s is for %s among those of serviceability", c.Name, c.Situation)
		}
	}
	if equation == "6.10b" {
		m, err := newMaker(cases, r)
		if err != nil {
			t.Fatal(err)
		}
		m.persistent("(6.10b)", r.Xi*r.GSup, full)
		return m.out
	}
	var out []Combination
	for _, c := range append(u, s...) {
		if c.Source == "EN 1990:2002 ("+equation+")" {
			out = append(out, c)
		}
	}
	return out
}
