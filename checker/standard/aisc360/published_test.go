package aisc360

import (
	"math"
	"testing"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/section"
	"kern/checker/standard"
)

// US customary units.
const (
	inch = 0.0254
	foot = 12 * inch
	kip  = 4448.2216152605
	ksi  = kip / (inch * inch)
)

// post is a column as published examples state it: in inches, kips and ksi, with
// the properties of the tables where they are given.
type post struct {
	shape          section.Shape // inches
	area, rx, ry   float64       // 0: from the outline
	j, cw          float64       // -1: from the outline
	x0, y0         float64       // NaN: from the outline
	fy, fu         float64
	height         float64 // ft
	lx, ly, kx, ky float64 // unbraced lengths (ft) and factors, 0 for the height and 1
	force          float64 // kip, negative for tension
	asd            bool
	overrides      map[string]float64
	more           func(m *model.Member) // what else the member has
}

func inches(s section.Shape) section.Shape {
	for _, v := range []*float64{&s.Depth, &s.Width, &s.Web, &s.Flange, &s.Wall, &s.Diameter, &s.Root, &s.Toe, &s.Gap, &s.OuterRadius, &s.InnerRadius} {
		*v *= inch
	}
	return s
}

func (p post) frame(t *testing.T) *standard.Frame {
	t.Helper()
	shape := inches(p.shape)
	props, err := section.Compute(shape)
	if err != nil {
		t.Fatal(err)
	}
	if p.area > 0 {
		props.Area = p.area * inch * inch
	}
	if p.rx > 0 {
		props.RMajor, props.RMinor = p.rx*inch, p.ry*inch
		props.IMajor, props.IMinor = props.Area*props.RMajor*props.RMajor, props.Area*props.RMinor*props.RMinor
	}
	if p.j > 0 {
		props.It, props.Iw = p.j*math.Pow(inch, 4), p.cw*math.Pow(inch, 6)
	}
	if p.x0 != 0 || p.y0 != 0 {
		props.SMajor, props.SMinor = p.x0*inch, p.y0*inch
	}
	basis := model.Basis{Standard: "ANSI/AISC 360-22", Method: "LRFD", Overrides: map[string]model.Override{}}
	if p.asd {
		basis.Method = "ASD"
	}
	for name, v := range p.overrides {
		basis.Overrides[name] = model.Override{Value: v, Because: "test"}
	}
	c := &model.Case{}
	c.Name = "load"
	env := &model.Env{Cases: []*model.Case{c}, Basis: basis}
	ends := [2]action.End{action.Pinned, action.Pinned}
	m := &model.Member{Name: "A1", Net: math.NaN(), Height: p.height * foot, Base: ends, Top: ends,
		Section:  &model.Section{Name: "section", Shape: shape, Properties: props, Thickness: max(shape.Web, shape.Flange, shape.Wall)},
		Material: &model.Material{Name: "steel", E: 29000 * ksi, G: 11200 * ksi, Density: 7850, Fy: p.fy * ksi, Fu: math.NaN()}}
	if p.fu > 0 {
		m.Material.Fu = p.fu * ksi
	}
	for a, l := range [2]float64{p.lx, p.ly} {
		k := [2]float64{p.kx, p.ky}[a]
		if l > 0 || k > 0 {
			if l == 0 {
				l = p.height
			}
			if k == 0 {
				k = 1
			}
			m.Factor[a] = k * l / p.height
		}
	}
	m.Loads = append(m.Loads, model.Load{Kind: model.AxialLoad, Value: p.force * kip, At: m.Height})
	if p.more != nil {
		p.more(m)
	}
	one := model.Combination{}
	one.Name, one.Factors = "load", []float64{1}
	return standard.NewFrame(env, m, []model.Combination{one})
}

// values are all steps of the member's derivation under their symbols: of a symbol
// that several checks compute, that of each check under RULE/SYMBOL too.
func (p post) values(t *testing.T, s Standard) (map[string]float64, *standard.Outcome) {
	t.Helper()
	return valuesOf(s, p.frame(t))
}

func valuesOf(s Standard, f *standard.Frame) (map[string]float64, *standard.Outcome) {
	record := &derivation.Record{Set: s.Symbols()}
	out := s.Check(f, record)
	v := map[string]float64{}
	for _, step := range record.Steps {
		if step.Note == "" {
			name := s.Symbols().At(step.Symbol).Name
			v[name] = step.Value
			v[step.Group+"/"+name] = step.Value
		}
	}
	return v, out
}

