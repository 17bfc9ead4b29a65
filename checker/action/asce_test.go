package action

import (
	"maps"
	"slices"
	"strings"
	"testing"
)

// basicCases are one case of every kind of the basic combinations.
var basicCases = []Case{{Name: "D", Kind: Permanent}, {Name: "L", Kind: Imposed}, {Name: "Lr", Kind: RoofLive}, {Name: "S", Kind: Snow}, {Name: "R", Kind: Rain},
	{Name: "W", Kind: Wind}, {Name: "E", Kind: Earthquake}}

// whole are the combinations of ASCE/SEI 7-22 with nothing left out, written by
// hand from 2.3.1, 2.3.6, 2.4.1 and 2.4.5 (from memory; 1.2D + 1.6L, D + L and
// 1.2D + 1.0S are seen in printed examples).
var whole = map[Method]string{
	LRFD: `1.4 D
1.2 D + 1.6 L + 0.5 Lr
1.2 D + 1.6 L + 0.3 S
1.2 D + 1.6 L + 0.5 R
1.2 D + 1.6 Lr + 1.0 L
1.2 D + 1.0 S + 1.0 L
1.2 D + 1.6 R + 1.0 L
1.2 D + 1.6 Lr + 0.5 W
1.2 D + 1.0 S + 0.5 W
1.2 D + 1.6 R + 0.5 W
1.2 D + 1.0 W + 1.0 L + 0.5 Lr
1.2 D + 1.0 W + 1.0 L + 0.3 S
1.2 D + 1.0 W + 1.0 L + 0.5 R
0.9 D + 1.0 W
1.2 D + 1.0 E + 1.0 L + 0.15 S
1.2 D - 1.0 E + 1.0 L + 0.15 S
0.9 D + 1.0 E
0.9 D - 1.0 E`,
	ASD: `1.0 D
1.0 D + 1.0 L
1.0 D + 1.0 Lr
1.0 D + 0.7 S
1.0 D + 1.0 R
1.0 D + 0.75 L + 0.75 Lr
1.0 D + 0.75 L + 0.525 S
1.0 D + 0.75 L + 0.75 R
1.0 D + 0.6 W
1.0 D + 0.75 L + 0.45 W + 0.75 Lr
1.0 D + 0.75 L + 0.45 W + 0.525 S
1.0 D + 0.75 L + 0.45 W + 0.75 R
0.6 D + 0.6 W
1.0 D + 0.7 E
1.0 D - 0.7 E
1.0 D + 0.525 E + 0.75 L + 0.1 S
1.0 D - 0.525 E + 0.75 L + 0.1 S
0.6 D + 0.7 E
0.6 D - 0.7 E`,
}

// terms reads a sum as factors by name.
func terms(sum string) map[string]string {
	out := map[string]string{}
	sign := ""
	fields := strings.Fields(sum)
	for i := 0; i < len(fields); i++ {
		switch fields[i] {
		case "+":
			sign = ""
		case "-":
			sign = "-"
		default:
			out[fields[i+1]] = sign + fields[i]
			i++
		}
	}
	return out
}

// TestBasic: every combination of the standard is made; every one that is made is
// one of the standard's, whole or with variable loads left out; none is made twice.
func TestBasic(t *testing.T) {
	for method, text := range whole {
		made, err := Basic(basicCases, BasicRules{Method: method, Companion: 1})
		if err != nil {
			t.Fatal(err)
		}
		var want []map[string]string
		for _, line := range strings.Split(text, "\n") {
			want = append(want, terms(line))
		}
		seen := map[string]bool{}
		for _, c := range made {
			if seen[c.Name] {
				t.Errorf("%s: %s is made twice", method, c.Name)
			}
			seen[c.Name] = true
			got := terms(c.Name)
			part := func(w map[string]string) bool {
				for name, factor := range got {
					if w[name] != factor {
						return false
					}
				}
				return got["D"] == w["D"] && got["E"] == w["E"]
			}
			if !slices.ContainsFunc(want, part) {
				t.Errorf("%s: %s is none of the standard's", method, c.Name)
			}
		}
		for _, w := range want {
			if !slices.ContainsFunc(made, func(c Combination) bool { return maps.Equal(terms(c.Name), w) }) {
				t.Errorf("%s: %v is not made", method, w)
			}
		}
	}
}

// TestBasicPrinted: P_u = 1.2(140) + 1.6(420) = 840 kips and P_a = 140 + 420 = 560
// kips, AISC Design Examples, E.1A.
func TestBasicPrinted(t *testing.T) {
	loads := []float64{140, 420}
	for method, want := range map[Method]float64{LRFD: 840, ASD: 560} {
		made, err := Basic(basicCases[:2], BasicRules{Method: method, Companion: 1})
		if err != nil {
			t.Fatal(err)
		}
		most := 0.0
		for _, c := range made {
			sum := 0.0
			for i, f := range c.Factors {
				sum += f * loads[i]
			}
			most = max(most, sum)
		}
		if most != want {
			t.Errorf("%s: %g, want %g", method, most, want)
		}
	}
}

// TestBasicExclusive: of two directions of wind one blows at a time, and a companion
// live load has its factor.
func TestBasicExclusive(t *testing.T) {
	cases := []Case{{Name: "D", Kind: Permanent}, {Name: "L", Kind: Imposed}, {Name: "W1", Kind: Wind}, {Name: "W2", Kind: Wind}}
	made, err := Basic(cases, BasicRules{Method: LRFD, Companion: 0.5, Exclusive: [][]int{{2, 3}}})
	if err != nil {
		t.Fatal(err)
	}
	half := false
	for _, c := range made {
		if c.Factors[2] != 0 && c.Factors[3] != 0 {
			t.Errorf("%s has both directions", c.Name)
		}
		if c.Factors[1] == 1 {
			t.Errorf("%s has the whole live load beside another", c.Name)
		}
		half = half || c.Factors[1] == 0.5 && c.Factors[2] == 1
	}
	if !half {
		t.Error("1.2 D + 1.0 W1 + 0.5 L is not made")
	}
	if _, err := Basic(make([]Case, 0), BasicRules{Method: LRFD}); err != nil {
		t.Error(err)
	}
}
