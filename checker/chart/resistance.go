package chart

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"kern/checker"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// Plain is a pinned column under one load along it, for a chart of resistances.
type Plain struct {
	Section, Material string // as they stand in quotes in a calculation
	Standard, Annex   string // Annex "" for the standard's own
	Method            string // of the standard, "" where it has one alone
	K                 [2]float64
	From, To          float64 // heights, m; To 0 to find one
	Points            int
}

// probeLoad is the load that resistances are found with, N. They are in
// proportion to it: a member that is not bent is linear in its load.
const probeLoad = 1000.0

// text is the calculation of one height.
func (p Plain) text(height float64) string {
	var b strings.Builder
	fmt.Fprintf(&b, "basis { standard %q", p.Standard)
	if p.Method != "" {
		b.WriteString(" by " + p.Method)
	}
	if p.Annex != "" {
		fmt.Fprintf(&b, " annex %q", p.Annex)
	}
	fmt.Fprintf(&b, " }\ncolumn A {\nsection = %q\nmaterial = %q\nheight = %s m\neffective = %s about major\neffective = %s about minor\nselfweight off\nload %s N at top\n}\n",
		p.Section, p.Material, exact(height), exact(p.K[0]), exact(p.K[1]), exact(probeLoad))
	return b.String()
}

func exact(v float64) string { return strconv.FormatFloat(v, 'f', -1, 64) }

// check works out one height. The error is what is wrong with the section or the
// material.
func (p Plain) check(height float64) (*checker.Result, error) {
	text := p.text(height)
	r := checker.Check(lang.Load([]string{"chart.kern"}, func(string) (string, error) { return text, nil }, nil), nil)
	for _, d := range r.Diagnostics {
		if d.Severity == lang.Error && d.Member == "" {
			return nil, fmt.Errorf("%s", d.Message)
		}
	}
	if len(r.Members) != 1 {
		return nil, fmt.Errorf("the section %s of %s gives no result", p.Section, p.Material)
	}
	m := r.Members[0]
	if len(m.Missing) > 0 {
		return nil, fmt.Errorf("%s", m.Missing[0])
	}
	return m, nil
}

// Resistance is the resistance to compression of a section and a steel against
// the height, by every check of a standard, and the least of them.
func Resistance(p Plain) (*Chart, error) {
	if p.K[0] == 0 {
		p.K[0] = 1
	}
	if p.K[1] == 0 {
		p.K[1] = 1
	}
	first, err := p.check(max(p.From, 1))
	if err != nil {
		return nil, err
	}
	if p.To == 0 {
		// a slenderness of 250 about the minor axis: beyond, no one builds columns
		p.To = math.Ceil(250 * first.Member.Section.RMinor / p.K[1])
	}
	if p.From == 0 {
		p.From = p.To / 100
	}
	if !(p.From >= 0.05) || !(p.To > p.From) || p.To > 200 {
		return nil, fmt.Errorf("the heights from %s m to %s m are no range of columns: give --from and --to between 0.05 m and 200 m", unit.Short(p.From, 4), unit.Short(p.To, 4))
	}
	units := first.Units()
	force := units.For(unit.Force)
	c := &Chart{Title: p.Section + ", " + p.Material + ": resistance to compression by " + strings.TrimSpace(p.Standard+" "+p.Method), X: Scale{Name: "height", Unit: "m", Most: p.To}, Y: Scale{Name: "resistance", Unit: force.Symbol}}
	var rules []string
	values := map[string][]float64{}
	var x []float64
	n := max(p.Points, 2)
	gaps, undecided := map[string]bool{}, make([]bool, n)
	for i := range n {
		h := p.From + (p.To-p.From)*float64(i)/float64(n-1)
		m, err := p.check(h)
		if err != nil {
			return nil, err
		}
		x = append(x, h)
		for _, k := range m.Checks {
			if k.Rule == "slenderness" || k.Combination < 0 && k.Verdict != standard.Undecided {
				continue
			}
			if values[k.Rule] == nil {
				rules = append(rules, k.Rule)
				values[k.Rule] = unknown(n)
			}
			v := math.NaN()
			if k.Utilisation > 0 {
				v = probeLoad / k.Utilisation / force.Factor
			} else {
				gaps[k.Rule], undecided[i] = true, true
			}
			values[k.Rule][i] = v
		}
	}
	if len(rules) == 0 {
		return nil, fmt.Errorf("%s makes no check of a column that is compressed", p.Standard)
	}
	for _, r := range rules {
		c.Lines = append(c.Lines, Line{Name: words(r), X: x, Y: values[r]})
		if gaps[r] {
			c.Notes = append(c.Notes, words(r)+" is not decided at some heights: its line and that of the least resistance have gaps there.")
		}
	}
	least := lowest(c.Lines)
	least.Name = "least resistance"
	for i, u := range undecided {
		if u {
			least.Y[i] = math.NaN()
		}
	}
	c.Lines = append(c.Lines, least)
	c.fit(0)
	c.Notes = append([]string{fmt.Sprintf("Pinned ends, K = %s about major and %s about minor, concentric load, no self-weight.", unit.Short(p.K[0], 3), unit.Short(p.K[1], 3)), c.falls(least)}, c.Notes...)
	return c, nil
}

// falls says the first and the last value of a line.
func (c *Chart) falls(l Line) string {
	n := len(l.X) - 1
	return fmt.Sprintf("The least resistance is %s %s at %s m and %s %s at %s m.", short(l.Y[0]), c.Y.Unit, short(l.X[0]), short(l.Y[n]), c.Y.Unit, short(l.X[n]))
}

func unknown(n int) []float64 {
	out := make([]float64, n)
	for i := range out {
		out[i] = math.NaN()
	}
	return out
}

func short(v float64) string {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return "–"
	}
	return unit.Short(v, 4)
}

func words(name string) string { return strings.ReplaceAll(name, "-", " ") }
