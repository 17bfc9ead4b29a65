package catalogue

import (
	"math"
	"strings"
	"testing"

	"kern/checker/section"
)

// printed tells whether a computed value agrees with a printed one: within 0.5 %
// or within half a unit of the third significant digit, as tables are rounded.
func printed(got, want float64) bool {
	rounding := math.Pow(10, math.Floor(math.Log10(want))-2) / 2
	return math.Abs(got-want) <= max(0.005*want, 1.001*rounding)
}

// check computes a line's properties and compares them with the printed ones.
// It returns the largest relative deviation.
func (p published) check(t *testing.T) float64 {
	t.Helper()
	e, ok := Find(p.name)
	if !ok {
		t.Errorf("%s: not found", p.name)
		return 0
	}
	if !e.Listed {
		t.Errorf("%s: not listed", p.name)
	}
	got, err := section.Compute(e.Shape)
	if err != nil {
		t.Errorf("%s: %v", p.name, err)
		return 0
	}
	worst := 0.0
	for _, c := range []struct {
		what      string
		got, want float64
	}{
		{"A", got.Area * 1e4, p.a},
		{"Iy", got.IMajor * 1e8, p.iy},
		{"Iz", got.IMinor * 1e8, p.iz},
	} {
		if c.want == 0 {
			continue
		}
		if apart, known := publishedApart[p.name+" "+c.what]; known {
			if math.Abs(100*(c.got/c.want-1)-apart) > 0.01 {
				t.Errorf("%s: %s deviates by %+.3f %%, noted %+.2f %%", p.name, c.what, 100*(c.got/c.want-1), apart)
			}
		} else if !printed(c.got, c.want) {
			t.Errorf("%s: %s computed %.5g, printed %g (%+.2f %%)", p.name, c.what, c.got, c.want, 100*(c.got/c.want-1))
		}
		worst = max(worst, math.Abs(c.got/c.want-1))
	}
	return worst
}

func TestRolledSectionsHavePublishedProperties(t *testing.T) {
	worst := map[string]float64{}
	seen := map[string]bool{}
	for _, p := range publishedRows {
		seen[p.name] = true
		f, _, _ := strings.Cut(p.name, " ")
		worst[f] = max(worst[f], p.check(t))
	}
	for _, e := range All() {
		switch e.Family {
		case "IPE", "HEA", "HEB", "HEM", "UPN", "UPE":
		default:
			continue // series_test.go
		}
		if e.Product == OpenSection && !seen[e.Designation] {
			t.Errorf("%s has no published line", e.Designation)
		}
	}
	for f, w := range worst {
		t.Logf("%s: largest deviation %.2f %%", f, 100*w)
	}
}

func TestHollowSectionsHavePublishedProperties(t *testing.T) {
	for _, p := range publishedHollow {
		p.check(t)
	}
}

func TestEveryEntryComputes(t *testing.T) {
	for _, e := range All() {
		if faults := e.Shape.Check(); len(faults) != 0 {
			t.Errorf("%s: %+v", e.Designation, faults)
		}
		if p, err := section.Compute(e.Shape); err != nil || !(p.Area > 0) {
			t.Errorf("%s: %v", e.Designation, err)
		}
	}
}
