package sheet

import (
	"fmt"
	"io"
)

// Write writes the sheet in a form: html, pdf or markdown.
func (s *Sheet) Write(w io.Writer, form string) error {
	switch form {
	case "html":
		return s.HTML(w)
	case "pdf":
		return s.PDF(w)
	case "markdown":
		return s.Markdown(w)
	}
	return fmt.Errorf("a sheet is html, pdf or markdown, not '%s'", form)
}
