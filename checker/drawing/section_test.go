package drawing_test

import (
	"encoding/xml"
	"flag"
	"io"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"kern/checker/catalogue"
	"kern/checker/drawing"
	"kern/checker/section"
)

var update = flag.Bool("update", false, "write the golden files anew")

// shapes are one of each kind that has an outline.
func shapes(t *testing.T) map[string]section.Shape {
	out := map[string]section.Shape{
		"bar": {Kind: section.Bar, Width: 0.06, Depth: 0.09},
		"rod": {Kind: section.Rod, Diameter: 0.05},
		"box": {Kind: section.Tube, Made: section.Welded, Width: 0.3, Depth: 0.4, Wall: 0.012},
	}
	for _, name := range []string{"HEB 160", "UPN 200", "1/2 IPE 300", "L 100x100x10", "L 150x75x10", "RHS 140x90x6.3", "CHS 168.3x8", "EHS 200x100x8"} {
		e, ok := catalogue.Find(name)
		if !ok {
			t.Fatalf("%s is not in the catalogue", name)
		}
		out[strings.NewReplacer(" ", "-", "/", "-").Replace(name)] = e.Shape
	}
	return out
}

// TestSectionGolden compares each drawing with testdata/section.
func TestSectionGolden(t *testing.T) {
	for name, s := range shapes(t) {
		p, err := section.Compute(s)
		if err != nil {
			t.Fatal(err)
		}
		got := drawing.Section(s, p, drawing.Sized{Title: name, Side: 40, Dimensions: true}).SVG(drawing.Alone) + "\n"
		path := filepath.Join("testdata", "section", name+".svg")
		if *update {
			if err := os.WriteFile(path, []byte(got), 0o666); err != nil {
				t.Fatal(err)
			}
			continue
		}
		want, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		if got != string(want) {
			t.Errorf("%s is drawn as\n%s(-update writes it)", name, got)
		}
	}
}

// TestSectionToScale reads drawings back: they are XML, and the area inside the
// drawn path, at its scale, is the area of the section.
func TestSectionToScale(t *testing.T) {
	for name, s := range shapes(t) {
		p, err := section.Compute(s)
		if err != nil {
			t.Fatal(err)
		}
		svg := drawing.Section(s, p, drawing.Sized{Side: 1200}).SVG(drawing.OnAnyGround)
		d, paths := xml.NewDecoder(strings.NewReader(svg)), []string{}
		for {
			token, err := d.Token()
			if err == io.EOF {
				break
			}
			if err != nil {
				t.Fatalf("%s: %v", name, err)
			}
			if e, ok := token.(xml.StartElement); ok && e.Name.Local == "path" {
				paths = append(paths, e.Attr[0].Value)
			}
		}
		if len(paths) != 3 {
			t.Errorf("%s: %d paths", name, len(paths))
			continue
		}
		area, low, high := pathArea(t, paths[0])
		scale := 1200 / max(high[0]-low[0], high[1]-low[1]) // mm in the greater side
		side := max(s.Width, s.Depth, s.Diameter)
		if got := area * (side * side) / (1200 * 1200); math.Abs(scale-1) > 1e-3 || math.Abs(got/p.Area-1) > 2e-3 {
			t.Errorf("%s: the drawing has %g m2, the section %g m2 (scale off by %g)", name, got, p.Area, scale-1)
		}
	}
}

// pathArea is the area inside a path of M, L, A and Z commands by the even-odd
// rule where holes run against the outline, with the box around it.
func pathArea(t *testing.T, d string) (area float64, low, high [2]float64) {
	t.Helper()
	low, high = [2]float64{math.Inf(1), math.Inf(1)}, [2]float64{math.Inf(-1), math.Inf(-1)}
	var at [2]float64
	numbers := func(s string) []float64 {
		var out []float64
		for _, f := range strings.Fields(s) {
			v, err := strconv.ParseFloat(f, 64)
			if err != nil {
				t.Fatal(err)
			}
			out = append(out, v)
		}
		return out
	}
	line := func(to [2]float64) {
		area += (at[0]*to[1] - to[0]*at[1]) / 2
		at = to
		for i := range at {
			low[i], high[i] = min(low[i], at[i]), max(high[i], at[i])
		}
	}
	for d != "" {
		command := d[0]
		end := strings.IndexAny(d[1:], "MLAZ") + 1
		if end == 0 {
			end = len(d)
		}
		v := numbers(d[1:end])
		d = d[end:]
		switch command {
		case 'M':
			at = [2]float64{v[0], v[1]}
			line(at)
		case 'L':
			line([2]float64{v[0], v[1]})
		case 'A':
			// centre of the arc from its ends, its radius and its sense of turning
			r, turn, to := v[0], v[4], [2]float64{v[5], v[6]}
			mx, my := (to[0]-at[0])/2, (to[1]-at[1])/2
			half := math.Hypot(mx, my)
			if half < 1e-9 {
				continue
			}
			h := math.Sqrt(max(0, r*r-half*half)) / half
			if turn == 0 {
				h = -h
			}
			cx, cy := at[0]+mx-h*my, at[1]+my+h*mx
			a0, a1 := math.Atan2(at[1]-cy, at[0]-cx), math.Atan2(to[1]-cy, to[0]-cx)
			sweep := math.Mod(a1-a0+4*math.Pi, 2*math.Pi)
			if turn == 0 {
				sweep -= 2 * math.Pi
			}
			for i := 1; i <= 100; i++ {
				sin, cos := math.Sincos(a0 + sweep*float64(i)/100)
				line([2]float64{cx + r*cos, cy + r*sin})
			}
			line(to)
		}
	}
	return math.Abs(area), low, high
}

func TestSectionOfNothing(t *testing.T) {
	if s := drawing.Section(section.Shape{Kind: section.Given}, section.Properties{}, drawing.Sized{Side: 40}); s != nil {
		t.Errorf("a section without outline is drawn as %s", s.SVG(drawing.Alone))
	}
}
