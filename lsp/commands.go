package lsp

import (
	"context"
	"sort"
	"strings"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
)

// commands are what the server can be asked to execute, by name. Features add
// theirs.
var commands = map[string]func(ctx context.Context, s *Server, args []protocol.LSPAny) (any, error){}

var commandsFeature = feature{
	name:    "commands",
	methods: []string{protocol.MethodWorkspaceExecuteCommand},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if !client.Commands {
			return
		}
		for name := range commands {
			c.ExecuteCommandProvider.Commands = append(c.ExecuteCommandProvider.Commands, name)
		}
		sort.Strings(c.ExecuteCommandProvider.Commands)
	},
}

// ExecuteCommand executes a command of the server.
func (s *Server) ExecuteCommand(ctx context.Context, p *protocol.ExecuteCommandParams) (protocol.LSPAny, error) {
	name := strings.Clone(p.Command)
	command := commands[name]
	if command == nil {
		return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "there is no command '%s'", name)
	}
	args := make([]protocol.LSPAny, len(p.Arguments))
	for i, a := range p.Arguments {
		args[i] = a.Clone()
	}
	out, err := command(ctx, s, args)
	if err != nil {
		return nil, err
	}
	return object(out), nil
}
