package sheet

import (
	"fmt"
	"io"

	"kern/checker"
)

// Write writes the sheet in a form: html, pdf or markdown. progress is told of the
// pages of a PDF, which take the longest; it may be nil.
func (s *Sheet) Write(w io.Writer, form string, progress checker.Progress) error {
	switch form {
	case "html":
		return s.HTML(w)
	case "pdf":
		return s.PDF(w, progress)
	case "markdown":
		return s.Markdown(w)
	}
	return fmt.Errorf("a sheet is html, pdf or markdown, not '%s'", form)
}
