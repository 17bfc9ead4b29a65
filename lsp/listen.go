package lsp

import (
	"context"
	"errors"
	"fmt"
	"net"
	"sync"
)

// Listen serves clients on an address of this machine, each with a session of
// its own, until the context ends. started is told the address that is listened
// on; it may be nil.
func Listen(ctx context.Context, address string, o Options, started func(net.Addr)) error {
	host, _, err := net.SplitHostPort(address)
	if err != nil {
		return fmt.Errorf("'%s' is no address with a port: 127.0.0.1:4389", address)
	}
	// whoever can connect can have files read
	if ip := net.ParseIP(host); host != "localhost" && (ip == nil || !ip.IsLoopback()) {
		return fmt.Errorf("'%s' is no address of this machine alone: 127.0.0.1", host)
	}
	var config net.ListenConfig
	listener, err := config.Listen(ctx, "tcp", address)
	if err != nil {
		return err
	}
	stop := context.AfterFunc(ctx, func() { listener.Close() })
	defer stop()
	if started != nil {
		started(listener.Addr())
	}
	var sessions sync.WaitGroup
	defer sessions.Wait()
	for {
		conn, err := listener.Accept()
		if err != nil {
			if ctx.Err() != nil && errors.Is(err, net.ErrClosed) {
				return nil
			}
			return err
		}
		sessions.Go(func() { Serve(ctx, conn, o) })
	}
}
