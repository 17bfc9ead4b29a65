package lang

import (
	"math"
	"strings"
	"testing"

	"kern/lang/unit"
)

// statement reads a text that is one assignment and gives its value's parts and
// the problems.
func statement(t *testing.T, text string) ([]*Expr, []Problem) {
	t.Helper()
	f := Parse(&FileID{}, text, nil)
	if len(f.Decls) != 1 || len(f.Decls[0].Stmts) != 1 {
		t.Fatalf("%q is not one statement", text)
	}
	parts, ok := f.Decls[0].Stmts[0].Assigned()
	if !ok {
		t.Fatalf("%q assigns nothing", text)
	}
	return parts, f.Decls[0].Problems
}

// names are the values that the tests lean on, in SI units.
func names(e *Expr) (unit.Quantity, *Problem) {
	switch e.Text {
	case "a":
		return unit.Quantity{Value: 3}, nil
	case "b":
		return unit.Quantity{Value: 2}, nil
	case "L":
		return unit.Quantity{Value: 4, Dim: unit.Length}, nil
	case "F":
		return unit.Quantity{Value: 1000, Dim: unit.Force}, nil
	case "silent":
		return unit.Quantity{}, Silent
	}
	return unit.Quantity{}, &Problem{Rule: "unknown-name", Span: e.Span, Message: "no " + e.Text}
}

func TestEval(t *testing.T) {
	none, length, force := unit.None, unit.Length, unit.Force
	for _, c := range []struct {
		text string
		want float64
		dim  unit.Dim
	}{
		{"1 + 2 * 3", 7, none},
		{"(1 + 2) * 3", 9, none},
		{"10 - 4 - 3", 3, none}, // to the left
		{"100 / 10 / 2", 5, none},
		{"12 / 3 * 2", 8, none},
		{"2^3^2", 512, none}, // to the right
		{"2^3 * 2", 16, none},
		{"-2^2", -4, none}, // the power binds before the sign
		{"(-2)^2", 4, none},
		{"2^-1", 0.5, none},
		{"2^-2^2", 0.0625, none}, // 2^(-(2^2))
		{"-a * b", -6, none},
		{"a * -b", -6, none},
		{"a - -b", 5, none},
		{"+a", 3, none},
		{"--a", 3, none},
		{"-a + b", -1, none},
		{"1_000 + 1", 1001, none},
		{"8.67e-7", 8.67e-7, none},
		{"1E3", 1000, none},
		// units
		{"5 kN", 5000, force},
		{"5kN", 5000, force},
		{"5\u00a0kN", 5000, force},
		{"5\u202fkN", 5000, force},
		{"90 mm", 0.09, length},
		{"3 m * 2 m", 6, unit.Area},
		{"10 kN / 2 m", 5000, unit.ForcePerLength},
		{"5 kN / L", 1250, unit.ForcePerLength},
		{"F / L", 250, unit.ForcePerLength},
		{"L / 300", 4.0 / 300, length},
		{"1 m + 50 cm", 1.5, length},
		{"1 m - 50 cm", 0.5, length},
		{"50 %", 0.5, none},
		{"50%", 0.5, none},
		{"180 deg", math.Pi, unit.Angle},
		{"180°", math.Pi, unit.Angle},
		{"L^2", 16, unit.Area},
		{"(16 m2)^(1/2)", 4, length},
		{"(8 m3)^(1/3)", 2, length},
		{"L^0", 1, none},
		{"2 mm^2", 2e-6, unit.Area}, // a unit with its exponent
		{"100 kg * g", 980.665, force},
		{"2 * pi", 2 * math.Pi, none},
		// feet and inches: 1 ft = 0.3048 m and 1 in = 0.0254 m exactly
		{"14 ft 6 in", 4.4196, length},
		{"14ft 6in", 4.4196, length},
		{"14 ft 6 in + 1 m", 5.4196, length},
		{"2 * 14 ft 6 in", 8.8392, length},
		{"-14 ft 6 in", -4.4196, length},
		{"14 ft", 4.2672, length},
		// functions
		{"sqrt(16 m2)", 4, length},
		{"sqrt(0)", 0, none},
		{"min(3, a - 1, 5)", 2, none},
		{"max(1 m, 20 cm, L)", 4, length},
		{"max(2,5)", 5, none}, // inside brackets a comma parts values
		{"abs(-5 kN)", 5000, force},
		{"sin(30 deg)", 0.5, none},
		{"cos(60°)", 0.5, none},
		{"tan(45 deg)", 1, none},
		{"sin(pi / 2)", 1, none},
		{"sqrt(abs(min(-4, 4)))", 2, none},
		// the minus rule does not count inside brackets
		{"(a -b)", 1, none},
		{"max(a -b, 0)", 1, none},
		{"a-b", 1, none},
		{"a - b", 1, none},
		{"a- b", 1, none},
		// lines that go on
		{"(1 +\n 2)", 3, none},
		{"max(1, # one\r\n 2)", 2, none},
	} {
		parts, problems := statement(t, "x = "+c.text)
		if len(problems) > 0 || len(parts) != 1 {
			t.Errorf("%s: %d parts, %v", c.text, len(parts), problems)
			continue
		}
		q, p := Eval(parts[0], names)
		if p != nil {
			t.Errorf("%s: %s", c.text, p.Message)
			continue
		}
		if q.Dim != c.dim || math.Abs(q.Value-c.want) > 1e-12*max(1, math.Abs(c.want)) {
			t.Errorf("%s is %v %v, want %v %v", c.text, q.Value, q.Dim.Name(), c.want, c.dim.Name())
		}
	}
}

