package en1993_test

import (
	"fmt"
	"math"
	"math/rand"
	"sort"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// The properties that members by EN 1993-1-1 and by elastic theory have in
// common, on random members written in the language.

// si and us write a value in coherent units with a unit of one system.
type system map[unit.Dim]string

var (
	si = system{unit.Length: "mm", unit.Force: "kN", unit.Stress: "MPa", unit.Moment: "kNm", unit.ForcePerLength: "kN/m", unit.Area: "m2", unit.Density: "kg/m3"}
	us = system{unit.Length: "in", unit.Force: "kip", unit.Stress: "ksi", unit.Moment: "kip-ft", unit.ForcePerLength: "kip/ft", unit.Area: "ft2", unit.Density: "pcf"}
)

func (s system) write(v float64, dim unit.Dim) string {
	u, err := unit.Parse(s[dim])
	if err != nil {
		panic(err)
	}
	return unit.Exact(v/u.Factor) + " " + u.Symbol
}

// load is a load of a random column, coherent units.
type load struct {
	name  string // its case, "" for none
	value float64
	dim   unit.Dim
	at    float64 // share of the height
	axis  string  // of an offset or of a load across
	off   float64 // m
}

// column is a random member.
type column struct {
	basis      string
	shape      string // word of the shape
	made       string
	size       map[string]float64 // m
	e, fy      float64            // Pa
	height     float64            // m
	base, top  string
	holds      []string  // what each restrains
	at         []float64 // share of the height
	loads      []load
	cases      bool
	slenderest float64
}

// decls are the declarations of a calculation with one column, in any system.
func (c *column) decls(s system) []string {
	w := func(v float64, dim unit.Dim) string { return s.write(v, dim) }
	out := []string{c.basis}
	out = append(out, fmt.Sprintf("material steel { E = %s; fy = %s; density = %s }", w(c.e, unit.Stress), w(c.fy, unit.Stress), w(7850, unit.Density)))
	var names []string
	for n := range c.size {
		names = append(names, n)
	}
	sort.Strings(names)
	var b strings.Builder
	fmt.Fprintf(&b, "section shape = %s {\n", c.shape)
	for _, n := range names {
		fmt.Fprintf(&b, "    %s = %s\n", n, w(c.size[n], unit.Length))
	}
	if c.made != "" {
		fmt.Fprintf(&b, "    made = %s\n", c.made)
	}
	out = append(out, b.String()+"}")
	if c.cases {
		out = append(out, "case G permanent", "case Q imposed \"B\"", "case W wind")
	}
	b.Reset()
	fmt.Fprintf(&b, "column A1 {\n    section = shape\n    material = steel\n    height = %s\n    base %s\n    top %s\n", w(c.height, unit.Length), c.base, c.top)
	for i, h := range c.holds {
		fmt.Fprintf(&b, "    hold %s at %s\n", h, w(c.at[i]*c.height, unit.Length))
	}
	for _, l := range c.loads {
		fmt.Fprintf(&b, "    load %s %s", l.name, w(l.value, l.dim))
		at := w(l.at*c.height, unit.Length)
		switch {
		case l.dim == unit.Force && l.off == 0 && l.axis != "":
			fmt.Fprintf(&b, " across %s at %s", l.axis, at)
		case l.dim == unit.Force:
			fmt.Fprintf(&b, " at %s", at)
			if l.off != 0 {
				fmt.Fprintf(&b, " offset %s about %s", w(l.off, unit.Length), l.axis)
			}
		case l.dim == unit.ForcePerLength:
			fmt.Fprintf(&b, " about %s", l.axis)
		default:
			fmt.Fprintf(&b, " about %s at %s", l.axis, at)
		}
		b.WriteString("\n")
	}
	if c.slenderest > 0 {
		fmt.Fprintf(&b, "    limit slenderness = %s\n", unit.Exact(c.slenderest))
	}
	return append(out, b.String()+"}")
}

// check works the column out.
func (c *column) check(t *testing.T) *checker.Result {
	t.Helper()
	return worked(t, map[string]string{"a.kern": strings.Join(c.decls(si), "\n")})
}

func worked(t *testing.T, files map[string]string) *checker.Result {
	t.Helper()
	var names []string
	for n := range files {
		names = append(names, n)
	}
	p := lang.Load(names, func(name string) (string, error) { return files[name], nil }, nil)
	r := checker.Check(p, nil)
	if len(r.Members) != 1 {
		t.Fatalf("%d members in\n%v", len(r.Members), files)
	}
	return r.Members[0]
}

// utilisations are those of each check; NaN for undecided ones.
func utilisations(r *checker.Result) map[string]float64 {
	out := map[string]float64{}
	for _, c := range r.Checks {
		out[c.Rule] = c.Utilisation
	}
	return out
}

const (
	eurocode = "EN 1993-1-1:2005"
	euler    = "elastic"
)

// randomColumn makes a column of a standard whose loads all press it, with
// bending in the elastic standard alone.
func randomColumn(r *rand.Rand, name string) *column {
	pick := func(list ...string) string { return list[r.Intn(len(list))] }
	between := func(low, high float64) float64 { return low + (high-low)*r.Float64() }
	h := between(0.08, 0.5)
	c := &column{e: between(190e9, 210e9), fy: between(200e6, 460e6), height: between(1, 9), cases: r.Intn(2) == 0}
	switch c.shape = pick("tube", "pipe", "bar", "rod", "isection", "isection", "channel", "tee", "angle"); c.shape {
	case "tube":
		c.made = pick("hot", "cold", "welded")
		c.size = map[string]float64{"depth": h, "width": h * between(0.5, 1), "wall": h / between(12, 60)}
	case "pipe":
		c.made = pick("hot", "cold", "welded")
		c.size = map[string]float64{"outside": h, "wall": h / between(12, 60)}
	case "bar":
		c.size = map[string]float64{"depth": h / 3, "width": h / 3 * between(0.3, 1)}
	case "rod":
		c.size = map[string]float64{"diameter": h / 3}
	case "angle":
		c.made = "rolled"
		c.size = map[string]float64{"depth": h / 2, "width": h / 2, "wall": h / 2 / between(6, 14)}
	default:
		c.made = "welded"
		c.size = map[string]float64{"depth": h, "width": h * between(0.4, 1), "web": h / between(15, 60), "flange": h / between(12, 40)}
		if c.shape == "isection" && r.Intn(2) == 0 {
			c.made, c.size["root"] = "rolled", h/40
		}
	}
	if c.shape == "channel" {
		c.size["width"] = h * between(0.25, 0.5)
	}
	c.basis = "basis { standard \"" + name + "\"; selfweight " + pick("on", "off")
	if c.cases {
		c.basis += "; actions \"EN 1990:2002\""
	}
	c.basis += " }"
	c.base, c.top, _ = strings.Cut(pick("pinned pinned", "pinned pinned", "fixed pinned", "fixed fixed", "fixed free", "fixed guided", "pinned guided"), " ")
	for i := range r.Intn(4) {
		c.holds = append(c.holds, pick("both", "minor", "major", "twist"))
		c.at = append(c.at, (float64(i)+between(0.1, 0.9))/4)
	}
	if r.Intn(3) == 0 {
		c.slenderest = between(60, 250)
	}
	group := func() string {
		if c.cases {
			return pick("G", "Q", "W")
		}
		return ""
	}
	area := 0.02 * h * h
	squash := c.fy * area * 20 * between(0.02, 0.6)
	c.loads = append(c.loads, load{name: group(), value: squash, dim: unit.Force, at: 1})
	if r.Intn(3) == 0 {
		c.loads = append(c.loads, load{name: group(), value: squash * between(0.1, 1), dim: unit.Force, at: between(0.2, 0.9)})
	}
	if name == euler {
		switch r.Intn(5) {
		case 0:
			c.loads[0].axis, c.loads[0].off = pick("major", "minor"), h*between(-0.4, 0.4)
		case 1:
			c.loads = append(c.loads, load{name: group(), value: squash / 100 / c.height * between(-1, 1), dim: unit.ForcePerLength, axis: pick("major", "minor")})
		case 2:
			c.loads = append(c.loads, load{name: group(), value: squash / 50 * between(-1, 1), dim: unit.Force, axis: pick("major", "minor"), at: between(0.1, 0.9)})
		case 3:
			c.loads = append(c.loads, load{name: group(), value: squash * h / 20 * between(-1, 1), dim: unit.Moment, axis: pick("major", "minor"), at: 1})
		}
	}
	return c
}

// copied is a column that can be changed without the first.
func (c *column) copied() *column {
	d := *c
	d.loads = append([]load(nil), c.loads...)
	d.holds = append([]string(nil), c.holds...)
	d.at = append([]float64(nil), c.at...)
	return &d
}

func (c *column) bends() bool {
	for _, l := range c.loads {
		if l.axis != "" {
			return true
		}
	}
	return false
}

// buckles tells whether the member buckles before it yields.
func buckles(r *checker.Result) bool {
	for _, c := range r.Checks {
		if c.Rule == "first-yield" && c.Dim == unit.Force {
			return c.Verdict == standard.Fails
		}
	}
	return false
}

// TestWorseIsNeverBetter makes random columns worse in one way and holds that
// no check's utilisation falls. Where a clause makes it fall all the same, the
// exception is named, and counted so that it shows when it goes away.
func TestWorseIsNeverBetter(t *testing.T) {
	r := rand.New(rand.NewSource(5))
	exceptions := map[string]int{}
	compared := map[string]int{}
	for i := range 1600 {
		name := []string{eurocode, euler}[i%2]
		c := randomColumn(r, name)
		before := c.check(t)
		first := utilisations(before)
		compare := func(what string, worse *column, exception func(rule string, a, b float64) string) {
			after := worse.check(t)
			second := utilisations(after)
			for rule, a := range first {
				b, made := second[rule]
				if math.IsNaN(a) || rule == "slenderness" && what == "load" {
					continue
				}
				compared[what]++
				if made && (math.IsNaN(b) || b >= a*(1-1e-12)-1e-12) {
					continue
				}
				why := exception(rule, a, b)
				if why == "" && a > 1 && rule == "first-yield" && buckles(after) {
					why = "first yield beyond the critical load: no stress can be given, the axial force over the critical load is"
				}
				if why != "" {
					exceptions[why]++
					continue
				}
				t.Errorf("%s, %s: utilisation falls from %.6g to %.6g when %s\n%s", name, rule, a, b, what, strings.Join(worse.decls(si), "\n"))
			}
			// nor does the verdict get better, unless a utilisation fell
			if before.Verdict == standard.Fails && after.Verdict == standard.Passes {
				fell := false
				for rule, a := range first {
					fell = fell || second[rule] < a
				}
				if !fell {
					t.Errorf("%s: fails, and passes when %s", name, what)
				}
			}
		}
		none := func(string, float64, float64) string { return "" }
		statics := func(rule string, _, _ float64) string {
			if name == euler && strings.HasPrefix(rule, "section-shear") {
				return "shear of end moments falls when the column grows or loses a hold: statics"
			}
			return ""
		}

		d := c.copied()
		for j := range d.loads {
			if d.loads[j].dim == unit.Force && (d.loads[j].axis == "" || d.loads[j].off != 0) {
				d.loads[j].value *= 1.3
			}
		}
		compare("the axial loads grow", d, none)

		d = c.copied()
		d.height *= 1.15
		compare("the height grows", d, statics)

		d = c.copied()
		d.fy *= 0.9
		compare("f_y falls", d, func(string, float64, float64) string {
			// TestNamedExceptions shows it; random columns rarely do
			if name == eurocode && classOf(before) == 4 && classOf(d.check(t)) < 4 {
				return "f_y falls and the section leaves class 4: Table 5.2 counts internal parts in full up to 42 epsilon, EN 1993-1-5 4.4(2) reduces them from 38.2 epsilon on"
			}
			return ""
		})

		if len(c.holds) > 0 {
			d = c.copied()
			k := r.Intn(len(d.holds))
			d.holds = append(d.holds[:k], d.holds[k+1:]...)
			d.at = append(d.at[:k], d.at[k+1:]...)
			clamped := c.base == "fixed" || c.top == "fixed" || c.top == "guided"
			compare("a hold is removed", d, func(rule string, _, _ float64) string {
				switch {
				case clamped && c.top != "free":
					return "a hold near a clamped end is removed: each stretch is taken for itself, pinned where the column goes on, a lower bound that the hold does not raise"
				case rule == "first-yield" && c.bends():
					return "a hold is removed from a bent column: the hold itself makes moments"
				}
				return statics(rule, 0, 0)
			})
		}
	}
	for what, n := range compared {
		t.Logf("%5d comparisons: %s", n, what)
		if n < 500 {
			t.Errorf("only %d comparisons of %s", n, what)
		}
	}
	for why, n := range exceptions {
		t.Logf("%5d exceptions: %s", n, why)
	}
}

// classOf is the class of the section in a member's derivation.
func classOf(r *checker.Result) float64 {
	v := math.NaN()
	for _, s := range r.Derive().Steps {
		if s.Note == "" && r.Symbols().At(s.Symbol).Name == "class" {
			v = s.Value
		}
	}
	return v
}
