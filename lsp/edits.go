package lsp

import (
	"slices"
	"strings"

	"kern/lang"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// editing collects changes of files for the client to carry out.
type editing struct {
	files map[uri.URI]*fileEditing
	// lost is set when a file's text is not known for certain: its changes could
	// not be applied.
	lost bool
}

type fileEditing struct {
	version *int32 // nil for a file that is not open
	edits   []protocol.TextEdit
	seen    map[protocol.TextEdit]bool
}

// add has a span of a file of a workspace replaced. The same change may be added
// again.
func (e *editing) add(s *Snapshot, file string, span lang.Span, text string) {
	if d := s.open[file]; d != nil && d.lost {
		e.lost = true
	}
	u := s.URI(file)
	f := e.files[u]
	if f == nil {
		f = &fileEditing{version: s.Version(file), seen: map[protocol.TextEdit]bool{}}
		if e.files == nil {
			e.files = map[uri.URI]*fileEditing{}
		}
		e.files[u] = f
	}
	edit := protocol.TextEdit{Range: s.Range(file, span), NewText: text}
	if !f.seen[edit] {
		f.seen[edit] = true
		f.edits = append(f.edits, edit)
	}
}

// workspaceEdit writes the changes as the client takes them: with the versions
// that they are meant for, if it can, so that it refuses them when it has gone
// on. It is nil when there are none.
func (e *editing) workspaceEdit(client *Client) (*protocol.WorkspaceEdit, error) {
	if e.lost {
		return nil, protocol.ErrContentModified
	}
	if len(e.files) == 0 {
		return nil, nil
	}
	order := make([]uri.URI, 0, len(e.files))
	for u := range e.files {
		order = append(order, u)
	}
	slices.SortFunc(order, func(a, b uri.URI) int { return strings.Compare(string(a), string(b)) })
	out := &protocol.WorkspaceEdit{}
	for _, u := range order {
		f := e.files[u]
		if !client.DocumentChanges {
			if out.Changes == nil {
				out.Changes = map[uri.URI][]protocol.TextEdit{}
			}
			out.Changes[u] = f.edits
			continue
		}
		change := &protocol.TextDocumentEdit{TextDocument: protocol.OptionalVersionedTextDocumentIdentifier{
			TextDocumentIdentifier: protocol.TextDocumentIdentifier{URI: u}, Version: f.version}}
		for i := range f.edits {
			change.Edits = append(change.Edits, &f.edits[i])
		}
		out.DocumentChanges = append(out.DocumentChanges, change)
	}
	return out, nil
}
