package aisc360

import (
	"math"
	"testing"

	"kern/checker/catalogue"
	"kern/checker/model"
	"kern/checker/section"
)

// TestSelectionTable holds phi M_px, L_r and phi V_nx of rolled sections in A992 (F_y =
// 50 ksi) against the selection table of the Manual, 16th edition (Table 3-2, from
// memory), with the sections of the catalogue. Those of noncompact flanges are among
// them, and those whose webs have phi_v = 0.90.
func TestSelectionTable(t *testing.T) {
	for _, r := range []struct {
		name              string
		moment, lr, shear float64 // kip-ft, ft, kip
	}{
		{"W14X90", 574, 42.5, 185}, {"W14X99", 646, 45.3, 207}, {"W12X65", 356, 35.1, 142}, {"W10X12", 46.9, 8.05, 56.3},
		{"W8X31", 114, 24.8, 68.4}, {"W18X50", 379, 16.9, 192}, {"W10X33", 146, 21.8, 84.7}, {"W14X82", 521, 33.2, 219},
		{"W24X62", 574, 14.4, 306}, {"W16X26", 166, 11.2, 106}, {"W12X26", 140, 14.9, 84.2}, {"W36X150", 2180, 25.3, 673},
		{"W21X48", 398, 16.5, 216}, {"W24X55", 503, 13.9, 252},
	} {
		e, ok := catalogue.Find(r.name)
		if !ok {
			t.Errorf("%s is not in the catalogue", r.name)
			continue
		}
		p := post{shape: section.Shape{Kind: section.ISection, Made: section.Rolled, Depth: 10, Width: 10, Web: 1, Flange: 1, Root: 0.5}, fy: 50, height: 10}
		p.more = all(func(m *model.Member) {
			props, err := section.Compute(e.Shape)
			if err != nil {
				t.Fatal(err)
			}
			m.Section.Shape, m.Section.Properties = e.Shape, props
		}, push(model.Major, 10))
		v, _ := p.values(t, Standard{})
		for _, w := range []struct {
			symbol        string
			printed, unit float64
		}{{"phi_M_n_s_x", r.moment, kipft}, {"L_r", r.lr, foot}, {"phi_V_n_x", r.shear, kip}} {
			// properties of the outline and those of the tables differ by up to 0.5 %
			if got := v[w.symbol] / w.unit; !(math.Abs(got/w.printed-1) <= 0.0075) {
				t.Errorf("%s: %s = %.4g, printed %g (%+.2f %%)", r.name, w.symbol, got, w.printed, 100*(got/w.printed-1))
			}
		}
	}
}

// TestStrengthTables holds phi M_n and phi V_n of channels, HSS and pipes of the
// catalogue against what AISC Design Examples v16.0 print (F.2-1A, F.6, F.7A, F.8A,
// F.9A, G.2A, G.4; read in the source).
func TestStrengthTables(t *testing.T) {
	for _, r := range []struct {
		name, symbol      string
		fy, printed, unit float64 // ksi
	}{
		{"C15X33.9", "phi_M_n_s_x", 50, 191, kipft}, {"HSS3-1/2X3-1/2X1/8", "phi_M_n_s_x", 50, 7.20, kipft}, {"HSS10X6X3/16", "phi_M_n_s_x", 50, 59.7, kipft},
		{"HSS8X8X3/16", "phi_M_n_s_x", 50, 46.3, kipft}, {"PIPE8XS", "phi_M_n_s_x", 35, 81.4, kipft}, {"HSS6X4X3/8", "phi_V_n_x", 50, 93.6, kip}, {"C15X33.9", "phi_V_n_x", 50, 162, kip},
	} {
		e, ok := catalogue.Find(r.name)
		if !ok {
			t.Errorf("%s is not in the catalogue", r.name)
			continue
		}
		props, err := section.Compute(e.Shape)
		if err != nil {
			t.Fatal(err)
		}
		p := post{shape: section.Shape{Kind: section.Rod, Diameter: 4}, fy: r.fy, height: 10}
		p.more = all(func(m *model.Member) { m.Section.Shape, m.Section.Properties = e.Shape, props }, push(model.Major, 1))
		v, _ := p.values(t, Standard{})
		if got := v[r.symbol] / r.unit; !(math.Abs(got/r.printed-1) <= 0.0125) {
			t.Errorf("%s: %s = %.4g, printed %g (%+.2f %%)", r.name, r.symbol, got, r.printed, 100*(got/r.printed-1))
		}
	}
}
