package lsp

import (
	"context"
	"errors"
	"fmt"
	"io"
	"net"
	"time"

	"go.lsp.dev/jsonrpc2"
)

// Serve serves one client over a connection until it says exit, goes away or
// the context ends. The result is the exit status of a process that serves this
// client alone: 0 when the client had asked for shutdown, 1 otherwise.
func Serve(ctx context.Context, conn io.ReadWriteCloser, o Options) int {
	s := newServer(ctx, o)
	return s.serve(conn)
}

func (s *Server) serve(wire io.ReadWriteCloser) int {
	g := newGuard(wire)
	s.conn = jsonrpc2.NewConn(jsonrpc2.NewStream(g), jsonrpc2.WithCodec(codec{}))
	s.conn.Go(s.ctx, s.handler())
	select {
	case <-s.exit:
	case <-g.empty: // requests may still wait for something; nobody waits for them
	case <-s.conn.Done():
	case <-s.ctx.Done():
	}
	code := s.code()
	s.end(g)
	return code
}

// end closes the session down: what is still running is told to stop, what has
// been written gets the chance to leave.
func (s *Server) end(g *guard) {
	s.cancel()
	waitFor(time.Second, g.flush)
	closed := func() {
		if err := g.Close(); err != nil && s.options.Log != nil && !errors.Is(err, net.ErrClosed) {
			fmt.Fprintf(s.options.Log, "kern lsp: closing the connection: %v\n", err)
		}
		s.goroutines.Wait()
		<-s.conn.Done()
	}
	// Standard input cannot always be closed while somebody reads from it; the
	// end of the process does that.
	waitFor(time.Second, closed)
}

// waitFor runs f, but waits no longer than this for its end.
func waitFor(limit time.Duration, f func()) {
	done := make(chan struct{})
	go func() {
		defer close(done)
		f()
	}()
	timer := time.NewTimer(limit)
	defer timer.Stop()
	select {
	case <-done:
	case <-timer.C:
	}
}
