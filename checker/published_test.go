package checker_test

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// Worked examples and tables that others have published, as calculations in the
// language. The figures are theirs, the texts are not. "SEEN" was read in the
// source, "MEMORY" was recalled and holds less.
//
// Published cases that no test here uses, because kern does not yet make the
// check:
//
//	EU-16                      its part in bending, to ENV 1993-1-1
//	EU-11                      stainless steel, EN 1993-1-4
//	US-01 to US-29             AISC 360
//	E-03                       inelastic buckling
//	E-06 to E-10               own weight, springs, steps, tapers, foundations:
//	                           those that apply are in package action
//	LC-01, C-01, C-02          combinations and reduction of imposed loads: LC-01
//	                           is in package action
//	LC-02                      ASCE 7

// publishedCase is one published case.
type publishedCase struct {
	id, source string
	text       string
	rows       []publishedRow
}

// publishedRow is one published figure.
type publishedRow struct {
	member, symbol string
	printed        string // as the source prints it
	unit           string
	// within is the relative deviation that may be: 0.006 for a result with three
	// significant figures from inputs rounded on the way, 0.012 where the source
	// rounds more; 0 for half a unit of the last printed place.
	within float64
	why    string // of a tolerance wider than these
}

const (
	threeFigures = 0.006
	printed      = 0
)

func publishedReport(t *testing.T, text string) *checker.Report {
	t.Helper()
	p := lang.Load([]string{"case.kern"}, func(string) (string, error) { return text, nil }, nil)
	r := checker.Check(p, nil)
	for _, d := range r.Diagnostics {
		switch d.Rule {
		case "undecided", "unused-definition", "implausible-load":
			continue
		}
		if d.Member == "" { // a slip in the text of the case, not a result
			t.Errorf("%s: %s", d.Rule, d.Message)
		}
	}
	return r
}

// publishedValue is the last value of a symbol in a member's derivation.
func publishedValue(t *testing.T, r *checker.Report, member, symbol string) (float64, unit.Dim) {
	t.Helper()
	for _, m := range r.Members {
		if m.Name != member {
			continue
		}
		v, dim := math.NaN(), unit.None
		for _, s := range m.Derive().Steps {
			if s.Note == "" && m.Symbols().At(s.Symbol).Name == symbol {
				v, dim = s.Value, m.Symbols().At(s.Symbol).Dim
			}
		}
		return v, dim
	}
	t.Errorf("no member %s", member)
	return math.NaN(), unit.None
}

func TestPublishedCases(t *testing.T) {
	rows := 0
	for _, c := range publishedCases() {
		t.Run(c.id, func(t *testing.T) {
			r := publishedReport(t, c.text)
			for _, row := range c.rows {
				rows++
				got, dim := publishedValue(t, r, row.member, row.symbol)
				factor := 1.0
				if row.unit != "" {
					u, err := unit.Parse(row.unit)
					if err != nil || u.Dim != dim {
						t.Fatalf("%s is no unit of %s", row.unit, row.symbol)
					}
					factor = u.Factor
				}
				want, err := strconv.ParseFloat(row.printed, 64)
				if err != nil {
					t.Fatal(err)
				}
				allowed := row.within * math.Abs(want)
				if row.within == printed {
					places := 0
					if _, after, ok := strings.Cut(row.printed, "."); ok {
						places = len(after)
					}
					allowed = 0.5 * math.Pow(10, -float64(places))
				}
				if row.within > 0.012 && row.why == "" {
					t.Errorf("%s: a tolerance of %g needs a reason", row.symbol, row.within)
				}
				if d := math.Abs(got/factor - want); !(d <= allowed*(1+1e-9)) {
					t.Errorf("%s (%s): %s of %s = %.6g %s, published %s (%+.2f %%)", c.id, c.source, row.symbol, row.member, got/factor, row.unit, row.printed, 100*(got/factor/want-1))
				}
			}
		})
	}
	if rows < 120 {
		t.Errorf("%d published figures, want at least 120", rows)
	}
}

