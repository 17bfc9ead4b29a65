package sheet

import (
	"regexp"
	"slices"
	"strings"

	"kern/lang"
)

// mark is a part of a formula as it is set: a sign, or an arrangement of parts.
type mark struct {
	kind markKind
	text string
	// parts of a row; of a fraction above and below; of a root or a fence what
	// stands in it; of a script the base, what stands below and what above, each
	// of which may be empty.
	parts []mark
}

type markKind uint8

const (
	emptyMark    markKind = iota
	letterMark            // a letter that stands for a quantity: set in italics
	wordMark              // upright: words, units, names of functions
	numberMark            // digits
	operatorMark          // a sign between two parts, with space around it
	prefixMark            // a sign before a part
	commaMark             // between the arguments of a function
	spaceMark             // the small space between a number and its unit
	rowMark
	fractionMark
	rootMark
	scriptMark
	fenceMark // text is the opening and the closing sign
)

// greek are the letters that ASCII names of symbols spell out.
var greek = map[string]string{
	"alpha": "α", "beta": "β", "gamma": "γ", "delta": "δ", "epsilon": "ε", "zeta": "ζ", "eta": "η", "theta": "θ", "kappa": "κ", "lambda": "λ",
	"mu": "μ", "nu": "ν", "xi": "ξ", "pi": "π", "rho": "ρ", "sigma": "σ", "tau": "τ", "phi": "φ", "chi": "χ", "psi": "ψ", "omega": "ω",
	"Delta": "Δ", "Lambda": "Λ", "Phi": "Φ", "Psi": "Ψ", "Omega": "Ω",
}

// powers are the raised digits of units.
var powers = strings.NewReplacer("²", "2", "³", "3", "⁴", "4", "⁶", "6")

// notation turns an expression of the language into marks. The text is that of
// the expression: numbers are set as they are written there.
func notation(text string, e *lang.Expr) mark {
	switch e.Kind {
	case lang.NumberExpr:
		return number(e.Span.Of(text))
	case lang.QuantExpr:
		digits := strings.TrimSpace(strings.TrimSuffix(e.Span.Of(text), e.Text))
		return row(number(digits), mark{kind: spaceMark}, unitMark(e.Text))
	case lang.NameExpr:
		return symbolMark(e.Text)
	case lang.ParenExpr:
		return mark{kind: fenceMark, text: "()", parts: []mark{notation(text, e.Args[0])}}
	case lang.UnaryExpr:
		sign := "−"
		if e.Op == '+' {
			sign = "+"
		}
		return row(mark{kind: prefixMark, text: sign}, notation(text, e.Args[0]))
	case lang.BinaryExpr:
		return binary(text, e)
	case lang.CallExpr:
		return call(text, e)
	}
	return word(e.Span.Of(text))
}

func binary(text string, e *lang.Expr) mark {
	switch e.Op {
	case '/':
		return mark{kind: fractionMark, parts: []mark{notation(text, bare(e.Args[0])), notation(text, bare(e.Args[1]))}}
	case '^':
		base, above := notation(text, e.Args[0]), level(notation(text, bare(e.Args[1])))
		if base.kind == scriptMark && base.parts[2].kind == emptyMark {
			return mark{kind: scriptMark, parts: []mark{base.parts[0], base.parts[1], above}}
		}
		return mark{kind: scriptMark, parts: []mark{base, {}, above}}
	}
	sign := map[byte]string{'+': "+", '-': "−", '*': "·"}[e.Op]
	return row(notation(text, e.Args[0]), mark{kind: operatorMark, text: sign}, notation(text, e.Args[1]))
}

// level sets a fraction on one line, for an exponent: a bar would make it too small to
// read.
func level(m mark) mark {
	if m.kind != fractionMark {
		return m
	}
	part := func(p mark) mark {
		if p.kind == fractionMark || p.kind == rowMark && slices.ContainsFunc(p.parts, func(x mark) bool { return x.kind == operatorMark }) {
			return mark{kind: fenceMark, text: "()", parts: []mark{p}}
		}
		return p
	}
	return row(part(m.parts[0]), mark{kind: operatorMark, text: "/"}, part(m.parts[1]))
}

// bare takes the brackets off where a bar, a root or a raised line groups.
func bare(e *lang.Expr) *lang.Expr {
	for e.Kind == lang.ParenExpr {
		e = e.Args[0]
	}
	return e
}

