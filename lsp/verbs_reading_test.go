package lsp

import (
	"encoding/json"
	"regexp"
	"strings"

	"kern/lang"

	"go.lsp.dev/protocol"
)

// The verbs of hovers, hints and lenses.
func init() {
	// hover MARK…: what stands at each mark, with the text that it is about
	verbs["hover"] = func(s *scene, args []string) {
		for _, name := range args {
			m := s.mark(name)
			raw, err := s.ask("textDocument/hover", s.place(m.file, m.span.Start))
			if len(args) > 1 {
				s.print("%s: ", name)
			}
			switch {
			case err != nil:
				s.print("error: %v\n", err)
				continue
			case string(raw) == "null":
				s.print("nothing\n")
				continue
			}
			var h struct {
				Contents protocol.MarkupContent
				Range    protocol.Range
			}
			if err := json.Unmarshal(raw, &h); err != nil {
				s.t.Fatal(err)
			}
			s.print("%s (%s)\n%s", s.marked(s.uri(m.file), h.Range), h.Contents.Kind, quotePage(h.Contents.Value))
		}
	}
	// hints FILE: the lines that have hints, with the hints in them
	verbs["hints"] = func(s *scene, args []string) {
		text := s.texts[args[0]]
		s.printHints(args[0], lang.Span{End: int32(len(text))})
	}
	// hintsin MARK: those of a part of a file
	verbs["hintsin"] = func(s *scene, args []string) { s.printHints(s.mark(args[0]).file, s.mark(args[0]).span) }
	// tip FILE "LABEL": the tooltip of the first hint with the label
	verbs["tip"] = func(s *scene, args []string) {
		for _, h := range s.hints(args[0], lang.Span{End: int32(len(s.texts[args[0]]))}) {
			if string(h.Label.(protocol.String)) != args[1] {
				continue
			}
			if h.Tooltip != nil {
				s.print("(sent with the hint) ")
			} else {
				raw, err := protocol.Marshal(&h)
				if err != nil {
					s.t.Fatal(err)
				}
				answer, err := s.ask("inlayHint/resolve", string(raw))
				if err != nil {
					s.print("error: %v\n", err)
					return
				}
				h = protocol.InlayHint{}
				if err := protocol.Unmarshal(answer, &h); err != nil {
					s.t.Fatal(err)
				}
			}
			if c, ok := h.Tooltip.(*protocol.MarkupContent); ok {
				s.print("(%s)\n%s", c.Kind, quotePage(c.Value))
			} else {
				s.print("no tooltip\n")
			}
			return
		}
		s.print("there is no such hint\n")
	}
	// lenses FILE: each line with its lenses above, resolved
	verbs["lenses"] = func(s *scene, args []string) {
		raw, err := s.ask("textDocument/codeLens", `{"textDocument":{"uri":"`+string(s.uri(args[0]))+`"}}`)
		if err != nil {
			s.print("error: %v\n", err)
			return
		}
		var lenses []json.RawMessage
		if err := json.Unmarshal(raw, &lenses); err != nil {
			s.t.Fatal(err)
		}
		for _, l := range lenses {
			resolved, err := s.ask("codeLens/resolve", string(l))
			if err != nil {
				s.print("error: %v\n", err)
				continue
			}
			var lens protocol.CodeLens
			if err := protocol.Unmarshal(resolved, &lens); err != nil {
				s.t.Fatal(err)
			}
			s.print("[%s] %s", lens.Command.Title, lens.Command.Command)
			for _, a := range lens.Command.Arguments {
				s.print(" %s", strings.ReplaceAll(string(a), string(s.uri("")), "DIR"))
			}
			s.print("\n    %s\n", s.marked(s.uri(args[0]), lens.Range))
		}
		if len(lenses) == 0 {
			s.print("none\n")
		}
	}
	// working FILE MEMBER [CHECK]: what the command gives, as text
	verbs["working"] = func(s *scene, args []string) {
		list := []any{s.uri(args[0])}
		for _, a := range args[1:] {
			list = append(list, a)
		}
		raw, err := s.ask("workspace/executeCommand", string(remarshal(s.t, map[string]any{"command": "kern.working", "arguments": list})))
		if err != nil {
			s.print("error: %v\n", err)
			return
		}
		var text string
		if err := json.Unmarshal(raw, &text); err != nil {
			s.t.Fatal(err)
		}
		s.print("%s", quotePage(text))
	}
}

