package chart_test

import (
	"encoding/csv"
	"flag"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/chart"
	"kern/lang"
)

var update = flag.Bool("update", false, "write the golden files anew")

// check works out a calculation of one file.
func check(text string) *checker.Report {
	return checker.Check(lang.Load([]string{"a.kern"}, func(string) (string, error) { return text, nil }, nil), nil)
}

// post is a calculation of our own invention.
func post(standard, height string) string {
	return `basis { standard ` + standard + `; show kN, kNm, m, MPa }
case G permanent
case W wind
column A1 "Post" {
    section  = "HEB 160"
    material = "S355"
    height   = ` + height + `
    hold minor at height / 2
    load G 300 kN at top
    load G 20 kN at top offset 150 mm about major
    load W 2.5 kN/m about major
}
column A2 as A1 { load G 320 kN at top; load W 2 kN/m about major }
`
}

func named(t *testing.T, r *checker.Report, name string) *checker.Result {
	t.Helper()
	for _, m := range r.Members {
		if m.Name == name {
			return m
		}
	}
	t.Fatalf("no member %s", name)
	return nil
}

func exact(v float64) string { return strconv.FormatFloat(v, 'f', -1, 64) }

// line finds a line by its name.
func line(t *testing.T, c *chart.Chart, name string) chart.Line {
	t.Helper()
	for _, l := range c.Lines {
		if l.Name == name {
			return l
		}
	}
	t.Fatalf("no line '%s'", name)
	return chart.Line{}
}

// TestVaryHeight: every point of the line is the utilisation of a calculation
// with that height written in it, by each standard, also for a member that takes
// its height over from another one.
func TestVaryHeight(t *testing.T) {
	for _, standard := range checker.Stated() {
		r := check(post(standard, "4.8 m"))
		for _, name := range []string{"A1", "A2"} {
			c, err := chart.Vary(r, named(t, r, name), "height", chart.Range{From: 2, To: 9, Points: 8})
			if err != nil {
				t.Fatal(err)
			}
			l := line(t, c, "utilisation")
			for i, h := range l.X {
				want := named(t, check(post(standard, exact(h)+" m")), name).Utilisation
				if math.Abs(l.Y[i]-want) > 1e-9 || math.IsNaN(want) {
					t.Errorf("%s, %s, %g m: %g, want %g", standard, name, h, l.Y[i], want)
				}
			}
		}
	}
}

// TestVaryLoad: the same for a factor on all loads and on those of a case.
func TestVaryLoad(t *testing.T) {
	text := func(g, w float64) string {
		return `basis { standard "EN 1993-1-1:2005" }
case G permanent
case W wind
column A1 { section = "HEB 160"; material = "S355"; height = 4 m; load G ` + exact(300*g) + ` kN; load W ` + exact(3*w) + ` kN/m about minor }`
	}
	r := check(text(1, 1))
	for _, c := range []struct {
		parameter string
		text      func(f float64) string
	}{{"load", func(f float64) string { return text(f, f) }}, {"load:W", func(f float64) string { return text(1, f) }}} {
		drawn, err := chart.Vary(r, r.Members[0], c.parameter, chart.Range{To: 3, Points: 7})
		if err != nil {
			t.Fatal(err)
		}
		l := line(t, drawn, "utilisation")
		for i, f := range l.X {
			if want := check(c.text(f)).Members[0].Utilisation; math.Abs(l.Y[i]-want) > 1e-9 && f > 0 {
				t.Errorf("%s times %g: %g, want %g", c.parameter, f, l.Y[i], want)
			}
		}
	}
}

// TestVaryCrossing: where the note says that the limit is reached, a calculation
// with that height passes, and one with a little more fails.
func TestVaryCrossing(t *testing.T) {
	r := check(post(`"EN 1993-1-1:2005"`, "4.8 m"))
	c, err := chart.Vary(r, named(t, r, "A1"), "height", chart.Range{From: 1, To: 15, Points: 40})
	if err != nil {
		t.Fatal(err)
	}
	_, rest, found := strings.Cut(c.Notes[0], "reaches 1.00 at height ")
	number, _, _ := strings.Cut(rest, " m.")
	h, err := strconv.ParseFloat(number, 64)
	if !found || err != nil {
		t.Fatalf("the note is '%s'", c.Notes[0])
	}
	below := named(t, check(post(`"EN 1993-1-1:2005"`, exact(h*0.999)+" m")), "A1").Utilisation
	above := named(t, check(post(`"EN 1993-1-1:2005"`, exact(h*1.001)+" m")), "A1").Utilisation
	if !(below <= 1 && above > 1) {
		t.Errorf("at %g m: %g below, %g above", h, below, above)
	}
}

