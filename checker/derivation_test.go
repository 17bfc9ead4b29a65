package checker_test

import (
	"fmt"
	"math"
	"math/rand"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/standard"
	"kern/checker/standard/elastic"
	"kern/checker/standard/en1993"
	"kern/lang"
	"kern/lang/unit"
)

// derived is every step that the tests have seen, by formula.
type derived struct {
	t              *testing.T
	formulas       map[*derivation.Formula]int
	members, steps int
	exact, rounded worst // with all digits, and as printed
}

// worst is the greatest deviation and where it was.
type worst struct {
	deviation float64
	text      string
}

func (w *worst) add(deviation float64, text string) {
	if !(deviation <= w.deviation) {
		*w = worst{deviation, text}
	}
}

// deviation is relative to the value, or absolute where the value is zero.
func deviation(got, want float64) float64 {
	if want == 0 {
		return math.Abs(got)
	}
	return math.Abs(got/want - 1)
}

// check puts the numbers into every step of a member's derivation.
func (d *derived) check(m *checker.Result) {
	record := m.Derive()
	if record == nil {
		return
	}
	d.members++
	for _, s := range record.Steps {
		if s.Formula != nil {
			d.step(m, record.Set, s)
		}
	}
	for _, c := range m.Checks {
		if c.Rule != "requirement" && !math.IsNaN(c.Utilisation) {
			d.complete(m, record, c)
		}
	}
}

// complete holds that the derivation of a check stands by itself: every value
// that a formula reads stands above it, the same value, and the utilisation of
// the check is the last line.
func (d *derived) complete(m *checker.Result, record *derivation.Record, c standard.Check) {
	steps := record.Of(c.Rule)
	known := map[derivation.ID]float64{}
	last := math.NaN()
	for _, s := range steps {
		if s.Note != "" {
			continue
		}
		for _, in := range s.Inputs {
			if v, ok := known[in.Symbol]; !ok || v != in.Value {
				d.t.Errorf("%s, %s: %s reads %s = %g, which the derivation has as %g", m.Name, c.Rule, record.Set.At(s.Symbol).Name, record.Set.At(in.Symbol).Name, in.Value, v)
			}
		}
		known[s.Symbol], last = s.Value, s.Value
	}
	if last != c.Utilisation {
		d.t.Errorf("%s, %s: the derivation ends with %g, the check says %g", m.Name, c.Rule, last, c.Utilisation)
	}
}

// evaluated reads a text in the language and computes it.
func (d *derived) evaluated(m *checker.Result, s derivation.Step, text string) (unit.Quantity, bool) {
	e, err := lang.ParseExpr(text)
	if err != nil {
		d.t.Errorf("%s: %s = %s cannot be read: %v", m.Name, s.Formula.Text, text, err)
		return unit.Quantity{}, false
	}
	q, p := lang.Eval(e, func(n *lang.Expr) (unit.Quantity, *lang.Problem) {
		d.t.Errorf("%s: %s: the name %s is left in the numbers", m.Name, text, n.Text)
		return unit.Quantity{}, lang.Silent
	})
	if p != nil {
		d.t.Errorf("%s: %s = %s has no value: %s", m.Name, s.Formula.Text, text, p.Message)
		return q, false
	}
	return q, true
}

