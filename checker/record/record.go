// Package record keeps the results of a project as a small text that lives in
// version control, so that an issued calculation cannot change unseen: by an edit,
// by a new version of the program, or by one of its catalogue.
package record

import (
	"bufio"
	"cmp"
	"fmt"
	"io"
	"math"
	"slices"
	"strconv"
	"strings"

	"kern/checker"
)

// FileName is what a record is called.
const FileName = "recorded-results.txt"

// DefaultTolerance is by how much a utilisation may differ from the recorded one,
// which has five decimals.
const DefaultTolerance = 0.0005

// Record is the recorded results of a project.
type Record struct {
	Program   string // that wrote it; it makes no difference
	Tolerance float64
	Entries   []Entry // by file and name
}

// Entry is the result of one member.
type Entry struct {
	File, Name  string
	Verdict     string // passes, fails, undecided
	Utilisation float64
	Governing   string // the rule, "" for none
	// Carried is why a failing or undecided member does not block; "" for one that
	// does.
	Carried string
}

// known tells whether the member is all right by its record: it passes, or is
// carried.
func (e Entry) known() bool { return e.Verdict == "passes" || e.Carried != "" }

// Of takes down the results of a report. name turns the workspace's names of files
// into those of the record.
func Of(r *checker.Report, name func(string) string) *Record {
	out := &Record{Tolerance: DefaultTolerance}
	for _, m := range r.Members {
		file, _ := r.Place(m)
		out.Entries = append(out.Entries, Entry{File: name(file), Name: m.Name, Verdict: m.Verdict.String(), Utilisation: m.Utilisation, Governing: m.Governing})
	}
	slices.SortStableFunc(out.Entries, func(a, b Entry) int {
		return cmp.Or(strings.Compare(a.File, b.File), strings.Compare(a.Name, b.Name))
	})
	return out
}

// Carry takes the reasons of an earlier record over to the members that still
// fail or are undecided, and are no worse than they were there. With a reason of
// its own it carries the others too; without, it gives those that are not carried.
func (r *Record) Carry(before *Record, because string) (left []Entry) {
	old := index(before)
	for i := range r.Entries {
		e := &r.Entries[i]
		if e.Verdict == "passes" {
			continue
		}
		was, ok := old.take(*e)
		switch {
		case ok && was.Carried != "" && !worse(was, *e, before.Tolerance):
			e.Carried = was.Carried
		case because != "":
			e.Carried = because
		default:
			left = append(left, *e)
		}
	}
	return left
}

// worse tells whether a member is worse than it was.
func worse(was, now Entry, tolerance float64) bool {
	rank := map[string]int{"passes": 0, "undecided": 1, "fails": 2}
	if rank[now.Verdict] != rank[was.Verdict] {
		return rank[now.Verdict] > rank[was.Verdict]
	}
	switch {
	case math.IsNaN(now.Utilisation):
		return !math.IsNaN(was.Utilisation)
	case math.IsNaN(was.Utilisation):
		return false
	}
	return now.Utilisation > was.Utilisation+tolerance
}

// shelf finds entries by file and name; members of one name are taken in order.
type shelf map[string][]Entry

func index(r *Record) shelf {
	out := shelf{}
	if r != nil {
		for _, e := range r.Entries {
			out[e.File+"\n"+e.Name] = append(out[e.File+"\n"+e.Name], e)
		}
	}
	return out
}

func (s shelf) take(like Entry) (Entry, bool) {
	key := like.File + "\n" + like.Name
	if len(s[key]) == 0 {
		return Entry{}, false
	}
	e := s[key][0]
	s[key] = s[key][1:]
	return e, true
}

