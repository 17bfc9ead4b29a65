package record_test

import (
	"bytes"
	"math"
	"math/rand/v2"
	"strconv"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/record"
	"kern/lang"

	"github.com/google/go-cmp/cmp"
	"github.com/google/go-cmp/cmp/cmpopts"
)

func same(name string) string { return name }

func report(load string) *checker.Report {
	text := `basis { standard "elastic" }
column A1 { section = "HEB 100"; material = "S235"; height = 3 m; load ` + load + ` }
column A2 { section = "HEB 100"; material = "S235"; height = 3 m; load 100 kN }
column A3 { section = "HEB 100"; material = "S235"; height = 3 m }
`
	return checker.Check(lang.Load([]string{"a.kern"}, func(string) (string, error) { return text, nil }, nil), nil)
}

// TestRoundTrip writes random records and reads them back.
func TestRoundTrip(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 1))
	for range 200 {
		want := &record.Record{Tolerance: float64(r.IntN(100)) / 1000}
		for f := range 1 + r.IntN(3) {
			for m := range r.IntN(4) {
				e := record.Entry{File: "f" + strconv.Itoa(f) + " \"é\".kern", Name: "A" + strconv.Itoa(m), Verdict: []string{"passes", "fails", "undecided"}[r.IntN(3)], Utilisation: float64(r.IntN(200000)) / 1e5, Governing: "first-yield"}
				if e.Verdict == "undecided" {
					e.Utilisation, e.Governing = math.NaN(), ""
				}
				if e.Verdict != "passes" && r.IntN(2) == 0 {
					e.Carried = "because \"it\" is\nold"
				}
				want.Entries = append(want.Entries, e)
			}
		}
		var b bytes.Buffer
		if err := want.Write(&b); err != nil {
			t.Fatal(err)
		}
		text := b.String()
		if r.IntN(2) == 0 {
			text = strings.ReplaceAll(text, "\n", "\r\n")
		}
		got, err := record.Read(text)
		if err != nil {
			t.Fatalf("%v\n%s", err, text)
		}
		if d := cmp.Diff(want, got, cmpopts.EquateNaNs()); d != "" {
			t.Errorf("%s\n%s", d, text)
		}
	}
}

// TestUnreadable: what is no record is refused with the line.
func TestUnreadable(t *testing.T) {
	for text, want := range map[string]string{
		"file \"a\"\nA1 passes": "line 2: a member has", "A1 passes 0.5 first-yield": "before any file", "file a": "in quotes", "tolerance x": "a number from 0 to 0.1", "tolerance 5": "a number",
		"file \"a\"\nA1 holds 0.5 x": "not 'holds'", "file \"a\"\nA1 passes high x": "no utilisation", "file \"a\"\nA1 fails 1.5 x carried because old": "in quotes",
		"file \"a\"\nA1 passes 0.5 x carried because \"old\"": "is not carried", "<<<<<<< HEAD": "a merge left both sides", "file \"a\"\nA1 passes NaN x": "no utilisation",
		"file \"a\"\nA1 fails 1.5 x carried because \" \"": "in quotes",
	} {
		if _, err := record.Read(text); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%q: %v", text, err)
		}
	}
}

// TestCompare: what is as recorded is silent; a change beyond the tolerance, of a
// verdict, or of the members is told and blocks; a carried failure does not, unless
// it grows.
func TestCompare(t *testing.T) {
	at := func(load string) *record.Record { return record.Of(report(load), same) }
	differ := func(r *checker.Report, rec *record.Record, tolerance float64) (*record.Outcome, string) {
		o := record.Compare(r, rec, tolerance, same)
		var all []string
		for _, d := range o.Differences {
			all = append(all, d.Name+" "+d.Message)
		}
		return o, strings.Join(all, "; ")
	}
	// A3 carries its own weight alone and passes; A1 passes at 300 kN and fails at 900
	if o, said := differ(report("300 kN"), at("300 kN"), -1); said != "" || o.Blocked {
		t.Errorf("as recorded: %q, blocked %v", said, o.Blocked)
	}
	if o, said := differ(report("301 kN"), at("300 kN"), -1); !strings.HasPrefix(said, "A1 has a utilisation of ") || !o.Blocked {
		t.Errorf("another load: %q", said)
	}
	if _, said := differ(report("301 kN"), at("300 kN"), 0.1); said != "" {
		t.Errorf("within the tolerance: %q", said)
	}
	if o, said := differ(report("900 kN"), at("300 kN"), 0.1); !strings.Contains(said, "A1 was recorded as one that passes") || !o.Blocked {
		t.Errorf("another verdict: %q", said)
	}
	if o, said := differ(report("900 kN"), at("900 kN"), -1); said != "" || !o.Blocked {
		t.Errorf("a failure that is recorded and not carried: %q, blocked %v", said, o.Blocked)
	}
	carried := at("900 kN")
	if left := carried.Carry(nil, "known"); len(left) != 0 {
		t.Errorf("%v are left", left)
	}
	if o, said := differ(report("900 kN"), carried, -1); said != "" || o.Blocked || len(o.Carried) != 1 || !o.Carries("a.kern", "A1") || o.Carries("a.kern", "A2") {
		t.Errorf("a carried failure: %q, %+v", said, o)
	}
	if o, _ := differ(report("905 kN"), carried, -1); !o.Blocked || len(o.Carried) != 0 {
		t.Errorf("a carried failure that grows: %+v", o)
	}
	if o, said := differ(report("900 kN"), carried, -1); o.Blocked {
		t.Errorf("%q", said)
	}
	// recorded anew, it stays carried while it is no worse
	for load, stays := range map[string]bool{"900 kN": true, "890 kN": true, "1000 kN": false} {
		now := at(load)
		if left := now.Carry(carried, ""); (len(left) == 0) != stays {
			t.Errorf("%s: %v are left", load, left)
		}
	}
	fewer := at("300 kN")
	fewer.Entries = fewer.Entries[1:]
	if _, said := differ(report("300 kN"), fewer, -1); !strings.Contains(said, "A1 is not recorded: it passes") {
		t.Errorf("a new member: %q", said)
	}
	more := at("300 kN")
	more.Entries = append(more.Entries, record.Entry{File: "b.kern", Name: "Z1", Verdict: "passes", Utilisation: 0.5})
	if _, said := differ(report("300 kN"), more, -1); !strings.Contains(said, "Z1 is recorded, and there is no such member any more") {
		t.Errorf("a member that is gone: %q", said)
	}
}

// TestErrorsBlock: an error in a text blocks, whatever is carried.
func TestErrorsBlock(t *testing.T) {
	r := checker.Check(lang.Load([]string{"a.kern"}, func(string) (string, error) { return "x = 3 Kn\n", nil }, nil), nil)
	if o := record.Compare(r, record.Of(r, same), -1, same); !o.Blocked {
		t.Error("it does not block")
	}
}
