package lsp

import (
	"context"
	"encoding/json"
	"fmt"
	"maps"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/generate"
	"kern/lang"

	"go.lsp.dev/protocol"
	"golang.org/x/tools/txtar"
)

// TestNavigationGates holds that each of these features is offered to a client
// that can use it, and to no other.
func TestNavigationGates(t *testing.T) {
	offered := func(patch string) map[string]json.RawMessage {
		s := start(t, t.TempDir())
		s.initialize(patch, "")
		raw, err := protocol.Marshal(&s.result.Capabilities)
		if err != nil {
			t.Fatal(err)
		}
		var all map[string]json.RawMessage
		if err := json.Unmarshal(raw, &all); err != nil {
			t.Fatal(err)
		}
		if w, ok := all["workspace"]; ok {
			var below map[string]json.RawMessage
			if err := json.Unmarshal(w, &below); err != nil {
				t.Fatal(err)
			}
			maps.Copy(all, below)
		}
		return all
	}
	const with = `{"workspace": {"fileOperations": {"willRename": true}}, "textDocument": {"linkedEditingRange": {}}}`
	everything := offered(with)
	for _, c := range []struct{ part, name, offer string }{
		{"textDocument", "definition", "definitionProvider"}, {"textDocument", "typeDefinition", "typeDefinitionProvider"},
		{"textDocument", "references", "referencesProvider"}, {"textDocument", "documentHighlight", "documentHighlightProvider"},
		{"textDocument", "linkedEditingRange", "linkedEditingRangeProvider"}, {"textDocument", "rename", "renameProvider"}, {"textDocument", "documentSymbol", "documentSymbolProvider"},
		{"textDocument", "foldingRange", "foldingRangeProvider"}, {"textDocument", "selectionRange", "selectionRangeProvider"},
		{"textDocument", "documentLink", "documentLinkProvider"}, {"textDocument", "semanticTokens", "semanticTokensProvider"},
		{"textDocument", "callHierarchy", "callHierarchyProvider"}, {"workspace", "symbol", "workspaceSymbolProvider"},
		{"workspace", "fileOperations", "fileOperations"},
	} {
		if everything[c.offer] == nil {
			t.Errorf("%s is not offered", c.offer)
		}
		if got := offered(`{"` + c.part + `": {"` + c.name + `": null}}`)[c.offer]; got != nil {
			t.Errorf("%s is offered to a client without %s: %s", c.offer, c.name, got)
		}
	}
	for _, c := range []struct{ patch, offer, want string }{
		{`{"textDocument": {"rename": {"prepareSupport": false}}}`, "renameProvider", `true`},
		{`{"textDocument": {"rename": {"prepareSupport": true}}}`, "renameProvider", `{"prepareProvider":true}`},
		{`{"workspace": {"symbol": {"resolveSupport": null}}}`, "workspaceSymbolProvider", `true`},
		{`{}`, "workspaceSymbolProvider", `{"resolveProvider":true}`},
		{`{"textDocument": {"semanticTokens": {"formats": []}}}`, "semanticTokensProvider", ``},
		{`{"textDocument": {"semanticTokens": {"requests": {"full": true, "range": false}}}}`, "semanticTokensProvider", `"full":true}`},
		{`{"textDocument": {"semanticTokens": {"requests": {"full": {"delta": true}, "range": null}}}}`, "semanticTokensProvider", `"full":{"delta":true}}`},
		{`{"textDocument": {"semanticTokens": {"requests": {"full": false}}}}`, "semanticTokensProvider", `"range":true}`},
	} {
		if got := string(offered(c.patch)[c.offer]); !strings.HasSuffix(got, c.want) || c.want == "" && got != "" {
			t.Errorf("%s: %s is %s, want %s", c.patch, c.offer, got, c.want)
		}
	}
}

// fileOf is a file of a project that no editor has open.
func fileOf(t testing.TB, files map[string]string, name string, unit encoding) *File {
	t.Helper()
	project := lang.Load(slices.Sorted(maps.Keys(files)), func(name string) (string, error) {
		if text, ok := files[name]; ok {
			return text, nil
		}
		return "", os.ErrNotExist
	}, nil)
	w := &workspace{server: newServer(context.Background(), Options{}), kind: wholeFolder}
	s := &Snapshot{workspace: w, unit: unit, loaded: make(chan struct{}), checked: make(chan struct{}), project: project, report: checker.Check(project, nil)}
	s.once.Do(func() {})
	close(s.loaded)
	close(s.checked)
	if project.Files[name] == nil {
		return nil
	}
	return &File{Snapshot: s, Name: name, Text: s.textOf(name), Tree: project.Files[name]}
}

