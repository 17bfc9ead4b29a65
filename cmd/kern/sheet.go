package main

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strings"

	"kern/checker/sheet"

	"github.com/spf13/cobra"
	"golang.org/x/term"
)

type sheetFlags struct {
	form, file, paper, verify string
	members                   []string
	full                      bool
}

// sheetForms are the forms of a sheet by the ends of file names.
var sheetForms = map[string]string{".html": "html", ".htm": "html", ".pdf": "pdf", ".md": "markdown", ".markdown": "markdown"}

func sheetCommand() *cobra.Command {
	var f sheetFlags
	c := &cobra.Command{
		Use:   "sheet [PATH…]",
		Short: "Print the calculation, with every step of the governing checks",
		Long: "sheet writes the calculations (files, or folders walked for *.kern) as a document: basis,\n" +
			"materials, sections, loads, and for every member pictures, all checks, the working of the\n" +
			"governing one, what was checked and what not, assumptions and departures.\n\n" +
			"The form follows the name of the file, or --output: html (one file, no network), pdf or\n" +
			"markdown. A sheet carries a digest of its inputs; --verify says whether it still follows\n" +
			"from them.\n\n" +
			"Exit status: 0 the sheet was written, whatever the verdicts on it, or it still follows; 1 it\n" +
			"does not follow any more; 2 the command itself could not run.",
		Example: "  kern sheet frame/ -o frame.pdf\n  kern sheet frame/posts.kern --member A1 --full -o A1.html\n  kern sheet --verify frame.pdf",
		RunE: func(c *cobra.Command, paths []string) error {
			if f.verify != "" {
				return verifySheet(c.OutOrStdout(), f.verify, paths)
			}
			return printSheet(c.OutOrStdout(), f, paths)
		},
	}
	c.Flags().StringVar(&f.form, "output", "", "form of the sheet: html, pdf or markdown (default: by the name of the file, else html)")
	c.Flags().StringVarP(&f.file, "file", "o", "", "file to write; without it standard output")
	c.Flags().StringVar(&f.paper, "paper", string(sheet.A4), "paper of a PDF: a4 or letter")
	c.Flags().StringArrayVar(&f.members, "member", nil, "a member to show alone; may be given several times")
	c.Flags().BoolVar(&f.full, "full", false, "write the working of every check, not of the governing one alone")
	c.Flags().StringVar(&f.verify, "verify", "", "say whether a sheet still follows from the files (in the folder PATH)")
	c.MarkFlagsMutuallyExclusive("verify", "file")
	c.MarkFlagsMutuallyExclusive("verify", "output")
	completeWords(c, "output", "html", "pdf", "markdown")
	completeWords(c, "paper", "a4", "letter")
	return c
}

func printSheet(out io.Writer, f sheetFlags, paths []string) error {
	form, err := f.formOf()
	if err != nil {
		return err
	}
	if f.paper != string(sheet.A4) && f.paper != string(sheet.Letter) {
		return fmt.Errorf("--paper is a4 or letter, not '%s'", f.paper)
	}
	if terminal, ok := out.(*os.File); ok && f.file == "" && form == "pdf" && term.IsTerminal(int(terminal.Fd())) {
		return errors.New("a PDF is nothing to show on a terminal: name a file with -o FILE.pdf")
	}
	w, err := openWorkspace(paths)
	if err != nil {
		return err
	}
	report := w.check(os.Stderr)
	b := newBar(os.Stderr)
	b.what = "writing members"
	s, err := sheet.New(report, sheet.Options{Program: program(), Asked: w.names, Members: f.members, Full: f.full, Paper: sheet.Paper(f.paper), Progress: b.tell})
	b.finish()
	if err != nil {
		return err
	}
	var data bytes.Buffer
	pages := newBar(os.Stderr)
	pages.what = "writing pages"
	err = s.Write(&data, form, pages.tell)
	pages.finish()
	if err != nil {
		return err
	}
	if f.file == "" {
		_, err := out.Write(data.Bytes())
		return err
	}
	if err := os.WriteFile(f.file, data.Bytes(), 0o666); err != nil {
		return fmt.Errorf("%s: %w", f.file, reason(err))
	}
	fmt.Fprintf(os.Stderr, "%s: %s\n", f.file, s.Tally.Rest)
	return nil
}

// formOf finds the form that is wanted.
func (f sheetFlags) formOf() (string, error) {
	byName := sheetForms[strings.ToLower(filepath.Ext(f.file))]
	switch {
	case f.form == "html" || f.form == "pdf" || f.form == "markdown":
		if byName != "" && byName != f.form {
			return "", fmt.Errorf("--output says %s, but the name %s says %s", f.form, f.file, byName)
		}
		return f.form, nil
	case f.form != "":
		return "", fmt.Errorf("--output is html, pdf or markdown, not '%s'", f.form)
	case byName != "":
		return byName, nil
	case f.file != "":
		return "", fmt.Errorf("the name %s does not tell the form: say --output html, pdf or markdown", f.file)
	}
	return "html", nil
}
