package complete

import (
	"strings"
	"testing"

	"kern/checker"
	"kern/lang"
)

// reportOf checks files.
func reportOf(files map[string]string) *checker.Report {
	var names []string
	for name := range files {
		names = append(names, name)
	}
	read := func(name string) (string, error) { return files[name], nil }
	return checker.Check(lang.Load(names, read, nil), nil)
}

// at gives the items where the mark ¦ stands in a text.
func at(t testing.TB, marked string, how Asking) (List, string) {
	t.Helper()
	before, after, ok := strings.Cut(marked, "¦")
	if !ok {
		t.Fatal("no mark")
	}
	text := before + after
	return At(reportOf(map[string]string{"a.kern": text}), "a.kern", int32(len(before)), how), text
}

func labels(l List) string {
	var out []string
	for _, x := range l.Items {
		out = append(out, x.Label)
	}
	return strings.Join(out, " ")
}

const shared = `basis { standard "EN 1993-1-1:2005"; actions "EN 1990:2002" }
case G permanent
case Q imposed "B"
level ground at 0 m
level roof at 3.6 m { G 0.5 kN/m2 }
section post = "HEB 160"
material steel = "S355"
bay = 6 m
share = 0.9 kN/m2 * bay * bay
`

// TestDue looks at what is first in many places.
func TestDue(t *testing.T) {
	for text, want := range places {
		l, _ := at(t, shared+text, ByUser)
		if strings.HasPrefix(text, "basis") || text == "¦" {
			l, _ = at(t, text, ByUser)
		}
		var got []string
		for _, x := range l.Items {
			got = append(got, strings.ReplaceAll(x.Label, " ", "_"))
		}
		have := strings.Join(got, " ")
		if want == "" && have != "" || !strings.HasPrefix(have, want) {
			t.Errorf("%s\n have %.150s\n want %s", text, have, want)
		}
	}
}

