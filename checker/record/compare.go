package record

import (
	"cmp"
	"math"
	"slices"
	"strconv"
	"strings"

	"kern/checker"
	"kern/lang"
)

// Outcome is a report held against a record.
type Outcome struct {
	Differences []Difference // by file and name
	Carried     []Entry      // members that fail or are undecided, as recorded, and do not block
	// Blocked tells whether anything is wrong that is not carried: a difference, a
	// member that does not pass, an error in a text.
	Blocked bool
	carried map[string]bool
}

// Difference is a member whose result is not the recorded one.
type Difference struct {
	File, Name string
	Message    string
}

// Carries tells whether a member's failure is carried.
func (o *Outcome) Carries(file, name string) bool { return o != nil && o.carried[file+"\n"+name] }

// Compare holds a report against a record. A negative tolerance takes the
// record's. name turns the workspace's names of files into those of the record.
func Compare(r *checker.Report, recorded *Record, tolerance float64, name func(string) string) *Outcome {
	if tolerance < 0 {
		tolerance = recorded.Tolerance
	}
	out := &Outcome{carried: map[string]bool{}}
	old := index(recorded)
	differ := func(e Entry, message string) {
		out.Differences = append(out.Differences, Difference{e.File, e.Name, message})
	}
	for _, e := range Of(r, name).Entries {
		was, ok := old.take(e)
		switch {
		case !ok:
			differ(e, "is not recorded: it "+said(e)+" now")
		case was.Verdict != e.Verdict:
			differ(e, "was recorded as one that "+said(was)+"; now it "+said(e))
		case math.IsNaN(was.Utilisation) != math.IsNaN(e.Utilisation), math.Abs(was.Utilisation-e.Utilisation) > tolerance+0.5e-5:
			differ(e, "has a utilisation of "+number(e.Utilisation)+"; "+number(was.Utilisation)+" is recorded")
		}
		if ok && was.Carried != "" && e.Verdict != "passes" && !worse(was, e, tolerance+0.5e-5) {
			e.Carried = was.Carried
			out.Carried = append(out.Carried, e)
			out.carried[e.File+"\n"+e.Name] = true
		}
		if e.Verdict != "passes" && e.Carried == "" {
			out.Blocked = true
		}
	}
	for _, left := range old {
		for _, e := range left {
			differ(e, "is recorded, and there is no such member any more")
		}
	}
	slices.SortStableFunc(out.Differences, func(a, b Difference) int {
		return cmp.Or(strings.Compare(a.File, b.File), strings.Compare(a.Name, b.Name))
	})
	for _, d := range r.Diagnostics {
		if d.Severity == lang.Error && !out.carried[name(d.File)+"\n"+d.Member] {
			out.Blocked = true
		}
	}
	out.Blocked = out.Blocked || len(out.Differences) > 0
	return out
}

func number(u float64) string {
	if math.IsNaN(u) {
		return "none"
	}
	return strconv.FormatFloat(u, 'f', 5, 64)
}

// said is an entry as the end of a sentence.
func said(e Entry) string {
	words := map[string]string{"passes": "passes", "fails": "fails", "undecided": "is undecided"}[e.Verdict]
	if math.IsNaN(e.Utilisation) {
		return words
	}
	return words + " (" + number(e.Utilisation) + ")"
}
