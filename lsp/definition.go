package lsp

import (
	"context"

	"kern/lang"

	"go.lsp.dev/protocol"
)

var definitionFeature = feature{
	name:    "definition",
	methods: []string{protocol.MethodTextDocumentDefinition},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Definition {
			c.DefinitionProvider = protocol.Boolean(true)
		}
	},
}

// Definition answers with where a name is given its meaning.
func (s *Server) Definition(ctx context.Context, p *protocol.DefinitionParams) (protocol.DefinitionResult, error) {
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	origin, targets := definitions(f, f.Offset(p.Position))
	return f.links(origin, targets, s.client.DefinitionLinks), nil
}

// target is where somebody is led to: the name, and the whole that it stands
// for around it.
type target struct {
	file        string
	name, whole lang.Span
}

// definitions gives where the name at an offset is declared, and the span that
// the question is about: a name's declaration, in each calculation that gives it
// another; the file that an include brings in; the height of the member for
// "height" in its block.
func definitions(f *File, offset int32) (lang.Span, []target) {
	if span, name, ok := includeAt(f, offset); ok {
		if f.project.Files[name] == nil {
			return span, nil
		}
		return span, []target{{file: name}}
	}
	var origin lang.Span
	var out []target
	for _, m := range mentionsAt(f, offset) {
		_, origin = f.report.Where(m.Place)
		out = append(out, f.target(m.Named.Place, m.Named.Stmt.Span))
	}
	if out != nil {
		return origin, out
	}
	if origin, places, ok := ownHeight(f, offset); ok {
		for _, p := range places {
			out = append(out, f.target(p, p.Span))
		}
		return origin, out
	}
	return origin, nil
}

// target is the target for a place inside a wider span of its declaration.
func (s *Snapshot) target(at lang.Place, whole lang.Span) target {
	file, name := s.report.Where(at)
	_, around := s.report.Where(lang.Place{Decl: at.Decl, Span: whole.Join(at.Span)})
	return target{file, name, around}
}

// links writes targets as the client takes them.
func (f *File) links(origin lang.Span, targets []target, links bool) protocol.DefinitionResult {
	if len(targets) == 0 {
		return nil
	}
	if !links {
		out := protocol.LocationSlice{}
		for _, t := range targets {
			out = append(out, f.Location(t.file, t.name))
		}
		return out
	}
	from := f.RangeOf(origin)
	out := protocol.DefinitionLinkSlice{}
	for _, t := range targets {
		out = append(out, protocol.DefinitionLink{OriginSelectionRange: &from, TargetURI: f.URI(t.file),
			TargetRange: f.Range(t.file, t.whole), TargetSelectionRange: f.Range(t.file, t.name)})
	}
	return out
}