func (d *derived) step(m *checker.Result, set *derivation.Set, s derivation.Step) {
	d.steps++
	d.formulas[s.Formula]++
	sym := set.At(s.Symbol)
	for _, in := range s.Inputs {
		if math.IsNaN(in.Value) || math.IsInf(in.Value, 0) {
			// a value that is not known makes no other value
			if !math.IsNaN(s.Value) {
				d.t.Errorf("%s: %s = %g from %s = %g", m.Name, sym.Name, s.Value, set.At(in.Symbol).Name, in.Value)
			}
			return
		}
	}
	if len(s.Inputs) != len(s.Formula.Uses()) {
		d.t.Errorf("%s: %s records %d inputs of %d", m.Name, s.Formula.Text, len(s.Inputs), len(s.Formula.Uses()))
	}
	full := s.Numbers(set, m.Units(), 0)
	if q, ok := d.evaluated(m, s, full); ok {
		if q.Dim != sym.Dim {
			d.t.Errorf("%s: %s = %s has the dimension of a %s, the symbol that of a %s", m.Name, sym.Name, full, q.Dim.Name(), sym.Dim.Name())
		}
		dev := deviation(q.Value, s.Value)
		d.exact.add(dev, sym.Name+" = "+full)
		if !(dev <= 1e-12) {
			d.t.Errorf("%s: %s = %s evaluates to %.17g, computed was %.17g (%.2g)", m.Name, sym.Name, full, q.Value, s.Value, dev)
		}
	}
	short := s.Numbers(set, m.Units(), derivation.Digits)
	if q, ok := d.evaluated(m, s, short); ok && q.Dim == sym.Dim {
		shown, err := lang.ParseExpr(m.Units().Show(s.Value, sym.Dim, derivation.Digits))
		if err != nil {
			d.t.Errorf("%s: the printed value of %s cannot be read: %v", m.Name, sym.Name, err)
			return
		}
		value, p := lang.Eval(shown, nil)
		if p != nil || value.Dim != sym.Dim {
			d.t.Errorf("%s: the printed value of %s has no value", m.Name, sym.Name)
			return
		}
		dev := deviation(q.Value, value.Value)
		d.rounded.add(dev, sym.Name+" = "+short)
		if !(dev <= 0.002) {
			d.t.Errorf("%s: %s = %s evaluates to %.6g, printed is %.6g (%.2g)", m.Name, sym.Name, short, q.Value, value.Value, dev)
		}
	}
}

