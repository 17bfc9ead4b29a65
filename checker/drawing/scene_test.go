package drawing_test

import (
	"math"
	"regexp"
	"strings"
	"testing"

	"kern/checker/drawing"
)

// TestCubics: curves in place of arcs stay within 0.03 % of the radius of the
// circle, for arcs either way, small and nearly half a turn, and end where the
// arcs end.
func TestCubics(t *testing.T) {
	const r = 10.0
	for _, sweep := range []float64{0.1, 1, 1.6, 2.8, -0.1, -1, -1.6, -2.8} {
		at := func(a float64) drawing.Point {
			return drawing.Point{X: 3 + r*math.Cos(a), Y: -2 + r*math.Sin(a)}
		}
		path := drawing.Path{Steps: []drawing.Step{{Kind: drawing.Move, To: at(0.4)}, {Kind: drawing.Arc, To: at(0.4 + sweep), Radius: r, Clockwise: sweep > 0}, {Kind: drawing.Close}}}
		from, arc := path.Steps[0].To, 0.0
		for _, s := range path.Cubics() {
			switch s.Kind {
			case drawing.Arc:
				t.Errorf("%g: an arc is left", sweep)
			case drawing.Close:
				if s.To != path.Steps[0].To {
					t.Errorf("%g: it closes at %v", sweep, s.To)
				}
			case drawing.Cubic:
				last := from
				for i := 1; i <= 50; i++ {
					u := float64(i) / 50
					v := 1 - u
					p := drawing.Point{
						X: v*v*v*from.X + 3*v*v*u*s.Control[0].X + 3*v*u*u*s.Control[1].X + u*u*u*s.To.X,
						Y: v*v*v*from.Y + 3*v*v*u*s.Control[0].Y + 3*v*u*u*s.Control[1].Y + u*u*u*s.To.Y,
					}
					if d := math.Hypot(p.X-3, p.Y+2); math.Abs(d/r-1) > 3e-4 {
						t.Errorf("%g: %g off the centre", sweep, d)
					}
					arc += math.Hypot(p.X-last.X, p.Y-last.Y)
					last = p
				}
				from = s.To
			}
		}
		if end := at(0.4 + sweep); math.Hypot(from.X-end.X, from.Y-end.Y) > 1e-9 || math.Abs(arc/(r*math.Abs(sweep))-1) > 1e-3 {
			t.Errorf("%g: the curve ends at %v after %g", sweep, from, arc)
		}
	}
}

// TestSVGWords: whatever a title or a label says, the picture stays XML and says
// it; the picture has no ids, which would clash in a page.
func TestSVGWords(t *testing.T) {
	const odd = "a < b & \"c\" \x01 Ω — ]]>"
	s := &drawing.Scene{Width: 10, Height: 10, Title: odd, Description: odd, Items: []drawing.Item{drawing.Group{Name: "x", Items: []drawing.Item{drawing.Text{Words: odd, Size: 3}}}}}
	for _, use := range []drawing.Use{drawing.InPage, drawing.Alone, drawing.OnAnyGround} {
		svg := s.SVG(use)
		wellFormed(t, svg)
		if strings.Contains(svg, " id=") || strings.Count(svg, "Ω — ]]&gt;") != 3 {
			t.Errorf("%s", svg)
		}
	}
}

// TestCSS: every rule for pages is bound to pictures, so that it meets nothing
// else in the page, and every style and tone has one.
func TestCSS(t *testing.T) {
	css := drawing.CSS()
	for _, line := range strings.Split(strings.TrimSpace(css), "\n") {
		if !strings.HasPrefix(line, ".k-drawing .k-") {
			t.Errorf("a rule for anything: %s", line)
		}
	}
	names := map[string]bool{}
	for _, l := range drawing.Looks {
		names[l.Name] = true
	}
	for _, l := range drawing.Tones {
		names[l.Name] = true
	}
	if len(names) != len(drawing.Looks)+len(drawing.Tones) {
		t.Error("two styles have one name")
	}
	for n := range names {
		if !regexp.MustCompile(regexp.QuoteMeta("."+n) + `\{`).MatchString(css) {
			t.Errorf("no rule for %s", n)
		}
	}
}

// TestContrast: words and lines can be read on their ground: at least 4.5 to 1
// (WCAG 2.1, 1.4.3), and on either ground at least 3 to 1 (1.4.11). The accent in
// grey differs from the steel that it stands beside.
func TestContrast(t *testing.T) {
	for _, p := range []struct {
		palette drawing.Palette
		grounds []string
		least   float64
	}{
		{drawing.Light, []string{drawing.Light[drawing.Paper]}, 4.5}, {drawing.Dark, []string{drawing.Dark[drawing.Paper]}, 4.5},
		{drawing.Either, []string{"#ffffff", "#1e1e1e"}, 3},
	} {
		for _, c := range []drawing.Colour{drawing.Ink, drawing.Grey, drawing.AccentColour} {
			for _, g := range p.grounds {
				if got := contrast(t, p.palette[c], g); got < p.least {
					t.Errorf("%s on %s: %.2f to 1", p.palette[c], g, got)
				}
			}
		}
	}
	for _, p := range []drawing.Palette{drawing.Light, drawing.Dark} {
		if got := contrast(t, p[drawing.AccentColour], p[drawing.Steel]); got < 2 {
			t.Errorf("accent beside steel: %.2f to 1", got)
		}
	}
}

// contrast is the contrast ratio of WCAG 2.1.
func contrast(t *testing.T, a, b string) float64 {
	t.Helper()
	x, y := luminance(t, a)+0.05, luminance(t, b)+0.05
	return max(x/y, y/x)
}

func luminance(t *testing.T, colour string) float64 {
	t.Helper()
	sum := 0.0
	for i, weight := range []float64{0.2126, 0.7152, 0.0722} {
		v := 0.0
		for _, d := range colour[1+2*i : 3+2*i] {
			digit := strings.IndexRune("0123456789abcdef", d)
			if digit < 0 {
				t.Fatalf("'%s' is no colour", colour)
			}
			v = 16*v + float64(digit)
		}
		if v /= 255; v <= 0.04045 {
			v /= 12.92
		} else {
			v = math.Pow((v+0.055)/1.055, 2.4)
		}
		sum += weight * v
	}
	return sum
}

// TestWidth: the estimate of words is above the width that a common font gives
// them. Widths of Helvetica in thousandths of the size: Adobe's font metrics, from
// memory ("A" 667, "M" 833, "0" 556, " " 278, "i" 222, "m" 833).
func TestWidth(t *testing.T) {
	for words, want := range map[string]float64{"A": 667, "M": 833, "0": 556, " ": 278, "i": 222, "m": 833, "A0 Mi": 667 + 556 + 278 + 833 + 222} {
		if got := drawing.Width(words, 1000, false); got < want || got > 1.45*want {
			t.Errorf("'%s' is %g wide, in Helvetica %g", words, got, want)
		}
	}
	if drawing.Width("Bold words", 3, true) < drawing.Width("Bold words", 3, false) {
		t.Error("bold words are narrower")
	}
}
