package main

import (
	"errors"
	"fmt"
	"io"
	"os"
	"path"
	"path/filepath"
	"slices"
	"strconv"
	"strings"

	"kern/checker"
	"kern/checker/output"
	"kern/checker/review"
	verdict "kern/checker/standard"
	"kern/lang"
	"kern/lsp/disk"
	"kern/lsp/history"

	"github.com/spf13/cobra"
)

// reviewOptions are the flags of kern review.
type reviewOptions struct {
	format, link    string
	strict, merge   bool
	textconv, setup bool
}

func reviewCommand() *cobra.Command {
	o := reviewOptions{format: "text"}
	c := &cobra.Command{
		Use:   "review [BASE [HEAD]] [-- PATH…]",
		Short: "Say what changed between two states, and which edits did it",
		Long: "review compares two states of the calculations: what fails now, what changed, and how\n" +
			"much of it each edit brought about. The states are branches, tags or commits of the\n" +
			"git repository, read without a checkout, or two folders or two files. Without HEAD\n" +
			"the later state is the working directory; without BASE the earlier one is where HEAD\n" +
			"parts from the default branch. Paths behind -- narrow it to folders or files. Two names\n" +
			"that are folders are taken for folders: a branch of such a name is refs/heads/NAME.\n\n" +
			"--merge OURS THEIRS merges two commits as git does by text, and tells of members that\n" +
			"are right on either side and not together.\n\n" +
			"Exit status: 0 nothing got worse; 1 a member fails or is undecided, or the text has an\n" +
			"error, and did not before (with --strict also when a limit, requirement or factor was\n" +
			"loosened, a departure added or a reason reworded; with --merge when something is wrong\n" +
			"in the merged state alone, or it does not merge); 2 the command itself could not run.",
		Example: "  kern review\n  kern review main --output markdown > comment.md\n  kern review v1.2 HEAD -- frame/\n  kern review issued/ working/\n  kern review --merge main HEAD\n  kern review --driver",
		RunE: func(c *cobra.Command, args []string) error {
			var paths []string
			if n := c.ArgsLenAtDash(); n >= 0 {
				args, paths = args[:n], args[n:]
			}
			return o.run(c.OutOrStdout(), args, paths)
		},
	}
	c.Flags().StringVarP(&o.format, "output", "o", o.format, "form of the review: text, markdown, html or json")
	c.Flags().StringVar(&o.link, "link", "", "address of a line, with {file} and {line}: https://host/project/blob/branch/{file}#L{line}")
	c.Flags().BoolVar(&o.strict, "strict", false, "exit 1 too when anything was loosened, departed from or reworded")
	c.Flags().BoolVar(&o.merge, "merge", false, "review the merge of the two commits")
	c.Flags().BoolVar(&o.textconv, "textconv", false, "print one file with the results beside its members, for git diff")
	c.Flags().BoolVar(&o.setup, "driver", false, "print how git shows results in its diffs")
	completeWords(c, "output", "text", "markdown", "html", "json")
	return c
}

// shownRows bounds the changed members in a text or a comment.
const shownRows = 25

