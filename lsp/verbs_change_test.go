package lsp

import (
	"encoding/json"
	"fmt"
	"maps"
	"slices"
	"strings"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// The verbs of code actions and formatting.
func init() {
	// actions MARK [KIND…] [automatic]: what can be done at a mark; of these kinds
	verbs["actions"] = func(s *scene, args []string) {
		for _, a := range s.actions(args[0], args[1:]) {
			line := string(*a.Kind) + ": " + a.Title
			if a.IsPreferred != nil && *a.IsPreferred {
				line += " (preferred)"
			}
			for _, d := range a.Diagnostics {
				line += ", mends " + string(d.Code.(protocol.String)) + " at " + s.marked(s.uri(s.mark(args[0]).file), d.Range)
			}
			if a.Edit != nil {
				line += ", with its edit"
			}
			s.print("%s\n", line)
		}
	}
	// act MARK "title" [KIND…]: take an action, and what the client's files become
	verbs["act"] = func(s *scene, args []string) {
		all := s.actions(args[0], args[2:])
		i := slices.IndexFunc(all, func(a *protocol.CodeAction) bool { return a.Title == args[1] })
		if i < 0 {
			s.print("not offered\n")
			return
		}
		s.take(all[i])
	}
	// stale MARK "title" OTHER "text": take an action after another mark was changed
	verbs["stale"] = func(s *scene, args []string) {
		all := s.actions(args[0], nil)
		i := slices.IndexFunc(all, func(a *protocol.CodeAction) bool { return a.Title == args[1] })
		if i < 0 {
			s.print("not offered\n")
			return
		}
		s.replaceMark(args[2], args[3])
		s.take(all[i])
	}
	// advertised NAME…: what the server says of these capabilities
	verbs["advertised"] = func(s *scene, args []string) {
		raw, err := protocol.Marshal(&s.result.Capabilities)
		if err != nil {
			s.t.Fatal(err)
		}
		var all map[string]json.RawMessage
		if err := unmarshal(string(raw), &all); err != nil {
			s.t.Fatal(err)
		}
		for _, name := range args {
			if all[name] == nil {
				all[name] = json.RawMessage("not said")
			}
			s.print("%s: %s\n", name, all[name])
		}
	}
	// format FILE
	verbs["format"] = func(s *scene, args []string) {
		s.layOut(args[0], "textDocument/formatting", map[string]any{"textDocument": map[string]any{"uri": s.uri(args[0])}})
	}
	// formatrange MARK…
	verbs["formatrange"] = func(s *scene, args []string) {
		var ranges []protocol.Range
		for _, name := range args {
			ranges = append(ranges, s.rangeOf(name))
		}
		file := s.mark(args[0]).file
		if len(ranges) == 1 {
			s.layOut(file, "textDocument/rangeFormatting", map[string]any{"textDocument": map[string]any{"uri": s.uri(file)}, "range": ranges[0]})
			return
		}
		s.layOut(file, "textDocument/rangesFormatting", map[string]any{"textDocument": map[string]any{"uri": s.uri(file)}, "ranges": ranges})
	}
	// keys MARK "text": type a text behind a mark, and what the server makes of it
	verbs["keys"] = func(s *scene, args []string) {
		m := s.mark(args[0])
		s.replaceMark(args[0], m.span.Of(s.texts[m.file])+args[1])
		m = s.mark(args[0])
		ch := args[1][len(args[1])-1:]
		s.layOut(m.file, "textDocument/onTypeFormatting", map[string]any{"textDocument": map[string]any{"uri": s.uri(m.file)}, "ch": ch,
			"position": slowPosition(s.texts[m.file], m.span.End, s.unit)})
	}
}

func (s *scene) rangeOf(mark string) protocol.Range {
	m := s.mark(mark)
	text := s.text(s.uri(m.file))
	return protocol.Range{Start: slowPosition(text, m.span.Start, s.unit), End: slowPosition(text, m.span.End, s.unit)}
}

func (s *scene) actions(mark string, more []string) []*protocol.CodeAction {
	context := map[string]any{"diagnostics": []any{}}
	var only []string
	for _, m := range more {
		if m == "automatic" {
			context["triggerKind"] = 2
			continue
		}
		only = append(only, m)
	}
	if only != nil {
		context["only"] = only
	}
	raw, err := s.ask("textDocument/codeAction", string(remarshal(s.t, map[string]any{"textDocument": map[string]any{"uri": s.uri(s.mark(mark).file)}, "range": s.rangeOf(mark), "context": context})))
	if err != nil {
		s.print("error: %v\n", err)
		return nil
	}
	var all []*protocol.CodeAction
	if err := protocol.Unmarshal(raw, &all); err != nil {
		s.t.Fatalf("%v in %s", err, raw)
	}
	return all
}

// take resolves an action and carries out its edit.
func (s *scene) take(a *protocol.CodeAction) {
	if a.Edit == nil {
		raw, err := protocol.Marshal(a)
		if err != nil {
			s.t.Fatal(err)
		}
		answer, err := s.ask("codeAction/resolve", string(raw))
		if err != nil {
			s.print("error: %v\n", err)
			return
		}
		a = &protocol.CodeAction{}
		if err := protocol.Unmarshal(answer, a); err != nil {
			s.t.Fatalf("%v in %s", err, answer)
		}
	}
	if a.Edit == nil {
		s.print("no edit\n")
		return
	}
	edits := maps.Clone(a.Edit.Changes)
	if edits == nil {
		edits = map[uri.URI][]protocol.TextEdit{}
	}
	for _, c := range a.Edit.DocumentChanges {
		c := c.(*protocol.TextDocumentEdit)
		name := s.name(c.TextDocument.URI)
		if v := c.TextDocument.Version; v == nil {
			s.print("%s: no version\n", name)
		} else if *v != s.versions[name] {
			s.print("%s: version %d, but it is at %d\n", name, *v, s.versions[name])
		}
		for _, e := range c.Edits {
			edits[c.TextDocument.URI] = append(edits[c.TextDocument.URI], *e.(*protocol.TextEdit))
		}
	}
	for _, u := range slices.Sorted(maps.Keys(edits)) {
		s.carryOut(s.name(u), edits[u])
	}
}

func (s *scene) layOut(file, method string, params map[string]any) {
	params["options"] = map[string]any{"tabSize": 2, "insertSpaces": false}
	raw, err := s.ask(method, string(remarshal(s.t, params)))
	if err != nil {
		s.print("error: %v\n", err)
		return
	}
	var edits []protocol.TextEdit
	if err := protocol.Unmarshal(raw, &edits); err != nil {
		s.t.Fatalf("%v in %s", err, raw)
	}
	s.print("%d edits\n", len(edits))
	s.carryOut(file, edits)
}

// carryOut makes edits to a file as a client does, all of them in the text as it
// was, and prints the lines that change.
func (s *scene) carryOut(name string, edits []protocol.TextEdit) {
	old := s.text(s.uri(name))
	text := old
	type span struct {
		start, end int32
		new        string
	}
	var all []span
	for _, e := range edits {
		all = append(all, span{slowOffset(old, e.Range.Start, s.unit), slowOffset(old, e.Range.End, s.unit), e.NewText})
	}
	slices.SortStableFunc(all, func(a, b span) int { return int(a.start - b.start) })
	for i, e := range slices.Backward(all) {
		if i > 0 && all[i-1].end > e.start {
			s.t.Fatalf("edits of %s overlap", name)
		}
		text = text[:e.start] + e.new + text[e.end:]
	}
	s.print("%s\n%s", name, changedLines(old, text))
	if _, open := s.texts[name]; open {
		for n, m := range s.marks { // the marks move along
			if m.file != name {
				continue
			}
			for _, e := range slices.Backward(all) {
				edit := textEdit{e.start, e.end, int32(len(e.new))}
				m.span.Start, m.span.End = edit.move(m.span.Start), edit.move(m.span.End)
			}
			s.marks[n] = m
		}
		s.texts[name] = text
		s.change(name, &protocol.TextDocumentContentChangeWholeDocument{Text: text})
	} else {
		s.write(name, text)
	}
}

// changedLines shows how lines change: those taken away with -, those put in with
// +, by the longest common row of lines.
func changedLines(old, new string) string {
	a, b := strings.SplitAfter(old, "\n"), strings.SplitAfter(new, "\n")
	common := make([][]int, len(a)+1)
	for i := range common {
		common[i] = make([]int, len(b)+1)
	}
	for i := len(a) - 1; i >= 0; i-- {
		for j := len(b) - 1; j >= 0; j-- {
			if a[i] == b[j] {
				common[i][j] = common[i+1][j+1] + 1
			} else {
				common[i][j] = max(common[i+1][j], common[i][j+1])
			}
		}
	}
	var out strings.Builder
	line := func(sign, text string) {
		if text != "" {
			fmt.Fprintf(&out, "%s %s\n", sign, strings.NewReplacer("\r", "␍", "\n", "", "\t", "→").Replace(text))
		}
	}
	i, j := 0, 0
	for i < len(a) || j < len(b) {
		switch {
		case i < len(a) && j < len(b) && a[i] == b[j]:
			i, j = i+1, j+1
		case j == len(b) || i < len(a) && common[i+1][j] >= common[i][j+1]:
			line("-", a[i])
			i++
		default:
			line("+", b[j])
			j++
		}
	}
	return out.String()
}
