package drawing_test

import (
	"encoding/xml"
	"io"
	"math"
	"strconv"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/drawing"
	"kern/lang"
	"kern/lang/unit"
)

// check works out a calculation of one file.
func check(t testing.TB, text string) *checker.Report {
	t.Helper()
	return checker.Check(lang.Load([]string{"a.kern"}, func(string) (string, error) { return text, nil }, nil), nil)
}

// member is the one member of a calculation; it must be without errors.
func member(t testing.TB, text string) *checker.Result {
	t.Helper()
	r := check(t, text)
	for _, d := range r.Diagnostics {
		if d.Severity == lang.Error && d.Rule != "fails" {
			t.Fatalf("%s: %s", d.Rule, d.Message)
		}
	}
	if len(r.Members) != 1 {
		t.Fatalf("%d members", len(r.Members))
	}
	return r.Members[0]
}

// parts are the paths and texts of a scene.
type parts struct {
	paths []drawing.Path
	texts []drawing.Text
}

func (p *parts) Path(x drawing.Path) { p.paths = append(p.paths, x) }
func (p *parts) Text(x drawing.Text) { p.texts = append(p.texts, x) }
func (p *parts) Open(string)         {}
func (p *parts) Close()              {}

func partsOf(s *drawing.Scene) *parts {
	p := new(parts)
	s.Paint(p)
	return p
}

// wellFormed reads an SVG picture to its end.
func wellFormed(t *testing.T, svg string) {
	t.Helper()
	d := xml.NewDecoder(strings.NewReader(svg))
	for {
		if _, err := d.Token(); err == io.EOF {
			return
		} else if err != nil {
			t.Fatalf("%v in %s", err, svg)
		}
	}
}

// sound is why a picture is wrong, "" when it is not: words or lines outside
// it, words over words, places that are no numbers, no title.
func sound(s *drawing.Scene) string {
	sheet := drawing.Box{Right: s.Width, Bottom: s.Height}
	if !(s.Width > 0 && s.Width <= drawing.SheetWidth) || !(s.Height > 0 && s.Height < 400) {
		return "the sheet has a strange size"
	}
	if s.Title == "" || s.Description == "" {
		return "it has no words for those who cannot see it"
	}
	p := partsOf(s)
	for i, x := range p.texts {
		b := x.Box()
		if !b.Inside(drawing.Box{Left: -0.01, Top: -0.01, Right: sheet.Right + 0.01, Bottom: sheet.Bottom + 0.01}) {
			return "'" + x.Words + "' lies outside"
		}
		for _, y := range p.texts[:i] {
			if b.Overlaps(y.Box()) {
				return "'" + x.Words + "' lies over '" + y.Words + "'"
			}
		}
	}
	for _, x := range p.paths {
		for _, q := range x.Steps {
			if q.Kind == drawing.Close {
				continue
			}
			if math.IsNaN(q.To.X+q.To.Y) || q.To.X < -1 || q.To.Y < -1 || q.To.X > s.Width+1 || q.To.Y > s.Height+1 {
				return "a line lies outside"
			}
		}
	}
	return ""
}

// TestRandom: the pictures of random members are sound, well-formed, and the same
// when they are drawn again.
func TestRandom(t *testing.T) {
	members, pictures, seeds := 0, 0, uint64(10)
	if testing.Short() {
		seeds = 2
	}
	for seed := range seeds {
		text := randomMembers(50, seed)
		for _, r := range check(t, text).Members {
			members++
			for _, s := range drawing.Pictures(r) {
				pictures++
				if why := sound(s); why != "" {
					at := strings.Index(text, " "+r.Name+" ")
					t.Errorf("seed %d, %s: %s\n%s", seed, s.Title, why, text[at:at+strings.Index(text[at:], "}\n")])
				}
			}
			if members%10 == 0 {
				for i, s := range drawing.Pictures(r) {
					svg := s.SVG(drawing.Alone)
					wellFormed(t, svg)
					if again := drawing.Pictures(r)[i].SVG(drawing.Alone); again != svg {
						t.Errorf("%s is drawn differently again", s.Title)
					}
				}
			}
		}
	}
	if members != 50*int(seeds) || pictures < 3*members {
		t.Errorf("%d pictures of %d members", pictures, members)
	}
	t.Logf("%d pictures of %d members", pictures, members)
}

// shortly writes a number as pictures do; exact writes every digit.
func shortly(v float64) string { return unit.Short(v, 4) }
func exact(v float64) string   { return strconv.FormatFloat(v, 'f', -1, 64) }

// BenchmarkPictures draws all pictures of a member that is compressed and bent.
func BenchmarkPictures(b *testing.B) {
	r := member(b, gallery)
	for b.Loop() {
		for _, s := range drawing.Pictures(r) {
			s.SVG(drawing.Alone)
		}
	}
}
