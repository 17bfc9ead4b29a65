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

// randomShape is a section of any kind, in inches, with plates from stocky to
// slender.
func randomShape(r *rand.Rand) section.Shape {
	between := func(low, high float64) float64 { return low + (high-low)*r.Float64() }
	size := between(3, 16)
	switch r.Intn(7) {
	case 0:
		t := size / between(8, 70)
		return section.Shape{Kind: section.Tube, Made: section.Cold, Depth: size, Width: size * between(0.5, 1), Wall: t, OuterRadius: 2 * t, InnerRadius: t}
	case 1:
		return section.Shape{Kind: section.Tube, Made: section.Welded, Depth: size, Width: size * between(0.5, 1), Wall: size / between(10, 80)}
	case 2:
		return section.Shape{Kind: section.Pipe, Made: section.Hot, Diameter: size, Wall: size / between(8, 200)}
	case 3:
		return section.Shape{Kind: section.ISection, Made: section.Welded, Depth: size, Width: size * between(0.4, 1.1), Web: size / between(15, 90), Flange: size / between(10, 40)}
	case 4:
		return section.Shape{Kind: section.Channel, Made: section.Welded, Depth: size, Width: size * between(0.25, 0.6), Web: size / between(15, 60), Flange: size / between(12, 30)}
	case 5:
		return section.Shape{Kind: section.Tee, Made: section.Welded, Depth: size, Width: size * between(0.5, 2), Web: size / between(8, 35), Flange: size / between(8, 25)}
	}
	return section.Shape{Kind: section.Angle, Made: section.Rolled, Depth: size, Width: size * between(0.5, 1), Wall: size / between(6, 25), Root: size / 40}
}

// strengthOf is the nominal compressive strength, kip.
func strengthOf(t *testing.T, p post) float64 {
	v, _ := p.values(t, Standard{})
	return v["P_n"] / kip
}

// TestStrengthFalls: more length, a hold less or a lower yield stress never make a
// column stronger; it is never stronger than its yielding, nor than Euler's load
// about either axis.
func TestStrengthFalls(t *testing.T) {
	r := rand.New(rand.NewSource(22))
	for range 300 {
		p := post{shape: randomShape(r), fy: 36 + 34*r.Float64(), height: 3 + 25*r.Float64(), force: 1}
		n := strengthOf(t, p)
		if math.IsNaN(n) {
			continue // out of scope
		}
		less := func(what string, change func(p *post)) {
			q := p
			change(&q)
			if m := strengthOf(t, q); !(m <= n*(1+1e-9)) {
				t.Errorf("%+v: P_n = %.5g kip, %s %.5g", p, n, what, m)
			}
		}
		less("longer", func(p *post) { p.height *= 1.1 })
		less("K = 1.2 about y–y", func(p *post) { p.ky = 1.2 })
		less("K = 1.2 about x–x", func(p *post) { p.kx = 1.2 })
		less("twist held less", func(p *post) { p.more = func(m *model.Member) { m.Factor[2] = 1.5 } })
		held := p
		held.more = func(m *model.Member) {
			m.Holds = append(m.Holds, model.Hold{At: m.Height / 2, Major: true, Minor: true, Twist: true})
		}
		if m := strengthOf(t, held); !(m >= n*(1-1e-9)) {
			t.Errorf("%+v: P_n = %.5g kip, held in the middle %.5g", p, n, m)
		}
		v, _ := p.values(t, Standard{})
		yield := v["F_y"] * v["A_g"] / kip
		for _, axis := range []string{"x", "y"} {
			l := v["L_"+axis]
			if euler := math.Pi * math.Pi * v["E"] * v["I_"+axis] / (l * l) / kip; !(n <= min(yield, euler)*(1+1e-9)) {
				t.Errorf("%+v: P_n = %.5g kip, yield %.5g, Euler %.5g", p, n, yield, euler)
			}
		}
		if ae := v["A_e"]; !(ae <= v["A_g"]*(1+1e-12)) && !math.IsNaN(ae) && ae != 0 {
			t.Errorf("%+v: A_e = %.5g, A_g = %.5g", p, ae, v["A_g"])
		}
	}
}

// TestMethods: what LRFD and ASD make of one nominal strength stands in the ratio
// 0.9 times 1.67, in every check of compression and tension.
func TestMethods(t *testing.T) {
	r := rand.New(rand.NewSource(16))
	for range 200 {
		p := post{shape: randomShape(r), fy: 50, fu: 65, height: 3 + 20*r.Float64(), force: 20 - 40*r.Float64()}
		a, _ := p.values(t, Standard{})
		p.asd = true
		b, _ := p.values(t, Edition2016)
		for lrfd, asd := range map[string]string{"phi_P_n": "P_n_over_Omega", "phi_P_n_x": "P_n_x_over_Omega", "phi_P_n_T": "P_n_T_over_Omega", "phi_P_n_Y": "P_n_Y_over_Omega"} {
			if _, ok := a[lrfd]; ok && !math.IsNaN(a[lrfd]) && !(math.Abs(a[lrfd]/b[asd]/(0.9*1.67)-1) <= 1e-12) {
				t.Errorf("%+v: %s = %g, %s = %g", p, lrfd, a[lrfd], asd, b[asd])
			}
		}
	}
}

