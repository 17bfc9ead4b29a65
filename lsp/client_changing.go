package lsp

import (
	"slices"

	"go.lsp.dev/protocol"
)

// changing reads what the client can do about changes that the server offers.
func (c *Client) changing(caps protocol.ClientCapabilities) {
	t := caps.TextDocument
	if t == nil {
		return
	}
	if a := t.CodeAction; a != nil {
		// without literals a client takes commands alone, and there are none
		c.Actions = len(a.CodeActionLiteralSupport.CodeActionKind.ValueSet) > 0
		c.PreferredActions = is(a.IsPreferredSupport)
		c.LazyActions = is(a.DataSupport) && slices.Contains(a.ResolveSupport.Properties, "edit")
	}
	c.Formatting, c.TypeFormatting = t.Formatting != nil, t.OnTypeFormatting != nil
	if r := t.RangeFormatting; r != nil {
		c.RangeFormatting, c.RangesFormatting = true, is(r.RangesSupport)
	}
}
