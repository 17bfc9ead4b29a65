package checker_test

import (
	"flag"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"sort"
	"strconv"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/standard"
	"kern/lang"

	"golang.org/x/tools/txtar"
)

var update = flag.Bool("update", false, "write the expectations of the archives anew")

const brokenFolder = "../testdata/broken"

// brokenArchive is one broken calculation: its files, and what is expected of
// it. The lines of the archive's comment say what it is about, and
//
//	escaped           \xNN, \uNNNN, \r and \\ in the files stand for what they name
//	except: OK1 …     the good member OK1 is undecided, as what it shares is broken: why
//	other: OK1 …      the good member OK1 has another result than alone: why
type brokenArchive struct {
	name    string
	archive *txtar.Archive
	files   map[string]string
	want    string
	except  map[string]string // good members that are undecided, with the reason
	other   map[string]string // good members with another result, with the reason
}

func brokenArchives(t testing.TB) []*brokenArchive {
	t.Helper()
	paths, err := filepath.Glob(filepath.Join(brokenFolder, "*.txtar"))
	if err != nil || len(paths) < 100 {
		t.Fatalf("%d archives of broken calculations: %v", len(paths), err)
	}
	var out []*brokenArchive
	for _, path := range paths {
		data, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		a := &brokenArchive{name: strings.TrimSuffix(filepath.Base(path), ".txtar"), archive: txtar.Parse(data),
			files: map[string]string{}, except: map[string]string{}, other: map[string]string{}}
		escaped := false
		for line := range strings.Lines(string(a.archive.Comment)) {
			line = strings.TrimSpace(line)
			if line == "escaped" {
				escaped = true
			}
			for word, into := range map[string]map[string]string{"except: ": a.except, "other: ": a.other} {
				if reasons, ok := strings.CutPrefix(line, word); ok {
					for reason := range strings.SplitSeq(reasons, "; ") {
						name, why, _ := strings.Cut(reason, " ")
						into[name] = why
					}
				}
			}
		}
		for _, f := range a.archive.Files {
			switch {
			case f.Name == "want":
				a.want = string(f.Data)
			case escaped:
				a.files[f.Name] = unescape(t, string(f.Data))
			default:
				a.files[f.Name] = string(f.Data)
			}
		}
		out = append(out, a)
	}
	return out
}

// unescape reads \xNN, \uNNNN, \r and \\; every other byte stands for itself.
func unescape(t testing.TB, text string) string {
	var b strings.Builder
	for text != "" {
		if text[0] != '\\' {
			b.WriteByte(text[0])
			text = text[1:]
			continue
		}
		n := map[byte]int{'x': 4, 'u': 6, 'r': 2, '\\': 2}[text[1]]
		if n == 0 || n > len(text) {
			t.Fatalf("an escape that is none: %.10q", text)
		}
		s, err := strconv.Unquote(`"` + text[:n] + `"`)
		if err != nil {
			t.Fatalf("%q: %v", text[:n], err)
		}
		b.WriteString(s)
		text = text[n:]
	}
	return b.String()
}

// checkFiles works out the calculation whose root is a.kern.
func checkFiles(files map[string]string) *checker.Report {
	read := func(name string) (string, error) {
		if text, ok := files[name]; ok {
			return text, nil
		}
		return "", fmt.Errorf("there is no such file")
	}
	return checker.Check(lang.Load([]string{"a.kern"}, read, nil), nil)
}

// at writes a span as line:column-column, both columns counted in letters from
// 1, the second behind the last letter; a span of several lines ends with a
// line of its own.
func at(text string, s lang.Span) string {
	lines := lang.NewLines(text)
	line, column := lines.Position(s.Start)
	lastLine, lastColumn := lines.Position(s.End)
	if line != lastLine {
		return fmt.Sprintf("%d:%d-%d:%d", line, column, lastLine, lastColumn)
	}
	return fmt.Sprintf("%d:%d-%d", line, column, lastColumn)
}

// marked shows a marked text within one line.
func marked(text string) string {
	text = strconv.Quote(text)
	text = strings.ReplaceAll(text[1:len(text)-1], `\"`, `"`)
	if r := []rune(text); len(r) > 70 {
		text = string(r[:40]) + " … " + string(r[len(r)-20:])
	}
	return "«" + text + "»"
}

