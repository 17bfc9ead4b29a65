package lsp

import (
	"fmt"
	"sort"
	"strings"
	"unicode/utf16"

	"go.lsp.dev/protocol"
)

// The verbs of completion and signature help.
func init() {
	// complete MARK ["sign"] [first N]: what is offered, behind the sign that was typed
	verbs["complete"] = func(s *scene, args []string) {
		most, sign := 1000, ""
		for i := 1; i < len(args); i++ {
			if args[i] == "first" {
				fmt.Sscan(args[i+1], &most)
				break
			}
			sign = args[i]
		}
		list := s.completions(args[0], sign)
		if list == nil {
			s.print("nothing\n")
			return
		}
		if list.IsIncomplete {
			s.print("more as typing goes on\n")
		}
		last := ""
		for i, x := range list.Items {
			if i == most {
				s.print("… %d in all\n", len(list.Items))
				break
			}
			if now := s.replaced(args[0], x); now != last {
				s.print("%s\n", now)
				last = now
			}
			s.print("    %s\n", s.item(x))
		}
	}
	// accept MARK "label": the line when the item has been taken
	verbs["accept"] = func(s *scene, args []string) {
		m := s.mark(args[0])
		list := s.completions(args[0], "")
		if list == nil {
			s.print("nothing\n")
			return
		}
		for _, x := range list.Items {
			if x.Label != args[1] {
				continue
			}
			text, ways := s.texts[m.file], []struct {
				name string
				r    protocol.Range
			}{}
			with := ""
			switch e := x.TextEdit.(type) {
			case *protocol.TextEdit:
				ways, with = append(ways, struct {
					name string
					r    protocol.Range
				}{"", e.Range}), e.NewText
			case *protocol.InsertReplaceEdit:
				with = e.NewText
				for _, w := range []struct {
					name string
					r    protocol.Range
				}{{"insert: ", e.Insert}, {"replace: ", e.Replace}} {
					if w.name == "insert: " || e.Insert != e.Replace {
						ways = append(ways, w)
					}
				}
			}
			for _, w := range ways {
				start, end := slowOffset(text, w.r.Start, s.unit), slowOffset(text, w.r.End, s.unit)
				from := strings.LastIndex(text[:start], "\n") + 1
				to := len(text)
				if i := strings.Index(text[end:], "\n"); i >= 0 {
					to = int(end) + i
				}
				if len(ways) == 1 {
					w.name = ""
				}
				s.print("%s%s⟦%s⟧%s\n", w.name, strings.TrimLeft(text[from:start], " "), with, text[end:to])
			}
			return
		}
		s.print("%s is not offered\n", args[1])
	}
	// explain MARK "label": the documentation of an item
	verbs["explain"] = func(s *scene, args []string) {
		if list := s.completions(args[0], ""); list != nil {
			for _, x := range list.Items {
				if x.Label == args[1] {
					raw, err := protocol.Marshal(&x)
					if err != nil {
						s.t.Fatal(err)
					}
					answer, err := s.ask("completionItem/resolve", string(raw))
					if err != nil {
						s.print("error: %v\n", err)
						return
					}
					var out protocol.CompletionItem
					if err := protocol.Unmarshal(answer, &out); err != nil {
						s.t.Fatal(err)
					}
					s.print("%s\n", tooltip(out.Documentation))
					return
				}
			}
		}
		s.print("%s is not offered\n", args[1])
	}
	// signature MARK ["sign"]: the forms, with the part that is due
	verbs["signature"] = func(s *scene, args []string) {
		raw, err := s.ask("textDocument/signatureHelp", s.position(args[0], append(args, "")[1]))
		if err != nil {
			s.print("error: %v\n", err)
			return
		}
		if string(raw) == "null" {
			s.print("nothing\n")
			return
		}
		var h protocol.SignatureHelp
		if err := protocol.Unmarshal(raw, &h); err != nil {
			s.t.Fatal(err)
		}
		for i, x := range h.Signatures {
			active := h.ActiveSignature != nil && int(*h.ActiveSignature) == i
			sign, label, words := "  ", x.Label, ""
			if active {
				sign = "> "
			}
			if n, ok := h.ActiveParameter.Get(); ok && active && int(n) < len(x.Parameters) {
				p := x.Parameters[n]
				words = tooltip(p.Documentation)
				switch l := p.Label.(type) {
				case protocol.String:
					label = strings.Replace(label, string(l), "⟦"+string(l)+"⟧", 1)
				case protocol.ParameterInformationLabelTuple:
					u := utf16.Encode([]rune(label))
					label = string(utf16.Decode(u[:l[0]])) + "⟦" + string(utf16.Decode(u[l[0]:l[1]])) + "⟧" + string(utf16.Decode(u[l[1]:]))
				}
			}
			s.print("%s%s\n", sign, label)
			if active {
				s.print("      %s\n", tooltip(x.Documentation))
				if words != "" {
					s.print("      %s\n", words)
				}
			}
		}
	}
}

