package unit

import (
	"math"
	"math/rand/v2"
	"regexp"
	"strconv"
	"strings"
	"testing"
)

func TestNumber(t *testing.T) {
	for _, c := range []struct {
		v      float64
		digits int
		want   string
	}{
		{12345, 3, "12345"},
		{12345.678, 3, "12346"},
		{-12345.678, 3, "-12346"},
		{1.5, 3, "1.50"},
		{100, 3, "100"},
		{100, 4, "100.0"},
		{9.996, 3, "10.0"},
		{9.994, 3, "9.99"},
		{99.96, 3, "100"},
		{999.6, 3, "1000"},
		{0.5, 1, "0.5"},
		{0.95, 1, "0.9"}, // the float64 is below 0.95
		{0.123456, 3, "0.123"},
		{0.0001, 3, "0.000100"},
		{0.00012345, 4, "0.0001234"}, // the float64 is below 0.00012345
		{0.000099996, 3, "0.000100"},
		{0.00009994, 3, "9.99e-5"},
		{1.234e-7, 4, "1.234e-7"},
		{-1.234e-7, 4, "-1.234e-7"},
		{1e-12, 1, "1e-12"},
		{9999999, 3, "9999999"},
		{9999999.4, 3, "9999999"},
		{9999999.6, 3, "1.00e7"},
		{1e7, 3, "1.00e7"},
		{12345678, 4, "1.235e7"},
		{210e9, 3, "2.10e11"},
		{math.MaxFloat64, 3, "1.80e308"},
		{math.SmallestNonzeroFloat64, 2, "4.9e-324"},
		{0, 3, "0"},
		{math.Copysign(0, -1), 3, "0"},
		{2, 0, "2"},
		{2, -5, "2"},
		{0.1, 99, "0.10000000000000001"},
		{math.NaN(), 3, "NaN"},
		{math.Inf(1), 3, "Inf"},
		{math.Inf(-1), 3, "-Inf"},
	} {
		if got := Number(c.v, c.digits); got != c.want {
			t.Errorf("Number(%v, %d) = %q, want %q", c.v, c.digits, got, c.want)
		}
	}
}

func TestExact(t *testing.T) {
	for v, want := range map[float64]string{
		0: "0", 1: "1", 0.1: "0.1", 12345: "12345", 0.0001: "0.0001", 0.00009: "9e-5", 1.5e-7: "1.5e-7",
		9999999: "9999999", 1e7: "1e7", 210e9: "2.1e11", -2.5: "-2.5", 1.0 / 3: "0.3333333333333333",
		math.Inf(1): "Inf", math.Inf(-1): "-Inf",
	} {
		if got := Exact(v); got != want {
			t.Errorf("Exact(%v) = %q, want %q", v, got, want)
		}
	}
	if got := Exact(math.NaN()); got != "NaN" {
		t.Errorf("Exact(NaN) = %q", got)
	}
	if got := Exact(math.Copysign(0, -1)); got != "-0" {
		t.Errorf("Exact(-0) = %q", got)
	}
}

// numberForm is how the language writes a number, with a sign before it.
var numberForm = regexp.MustCompile(`^-?[0-9]+(\.[0-9]+)?(e-?[1-9][0-9]*)?$`)

func TestNumbersReadBack(t *testing.T) {
	r := rand.New(rand.NewPCG(4, 4))
	for i := range 50000 {
		v := math.Float64frombits(r.Uint64())
		if i%2 == 0 { // the magnitudes of daily use
			v = r.NormFloat64() * math.Pow(10, float64(r.IntN(24)-12))
		}
		if math.IsNaN(v) || math.IsInf(v, 0) {
			continue
		}
		text := Exact(v)
		back, err := strconv.ParseFloat(text, 64)
		if err != nil || back != v || !numberForm.MatchString(text) {
			t.Fatalf("Exact(%v) = %q, which reads as %v, %v", v, text, back, err)
		}
		digits := 1 + r.IntN(17)
		text = Number(v, digits)
		back, err = strconv.ParseFloat(text, 64)
		if !numberForm.MatchString(text) || err != nil && !math.IsInf(back, 0) {
			t.Fatalf("Number(%v, %d) = %q: %v", v, digits, text, err)
		}
		a := math.Abs(v)
		if math.IsInf(back, 0) || a < 1e-300 {
			continue // rounded past the ends of float64
		}
		// Half a unit of the last significant digit, with room for the
		// rounding of this check itself.
		half := math.Pow(10, math.Floor(math.Log10(a))-float64(digits-1)) / 2
		if math.Abs(back-v) > half*1.001+a*1e-15 {
			t.Fatalf("Number(%v, %d) = %q is off by %v", v, digits, text, back-v)
		}
		mantissa, exponent, scientific := strings.Cut(strings.TrimPrefix(text, "-"), "e")
		whole, fraction, _ := strings.Cut(mantissa, ".")
		if scientific && (len(whole) != 1 || exponent == "0") {
			t.Fatalf("Number(%v, %d) = %q", v, digits, text)
		}
		if b := math.Abs(back); scientific == (b >= plainFrom && b < plainTo) {
			t.Fatalf("Number(%v, %d) = %q has the wrong form", v, digits, text)
		}
		significant := len(strings.TrimLeft(whole+fraction, "0"))
		if want := digits; significant != want && !(fraction == "" && significant > want) && significant != want+1 {
			t.Fatalf("Number(%v, %d) = %q has %d digits", v, digits, text, significant)
		}
		if again := Number(back, digits); again != text && significant == digits {
			t.Fatalf("Number(%v, %d) = %q, but that reads and prints as %q", v, digits, text, again)
		}
	}
}