// reported writes all that is to be said about a calculation.
func reported(files map[string]string, r *checker.Report) string {
	var b strings.Builder
	for _, d := range r.Diagnostics {
		text := files[d.File]
		fmt.Fprintf(&b, "%s:%s %s %s %s\n    %s\n", d.File, at(text, d.Span), d.Severity, d.Rule, marked(d.Span.Of(text)), d.Message)
		for _, rel := range d.Related {
			text := files[rel.File]
			fmt.Fprintf(&b, "    see %s:%s %s %s\n", rel.File, at(text, rel.Span), marked(rel.Span.Of(text)), rel.Message)
		}
		for _, note := range d.Notes {
			fmt.Fprintf(&b, "    note: %s\n", note)
		}
		for _, f := range d.Fixes {
			fmt.Fprintf(&b, "    %s: %s\n", map[bool]string{true: "mend", false: "offer"}[f.Safe], f.Title)
		}
	}
	for _, m := range r.Members {
		fmt.Fprintf(&b, "%s %s", m.Name, m.Verdict)
		if !math.IsNaN(m.Utilisation) {
			fmt.Fprintf(&b, " %s %s", checker.Ratio(m.Utilisation), m.Governing)
		}
		b.WriteByte('\n')
	}
	return b.String()
}

func member(r *checker.Report, name string) *checker.Result {
	for _, m := range r.Members {
		if m.Name == name {
			return m
		}
	}
	return nil
}

// TestBroken checks every broken calculation against its expectation, and that
// the good members that stand beside the broken part have the results that they
// have alone.
func TestBroken(t *testing.T) {
	archives := brokenArchives(t)
	var alone *checker.Report
	for _, a := range archives {
		if a.name == "only-good" {
			alone = checkFiles(a.files)
		}
	}
	if alone == nil || alone.Summary.Passes != 2 || alone.Summary.Failed() {
		t.Fatal("the good members alone do not pass")
	}
	for _, a := range archives {
		t.Run(a.name, func(t *testing.T) {
			r := checkFiles(a.files)
			spansInside(t, a.files, r)
			for _, name := range []string{"OK1", "OK2"} {
				if !strings.Contains(a.files["a.kern"], "column "+name) {
					continue
				}
				m, want := member(r, name), member(alone, name)
				same := m != nil && m.Verdict == want.Verdict && m.Utilisation == want.Utilisation && m.Governing == want.Governing
				except, other := a.except[name], a.other[name]
				switch {
				case except == "" && other == "" && !same:
					t.Errorf("%s is not what it is alone", name)
				case except+other != "" && same:
					t.Errorf("%s is as alone, although %s", name, except+other)
				case except != "" && m != nil && m.Verdict != standard.Undecided:
					t.Errorf("%s %s although %s", name, m.Verdict, except)
				}
			}
			got := reported(a.files, r)
			if got == a.want {
				return
			}
			if !*update {
				t.Errorf("got\n%s\nwant\n%s", got, a.want)
				return
			}
			a.archive.Files[len(a.archive.Files)-1].Data = []byte(got)
			if err := os.WriteFile(filepath.Join(brokenFolder, a.name+".txtar"), txtar.Format(a.archive), 0o644); err != nil {
				t.Fatal(err)
			}
		})
	}
}

// spansInside demands that all places of all diagnostics lie in their files.
func spansInside(t testing.TB, files map[string]string, r *checker.Report) {
	t.Helper()
	inside := func(what, file string, s lang.Span) {
		text, ok := files[file]
		if !ok || s.Start < 0 || s.End < s.Start || int(s.End) > len(text) {
			t.Errorf("%s at %v of %q, which has %d bytes", what, s, file, len(text))
		}
	}
	for _, d := range r.Diagnostics {
		what := d.Rule + " (" + d.Message + ")"
		inside(what, d.File, d.Span)
		for _, rel := range d.Related {
			inside("what "+what+" points at", rel.File, rel.Span)
		}
		for _, f := range d.Fixes {
			for _, e := range f.Edits {
				inside("a fix of "+what, e.File, e.Span)
			}
		}
	}
}

