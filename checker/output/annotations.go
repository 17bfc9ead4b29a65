package output

import (
	"bufio"
	"fmt"
	"io"
	"strconv"
	"strings"

	"kern/checker"
	"kern/checker/record"
	"kern/lang"
)

func itoa(n int) string { return strconv.Itoa(n) }

// Annotations writes a report as workflow commands of GitHub Actions, which marks
// the lines of a pull request with them. Names of files are those of the
// workspace, which count from the checkout. A carried failure is a notice.
func Annotations(w io.Writer, r *checker.Report, known *record.Outcome, recorded Names) error {
	b := bufio.NewWriter(w)
	lines := newIndex(r.Project)
	for _, d := range r.Diagnostics {
		level := map[lang.Severity]string{lang.Error: "error", lang.Warning: "warning"}[d.Severity]
		message := d.Message
		if reason := carriedReason(known, recorded, d); reason != "" {
			level, message = "notice", message+" (carried: "+reason+")"
		}
		if level == "" {
			level = "notice"
		}
		for _, n := range d.Notes {
			message += "\n" + n
		}
		for _, rel := range d.Related {
			at := lines.span(rel.File, rel.Span).Start
			message += fmt.Sprintf("\n%s:%d: %s", rel.File, at.Line, rel.Message)
		}
		at := lines.span(d.File, d.Span)
		place := fmt.Sprintf("line=%d,endLine=%d", at.Start.Line, at.End.Line)
		if at.Start.Line == at.End.Line { // columns count within one line alone
			place += fmt.Sprintf(",col=%d,endColumn=%d", at.Start.Column, max(at.End.Column, at.Start.Column+1))
		}
		fmt.Fprintf(b, "::%s file=%s,%s,title=%s::%s\n", level, commandProperty(d.File), place, commandProperty(d.Rule), commandText(message))
	}
	if known != nil {
		for _, d := range known.Differences {
			fmt.Fprintf(b, "::error title=recorded results::%s\n", commandText(d.File+": "+d.Name+" "+d.Message))
		}
		if n := len(known.Carried); n > 0 {
			fmt.Fprintf(b, "::notice title=carried failures::%s\n", commandText(carriedCount(n)))
		}
	}
	s := r.Summary
	fmt.Fprintf(b, "%s\n", Counts(s))
	return b.Flush()
}

// commandText escapes the message of a workflow command.
func commandText(s string) string {
	return strings.NewReplacer("%", "%25", "\r", "%0D", "\n", "%0A").Replace(s)
}

// commandProperty escapes a property of a workflow command.
func commandProperty(s string) string {
	return strings.NewReplacer("%", "%25", "\r", "%0D", "\n", "%0A", ":", "%3A", ",", "%2C").Replace(s)
}

func carriedCount(n int) string {
	if n == 1 {
		return "1 known failure is carried, and does not block"
	}
	return fmt.Sprintf("%d known failures are carried, and do not block", n)
}
