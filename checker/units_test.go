package checker_test

import (
	"regexp"
	"slices"
	"strings"
	"testing"

	"kern/checker"
	"kern/lang"
)

// everywhere is a calculation that says every kind of thing that messages, assumptions
// and coverage put a quantity into; %BASIS is its first lines.
const everywhere = `basis {
    standard %STANDARD
    %REST
}
material a36 { E = 200 GPa; G = 77 GPa; density = 7850 kg/m3; fy = 250 MPa; fu = 400 MPa }
material high { E = 200 GPa; G = 77 GPa; density = 7850 kg/m3; fy = 900 MPa; fu = 950 MPa }
section t1 = tube { width = 150 mm; depth = 200 mm; wall = 8 mm }
section p1 = pipe { outside = 168.3 mm; wall = 8 mm }
section w1 = isection { depth = 300 mm; width = 300 mm; web = 10 mm; flange = 15 mm }
section l1 = angle { depth = 100 mm; wall = 10 mm }
section l2 = doubleangle { depth = 100 mm; wall = 10 mm; gap = 10 mm }
splice = 3.1 m
knee = 5.5 m
case G permanent
case Q imposed "B"
level ground at 0 m
level first at 4 m { Q 3 kN/m2; G 4 kN/m2 }
level second at 8 m { Q 3 kN/m2; G 4 kN/m2 }
level third at 12 m { Q 3 kN/m2; G 4 kN/m2 }
column A1 { section = "HEB 200"; material = a36; from ground to third; hold both at first; hold both at second; load floor 7.25 m2 at first; load floor 7.25 m2 at second offset 100 mm about major; load floor 7.25 m2 at third; reduce imposed by area }
column A2 as A1 { reduce imposed by storeys; lift base to knee { section = "HEB 220" } }
column A3 { section = "HEB 200"; material = a36; height = 7 m; hold both at 3.5 m; hold twist at 2 m; load Q 500 kN at 3.5 m offset 50 mm about major; load G 100 kN; load G 3 kN across minor at 1 m; limit deflection = span / 300; moments nominal }
column A4 { section = t1; material = a36; height = 7 m; base fixed; top free; load G 20 kN offset 100 mm about major and 50 mm about minor; limit sway = 20 mm; imperfection on }
column A5 { section = p1; material = a36; height = 6.3 m; hold minor at 3 m stiffness 900 kN/m; hold major at 3 m stiffness 2 kN/m; critical exact; load G 200 kN; load Q 5 kNm about major at top }
column A6 { section = w1; material = high; height = 6.3 m; load G 1 N; load Q 900 MN }
column A7 { section = l1; material = a36; height = 2.3 m; connected by long leg; load G 100 kN }
column A8 { section = l2; material = a36; height = 2.3 m; connectors every 600 mm welded; load G 100 kN }
column A9 { section = l2; material = a36; height = 2.3 m; load G 100 kN at 9 m }
column B1 { section = w1; material = a36; height = 6 m; base spring 4000 kNm/rad about major; top pinned; critical exact; load G 300 kN; load G 4 kN/m about major from 1 m to 2.3 m }
column B2 { section = w1; material = a36; height = 6 m; lift base to 3 m { section = "HEB 300" }; lift 2.5 m to 4 m { section = "HEB 200" }; load G 300 kN }
column B3 { section = "HEA 300"; material = a36; height = 6 m; lift base to splice { section = "HEB 300" }; hold twist at 1.2 m; load G 300 kN offset 0.1 m about major }
column B4 { section = "HEA 300"; material = a36; from ground to ground; load G 300 kN }
column B5 { section = "UPN 200"; material = a36; height = 3 m; load G 30 kN offset 0.1 m about minor; require N_b_minor >= 10 kN; limit slenderness = 20 }
column B6 { section = "HEA 300"; material = a36; height = 3 m; load G 30 kN; load G 10 kNm about major at base; load G -10 kNm about major at top; selfweight off }
section bad1 = tube { width = 150 mm; depth = 200 mm; wall = 80 mm }
section bad2 = isection { depth = 300 mm; width = 300 mm; web = 10 mm; flange = 15 mm; root = 140 mm }
section bad3 = tube { width = 150 mm; depth = 200 mm; wall = 8 mm; corner = 90 mm }
column B7 { section = l2; material = a36; height = 2.3 m; load G 100 kN }
tie D1 { section = "UPN 200"; material = a36; height = 3 m; net = 28 cm2; load G -100 kN }
tie D2 { section = "UPN 200"; material = a36; height = 3 m; net = 92 cm2; load G -100 kN }
`

