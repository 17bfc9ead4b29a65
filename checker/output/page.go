package output

// Page is a text for people that is composed once, block by block, and printed in
// several forms: as Markdown, as plain text for whoever shows no Markdown, and by
// the printed sheet as HTML and PDF. What a calculation says (titles, reasons,
// names) can do nothing to the form.
type Page struct {
	blocks []Block
	plain  bool
}

// NewPage begins a page in Markdown, or in plain text.
func NewPage(markdown bool) *Page { return &Page{plain: !markdown} }

// Empty tells whether nothing was written yet.
func (p *Page) Empty() bool { return len(p.blocks) == 0 }

// Blocks are what was written, in order.
func (p *Page) Blocks() []Block { return p.blocks }

// Block is a part of a page: one of the types below.
type Block any

// The blocks of a page.
type (
	// Heading is a heading of level 1 to 4.
	Heading struct {
		Level int
		Text  string
	}
	// Paragraph is a paragraph.
	Paragraph struct{ Text Line }
	// List is a list of lines.
	List struct{ Items []Line }
	// Source is text of the language on lines of its own.
	Source struct{ Text string }
	// Picture is an SVG picture with the words for whoever cannot see it.
	Picture struct{ Alt, SVG string }
	// Table is a table. Align has a letter for each column: l left, r right, n
	// numbers that stand on their decimal points.
	Table struct {
		Head  []string
		Align string
		Rows  [][]Line
	}
	// Equations are the computed steps of a derivation.
	Equations struct{ Steps []Equation }
	// Fold begins a part that is shown when it is asked for, Unfold ends it.
	Fold   struct{ Summary string }
	Unfold struct{}
)

// Equation is a computed step of a derivation, in the language's own expressions:
// put into the language, Numbers gives Value.
type Equation struct {
	What, Clause string
	Symbol       string
	Formula      string // "" where nothing is computed
	Numbers      string // the formula with its numbers put in, "" where that says nothing new
	Value        string // with its unit
	Note         string // a remark instead of all this
}

// Line is a run of words in several faces.
type Line []Part

// Part is words in one face.
type Part struct {
	Face Face
	Text string
	To   string // the address that a Linked part leads to
}

// Face is how words look.
type Face uint8

// The faces of words.
const (
	Ordinary Face = iota
	Bold
	Mono    // text of the language
	NewLine // no words: the next line of the same paragraph
	Linked  // words that lead to an address
)

// Words are ordinary words; nothing in them is taken for a mark.
func Words(s string) Line { return Line{{Face: Ordinary, Text: s}} }

// Strong are words that stand out.
func Strong(s string) Line { return Line{{Face: Bold, Text: s}} }

// Code is text of the language: a symbol, a formula, a name.
func Code(s string) Line { return Line{{Face: Mono, Text: s}} }

// Link are words that lead to an address. Plain text shows the words alone.
func Link(s, address string) Line { return Line{{Linked, s, address}} }

// Break goes on in the next line of the same paragraph.
func Break() Line { return Line{{Face: NewLine}} }

// Join puts lines one behind the other.
func Join(lines ...Line) Line {
	var out Line
	for _, l := range lines {
		out = append(out, l...)
	}
	return out
}

// String is the words of a line alone.
func (l Line) String() string {
	out := ""
	for _, x := range l {
		if x.Face == NewLine {
			out += "; "
		}
		out += x.Text
	}
	return out
}

func (p *Page) add(b Block) { p.blocks = append(p.blocks, b) }

// Add puts blocks of other pages behind what was written.
func (p *Page) Add(b ...Block) { p.blocks = append(p.blocks, b...) }

// Head writes a heading of level 1 to 4.
func (p *Page) Head(level int, text string) { p.add(Heading{min(max(level, 1), 4), text}) }

// Text writes a paragraph.
func (p *Page) Text(lines ...Line) { p.add(Paragraph{Join(lines...)}) }

// List writes a list.
func (p *Page) List(items ...Line) {
	if len(items) > 0 {
		p.add(List{items})
	}
}

// Block writes text of the language on lines of its own.
func (p *Page) Block(text string) { p.add(Source{text}) }

// Picture shows an SVG picture; plain text shows none.
func (p *Page) Picture(alt, svg string) {
	if svg != "" {
		p.add(Picture{alt, svg})
	}
}

// Table writes a table. align has a letter for each column: l, r or n. Plain text
// leaves out a head whose words are all empty.
func (p *Page) Table(head []string, align string, rows [][]Line) {
	if len(rows) > 0 {
		p.add(Table{head, align, rows})
	}
}

// Equations writes the computed steps of a derivation.
func (p *Page) Equations(steps []Equation) {
	if len(steps) > 0 {
		p.add(Equations{steps})
	}
}
