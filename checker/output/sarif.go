package output

import (
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"fmt"
	"io"
	"net/url"
	"strings"

	"kern/checker"
	"kern/checker/record"
	"kern/checker/rule"
	"kern/lang"
)

// The parts of a SARIF 2.1.0 log (OASIS) that reports have.
type (
	sarifLog struct {
		Schema  string     `json:"$schema"`
		Version string     `json:"version"`
		Runs    []sarifRun `json:"runs"`
	}
	sarifRun struct {
		Tool        sarifTool              `json:"tool"`
		ColumnKind  string                 `json:"columnKind"`
		Bases       map[string]sarifBase   `json:"originalUriBaseIds"`
		Results     []sarifResult          `json:"results"`
		Invocations []sarifInvocation      `json:"invocations"`
		Properties  map[string]interface{} `json:"properties"`
	}
	sarifBase struct {
		Description sarifText `json:"description"`
	}
	sarifInvocation struct {
		Successful bool `json:"executionSuccessful"`
	}
	sarifTool struct {
		Driver sarifDriver `json:"driver"`
	}
	sarifDriver struct {
		Name    string      `json:"name"`
		Version string      `json:"semanticVersion"`
		Rules   []sarifRule `json:"rules"`
	}
	sarifRule struct {
		ID            string      `json:"id"`
		Short         sarifText   `json:"shortDescription"`
		HelpURI       string      `json:"helpUri"`
		Help          sarifText   `json:"help"`
		Configuration sarifConfig `json:"defaultConfiguration"`
		Properties    sarifTags   `json:"properties"`
	}
	sarifTags struct {
		Tags []string `json:"tags"`
	}
	sarifConfig struct {
		Level string `json:"level"`
	}
	sarifText struct {
		Text     string `json:"text"`
		Markdown string `json:"markdown,omitempty"`
	}
	sarifResult struct {
		RuleID       string             `json:"ruleId"`
		RuleIndex    int                `json:"ruleIndex"`
		Level        string             `json:"level"`
		Message      sarifText          `json:"message"`
		Locations    []sarifLocation    `json:"locations"`
		Related      []sarifLocation    `json:"relatedLocations,omitempty"`
		Fingerprints map[string]string  `json:"partialFingerprints"`
		Suppressions []sarifSuppression `json:"suppressions,omitempty"`
		Fixes        []sarifFix         `json:"fixes,omitempty"`
	}
	sarifSuppression struct {
		Kind          string `json:"kind"`
		Justification string `json:"justification"`
	}
	sarifLocation struct {
		ID       *int           `json:"id,omitempty"`
		Physical sarifPhysical  `json:"physicalLocation"`
		Logical  []sarifLogical `json:"logicalLocations,omitempty"`
		Message  *sarifText     `json:"message,omitempty"`
	}
	sarifLogical struct {
		Name string `json:"name"`
		Kind string `json:"kind"`
	}
	sarifPhysical struct {
		Artifact sarifArtifact `json:"artifactLocation"`
		Region   *sarifRegion  `json:"region,omitempty"`
	}
	sarifArtifact struct {
		URI  string `json:"uri"`
		Base string `json:"uriBaseId"`
	}
	sarifRegion struct {
		StartLine   int `json:"startLine"`
		StartColumn int `json:"startColumn"`
		EndLine     int `json:"endLine"`
		EndColumn   int `json:"endColumn"`
	}
	sarifFix struct {
		Description sarifText     `json:"description"`
		Changes     []sarifChange `json:"artifactChanges"`
	}
	sarifChange struct {
		Artifact     sarifArtifact      `json:"artifactLocation"`
		Replacements []sarifReplacement `json:"replacements"`
	}
	sarifReplacement struct {
		Deleted  sarifRegion `json:"deletedRegion"`
		Inserted sarifText   `json:"insertedContent"`
	}
)

// sarifRoot names the folder that file names count from: the checkout.
const sarifRoot = "SRCROOT"

// SARIF writes a report as a SARIF 2.1.0 log. Names of files are those of the
// workspace, which count from the checkout. known says which failures are carried;
// nil for none. Departures and carried failures are suppressed with their reasons.
func SARIF(w io.Writer, r *checker.Report, program string, known *record.Outcome, recorded Names) error {
	s := &sarifWriter{r: r, lines: newIndex(r.Project), known: known, recorded: recorded, index: map[string]int{}, seen: map[string]int{}}
	name, version, _ := strings.Cut(program, " ")
	run := sarifRun{ColumnKind: "unicodeCodePoints", Results: []sarifResult{}, Invocations: []sarifInvocation{{Successful: true}},
		Bases:      map[string]sarifBase{sarifRoot: {sarifText{Text: "the checkout that the calculations lie in"}}},
		Properties: map[string]interface{}{"caution": Caution}}
	for i, x := range rule.All() {
		s.index[x.Name] = i
		run.Tool.Driver.Rules = append(run.Tool.Driver.Rules, sarifRule{ID: x.Name, Short: sarifText{Text: x.Summary}, HelpURI: "kern-rule:" + x.Name,
			Help: sarifText{Text: x.Page, Markdown: x.Page}, Configuration: sarifConfig{sarifLevel(x.Severity)}, Properties: sarifTags{[]string{x.Topic}}})
	}
	run.Tool.Driver.Name, run.Tool.Driver.Version = name, version
	for _, d := range r.Diagnostics {
		run.Results = append(run.Results, s.result(d))
	}
	if known != nil {
		run.Properties["carriedFailures"], run.Properties["differencesFromRecord"] = len(known.Carried), len(known.Differences)
		run.Results = append(run.Results, s.differences()...)
	}
	e := json.NewEncoder(w)
	e.SetIndent("", "  ")
	e.SetEscapeHTML(false)
	return e.Encode(sarifLog{Schema: "https://json.schemastore.org/sarif-2.1.0.json", Version: "2.1.0", Runs: []sarifRun{run}})
}

