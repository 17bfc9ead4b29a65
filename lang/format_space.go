package lang

import "strings"

// spacing decides on the blanks between the tokens of a statement. The language
// reads some blanks: before a bracket (a call has none), before a unit (one at
// most) and around a sign between the parts of a statement ("load G -5 kN" has
// a part more than "a - b"). What they say is kept.
type spacing struct {
	text    string
	word    string // the statement's first word
	prev    Kind
	unit    bool  // the token before is a unit, or a word where a unit may stand
	after   int32 // columns behind the token before
	operand bool  // a value ended: a sign would be an operator
	first   bool  // the token before is the statement's first word
	parens  int
}

// spread adds the pieces of a statement's line.
func (w *formatter) spread(u *segment, r *row) {
	s := spacing{text: w.text}
	spaced, breaks := false, uint8(0)
	for i := u.first; i < u.last; i++ {
		t := w.tokens[i]
		p := w.piece(i)
		switch t.Kind {
		case Blank:
			spaced = true
			continue
		case Newline:
			spaced = true
			breaks = min(breaks+1, 2)
			continue
		case Comment:
			p.gap = commentGap
			spaced = true
		default:
			next, glued := w.following(i, u.last)
			p.gap = s.before(t.Token, next, spaced, glued)
			spaced = false
		}
		if p.breaks = breaks; breaks > 0 {
			r.single = false
		}
		breaks = 0
		w.pieces = append(w.pieces, p)
	}
}

// following gives the kind of the token after the one at i, and whether it
// follows without a blank.
func (w *formatter) following(i, last int) (next Kind, glued bool) {
	for j := i + 1; j < last; j++ {
		switch w.tokens[j].Kind {
		case Blank, Newline, Comment:
			continue
		}
		return w.tokens[j].Kind, j == i+1
	}
	return EOF, false
}

// before gives the columns before a token. spaced tells whether it stood apart
// from the token before it, glued whether the next token sticks to it.
func (s *spacing) before(t Token, next Kind, spaced, glued bool) int32 {
	gap, after := s.after, int32(1)
	operand, first := false, false
	unit := t.Kind == Unit || t.Kind == Name && s.prev == Number
	switch t.Kind {
	case Comma:
		gap = 0
	case OpenParen:
		if s.prev == Name && !spaced && !s.first {
			gap = 0
		}
		after = 0
		s.parens++
	case CloseParen:
		gap, operand = 0, true
		s.parens--
	case Number:
		operand = true
	case Unit:
		gap, operand = 1, true
		if !spaced && stickyUnit(t.Span().Of(s.text)) {
			gap = 0
		}
	case Name:
		operand = true
		if s.prev == EOF {
			s.word, operand, first = t.Span().Of(s.text), false, true
		}
		if s.prev == Number && unitLength(s.text[t.Start:]) > 0 {
			gap = 2 // with one blank it would be a unit
		}
	case Operator:
		gap, after = s.operator(t, next, spaced, glued)
	}
	s.prev, s.unit, s.after, s.operand, s.first = t.Kind, unit, after, operand, first
	return gap
}

// operator gives the columns before and behind an operator.
func (s *spacing) operator(t Token, next Kind, spaced, glued bool) (gap, after int32) {
	op := s.text[t.Start]
	switch {
	case op == '+' || op == '-':
		if !s.operand || s.parens == 0 && spaced && glued {
			return s.after, 0 // a sign
		}
		if s.word == "depart" && s.prev == Name && next == Name {
			return 0, 0 // the hyphen in the name of a rule
		}
	case op == '^':
		if s.unit && next == Number {
			break // "kN^2" without blanks is one unit
		}
		if s.word != "show" {
			return 0, 0
		}
	case op != '*' && op != '/':
		return s.after, 1
	}
	gap, after = 1, 1
	if s.word == "show" {
		// the signs in the units of results are no arithmetic
		if !spaced {
			gap = 0
		}
		if glued {
			after = 0
		}
	}
	return gap, after
}

// stickyUnit tells whether a unit may stand right behind its number.
func stickyUnit(unit string) bool {
	return strings.HasPrefix(unit, "%") || strings.HasPrefix(unit, "‰") || strings.HasPrefix(unit, "°")
}