// position is the place of a mark as the parameters of a request; sign is what
// was typed for it, "" when the user asked.
func (s *scene) position(mark, sign string) string {
	m := s.mark(mark)
	p := map[string]any{"textDocument": map[string]any{"uri": s.uri(m.file)}, "position": slowPosition(s.texts[m.file], m.span.End, s.unit)}
	if sign != "" {
		p["context"] = map[string]any{"triggerKind": 2, "triggerCharacter": sign}
	}
	return string(remarshal(s.t, p))
}

func (s *scene) completions(mark, sign string) *protocol.CompletionList {
	raw, err := s.ask("textDocument/completion", s.position(mark, sign))
	if err != nil {
		s.t.Fatal(err)
	}
	if string(raw) == "null" {
		return nil
	}
	list := &protocol.CompletionList{}
	if err := protocol.Unmarshal(raw, list); err != nil {
		s.t.Fatal(err)
	}
	if !sort.SliceIsSorted(list.Items, func(i, j int) bool {
		a, _ := list.Items[i].SortText.Get()
		b, _ := list.Items[j].SortText.Get()
		return a < b
	}) {
		s.t.Error("the list is not in its own order")
	}
	return list
}

// replaced shows what an item would replace.
func (s *scene) replaced(mark string, x protocol.CompletionItem) string {
	u := s.uri(s.mark(mark).file)
	switch e := x.TextEdit.(type) {
	case *protocol.TextEdit:
		return s.marked(u, e.Range)
	case *protocol.InsertReplaceEdit:
		if e.Insert == e.Replace {
			return s.marked(u, e.Insert)
		}
		return "insert " + s.marked(u, e.Insert) + ", replace " + s.marked(u, e.Replace)
	}
	return "no edit"
}

// item writes an item in a line.
func (s *scene) item(x protocol.CompletionItem) string {
	out := x.Label
	with, snippet := "", x.InsertTextFormat == protocol.InsertTextFormatSnippet
	switch e := x.TextEdit.(type) {
	case *protocol.TextEdit:
		with = e.NewText
	case *protocol.InsertReplaceEdit:
		with = e.NewText
	}
	if with != x.Label {
		out += " → " + strings.ReplaceAll(with, "\n", "⏎")
		if snippet {
			out += " (snippet)"
		}
	}
	if detail, ok := x.Detail.Get(); ok {
		out += "  · " + detail
	}
	if filter, ok := x.FilterText.Get(); ok {
		out += "  found as " + filter
	}
	if len(x.CommitCharacters) > 0 {
		out += "  taken by " + strings.Join(x.CommitCharacters, " ")
	}
	return out
}

// tooltip is a documentation as text.
func tooltip(d protocol.InlayHintTooltip) string {
	switch d := d.(type) {
	case protocol.String:
		return string(d)
	case *protocol.MarkupContent:
		return d.Value
	}
	return "no documentation"
}
