package lsp

import (
	"context"

	"kern/lang"

	"go.lsp.dev/protocol"
)

var linkedEditingFeature = feature{
	name:    "linked editing",
	methods: []string{protocol.MethodTextDocumentLinkedEditingRange},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.LinkedEditing {
			c.LinkedEditingRangeProvider = protocol.Boolean(true)
		}
	},
}

// LinkedEditingRange answers with the places of the name under the cursor that
// change together while it is typed.
func (s *Server) LinkedEditingRange(ctx context.Context, p *protocol.LinkedEditingRangeParams) (*protocol.LinkedEditingRanges, error) {
	snapshots := s.snapshots() // of the same moment as the file
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	found := mentionsAt(f, f.Offset(p.Position))
	if len(found) == 0 {
		return nil, nil
	}
	names := bound(f.report, nameds(found))
	spots, err := allSpots(ctx, f, names, snapshots)
	if err != nil {
		return nil, err
	}
	spans := linked(f, spots)
	if spans == nil {
		return nil, nil
	}
	out := &protocol.LinkedEditingRanges{}
	for _, span := range spans {
		out.Ranges = append(out.Ranges, f.RangeOf(span))
	}
	return out, nil
}

// linked gives the spans of a name that can be typed over together: it stands
// more than once, is given once, and no other file says it. A name of several
// files is renamed, where the user sees what changes.
func linked(f *File, spots []spot) []lang.Span {
	given := 0
	var out []lang.Span
	for _, p := range spots {
		if p.Snapshot != f.Snapshot || p.file != f.Name {
			return nil
		}
		if p.declares {
			given++
		}
		out = append(out, p.span)
	}
	if given != 1 || len(out) < 2 {
		return nil
	}
	return out
}
