package checker

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"kern/checker/generate"
	"kern/checker/model"
	"kern/lang"
)

// mentionsText has every place where a name can stand, marked ⟨…⟩, and many
// where the same word is not that name.
const mentionsText = `include "b.kern"
basis {
    standard "EN 1993-1-1:2005"
    actions "EN 1990:2002" eq "6.10"
    gamma_M1 = ⟨factor⟩ because "factor of safety"
}
⟨factor⟩ = 1.1
⟨half⟩ = ⟨tall⟩ / 2 + min(⟨half2⟩, 3 m)
⟨half2⟩ = (1 m + 0 m) * ⟨factor⟩
material ⟨s355⟩ = "S355" per "EN 10025-2"
material ⟨cast⟩ { E = 100 GPa * ⟨factor⟩; fy = 120 MPa; density = 7200 kg/m3 }
section ⟨cold⟩ = tube { width = ⟨wide⟩; wall = 6 mm; made = cold }
section ⟨c⟩ = given { A = 24 cm2; I_major = 612 cm4; I_minor = 201 cm4; curve = c }
⟨wide⟩ = 90 mm
case ⟨G⟩ permanent
case ⟨Q⟩ imposed "C3"
case ⟨wind⟩ wind
combination ⟨both2⟩ = 1.1 ⟨G⟩ + 0.5⟨Q⟩ - (⟨factor⟩ * ⟨wind⟩) + ⟨Q⟩
level ⟨ground⟩ at 0 m
level ⟨roof⟩ at ⟨tall⟩ { ⟨G⟩ 4.1 kN/m2; ⟨Q⟩ ⟨pressure⟩ }
⟨pressure⟩ = 5 kN/m2
column ⟨A1⟩ "A1 of roof" {
    section = ⟨cold⟩
    material = ⟨s355⟩
    from ⟨ground⟩ to ⟨roof⟩
    base fixed about major
    hold both at ⟨half⟩
    effective = ⟨factor⟩ about minor
    load ⟨G⟩ 80 kN at top
    load ⟨Q⟩ ⟨push⟩ at ⟨half⟩ offset ⟨wide⟩ about major and ⟨wide⟩ / 2 about minor
    load floor 18 m2 at ⟨roof⟩
    load ⟨wind⟩ 1.8 kN/m about major from ⟨half2⟩ to ⟨half⟩
    load ⟨wind⟩ 6 kN across major at ⟨half⟩
    limit sway = height / 300 * ⟨factor⟩
    require N_b_minor >= ⟨push⟩ because "push"
    depart flexural-buckling-minor because "G"
    note "G and roof"
    selfweight off
}
⟨push⟩ = 5 kN
column ⟨A2⟩, ⟨A3⟩ "Like A1" as ⟨A1⟩ {
    section = bar { width = ⟨wide⟩ }
    height = ⟨tall⟩ * 0.9
    hold minor at 1 m
}
`

// TestMentions holds the names that are found in every place of the language
// against those that are marked, and what each leads to.
func TestMentions(t *testing.T) {
	var b strings.Builder
	var want []lang.Span
	for i, part := range strings.Split(mentionsText, "⟨") {
		if i > 0 {
			name, rest, _ := strings.Cut(part, "⟩")
			want = append(want, lang.Span{Start: int32(b.Len()), End: int32(b.Len() + len(name))})
			part = name + rest
		}
		b.WriteString(part)
	}
	text := b.String()
	files := map[string]string{"a.kern": text, "b.kern": "tall = 4 m\n"}
	report := Check(load(files), nil)
	var got []lang.Span
	f := report.Project.Files["a.kern"]
	c := report.Calculations("a.kern")
	if len(c) != 1 || len(report.Calculations("b.kern")) != 1 || len(report.Calculations("c.kern")) != 0 {
		t.Fatalf("%d calculations", len(c))
	}
	for i, d := range f.Decls {
		Mentions(c[0], d, func(m Mention) {
			got = append(got, lang.Span{Start: f.Starts[i] + m.Place.Span.Start, End: f.Starts[i] + m.Place.Span.End})
		})
	}
	slices.SortFunc(got, func(a, b lang.Span) int { return int(a.Start - b.Start) })
	show := func(list []lang.Span) []string {
		var out []string
		for _, s := range list {
			out = append(out, fmt.Sprint(strings.Count(text[:s.Start], "\n")+1, " ", s.Of(text)))
		}
		return out
	}
	if g, w := show(got), show(want); !slices.Equal(g, w) {
		t.Errorf("found %q\nwant  %q", g, w)
	}
	// every mark is found from its first letter to behind its last, and leads to
	// all the places of its name
	for _, s := range want {
		name := s.Of(text)
		for offset := s.Start; offset <= s.End; offset++ {
			m, ok := report.NameAt("a.kern", offset)
			if !ok || m.Named.Name != name {
				t.Errorf("at %d of %s: %v", offset-s.Start, name, m.Named)
			}
		}
		m, _ := report.NameAt("a.kern", s.Start)
		count := 0
		for _, w := range want {
			if w.Of(text) == name {
				count++
			}
		}
		if name == "tall" {
			count++ // its declaration, in the other file
		}
		refs := report.References(m.Named)
		declared := 0
		for _, r := range refs {
			file, span := report.Where(r.Place)
			if span.Of(files[file]) != name {
				t.Errorf("a reference of %s is %q", name, span.Of(files[file]))
			}
			if r.Declares {
				declared++
			}
		}
		if len(refs) != count || declared != 1 {
			t.Errorf("%s: %d references, %d declare it, want %d and 1", name, len(refs), declared, count)
		}
	}
	for _, word := range []string{"floor 18", "height /", "about major", "fixed", "imposed", "flexural", "made", "N_b_minor"} {
		if m, ok := report.NameAt("a.kern", int32(strings.Index(text, word))); ok {
			t.Errorf("the word %q is the name %s", word, m.Named.Name)
		}
	}
}

// TestResultsOf holds the results of a declaration and of a file against a
// search through all.
func TestResultsOf(t *testing.T) {
	files := map[string]string{"a.kern": generate.Shared + generate.Columns(9, 1) + "column X1, X2 as C3 { height = 3 m }\n", "b.kern": "x = 1 m\n", "c.kern": generate.Shared + generate.Columns(3, 2)}
	report := Check(load(files), nil)
	seen := 0
	for name, f := range report.Project.Files {
		inFile := report.ResultsIn(name)
		for _, d := range f.Decls {
			var want []*Result
			for _, m := range report.Members {
				if m.Member.Decl == d {
					want = append(want, m)
				}
			}
			if got := report.Results(d); !slices.Equal(got, want) {
				t.Errorf("%s: %d results, want %d", name, len(got), len(want))
			}
			seen += len(want)
			inFile = inFile[len(want):]
		}
		if len(inFile) > 0 {
			t.Errorf("%s has %d results too many", name, len(inFile))
		}
	}
	if seen != 14 {
		t.Errorf("%d results", seen)
	}
	n := report.Calculations("c.kern")[0].Env.Names["s355"]
	users := report.Users(n)
	if n.Kind != model.MaterialName || len(users) == 0 || len(users) > 3 {
		t.Errorf("%d members use s355 of c.kern", len(users))
	}
	if report.Results(&lang.Decl{}) != nil {
		t.Error("a declaration that nobody knows has results")
	}
	if file, _ := report.Where(lang.Place{Decl: &lang.Decl{}}); file != "" {
		t.Error("a declaration that nobody knows has a place")
	}
}
