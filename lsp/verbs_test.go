package lsp

import (
	"encoding/json"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"time"

	"kern/lang"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

func unmarshal(text string, v any) error { return json.Unmarshal([]byte(text), v) }

func remarshal(t testing.TB, v any) json.RawMessage {
	t.Helper()
	raw, err := json.Marshal(v)
	if err != nil {
		t.Fatal(err)
	}
	return raw
}

// replaceMark replaces what a mark stands for and moves the other marks of the
// file along.
func (s *scene) replaceMark(name, with string) {
	m := s.mark(name)
	s.edit(m.file, m.span.Start, m.span.End, with)
	e := textEdit{m.span.Start, m.span.End, int32(len(with))}
	for n, o := range s.marks {
		switch {
		case n == name:
			o.span = lang.Span{Start: m.span.Start, End: m.span.Start + e.with}
		case o.file == m.file:
			o.span = lang.Span{Start: e.move(o.span.Start), End: e.move(o.span.End)}
		}
		s.marks[n] = o
	}
}

// The verbs of the core.
func init() {
	verbs["open"] = func(s *scene, args []string) { s.openText(args[0], s.files[args[0]]) }
	verbs["close"] = func(s *scene, args []string) { s.closeText(args[0]) }
	verbs["save"] = func(s *scene, args []string) {
		if !strings.Contains(args[0], ":") {
			s.write(args[0], s.texts[args[0]])
		}
		s.send("textDocument/didSave", &protocol.DidSaveTextDocumentParams{TextDocument: protocol.TextDocumentIdentifier{URI: s.uri(args[0])}})
	}
	// change MARK "text"
	verbs["change"] = func(s *scene, args []string) { s.replaceMark(args[0], args[1]) }
	// type MARK "text": key by key, behind what was typed there
	verbs["type"] = func(s *scene, args []string) {
		m := s.mark(args[0])
		typed := m.span.Of(s.texts[m.file])
		for _, r := range args[1] {
			typed += string(r)
			s.replaceMark(args[0], typed)
			s.settle()
		}
	}
	// whole FILE "text": the whole text at once
	verbs["whole"] = func(s *scene, args []string) {
		s.texts[args[0]] = args[1]
		s.change(args[0], &protocol.TextDocumentContentChangeWholeDocument{Text: args[1]})
	}
	// raw FILE {json}: a change as it stands, which the client's text does not follow
	verbs["raw"] = func(s *scene, args []string) {
		s.versions[args[0]]++
		s.notify("textDocument/didChange", `{"textDocument":{"uri":"`+string(s.uri(args[0]))+`","version":`+string(remarshal(s.t, s.versions[args[0]]))+`},"contentChanges":`+args[1]+`}`)
	}
	// disk created|changed|deleted FILE [from SECTION]: a change on the disk, and word of it
	verbs["disk"] = func(s *scene, args []string) {
		kind := map[string]protocol.FileChangeType{"created": 1, "changed": 2, "deleted": 3}[args[0]]
		s.onDisk(args[0], args[1:])
		s.send("workspace/didChangeWatchedFiles", &protocol.DidChangeWatchedFilesParams{Changes: []protocol.FileEvent{{URI: s.uri(args[1]), Type: kind}}})
	}
	// silently created|changed|deleted FILE [from SECTION]: the same without word
	verbs["silently"] = func(s *scene, args []string) { s.onDisk(args[0], args[1:]) }
	// settings {json}: what the client answers from now on, and word of it
	verbs["settings"] = func(s *scene, args []string) {
		s.mu.Lock()
		s.config = json.RawMessage(args[0])
		s.mu.Unlock()
		s.notify("workspace/didChangeConfiguration", `{"settings":{"kern":`+args[0]+`}}`)
	}
	verbs["folder"] = func(s *scene, args []string) {
		folder := []protocol.WorkspaceFolder{{URI: uriOf(filepath.Join(s.dir, args[1])), Name: args[1]}}
		event := protocol.WorkspaceFoldersChangeEvent{Added: []protocol.WorkspaceFolder{}, Removed: []protocol.WorkspaceFolder{}}
		if args[0] == "add" {
			event.Added = folder
		} else {
			event.Removed = folder
		}
		s.send("workspace/didChangeWorkspaceFolders", &protocol.DidChangeWorkspaceFoldersParams{Event: event})
	}
	verbs["advance"] = func(s *scene, args []string) {
		d, err := time.ParseDuration(args[0])
		if err != nil {
			s.t.Fatal(err)
		}
		s.advance(d)
	}
	// diagnostics [FILE]: what the client was told last
	verbs["diagnostics"] = func(s *scene, args []string) {
		s.settle()
		s.mu.Lock()
		var all []uri.URI
		for u := range s.session.diagnostics {
			all = append(all, u)
		}
		s.mu.Unlock()
		slices.Sort(all)
		for _, u := range all {
			name := s.name(u)
			if len(args) > 0 && args[0] != name {
				continue
			}
			s.print("%s: ", name)
			if said := s.told(name); said != "" {
				s.print("\n%s", said)
			} else {
				s.print("nothing\n")
			}
		}
		if len(all) == 0 {
			s.print("none were sent\n")
		}
	}
	// published: how often diagnostics were sent since this was asked last
	verbs["published"] = func(s *scene, _ []string) {
		s.mu.Lock()
		defer s.mu.Unlock()
		s.print("%d times\n", s.published)
		s.published = 0
	}
	verbs["pull"] = func(s *scene, args []string) { s.pull(args) }
	// asked [METHOD]: what the server asked since this was asked last
	verbs["asked"] = func(s *scene, args []string) {
		s.mu.Lock()
		defer s.mu.Unlock()
		s.session.asked = slices.DeleteFunc(s.session.asked, func(m string) bool { return len(args) > 0 && m != args[0] })
		slices.Sort(s.session.asked) // requests of their own, in no order
		for _, a := range s.session.asked {
			s.print("%s\n", a)
		}
		if len(s.session.asked) == 0 {
			s.print("nothing\n")
		}
		s.session.asked = nil
	}
	verbs["logs"] = func(s *scene, _ []string) {
		s.mu.Lock()
		defer s.mu.Unlock()
		for _, l := range s.session.logs {
			s.print("%s\n", strings.ReplaceAll(l, s.dir, "DIR"))
		}
		s.session.logs = nil
	}
	verbs["capabilities"] = func(s *scene, _ []string) {
		raw, err := protocol.Marshal(&s.result.Capabilities)
		if err != nil {
			s.t.Fatal(err)
		}
		var v any
		if err := json.Unmarshal(raw, &v); err != nil {
			s.t.Fatal(err)
		}
		out, err := json.MarshalIndent(v, "", "  ")
		if err != nil {
			s.t.Fatal(err)
		}
		s.print("%s\n", out)
		for _, r := range s.registered {
			s.print("registered: %s\n", r)
		}
	}
	// request METHOD {json}: any request; FILE in it stands for the address of a
	// file, as "uri": "@a.kern"
	verbs["request"] = func(s *scene, args []string) {
		params := "null"
		if len(args) > 1 {
			params = args[1]
		}
		for name := range s.files {
			params = strings.ReplaceAll(params, `"@`+name+`"`, `"`+string(s.uri(name))+`"`)
		}
		result, err := s.ask(args[0], params)
		if err != nil {
			s.print("error: %v\n", err)
			return
		}
		s.print("%s\n", strings.ReplaceAll(string(result), string(s.uri("")), "DIR"))
	}
}

func (s *scene) onDisk(kind string, args []string) {
	if kind == "deleted" {
		if err := os.RemoveAll(filepath.Join(s.dir, args[0])); err != nil {
			s.t.Fatal(err)
		}
		return
	}
	section := args[0]
	if len(args) > 2 {
		section = args[2]
	}
	s.write(args[0], s.files[section])
}

// pull asks for diagnostics, of a file or of the workspace, with what it was
// told last time.
func (s *scene) pull(args []string) {
	if s.results == nil {
		s.results = map[uri.URI]string{}
	}
	if args[0] != "workspace" {
		u := s.uri(args[0])
		p := map[string]any{"textDocument": map[string]any{"uri": u}}
		if id := s.results[u]; id != "" {
			p["previousResultId"] = id
		}
		raw, err := s.ask("textDocument/diagnostic", string(remarshal(s.t, p)))
		if err != nil {
			s.print("error: %v\n", err)
			return
		}
		s.pulled(u, raw)
		return
	}
	previous := []any{}
	for u, id := range s.results {
		previous = append(previous, map[string]any{"uri": u, "value": id})
	}
	raw, err := s.ask("workspace/diagnostic", string(remarshal(s.t, map[string]any{"previousResultIds": previous})))
	if err != nil {
		s.print("error: %v\n", err)
		return
	}
	var report struct {
		Items []json.RawMessage `json:"items"`
	}
	if err := json.Unmarshal(raw, &report); err != nil {
		s.t.Fatal(err)
	}
	for _, item := range report.Items {
		var of struct {
			URI uri.URI `json:"uri"`
		}
		if err := json.Unmarshal(item, &of); err != nil {
			s.t.Fatal(err)
		}
		s.pulled(of.URI, item)
	}
}

func (s *scene) pulled(u uri.URI, raw json.RawMessage) {
	var report struct {
		Kind     string          `json:"kind"`
		ResultID string          `json:"resultId"`
		Items    json.RawMessage `json:"items"`
	}
	if err := json.Unmarshal(raw, &report); err != nil {
		s.t.Fatal(err)
	}
	s.print("%s: %s\n", s.name(u), report.Kind)
	if report.ResultID != "" {
		s.results[u] = report.ResultID
	}
	if report.Items == nil {
		return
	}
	var list []protocol.Diagnostic
	if err := protocol.Unmarshal(report.Items, &list); err != nil {
		s.t.Fatal(err)
	}
	s.print("%s", s.printDiagnostics(u, list))
}
