package main

import (
	"errors"
	"fmt"
	"io"
	"os"
	"slices"
	"strings"
	"sync"
	"time"

	"kern/checker"
	"kern/checker/output"
	"kern/checker/record"
	"kern/lang"

	"github.com/schollz/progressbar/v3"
	"github.com/spf13/cobra"
	"golang.org/x/term"
)

// forms are the forms of a report.
var forms = []string{"text", "json", "sarif", "junit", "github"}

func checkCommand() *cobra.Command {
	format, recorded, tolerance := "text", false, -1.0
	c := &cobra.Command{
		Use:   "check [PATH…]",
		Short: "Check every member of the calculations",
		Long: "check reads the calculations (files, or folders walked for *.kern; the working\n" +
			"directory without a path) and checks every member.\n\n" +
			"With --recorded the results are held against those that kern record has written\n" +
			"(" + record.FileName + " beside the calculations): a difference is an error, and known\n" +
			"failures that the record carries do not block.\n\n" +
			"Exit status: 0 every member passes and no file has an error; 1 a member fails or is\n" +
			"undecided, or a file has an error; 2 the command itself could not run. With\n" +
			"--recorded: 0 when nothing but carried failures is wrong and all is as recorded.",
		Example: "  kern check\n  kern check frame/ --output json\n  kern check --recorded --output github",
		RunE: func(c *cobra.Command, paths []string) error {
			if !slices.Contains(forms, format) {
				return fmt.Errorf("--output is %s, not '%s'", lang.OrList(forms), format)
			}
			if c.Flags().Changed("tolerance") && (!recorded || !(tolerance >= 0 && tolerance <= 0.1)) {
				return errors.New("--tolerance is a number from 0 to 0.1 and goes with --recorded")
			}
			w, err := openWorkspace(paths)
			if err != nil {
				return err
			}
			report := w.check(os.Stderr)
			var known *record.Outcome
			names := w.show
			if recorded {
				shelf, err := w.shelf(paths)
				if err != nil {
					return err
				}
				r, err := shelf.read()
				if err != nil {
					return err
				}
				names = shelf.name
				known = record.Compare(report, r, tolerance, shelf.name)
			}
			if err := printReport(c.OutOrStdout(), format, w, report, known, names); err != nil {
				return err
			}
			if known == nil && report.Summary.Failed() || known != nil && known.Blocked {
				return errWrong
			}
			return nil
		},
	}
	c.Flags().StringVarP(&format, "output", "o", format, "form of the report: "+strings.Join(forms, ", "))
	c.Flags().BoolVar(&recorded, "recorded", false, "hold the results against the recorded ones")
	c.Flags().Float64Var(&tolerance, "tolerance", -1, "by how much a utilisation may differ from the recorded one; the record's own without it")
	completeWords(c, "output", forms...)
	return c
}

// printReport writes a report in one of the forms. recorded turns names of files
// into those of the record.
func printReport(out io.Writer, form string, w *workspace, r *checker.Report, known *record.Outcome, recorded output.Names) error {
	whole := func(name string) string { return name } // from the checkout, as build servers count
	switch form {
	case "json":
		return output.JSON(out, r, program(), w.show, known)
	case "sarif":
		return output.SARIF(out, r, program(), known, recorded)
	case "junit":
		return output.JUnit(out, r, whole, known, recorded)
	case "github":
		return output.Annotations(out, r, known, recorded)
	}
	return output.Text(out, r, style(out), w.show, known)
}

// completeWords offers the values of a flag in shell completion.
func completeWords(c *cobra.Command, flag string, words ...string) {
	if err := c.RegisterFlagCompletionFunc(flag, cobra.FixedCompletions(words, cobra.ShellCompDirectiveNoFileComp)); err != nil {
		panic(err) // the flag does not exist: a defect of this program
	}
}

// check works out the calculations of a workspace, with a progress bar on a
// terminal when it takes more than a second.
func (w *workspace) check(terminal *os.File) *checker.Report {
	project := lang.Load(w.names, w.read, nil)
	bar := newBar(terminal)
	defer bar.finish()
	return checker.Check(project, bar.tell)
}

// bar is a progress bar that shows itself only when there is time to look.
type bar struct {
	terminal *os.File
	what     string // is being done
	started  time.Time
	mu       sync.Mutex
	shown    *progressbar.ProgressBar
	last     int
}

func newBar(terminal *os.File) *bar {
	return &bar{terminal: terminal, what: "checking members", started: time.Now()}
}

func (b *bar) tell(done, all int) {
	if done%64 != 0 && done != all || !term.IsTerminal(int(b.terminal.Fd())) || time.Since(b.started) < time.Second {
		return
	}
	b.mu.Lock()
	defer b.mu.Unlock()
	if b.shown == nil {
		b.shown = progressbar.NewOptions(all, progressbar.OptionSetWriter(b.terminal), progressbar.OptionSetDescription(b.what),
			progressbar.OptionShowCount(), progressbar.OptionClearOnFinish(), progressbar.OptionThrottle(100*time.Millisecond))
	}
	if done > b.last {
		b.last = done
		if err := b.shown.Set(done); err != nil {
			return // a bar that cannot be drawn is no reason to stop checking
		}
	}
}

func (b *bar) finish() {
	b.mu.Lock()
	defer b.mu.Unlock()
	if b.shown != nil {
		if err := b.shown.Finish(); err != nil {
			return // nothing depends on the bar
		}
	}
}

// style finds out how the output may look: colour on a terminal alone, and
// never with NO_COLOR.
func style(out io.Writer) output.Style {
	f, ok := out.(*os.File)
	if !ok || !term.IsTerminal(int(f.Fd())) {
		return output.Style{}
	}
	s := output.Style{Colour: os.Getenv("NO_COLOR") == "" && os.Getenv("TERM") != "dumb"}
	if width, _, err := term.GetSize(int(f.Fd())); err == nil {
		s.Width = width
	}
	return s
}