func init() {
	// sheet FILE [FORM [MEMBER…]]: the headings and verdicts of what the command gives
	verbs["sheet"] = func(s *scene, args []string) {
		list := []any{s.uri(args[0])}
		for _, a := range args[1:] {
			list = append(list, a)
		}
		raw, err := s.ask("workspace/executeCommand", string(remarshal(s.t, map[string]any{"command": commandSheet, "arguments": list})))
		if err != nil {
			s.print("error: %v\n", err)
			return
		}
		var text string
		if err := json.Unmarshal(raw, &text); err != nil {
			s.t.Fatal(err)
		}
		for line := range strings.Lines(text) {
			if strings.HasPrefix(line, "#") || strings.HasPrefix(line, "**") || strings.HasPrefix(line, "<h") || strings.HasPrefix(line, "<p class=\"verdict") {
				s.print("    %s", line)
			}
		}
	}
}

// place is the parameters of a request about a place.
func (s *scene) place(file string, offset int32) string {
	return string(remarshal(s.t, map[string]any{"textDocument": map[string]any{"uri": s.uri(file)}, "position": slowPosition(s.texts[file], offset, s.unit)}))
}

func (s *scene) hints(file string, span lang.Span) []protocol.InlayHint {
	s.t.Helper()
	text := s.texts[file]
	params := map[string]any{"textDocument": map[string]any{"uri": s.uri(file)},
		"range": protocol.Range{Start: slowPosition(text, span.Start, s.unit), End: slowPosition(text, span.End, s.unit)}}
	raw, err := s.ask("textDocument/inlayHint", string(remarshal(s.t, params)))
	if err != nil {
		s.print("error: %v\n", err)
		return nil
	}
	var list []protocol.InlayHint
	if err := protocol.Unmarshal(raw, &list); err != nil {
		s.t.Fatal(err)
	}
	return list
}

func (s *scene) printHints(file string, span lang.Span) {
	text := s.texts[file]
	lines := strings.SplitAfter(text, "\n")
	type insert struct {
		column int
		label  string
	}
	of := map[int][]insert{}
	list := s.hints(file, span)
	for _, h := range list {
		offset := slowOffset(text, h.Position, s.unit)
		line := strings.Count(text[:offset], "\n")
		start := strings.LastIndexByte(text[:offset], '\n') + 1
		of[line] = append(of[line], insert{int(offset) - start, string(h.Label.(protocol.String))})
	}
	for i, line := range lines {
		if len(of[i]) == 0 {
			continue
		}
		line = strings.TrimRight(line, "\r\n")
		at := 0
		for _, x := range of[i] {
			if x.column < at {
				s.t.Errorf("the hint %q goes back", x.label)
				continue
			}
			s.print("%s‹%s›", line[at:x.column], x.label)
			at = x.column
		}
		s.print("%s\n", line[at:])
	}
	if len(list) == 0 {
		s.print("none\n")
	}
}

var picture = regexp.MustCompile(`\]\(data:[^)]*\)`)

// quotePage indents a page, with the letters of its pictures left out.
func quotePage(text string) string {
	var b strings.Builder
	for line := range strings.Lines(picture.ReplaceAllString(text, "](a picture)")) {
		b.WriteString(strings.TrimRight("    "+strings.TrimRight(line, "\n"), " ") + "\n")
	}
	return b.String()
}
