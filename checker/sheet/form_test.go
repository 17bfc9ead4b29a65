package sheet_test

import (
	"bytes"
	"fmt"
	"math"
	"os"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"kern/checker/generate"
	"kern/checker/sheet"

	"golang.org/x/net/html"
)

// hostile is a project whose words are marks of every form.
const hostile = `project { name "</title><script>alert(1)</script>"; number "--> \\ ) Tj ET"; prepared by "(unbalanced \\"; revision "|*_[x](y)"; date "2026-03-31" }
basis { standard "elastic" }
column A1 "<img src=x onerror=alert(1)> & \\(x" { section = "HEB 160"; material = "S355"; height = 4 m; load 20 kN; note "</section> ](http://example.org) 日本 é ﷽"; depart first-yield because "<b>bold</b> --> *no*" }
`

// TestHarmless: what a calculation says can do nothing to the form.
func TestHarmless(t *testing.T) {
	r := check(map[string]string{"a.kern": strings.ReplaceAll(hostile, `\\`, `\`)})
	page := printed(t, r, "html", sheet.Options{})
	root := parse(t, page)
	for _, name := range []string{"script", "img", "b", "iframe", "link"} {
		if len(elements(root, name)) > 0 {
			t.Errorf("the page has an element %s", name)
		}
	}
	if title := said(elements(root, "title")[0]); !strings.Contains(title, "<script>alert(1)</script>") {
		t.Errorf("the title is %q", title)
	}
	if n := len(elements(root, "style")); n != 1 {
		t.Errorf("%d style sheets", n)
	}
	markdown := string(printed(t, r, "markdown", sheet.Options{}))
	if strings.Contains(markdown, "\n<img") || strings.Contains(markdown, " <img") || strings.Count(markdown, "<!--") != 1 || strings.Contains(markdown, "[x](y)") && !strings.Contains(markdown, `\[x](y)`) {
		t.Error("the Markdown has marks of the calculation's own")
	}
	on, all := map[string]bool{}, ""
	for _, p := range pdfPages(t, printed(t, r, "pdf", sheet.Options{})) {
		for _, w := range p.words {
			on[w.text] = true
			all += w.text + " "
		}
	}
	for _, due := range []string{`\(x`, "Tj", "ET", "<script>alert(1)</", "-->", "é", "□□", "stands for a letter"} {
		if !on[due] && !strings.Contains(all, due) {
			t.Errorf("the PDF lacks the words %q", due)
		}
	}
}

// TestAccessible checks the page as a screen reader and a keyboard meet it: one
// title, headings that leave out no level, heads of tables, pictures with words,
// links that lead somewhere, nothing from elsewhere.
func TestAccessible(t *testing.T) {
	page := printed(t, check(boathouse(t)), "html", sheet.Options{Full: true})
	root := parse(t, page)
	if lang := attribute(elements(root, "html")[0], "lang"); lang != "en" {
		t.Errorf("the language is %q", lang)
	}
	last, ones := 0, 0
	ids := map[string]bool{}
	var walk func(n *html.Node)
	walk = func(n *html.Node) {
		if n.Type == html.ElementNode {
			if id := attribute(n, "id"); id != "" {
				if ids[id] {
					t.Errorf("two elements have the id %s", id)
				}
				ids[id] = true
			}
			if len(n.Data) == 2 && n.Data[0] == 'h' && n.Data[1] >= '1' && n.Data[1] <= '6' {
				level := int(n.Data[1] - '0')
				if level > last+1 {
					t.Errorf("%q of level %d follows one of level %d", said(n), level, last)
				}
				last = level
				if level == 1 {
					ones++
				}
			}
			for _, a := range n.Attr {
				if (a.Key == "src" || a.Key == "href") && !strings.HasPrefix(a.Val, "#") || strings.HasPrefix(a.Key, "on") {
					t.Errorf("%s has %s=%q", n.Data, a.Key, a.Val)
				}
			}
		}
		for c := n.FirstChild; c != nil; c = c.NextSibling {
			walk(c)
		}
	}
	walk(root)
	if ones != 1 {
		t.Errorf("%d headings of level 1", ones)
	}
	for _, a := range elements(root, "a") {
		if !ids[strings.TrimPrefix(attribute(a, "href"), "#")] {
			t.Errorf("the link %q leads nowhere", said(a))
		}
	}
	for _, table := range elements(root, "table") {
		for _, th := range elements(table, "th") {
			if s := attribute(th, "scope"); s != "col" && s != "row" || said(th) == "" {
				t.Errorf("a head %q with scope %q", said(th), s)
			}
		}
		if len(elements(table, "th")) == 0 {
			t.Error("a table without heads")
		}
	}
	for _, svg := range elements(root, "svg") {
		title := elements(svg, "title")
		if attribute(svg, "role") != "img" || len(title) != 1 || said(title[0]) == "" {
			t.Errorf("a picture without words: %v", svg.Attr)
		}
	}
	if css := said(elements(root, "style")[0]); strings.Contains(css, "url(") || strings.Contains(css, "@import") {
		t.Error("the style sheet reads from elsewhere")
	}
}

// TestContrast computes the contrast of words on their grounds, on a light and a
// dark screen and on paper: 4.5 at least (WCAG 2.2, 1.4.3).
func TestContrast(t *testing.T) {
	css, err := os.ReadFile("sheet.css")
	if err != nil {
		t.Fatal(err)
	}
	schemes := regexp.MustCompile(`(?s):root \{(.*?)\}`).FindAllSubmatch(css, -1)
	if len(schemes) != 3 {
		t.Fatalf("%d schemes", len(schemes))
	}
	for i, s := range schemes {
		colours := map[string]float64{}
		for _, m := range regexp.MustCompile(`--([\w-]+): #([0-9a-f]{6})`).FindAllStringSubmatch(string(s[1]), -1) {
			colours[m[1]] = luminance(t, m[2])
		}
		for _, pair := range [][2]string{{"ink", "ground"}, {"quiet", "ground"}, {"accent", "ground"}, {"ink", "pale"}, {"quiet", "pale"}, {"on-accent", "accent"}} {
			a, b := colours[pair[0]], colours[pair[1]]
			if c := (max(a, b) + 0.05) / (min(a, b) + 0.05); c < 4.5 {
				t.Errorf("scheme %d: %s on %s has a contrast of %.2f", i, pair[0], pair[1], c)
			}
		}
	}
}

// luminance is the relative luminance of a colour (WCAG 2.2).
func luminance(t *testing.T, hex string) float64 {
	t.Helper()
	v, err := strconv.ParseUint(hex, 16, 32)
	if err != nil {
		t.Fatal(err)
	}
	part := func(shift uint) float64 {
		c := float64(v>>shift&255) / 255
		if c <= 0.04045 {
			return c / 12.92
		}
		return math.Pow((c+0.055)/1.055, 2.4)
	}
	return 0.2126*part(16) + 0.7152*part(8) + 0.0722*part(0)
}

// TestOnThePaper: no word of a PDF lies outside the paper's margins, on either
// paper, whatever the length of titles and formulas.
func TestOnThePaper(t *testing.T) {
	files := generate.BentProject(4, 4)
	files["long.kern"] = "basis { standard \"elastic\" }\ncolumn A1 \"" + strings.Repeat("A very long title of a column ", 12) + "\" { section = \"HEB 160\"; material = \"S355\"; height = 4 m; load 20 kN; note \"" + strings.Repeat("x", 400) + "\" }\n"
	r := check(files)
	for _, paper := range []sheet.Paper{sheet.A4, sheet.Letter} {
		width, height := 210*72/25.4, 297*72/25.4
		if paper == sheet.Letter {
			width, height = 612, 792
		}
		pages := pdfPages(t, printed(t, r, "pdf", sheet.Options{Full: true, Paper: paper}))
		for i, p := range pages {
			numbered := false
			for _, w := range p.words {
				x, errX := strconv.ParseFloat(w.x, 64)
				y, errY := strconv.ParseFloat(w.y, 64)
				if errX != nil || errY != nil {
					t.Fatal(errX, errY)
				}
				end := x + sheet.WidthOf(w.text, 5) // the smallest letters: what is out is out
				if x < 60 || end > width-45 || y < 30 || y > height-40 {
					t.Errorf("%s, page %d: %q at %s %s", paper, i+1, w.text, w.x, w.y)
				}
				numbered = numbered || w.text == fmt.Sprintf("%d / %d", i+1, len(pages))
			}
			if !numbered {
				t.Errorf("%s: page %d has no number", paper, i+1)
			}
		}
	}
}

// TestContentsPages: the pages that the contents name are those where the chapters
// begin.
func TestContentsPages(t *testing.T) {
	pages := pdfPages(t, printed(t, check(boathouse(t)), "pdf", sheet.Options{}))
	found := 0
	for i, p := range pages {
		for k, w := range p.words {
			if w.text != "Props" || k < 3 || i < 2 { // the title of the first member's chapter
				continue
			}
			if p.words[k-1].text == "P3:" {
				found = i + 1
			}
		}
	}
	named := ""
	for k, w := range pages[1].words {
		if w.text == "P3:" {
			for j := k; j > 0; j-- { // the number is written before the words
				if _, err := strconv.Atoi(pages[1].words[j].text); err == nil {
					named = pages[1].words[j].text
					break
				}
			}
		}
	}
	if named != strconv.Itoa(found) {
		t.Errorf("the contents say page %q, it is page %d", named, found)
	}
}

// TestMark reads what a sheet was made from out of each form.
func TestMark(t *testing.T) {
	files := boathouse(t)
	files["boathouse/odd name & (x) -- é.kern"] = "include \"basis.kern\"\ncolumn Z1 { section = \"HEB 160\"; material = \"S355\"; height = 4 m; load G 20 kN }\n"
	r := check(files)
	s, err := sheet.New(r, sheet.Options{Program: "kern test", Members: []string{"P1", "Z1"}, Full: true, Paper: sheet.Letter, Asked: []string{"boathouse/gallery.kern"}})
	if err != nil {
		t.Fatal(err)
	}
	for _, form := range forms {
		var b bytes.Buffer
		if err := s.Write(&b, form, nil); err != nil {
			t.Fatal(err)
		}
		m, ok := sheet.ReadMark(b.Bytes())
		if !ok {
			t.Errorf("%s has no mark", form)
			continue
		}
		if m.Form != form || m.Program != "kern test" || !m.Full || strings.Join(m.Members, " ") != "P1 Z1" || m.Inputs.Digest != s.Inputs.Digest || m.Results != s.Results || len(m.Inputs.Files) != len(s.Inputs.Files) {
			t.Errorf("%s: %+v", form, m)
		}
		if form == "pdf" && m.Paper != sheet.Letter {
			t.Errorf("the paper is %s", m.Paper)
		}
		for i, f := range m.Inputs.Files {
			if w := s.Inputs.Files[i]; f.Name != w.Name || f.Digest != w.Digest || f.Asked != w.Asked {
				t.Errorf("%s: %+v is not %+v", form, f, w)
			}
		}
	}
	names := ""
	for _, f := range s.Inputs.Files {
		names += f.Name + "\n"
	}
	if names != "basis.kern\ngallery.kern\nodd name & (x) -- é.kern\nsteel.kern\n" {
		t.Errorf("the inputs are\n%s", names)
	}
}

// TestTable: a table of forces is an input like any other.
func TestTable(t *testing.T) {
	files := map[string]string{"job/a.kern": "basis { standard \"elastic\" }\nforces \"f.csv\" compression positive\ncolumn A1 { section = \"HEB 200\"; material = \"S355\"; height = 4 m }\n",
		"job/f.csv": "member,combination,N [kN]\nA1,one,412.5\nA1,two,300\n"}
	r := check(files)
	s, err := sheet.New(r, sheet.Options{Asked: []string{"job/a.kern"}})
	if err != nil {
		t.Fatal(err)
	}
	if len(s.Inputs.Files) != 2 || s.Inputs.Files[1].Name != "f.csv" || s.Inputs.Files[1].Asked {
		t.Errorf("the inputs are %+v", s.Inputs.Files)
	}
	page := string(printed(t, r, "markdown", sheet.Options{Full: true}))
	for _, due := range []string{"| one ", "| two ", "412.5 kN", "Forces from the table"} {
		if !strings.Contains(page, due) {
			t.Errorf("the sheet lacks %q", due)
		}
	}
}

// TestDigest: line ends and the place of the folder change nothing; a letter, a name
// and a file do.
func TestDigest(t *testing.T) {
	digest := func(files map[string]string) string {
		s, err := sheet.New(check(files), sheet.Options{})
		if err != nil {
			t.Fatal(err)
		}
		return s.Inputs.Digest
	}
	a := "basis { standard \"elastic\" }\ncolumn A1 { section = \"HEB 160\"; material = \"S355\"; height = 4 m; load 20 kN }\n"
	same := digest(map[string]string{"a.kern": a})
	for name, files := range map[string]map[string]string{
		"windows": {"a.kern": strings.ReplaceAll(a, "\n", "\r\n")}, "folder": {"deep/er/a.kern": a},
	} {
		if digest(files) != same {
			t.Errorf("%s: the digest differs", name)
		}
	}
	for name, files := range map[string]map[string]string{
		"letter": {"a.kern": strings.Replace(a, "20 kN", "21 kN", 1)}, "name": {"b.kern": a}, "file": {"a.kern": a, "b.kern": ""},
	} {
		if digest(files) == same {
			t.Errorf("%s: the digest is the same", name)
		}
	}
}
