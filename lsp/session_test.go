package lsp

import (
	"context"
	"encoding/json"
	"io"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"sync"
	"testing"
	"time"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// session is a client and a server of its own, joined by pipes in memory. What
// the client is told is kept; nothing is waited for by the clock.
type session struct {
	t      testing.TB
	server *Server
	conn   jsonrpc2.Conn
	client protocol.Server // the server as the client sees it
	clock  *testClock
	dir    string
	code   chan int
	unit   encoding

	result *protocol.InitializeResult

	mu          sync.Mutex
	diagnostics map[uri.URI]*protocol.PublishDiagnosticsParams
	published   int
	logs        []string
	asked       []string // requests of the server, by method
	progress    []string
	registered  []string
	config      json.RawMessage

	texts    map[string]string // what the client has open, by name
	versions map[string]int32
}

// deadline is how long a test waits for what must come at once. It is reached
// only by a defect.
const deadline = 60 * time.Second

type pipe struct {
	io.Reader
	io.Writer
	close func()
}

func (p pipe) Close() error { p.close(); return nil }

func pipes() (a, b pipe) {
	r1, w1 := io.Pipe()
	r2, w2 := io.Pipe()
	shut := func() { r1.Close(); w1.Close(); r2.Close(); w2.Close() }
	return pipe{r1, w2, shut}, pipe{r2, w1, shut}
}

// start begins a session without initialising it.
func start(t testing.TB, dir string) *session {
	t.Helper()
	s := &session{t: t, clock: newTestClock(), dir: dir, code: make(chan int, 1), diagnostics: map[uri.URI]*protocol.PublishDiagnosticsParams{},
		texts: map[string]string{}, versions: map[string]int32{}, config: json.RawMessage("null")}
	near, far := pipes()
	s.server = newServer(context.Background(), Options{Version: "0.0.0", Clock: s.clock})
	go func() { s.code <- s.server.serve(far) }()
	s.conn = jsonrpc2.NewConn(jsonrpc2.NewStream(near), jsonrpc2.WithCodec(codec{}))
	s.conn.Go(context.Background(), s.handle)
	s.client = protocol.ServerDispatcher(s.conn)
	t.Cleanup(func() {
		near.Close()
		select {
		case <-s.server.ctx.Done():
		case <-time.After(deadline):
			t.Error("the server does not end with its connection")
		}
		<-s.conn.Done()
	})
	return s
}

// capabilities are those of a client that can do everything, as JSON.
const everything = `{
	"general": {"positionEncodings": ["utf-16"]},
	"window": {"workDoneProgress": true, "showDocument": {"support": true}},
	"workspace": {
		"applyEdit": true, "workspaceFolders": true, "configuration": true,
		"workspaceEdit": {"documentChanges": true, "failureHandling": "abort", "normalizesLineEndings": true},
		"didChangeConfiguration": {"dynamicRegistration": true},
		"didChangeWatchedFiles": {"dynamicRegistration": true},
		"inlayHint": {"refreshSupport": true}, "codeLens": {"refreshSupport": true}, "semanticTokens": {"refreshSupport": true},
		"diagnostics": {"refreshSupport": true}, "foldingRange": {"refreshSupport": true},
		"symbol": {"resolveSupport": {"properties": ["location.range"]}},
		"textDocumentContent": {}
	},
	"textDocument": {
		"publishDiagnostics": {"relatedInformation": true, "versionSupport": true, "codeDescriptionSupport": true, "dataSupport": true, "tagSupport": {"valueSet": [1, 2]}},
		"hover": {"contentFormat": ["markdown", "plaintext"]},
		"completion": {"contextSupport": true, "completionItem": {"snippetSupport": true, "documentationFormat": ["markdown", "plaintext"], "labelDetailsSupport": true,
			"insertReplaceSupport": true, "deprecatedSupport": true, "resolveSupport": {"properties": ["documentation", "detail"]}, "insertTextModeSupport": {"valueSet": [1, 2]}}},
		"signatureHelp": {"contextSupport": true, "signatureInformation": {"documentationFormat": ["markdown", "plaintext"], "activeParameterSupport": true, "parameterInformation": {"labelOffsetSupport": true}}},
		"codeAction": {"isPreferredSupport": true, "disabledSupport": true, "dataSupport": true, "resolveSupport": {"properties": ["edit"]},
			"codeActionLiteralSupport": {"codeActionKind": {"valueSet": ["", "quickfix", "refactor", "source", "source.fixAll"]}}},
		"definition": {"linkSupport": true}, "typeDefinition": {"linkSupport": true}, "references": {}, "documentHighlight": {},
		"rename": {"prepareSupport": true, "prepareSupportDefaultBehavior": 1}, "documentSymbol": {"hierarchicalDocumentSymbolSupport": true},
		"foldingRange": {"foldingRangeKind": {"valueSet": ["comment", "imports", "region"]}}, "selectionRange": {}, "documentLink": {"tooltipSupport": true},
		"semanticTokens": {"requests": {"range": true, "full": {"delta": true}}, "tokenTypes": ["keyword", "variable", "number", "string", "comment", "operator", "function", "property", "type", "class", "enumMember"],
			"tokenModifiers": ["declaration", "definition", "readonly", "deprecated"], "formats": ["relative"]},
		"callHierarchy": {}, "linkedEditingRange": {}, "formatting": {}, "rangeFormatting": {"rangesSupport": true}, "onTypeFormatting": {},
		"codeLens": {}, "inlayHint": {"resolveSupport": {"properties": ["tooltip", "textEdits", "label.tooltip"]}},
		"synchronization": {"didSave": true}
	}
}`

// initialize opens the session's folder with capabilities as JSON; patch is laid
// over those of a client that can do everything: null takes one away.
func (s *session) initialize(patch string, options string, folders ...string) {
	s.t.Helper()
	caps := merge(decode(s.t, everything), decode(s.t, patch))
	params := map[string]any{"processId": nil, "rootUri": nil, "capabilities": caps, "clientInfo": map[string]any{"name": "test"}}
	if options != "" {
		params["initializationOptions"] = decode(s.t, options)
	}
	list := []any{}
	for _, f := range folders {
		list = append(list, map[string]any{"uri": string(uriOf(filepath.Join(s.dir, f))), "name": f})
	}
	params["workspaceFolders"] = list
	raw, err := json.Marshal(params)
	if err != nil {
		s.t.Fatal(err)
	}
	if _, err := s.conn.Call(context.Background(), "initialize", jsonrpc2.RawMessage(raw), &s.result); err != nil {
		s.t.Fatalf("initialize: %v", err)
	}
	for unit, kind := range encodingKinds {
		if kind == s.result.Capabilities.PositionEncoding {
			s.unit = encoding(unit)
		}
	}
	s.notify("initialized", `{}`)
	s.settle()
}

func decode(t testing.TB, text string) any {
	t.Helper()
	if strings.TrimSpace(text) == "" {
		return nil
	}
	var v any
	if err := json.Unmarshal([]byte(text), &v); err != nil {
		t.Fatalf("%v in %s", err, text)
	}
	return v
}

// merge lays a patch over a value; null in it takes away.
func merge(base, patch any) any {
	p, ok := patch.(map[string]any)
	if !ok {
		if patch == nil {
			return base
		}
		return patch
	}
	b, ok := base.(map[string]any)
	if !ok {
		b = map[string]any{}
	}
	for k, v := range p {
		if v == nil {
			delete(b, k)
			continue
		}
		b[k] = merge(b[k], v)
	}
	return b
}

// handle keeps what the server says and answers what it asks.
func (s *session) handle(_ context.Context, r *jsonrpc2.Request) (any, error) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if r.IsCall() {
		s.asked = append(s.asked, strings.Clone(r.Method()))
	}
	switch r.Method() {
	case "textDocument/publishDiagnostics":
		p := &protocol.PublishDiagnosticsParams{}
		if err := protocol.Unmarshal(r.Params(), p); err != nil {
			s.t.Errorf("diagnostics that cannot be read: %v", err)
			return nil, nil
		}
		s.diagnostics[p.URI] = p
		s.published++
	case "window/logMessage":
		p := &protocol.LogMessageParams{}
		if protocol.Unmarshal(r.Params(), p) == nil {
			s.logs = append(s.logs, p.Message)
		}
	case "$/progress":
		s.progress = append(s.progress, string(r.Params()))
	case "workspace/configuration":
		return []json.RawMessage{s.config}, nil
	case "client/registerCapability":
		p := &protocol.RegistrationParams{}
		if protocol.Unmarshal(r.Params(), p) == nil {
			for _, x := range p.Registrations {
				s.registered = append(s.registered, x.Method+" "+string(x.RegisterOptions))
			}
		}
	}
	return nil, nil
}