func TestEvalProblems(t *testing.T) {
	for _, c := range []struct{ text, rule, at string }{
		{"1 m + 1 kN", "unit-mismatch", "1 m + 1 kN"},
		{"1 m - 1", "unit-mismatch", "1 m - 1"},
		{"L + F * 1 m", "unit-mismatch", "L + F * 1 m"},
		{"L + (F + 1)", "unit-mismatch", "F + 1"},
		{"1 / 0", "no-value", "0"},
		{"F / (L - L)", "no-value", "(L - L)"},
		{"sqrt(-1)", "no-value", "sqrt(-1)"},
		{"(-1)^0.5", "no-value", "(-1)^0.5"},
		{"10^400", "no-value", "10^400"},
		{"0^-1", "no-value", "0^-1"},
		{"1e308 * 10", "no-value", "1e308 * 10"},
		{"1 / (1e308 * 10)", "no-value", "1e308 * 10"},
		{"min(1, 1e308 * 10)", "no-value", "1e308 * 10"},
		{"1 / 1e308 Mlbf", "unknown-unit", "Mlbf"},
		{"1 kN / 1e308 kN", "no-value", "1e308 kN"},
		{"2^L", "unit-mismatch", "L"},
		{"L^0.3", "unit-mismatch", "0.3"},
		{"sin(5 kN)", "unit-mismatch", "5 kN"},
		{"max(1 m, 1 kN)", "unit-mismatch", "1 kN"},
		{"min()", "wrong-count", "min()"},
		{"sqrt(1, 2)", "wrong-count", "sqrt(1, 2)"},
		{"foo(1)", "unknown-name", "foo"},
		{"nobody + 1", "unknown-name", "nobody"},
		{"5 kNx", "unknown-unit", "kNx"},
		{"5 kN/q", "unknown-unit", "kN/q"},
		{"L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L * L", "unit-mismatch", ""},
	} {
		parts, problems := statement(t, "x = "+c.text)
		if len(problems) > 0 || len(parts) != 1 {
			t.Errorf("%s: %d parts, %v", c.text, len(parts), problems)
			continue
		}
		q, p := Eval(parts[0], names)
		if p == nil {
			t.Errorf("%s has the value %v %s", c.text, q.Value, q.Dim.Name())
			continue
		}
		if at := p.Span.Of("x = " + c.text); p.Rule != c.rule || c.at != "" && at != c.at || p.Message == "" {
			t.Errorf("%s: %s at %q (%s), want %s at %q", c.text, p.Rule, at, p.Message, c.rule, c.at)
		}
	}
	for _, text := range []string{"silent", "silent + 1", "-silent", "sqrt(silent)", "max(1, silent)", "1 + silent * 2"} {
		parts, _ := statement(t, "x = "+text)
		if _, p := Eval(parts[0], names); p != Silent {
			t.Errorf("%s: %v, want silence", text, p)
		}
	}
}

