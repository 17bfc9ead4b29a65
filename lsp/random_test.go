package lsp

import (
	"errors"
	"flag"
	"fmt"
	"math/rand/v2"
	"os"
	"path/filepath"
	"runtime"
	"slices"
	"strings"
	"testing"
	"time"

	"kern/checker"
	"kern/checker/generate"
	"kern/lang"

	"github.com/google/go-cmp/cmp"
	"go.lsp.dev/protocol"
)

var messages = flag.Int("messages", 10_000, "how many messages TestRandom sends")

// randomSnippets are typed at random places.
var randomSnippets = []string{"\n", "}", "{", "load G 10 kN at top\n", "column C3 as C1 { height = 3 m }\n", "column C1", "section s1 = \"HEB 180\"\n", "section s9 = \"IPE 200\"\n",
	"height = 4 m\n", "5", "kN", "as C2", " ", "#", "\"", "(", "x = 3 m\n", "case H imposed \"H\"\n", "include \"other.kern\"\n", "include \"deep/more.kern\"\n", "C2, C9", "basis {\n}\n", "ä", "𝄞", "\r\n", "\r", ","}

// TestRandom sends random messages, everything a client may send in any order,
// and holds what the client has been told against a check from scratch of what
// is open and on the disk.
func TestRandom(t *testing.T) {
	dir, err := filepath.EvalSymlinks(t.TempDir())
	if err != nil {
		t.Fatal(err)
	}
	s := start(t, dir)
	r := rand.New(rand.NewPCG(7, 8))
	names := []string{"a.kern", "other.kern", "deep/more.kern", "untitled:One"}
	fresh := func(name string) string {
		switch name {
		case "a.kern":
			return "include \"other.kern\"\n" + generate.Shared + generate.Columns(3, r.Uint64())
		case "other.kern":
			return "y = 2 m\ncolumn Z1 { section = \"HEB 100\"; material = \"S235\"; height = y; load G 500 kN }\n"
		}
		return "basis { standard \"elastic\" }\ncolumn D1 { section = \"HEB 100\"; material = \"S235\"; height = 4 m; load 900 kN }\n"
	}
	disk := map[string]string{}
	for _, name := range names[:3] {
		disk[name] = fresh(name)
		s.write(name, disk[name])
	}
	s.initialize(`{"general": {"positionEncodings": ["utf-`+[]string{"8", "16", "32"}[r.IntN(3)]+`"]}}`, "", ".")
	requests := []string{"textDocument/hover", "textDocument/completion", "textDocument/inlayHint", "textDocument/diagnostic", "workspace/diagnostic", "textDocument/documentSymbol", "textDocument/codeAction",
		"textDocument/semanticTokens/full", "textDocument/formatting", "textDocument/rename", "textDocument/references", "textDocument/definition", "no/such",
		"textDocument/typeDefinition", "textDocument/documentHighlight", "textDocument/linkedEditingRange", "textDocument/prepareRename", "textDocument/foldingRange",
		"textDocument/selectionRange", "textDocument/documentLink", "textDocument/codeLens", "textDocument/signatureHelp", "textDocument/rangeFormatting",
		"textDocument/onTypeFormatting", "textDocument/semanticTokens/range", "textDocument/semanticTokens/full/delta", "textDocument/prepareCallHierarchy", "workspace/symbol"}
	started, calls, checks := 0, make(chan struct{}, 64), 0
	var early runtime.MemStats
	var goroutines int
	for i := 0; i < *messages; i++ {
		name := names[r.IntN(len(names))]
		text, open := s.texts[name]
		switch n := r.IntN(100); {
		case !open:
			if text = disk[name]; name == "untitled:One" || r.IntN(4) == 0 {
				text = fresh(name)
			}
			s.openText(name, text)
		case n < 55:
			at := r.IntN(len(text) + 1)
			end := at + r.IntN(min(12, len(text)-at)+1)
			start, end32 := wholeRunes(text, at), wholeRunes(text, end)
			s.edit(name, start, end32, randomSnippets[r.IntN(len(randomSnippets))])
		case n < 60:
			s.texts[name] = fresh(name)
			s.change(name, &protocol.TextDocumentContentChangeWholeDocument{Text: s.texts[name]})
		case n < 64:
			s.closeText(name)
		case n < 68 && name != "untitled:One":
			s.write(name, text)
			disk[name] = text
			s.send("textDocument/didSave", &protocol.DidSaveTextDocumentParams{TextDocument: protocol.TextDocumentIdentifier{URI: s.uri(name)}})
		case n < 72 && name != "untitled:One":
			disk[name] = fresh(name)
			s.write(name, disk[name])
			s.send("workspace/didChangeWatchedFiles", &protocol.DidChangeWatchedFilesParams{Changes: []protocol.FileEvent{{URI: s.uri(name), Type: protocol.FileChangeTypeChanged}}})
		case n < 73 && name == "deep/more.kern":
			if err := os.RemoveAll(filepath.Join(dir, "deep")); err != nil {
				t.Fatal(err)
			}
			delete(disk, name)
			s.send("workspace/didChangeWatchedFiles", &protocol.DidChangeWatchedFilesParams{Changes: []protocol.FileEvent{{URI: s.uri("deep"), Type: protocol.FileChangeTypeDeleted}}})
		case n < 95:
			calls <- struct{}{}
			method := requests[r.IntN(len(requests))]
			position := slowPosition(text, int32(r.IntN(len(text)+1)), s.unit)
			params := fmt.Sprintf(`{"textDocument":{"uri":%[1]q},"position":{"line":%[2]d,"character":%[3]d},"range":{"start":{"line":0,"character":0},"end":{"line":9,"character":0}},"context":{"diagnostics":[],"includeDeclaration":true},"newName":"q","query":"a","ch":"}","positions":[{"line":%[2]d,"character":%[3]d}],"previousResultId":"1","options":{"tabSize":4,"insertSpaces":true},"previousResultIds":[]}`, s.uri(name), position.Line, position.Character)
			started++
			go func() { // answered or refused: one answer in any case
				s.ask(method, params)
				<-calls
			}()
			if r.IntN(5) == 0 {
				s.notify("$/cancelRequest", fmt.Sprintf(`{"id":%d}`, i+r.IntN(10)))
			}
		default:
			s.clock.advance(time.Duration(r.IntN(400)) * time.Millisecond)
		}
		if i%25 == 24 {
			s.advance(time.Second)
			checks++
			s.compareAll(disk)
			if t.Failed() {
				t.Fatalf("after %d messages", i+1)
			}
		}
		if i == *messages/4 {
			goroutines = settledGoroutines(s, calls)
			runtime.ReadMemStats(&early)
		}
	}
	late := settledGoroutines(s, calls)
	if late > goroutines+5 {
		t.Errorf("%d goroutines after a quarter of the messages, %d at the end", goroutines, late)
	}
	var end runtime.MemStats
	runtime.ReadMemStats(&end)
	if end.HeapAlloc > early.HeapAlloc*3/2+(16<<20) {
		t.Errorf("%d bytes in use after a quarter of the messages, %d at the end", early.HeapAlloc, end.HeapAlloc)
	}
	if started == 0 || checks < *messages/50 {
		t.Errorf("%d requests, %d checks", started, checks)
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	for _, l := range s.logs {
		if strings.Contains(l, "internal error") {
			t.Errorf("%s", l)
		}
	}
}

// settledGoroutines counts goroutines when every request has been answered.
func settledGoroutines(s *session, calls chan struct{}) int {
	for range cap(calls) {
		calls <- struct{}{}
	}
	for range cap(calls) {
		<-calls
	}
	s.settle()
	runtime.GC()
	return runtime.NumGoroutine()
}

// wholeRunes moves an offset to the beginning of its character, and out of the
// middle of a line end, which no position can name.
func wholeRunes(text string, at int) int32 {
	for at > 0 && at < len(text) && text[at]&0xc0 == 0x80 {
		at--
	}
	if at > 0 && at < len(text) && text[at-1] == '\r' && text[at] == '\n' {
		at--
	}
	return int32(at)
}

// compareAll holds what the client knows of every file against a check from
// scratch.
func (s *session) compareAll(disk map[string]string) {
	s.t.Helper()
	read := func(name string) (string, error) {
		if text, ok := s.texts[name]; ok && name != "untitled:One" {
			return text, nil
		}
		if text, ok := disk[name]; ok {
			return text, nil
		}
		return "", errors.New("there is no such file or folder")
	}
	var names []string
	for name := range disk {
		names = append(names, name)
	}
	for name := range s.texts {
		if name != "untitled:One" && disk[name] == "" {
			names = append(names, name)
		}
	}
	want := s.scratch(names, read)
	if text, ok := s.texts["untitled:One"]; ok {
		want += s.scratch([]string{"untitled:One"}, func(name string) (string, error) {
			if name == "untitled:One" {
				return text, nil
			}
			return "", errScratch
		})
	}
	s.mu.Lock()
	var got []string
	for u, p := range s.diagnostics {
		if d, ok := s.versions[s.name(u)], true; ok && len(p.Diagnostics) > 0 {
			if v, has := p.Version.Get(); has && v > d {
				s.t.Errorf("%s: version %d of %d", u, v, d)
			}
			got = append(got, s.name(u))
		}
	}
	slices.SortFunc(got, func(a, b string) int {
		if x, y := strings.Contains(a, ":"), strings.Contains(b, ":"); x != y {
			return map[bool]int{true: 1, false: -1}[x]
		}
		return strings.Compare(a, b)
	})
	var b strings.Builder
	for _, name := range got {
		p := s.diagnostics[s.uri(name)]
		for _, d := range p.Diagnostics {
			fmt.Fprintf(&b, "%s %v %s %s %s %d\n", name, d.Range, severityWords[d.Severity], d.Code, d.Message, len(d.RelatedInformation))
		}
	}
	s.mu.Unlock()
	if b.String() != want {
		s.t.Errorf("(-from scratch +told)\n%s\nof %q", cmp.Diff(strings.Split(want, "\n"), strings.Split(b.String(), "\n")), s.texts)
	}
}

// scratch checks files from scratch and writes the diagnostics as compareAll
// does.
func (s *session) scratch(names []string, read lang.Read) string {
	slices.Sort(names)
	report := checker.Check(lang.Load(names, read, nil), nil)
	var b strings.Builder
	for _, d := range report.Diagnostics {
		text := report.Project.Files[d.File].Text
		at := protocol.Range{Start: slowPosition(text, d.Span.Start, s.unit), End: slowPosition(text, d.Span.End, s.unit)}
		fmt.Fprintf(&b, "%s %v %s %s %s %d\n", d.File, at, d.Severity, d.Rule, strings.Join(append([]string{d.Message}, d.Notes...), "\n"), len(d.Related))
	}
	return b.String()
}
