package sheet_test

import (
	"bytes"
	"compress/zlib"
	"encoding/hex"
	"io"
	"regexp"
	"strings"
	"testing"
	"unicode/utf16"

	"golang.org/x/net/html"
)

// This file reads finished sheets as someone does who has nothing but the paper: the
// tables and formulas of HTML, and the words of a PDF. It shares no code with the
// writers.

// element finds all elements of a name below a node, in order.
func elements(n *html.Node, name string) []*html.Node {
	var out []*html.Node
	var walk func(*html.Node)
	walk = func(n *html.Node) {
		if n.Type == html.ElementNode && n.Data == name {
			out = append(out, n)
		}
		for c := n.FirstChild; c != nil; c = c.NextSibling {
			walk(c)
		}
	}
	walk(n)
	return out
}

func attribute(n *html.Node, key string) string {
	for _, a := range n.Attr {
		if a.Key == key {
			return a.Val
		}
	}
	return ""
}

// said is the text of a node.
func said(n *html.Node) string {
	if n.Type == html.TextNode {
		return n.Data
	}
	if n.Data == "math" {
		return strings.TrimSpace(formulaText(n))
	}
	var b strings.Builder
	for c := n.FirstChild; c != nil; c = c.NextSibling {
		b.WriteString(said(c))
	}
	return b.String()
}

var ascii = strings.NewReplacer("α", "alpha", "β", "beta", "γ", "gamma", "δ", "delta", "ε", "epsilon", "η", "eta", "θ", "theta", "κ", "kappa", "λ", "lambda", "μ", "mu",
	"ν", "nu", "ξ", "xi", "π", "pi", "ρ", "rho", "σ", "sigma", "τ", "tau", "φ", "phi", "χ", "chi", "ψ", "psi", "ω", "omega", "Δ", "Delta", "Φ", "Phi", "Ψ", "Psi", "Ω", "Omega",
	"−", "-", "²", "2", "³", "3", "⁴", "4", "⁶", "6")

func children(n *html.Node) []*html.Node {
	var out []*html.Node
	for c := n.FirstChild; c != nil; c = c.NextSibling {
		if c.Type == html.ElementNode {
			out = append(out, c)
		}
	}
	return out
}

// formulaText reads MathML back: what a person would type in to compute it.
func formulaText(n *html.Node) string {
	kids := children(n)
	switch n.Data {
	case "mi", "mn":
		return ascii.Replace(n.FirstChild.Data)
	case "mo":
		switch s := n.FirstChild.Data; s {
		case "·":
			return " * "
		case "/":
			return " / "
		case "−":
			if attribute(n, "form") == "prefix" {
				return "-"
			}
			return " - "
		case "+", "=":
			return " " + s + " "
		case ",":
			return ", "
		default:
			return s
		}
	case "mfrac":
		if below := formulaText(kids[1]); below == "Omega" { // an allowable strength: one symbol
			return formulaText(kids[0]) + "_over_Omega"
		}
		return "((" + formulaText(kids[0]) + ") / (" + formulaText(kids[1]) + "))"
	case "msqrt":
		return "sqrt(" + rowText(kids) + ")"
	case "msub":
		return formulaText(kids[0]) + "_" + strings.ReplaceAll(formulaText(kids[1]), ", ", "_")
	case "msup":
		return formulaText(kids[0]) + "^(" + formulaText(kids[1]) + ")"
	case "msubsup":
		return formulaText(kids[0]) + "_" + strings.ReplaceAll(formulaText(kids[1]), ", ", "_") + "^(" + formulaText(kids[2]) + ")"
	}
	return rowText(kids)
}

func rowText(kids []*html.Node) string {
	// a number times a power of ten
	if len(kids) == 1 && kids[0].Data == "mrow" {
		return rowText(children(kids[0]))
	}
	if len(kids) == 3 && kids[0].Data == "mn" && kids[1].FirstChild != nil && kids[1].FirstChild.Data == "×" {
		return formulaText(kids[0]) + "e" + formulaText(children(kids[2])[1])
	}
	var b strings.Builder
	for i, k := range kids {
		switch {
		case k.Data == "mspace" && i > 0 && kids[i-1].Data == "mi" && said(kids[i-1]) == "φ": // a factor before a strength: one symbol
			b.WriteByte('_')
		case k.Data == "msub" && i > 1 && kids[i-1].Data == "mspace" && kids[i-2].Data == "mi" && said(kids[i-2]) == "φ":
			b.WriteString(formulaText(k))
		case k.Data == "mspace":
			b.WriteByte(' ')
		case i > 0 && kids[i-1].Data == "mspace":
			b.WriteString(unitText(k))
		case k.Data == "mo" && k.FirstChild.Data == "|" && attribute(k, "form") == "prefix":
			b.WriteString("abs(")
		case k.Data == "mo" && k.FirstChild.Data == "|":
			b.WriteString(")")
		default:
			b.WriteString(formulaText(k))
		}
	}
	return b.String()
}

