package review_test

import (
	"flag"
	"fmt"
	"maps"
	"math"
	"math/rand/v2"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/generate"
	"kern/checker/review"
	"kern/lang"
)

var many = flag.Int("many", 0, "number of random pairs of states to review")

// check works out files given by name.
func check(files map[string]string) *checker.Report {
	var names []string
	for name := range files {
		names = append(names, name)
	}
	slices.Sort(names)
	read := func(name string) (string, error) {
		if text, ok := files[name]; ok {
			return text, nil
		}
		return "", fmt.Errorf("there is no such file")
	}
	return checker.Check(lang.Load(names, read, nil), nil)
}

func one(text string) *checker.Report { return check(map[string]string{"a.kern": text}) }

// compare reviews two texts.
func compare(before, after string) *review.Review { return review.Compare(one(before), one(after)) }

// change finds a member's change; it fails the test when there is none.
func change(t *testing.T, r *review.Review, name string) *review.Change {
	t.Helper()
	for i := range r.Changes {
		if r.Changes[i].Name == name {
			return &r.Changes[i]
		}
	}
	t.Fatalf("%s did not change: %+v", name, r.Changes)
	return nil
}

// sum holds the shares of a change against the change.
func sum(t *testing.T, c *review.Change) {
	t.Helper()
	total := 0.0
	for _, x := range c.Causes {
		total += x.Share
	}
	if want := c.After.Utilisation - c.Before.Utilisation; !(math.Abs(total-want) <= 1e-9) {
		t.Errorf("%s: the shares come to %.12f, the change is %.12f (%s)", c.Name, total, want, c.Why)
	}
}

func causeOf(c *review.Change, text string) *review.Cause {
	for i, x := range c.Causes {
		for _, e := range x.Edits {
			if strings.Contains(e.String(), text) {
				return &c.Causes[i]
			}
		}
	}
	return nil
}

// mutate edits a text of generate.Columns at random, line by line.
func mutate(text string, r *rand.Rand, edits int) string {
	lines := strings.Split(text, "\n")
	for range edits {
		i := r.IntN(len(lines))
		switch line := strings.TrimSpace(lines[i]); {
		case strings.HasPrefix(line, "height"):
			lines[i] = fmt.Sprintf("    height   = %.2f m", 2.4+r.Float64()*3)
		case strings.HasPrefix(line, "load"):
			switch r.IntN(4) {
			case 0:
				lines[i] = ""
			case 1:
				lines[i] += fmt.Sprintf("\n    load G %.1f kN at top", 10*r.Float64())
			default:
				lines[i] = "    " + strings.Join(strings.Fields(line)[:2], " ") + fmt.Sprintf(" %.1f kN at top", 5+r.Float64()*200)
			}
		case strings.HasPrefix(line, "base"):
			lines[i] = "    base " + []string{"pinned", "fixed"}[r.IntN(2)]
		case strings.HasPrefix(line, "hold"):
			lines[i] = ""
		case strings.HasPrefix(line, "section  ="):
			lines[i] = fmt.Sprintf("    section  = s%d", r.IntN(6))
		case strings.HasPrefix(line, "section s"):
			lines[i] = strings.Fields(line)[0] + " " + strings.Fields(line)[1] + []string{` = "HEB 180"`, ` = "HEA 260"`, ` = "SHS 140x140x8"`, ` = pipe { outside = 168.3 mm; wall = 6.3 mm }`}[r.IntN(4)]
		case strings.HasPrefix(line, "actions"):
			lines[i] = `    actions "EN 1990:2002" eq "6.10a/b"`
		case strings.HasPrefix(line, "show"):
			lines[i] += "\n    gamma_M1 = 1.1 because \"site\""
		case strings.HasPrefix(line, "column"):
			lines[i] += "\n    note \"seen\""
		case strings.HasPrefix(line, "case Q"):
			lines[i] = `case Q imposed "E1"`
		}
	}
	return strings.Join(lines, "\n")
}

// TestAnyText reviews the demo project against itself with random pieces lost,
// doubled or put elsewhere: nothing may panic, and shares must add up.
func TestAnyText(t *testing.T) {
	rounds := 6
	if *many > 0 {
		rounds = *many
	}
	files := map[string]string{}
	names, err := filepath.Glob("../../testdata/boathouse/*.kern")
	if err != nil || len(names) < 4 {
		t.Fatal(names, err)
	}
	for _, name := range names {
		text, err := os.ReadFile(name)
		if err != nil {
			t.Fatal(err)
		}
		files[filepath.Base(name)] = string(text)
	}
	sorted := slices.Sorted(maps.Keys(files))
	base := check(files)
	changes := 0
	for seed := range uint64(rounds) {
		r := rand.New(rand.NewPCG(seed, 77))
		edited := maps.Clone(files)
		for range 1 + r.IntN(4) {
			name := sorted[r.IntN(len(sorted))]
			lines := strings.SplitAfter(edited[name], "\n")
			i, k := r.IntN(len(lines)), r.IntN(len(lines))
			switch r.IntN(5) {
			case 0:
				lines[i] = ""
			case 1:
				lines[i] += lines[k]
			case 2:
				lines[i], lines[k] = lines[k], lines[i]
			case 3:
				at := r.IntN(len(lines[i]) + 1)
				lines[i] = lines[i][:at] + string("{}()\"#;=,.07 kmN\n"[r.IntN(17)]) + lines[i][at:]
			default:
				for j := range lines[i] {
					if c := lines[i][j]; c >= '1' && c <= '9' {
						lines[i] = lines[i][:j] + string('1'+(c-'0')%9) + lines[i][j+1:]
						break
					}
				}
			}
			edited[name] = strings.Join(lines, "")
		}
		now := check(edited)
		for _, x := range []*review.Review{review.Compare(base, now), review.Compare(now, base)} {
			for i := range x.Changes {
				changes++
				if x.Changes[i].Method != review.None {
					sum(t, &x.Changes[i])
				}
			}
		}
	}
	t.Logf("%d rounds, %d changes", rounds, changes)
}

// TestSharesAddUp holds the shares of random pairs of states to their sum, edits
// that cannot matter to exactly nothing, and all of it against another order of
// the lines.
func TestSharesAddUp(t *testing.T) {
	pairs := 12
	if *many > 0 {
		pairs = *many
	}
	changes, exact, sampled, none := 0, 0, 0, 0
	reasons := map[string]int{}
	for seed := range uint64(pairs) {
		r := rand.New(rand.NewPCG(seed, 5))
		before := generate.Shared + generate.Columns(4, seed)
		if seed%3 == 2 {
			before = generate.Shared + generate.BentColumns(2, seed)
		}
		after := mutate(before, r, 1+r.IntN([]int{18, 90}[seed%2]))
		got := compare(before, after)
		for i := range got.Changes {
			c := &got.Changes[i]
			changes++
			switch c.Method {
			case review.Exact:
				exact++
			case review.Sampled:
				sampled++
			default:
				none++
				reasons[c.Why]++
				continue
			}
			sum(t, c)
			if n := causeOf(c, "note"); n != nil && n.Share != 0 {
				t.Errorf("seed %d: a note moved %s by %g", seed, c.Name, n.Share)
			}
		}
	}
	t.Logf("%d pairs: %d changes, %d exact, %d sampled, %d without shares %v", pairs, changes, exact, sampled, none, reasons)
	if exact < pairs/4 {
		t.Errorf("only %d of %d changes had shares", exact, changes)
	}
}