func verdict(out *standard.Outcome, rule string) (standard.Check, bool) {
	for _, c := range out.Checks {
		if c.Rule == rule {
			return c, true
		}
	}
	return standard.Check{}, false
}

func state(out *standard.Outcome, rule string) standard.State {
	for _, c := range out.Coverage {
		if c.Rule == rule {
			return c.State
		}
	}
	return standard.State(99)
}

type row struct {
	symbol        string
	printed, unit float64
	within        float64 // relative; 0 for 0.6 %, three significant figures rounded on the way
}

const (
	fbx = "flexural-buckling-major/"
	fby = "flexural-buckling-minor/"
	ftb = "flexural-torsional-buckling/"
	tb  = "torsional-buckling/"
)

// TestPublishedExamples holds the worked examples of AISC Design Examples v16.0
// (companion to the Manual, 16th edition; standard ANSI/AISC 360-22), as far as
// they were read in the source. Section properties are those that the source
// prints, as its tables round them.
func TestPublishedExamples(t *testing.T) {
	w16x31 := section.Shape{Kind: section.ISection, Made: section.Rolled, Depth: 15.9, Width: 5.53, Web: 0.275, Flange: 0.44, Root: 0.41}
	hss := section.Shape{Kind: section.Tube, Made: section.Cold, Depth: 12, Width: 8, Wall: 0.174, OuterRadius: 0.348, InnerRadius: 0.174}
	w14x82 := section.Shape{Kind: section.ISection, Made: section.Rolled, Depth: 14.3, Width: 10.1, Web: 0.51, Flange: 0.855, Root: 0.59}
	built := section.Shape{Kind: section.ISection, Made: section.Welded, Depth: 17, Width: 8, Web: 0.25, Flange: 1}
	for _, c := range []struct {
		name string
		post
		lrfd, asd []row
	}{
		{"E.1 W14x132, 30 ft", post{shape: section.Shape{Kind: section.ISection, Made: section.Rolled, Depth: 14.7, Width: 14.7, Web: 0.645, Flange: 1.03, Root: 0.6},
			area: 38.8, rx: 6.28, ry: 3.76, fy: 50, height: 30, force: 840},
			[]row{{"slenderness_y", 95.7, 1, 0}, {"lambda_r_f", 13.5, 1, 0}, {"lambda_r_w", 35.9, 1, 0}, {"phi_P_n", 893, kip, 0}},
			[]row{{"P_n_over_Omega", 594, kip, 0}}},
		{"E.1E W16x31, 5 ft", post{shape: w16x31, area: 9.13, rx: 6.41, ry: 1.17, fy: 50, height: 5, force: 100},
			[]row{{"slenderness_y", 51.3, 1, 0}, {"F_e_y", 109, ksi, 0}, {"F_n_y", 41.3, ksi, 0}, {fby + "lambda_e_w", 39.5, 1, 0}, {fby + "F_el_w", 41.5, ksi, 0},
				{fby + "h_e", 11.7, inch, 0}, {fby + "A_e", 8.44, inch * inch, 0}, {"P_n_y", 349, kip, 0}, {"phi_P_n_y", 314, kip, 0}},
			[]row{{"P_n_y_over_Omega", 209, kip, 0}}},
		{"E.1E W16x31, 10 ft", post{shape: w16x31, area: 9.13, rx: 6.41, ry: 1.17, fy: 50, height: 10, force: 100},
			[]row{{"F_e_y", 27.0, ksi, 0.012}, {"F_n_y", 23.0, ksi, 0.012}, {fby + "lambda_e_w", 52.9, 1, 0}, {"P_n_y", 210, kip, 0.012}, {"phi_P_n_y", 189, kip, 0.012}},
			[]row{{"P_n_y_over_Omega", 126, kip, 0.012}}},
		{"E.1E W16x31, 15 ft", post{shape: w16x31, area: 9.13, rx: 6.41, ry: 1.17, fy: 50, height: 15, force: 50},
			[]row{{"F_n_y", 10.6, ksi, 0}, {"P_n_y", 96.8, kip, 0}, {"phi_P_n_y", 87.1, kip, 0}},
			[]row{{"P_n_y_over_Omega", 58.0, kip, 0}}},
		{"E.2 built-up, slender web", post{shape: built, j: 5.41, cw: 5470, fy: 50, height: 15, force: 420},
			[]row{{"A_g", 19.8, inch * inch, 0}, {"I_y", 85.4, math.Pow(inch, 4), 0}, {"r_y", 2.08, inch, 0}, {"slenderness_y", 86.5, 1, 0}, {"F_e_y", 38.3, ksi, 0},
				{"F_e_T", 91.9, ksi, 0}, {"F_n_y", 28.9, ksi, 0}, {"k_c", 0.516, 1, 0}, {"lambda_r_f", 11.1, 1, 0}, {fby + "lambda_e_w", 47.2, 1, 0},
				{fby + "F_el_w", 30.7, ksi, 0}, {fby + "h_e", 12.6, inch, 0}, {fby + "A_e", 19.2, inch * inch, 0}, {"P_n", 555, kip, 0}, {"phi_P_n", 500, kip, 0}},
			[]row{{"P_n_over_Omega", 332, kip, 0}}},
		{"E.3 built-up, slender flanges", post{shape: section.Shape{Kind: section.ISection, Made: section.Welded, Depth: 8, Width: 10.5, Web: 0.25, Flange: 0.375}, j: 0.407, cw: 1050, fy: 50, height: 15, force: 240},
			[]row{{"A_g", 9.69, inch * inch, 0}, {"r_y", 2.73, inch, 0}, {"I_x", 122, math.Pow(inch, 4), 0}, {"lambda_c_w", 29.0, 1, 0}, {"k_c", 0.743, 1, 0}, {"lambda_r_f", 13.3, 1, 0}, {"lambda_c_f", 14.0, 1, 0},
				{"slenderness_y", 65.9, 1, 0}, {"F_e_y", 65.9, ksi, 0}, {"F_e_T", 71.2, ksi, 0}, {"F_n_y", 36.4, ksi, 0}, {fby + "lambda_e_f", 15.6, 1, 0}, {"P_n", 353, kip, 0}, {"phi_P_n", 318, kip, 0}},
			[]row{{"P_n_over_Omega", 211, kip, 0}}},
		{"E.8 WT7x15", post{shape: section.Shape{Kind: section.Tee, Made: section.Rolled, Depth: 6.92, Width: 6.73, Web: 0.27, Flange: 0.385, Root: 0.4},
			area: 4.42, rx: 2.07, ry: 1.49, y0: 1.39, j: 0.190, cw: 0, fy: 50, height: 20, force: 36},
			[]row{{"lambda_c_s", 25.6, 1, 0}, {"lambda_r_s", 18.1, 1, 0}, {"lambda_c_f", 8.74, 1, 0}, {"slenderness_x", 116, 1, 0}, {"slenderness_y", 161, 1, 0}, {"F_e_x", 21.3, ksi, 0.006}, {"H", 0.771, 1, 0},
				{"F_e_z", 57.0, ksi, 0}, {"F_e_T", 10.5, ksi, 0}, {"F_n_T", 9.21, ksi, 0}, {ftb + "lambda_e_s", 42.2, 1, 0}, {"P_n", 40.7, kip, 0}, {"phi_P_n", 36.6, kip, 0}, {"phi_P_n_x", 74.3, kip, 0}},
			[]row{{"P_n_over_Omega", 24.4, kip, 0}, {"P_n_x_over_Omega", 49.4, kip, 0}}},
		{"E.7 WT7x34", post{shape: section.Shape{Kind: section.Tee, Made: section.Rolled, Depth: 7.02, Width: 10.035, Web: 0.415, Flange: 0.72, Root: 0.6},
			area: 10.0, rx: 2.46, ry: 1.81, x0: 0.93, j: 1.50, cw: 0, fy: 50, height: 20, force: 120},
			// kern's major axis of this tee is its axis of symmetry, y–y in the source
			[]row{{"slenderness_y", 133, 1, 0}, {"F_e_y", 16.2, ksi, 0}, {ftb + "slenderness_x", 97.6, 1, 0}, {ftb + "F_e_x", 30.0, ksi, 0}, {"F_e_z", 165, ksi, 0},
				{"H", 0.915, 1, 0}, {"F_e_T", 29.5, ksi, 0}, {"F_n_y", 14.2, ksi, 0}, {"P_n", 142, kip, 0}, {"phi_P_n", 128, kip, 0}, {"phi_P_n_T", 222, kip, 0}},
			[]row{{"P_n_over_Omega", 85.0, kip, 0}, {"P_n_T_over_Omega", 147, kip, 0}}},
		{"E.9 HSS12x10x3/8, fixed and pinned", post{shape: section.Shape{Kind: section.Tube, Made: section.Cold, Depth: 12, Width: 10, Wall: 0.349, OuterRadius: 0.698, InnerRadius: 0.349},
			area: 14.6, rx: 4.61, ry: 4.01, fy: 50, height: 20, kx: 0.8, ky: 0.8, force: 510},
			[]row{{"lambda_r_h", 33.7, 1, 0}, {"lambda_c_h", 31.4, 1, 0}, {"lambda_c_b", 25.7, 1, 0}, {"slenderness_y", 47.9, 1, 0}, {"F_e_y", 125, ksi, 0}, {"F_n_y", 42.3, ksi, 0},
				{"P_n", 618, kip, 0}, {"phi_P_n", 556, kip, 0}},
			[]row{{"P_n_over_Omega", 370, kip, 0}}},
		{"E.10 HSS12x8x3/16, 18 ft", post{shape: hss, area: 6.76, rx: 4.56, ry: 3.35, fy: 50, height: 18, force: 100},
			[]row{{"F_n_y", 36.9, ksi, 0}, {fby + "lambda_e_b", 39.2, 1, 0}, {fby + "F_el_b", 58.5, ksi, 0}, {fby + "b_lie_e", 7.05, inch, 0}, {fby + "F_el_h", 24.8, ksi, 0},
				{fby + "h_up_e", 7.88, inch, 0}, {fby + "A_e", 5.35, inch * inch, 0}, {"P_n", 197, kip, 0}, {"phi_P_n", 177, kip, 0}},
			[]row{{"P_n_over_Omega", 118, kip, 0}}},
		{"E.10 HSS12x8x3/16, 24 ft", post{shape: hss, area: 6.76, rx: 4.56, ry: 3.35, fy: 50, height: 24, force: 100},
			[]row{{"F_n_y", 29.1, ksi, 0}, {fby + "h_up_e", 8.66, inch, 0}, {fby + "A_e", 5.77, inch * inch, 0}, {"P_n", 168, kip, 0}, {"phi_P_n", 151, kip, 0}},
			[]row{{"P_n_over_Omega", 101, kip, 0}}},
		{"E.10 HSS12x8x3/16, 40 ft", post{shape: hss, area: 6.76, rx: 4.56, ry: 3.35, fy: 50, height: 40, force: 50},
			[]row{{"F_n_y", 12.3, ksi, 0}, {fby + "A_e", 6.76, inch * inch, 0}, {"P_n", 83.1, kip, 0}, {"phi_P_n", 74.8, kip, 0}},
			[]row{{"P_n_over_Omega", 49.8, kip, 0.0065}}},
		{"E.11 Pipe 10 Std", post{shape: section.Shape{Kind: section.Pipe, Made: section.Hot, Diameter: 10.75, Wall: 0.34},
			area: 11.5, rx: 3.68, ry: 3.68, fy: 35, height: 30, lx: 30, ly: 15, force: 210},
			[]row{{"lambda_r_D", 91.1, 1, 0}, {"lambda_c_D", 31.6, 1, 0}, {"slenderness_x", 97.8, 1, 0}, {"F_e_x", 29.9, ksi, 0}, {"F_n_x", 21.4, ksi, 0}, {"P_n", 246, kip, 0}, {"phi_P_n", 221, kip, 0}},
			[]row{{"P_n_over_Omega", 147, kip, 0}}},
		// r_a from the outline, 0.826 against the printed 0.824; the source rounds L_c/r up
		{"E.14A L5x3x1/2 by its long leg", post{shape: section.Shape{Kind: section.Angle, Made: section.Rolled, Depth: 5, Width: 3, Wall: 0.5, Root: 0.4375, Toe: 0.25},
			fy: 50, height: 5, force: 30, more: func(m *model.Member) { m.Leg.Long = true }},
			[]row{{"slenderness_y", 127, 1, 0}, {"r_a", 0.824, inch, 0.01}, {"F_e_y", 17.7, ksi, 0.012}, {"F_n_y", 15.5, ksi, 0.012}, {"bt_E4", 17.1, 1, 0}, {"P_n", 58.1, kip, 0.012}, {"phi_P_n", 52.3, kip, 0.012}},
			[]row{{"P_n_over_Omega", 34.8, kip, 0.012}}},
		// kern's major axis of both pairs is the source's y–y, the axis of symmetry
		{"E.5 2L4x3-1/2x3/8 LLBB", post{shape: section.Shape{Kind: section.DoubleAngle, Made: section.Rolled, Depth: 4, Width: 3.5, Wall: 0.375, Gap: 0.75, Root: 0.3125, Toe: 0.1875},
			area: 5.36, rx: 1.69, ry: 1.25, j: 0.264, cw: 0, fy: 50, height: 8, force: 120, more: func(m *model.Member) { m.Connectors = model.Connectors{Every: 32 * inch, Kind: "welded"} }},
			[]row{{"lambda_c_1", 10.7, 1, 0}, {"lambda_r_1", 10.8, 1, 0}, {"slenderness_y", 76.8, 1, 0}, {"F_e_y", 48.5, ksi, 0}, {"slenderness_o_x", 56.8, 1, 0}, {"a_over_r_i", 44.5, 1, 0},
				{"slenderness_x", 61.0, 1, 0}, {"F_e_x", 76.9, ksi, 0}, {"r_o", 2.33, inch, 0}, {"H", 0.813, 1, 0}, {"F_e_z", 102, ksi, 0}, {"F_e_T", 60.5, ksi, 0},
				{"F_n_y", 32.5, ksi, 0}, {"P_n", 174, kip, 0}, {"phi_P_n", 157, kip, 0}, {"u_a", 44.5 / (0.75 * 76.8), 1, 0}},
			[]row{{"P_n_over_Omega", 104, kip, 0}}},
		{"E.6 2L5x3x1/4 LLBB", post{shape: section.Shape{Kind: section.DoubleAngle, Made: section.Rolled, Depth: 5, Width: 3, Wall: 0.25, Gap: 0.75, Root: 0.3125, Toe: 0.1875},
			area: 3.88, rx: 1.62, ry: 1.33, j: 0.0876, cw: 0, fy: 50, height: 8, force: 60, more: func(m *model.Member) { m.Connectors = model.Connectors{Every: 32 * inch, Kind: "welded"} }},
			[]row{{"slenderness_x", 59.3, 1, 0}, {"F_e_x", 81.4, ksi, 0}, {"slenderness_o_y", 72.2, 1, 0}, {"slenderness_y", 76.3, 1, 0}, {"F_e_y", 49.2, ksi, 0}, {"r_o", 2.59, inch, 0},
				{"H", 0.657, 1, 0.01}, {"F_e_z", 37.8, ksi, 0.01}, {"F_e_T", 26.8, ksi, 0.01}, {"F_n_T", 22.9, ksi, 0.01}, {ftb + "lambda_e_1", 16.0, 1, 0}, {ftb + "F_el_1", 32.4, ksi, 0.007},
				{ftb + "b_1_e", 4.39, inch, 0}, {ftb + "A_e", 3.58, inch * inch, 0}, {"P_n", 82.0, kip, 0.01}, {"phi_P_n", 73.8, kip, 0.01}},
			[]row{{"P_n_over_Omega", 49.1, kip, 0.01}}},
		// the source reads K = 1.5 and 2.0 off the chart and enters a table at 9 and 11.5 ft
		// about y–y; the chart's equations give 1.459 and 2.033
		{"E.4A W14x82, storey BC", post{shape: w14x82, area: 24.0, rx: 6.05, ry: 2.48, fy: 50, height: 14, ky: 0.01, force: 100,
			more: func(m *model.Member) { m.Joints[0] = &action.Joints{Top: 1.38, Base: 1.63, Sway: true} }},
			[]row{{"K_x", 1.5, 1, 0.034}, {"chart_x", 1, 1, 1e-9}, {"phi_P_n_x", 940, kip, 0.02}}, []row{{"P_n_x_over_Omega", 626, kip, 0.02}}},
		{"E.4B W14x82, storey AB, pinned base", post{shape: w14x82, area: 24.0, rx: 6.05, ry: 2.48, fy: 50, height: 14, ky: 0.01, force: 100,
			more: func(m *model.Member) { m.Joints[0] = &action.Joints{Top: 1.62, Base: 10, Sway: true} }},
			[]row{{"K_x", 2.0, 1, 0.025}, {"phi_P_n_x", 861, kip, 0.01}}, []row{{"P_n_x_over_Omega", 573, kip, 0.01}}},
		{"H.1 W14x99, axial strength", post{shape: section.Shape{Kind: section.ISection, Made: section.Rolled, Depth: 14.2, Width: 14.6, Web: 0.485, Flange: 0.78, Root: 0.6},
			area: 29.1, rx: 6.17, ry: 3.71, fy: 50, height: 14, force: 400},
			[]row{{"phi_P_n", 1130, kip, 0}}, []row{{"P_n_over_Omega", 750, kip, 0}}},
	} {
		for i, rows := range [][]row{c.lrfd, c.asd} {
			p := c.post
			p.asd = i == 1
			v, _ := p.values(t, Standard{})
			for _, r := range rows {
				within := r.within
				if within == 0 {
					within = 0.006
				}
				if got := v[r.symbol] / r.unit; !(math.Abs(got/r.printed-1) <= within) {
					t.Errorf("%s: %s = %.4g, printed %g", c.name, r.symbol, got, r.printed)
				}
			}
		}
	}
}

