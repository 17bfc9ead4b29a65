package main

import (
	"context"
	"fmt"
	"io"
	"io/fs"
	"math"
	"os"
	"os/signal"
	"path/filepath"
	"slices"
	"strings"
	"time"

	"kern/checker"
	"kern/checker/output"
	"kern/lang"

	"github.com/fsnotify/fsnotify"
	"github.com/spf13/cobra"
)

// settle is how long the files must be left alone before they are read: editors
// save in several steps.
const settle = 120 * time.Millisecond

func watchCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "watch [PATH…]",
		Short: "Check again whenever a file is saved",
		Long: "watch checks the calculations, and again whenever one of their files is saved, until\n" +
			"it is interrupted (Ctrl-C). After the first report it prints what has changed: members\n" +
			"that newly fail, that pass again, and other utilisations.",
		RunE: func(c *cobra.Command, paths []string) error {
			ctx, stop := signal.NotifyContext(c.Context(), os.Interrupt)
			defer stop()
			w, err := newWatching(c.OutOrStdout(), paths)
			if err != nil {
				return err
			}
			saved, err := w.saves(ctx)
			if err != nil {
				return err
			}
			w.first()
			w.loop(ctx, saved, settle)
			return nil
		},
	}
}

// watching is a set of paths that is checked again and again.
type watching struct {
	out     io.Writer
	paths   []string
	project *lang.Project
	report  *checker.Report
	watcher *fsnotify.Watcher
	broken  string // why the paths could not be read last time
}

func newWatching(out io.Writer, paths []string) (*watching, error) {
	if _, err := openWorkspace(paths); err != nil {
		return nil, err
	}
	return &watching{out: out, paths: paths}, nil
}

// saves tells of files that were written, renamed or removed in the folders of the
// paths.
func (w *watching) saves(ctx context.Context) (<-chan struct{}, error) {
	watcher, err := fsnotify.NewWatcher()
	if err != nil {
		return nil, fmt.Errorf("files cannot be watched here: %w", err)
	}
	w.watcher = watcher
	paths := w.paths
	if len(paths) == 0 {
		paths = []string{"."}
	}
	for _, p := range paths {
		if info, err := os.Stat(p); err == nil && !info.IsDir() {
			p = filepath.Dir(p)
		}
		w.add(p)
	}
	out := make(chan struct{}, 1)
	go func() {
		defer watcher.Close()
		for {
			select {
			case <-ctx.Done():
				return
			case e, ok := <-watcher.Events:
				if !ok {
					return
				}
				if info, err := os.Stat(e.Name); err == nil && info.IsDir() {
					w.add(e.Name)
				} else if !matters(e) {
					continue
				}
				select {
				case out <- struct{}{}:
				default: // it is told already
				}
			case err, ok := <-watcher.Errors:
				if !ok {
					return
				}
				fmt.Fprintln(os.Stderr, "kern: watching:", err)
			}
		}
	}()
	return out, nil
}

// matters tells whether an event is about what calculations are made of.
func matters(e fsnotify.Event) bool {
	ext := filepath.Ext(e.Name)
	return (ext == extension || ext == ".csv") && e.Op&^fsnotify.Chmod != 0
}

// add watches a folder and those in it. One that cannot be watched is told of.
func (w *watching) add(folder string) {
	err := filepath.WalkDir(folder, func(path string, d fs.DirEntry, err error) error {
		if err != nil || !d.IsDir() {
			return nil // what cannot be read is no calculation
		}
		if name := d.Name(); path != folder && (strings.HasPrefix(name, ".") || name == "node_modules") {
			return fs.SkipDir
		}
		return w.watcher.Add(path)
	})
	if err != nil {
		fmt.Fprintf(os.Stderr, "kern: %s is not watched: %v\n", folder, err)
	}
}

// loop checks after every burst of saves, until ctx ends.
func (w *watching) loop(ctx context.Context, saved <-chan struct{}, settle time.Duration) {
	for {
		select {
		case <-ctx.Done():
			return
		case _, ok := <-saved:
			if !ok {
				return
			}
		}
		for quiet := time.NewTimer(settle); ; {
			select {
			case <-ctx.Done():
				return
			case _, ok := <-saved:
				if !ok {
					return
				}
				quiet.Reset(settle)
				continue
			case <-quiet.C:
			}
			break
		}
		w.again()
	}
}

// check reads the paths and checks what changed.
func (w *watching) check() (*workspace, *checker.Report, error) {
	space, err := openWorkspace(w.paths)
	if err != nil {
		return nil, nil, err
	}
	w.project = lang.Load(space.names, space.read, w.project)
	return space, checker.CheckAgain(w.report, w.project, nil), nil
}

// first prints the whole report.
func (w *watching) first() {
	space, report, err := w.check()
	if err != nil {
		fmt.Fprintln(w.out, "kern:", err)
		return
	}
	w.report = report
	if err := output.Text(w.out, report, style(w.out), space.show, nil); err != nil {
		fmt.Fprintln(w.out, "kern:", err)
	}
	fmt.Fprintln(w.out, "\nwatching for changes; Ctrl-C ends it")
}

// again checks and prints what is other than before.
func (w *watching) again() {
	space, report, err := w.check()
	if err != nil {
		if w.broken != err.Error() {
			fmt.Fprintln(w.out, "kern:", err)
		}
		w.broken = err.Error()
		return
	}
	w.broken = ""
	lines := changes(w.report, report, space.show)
	w.report = report
	if len(lines) == 0 {
		return
	}
	fmt.Fprintln(w.out)
	for _, l := range lines {
		fmt.Fprintln(w.out, l)
	}
	fmt.Fprintln(w.out, output.Counts(report.Summary))
}

// changes lists what is other in a report than in the one before: errors that are
// new, members whose verdict or utilisation changed.
func changes(before, now *checker.Report, show output.Names) []string {
	var out []string
	said := map[string]int{}
	key := func(d checker.Diagnostic) string { return d.File + "\n" + d.Rule + "\n" + d.Message }
	old := map[string]string{}
	if before != nil {
		for _, d := range before.Diagnostics {
			said[key(d)]++
		}
		for _, m := range before.Members {
			file, _ := before.Place(m)
			old[file+"\n"+m.Name] = state(m)
		}
	}
	for _, d := range now.Diagnostics {
		if k := key(d); said[k] > 0 {
			said[k]--
		} else if d.Severity == lang.Error && d.Member == "" {
			out = append(out, show(d.File)+": "+d.Rule+": "+d.Message)
		}
	}
	for _, m := range now.Members {
		file, _ := now.Place(m)
		k := file + "\n" + m.Name
		was, known := old[k]
		delete(old, k)
		switch is := state(m); {
		case !known:
			out = append(out, m.Name+" is new: "+is)
		case was != is:
			out = append(out, m.Name+": "+was+" → "+is)
		}
	}
	var gone []string
	for k := range old {
		_, name, _ := strings.Cut(k, "\n")
		gone = append(gone, name+" is gone")
	}
	slices.Sort(gone)
	return append(out, gone...)
}

// state is a member's result in a few words.
func state(m *checker.Result) string {
	if math.IsNaN(m.Utilisation) {
		return m.Verdict.String()
	}
	return fmt.Sprintf("%s %s, %s", m.Verdict, checker.Ratio(m.Utilisation), m.Governing)
}
