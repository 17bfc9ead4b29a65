package lsp

import (
	"context"
	"encoding/json"
	"math"
	"strings"

	"kern/checker"
	"kern/checker/standard"
	"kern/lang"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

var lensesFeature = feature{
	name:    "code lenses",
	methods: []string{protocol.MethodTextDocumentCodeLens, protocol.MethodCodeLensResolve},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Lenses {
			c.CodeLensProvider = &protocol.CodeLensOptions{ResolveProvider: pointer(true)}
		}
	},
	refresh: func(client *Client) string {
		if client.Lenses && client.RefreshLenses {
			return protocol.MethodWorkspaceCodeLensRefresh
		}
		return ""
	},
}

// showWorking is the command of the client that shows the working of a member
// beside the text. Its arguments are the file's address and the member's name;
// commandWorking gives the text.
const showWorking = "kern.showWorking"

// lens is a line above a member: what it comes to, or the way to its working.
type lens struct {
	span  lang.Span // of the member's name, in the file
	names []string
	// working is set for the lens that leads to the working.
	working bool
}

// lensesOf gives the lenses of a file: two above each member. Members of one
// block that say the same share them.
func lensesOf(f *File) []lens {
	own := f.Report().ResultsIn(f.Name)
	out := make([]lens, 0, 2*len(own))
	for len(own) > 0 {
		n := 1
		for n < len(own) && own[n].Member.Stmt == own[0].Member.Stmt {
			n++
		}
		groups := []group{{results: own[:1]}}
		if n > 1 {
			groups = groupsOf(own[:n], lensTitle)
		}
		for _, g := range groups {
			var names []string
			for _, r := range g.results {
				names = append(names, r.Name)
			}
			_, span := f.Report().Place(g.results[0])
			out = append(out, lens{span: span, names: names}, lens{span: span, names: names, working: true})
		}
		own = own[n:]
	}
	return out
}

// lensTitle is a member's verdict with what decides it and what it departs from.
// An undecided member shows no number that could be taken for an answer.
func lensTitle(r *checker.Result) string {
	out := r.Verdict.String()
	if !math.IsNaN(r.Utilisation) && r.Verdict != standard.Undecided {
		out += " " + checker.Ratio(r.Utilisation) + ", " + r.Governing
		if r.Combination != "" {
			out += " under " + r.Combination
		}
	}
	for i, d := range r.Departures {
		out += map[bool]string{true: "; departs from ", false: ", "}[i == 0] + d.Rule
	}
	return out
}

// lensData finds the member of a lens again.
type lensData struct {
	URI     string   `json:"uri"`
	Members []string `json:"members"`
	Working bool     `json:"working"`
}

// CodeLens answers with the lenses of a document, without their words.
func (s *Server) CodeLens(ctx context.Context, p *protocol.CodeLensParams) ([]protocol.CodeLens, error) {
	if !s.Settings().CodeLens {
		return []protocol.CodeLens{}, nil
	}
	u := uri.URI(strings.Clone(string(p.TextDocument.URI)))
	f, err := s.File(ctx, u)
	if f == nil || err != nil {
		return nil, err
	}
	out := []protocol.CodeLens{}
	for _, l := range lensesOf(f) {
		out = append(out, protocol.CodeLens{Range: f.RangeOf(l.span), Data: object(lensData{string(u), l.names, l.working})})
	}
	return out, nil
}

// CodeLensResolve answers with the words of a lens. A member that is gone has
// none, and no command.
func (s *Server) CodeLensResolve(ctx context.Context, p *protocol.CodeLens) (*protocol.CodeLens, error) {
	out, err := protocol.Clone(*p)
	if err != nil {
		return nil, err
	}
	var data lensData
	if json.Unmarshal(out.Data, &data) != nil || data.URI == "" || len(data.Members) == 0 {
		return &out, nil
	}
	f, err := s.File(ctx, uri.URI(data.URI))
	if f == nil || err != nil {
		return &out, err
	}
	found := membersOf(f, data.Members[0])
	switch {
	case len(found) == 0:
		out.Command = protocol.Command{Title: "–"}
	case data.Working:
		out.Command = protocol.Command{Title: "show working", Command: showWorking, Arguments: []protocol.LSPAny{object(data.URI), object(data.Members[0])}}
	default:
		out.Command = protocol.Command{Title: strings.Join(data.Members, ", ") + ": " + lensTitle(found[0])}
	}
	return &out, nil
}

// membersOf gives the results of a member of a file: several when calculations
// that share the file differ about it.
func membersOf(f *File, name string) []*checker.Result {
	var out []*checker.Result
	for _, r := range f.Report().ResultsIn(f.Name) {
		if r.Name == name {
			out = append(out, r)
		}
	}
	return out
}
