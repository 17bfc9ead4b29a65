package lsp

import (
	"context"
	"fmt"
	"strings"

	"kern/checker/model"
	"kern/lang"

	"go.lsp.dev/protocol"
)

var documentLinksFeature = feature{
	name:    "document links",
	methods: []string{protocol.MethodTextDocumentDocumentLink},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Links {
			c.DocumentLinkProvider = &protocol.DocumentLinkOptions{}
		}
	},
}

// DocumentLink answers with the includes of a file as links to what they bring
// in. There is nothing to resolve later: the target is known, and the tooltip
// costs nothing.
func (s *Server) DocumentLink(ctx context.Context, p *protocol.DocumentLinkParams) ([]protocol.DocumentLink, error) {
	f, err := s.Parsed(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	out := []protocol.DocumentLink{}
	for _, inc := range f.includesOf(f.Name) {
		file := f.project.Files[inc.leads]
		if file == nil {
			continue // reported as missing
		}
		link := protocol.DocumentLink{Range: f.RangeOf(inside(inc.span)), Target: pointer(f.URI(inc.leads))}
		if s.client.LinkTooltips {
			link.Tooltip = pointer(contentsOf(file))
		}
		out = append(out, link)
	}
	return out, nil
}

// inside is the span between the quotes of a text.
func inside(s lang.Span) lang.Span {
	return lang.Span{Start: s.Start + 1, End: max(s.Start+1, s.End-1)}
}

// contentsOf says what a file declares: "2 materials, 1 section".
func contentsOf(f *lang.File) string {
	words := [...][2]string{
		model.MaterialName: {"material", "materials"}, model.SectionName: {"section", "sections"}, model.CaseName: {"load case", "load cases"},
		model.LevelName: {"level", "levels"}, model.CombinationName: {"combination", "combinations"}, model.ValueName: {"value", "values"}, model.MemberName: {"member", "members"},
	}
	counts := [len(words)]int{}
	basis := false
	for _, d := range f.Decls {
		for _, s := range d.Stmts {
			if names := givenNames(s); len(names) > 0 {
				counts[declaredKind(s)] += len(names)
			}
			basis = basis || s.Word == "basis" && s.Body != nil
		}
	}
	var parts []string
	if basis {
		parts = append(parts, "the basis")
	}
	for _, k := range []model.NameKind{model.MaterialName, model.SectionName, model.CaseName, model.LevelName, model.CombinationName, model.ValueName, model.MemberName} {
		switch n := counts[k]; n {
		case 0:
		case 1:
			parts = append(parts, "1 "+words[k][0])
		default:
			parts = append(parts, fmt.Sprintf("%d %s", n, words[k][1]))
		}
	}
	if len(parts) == 0 {
		return "declares nothing"
	}
	return strings.Join(parts, ", ")
}
