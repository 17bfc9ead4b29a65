package drawing_test

import (
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/action"
	"kern/checker/drawing"
)

// basis is the head of the calculations below; all of them are invented.
const basis = `basis { standard "EN 1993-1-1:2005"; actions "EN 1990:2002" eq "6.10"; show kN, kNm, mm, MPa }
case G permanent
case Q imposed "B"
case W wind
`

// gallery is a post with a hold, an offset and wind.
const gallery = basis + `column A1 {
    section = "HEB 160"; material = "S355"; height = 5 m
    hold minor at 2.5 m
    load G 80 kN at top
    load Q 120 kN at top
    load G 30 kN at 3 m offset 180 mm about major and 20 mm about minor
    load W 2.5 kN/m about major
}
`

const facade = basis + `level ground at 0 m
level gallery at 3.6 m { G 4 kN/m2; Q 5 kN/m2 }
level roof at 7.2 m { G 0.8 kN/m2 }
column A2 {
    section = "HEA 200"; material = "S355"
    from ground to roof
    base fixed about major
    base pinned about minor
    hold both at gallery
    hold twist at 1.8 m
    hold minor at 5.4 m
    load floor 18 m2 at gallery offset 150 mm about major
    load floor 40 m2 at roof
    load W 12 kN across major at 5.4 m
    load W -1.5 kN/m about minor from 1 m to 3 m
    load G 5 kNm about major at top
}
`

const mast = `basis { standard "elastic"; factor_yield = 1.5; factor_buckling = 2; show kip, kip-ft, in, ksi }
case G permanent
column A3 {
    section = "CHS 168.3x8"; material = "S355H"; height = 20 ft
    base fixed
    top free
    load G 5 kip at top
    load G 1 kip across major at 12 ft
    limit utilisation = 0.9
}
`

// TestMemberGolden compares six pictures with testdata/member.
func TestMemberGolden(t *testing.T) {
	for _, c := range []struct {
		name, text string
		draw       func(*checker.Result) *drawing.Scene
	}{
		{"elevation", facade, drawing.Elevation}, {"buckling", facade, drawing.Buckling}, {"diagrams", gallery, drawing.Diagrams},
		{"interaction", gallery, drawing.Interaction}, {"interaction-elastic", mast, drawing.Interaction}, {"bars", gallery, drawing.Bars},
	} {
		s := c.draw(member(t, c.text))
		if s == nil {
			t.Errorf("%s: nothing is drawn", c.name)
			continue
		}
		if why := sound(s); why != "" {
			t.Errorf("%s: %s", c.name, why)
		}
		got, path := s.SVG(drawing.Alone)+"\n", filepath.Join("testdata", "member", c.name+".svg")
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
			t.Errorf("%s has changed (-update writes it)", c.name)
		}
	}
}

// box is the rectangle around a path.
func box(p drawing.Path) drawing.Box {
	b := drawing.Box{Left: math.Inf(1), Top: math.Inf(1), Right: math.Inf(-1), Bottom: math.Inf(-1)}
	for _, s := range p.Steps {
		if s.Kind != drawing.Close {
			b.Left, b.Right = min(b.Left, s.To.X), max(b.Right, s.To.X)
			b.Top, b.Bottom = min(b.Top, s.To.Y), max(b.Bottom, s.To.Y)
		}
	}
	return b
}

// TestElevationToScale: the member is a rectangle of its height and depth at one
// scale, and a hold at half the height is drawn at half the height, in the view
// about its axis alone.
func TestElevationToScale(t *testing.T) {
	r := member(t, basis+`column A { section = bar { width = 300 mm; depth = 500 mm }; material = "S355"; height = 5 m; hold minor at 2.5 m; load G 50 kN }`)
	p := partsOf(drawing.Elevation(r))
	var bodies []drawing.Box
	for _, x := range p.paths {
		if x.Style == drawing.Fill {
			bodies = append(bodies, box(x))
		}
	}
	if len(bodies) != 2 {
		t.Fatalf("%d rectangles", len(bodies))
	}
	for i, depth := range []float64{0.5, 0.3} {
		b := bodies[i]
		if got := (b.Right - b.Left) / (b.Bottom - b.Top); math.Abs(got-depth/5) > 1e-9 {
			t.Errorf("view %d: the proportion is %g, want %g", i, got, depth/5)
		}
		middle, holds := (b.Top+b.Bottom)/2, 0
		for _, x := range p.paths { // a hold is a triangle that touches the member
			c := box(x)
			if x.Style == drawing.Outline && len(x.Steps) == 4 && math.Abs((c.Top+c.Bottom)/2-middle) < 1e-9 && (math.Abs(c.Right-b.Left) < 1e-9 || math.Abs(c.Left-b.Right) < 1e-9) {
				holds++
			}
		}
		if holds != i {
			t.Errorf("view %d has %d holds at half the height, want %d", i, holds, i)
		}
	}
}

