package main

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strings"

	"kern/checker/schedule"

	"github.com/spf13/cobra"
	"golang.org/x/term"
)

// scheduleForms are the forms of a schedule by the ends of file names.
var scheduleForms = map[string]string{".txt": "text", ".csv": "csv", ".md": "markdown", ".xlsx": "xlsx"}

func scheduleCommand() *cobra.Command {
	form, file, order := "", "", string(schedule.ByFile)
	c := &cobra.Command{
		Use:   "schedule [PATH…]",
		Short: "List the members with base forces and the steel they need",
		Long: "schedule lists the members of the calculations (files, or folders walked for *.kern): section,\n" +
			"grade, levels, length, the forces at the base of every case and of the governing\n" +
			"combination, the governing check and its utilisation; and the mass of steel by section.\n\n" +
			"The form follows the name of the file, or --output. CSV holds the table of members alone.\n" +
			"Exit status: 0 the schedule was written, whatever the verdicts in it; 2 it could not be.",
		Example: "  kern schedule frame/\n  kern schedule frame/ --sort utilisation -o columns.xlsx",
		RunE: func(c *cobra.Command, paths []string) error {
			by, err := schedule.ParseOrder(order)
			if err != nil {
				return err
			}
			form, err := scheduleForm(form, file)
			if err != nil {
				return err
			}
			if out, ok := c.OutOrStdout().(*os.File); ok && file == "" && form == "xlsx" && term.IsTerminal(int(out.Fd())) {
				return errors.New("a workbook is nothing to show on a terminal: name a file with -o FILE.xlsx")
			}
			w, err := openWorkspace(paths)
			if err != nil {
				return err
			}
			s := schedule.New(w.check(os.Stderr), by)
			var data bytes.Buffer
			if err := writeSchedule(&data, s, form); err != nil {
				return err
			}
			if file == "" {
				_, err := c.OutOrStdout().Write(data.Bytes())
				return err
			}
			if err := os.WriteFile(file, data.Bytes(), 0o666); err != nil {
				return fmt.Errorf("%s: %w", file, reason(err))
			}
			return nil
		},
	}
	c.Flags().StringVar(&form, "output", "", "form of the schedule: text, csv, markdown or xlsx (default: by the name of the file, else text)")
	c.Flags().StringVarP(&file, "file", "o", "", "file to write; without it standard output")
	c.Flags().StringVar(&order, "sort", order, "order of the members: file, name, utilisation or section")
	completeWords(c, "output", "text", "csv", "markdown", "xlsx")
	completeWords(c, "sort", "file", "name", "utilisation", "section")
	return c
}

func scheduleForm(form, file string) (string, error) {
	byName := scheduleForms[strings.ToLower(filepath.Ext(file))]
	switch form {
	case "text", "csv", "markdown", "xlsx":
		if byName != "" && byName != form {
			return "", fmt.Errorf("--output says %s, but the name %s says %s", form, file, byName)
		}
		return form, nil
	case "":
		if byName != "" {
			return byName, nil
		}
		if file != "" {
			return "", fmt.Errorf("the name %s does not tell the form: say --output text, csv, markdown or xlsx", file)
		}
		return "text", nil
	}
	return "", fmt.Errorf("--output is text, csv, markdown or xlsx, not '%s'", form)
}

func writeSchedule(w io.Writer, s *schedule.Schedule, form string) error {
	switch form {
	case "csv":
		return s.CSV(w)
	case "xlsx":
		return s.XLSX(w, program())
	}
	return s.Text(w, form == "markdown")
}