// TestPublishedTension holds the worked examples D.1 to D.3 of AISC Design Examples
// v16.0, read in the source.
func TestPublishedTension(t *testing.T) {
	w8x21 := section.Shape{Kind: section.ISection, Made: section.Rolled, Depth: 8.28, Width: 5.27, Web: 0.25, Flange: 0.4, Root: 0.3}
	l4 := section.Shape{Kind: section.Angle, Made: section.Rolled, Depth: 4, Width: 4, Wall: 0.5, Root: 0.375, Toe: 0.25}
	wt6x20 := section.Shape{Kind: section.Tee, Made: section.Rolled, Depth: 5.97, Width: 8.01, Web: 0.295, Flange: 0.515, Root: 0.5}
	for _, c := range []struct {
		name                                string
		shape                               section.Shape
		area, rx, ry, height, force, net, u float64
		rows                                []row // LRFD
		yield, rupture                      float64
	}{
		{"D.1 W8x21", w8x21, 6.16, 3.49, 1.26, 25, 180, 4.76, 0.908, []row{{"A_e_t", 4.32, inch * inch, 0}, {"P_n_R", 281, kip, 0}, {"phi_P_n_Y", 277, kip, 0}, {"phi_P_n_R", 211, kip, 0}}, 184, 141},
		{"D.2 L4x4x1/2", l4, 3.75, 1.54, 0.776, 10, 120, 3.31, 0.869, []row{{"P_n_Y", 188, kip, 0}, {"phi_P_n_Y", 169, kip, 0}, {"A_e_t", 2.88, inch * inch, 0}, {"P_n_R", 187, kip, 0}, {"phi_P_n_R", 140, kip, 0}}, 113, 93.5},
		{"D.3 WT6x20", wt6x20, 5.84, 1.94, 1.57, 30, 240, 5.84, 0.860, []row{{"phi_P_n_Y", 263, kip, 0}, {"A_e_t", 5.02, inch * inch, 0}, {"P_n_R", 326, kip, 0}, {"phi_P_n_R", 245, kip, 0}}, 175, 163},
	} {
		p := post{shape: c.shape, area: c.area, rx: c.rx, ry: c.ry, fy: 50, fu: 65, height: c.height, force: -c.force, overrides: map[string]float64{"U": c.u},
			more: func(m *model.Member) { m.Net = c.net * inch * inch }}
		v, out := p.values(t, Standard{})
		for _, r := range c.rows {
			if got := v[r.symbol] / r.unit; !(math.Abs(got/r.printed-1) <= 0.006) {
				t.Errorf("%s: %s = %.4g, printed %g", c.name, r.symbol, got, r.printed)
			}
		}
		for rule, capacity := range map[string]string{"section-tension": "phi_P_n_Y", "net-section": "phi_P_n_R"} {
			if check, ok := verdict(out, rule); !ok || check.Capacity != v[capacity] || check.Verdict != standard.Passes {
				t.Errorf("%s: %s %+v, strength %g", c.name, rule, check, v[capacity])
			}
		}
		p.asd = true // D.2 divides 188, rounded from 187.5
		v, _ = p.values(t, Edition2016)
		if y, r := v["P_n_Y_over_Omega"]/kip, v["P_n_R_over_Omega"]/kip; !(math.Abs(y/c.yield-1) <= 0.007 && math.Abs(r/c.rupture-1) <= 0.006) {
			t.Errorf("%s by ASD: %.4g and %.4g, printed %g and %g", c.name, y, r, c.yield, c.rupture)
		}
	}
}

