package elastic

import (
	"encoding/csv"
	"kern/lang/unit"
	"math"
	"os"
	"sort"
	"strconv"
	"testing"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/section"
	"kern/checker/standard"
)

// table reads a file of testdata: the records by column name.
func table(t testing.TB, name string) []map[string]string {
	t.Helper()
	f, err := os.Open("testdata/" + name)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	r := csv.NewReader(f)
	r.Comment = '#'
	lines, err := r.ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var out []map[string]string
	for _, l := range lines[1:] {
		m := map[string]string{}
		for i, head := range lines[0] {
			m[head] = l[i]
		}
		out = append(out, m)
	}
	return out
}

// bent is a column of one stretch that is bent about its major axis.
type bent struct {
	area, inertia, modulus, height float64 // m2, m4, m3, m
	base, top                      action.End
	holds                          []float64
	loads                          []model.Load
	simple                         bool // amplification simple

	whole           bool         // critical exact
	springs         []model.Hold // holds with a stiffness
	baseSpr, topSpr model.Spring
}

const modulusE = 210e9

// check works the column out with the yield strength fy, Pa.
func (b bent) check(fy float64) (*standard.Outcome, *derivation.Record) {
	c := &model.Case{}
	c.Name = "load"
	env := &model.Env{Cases: []*model.Case{c}, Basis: model.Basis{Standard: "elastic", Overrides: map[string]model.Override{}, Simple: b.simple}}
	nan := math.NaN() // as the language leaves what a given section does not state
	s := &model.Section{Name: "s", Thickness: nan, Properties: section.Properties{Area: b.area, IMajor: b.inertia, IMinor: b.inertia, WelMajor: b.modulus, WelMinor: b.modulus,
		It: nan, Iw: nan, AvMajor: nan, AvMinor: nan}}
	s.Shape.Kind = section.Given
	m := &model.Member{Name: "A1", Section: s, Material: &model.Material{Name: "m", E: modulusE, G: 81e9, Fy: fy, Density: 7850}, Height: b.height,
		Base: [2]action.End{b.base, b.base}, Top: [2]action.End{b.top, b.top}, Loads: b.loads}
	for _, h := range b.holds {
		m.Holds = append(m.Holds, model.Hold{At: h, Major: true, Minor: true})
	}
	m.Exact = b.whole
	for _, h := range b.springs {
		h.Major, h.Minor = true, true
		m.Holds = append(m.Holds, h)
	}
	sort.Slice(m.Holds, func(i, j int) bool { return m.Holds[i].At < m.Holds[j].At })
	m.BaseSpring, m.TopSpring = [2]model.Spring{b.baseSpr, b.baseSpr}, [2]model.Spring{b.topSpr, b.topSpr}
	one := model.Combination{}
	one.Name, one.Factors = "load", []float64{1}
	record := &derivation.Record{Set: set}
	return Standard{}.Check(standard.NewFrame(env, m, []model.Combination{one}), record), record
}

// last is the last value of a symbol in a record, NaN when there is none.
func last(record *derivation.Record, symbol string) float64 {
	v := math.NaN()
	for _, s := range record.Steps {
		if s.Note == "" && set.At(s.Symbol).Name == symbol {
			v = s.Value
		}
	}
	return v
}

func firstYield(t testing.TB, o *standard.Outcome) standard.Check {
	t.Helper()
	for _, c := range o.Checks {
		if c.Rule == "first-yield" {
			return c
		}
	}
	t.Fatal("no check of first yield")
	return standard.Check{}
}

// column reads a record of beamcolumn.csv: mm and N there.
func column(t testing.TB, r map[string]string) bent {
	t.Helper()
	num := func(name string) float64 {
		if r[name] == "" {
			return 0
		}
		x, err := strconv.ParseFloat(r[name], 64)
		if err != nil {
			t.Fatal(err)
		}
		return x
	}
	b := bent{area: num("A") * 1e-6, inertia: num("EI") * 1e-6 / modulusE, modulus: num("W") * 1e-9, height: num("L") * 1e-3}
	h := b.height
	// a moment of a member turns the way a force above it would: at the top of
	// a column on two pins that bends it the other way than a force across it
	atTop := -1.0
	if r["ends"] == "fixed-free" {
		b.base, b.top, atTop = action.Fixed, action.Free, 1
	}
	b.loads = []model.Load{{Kind: model.AxialLoad, Value: num("N"), At: h}}
	add := func(l model.Load) {
		if l.Value != 0 {
			b.loads = append(b.loads, l)
		}
	}
	add(model.Load{Kind: model.EndMoment, Value: atTop * num("M_top") * 1e-3, At: h})
	add(model.Load{Kind: model.EndMoment, Value: num("M_base") * 1e-3, At: 0})
	add(model.Load{Kind: model.LineLoad, Value: num("w") * 1e3, At: 0, To: h})
	add(model.Load{Kind: model.PointLoad, Value: num("P"), At: num("a") * 1e-3})
	return b
}

