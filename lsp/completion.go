package lsp

import (
	"context"
	"encoding/json"
	"fmt"
	"slices"

	"kern/lsp/complete"

	"go.lsp.dev/jsonrpc2"
	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// completionTriggers are the signs after which the editor asks by itself: a
// quote and the sign of a value, a blank where few words can follow, a slash in
// a path or a unit.
var completionTriggers = []string{`"`, "=", " ", "/", "."}

var completionFeature = feature{
	name:    "completion",
	methods: []string{protocol.MethodTextDocumentCompletion, protocol.MethodCompletionItemResolve},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if t := client.Capabilities.TextDocument; t != nil && t.Completion != nil {
			c.CompletionProvider = &protocol.CompletionOptions{TriggerCharacters: completionTriggers, ResolveProvider: pointer(true)}
		}
	},
}

// completionClient is what the client can do with completions.
type completionClient struct {
	snippets bool // fills in places
	both     bool // chooses between putting in and replacing
	commits  bool // takes an item by a sign of the item's own
	adjusts  bool // indents further lines
	markdown bool
	kinds    []protocol.CompletionItemKind // nil for those of the protocol's first version
}

func (c *Client) completion() completionClient {
	t := c.Capabilities.TextDocument
	if t == nil || t.Completion == nil {
		return completionClient{}
	}
	var out completionClient
	if k := t.Completion.CompletionItemKind; k != nil {
		out.kinds = k.ValueSet
	}
	if i := t.Completion.CompletionItem; i != nil {
		out.snippets, out.both, out.commits = is(i.SnippetSupport), is(i.InsertReplaceSupport), is(i.CommitCharactersSupport)
		out.adjusts = slices.Contains(i.InsertTextModeSupport.ValueSet, protocol.InsertTextModeAdjustIndentation)
		out.markdown = len(i.DocumentationFormat) > 0 && i.DocumentationFormat[0] == protocol.MarkupKindMarkdown
	}
	return out
}

// Completion answers with what can be written at a place.
func (s *Server) Completion(ctx context.Context, p *protocol.CompletionParams) (protocol.CompletionResult, error) {
	how := asking(p.Context) // before the message is let go
	f, err := s.File(ctx, p.TextDocument.URI)
	if f == nil || err != nil {
		return nil, err
	}
	list := complete.At(f.Report(), f.Name, f.Offset(p.Position), how)
	if len(list.Items) == 0 {
		return nil, nil
	}
	return f.completions(list, s.client.completion()), nil
}

// asking tells how the editor came to ask.
func asking(c protocol.CompletionContext) complete.Asking {
	if c.TriggerKind != protocol.CompletionTriggerKindTriggerCharacter || c.TriggerCharacter == nil {
		return complete.ByUser
	}
	switch *c.TriggerCharacter {
	case " ":
		return complete.ByBlank
	case "=":
		return complete.BySign
	case "/":
		return complete.ByCatching
	}
	return complete.ByUser
}

var completionKinds = [...]protocol.CompletionItemKind{
	complete.StatementItem: protocol.CompletionItemKindKeyword, complete.WordItem: protocol.CompletionItemKindEnumMember, complete.SignItem: protocol.CompletionItemKindOperator,
	complete.SectionItem: protocol.CompletionItemKindStruct, complete.FamilyItem: protocol.CompletionItemKindFolder, complete.MaterialItem: protocol.CompletionItemKindClass,
	complete.CaseItem: protocol.CompletionItemKindEnum, complete.LevelItem: protocol.CompletionItemKindReference, complete.MemberItem: protocol.CompletionItemKindVariable,
	complete.ValueItem: protocol.CompletionItemKindVariable, complete.FunctionItem: protocol.CompletionItemKindFunction, complete.ConstantItem: protocol.CompletionItemKindConstant,
	complete.UnitItem: protocol.CompletionItemKindUnit, complete.ResultItem: protocol.CompletionItemKindProperty, complete.RuleItem: protocol.CompletionItemKindEvent,
	complete.TextItem: protocol.CompletionItemKindText, complete.FileItem: protocol.CompletionItemKindFile,
}

