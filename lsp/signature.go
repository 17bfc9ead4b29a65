package lsp

import (
	"context"
	"strconv"
	"unicode/utf16"

	"kern/lsp/complete"

	"go.lsp.dev/protocol"
)

var signatureFeature = feature{
	name:    "signature help",
	methods: []string{protocol.MethodTextDocumentSignatureHelp},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if t := client.Capabilities.TextDocument; t != nil && t.SignatureHelp != nil {
			c.SignatureHelpProvider = &protocol.SignatureHelpOptions{TriggerCharacters: []string{" ", "(", ","}, RetriggerCharacters: []string{")"}}
		}
	},
}

// signatureClient is what the client can do with signatures.
type signatureClient struct {
	markdown bool
	own      bool // a part that is due of each signature
	none     bool // no part at all
	offsets  bool // parts by their place in the form
}

func (c *Client) signatures() signatureClient {
	t := c.Capabilities.TextDocument
	if t == nil || t.SignatureHelp == nil || t.SignatureHelp.SignatureInformation == nil {
		return signatureClient{}
	}
	i := t.SignatureHelp.SignatureInformation
	return signatureClient{
		markdown: len(i.DocumentationFormat) > 0 && i.DocumentationFormat[0] == protocol.MarkupKindMarkdown,
		own:      is(i.ActiveParameterSupport), none: is(i.NoActiveParameterSupport),
		offsets: i.ParameterInformation != nil && is(i.ParameterInformation.LabelOffsetSupport),
	}
}

// SignatureHelp answers with the forms of the statement or the function at a
// place.
func (s *Server) SignatureHelp(ctx context.Context, p *protocol.SignatureHelpParams) (*protocol.SignatureHelp, error) {
	// a blank opens no help in a text; help that is open stays
	opens := p.Context.TriggerKind == protocol.SignatureHelpTriggerKindTriggerCharacter && !p.Context.IsRetrigger
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	h, ok := complete.SignatureAt(f.Report(), f.Name, f.Offset(p.Position))
	if !ok || opens && h.Quoted {
		return nil, nil
	}
	return signatures(h, s.client.signatures()), nil
}

// signatures writes the forms for the client.
func signatures(h complete.Help, client signatureClient) *protocol.SignatureHelp {
	active := uint32(h.Active)
	out := &protocol.SignatureHelp{ActiveSignature: &active}
	switch {
	case h.Param >= 0:
		out.ActiveParameter = dueParameter(strconv.Itoa(h.Param))
	case client.none:
		out.ActiveParameter = dueParameter("null")
	}
	for i, form := range h.Forms {
		x := protocol.SignatureInformation{Label: form.Syntax, Documentation: documented(complete.Document{Text: []string{form.Summary}}, client.markdown)}
		if client.own && i == h.Active {
			x.ActiveParameter = out.ActiveParameter
		}
		for _, p := range form.Params {
			info := protocol.ParameterInformation{Label: protocol.String(p.Span.Of(form.Syntax))}
			if client.offsets {
				info.Label = protocol.ParameterInformationLabelTuple{units16(form.Syntax[:p.Span.Start]), units16(form.Syntax[:p.Span.End])}
			}
			if p.Words != "" {
				info.Documentation = documented(complete.Document{Text: []string{p.Words}}, client.markdown)
			}
			x.Parameters = append(x.Parameters, info)
		}
		out.Signatures = append(out.Signatures, x)
	}
	return out
}

// dueParameter is a number or null: the library makes it from JSON alone.
func dueParameter(raw string) protocol.Nullable[uint32] {
	var out protocol.Nullable[uint32]
	if err := protocol.Unmarshal([]byte(raw), &out); err != nil {
		panic("lsp: " + err.Error()) // a number can always be read
	}
	return out
}

// units16 is the length of a text in the units that labels count in, UTF-16
// whatever positions count in.
func units16(s string) uint32 { return uint32(len(utf16.Encode([]rune(s)))) }
