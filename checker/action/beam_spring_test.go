package action

import (
	"math"
	"testing"
)

// TestSpringSupports: beams on elastic supports by the force method, which books
// of the strength of materials have (derived by hand from the deflections of a
// cantilever P l³/3, P l²/2 and w l⁴/8 and of a simple beam 5 w l⁴/384, P l³/48,
// w l³/24 and M l/3). E I is 1; moments as in TestClosedForms.
func TestSpringSupports(t *testing.T) {
	const p, w = 7300.0, 1900.0
	for _, l := range []float64{1, 3.6, 12.5} {
		for _, soft := range []float64{1e-3, 0.1, 1, 30, 1e4} {
			k, c := soft*3/(l*l*l), soft/l
			prop := (w * l * l * l * l / 8) / (l*l*l/3 + 1/k)
			tip := p / (k + 3/(l*l*l))
			mid := (5 * w * l * l * l * l / 384) / (l*l*l/48 + 1/k)
			end := (w * l * l * l / 24) / (1/c + l/3)
			force := []Push{{Force: p, From: l}}
			line := []Push{{Line: w, To: l}}
			for i, x := range []struct {
				beam  Beam
				push  []Push
				wants []figure
			}{
				{Beam{Base: Fixed, Top: Free, Springs: []Spring{{At: l, Lateral: k}}}, force, []figure{{'v', l, tip}, {'M', 0, (p - k*tip) * l}}},
				{Beam{Base: Fixed, Top: Free, Springs: []Spring{{At: l, Lateral: k}}}, line, []figure{{'v', l, prop / k}, {'M', 0, w*l*l/2 - prop*l}}},
				{Beam{Base: Pinned, Top: Pinned, Springs: []Spring{{At: l / 2, Lateral: k}}}, line, []figure{{'v', l / 2, mid / k}, {'m', l / 2, -w*l*l/8 + mid*l/4}}},
				{Beam{Base: Pinned, Top: Pinned, Springs: []Spring{{Turning: c}}}, line, []figure{{'M', 0, end}, {'m', l, 0}}},
				{Beam{Base: Pinned, Top: Free, Springs: []Spring{{Turning: c}}}, force, []figure{{'v', l, p*l*l/c + p*l*l*l/3}, {'M', 0, p * l}}},
			} {
				x.beam.Height = l
				got, err := x.beam.Solve([][]Push{x.push})
				if err != nil {
					t.Fatal(err)
				}
				for _, f := range x.wants {
					v, scale := momentAt(got[0], f.z, f.what == 'M'), w*l*l+p*l
					if f.what == 'v' {
						v, scale = deflectionAt(got[0], f.z), math.Abs(f.want)
					}
					if !(math.Abs(v-f.want) <= 1e-9*scale) {
						t.Errorf("case %d, l %g, stiffness %g, %c at %g: %.12g, want %.12g", i, l, soft, f.what, f.z, v, f.want)
					}
				}
			}
		}
	}
}

// TestSpringLimits: a very stiff spring is a hold, a very soft one none; a beam
// that only springs keep in place stands, and one without does not.
func TestSpringLimits(t *testing.T) {
	push := [][]Push{{{Line: 3, To: 5}, {Force: 2, From: 3.5}, {Moment: 4, From: 1}}}
	peak := func(b Beam) float64 {
		b.Height = 5
		pieces, err := b.Solve(push)
		if err != nil {
			t.Fatal(err)
		}
		most := 0.0
		for _, p := range pieces[0] {
			m, _ := p.Largest()
			most = max(most, math.Abs(m))
		}
		return most
	}
	for _, c := range []struct {
		name          string
		sprung, limit Beam
	}{
		{"stiff hold", Beam{Base: Pinned, Top: Pinned, Springs: []Spring{{At: 2, Lateral: 1e9}}}, Beam{Base: Pinned, Top: Pinned, Holds: []float64{2}}},
		{"soft hold", Beam{Base: Pinned, Top: Pinned, Springs: []Spring{{At: 2, Lateral: 1e-9}}}, Beam{Base: Pinned, Top: Pinned}},
		{"stiff base", Beam{Base: Pinned, Top: Pinned, Springs: []Spring{{Turning: 1e9}}}, Beam{Base: Fixed, Top: Pinned}},
		{"stiff top", Beam{Base: Fixed, Top: Free, Springs: []Spring{{At: 5, Lateral: 1e9}}}, Beam{Base: Fixed, Top: Pinned}},
		{"two springs", Beam{Base: Free, Top: Free, Springs: []Spring{{Lateral: 1e9}, {At: 5, Lateral: 1e9}}}, Beam{Base: Pinned, Top: Pinned}},
	} {
		if got, want := peak(c.sprung), peak(c.limit); !(math.Abs(got/want-1) < 1e-6) {
			t.Errorf("%s: %.9g, want %.9g", c.name, got, want)
		}
	}
	for _, b := range []Beam{
		{Base: Free, Top: Free, Height: 5, Springs: []Spring{{At: 2, Lateral: 1}}},
		{Base: Pinned, Top: Free, Height: 5, Springs: []Spring{{At: 0, Lateral: 1}}},
	} {
		if _, err := b.Solve(push); err != ErrMechanism {
			t.Errorf("%v: %v, want a mechanism", b, err)
		}
	}
	b := Beam{Base: Fixed, Top: Free, Height: 5, Springs: []Spring{{At: 5, Lateral: -1}}}
	if _, err := b.Solve(push); err != ErrLoading {
		t.Errorf("a negative spring: %v", err)
	}
}