// handmade are members of every kind in every standard.
const handmade = `
material steel = "S355"
material stated { E = 205 GPa; nu = 0.3; fy = 460 MPa; density = 7850 kg/m3 }
section hot    = tube { width = 120 mm; wall = 5 mm; made = hot }
section thin   = tube { depth = 300 mm; width = 200 mm; wall = 4 mm; made = cold }
section box    = tube { depth = 400 mm; width = 300 mm; wall = 6 mm; corner = 0 mm; made = welded }
section stoutbox = tube { width = 200 mm; wall = 12 mm; corner = 0 mm; made = welded }
section lying  = tube { depth = 100 mm; width = 300 mm; wall = 4 mm; made = cold }
section deepbox = tube { depth = 400 mm; width = 100 mm; wall = 6 mm; corner = 0 mm; made = welded }
section lowbox = tube { depth = 100 mm; width = 400 mm; wall = 6 mm; corner = 0 mm; made = welded }
section round  = pipe { outside = 168.3 mm; wall = 8 mm; made = hot }
section flat   = bar { width = 30 mm; depth = 90 mm }
section solid  = rod { diameter = 50 mm }
section rolled = isection { depth = 300 mm; width = 150 mm; web = 7.1 mm; flange = 10.7 mm; root = 15 mm; made = rolled }
section plates = isection { depth = 800 mm; width = 300 mm; web = 6 mm; flange = 10 mm; made = welded }
section u      = channel { depth = 200 mm; width = 75 mm; web = 8.5 mm; flange = 11.5 mm; root = 11.5 mm }
section uthin  = channel { depth = 300 mm; width = 90 mm; web = 4 mm; flange = 4 mm; made = welded }
section uweb   = channel { depth = 300 mm; width = 60 mm; web = 3 mm; flange = 8 mm; made = welded }
section t      = tee { depth = 150 mm; width = 150 mm; web = 12 mm; flange = 14 mm; made = welded }
section twide  = tee { depth = 90 mm; width = 200 mm; web = 12 mm; flange = 14 mm; made = welded }
section tthin  = tee { depth = 250 mm; width = 150 mm; web = 6 mm; flange = 6 mm; made = welded }
section l      = angle { depth = 100 mm; wall = 12 mm; root = 12 mm }
section lun    = angle { depth = 150 mm; width = 100 mm; wall = 14 mm; root = 12 mm }
section lthin  = angle { depth = 150 mm; wall = 8 mm; root = 12 mm }
section told   = given { A = 24.1 cm2; I_major = 612 cm4; I_minor = 201 cm4; W_major = 80 cm3; W_minor = 40 cm3; I_t = 10 cm4; I_w = 500 cm6; thickness = 8 mm; class = 2; curve = c }
column A1  { section = hot; material = steel; height = 4 m; load 200 kN; limit slenderness = 180 }
column A2  as A1 { section = thin }
column A3  as A1 { section = box }
column A4  as A1 { section = stoutbox }
column A5  as A1 { section = round }
column A6  as A1 { section = flat; height = 1 m }
column A7  as A1 { section = solid; height = 1 m }
column A8  as A1 { section = rolled; hold minor at 1.5 m; hold twist at 2 m }
column A9  as A1 { section = plates; base fixed; top free }
column A10 as A1 { section = u; height = 2 m }
column A11 as A1 { section = uthin }
column A12 as A1 { section = t }
column A13 as A1 { section = twide }
column A14 as A1 { section = tthin }
column A15 as A1 { section = l; height = 1.5 m }
column A16 as A1 { section = lun }
column A17 as A1 { section = lthin }
column A18 as A1 { section = told; material = stated }
column A19 as A1 { section = "HEB 200"; effective = 0.9 about minor; effective = 0.7 about twist }
column A20 as A1 { section = "UPN 200"; top guided; base fixed }
column A21 as A1 { section = rolled; load 200 kN offset 20 mm about major }
column A22 as A1 { section = rolled; load 200 kN offset 20 mm about minor }
column A23 as A1 { section = rolled; load 200 kN offset 20 mm about major and 15 mm about minor; load 30 kN at 2 m }
column A24 as A1 { section = rolled; load 100 kN; load 2 kN/m about major; load 1 kN/m about minor }
column A25 as A1 { section = rolled; load 100 kN; load 5 kNm about minor at top; load 3 kN across major at 1 m }
column A26 as A1 { section = plates; top free; base fixed; hold both at 2 m }
tie    A27 { section = solid; material = steel; length = 3 m; load -100 kN offset 5 mm about major and 4 mm about minor }
strut  A28 { section = plates; material = steel; length = 3 m; load 500 kN; limit slenderness = 20; effective = 0.5 about minor }
column A29 as A1 { section = told; material = stated; load 100 kN offset 10 mm about minor }
column A30 as A1 { section = rolled; hold major at 1 m; hold major at 2 m; hold major at 3 m; hold minor at 2 m; load 2 kN/m about minor }
column A32 as A1 { section = lying }
column A33 as A1 { section = deepbox }
column A34 as A1 { section = lowbox }
column A35 as A1 { section = uweb }
column SP1 as A1 { section = hot; critical exact; hold minor at 1.5 m; load 90 kN at 2 m; load 100 kN }
column SP2 as A1 { section = hot; critical exact; hold minor at 1.5 m stiffness 300 kN/m; base spring 90 kNm/rad about major; load 1 kN/m about major; load 100 kN; load 0.5 kN/m about minor }
column SP3 as A1 { section = hot; base fixed; top free; imperfection on; load 40 kN; load 1 kN across major at top; limit sway = height / 150; limit deflection = span / 200 }
column SP4 as A1 { section = rolled; base fixed; top spring 200 kN/m; imperfection on; critical exact; load 90 kN at 2 m; load 100 kN offset 20 mm about major }
column SP5 as A1 { section = l; height = 1.5 m; critical exact; load 60 kN; limit deflection = 4 mm }
column SP7 as A1 { section = hot; critical exact; effective = 1 about minor; load 1 kN/m about major; load 0.5 kN/m about minor; load 60 kN }
column SP10 as A1 { section = hot; critical exact; effective = 1 about major; load 1 kN/m about major; load 0.5 kN/m about minor; load 60 kN }
column SP8 as A1 { section = hot; critical exact; load 1 kN/m about major; load 60 kN }
column SP9 as A1 { section = hot; critical exact; load 1 kN/m about minor; load 60 kN }
column SP6 as A1 { section = u; height = 2 m; critical exact; load 60 kN }
column A31 as A1 { section = rolled; effective = 2.0 about major; limit slenderness = 60 }
`

