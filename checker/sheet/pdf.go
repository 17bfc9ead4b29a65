package sheet

import (
	"fmt"
	"io"
	"strconv"
	"strings"
	"time"
	"unicode/utf16"

	"kern/checker"
	"kern/checker/drawing"
	"kern/checker/output"

	"codeberg.org/go-pdf/fpdf"
)

// PDF writes the sheet as a PDF with its fonts in it, searchable, with bookmarks. A
// formula is read out and copied as text of the language. progress is told of the
// pages; it may be nil.
func (s *Sheet) PDF(w io.Writer, progress checker.Progress) error {
	pages, headings, size := s.layOut()
	doc := fpdf.NewCustom(&fpdf.InitType{UnitStr: "pt", Size: size})
	for _, f := range faceNames {
		doc.AddUTF8FontFromBytes(f.family, f.style, f.data)
	}
	s.properties(doc)
	p := pdfWriter{doc: doc, links: make([]int, len(headings)), height: size.Ht}
	for i, h := range headings {
		p.links[i] = doc.AddLink()
		doc.SetLink(p.links[i], h.y, h.page+1)
	}
	next := 0
	for i, page := range pages {
		doc.AddPage()
		p.reset()
		s.furniture(&p, i+1, len(pages), size)
		for ; next < len(headings) && headings[next].page == i; next++ {
			if h := headings[next]; h.Level == 2 || h.Level == 3 {
				doc.Bookmark(clean(h.Text), h.Level-2, h.y)
			}
		}
		for _, o := range page.ops {
			p.op(o)
		}
		pages[i].ops = nil // a long sheet is big
		if progress != nil {
			progress(i+1, len(pages))
		}
	}
	if err := doc.Output(w); err != nil {
		return fmt.Errorf("the PDF could not be written: %w", err)
	}
	return nil
}

// layOut puts the sheet on pages: cover, contents, and the rest.
func (s *Sheet) layOut() ([]paged, []placed, fpdf.SizeType) {
	cover := newFlow(s.options.Paper)
	cover.blocks(s.Blocks[:s.contentsAt])
	rest := newFlow(s.options.Paper)
	rest.blocks(s.Blocks[s.contentsAt:])
	if missed(append(cover.pages, rest.pages...)) {
		rest.blocks([]output.Block{output.Paragraph{Text: output.Words(string(missing) + " stands for a letter that the fonts of this PDF lack; the sheet as HTML or Markdown shows it.")}})
	}
	// how many pages the contents take does not depend on the numbers in them
	list := newFlow(s.options.Paper)
	list.contents(rest.headings)
	before := len(cover.pages) + len(list.pages)
	headings := cover.headings
	first := len(headings)
	for _, h := range rest.headings {
		h.page += before
		headings = append(headings, h)
	}
	list = newFlow(s.options.Paper)
	list.contents(headings[first:])
	for _, p := range list.pages {
		for i := range p.ops {
			if p.ops[i].kind == linkOp {
				p.ops[i].target += first
			}
		}
	}
	pages := append(append(cover.pages, list.pages...), rest.pages...)
	return pages, headings, fpdf.SizeType{Wd: cover.width, Ht: cover.height}
}

// missed tells whether a page has a letter that the fonts lack.
func missed(pages []paged) bool {
	for _, p := range pages {
		for _, o := range p.ops {
			if o.kind == textOp && strings.ContainsRune(o.text, missing) {
				return true
			}
		}
	}
	return false
}

// properties fill the document's information. Its date is that of the project,
// for a sheet has no clock.
func (s *Sheet) properties(doc *fpdf.Fpdf) {
	doc.SetTitle(clean(s.Title), true)
	doc.SetSubject(clean(s.RunningRight), true)
	doc.SetAuthor(clean(s.Project.PreparedBy), true)
	doc.SetCreator(s.Program, true)
	doc.SetProducer(s.Program, true)
	doc.SetKeywords(s.mark("pdf"), false)
	doc.SetLang("en")
	date := time.Date(2000, 1, 1, 0, 0, 0, 0, time.UTC)
	if d, err := time.Parse(time.DateOnly, s.Project.Date); err == nil {
		date = d
	}
	doc.SetCreationDate(date)
	doc.SetModificationDate(date)
	doc.SetCatalogSort(true)
	doc.SetAutoPageBreak(false, 0)
	doc.SetMargins(0, 0, 0)
	doc.SetDisplayMode("fullwidth", "continuous")
}