// places are places with what is offered there first; blanks of labels are
// written _.
var places = map[string]string{
	"¦":                        "include forces project basis material section case combination exclusive level column strut tie",
	"project { ¦ }":            "name number prepared checked revision date",
	"project { prepared ¦ }":   "by",
	"basis { ¦ }":              "standard actions permanent roofs accidental show effective",
	"basis { standard \"¦\" }": "elastic EN_1993-1-1:2005",
	"basis { standard ¦ }":     "elastic EN_1993-1-1:2005",
	"basis { standard \"EN 1993-1-1:2005\" ¦ }":         "annex",
	"basis { standard \"ANSI/AISC 360-22\" ¦ }":         "by",
	"basis { standard \"ANSI/AISC 360-22\" by ¦ }":      "LRFD ASD",
	"basis { standard \"EN 1993-1-1:2005\" annex \"¦ }": "recommended",
	"basis { actions \"EN 1990:2002\" eq \"¦\" }":       "6.10",
	"basis { show kN, ¦ }":                              "kNm Nm",
	"basis { effective ¦ }":                             "lengths",
	"basis { effective lengths ¦ }":                     "theoretical recommended",
	"basis { selfweight ¦ }":                            "on off",
	"basis { strengths \"¦\" }":                         "product_standard EN_1993-1-1_Table_3.1",
	"basis { gamma_M0 = 1.1 ¦ }":                        "because",
	"case Q ¦":                                          "permanent dead imposed live roof snow rain wind temperature accidental seismic",
	"case Q imposed \"¦\"":                              "A B C1",
	"case Q snow \"¦\"":                                 "below_1000_m above_1000_m",
	"material x = \"¦\"":                                "S235 S235JR",
	"material x = \"S355H\" ¦":                          "per",
	"material x = \"S355H\" per \"¦\"":                  "EN_10210-1 EN_10219-1",
	"material x { ¦ }":                                  "E G nu fy fu density",
	"material x { E = 210 ¦ }":                          "GPa kN/m2 MPa",
	"section x = ¦":                                     "HEB_160 tube pipe",
	"section x = \"HEB 1¦\"":                            "HEB_100 HEB_120 HEB_140 HEB_160 HEB_180 HEB_1000",
	"section x = \"HEB 1¦60\"":                          "HEB_100 HEB_120",
	"section x = \"heb1¦":                               "HEB_100 HEB_120",
	"section x = \"SHS 100x100x¦\"":                     "SHS_100x100x",
	"section x = tube { ¦ }":                            "width depth wall corner made",
	"section x = tube { width = 90 mm; ¦ }":             "depth wall corner made",
	"section x = tube { made = ¦ }":                     "hot cold welded",
	"section x = isection { made = ¦ }":                 "rolled welded",
	"section x = given { I_w = 12 ¦ }":                  "cm6",
	"section x = given { curve = ¦ }":                   "a0 a b c d",
	"combination x = ¦":                                 "G Q",
	"combination x = 1.1 ¦":                             "G Q",
	"combination x = 1.1 G + 0.5 ¦":                     "G Q",
	"level attic ¦":                                     "at",
	"level attic at 3 ¦":                                "m",
	"level attic at 3 m { ¦ }":                          "G Q",
	"level attic at 3 m { G 2 ¦ }":                      "kN/m2",
	"x = 3 ¦":                                           "m kN/m2",
	"x = bay + ¦":                                       "bay ground roof abs max min sqrt",
	"x = min(bay, ¦":                                    "bay ground roof",
	"x = sqrt(¦":                                        "bay share",
	"x = b¦":                                            "bay",
	"column A1 ¦":                                       "as",
	"column A1 \"x\" as ¦":                              "",
	"column A1 { ¦ }":                                   "section material height",
	"column A1 { section = post; ¦ }":                   "material height",
	"column A1 { section = ¦ }":                         "post HEB_160 tube",
	"column A1 {\n section =¦\n}":                       "post HEB_160 tube",
	"column A1 { section = \"¦ }":                       "HEB_160 HEA",
	"column A1 { material = ¦ }":                        "steel S235",
	"column A1 { section = \"SHS 100x100x5 cold\"\n material = \"¦\" }": "S275MH S275MLH S355MH S355MLH S420MH S420MLH S460MH S460MLH S235H",
	"column A1 { height = 3 ¦ }":                                        "m",
	"column A1 { height = ¦ }":                                          "bay ground roof",
	"column A1 { height = bay - ¦ }":                                    "bay ground roof",
	"column A1 { from ¦ }":                                              "ground roof bay",
	"column A1 { from ground ¦ }":                                       "to",
	"column A1 { from ground to ¦ }":                                    "ground roof bay",
	"column A1 { base ¦ }":                                              "pinned fixed free guided",
	"column A1 { base p¦ }":                                             "pinned fixed free guided",
	"column A1 { base fixed ¦ }":                                        "about",
	"column A1 { base fixed about ¦ }":                                  "major minor",
	"column A1 { hold ¦ }":                                              "major minor both twist",
	"column A1 { hold minor ¦ }":                                        "at",
	"column A1 { height = 3 m; hold minor at ¦ }":                       "height_/_2 bay height",
	"column A1 { from ground to roof; load G 3 kN at ¦ }":               "top base ground roof height_/_2",
	"column A1 { effective = 0.8 ¦ }":                                   "about %",
	"column A1 { effective = 0.8 about ¦ }":                             "major minor twist",
	"column A1 { load ¦ }":                                              "G Q floor",
	"column A1 { load G ¦ }":                                            "share",
	"column A1 { load G 80 ¦ }":                                         "kN kN/m kNm",
	"column A1 { load G 80¦ }":                                          "kN kN/m kNm",
	"column A1 { load G 80 k¦ }":                                        "kN kN/m kNm",
	"column A1 { load G 80 ¦ about major }":                             "kN/m kNm",
	"column A1 { load G 80 ¦ across major at 2 m }":                     "kN N",
	"column A1 { load G 80 kN ¦ }":                                      "at offset across",
	"column A1 { load G 80 kN/m ¦ }":                                    "about",
	"column A1 { load G 80 kN/m about major ¦ }":                        "from",
	"column A1 { load G 80 kNm about ¦ }":                               "major minor",
	"column A1 { load G 80 kN offset 20 ¦ }":                            "mm",
	"column A1 { load G 80 kN offset 20 mm ¦ }":                         "about",
	"column A1 { load G 80 kN offset 20 mm about major ¦ }":             "and",
	"column A1 { load floor ¦ }":                                        "abs max min sqrt",
	"column A1 { load floor 18 ¦ }":                                     "m2 mm2",
	"column A1 { load floor 18 m2 at ¦ }":                               "roof ground",
	"column A1 { load ¦ 80 kN }":                                        "G Q",
	"column A1 { load G 2 * ¦ }":                                        "share",
	"column A1 { load G 80 kN/m2 * ¦ }":                                 "bay ground roof",
	"column A1 { limit ¦ }":                                             "utilisation slenderness sway",
	"column A1 { limit sway = 20 ¦ }":                                   "mm m",
	"column A1 { require ¦ }":                                           "N_b_minor N_b_major",
	"column A1 { require N_b_minor ¦ }":                                 ">= <= > <",
	"column A1 { require N_b_minor >= 400 ¦ }":                          "kN",
	"column A1 { require N_b_minor >= 400 kN ¦ }":                       "because",
	"column A1 { depart ¦ }":                                            "local-buckling section-compression",
	"column A1 { depart flexural-buckling-mi¦ }":                        "local-buckling section-compression",
	"column A1 { depart slenderness ¦ }":                                "because",
	"column A1 { note \"¦\" }":                                          "",
	"column A1 { load G 80 kN # at ¦":                                   "",
	"column A1 { height = 14 ft 6 ¦ }":                                  "in",
}

// TestTaken takes everything that is offered in these places. Nothing of it is
// something that the language or the calculation does not know.
func TestTaken(t *testing.T) {
	unknown := map[string]bool{"unclosed-text": true, "stray-character": true, "unknown-word": true, "unknown-unit": true, "unknown-section": true, "unknown-grade": true,
		"unknown-standard": true, "unknown-annex": true, "unknown-rule": true, "unknown-category": true, "unknown-property": true, "unknown-statement": true, "misplaced-sign": true, "wrong-kind": true}
	taken := 0
	for place := range places {
		whole := shared + place
		if strings.HasPrefix(place, "basis") {
			whole = place
		}
		l, text := at(t, whole, ByUser)
		before := map[string]int{}
		for _, rule := range rulesOf(text) {
			before[rule]++
		}
		for i, x := range l.Items {
			if i > 30 && i%7 > 0 || x.Kind == FamilyItem || x.Kind == FunctionItem || strings.HasSuffix(place, "¦ }") && x.Kind == StatementItem {
				continue // some of a long list will do; the others go on
			}
			taken++
			now := map[string]int{}
			with := text[:l.Whole.Start] + x.written() + text[l.Whole.End:]
			for _, rule := range rulesOf(with) {
				if now[rule]++; unknown[rule] && now[rule] > before[rule] {
					t.Errorf("%s: %q is offered and %s", place, x.written(), rule)
				}
			}
		}
	}
	if taken < 500 {
		t.Errorf("%d were taken", taken)
	}
}
