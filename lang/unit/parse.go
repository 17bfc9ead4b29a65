package unit

import (
	"math/big"
	"strings"
	"unicode/utf8"
)

// Bounds of a unit text, so that no input costs more than a few microseconds.
const (
	maxText     = 64 // bytes
	maxFactors  = 8
	maxExponent = 12
)

// Factors outside these bounds are refused: values in such a unit would leave
// the range of a float64 at the next step of a calculation.
const (
	smallestFactor = 1e-100
	largestFactor  = 1e100
)

// Parse reads a unit text: atoms joined by "*", "·" or "/", each with an
// optional exponent from 1 to 12 written as digits ("mm2"), after a caret
// ("mm^2") or raised ("mm²"). There are no spaces. Each "/" divides by the one
// factor after it ("kN/m/m"); a product after a solidus ("N/mm*m") can be read
// in two ways and is refused. A text may start with "1/", and "1" alone is the
// unit of a pure number. The exponent of a unit that is run together belongs
// to its second part: "kNm2" is kN*m2.
//
// The symbol of the result is the text as it was written; its factor is the
// float64 nearest to the exact one. Errors are of type *ParseError. Parse may
// be called from several goroutines; reading a text that was read lately
// allocates nothing.
func Parse(text string) (Unit, error) {
	if len(text) > maxText {
		return Unit{}, &ParseError{Text: text, Part: text, fault: tooLong}
	}
	pair, u := remembered(text)
	if u != nil {
		return *u, nil
	}
	product, failure := read(atoms, text)
	if failure != nil {
		return Unit{}, failure
	}
	factor, _ := product.rat().Float64()
	if !(factor >= smallestFactor && factor <= largestFactor) {
		return Unit{}, &ParseError{Text: text, Part: text, fault: tooExtreme}
	}
	return *remember(pair, Unit{Symbol: text, Factor: factor, Dim: product.dim}), nil
}

// product is a compound unit while it is being read: above/below is its exact
// factor. Fractions are brought to lowest terms once, at the end.
type product struct {
	above, below big.Int
	dim          Dim
}

func (p *product) rat() *big.Rat { return new(big.Rat).SetFrac(&p.above, &p.below) }

// multiply takes an atom to the power num/den into the product, or into its
// divisor. It reports false when a dimension cannot be held. Roots are taken of
// atoms with the factor 1 only; the caller sees to that.
func (p *product) multiply(k *known, num, den int, divide bool) bool {
	if k.head != nil {
		return p.multiply(k.head, 1, 1, divide) && p.multiply(k.tail, num, den, divide)
	}
	power, ok := k.Dim.Pow(num, den)
	if !ok {
		return false
	}
	above, below := &p.above, &p.below
	if divide {
		above, below = below, above
		p.dim, ok = p.dim.Div(power)
	} else {
		p.dim, ok = p.dim.Mul(power)
	}
	if den == 1 {
		for range num {
			above.Mul(above, k.factor.Num())
			below.Mul(below, k.factor.Denom())
		}
	}
	return ok
}