// wrong are the rules of the errors that everywhere has on purpose.
var wrong = []string{"outside-the-member", "lifts-overlap", "impossible-value", "nominal-without-hold", "impossible-section"}

// written is all that a report says in words, without the working.
func written(r *checker.Report) []string {
	var out []string
	for _, d := range r.Diagnostics {
		out = append(out, d.Message)
		out = append(out, d.Notes...)
	}
	for _, m := range r.Members {
		out = append(out, m.Missing...)
		out = append(out, m.Assumptions...)
		for _, c := range m.Checks {
			out = append(out, c.Why, c.Lift, c.Under)
		}
		for _, c := range m.Coverage {
			out = append(out, c.Why)
		}
		for _, h := range m.Holds() {
			out = append(out, h.How)
		}
		if record := m.Derive(); record != nil {
			for _, s := range record.Steps {
				out = append(out, s.Note)
				if s.Formula == nil && !strings.HasPrefix(s.Clause, "curve ") { // words of EN 1993-1-1 Table 6.2
					out = append(out, s.Clause)
				}
			}
		}
	}
	slices.Sort(out)
	return slices.Compact(out)
}

// TestWordsInUnits asks that whatever is said of a calculation that shows US customary
// units is said in these, and the other way round. Words that are left alone: those of the
// calculation itself (names of grades, sections and lifts) and of tables of a standard.
func TestWordsInUnits(t *testing.T) {
	metric := regexp.MustCompile(`[0-9] ?(m|m2|mm|mm2|cm|cm2|cm4|kN|N|MN|kNm|kN/m|kN/m2|MPa|N/mm2|kNm/rad)([^A-Za-z0-9/*]|$)`)
	american := regexp.MustCompile(`[0-9] ?(ft|in|ft2|in2|kip|lbf|ksi|psi|psf|klf|kip-ft|kip-in|kip/in)([^A-Za-z0-9/*]|$)`)
	for _, standard := range checker.Stated() {
		for _, rest := range []string{"show kip, in, ksi", "show kN, m, MPa"} {
			foreign := metric
			if strings.Contains(rest, "kN") {
				foreign = american
			}
			for _, extra := range []string{"", "; moments nominal", "; stability direct"} {
				if strings.Contains(extra, "direct") && !strings.Contains(standard, "AISC") {
					continue
				}
				text := strings.NewReplacer("%STANDARD", standard, "%REST", rest+extra).Replace(everywhere)
				report := checkFiles(map[string]string{"a.kern": text})
				for _, d := range report.Diagnostics {
					if d.Severity == lang.Error && d.Member == "" && !slices.Contains(wrong, d.Rule) {
						t.Errorf("%s: %s: %s", standard, d.Rule, d.Message)
					}
				}
				for _, s := range written(report) {
					if m := foreign.FindString(s); m != "" {
						t.Errorf("%s, %s%s: %q in %q", standard, rest, extra, m, s)
					}
				}
			}
		}
	}
}

// TestNoShearOfConstantMoment holds that a constant moment has no shear force at all,
// not what rounding leaves of one.
func TestNoShearOfConstantMoment(t *testing.T) {
	for _, name := range checker.Stated() {
		for _, height := range []string{"7 m", "7.1 m", "8 m", "23 ft"} {
			text := "basis { standard " + name + "; selfweight off }\ncase G permanent\n" +
				"column A { section = \"CHS 168.3x8\"; material = \"S355H\"; height = " + height + "; base fixed; top free; load G 14 kN; load G 6 kN at 6.5 m offset 250 mm about major }\n"
			r := checkFiles(map[string]string{"a.kern": text})
			for _, c := range r.Members[0].Checks {
				if strings.HasPrefix(c.Rule, "section-shear") && c.Demand != 0 {
					t.Errorf("%s, %s: %s demands %g", name, height, c.Rule, c.Demand)
				}
			}
		}
	}
}
