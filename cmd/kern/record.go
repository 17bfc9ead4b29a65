package main

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"strings"

	"kern/checker/record"

	"github.com/spf13/cobra"
)

// shelf is where the record of some paths lies: the folder that is common to them.
type shelf struct {
	w      *workspace
	folder string // absolute
}

// shelf finds where the record of the paths lies.
func (w *workspace) shelf(paths []string) (*shelf, error) {
	folder := ""
	if len(paths) == 0 {
		paths = []string{"."}
	}
	for _, p := range paths {
		a, err := filepath.Abs(p)
		if err != nil {
			return nil, err
		}
		if info, err := os.Stat(a); err != nil {
			return nil, fmt.Errorf("%s: %w", p, reason(err))
		} else if !info.IsDir() {
			a = filepath.Dir(a)
		}
		if folder == "" {
			folder = a
		}
		for folder != a && !strings.HasPrefix(a, strings.TrimSuffix(folder, string(filepath.Separator))+string(filepath.Separator)) {
			folder = filepath.Dir(folder)
		}
	}
	return &shelf{w, folder}, nil
}

func (s *shelf) path() string { return filepath.Join(s.folder, record.FileName) }

// name is a name of the workspace as the record has it: from the record's folder,
// with slashes.
func (s *shelf) name(name string) string {
	rel, err := filepath.Rel(s.folder, s.w.folder.Path(name))
	if err != nil {
		return name
	}
	return filepath.ToSlash(rel)
}

// read reads the record.
func (s *shelf) read() (*record.Record, error) {
	text, err := os.ReadFile(s.path())
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return nil, fmt.Errorf("%s: nothing is recorded yet; run kern record", s.show())
	case err != nil:
		return nil, fmt.Errorf("%s: %w", s.show(), reason(err))
	}
	r, err := record.Read(string(text))
	if err != nil {
		return nil, fmt.Errorf("%s: %w", s.show(), err)
	}
	return r, nil
}

func (s *shelf) show() string {
	if rel, err := filepath.Rel(s.w.here, s.path()); err == nil {
		return filepath.ToSlash(rel)
	}
	return s.path()
}

func recordCommand() *cobra.Command {
	carry, because, tolerance := false, "", record.DefaultTolerance
	c := &cobra.Command{
		Use:   "record [PATH…]",
		Short: "Record the results, so that they cannot change unseen",
		Long: "record checks the calculations and writes the verdict and the utilisation of every\n" +
			"member into " + record.FileName + ", in the folder that holds the paths. Keep it in version\n" +
			"control: kern check --recorded then fails when a result differs, whether by an edit or\n" +
			"by a new version of kern.\n\n" +
			"Members that fail or are undecided are recorded as they are and go on blocking, unless\n" +
			"--carry-failures says with a reason that they are known. Those carried before stay\n" +
			"carried as long as they are no worse.",
		Example: "  kern record\n  kern record frame/ --carry-failures --because \"existing hall, load unchanged\"",
		RunE: func(c *cobra.Command, paths []string) error {
			switch {
			case carry && strings.TrimSpace(because) == "":
				return errors.New("--carry-failures needs a reason: --because \"…\"")
			case !carry && because != "":
				return errors.New("--because goes with --carry-failures")
			case !(tolerance >= 0 && tolerance <= 0.1):
				return errors.New("--tolerance is a number from 0 to 0.1")
			}
			w, err := openWorkspace(paths)
			if err != nil {
				return err
			}
			s, err := w.shelf(paths)
			if err != nil {
				return err
			}
			var before *record.Record
			if _, err := os.Stat(s.path()); err == nil {
				if before, err = s.read(); err != nil {
					return err
				}
			}
			report := w.check(os.Stderr)
			now := record.Of(report, s.name)
			now.Program = program()
			if before != nil {
				now.Tolerance = before.Tolerance
			}
			if c.Flags().Changed("tolerance") {
				now.Tolerance = tolerance
			}
			left := now.Carry(before, because)
			var b bytes.Buffer
			if err := now.Write(&b); err != nil {
				return err
			}
			if err := os.WriteFile(s.path(), b.Bytes(), 0o666); err != nil {
				return fmt.Errorf("%s: %w", s.show(), reason(err))
			}
			out := c.OutOrStdout()
			fmt.Fprintf(out, "%s: %d members recorded", s.show(), len(now.Entries))
			carried := 0
			for _, e := range now.Entries {
				if e.Carried != "" {
					carried++
				}
			}
			if carried > 0 {
				fmt.Fprintf(out, ", %d known failures carried", carried)
			}
			fmt.Fprintln(out)
			for _, e := range left {
				fmt.Fprintf(out, "%s %s %s and is not carried: kern check --recorded fails on it\n", e.File, e.Name, map[string]string{"fails": "fails", "undecided": "is undecided"}[e.Verdict])
			}
			return nil
		},
	}
	c.Flags().BoolVar(&carry, "carry-failures", false, "carry the members that fail or are undecided now: they are listed and do not block")
	c.Flags().StringVar(&because, "because", "", "why they are carried")
	c.Flags().Float64Var(&tolerance, "tolerance", record.DefaultTolerance, "by how much a utilisation may differ from the recorded one")
	return c
}