// TestVaryLevels: a member between levels is varied with its upper level and what
// stands on it, as if the level were elsewhere, and heights at which a hold would
// stand outside it have no point.
func TestVaryLevels(t *testing.T) {
	text := func(h float64) string {
		return `basis { standard "EN 1993-1-1:2005"; show m }
case G permanent
level ground at 0 m
level roof at ` + exact(h) + ` m { G 2 kN/m2 }
column A { section = "HEB 160"; material = "S355"; from ground to roof; hold minor at 3.1 m; load floor 100 m2 at roof offset 50 mm about major }`
	}
	r := check(text(6))
	c, err := chart.Vary(r, r.Members[0], "height", chart.Range{From: 2, To: 10, Points: 9})
	if err != nil {
		t.Fatal(err)
	}
	l := line(t, c, "utilisation")
	for i, h := range l.X {
		if got, want := !math.IsNaN(l.Y[i]), h > 3.1; got != want {
			t.Errorf("a point at %g m: %v, want %v", h, got, want)
		}
		if want := check(text(h)).Members[0].Utilisation; h > 3.1 && !(math.Abs(l.Y[i]-want) < 1e-9) {
			t.Errorf("%g m: %g, want %g", h, l.Y[i], want)
		}
	}
	if !strings.Contains(strings.Join(c.Notes, " "), "would lie outside") {
		t.Errorf("the gap is not explained: %q", c.Notes)
	}
}

// TestResistance: the lines are those of calculations with a load of that size: it
// has the utilisation 1. For Euler's column they are pi2 E I / (K L)2.
func TestResistance(t *testing.T) {
	for _, standard := range checker.Stated() {
		quoted, method, _ := strings.Cut(standard, " by ")
		c, err := chart.Resistance(chart.Plain{Section: "HEB 160", Material: "S355", Standard: strings.Trim(quoted, `"`), Method: method, K: [2]float64{1, 0.7}, From: 2, To: 10, Points: 5})
		if err != nil {
			t.Fatal(err)
		}
		l := line(t, c, "least resistance")
		for i, h := range l.X {
			r := check(`basis { standard ` + standard + ` }
column A { section = "HEB 160"; material = "S355"; height = ` + exact(h) + ` m; effective = 0.7 about minor; selfweight off; load ` + exact(l.Y[i]) + ` kN }`)
			if u := r.Members[0].Utilisation; math.Abs(u-1) > 1e-9 {
				t.Errorf("%s, %g m: %g kN has the utilisation %g", standard, h, l.Y[i], u)
			}
		}
	}
	c, err := chart.Resistance(chart.Plain{Section: "HEB 160", Material: "S355", Standard: "elastic", K: [2]float64{1, 2}, From: 5, To: 10, Points: 2})
	if err != nil {
		t.Fatal(err)
	}
	// I_minor = 889.2 cm4: value of HEB 160 in handbooks of EN 10365 sections, from memory
	if got, want := line(t, c, "elastic buckling minor").Y[1], math.Pi*math.Pi*210e6*889.2e-8/400; math.Abs(got/want-1) > 1e-3 {
		t.Errorf("%g kN, want %g", got, want)
	}
}

// TestVaryTable: the forces of a table grow with a factor, and nothing else can be
// varied, as the table does not say what they would be then.
func TestVaryTable(t *testing.T) {
	table := func(f float64) *checker.Report {
		files := map[string]string{
			"a.kern": `basis { standard "EN 1993-1-1:2005" }
forces "frame.csv" compression positive
column A1 { section = "HEB 160"; material = "S355"; height = 4 m }
`,
			"frame.csv": "member,position [m],combination,N [N],M_major [Nm]\nA1,0,ULS," + exact(300e3*f) + ",0\nA1,4,ULS," + exact(290e3*f) + "," + exact(12e3*f) + "\n",
		}
		return checker.Check(lang.Load([]string{"a.kern"}, func(name string) (string, error) { return files[name], nil }, nil), nil)
	}
	r := table(1)
	c, err := chart.Vary(r, r.Members[0], "load", chart.Range{From: 0.5, To: 2, Points: 4})
	if err != nil {
		t.Fatal(err)
	}
	l := line(t, c, "utilisation")
	for i, f := range l.X {
		if want := table(f).Members[0].Utilisation; !(math.Abs(l.Y[i]-want) < 1e-9) {
			t.Errorf("times %g: %g, want %g", f, l.Y[i], want)
		}
	}
	for _, parameter := range []string{"height", "offset:major", "load:G"} {
		if _, err := chart.Vary(r, r.Members[0], parameter, chart.Range{Points: 4}); err == nil || !strings.Contains(err.Error(), "frame.csv") {
			t.Errorf("%s: %v", parameter, err)
		}
	}
}