// projects are the calculations below the repository's test data.
func projectsOf(t testing.TB) map[string]map[string]string {
	t.Helper()
	out := map[string]map[string]string{}
	folders, err := filepath.Glob("../testdata/*/*.kern")
	if err != nil {
		t.Fatal(err)
	}
	for _, path := range folders {
		data, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		put(out, filepath.Base(filepath.Dir(path)), filepath.Base(path), string(data))
	}
	archives, err := filepath.Glob("../testdata/*/*.txtar")
	if err != nil {
		t.Fatal(err)
	}
	for _, path := range archives {
		archive, err := txtar.ParseFile(path)
		if err != nil {
			t.Fatal(err)
		}
		for _, f := range archive.Files {
			if filepath.Ext(f.Name) == ".kern" {
				put(out, filepath.Base(path), f.Name, string(f.Data))
			}
		}
	}
	if len(out) < 50 {
		t.Fatalf("only %d projects", len(out))
	}
	return out
}

// TestRenameChangesNothing renames every name of every project to a new one and
// back: every member keeps its result to the last bit, every rule is reported as
// often as before, and the texts come back.
func TestRenameChangesNothing(t *testing.T) {
	renamed, refusals := 0, 0
	for project, files := range projectsOf(t) {
		if project == "quotes-name.txtar" {
			continue // is about texts that are names by mistake; texts are not renamed
		}
		for name := range files {
			f := fileOf(t, files, name, utf16Units)
			if f == nil || len(files[name]) > 20_000 {
				continue
			}
			before := summary(f.report)
			done := map[lang.Place]bool{}
			for i, d := range f.Tree.Decls {
				for _, c := range f.report.Calculations(name) {
					checker.Mentions(c, d, func(m checker.Mention) {
						if done[m.Named.Place] || len(done) > 5 {
							return
						}
						done[m.Named.Place] = true
						if slices.ContainsFunc(f.spots(nameds([]checker.Mention{m})), func(p spot) bool { return p.declares && !p.mention.Declares }) {
							return // given twice: renaming mends that
						}
						offset := f.Tree.Starts[i] + m.Place.Span.Start
						after, err := renameIn(f, files, offset, "zz_other")
						if err != nil {
							if !isWord(m.Named.Name) {
								t.Logf("%s %s: %s: %v", project, name, m.Named.Name, err)
							}
							refusals++
							return
						}
						renamed++
						g := fileOf(t, after, name, utf16Units)
						if got := summary(g.report); got != before {
							t.Errorf("%s: renaming %s in %s changes\n%s\nto\n%s", project, m.Named.Name, name, before, got)
						}
					})
				}
			}
		}
	}
	t.Logf("%d names renamed, %d refused", renamed, refusals)
	if renamed < 500 || refusals > renamed/50 {
		t.Errorf("%d names renamed, %d refused", renamed, refusals)
	}
}

// renameIn gives the files with a name renamed.
func renameIn(f *File, files map[string]string, offset int32, name string) (map[string]string, error) {
	edits, err := rename(context.Background(), f, offset, name, nil)
	if err != nil {
		return nil, err
	}
	out := maps.Clone(files)
	for u, e := range edits.files {
		text := files[string(u)]
		for _, x := range slices.Backward(e.edits) {
			start, end := slowOffset(text, x.Range.Start, utf16Units), slowOffset(text, x.Range.End, utf16Units)
			text = text[:start] + x.NewText + text[end:]
		}
		out[string(u)] = text
	}
	return out, nil
}

// summary is what a report says without the names.
func summary(r *checker.Report) string {
	var b strings.Builder
	for _, m := range r.Members {
		fmt.Fprintf(&b, "%s %x %s %d\n", m.Verdict, math.Float64bits(m.Utilisation), m.Governing, len(m.Checks))
	}
	rules := map[string]int{}
	for _, d := range r.Diagnostics {
		rules[d.Rule]++
	}
	for _, rule := range slices.Sorted(maps.Keys(rules)) {
		fmt.Fprintf(&b, "%s %d\n", rule, rules[rule])
	}
	return b.String()
}

