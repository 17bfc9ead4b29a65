package lsp

import (
	"context"
	"strings"

	"kern/lsp/disk"

	"go.lsp.dev/protocol"
)

// DidChangeWatchedFiles is told of files that changed on the disk.
func (s *Server) DidChangeWatchedFiles(_ context.Context, p *protocol.DidChangeWatchedFilesParams) error {
	s.mu.Lock()
	defer s.mu.Unlock()
	touched := map[*workspace]bool{}
	for _, c := range p.Changes {
		path := pathOf(c.URI)
		if path == "" {
			continue
		}
		for _, w := range s.workspaces {
			name, ok := w.name(path)
			if !ok {
				continue
			}
			w.disk.saved(name)
			if c.Type != protocol.FileChangeTypeChanged || !strings.HasSuffix(name, disk.Extension) {
				// a folder that came or went says nothing of the files in it
				w.disk.suspect(true)
			}
			touched[w] = true
		}
	}
	for w := range touched {
		w.outer.Store(true)
		w.touch()
	}
	return nil
}

// watchers is the registration of the files that matter.
func watchers() protocol.Registration {
	options := protocol.DidChangeWatchedFilesRegistrationOptions{Watchers: []protocol.FileSystemWatcher{
		{GlobPattern: protocol.Pattern("**/*" + disk.Extension)}, {GlobPattern: protocol.Pattern("**/*.csv")}}}
	return registration("watched-files", protocol.MethodWorkspaceDidChangeWatchedFiles, &options)
}
