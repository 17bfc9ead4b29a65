package checker_test

import (
	"fmt"
	"math/rand"
	"os"
	"strconv"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/action"
	"kern/checker/standard"
)

// TestEndsAISC checks random members with every pair of ends, mechanisms too, holds,
// loads and joints by both methods of ANSI/AISC 360: nothing panics, and what cannot
// stand never passes. KERN_RANDOM=N runs N times as many.
func TestEndsAISC(t *testing.T) {
	rounds, _ := strconv.Atoi(os.Getenv("KERN_RANDOM"))
	r := rand.New(rand.NewSource(7))
	ends := []string{"pinned", "fixed", "free", "guided"}
	mechanisms := 0
	for range 10 * max(1, rounds) {
		text := aiscBases[r.Intn(len(aiscBases))] + randomColumns(r, 20)
		var b strings.Builder
		for _, line := range strings.SplitAfter(text, "\n") {
			if strings.HasPrefix(strings.TrimSpace(line), "base ") {
				line = ""
				for _, axis := range []string{"major", "minor"} {
					line += fmt.Sprintf("    base %s about %s; top %s about %s\n", ends[r.Intn(4)], axis, ends[r.Intn(4)], axis)
				}
				if r.Intn(6) == 0 {
					line += fmt.Sprintf("    joints %.2f at base, %.2f at top about major %s\n", 0.1+9*r.Float64(), 0.1+9*r.Float64(), []string{"sway", "braced"}[r.Intn(2)])
				}
			}
			b.WriteString(line)
		}
		for _, m := range derivedReport(t, b.String(), false) {
			for a := range m.Member.Base {
				if m.Member.Joints[a] != nil || m.Member.Factor[a] > 0 || len(m.Member.Holds) > 0 {
					continue
				}
				if _, stands := action.Factor(m.Member.Base[a], m.Member.Top[a], false); !stands {
					mechanisms++
					if m.Verdict == standard.Passes && pressed(m) {
						t.Errorf("%s passes and cannot stand:\n%s", m.Name, b.String())
					}
				}
			}
		}
	}
	if mechanisms < 30 {
		t.Errorf("only %d mechanisms", mechanisms)
	}
}

// pressed tells whether some combination compresses a member.
func pressed(m *checker.Result) bool {
	f := m.Frame()
	for k := range m.Combinations() {
		if f.Compression(k, 0, m.Member.Height) > 0 {
			return true
		}
	}
	return false
}
