package lsp

import (
	"fmt"
	"hash/fnv"
	"net/url"
	"sort"
	"strings"
	"time"

	"kern/checker"
	"kern/checker/rule"
	"kern/lang"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

var diagnosticsFeature = feature{
	name:    "diagnostics",
	methods: []string{protocol.MethodTextDocumentDiagnostic, protocol.MethodWorkspaceDiagnostic},
	advertise: func(c *protocol.ServerCapabilities, client *Client) {
		if client.Pulls {
			c.DiagnosticProvider = &protocol.DiagnosticOptions{Identifier: pointer("kern"), InterFileDependencies: true, WorkspaceDiagnostics: true}
		}
	},
}

// of gives the diagnostics of a file: they are sorted by file.
func diagnosticsOf(r *checker.Report, name string) []checker.Diagnostic {
	all := r.Diagnostics
	first := sort.Search(len(all), func(i int) bool { return all[i].File >= name })
	last := first + sort.Search(len(all)-first, func(i int) bool { return all[first+i].File > name })
	return all[first:last]
}

// diagnosticsNow gives the diagnostics of a file without those that are held
// back, and the time when these are due.
func (s *Snapshot) diagnosticsNow(name string) ([]checker.Diagnostic, time.Time) {
	all := diagnosticsOf(s.report, name)
	d := s.open[name]
	if d == nil {
		return all, time.Time{}
	}
	file := s.project.Files[name]
	if file == nil || s.workspace.server.client.Pulls && !s.workspace.server.client.RefreshDiagnostics {
		return all, time.Time{} // such a client would never ask for what was held back
	}
	return d.typing.filter(d.version, file, d.text, all, s.workspace.server.clock.Now())
}

var severities = [...]protocol.DiagnosticSeverity{
	lang.Error: protocol.DiagnosticSeverityError, lang.Warning: protocol.DiagnosticSeverityWarning,
	lang.Information: protocol.DiagnosticSeverityInformation, lang.Hint: protocol.DiagnosticSeverityHint,
}

// printer writes diagnostics as the protocol has them. The terminal, the JSON
// and this are printings of the same thing.
type printer struct {
	snapshot *Snapshot
	client   *Client
	docs     string
}

func (s *Snapshot) printer() printer {
	return printer{s, s.workspace.server.client, s.workspace.server.Settings().DocsURL}
}

func (p printer) diagnostic(d checker.Diagnostic) protocol.Diagnostic {
	out := protocol.Diagnostic{
		Range:    p.snapshot.Range(d.File, d.Span),
		Severity: severities[d.Severity],
		Code:     protocol.String(d.Rule),
		Source:   protocol.NewOptional("kern"),
		Message:  protocol.String(message(d)),
	}
	if p.client.CodeDescription {
		out.CodeDescription.Href = p.page(d.Rule)
	}
	if p.client.UnusedTag && d.Unused {
		out.Tags = protocol.NewDiagnosticTags(protocol.DiagnosticTagUnnecessary)
	}
	if p.client.RelatedInformation {
		for _, r := range d.Related {
			out.RelatedInformation = append(out.RelatedInformation, protocol.DiagnosticRelatedInformation{Location: p.snapshot.Location(r.File, r.Span), Message: r.Message})
		}
	}
	if p.client.DiagnosticData {
		out.Data = protocol.LSPAny(`{"key":"` + diagnosticKey(d) + `"}`)
	}
	return out
}

// write writes diagnostics as a JSON array. They are written one by one: the
// library has written code for one of them, and none for a list.
func (p printer) write(list []checker.Diagnostic) ([]byte, error) {
	out := make([]byte, 0, 2+600*len(list))
	out = append(out, '[')
	for i, d := range list {
		if i > 0 {
			out = append(out, ',')
		}
		x := p.diagnostic(d)
		var err error
		if out, err = protocol.AppendMarshal(out, &x); err != nil {
			return nil, err
		}
	}
	return append(out, ']'), nil
}

// message is what the user reads: what is wrong, then the notes.
func message(d checker.Diagnostic) string {
	if len(d.Notes) == 0 {
		return d.Message
	}
	return d.Message + "\n" + strings.Join(d.Notes, "\n")
}

// page is the address of a rule's page: below the address that is set, or as a
// document that the client can open, or "".
func (p printer) page(name string) uri.URI {
	if rule.Find(name) == nil {
		return ""
	}
	if p.docs != "" {
		if u, err := url.JoinPath(p.docs, name); err == nil {
			return uri.URI(u)
		}
	}
	if p.client.Contents {
		return rulePage(name)
	}
	return ""
}

// diagnosticKey tells a diagnostic from the others of its file: what it is
// about, but not where it stands, which moves while somebody types above it.
func diagnosticKey(d checker.Diagnostic) string {
	h := fnv.New64a()
	for _, s := range []string{d.Rule, d.Member, d.Message} {
		h.Write([]byte(s))
		h.Write([]byte{0})
	}
	return fmt.Sprintf("%016x", h.Sum64())
}

// Find gives the diagnostic of the report that a client speaks of, as code
// actions need it: by its key and, where the client drops keys, by rule and
// words; the nearest to the place, if there are several.
func (f *File) Find(d protocol.Diagnostic) (checker.Diagnostic, bool) {
	at := f.Offset(d.Range.Start)
	words := ""
	switch m := d.Message.(type) {
	case protocol.String:
		words = string(m)
	case *protocol.MarkupContent:
		words = m.Value
	}
	best, found, distance := checker.Diagnostic{}, false, int32(0)
	for _, c := range diagnosticsOf(f.report, f.Name) {
		if code, ok := d.Code.(protocol.String); !ok || string(code) != c.Rule {
			continue
		}
		if !strings.Contains(string(d.Data), `"`+diagnosticKey(c)+`"`) && words != message(c) {
			continue
		}
		away := max(c.Span.Start-at, at-c.Span.Start)
		if !found || away < distance {
			best, found, distance = c, true, away
		}
	}
	return best, found
}
