package drawing

import (
	"fmt"
	"strconv"
	"strings"
)

// family is the font of words in SVG.
const family = "'Helvetica Neue', Helvetica, Arial, 'Liberation Sans', sans-serif"

// Use says where an SVG picture is to stand.
type Use uint8

// The uses.
const (
	// InPage stands inside an HTML page that has the rules of CSS: ink is the
	// page's own text colour.
	InPage Use = iota
	// Alone is a file of its own: light, or dark where the reader's screen is.
	Alone
	// OnAnyGround has colours that can be read on a light and on a dark ground,
	// for an image in a page that tells it nothing.
	OnAnyGround
)

// CSS gives the rules for pictures in a page. A page may set --kern-accent,
// --kern-grey, --kern-steel and --kern-paper; ink is its text colour.
func CSS() string {
	p := Light
	colour := func(c Colour) string {
		switch c {
		case None:
			return "none"
		case Ink:
			return "currentColor"
		}
		return "var(--kern-" + [...]string{Grey: "grey", Steel: "steel", AccentColour: "accent", Paper: "paper"}[c] + ", " + p[c] + ")"
	}
	return rules(".k-drawing ", colour)
}

// rules writes the rules of all styles.
func rules(scope string, colour func(Colour) string) string {
	var b strings.Builder
	for _, l := range Looks {
		fmt.Fprintf(&b, "%s.%s{fill:%s", scope, l.Name, colour(l.Fill))
		if l.Fill != None && l.Opaque != 1 {
			fmt.Fprintf(&b, ";fill-opacity:%s;fill-rule:evenodd", number(l.Opaque))
		}
		if l.Line != None {
			fmt.Fprintf(&b, ";stroke:%s;stroke-width:%s", colour(l.Line), number(l.Width))
			if l.Dashes != nil {
				fmt.Fprintf(&b, ";stroke-dasharray:%s", numbers(l.Dashes))
			}
		}
		b.WriteString("}\n")
	}
	for _, t := range Tones {
		fmt.Fprintf(&b, "%s.%s{fill:%s}\n", scope, t.Name, colour(t.Colour))
	}
	return b.String()
}

// SVG writes the scene. The same scene gives the same bytes.
func (s *Scene) SVG(use Use) string {
	w := &svg{use: use}
	class := ` class="k-drawing"`
	if use == OnAnyGround {
		class = ""
	}
	fmt.Fprintf(&w.b, `<svg xmlns="http://www.w3.org/2000/svg"%s role="img" width="%smm" height="%smm" viewBox="0 0 %s %s" font-family="%s">`,
		class, number(s.Width), number(s.Height), number(s.Width), number(s.Height), family)
	if s.Title != "" {
		fmt.Fprintf(&w.b, "<title>%s</title>", escape(s.Title))
	}
	if s.Description != "" {
		fmt.Fprintf(&w.b, "<desc>%s</desc>", escape(s.Description))
	}
	if use == Alone {
		light := func(p Palette) func(Colour) string {
			return func(c Colour) string {
				if c == None {
					return "none"
				}
				return p[c]
			}
		}
		fmt.Fprintf(&w.b, "<style>\n%s@media (prefers-color-scheme:dark){\n%s}\n</style>", rules("", light(Light)), rules("", light(Dark)))
		fmt.Fprintf(&w.b, `<rect class="k-ground" width="%s" height="%s"/>`, number(s.Width), number(s.Height))
	}
	s.Paint(w)
	w.b.WriteString("</svg>")
	return w.b.String()
}

// svg is a painter.
type svg struct {
	b   strings.Builder
	use Use
}

// Open begins a group.
func (w *svg) Open(name string) {
	if w.use == OnAnyGround {
		w.b.WriteString("<g>")
		return
	}
	fmt.Fprintf(&w.b, `<g class="k-%s">`, escape(strings.ReplaceAll(name, " ", "-")))
}

// Close ends a group.
func (w *svg) Close() { w.b.WriteString("</g>") }

// Path writes a path.
func (w *svg) Path(p Path) {
	w.b.WriteString(`<path d="`)
	for _, s := range p.Steps {
		switch s.Kind {
		case Move:
			w.b.WriteString("M" + point(s.To))
		case Line:
			w.b.WriteString("L" + point(s.To))
		case Arc:
			turn := 0
			if s.Clockwise {
				turn = 1
			}
			r := number(s.Radius)
			fmt.Fprintf(&w.b, "A%s %s 0 0 %d %s", r, r, turn, point(s.To))
		case Cubic:
			fmt.Fprintf(&w.b, "C%s %s %s", point(s.Control[0]), point(s.Control[1]), point(s.To))
		case Close:
			w.b.WriteString("Z")
		}
	}
	l := Looks[p.Style]
	if w.use != OnAnyGround {
		fmt.Fprintf(&w.b, `" class="%s"/>`, l.Name)
		return
	}
	fmt.Fprintf(&w.b, `" fill="%s"`, either(l.Fill))
	if l.Fill != None && l.Opaque != 1 {
		fmt.Fprintf(&w.b, ` fill-opacity="%s" fill-rule="evenodd"`, number(l.Opaque))
	}
	if l.Line != None {
		fmt.Fprintf(&w.b, ` stroke="%s" stroke-width="%s"`, either(l.Line), number(l.Width))
		if l.Dashes != nil {
			fmt.Fprintf(&w.b, ` stroke-dasharray="%s"`, numbers(l.Dashes))
		}
	}
	w.b.WriteString("/>")
}

// Text writes words.
func (w *svg) Text(t Text) {
	fmt.Fprintf(&w.b, `<text x="%s" y="%s" font-size="%s"`, number(t.At.X), number(t.At.Y), number(t.Size))
	if w.use == OnAnyGround {
		fmt.Fprintf(&w.b, ` fill="%s"`, either(Tones[t.Tone].Colour))
	} else {
		fmt.Fprintf(&w.b, ` class="%s"`, Tones[t.Tone].Name)
	}
	if t.Anchor != Start {
		fmt.Fprintf(&w.b, ` text-anchor="%s"`, [...]string{Middle: "middle", End: "end"}[t.Anchor])
	}
	if t.Bold {
		w.b.WriteString(` font-weight="bold"`)
	}
	if t.Upward {
		fmt.Fprintf(&w.b, ` transform="rotate(-90 %s %s)"`, number(t.At.X), number(t.At.Y))
	}
	fmt.Fprintf(&w.b, ">%s</text>", escape(t.Words))
}

func either(c Colour) string {
	if c == None {
		return "none"
	}
	return Either[c]
}

func point(p Point) string { return number(p.X) + " " + number(p.Y) }

// number writes a length to a hundredth of a millimetre: finer than any printer.
func number(v float64) string {
	s := strconv.FormatFloat(v, 'f', 2, 64)
	s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	if s == "-0" {
		return "0"
	}
	return s
}

func numbers(v []float64) string {
	var out []string
	for _, x := range v {
		out = append(out, number(x))
	}
	return strings.Join(out, " ")
}

// escape makes text safe in XML: its signs, and characters that XML has none of.
func escape(s string) string {
	var b strings.Builder
	for _, r := range s {
		switch {
		case r == '&':
			b.WriteString("&amp;")
		case r == '<':
			b.WriteString("&lt;")
		case r == '>':
			b.WriteString("&gt;")
		case r == '"':
			b.WriteString("&quot;")
		case r < 0x20 && r != '\t' && r != '\n' || r == 0xFFFE || r == 0xFFFF:
			b.WriteString("\uFFFD")
		default:
			b.WriteRune(r)
		}
	}
	return b.String()
}
