package lsp

import (
	"context"

	"kern/checker"
	"kern/checker/model"
	"kern/lang"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
)

var renameFeature = feature{
	name:    "rename",
	methods: []string{protocol.MethodTextDocumentRename, protocol.MethodTextDocumentPrepareRename},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		switch {
		case client.PrepareRename:
			c.RenameProvider = &protocol.RenameOptions{PrepareProvider: pointer(true)}
		case client.Rename:
			c.RenameProvider = protocol.Boolean(true)
		}
	},
}

// refused is the answer to a request that is right but cannot be done.
func refused(format string, args ...any) error {
	return jsonrpc2.Errorf(jsonrpc2.Code(protocol.LSPErrorCodesRequestFailed), format, args...)
}

// PrepareRename answers with the name under the cursor, or why it is none that
// can be renamed.
func (s *Server) PrepareRename(ctx context.Context, p *protocol.PrepareRenameParams) (protocol.PrepareRenameResult, error) {
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	name, span, _, err := renamable(f, f.Offset(p.Position))
	if err != nil {
		return nil, err
	}
	return &protocol.PrepareRenamePlaceholder{Range: f.RangeOf(span), Placeholder: name}, nil
}

// Rename changes a name wherever it stands, in all files of all workspaces.
func (s *Server) Rename(ctx context.Context, p *protocol.RenameParams) (*protocol.WorkspaceEdit, error) {
	snapshots := s.snapshots() // of the same moment as the file
	name := string([]byte(p.NewName))
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	edits, err := rename(ctx, f, f.Offset(p.Position), name, snapshots)
	if err != nil {
		return nil, err
	}
	return edits.workspaceEdit(s.client)
}

// renamable gives the name at an offset, where it stands and what it means, or
// why it cannot be renamed.
func renamable(f *File, offset int32) (string, lang.Span, []checker.Mention, error) {
	if found := mentionsAt(f, offset); len(found) > 0 {
		_, span := f.report.Where(found[0].Place)
		return found[0].Named.Name, span, found, nil
	}
	at, ok := f.Tree.At(offset)
	if !ok || len(at.Stmts) == 0 {
		return "", lang.Span{}, nil, refused("there is no name here")
	}
	if _, name, ok := includeAt(f, offset); ok {
		return "", lang.Span{}, nil, refused("'%s' is a file: rename the file itself", name)
	}
	word := ""
	if e := at.Expr(); e != nil && (e.Kind == lang.NameExpr || e.Kind == lang.CallExpr) {
		word = e.Text
	} else if s := at.Stmt(); s.Head.Contains(at.Offset) && !at.Inside {
		word = s.Word
	}
	_, function := lang.Functions[word]
	_, constant := lang.Constants[word]
	switch {
	case word == "":
		return "", lang.Span{}, nil, refused("there is no name here")
	case function:
		return "", lang.Span{}, nil, refused("'%s' is a function of the language", word)
	case constant:
		return "", lang.Span{}, nil, refused("'%s' is a constant of the language", word)
	case isWord(word):
		return "", lang.Span{}, nil, refused("'%s' is a word of the language", word)
	}
	return "", lang.Span{}, nil, refused("'%s' is no name that the calculation gives", clip(word))
}

// rename gives the changes that rename what stands at an offset. They change no
// meaning: not of what is renamed, nor of anything else.
func rename(ctx context.Context, f *File, offset int32, name string, snapshots []*Snapshot) (*editing, error) {
	old, span, found, err := renamable(f, offset)
	if err != nil {
		return nil, err
	}
	edits := &editing{}
	if name == old {
		return edits, nil
	}
	if why := badName(name); why != "" {
		return nil, refused("%s", why)
	}
	names, alone := nameds(found), false
	if claims(found[0].Place.Decl, found[0].Place.Span) {
		// what is given here, and not what else claims the name elsewhere
		var own []*model.Named
		for _, m := range found {
			if m.Declares {
				own = append(own, m.Named)
			}
		}
		names, alone = own, len(own) == 0
	}
	if alone {
		// somebody has given the name before: this one is used by nobody
		for _, c := range f.report.Calculations(f.Name) {
			if why := f.taken(c, name); why != "" {
				return nil, refused("%s", why)
			}
		}
		if err := f.replace(edits, f.Name, []lang.Span{span}, old, name); err != nil {
			return nil, err
		}
		return edits, nil
	}
	all, err := holders(ctx, f, names, snapshots)
	if err != nil {
		return nil, err
	}
	for _, h := range all {
		if err := h.rename(edits, old, name); err != nil {
			return nil, err
		}
	}
	return edits, nil
}

// rename adds the changes of one workspace.
func (h holding) rename(edits *editing, old, name string) error {
	names := bound(h.report, h.names)
	for _, c := range h.report.AllCalculations() {
		meant := false
		for _, n := range names {
			now := c.Env.Names[old]
			meant = meant || now != nil && now.Place == n.Place
		}
		if !meant {
			continue
		}
		if why := h.taken(c, name); why != "" {
			return refused("%s", why)
		}
	}
	var files []string
	places := map[string][]lang.Span{}
	for _, p := range h.spots(names) {
		if p.declares && !p.mention.Declares {
			continue // another that claims the name
		}
		if places[p.file] == nil {
			files = append(files, p.file)
		}
		places[p.file] = append(places[p.file], p.span)
	}
	for _, file := range files {
		if err := h.replace(edits, file, places[file], old, name); err != nil {
			return err
		}
	}
	return nil
}

// replace adds the changes of one file, if it still reads the same with them.
func (s *Snapshot) replace(edits *editing, file string, spans []lang.Span, old, name string) error {
	if !readsAlike(s.project.Files[file], spans, name) {
		return refused("'%s' cannot stand for '%s' in %s: the text would read as something else", name, old, file)
	}
	for _, span := range spans {
		edits.add(s, file, span, name)
	}
	return nil
}