func sarifLevel(s lang.Severity) string {
	switch s {
	case lang.Error:
		return "error"
	case lang.Warning:
		return "warning"
	}
	return "note"
}

type sarifWriter struct {
	r        *checker.Report
	lines    *index
	known    *record.Outcome
	recorded Names
	index    map[string]int
	seen     map[string]int // fingerprints so far
}

func (s *sarifWriter) result(d checker.Diagnostic) sarifResult {
	out := sarifResult{RuleID: d.Rule, RuleIndex: -1, Level: sarifLevel(d.Severity), Message: sarifText{Text: d.Message},
		Locations: []sarifLocation{{Physical: s.at(d.File, d.Span)}}, Fingerprints: map[string]string{"kernStatement/v1": s.fingerprint(d)}}
	if i, ok := s.index[d.Rule]; ok {
		out.RuleIndex = i
	}
	for _, n := range d.Notes {
		out.Message.Text += "\n" + n
	}
	if d.Member != "" {
		out.Locations[0].Logical = []sarifLogical{{d.Member, "member"}}
	}
	for i, rel := range d.Related {
		out.Related = append(out.Related, sarifLocation{ID: &i, Physical: s.at(rel.File, rel.Span), Message: &sarifText{Text: rel.Message}})
	}
	for _, f := range d.Fixes {
		out.Fixes = append(out.Fixes, s.fix(f))
	}
	if reason, ok := s.departure(d); ok {
		out.Suppressions = append(out.Suppressions, sarifSuppression{"inSource", reason})
	}
	if reason := carriedReason(s.known, s.recorded, d); reason != "" {
		out.Suppressions = append(out.Suppressions, sarifSuppression{"external", reason})
	}
	return out
}

// differences are the results that are not as recorded. They are about a member,
// not about a place in its file.
func (s *sarifWriter) differences() []sarifResult {
	file := map[string]string{} // by its name in the record
	for name := range s.r.Project.Files {
		file[s.recorded(name)] = name
	}
	var out []sarifResult
	for _, d := range s.known.Differences {
		name := file[d.File]
		if name == "" {
			name = d.File // it is gone
		}
		sum := sha256.Sum256([]byte(d.File + "\x00" + d.Name))
		out = append(out, sarifResult{RuleID: "recorded-result", RuleIndex: -1, Level: "error", Message: sarifText{Text: d.Name + " " + d.Message},
			Locations:    []sarifLocation{{Physical: sarifPhysical{Artifact: sarifArtifact{sarifURI(name), sarifRoot}}, Logical: []sarifLogical{{d.Name, "member"}}}},
			Fingerprints: map[string]string{"kernRecorded/v1": hex.EncodeToString(sum[:16])}})
	}
	return out
}

// carriedReason is why a diagnostic of a member that fails does not block; "" for
// one that does.
func carriedReason(known *record.Outcome, recorded Names, d checker.Diagnostic) string {
	if d.Member == "" || known == nil || !known.Carries(recorded(d.File), d.Member) {
		return ""
	}
	for _, e := range known.Carried {
		if e.File == recorded(d.File) && e.Name == d.Member {
			return e.Carried
		}
	}
	return ""
}

// departure is the reason of a departure that a diagnostic tells of.
func (s *sarifWriter) departure(d checker.Diagnostic) (string, bool) {
	if d.Rule != "departure" {
		return "", false
	}
	for _, m := range s.r.Members {
		for _, dep := range m.Departures {
			if file, span := s.r.Where(dep.Place); m.Name == d.Member && file == d.File && span == d.Span {
				return dep.Because, true
			}
		}
	}
	return d.Message, true
}

func (s *sarifWriter) fix(f checker.Fix) sarifFix {
	out := sarifFix{Description: sarifText{Text: f.Title}}
	for _, e := range f.Edits {
		change := sarifReplacement{Deleted: *s.at(e.File, e.Span).Region, Inserted: sarifText{Text: e.New}}
		uri := sarifURI(e.File)
		if n := len(out.Changes); n > 0 && out.Changes[n-1].Artifact.URI == uri {
			out.Changes[n-1].Replacements = append(out.Changes[n-1].Replacements, change)
			continue
		}
		out.Changes = append(out.Changes, sarifChange{sarifArtifact{uri, sarifRoot}, []sarifReplacement{change}})
	}
	return out
}

func (s *sarifWriter) at(file string, span lang.Span) sarifPhysical {
	at := s.lines.span(file, span)
	return sarifPhysical{sarifArtifact{sarifURI(file), sarifRoot}, &sarifRegion{at.Start.Line, at.Start.Column, at.End.Line, at.End.Column}}
}

// sarifURI is a name of the workspace as a relative address.
func sarifURI(name string) string { return (&url.URL{Path: name}).EscapedPath() }

// fingerprint stays what it is when lines move: it is made of the file, the rule,
// the member and the text that the diagnostic is about, with a number for those that
// are alike.
func (s *sarifWriter) fingerprint(d checker.Diagnostic) string {
	text := ""
	if f := s.r.Project.Files[d.File]; f != nil && f.Unreadable == "" {
		l := s.lines.of(d.File)
		text = strings.Join(strings.Fields(l.Text(l.Line(d.Span.Start))), " ")
	}
	key := strings.Join([]string{d.File, d.Rule, d.Member, text}, "\x00")
	s.seen[key]++
	sum := sha256.Sum256(fmt.Appendf(nil, "%s\x00%d", key, s.seen[key]))
	return hex.EncodeToString(sum[:16])
}
