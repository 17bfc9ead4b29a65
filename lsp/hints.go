package lsp

import (
	"context"
	"encoding/json"
	"strings"

	"kern/lang"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

var hintsFeature = feature{
	name:    "inlay hints",
	methods: []string{protocol.MethodTextDocumentInlayHint, protocol.MethodInlayHintResolve},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Hints {
			c.InlayHintProvider = &protocol.InlayHintOptions{ResolveProvider: pointer(client.HintTooltips)}
		}
	},
	refresh: func(client *Client) string {
		if client.Hints && client.RefreshHints {
			return protocol.MethodWorkspaceInlayHintRefresh
		}
		return ""
	},
}

// InlayHint answers with the hints of a part of a document.
func (s *Server) InlayHint(ctx context.Context, p *protocol.InlayHintParams) ([]protocol.InlayHint, error) {
	within := p.Range
	u := uri.URI(strings.Clone(string(p.TextDocument.URI)))
	f, err := s.File(ctx, u)
	if f == nil || err != nil {
		return nil, err
	}
	list := hintsIn(f, f.Span(within), s.Settings())
	out := make([]protocol.InlayHint, 0, len(list))
	for i, h := range list {
		x := protocol.InlayHint{Position: f.Position(h.offset), Label: protocol.String(h.label), PaddingLeft: pointer(true)}
		if s.client.HintTooltips {
			x.Data = object(hintData{URI: string(u), Offset: h.offset, Kind: h.kind})
		} else if h.tip != nil && i < eagerTips {
			x.Tooltip = s.markup(h.tip(s.client.HoverMarkdown))
		}
		out = append(out, x)
	}
	return out, nil
}

// eagerTips bounds the tooltips that go with their hints to a client that does
// not ask for them: it may ask for the hints of a whole file.
const eagerTips = 200

// hintData finds a hint again.
type hintData struct {
	URI    string   `json:"uri"`
	Offset int32    `json:"offset"`
	Kind   hintKind `json:"kind"`
}

// InlayHintResolve answers with the tooltip of a hint. A hint whose text has
// changed since it was shown gets none.
func (s *Server) InlayHintResolve(ctx context.Context, p *protocol.InlayHint) (*protocol.InlayHint, error) {
	out, err := protocol.Clone(*p)
	if err != nil {
		return nil, err
	}
	label, ok := out.Label.(protocol.String)
	var data hintData
	if !ok || json.Unmarshal(out.Data, &data) != nil || data.URI == "" {
		return &out, nil
	}
	f, err := s.File(ctx, uri.URI(data.URI))
	if f == nil || err != nil {
		return &out, err
	}
	settings := DefaultSettings()                   // one that has just been switched off still shows
	settings.HintHistory = s.Settings().HintHistory // which is a part of a label
	for _, h := range hintsIn(f, lang.Span{Start: data.Offset, End: data.Offset}, settings) {
		if h.kind == data.Kind && h.offset == data.Offset && h.label == string(label) && h.tip != nil {
			out.Tooltip = s.markup(h.tip(s.client.HoverMarkdown))
			break
		}
	}
	return &out, nil
}
