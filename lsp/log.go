package lsp

import (
	"fmt"
	"io"
	"sync/atomic"
	"time"

	"go.lsp.dev/protocol"
)

// logger tells the client, and whoever started the server, what went wrong and,
// when traced, what was done. It never waits for either.
type logger struct {
	server *Server
	also   io.Writer
	level  atomic.Uint32 // traceOff and so on
}

const (
	traceOff uint32 = iota
	traceMessages
	traceVerbose
)

// fail tells of a defect or of something that keeps the server from its work.
func (l *logger) fail(format string, args ...any) { l.write(protocol.MessageTypeError, format, args) }

// warn tells of something that was not as it should be and was left out.
func (l *logger) warn(format string, args ...any) {
	l.write(protocol.MessageTypeWarning, format, args)
}

func (l *logger) write(kind protocol.MessageType, format string, args []any) {
	message := fmt.Sprintf(format, args...)
	if l.also != nil {
		fmt.Fprintln(l.also, "kern lsp: "+message)
	}
	l.server.notify(protocol.MethodWindowLogMessage, &protocol.LogMessageParams{Type: kind, Message: message})
}

// trace sets how much is logged of the messages that are handled.
func (l *logger) trace(value protocol.TraceValue) {
	switch value {
	case protocol.TraceValueMessages:
		l.level.Store(traceMessages)
	case protocol.TraceValueVerbose:
		l.level.Store(traceVerbose)
	case protocol.TraceValueOff:
		l.level.Store(traceOff)
	}
}

// handled logs a message that was handled.
func (l *logger) handled(method string, params []byte, took time.Duration, err error) {
	level := l.level.Load()
	if level == traceOff {
		return
	}
	p := &protocol.LogTraceParams{Message: fmt.Sprintf("%s: %.1f ms", method, float64(took.Microseconds())/1000)}
	if err != nil {
		p.Message += ": " + err.Error()
	}
	if level == traceVerbose {
		verbose := string(params)
		p.Verbose = &verbose
	}
	l.server.notify(protocol.MethodLogTrace, p)
}

// notify sends a notification; one that cannot be sent any more is no loss.
func (s *Server) notify(method string, params any) {
	if s.conn == nil {
		return
	}
	if err := s.conn.Notify(s.ctx, method, params); err != nil && s.options.Log != nil {
		fmt.Fprintf(s.options.Log, "kern lsp: %s was not sent: %v\n", method, err)
	}
}