// TestInteraction: the deciding combination is the main mark.
func TestInteraction(t *testing.T) {
	r := check(post(`"EN 1993-1-1:2005"`, "4.8 m"))
	c, err := chart.Interaction(named(t, r, "A1"))
	if err != nil {
		t.Fatal(err)
	}
	main := 0
	for _, m := range c.Marks {
		if m.Main {
			main++
		}
	}
	if main != 1 || len(c.Marks) != len(named(t, r, "A1").Combinations()) {
		t.Errorf("%d main marks of %d", main, len(c.Marks))
	}
	if _, err := chart.Interaction(check(`basis { standard "elastic" }
column A { section = "HEB 160"; material = "S355"; height = 4 m; load 20 kN }`).Members[0]); err == nil {
		t.Error("a member without bending has an interaction")
	}
}

// TestErrors: what cannot be drawn is refused with the reason.
func TestErrors(t *testing.T) {
	r := check(post(`"elastic"`, "4.8 m"))
	for parameter, want := range map[string]string{
		"weight": "nothing that can be varied", "load:X": "no load case", "offset:both": "nothing that can be varied",
	} {
		if _, err := chart.Vary(r, named(t, r, "A1"), parameter, chart.Range{Points: 5}); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%s: %v", parameter, err)
		}
	}
	if _, err := chart.Vary(r, named(t, r, "A1"), "height", chart.Range{From: 5, To: 4, Points: 5}); err == nil {
		t.Error("a range that ends before it begins is drawn")
	}
	for _, p := range []chart.Plain{{Section: "HEB 161"}, {Section: "HEB 160", Material: "S999"}, {Section: "HEB 160", Material: "S355", From: 8, To: 2}} {
		p.Standard, p.Points = "elastic", 5
		if p.Material == "" {
			p.Material = "S355"
		}
		if _, err := chart.Resistance(p); err == nil {
			t.Errorf("%+v is drawn", p)
		}
	}
}

// TestTextGolden compares the plots with testdata; none is wider than it should
// be, and the table says the same as the CSV.
func TestTextGolden(t *testing.T) {
	r := check(post(`"EN 1993-1-1:2005"`, "4.8 m"))
	resistance, err := chart.Resistance(chart.Plain{Section: "HEB 160", Material: "S355", Standard: "EN 1993-1-1:2005", Points: 50})
	if err != nil {
		t.Fatal(err)
	}
	height, err := chart.Vary(r, named(t, r, "A1"), "height", chart.Range{Points: 50})
	if err != nil {
		t.Fatal(err)
	}
	interaction, err := chart.Interaction(named(t, r, "A1"))
	if err != nil {
		t.Fatal(err)
	}
	for name, c := range map[string]*chart.Chart{"resistance": resistance, "height": height, "interaction": interaction} {
		var table strings.Builder
		if err := c.CSV(&table); err != nil {
			t.Fatal(err)
		}
		if rows, err := csv.NewReader(strings.NewReader(table.String())).ReadAll(); err != nil || len(rows) < 20 {
			t.Errorf("%s: %d rows, %v", name, len(rows), err)
		}
		text := c.Text(72, 18)
		for _, l := range strings.Split(text, "\n") {
			if len([]rune(l)) > 72 {
				t.Errorf("%s: a line is %d wide: %s", name, len([]rune(l)), l)
			}
		}
		for suffix, got := range map[string]string{".txt": text, ".csv": table.String(), ".svg": c.Scene().SVG(0) + "\n"} {
			path := filepath.Join("testdata", name+suffix)
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
				t.Errorf("%s has changed (-update writes it):\n%s", path, got)
			}
		}
	}
}