// spread is the range of a ratio.
type spread []float64

func (s spread) log(t *testing.T, name string) {
	if len(s) == 0 {
		return
	}
	sort.Float64s(s)
	q := func(p float64) float64 { return s[int(p*float64(len(s)-1))] }
	t.Logf("%-52s %4d: least %.4f, 10 %% %.4f, median %.4f, 90 %% %.4f, greatest %.4f", name, len(s), s[0], q(0.1), q(0.5), q(0.9), s[len(s)-1])
}

// TestBeamColumnsOfSecondImplementation holds the stress of eccentric and
// laterally loaded columns against testdata/beamcolumn.csv, the exact solution
// of the beam-column equation by a second implementation. It is not a published
// source.
func TestBeamColumnsOfSecondImplementation(t *testing.T) {
	groups := map[string]spread{}
	for _, r := range table(t, "beamcolumn.csv") {
		b := column(t, r)
		num := func(name string) float64 {
			x, _ := strconv.ParseFloat(r[name], 64)
			return x
		}
		o, record := b.check(355e6)
		c := firstYield(t, o)
		if r["status"] == "unstable" {
			if c.Verdict != standard.Fails || c.Dim != unit.Force || !(c.Utilisation >= 1) {
				t.Errorf("record %s: N >= N_cr and yet the check says %s, %g of %g", r["id"], c.Verdict, c.Demand, c.Capacity)
			}
			continue
		}
		group := r["ends"] + ", loads across the member alone"
		switch {
		case num("M_top") == num("M_base") && num("w") == 0 && num("P") == 0 && r["ends"] == "pinned-pinned":
			group = r["ends"] + ", equal end moments"
		case num("w") == 0 && num("P") == 0:
			group = r["ends"] + ", end moments alone"
		case num("M_top") != 0 || num("M_base") != 0:
			group = r["ends"] + ", end moments and loads across the member"
		}
		// P_cr
		if got, want := last(record, "P_cr_major"), num("N_cr"); math.Abs(got/want-1) > 1e-9 {
			t.Errorf("record %s: P_cr = %g, exact %g", r["id"], got, want)
		}
		// first order
		if m1 := num("M1_max_abs") * 1e-3; m1 > 0 {
			b.loads[0].Value = 0
			plain, _ := b.check(355e6)
			if got := firstYield(t, plain).Demand * b.modulus; math.Abs(got/m1-1) > 1e-9 {
				t.Errorf("record %s: first-order moment %g Nm, second implementation %g", r["id"], got, m1)
			}
		}
		exact := num("sigma2_max") * 1e6
		over := c.Demand / exact
		groups[group] = append(groups[group], over)
		if over < 0.999 {
			t.Errorf("record %s, %s: sigma = %.5g MPa, exact %.5g (%.4f), n = %.3f, M_top %s, M_base %s, w %s, P %s at %s of %s", r["id"], group, c.Demand/1e6, exact/1e6, over, num("N")/num("N_cr"),
				r["M_top"], r["M_base"], r["w"], r["P"], r["a"], r["L"])
		}
		if group == "pinned-pinned, equal end moments" && math.Abs(over-1) > 1e-6 {
			t.Errorf("record %s: equal end moments: sigma is %.9f times the exact one", r["id"], over)
		}
		b = column(t, r)
		b.simple = true
		plain, _ := b.check(355e6)
		under := firstYield(t, plain).Demand / exact
		groups["simple: "+group] = append(groups["simple: "+group], under)
		// 1/(1 - n) over the secant falls to pi/4 as n goes to 1
		if under < math.Pi/4 {
			t.Errorf("record %s: amplification simple gives %.4f of the exact stress", r["id"], under)
		}
	}
	var names []string
	for n := range groups {
		names = append(names, n)
	}
	sort.Strings(names)
	for _, n := range names {
		groups[n].log(t, n)
	}
}
