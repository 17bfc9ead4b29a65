package main

import (
	"errors"
	"fmt"
	"io"
	"os"
	"path"
	"path/filepath"
	"slices"
	"strings"

	"kern/checker"
	verdict "kern/checker/standard"
	"kern/lang"
	"kern/lsp/disk"
	"kern/lsp/history"
)

// driverRecipe says how git shows results in its diffs.
const driverRecipe = `git can show each member's result beside it in git diff, git show and git log -p:
what changed a result then shows as a changed line, even when the edit is elsewhere in the file.

1. In the repository, once for everybody, a line in .gitattributes:

       *.kern diff=kern

2. On each machine, once:

       git config diff.kern.textconv "kern review --textconv"
       git config diff.kern.xfuncname "^(column|strut|tie|section|material|case|level|basis)[ \t].*"

git diff --no-textconv shows the text alone. A diff with results is for reading: git apply takes
the text alone. Files that a calculation includes are read from the newest commit that has this
very file, and for a file that no commit has from the working directory.

A merge that is clean as text can still have members that fail:

       kern review --merge main HEAD

exits with 1 when a member is right on both sides and not together. Run it before a merge, or
from a hook:

       echo 'exec kern review --merge HEAD MERGE_HEAD' > .git/hooks/pre-merge-commit
       chmod +x .git/hooks/pre-merge-commit
`

// annotate prints a file with the results beside the first lines of its members.
func annotate(out io.Writer, file string) error {
	text, err := os.ReadFile(file)
	if err != nil {
		return fmt.Errorf("%s: %w", file, reason(err))
	}
	name, read, err := surroundings(file, string(text))
	if err != nil { // it stands alone
		name = filepath.Base(file)
		read = func(string) (string, error) { return "", errors.New("not known here") }
	}
	inner := read
	read = func(n string) (string, error) {
		if n == name {
			return string(text), nil
		}
		return inner(n)
	}
	r := checker.Check(lang.Load([]string{name}, read, nil), nil)
	lines := lang.NewLines(string(text))
	beside := map[int][]*checker.Result{}
	for _, m := range r.ResultsIn(name) {
		_, span := r.Place(m)
		i := lines.Line(span.Start)
		beside[i] = append(beside[i], m)
	}
	for i := range lines.Count() {
		start, end := lines.Start(i), lines.Start(i+1)
		line, content := string(text[start:end]), lines.Text(i)
		note := ""
		if list := beside[i]; len(list) > 0 {
			note = "  # " + results(list)
		}
		if _, err := io.WriteString(out, content+note+line[len(content):]); err != nil {
			return err
		}
	}
	return nil
}

// results says what the members of a line come to.
func results(list []*checker.Result) string {
	say := func(m *checker.Result) string {
		if m.Verdict == verdict.Undecided {
			return "undecided"
		}
		return strings.TrimSpace(m.Verdict.String() + " " + checker.Ratio(m.Utilisation) + " " + m.Governing)
	}
	first := say(list[0])
	if !slices.ContainsFunc(list, func(m *checker.Result) bool { return say(m) != first }) {
		return first
	}
	var parts []string
	for _, m := range list {
		parts = append(parts, m.Name+" "+say(m))
	}
	return strings.Join(parts, "; ")
}

// surroundings finds the workspace that a file belongs to: git hands over files of
// earlier states by themselves, under names of no meaning.
func surroundings(file, text string) (name string, read lang.Read, err error) {
	here, err := os.Getwd()
	if err != nil {
		return "", nil, err
	}
	absolute, err := filepath.Abs(file)
	if err != nil {
		return "", nil, err
	}
	dir := disk.Checkout(here)
	folder, err := disk.Open(dir)
	if err != nil {
		return "", nil, err
	}
	if disk.Inside(dir, absolute) {
		name, err = folder.Name(absolute)
		return name, folder.Read, err
	}
	repo, err := history.Open(dir)
	if err != nil {
		return "", nil, err
	}
	if c, name := repo.Having(text); c != nil {
		return name, c.Read, nil
	}
	// what is staged is in no commit: its name is what is left of it
	head, err := repo.Commit("HEAD")
	if err != nil {
		return "", nil, err
	}
	names, err := head.List(".")
	if err != nil {
		return "", nil, err
	}
	base := filepath.Base(file)
	for _, n := range names {
		if path.Base(n) != base {
			continue
		}
		if name != "" {
			return "", nil, errors.New("several files have this name")
		}
		name = n
	}
	if name == "" {
		return "", nil, errors.New("the file is not known")
	}
	return name, folder.Read, nil
}
