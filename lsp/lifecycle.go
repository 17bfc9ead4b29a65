package lsp

import (
	"context"
	"os"
	"path/filepath"
	"strings"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
)

// Initialize learns what the client can do and says what the server can.
func (s *Server) Initialize(_ context.Context, p *protocol.InitializeParams) (*protocol.InitializeResult, error) {
	s.mu.Lock()
	if s.stage != fresh {
		s.mu.Unlock()
		return nil, jsonrpc2.Errorf(jsonrpc2.InvalidRequest, "initialize can be asked for once")
	}
	s.mu.Unlock()
	client, err := newClient(p)
	if err != nil {
		return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "the capabilities cannot be read: %v", err)
	}
	s.client, s.unit = client, client.encoding()
	s.log.trace(p.Trace)
	if p.ProcessID != nil && *p.ProcessID > 0 {
		s.watchParent(int(*p.ProcessID))
	}
	wrong := s.ground.apply(p.InitializationOptions)
	s.mu.Lock()
	s.settings = s.ground
	s.stage = serving
	for _, dir := range foldersOf(p) {
		s.addFolder(dir)
	}
	s.mu.Unlock()
	if wrong != nil {
		s.log.warn("initializationOptions: %v", wrong)
	}
	result := &protocol.InitializeResult{ServerInfo: protocol.ServerInfo{Name: "kern"}}
	if s.options.Version != "" {
		result.ServerInfo.Version = protocol.NewOptional(s.options.Version)
	}
	result.Capabilities.PositionEncoding = encodingKinds[s.unit]
	for _, f := range features {
		if f.advertise != nil {
			f.advertise(&result.Capabilities, client)
		}
	}
	return result, nil
}

// foldersOf gives the folders that the editor has open, in the three ways that
// the protocol has had.
func foldersOf(p *protocol.InitializeParams) []string {
	var out []string
	if folders, ok := p.WorkspaceFolders.Get(); ok && len(folders) > 0 {
		for _, f := range folders {
			if path := pathOf(f.URI); path != "" {
				out = append(out, path)
			}
		}
		return out
	}
	if p.RootURI != nil {
		if path := pathOf(*p.RootURI); path != "" {
			return []string{path}
		}
	}
	if path, ok := p.RootPath.Get(); ok && filepath.IsAbs(path) {
		return []string{filepath.Clean(strings.Clone(path))}
	}
	return nil
}

// Initialized registers what is registered at run time, and asks for settings.
func (s *Server) Initialized(context.Context, *protocol.InitializedParams) error {
	s.register()
	s.pullSettings()
	return nil
}

// Shutdown ends the service; exit is still to come.
func (s *Server) Shutdown(context.Context) error {
	s.mu.Lock()
	defer s.mu.Unlock()
	s.stage = finished
	for _, w := range s.workspaces {
		w.cancel()
	}
	s.workspaces = map[string]*workspace{}
	return nil
}

// Exit ends the session.
func (s *Server) Exit(context.Context) error {
	s.leave()
	return nil
}

// leave has Serve return.
func (s *Server) leave() {
	s.mu.Lock()
	defer s.mu.Unlock()
	select {
	case <-s.exit:
	default:
		close(s.exit)
	}
}

// code is the exit status: 0 after an orderly shutdown.
func (s *Server) code() int {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.stage == finished {
		return 0
	}
	return 1
}

// watchParent ends the session when the editor's process is gone, so that no
// server stays behind.
func (s *Server) watchParent(pid int) {
	if pid == os.Getpid() {
		return
	}
	const every = 5_000_000_000 // 5 s
	var look func()
	look = func() {
		if s.ctx.Err() != nil {
			return
		}
		if !alive(pid) {
			s.leave()
			return
		}
		s.clock.AfterFunc(every, look)
	}
	s.clock.AfterFunc(every, look)
}
