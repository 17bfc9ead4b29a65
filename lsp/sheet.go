package lsp

import (
	"context"
	"encoding/json"
	"strings"

	"kern/checker/sheet"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// commandSheet is the command that prints the calculations of a file: the sheet of
// the command line, of the texts as they are in the editor. Its arguments are the
// address of a file, perhaps the form (html, which is usual, or markdown), and
// perhaps the members to show. It gives the text of the sheet.
const commandSheet = "kern.sheet"

func init() {
	commands[commandSheet] = func(ctx context.Context, s *Server, args []protocol.LSPAny) (any, error) {
		text := make([]string, len(args))
		for i := range args {
			if json.Unmarshal(args[i], &text[i]) != nil {
				return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "the arguments of %s are texts: a file's address, perhaps a form, perhaps members", commandSheet)
			}
		}
		if len(text) == 0 || text[0] == "" {
			return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "%s takes a file's address, perhaps a form, perhaps members", commandSheet)
		}
		u, err := uri.Parse(text[0])
		if err != nil {
			return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "'%s' is no address of a file", text[0])
		}
		form := "html"
		if len(text) > 1 && text[1] != "" {
			form = text[1]
		}
		if form != "html" && form != "markdown" {
			return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "a sheet in an editor is html or markdown, not '%s'", form)
		}
		return s.sheet(ctx, u, form, text[min(len(text), 2):])
	}
}

// sheet prints the calculations that read a file.
func (s *Server) sheet(ctx context.Context, u uri.URI, form string, members []string) (string, error) {
	f, err := s.File(ctx, u)
	if err != nil {
		return "", err
	}
	if f == nil {
		return "", jsonrpc2.Errorf(jsonrpc2.InvalidParams, "no calculation has this file")
	}
	var roots []string
	for _, c := range f.Report().Calculations(f.Name) {
		roots = append(roots, c.Root)
	}
	release, _, _ := strings.Cut(s.options.Version, " ") // without the commit, as the command line prints it
	printed, err := sheet.New(f.Report(), sheet.Options{Program: strings.TrimSpace("kern " + release), Asked: roots, Roots: roots, Members: members})
	if err != nil {
		return "", jsonrpc2.Errorf(jsonrpc2.InvalidParams, "%s", err)
	}
	var b strings.Builder
	if err := printed.Write(&b, form, nil); err != nil {
		return "", err
	}
	return b.String(), nil
}