const eurocode = "basis { standard \"EN 1993-1-1:2005\"; selfweight off }\n"
const eurocode31 = "basis { standard \"EN 1993-1-1:2005\"; selfweight off; strengths \"EN 1993-1-1 Table 3.1\" }\n"
const elasticBasis = "basis { standard \"elastic\"; selfweight off }\n"

func publishedCases() []publishedCase {
	return append(append(append(eurocodeCases(), bendingCases()...), tableCases()...), elasticCases()...)
}

// eurocodeCases are worked examples to EN 1993-1-1:2005.
func eurocodeCases() []publishedCase {
	return []publishedCase{
		{"EU-01", "Steel Buildings in Europe, Multi-Storey Steel Buildings, Part 4, worked example A.5, p. 4-95 to 4-96; SEEN", eurocode31 + `
column A1 { section = "HEB 300"; material = "S235"; height = 8.00 m; effective = 0.7 about minor; load 2000 kN }`,
			[]publishedRow{
				{"A1", "N_cr_y", "8151.2", "kN", threeFigures, ""},
				{"A1", "N_cr_z", "5657.4", "kN", threeFigures, ""},
				{"A1", "lambda_y", "0.655", "", threeFigures, ""},
				{"A1", "lambda_z", "0.787", "", threeFigures, ""},
				{"A1", "phi_y", "0.792", "", threeFigures, ""},
				{"A1", "chi_y", "0.808", "", threeFigures, ""},
				{"A1", "A", "149", "cm2", printed, ""},
			}},
		{"EU-02", "Steel Buildings in Europe, Single-Storey Steel Buildings, Part 5, worked example, p. 5-33; SEEN", eurocode31 + `
strut A1 { section = "IPE 330"; material = "S355"; length = 2151 mm; effective = 0.9; load 1477 kN }`,
			[]publishedRow{
				{"A1", "class", "4", "", printed, ""},
				{"A1", "A_eff", "6095", "mm2", threeFigures, ""},
				{"A1", "N_cr_z", "4357", "kN", threeFigures, ""},
				{"A1", "lambda_z", "0.705", "", threeFigures, ""},
				{"A1", "phi_z", "0.8344", "", threeFigures, ""},
				{"A1", "chi_z", "0.781", "", threeFigures, ""},
				{"A1", "N_b_z_Rd", "1690", "kN", threeFigures, ""},
				{"A1", "u_b_z", "0.874", "", threeFigures, ""},
			}},
		{"EU-04", "Steel Buildings in Europe, Single-Storey Steel Buildings, Part 5, p. 5-37; SEEN (radii of EN 10056-1: MEMORY)", eurocode31 + `
section l = angle { depth = 150 mm; wall = 15 mm; root = 16 mm; toe = 8 mm }
strut A1 { section = l; material = "S355"; length = 2 m; load 312.2 kN }`,
			[]publishedRow{
				{"A1", "A", "43", "cm2", threeFigures, ""},
				{"A1", "I_z", "369", "cm4", threeFigures, ""},    // I_v
				{"A1", "I_y", "1427.2", "cm4", threeFigures, ""}, // I_u = 2 x 898.1 - I_v
				{"A1", "ht3", "12.15", "", threeFigures, ""},     // the source rounds epsilon to 0.81
				{"A1", "bht3", "9.31", "", threeFigures, ""},
				{"A1", "ht", "10", "", printed, ""},
				{"A1", "bht", "10", "", printed, ""},
				{"A1", "class", "4", "", printed, ""},
			}},
		{"EU-13", "L. Gardner, D. A. Nethercot, Designers' Guide to EN 1993-1-1 (2005), Example 6.7; MEMORY", eurocode + `
section p = pipe { outside = 244.5 mm; wall = 10 mm; made = hot }
column A1 { section = p; material = "S355"; height = 4.0 m; load 1630 kN }`,
			[]publishedRow{
				{"A1", "dt", "24.5", "", threeFigures, ""},
				{"A1", "class", "1", "", printed, ""},
				{"A1", "N_c_Rd", "2616", "kN", threeFigures, ""},
				{"A1", "N_cr_y", "6571", "kN", threeFigures, ""},
				{"A1", "lambda_y", "0.63", "", printed, ""},
				{"A1", "phi_y", "0.74", "", printed, ""},
				{"A1", "chi_y", "0.88", "", printed, ""},
				{"A1", "N_b_y_Rd", "2297", "kN", threeFigures, ""},
			}},
		{"EU-16", "Italian worked example, HEA 140 (ENV 1993-1-1:1992, gamma_M = 1.10), the part in compression; SEEN", `
basis { standard "EN 1993-1-1:2005"; selfweight off; gamma_M0 = 1.1 because "ENV 1993-1-1"; gamma_M1 = 1.1 because "ENV 1993-1-1" }
column A1 { section = "HEA 140"; material = "S235"; height = 5.00 m; limit slenderness = 200; load 120 kN }`,
			[]publishedRow{
				{"A1", "N_c_Rd", "670.8", "kN", threeFigures, ""},
				{"A1", "slenderness_z", "142", "", threeFigures, ""},
				{"A1", "N_cr_y", "854.7", "kN", threeFigures, ""},
				{"A1", "N_cr_z", "322.75", "kN", threeFigures, ""},
				{"A1", "lambda_y", "0.93", "", printed, ""},
				{"A1", "lambda_z", "1.51", "", printed, ""},
				{"A1", "phi_y", "1.056", "", threeFigures, ""},
				{"A1", "phi_z", "1.96", "", threeFigures, ""},
				{"A1", "chi_y", "0.6419", "", threeFigures, ""},
			}},
		{"EU-17", "S. Caffe, Verifica delle colonne in acciaio secondo EC3 (2016), IPE 600 from its dimensions; SEEN", eurocode + `
section s = isection { depth = 600 mm; width = 220 mm; web = 12 mm; flange = 19 mm; root = 24 mm; made = rolled }
column A1 { section = s; material = "S275"; height = 5 m; load 100 kN }`,
			[]publishedRow{
				{"A1", "A", "155.984", "cm2", printed, ""},
				{"A1", "I_y", "92083.398", "cm4", 1e-6, ""},
				{"A1", "I_z", "3380.975", "cm4", threeFigures, ""}, // the source drops a part of a fillet's term: 0.19 %
				{"A1", "I_t", "165.417", "cm4", printed, ""},
				{"A1", "I_w", "2845526.71", "cm6", threeFigures, ""}, // of the flanges alone there: 0.46 %
			}},
		{"EU-18", "L. Gardner, D. A. Nethercot, Designers' Guide to EN 1993-1-1 (2005), Example 6.9, the part in compression; MEMORY", eurocode + `
section s = tube { depth = 200 mm; width = 100 mm; wall = 16 mm; made = hot }
strut A1 { section = s; material = "S355"; length = 7.2 m; hold minor at 2.4 m; hold minor at 4.8 m; load 90 kN }`,
			[]publishedRow{
				{"A1", "N_c_Rd", "2946", "kN", threeFigures, ""},
				{"A1", "N_cr_y", "1470", "kN", threeFigures, ""},
				{"A1", "lambda_y", "1.42", "", printed, ""},
				{"A1", "phi_y", "1.63", "", printed, ""},
				{"A1", "chi_y", "0.41", "", printed, ""},
				{"A1", "N_b_y_Rd", "1209", "kN", threeFigures, ""},
				{"A1", "N_cr_z", "4127", "kN", threeFigures, ""},
				{"A1", "lambda_z", "0.84", "", printed, ""},
			}},
		{"B-01", "L. Gardner, D. A. Nethercot, Designers' Guide to EN 1993-1-1 (2005), Example 6.10, the part in compression; MEMORY", eurocode31 + `
section s = given { A = 30600 mm2; I_major = 642.0e6 mm4; I_minor = 203.1e6 mm4; I_t = 12.71e6 mm4; I_w = 5.03e12 mm6
    thickness = 37.7 mm; class = 1; curve_major = b; curve_minor = c }
column A1 { section = s; material = "S275"; height = 4.2 m; effective = 0.7 about major; load 3440 kN }`,
			[]publishedRow{
				{"A1", "N_c_Rd", "8415", "kN", printed, ""},
				{"A1", "u_c", "0.41", "", printed, ""},
				{"A1", "N_cr_y", "153943", "kN", printed, ""},
				{"A1", "lambda_y", "0.23", "", printed, ""},
				{"A1", "chi_y", "0.99", "", printed, ""},
				{"A1", "N_b_y_Rd", "8314", "kN", printed, ""},
				{"A1", "N_cr_z", "23863", "kN", printed, ""},
				{"A1", "lambda_z", "0.59", "", printed, ""},
				{"A1", "chi_z", "0.79", "", printed, ""},
				{"A1", "N_b_z_Rd", "6640", "kN", printed, ""},
			}},
		{"B-05", "Access Steel SX029a-EN-EU (2006), portal column IPE 600, its critical load; MEMORY", eurocode31 + `
column A1 { section = "IPE 600"; material = "S275"; height = 5.99 m; load 161.5 kN }`,
			[]publishedRow{{"A1", "N_cr_y", "53190", "kN", threeFigures, ""}}},
		{"L-05", "Steel Buildings in Europe, Single-Storey Steel Buildings, Part 4, Appendix D, sheets 42 to 43, T section at the end of a haunch; SEEN", eurocode31 + `
section s = tee { depth = 121.2 mm; width = 210 mm; web = 9.4 mm; flange = 17.2 mm; made = welded }
strut A1 { section = s; material = "S355"; length = 2.74 m; load 709.5 kN }`,
			[]publishedRow{ // buckling out of the plane of the web is about the major axis here
				{"A1", "A", "4590", "mm2", threeFigures, ""},
				{"A1", "I_y", "13280000", "mm4", threeFigures, ""},
				{"A1", "lambda_y", "0.667", "", threeFigures, ""},
				{"A1", "phi_y", "0.837", "", threeFigures, ""},
				{"A1", "chi_y", "0.745", "", threeFigures, ""},
				{"A1", "N_b_y_Rd", "1214", "kN", threeFigures, ""},
			}},
		// Thin walls 100 x 100 x 2 mm on their mid-lines. The source is elastic
		// theory alone: the yield strength is chosen so low that the section is of
		// class 1 and takes no part in the elastic critical loads. The source's
		// warping constant of 2488e6 mm6 is not that of its channel, which is
		// 1190e6 mm6 by the closed form h2 b3 t/12 (2h + 3b)/(h + 6b); its torsional
		// loads are checked in package en1993 with its own constant put in.
		{"T-01", "T. H. G. Megson, An Introduction to Aircraft Structural Analysis (2010), Example 8.4; SEEN (E, G and length inferred)", eurocode + `
material a { E = 70 GPa; G = 30 GPa; fy = 1 MPa }
section s = channel { depth = 102 mm; width = 101 mm; web = 2 mm; flange = 2 mm; made = welded }
strut A1 { section = s; material = a; length = 1 m; load 100 N }`,
			[]publishedRow{
				{"A1", "A", "600", "mm2", printed, ""},
				{"A1", "I_y", "1.17e6", "mm4", threeFigures, ""},
				{"A1", "I_z", "0.67e6", "mm4", threeFigures, ""},
				{"A1", "y_0", "76.2", "mm", threeFigures, ""},
				{"A1", "I_w", "1190.48e6", "mm6", 1e-3, ""}, // the closed form, not the source
				{"A1", "N_cr_z", "463000", "N", threeFigures, ""},
				{"A1", "N_cr_y", "808000", "N", threeFigures, ""},
			}},
	}
}

