package offer

import (
	"fmt"
	"io/fs"
	"maps"
	"math"
	"math/rand/v2"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"kern/checker"
	"kern/lang"

	"golang.org/x/tools/txtar"
)

// projects are all calculations below testdata, by folder or archive.
func projects(t testing.TB) map[string]map[string]string {
	t.Helper()
	out := map[string]map[string]string{}
	put := func(project, file, text string) {
		if out[project] == nil {
			out[project] = map[string]string{}
		}
		out[project][file] = text
	}
	root := "../../testdata"
	err := filepath.WalkDir(root, func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		data, err := os.ReadFile(path)
		if err != nil {
			return err
		}
		switch filepath.Ext(path) {
		case ".txtar":
			a := txtar.Parse(data)
			escaped := strings.Contains(string(a.Comment), "\nescaped\n")
			for _, f := range a.Files {
				if filepath.Ext(f.Name) != ".kern" {
					continue
				}
				text := string(f.Data)
				if escaped {
					text = unescape(text)
				}
				put(filepath.Base(path), f.Name, text)
			}
		case ".kern":
			put(filepath.Base(filepath.Dir(path)), filepath.Base(path), string(data))
		}
		return nil
	})
	if err != nil || len(out) < 100 {
		t.Fatalf("%d projects: %v", len(out), err)
	}
	return out
}

// unescape reads the escapes of the archives: \r, \xNN and \uNNNN.
func unescape(text string) string {
	var b strings.Builder
	for text != "" {
		n := map[byte]int{'x': 4, 'u': 6}[(text + "  ")[1]]
		switch {
		case strings.HasPrefix(text, `\r`):
			b.WriteByte('\r')
			text = text[2:]
		case text[0] == '\\' && n > 0 && len(text) >= n:
			if v, err := strconv.ParseUint(text[2:n], 16, 32); err == nil {
				if n == 4 {
					b.WriteByte(byte(v))
				} else {
					b.WriteRune(rune(v))
				}
				text = text[n:]
				continue
			}
			fallthrough
		default:
			b.WriteByte(text[0])
			text = text[1:]
		}
	}
	return b.String()
}

func check(files map[string]string) *checker.Report {
	return checker.Check(lang.Load(slices.Sorted(maps.Keys(files)), func(name string) (string, error) {
		if text, ok := files[name]; ok {
			return text, nil
		}
		return "", fmt.Errorf("there is no such file")
	}, nil), nil)
}

// apply makes the edits of an offer.
func apply(t testing.TB, files map[string]string, edits []checker.Edit) map[string]string {
	t.Helper()
	out := maps.Clone(files)
	for i, e := range slices.Backward(edits) {
		text, ok := files[e.File]
		if !ok || e.Span.Start < 0 || e.Span.Start > e.Span.End || int(e.Span.End) > len(text) {
			t.Fatalf("an edit that does not fit its file: %+v", e)
		}
		if i > 0 && edits[i-1].File == e.File && edits[i-1].Span.End > e.Span.Start {
			t.Fatalf("edits that overlap or are out of order: %+v, %+v", edits[i-1], e)
		}
		out[e.File] = out[e.File][:e.Span.Start] + e.New + out[e.File][e.Span.End:]
	}
	return out
}

// results writes the numbers of a report, every bit of them, without places.
func results(r *checker.Report) []string {
	var out []string
	bits := func(v float64) string { return fmt.Sprintf("%x", math.Float64bits(v)) }
	for _, m := range r.Members {
		s := fmt.Sprintf("%s %s %s %s %s", m.Name, m.Verdict, bits(m.Utilisation), m.Governing, m.Combination)
		for _, c := range m.Checks {
			s += fmt.Sprintf("\n  %s %s %s %s %s %v", c.Rule, bits(c.Demand), bits(c.Capacity), bits(c.Utilisation), c.Verdict, c.Departed)
		}
		for _, c := range m.Coverage {
			s += fmt.Sprintf("\n  %s %s", c.Rule, c.State)
		}
		out = append(out, s)
	}
	slices.Sort(out)
	return out
}

// near tells whether two reports have the same verdicts, and numbers that agree
// but for a part.
func near(a, b *checker.Report, part float64) error {
	if len(a.Members) != len(b.Members) {
		return fmt.Errorf("%d members became %d", len(a.Members), len(b.Members))
	}
	same := func(x, y float64) bool { return x == y || x != x && y != y || math.Abs(x-y) <= part*math.Abs(x) }
	for i, m := range a.Members {
		n := b.Members[i]
		if m.Name != n.Name || m.Verdict != n.Verdict || !same(m.Utilisation, n.Utilisation) || len(m.Checks) != len(n.Checks) {
			return fmt.Errorf("%s %s %v became %s %s %v", m.Name, m.Verdict, m.Utilisation, n.Name, n.Verdict, n.Utilisation)
		}
		for j, c := range m.Checks {
			// a demand that is nothing but rounding is next to nothing beside the capacity
			d := n.Checks[j]
			nothing := math.Abs(c.Demand-d.Demand) <= part*math.Abs(c.Capacity)
			if c.Rule != d.Rule || c.Verdict != d.Verdict || !same(c.Demand, d.Demand) && !nothing || !same(c.Capacity, d.Capacity) {
				return fmt.Errorf("%s: %+v became %+v", m.Name, c, d)
			}
		}
	}
	return nil
}

