package lsp

import (
	"context"

	"kern/lang"

	"go.lsp.dev/protocol"
)

var referencesFeature = feature{
	name:    "references",
	methods: []string{protocol.MethodTextDocumentReferences},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.References {
			c.ReferencesProvider = protocol.Boolean(true)
		}
	},
}

// References answers with every place where a name stands, in every workspace
// that knows it; for the file of an include, with every include of it.
func (s *Server) References(ctx context.Context, p *protocol.ReferenceParams) ([]protocol.Location, error) {
	snapshots := s.snapshots() // of the same moment as the file
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	offset := f.Offset(p.Position)
	if _, name, ok := includeAt(f, offset); ok {
		return includers(ctx, f, name, snapshots)
	}
	found := mentionsAt(f, offset)
	if len(found) == 0 {
		return nil, nil
	}
	spots, err := allSpots(ctx, f, nameds(found), snapshots)
	if err != nil {
		return nil, err
	}
	out := []protocol.Location{}
	for _, spot := range spots {
		if !spot.declares || p.Context.IncludeDeclaration {
			out = append(out, spot.location())
		}
	}
	return out, nil
}

// includers gives the includes that bring in a file.
func includers(ctx context.Context, f *File, name string, snapshots []*Snapshot) ([]protocol.Location, error) {
	out := []protocol.Location{}
	seen := map[protocol.Location]bool{}
	u := f.URI(name)
	for _, s := range snapshots {
		target, ok := s.sameFile(u)
		if s == f.Snapshot {
			target, ok = name, true
		}
		if !ok {
			continue
		}
		if err := s.wait(ctx, s.loaded); err != nil {
			return nil, err
		}
		for _, inc := range s.includes() {
			if at := s.Location(inc.file, inc.span); inc.leads == target && !seen[at] {
				seen[at] = true
				out = append(out, at)
			}
		}
	}
	return out, nil
}

// including is an include statement: where its quoted path stands and the file
// that it leads to.
type including struct {
	file  string
	span  lang.Span
	path  string // as written
	leads string
}

// includes lists the includes of a workspace's files that lead somewhere, by
// file and place.
func (s *Snapshot) includes() []including {
	var out []including
	for _, name := range s.fileNames() {
		out = append(out, s.includesOf(name)...)
	}
	return out
}

// includesOf lists the includes of a file that lead somewhere.
func (s *Snapshot) includesOf(name string) []including {
	var out []including
	f := s.project.Files[name]
	for i, d := range f.Decls {
		for _, stmt := range d.Stmts {
			if leads := s.project.Included(name, stmt); leads != "" {
				arg := stmt.Args[0]
				out = append(out, including{name, moved(arg.Span, f.Starts[i]), arg.Text, leads})
			}
		}
	}
	return out
}