// tableCases are tables of resistances.
func tableCases() []publishedCase {
	const source = "Steel Building Design: Design Data, tables of bearing piles in S355 (UK National Annex: fy by EN 10025-2); results SEEN, dimensions MEMORY"
	lengths := func(text string, axis string, values [][2]string) (string, []publishedRow) {
		var rows []publishedRow
		for i, v := range values {
			name := fmt.Sprintf("%s%d", strings.ToUpper(axis), i+1)
			text += fmt.Sprintf("column %s { section = s; material = \"S355\"; height = %s m; load 100 kN }\n", name, v[0])
			rows = append(rows, publishedRow{name, "N_b_" + axis + "_Rd", v[1], "kN", threeFigures, ""})
		}
		return text, rows
	}
	text, eu05 := lengths(eurocode+"section s = isection { depth = 361.4 mm; width = 378.5 mm; web = 20.3 mm; flange = 20.4 mm; root = 15.2 mm; made = rolled }\n", "y",
		[][2]string{{"1.5", "7640"}, {"2.5", "7610"}, {"3.5", "7370"}, {"5.0", "7000"}, {"7.0", "6420"}, {"9.0", "5700"}, {"11.0", "4880"}, {"13.0", "4070"}})
	text, more := lengths(text, "z", [][2]string{{"1.0", "7640"}, {"2.0", "7320"}, {"3.0", "6760"}, {"4.0", "6160"}, {"6.0", "4830"}, {"8.0", "3580"}, {"10.0", "2630"}, {"12.0", "1980"}, {"14.0", "1530"}})
	eu05 = append(append(eu05, more...), publishedRow{"Y1", "N_c_Rd", "7640", "kN", threeFigures, ""}, publishedRow{"Y1", "f_y", "345", "MPa", printed, ""})
	text10, eu10 := lengths(eurocode+"section s = isection { depth = 356.4 mm; width = 376.0 mm; web = 17.8 mm; flange = 17.9 mm; root = 15.2 mm; made = rolled }\n", "y",
		[][2]string{{"1.0", "6680"}, {"1.5", "6680"}, {"2.0", "6680"}, {"2.5", "6650"}, {"3.0", "6550"}, {"3.5", "6440"}, {"4.0", "6340"}})
	eu10 = append(eu10, publishedRow{"Y1", "class", "3", "", printed, ""})
	// The design stresses of IS 800:2007 are those of curve c with E = 200 GPa.
	text09 := `basis { standard "EN 1993-1-1:2005"; selfweight off; gamma_M1 = 1.10 because "IS 800:2007" }
material m { E = 200 GPa; fy = 250 MPa }
section s = given { A = 100 cm2; I_major = 10000 cm4; I_minor = 10000 cm4; I_t = 1000 cm4; class = 1; curve = c }
`
	var s09 []publishedRow
	for i, v := range strings.Fields("2270 2240 2110 1980 1830 1680 1520 1360 1210 1070 946 837 743 662 592 533 481 436 397 363") {
		text09 += fmt.Sprintf("column C%d { section = s; material = m; height = %d m; load 100 kN }\n", i+1, i+1)
		s09 = append(s09, publishedRow{fmt.Sprintf("C%d", i+1), "N_b_y_Rd", v, "kN", threeFigures, ""})
	}
	return []publishedCase{
		{"EU-05", source, text, eu05},
		{"EU-10", source, text10, eu10},
		{"S-09", "IS 800:2007, Table 9(c), f_y = 250: another standard's table of the same curve; MEMORY", text09, s09},
	}
}

