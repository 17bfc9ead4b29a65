package lang

import (
	"math/rand/v2"
	"strings"
)

// generator makes texts for the properties of lexer, parser and formatter: well
// formed ones from pieces of the language, and mangled ones.
type generator struct {
	*rand.Rand
	b strings.Builder
}

func newGenerator(seed uint64) *generator {
	return &generator{Rand: rand.New(rand.NewPCG(seed, 1))}
}

func (g *generator) one(of ...string) string { return of[g.IntN(len(of))] }

func (g *generator) name() string {
	return g.one("A1", "mast", "G", "Q", "W", "s355", "eaves", "λ_1", "roof", "width", "wall", "height", "N_b", "g", "x.y", "柱", "case", "section", "at", "level")
}

func (g *generator) blank() string {
	return g.one("", " ", " ", " ", "  ", "   ", "\t", "\u00a0", " \u00a0", "\u2009")
}

func (g *generator) gap() string { return g.one(" ", " ", "  ", "\t", "    ", "\u00a0") }

func (g *generator) number() string {
	return g.one("0", "1", "2.5", "4.80", "12", "1_000", "8.67e-7", "168.3", "1e3", "100")
}

func (g *generator) quantity() string {
	return g.one("", "", "", "-", "- ", "+") + g.number() + g.one("", " ", " ", " ", "  ") +
		g.one("mm", "kN", "kN/m2", "kNm", "m", "%", "°", "mm^2", "m²", "ft", "in", "N/mm2", "kip-ft", "kN*m", "q/z")
}

func (g *generator) expr(depth int) string {
	if depth <= 0 {
		return g.one(g.quantity(), g.quantity(), g.number(), g.name(), g.number()+" ft "+g.number()+" in")
	}
	x := func() string { return g.expr(depth - 1 - g.IntN(2)) }
	switch g.IntN(7) {
	case 0:
		return "(" + g.blank() + x() + g.blank() + ")"
	case 1:
		return g.one("max", "min", "sqrt") + g.one("", "", " ") + "(" + x() + g.blank() + "," + g.gap() + x() + ")"
	case 2:
		return g.one("-", "- ", "+") + x()
	}
	return x() + g.blank() + g.one("+", "-", "-", "*", "/", "^", "-") + g.blank() + x()
}

func (g *generator) statement(depth int) string {
	eq := g.blank() + "=" + g.blank()
	switch g.IntN(16) {
	case 0:
		return "load" + g.gap() + g.name() + g.gap() + g.quantity() + g.gap() + "at" + g.gap() + g.name()
	case 1:
		return "load" + g.gap() + g.one("", "floor ", "G ") + g.expr(2) + g.one("", " about major", " offset 3 mm about minor")
	case 2:
		return "limit" + g.gap() + g.name() + eq + g.expr(1)
	case 3:
		return "require" + g.gap() + g.name() + g.blank() + g.one(">=", "<", "==") + g.blank() + g.expr(1) + ` because "x;y"`
	case 4:
		return "depart" + g.gap() + g.one("wall-thickness", "a - b", "a -b", "sway") + ` because "…"`
	case 5:
		return "show" + g.gap() + g.one("kN, kNm , mm", "kN/m,kip-ft", "mm ^2,", "kN / m", "kip -ft", "kN,\n mm", "kN, # c\n mm")
	case 6:
		return `note "a  # {b};  c"`
	case 7:
		return g.name() + eq + "tube" + g.blank() + g.block(depth-1)
	case 8:
		return g.name() + eq + "max(1 m,\n" + g.blank() + g.expr(1) + g.one("", " # c", "\n", "\n\n\n") + "\n, 2)"
	case 9:
		return g.name() + g.gap() + g.name() + g.gap() + g.expr(1) + g.blank() + g.expr(1)
	case 10:
		return g.name() + g.blank() + g.expr(2)
	}
	return g.name() + eq + g.one(g.quantity(), g.expr(1), g.expr(2), `"HEB 160"`, "cold")
}

func (g *generator) block(depth int) string {
	var b strings.Builder
	b.WriteString(g.one("", "", "", "", " # c\n", "\n", "\n\n# d\n") + "{")
	one := g.IntN(2) == 0
	for range g.IntN(5) {
		if depth > 0 {
			b.WriteString(g.blank() + g.statement(depth))
		} else {
			b.WriteString(g.blank() + g.name() + " = " + g.quantity())
		}
		if one {
			b.WriteString(g.one(";", "; ", " ;", ";;"))
		} else {
			b.WriteString(g.lineEnd())
		}
	}
	b.WriteString(g.blank() + "}")
	return b.String()
}

