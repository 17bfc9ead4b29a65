package size

import (
	"math"
	"slices"
	"sort"
	"strings"

	"kern/checker"
	"kern/checker/edit"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// restraint is what one more hold holds.
type restraint struct{ major, minor, twist bool }

// restraints are those that are tried, the least first.
var restraints = []restraint{
	{minor: true},
	{major: true},
	{major: true, minor: true},
	{minor: true, twist: true},
	{major: true, minor: true, twist: true},
}

func (x restraint) lines(at string) []string {
	word := map[[2]bool]string{{true, true}: "both", {true, false}: "major", {false, true}: "minor"}[[2]bool{x.major, x.minor}]
	out := []string{"hold " + word + " at " + at}
	if x.twist {
		out = append(out, "hold twist at "+at)
	}
	return out
}

func (x restraint) on(m *model.Member, at float64) {
	m.Holds = append(m.Holds, model.Hold{At: at, Major: x.major, Minor: x.minor})
	if x.twist {
		m.Holds = append(m.Holds, model.Hold{At: at, Twist: true})
	}
	sort.SliceStable(m.Holds, func(i, j int) bool { return m.Holds[i].At < m.Holds[j].At })
}

// positions is into how many parts the height is cut to look for the best place
// of a hold.
const positions = 20

// holds gives one more hold with which the member passes: at half the height and
// where it helps most, of the least restraint that is enough.
func (s *subject) holds() []Mend {
	m := s.r.Member
	if m.Imported != nil || m.Nominal {
		return nil // the moments that are given belong to the holds that there are
	}
	u := lengthOf(s.lengthUnit())
	step := 0.05 // m
	if u.Symbol != "m" {
		step = u.Factor / 4
	}
	t := s.trial()
	for _, x := range restraints {
		if x.major && m.Joints[model.Major] != nil || x.minor && m.Joints[model.Minor] != nil {
			continue
		}
		j := newJudge(s.r)
		best, bestAt := math.Inf(1), 0.0
		middle := math.Inf(1) // the utilisation with a hold at half the height
		tried := map[float64]bool{}
		for i := 1; i < positions; i++ {
			at := m.Height * float64(i) / positions
			if i != positions/2 {
				at = math.Round(at/step) * step
			}
			if tried[at] || s.held(x, at) {
				continue
			}
			tried[at] = true
			r, ok := j.passes(func(m *model.Member) { x.on(m, at) })
			if !ok {
				continue
			}
			if i == positions/2 {
				middle = r.Utilisation
			}
			if r.Utilisation < best-1e-9 {
				best, bestAt = r.Utilisation, at
			}
		}
		var out []Mend
		if !math.IsInf(middle, 1) {
			out = s.hold(t, x, m.Height/2, "height / 2", out)
		}
		if bestAt > 0 && best < middle-0.005 {
			out = s.hold(t, x, bestAt, Down(bestAt, u, 4), out)
		}
		if len(out) > 0 {
			return out
		}
	}
	return nil
}

// held tells whether something holds the member there, or close by, already.
func (s *subject) held(x restraint, at float64) bool {
	m := s.r.Member
	if at < 0.03*m.Height || at > 0.97*m.Height {
		return true
	}
	return slices.ContainsFunc(m.Holds, func(h model.Hold) bool {
		return math.Abs(h.At-at) < 0.03*m.Height && (x.major && h.Major || x.minor && h.Minor || x.twist && h.Twist)
	})
}

func (s *subject) hold(t *trial, x restraint, at float64, text string, out []Mend) []Mend {
	lines := x.lines(text)
	all := append(edit.TakenOver(s.calcs[0].Env, s.line, "hold"), lines...)
	if s.own("hold") != nil {
		all = lines
	}
	c, ok := edit.Insert(s.line.Decl.Text, s.line.Stmt, all...)
	if !ok {
		return out
	}
	r, ok := t.passes([]lang.Change{c})
	if !ok {
		return out
	}
	mend := s.mend(Hold, strings.Join(lines, ", "), r, []lang.Change{c})
	mend.Value, mend.Dim, mend.Needs = at, unit.Length, needs(r, at)
	if x.twist {
		mend.Note = "what holds against twist must take up a moment about the member's axis: to be worked out by hand"
	}
	return append(out, mend)
}

// needs is what the holds at a height must be able to do.
func needs(r *checker.Result, at float64) []standard.HoldDemand {
	var out []standard.HoldDemand
	for _, d := range r.Holds() {
		if math.Abs(d.At-at) <= 1e-6*r.Member.Height {
			out = append(out, d)
		}
	}
	return out
}
