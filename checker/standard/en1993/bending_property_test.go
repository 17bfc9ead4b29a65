package en1993_test

import (
	"math"
	"math/rand"
	"strings"
	"testing"

	"kern/checker"
	"kern/lang/unit"
)

// bent makes a random column of EN 1993-1-1 that its loads bend.
func bent(r *rand.Rand) *column {
	c := randomColumn(r, eurocode)
	pick := func(list ...string) string { return list[r.Intn(len(list))] }
	c.fy = min(c.fy, 459e6)
	group := func() string {
		if c.cases {
			return pick("G", "Q", "W")
		}
		return ""
	}
	squash, h := c.loads[0].value/4, 0.2
	c.loads[0].value = squash
	for range 1 + r.Intn(2) {
		axis := pick("major", "minor")
		size := squash * h / 8 * (2*r.Float64() - 1)
		switch r.Intn(4) {
		case 0:
			c.loads[0].axis, c.loads[0].off = axis, h/4*(2*r.Float64()-1)
		case 1:
			c.loads = append(c.loads, load{name: group(), value: 4 * size / c.height / c.height, dim: unit.ForcePerLength, axis: axis})
		case 2:
			c.loads = append(c.loads, load{name: group(), value: 4 * size / c.height, dim: unit.Force, axis: axis, at: 0.1 + 0.8*r.Float64()})
		case 3:
			c.loads = append(c.loads, load{name: group(), value: size, dim: unit.Moment, axis: axis, at: float64(r.Intn(2))})
		}
	}
	return c
}

// symbolIn is the last value of a symbol in the derivation of a rule.
func symbolIn(m *checker.Result, rule, symbol string) float64 {
	v := math.NaN()
	record := m.Derive()
	if record == nil {
		return v
	}
	for _, s := range record.Steps {
		if s.Note == "" && s.Group == rule && m.Symbols().At(s.Symbol).Name == symbol {
			v = s.Value
		}
	}
	return v
}

// biaxial tells whether the interaction of the section is that of (6.41) about
// both axes.
func biaxial(m *checker.Result) bool {
	return !math.IsNaN(symbolIn(m, "section-interaction", "beta_NM"))
}

// TestWorseIsNeverBetterBent makes random bent columns worse in one way and holds
// that no utilisation falls, but for the exceptions that a clause makes, each
// named and counted.
func TestWorseIsNeverBetterBent(t *testing.T) {
	r := rand.New(rand.NewSource(11))
	exceptions, compared := map[string]int{}, map[string]int{}
	examples := map[string]string{}
	for range 1500 {
		c := bent(r)
		before := c.check(t)
		first := utilisations(before)
		compare := func(what string, worse *column, exception func(rule string, a, b float64) string) {
			second := utilisations(worse.check(t))
			for rule, a := range first {
				b, made := second[rule]
				if math.IsNaN(a) {
					continue
				}
				compared[what]++
				if !made || math.IsNaN(b) || b >= a*(1-1e-6)-1e-12 {
					continue
				}
				if why := exception(rule, a, b); why != "" {
					exceptions[what+": "+why]++
					continue
				}
				key := what + " " + rule
				if examples[key] == "" {
					examples[key] = strings.Join(worse.decls(si), "\n")
					t.Errorf("%s: utilisation falls from %.6g to %.6g when %s\n%s", rule, a, b, what, examples[key])
				}
			}
		}
		d := c.copied()
		for i := range d.loads {
			d.loads[i].value *= 1.2
		}
		compare("all loads grow", d, func(rule string, a, b float64) string {
			if rule == "section-interaction" && a > 1 && b > 1 && symbolIn(before, rule, "n") > 0.99 {
				return "N_Ed is more than the resistance: M / M_N is held at n = 0.99 in class 1 and 2, and is not in class 3 and beside shear"
			}
			if rule == "section-interaction" && biaxial(before) {
				return "the exponents of (6.41) grow with the axial force, 6.2.9.1(6): what is raised to them is below 1"
			}
			return ""
		})

		d = c.copied()
		d.fy *= 0.93
		weak := d.check(t)
		compare("f_y falls", d, func(rule string, a, b float64) string {
			switch {
			case symbolIn(before, rule, "class_NM") > symbolIn(weak, rule, "class_NM"):
				return "the section comes into a better class: Table 5.2 and 6.2.5(2) change the modulus in steps"
			case rule == "section-interaction" && biaxial(before):
				return "the exponents of (6.41) grow with n, 6.2.9.1(6)"
			}
			return ""
		})

		d = c.copied()
		d.height *= 1.1
		several := 0
		for _, l := range c.loads {
			if l.axis != "" {
				several++
			}
		}
		compare("the height grows", d, func(rule string, a, b float64) string {
			switch {
			case strings.HasPrefix(rule, "section-shear"):
				return "shear of end moments falls when the column grows: statics"
			case strings.HasPrefix(rule, "section-") && several > 1:
				return "moments of loads that act against each other: statics"
			}
			return ""
		})
	}
	for what, n := range compared {
		if n < 5000 {
			t.Errorf("only %d comparisons of %s", n, what)
		}
		t.Logf("%5d comparisons: %s", n, what)
	}
	for why, n := range exceptions {
		t.Logf("%5d exceptions: %s", n, why)
	}
}