func (o *reviewOptions) run(out io.Writer, args, paths []string) error {
	if !slices.Contains([]string{"text", "markdown", "html", "json"}, o.format) {
		return fmt.Errorf("--output is text, markdown, html or json, not '%s'", o.format)
	}
	switch {
	case o.setup:
		_, err := io.WriteString(out, driverRecipe)
		return err
	case o.textconv:
		if len(args) != 1 {
			return errors.New("--textconv takes one file")
		}
		return annotate(out, args[0])
	case o.merge && len(args) != 2:
		return errors.New("--merge takes two commits: kern review --merge OURS THEIRS")
	case len(args) > 2:
		return errors.New("review takes two states at most; paths stand behind --")
	}
	var r *review.Review
	f := output.ReviewForm{Program: program(), Merge: o.merge, Names: func(n string) string { return n }}
	if o.format != "json" && o.format != "html" {
		f.Rows = shownRows
	}
	if o.link != "" {
		f.Link = func(p review.Place) string {
			if p.Before {
				return "" // the line is not there any more
			}
			return strings.NewReplacer("{file}", (&pathEscaper{p.File}).String(), "{line}", strconv.Itoa(p.Line)).Replace(o.link)
		}
	}
	before, after, err := o.states(args, paths, &f)
	if err != nil {
		return err
	}
	if o.merge {
		merged, err := mergedStates(args, paths, &f)
		if errors.Is(err, history.ErrConflict) {
			fmt.Fprintf(os.Stderr, "kern: %v: git cannot merge them by itself\n", err)
			return errWrong
		}
		if err != nil {
			return err
		}
		before, after = merged.base, merged.report
	}
	r = review.Compare(before, after)
	switch o.format {
	case "json":
		err = output.ReviewJSON(out, r, f)
	case "html":
		_, err = io.WriteString(out, output.ReviewHTML(r, f))
	default:
		_, err = io.WriteString(out, output.ReviewPage(r, f, o.format == "markdown"))
	}
	if err != nil {
		return err
	}
	bad := r.Worse() || o.strict && len(r.Loosened) > 0
	if o.merge {
		bad = len(f.Together) > 0 || o.strict && len(r.Loosened) > 0
	}
	if bad {
		return errWrong
	}
	return nil
}

// pathEscaper writes a file's name as a part of an address.
type pathEscaper struct{ name string }

// String escapes what an address may not have in it.
func (p *pathEscaper) String() string {
	return strings.NewReplacer("%", "%25", "#", "%23", "?", "%3F").Replace(p.name)
}

// states finds the two states that the arguments mean, and works them out.
func (o *reviewOptions) states(args, paths []string, f *output.ReviewForm) (before, after *checker.Report, err error) {
	if o.merge {
		return nil, nil, nil
	}
	if len(args) == 2 {
		one, two := kindOfPath(args[0]), kindOfPath(args[1])
		if one != absent && one == two {
			if len(paths) > 0 {
				return nil, nil, errors.New("paths behind -- go with commits; two folders are compared whole")
			}
			return compareOnDisk(args[0], args[1], one, f)
		}
		if one != absent && two != absent {
			return nil, nil, fmt.Errorf("'%s' and '%s' are a folder and a file: give two folders, two files or two commits", args[0], args[1])
		}
	}
	c, err := openCheckout(paths)
	if err != nil {
		return nil, nil, err
	}
	defer c.folder.Close()
	head, err := c.repo.Commit("HEAD")
	if err != nil {
		return nil, nil, err
	}
	var later history.Texts = working{c}
	f.After = "the working directory"
	if len(args) == 2 {
		if head, err = c.repo.Commit(args[1]); err != nil {
			return nil, nil, err
		}
		later, f.After = head, head.Title()
	}
	var base *history.Commit
	if len(args) > 0 {
		base, err = c.repo.Commit(args[0])
		if err != nil && kindOfPath(args[0]) != absent {
			err = fmt.Errorf("%w; it is a folder or file: two are compared with one another, and paths stand behind --", err)
		}
	} else {
		var branch *history.Commit
		if branch, err = c.repo.Default(); err == nil {
			base, err = c.repo.MergeBase(head, branch)
		}
	}
	if err != nil {
		return nil, nil, err
	}
	f.Before, f.Names = base.Title(), c.show
	return c.check(base, later)
}

// compareOnDisk reviews two folders or two files.
func compareOnDisk(one, two string, kind pathKind, f *output.ReviewForm) (before, after *checker.Report, err error) {
	f.Before, f.After = filepath.ToSlash(one), filepath.ToSlash(two)
	if kind == isFile {
		before, err = checkFile(one)
		if err == nil {
			after, err = checkFile(two)
		}
		f.Names = func(n string) string { return beside(filepath.ToSlash(two), n) }
		return before, after, err
	}
	if before, err = checkFolder(one); err == nil {
		after, err = checkFolder(two)
	}
	f.Names = func(n string) string { return path.Join(filepath.ToSlash(two), n) }
	return before, after, err
}

type pathKind uint8

const (
	absent pathKind = iota
	isFile
	isFolder
)

