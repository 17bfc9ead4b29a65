package lsp

import (
	"encoding/json"
	"fmt"
	"slices"
	"strings"
	"sync"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// The verbs of finding, showing and renaming things. Every answer is printed as
// marked text.
func init() {
	verbs["definition"] = func(s *scene, args []string) { s.links("textDocument/definition", args[0]) }
	verbs["typedefinition"] = func(s *scene, args []string) { s.links("textDocument/typeDefinition", args[0]) }
	// references MARK [uses]: with the declaration, or the uses alone
	verbs["references"] = func(s *scene, args []string) {
		var list []protocol.Location
		if s.answer("textDocument/references", s.at(args[0], map[string]any{"context": map[string]any{"includeDeclaration": len(args) < 2}}), &list) {
			for _, l := range list {
				s.print("%s: %s\n", s.name(l.URI), s.marked(l.URI, l.Range))
			}
		}
	}
	verbs["highlight"] = func(s *scene, args []string) {
		var list []protocol.DocumentHighlight
		if s.answer("textDocument/documentHighlight", s.at(args[0], nil), &list) {
			for _, h := range list {
				s.print("%s: %s\n", map[protocol.DocumentHighlightKind]string{2: "read", 3: "write"}[h.Kind], s.marked(s.uri(s.mark(args[0]).file), h.Range))
			}
		}
	}
	verbs["linked"] = func(s *scene, args []string) {
		var linked *protocol.LinkedEditingRanges
		if s.answer("textDocument/linkedEditingRange", s.at(args[0], nil), &linked) && linked != nil {
			for _, r := range linked.Ranges {
				s.print("%s\n", s.marked(s.uri(s.mark(args[0]).file), r))
			}
		}
	}
	verbs["prepare"] = func(s *scene, args []string) {
		var p protocol.PrepareRenamePlaceholder
		if s.answer("textDocument/prepareRename", s.at(args[0], nil), &p) {
			s.print("%s, now '%s'\n", s.marked(s.uri(s.mark(args[0]).file), p.Range), p.Placeholder)
		}
	}
	// rename MARK NAME
	verbs["rename"] = func(s *scene, args []string) {
		var e protocol.WorkspaceEdit
		if s.answer("textDocument/rename", s.at(args[0], map[string]any{"newName": args[1]}), &e) {
			s.printEdit(&e)
		}
	}
	// willrename OLD NEW [OLD NEW …]
	verbs["willrename"] = func(s *scene, args []string) {
		files := []any{}
		for i := 0; i+1 < len(args); i += 2 {
			files = append(files, map[string]any{"oldUri": s.uri(args[i]), "newUri": s.uri(args[i+1])})
		}
		var e protocol.WorkspaceEdit
		if s.answer("workspace/willRenameFiles", map[string]any{"files": files}, &e) {
			s.printEdit(&e)
		}
	}
	verbs["symbols"] = func(s *scene, args []string) {
		u := s.uri(args[0])
		raw, ok := s.raw("textDocument/documentSymbol", s.of(args[0], nil))
		if !ok {
			return
		}
		var flat []protocol.SymbolInformation
		if strings.Contains(string(raw), `"location"`) {
			if err := protocol.Unmarshal(raw, &flat); err != nil {
				s.t.Fatal(err)
			}
			for _, x := range flat {
				s.print("%s %s: %s\n", symbolWords[x.Kind], x.Name, s.marked(x.Location.URI, x.Location.Range))
			}
			return
		}
		var tree []protocol.DocumentSymbol
		if err := protocol.Unmarshal(raw, &tree); err != nil {
			s.t.Fatal(err)
		}
		s.printSymbols(u, tree, "")
	}
	// find "QUERY"
	verbs["find"] = func(s *scene, args []string) {
		raw, ok := s.raw("workspace/symbol", map[string]any{"query": args[0]})
		if !ok {
			return
		}
		var list []protocol.WorkspaceSymbol
		if err := protocol.Unmarshal(raw, &list); err != nil {
			s.t.Fatal(err)
		}
		for _, x := range list {
			s.print("%s %s", symbolWords[x.Kind], x.Name)
			if x.ContainerName != nil {
				s.print(" (%s)", *x.ContainerName)
			}
			if lazy, ok := x.Location.(*protocol.LocationUriOnly); ok {
				s.print(", %s, resolved", s.name(lazy.URI))
				raw, err := protocol.Marshal(&x)
				if err != nil {
					s.t.Fatal(err)
				}
				answer, err := s.ask("workspaceSymbol/resolve", string(raw))
				if err != nil {
					s.t.Fatal(err)
				}
				x = protocol.WorkspaceSymbol{}
				if err := protocol.Unmarshal(answer, &x); err != nil {
					s.t.Fatal(err)
				}
			}
			at := x.Location.(*protocol.Location)
			s.print(": %s: %s\n", s.name(at.URI), s.marked(at.URI, at.Range))
		}
		if len(list) == 0 {
			s.print("nothing\n")
		}
	}
	verbs["folds"] = func(s *scene, args []string) {
		var list []protocol.FoldingRange
		if !s.answer("textDocument/foldingRange", s.of(args[0], nil), &list) {
			return
		}
		lines := slowLines(s.text(s.uri(args[0])))
		for _, r := range list {
			first, last := strings.TrimRight(lines[r.StartLine], "\r\n"), strings.TrimRight(lines[r.EndLine], "\r\n")
			if r.StartCharacter != nil {
				first, last = cut16(first, *r.StartCharacter), cut16(last, *r.EndCharacter)
			}
			s.print("%d lines %s: %s … %s\n", r.EndLine-r.StartLine+1, r.Kind, first, strings.TrimSpace(last))
		}
	}
	// selection MARK…
	verbs["selection"] = func(s *scene, args []string) {
		m := s.mark(args[0])
		var positions []any
		for _, a := range args {
			positions = append(positions, slowPosition(s.text(s.uri(m.file)), s.mark(a).span.End, s.unit))
		}
		var list []protocol.SelectionRange
		if !s.answer("textDocument/selectionRange", s.of(m.file, map[string]any{"positions": positions}), &list) {
			return
		}
		for i, r := range list {
			if len(args) > 1 {
				s.print("from %s\n", args[i])
			}
			for r := &r; r != nil; r = r.Parent {
				s.print("%s\n", shorten(s.marked(s.uri(m.file), r.Range)))
			}
		}
	}
	verbs["links"] = func(s *scene, args []string) {
		var list []protocol.DocumentLink
		if s.answer("textDocument/documentLink", s.of(args[0], nil), &list) {
			for _, l := range list {
				s.print("%s → %s", s.marked(s.uri(args[0]), l.Range), s.name(*l.Target))
				if l.Tooltip != nil {
					s.print(" (%s)", *l.Tooltip)
				}
				s.print("\n")
			}
		}
	}
	// tokens FILE, tokens MARK: of a file, or of a part of it
	verbs["tokens"] = func(s *scene, args []string) {
		var answer protocol.SemanticTokens
		file := args[0]
		if m, ok := s.marks[args[0]]; ok {
			file = m.file
			text := s.text(s.uri(file))
			r := map[string]any{"start": slowPosition(text, m.span.Start, s.unit), "end": slowPosition(text, m.span.End, s.unit)}
			if !s.answer("textDocument/semanticTokens/range", s.of(file, map[string]any{"range": r}), &answer) {
				return
			}
		} else {
			if !s.answer("textDocument/semanticTokens/full", s.of(file, nil), &answer) {
				return
			}
			s.keepTokens(file, answer)
		}
		s.printTokens(file, answer.Data)
	}
	// delta FILE: what changed since it was asked last
	verbs["delta"] = func(s *scene, args []string) {
		before := s.lastTokens(args[0])
		id := "none"
		if before.ResultID != nil {
			id = *before.ResultID
		}
		raw, ok := s.raw("textDocument/semanticTokens/full/delta", s.of(args[0], map[string]any{"previousResultId": id}))
		if !ok {
			return
		}
		if !strings.Contains(string(raw), `"edits"`) {
			var all protocol.SemanticTokens
			if err := protocol.Unmarshal(raw, &all); err != nil {
				s.t.Fatal(err)
			}
			s.print("all\n")
			s.keepTokens(args[0], all)
			return
		}
		var delta protocol.SemanticTokensDelta
		if err := protocol.Unmarshal(raw, &delta); err != nil {
			s.t.Fatal(err)
		}
		data := slices.Clone(before.Data)
		for _, e := range delta.Edits {
			s.print("%d numbers out, %d in\n", e.DeleteCount, len(e.Data))
			data = slices.Replace(data, int(e.Start), int(e.Start+e.DeleteCount), e.Data...)
		}
		if len(delta.Edits) == 0 {
			s.print("no change\n")
		}
		var whole protocol.SemanticTokens
		s.answer("textDocument/semanticTokens/full", s.of(args[0], nil), &whole)
		if !slices.Equal(data, whole.Data) {
			s.t.Errorf("the changed tokens are not those of the text")
		}
		s.keepTokens(args[0], whole)
	}
	// hierarchy MARK: what is there, what uses it, what it uses
	verbs["hierarchy"] = func(s *scene, args []string) {
		var items []protocol.CallHierarchyItem
		if !s.answer("textDocument/prepareCallHierarchy", s.at(args[0], nil), &items) {
			return
		}
		for _, x := range items {
			s.print("%s\n", s.hierarchyItem(x))
			raw, err := protocol.Marshal(&x)
			if err != nil {
				s.t.Fatal(err)
			}
			var in []protocol.CallHierarchyIncomingCall
			if s.answer("callHierarchy/incomingCalls", map[string]any{"item": json.RawMessage(raw)}, &in) {
				for _, c := range in {
					s.print("  used by %s\n", s.hierarchyItem(c.From))
					for _, r := range c.FromRanges {
						s.print("      %s\n", s.marked(c.From.URI, r))
					}
				}
			}
			var out []protocol.CallHierarchyOutgoingCall
			if s.answer("callHierarchy/outgoingCalls", map[string]any{"item": json.RawMessage(raw)}, &out) {
				for _, c := range out {
					s.print("  uses %s\n", s.hierarchyItem(c.To))
					for _, r := range c.FromRanges {
						s.print("      %s\n", s.marked(x.URI, r))
					}
				}
			}
		}
	}
}

// tokensOf are the tokens that scenes were answered with last, by scene and
// file.
var tokensOf sync.Map

type tokensKey struct {
	scene *scene
	file  string
}

func (s *scene) keepTokens(file string, t protocol.SemanticTokens) {
	tokensOf.Store(tokensKey{s, file}, t)
}

func (s *scene) lastTokens(file string) protocol.SemanticTokens {
	t, _ := tokensOf.Load(tokensKey{s, file})
	out, _ := t.(protocol.SemanticTokens)
	return out
}

func (s *scene) hierarchyItem(x protocol.CallHierarchyItem) string {
	out := fmt.Sprintf("%s %s", symbolWords[x.Kind], x.Name)
	if x.Detail != nil {
		out += " (" + *x.Detail + ")"
	}
	return out + ", " + s.name(x.URI) + ": " + s.marked(x.URI, x.SelectionRange)
}

// of are the parameters of a request about a file.
func (s *scene) of(file string, more map[string]any) map[string]any {
	p := map[string]any{"textDocument": map[string]any{"uri": s.uri(file)}}
	for k, v := range more {
		p[k] = v
	}
	return p
}

// at are the parameters of a request about a place.
func (s *scene) at(mark string, more map[string]any) map[string]any {
	m := s.mark(mark)
	p := s.of(m.file, more)
	p["position"] = slowPosition(s.text(s.uri(m.file)), m.span.Start, s.unit)
	return p
}

// raw asks and gives the answer; an error or nothing is printed.
func (s *scene) raw(method string, params any) (json.RawMessage, bool) {
	s.t.Helper()
	raw, err := s.ask(method, string(remarshal(s.t, params)))
	switch {
	case err != nil:
		s.print("error: %v\n", err)
	case string(raw) == "null":
		s.print("nothing\n")
	default:
		return raw, true
	}
	return nil, false
}

// answer is raw for an answer of a known form; an empty list is printed too.
func (s *scene) answer(method string, params, into any) bool {
	s.t.Helper()
	raw, ok := s.raw(method, params)
	if !ok {
		return false
	}
	if err := protocol.Unmarshal(raw, into); err != nil {
		s.t.Fatalf("%s: %v in %s", method, err, raw)
	}
	if string(raw) == "[]" && !strings.HasPrefix(method, "callHierarchy/") {
		s.print("nothing\n")
	}
	return true
}

func (s *scene) links(method, mark string) {
	raw, ok := s.raw(method, s.at(mark, nil))
	if !ok {
		return
	}
	if strings.Contains(string(raw), `"targetUri"`) {
		var list []protocol.LocationLink
		if err := protocol.Unmarshal(raw, &list); err != nil {
			s.t.Fatal(err)
		}
		for _, l := range list {
			s.print("from %s\n", s.marked(s.uri(s.mark(mark).file), *l.OriginSelectionRange))
			s.print("to %s: %s\n", s.name(l.TargetURI), s.marked(l.TargetURI, l.TargetSelectionRange))
			s.print("in %s\n", s.marked(l.TargetURI, l.TargetRange))
		}
		return
	}
	var list []protocol.Location
	if err := protocol.Unmarshal(raw, &list); err != nil {
		s.t.Fatal(err)
	}
	for _, l := range list {
		s.print("to %s: %s\n", s.name(l.URI), s.marked(l.URI, l.Range))
	}
}

func (s *scene) printEdit(e *protocol.WorkspaceEdit) {
	show := func(u uri.URI, edits []protocol.TextEdit) {
		for _, x := range edits {
			s.print("    %s → %s\n", s.marked(u, x.Range), x.NewText)
		}
	}
	var order []uri.URI
	for u := range e.Changes {
		order = append(order, u)
	}
	slices.Sort(order)
	for _, u := range order {
		s.print("%s\n", s.name(u))
		show(u, e.Changes[u])
	}
	for _, c := range e.DocumentChanges {
		d := c.(*protocol.TextDocumentEdit)
		version := "not open"
		if v := d.TextDocument.Version; v != nil {
			version = fmt.Sprintf("version %d", *v)
		}
		s.print("%s, %s\n", s.name(d.TextDocument.URI), version)
		var edits []protocol.TextEdit
		for _, x := range d.Edits {
			edits = append(edits, *x.(*protocol.TextEdit))
		}
		show(d.TextDocument.URI, edits)
	}
}

func (s *scene) printSymbols(u uri.URI, list []protocol.DocumentSymbol, indent string) {
	for _, x := range list {
		s.print("%s%s %s", indent, symbolWords[x.Kind], x.Name)
		if x.Detail != nil {
			s.print(" (%s)", *x.Detail)
		}
		s.print(": %s\n", s.marked(u, x.SelectionRange))
		if a, b := slowOffset(s.text(u), x.Range.Start, s.unit), slowOffset(s.text(u), x.SelectionRange.Start, s.unit); a > b {
			s.t.Errorf("the name of %s lies outside of it", x.Name)
		}
		s.printSymbols(u, x.Children, indent+"    ")
	}
}

// printTokens shows the tokens in their lines, each as ⟦text⟧ and its kind.
func (s *scene) printTokens(file string, data []uint32) {
	lines := slowLines(s.text(s.uri(file)))
	legend := s.result.Capabilities.SemanticTokensProvider.(*protocol.SemanticTokensOptions).Legend
	line, char := uint32(0), uint32(0)
	for i := 0; i+5 <= len(data); i += 5 {
		if data[i] > 0 || i == 0 {
			line, char = line+data[i], 0
			s.print("%s\n", strings.TrimRight(lines[line], "\r\n"))
		}
		char += data[i+1]
		text := lines[line]
		start, end := slowOffset(text, protocol.Position{Character: char}, s.unit), slowOffset(text, protocol.Position{Character: char + data[i+2]}, s.unit)
		kind := legend.TokenTypes[data[i+3]]
		for bit, name := range legend.TokenModifiers {
			if data[i+4]&(1<<bit) != 0 {
				kind += "." + name
			}
		}
		s.print("    %s %s\n", text[start:end], kind)
	}
}

// cut16 is a line up to a column, where columns are those of UTF-16.
func cut16(line string, column uint32) string {
	return line[:slowOffset(line, protocol.Position{Character: column}, utf16Units)]
}

// shorten keeps a long selection readable.
func shorten(s string) string {
	if r := []rune(s); len(r) > 100 {
		return string(r[:60]) + " … " + string(r[len(r)-35:])
	}
	return s
}

var symbolWords = map[protocol.SymbolKind]string{1: "file", 3: "namespace", 4: "package", 5: "class", 7: "property", 8: "field", 10: "enum", 11: "interface",
	12: "function", 13: "variable", 14: "constant", 19: "object", 20: "key", 22: "enum member", 23: "struct", 25: "operator"}
