package lsp

import (
	"bufio"
	"context"
	"encoding/json"
	"fmt"
	"io"
	"net"
	"os"
	"os/exec"
	"strings"
	"testing"
	"time"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// raw is a client that writes what it likes.
type raw struct {
	t    testing.TB
	out  io.Writer
	in   *bufio.Reader
	code chan int
}

func startRaw(t testing.TB, o Options) *raw {
	near, far := pipes()
	r := &raw{t: t, out: near, in: bufio.NewReader(near), code: make(chan int, 1)}
	go func() { r.code <- Serve(context.Background(), far, o) }()
	t.Cleanup(func() { near.Close() })
	return r
}

func (r *raw) write(body string) {
	r.t.Helper()
	if _, err := fmt.Fprintf(r.out, "Content-Length: %d\r\n\r\n%s", len(body), body); err != nil {
		r.t.Fatal(err)
	}
}

// read gives the next message that is not a log.
func (r *raw) read() string {
	r.t.Helper()
	for {
		length := 0
		for {
			line, err := r.in.ReadString('\n')
			if err != nil {
				return "end"
			}
			line = strings.TrimSpace(line)
			if line == "" {
				break
			}
			if _, err := fmt.Sscanf(line, "Content-Length: %d", &length); err != nil {
				r.t.Fatalf("header %q", line)
			}
		}
		body := make([]byte, length)
		if _, err := io.ReadFull(r.in, body); err != nil {
			return "end"
		}
		if !strings.Contains(string(body), `"window/logMessage"`) {
			return string(body)
		}
	}
}

// code gives "id code" of an answer.
func answerOf(t testing.TB, body string) string {
	t.Helper()
	var m struct {
		ID     json.RawMessage `json:"id"`
		Result json.RawMessage `json:"result"`
		Error  *struct {
			Code int `json:"code"`
		} `json:"error"`
	}
	if err := json.Unmarshal([]byte(body), &m); err != nil {
		return body
	}
	if m.Error != nil {
		return fmt.Sprintf("%s error %d", m.ID, m.Error.Code)
	}
	return fmt.Sprintf("%s ok", m.ID)
}

// TestStages goes through a session with everything out of place.
func TestStages(t *testing.T) {
	r := startRaw(t, Options{})
	expect := func(send, want string) {
		t.Helper()
		r.write(send)
		if got := answerOf(t, r.read()); got != want {
			t.Errorf("%.100s: %s, want %s", send, got, want)
		}
	}
	silent := func(send string) { t.Helper(); r.write(send) }
	expect(`{"jsonrpc":"2.0","id":1,"method":"textDocument/hover","params":{}}`, "1 error -32002")
	expect(`{"jsonrpc":"2.0","id":"two","method":"shutdown"}`, `"two" error -32002`)
	silent(`{"jsonrpc":"2.0","method":"textDocument/didOpen","params":{}}`)
	silent(`{"jsonrpc":"2.0","method":"$/whatever","params":[1]}`)
	expect(`{"jsonrpc":"2.0","id":2,"method":"initialize","params":5}`, "2 error -32602")
	expect(`{"jsonrpc":"2.0","id":2,"method":"initialize","params":{"capabilities":7}}`, "2 error -32602")
	expect(`{"jsonrpc":"2.0","id":3,"method":"initialize","params":{"processId":null,"rootUri":null,"capabilities":{}}}`, "3 ok")
	expect(`{"jsonrpc":"2.0","id":4,"method":"initialize","params":{"processId":null,"rootUri":null,"capabilities":{}}}`, "4 error -32600")
	silent(`{"jsonrpc":"2.0","method":"initialized","params":{}}`)
	// what is no message is answered and does not end the session
	expect(`{"jsonrpc":"2.0","id":5,`, "null error -32700")
	expect(`nonsense`, "null error -32700")
	expect(`{"id":6,"method":"shutdown"}`, "6 error -32600")
	expect(`{"jsonrpc":"2.0","id":{"a":1},"method":"shutdown"}`, "null error -32600")
	expect(`{"jsonrpc":"2.0","id":7}`, "7 error -32600")
	expect(`5`, "null error -32600")
	silent(`{"jsonrpc":"2.0","id":99,"result":null}`)
	// batches are answered as such
	r.write(`[{"jsonrpc":"2.0","id":8,"method":"no/such"},{"jsonrpc":"2.0","method":"$/x"},{"jsonrpc":"2.0","id":9,"method":"textDocument/diagnostic","params":{"textDocument":{"uri":"file:///no/such.kern"}}}]`)
	if got := r.read(); !strings.HasPrefix(got, "[") || !strings.Contains(got, "-32601") || !strings.Contains(got, `"id":9,"result"`) {
		t.Errorf("batch: %s", got)
	}
	// unknown and malformed requests and notifications
	expect(`{"jsonrpc":"2.0","id":10,"method":"no/such","params":{}}`, "10 error -32601")
	expect(`{"jsonrpc":"2.0","id":11,"method":"$/no/such"}`, "11 error -32601")
	expect(`{"jsonrpc":"2.0","id":12,"method":"textDocument/moniker","params":{}}`, "12 error -32601")
	expect(`{"jsonrpc":"2.0","id":13,"method":"textDocument/diagnostic"}`, "13 error -32602")
	expect(`{"jsonrpc":"2.0","id":14,"method":"textDocument/diagnostic","params":[]}`, "14 error -32602")
	expect(`{"jsonrpc":"2.0","id":15,"method":"textDocument/diagnostic","params":{"textDocument":5}}`, "15 error -32602")
	expect(`{"jsonrpc":"2.0","id":16,"method":"textDocument/diagnostic","params":{}}`, "16 error -32602")
	for _, n := range []string{`"$/setTrace","params":{"value":5}`, `"$/setTrace","params":{"value":"off"}`, `"$/cancelRequest","params":{"id":null}`, `"$/cancelRequest","params":{}`,
		`"$/cancelRequest"`, `"$/cancelRequest","params":{"id":12345678901234}`, `"$/cancelRequest","params":{"id":1.5}`, `"$/progress","params":{"token":1,"value":{}}`,
		`"no/such"`, `"textDocument/didOpen"`, `"textDocument/didOpen","params":{"textDocument":{"uri":7}}`,
		`"textDocument/didChange","params":{"textDocument":{"uri":"file:///x.kern"}}`, `"textDocument/didChange","params":7`, `"textDocument/didClose","params":{"textDocument":{"uri":"x:y"}}`,
		`"workspace/didChangeConfiguration","params":{"settings":7}`, `"workspace/didChangeWorkspaceFolders","params":{}`, `"workspace/didChangeWatchedFiles","params":{"changes":[{"uri":"::","type":9}]}`,
		`"initialize","params":{}`, `"shutdown"`} {
		silent(`{"jsonrpc":"2.0","method":` + n + `}`)
	}
	expect(`{"jsonrpc":"2.0","id":17,"method":"no/such"}`, "17 error -32600")
	expect(`{"jsonrpc":"2.0","id":18,"method":"shutdown"}`, "18 error -32600")
	silent(`{"jsonrpc":"2.0","method":"textDocument/didOpen","params":{}}`)
	r.write(`{"jsonrpc":"2.0","method":"exit"}`)
	if got := r.read(); got != "end" {
		t.Errorf("after exit: %s", got)
	}
	if code := <-r.code; code != 0 {
		t.Errorf("exit status %d", code)
	}
}

// TestEnds looks at how sessions end.
func TestEnds(t *testing.T) {
	const initialize = `{"jsonrpc":"2.0","id":1,"method":"initialize","params":{"processId":%s,"rootUri":null,"capabilities":{}}}`
	t.Run("exit without shutdown", func(t *testing.T) {
		r := startRaw(t, Options{})
		r.write(`{"jsonrpc":"2.0","method":"exit"}`)
		if code := <-r.code; code != 1 {
			t.Errorf("exit status %d", code)
		}
	})
	t.Run("input ends", func(t *testing.T) {
		r := startRaw(t, Options{})
		r.write(fmt.Sprintf(initialize, "null"))
		r.read()
		r.out.(pipe).close()
		if code := <-r.code; code != 1 {
			t.Errorf("exit status %d", code)
		}
	})
	t.Run("input ends after shutdown", func(t *testing.T) {
		r := startRaw(t, Options{})
		r.write(fmt.Sprintf(initialize, "null"))
		r.read()
		r.write(`{"jsonrpc":"2.0","id":2,"method":"shutdown"}`)
		r.read()
		r.out.(pipe).close()
		if code := <-r.code; code != 0 {
			t.Errorf("exit status %d", code)
		}
	})
	t.Run("header that is none", func(t *testing.T) {
		for _, header := range []string{"Content-Length: x\r\n\r\n", "GET /a:b HTTP/1.1\r\nContent-Length: 2\r\n\r\n{}", "Content-Type: x\r\n\r\n", "Content-Length: -1\r\n\r\n"} {
			r := startRaw(t, Options{})
			go io.WriteString(r.out, header)
			if code := <-r.code; code != 1 {
				t.Errorf("%q: exit status %d", header, code)
			}
		}
	})
	t.Run("parent gone", func(t *testing.T) {
		child := exec.Command(os.Args[0], "-test.run=^$")
		if err := child.Run(); err != nil {
			t.Fatal(err)
		}
		clock := newTestClock()
		r := startRaw(t, Options{Clock: clock})
		r.write(fmt.Sprintf(initialize, fmt.Sprint(child.Process.Pid)))
		r.read()
		clock.advance(5 * time.Second)
		if code := <-r.code; code != 1 {
			t.Errorf("exit status %d", code)
		}
	})
	t.Run("parent there", func(t *testing.T) {
		clock := newTestClock()
		r := startRaw(t, Options{Clock: clock})
		r.write(fmt.Sprintf(initialize, fmt.Sprint(os.Getppid())))
		r.read()
		clock.advance(5 * time.Second)
		clock.advance(5 * time.Second)
		r.write(`{"jsonrpc":"2.0","id":2,"method":"shutdown"}`)
		if got := answerOf(t, r.read()); got != "2 ok" {
			t.Errorf("%s", got)
		}
	})
}

// TestCancel cancels a request that waits for the checker: it is answered once,
// with the error that is due.
func TestCancel(t *testing.T) {
	s := start(t, t.TempDir())
	s.initialize(`{"textDocument": {"diagnostic": {}}}`, "", ".")
	s.openText("a.kern", "x = 1 m\n")
	s.settle()
	s.server.mu.Lock()
	w := s.server.workspaces[s.dir]
	s.server.mu.Unlock()
	w.check.Lock() // nothing is checked from here on
	s.edit("a.kern", 0, 0, "y = 2 m\n")
	ctx, cancel := context.WithCancel(context.Background())
	answers := make(chan error, 1)
	go func() {
		_, err := s.client.Diagnostic(ctx, &protocol.DocumentDiagnosticParams{TextDocument: protocol.TextDocumentIdentifier{URI: s.uri("a.kern")}})
		answers <- err
	}()
	raw := make(chan error, 1)
	go func() {
		var out jsonrpc2.RawMessage
		_, err := s.conn.Call(context.Background(), "textDocument/diagnostic", jsonrpc2.RawMessage(`{"textDocument":{"uri":"`+string(s.uri("a.kern"))+`"}}`), &out)
		raw <- err
	}()
	// whichever numbers the two have, and whenever they arrive
	answered := false
	for number := int64(1); !answered && number < 1e6; number++ {
		s.ask("$/test/ping", "null")
		for i := range number {
			s.notify("$/cancelRequest", fmt.Sprintf(`{"id":%d}`, i))
		}
		select {
		case err := <-raw:
			answered = true
			if e, ok := err.(*jsonrpc2.Error); !ok || e.Code != protocol.CodeRequestCancelled {
				t.Errorf("a cancelled request: %v", err)
			}
		default:
		}
	}
	cancel()
	<-answers
	w.check.Unlock()
	s.settle()
	if _, err := s.ask("textDocument/diagnostic", `{"textDocument":{"uri":"`+string(s.uri("a.kern"))+`"}}`); err != nil {
		t.Errorf("after cancelling: %v", err)
	}
}

// TestPanics has a request and a check fail with a defect: both are told, and
// the session goes on.
func TestPanics(t *testing.T) {
	contents["test-panic"] = func(context.Context, *Server, uri.URI) (string, error) { panic("a defect") }
	defer delete(contents, "test-panic")
	s := start(t, t.TempDir())
	s.initialize(`{"textDocument": {"diagnostic": {}}}`, "", ".")
	_, err := s.ask("workspace/textDocumentContent", `{"uri":"test-panic:x"}`)
	if e, ok := err.(*jsonrpc2.Error); !ok || e.Code != jsonrpc2.InternalError {
		t.Errorf("a request with a defect: %v", err)
	}
	s.openText("a.kern", "x = 1 m\n")
	s.settle()
	s.server.mu.Lock()
	w := s.server.workspaces[s.dir]
	good := w.open["a.kern"]
	w.open["a.kern"] = &document{uri: good.uri, path: good.path, typing: good.typing} // without a text
	w.touch()
	s.server.mu.Unlock()
	s.settle()
	_, err = s.ask("textDocument/diagnostic", `{"textDocument":{"uri":"`+string(s.uri("a.kern"))+`"}}`)
	if e, ok := err.(*jsonrpc2.Error); !ok || e.Code != jsonrpc2.InternalError {
		t.Errorf("a check with a defect: %v", err)
	}
	s.server.mu.Lock()
	w.open["a.kern"] = good
	w.touch()
	s.server.mu.Unlock()
	if _, err = s.ask("textDocument/diagnostic", `{"textDocument":{"uri":"`+string(s.uri("a.kern"))+`"}}`); err != nil {
		t.Errorf("after a defect: %v", err)
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	if all := strings.Join(s.logs, "\n"); strings.Count(all, "internal error") < 2 || !strings.Contains(all, "a defect") {
		t.Errorf("the log says %q", all)
	}
}

// TestAdvertised asks for every method of the table of features: each is served,
// and what is not in the table is not.
func TestAdvertised(t *testing.T) {
	s := start(t, t.TempDir())
	s.initialize(`{"textDocument": {"diagnostic": {}}}`, "", ".")
	s.openText("a.kern", "x = 1 m\n")
	for _, f := range features {
		if f.advertise == nil && f.register == nil && len(f.methods) == 0 {
			t.Errorf("the feature %s does nothing", f.name)
		}
		for _, m := range f.methods {
			_, err := s.ask(m, `{"textDocument":{"uri":"`+string(s.uri("a.kern"))+`"},"position":{"line":0,"character":0},"range":{"start":{"line":0,"character":0},"end":{"line":0,"character":1}},"positions":[],"ranges":[],"context":{"diagnostics":[],"includeDeclaration":true},"options":{"tabSize":4,"insertSpaces":true},"ch":"}","newName":"y","query":"","previousResultIds":[],"uri":"kern-rule:undecided","changes":[],"event":{"added":[],"removed":[]},"settings":null,"contentChanges":[]}`)
			if e, ok := err.(*jsonrpc2.Error); ok && e.Code == jsonrpc2.MethodNotFound {
				t.Errorf("%s: %s is not served", f.name, m)
			}
		}
	}
	if _, err := s.ask("textDocument/moniker", `{}`); err == nil || !strings.Contains(err.Error(), "not served") {
		t.Errorf("a method that no feature has: %v", err)
	}
}

func TestListen(t *testing.T) {
	for _, address := range []string{"0.0.0.0:0", "example.org:1", "nonsense", "[::]:0"} {
		if err := Listen(context.Background(), address, Options{}, nil); err == nil {
			t.Errorf("%s was listened on", address)
		}
	}
	ctx, cancel := context.WithCancel(context.Background())
	addresses, end := make(chan net.Addr, 1), make(chan error, 1)
	go func() { end <- Listen(ctx, "127.0.0.1:0", Options{}, func(a net.Addr) { addresses <- a }) }()
	address := (<-addresses).String()
	for range 2 {
		conn, err := net.Dial("tcp", address)
		if err != nil {
			t.Fatal(err)
		}
		r := &raw{t: t, out: conn, in: bufio.NewReader(conn)}
		r.write(`{"jsonrpc":"2.0","id":1,"method":"initialize","params":{"processId":null,"rootUri":null,"capabilities":{}}}`)
		if got := answerOf(t, r.read()); got != "1 ok" {
			t.Error(got)
		}
		r.write(`{"jsonrpc":"2.0","method":"exit"}`)
		if got := r.read(); got != "end" {
			t.Error(got)
		}
		conn.Close()
	}
	cancel()
	if err := <-end; err != nil {
		t.Error(err)
	}
}