func kindOfPath(p string) pathKind {
	info, err := os.Stat(p)
	switch {
	case err != nil:
		return absent
	case info.IsDir():
		return isFolder
	}
	return isFile
}

// checkFolder works out the calculations of a folder. Includes stay inside it.
func checkFolder(p string) (*checker.Report, error) {
	dir, err := filepath.Abs(p)
	if err != nil {
		return nil, err
	}
	folder, err := disk.Open(dir)
	if err != nil {
		return nil, fmt.Errorf("%s: %w", p, reason(err))
	}
	defer folder.Close()
	names, err := folder.Find(dir)
	if err != nil {
		return nil, err
	}
	return checker.Check(lang.Load(names, folder.Read, nil), nil), nil
}

// ups is how many folders up the includes of a file that is compared may lead.
const ups = 8

// checkFile works out one file, under a name that is the same for every file: two
// files that are compared are two states of one.
func checkFile(p string) (*checker.Report, error) {
	absolute, err := filepath.Abs(p)
	if err != nil {
		return nil, err
	}
	folder, err := disk.Open(disk.Checkout(filepath.Dir(absolute)))
	if err != nil {
		return nil, fmt.Errorf("%s: %w", p, reason(err))
	}
	defer folder.Close()
	name, err := folder.Name(absolute)
	if err != nil {
		return nil, err
	}
	if _, err := folder.Read(name); err != nil {
		return nil, fmt.Errorf("%s: %w", p, err)
	}
	own := strings.Repeat("_/", ups) + "calculation" + extension
	read := func(n string) (string, error) {
		if n == own {
			return folder.Read(name)
		}
		n = beside(name, n)
		if strings.HasPrefix(n, "../") {
			return "", errors.New("it lies outside of the workspace")
		}
		return folder.Read(n)
	}
	return checker.Check(lang.Load([]string{own}, read, nil), nil), nil
}

// beside is the name of a file that checkFile read, as seen from the file that was
// asked for.
func beside(file, n string) string {
	up := ups
	for ; up > 0 && strings.HasPrefix(n, "_/"); up-- {
		n = n[2:]
	}
	if up == 0 && n == "calculation"+extension {
		return file
	}
	return path.Join(path.Dir(file), strings.Repeat("../", up)+n)
}

// checkout is a working directory with its repository.
type checkout struct {
	folder *disk.Folder
	repo   *history.Repository
	here   string
	below  []string // names of the folders and files that are reviewed
}

// openCheckout opens the checkout around the working directory. Without paths the
// working directory itself is reviewed, as it is checked.
func openCheckout(paths []string) (*checkout, error) {
	here, err := os.Getwd()
	if err != nil {
		return nil, err
	}
	c := &checkout{here: here}
	dir := disk.Checkout(here)
	if c.repo, err = history.Open(dir); err != nil {
		if errors.Is(err, history.ErrNone) {
			err = errors.New("the working directory lies in no git repository: compare two folders or files, kern review OLD NEW")
		}
		return nil, err
	}
	if c.folder, err = disk.Open(dir); err != nil {
		return nil, err
	}
	if len(paths) == 0 {
		paths = []string{"."}
	}
	for _, p := range paths {
		absolute, err := filepath.Abs(p)
		if err != nil {
			return nil, err
		}
		if !disk.Inside(dir, absolute) {
			return nil, fmt.Errorf("%s lies outside of the repository", p)
		}
		name, err := c.folder.Name(absolute)
		if err != nil {
			return nil, err
		}
		c.below = append(c.below, name)
	}
	return c, nil
}

// show is a name of the repository as it is printed: as the working directory
// sees it.
func (c *checkout) show(name string) string {
	rel, err := filepath.Rel(c.here, c.folder.Path(name))
	if err != nil {
		return name
	}
	return filepath.ToSlash(rel)
}

// working is the working directory as a state.
type working struct{ *checkout }

// List lists the calculations at a name.
func (w working) List(name string) ([]string, error) {
	absolute := w.folder.Path(name)
	if kindOfPath(absolute) == absent {
		return nil, nil // it may be in the other state
	}
	found, err := w.folder.Find(absolute)
	foreign := map[string]bool{".": false}
	return slices.DeleteFunc(found, func(n string) bool { return w.foreign(path.Dir(n), foreign) }), err
}

