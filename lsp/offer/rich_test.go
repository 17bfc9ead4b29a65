package offer

import (
	"strings"
	"testing"

	"kern/lang"
)

// rich is a calculation with a little of everything that is rewritten.
const rich = `# A calculation to rewrite (invented).

include "more.kern"

basis {
    standard "EN 1993-1-1:2005"
    actions "EN 1990:2002"
    show kN, mm, MPa
    gamma_M1 = 1.05 because "national annex"
}

case G permanent
case Q imposed "B"

eaves = 4.2 m  # to the underside
rise = eaves / 4
drop = -0.4 m
half = gallery - 0.6 m
part = 0.5

level ground at 0 m
level gallery at 3.6 m { G 4.1 kN/m2; Q 3 kN/m2 }
level roof at 7.2 m { G 4.1 kN/m2 }

section leg = tube { width = 90 mm; wall = 6.3 mm }
section beam = isection {
    depth  = 200 mm
    width  = 100 mm # the flange
    web    =   6 mm
    flange =  10 mm
}
material cast { E = 210 GPa; fy = 235 MPa; density = 7850 kg/m3 }

# Posts below the gallery.
column A1, A2 "Posts" {
    section  = "HEB 160"
    material = "S355" per "EN 10025-2"
    height   = 3.6 m
    hold minor at eaves/2 - 0.3 m
    load G 80 kN at top offset 20 mm about major
    load Q -drop * 30 kN/m
    load Q rise * part * 10 kN/m at top
    load G 1.2 kN/m about major from 0.3 m to 3.3 m
}

column A3 "Post" as A1 { base fixed about major; height = eaves }
column A4 as A3
column A5 { section = "HEB 160"; material = "S355" per "EN 10025-2"; height = eaves^1 + drop; load G 80 kN; load Q 2*drop*-1*20 kN/m }
column A6 { section = tube { width = 120 mm; wall = 5 mm; made = hot }; material = "S355H"; from ground to roof; hold both at gallery; load floor 12 m2 at gallery; load G 10 kN at half }
column A7 {
    section = tube {
        width = 120 mm
        wall = 5 mm
        made = hot
    }
    material = "S355H"; height = 14 ft 6 in
    load G 80 kN
    limit slenderness = 40
    limit sway = eaves / 300
    depart sway because "not worked out"
}
strut A8 { section = leg; material = cast; length = 3.6 m; load G 600 kN; load Q 80 kN; hold twist at drop*-1 }
tie A9 { section = beam; material = s235; length = 3 m; load G -80 kN }
`

const more = "material s235 = \"S235\"\nover = 0.3 m ; under = over * 2\n\ncolumn M1 { section = \"HEB 160\"; material = s235; height = 3.6 m; load G 10 kN }\n"

// TestRich takes every offer at every place of a calculation with a little of
// everything: as it is, laid out, with other line ends, and with every blank line
// taken out.
func TestRich(t *testing.T) {
	step := 5
	if testing.Short() {
		step = 17
	}
	for name, change := range map[string]func(string) string{
		"as it is":  func(s string) string { return s },
		"laid out":  lang.Format,
		"crlf":      func(s string) string { return strings.ReplaceAll(s, "\n", "\r\n") },
		"no blanks": func(s string) string { return strings.ReplaceAll(s, "\n\n", "\n") },
		"tabs":      func(s string) string { return strings.ReplaceAll(s, "    ", "\t") },
	} {
		files := map[string]string{"a.kern": change(rich), "more.kern": change(more)}
		report := check(files)
		for _, d := range report.Diagnostics {
			if d.Severity == lang.Error && d.Member == "" {
				t.Fatalf("%s: %s: %s", name, d.Rule, d.Message)
			}
		}
		done := map[string]bool{}
		for file, text := range files {
			for at := 0; at <= len(text); at += step {
				span := lang.Span{Start: int32(at), End: int32(at)}
				for _, o := range At(Request{Report: report, File: file, Span: span}) {
					// an offer that several places of a statement have in common
					key := o.Title
					for _, e := range o.Edits() {
						key += e.File + e.New + string(rune(e.Span.Start)) + string(rune(e.Span.End))
					}
					if done[key] {
						continue
					}
					done[key] = true
					t.Run(name, func(t *testing.T) { hold(t, files, report, file, span, o) })
					if name == "laid out" {
						t.Logf("%s %s", o.Kind, o.Title)
					}
				}
			}
		}
	}
}
