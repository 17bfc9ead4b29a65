package main

import (
	"fmt"
	"io"
	"os"
	"sync"
	"time"

	"kern/checker"
	"kern/checker/output"
	"kern/lang"

	"github.com/schollz/progressbar/v3"
	"github.com/spf13/cobra"
	"golang.org/x/term"
)

func checkCommand() *cobra.Command {
	format := "text"
	c := &cobra.Command{
		Use:   "check [PATH…]",
		Short: "Check every member of the calculations",
		Long: "check reads the calculations (files, or folders walked for *.kern; the working\n" +
			"directory without a path) and checks every member.\n\n" +
			"Exit status: 0 every member passes and no file has an error; 1 a member fails or is\n" +
			"undecided, or a file has an error; 2 the command itself could not run.",
		Example: "  kern check\n  kern check frame/ --output json",
		RunE: func(c *cobra.Command, paths []string) error {
			if format != "text" && format != "json" {
				return fmt.Errorf("--output is text or json, not '%s'", format)
			}
			w, err := openWorkspace(paths)
			if err != nil {
				return err
			}
			report := w.check(os.Stderr)
			out := c.OutOrStdout()
			if format == "json" {
				err = output.JSON(out, report, program(), w.show)
			} else {
				err = output.Text(out, report, style(out), w.show)
			}
			if err != nil {
				return err
			}
			if report.Summary.Failed() {
				return errWrong
			}
			return nil
		},
	}
	c.Flags().StringVarP(&format, "output", "o", format, "form of the report: text or json")
	completeWords(c, "output", "text", "json")
	return c
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