// TestLifts: a member of two lifts is drawn with both widths, has both sections
// and buckles as a stepped bar, whose factor lies between those of the bars of
// either section.
func TestLifts(t *testing.T) {
	text := func(lift string) string {
		return basis + `column A { section = "HEB 160"; material = "S355"; height = 5 m; selfweight off; ` + lift + ` load G 100 kN }`
	}
	r := member(t, text(`lift base to 2 m { section = "HEB 300" };`))
	p := partsOf(drawing.Elevation(r))
	var widths []float64
	for _, x := range p.paths {
		if x.Style == drawing.Fill {
			b := box(x)
			widths = append(widths, (b.Right-b.Left)/80*5)
		}
	}
	if want := []float64{0.3, 0.16, 0.3, 0.16}; len(widths) != 4 || math.Abs(widths[0]-want[0]) > 1e-9 || math.Abs(widths[1]-want[1]) > 1e-9 {
		t.Errorf("the widths are %v, want %v", widths, want)
	}
	if n := len(drawing.Sections(r)); n != 2 {
		t.Errorf("%d sections", n)
	}
	factor := func(text string) float64 {
		_, rest, _ := strings.Cut(drawing.Buckling(member(t, text)).Description, "about minor at ")
		v, err := strconv.ParseFloat(strings.Fields(rest)[0], 64)
		if err != nil {
			t.Fatal(err)
		}
		return v
	}
	least, most := factor(text("")), factor(strings.Replace(text(""), "HEB 160", "HEB 300", 1))
	if f := factor(text(`lift base to 2 m { section = "HEB 300" };`)); !(f > least && f < most) {
		t.Errorf("the factor %g does not lie between %g and %g", f, least, most)
	}
}

// TestSprings: every spring is said with its stiffness in the view about its axis,
// and is no rigid hold.
func TestSprings(t *testing.T) {
	r := check(t, basis+`column A { section = "HEB 160"; material = "S355"; height = 5 m; critical exact
base spring 4000 kNm/rad about major
top free about major
top spring 250 kN/m about major
hold minor at 2.5 m stiffness 900 kN/m
load G 50 kN }`).Members[0]
	s := drawing.Elevation(r)
	if why := sound(s); why != "" {
		t.Error(why)
	}
	var words []string
	for _, x := range partsOf(s).texts {
		words = append(words, x.Words)
	}
	for _, want := range []string{"spring 4000 kNm/rad", "spring 250 kN/m", "spring 900 kN/m"} {
		if n := count(words, want); n != 1 {
			t.Errorf("'%s' stands %d times among %q", want, n, words)
		}
	}
	if strings.Contains(s.Description, "held at") || !strings.Contains(s.Description, "about minor: base pinned, top pinned, spring 900 kN/m at 2500 mm") {
		t.Error(s.Description)
	}
}

// TestSectionAspect: a section 200 mm deep and 100 mm wide is drawn twice as high
// as it is wide.
func TestSectionAspect(t *testing.T) {
	r := member(t, basis+`column A { section = tube { depth = 200 mm; width = 100 mm; wall = 5 mm; made = hot }; material = "S355H"; height = 5 m; load G 50 kN }`)
	for _, x := range partsOf(drawing.SectionOf(r)).paths {
		if x.Style == drawing.Fill {
			if b := box(x); math.Abs((b.Bottom-b.Top)/(b.Right-b.Left)-2) > 1e-9 {
				t.Errorf("%g by %g", b.Right-b.Left, b.Bottom-b.Top)
			}
			return
		}
	}
	t.Error("no outline")
}