func (s *session) notify(method, params string) {
	s.t.Helper()
	if err := s.conn.Notify(context.Background(), method, jsonrpc2.RawMessage(params)); err != nil {
		s.t.Fatalf("%s: %v", method, err)
	}
}

// send sends a notification of the protocol's own types.
func (s *session) send(method string, params any) {
	s.t.Helper()
	raw, err := protocol.Marshal(params)
	if err != nil {
		s.t.Fatal(err)
	}
	s.notify(method, string(raw))
}

// ask sends a request and gives its result as JSON.
func (s *session) ask(method, params string) (json.RawMessage, error) {
	s.t.Helper()
	ctx, cancel := context.WithTimeout(context.Background(), deadline)
	defer cancel()
	var out jsonrpc2.RawMessage
	_, err := s.conn.Call(ctx, method, jsonrpc2.RawMessage(params), &out)
	return json.RawMessage(out), err
}

// settle waits until the server has done all that the client sent for, and the
// client has been told of it: a request is answered after all that came before
// it, and what the server has begun is counted.
func (s *session) settle() {
	s.t.Helper()
	ctx, cancel := context.WithTimeout(context.Background(), deadline)
	defer cancel()
	s.ask("$/test/ping", "null")
	if err := s.server.busy.wait(ctx); err != nil {
		s.t.Fatalf("the server does not come to rest: %d tasks", s.server.busy.n)
	}
	s.ask("$/test/ping", "null")
}