// TestDerivations puts the numbers into every step of every derivation, of
// members made by hand and of 1,000 random ones, and finds the value that was
// computed: what is printed is what was calculated. Every formula of both
// standards is reached by some member.
func TestDerivations(t *testing.T) {
	d := &derived{t: t, formulas: map[*derivation.Formula]int{}}
	bases := []string{
		"basis { standard \"elastic\"; factor_yield = 1.5; factor_buckling = 2 }",
		"basis { standard \"elastic\"; amplification simple; effective lengths recommended; show kip, kip-ft, in, ksi }",
		"basis { standard \"EN 1993-1-1:2005\" }",
		"basis { standard \"EN 1993-1-1:2005\"; gamma_M1 = 1.1 because \"national annex\"; strengths \"EN 1993-1-1 Table 3.1\"; show lbf, in, psi }",
	}
	for _, b := range bases {
		for _, m := range derivedReport(t, b+handmade, true) {
			d.check(m)
		}
	}
	demo := 0
	for _, m := range demoReport(t, "../testdata/boathouse").Members {
		d.check(m)
		demo++
	}
	if demo < 20 {
		t.Errorf("the demo project has %d members, want 20", demo)
	}
	for _, b := range bendingBases {
		for _, m := range derivedReport(t, b+bendingMembers, true) {
			d.check(m)
		}
	}
	byHand := d.members
	if byHand < 100 {
		t.Errorf("%d members made by hand have a derivation, want 100", byHand)
	}
	r := rand.New(rand.NewSource(1993))
	for range 50 {
		for _, m := range derivedReport(t, bases[r.Intn(len(bases))]+randomColumns(r, 20), false) {
			d.check(m)
		}
	}
	if d.members-byHand < 950 {
		t.Errorf("%d of 1,000 random members have a derivation", d.members-byHand)
	}
	t.Logf("%d members, %d steps", d.members, d.steps)
	t.Logf("greatest deviation with all digits %.2g in %s", d.exact.deviation, d.exact.text)
	t.Logf("greatest deviation as printed %.2g in %s", d.rounded.deviation, d.rounded.text)
	for name, set := range map[string]*derivation.Set{"elastic": elastic.Standard{}.Symbols(), "EN 1993-1-1:2005": en1993.Standard{}.Symbols()} {
		for _, f := range set.Formulas() {
			if d.formulas[f] == 0 {
				t.Errorf("%s: no member comes to %s = %s", name, set.At(f.Symbol).Name, f.Text)
			}
		}
	}
}

// derivedReport works a text out; its members by place.
func derivedReport(t *testing.T, text string, clean bool) []*checker.Result {
	t.Helper()
	p := lang.Load([]string{"m.kern"}, func(string) (string, error) { return text, nil }, nil)
	r := checker.Check(p, nil)
	for _, d := range r.Diagnostics {
		if clean && d.Severity == lang.Error && d.Member == "" {
			t.Errorf("%s: %s: %q", d.Rule, d.Message, d.Span.Of(text))
		}
	}
	return r.Members
}