// elasticCases are textbook cases of elastic theory.
func elasticCases() []publishedCase {
	const gere = "J. M. Gere, B. J. Goodno, Mechanics of Materials, 7th ed., "
	ends := func(theory, rec string) publishedCase {
		pairs := [][2]string{{"pinned", "pinned"}, {"fixed", "free"}, {"fixed", "fixed"}, {"fixed", "pinned"}, {"fixed", "guided"}, {"pinned", "guided"}}
		c := publishedCase{id: "E-01 " + theory, source: "course notes after Gere and Hibbeler, AISC 360 Table C-A-7.1: effective length factors; SEEN, sway rows MEMORY"}
		c.text = "basis { standard \"elastic\"; selfweight off; effective lengths " + theory + " }\nmaterial m { E = 200 GPa; fy = 250 MPa }\nsection r = rod { diameter = 100 mm }\n"
		for i, v := range strings.Fields(rec) {
			c.text += fmt.Sprintf("column K%d { section = r; material = m; height = 3 m; base %s; top %s; load 1 kN }\n", i, pairs[i][0], pairs[i][1])
			c.rows = append(c.rows, publishedRow{fmt.Sprintf("K%d", i), "K_major", v, "", printed, ""}, publishedRow{fmt.Sprintf("K%d", i), "K_minor", v, "", printed, ""})
		}
		return c
	}
	return []publishedCase{
		ends("theoretical", "1.000 2.000 0.500 0.700 1.000 2.000"),
		ends("recommended", "1.000 2.100 0.650 0.800 1.200 2.000"),
		{"E-02", "course notes \"Buckling and Stability\", Examples 1 and 2; SEEN", elasticBasis + `
material m { E = 200 GPa; fy = 250 MPa }
section s = given { A = 5890 mm2; I_major = 15.4e6 mm4; I_minor = 15.4e6 mm4 }
column A1 { section = s; material = m; height = 5 m; limit slenderness = 200; load 100 kN }
column A2 as A1 { base fixed }
column A3 as A1 { base fixed; top fixed }
column A4 as A1 { base fixed; top free }`,
			[]publishedRow{
				{"A1", "P_cr_minor", "1216", "kN", printed, ""},
				{"A1", "i_major", "51.1", "mm", printed, ""},
				{"A2", "P_cr_minor", "2482", "kN", printed, ""},
				{"A3", "P_cr_minor", "4864", "kN", printed, ""},
				{"A4", "P_cr_minor", "304", "kN", printed, ""},
			}},
		{"E-04", gere + "solution of Problem 11.3-3; SEEN", elasticBasis + `
material m { E = 30000 ksi; fy = 50 ksi }
section s = given { A = 13.3 in2; I_major = 248 in4; I_minor = 53.4 in4 }
column A1 { section = s; material = m; height = 336 in; load 100 kip }`,
			[]publishedRow{
				{"A1", "P_cr_major", "650", "kip", printed, ""},
				{"A1", "P_cr_minor", "140", "kip", printed, ""},
			}},
		{"S-01", "J. M. Gere, S. P. Timoshenko, Mechanics of Materials, Example 11-6; part a SEEN, part b (load factor 1.99) MEMORY", `
basis { standard "elastic"; selfweight off; factor_yield = 1.99 }
material m { E = 30000 ksi; fy = 42 ksi }
section s = given { A = 24.1 in2; I_major = 24.1 in2 * (6.05 in)^2; I_minor = 100 in4; W_major = 24.1 in2 * (6.05 in)^2 / 7.155 in; W_minor = 20 in3 }
column A1 { section = s; material = m; height = 25 ft; hold minor at 12.5 ft; limit slenderness = 200; load 320 kip; load 40 kip offset 13.5 in about major }`,
			[]publishedRow{
				{"A1", "sigma", "42", "ksi", threeFigures, ""},
				{"A1", "u_yield", "1.00", "", threeFigures, ""},
			}},
		{"S-01a", "J. M. Gere, S. P. Timoshenko, Mechanics of Materials, Example 11-6; SEEN", elasticBasis + `
material m { E = 30000 ksi; fy = 42 ksi }
section s = given { A = 24.1 in2; I_major = 24.1 in2 * (6.05 in)^2; I_minor = 24.1 in2 * (6.05 in)^2; W_major = 24.1 in2 * (6.05 in)^2 / 7.155 in }
column A1 { section = s; material = m; height = 25 ft; limit slenderness = 200; load 320 kip; load 40 kip offset 13.5 in about major }`,
			[]publishedRow{
				{"A1", "slenderness_major", "49.59", "", printed, ""},
				{"A1", "sigma", "20.1", "ksi", printed, ""},
			}},
		{"S-04", gere + "solution of Problem 11.6-7, data and ratios; SEEN", elasticBasis + `
material m { E = 30000 ksi; fy = 42 ksi }
section s = given { A = 17.6 in2; I_major = 341 in4; I_minor = 341 in4; W_major = 341 in4 / 5.11 in }
column A1 { section = s; material = m; height = 24 ft; limit slenderness = 200; load 120 kip offset 2.0 in about major }`,
			[]publishedRow{{"A1", "slenderness_major", "65.42", "", threeFigures, ""}}},
		{"S-05", "course notes \"Buckling and Stability\", Exercise 5; SEEN", elasticBasis + `
material m { E = 200 GPa; fy = 250 MPa }
section s = given { A = 5890 mm2; I_major = 5890 mm2 * (51.1 mm)^2; I_minor = 5890 mm2 * (51.1 mm)^2; W_major = 5890 mm2 * (51.1 mm)^2 / 100 mm }
column A1 { section = s; material = m; height = 5 m; load 400 kN offset 10 mm about major }`,
			[]publishedRow{
				{"A1", "a_major", "1.611", "", threeFigures, ""},
				{"A1", "sigma", "109.7", "MPa", threeFigures, ""},
			}},
		{"S-06", "Multimedia Engineering Mechanics of Materials, 9.3 case study; SEEN", elasticBasis + `
material m { E = 29000 ksi; fy = 36 ksi }
section s = pipe { outside = 6 in; wall = 0.25 in; made = welded }
column A1 { section = s; material = m; height = 30 ft; base fixed; top free; limit slenderness = 400; load 5 kip offset 3 in about major }`,
			[]publishedRow{
				{"A1", "A", "4.515", "in2", threeFigures, ""},
				{"A1", "I_major", "18.7", "in4", printed, ""},
				{"A1", "i_major", "2.035", "in", printed, ""},
				{"A1", "a_major", "2.175", "", threeFigures, ""},
			}},
		{"S-07", gere + "Problem 11.5-1; SEEN", elasticBasis + `
material m { E = 10000 ksi; fy = 40 ksi }
section s = bar { width = 1 in; depth = 2 in }
column A1 { section = s; material = m; height = 30 in; load 2800 lbf offset 0.5 in about minor }`,
			[]publishedRow{
				{"A1", "I_minor", "0.16667", "in4", printed, ""},
				{"A1", "a_minor", "1.224", "", printed, ""},
			}},
		{"S-08", gere + "solution of Problem 11.5-10: the top moves by 30 mm at e = 50 mm, so that the moment grows by (50 + 30)/50; SEEN", elasticBasis + `
material m { E = 73 GPa; fy = 200 MPa }
section s = tube { width = 100 mm; wall = 8 mm; corner = 0 mm; made = welded }
column A1 { section = s; material = m; height = 2.21 m; base fixed; top free; load 50 kN offset 50 mm about major }`,
			[]publishedRow{
				{"A1", "I_major", "4184400", "mm4", threeFigures, ""},
				{"A1", "a_major", "1.6", "", threeFigures, ""},
			}},
	}
}

// TestPublishedClass4Angle holds that the angle of EU-04, which the source finds
// to be of class 4, is left to a person.
func TestPublishedClass4Angle(t *testing.T) {
	for _, c := range eurocodeCases() {
		if c.id != "EU-04" {
			continue
		}
		m := publishedReport(t, c.text).Members[0]
		if m.Verdict != standard.Undecided {
			t.Errorf("the angle %s, want undecided", m.Verdict)
		}
	}
}
