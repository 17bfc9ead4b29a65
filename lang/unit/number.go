package unit

import (
	"math"
	"strconv"
	"strings"
)

// Plain decimals are printed from plainFrom up to, and without, plainTo; other
// magnitudes get an exponent.
const (
	plainFrom = 1e-4
	plainTo   = 1e7
)

// maxSignificant is the number of significant digits that tells any two
// float64 apart.
const maxSignificant = 17

// Number returns v as a decimal text with exactly the given number of
// significant digits (held within 1 to 17), but never with the integer part
// rounded away: 12345 with three digits is "12345". Magnitudes below 1e-4 and
// from 1e7 on are written as "1.234e-7". Zero is "0"; what is not finite is
// "NaN", "Inf" or "-Inf". strconv.ParseFloat reads every result, the language
// every finite one.
func Number(v float64, significant int) string {
	if text, done := special(v); done {
		return text
	}
	if v == 0 {
		return "0"
	}
	significant = min(max(significant, 1), maxSignificant)
	scientific := strconv.FormatFloat(v, 'e', significant-1, 64)
	mark := strings.IndexByte(scientific, 'e')
	exponent, _ := strconv.Atoi(scientific[mark+1:]) // FormatFloat wrote it
	// Rounding can carry a magnitude over either bound, so that what counts
	// is the printed number.
	if exponent >= -4 && math.Abs(v) < plainTo {
		plain := strconv.FormatFloat(v, 'f', max(0, significant-1-exponent), 64)
		if rounded, err := strconv.ParseFloat(plain, 64); err == nil && math.Abs(rounded) < plainTo {
			return plain
		}
	}
	return short(scientific)
}

// Exact returns the shortest decimal text that strconv.ParseFloat reads back
// to v itself: plain decimals for 1e-4 <= |v| < 1e7 and zero, else the form
// "1.234e-7"; "NaN", "Inf" or "-Inf" for what is not finite.
func Exact(v float64) string {
	if text, done := special(v); done {
		return text
	}
	if a := math.Abs(v); a == 0 || plainFrom <= a && a < plainTo {
		return strconv.FormatFloat(v, 'f', -1, 64)
	}
	return short(strconv.FormatFloat(v, 'e', -1, 64))
}

// special returns the text of a value that is not finite.
func special(v float64) (string, bool) {
	switch {
	case math.IsNaN(v):
		return "NaN", true
	case math.IsInf(v, 1):
		return "Inf", true
	case math.IsInf(v, -1):
		return "-Inf", true
	}
	return "", false
}

// short takes the plus sign and the leading zero off the exponent that
// strconv writes: "1.5e-07" is "1.5e-7", "2.1e+11" is "2.1e11".
func short(scientific string) string {
	mark := strings.IndexByte(scientific, 'e')
	exponent, err := strconv.Atoi(scientific[mark+1:])
	if err != nil {
		return scientific
	}
	return scientific[:mark+1] + strconv.Itoa(exponent)
}

// Short writes v for reading: at most the given number of significant digits,
// without zeros at the end ("2.5", "0.04", "12345" with any number of digits).
func Short(v float64, significant int) string {
	s := Number(v, significant)
	mantissa, exponent, _ := strings.Cut(s, "e")
	if strings.Contains(mantissa, ".") {
		mantissa = strings.TrimRight(strings.TrimRight(mantissa, "0"), ".")
	}
	if exponent != "" {
		return mantissa + "e" + exponent
	}
	return mantissa
}