// furniture draws what stands on every page.
func (s *Sheet) furniture(p *pdfWriter, page, pages int, size fpdf.SizeType) {
	const letters = 7.6
	put := func(text string, y float64, right bool) {
		b := words(regular, letters, clean(text))
		x := leftEdge
		if right {
			x = size.Wd - rightEdge - b.width
		}
		b.ops[0].ink = quiet
		for _, o := range shifted(b.ops, x, y) {
			p.op(o)
		}
	}
	most := size.Wd - leftEdge - rightEdge - regular.width(s.RunningRight)*letters - 12
	put(short(s.Running, most/letters), topEdge-24, false)
	put(s.RunningRight, topEdge-24, true)
	put(s.Foot, size.Ht-bottomEdge+26, false)
	put(fmt.Sprintf("%d / %d", page, pages), size.Ht-bottomEdge+26, true)
}

// short cuts a text to a width in ems.
func short(s string, width float64) string {
	for r := []rune(s); regular.width(s) > width && len(r) > 1; s = string(r) + "…" {
		r = r[:len(r)-1]
	}
	return s
}

// pdfWriter draws ops.
type pdfWriter struct {
	doc    *fpdf.Fpdf
	links  []int
	height float64

	face  face
	size  float64
	known bool // face and size are those of the document
	depth int  // of texts that are read as something else
}

func (p *pdfWriter) reset() { p.known = false }

func (p *pdfWriter) font(f face, size float64) {
	size = round(size)
	if p.known && p.face == f && p.size == size {
		return
	}
	p.face, p.size, p.known = f, size, true
	p.doc.SetFont(faceNames[f].family, faceNames[f].style, size)
}

func (p *pdfWriter) op(o op) {
	c := inks[o.ink]
	switch o.kind {
	case textOp:
		if o.text == "" {
			return
		}
		p.font(o.face, o.size)
		p.doc.SetTextColor(c[0], c[1], c[2])
		p.doc.Text(o.x, o.y, o.text)
	case ruleOp:
		p.doc.SetFillColor(c[0], c[1], c[2])
		p.doc.Rect(o.x, o.y, o.w, o.h, "F")
	case strokeOp:
		p.stroke(o, c)
	case linkOp:
		p.doc.Link(o.x, o.y, o.w, o.h, p.links[o.target])
	case sceneOp:
		s := o.scene
		p.read(strings.TrimSuffix(s.Title+". "+s.Description, ". "), "Figure")
		s.Paint(&scenePainter{p, o.x, o.y, o.w * point})
		p.end()
	case readOp:
		p.read(o.text, "Span")
	case endOp:
		p.end()
	}
}

// read opens a part of the page that is read as the text.
func (p *pdfWriter) read(text, role string) {
	key := "ActualText"
	if role == "Figure" {
		key, role = "Alt", "Span"
	}
	var b strings.Builder
	for _, u := range utf16.Encode([]rune(clean(text))) {
		fmt.Fprintf(&b, "%04X", u)
	}
	p.doc.RawWriteStr("/" + role + " <</" + key + " <FEFF" + b.String() + ">>> BDC")
	p.depth++
}

func (p *pdfWriter) end() {
	if p.depth > 0 {
		p.depth--
		p.doc.RawWriteStr("EMC")
	}
}

