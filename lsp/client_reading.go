package lsp

import (
	"slices"

	"go.lsp.dev/protocol"
)

// terminals are clients that name a reader of Markdown but show it as text: a
// picture in it would be a page of letters.
var terminals = []string{"coc.nvim", "vim", "Neovim"}

// readings reads what the client shows of what is read rather than written:
// hovers, hints, lenses.
func (c *Client) readings(caps *protocol.ClientCapabilities) {
	if t := caps.TextDocument; t != nil {
		if t.Hover != nil {
			c.Hovers = true
			for _, f := range t.Hover.ContentFormat { // in order of liking
				if f == protocol.MarkupKindMarkdown || f == protocol.MarkupKindPlainText {
					c.HoverMarkdown = f == protocol.MarkupKindMarkdown
					break
				}
			}
		}
		if t.InlayHint != nil {
			c.Hints = true
			c.HintTooltips = slices.Contains(t.InlayHint.ResolveSupport.Properties, "tooltip")
		}
		c.Lenses = t.CodeLens != nil
	}
	if w := caps.Workspace; w != nil {
		c.RefreshHints = w.InlayHint != nil && is(w.InlayHint.RefreshSupport)
		c.RefreshLenses = w.CodeLens != nil && is(w.CodeLens.RefreshSupport)
		c.Commands = w.ExecuteCommand != nil
	}
	if g := caps.General; g != nil {
		c.Pictures = c.HoverMarkdown && g.Markdown.Parser != "" && !slices.Contains(terminals, c.Name)
	}
}