// rules counts the diagnostics of a report by rule.
func rules(r *checker.Report) map[string]int {
	out := map[string]int{}
	for _, d := range r.Diagnostics {
		out[d.Rule]++
	}
	return out
}

// count is how often a report says something.
func count(r *checker.Report, d *checker.Diagnostic) int {
	n := 0
	for _, x := range r.Diagnostics {
		if x.File == d.File && x.Rule == d.Rule && x.Message == d.Message {
			n++
		}
	}
	return n
}

// hold fails the test if an offer breaks its promise.
func hold(t *testing.T, files map[string]string, report *checker.Report, file string, span lang.Span, o Offer) {
	t.Helper()
	edits := o.Edits()
	where := func() string {
		text := files[file]
		return fmt.Sprintf("%s %q at\n%s⟦%s⟧%s", o.Kind, o.Title, text[:span.Start], span.Of(text), text[span.End:])
	}
	if len(edits) == 0 {
		t.Fatalf("nothing changes: %s", where())
	}
	after := apply(t, files, edits)
	for name, text := range files {
		if strings.Contains(text, "\r\n") && strings.Count(text, "\n") == strings.Count(text, "\r\n") && strings.Count(after[name], "\n") != strings.Count(after[name], "\r\n") {
			t.Fatalf("line ends are mixed: %s\n--\n%q", where(), after[name])
		}
		if lang.Format(text) == text && lang.Format(after[name]) != after[name] {
			t.Fatalf("%s is no longer laid out: %s\n--\n%s", name, where(), after[name])
		}
	}
	again := check(after)
	broken := func(format string, args ...any) {
		t.Helper()
		var all strings.Builder
		for _, name := range slices.Sorted(maps.Keys(after)) {
			fmt.Fprintf(&all, "-- %s --\n%s", name, after[name])
		}
		for _, d := range again.Diagnostics {
			fmt.Fprintf(&all, "%s %s: %s\n", d.File, d.Rule, d.Message)
		}
		t.Fatalf(format+": %s\nbecame\n%s", append(append([]any{}, args...), where(), all.String())...)
	}
	switch o.Kind {
	case QuickFix:
		if o.Mends == nil {
			broken("a fix of nothing")
		}
		if count(again, o.Mends) >= count(report, o.Mends) {
			broken("'%s' is still there", o.Mends.Message)
		}
	case FixAll:
		for _, d := range diagnosticsOf(again, file) {
			if i := safe(&d); i >= 0 && within(d.Fixes[i], file) {
				broken("%s is safe and still there", d.Fixes[i].Title)
			}
		}
	default:
		if strings.HasPrefix(o.Title, "Convert to ") {
			digits := 1e-12
			if strings.HasSuffix(o.Title, "(rounded)") {
				digits = 1e-10
			}
			if err := near(report, again, digits); err != nil {
				broken("%v", err)
			}
		} else if a, b := results(report), results(again); !slices.Equal(a, b) {
			for i := range a {
				if i < len(b) && a[i] != b[i] {
					broken("other results\n%s\n%s\n", a[i], b[i])
				}
			}
			broken("other members")
		}
		if a, b := rules(report), rules(again); !maps.Equal(a, b) {
			broken("other diagnostics, %v and %v", a, b)
		}
	}
}

// TestOffers takes every offer at places of every file below testdata and holds
// it to the promises of the package.
func TestOffers(t *testing.T) {
	places := 8
	if testing.Short() {
		places = 3
	}
	kinds, titles := map[Kind]int{}, map[string]int{}
	all := projects(t)
	for _, name := range slices.Sorted(maps.Keys(all)) {
		files := all[name]
		r := rand.New(rand.NewPCG(1, uint64(len(name))))
		report := check(files)
		for _, file := range slices.Sorted(maps.Keys(report.Project.Files)) {
			text := report.Project.Files[file].Text
			done := map[string]bool{}
			try := func(span lang.Span) {
				for _, o := range At(Request{Report: report, File: file, Span: span}) {
					key := o.Title
					if o.Mends != nil {
						key += o.Mends.Message
					} else if o.Kind != FixAll {
						key += fmt.Sprint(span)
					}
					if done[key] {
						continue
					}
					done[key] = true
					kinds[o.Kind]++
					first, _, _ := strings.Cut(o.Title, " ")
					titles[first]++
					t.Run(name, func(t *testing.T) { hold(t, files, report, file, span, o) })
				}
			}
			for _, d := range diagnosticsOf(report, file) {
				try(d.Span)
			}
			for range places {
				at := int32(r.IntN(len(text) + 1))
				end := at
				if r.IntN(4) == 0 {
					end = min(int32(len(text)), at+int32(r.IntN(30)))
				}
				try(lang.Span{Start: at, End: end})
			}
		}
	}
	t.Logf("%v %v", kinds, titles)
	for _, k := range Kinds() {
		if kinds[k] == 0 {
			t.Errorf("no offer of the kind %s was tried", k)
		}
	}
}