// TestCriticalStress holds the nominal and available stresses of E3 against
// printed values by slenderness, for a solid bar whose radius of gyration makes
// the slenderness. Those of AISC Design Examples v16.0 were read in the source; the
// others are as their comment says.
func TestCriticalStress(t *testing.T) {
	for _, c := range []struct {
		fy, slenderness, printed float64
		symbol                   string
	}{
		{50, 95.7, 23.0, "phi"}, {50, 95.7, 15.4, "omega"}, {50, 58.6, 38.9, "F"}, {50, 51.3, 41.3, "F"}, {50, 103, 23.0, "F"}, {50, 154, 10.6, "F"},
		{50, 47.9, 42.3, "F"}, {50, 86.0, 29.1, "F"}, {50, 86.5, 28.9, "F"}, {50, 65.9, 36.4, "F"}, {50, 85.0, 29.5, "F"}, {50, 127, 15.5, "F"},
		{50, 133, 14.2, "F"}, {50, 69.5, 35.1, "F"}, {35, 97.8, 21.4, "F"},
		{50, 87.43, 28.59, "F"},                                // a textbook problem, WT12x81, read in the source
		{50, 96.77, 25.21, "F"},                                // Segui, Steel Design, Example 4.2, from memory
		{50, 54.55, 36.24, "phi"}, {50, 54.55, 24.09, "omega"}, // Segui and Manual Table 4-14, from memory
		// the Manual's table of stresses, from memory: plateau, middle, elastic end
		{36, 0, 32.4, "phi"}, {36, 0, 21.6, "omega"}, {36, 200, 5.65, "phi"}, {42, 0, 37.8, "phi"}, {46, 0, 41.4, "phi"},
		{50, 0, 45.0, "phi"}, {50, 0, 29.9, "omega"}, {50, 200, 5.65, "phi"}, {50, 100, 21.7, "phi"}, {50, 100, 14.4, "omega"},
	} {
		slenderness := max(c.slenderness, 1e-3)
		r := 1.0
		p := post{shape: section.Shape{Kind: section.Rod, Diameter: 4}, area: 1, rx: 2 * r, ry: r, fy: c.fy, height: slenderness / 12, force: 1, asd: c.symbol == "omega"}
		v, _ := p.values(t, Standard{})
		symbol := map[string]string{"F": "F_n_y", "phi": "phi_P_n_y", "omega": "P_n_y_over_Omega"}[c.symbol]
		unit := ksi // the area is one square inch
		if c.symbol != "F" {
			unit = kip
		}
		if got := v[symbol] / unit; !(math.Abs(got/c.printed-1) <= 0.006 || math.Abs(got-c.printed) <= 0.051) {
			t.Errorf("F_y = %g ksi, L_c/r = %g: %s = %.4g, printed %g", c.fy, c.slenderness, symbol, got, c.printed)
		}
	}
}

