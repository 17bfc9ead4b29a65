package main

import (
	"fmt"
	"io"
	"os"
	"path/filepath"

	"kern/lang"

	"github.com/spf13/cobra"
)

func formatCommand() *cobra.Command {
	check := false
	c := &cobra.Command{
		Use:   "format [PATH…]",
		Short: "Lay the calculations out in the one layout",
		Long: "format rewrites the calculations in place (files, or folders walked for *.kern). It\n" +
			"changes blanks and line breaks alone, keeps every comment, and leaves alone what it\n" +
			"cannot read. With - it reads standard input and writes standard output.",
		Example: "  kern format\n  kern format --check frame/\n  kern format - < posts.kern",
		RunE: func(c *cobra.Command, paths []string) error {
			if len(paths) == 1 && paths[0] == "-" {
				text, err := io.ReadAll(c.InOrStdin())
				if err != nil {
					return err
				}
				done := lang.Format(string(text))
				if check {
					if done != string(text) {
						fmt.Fprintln(c.OutOrStdout(), "standard input is not in the layout")
						return errWrong
					}
					return nil
				}
				_, err = io.WriteString(c.OutOrStdout(), done)
				return err
			}
			w, err := openWorkspace(paths)
			if err != nil {
				return err
			}
			return w.format(c.OutOrStdout(), check)
		},
	}
	c.Flags().BoolVar(&check, "check", false, "write nothing, list what would change, exit 1 if anything would")
	return c
}

func (w *workspace) format(out io.Writer, check bool) error {
	changed := false
	for _, name := range w.names {
		text, err := w.read(name)
		if err != nil {
			return fmt.Errorf("%s: %w", w.show(name), err)
		}
		done := lang.Format(text)
		if done == text {
			continue
		}
		changed = true
		fmt.Fprintln(out, w.show(name))
		if check {
			continue
		}
		if err := w.replace(name, done); err != nil {
			return fmt.Errorf("%s: %w", w.show(name), err)
		}
	}
	if check && changed {
		return errWrong
	}
	return nil
}

// replace writes a file whole or not at all: beside it first, then over it.
func (w *workspace) replace(name, text string) error {
	local := filepath.FromSlash(name)
	info, err := w.root.Stat(local)
	if err != nil {
		return reason(err)
	}
	beside := local + ".new"
	f, err := w.root.OpenFile(beside, os.O_WRONLY|os.O_CREATE|os.O_EXCL, info.Mode().Perm())
	if err != nil {
		return reason(err)
	}
	_, err = f.WriteString(text)
	if err == nil {
		err = f.Sync()
	}
	if closed := f.Close(); err == nil {
		err = closed
	}
	if err == nil {
		err = w.root.Rename(beside, local)
	}
	if err != nil {
		if gone := w.root.Remove(beside); gone != nil {
			return fmt.Errorf("%w (and %s is left behind)", reason(err), beside)
		}
		return reason(err)
	}
	return nil
}
