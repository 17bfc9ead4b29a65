package lsp

import "go.lsp.dev/protocol"

// features is the table of all that the server does. A new feature is a file of
// its own and one line here; doc.go says how.
var features = []feature{
	documentsFeature,
	foldersFeature,
	watchFeature,
	settingsFeature,
	diagnosticsFeature,
	rulePagesFeature,
	hoverFeature,
	hintsFeature,
	lensesFeature,
	commandsFeature,
	codeActionFeature,
	formattingFeature,
	completionFeature,
	signatureFeature,
	definitionFeature,
	typeDefinitionFeature,
	referencesFeature,
	highlightFeature,
	linkedEditingFeature,
	renameFeature,
	renameFilesFeature,
	symbolsFeature,
	workspaceSymbolsFeature,
	foldingFeature,
	selectionFeature,
	documentLinksFeature,
	tokensFeature,
	hierarchyFeature,
}

var documentsFeature = feature{
	name: "documents",
	methods: []string{protocol.MethodTextDocumentDidOpen, protocol.MethodTextDocumentDidChange, protocol.MethodTextDocumentDidSave,
		protocol.MethodTextDocumentDidClose},
	advertise: func(c *protocol.ServerCapabilities, _ *Client) {
		c.TextDocumentSync = &protocol.TextDocumentSyncOptions{OpenClose: pointer(true), Change: pointer(protocol.TextDocumentSyncKindIncremental),
			Save: &protocol.SaveOptions{IncludeText: pointer(false)}}
	},
}

var foldersFeature = feature{
	name:    "folders",
	methods: []string{protocol.MethodWorkspaceDidChangeWorkspaceFolders},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Folders {
			workspaceOptions(c).WorkspaceFolders = &protocol.WorkspaceFoldersServerCapabilities{Supported: pointer(true), ChangeNotifications: protocol.Boolean(true)}
		}
	},
}

var watchFeature = feature{
	name:    "watched files",
	methods: []string{protocol.MethodWorkspaceDidChangeWatchedFiles},
	register: func(client *Client) []protocol.Registration {
		if !client.Watches {
			return nil
		}
		return []protocol.Registration{watchers()}
	},
}

// workspaceOptions is the part of the capabilities about workspaces.
func workspaceOptions(c *protocol.ServerCapabilities) *protocol.WorkspaceOptions {
	if c.Workspace == nil {
		c.Workspace = &protocol.WorkspaceOptions{}
	}
	return c.Workspace
}