// foreign tells whether a folder lies in a checkout of its own, such as that of a
// submodule, which a commit does not hold. known remembers the answers.
func (w working) foreign(dir string, known map[string]bool) bool {
	if is, ok := known[dir]; ok {
		return is
	}
	_, err := w.folder.Root().Lstat(filepath.Join(filepath.FromSlash(dir), ".git"))
	known[dir] = err == nil || w.foreign(path.Dir(dir), known)
	return known[dir]
}

// Read gives the text of a file.
func (w working) Read(name string) (string, error) { return w.folder.Read(name) }

// load reads the calculations of a state. What is as in another state is taken
// over from there; other may be nil.
func (c *checkout) load(t history.Texts, other *lang.Project) (*lang.Project, error) {
	var names []string
	for _, below := range c.below {
		list, err := t.List(below)
		if err != nil {
			return nil, err
		}
		for _, n := range list {
			if !slices.Contains(names, n) {
				names = append(names, n)
			}
		}
	}
	return lang.Load(names, t.Read, other), nil
}

// check works out two states. What is the same in both is worked out once.
func (c *checkout) check(earlier, later history.Texts) (before, after *checker.Report, err error) {
	b, err := c.load(earlier, nil)
	if err != nil {
		return nil, nil, err
	}
	a, err := c.load(later, b)
	if err != nil {
		return nil, nil, err
	}
	if len(b.Files) == 0 && len(a.Files) == 0 {
		return nil, nil, fmt.Errorf("there is no calculation (*%s) in either state", extension)
	}
	bar := newBar(os.Stderr)
	defer bar.finish()
	before = checker.Check(b, bar.tell)
	return before, checker.CheckAgain(before, a, bar.tell), nil
}

// mergedState is the merge of two commits with where they part.
type mergedState struct{ base, report *checker.Report }

// mergedStates merges two commits and finds the members that are right on either
// side and not together.
func mergedStates(args, paths []string, f *output.ReviewForm) (*mergedState, error) {
	c, err := openCheckout(paths)
	if err != nil {
		return nil, err
	}
	defer c.folder.Close()
	f.Names = c.show
	ours, err := c.repo.Commit(args[0])
	if err != nil {
		return nil, err
	}
	theirs, err := c.repo.Commit(args[1])
	if err != nil {
		return nil, err
	}
	base, err := c.repo.MergeBase(ours, theirs)
	if err != nil {
		return nil, err
	}
	f.Before, f.After = base.Title(), "the merge of "+ours.Title()+" and "+theirs.Title()
	merged := history.Merged{Base: base, Ours: ours, Theirs: theirs}
	var conflict error
	project, err := c.load(watched{merged, &conflict}, nil)
	if err != nil {
		return nil, err
	}
	if conflict != nil {
		return nil, conflict
	}
	out := &mergedState{report: checker.Check(project, nil)}
	b, err := c.load(base, nil)
	if err != nil {
		return nil, err
	}
	out.base = checker.Check(b, nil)
	bad := map[string]bool{} // on one of the sides
	key := func(m *checker.Result) string { return m.Member.Decl.File.Name + "\x00" + m.Name }
	for _, side := range []history.Texts{ours, theirs} {
		p, err := c.load(side, nil)
		if err != nil {
			return nil, err
		}
		for _, m := range checker.Check(p, nil).Members {
			if m.Verdict != verdict.Passes {
				bad[key(m)] = true
			}
		}
	}
	for _, m := range out.report.Members {
		if m.Verdict != verdict.Passes && !bad[key(m)] {
			f.Together = append(f.Together, m.Name)
		}
	}
	return out, nil
}

// watched notes files that do not merge.
type watched struct {
	history.Merged
	conflict *error
}

// Read gives the text of a merged file.
func (w watched) Read(name string) (string, error) {
	text, err := w.Merged.Read(name)
	if errors.Is(err, history.ErrConflict) && *w.conflict == nil {
		*w.conflict = fmt.Errorf("%s: %w", name, err)
	}
	return text, err
}