func (p *pdfWriter) stroke(o op, c [3]int) {
	p.doc.SetDrawColor(c[0], c[1], c[2])
	p.doc.SetLineWidth(o.size)
	p.doc.SetLineJoinStyle("miter")
	p.doc.SetLineCapStyle("butt")
	if o.text == "dashed" {
		p.doc.SetDashPattern([]float64{3, 2}, 0)
		defer p.doc.SetDashPattern(nil, 0)
	}
	q := o.points
	p.doc.MoveTo(q[0], q[1])
	if o.cubic {
		p.doc.CurveBezierCubicTo(q[2], q[3], q[4], q[5], q[6], q[7])
	} else {
		for i := 2; i < len(q); i += 2 {
			p.doc.LineTo(q[i], q[i+1])
		}
	}
	p.doc.DrawPath("D")
}

// scenePainter paints a picture of package drawing.
type scenePainter struct {
	p    *pdfWriter
	x, y float64
	unit float64 // a millimetre of the picture, points
}

// Open begins a group, which a page does not show.
func (s *scenePainter) Open(string) {}

// Close ends a group.
func (s *scenePainter) Close() {}

func (s *scenePainter) at(p drawing.Point) (x, y float64) {
	return s.x + p.X*s.unit, s.y + p.Y*s.unit
}

// Path draws a path. Areas that let the ground show through are mixed with white
// instead: paper is white, and some printers cannot do the other.
func (s *scenePainter) Path(path drawing.Path) {
	look := drawing.Looks[path.Style]
	doc := s.p.doc
	for _, step := range path.Cubics() {
		x, y := s.at(step.To)
		switch step.Kind {
		case drawing.Move:
			doc.MoveTo(x, y)
		case drawing.Line:
			doc.LineTo(x, y)
		case drawing.Cubic:
			ax, ay := s.at(step.Control[0])
			bx, by := s.at(step.Control[1])
			doc.CurveBezierCubicTo(ax, ay, bx, by, x, y)
		case drawing.Close:
			doc.ClosePath()
		}
	}
	how := ""
	if look.Fill != drawing.None {
		c := mixed(colour(look.Fill), look.Opaque)
		doc.SetFillColor(c[0], c[1], c[2])
		how = "F"
	}
	if look.Line != drawing.None {
		c := colour(look.Line)
		doc.SetDrawColor(c[0], c[1], c[2])
		doc.SetLineWidth(look.Width * s.unit)
		doc.SetLineJoinStyle("miter")
		doc.SetLineCapStyle("butt")
		dashes := make([]float64, len(look.Dashes))
		for i, d := range look.Dashes {
			dashes[i] = round(d * s.unit)
		}
		doc.SetDashPattern(dashes, 0)
		how += "D"
	}
	switch how { // areas by the even-odd rule
	case "F":
		how = "F*"
	case "FD":
		how = "FD*"
	case "":
		how = "n"
	}
	doc.DrawPath(how)
	doc.SetDashPattern(nil, 0)
}

// Text writes words of a picture.
func (s *scenePainter) Text(t drawing.Text) {
	f := regular
	if t.Bold {
		f = bold
	}
	size := t.Size * s.unit
	b := words(f, size, clean(t.Words))
	x, y := s.at(t.At)
	dx := map[drawing.Anchor]float64{drawing.Middle: -b.width / 2, drawing.End: -b.width}[t.Anchor]
	c := colour(drawing.Tones[t.Tone].Colour)
	s.p.font(f, size)
	s.p.doc.SetTextColor(c[0], c[1], c[2])
	if !t.Upward {
		s.p.doc.Text(x+dx, y, b.ops[0].text)
		return
	}
	s.p.doc.TransformBegin()
	s.p.doc.TransformRotate(90, x, y)
	s.p.doc.Text(x+dx, y, b.ops[0].text)
	s.p.doc.TransformEnd()
	s.p.known = false
}

// colour reads a colour of the light palette.
func colour(c drawing.Colour) [3]int {
	v, err := strconv.ParseUint(strings.TrimPrefix(drawing.Light[c], "#"), 16, 32)
	if err != nil {
		return inks[black]
	}
	return [3]int{int(v >> 16), int(v >> 8 & 255), int(v & 255)}
}

// mixed is a colour on white paper that lets the paper through.
func mixed(c [3]int, opaque float64) [3]int {
	for i := range c {
		c[i] = 255 - int(float64(255-c[i])*opaque+0.5)
	}
	return c
}
