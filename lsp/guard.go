package lsp

import (
	"bufio"
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"strconv"
	"strings"
	"sync"

	"go.lsp.dev/jsonrpc2"
)

// guard stands between the wire and the library. A message that is no JSON, or
// no message, would end the library's connection: the guard answers it with the
// error that is due, and only sound messages go on. And it takes what is written
// into a queue, so that a client that does not read while it writes cannot bring
// both sides to a standstill.
type guard struct {
	conn io.ReadWriteCloser
	in   *bufio.Reader
	left []byte // of the message that is being handed on

	sound  chan []byte   // messages for the library
	ended  error         // why there are no more; set before sound is closed
	closes chan struct{} // closed by Close
	empty  chan struct{} // closed when the last message has been handed on
	once   sync.Once

	mu     sync.Mutex
	change *sync.Cond
	queue  [][]byte
	size   int
	failed error
	closed bool
	idle   bool // nothing is being written
}

const (
	maxMessage = 512 << 20 // bytes of one message
	maxQueue   = 256 << 20 // bytes that wait for a client that does not read
)

func newGuard(conn io.ReadWriteCloser) *guard {
	g := &guard{conn: conn, in: bufio.NewReaderSize(conn, 1<<16), idle: true, sound: make(chan []byte, 16), closes: make(chan struct{}), empty: make(chan struct{})}
	g.change = sync.NewCond(&g.mu)
	go g.write()
	go g.read()
	return g
}

// read reads ahead. It has a goroutine of its own as a read of standard input
// cannot always be broken off: the session ends without it then.
func (g *guard) read() {
	defer close(g.sound)
	for {
		message, err := g.next()
		if err != nil {
			g.ended = err
			return
		}
		if message == nil {
			continue
		}
		select {
		case g.sound <- message:
		case <-g.closes:
			g.ended = io.ErrClosedPipe
			return
		}
	}
}

// Read hands on the bytes of sound messages.
func (g *guard) Read(p []byte) (int, error) {
	if len(g.left) == 0 {
		select {
		case message, ok := <-g.sound:
			if !ok {
				g.once.Do(func() { close(g.empty) })
				return 0, g.ended
			}
			g.left = message
		case <-g.closes:
			return 0, io.ErrClosedPipe
		}
	}
	n := copy(p, g.left)
	g.left = g.left[n:]
	return n, nil
}

// next reads one message, nil for one that was answered here. Its error ends the session: behind a header that
// cannot be read, nobody knows where the next message begins.
func (g *guard) next() ([]byte, error) {
	length := -1
	for first := true; ; first = false {
		line, err := g.in.ReadSlice('\n')
		if err != nil {
			if err == io.EOF && (len(line) > 0 || !first) {
				return nil, io.ErrUnexpectedEOF
			}
			return nil, err
		}
		field := strings.TrimRight(string(line), "\r\n")
		if field == "" {
			break
		}
		name, value, ok := strings.Cut(field, ":")
		// A browser can be made to send requests to a port, never to begin
		// them with a header of ours.
		if !ok || first && !strings.HasPrefix(strings.ToLower(name), "content-") {
			return nil, jsonrpc2.ErrInvalidHeader
		}
		if strings.EqualFold(name, "content-length") {
			if length, err = strconv.Atoi(strings.TrimSpace(value)); err != nil || length < 0 {
				return nil, jsonrpc2.ErrInvalidHeader
			}
		}
	}
	if length < 0 {
		return nil, jsonrpc2.ErrInvalidHeader
	}
	if length > maxMessage {
		if _, err := io.CopyN(io.Discard, g.in, int64(length)); err != nil {
			return nil, err
		}
		g.refuse(jsonrpc2.InvalidRequest, "the message is too long", nil)
		return nil, nil
	}
	var body bytes.Buffer
	if _, err := io.CopyN(&body, g.in, int64(length)); err != nil {
		if err == io.EOF {
			err = io.ErrUnexpectedEOF
		}
		return nil, err
	}
	if !g.readable(body.Bytes()) {
		return nil, nil
	}
	return append(fmt.Appendf(make([]byte, 0, length+40), "Content-Length: %d\r\n\r\n", length), body.Bytes()...), nil
}

// readable tells whether the library can read a message, and answers it when not.
func (g *guard) readable(body []byte) bool {
	if !json.Valid(body) {
		g.refuse(jsonrpc2.ParseError, "the message is no JSON", nil)
		return false
	}
	if body = bytes.TrimLeft(body, " \t\r\n"); body[0] == '[' {
		return true // each part of a batch is answered by itself
	}
	_, err := jsonrpc2.DecodeMessage(body)
	if err == nil {
		return true
	}
	var envelope struct {
		ID     json.RawMessage `json:"id"`
		Result json.RawMessage `json:"result"`
		Error  json.RawMessage `json:"error"`
	}
	if json.Unmarshal(body, &envelope) == nil && (envelope.Result != nil || envelope.Error != nil) {
		return false // an answer is not answered
	}
	var id any
	if json.Unmarshal(envelope.ID, &id) != nil {
		envelope.ID = nil
	}
	switch id.(type) {
	case string, float64:
	default:
		envelope.ID = nil
	}
	g.refuse(jsonrpc2.InvalidRequest, "the message is no request", envelope.ID)
	return false
}

func (g *guard) refuse(code jsonrpc2.Code, message string, id json.RawMessage) {
	if id == nil {
		id = json.RawMessage("null")
	}
	body := fmt.Appendf(nil, `{"jsonrpc":"2.0","id":%s,"error":{"code":%d,"message":%q}}`, id, code, message)
	if _, err := g.Write(append(fmt.Appendf(nil, "Content-Length: %d\r\n\r\n", len(body)), body...)); err != nil {
		return // nobody is there to be told
	}
}

// Write takes a message; the library hands over each as one piece.
func (g *guard) Write(p []byte) (int, error) {
	g.mu.Lock()
	defer g.mu.Unlock()
	for g.size > maxQueue && g.failed == nil && !g.closed {
		g.change.Wait()
	}
	if g.failed != nil {
		return 0, g.failed
	}
	if g.closed {
		return 0, io.ErrClosedPipe
	}
	g.queue = append(g.queue, bytes.Clone(p))
	g.size += len(p)
	g.change.Broadcast()
	return len(p), nil
}

// write sends what is in the queue, all that waits at once.
func (g *guard) write() {
	g.mu.Lock()
	defer g.mu.Unlock()
	for {
		for len(g.queue) == 0 && !g.closed {
			g.change.Wait()
		}
		if len(g.queue) == 0 || g.failed != nil {
			return
		}
		batch := g.queue
		g.queue, g.size, g.idle = nil, 0, false
		g.mu.Unlock()
		out := batch[0]
		if len(batch) > 1 {
			out = bytes.Join(batch, nil)
		}
		_, err := g.conn.Write(out)
		g.mu.Lock()
		g.idle = true
		if err != nil {
			g.failed = errors.Join(io.ErrClosedPipe, err)
		}
		g.change.Broadcast()
	}
}

// flush waits until everything has been written, or cannot be.
func (g *guard) flush() {
	g.mu.Lock()
	defer g.mu.Unlock()
	for (len(g.queue) > 0 || !g.idle) && g.failed == nil && !g.closed {
		g.change.Wait()
	}
}

// Close closes the wire.
func (g *guard) Close() error {
	g.mu.Lock()
	if !g.closed {
		close(g.closes)
	}
	g.closed = true
	g.queue = nil
	g.change.Broadcast()
	g.mu.Unlock()
	return g.conn.Close()
}
