package lsp

import (
	"context"

	"go.lsp.dev/protocol"
)

// feature is something that the server does for the client: the requests that
// it answers and how the client learns of it. Nothing is advertised that is not
// in the table, and only requests of the table are answered.
type feature struct {
	// name is for people and for test output.
	name string
	// methods are the requests and notifications that the feature serves. The
	// Server has a method for each.
	methods []string
	// advertise puts the feature into the server's capabilities, if the client
	// can use it. nil for a feature that needs no word, or is registered.
	advertise func(*protocol.ServerCapabilities, *Client)
	// register gives what is to be registered at run time, if the client can do
	// that. nil for none.
	register func(*Client) []protocol.Registration
	// refresh is the request that has the client ask again when results change
	// without an edit of its document; "" where there is none or the client does
	// not know it.
	refresh func(*Client) string
}

// registration makes a registration of options that are sent as JSON.
func registration(id, method string, options any) protocol.Registration {
	raw, err := protocol.Marshal(options)
	if err != nil {
		panic("lsp: the options of " + method + " cannot be written: " + err.Error()) // they are constant
	}
	return protocol.Registration{ID: "kern-" + id, Method: method, RegisterOptions: raw}
}

// served tells the methods that are answered, of all features.
var served = func() map[string]bool {
	out := map[string]bool{protocol.MethodInitialize: true, protocol.MethodInitialized: true, protocol.MethodShutdown: true, protocol.MethodExit: true,
		protocol.MethodSetTrace: true, protocol.MethodProgress: true}
	for _, f := range features {
		for _, m := range f.methods {
			out[m] = true
		}
	}
	return out
}

// register registers what the features want registered.
func (s *Server) register() {
	var all []protocol.Registration
	for _, f := range features {
		if f.register != nil {
			all = append(all, f.register(s.client)...)
		}
	}
	if len(all) == 0 {
		return
	}
	s.background(func() {
		if err := s.call(protocol.MethodClientRegisterCapability, &protocol.RegistrationParams{Registrations: all}, nil); err != nil {
			s.log.warn("the client does not register what it said it would: %v", err)
		}
	})
}

// call asks the client something and waits for the answer: never on the
// goroutine that reads its messages.
func (s *Server) call(method string, params, result any) error {
	_, err := s.conn.Call(s.ctx, method, params, result)
	return err
}

// Progress and SetTrace are for the client's own bookkeeping.

// Progress takes a progress report of the client; there is none that we ask for.
func (s *Server) Progress(context.Context, *protocol.ProgressParams) error { return nil }

// SetTrace sets how much is logged.
func (s *Server) SetTrace(_ context.Context, p *protocol.SetTraceParams) error {
	s.log.trace(p.Value)
	return nil
}

// pointer is for the optional fields of the protocol.
func pointer[T any](v T) *T { return &v }

// object writes constant data as JSON.
func object(v any) protocol.LSPAny {
	raw, err := protocol.Marshal(v)
	if err != nil {
		panic("lsp: " + err.Error()) // plain data can always be written
	}
	return raw
}