// Write writes the record: one member a line, sorted, for people and for diffs.
func (r *Record) Write(w io.Writer) error {
	b := bufio.NewWriter(w)
	fmt.Fprintf(b, "# Recorded results, written by %s. Compare with: kern check --recorded\n", r.Program)
	fmt.Fprintf(b, "tolerance %s\n", strconv.FormatFloat(r.Tolerance, 'g', -1, 64))
	file := ""
	for _, e := range r.Entries {
		if e.File != file {
			file = e.File
			fmt.Fprintf(b, "\nfile %s\n", strconv.Quote(file))
		}
		u := "-"
		if !math.IsNaN(e.Utilisation) {
			u = strconv.FormatFloat(e.Utilisation, 'f', 5, 64)
		}
		governing := e.Governing
		if governing == "" {
			governing = "-"
		}
		fmt.Fprintf(b, "%s %s %s %s", e.Name, e.Verdict, u, governing)
		if e.Carried != "" {
			fmt.Fprintf(b, " carried because %s", strconv.Quote(e.Carried))
		}
		b.WriteByte('\n')
	}
	return b.Flush()
}

// Read reads a record. The error names the line that cannot be read.
func Read(text string) (*Record, error) {
	r := &Record{Tolerance: DefaultTolerance}
	file := ""
	for i, line := range strings.Split(text, "\n") {
		line = strings.TrimSpace(strings.TrimPrefix(line, "\ufeff"))
		fault := func(format string, args ...any) error {
			return fmt.Errorf("line %d: %s", i+1, fmt.Sprintf(format, args...))
		}
		switch {
		case line == "", line[0] == '#':
			continue
		case strings.HasPrefix(line, "tolerance "):
			v, err := strconv.ParseFloat(strings.TrimSpace(line[len("tolerance "):]), 64)
			if err != nil || !(v >= 0) || v > 0.1 {
				return nil, fault("the tolerance is a number from 0 to 0.1")
			}
			r.Tolerance = v
			continue
		case strings.HasPrefix(line, "file "):
			name, err := strconv.Unquote(strings.TrimSpace(line[len("file "):]))
			if err != nil || name == "" {
				return nil, fault("a file stands in quotes: file \"frame.kern\"")
			}
			file = name
			continue
		case strings.HasPrefix(line, "<<<<<<<"), strings.HasPrefix(line, "======="), strings.HasPrefix(line, ">>>>>>>"):
			return nil, fault("a merge left both sides here: settle the texts of the calculations, then run kern record")
		}
		e, why := entry(line)
		if why != "" {
			return nil, fault("%s", why)
		}
		if e.File = file; file == "" {
			return nil, fault("a member stands before any file")
		}
		r.Entries = append(r.Entries, e)
	}
	return r, nil
}

// entry reads "NAME VERDICT UTILISATION RULE [carried because "…"]".
func entry(line string) (Entry, string) {
	line, reason, carried := strings.Cut(line, " carried because ")
	fields := strings.Fields(line)
	if len(fields) != 4 {
		return Entry{}, "a member has its verdict, its utilisation and the check that governs: A1 passes 0.75120 flexural-buckling-minor"
	}
	e := Entry{Name: fields[0], Verdict: fields[1], Utilisation: math.NaN(), Governing: fields[3]}
	if e.Governing == "-" {
		e.Governing = ""
	}
	switch e.Verdict {
	case "passes", "fails", "undecided":
	default:
		return e, "a verdict is passes, fails or undecided, not '" + e.Verdict + "'"
	}
	if fields[2] != "-" {
		v, err := strconv.ParseFloat(fields[2], 64)
		if err != nil || !(v >= 0) || math.IsInf(v, 0) {
			return e, "'" + fields[2] + "' is no utilisation"
		}
		e.Utilisation = v
	}
	if carried {
		text, err := strconv.Unquote(strings.TrimSpace(reason))
		switch {
		case err != nil || strings.TrimSpace(text) == "":
			return e, "a reason stands in quotes: carried because \"…\""
		case e.Verdict == "passes":
			return e, "a member that passes is not carried"
		}
		e.Carried = text
	}
	return e, ""
}