// TestColumnTables holds available strengths against printed column tables: the
// first four by LRFD from the load tables for W14 sections of an earlier manual (F_y
// 36 and 50 ksi, phi_c = 0.85 at the time), the others by ASD from a producer's tables of heavy
// columns (A992/A913 Grade 50); three significant figures. Area and radius of
// gyration are those printed with the tables.
func TestColumnTables(t *testing.T) {
	for _, c := range []struct {
		name         string
		area, ry, fy float64
		asd          bool
		rows         [][2]float64 // KL in feet, strength in kips
	}{
		{"W14x730", 215, 4.69, 36, false, [][2]float64{{11, 6310}, {20, 5730}, {30, 4820}, {40, 3790}, {50, 2780}}},
		{"W14x730", 215, 4.69, 50, false, [][2]float64{{11, 8620}, {20, 7550}, {30, 5940}, {40, 4250}, {50, 2800}}},
		{"W14x665", 196, 4.62, 36, false, [][2]float64{{11, 5750}, {20, 5200}, {30, 4360}, {40, 3400}, {50, 2470}}},
		{"W14x665", 196, 4.62, 50, false, [][2]float64{{11, 7850}, {20, 6840}, {30, 5340}, {40, 3780}, {50, 2480}}},
		{"W14x605", 178, 4.55, 36, false, [][2]float64{{11, 5210}, {20, 4700}, {30, 3920}, {40, 3030}, {50, 2180}}},
		{"W14x605", 178, 4.55, 50, false, [][2]float64{{11, 7110}, {20, 6170}, {30, 4790}, {40, 3350}, {50, 2180}}},
		{"W14x550", 162, 4.49, 36, false, [][2]float64{{11, 4740}, {20, 4260}, {30, 3530}, {40, 2720}, {50, 1940}}},
		{"W14x550", 162, 4.49, 50, false, [][2]float64{{11, 6460}, {20, 5590}, {30, 4300}, {40, 2990}, {50, 1940}}},
		{"W14x873", 257, 4.9, 50, true, [][2]float64{{11, 7300}, {12, 7220}, {13, 7140}, {14, 7060}, {15, 6970}, {16, 6880}, {17, 6780}, {18, 6680}, {19, 6570}, {20, 6460}, {22, 6220}, {24, 5980}, {26, 5720}, {28, 5460}, {30, 5190}, {32, 4910}, {34, 4630}, {36, 4360}, {38, 4080}, {40, 3810}, {42, 3550}, {44, 3290}, {46, 3040}, {48, 2800}, {50, 2580}}},
		{"W14x808", 238, 4.83, 50, true, [][2]float64{{11, 6750}, {20, 5950}, {30, 4750}, {40, 3460}, {50, 2320}}},
		{"W21x275", 81.0, 3.12, 50, true, [][2]float64{{11, 2130}, {20, 1570}, {30, 916}, {40, 515}}},
	} {
		for _, r := range c.rows {
			p := post{shape: section.Shape{Kind: section.Rod, Diameter: 4}, area: c.area, rx: c.ry, ry: c.ry, fy: c.fy, height: r[0], force: 1, asd: c.asd}
			v, _ := p.values(t, Standard{})
			got := 0.85 * v["P_n"]
			if c.asd {
				got = v["P_n_over_Omega"]
			}
			// 3 figures, and ry printed with 3
			if got /= kip; !(math.Abs(got/r[1]-1) <= 0.003) {
				t.Errorf("%s, F_y = %g ksi, KL = %g ft: %.5g kip, printed %g", c.name, c.fy, r[0], got, r[1])
			}
		}
	}
}

// TestStressForm holds F_n of E3 for F_y 36, 42, 46 and 50 ksi against the form in
// which earlier editions write it, by the slenderness parameter lambda_c =
// (KL/r)/pi sqrt(F_y/E): 0.658^(lambda_c^2) F_y up to 1.5, then 0.877/lambda_c^2 F_y.
func TestStressForm(t *testing.T) {
	for _, fy := range []float64{36, 42, 46, 50} {
		for kl := 1.0; kl <= 200; kl++ {
			lambda := kl / math.Pi * math.Sqrt(fy/29000)
			want := math.Pow(0.658, lambda*lambda) * fy
			if lambda > 1.5 {
				want = 0.877 / (lambda * lambda) * fy
			}
			p := post{shape: section.Shape{Kind: section.Rod, Diameter: 4}, area: 1, rx: 1, ry: 1, fy: fy, height: kl / 12, force: 1}
			v, _ := p.values(t, Edition2016)
			if got := v["F_cr_y"] / ksi; !(math.Abs(got/want-1) <= 1e-12) {
				t.Errorf("F_y = %g ksi, KL/r = %g: %.6g, want %.6g", fy, kl, got, want)
			}
		}
	}
}
