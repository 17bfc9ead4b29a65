package lang

// Severity orders diagnostics.
type Severity uint8

// The severities, worst first.
const (
	Error Severity = iota
	Warning
	Information
	Hint
)

var severityNames = [...]string{"error", "warning", "information", "hint"}

// String is the word that every output prints.
func (s Severity) String() string { return severityNames[s] }

// Problem is something wrong in one declaration, with spans relative to it.
type Problem struct {
	Rule    string // kebab case, registered in checker/rule
	Span    Span
	Message string
	Related []Related
	Notes   []string
	Fixes   []Fix
	// Severity is Error unless said otherwise.
	Severity Severity
	Unused   bool   // editors show the span greyed
	Member   string // the member whose verdict it reports, "" otherwise
}

// Related points at another place that takes part.
type Related struct {
	Place   Place // a nil declaration means the problem's own
	Message string
}

// Fix is a change of text that mends a problem.
type Fix struct {
	Title string
	// Safe fixes change no meaning that the writer could have had; the others
	// are offers.
	Safe  bool
	Edits []Edit
}

// Edit replaces a place's text.
type Edit struct {
	Place Place // a nil declaration means the problem's own
	New   string
}

// Replace makes a fix of one edit in the problem's own declaration.
func Replace(title string, safe bool, span Span, text string) Fix {
	return Fix{Title: title, Safe: safe, Edits: []Edit{{Place: Place{Span: span}, New: text}}}
}

// Diagnostic is a problem with the declaration it stands in.
type Diagnostic struct {
	Decl *Decl
	Problem
}
