package main

import (
	"errors"
	"fmt"
	"net"
	"os"
	"os/signal"
	"runtime/debug"
	"syscall"

	"kern/lsp"

	"github.com/spf13/cobra"
)

func lspCommand() *cobra.Command {
	listen := ""
	var set []string
	verbose := false
	c := &cobra.Command{
		Use:   "lsp",
		Short: "Serve an editor",
		Long: "lsp is the language server: an editor starts it and talks to it over standard input\n" +
			"and output, or connects to it with --listen.\n\n" +
			"Exit status: 0 when the editor ended the session in order, 1 otherwise.",
		Example: "  kern lsp\n  kern lsp --listen 127.0.0.1:4389\n  kern lsp --set inlayHints.units=false",
		Args:    cobra.NoArgs,
		RunE: func(c *cobra.Command, _ []string) error {
			settings := lsp.DefaultSettings()
			for _, s := range set {
				if err := settings.Set(s); err != nil {
					return err
				}
			}
			o := lsp.Options{Version: release, Settings: &settings}
			if verbose {
				o.Log = os.Stderr
			}
			// An edit makes little that lasts and much that does not: collecting
			// it less often keeps pauses away from the keys, for some memory.
			debug.SetGCPercent(300)
			ctx, stop := signal.NotifyContext(c.Context(), os.Interrupt, syscall.SIGTERM)
			defer stop()
			if listen != "" {
				return lsp.Listen(ctx, listen, o, func(a net.Addr) { fmt.Fprintf(os.Stderr, "kern lsp: listening on %s\n", a) })
			}
			if lsp.Serve(ctx, standard{}, o) != 0 {
				return errWrong
			}
			return nil
		},
	}
	c.Flags().StringVar(&listen, "listen", "", "serve on an address of this machine instead of standard input and output")
	c.Flags().StringArrayVar(&set, "set", nil, "a setting, NAME=VALUE; the editor's own settings come before it")
	c.Flags().BoolVar(&verbose, "log", false, "write what goes wrong to standard error too")
	c.Flags().Bool("stdio", true, "serve on standard input and output, as is the rule")
	return c
}

// standard is standard input and output as one connection.
type standard struct{}

// Read reads standard input.
func (standard) Read(p []byte) (int, error) { return os.Stdin.Read(p) }

// Write writes standard output.
func (standard) Write(p []byte) (int, error) { return os.Stdout.Write(p) }

// Close closes both.
func (standard) Close() error { return errors.Join(os.Stdin.Close(), os.Stdout.Close()) }