// advance moves the clock.
func (s *session) advance(d time.Duration) {
	s.settle()
	s.clock.advance(d)
	s.settle()
}

// uri is the address of a file of the session's folder.
func (s *session) uri(name string) uri.URI {
	if strings.Contains(name, ":") {
		return uri.URI(name)
	}
	return uriOf(filepath.Join(s.dir, filepath.FromSlash(name)))
}

func (s *session) write(name, text string) {
	s.t.Helper()
	path := filepath.Join(s.dir, filepath.FromSlash(name))
	if err := os.MkdirAll(filepath.Dir(path), 0o777); err != nil {
		s.t.Fatal(err)
	}
	if err := os.WriteFile(path, []byte(text), 0o666); err != nil {
		s.t.Fatal(err)
	}
}

func (s *session) openText(name, text string) {
	s.t.Helper()
	s.texts[name] = text
	s.versions[name]++
	s.send("textDocument/didOpen", &protocol.DidOpenTextDocumentParams{TextDocument: protocol.TextDocumentItem{URI: s.uri(name), LanguageID: "kern", Version: s.versions[name], Text: text}})
}

// edit replaces a part of an open text, by the range that the reference
// converter gives.
func (s *session) edit(name string, start, end int32, with string) {
	s.t.Helper()
	text := s.texts[name]
	r := protocol.Range{Start: slowPosition(text, start, s.unit), End: slowPosition(text, end, s.unit)}
	s.texts[name] = text[:start] + with + text[end:]
	s.change(name, &protocol.TextDocumentContentChangePartial{Range: r, Text: with})
}

func (s *session) change(name string, changes ...protocol.TextDocumentContentChangeEvent) {
	s.t.Helper()
	s.versions[name]++
	s.send("textDocument/didChange", &protocol.DidChangeTextDocumentParams{ContentChanges: changes,
		TextDocument: protocol.VersionedTextDocumentIdentifier{Version: s.versions[name], TextDocumentIdentifier: protocol.TextDocumentIdentifier{URI: s.uri(name)}}})
}

func (s *session) closeText(name string) {
	s.t.Helper()
	delete(s.texts, name)
	s.send("textDocument/didClose", &protocol.DidCloseTextDocumentParams{TextDocument: protocol.TextDocumentIdentifier{URI: s.uri(name)}})
}

// text is what the client has of a file: open, or on the disk.
func (s *session) text(u uri.URI) string {
	for name, text := range s.texts {
		if s.uri(name) == u {
			return text
		}
	}
	raw, err := os.ReadFile(u.FsPath())
	if err != nil {
		return ""
	}
	return string(raw)
}

// name is the name of an address in the session's folder.
func (s *session) name(u uri.URI) string {
	if rel, err := filepath.Rel(s.dir, u.FsPath()); u.IsFile() && err == nil {
		return filepath.ToSlash(rel)
	}
	return string(u)
}

// told gives what the client was told last of a file, as text.
func (s *session) told(name string) string {
	s.mu.Lock()
	defer s.mu.Unlock()
	p := s.diagnostics[s.uri(name)]
	if p == nil {
		return ""
	}
	return s.printDiagnostics(p.URI, p.Diagnostics)
}

// marked shows a range in the line that it stands in.
func (s *session) marked(u uri.URI, r protocol.Range) string {
	text := s.text(u)
	start, end := slowOffset(text, r.Start, s.unit), slowOffset(text, r.End, s.unit)
	if start > end {
		return "⟦a range that ends before it begins⟧"
	}
	from := strings.LastIndexAny(text[:start], "\r\n") + 1
	to := len(text)
	if i := strings.IndexAny(text[end:], "\r\n"); i >= 0 {
		to = int(end) + i
	}
	line := strings.TrimLeft(text[from:start], " \t") + "⟦" + text[start:end] + "⟧" + text[end:to]
	return strings.NewReplacer("\r\n", "⏎", "\n", "⏎", "\r", "⏎").Replace(line)
}

var severityWords = map[protocol.DiagnosticSeverity]string{1: "error", 2: "warning", 3: "information", 4: "hint"}

func (s *session) printDiagnostics(u uri.URI, list []protocol.Diagnostic) string {
	var b strings.Builder
	for _, d := range list {
		b.WriteString(severityWords[d.Severity] + " " + string(d.Code.(protocol.String)))
		if slices.Contains(d.Tags.Slice(), protocol.DiagnosticTagUnnecessary) {
			b.WriteString(" unused")
		}
		b.WriteString("\n    " + s.marked(u, d.Range) + "\n")
		for line := range strings.SplitSeq(string(d.Message.(protocol.String)), "\n") {
			b.WriteString("    " + line + "\n")
		}
		for _, r := range d.RelatedInformation {
			b.WriteString("    " + s.name(r.Location.URI) + ": " + s.marked(r.Location.URI, r.Location.Range) + " " + r.Message + "\n")
		}
		if d.CodeDescription.Href != "" {
			b.WriteString("    see " + string(d.CodeDescription.Href) + "\n")
		}
	}
	return b.String()
}