// unitText reads a unit: powers stand behind the symbol.
func unitText(n *html.Node) string {
	if n.FirstChild != nil && n.FirstChild.Type == html.TextNode {
		return strings.ReplaceAll(n.FirstChild.Data, "·", "*")
	}
	var b strings.Builder
	for _, k := range children(n) {
		b.WriteString(unitText(k))
	}
	return b.String()
}

// parse reads HTML.
func parse(t testing.TB, page []byte) *html.Node {
	t.Helper()
	n, err := html.Parse(bytes.NewReader(page))
	if err != nil {
		t.Fatal(err)
	}
	return n
}

// chapter is what stands below a heading of level 2, up to the next.
type chapter struct {
	title  string
	tables [][][]string // of each table the rows, head first; numbers with their units
	// equations are the computed steps, as "symbol = formula = numbers = value".
	equations []string
}

// chapters reads the tables and formulas of a sheet.
func chapters(page *html.Node) []*chapter {
	var out []*chapter
	var walk func(*html.Node)
	walk = func(n *html.Node) {
		if n.Type == html.ElementNode {
			switch n.Data {
			case "h2":
				out = append(out, &chapter{title: said(n)})
			case "table":
				if len(out) > 0 {
					c := out[len(out)-1]
					c.tables = append(c.tables, tableOf(n))
				}
				return
			case "p":
				if attribute(n, "class") == "formula" && len(out) > 0 {
					var b strings.Builder
					for _, m := range elements(n, "math") {
						b.WriteString(formulaText(m))
					}
					out[len(out)-1].equations = append(out[len(out)-1].equations, b.String())
					return
				}
			}
		}
		for c := n.FirstChild; c != nil; c = c.NextSibling {
			walk(c)
		}
	}
	walk(page)
	return out
}

func tableOf(n *html.Node) [][]string {
	var rows [][]string
	for _, tr := range elements(n, "tr") {
		var row []string
		for _, c := range children(tr) {
			text := ascii.Replace(strings.TrimSpace(said(c)))
			if attribute(c, "class") == "u" { // the unit of the number before it
				row[len(row)-1] = strings.TrimSpace(row[len(row)-1] + " " + text)
				continue
			}
			row = append(row, text)
		}
		rows = append(rows, row)
	}
	return rows
}

// table finds a table by the first words of its head.
func (c *chapter) table(head ...string) [][]string {
	for _, t := range c.tables {
		if len(t) > 0 && len(t[0]) >= len(head) && strings.Join(t[0][:len(head)], "|") == strings.Join(head, "|") {
			return t
		}
	}
	return nil
}

var (
	stream = regexp.MustCompile(`(?s)stream\n(.*?)\nendstream`)
	// what a page's stream does with words: it opens a part that is read as
	// something else, closes it, or shows a run of words
	marks = regexp.MustCompile(`(?s)/Span <</(ActualText|Alt) <FEFF([0-9A-F]*)>>> BDC|EMC|BT ([-\d.]+) ([-\d.]+) Td \(((?:\\.|[^\\)])*)\) Tj`)
)

// pageText is what a PDF's page says: the formulas as they are read out, and every
// run of words with its place.
type pageText struct {
	read  []string // formulas and symbols
	words []run
	said  []run // both in the order of the page: where a part is read as something else, that
}

type run struct {
	x, y string
	text string
}

// pdfPages reads the pages of a PDF.
func pdfPages(t testing.TB, data []byte) []pageText {
	t.Helper()
	var out []pageText
	for _, m := range stream.FindAllSubmatchIndex(data, -1) {
		// from where the stream begins: its last byte may look like a line end
		r, err := zlib.NewReader(bytes.NewReader(data[m[2]:]))
		if err != nil {
			continue
		}
		body, err := io.ReadAll(r)
		if err != nil || !bytes.Contains(body, []byte(" Tj ET")) {
			continue
		}
		var p pageText
		instead := ""
		for _, m := range marks.FindAllSubmatch(body, -1) {
			switch {
			case string(m[0]) == "EMC":
				instead = ""
			case len(m[1]) > 0:
				raw, err := hex.DecodeString(string(m[2]))
				if err != nil {
					t.Fatal(err)
				}
				if instead = utf16Text(raw); string(m[1]) == "ActualText" {
					p.read = append(p.read, instead)
				}
			default:
				r := run{string(m[3]), string(m[4]), utf16Text(unescaped(m[5]))}
				p.words = append(p.words, r)
				switch instead {
				case "":
					p.said = append(p.said, r)
				case "-": // said already
				default:
					p.said = append(p.said, run{r.x, r.y, instead})
					instead = "-"
				}
			}
		}
		out = append(out, p)
	}
	return out
}

func unescaped(s []byte) []byte {
	var out []byte
	for i := 0; i < len(s); i++ {
		if s[i] == '\\' && i+1 < len(s) {
			i++
			if s[i] == 'r' {
				out = append(out, '\r')
				continue
			}
		}
		out = append(out, s[i])
	}
	return out
}

func utf16Text(raw []byte) string {
	var units []uint16
	for i := 0; i+1 < len(raw); i += 2 {
		units = append(units, uint16(raw[i])<<8|uint16(raw[i+1]))
	}
	return string(utf16.Decode(units))
}
