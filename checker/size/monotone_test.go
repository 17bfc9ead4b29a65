package size_test

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"kern/checker/catalogue"
	"kern/checker/model"
	"kern/checker/size"
	"kern/checker/standard"
)

// stand is a column that fails, of a section, a grade and a height, with lines
// of its own.
func stand(section, grade, height string, lines ...string) string {
	return fmt.Sprintf("basis {\n    standard \"EN 1993-1-1:2005\"\n}\n\ncolumn C {\n    section  = \"%s\"\n    material = \"%s\"\n    height   = %s\n    %s\n}\n",
		section, grade, height, strings.Join(lines, "\n    "))
}

// verdicts are the sections of a family by mass with whether the column passes.
func verdicts(t *testing.T, text, now, family string) (names []string, pass []bool) {
	t.Helper()
	type row struct {
		name string
		area float64
		ok   bool
	}
	var rows []row
	for _, e := range catalogue.All() {
		if e.Family != family || e.American() {
			continue
		}
		s, err := model.RolledSection(e)
		if err != nil {
			t.Fatal(err)
		}
		r := check(t, strings.Replace(text, `"`+now+`"`, `"`+e.Designation+`"`, 1)).Members[0]
		rows = append(rows, row{e.Designation, s.Area, r.Verdict == standard.Passes})
	}
	slices.SortStableFunc(rows, func(a, b row) int {
		switch {
		case a.area < b.area:
			return -1
		case a.area > b.area:
			return 1
		}
		return 0
	})
	for _, r := range rows {
		names, pass = append(names, r.name), append(pass, r.ok)
	}
	return names, pass
}

// TestHeavierFails has cases in which a heavier section of the same family fails
// where a lighter one passes, so that nothing may be skipped: slender against
// stocky (UB about the minor axis), a thickness at which the yield strength and
// the buckling curve step, and webs of class 4.
func TestHeavierFails(t *testing.T) {
	for _, c := range []struct{ name, section, family, text string }{
		{"narrow flanges", "UB 127x76x13", "UB", stand("UB 127x76x13", "S355", "5 m", "load 380 kN")},
		{"class 4 webs", "IPE 80", "IPE", stand("IPE 80", "S460", "1 m", "load 2100 kN")},
		{"strength by thickness", "HEB 100", "HEB", stand("HEB 100", "S355", "0.5 m", "load 5000 kN")},
		{"wide and thin", "UB 127x76x13", "UB", stand("UB 127x76x13", "S275", "2 m", "load 900 kN")},
	} {
		t.Run(c.name, func(t *testing.T) {
			names, pass := verdicts(t, c.text, c.section, c.family)
			first := slices.Index(pass, true)
			if first < 0 {
				t.Fatal("none passes")
			}
			jumps := 0
			for i := first; i+1 < len(pass); i++ {
				if pass[i] && !pass[i+1] {
					jumps++
				}
			}
			t.Logf("%s first, then %d times a heavier one that fails", names[first], jumps)
			if jumps == 0 && c.family == "UB" {
				t.Error("the case shows nothing: every heavier section passes")
			}
			report := check(t, c.text)
			found := ""
			for _, m := range size.Mends(report, report.Members[0], size.Options{Families: []string{c.family}, Kinds: []size.Kind{size.Section}}) {
				found = m.Change
			}
			if found != names[first] {
				t.Errorf("found '%s', the lightest is %s", found, names[first])
			}
		})
	}
}

// TestHeightAboveAHold: below the hold the member has no result, and the
// greatest height is found all the same.
func TestHeightAboveAHold(t *testing.T) {
	text := stand("HEB 100", "S235", "6 m", "hold minor at 2.5 m", "load 250 kN")
	report := check(t, text)
	for _, m := range size.Mends(report, report.Members[0], size.Options{Kinds: []size.Kind{size.Height}}) {
		if m.Value > 2.5 && m.Value < 6 {
			return
		}
	}
	t.Errorf("no greatest height in\n%s", text)
}

// TestRelief: a load that relieves another. Without it the member fails, so there
// is no value below which all pass, and none is offered.
func TestRelief(t *testing.T) {
	text := stand("HEB 100", "S235", "3 m", "load 30 kNm about major at top", "load 400 kN at top offset -160 mm about major")
	report := check(t, text)
	r := report.Members[0]
	if r.Verdict != standard.Fails {
		t.Fatalf("it %s", r.Verdict)
	}
	for _, m := range size.Mends(report, r, size.Options{Kinds: []size.Kind{size.Load}}) {
		if strings.Contains(m.Change, "offset") {
			t.Errorf("%s is offered", m.Change)
		}
	}
}

// TestNotOffered has members whose other data belong to what they have now.
func TestNotOffered(t *testing.T) {
	for _, c := range []struct {
		line string
		kind size.Kind
	}{
		{"net = 10 cm2", size.Section},
		{"joints 2 at base, 2 at top about major braced", size.Section},
		{"joints 2 at base, 2 at top about major braced", size.Height},
		{"lift base to 1 m { section = \"HEB 120\" }", size.Section},
	} {
		report := check(t, stand("HEB 100", "S235", "5 m", c.line, "load 400 kN"))
		if r := report.Members[0]; r.Verdict != standard.Fails {
			t.Errorf("%s: it %s: %v", c.line, r.Verdict, r.Missing)
		}
		if found := size.Mends(report, report.Members[0], size.Options{Kinds: []size.Kind{c.kind}}); len(found) > 0 {
			t.Errorf("%s: %s is offered", c.line, found[0].Change)
		}
	}
}
