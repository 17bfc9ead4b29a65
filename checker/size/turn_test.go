package size_test

import (
	"strings"
	"testing"

	"kern/checker/size"
	"kern/checker/standard"
)

func turned(t *testing.T, text string) (size.Mend, bool) {
	t.Helper()
	r := check(t, text)
	all := size.Mends(r, r.Members[0], size.Options{Kinds: []size.Kind{size.Turn}})
	if len(all) == 0 {
		return size.Mend{}, false
	}
	return all[0], true
}

// TestTurn: a section that stands across its load passes when it is turned; the text
// with the axes exchanged is the one that a person would write, and passes as it was
// promised.
func TestTurn(t *testing.T) {
	lines := []string{"base fixed about minor", "hold major at height / 2", "hold twist at height / 2", "load 60 kN at top offset 60 mm about minor and 5 mm about major", "load 30 kN/m about minor"}
	exchange := strings.NewReplacer("major", "minor", "minor", "major")
	var other []string
	for _, l := range lines {
		other = append(other, exchange.Replace(l))
	}
	text, want := stand("IPE 240", "S275", "3.2 m", lines...), stand("IPE 240", "S275", "3.2 m", other...)
	if v := check(t, text).Members[0].Verdict; v != standard.Fails {
		t.Fatalf("the column %s", v)
	}
	m, ok := turned(t, text)
	if !ok {
		t.Fatal("no turned section is offered")
	}
	got := apply(text, m.Edits())
	if got != want {
		t.Errorf("%s\nwant\n%s", got, want)
	}
	if r := check(t, got).Members[0]; r.Verdict != standard.Passes || r.Utilisation != m.Utilisation || r.Governing != m.Governing {
		t.Errorf("%s %v by %s, promised %v by %s", r.Verdict, r.Utilisation, r.Governing, m.Utilisation, m.Governing)
	}
	if m.Added != 0 || m.Note == "" {
		t.Errorf("%+v", m)
	}
}

// TestTurnLeft: nothing is offered where turning does nothing, would change a
// condition, or a line that another member says.
func TestTurnLeft(t *testing.T) {
	load := "load 16 kN/m about minor"
	for name, text := range map[string]string{
		"a square tube": stand("SHS 90x90x5", "S275H", "5 m", load),
		"no axis":       stand("IPE 240", "S275", "9 m", "load 900 kN"),
		"a condition":   stand("IPE 240", "S275", "3.2 m", load, "require N_b_minor >= 10 kN"),
		"a departure":   stand("IPE 240", "S275", "3.2 m", load, "depart slenderness because \"x\""),
		"a line that is another's": "column P { section = \"IPE 240\"; material = \"S275\"; height = 3.2 m; load 1 kN/m about minor }\n" +
			strings.Replace(stand("IPE 240", "S275", "3.2 m", "load 60 kN", "height = 3 m"), "column C {", "column C as P {", 1),
		"no better": stand("IPE 240", "S275", "3.2 m", "load 160 kN/m about major", "load 160 kN/m about minor"),
	} {
		if m, ok := turned(t, text); ok {
			t.Errorf("%s: %+v", name, m)
		}
	}
}
