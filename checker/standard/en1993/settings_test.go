package en1993

import (
	"fmt"
	"math"
	"os"
	"strings"
	"testing"

	"kern/checker/model"
	"kern/checker/section"
)

// TestNationalsAreWritten: the reference prints every national number with its
// source.
func TestNationalsAreWritten(t *testing.T) {
	page, err := os.ReadFile("../../../lang/README.md")
	if err != nil {
		t.Fatal(err)
	}
	rows := map[string]int{}
	for _, n := range (Standard{}).Nationals() {
		rows[n.Annex]++
		row := fmt.Sprintf("| %s | EN 1993-1-1 | %s | %s | %s |", n.Annex, n.What, n.Value, n.Source)
		if !strings.Contains(string(page), row+"\n") {
			t.Errorf("the reference lacks the row\n%s", row)
		}
	}
	for _, name := range (Standard{}).Annexes() {
		if rows[name] == 0 {
			t.Errorf("%s has no row with a source", name)
		}
	}
}

// TestSettings: what an annex chooses and what a basis chooses before it.
func TestSettings(t *testing.T) {
	for _, c := range []struct {
		annex, lateral, interaction string
		special, annexA, british    bool
		gammaM1                     float64
	}{
		{"", "", "", false, false, false, 1},
		{"recommended", "", "", false, false, false, 1},
		{"recommended", "rolled", "A", true, true, false, 1},
		{"recommended", "general", "B", false, false, false, 1},
		{"Germany", "", "", false, false, false, 1.1},
		{"Germany", "rolled", "A", true, true, false, 1.1},
		{"United Kingdom", "", "", true, false, true, 1},
		{"United Kingdom", "general", "A", false, true, true, 1},
	} {
		s := settingsOf(&model.Basis{Annex: c.annex, Lateral: model.Chosen{Word: c.lateral}, Interaction: model.Chosen{Word: c.interaction}})
		m0, _ := s.partial("gamma_M0", 1)
		m1, _ := s.partial("gamma_M1", 1)
		m2, _ := s.partial("gamma_M2", 1.25)
		if s.special != c.special || s.annexA != c.annexA || s.national.british != c.british || m0 != 1 || m1 != c.gammaM1 || m2 != 1.25 {
			t.Errorf("%+v: %+v, %v, %v, %v", c, s, m0, m1, m2)
		}
	}
}

// TestGermany: resistances to instability are those of the recommended values over
// 1.1, those of cross-sections are the same (own calculation).
func TestGermany(t *testing.T) {
	b := &beamColumn{specimen: shaped(t, section.Shape{Kind: section.ISection, Made: section.Rolled, Depth: 0.3, Width: 0.3, Web: 0.011, Flange: 0.019, Root: 0.027}, 235e6), ly: 4, lz: 4}
	b.force = 1e5
	base := b.check()
	b.annex = "Germany"
	german := b.check()
	for symbol, over := range map[string]float64{"N_b_y_Rd": 1.1, "N_b_z_Rd": 1.1, "N_c_Rd": 1} {
		x, ok1 := base.Value(symbol)
		y, ok2 := german.Value(symbol)
		if !ok1 || !ok2 || !(math.Abs(x.Value/y.Value/over-1) < 1e-12) {
			t.Errorf("%s: %v and %v", symbol, x.Value, y.Value)
		}
	}
	if !strings.Contains(strings.Join(german.Assumptions, "\n"), "gamma_M1 = 1.1 (annex Germany)") {
		t.Error(german.Assumptions)
	}
}
