package lsp

import (
	"context"
	"io"
	"sync"
	"sync/atomic"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// Options are what the program hands to a server. The zero value works.
type Options struct {
	// Version is the version of the program.
	Version string
	// Settings are the settings of the command line; DefaultSettings when nil.
	Settings *Settings
	// Log takes the server's own notes besides the client; nil for none.
	Log io.Writer
	// Clock is the system's when nil.
	Clock Clock
}

// Server serves one client. Its methods are those of the protocol; each
// feature's stand in the feature's file.
type Server struct {
	protocol.UnimplementedServer

	options Options
	clock   Clock
	conn    jsonrpc2.Conn
	log     *logger
	ctx     context.Context // ends with the session
	cancel  context.CancelFunc

	goroutines sync.WaitGroup
	tokens     atomic.Int64 // of progress
	busy       busy

	// set by Initialize, before anything else is served
	client *Client
	unit   encoding

	mu         sync.Mutex
	stage      stage
	settings   Settings
	ground     Settings // what the client's settings are laid over
	docs       map[uri.URI]*document
	folders    []string // opened by the editor, absolute
	workspaces map[string]*workspace
	exit       chan struct{} // closed by exit or the death of the parent

	pushing  sync.Mutex // held while diagnostics are sent
	shown    map[uri.URI]shownSet
	refresh  refresher
	answered tokenMemory // the semantic tokens that documents were answered with
}

// stage is how far the session has come.
type stage uint8

const (
	fresh    stage = iota // before initialize
	serving               // from initialize on
	finished              // after shutdown
)

func newServer(ctx context.Context, o Options) *Server {
	if o.Clock == nil {
		o.Clock = systemClock{}
	}
	if o.Settings == nil {
		s := DefaultSettings()
		o.Settings = &s
	}
	s := &Server{options: o, clock: o.Clock, settings: *o.Settings, ground: *o.Settings, client: &Client{},
		docs: map[uri.URI]*document{}, workspaces: map[string]*workspace{}, shown: map[uri.URI]shownSet{}, exit: make(chan struct{})}
	s.ctx, s.cancel = context.WithCancel(ctx)
	s.log = &logger{server: s, also: o.Log}
	s.refresh.server = s
	return s
}

// Settings are the settings as they are now.
func (s *Server) Settings() Settings {
	s.mu.Lock()
	defer s.mu.Unlock()
	return s.settings
}

// Client is what the client can do.
func (s *Server) Client() *Client { return s.client }

// background runs something that may wait for the client: never on the
// goroutine that reads its messages.
func (s *Server) background(f func()) {
	s.busy.begin()
	s.goroutines.Go(func() {
		defer s.busy.end()
		f()
	})
}