// TestNavigationEverywhere asks for everything at every place of every project,
// broken ones too, and holds the answers against what must be true of any.
func TestNavigationEverywhere(t *testing.T) {
	ctx := context.Background()
	w := newTokenWays(protocol.SemanticTokensClientCapabilities{Formats: []protocol.TokenFormat{protocol.TokenFormatRelative},
		Requests: protocol.ClientSemanticTokensRequestOptions{Full: protocol.Boolean(true)}, TokenTypes: []string{"keyword", "variable", "number", "string", "comment", "operator", "function", "property", "type", "class", "enumMember"}})
	for project, files := range projectsOf(t) {
		for name := range files {
			for unit := range encoding(3) {
				if unit != utf16Units && !strings.ContainsFunc(files[name], func(r rune) bool { return r >= 0x80 }) {
					continue // all the same
				}
				f := fileOf(t, files, name, unit)
				if f == nil {
					continue
				}
				soundTokens(t, f, w)
				if unit != utf16Units {
					continue
				}
				soundFolds(t, f)
				soundSymbols(t, f)
				f.findings(name, "a")
				step := int32(1 + len(f.Tree.Text)/80)
				for offset := int32(0); offset <= f.Text.Len(); offset += step {
					definitions(f, offset)
					typeDefinitions(f, offset)
					highlights(f, offset)
					if found := mentionsAt(f, offset); len(found) > 0 {
						if _, err := allSpots(ctx, f, nameds(found), nil); err != nil {
							t.Fatal(err)
						}
					}
					spans := selections(f, offset)
					for i, s := range spans {
						if !s.Contains(offset) || i > 0 && (s.Start > spans[i-1].Start || s.End < spans[i-1].End || s == spans[i-1]) {
							t.Fatalf("%s %s at %d: the selection grows %v", project, name, offset, spans)
						}
					}
				}
			}
		}
	}
}

// soundTokens holds the tokens of a file against its text: in order, apart,
// inside their lines, in whole characters; and those of a part and of all cores
// against those of one.
func soundTokens(t *testing.T, f *File, w *tokenWays) {
	t.Helper()
	data := encodeTokens(f, w)
	one := newTokenEncoder(f, w)
	one.declarations(0, len(f.Tree.Decls))
	if !slices.Equal(one.out, data) {
		t.Fatalf("%s: the tokens depend on the number of cores", f.Name)
	}
	spans := tokenSpans(t, f, data)
	for i, s := range spans {
		if i > 0 && s.Start < spans[i-1].End || s.End <= s.Start || strings.ContainsAny(s.Of(f.Tree.Text), "\r\n") {
			t.Fatalf("%s: token %d %q overlaps another or is none", f.Name, i, s.Of(f.Tree.Text))
		}
	}
	half := lang.Span{Start: f.Text.Len() / 3, End: 2 * f.Text.Len() / 3}
	var want []lang.Span
	for _, s := range spans {
		if s.End > half.Start && s.Start < half.End {
			want = append(want, s)
		}
	}
	if got := tokenSpans(t, f, encodeTokensIn(f, w, half)); !slices.Equal(got, want) {
		t.Fatalf("%s: the tokens of a part are %v, want %v", f.Name, got, want)
	}
}

// tokenSpans reads tokens back, with the slow converter.
func tokenSpans(t *testing.T, f *File, data []uint32) []lang.Span {
	t.Helper()
	lines := slowLines(f.Tree.Text)
	starts := make([]int32, len(lines)+1)
	for i, l := range lines {
		starts[i+1] = starts[i] + int32(len(l))
	}
	var out []lang.Span
	line, char := uint32(0), uint32(0)
	for i := 0; i < len(data); i += 5 {
		if data[i] > 0 {
			line, char = line+data[i], 0
		}
		char += data[i+1]
		text := lines[line]
		start, end := slowOffset(text, protocol.Position{Character: char}, f.unit), slowOffset(text, protocol.Position{Character: char + data[i+2]}, f.unit)
		if got := slowUnits(text[start:end], f.unit); got != int(data[i+2]) {
			t.Fatalf("%s: a token of %d units has %d in the text", f.Name, data[i+2], got)
		}
		out = append(out, lang.Span{Start: starts[line] + start, End: starts[line] + end})
	}
	return out
}

func soundFolds(t *testing.T, f *File) {
	t.Helper()
	for _, x := range folds(f) {
		if x.span.Start < 0 || x.span.End > f.Text.Len() || f.Text.Line(x.span.Start) >= f.Text.Line(x.span.End) {
			t.Fatalf("%s: a fold of %v", f.Name, x.span)
		}
	}
}

func soundSymbols(t *testing.T, f *File) {
	t.Helper()
	var sound func(list []symbol, within lang.Span)
	sound = func(list []symbol, within lang.Span) {
		for _, x := range list {
			if strings.TrimSpace(x.name) == "" || x.at.Start < x.whole.Start || x.at.End > x.whole.End || x.whole.Start < within.Start || x.whole.End > within.End {
				t.Fatalf("%s: symbol %q at %v in %v in %v", f.Name, x.name, x.at, x.whole, within)
			}
			sound(x.below, x.whole)
		}
	}
	sound(symbols(f, true), lang.Span{Start: 0, End: f.Text.Len()})
}

