package checker_test

import (
	"fmt"
	"math"
	"math/rand"
	"regexp"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/generate"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// spellings are the US customary unit of each SI unit that the calculations below use, and
// how many of it one is, as an expression of exact numbers: an inch is 25.4 mm and a foot 12
// inches, a pound is 0.45359237 kg and a pound-force that at 9.80665 m/s2 (NIST SP 811, B.8).
var spellings = map[string][2]string{
	"m": {"ft", "1/0.3048"}, "mm": {"in", "1/25.4"},
	"mm2": {"in2", "1/25.4/25.4"}, "cm2": {"in2", "1/2.54/2.54"}, "m2": {"ft2", "1/0.3048/0.3048"},
	"cm3": {"in3", "1/2.54/2.54/2.54"}, "cm4": {"in4", "1/2.54/2.54/2.54/2.54"},
	"N": {"lbf", "1/0.45359237/9.80665"}, "kN": {"kip", "1/0.45359237/9.80665"}, "MN": {"kip", "1000/0.45359237/9.80665"},
	"kNm":     {"kip-ft", "1/0.45359237/9.80665/0.3048"},
	"kN/m":    {"klf", "0.3048/0.45359237/9.80665"},
	"kN/m2":   {"ksf", "0.3048*0.3048/0.45359237/9.80665"},
	"MPa":     {"ksi", "25.4*25.4/1000/0.45359237/9.80665"},
	"GPa":     {"ksi", "25.4*25.4/0.45359237/9.80665"},
	"kg/m3":   {"pcf", "0.3048*0.3048*0.3048/0.45359237"},
	"kNm/rad": {"kip-ft/rad", "1/0.45359237/9.80665/0.3048"},
}

var quantity = regexp.MustCompile(`"[^"]*"|show [^;}\n]*|\b([0-9][0-9.]*(?:e-?[0-9]+)?) ([A-Za-z][A-Za-z0-9/]*)`)

// respelled writes every quantity of a calculation in the US customary unit, as a product
// of exact numbers, and shows the results in such units.
func respelled(t *testing.T, text string) string {
	t.Helper()
	many := 0
	out := quantity.ReplaceAllStringFunc(text, func(s string) string {
		if s[0] == '"' {
			return s
		}
		if strings.HasPrefix(s, "show ") {
			return "show kip, in, ksi"
		}
		number, symbol, _ := strings.Cut(s, " ")
		to, ok := spellings[symbol]
		if !ok {
			return s
		}
		many++
		return "(" + number + "*" + to[1] + " * 1 " + to[0] + ")"
	})
	if many < 10 {
		t.Fatalf("only %d quantities of the calculation were found", many)
	}
	return out
}

// sprung writes random columns between levels, with springs at ends and holds, floors that
// are reduced, and limits.
func sprung(r *rand.Rand, n int) string {
	var b strings.Builder
	b.WriteString("material s355 = \"S355\"\nsection built = isection { depth = 310 mm; width = 250 mm; web = 10 mm; flange = 16 mm }\n" +
		"case G permanent\ncase Q imposed \"B\"\ncase W wind\nlevel ground at 0.3 m\nlevel first at 4.1 m { Q 2.5 kN/m2; G 3.7 kN/m2 }\nlevel second at 7.7 m { Q 2.5 kN/m2; G 3.7 kN/m2 }\nlevel roof at 11.2 m { Q 1.5 kN/m2; G 2.7 kN/m2 }\n")
	pick := func(list ...string) string { return list[r.Intn(len(list))] }
	for i := range n {
		fmt.Fprintf(&b, "column C%d {\n    section = %s; material = s355; from ground to roof\n", i, pick("built", `"HEB 240"`, `"HEA 300"`, `"SHS 200x200x10"`))
		fmt.Fprintf(&b, "    load floor %.2f m2 at first offset %d mm about major\n    load floor %.2f m2 at second\n    load floor %.2f m2 at roof\n", 5+20*r.Float64(), 20+r.Intn(100), 5+20*r.Float64(), 5+20*r.Float64())
		fmt.Fprintf(&b, "    load W %.2f kN/m about %s\n", 3*r.Float64(), pick("major", "minor"))
		b.WriteString(pick("    reduce imposed by storeys\n", "    reduce imposed by area\n", ""))
		switch r.Intn(3) {
		case 0:
			fmt.Fprintf(&b, "    base spring %d kNm/rad\n    hold both at first\n    hold both at second stiffness %d kN/m\n    critical exact\n", 800+r.Intn(20000), 400+r.Intn(9000))
		case 1:
			fmt.Fprintf(&b, "    base fixed\n    top free about major\n    top spring %d kN/m about major\n    hold minor at first\n    hold twist at second\n    critical exact\n", 100+r.Intn(900))
		case 2:
			b.WriteString("    hold both at first\n    hold both at second\n    hold twist at first\n    limit deflection = span / 250\n    limit slenderness = 150\n")
		}
		b.WriteString("}\n")
	}
	return b.String()
}

// sameNumbers tells whether two numbers of a report are one but for rounding. Numbers that
// are nothing beside the greatest of their kind in the member are rounding themselves.
func sameNumbers(a, b, size, tolerance float64) bool {
	if math.IsNaN(a) || math.IsNaN(b) {
		return math.IsNaN(a) && math.IsNaN(b)
	}
	return a == b || math.Abs(a-b) <= tolerance*math.Max(math.Abs(a), size)
}

// TestSpellings checks calculations in SI units and the same in US customary ones by every
// standard: each verdict and reason is the same, each number the same to 1e-12 before
// rounding (1e-11 with critical loads of whole members), and so is each step of the working.
func TestSpellings(t *testing.T) {
	r := rand.New(rand.NewSource(7))
	numbers, members, ties, worst, where := 0, 0, 0, 0.0, ""
	for _, name := range checker.Stated() {
		basis := "basis {\n    standard " + name + "\n    show kN, mm, MPa\n}\n"
		shared := strings.Replace(generate.Shared, `standard "EN 1993-1-1:2005" annex "recommended"`, "standard "+name, 1)
		texts := []string{
			shared + generate.Columns(4, 3),
			shared + generate.BentColumns(6, 5),
			basis + randomColumns(r, 14),
			basis + liftBasis + "column C1 {\n" + randomLifts(r, true) + "    load G 300 kN at first offset 60 mm about major\n    load Q 80 kN at second\n    load G 70 kN at third\n}",
			strings.Replace(basis, "show", "actions \"EN 1990:2002\"\n    show", 1) + sprung(r, 4),
		}
		if strings.Contains(name, "AISC") {
			for i := range texts {
				texts[i] = strings.Replace(texts[i], `actions  "EN 1990:2002" eq "6.10"`, "", 1)
				texts[i] = strings.Replace(texts[i], `actions "EN 1990:2002"`, "", 1)
			}
		}
		for i, text := range texts {
			si, us := checkFiles(map[string]string{"a.kern": text}), checkFiles(map[string]string{"a.kern": respelled(t, text)})
			for _, d := range si.Diagnostics {
				if d.Severity == lang.Error && d.Member == "" {
					t.Fatalf("%s, text %d: %s: %q", name, i, d.Message, d.Span.Of(text))
				}
			}
			if len(si.Members) != len(us.Members) || si.Summary != us.Summary {
				t.Fatalf("%s, text %d: %v in one spelling, %v in the other", name, i, si.Summary, us.Summary)
			}
			for k, m := range si.Members {
				o := us.Members[k]
				members++
				at := fmt.Sprintf("%s, text %d, %s", name, i, m.Name)
				// a critical load of the whole member is a root that is found to 1e-13 in a
				// determinant of its own rounding
				tolerance := 1e-12
				if m.Member.Exact {
					tolerance = 1e-11
				}
				same := func(what string, a, b, size float64) {
					numbers++
					if !sameNumbers(a, b, size, tolerance) {
						t.Errorf("%s: %s is %.17g, respelled %.17g (%.1g)", at, what, a, b, math.Abs(b/a-1))
					}
					if d := math.Abs(a-b) / math.Max(math.Abs(a), size); d > worst {
						worst, where = d, at+": "+what
					}
				}
				if m.Verdict != o.Verdict || len(m.Checks) != len(o.Checks) || len(m.Coverage) != len(o.Coverage) {
					t.Errorf("%s: %v with %d checks, respelled %v with %d", at, m.Verdict, len(m.Checks), o.Verdict, len(o.Checks))
					continue
				}
				tied := false
				same("utilisation", m.Utilisation, o.Utilisation, 0)
				for j, c := range m.Checks {
					d := o.Checks[j]
					if c.Rule != d.Rule || c.Verdict != d.Verdict || c.Clause != d.Clause {
						t.Errorf("%s: %s %v, respelled %s %v", at, c.Rule, c.Verdict, d.Rule, d.Verdict)
					}
					same(c.Rule, c.Utilisation, d.Utilisation, 1e-3)
					if ratio := d.Demand / c.Demand; c.Combination != d.Combination || math.Abs(ratio-1) > 1e-9 && math.Abs(d.Capacity/c.Capacity/ratio-1) < 1e-9 {
						tied = true // combinations or lifts that are used alike: rounding says which is shown
						continue
					}
					same(c.Rule+" demand", c.Demand, d.Demand, 1e-3*c.Capacity)
					same(c.Rule+" capacity", c.Capacity, d.Capacity, 0)
				}
				for j, c := range m.Coverage {
					if d := o.Coverage[j]; c.Rule != d.Rule || c.State != d.State {
						t.Errorf("%s: %s %v, respelled %s %v", at, c.Rule, c.State, d.Rule, d.State)
					}
				}
				sameHolds(at, m.Holds(), o.Holds(), same)
				a, b := m.Derive(), o.Derive()
				if (a == nil) != (b == nil) {
					t.Errorf("%s: only one spelling has a working", at)
				}
				if a == nil || b == nil {
					continue
				}
				// the working is of what is shown: of two alike, of one side of a value in a table
				if tied || !sameSymbols(a, b) {
					ties++
					continue
				}
				size := map[unit.Dim]float64{}
				for _, s := range a.Steps {
					if v := math.Abs(s.Value); s.Note == "" && v < math.MaxFloat64 {
						dim := a.Set.At(s.Symbol).Dim
						size[dim] = max(size[dim], v)
					}
				}
				size[unit.None] = max(size[unit.None], 1e4) // ratios of end moments and the like
				size[unit.Moment] = max(size[unit.Moment], 1e3*size[unit.Force]*m.Member.Height)
				for j, s := range a.Steps {
					if s.Note == "" {
						same("step "+a.Set.At(s.Symbol).Name, s.Value, b.Steps[j].Value, 1e-6*size[a.Set.At(s.Symbol).Dim])
					}
				}
			}
		}
	}
	t.Logf("%d members, %d with another choice between equals, %d numbers, the greatest difference %.2g (%s)", members, ties, numbers, worst, where)
	if numbers < 10000 || ties > members/25 {
		t.Errorf("%d numbers were compared, and %d of %d members could not be", numbers, ties, members)
	}
}

// sameSymbols tells whether two workings take the same steps. The ends of the interval of
// a table that a value lies in (psi_a, psi_b) are a step too: a value on the line between
// two intervals may be in either.
func sameSymbols(a, b *derivation.Record) bool {
	if len(a.Steps) != len(b.Steps) {
		return false
	}
	for i, s := range a.Steps {
		x := b.Steps[i]
		if s.Symbol != x.Symbol || strings.HasPrefix(a.Set.At(s.Symbol).Name, "psi_a") && math.Abs(s.Value-x.Value) > 0.1 {
			return false
		}
	}
	return true
}

func sameHolds(at string, a, b []standard.HoldDemand, same func(what string, a, b, size float64)) {
	for i := range min(len(a), len(b)) {
		x, y := a[i], b[i]
		what := fmt.Sprintf("hold %d ", i)
		same(what+"height", x.At, y.At, 0)
		same(what+"compression", x.Compression, y.Compression, 0)
		same(what+"force", x.Force, y.Force, 0)
		// the stiffness at which rigid bars with hinges at the holds turn over is an
		// eigenvalue; holds that nearly meet make it ten thousand times less sure
		same(what+"stiffness", x.Stiffness, y.Stiffness, 1e4*x.Stiffness)
		same(what+"stated stiffness", x.Stated, y.Stated, 0)
	}
	same(at+" number of holds", float64(len(a)), float64(len(b)), 0)
}