// TestBrokenFixes applies every fix that is offered in any archive: the
// diagnostic must be gone, and a safe fix must bring no new kind of error.
func TestBrokenFixes(t *testing.T) {
	fixes, safe := 0, 0
	for _, a := range brokenArchives(t) {
		before := checkFiles(a.files)
		for _, d := range before.Diagnostics {
			for _, f := range d.Fixes {
				fixes++
				mended := applied(t, a.files, f)
				after := checkFiles(mended)
				name := fmt.Sprintf("%s: %q of %s at %s", a.name, f.Title, d.Rule, at(a.files[d.File], d.Span))
				if n := said(after, d); n >= said(before, d) {
					t.Errorf("%s: the diagnostic is still there: %s", name, d.Message)
				}
				if !f.Safe {
					continue
				}
				safe++
				had := errorRules(before)
				for rule, n := range errorRules(after) {
					if n > had[rule] {
						t.Errorf("%s: a safe fix brings %s", name, rule)
					}
				}
			}
		}
	}
	t.Logf("%d fixes applied, %d of them safe", fixes, safe)
	if safe < 50 || fixes < 200 {
		t.Errorf("only %d fixes, %d safe, were there to apply", fixes, safe)
	}
}

// said counts the diagnostics that say the same as d.
func said(r *checker.Report, d checker.Diagnostic) int {
	n := 0
	for _, x := range r.Diagnostics {
		if x.Rule == d.Rule && x.Message == d.Message && x.File == d.File {
			n++
		}
	}
	return n
}

func errorRules(r *checker.Report) map[string]int {
	out := map[string]int{}
	for _, d := range r.Diagnostics {
		if d.Severity == lang.Error {
			out[d.Rule]++
		}
	}
	return out
}

// applied gives the files with a fix applied.
func applied(t testing.TB, files map[string]string, f checker.Fix) map[string]string {
	t.Helper()
	out := map[string]string{}
	for name, text := range files {
		var edits []checker.Edit
		for _, e := range f.Edits {
			if e.File == name {
				edits = append(edits, e)
			}
		}
		sort.SliceStable(edits, func(i, j int) bool { return edits[i].Span.Start > edits[j].Span.Start })
		last := len(text)
		for _, e := range edits {
			if int(e.Span.End) > last {
				t.Fatalf("the edits of %q overlap", f.Title)
			}
			last = int(e.Span.Start)
			text = text[:e.Span.Start] + e.New + text[e.Span.End:]
		}
		out[name] = text
	}
	return out
}

// TestTyping types the lines of a member letter by letter between two good
// members and behind one: at no moment do the good ones change.
func TestTyping(t *testing.T) {
	const head = `basis {
    standard "EN 1993-1-1:2005"
    actions  "EN 1990:2002" eq "6.10"
}
material s355 = "S355"
section mast = "HEB 160"
case G permanent
case Q imposed "B"
column OK1 { section = mast; material = s355; height = 4 m; load G 80 kN }
`
	const tail = `
column OK2 { section = mast; material = s355; height = 5 m; load Q 80 kN }
`
	const typed = `section leg = tube { width = 90 mm; wall = 6.3 mm; made = cold }

column A1, A2 "Gallery post" {
    section  = tube {
        width = 90 mm
        wall  = 6.3 mm
    }
    material = "S355" per "EN 10025-2"
    height   = max(4 m, 12 ft 6 in)
    base fixed about major
    hold both at height / 2
    effective = 0.85 about minor
    load G 80 kN at top offset 20 mm about major
    load Q 1.8 kN/m about major from 1 m to 3 m
    require N_b_minor >= 400 kN because "room for one more floor"
}
`
	alone := checkFiles(map[string]string{"a.kern": head + tail})
	for i := range len(typed) + 1 {
		for _, behind := range []string{"", tail} {
			files := map[string]string{"a.kern": head + typed[:i] + behind}
			r := checkFiles(files)
			spansInside(t, files, r)
			for _, name := range []string{"OK1", "OK2"} {
				if name == "OK2" && behind == "" {
					continue
				}
				m, want := member(r, name), member(alone, name)
				if m == nil || m.Verdict != want.Verdict || m.Utilisation != want.Utilisation {
					t.Errorf("behind %q %s is no longer what it was: %+v", typed[max(0, i-20):i], name, m)
				}
			}
			for _, d := range r.Diagnostics {
				if d.Member == "OK1" || d.Member == "OK2" {
					t.Errorf("behind %q: %s", typed[max(0, i-20):i], d.Message)
				}
			}
		}
	}
}