// Problems that the reader of statements finds: the statement is broken, and its
// value is never computed from what was meant.
func TestBrokenValues(t *testing.T) {
	for _, c := range []struct{ text, rule, at, mended string }{
		{"x = 2,5 m", "decimal-comma", "2,5", "2.5"},
		{"x = 1,234,567", "decimal-comma", "1,234,567", "1_234_567"},
		{"x = 1.2.3", "bad-number", "1.2.3", ""},
		{"x = .5", "bad-number", ".5", "0.5"},
		{"x = 5. m", "bad-number", "5.", "5"},
		{"x = 1__0", "bad-number", "1__0", ""},
		{"x = 1e999", "bad-number", "1e999", ""},
		{"x = 1e-999", "bad-number", "1e-999", ""},
		{"x = 14 ft 1e999 in", "bad-number", "1e999", ""},
		{"x = “S355”", "curly-quotes", "“S355”", `"S355"`},
		{"x = „S355“", "curly-quotes", "„S355“", `"S355"`},
		{"x = «S355»", "curly-quotes", "«S355»", `"S355"`},
		{"x = \"open", "unclosed-text", "\"open", ""},
		{"x = (1 + 2", "unclosed-bracket", "(", ""},
		{"x = max(1, 2", "unclosed-bracket", "(", ""},
		{"x = 1 + 2)", "misplaced-sign", ")", ""},
		{"x = 1 +", "missing-value", "+", ""},
		{"x = * 2", "misplaced-sign", "*", ""},
		{"x = 1 + \"a\"", "misplaced-sign", "\"a\"", ""},
		{"x = 1 § 2", "stray-character", "§", ""},
		{"x = 1 \xff", "stray-character", "\xff", ""},
		{"x = " + strings.Repeat("-", 100) + "1", "nested-too-deep", "-", ""},
		{"x = " + strings.Repeat("(", 100) + "1" + strings.Repeat(")", 100), "nested-too-deep", "(", ""},
		{"x = " + strings.Repeat("2^", 100) + "1", "nested-too-deep", "2", ""},
	} {
		f := Parse(&FileID{}, c.text+"\n", nil)
		d := f.Decls[0]
		if len(f.Decls) != 1 || len(d.Stmts) != 1 || !d.Stmts[0].Broken || len(d.Problems) != 1 {
			t.Errorf("%q: %d statements, problems %v", c.text, len(d.Stmts), d.Problems)
			continue
		}
		p := d.Problems[0]
		if p.Rule != c.rule || p.Span.Of(c.text) != c.at {
			t.Errorf("%q: %s at %q, want %s at %q", c.text, p.Rule, p.Span.Of(c.text), c.rule, c.at)
		}
		if c.mended != "" && (len(p.Fixes) == 0 || p.Fixes[0].Edits[0].New != c.mended) {
			t.Errorf("%q: no fix to %q: %v", c.text, c.mended, p.Fixes)
		}
	}
}

// Every flaw past the bound of problems breaks its statement all the same.
func TestBrokenBeyondBound(t *testing.T) {
	text := "column A {\n" + strings.Repeat("load 2,5 kN\n", maxReport+50) + "load 5 kN\n}\n"
	d := Parse(&FileID{}, text, nil).Decls[0]
	if len(d.Problems) != maxReport {
		t.Errorf("%d problems, want %d", len(d.Problems), maxReport)
	}
	for i, s := range d.Stmts[0].Body.Stmts {
		if want := i < maxReport+50; s.Broken != want {
			t.Fatalf("statement %d: broken %v, want %v", i, s.Broken, want)
		}
	}
}

// Between the parts of a statement a minus with a blank before it and none
// behind it begins a new part.
func TestMinusRule(t *testing.T) {
	for _, c := range []struct {
		text  string
		parts int
	}{
		{"a - b", 1}, {"a-b", 1}, {"a- b", 1}, {"a -b", 2}, {"a +b", 2}, {"a\t-b", 2}, {"a\u00a0-b", 2},
		{"G -5 kN", 2}, {"5 kN -5 kN", 2}, {"5 kN - 5 kN", 1}, {"(a -b)", 1}, {"(a) -b", 2}, {"max(a -b, 1)", 1},
		{"-5", 1}, {"- 5", 1}, {"a --b", 2}, {"a - -b", 1}, {"a *-b", 1}, {"a -b -c", 3}, {"2 -1", 2}, {"a *b", 1},
	} {
		parts, problems := statement(t, "x = "+c.text)
		if len(parts) != c.parts || len(problems) > 0 {
			t.Errorf("%q has %d parts, want %d; %v", c.text, len(parts), c.parts, problems)
		}
	}
}

func TestParseExpr(t *testing.T) {
	for _, text := range []string{"a + b", "sqrt(a^2 + b^2)", "min(1, 2)", "-L"} {
		if e, err := ParseExpr(text); err != nil || e == nil || e.Span != (Span{0, int32(len(text))}) {
			t.Errorf("%q: %v, %v", text, e, err)
		}
	}
	for _, text := range []string{"", "a b", "a -b", "(a", "2,5", "a +", "1 = 2"} {
		if e, err := ParseExpr(text); err == nil {
			t.Errorf("%q reads as %v", text, e)
		}
	}
}
