package sheet_test

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/generate"
	"kern/checker/sheet"
	"kern/lang/unit"
)

// follow computes the steps of a chapter with nothing but what it says: the table
// of symbols, then each formula in turn with the values printed before it. It gives
// the last value.
func follow(t *testing.T, c *chapter, equations []string) (last float64) {
	t.Helper()
	known := map[string]unit.Quantity{}
	for _, table := range c.tables {
		if len(table[0]) < 3 || table[0][0] != "symbol" {
			continue
		}
		for _, row := range table[1:] {
			if row[2] == "not known" {
				continue
			}
			known[row[0]] = quantity(t, row[2], nil)
		}
	}
	last = math.NaN()
	for _, e := range equations {
		parts := strings.Split(e, " = ")
		symbol, result := parts[0], parts[len(parts)-1]
		if result == "not known" {
			delete(known, symbol)
			continue
		}
		want := quantity(t, result, nil)
		for i, middle := range parts[1 : len(parts)-1] {
			names := known
			if i > 0 || !strings.ContainsAny(middle, "abcdefghijklmnopqrstuvwxyzABCDEFGHIJKLMNOPQRSTUVWXYZ") {
				names = nil
			}
			got := quantity(t, middle, names)
			// five digits in, five digits out; a difference of nearly equal values
			// loses some of them
			if got.Dim != want.Dim || math.Abs(got.Value-want.Value) > 2e-3*math.Max(math.Abs(want.Value), 1e-3) {
				t.Errorf("%s: %s: %q comes to %g %v", c.title, symbol, middle, got.Value, got.Dim)
			}
		}
		known[symbol] = want
		last = want.Value
	}
	return last
}

// TestBlindReader works the governing utilisation of every member of the demo and
// of generated ones out again from the printed page alone: from the formulas as
// they are set in HTML, and from the words of the PDF.
func TestBlindReader(t *testing.T) {
	members, read := 0, 0
	for _, files := range []map[string]string{boathouse(t), generate.Project(8, 3), generate.BentProject(6, 9), american("LRFD"), american("ASD")} {
		m, p := readBlind(t, check(files))
		members, read = members+m, read+p
	}
	if members < 25 {
		t.Errorf("only %d members were worked out", members)
	}
	if read < 100 {
		t.Errorf("only %d formulas of the PDF were read", read)
	}
}

// american is a calculation to ANSI/AISC 360 in US units.
func american(method string) map[string]string {
	return map[string]string{"us.kern": `basis { standard "ANSI/AISC 360-22" by ` + method + `; show kip, ksi, in, kip-ft }
material a992 { E = 29000 ksi; fy = 50 ksi; fu = 65 ksi; density = 490 pcf }
section w = isection { depth = 10 in; width = 10 in; web = 0.34 in; flange = 0.56 in; root = 0.5 in; made = rolled }
column A1 "Post" { section = w; material = a992; height = 15 ft; load 150 kip; load 4 kip across major at 7.5 ft }
column A2 { section = w; material = a992; height = 15 ft; load 170 kip }
column A3 { section = tube { width = 5 in; wall = 0.25 in; made = cold }; material = a992; height = 12 ft; load 60 kip }
`}
}

func readBlind(t *testing.T, r *checker.Report) (members, read int) {
	t.Helper()
	want := jsonOf(t, r)
	fromPDF := map[string]bool{}
	for _, p := range pdfPages(t, printed(t, r, "pdf", sheet.Options{})) {
		for _, e := range p.read {
			fromPDF[e] = true
		}
	}
	for _, c := range chapters(parse(t, printed(t, r, "html", sheet.Options{}))) {
		name, _, _ := strings.Cut(c.title, ":")
		name, _, _ = strings.Cut(name, ",")
		m, ok := want[name]
		if !ok || len(c.equations) == 0 || m.Utilisation == nil {
			continue
		}
		got := follow(t, c, c.equations)
		if math.Abs(got-*m.Utilisation) > 2e-3*math.Max(*m.Utilisation, 0.05) && m.Governing != "slenderness" {
			t.Errorf("%s: the sheet comes to %g, the JSON has %g", name, got, *m.Utilisation)
		}
		members++
	}
	// the words of the PDF, without the formulas that HTML sets
	for e := range fromPDF {
		parts := strings.Split(e, " = ")
		if len(parts) < 4 || parts[len(parts)-1] == "not known" {
			continue
		}
		got, due := quantity(t, parts[len(parts)-2], nil), quantity(t, parts[len(parts)-1], nil)
		if got.Dim != due.Dim || math.Abs(got.Value-due.Value) > 2e-3*math.Max(math.Abs(due.Value), 1e-3) {
			t.Errorf("the PDF says %s", e)
		}
		read++
	}
	if members == 0 || read == 0 {
		t.Errorf("of %d members %d were worked out, %d formulas of the PDF read", len(r.Members), members, read)
	}
	return members, read
}

// TestBlindReaderOfPaper works members out again from the PDF alone: the rows of the
// tables of symbols, by where their words stand on the paper, and the formulas as
// they are read out.
func TestBlindReaderOfPaper(t *testing.T) {
	r := check(boathouse(t))
	want := jsonOf(t, r)
	for _, name := range []string{"H4", "P6", "B1", "W4", "M1"} {
		known := map[string]unit.Quantity{}
		got, steps := math.NaN(), 0
		for _, p := range pdfPages(t, printed(t, r, "pdf", sheet.Options{Members: []string{name}})) {
			from := math.NaN() // where the last column begins, in a table of symbols
			for i, w := range p.said {
				at := func(k int) float64 {
					x, err := strconv.ParseFloat(p.said[k].x, 64)
					if err != nil {
						t.Fatal(err)
					}
					return x
				}
				switch {
				case w.text == "symbol":
					for k := i; k < len(p.said) && p.said[k].y == w.y; k++ {
						if p.said[k].text == "from" {
							from = at(k)
						}
					}
				case (w.text == "check" || w.text == "combination") && at(i) < 70:
					from = math.NaN()
				case strings.Contains(w.text, " = "):
					parts := strings.Split(w.text, " = ")
					due := quantity(t, parts[len(parts)-1], nil)
					if len(parts) > 2 {
						x := quantity(t, parts[1], known)
						if x.Dim != due.Dim || math.Abs(x.Value-due.Value) > 2e-3*math.Max(math.Abs(due.Value), 1e-3) {
							t.Errorf("%s: %q comes to %g", name, w.text, x.Value)
						}
					}
					known[parts[0]], got = due, due.Value
					steps++
				case from > 0 && at(i) < 70: // the first word of a row
					value := ""
					for k := i + 1; k < len(p.said) && at(k) >= 70; k++ { // up to the next row
						if p.said[k].y != w.y || at(k) > from-1 {
							continue
						}
						word := ascii.Replace(p.said[k].text)
						if _, err := strconv.ParseFloat(word, 64); err == nil {
							value = word
						} else if value != "" {
							value += map[bool]string{true: "", false: " "}[strings.Contains(value, " ")] + word
						}
					}
					if value != "" {
						known[w.text] = quantity(t, value, nil)
					}
				}
			}
		}
		if due := *want[name].Utilisation; steps < 1 || math.Abs(got-due) > 2e-3*due {
			t.Errorf("%s: the paper comes to %g in %d steps, the JSON has %g", name, got, steps, due)
		}
	}
}
