package checker_test

import (
	"math"
	"testing"

	"kern/checker/standard"
)

// TestJoints holds what the stiffness ratios of joints bring about in every
// standard: the factor of the chart (about 1.48 by its equation for 1.2 and 2.0 with
// sway), and to EN 1993-1-1 the moment factor 0.9 of members whose ends can move
// sideways (Annex B, Table B.3).
func TestJoints(t *testing.T) {
	const column = `
column A1 { section = "HEB 200"; material = "S355"; height = 4 m; load 300 kN; load 20 kNm about major at top
    joints 1.2 at base, 2.0 at top about major sway }
column A2 { section = "HEB 200"; material = "S355"; height = 4 m; load 300 kN; load 20 kNm about major at top
    joints 1.2 at base, 2.0 at top about major braced }
column A3 { section = "HEB 200"; material = "S355"; height = 4 m; load 300 kN; load 20 kNm about major at top; effective = 1.479 about major }
`
	for _, c := range []struct {
		basis, k, n string // the names of the factor and of the critical force
	}{
		{`"EN 1993-1-1:2005"`, "K_y", "N_cr_y"}, {`"elastic"`, "K_major", "P_cr_major"}, {`"ANSI/AISC 360-22" by LRFD; B_2 = 1.1 because "story"`, "K_x", "P_e_x"},
	} {
		value := map[string]map[string]float64{}
		for _, m := range derivedReport(t, "basis { standard "+c.basis+"; selfweight off }"+column, true) {
			v := map[string]float64{}
			record := m.Derive()
			for _, s := range record.Steps {
				if s.Note == "" {
					v[record.Set.At(s.Symbol).Name] = s.Value
				}
			}
			value[m.Name] = v
		}
		if k := value["A1"][c.k]; !(math.Abs(k-1.479) <= 1e-3) {
			t.Errorf("%s: K = %g with sway, want 1.479", c.basis, k)
		}
		if k := value["A2"][c.k]; !(k > 0.7 && k < 1) {
			t.Errorf("%s: K = %g without sway", c.basis, k)
		}
		if a, b := value["A1"][c.n], value["A3"][c.n]; !(math.Abs(a/b-1) <= 2e-3) {
			t.Errorf("%s: critical force %g, with the stated factor %g", c.basis, a, b)
		}
		if c.k == "K_y" {
			if a, b := value["A1"]["C_my"], value["A3"]["C_my"]; a != 0.9 || b == 0.9 {
				t.Errorf("C_my = %g with sway, %g without", a, b)
			}
		}
	}
}

// TestNotionalLoads: by direct analysis a column that can sway is undecided until it
// carries the forces of a sway imperfection; a frame's is not its own.
func TestNotionalLoads(t *testing.T) {
	const column = `
column A1 { section = "HEB 200"; material = "S355"; height = 4 m; base fixed; top free; load 80 kN }
column A2 as A1 { imperfection on }
column A3 { section = "HEB 200"; material = "S355"; height = 4 m; load 80 kN; imperfection on; joints 1 at base, 2 at top about major sway }
column A4 { section = "HEB 200"; material = "S355"; height = 4 m; load 80 kN }
`
	for _, m := range derivedReport(t, `basis { standard "ANSI/AISC 360-22" by LRFD; stability direct; B_2 = 1.1 because "story" }`+column, true) {
		want := map[string]standard.State{"A1": standard.NotCovered, "A2": standard.Checked, "A3": standard.NotCovered, "A4": standard.Checked}[m.Name]
		for _, c := range m.Coverage {
			if c.Rule == "frame-stability" && c.State != want {
				t.Errorf("%s: frame-stability is %s, want %s", m.Name, c.State, want)
			}
		}
		if decided := m.Verdict != standard.Undecided; decided != (want == standard.Checked) {
			t.Errorf("%s %s", m.Name, m.Verdict)
		}
	}
}
