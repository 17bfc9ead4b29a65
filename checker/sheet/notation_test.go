package sheet_test

import (
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"kern/checker/sheet"
	"kern/lang"
	"kern/lang/unit"
)

// TestNotation holds how expressions are set.
func TestNotation(t *testing.T) {
	for text, want := range map[string]string{
		"A * f_y / gamma_M0": "<mfrac><mrow><mi>A</mi><mo form=\"infix\">·</mo><msub><mi>f</mi><mi mathvariant=\"normal\">y</mi></msub></mrow><msub><mi>γ</mi><mi>M0</mi></msub></mfrac>",
		"sqrt(a)":            "<msqrt><mi>a</mi></msqrt>",
		"(a + b)^2":          "<msup><mrow><mo form=\"prefix\" stretchy=\"true\">(</mo><mrow><mi>a</mi><mo form=\"infix\">+</mo><mi>b</mi></mrow><mo form=\"postfix\" stretchy=\"true\">)</mo></mrow><mn>2</mn></msup>",
		"lambda_z^2":         "<msubsup><mi>λ</mi><mi mathvariant=\"normal\">z</mi><mn>2</mn></msubsup>",
		"199.59 cm4":         "<mrow><mn>199.59</mn><mspace width=\"0.18em\"/><mrow><msup><mi>cm</mi><mn>4</mn></msup></mrow></mrow>",
		"235 N/mm2":          "<mrow><mn>235</mn><mspace width=\"0.18em\"/><mrow><mrow><mi mathvariant=\"normal\">N</mi><mi mathvariant=\"normal\">/</mi><msup><mi>mm</mi><mn>2</mn></msup></mrow></mrow></mrow>",
		"1.5e-7":             "<mrow><mrow><mn>1.5</mn><mo form=\"infix\">×</mo><msup><mn>10</mn><mrow><mo form=\"prefix\">−</mo><mn>7</mn></mrow></msup></mrow></mrow>",
		"not known":          "<mi>not known</mi>",
		"<script>":           "<mi>&lt;script&gt;</mi>",
	} {
		if got := sheet.MathML(text); got != "<math>"+want+"</math>" {
			t.Errorf("%s is set as\n%s, want\n%s", text, got, want)
		}
	}
}

// TestNotationMeansTheSame sets random expressions and reads them back: they have the
// value that they had.
func TestNotationMeansTheSame(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 11))
	known := map[string]unit.Quantity{}
	names := []string{"a", "x_1", "gamma_M1", "N_b_z_Rd", "lambda_LT", "chi"}
	for _, n := range names {
		known[n] = unit.Quantity{Value: 0.3 + 2*r.Float64()}
	}
	var expression func(depth int) string
	expression = func(depth int) string {
		if depth == 0 {
			if r.IntN(3) == 0 {
				return []string{"2", "0.5", "1.25", "3e-2", "1_000", "pi"}[r.IntN(6)]
			}
			return names[r.IntN(len(names))]
		}
		x, y := expression(depth-1-r.IntN(depth)), expression(depth-1-r.IntN(depth))
		switch r.IntN(12) {
		case 0, 1:
			return x + " + " + y
		case 2, 3:
			return x + " - " + y
		case 4, 5:
			return x + " * " + y
		case 6, 7:
			return x + " / " + y
		case 8:
			return "(" + x + ")^" + []string{"2", "0.5", "(" + y + ")", "-1"}[r.IntN(4)]
		case 9:
			return "(" + x + ")"
		case 10:
			return []string{"sqrt(abs(" + x + "))", "min(" + x + ", " + y + ")", "max(1, " + x + ")", "abs(" + x + ")", "cos(" + x + ")"}[r.IntN(5)]
		}
		return "-(" + x + ")"
	}
	compared := 0
	for range 4000 {
		text := expression(1 + r.IntN(5))
		want, ok := try(text, known)
		if !ok {
			continue
		}
		back := strings.TrimSpace(formulaText(elements(parse(t, []byte(sheet.MathML(text))), "math")[0]))
		got, ok := try(back, known)
		if !ok || math.Abs(got-want) > 1e-9*math.Max(math.Abs(want), 1e-9) {
			t.Fatalf("%s = %g is set so that it reads %s = %g", text, want, back, got)
		}
		compared++
	}
	if compared < 2500 {
		t.Errorf("only %d expressions were compared", compared)
	}
}

// try computes a text; false where it has no finite value.
func try(text string, known map[string]unit.Quantity) (float64, bool) {
	e, err := lang.ParseExpr(text)
	if err != nil {
		return 0, false
	}
	q, p := lang.Eval(e, func(n *lang.Expr) (unit.Quantity, *lang.Problem) {
		v, ok := known[n.Text]
		if !ok {
			return unit.Quantity{}, lang.Silent
		}
		return v, nil
	})
	return q.Value, p == nil && !math.IsNaN(q.Value) && !math.IsInf(q.Value, 0)
}
