package lsp

import (
	"encoding/json"
	"fmt"
	"slices"
	"strings"
	"testing"
	"time"

	"kern/checker/generate"
	"kern/checker/output"
	"kern/lang"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// TestReadingsAdvertised holds that hovers, hints, lenses and commands are
// offered to clients that know them and to no others, and that each command that
// is offered is there.
func TestReadingsAdvertised(t *testing.T) {
	with, without := start(t, t.TempDir()), start(t, t.TempDir())
	with.initialize(`{"workspace": {"executeCommand": {}}}`, "", ".")
	without.initialize(`{"textDocument": {"hover": null, "inlayHint": null, "codeLens": null}}`, "", ".")
	c := with.result.Capabilities
	if c.HoverProvider == nil || c.InlayHintProvider == nil || c.CodeLensProvider == nil {
		t.Errorf("a client that can do all is offered hovers %v, hints %v, lenses %v", c.HoverProvider, c.InlayHintProvider, c.CodeLensProvider)
	}
	if !slices.Contains(c.ExecuteCommandProvider.Commands, commandWorking) {
		t.Errorf("commands: %v", c.ExecuteCommandProvider.Commands)
	}
	for _, name := range c.ExecuteCommandProvider.Commands {
		if commands[name] == nil {
			t.Errorf("the command %s is offered and not there", name)
		}
	}
	if c := without.result.Capabilities; c.HoverProvider != nil || c.InlayHintProvider != nil || c.CodeLensProvider != nil || len(c.ExecuteCommandProvider.Commands) > 0 {
		t.Errorf("a client that knows none is offered hovers %v, hints %v, lenses %v, commands %v", c.HoverProvider, c.InlayHintProvider, c.CodeLensProvider, c.ExecuteCommandProvider.Commands)
	}
}

// TestPictures holds that pictures go to clients that render Markdown, and to no
// terminal.
func TestPictures(t *testing.T) {
	for _, x := range []struct {
		name, general string
		want          bool
	}{
		{"Visual Studio Code", `{"markdown": {"parser": "marked"}}`, true},
		{"coc.nvim", `{"markdown": {"parser": "marked"}}`, false},
		{"Neovim", `{}`, false},
		{"", `null`, false},
	} {
		var p protocol.InitializeParams
		raw := fmt.Sprintf(`{"processId":null,"rootUri":null,"clientInfo":{"name":%q},"capabilities":{"textDocument":{"hover":{"contentFormat":["markdown"]}},"general":%s}}`, x.name, x.general)
		if err := protocol.Unmarshal([]byte(raw), &p); err != nil {
			t.Fatal(err)
		}
		c, err := newClient(&p)
		if err != nil {
			t.Fatal(err)
		}
		if c.Pictures != x.want || !c.HoverMarkdown {
			t.Errorf("%s %s: pictures %v, Markdown %v", x.name, x.general, c.Pictures, c.HoverMarkdown)
		}
	}
}

// TestWorkingAddress holds that the address of a working leads back to its member,
// also where a client has escaped it once more, and that others lead nowhere.
func TestWorkingAddress(t *testing.T) {
	for _, x := range []struct {
		file          uri.URI
		member, check string
	}{{"file:///tmp/a%20b/c.kern", "A1", ""}, {"untitled:One", "Stütze_1", "flexural-buckling-minor"}, {"file:///c%3A/x&y=1.kern", "µ", ""}} {
		if canonical, err := uri.Parse(string(x.file)); err != nil {
			t.Fatal(err)
		} else {
			x.file = canonical
		}
		u := workingURI(x.file, x.member, x.check)
		if u.Scheme() != workingScheme {
			t.Errorf("%s has the scheme %s", u, u.Scheme())
		}
		parsed, err := uri.Parse(string(u)) // as it comes in from a client
		if err != nil {
			t.Fatal(err)
		}
		for _, v := range []uri.URI{u, parsed} {
			if file, member, check := fromWorkingURI(v); file != x.file || member != x.member || check != x.check {
				t.Errorf("%s leads to %q %q %q", v, file, member, check)
			}
		}
	}
	for _, u := range []uri.URI{"kern-working:", "kern-working:/A1.md", "kern-working:/.md?ZmlsZTovLy9h", "%", "kern-working:/A1.md?%zz", "kern-working:/A1.md?!!"} {
		if file, _, _ := fromWorkingURI(u); file != "" {
			t.Errorf("%s leads to %s", u, file)
		}
	}
}

// TestWorkingDocument opens the working as a document that the server makes.
func TestWorkingDocument(t *testing.T) {
	s := start(t, t.TempDir())
	s.initialize(``, "", ".")
	s.openText("a.kern", "basis { standard \"elastic\" }\ncolumn A1 { section = \"HEB 100\"; material = \"S235\"; height = 3 m; load 10 kN }\n")
	u := workingURI(s.uri("a.kern"), "A1", "")
	raw, err := s.ask("workspace/textDocumentContent", `{"uri":"`+string(u)+`"}`)
	if err != nil {
		t.Fatal(err)
	}
	var got struct{ Text string }
	if err := json.Unmarshal(raw, &got); err != nil || !strings.HasPrefix(got.Text, "# A1\n") || !strings.Contains(got.Text, "## elastic-buckling-minor") {
		t.Errorf("%v: %s", err, got.Text)
	}
	if _, err := s.ask("workspace/textDocumentContent", `{"uri":"kern-working:/A1.md"}`); err == nil {
		t.Error("an address without a file was answered")
	}
	if schemes := contentSchemes(); !slices.Contains(schemes, workingScheme) {
		t.Errorf("the schemes are %v", schemes)
	}
}

// readingOf is a file of one project as a request sees it.
func readingOf(t testing.TB, text string) *File {
	t.Helper()
	s := start(t, t.TempDir())
	s.initialize(``, "", ".")
	s.openText("a.kern", text)
	s.settle()
	f, err := s.server.File(s.server.ctx, s.uri("a.kern"))
	if err != nil || f == nil {
		t.Fatalf("no file: %v", err)
	}
	return f
}

// TestReadingEverywhere asks for a hover at every place of calculations that have
// all there is, whole and cut off anywhere, and holds that spans lie in the text
// around the place, and that hints stand in order inside it.
func TestReadingEverywhere(t *testing.T) {
	text := generate.Shared + generate.Columns(3, 2) + `
level ground at 0 m
level roof at 7.2 m { G 0.85 kN/m2; Q 0.4 kN/m2 }
share = 14 ft 6 in * 9.6 m / 2
combination lift = 0.9 G + -1.5 W
material cast { E = 100 GPa; fy = 120 MPa; nu = 0.27; density = 7200 kg/m3 }
column A1, A2 "Post" as C1 { from ground to roof; load floor share at roof; hold both at height / 2
    require N_b_minor >= 40 kN because "why"; depart flexural-buckling-minor because "x"; limit slenderness = 180; section = rod { diameter = 50 mm }; material = cast
    effective = 0.9 about minor; note "n"; selfweight on; load G 2 kN at top offset 10 mm about major and 5 mm about minor; load W 1 kNm about major at top }
`
	cuts := []int{len(text)}
	for i := len(text) - 700; i < len(text); i += 37 {
		cuts = append(cuts, i)
	}
	for _, cut := range cuts {
		f := readingOf(t, text[:cut])
		n := 0
		for offset := int32(0); offset <= int32(cut); offset += 3 {
			page, span, ok := hoverAt(f, offset, paper{markdown: true, pictures: true})
			if !ok {
				continue
			}
			n++
			if page == "" || span.Start > offset || span.End < offset || span.End > int32(cut) {
				t.Fatalf("cut at %d, at %d: %v %q", cut, offset, span, page)
			}
			if strings.Contains(page, "NaN") || strings.Contains(page, "Inf") {
				t.Errorf("cut at %d, at %d: %s", cut, offset, page)
			}
		}
		if n < 100 {
			t.Errorf("cut at %d: only %d hovers", cut, n)
		}
		hints := hintsIn(f, lang.Span{End: int32(cut)}, DefaultSettings())
		last := int32(0)
		for _, h := range hints {
			if h.offset < last || h.offset > int32(cut) || h.label == "" || strings.ContainsAny(h.label, "\r\n") || strings.Contains(h.label, "NaN") {
				t.Errorf("cut at %d: the hint %q at %d", cut, h.label, h.offset)
			}
			last = h.offset
			if h.tip != nil && (h.tip(true) == "" || h.tip(false) == "") {
				t.Errorf("cut at %d: the hint %q has an empty tooltip", cut, h.label)
			}
		}
		lensesOf(f)
	}
}

// TestCriticalIsThatOfTheDerivation holds that the critical force shown for a
// stretch is the one that the standard works out for it.
func TestCriticalIsThatOfTheDerivation(t *testing.T) {
	f := readingOf(t, generate.Shared+generate.Columns(60, 4))
	compared := 0
	for _, r := range f.Report().Members {
		record, frame := r.Derive(), r.Frame()
		for axis, letter := range []string{"y", "z"} {
			id, _ := r.Symbol("N_cr_" + letter)
			l, _ := r.Symbol("L_cr_" + letter)
			var lcr, ncr float64
			for _, s := range record.Steps {
				if s.Group == "flexural-buckling-major" || s.Group == "flexural-buckling-minor" {
					switch s.Symbol {
					case l:
						lcr = s.Value
					case id:
						ncr = s.Value
					}
				}
			}
			for _, s := range frame.Stretches[axis] {
				if s.Effective() == lcr {
					compared++
					if got := r.Critical(axis, s); got/ncr-1 > 1e-12 || got/ncr-1 < -1e-12 {
						t.Errorf("%s, %s: %g for %g", r.Name, letter, got, ncr)
					}
				}
			}
		}
	}
	if compared < 100 {
		t.Errorf("only %d compared", compared)
	}
}

// TestHintsFollowSettings holds that each setting switches its kind of hint, and
// only that.
func TestHintsFollowSettings(t *testing.T) {
	f := readingOf(t, generate.Shared+"a = 2 * 3 ft\n"+generate.Columns(2, 1))
	all := hintsIn(f, lang.Span{End: f.Text.Len()}, DefaultSettings())
	kinds := map[hintKind]int{}
	for _, h := range all {
		kinds[h.kind]++
	}
	for kind, flag := range map[hintKind]func(*Settings) *bool{
		resultHint: func(s *Settings) *bool { return &s.HintResults }, sectionHint: func(s *Settings) *bool { return &s.HintSections },
		strengthHint: func(s *Settings) *bool { return &s.HintStrengths }, valueHint: func(s *Settings) *bool { return &s.HintValues },
		unitHint: func(s *Settings) *bool { return &s.HintUnits }, assumptionHint: func(s *Settings) *bool { return &s.HintAssumptions },
	} {
		settings := DefaultSettings()
		*flag(&settings) = false
		left := hintsIn(f, lang.Span{End: f.Text.Len()}, settings)
		if kinds[kind] == 0 || len(left) != len(all)-kinds[kind] {
			t.Errorf("%s: %d of %d hints are left, %d were of the kind", kind, len(left), len(all), kinds[kind])
		}
	}
}

// TestUnitNames names every atom and the usual compound units.
func TestUnitNames(t *testing.T) {
	for text, want := range map[string]string{"kN/m2": "kilonewton per square metre", "mm4": "millimetre to the power of 4", "kip-ft": "kip foot", "N/mm²": "newton per square millimetre",
		"kN*m": "kilonewton metre", "kg/m3": "kilogram per cubic metre", "1/m": "per metre", "m^2": "square metre", "°": "degree", "kNm2": ""} {
		if got := unitName(text); got != want {
			t.Errorf("%s is %q, want %q", text, got, want)
		}
	}
	for symbol := range atoms {
		if unitName(symbol) == "" {
			t.Errorf("%s has no name", symbol)
		}
	}
}

// BenchmarkHover measures hovers in a file of 10,000 columns: over the name of a
// member, a line, and the text of a section.
func BenchmarkHover(b *testing.B) {
	f := readingOf(b, generate.Shared+generate.Columns(10_000, 1))
	text := f.Text.String()
	for _, what := range []string{"C5000 ", "load G", "s355\n", "S355\""} {
		at := int32(strings.Index(text, "column C5000 "))
		if what == "S355\"" {
			at = 0
		}
		at += int32(strings.Index(text[at:], what))
		b.Run(strings.TrimSpace(what), func(b *testing.B) {
			times := make([]time.Duration, 0, b.N)
			for b.Loop() {
				start := time.Now()
				if _, _, ok := hoverAt(f, at, paper{markdown: true, pictures: true}); !ok {
					b.Fatal("nothing")
				}
				times = append(times, time.Since(start))
			}
			slices.Sort(times)
			b.ReportMetric(float64(times[len(times)*95/100].Microseconds()), "p95-µs")
		})
	}
}

// BenchmarkHints measures the hints of a screenful, and the lenses of the whole
// file, in a file of 10,000 columns.
func BenchmarkHints(b *testing.B) {
	f := readingOf(b, generate.Shared+generate.Columns(10_000, 1))
	at := int32(strings.Index(f.Text.String(), "column C5000 "))
	b.Run("screen", func(b *testing.B) {
		for b.Loop() {
			hintsIn(f, lang.Span{Start: at, End: at + 3000}, DefaultSettings())
		}
	})
	b.Run("top", func(b *testing.B) {
		for b.Loop() {
			hintsIn(f, lang.Span{Start: 0, End: 3000}, DefaultSettings())
		}
	})
	b.Run("file", func(b *testing.B) {
		for b.Loop() {
			hintsIn(f, lang.Span{End: f.Text.Len()}, DefaultSettings())
		}
	})
	b.Run("lenses", func(b *testing.B) {
		for b.Loop() {
			lensesOf(f)
		}
	})
	b.Run("working", func(b *testing.B) {
		r := membersOf(f, "C5000")[0]
		for b.Loop() {
			output.WorkingMarkdown(r, "")
		}
	})
}
