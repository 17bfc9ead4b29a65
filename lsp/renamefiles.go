package lsp

import (
	"context"
	"path"
	"strings"

	"kern/lang"
	"kern/lsp/disk"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

var renameFilesFeature = feature{
	name:    "rename files",
	methods: []string{protocol.MethodWorkspaceWillRenameFiles},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if !client.RenameFiles {
			return
		}
		filter := func(glob string, kind protocol.FileOperationPatternKind) protocol.FileOperationFilter {
			return protocol.FileOperationFilter{Scheme: pointer("file"), Pattern: protocol.FileOperationPattern{Glob: glob, Matches: kind}}
		}
		workspaceOptions(c).FileOperations = &protocol.FileOperationOptions{WillRename: protocol.FileOperationRegistrationOptions{
			Filters: []protocol.FileOperationFilter{filter("**/*"+disk.Extension, protocol.FileOperationPatternKindFile), filter("**", protocol.FileOperationPatternKindFolder)}}}
	},
}

// WillRenameFiles answers with the changes that keep includes leading where they
// lead, when files or folders are about to be renamed.
func (s *Server) WillRenameFiles(ctx context.Context, p *protocol.RenameFilesParams) (*protocol.WorkspaceEdit, error) {
	snapshots := s.snapshots()
	var moves []move
	for _, r := range p.Files {
		from, err := uri.Parse(string([]byte(r.OldURI)))
		if err != nil {
			continue
		}
		to, err := uri.Parse(string([]byte(r.NewURI)))
		if err != nil {
			continue
		}
		moves = append(moves, move{pathOf(from), pathOf(to)})
	}
	release(ctx)
	edits := &editing{}
	for _, snapshot := range snapshots {
		if err := snapshot.wait(ctx, snapshot.loaded); err != nil {
			return nil, err
		}
		snapshot.followMoves(edits, moves)
	}
	return edits.workspaceEdit(s.client)
}

// move is a file or folder that goes from one path to another.
type move struct{ from, to string }

// followMoves adds the changes of a workspace's includes. The files are still
// where they were when the changes are made.
func (s *Snapshot) followMoves(edits *editing, moves []move) {
	var named []move // as names of the workspace; to is "" when it leaves
	for _, m := range moves {
		from, ok := s.workspace.name(m.from)
		if m.from == "" || !ok {
			continue
		}
		to, ok := s.workspace.name(m.to)
		if m.to == "" || !ok {
			to = ""
		}
		named = append(named, move{from, to})
	}
	if len(named) == 0 {
		return
	}
	after := func(name string) string {
		for _, m := range named {
			if name == m.from {
				return m.to
			}
			if below, ok := strings.CutPrefix(name, m.from+"/"); ok && m.to != "" {
				return m.to + "/" + below
			} else if ok {
				return ""
			}
		}
		return name
	}
	for _, inc := range s.includes() {
		file, leads := after(inc.file), after(inc.leads)
		if file == inc.file && leads == inc.leads || file == "" || leads == "" {
			continue
		}
		if now, ok := lang.Resolve(file, inc.path); ok && now == leads {
			continue // still leads there, as when a whole folder moves
		}
		text := relative(path.Dir(file), leads)
		if now, ok := lang.Resolve(file, text); ok && now == leads && !strings.ContainsAny(text, "\"\r\n") {
			edits.add(s, inc.file, inc.span, `"`+text+`"`)
		}
	}
}

// relative is the path of a name as seen from a folder of the workspace.
func relative(dir, name string) string {
	up := ""
	for dir != "." && dir != "/" && !strings.HasPrefix(name, dir+"/") {
		dir = path.Dir(dir)
		up += "../"
	}
	if dir != "." && dir != "/" {
		name = strings.TrimPrefix(name, dir+"/")
	}
	return up + name
}
