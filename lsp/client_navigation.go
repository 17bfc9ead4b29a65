package lsp

import (
	"slices"

	"go.lsp.dev/protocol"
)

// navigation reads what the client can do about finding, showing and renaming
// things.
func (c *Client) navigation(caps protocol.ClientCapabilities) {
	if t := caps.TextDocument; t != nil {
		if d := t.Definition; d != nil {
			c.Definition, c.DefinitionLinks = true, is(d.LinkSupport)
		}
		if d := t.TypeDefinition; d != nil {
			c.TypeDefinition, c.TypeDefinitionLinks = true, is(d.LinkSupport)
		}
		c.References, c.Highlight = t.References != nil, t.DocumentHighlight != nil
		c.LinkedEditing = t.LinkedEditingRange != nil
		if r := t.Rename; r != nil {
			c.Rename, c.PrepareRename = true, is(r.PrepareSupport)
		}
		if d := t.DocumentSymbol; d != nil {
			c.Symbols, c.SymbolTree = true, is(d.HierarchicalDocumentSymbolSupport)
		}
		if f := t.FoldingRange; f != nil {
			c.Folding, c.FoldLines = true, is(f.LineFoldingOnly)
		}
		c.SelectionRanges = t.SelectionRange != nil
		if l := t.DocumentLink; l != nil {
			c.Links, c.LinkTooltips = true, is(l.TooltipSupport)
		}
		c.Hierarchy = t.CallHierarchy != nil
		c.Tokens = newTokenWays(t.SemanticTokens)
	}
	if w := caps.Workspace; w != nil {
		c.RenameFiles = w.FileOperations != nil && is(w.FileOperations.WillRename)
		if s := w.Symbol; s != nil {
			c.WorkspaceSymbols, c.LazySymbols = true, slices.Contains(s.ResolveSupport.Properties, "location.range")
		}
		c.RefreshTokens = w.SemanticTokens != nil && is(w.SemanticTokens.RefreshSupport)
	}
}

// symbolKinds are the kinds of symbol that the client can show.
func symbolKinds(o *protocol.ClientSymbolKindOptions) func(protocol.SymbolKind) bool {
	if o == nil || len(o.ValueSet) == 0 {
		return func(k protocol.SymbolKind) bool { return k <= protocol.SymbolKindArray } // those of the protocol's first version
	}
	return func(k protocol.SymbolKind) bool { return slices.Contains(o.ValueSet, k) }
}