func call(text string, e *lang.Expr) mark {
	if len(e.Args) == 1 {
		switch e.Text {
		case "sqrt":
			return mark{kind: rootMark, parts: []mark{notation(text, bare(e.Args[0]))}}
		case "abs":
			return mark{kind: fenceMark, text: "||", parts: []mark{notation(text, bare(e.Args[0]))}}
		}
	}
	var inside []mark
	for i, a := range e.Args {
		if i > 0 {
			inside = append(inside, mark{kind: commaMark, text: ","})
		}
		inside = append(inside, notation(text, a))
	}
	return row(word(e.Text), mark{kind: fenceMark, text: "()", parts: []mark{row(inside...)}})
}

// row puts marks in a line; rows inside are taken apart, so that a line can be
// broken at any of its signs.
func row(parts ...mark) mark {
	var out []mark
	for _, p := range parts {
		switch p.kind {
		case emptyMark:
		case rowMark:
			out = append(out, p.parts...)
		default:
			out = append(out, p)
		}
	}
	if len(out) == 1 {
		return out[0]
	}
	return mark{kind: rowMark, parts: out}
}

func word(s string) mark { return mark{kind: wordMark, text: s} }

// number sets digits; a power of ten is written out.
func number(s string) mark {
	digits, exponent, found := strings.Cut(strings.ToLower(s), "e")
	if !found {
		return mark{kind: numberMark, text: s}
	}
	exponent = strings.TrimPrefix(exponent, "+")
	power := mark{kind: numberMark, text: strings.TrimPrefix(exponent, "-")}
	if strings.HasPrefix(exponent, "-") {
		power = row(mark{kind: prefixMark, text: "−"}, power)
	}
	// one part, so that no line is broken in it and no power is taken of half of it
	return mark{kind: fenceMark, parts: []mark{row(mark{kind: numberMark, text: digits}, mark{kind: operatorMark, text: "×"},
		mark{kind: scriptMark, parts: []mark{{kind: numberMark, text: "10"}, {}, power}})}}
}

// factor is the letter phi before a resistance, as one standard prints it: a
// factor, not a part of the name.
var factor = regexp.MustCompile(`^phi_([PMVTR]_n.*)$`)

// symbolMark sets a symbol: the letter, and what follows "_" below it.
func symbolMark(name string) mark {
	if m := factor.FindStringSubmatch(name); m != nil {
		return row(letter("phi"), mark{kind: spaceMark}, symbolMark(m[1]))
	}
	if resistance, safety, found := strings.Cut(name, "_over_"); found {
		return mark{kind: fractionMark, parts: []mark{symbolMark(resistance), symbolMark(safety)}}
	}
	base, below, found := strings.Cut(name, "_")
	if !found || base == "" || below == "" {
		return letter(name)
	}
	var subs []mark
	for i, s := range strings.Split(below, "_") {
		if i > 0 {
			subs = append(subs, mark{kind: commaMark, text: ","})
		}
		if g, ok := greek[s]; ok {
			s = g
		}
		subs = append(subs, word(s))
	}
	return mark{kind: scriptMark, parts: []mark{letter(base), row(subs...), {}}}
}

// letter sets a letter in italics and a word upright.
func letter(s string) mark {
	if g, ok := greek[s]; ok {
		return mark{kind: letterMark, text: g}
	}
	if len([]rune(s)) == 1 {
		return mark{kind: letterMark, text: s}
	}
	return word(s)
}

// unitPart is a symbol of a unit with its power.
var unitPart = regexp.MustCompile(`^(.*?\p{L})\^?([2346]|[²³⁴⁶])$`)

// unitMark sets a unit, its powers raised.
func unitMark(s string) mark {
	var out []mark
	for i, part := range splitUnit(s) {
		if i%2 == 1 {
			sign := "/"
			if part == "*" {
				sign = "·"
			}
			out = append(out, word(sign))
			continue
		}
		if m := unitPart.FindStringSubmatch(part); m != nil {
			out = append(out, mark{kind: scriptMark, parts: []mark{word(m[1]), {}, {kind: numberMark, text: powers.Replace(m[2])}}})
			continue
		}
		out = append(out, word(part))
	}
	// a unit is never broken
	return mark{kind: fenceMark, parts: []mark{row(out...)}}
}

// splitUnit parts a unit at its signs: symbol, sign, symbol, …
func splitUnit(s string) []string {
	var out []string
	for {
		i := strings.IndexAny(s, "/*")
		if i < 0 {
			return append(out, s)
		}
		out = append(out, s[:i], s[i:i+1])
		s = s[i+1:]
	}
}

// expression turns a text of the language into marks; a text that is no
// expression is set as words.
func expression(text string) mark {
	e, err := lang.ParseExpr(text)
	if err != nil {
		return word(text)
	}
	return notation(text, e)
}
