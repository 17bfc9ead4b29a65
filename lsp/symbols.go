package lsp

import (
	"context"
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/lang"

	"go.lsp.dev/protocol"
)

var symbolsFeature = feature{
	name:    "document symbols",
	methods: []string{protocol.MethodTextDocumentDocumentSymbol},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Symbols {
			c.DocumentSymbolProvider = protocol.Boolean(true)
		}
	},
}

// DocumentSymbol answers with what a file declares: as a tree with what each
// thing comes to or, for a client that knows no trees, as a list of names.
func (s *Server) DocumentSymbol(ctx context.Context, p *protocol.DocumentSymbolParams) (protocol.DocumentSymbolResult, error) {
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	can := symbolKinds(s.client.Capabilities.TextDocument.DocumentSymbol.SymbolKind)
	list := symbols(f, s.client.SymbolTree)
	if !s.client.SymbolTree {
		out := protocol.SymbolInformationSlice{}
		for _, x := range list {
			out = append(out, protocol.SymbolInformation{BaseSymbolInformation: protocol.BaseSymbolInformation{Name: x.name, Kind: x.kind(can)},
				Location: f.Location(f.Name, x.whole)})
		}
		return out, nil
	}
	return protocol.DocumentSymbolSlice(f.symbolTree(list, can)), nil
}

func (f *File) symbolTree(list []symbol, can func(protocol.SymbolKind) bool) []protocol.DocumentSymbol {
	out := make([]protocol.DocumentSymbol, len(list))
	for i, x := range list {
		out[i] = protocol.DocumentSymbol{Name: x.name, Kind: x.kind(can), Range: f.RangeOf(x.whole), SelectionRange: f.RangeOf(x.at)}
		if x.detail != "" {
			out[i].Detail = pointer(x.detail)
		}
		if len(x.below) > 0 {
			out[i].Children = f.symbolTree(x.below, can)
		}
	}
	return out
}

// symbol is a declaration, or a statement in the block of one.
type symbol struct {
	name, detail string
	kind         func(can func(protocol.SymbolKind) bool) protocol.SymbolKind
	whole, at    lang.Span // of the file; at lies in whole
	below        []symbol
}

// manyDeclarations is from how many declarations on a file's symbols are listed
// without the statements of their blocks: nobody opens these one by one, and an
// editor takes long to draw them.
const manyDeclarations = 2000

// symbols lists what a file declares, in order.
func symbols(f *File, deep bool) []symbol {
	deep = deep && len(f.Tree.Decls) < manyDeclarations
	calculations := f.report.Calculations(f.Name)
	out := []symbol{}
	for i, d := range f.Tree.Decls {
		for _, s := range d.Stmts {
			if s.Word == "" {
				continue
			}
			x := f.symbol(calculations, d, s)
			start := f.Tree.Starts[i]
			if s.Body != nil && deep {
				for _, b := range s.Body.Stmts {
					if b.Word != "" {
						x.below = append(x.below, inner(d, b, start))
					}
				}
			}
			x.whole, x.at = moved(s.Span, start), moved(x.at, start)
			out = append(out, x)
		}
	}
	return out
}

// symbol describes a declaration; spans count from its start.
func (f *File) symbol(calculations []*model.Calculation, d *lang.Decl, s *lang.Stmt) symbol {
	x := symbol{name: s.Word, at: s.Head, kind: always(protocol.SymbolKindKey)}
	var names []string
	for i, span := range givenNames(s) {
		if i == 0 {
			x.at = span
		}
		names = append(names, span.Of(d.Text))
	}
	switch {
	case len(names) > 0:
		x.name = strings.Join(names, ", ")
		x.kind = func(can func(protocol.SymbolKind) bool) protocol.SymbolKind { return kindOf(declaredKind(s), can) }
		if isMember(s) {
			var results []*checker.Result
			for _, r := range f.report.Results(d) {
				if r.Member.Stmt == s {
					results = append(results, r)
				}
			}
			x.detail = verdictOf(results)
			break
		}
		for _, c := range calculations {
			if n := c.Env.Names[names[0]]; n != nil && n.Place == (lang.Place{Decl: d, Span: x.at}) {
				x.detail = f.detail(c, n)
				break
			}
		}
	case s.Word == "project":
		x.kind = always(protocol.SymbolKindPackage)
		for _, c := range calculations {
			if p := c.Env.Project; p.Place.Decl == d {
				x.detail = p.Name
				break
			}
		}
	case s.Word == "basis":
		x.kind = always(protocol.SymbolKindPackage)
		for _, c := range calculations {
			if c.Env.Basis.Place.Decl == d {
				x.detail = c.Env.Basis.Standard
				break
			}
		}
	case (s.Word == "include" || s.Word == "forces") && len(s.Args) > 0 && s.Args[0].Kind == lang.StringExpr:
		x.kind = always(protocol.SymbolKindFile)
		x.detail = s.Args[0].Text
	}
	return x
}

// declaredKind is what a statement that gives a name declares.
func declaredKind(s *lang.Stmt) model.NameKind {
	if _, assigned := s.Assigned(); assigned {
		return model.ValueName
	}
	switch s.Word {
	case "material":
		return model.MaterialName
	case "section":
		return model.SectionName
	case "case":
		return model.CaseName
	case "combination":
		return model.CombinationName
	case "level":
		return model.LevelName
	}
	return model.MemberName
}

func always(k protocol.SymbolKind) func(func(protocol.SymbolKind) bool) protocol.SymbolKind {
	return func(func(protocol.SymbolKind) bool) protocol.SymbolKind { return k }
}

// inner describes a statement of a block by its own words.
func inner(d *lang.Decl, s *lang.Stmt, start int32) symbol {
	x := symbol{name: s.Word, whole: moved(s.Span, start), at: moved(s.Head, start), kind: always(protocol.SymbolKindField)}
	rest := lang.Span{Start: s.Head.End, End: s.Line.End}
	if value, ok := s.Assigned(); ok {
		x.kind = always(protocol.SymbolKindProperty)
		rest.Start = s.Args[0].Span.End
		if len(value) == 0 {
			rest.Start = rest.End
		}
	}
	x.detail = strings.Join(strings.Fields(rest.Of(d.Text)), " ")
	return x
}
