package unit

import "fmt"

// ParseError says why a text is not a unit, and names the smallest part of the
// text that is at fault.
type ParseError struct {
	// Text is the whole text that was to be read.
	Text string
	// Part is the faulty part of it: an unknown atom, an exponent, an operator
	// with nothing beside it, or the whole text.
	Part string
	// Offset is where Part starts in Text, in bytes.
	Offset int

	fault fault
}

// fault is the kind of a ParseError.
type fault uint8

const (
	unknownAtom fault = iota
	emptyText
	tooLong
	missingFactor
	tooManyFactors
	badExponent
	noExponent
	badRoot
	unclearSolidus
	tooExtreme
)

// Unknown reports whether Part is a symbol that the language does not know,
// as opposed to known symbols put together wrongly.
func (e *ParseError) Unknown() bool { return e.fault == unknownAtom }

// Error returns the reason as one sentence part without a full stop.
func (e *ParseError) Error() string {
	text, part := clip(e.Text), clip(e.Part)
	switch e.fault {
	case emptyText:
		return "a unit is missing"
	case tooLong:
		return fmt.Sprintf("unit %q is longer than %d bytes", text, maxText)
	case missingFactor:
		return fmt.Sprintf("a unit is missing beside %q in %q", part, text)
	case tooManyFactors:
		return fmt.Sprintf("unit %q has more than %d factors", text, maxFactors)
	case badExponent:
		return fmt.Sprintf("exponent %q in %q is not a whole number from 1 to %d", part, text, maxExponent)
	case noExponent:
		return fmt.Sprintf("%q in %q cannot have an exponent", part, text)
	case badRoot:
		return fmt.Sprintf("exponent %q in %q is not a root of a coherent unit", part, text)
	case unclearSolidus:
		return fmt.Sprintf("%q after a solidus in %q can be read in two ways: put the products first, and a solidus before each divisor", part, text)
	case tooExtreme:
		return fmt.Sprintf("unit %q is too large or too small to compute with", text)
	}
	if part == text {
		return fmt.Sprintf("unknown unit %q", text)
	}
	return fmt.Sprintf("unknown unit %q in %q", part, text)
}

// clip shortens a text that is too long to be a unit, for messages.
func clip(text string) string {
	if len(text) <= maxText {
		return text
	}
	return text[:maxText] + "…"
}