// TestSinglySymmetric: where the section has an axis of symmetry, E4(b) is the
// lowest root of the cubic of E4(c).
func TestSinglySymmetric(t *testing.T) {
	r := rand.New(rand.NewSource(4))
	n := 0
	for range 300 {
		p := post{shape: randomShape(r), fy: 50, height: 3 + 20*r.Float64(), force: 1}
		v, _ := p.values(t, Standard{})
		if _, ok := v["H"]; !ok {
			continue
		}
		n++
		x, y := v["x_o"]/v["r_o"], v["y_o"]/v["r_o"]
		fx, fy := v[ftb+"F_e_x"], v[ftb+"F_e_y"]
		if x == 0 {
			fx = 1e6 * (fy + v["F_e_z"]) // the other axis takes no part
		} else {
			fy = 1e6 * (fx + v["F_e_z"])
		}
		if root := lowestRoot(fx, fy, v["F_e_z"], x, y); !(math.Abs(root/v["F_e_T"]-1) <= 1e-9) {
			t.Errorf("%+v: F_e_T = %g, root of the cubic %g", p, v["F_e_T"], root)
		}
	}
	if n < 60 {
		t.Errorf("only %d sections with one axis of symmetry", n)
	}
}

// TestDirectAnalysis: tau_b is 1 up to half of the strength of the cross-section and
// falls to nothing at the whole of it; lengths have no factors. By hand: alpha P_r =
// 0.8 P_ns gives 4 · 0.8 · 0.2 = 0.64.
func TestDirectAnalysis(t *testing.T) {
	bar := post{shape: section.Shape{Kind: section.Bar, Depth: 4, Width: 4}, fy: 50, height: 4}
	for _, c := range []struct {
		share, want float64
		asd         bool
	}{{0.1, 1, false}, {0.5, 1, false}, {0.8, 0.64, false}, {0.5, 0.64, true}, {1, 0, false}, {1.2, 0, false}} {
		p := bar
		p.asd, p.force = c.asd, c.share*16*50
		record := p.direct(t)
		if got := record["tau_b"]; !(math.Abs(got-c.want) <= 1e-9) {
			t.Errorf("P_r/P_ns = %g, ASD %v: tau_b = %g, want %g", c.share, c.asd, got, c.want)
		}
	}
	loose := bar
	loose.force = 10
	loose.more = func(m *model.Member) {
		m.Base, m.Top = [2]action.End{action.Fixed, action.Fixed}, [2]action.End{action.Free, action.Free}
	}
	if k := loose.direct(t)["K_y"]; k != 1 {
		t.Errorf("K = %g by direct analysis", k)
	}
}

// direct is values by the direct analysis method.
func (p post) direct(t *testing.T) map[string]float64 {
	t.Helper()
	f := p.frame(t)
	f.Env.Basis.Direct = true
	v, _ := valuesOf(Standard{}, standard.NewFrame(f.Env, f.Member, f.Combinations))
	return v
}

// TestUnsound gives the standard values that the language would refuse, one at a
// time: something must stay undecided or fail, whatever the value.
func TestUnsound(t *testing.T) {
	sound := func() (post, func(p post) bool) {
		p := post{shape: section.Shape{Kind: section.ISection, Made: section.Welded, Depth: 12, Width: 8, Web: 0.4, Flange: 0.6}, fy: 50, height: 10, force: 20}
		return p, func(p post) bool {
			out := Standard{}.Check(p.frame(t), nil)
			passed := 0
			for _, c := range out.Checks {
				if c.Verdict != standard.Passes {
					return false
				}
				passed++
			}
			for _, c := range out.Coverage {
				if c.State == standard.NotCovered {
					return false
				}
			}
			return passed > 0
		}
	}
	p, passes := sound()
	if !passes(p) {
		t.Fatal("the member does not pass to begin with")
	}
	for name, set := range map[string]func(m *model.Member, v float64){
		"A": func(m *model.Member, v float64) { m.Section.Area = v }, "I_x": func(m *model.Member, v float64) { m.Section.IMajor = v },
		"I_y": func(m *model.Member, v float64) { m.Section.IMinor = v }, "J": func(m *model.Member, v float64) { m.Section.It = v },
		"C_w": func(m *model.Member, v float64) { m.Section.Iw = v }, "E": func(m *model.Member, v float64) { m.Material.E = v },
		"G": func(m *model.Member, v float64) { m.Material.G = v }, "F_y": func(m *model.Member, v float64) { m.Material.Fy = v },
		"height": func(m *model.Member, v float64) { m.Height = v }, "force": func(m *model.Member, v float64) { m.Loads[0].Value = v },
	} {
		for _, bad := range []float64{math.NaN(), math.Inf(1), math.Inf(-1), 0, -1} {
			p, passes := sound()
			p.more = func(m *model.Member) { set(m, bad) }
			// without a part of its resistance to torsion a member may still pass
			if passes(p) && !(bad == 0 && (name == "J" || name == "C_w") || name == "C_w" && math.IsNaN(bad)) {
				t.Errorf("%s = %g: every check passes", name, bad)
			}
		}
	}
}

// TestValues: a requirement reads the strength of the check of that name, whatever
// the checks of combined forces compute after it.
func TestValues(t *testing.T) {
	p := post{shape: section.Shape{Kind: section.ISection, Made: section.Rolled, Depth: 12, Width: 8, Web: 0.4, Flange: 0.6, Root: 0.4}, fy: 50, height: 20, force: 10,
		more: func(m *model.Member) {
			m.Holds = append(m.Holds, model.Hold{At: 0.55 * m.Height, Minor: true, Twist: true})
			m.Loads = append(m.Loads, model.Load{Kind: model.PointLoad, Value: 40 * kip, At: 0.85 * m.Height})
		}}
	out := Standard{}.Check(p.frame(t), nil)
	for rule, word := range map[string]string{"flexural-buckling-major": "N_b_major", "flexural-buckling-minor": "N_b_minor"} {
		c, ok := verdict(out, rule)
		q, known := out.Value(Standard{}.Alias(word))
		if !ok || !known || q.Value != c.Capacity {
			t.Errorf("%s = %g, the check has %g", word, q.Value, c.Capacity)
		}
	}
}