// read takes a unit text apart with the atoms of a table.
func read(table map[string]*known, text string) (*product, *ParseError) {
	fail := func(f fault, part string, offset int) (*product, *ParseError) {
		return nil, &ParseError{Text: text, Part: part, Offset: offset, fault: f}
	}
	if text == "" {
		return fail(emptyText, "", 0)
	}
	p := new(product)
	p.above.SetInt64(1)
	p.below.SetInt64(1)
	if text == "1" {
		return p, nil
	}
	at, divide, divided := 0, false, false
	if strings.HasPrefix(text, "1/") {
		at, divide, divided = len("1/"), true, true
	}
	previous := at - 1 // of the operator before the factor, -1 for none
	for count := 1; ; count++ {
		end, operator := factorEnd(text, at)
		piece := text[at:end]
		if piece == "" {
			if previous >= 0 {
				return fail(missingFactor, text[previous:at], previous)
			}
			return fail(missingFactor, text[end:end+operator], end)
		}
		if count > maxFactors {
			return fail(tooManyFactors, piece, at)
		}
		atom, exponent := splitExponent(piece)
		k := table[atom]
		if k == nil {
			if atom == "" {
				atom = piece
			}
			return fail(unknownAtom, atom, at)
		}
		num, den, ok := exponentOf(exponent)
		switch {
		case !ok:
			return fail(badExponent, exponent, at+len(atom))
		case k.bare && exponent != "":
			return fail(noExponent, piece, at)
		case den != 1 && (k.head != nil || !k.factor.IsInt() || k.Factor != 1):
			return fail(badRoot, exponent, at+len(atom))
		}
		if !p.multiply(k, num, den, divide) {
			return fail(tooExtreme, piece, at)
		}
		if operator == 0 {
			return p, nil
		}
		divide = text[end] == '/'
		if divided && !divide {
			return fail(unclearSolidus, text[end:end+operator], end)
		}
		divided = divided || divide
		previous, at = end, end+operator
	}
}

// factorEnd returns where the factor that starts at at ends, and the length in
// bytes of the operator there (0 at the end of the text). A solidus within
// parentheses belongs to an exponent.
func factorEnd(text string, at int) (end, operator int) {
	inside := false
	for i := at; i < len(text); i++ {
		switch c := text[i]; {
		case c == '(':
			inside = true
		case c == ')':
			inside = false
		case c == '/' && !inside, c == '*':
			return i, 1
		case c == 0xC2 || c == 0xE2:
			if r, size := utf8.DecodeRuneInString(text[i:]); r == '·' || r == '⋅' {
				return i, size
			}
		}
	}
	return len(text), 0
}

// splitExponent divides a factor before its first digit, caret or raised
// digit.
func splitExponent(piece string) (atom, exponent string) {
	for i, r := range piece {
		if r == '^' || r >= '0' && r <= '9' || raisedDigit(r) >= 0 {
			return piece[:i], piece[i:]
		}
	}
	return piece, ""
}

// exponentOf reads "", "2", "^2", "²" or "^(1/2)" as num/den.
func exponentOf(text string) (num, den int, ok bool) {
	if text == "" {
		return 1, 1, true
	}
	if fraction, found := strings.CutPrefix(text, "^("); found {
		above, below, found := strings.Cut(fraction, "/")
		below, closed := strings.CutSuffix(below, ")")
		num, numOK := wholeNumber(above, maxExponent*sixths)
		den, denOK := wholeNumber(below, sixths)
		ok := found && closed && numOK && denOK && den > 1 &&
			num*sixths%den == 0 && num <= maxExponent*den
		return num, den, ok
	}
	if digits, found := strings.CutPrefix(text, "^"); found || text[0] < utf8.RuneSelf {
		num, ok = wholeNumber(digits, maxExponent)
		return num, 1, ok
	}
	for i, r := range text {
		digit := raisedDigit(r)
		if digit < 0 || i == 0 && digit == 0 || num > maxExponent {
			return 0, 1, false
		}
		num = num*10 + digit
	}
	return num, 1, num <= maxExponent
}

// wholeNumber reads a whole number from 1 to most without a sign or a leading
// zero.
func wholeNumber(text string, most int) (int, bool) {
	value := 0
	for i := range len(text) {
		c := text[i]
		if c < '0' || c > '9' || i == 0 && c == '0' || value > most {
			return 0, false
		}
		value = value*10 + int(c-'0')
	}
	return value, value >= 1 && value <= most
}

// raisedDigit returns the value of a superscript digit, -1 for another rune.
func raisedDigit(r rune) int {
	switch {
	case r == '¹':
		return 1
	case r == '²':
		return 2
	case r == '³':
		return 3
	case r == '⁰' || r >= '⁴' && r <= '⁹':
		return int(r - '⁰')
	}
	return -1
}
