package lsp

import (
	"context"
	"encoding/base64"
	"encoding/json"
	"net/url"
	"strings"

	"kern/checker/output"
	"kern/checker/rule"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// commandWorking is the command that gives the working of a member as Markdown.
// Its arguments are the address of a file, the name of a member in it, and
// perhaps a check.
const commandWorking = "kern.working"

// workingScheme is the scheme of documents that hold the working of a member,
// for clients that open documents whose text the server makes.
const workingScheme = "kern-working"

func init() {
	commands[commandWorking] = func(ctx context.Context, s *Server, args []protocol.LSPAny) (any, error) {
		var text [3]string
		for i := range min(len(args), len(text)) {
			if json.Unmarshal(args[i], &text[i]) != nil {
				return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "the arguments of %s are texts: a file's address, a member, and perhaps a check", commandWorking)
			}
		}
		u, err := uri.Parse(text[0])
		if err != nil || text[0] == "" || text[1] == "" {
			return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "%s takes a file's address, a member, and perhaps a check", commandWorking)
		}
		return s.working(ctx, u, text[1], text[2])
	}
	contents[workingScheme] = func(ctx context.Context, s *Server, u uri.URI) (string, error) {
		file, member, check := fromWorkingURI(uri.URI(strings.Clone(string(u))))
		if file == "" {
			return "", jsonrpc2.Errorf(jsonrpc2.InvalidParams, "'%s' names no member of a file", u)
		}
		return s.working(ctx, file, member, check)
	}
}

// workingURI is the address of the document with the working of a member. The
// file's own address goes in letters that nobody escapes: clients do not agree on
// what is to be escaped in an address.
func workingURI(file uri.URI, member, check string) uri.URI {
	query := base64.RawURLEncoding.EncodeToString([]byte(file))
	if check != "" {
		query += "~" + check
	}
	return uri.URI(workingScheme + ":/" + url.PathEscape(member) + ".md?" + query)
}

// fromWorkingURI reads such an address; "" for the file when it is none.
func fromWorkingURI(u uri.URI) (file uri.URI, member, check string) {
	x, err := url.Parse(string(u))
	if err != nil {
		return "", "", ""
	}
	query, err := url.QueryUnescape(x.RawQuery)
	if err != nil {
		return "", "", ""
	}
	letters, check, _ := strings.Cut(query, "~")
	name, err := base64.RawURLEncoding.DecodeString(letters)
	if err != nil {
		return "", "", ""
	}
	member = strings.TrimSuffix(strings.TrimPrefix(x.Path, "/"), ".md")
	file, err = uri.Parse(string(name))
	if err != nil || member == "" || len(name) == 0 {
		return "", "", ""
	}
	return file, member, check
}

// working is the working of a member of a file as Markdown: of one check, or of
// all. Where calculations that share the file differ, each has its own.
func (s *Server) working(ctx context.Context, u uri.URI, member, check string) (string, error) {
	f, err := s.File(ctx, u)
	if err != nil {
		return "", err
	}
	if check != "" {
		if r := rule.Find(check); r == nil || !r.Check {
			return "", jsonrpc2.Errorf(jsonrpc2.InvalidParams, "there is no check '%s'", check)
		}
	}
	if f == nil {
		return "", jsonrpc2.Errorf(jsonrpc2.InvalidParams, "no calculation has this file")
	}
	found := membersOf(f, member)
	if len(found) == 0 {
		return "", jsonrpc2.Errorf(jsonrpc2.InvalidParams, "%s has no member '%s'", f.Name, member)
	}
	var pages []string
	for _, r := range found {
		pages = append(pages, output.WorkingMarkdown(r, check))
	}
	return strings.Join(pages, "\n"), nil
}