// kind is the icon of an item, of those that the client has.
func (c completionClient) kind(k complete.Kind) protocol.CompletionItemKind {
	kind := completionKinds[k]
	if c.kinds == nil && kind <= protocol.CompletionItemKindReference || slices.Contains(c.kinds, kind) {
		return kind
	}
	switch k {
	case complete.WordItem, complete.SignItem, complete.StatementItem:
		return protocol.CompletionItemKindKeyword
	case complete.SectionItem, complete.FamilyItem:
		return protocol.CompletionItemKindClass
	}
	return protocol.CompletionItemKindValue
}

// completions writes a list for the client.
func (f *File) completions(list complete.List, client completionClient) *protocol.CompletionList {
	word, whole := f.RangeOf(list.Word), f.RangeOf(list.Whole)
	if list.Word.Len() == 0 && whole.End != word.End && !quotedAt(f.Text.s, list.Word.Start) {
		whole = word // in front of a word one is put in, it is not replaced
	}
	out := &protocol.CompletionList{IsIncomplete: list.More, Items: make([]protocol.CompletionItem, len(list.Items))}
	document := string(f.URI(f.Name))
	for i, x := range list.Items {
		text, format := x.Text, protocol.InsertTextFormat(0)
		if text == "" {
			text = x.Label
		}
		if client.snippets && x.Snippet != "" {
			text, format = x.Snippet, protocol.InsertTextFormatSnippet
		}
		item := protocol.CompletionItem{Label: x.Label, Kind: client.kind(x.Kind), InsertTextFormat: format, SortText: protocol.NewOptional(fmt.Sprintf("%03d", i))}
		if x.Detail != "" {
			item.Detail = protocol.NewOptional(x.Detail)
		}
		if x.Filter != "" {
			item.FilterText = protocol.NewOptional(x.Filter)
		}
		if client.both {
			item.TextEdit = &protocol.InsertReplaceEdit{NewText: text, Insert: protocol.Range{Start: word.Start, End: word.End}, Replace: whole}
		} else {
			item.TextEdit = &protocol.TextEdit{NewText: text, Range: whole}
		}
		if client.adjusts && format != 0 {
			item.InsertTextMode = protocol.InsertTextModeAdjustIndentation
		}
		if client.commits && x.Closed {
			item.CommitCharacters = []string{";"}
		}
		if x.About != (complete.About{}) {
			if x.About.Of == "name" || x.About.Of == "section" {
				x.About.URI = document
			}
			item.Data = object(x.About)
		}
		out.Items[i] = item
	}
	return out
}

// quotedAt tells whether a place stands behind the quote that opens a text.
func quotedAt(text string, at int32) bool { return at > 0 && text[at-1] == '"' }

// CompletionResolve adds the documentation of an item.
func (s *Server) CompletionResolve(ctx context.Context, p *protocol.CompletionItem) (*protocol.CompletionItem, error) {
	item, err := protocol.Clone(*p)
	if err != nil {
		return nil, jsonrpc2.Errorf(jsonrpc2.InvalidParams, "the item cannot be read: %v", err)
	}
	var a complete.About
	if len(item.Data) == 0 || json.Unmarshal(item.Data, &a) != nil {
		release(ctx)
		return &item, nil
	}
	var doc complete.Document
	if a.URI == "" {
		release(ctx)
		doc = complete.Explain(a, nil, "")
	} else {
		f, err := s.File(ctx, uri.URI(a.URI))
		switch {
		case err != nil:
			return nil, err
		case f == nil: // the document has gone
			doc = complete.Explain(a, nil, "")
		default:
			doc = complete.Explain(a, f.Report(), f.Name)
		}
	}
	if !doc.Empty() {
		item.Documentation = documented(doc, s.client.completion().markdown)
	}
	return &item, nil
}

// documented writes a documentation as the client shows it.
func documented(doc complete.Document, markdown bool) protocol.InlayHintTooltip {
	if markdown {
		return &protocol.MarkupContent{Kind: protocol.MarkupKindMarkdown, Value: doc.Markdown()}
	}
	return protocol.String(doc.Plain())
}