// TestTokenEdits holds that the edits lead from one row of tokens to the other,
// and are small after a small edit of a long file.
func TestTokenEdits(t *testing.T) {
	w := newTokenWays(protocol.SemanticTokensClientCapabilities{Formats: []protocol.TokenFormat{protocol.TokenFormatRelative},
		Requests: protocol.ClientSemanticTokensRequestOptions{Full: protocol.Boolean(true)}, TokenTypes: []string{"keyword", "variable", "number", "property"}})
	text := generate.Shared + generate.Columns(500, 1)
	before := encodeTokens(fileOf(t, map[string]string{"a.kern": text}, "a.kern", utf16Units), w)
	middle := strings.Index(text, "column C250")
	for _, edit := range []string{"", "\n", "# a comment\n", "x = 3 m\n", "column X9 { load 3 kN }\n\n", text[middle : middle+200]} {
		after := encodeTokens(fileOf(t, map[string]string{"a.kern": text[:middle] + edit + text[middle:]}, "a.kern", utf16Units), w)
		for _, way := range [][2][]uint32{{before, after}, {after, before}} {
			got, size := slices.Clone(way[0]), 0
			for _, e := range tokenEdits(way[0], way[1]) {
				got = slices.Replace(got, int(e.Start), int(e.Start+e.DeleteCount), e.Data...)
				size += len(e.Data) + int(e.DeleteCount)
			}
			if !slices.Equal(got, way[1]) {
				t.Errorf("%q: the edits do not lead to the tokens", edit)
			}
			if size > 500 {
				t.Errorf("%q: the edits have %d numbers", edit, size)
			}
		}
	}
}

// TestFuzzy holds the order in which names answer a query.
func TestFuzzy(t *testing.T) {
	for query, names := range map[string][]string{
		"hc":   {"HC", "hc2", "hall_column", "hallColumn", "thc"},
		"p1":   {"P1", "P10", "post_1", "grip1"},
		"roof": {"roof", "roof_load", "upper_roof", "rxoxoxf"},
		"s 3":  {"s3", "s355"},
	} {
		for i := 1; i < len(names); i++ {
			if a, b := fuzzy(query, names[i-1]), fuzzy(query, names[i]); a < b || b == 0 {
				t.Errorf("%q: %s has %d, %s has %d", query, names[i-1], a, names[i], b)
			}
		}
	}
	for _, no := range [][2]string{{"cba", "abc"}, {"hh", "h"}, {"x", ""}} {
		if fuzzy(no[0], no[1]) != 0 {
			t.Errorf("%q answers %q", no[1], no[0])
		}
	}
}

// BenchmarkNavigation measures each feature in a file of 10,000 columns.
func BenchmarkNavigation(b *testing.B) {
	text := generate.Shared + generate.Columns(10_000, 1)
	f := fileOf(b, map[string]string{"a.kern": text}, "a.kern", utf16Units)
	use := int32(strings.LastIndex(text, "= s355")) + 3
	w := newTokenWays(protocol.SemanticTokensClientCapabilities{Formats: []protocol.TokenFormat{protocol.TokenFormatRelative},
		Requests: protocol.ClientSemanticTokensRequestOptions{Full: protocol.Boolean(true)}, TokenTypes: []string{"keyword", "variable", "number", "string", "comment", "operator", "function", "property", "type", "class", "enumMember"}})
	data := encodeTokens(f, w)
	for name, run := range map[string]func(){
		"definition": func() { definitions(f, use) },
		"highlight":  func() { highlights(f, use) },
		"references": func() { f.spots(nameds(mentionsAt(f, use))) },
		"rename": func() {
			if _, err := rename(context.Background(), f, use, "zz_other", nil); err != nil {
				b.Fatal(err)
			}
		},
		"symbols":         func() { f.symbolTree(symbols(f, true), anyKind) },
		"workspacesymbol": func() { f.findings("a.kern", "c99") },
		"folding":         func() { folds(f) },
		"selection":       func() { selections(f, use) },
		"tokens":          func() { encodeTokens(f, w) },
		"tokens-range":    func() { encodeTokensIn(f, w, lang.Span{Start: use - 2000, End: use}) },
		"tokens-edits":    func() { tokenEdits(data, data) },
		"tokens-json": func() {
			if _, err := protocol.Marshal(&protocol.SemanticTokens{Data: data}); err != nil {
				b.Fatal(err)
			}
		},
	} {
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				run()
			}
		})
	}
}