// TestBucklingShape: on pins a member buckles in half a sine wave, and the factor
// times the load is Euler's load.
func TestBucklingShape(t *testing.T) {
	r := member(t, basis+`combination one = 1 G
column A { section = "HEB 160"; material = "S355"; height = 5 m; selfweight off; load G 100 kN }`)
	s := drawing.Buckling(r)
	curves := 0
	for _, x := range partsOf(s).paths {
		if len(x.Steps) > 50 {
			curves++
			b := box(x)
			from := x.Steps[0].To
			for _, q := range x.Steps {
				want := from.X + (b.Right-b.Left)*math.Sin(math.Pi*(from.Y-q.To.Y)/(b.Bottom-b.Top))
				if math.Abs(q.To.X-want) > 0.01 {
					t.Fatalf("the curve is at %v, want x = %g", q.To, want)
				}
			}
		}
	}
	if curves != 2 {
		t.Errorf("%d curves", curves)
	}
	// EN 1990 (6.10): 1.35 G; N_cr = pi2 E I / L2 with I of the section
	for a, i := range []float64{r.Member.Section.IMajor, r.Member.Section.IMinor} {
		want := math.Pi * math.Pi * 210e9 * i / 25 / 135e3
		if !strings.Contains(s.Description, [...]string{"about major at ", "about minor at "}[a]+shortly(want)+" × the loads") {
			t.Errorf("axis %d: want %s in: %s", a, shortly(want), s.Description)
		}
	}
}

// TestDiagramValues: the moments of a simple beam with a line load are those of
// the formula q L2 / 8, on the tension side, and the shear is q L / 2.
func TestDiagramValues(t *testing.T) {
	r := member(t, basis+`column A { section = "HEB 160"; material = "S355"; height = 4 m; selfweight off; load W 10 kN/m about major; load W 20 kN }`)
	var words []string
	for _, x := range partsOf(drawing.Diagrams(r)).texts {
		words = append(words, x.Words)
	}
	for _, want := range []string{"moment, major", "kNm", "30", "shear, major", "axial force"} {
		if n := count(words, want); n < 1 {
			t.Errorf("'%s' is not among %q", want, words)
		}
	}
	if n := count(words, "30"); n < 3 { // 1.5 * 10 * 16 / 8 kNm, 1.5 * 20 kN, 1.5 * 10 * 4 / 2 kN
		t.Errorf("the values are %q", words)
	}
}

func count(list []string, want string) int {
	n := 0
	for _, s := range list {
		if s == want {
			n++
		}
	}
	return n
}

// TestNothingToDraw: members without forces, without a height, in tension.
func TestNothingToDraw(t *testing.T) {
	r := member(t, basis+`tie A { section = "HEB 160"; material = "S355"; height = 4 m; load G -20 kN }`)
	if drawing.Buckling(r) != nil || drawing.Interaction(r) != nil {
		t.Error("a tie buckles")
	}
	r = member(t, basis+`column A { section = "HEB 160"; material = "S355"; height = 4 m; selfweight off; load G 0 kN }`)
	if drawing.Diagrams(r) != nil || drawing.Buckling(r) != nil {
		t.Error("a member without forces has diagrams")
	}
	for _, r := range check(t, basis+`column A { section = "HEB 160"; height = 4 n; load G 20 kN }`).Members {
		for _, s := range drawing.Pictures(r) {
			if s.Title != "section HEB 160" { // that is known
				t.Errorf("%s of a member with errors", s.Title)
			}
		}
	}
}

// TestInteractionLine: the line is where the checker itself says the limit is:
// texts with the loads of the points on the axes have the utilisation 1, by each
// standard.
func TestInteractionLine(t *testing.T) {
	for _, standard := range checker.Stated() {
		text := func(n, m float64) string {
			return `basis { standard ` + standard + `; show kN, kNm, mm, MPa }
column A { section = "HEB 160"; material = "S355"; height = 4 m; selfweight off
load ` + exact(n) + ` N at top
load ` + exact(m) + ` Nm about major at top
}`
		}
		n, m, ok := drawing.Corners(member(t, text(100e3, 10e3)))
		if !ok {
			t.Errorf("%s: no line", standard)
			continue
		}
		for _, c := range [][2]float64{{n, 1e-6}, {1e-6, m}} {
			if u := check(t, text(c[0], c[1])).Members[0].Utilisation; !(u < 1+1e-6 && u > 0.998) {
				t.Errorf("%s: %g N with %g Nm has the utilisation %g", standard, c[0], c[1], u)
			}
		}
	}
}

// TestEnds: every end condition has its word in the picture.
func TestEnds(t *testing.T) {
	for word := range action.EndNames {
		r := check(t, basis+`column A { section = "HEB 160"; material = "S355"; height = 4 m; base fixed; top `+word+`; load G 20 kN }`).Members[0]
		n := 0
		for _, x := range partsOf(drawing.Elevation(r)).texts {
			if x.Words == word {
				n++
			}
		}
		if want := map[bool]int{true: 4, false: 2}[word == "fixed"]; n != want {
			t.Errorf("'%s' stands %d times, want %d", word, n, want)
		}
	}
}
