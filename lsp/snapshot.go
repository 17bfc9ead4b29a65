package lsp

import (
	"context"
	"fmt"
	"runtime/debug"
	"sync"

	"kern/checker"
	"kern/checker/size"
	"kern/lang"

	"go.lsp.dev/protocol"
	"go.lsp.dev/uri"
)

// Snapshot is one state of a workspace. It is immutable and is read and checked
// when somebody first asks, once.
type Snapshot struct {
	workspace *workspace
	sequence  uint64
	open      map[string]*document
	owned     []string
	unit      encoding

	once    sync.Once
	loaded  chan struct{} // closed when the files have been read
	checked chan struct{} // closed when the members have been worked out
	project *lang.Project
	report  *checker.Report
	err     error
	sized   sync.Map // what makes a member pass, by its result: looked for when somebody first asks
}

// mends gives what makes a member pass, or what more one that passes may take.
func (s *Snapshot) mends(r *checker.Result) []size.Mend {
	find, _ := s.sized.LoadOrStore(r, sync.OnceValue(func() []size.Mend { return size.Mends(s.report, r, size.Options{}) }))
	return find.(func() []size.Mend)()
}

// wait has the snapshot worked out up to a stage. Only the waiting can be
// cancelled: what has begun serves the next who asks.
func (s *Snapshot) wait(ctx context.Context, stage <-chan struct{}) error {
	s.once.Do(func() {
		s.workspace.server.busy.begin()
		go func() {
			defer s.workspace.server.busy.end()
			s.work()
		}()
	})
	select {
	case <-stage:
		return s.err
	case <-ctx.Done():
		return ctx.Err()
	}
}

// work reads and checks. A panic in there is a defect of ours: it is logged and
// every request on the snapshot answered with it, and the session goes on.
func (s *Snapshot) work() {
	w := s.workspace
	stage := s.loaded
	defer func() {
		if r := recover(); r != nil {
			s.err = fmt.Errorf("%w: %v", errInternal, r)
			w.server.log.fail("internal error while checking: %v\n%s", r, debug.Stack())
			if stage == s.loaded {
				close(s.loaded)
			}
			close(s.checked)
		}
	}()
	s.project = lang.Load(w.names(s), w.reader(s), w.parsed.Load())
	w.parsed.Store(s.project)
	stage = s.checked
	close(s.loaded)
	w.check.Lock()
	defer w.check.Unlock()
	progress := w.server.newProgress("Checking " + w.title())
	s.report = checker.CheckAgain(w.report.Load(), s.project, progress.tell)
	progress.end()
	w.report.Store(s.report)
	close(s.checked)
}

func (w *workspace) title() string {
	if w.kind == scratchText {
		return "the unsaved text"
	}
	return w.base
}

// textOf is the text of a file of the project with its lines.
func (s *Snapshot) textOf(name string) *Text {
	if d := s.open[name]; d != nil {
		return d.text
	}
	file := s.project.Files[name]
	if file == nil {
		return NewText("")
	}
	if t, ok := s.workspace.lines.Load(name); ok && t.(*Text).s == file.Text {
		return t.(*Text)
	}
	t := NewText(file.Text)
	s.workspace.lines.Store(name, t)
	return t
}

// URI is the address of a file of the project, as the editor wrote it where it
// is open.
func (s *Snapshot) URI(name string) uri.URI {
	if d := s.open[name]; d != nil {
		return d.uri
	}
	if s.workspace.folder == nil {
		return uri.URI(name)
	}
	return uriOf(s.workspace.folder.Path(name))
}

// Range converts a span of a file.
func (s *Snapshot) Range(name string, span lang.Span) protocol.Range {
	return positions{s.textOf(name), s.unit}.rangeOf(span)
}

// Location converts a span of a file, with the file's address.
func (s *Snapshot) Location(name string, span lang.Span) protocol.Location {
	return protocol.Location{URI: s.URI(name), Range: s.Range(name, span)}
}

// Version is the version of a file that is open, nil for one that is not.
func (s *Snapshot) Version(name string) *int32 {
	if d := s.open[name]; d != nil {
		v := d.version
		return &v
	}
	return nil
}

// Project is the trees of the files.
func (s *Snapshot) Project() *lang.Project { return s.project }

// Report is what the checker says. It is nil in snapshots from parsed.
func (s *Snapshot) Report() *checker.Report { return s.report }
