package lang

import (
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"kern/lang/unit"
)

// define reads a text of assignments into named values.
func define(text string) (*Values, []*Value) {
	v := &Values{}
	var order []*Value
	for _, d := range Parse(&FileID{}, text, nil).Decls {
		for _, s := range d.Stmts {
			if parts, ok := s.Assigned(); ok && len(parts) > 0 {
				def := &Value{Name: s.Word, Decl: d, Stmt: s, Expr: parts[0]}
				v.Define(def)
				order = append(order, def)
			}
		}
	}
	return v, order
}

func TestValuesInAnyOrder(t *testing.T) {
	lines := []string{"height = eaves + rise", "eaves = 4.80 m", "rise = span / 10", "span = 2 * bay", "bay = 6 m", "area = bay * height", "load = 5 kN/m2 * area"}
	want := map[string]float64{"height": 6, "eaves": 4.8, "rise": 1.2, "span": 12, "bay": 6, "area": 36, "load": 180000}
	for seed := range uint64(50) {
		r := rand.New(rand.NewPCG(seed, 1))
		r.Shuffle(len(lines), func(i, j int) { lines[i], lines[j] = lines[j], lines[i] })
		v, order := define(strings.Join(lines, "\n"))
		r.Shuffle(len(order), func(i, j int) { order[i], order[j] = order[j], order[i] })
		for _, d := range order {
			q, p := v.Get(d, nil)
			if p != nil || math.Abs(q.Value-want[d.Name]) > 1e-9 {
				t.Fatalf("%s = %v, %v; want %v", d.Name, q.Value, p, want[d.Name])
			}
		}
	}
}

func TestValuesFirstDefinitionCounts(t *testing.T) {
	v, _ := define("a = 1\na = 2\n")
	d, ok := v.Lookup("a")
	if q, p := v.Get(d, nil); !ok || p != nil || q.Value != 1 {
		t.Errorf("a = %v, %v", q.Value, p)
	}
	if _, ok := v.Lookup("b"); ok {
		t.Error("b is defined")
	}
}

func TestValuesLoops(t *testing.T) {
	for _, c := range []struct {
		text    string
		reports int // definitions that report
		silent  int // definitions that have no value and say nothing
	}{
		{"a = a\n", 1, 0},
		{"a = a + 1\nb = a\n", 1, 1},
		{"a = b\nb = a\n", 1, 1},
		{"a = b\nb = c\nc = a\nd = a\ne = 1\n", 1, 3},
		{"a = a\nb = b\n", 2, 0},
		{"a = b\nb = a\nc = b + d\nd = c\n", 2, 2}, // two circles
	} {
		_, order := define(c.text)
		for first := range order { // whatever is asked for first
			v, order := define(c.text)
			reports, silent := 0, 0
			for i := range order {
				d := order[(first+i)%len(order)]
				_, p := v.Get(d, nil)
				switch {
				case p == nil:
				case p == Silent:
					silent++
				case p.Rule == "defined-by-itself" && strings.Contains(p.Message, " → "):
					reports++
				default:
					t.Errorf("%q: %s reports %s: %s", c.text, d.Name, p.Rule, p.Message)
				}
				if q, again := v.Get(d, nil); (again == nil) != (p == nil) || q.Value != d.quantity.Value {
					t.Errorf("%q: %s gives %v, then %v", c.text, d.Name, p, again)
				}
			}
			if reports != c.reports || silent != c.silent {
				t.Errorf("%q asked from %d: %d report and %d are silent, want %d and %d", c.text, first, reports, silent, c.reports, c.silent)
			}
		}
	}
	v, order := define("a = b\nb = c\nc = a\n")
	v.Get(order[1], nil)
	if _, p := v.Get(order[1], nil); p == nil || !strings.Contains(p.Message, "'b' depends on itself: b → c → a → b") {
		t.Errorf("the loop is told as %v", p)
	}
}

func TestValuesProblemsAreSaidOnce(t *testing.T) {
	v, order := define("a = 1 m + 1 kN\nb = a * 2\nc = b\nd = nobody\n")
	want := []string{"unit-mismatch", "", "", "unknown-name"}
	for i, d := range order {
		_, p := v.Get(d, nil)
		if p == nil {
			t.Errorf("%s has a value", d.Name)
		} else if p.Rule != want[i] || want[i] == "" && p != Silent {
			t.Errorf("%s: %q, want %q", d.Name, p.Rule, want[i])
		}
	}
	other := func(e *Expr) (unit.Quantity, *Problem) { return unit.Quantity{Value: 7}, nil }
	v, order = define("d = somebody\n")
	if q, p := v.Get(order[0], other); p != nil || q.Value != 7 {
		t.Errorf("a name from elsewhere gives %v, %v", q.Value, p)
	}
}

// A chain may be as long as a file, whichever value is asked for first.
func TestValuesLongChains(t *testing.T) {
	const n = 30_000
	var b strings.Builder
	for i := n - 1; i > 0; i-- {
		fmt.Fprintf(&b, "v%d = v%d + 1\n", i, i-1)
	}
	for _, fromHead := range []bool{true, false} {
		v, order := define(b.String() + "v0 = 1\n")
		if !fromHead {
			slices.Reverse(order)
		}
		for _, d := range order {
			if q, p := v.Get(d, nil); p != nil || "v"+fmt.Sprint(q.Value-1) != d.Name {
				t.Fatalf("from the head %v: %s is %v, %v", fromHead, d.Name, q.Value, p)
			}
		}
		head, _ := v.Lookup(fmt.Sprintf("v%d", n-1))
		if q, _ := v.Get(head, nil); q.Value != n {
			t.Errorf("the end of the chain is %v", q.Value)
		}
	}
	v, order := define(b.String() + fmt.Sprintf("v0 = v%d\n", n-1))
	reports := 0
	for _, d := range order {
		switch _, p := v.Get(d, nil); {
		case p == nil:
			t.Fatalf("%s in a circle has a value", d.Name)
		case p != Silent:
			reports++
		}
	}
	if reports != 1 {
		t.Errorf("a circle of %d is reported %d times", n, reports)
	}
}
