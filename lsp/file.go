package lsp

import (
	"context"

	"kern/lang"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// File is a file as a request saw it: what every feature starts from. It does
// not change.
type File struct {
	*Snapshot
	Name string // in the project
	Text *Text
	Tree *lang.File
}

// File gives the file of a request with everything worked out. It takes the
// present snapshot, lets later messages be read, and waits for the checker. It
// gives nil without an error for a file that no project has; the answer to the
// request is then empty.
func (s *Server) File(ctx context.Context, u uri.URI) (*File, error) {
	return s.file(ctx, u, true)
}

// Parsed is File for requests that need the trees alone: it does not wait for
// the checker, and there is no report.
func (s *Server) Parsed(ctx context.Context, u uri.URI) (*File, error) {
	return s.file(ctx, u, false)
}

func (s *Server) file(ctx context.Context, u uri.URI, checked bool) (*File, error) {
	if u == "" {
		return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "the request names no document")
	}
	s.mu.Lock()
	d := s.docs[u]
	var w *workspace
	if d != nil {
		w = s.homeOf(d)
	} else if path := pathOf(u); path != "" {
		w = s.home(path)
	}
	var snapshot *Snapshot
	if w != nil {
		snapshot = w.current
	}
	s.mu.Unlock()
	release(ctx)
	if snapshot == nil {
		return nil, nil
	}
	if d != nil && d.lost {
		return nil, protocol.ErrContentModified
	}
	stage := snapshot.loaded
	if checked {
		stage = snapshot.checked
	}
	if err := snapshot.wait(ctx, stage); err != nil {
		return nil, err
	}
	name, ok := "", false
	if d != nil {
		name, ok = w.nameOf(d)
	} else {
		name, ok = w.name(pathOf(u))
	}
	tree := snapshot.project.Files[name]
	if !ok || tree == nil {
		return nil, nil
	}
	return &File{Snapshot: snapshot, Name: name, Text: snapshot.textOf(name), Tree: tree}, nil
}

// Offset is the byte at a position of the file.
func (f *File) Offset(p protocol.Position) int32 { return positions{f.Text, f.unit}.offset(p) }

// Span is the bytes of a range of the file. A range that ends before it begins
// is empty.
func (f *File) Span(r protocol.Range) lang.Span {
	s, ok := positions{f.Text, f.unit}.spanOf(r)
	if !ok {
		s.End = s.Start
	}
	return s
}

// Position is the position of a byte of the file.
func (f *File) Position(offset int32) protocol.Position {
	return positions{f.Text, f.unit}.position(offset)
}

// RangeOf is the range of a span of the file.
func (f *File) RangeOf(s lang.Span) protocol.Range { return positions{f.Text, f.unit}.rangeOf(s) }