func (g *generator) lineEnd() string {
	return g.one("\n", "\n", "\n", "\n", "\n\n", "\n\n\n", " # c\n", "# c  \n", "\n# c\n", "; # c\n", ";\n;\n", "\n \n")
}

func (g *generator) declaration() string {
	switch g.IntN(9) {
	case 0:
		return "include" + g.gap() + `"common.kern"`
	case 1:
		return "basis" + g.blank() + g.block(1)
	case 2:
		return g.one("material", "section") + g.gap() + g.name() + g.blank() + "=" + g.blank() + g.one(`"S355" per "EN 10025-2"`, "tube "+g.block(0), "pipe"+g.block(0))
	case 3:
		return "case" + g.gap() + g.name() + g.gap() + g.one("permanent", `imposed "C3"`, "wind")
	case 4:
		return "level" + g.gap() + g.name() + g.gap() + "at" + g.gap() + g.quantity() + g.one("", g.block(1))
	case 5:
		return "combination " + g.name() + g.blank() + "=" + g.blank() + "1.1 G" + g.blank() + "+" + g.blank() + "0.5 W"
	case 6, 7:
		return g.one("column", "strut", "tie") + g.gap() + g.name() + g.one("", ", A2", ",\nA2") + g.one("", ` "Title"`, " as A1") + g.blank() + g.block(2)
	}
	return g.statement(1)
}

// file makes a text that is well formed in the main.
func (g *generator) file() string {
	var b strings.Builder
	b.WriteString(g.one("", "", "", "\ufeff", "# head\n", "\n\n"))
	for range g.IntN(8) {
		b.WriteString(g.blank() + g.declaration())
		b.WriteString(g.one(g.lineEnd(), g.lineEnd(), g.lineEnd(), "; ", ";", ""))
	}
	text := b.String()
	switch g.IntN(8) {
	case 0:
		text = strings.ReplaceAll(text, "\n", "\r\n")
	case 1:
		text = strings.ReplaceAll(text, "\n", "\r")
	case 2:
		for range 5 {
			text = strings.Replace(text, "\n", "\r\n", g.IntN(6))
		}
	}
	return text
}

// mangle puts a few mistakes into a text.
func (g *generator) mangle(text string) string {
	for range g.IntN(6) {
		if text == "" {
			return text
		}
		i := g.IntN(len(text))
		j := min(len(text), i+g.IntN(4))
		switch g.IntN(5) {
		case 0:
			text = text[:i] + text[j:]
		case 1:
			text = text[:i] + g.one("{", "}", "(", ")", "\"", "#", ";", ",", "=", "-", "\n", "\r", " ", "^", "2,5", "1..2", "“a”", "“", "\xff", "§", "!", ".5", "{\n", "}\n", "ft", "\ncolumn ", "1e999") + text[i:]
		case 2:
			text = text[:j] + text[i:]
		case 3:
			k := g.IntN(len(text))
			k2 := min(len(text), k+g.IntN(30))
			text = text[:i] + text[k:k2] + text[i:]
		case 4:
			text = text[:i] + text[min(len(text), i+g.IntN(20)):]
		}
	}
	return text
}

// random is a text of the generator, every second one mangled.
func random(seed uint64) string {
	g := newGenerator(seed)
	text := g.file()
	if seed%2 == 1 {
		text = g.mangle(text)
	}
	return text
}

// seeds are texts with something of everything, for the fuzzers.
var seeds = []string{
	"",
	"a = 1\n",
	"include \"common.kern\"\nbasis { show kN, mm }\neaves = 4.80 m\n",
	"column A1, A2 \"Post\" {\n    section = tube { width = 90 mm; wall = 6.3 mm; made = cold }\n    load G -5 kN at top # c\n}\n",
	"section leg=tube{width=90mm;wall=6.3 mm}\r\nlevel roof at 8.10 m { G 0.9 kN/m2; S 0.8 kN/m2 }\r\n",
	"a = (1 m +\n 2 ft 6 in) * -L^2\nb = sqrt (2)- -3\n",
	"column A\n# c\n{ depart wall-thickness because \"x\" }\n",
	"a = 2,5\nb = 1..2\nc = “x”\nd = \"open\n}\ncolumn {",
	"a = 5  kN ^2; b = 5 %;;c = 5\u00a0kN\ufeff\r",
	"show kN,;\n{ x }\n}\n{",
	"combination e = 1.1 G + 0.5 W\nx = 1e999 + (((((",
	"\ufeff\r\r\n\nlevel a at 0 m { case 5 kN }\n",
}