// randomColumns writes random members of every shape, with ends, holds, loads
// along and across, offsets and limits.
func randomColumns(r *rand.Rand, n int) string {
	var b strings.Builder
	pick := func(list ...string) string { return list[r.Intn(len(list))] }
	between := func(low, high float64) float64 { return low + (high-low)*r.Float64() }
	mm := func(low, high float64) string { return fmt.Sprintf("%.1f mm", between(low, high)) }
	b.WriteString("\nmaterial m1 = \"" + pick("S235", "S275", "S355") + "\"\nmaterial m2 { E = 70 GPa; fy = 160 MPa; density = 2700 kg/m3 }\nmaterial m3 { E = 210 GPa; fy = 450 MPa; density = 7850 kg/m3 }\n")
	for i := range n {
		size := between(60, 400)
		switch r.Intn(10) {
		case 0:
			fmt.Fprintf(&b, "section s%d = tube { depth = %.0f mm; width = %.0f mm; wall = %s; made = %s }\n", i, size, size*between(0.5, 1), mm(size/60, size/12), pick("hot", "cold", "welded"))
		case 1:
			fmt.Fprintf(&b, "section s%d = pipe { outside = %.0f mm; wall = %s; made = %s }\n", i, size, mm(size/80, size/10), pick("hot", "cold", "welded"))
		case 2:
			fmt.Fprintf(&b, "section s%d = bar { depth = %.0f mm; width = %.0f mm }\n", i, size/3, size/3*between(0.2, 1.5))
		case 3:
			fmt.Fprintf(&b, "section s%d = rod { diameter = %.0f mm }\n", i, size/3)
		case 4:
			fmt.Fprintf(&b, "section s%d = isection { depth = %.0f mm; width = %.0f mm; web = %s; flange = %s; made = welded }\n", i, size, size*between(0.4, 1.2), mm(size/100, size/20), mm(size/50, size/12))
		case 5:
			fmt.Fprintf(&b, "section s%d = isection { depth = %.0f mm; width = %.0f mm; web = %s; flange = %s; root = %s; made = rolled }\n", i, size, size*between(0.5, 1.1), mm(size/60, size/20), mm(size/40, size/12), mm(2, 12))
		case 6:
			fmt.Fprintf(&b, "section s%d = channel { depth = %.0f mm; width = %.0f mm; web = %s; flange = %s; root = %s; made = rolled }\n", i, size, size*between(0.3, 0.6), mm(size/40, size/20), mm(size/30, size/15), mm(2, 8))
		case 7:
			fmt.Fprintf(&b, "section s%d = tee { depth = %.0f mm; width = %.0f mm; web = %s; flange = %s; made = welded }\n", i, size, size*between(0.6, 2), mm(size/25, size/8), mm(size/25, size/8))
		case 8:
			fmt.Fprintf(&b, "section s%d = angle { depth = %.0f mm; width = %.0f mm; wall = %s; root = %s }\n", i, size, size*pickFloat(r, 1, 1, 0.7), mm(size/18, size/7), mm(2, 8))
		case 9:
			fmt.Fprintf(&b, "section s%d = \"%s\"\n", i, pick("HEB 160", "HEA 300", "IPE 300", "IPE 600", "UPN 200", "UPE 180", "SHS 100x100x5", "RHS 200x100x8", "CHS 114.3x5", "HEM 200"))
		}
		height := between(1, 9)
		fmt.Fprintf(&b, "%s C%d { section = s%d; material = %s\n    %s = %.3f m\n", pick("column", "column", "strut"), i, i, pick("m1", "m1", "m2", "m3"), "height", height)
		ends := pick("pinned pinned", "pinned pinned", "fixed pinned", "fixed fixed", "fixed free", "fixed guided", "pinned guided")
		base, top, _ := strings.Cut(ends, " ")
		fmt.Fprintf(&b, "    base %s; top %s\n", base, top)
		for range r.Intn(3) {
			fmt.Fprintf(&b, "    hold %s at %.3f m\n", pick("both", "minor", "major", "twist"), height*between(0.05, 0.95))
		}
		fmt.Fprintf(&b, "    load %.2f kN\n", math.Exp(between(0, 8))*pickFloat(r, 1, 1, 1, 1, -1))
		if r.Intn(3) == 0 {
			fmt.Fprintf(&b, "    load %.2f kN at %.3f m\n", math.Exp(between(0, 5)), height*between(0, 1))
		}
		switch r.Intn(6) {
		case 0:
			fmt.Fprintf(&b, "    load %.2f kN offset %.1f mm about %s\n", math.Exp(between(0, 4)), between(-50, 50), pick("major", "minor"))
		case 1:
			fmt.Fprintf(&b, "    load %.2f kN at %.3f m offset %.1f mm about major and %.1f mm about minor\n", math.Exp(between(0, 4)), height*between(0, 1), between(-50, 50), between(-50, 50))
		case 2:
			fmt.Fprintf(&b, "    load %.3f kN/m about %s\n", between(-3, 3), pick("major", "minor"))
		case 3:
			fmt.Fprintf(&b, "    load %.3f kNm about %s at %s\n    load %.3f kN across %s at %.3f m\n", between(-9, 9), pick("major", "minor"), pick("top", "base"), between(-9, 9), pick("major", "minor"), height*between(0, 1))
		}
		if r.Intn(3) == 0 {
			fmt.Fprintf(&b, "    limit slenderness = %d\n", 50+r.Intn(250))
		}
		if r.Intn(6) == 0 {
			fmt.Fprintf(&b, "    effective = %.2f about %s\n", between(0.5, 2.2), pick("major", "minor", "twist"))
		}
		b.WriteString("}\n")
	}
	return b.String()
}

func pickFloat(r *rand.Rand, list ...float64) float64 { return list[r.Intn(len(list))] }
