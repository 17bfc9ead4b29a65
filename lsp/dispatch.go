package lsp

import (
	"bytes"
	"context"
	"encoding/json"
	"errors"
	"runtime/debug"
	"strings"
	"sync"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// handler is the way of a message: cancellation, then the gate of the session's
// stages, then the method. Whatever goes wrong on it ends there: a panic is an
// internal error of that request, the error of a notification is logged. The
// connection would not survive either.
func (s *Server) handler() jsonrpc2.Handler {
	next := s.guarded(s.gate(served(), protocol.ServerHandler(s, nil)))
	running := &running{cancel: map[jsonrpc2.ID]*request{}}
	return func(wire context.Context, r *jsonrpc2.Request) (any, error) {
		if r.Method() == protocol.MethodCancelRequest {
			running.stop(r.Params())
			return nil, nil
		}
		ctx, cancel := context.WithCancel(s.ctx)
		defer cancel()
		request := &request{wire: wire, cancel: cancel, params: r.Params()}
		if r.IsCall() {
			id := r.ID()
			running.add(id, request)
			defer running.remove(id, request)
		}
		return next(context.WithValue(ctx, requestKey{}, request), r)
	}
}

// request is a message that is being handled. Its context is derived from the
// session's and not from the library's own: that one goes back into a pool when
// the message has been handled, and a context derived from it may look at it
// later still, which ends the process.
type request struct {
	wire     context.Context // the library's, for Async alone
	cancel   context.CancelFunc
	params   []byte // as they came; they last until release
	released bool
}

// paramsOf gives the parameters of a message as they came.
func paramsOf(ctx context.Context) []byte {
	if r, ok := ctx.Value(requestKey{}).(*request); ok && !r.released {
		return r.params
	}
	return nil
}

// requestKey is the context's key for the request.
type requestKey struct{}

// release lets the next message be read while this one is still being answered.
// Everything that depends on the order of messages has to be read before. It
// may be called again.
func release(ctx context.Context) {
	if r, ok := ctx.Value(requestKey{}).(*request); ok && !r.released {
		r.released = true
		jsonrpc2.Async(r.wire)
	}
}

// running are the requests that can be cancelled.
type running struct {
	mu     sync.Mutex
	cancel map[jsonrpc2.ID]*request
}

func (r *running) add(id jsonrpc2.ID, q *request) {
	r.mu.Lock()
	defer r.mu.Unlock()
	r.cancel[id] = q
}

func (r *running) remove(id jsonrpc2.ID, q *request) {
	r.mu.Lock()
	defer r.mu.Unlock()
	if r.cancel[id] == q { // a client may use an id again too early
		delete(r.cancel, id)
	}
}

// stop cancels the request that a notification names. One that cannot be read
// names none.
func (r *running) stop(params []byte) {
	var p struct {
		ID json.RawMessage `json:"id"`
	}
	if json.Unmarshal(params, &p) != nil {
		return
	}
	var id jsonrpc2.ID
	var number int64
	var text string
	switch {
	case p.ID == nil || bytes.Equal(p.ID, []byte("null")):
		return
	case json.Unmarshal(p.ID, &number) == nil:
		id = jsonrpc2.NewNumberID(number)
	case json.Unmarshal(p.ID, &text) == nil:
		id = jsonrpc2.NewStringID(text)
	default:
		return
	}
	r.mu.Lock()
	defer r.mu.Unlock()
	if q := r.cancel[id]; q != nil {
		q.cancel()
	}
}

// gate lets through what the stage of the session allows and the server serves.
func (s *Server) gate(methods map[string]bool, next jsonrpc2.Handler) jsonrpc2.Handler {
	return func(ctx context.Context, r *jsonrpc2.Request) (any, error) {
		s.mu.Lock()
		stage := s.stage
		s.mu.Unlock()
		method := r.Method()
		switch {
		case method == protocol.MethodExit:
		case stage == fresh && method != protocol.MethodInitialize:
			return nil, jsonrpc2.Errorf(jsonrpc2.ServerNotInitialized, "the server is not initialised")
		case stage == finished:
			return nil, jsonrpc2.Errorf(jsonrpc2.InvalidRequest, "the server has shut down")
		case !methods[method]:
			return nil, jsonrpc2.Errorf(jsonrpc2.MethodNotFound, "'%s' is not served", method)
		}
		return next(ctx, r)
	}
}

// guarded turns what a method came to into what the client is told.
func (s *Server) guarded(next jsonrpc2.Handler) jsonrpc2.Handler {
	return func(ctx context.Context, r *jsonrpc2.Request) (result any, err error) {
		start := s.clock.Now()
		method := strings.Clone(r.Method())
		defer func() {
			if p := recover(); p != nil {
				s.log.fail("internal error in %s: %v\n%s", method, p, debug.Stack())
				result, err = nil, jsonrpc2.Errorf(jsonrpc2.InternalError, "internal error in %s: %v", method, p)
			}
			s.log.handled(method, r.Params(), s.clock.Now().Sub(start), err)
			if r.IsCall() {
				return
			}
			if err != nil {
				s.dropped(method, r.Params(), err)
			}
			result, err = nil, nil
		}()
		result, err = next(ctx, r)
		switch {
		case err == nil:
		case errors.Is(err, jsonrpc2.ErrParse):
			err = jsonrpc2.Errorf(jsonrpc2.InvalidParams, "%s: the parameters cannot be read: %v", method, err)
		case ctx.Err() != nil && errors.Is(err, context.Canceled):
			err = protocol.ErrRequestCancelled
		case errors.Is(err, errInternal):
			err = jsonrpc2.Errorf(jsonrpc2.InternalError, "%v", err)
		}
		if err != nil {
			result = nil
		}
		return result, err
	}
}

// errInternal marks a defect of the server.
var errInternal = errors.New("internal error")

// dropped tells of a notification that came to nothing. A change that could not
// be read leaves its document unknown.
func (s *Server) dropped(method string, params []byte, err error) {
	var e *jsonrpc2.Error
	quiet := errors.As(err, &e) && (e.Code == jsonrpc2.ServerNotInitialized || e.Code == jsonrpc2.InvalidRequest ||
		e.Code == jsonrpc2.MethodNotFound && strings.HasPrefix(method, "$/"))
	if !quiet {
		s.log.warn("%s was left out: %v", method, err)
	}
	if method != protocol.MethodTextDocumentDidChange {
		return
	}
	var p struct {
		TextDocument struct {
			URI string `json:"uri"`
		} `json:"textDocument"`
	}
	if json.Unmarshal(params, &p) != nil {
		return
	}
	if u, err := uri.Parse(p.TextDocument.URI); err == nil {
		s.desync(u)
	}
}
