// Package lsp is the language server: the only place that knows the protocol.
// What is said about a calculation comes from packages lang and checker; here
// it is turned into what an editor can show.
//
// # How a message goes
//
// guard.go reads it from the wire, answers what is no message, and reads ahead;
// what is written goes through a queue, so that neither side can block the
// other. dispatch.go holds the gate: cancellation, the stages of a session
// (before initialize, serving, after shutdown), panics, the words of errors.
// Then it meets a method of [Server].
//
// Messages are handled one after another on the goroutine that reads them.
// Methods that change something (sync.go, folders.go, watch.go, configure.go)
// stay on it: they change documents in the order of the wire, make a new
// [Snapshot] and return. Everything slow happens elsewhere. Methods that answer
// something begin with [Server.File] (or [Server.Parsed], when trees will do):
// that takes the snapshot as it is, lets the next message be read, and waits for
// the checker on the request's own goroutine.
//
// A [Snapshot] is one state of a workspace. It never changes. It is read and
// checked once, when somebody first asks; declarations and members that an edit
// did not touch are taken over from the snapshot before. A burst of changes makes
// many snapshots, of which only those are worked out that somebody asks for, and
// the newest.
//
// Inside, everything counts in bytes. positions.go converts at the edge, and
// nothing else does: use the methods of [File] and [Snapshot].
//
// # How to add a feature
//
// A feature is one file with three parts: its entry for the table, the methods
// of the protocol, and a plain function from a [File] to plain data. Add its
// entry to the list in features.go, its verb to the test scripts, and at least
// one archive for each thing that it shows.
//
//	var foldingFeature = feature{
//		name:    "folding",
//		methods: []string{protocol.MethodTextDocumentFoldingRange},
//		advertise: func(c *protocol.ServerCapabilities, client *Client) {
//			if t := client.Capabilities.TextDocument; t != nil && t.FoldingRange != nil {
//				c.FoldingRangeProvider = protocol.Boolean(true)
//			}
//		},
//	}
//
//	// FoldingRanges answers with the blocks that can be folded.
//	func (s *Server) FoldingRanges(ctx context.Context, p *protocol.FoldingRangeParams) ([]protocol.FoldingRange, error) {
//		f, err := s.Parsed(ctx, p.TextDocument.URI)
//		if f == nil || err != nil {
//			return nil, err
//		}
//		return folds(f), nil
//	}
//
// Advertise nothing that the client cannot use, and nothing that does nothing:
// TestAdvertised asks for every method of the table. A feature whose results
// change without an edit of their document names its refresh request, and the
// core sends it. Settings stand in the one table of settings.go; ask
// [Server.Settings] for them. Documents whose text the server makes register
// their scheme in contents (rulepages.go).
//
// What was before stands in past.go: the state of the last commit is read and
// checked once, in the background, and answers show it beside what is. A commit
// is noticed with the next question.
//
// # What happens to errors
//
//   - A file that no project has: File is nil without an error, and the answer is
//     empty. The client asked about something that has just gone.
//   - A document whose changes could not be applied: "content modified", until its
//     whole text comes. An answer would be about another text than the editor's.
//   - A request that was cancelled: "request cancelled". Return the context's
//     error; the gate finds the words. Cancellation ends the waiting, not the check:
//     that serves the next who asks.
//   - Parameters that cannot be read or make no sense: "invalid params".
//   - A defect: "internal error", to this request alone, with the stack in the log.
//     Panics need no care in features.
//   - A notification has no answer: its error is logged and the session goes on.
//   - What the user should know (a folder that cannot be read, a setting that does
//     not exist) is a log message, never a pop-up. What is wrong in a calculation is
//     a diagnostic and nothing else.
//   - Never answer with something out of date, never guess a number: what the
//     checker calls undecided is shown as undecided.
//
// # The test harness
//
// TestArchives plays testdata/TOPIC/*.txtar, one behaviour an archive:
//
//	What the archive shows, in a sentence.
//	-- client.json --
//	{"capabilities": {"textDocument": {"hover": null}}, "options": {}, "settings": {}, "folders": ["."], "commit": false}
//	-- a.kern --
//	column ⟦name:A1⟧ { section = "HEB 100"; load ⟦at⟧10 kN }
//	-- script --
//	open a.kern
//	change name "A2"
//	diagnostics
//	-- want --
//	> diagnostics
//	…
//
// The capabilities are laid over those of a client that can do everything; null
// takes one away. Files are written to a folder before the session begins, but
// for those below later/ and those that are called like an address
// (untitled:One). ⟦name⟧ marks a place and ⟦name:text⟧ a part; the marks are
// taken out, keep up with edits, and are what scripts speak of: no test counts
// lines. What a verb prints goes below its line in "want"; ranges are printed as
// marked text. go test ./lsp -update writes "want" anew: read what it wrote.
//
// verbs_test.go has the verbs of the core. A feature's test file adds its own:
//
//	func init() {
//		verbs["folds"] = func(s *scene, args []string) { … s.ask(method, params) … s.print(…) }
//	}
//
// Tests never sleep. session.settle waits until the server has done all that it
// was sent and the client has been told of it; the clock is moved by advance.
package lsp
