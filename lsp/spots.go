package lsp

import (
	"context"
	"maps"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/lang"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// spot is a place where a name stands, in the workspace that knows it.
type spot struct {
	*Snapshot
	file     string
	span     lang.Span
	mention  checker.Mention
	declares bool // the name is given here, be it for the first time or again
}

// location is the spot as the editor finds it.
func (p spot) location() protocol.Location { return p.Location(p.file, p.span) }

// spots gives every place where one of the names stands in the files of a
// workspace, by file and place.
func (s *Snapshot) spots(names []*model.Named) []spot {
	var out []spot
	seen := map[lang.Place]bool{}
	for _, n := range names {
		for _, m := range s.report.References(n) {
			if seen[m.Place] {
				continue
			}
			seen[m.Place] = true
			file, span := s.report.Where(m.Place)
			out = append(out, spot{s, file, span, m, m.Declares || claims(m.Place.Decl, m.Place.Span)})
		}
	}
	slices.SortFunc(out, func(a, b spot) int {
		if a.file != b.file {
			return strings.Compare(a.file, b.file)
		}
		return int(a.span.Start - b.span.Start)
	})
	return out
}

// holding is a workspace with the names of it that are asked about.
type holding struct {
	*Snapshot
	names []*model.Named
}

// holders gives the workspaces in which names of a file stand: its own first,
// then every other that reads a file in which one of them is given. The
// snapshots are all that there are, as of the same moment as the file.
func holders(ctx context.Context, f *File, names []*model.Named, snapshots []*Snapshot) ([]holding, error) {
	out := []holding{{f.Snapshot, names}}
	for _, s := range snapshots {
		if s == f.Snapshot {
			continue
		}
		var there []*model.Named
		for _, n := range names {
			file, span := f.report.Where(n.Place)
			name, ok := s.sameFile(f.URI(file))
			if !ok {
				continue
			}
			if err := s.wait(ctx, s.checked); err != nil {
				return nil, err
			}
			if tree := s.project.Files[name]; tree == nil || tree.Text != f.project.Files[file].Text {
				continue
			}
			if m, ok := s.report.NameAt(name, span.Start); ok && m.Named.Name == n.Name && !slices.Contains(there, m.Named) {
				there = append(there, m.Named)
			}
		}
		if len(there) > 0 {
			out = append(out, holding{s, there})
		}
	}
	return out, nil
}

// sameFile is the name that a file would have in a workspace.
func (s *Snapshot) sameFile(u uri.URI) (string, bool) {
	path := pathOf(u)
	if path == "" {
		return "", false
	}
	return s.workspace.name(path)
}

// allSpots gives the places where names of a file stand, in every workspace; a
// place that two of them know is given once.
func allSpots(ctx context.Context, f *File, names []*model.Named, snapshots []*Snapshot) ([]spot, error) {
	all, err := holders(ctx, f, names, snapshots)
	if err != nil {
		return nil, err
	}
	var out []spot
	seen := map[uri.URI]map[lang.Span]bool{}
	for _, h := range all {
		for _, p := range h.spots(h.names) {
			u := h.URI(p.file)
			if seen[u] == nil {
				seen[u] = map[lang.Span]bool{}
			}
			if !seen[u][p.span] {
				seen[u][p.span] = true
				out = append(out, p)
			}
		}
	}
	return out, nil
}

// fileNames are the names of all files of the workspace, in order.
func (s *Snapshot) fileNames() []string {
	return slices.Sorted(maps.Keys(s.project.Files))
}
