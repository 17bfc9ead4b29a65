package aisc360

import (
	"math"
	"math/rand"
	"testing"

	"kern/checker/action"
	"kern/checker/model"
	"kern/checker/section"
	"kern/checker/standard"
)

// anyMember is a member of any section, ends, holds and loads, by either method;
// mechanisms are among them.
func anyMember(r *rand.Rand) post {
	between := func(low, high float64) float64 { return low + (high-low)*r.Float64() }
	p := post{shape: randomShape(r), fy: 36 + 34*r.Float64(), height: between(3, 30), asd: r.Intn(2) == 0}
	switch r.Intn(10) {
	case 0:
		p.shape = section.Shape{Kind: section.Bar, Depth: between(1, 6), Width: between(0.2, 6)}
	case 1:
		p.shape = section.Shape{Kind: section.Rod, Diameter: between(0.5, 6)}
	case 2:
		d := between(6, 40)
		p.shape = i(d, d*between(0.3, 1.1), d/between(20, 300), d/between(10, 60), r.Float64())
	}
	p.force = math.Exp(between(0, 6)) * []float64{1, 1, 1, -1, 0}[r.Intn(5)]
	if r.Intn(3) == 0 {
		p.overrides = map[string]float64{"B_2": between(0.5, 2)}
	}
	ends := [4]action.End{}
	for k := range ends {
		ends[k] = []action.End{action.Pinned, action.Pinned, action.Fixed, action.Fixed, action.Free, action.Guided}[r.Intn(6)]
	}
	type hold struct {
		at   float64
		what int
	}
	var held []hold
	for range r.Intn(4) {
		held = append(held, hold{between(0.05, 0.95), 1 + r.Intn(7)})
	}
	for k := 1; k < len(held); k++ {
		for j := k; j > 0 && held[j].at < held[j-1].at; j-- {
			held[j], held[j-1] = held[j-1], held[j]
		}
	}
	moments := [2][2]float64{{between(-50, 50), between(-50, 50)}, {between(-9, 9), between(-9, 9)}}
	line := [2]float64{between(-1, 1), between(-0.3, 0.3)}
	what := r.Intn(64)
	p.more = func(m *model.Member) {
		m.Base, m.Top = [2]action.End{ends[0], ends[1]}, [2]action.End{ends[2], ends[3]}
		for _, h := range held {
			m.Holds = append(m.Holds, model.Hold{At: h.at * m.Height, Major: h.what&1 > 0, Minor: h.what&2 > 0, Twist: h.what&4 > 0})
		}
		for a := range moments {
			for e := range 2 {
				if what>>(2*a+e)&1 > 0 {
					m.Loads = append(m.Loads, model.Load{Kind: model.EndMoment, Axis: model.Axis(a), Value: moments[a][e] * kip * foot, At: m.Height * float64(e)})
				}
			}
			if what>>(4+a)&1 > 0 {
				m.Loads = append(m.Loads, model.Load{Kind: model.LineLoad, Axis: model.Axis(a), Value: line[a] * kip / foot, To: m.Height})
			}
		}
	}
	return p
}

// TestAnyMember: whatever a member is, its checks end in one of the verdicts with a
// utilisation or a reason, a mechanism never passes, and what passes under twice the
// loads had less of a utilisation.
func TestAnyMember(t *testing.T) {
	r := rand.New(rand.NewSource(360))
	decided, mechanisms := 0, 0
	for n := range anyMembers {
		p := anyMember(r)
		f := p.frame(t)
		out := Standard{}.Check(f, nil)
		stands := f.Stands[0] && f.Stands[1]
		if !stands {
			mechanisms++
		}
		open := false
		before := map[string]float64{}
		for _, c := range out.Checks {
			switch {
			case c.Verdict == standard.Undecided && c.Why == "":
				t.Errorf("%d: %s is undecided without a reason", n, c.Rule)
			case c.Verdict != standard.Undecided && !(c.Utilisation >= 0 && c.Utilisation < math.Inf(1)):
				t.Errorf("%d: %s %v with a utilisation of %g", n, c.Rule, c.Verdict, c.Utilisation)
			}
			open = open || c.Verdict == standard.Undecided
			if c.Verdict != standard.Undecided {
				before[c.Rule] = c.Utilisation
			}
		}
		for _, c := range out.Coverage {
			open = open || c.State == standard.NotCovered
		}
		if !stands && !open {
			t.Errorf("%d: a mechanism is decided: %+v", n, out.Checks)
		}
		if open {
			continue
		}
		decided++
		more := p.more
		p.more = func(m *model.Member) {
			more(m)
			for k := range m.Loads {
				m.Loads[k].Value *= 2
			}
		}
		_, out = p.values(t, Standard{})
		for _, c := range out.Checks {
			// beyond P_e1 the utilisation is that of the compression, above 1
			if u, ok := before[c.Rule]; ok && c.Verdict == standard.Passes && c.Utilisation < u*(1-1e-9) {
				t.Errorf("%d: %s falls from %g to %g under twice the loads: %+v", n, c.Rule, u, c.Utilisation, p)
			}
		}
	}
	if decided < anyMembers/8 || mechanisms < anyMembers/20 {
		t.Errorf("of %d members %d are decided, %d are mechanisms", anyMembers, decided, mechanisms)
	}
}

// anyMembers is how many TestAnyMember looks at; 50,000 were tried once.
const anyMembers = 300
