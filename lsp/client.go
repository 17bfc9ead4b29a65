package lsp

import (
	"slices"

	"go.lsp.dev/protocol"
)

// Client is what the client said that it can do, each question answered once.
type Client struct {
	// Capabilities are its own words. The pointers in it may be nil.
	Capabilities protocol.ClientCapabilities
	Name         string

	Pulls              bool // asks for diagnostics itself
	RefreshDiagnostics bool
	RelatedInformation bool
	CodeDescription    bool
	DiagnosticData     bool
	UnusedTag          bool
	DiagnosticVersions bool

	Watches          bool // watches files for us
	Configuration    bool // can be asked for settings
	ConfigurationWay bool // tells of changed settings when asked to
	Progress         bool
	Contents         bool // opens documents whose text we make
	Folders          bool
	ApplyEdit        bool
	ShowDocument     bool
	DocumentChanges  bool // takes edits with versions

	Hovers        bool
	HoverMarkdown bool // shows Markdown in hovers
	Pictures      bool // shows pictures in Markdown
	Hints         bool
	HintTooltips  bool // asks for the tooltip of a hint when it shows it
	RefreshHints  bool
	Lenses        bool
	RefreshLenses bool
	Commands      bool // asks the server to execute commands

	Definition, DefinitionLinks         bool
	TypeDefinition, TypeDefinitionLinks bool
	References, Highlight               bool
	LinkedEditing                       bool
	Rename, PrepareRename               bool
	RenameFiles                         bool // asks before it renames files
	Symbols, SymbolTree                 bool // symbols of a document, as a tree
	WorkspaceSymbols, LazySymbols       bool // symbols of all files, whose ranges may come later
	Folding, FoldLines                  bool // folds, whole lines alone
	SelectionRanges                     bool
	Links, LinkTooltips                 bool
	Hierarchy                           bool
	RefreshTokens                       bool
	Tokens                              *tokenWays // how it wants tokens, nil for not at all

	Actions, PreferredActions         bool // takes code actions, and knows preferred ones
	LazyActions                       bool // asks for the edit of an action when it is taken
	Formatting, TypeFormatting        bool
	RangeFormatting, RangesFormatting bool
}

func is(b *bool) bool { return b != nil && *b }

// newClient reads the capabilities. They are cloned: what the library decodes
// shares the memory of the whole message.
func newClient(p *protocol.InitializeParams) (*Client, error) {
	caps, err := protocol.Clone(p.Capabilities)
	if err != nil {
		return nil, err
	}
	c := &Client{Capabilities: caps}
	if p.ClientInfo.Name != "" {
		c.Name = string([]byte(p.ClientInfo.Name))
	}
	if t := caps.TextDocument; t != nil {
		about := func(d protocol.DiagnosticsCapabilities) {
			c.RelatedInformation = is(d.RelatedInformation)
			c.CodeDescription = is(d.CodeDescriptionSupport)
			c.DiagnosticData = is(d.DataSupport)
			c.UnusedTag = slices.Contains(d.TagSupport.ValueSet, protocol.DiagnosticTagUnnecessary)
		}
		if d := t.PublishDiagnostics; d != nil {
			about(d.DiagnosticsCapabilities)
			c.DiagnosticVersions = is(d.VersionSupport)
		}
		if d := t.Diagnostic; d != nil {
			c.Pulls = true
			if t.PublishDiagnostics == nil {
				about(d.DiagnosticsCapabilities)
			}
		}
	}
	c.navigation(caps)
	c.readings(&caps)
	c.changing(caps)
	if w := caps.Workspace; w != nil {
		c.RefreshDiagnostics = w.Diagnostics != nil && is(w.Diagnostics.RefreshSupport)
		c.Watches = w.DidChangeWatchedFiles != nil && is(w.DidChangeWatchedFiles.DynamicRegistration)
		c.Configuration = is(w.Configuration)
		c.ConfigurationWay = w.DidChangeConfiguration != nil && is(w.DidChangeConfiguration.DynamicRegistration)
		c.Contents = w.TextDocumentContent != nil
		c.Folders = is(w.WorkspaceFolders)
		c.ApplyEdit = is(w.ApplyEdit)
		c.DocumentChanges = w.WorkspaceEdit != nil && is(w.WorkspaceEdit.DocumentChanges)
	}
	if w := caps.Window; w != nil {
		c.Progress = is(w.WorkDoneProgress)
		c.ShowDocument = w.ShowDocument != nil && w.ShowDocument.Support
	}
	return c, nil
}

// encoding is the unit of columns to use with the client.
func (c *Client) encoding() encoding {
	if g := c.Capabilities.General; g != nil {
		return negotiate(g.PositionEncodings)
	}
	return utf16Units
}
