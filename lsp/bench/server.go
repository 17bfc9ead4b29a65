package main

import (
	"bufio"
	"encoding/json"
	"fmt"
	"io"
	"os"
	"os/exec"
	"slices"
	"strconv"
	"strings"
	"sync"
	"time"
)

// server is a running language server.
type server struct {
	command *exec.Cmd
	in      io.WriteCloser
	version int
	number  int

	mu       sync.Mutex
	changed  *sync.Cond
	told     []told
	answers  map[int]time.Time
	provides string
	ended    bool
}

// told is when the diagnostics of a version came.
type told struct {
	version int
	at      time.Time
}

const address = "untitled:Bench"

func start(kern string) (*server, error) {
	s := &server{command: exec.Command(kern, "lsp"), answers: map[int]time.Time{}}
	s.changed = sync.NewCond(&s.mu)
	s.command.Stderr = os.Stderr
	var err error
	if s.in, err = s.command.StdinPipe(); err != nil {
		return nil, err
	}
	out, err := s.command.StdoutPipe()
	if err != nil {
		return nil, err
	}
	if err := s.command.Start(); err != nil {
		return nil, err
	}
	go s.read(bufio.NewReaderSize(out, 1<<20))
	return s, nil
}

func (s *server) stop() {
	s.write("exit", nil, false)
	s.in.Close()
	s.command.Wait()
}

// read notes when messages come.
func (s *server) read(in *bufio.Reader) {
	for {
		length := 0
		for {
			line, err := in.ReadString('\n')
			if err != nil {
				s.mu.Lock()
				s.ended = true
				s.changed.Broadcast()
				s.mu.Unlock()
				return
			}
			line = strings.TrimSpace(line)
			if line == "" {
				break
			}
			if value, ok := strings.CutPrefix(line, "Content-Length: "); ok {
				length, _ = strconv.Atoi(value)
			}
		}
		body := make([]byte, length)
		if _, err := io.ReadFull(in, body); err != nil {
			continue
		}
		at := time.Now()
		// Reading whole messages would take the processor that is measured: the
		// server writes what is looked for at the front.
		head := string(body[:min(len(body), 300)])
		s.mu.Lock()
		if strings.Contains(head, `"method":"textDocument/publishDiagnostics"`) {
			if _, after, ok := strings.Cut(head, `"version":`); ok {
				s.told = append(s.told, told{number(after), at})
			}
		} else if _, after, ok := strings.Cut(head, `"id":`); ok && !strings.Contains(head, `"method":`) {
			s.answers[number(after)] = at
			if strings.Contains(head, `"capabilities"`) {
				s.provides = string(body)
			}
		}
		s.changed.Broadcast()
		s.mu.Unlock()
	}
}

// number reads the number that a text begins with.
func number(text string) int {
	end := 0
	for end < len(text) && '0' <= text[end] && text[end] <= '9' {
		end++
	}
	n, _ := strconv.Atoi(text[:end])
	return n
}

func (s *server) write(method string, params any, call bool) int {
	m := map[string]any{"jsonrpc": "2.0", "method": method}
	if params != nil {
		m["params"] = params
	}
	if call {
		s.number++
		m["id"] = s.number
	}
	body, err := json.Marshal(m)
	if err != nil {
		panic(err) // plain data
	}
	fmt.Fprintf(s.in, "Content-Length: %d\r\n\r\n%s", len(body), body)
	return s.number
}

func (s *server) initialize() error {
	id := s.write("initialize", map[string]any{"processId": os.Getpid(), "rootUri": nil, "capabilities": map[string]any{"textDocument": map[string]any{
		"publishDiagnostics": map[string]any{"versionSupport": true, "relatedInformation": true}, "hover": map[string]any{"contentFormat": []string{"markdown"}},
		"completion": map[string]any{}}}}, true)
	if s.answered(id).IsZero() {
		return fmt.Errorf("the server does not initialise")
	}
	s.write("initialized", map[string]any{}, false)
	return nil
}

func (s *server) open(text string) {
	s.version = 1
	s.write("textDocument/didOpen", map[string]any{"textDocument": map[string]any{"uri": address, "languageId": "kern", "version": 1, "text": text}}, false)
}

// key types a digit, or takes it away again.
func (s *server) key(line, column, i int) {
	s.version++
	at := map[string]any{"line": line, "character": column}
	r, text := map[string]any{"start": at, "end": at}, strconv.Itoa(1+i/2%9)
	if i%2 == 1 {
		r["end"], text = map[string]any{"line": line, "character": column + 1}, ""
	}
	s.write("textDocument/didChange", map[string]any{"textDocument": map[string]any{"uri": address, "version": s.version},
		"contentChanges": []any{map[string]any{"range": r, "text": text}}}, false)
}

// await gives when the diagnostics of a version, or of a later one, came.
func (s *server) await(version int) time.Time {
	return s.until(func() time.Time {
		for _, t := range s.told {
			if t.version >= version {
				return t.at
			}
		}
		return time.Time{}
	})
}

func (s *server) answered(id int) time.Time {
	return s.until(func() time.Time { return s.answers[id] })
}

// until waits for something to have come; zero when the server ends before.
func (s *server) until(look func() time.Time) time.Time {
	s.mu.Lock()
	defer s.mu.Unlock()
	for {
		if at := look(); !at.IsZero() || s.ended {
			return at
		}
		s.changed.Wait()
	}
}

// requests measures hover and completion where the server has them, one at a
// time, each after a key.
func (s *server) requests(n, line, column int) error {
	for method, word := range map[string]string{"textDocument/hover": `"hoverProvider"`, "textDocument/completion": `"completionProvider"`} {
		if !strings.Contains(s.provides, word) {
			continue
		}
		var took []time.Duration
		for i := range 60 {
			s.key(line, column, i)
			s.await(s.version)
			sent := time.Now()
			id := s.write(method, map[string]any{"textDocument": map[string]any{"uri": address}, "position": map[string]any{"line": line, "character": 5 + i%8}}, true)
			came := s.answered(id)
			if came.IsZero() {
				return fmt.Errorf("%s is not answered", method)
			}
			took = append(took, came.Sub(sent))
		}
		slices.Sort(took)
		fmt.Printf("%8d %s p50 %.2f ms, p95 %.2f ms\n", n, method, float64(took[30].Microseconds())/1000, float64(took[57].Microseconds())/1000)
	}
	return nil
}

// cpu is the processor time that the server has used.
func (s *server) cpu() time.Duration {
	raw, err := os.ReadFile(fmt.Sprintf("/proc/%d/stat", s.command.Process.Pid))
	if err != nil {
		return 0
	}
	_, rest, _ := strings.Cut(string(raw), ") ")
	fields := strings.Fields(rest)
	ticks := 0
	for _, f := range fields[11:13] {
		n, _ := strconv.Atoi(f)
		ticks += n
	}
	return time.Duration(ticks) * 10 * time.Millisecond // the kernel's tick is 10 ms
}

// memory is what the server holds in memory now, in MB.
func (s *server) memory() int {
	raw, err := os.ReadFile(fmt.Sprintf("/proc/%d/status", s.command.Process.Pid))
	if err != nil {
		return 0
	}
	_, rest, _ := strings.Cut(string(raw), "VmRSS:")
	fields := strings.Fields(rest)
	kb, _ := strconv.Atoi(fields[0])
	return kb / 1024
}
