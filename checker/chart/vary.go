package chart

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// Range is the part of a quantity that a chart shows, in SI units; both zero to
// find one.
type Range struct {
	From, To float64
	Points   int
}

// Parameters are the words for what can be varied.
func Parameters(r *checker.Result) []string {
	out := []string{"height", "load"}
	if r.Env().Declared() {
		for _, c := range r.Env().Cases {
			if c.Place.Decl != nil {
				out = append(out, "load:"+c.Name)
			}
		}
	}
	return append(out, "offset:major", "offset:minor")
}

// varied is a quantity of a member that can have other values.
type varied struct {
	name  string
	dim   unit.Dim
	now   float64
	where Range
	at    func(v float64) *checker.Result
	note  string
}

// Vary is the utilisation of a member against one quantity: "height", "load"
// (a factor on all its loads), "load:CASE" (on those of a case), "offset:major"
// or "offset:minor" (an offset on top of those of its loads along it). Every
// point is checked as if the calculation said so.
func Vary(report *checker.Report, r *checker.Result, parameter string, where Range) (*Chart, error) {
	if len(r.Missing) > 0 {
		return nil, fmt.Errorf("%s has no result: %s", r.Name, r.Missing[0])
	}
	v, err := find(report, r, parameter)
	if err != nil {
		return nil, err
	}
	if where.To == 0 {
		where.To = v.where.To
	}
	if where.From == 0 {
		where.From = v.where.From
	}
	if !(where.To > where.From) {
		return nil, fmt.Errorf("the range of the %s from %s to %s is none: give --from and --to", v.name, short(where.From), short(where.To))
	}
	return v.chart(r, where), nil
}

func find(report *checker.Report, r *checker.Result, parameter string) (*varied, error) {
	what, of, _ := strings.Cut(parameter, ":")
	if in := r.Member.Imported; in != nil {
		if parameter != "load" {
			return nil, fmt.Errorf("the forces of %s come from the table '%s', which does not say what they would be then: only load can be varied", r.Name, in.Table)
		}
		return &varied{name: "factor on the forces", now: 1, where: Range{To: loadRange(r)}, note: "All forces of the table are multiplied by the factor.", at: func(f float64) *checker.Result {
			return r.With(func(m *model.Member) { m.Imported = in.Scaled(f, f) })
		}}, nil
	}
	switch {
	case parameter == "height" || parameter == "length":
		return height(report, r), nil
	case what == "load":
		return load(r, of)
	case what == "offset":
		axis := slices.Index([]string{"major", "minor"}, of)
		if of == "" {
			axis = 0
		}
		if axis >= 0 {
			return offset(r, model.Axis(axis))
		}
	}
	return nil, fmt.Errorf("'%s' is nothing that can be varied: say %s", parameter, lang.OrList(Parameters(r)))
}

// load is a factor on the loads, of a case or of all.
func load(r *checker.Result, name string) (*varied, error) {
	one := -1
	if name != "" {
		one = slices.IndexFunc(r.Env().Cases, func(c *model.Case) bool { return c.Name == name })
		if one < 0 {
			return nil, fmt.Errorf("'%s' is no load case of the calculation: say %s", name, lang.OrList(Parameters(r)))
		}
	}
	v := &varied{name: "factor on the loads", now: 1, note: "All loads are multiplied by the factor; self-weight stays."}
	if one >= 0 {
		v.name = "factor on the loads of case " + name
		v.note = "The loads of the case are multiplied by the factor; the others and self-weight stay."
	}
	v.at = func(f float64) *checker.Result {
		return r.With(func(m *model.Member) {
			for i := range m.Loads {
				if one < 0 || m.Loads[i].Case == one {
					m.Loads[i].Value *= f
				}
			}
		})
	}
	if !slices.ContainsFunc(r.Member.Loads, func(l model.Load) bool { return (one < 0 || l.Case == one) && l.Value != 0 }) {
		if one < 0 {
			return nil, fmt.Errorf("%s carries no load that could be varied", r.Name)
		}
		return nil, fmt.Errorf("%s carries no load of case %s", r.Name, name)
	}
	v.where.To = loadRange(r)
	return v, nil
}

// loadRange is up to which factor on its loads a member is looked at.
func loadRange(r *checker.Result) float64 {
	if u := r.Utilisation; u > 0 {
		return min(max(2, math.Ceil(1.3/u)), 20)
	}
	return 2
}

// offset is what the loads along the member stand off further.
func offset(r *checker.Result, axis model.Axis) (*varied, error) {
	if !slices.ContainsFunc(r.Member.Loads, func(l model.Load) bool { return l.Kind == model.AxialLoad && l.Value != 0 }) {
		return nil, fmt.Errorf("%s carries no load along it that could be offset", r.Name)
	}
	v := &varied{name: "offset about " + axis.String(), dim: unit.Length, note: "All loads along the member stand off by this much more, to one side."}
	v.at = func(e float64) *checker.Result {
		return r.With(func(m *model.Member) {
			for i := range m.Loads {
				if m.Loads[i].Kind == model.AxialLoad {
					m.Loads[i].Offset[axis] += e
				}
			}
		})
	}
	v.where.To = 0.2
	if s := r.Member.Section; s != nil && s.Area > 0 {
		v.where.To = math.Ceil(20*2*math.Sqrt(s.Area)) / 20
	}
	return v, nil
}

// height is the member's height, by the text of its declaration where that can be
// changed.
func height(report *checker.Report, r *checker.Result) *varied {
	now := r.Member.Height
	v := &varied{name: "height", dim: unit.Length, now: now, where: Range{From: 0.25 * now, To: 2 * now}}
	if c := calculation(report, r); c != nil && !r.Member.Levels {
		if _, ok := withHeight(c, r, now*1.01); ok {
			v.note = "The height is changed in the text of " + r.Name + "; what stands at a height of its own stays there."
			v.at = func(h float64) *checker.Result {
				out, ok := withHeight(c, r, h)
				if !ok {
					return nil
				}
				return out
			}
			return v
		}
	}
	v.note = "The top moves with what stands on it; holds and loads below stay at their heights."
	v.at = func(h float64) *checker.Result {
		fits := true
		out := r.With(func(m *model.Member) {
			move := func(z *float64) {
				switch {
				case *z >= now*(1-1e-9):
					*z = h
				case *z >= h*(1-1e-9):
					fits = false
				}
			}
			for i := range m.Loads {
				move(&m.Loads[i].At)
				if m.Loads[i].Kind == model.LineLoad {
					move(&m.Loads[i].To)
				}
			}
			for i := range m.Holds {
				move(&m.Holds[i].At)
			}
			for i := range m.Lifts {
				move(&m.Lifts[i].To)
			}
			m.Height = h
			if !fits {
				m.Height, m.Loads, m.Holds, m.Lifts = now, nil, nil, nil
			}
		})
		if !fits {
			return nil
		}
		return out
	}
	return v
}

// calculation is the one that a member belongs to.
func calculation(report *checker.Report, r *checker.Result) *model.Calculation {
	for _, c := range report.AllCalculations() {
		if c.Env == r.Env() {
			return c
		}
	}
	return nil
}

// withHeight judges the member with another height in its text.
func withHeight(c *model.Calculation, r *checker.Result, h float64) (*checker.Result, bool) {
	m := r.Member
	text, ok := heightText(m, h)
	if !ok {
		return nil, false
	}
	for _, out := range checker.Trial(c, m.Decl, text) {
		if out.Name == r.Name {
			return out, len(out.Missing) == 0
		}
	}
	return nil, false
}

// heightText is the declaration of a member with another height; false for one
// that does not state a height.
func heightText(m *model.Member, h float64) (string, bool) {
	if m.Decl == nil || m.Stmt == nil {
		return "", false
	}
	text, line := m.Decl.Text, "height = "+exact(h)+" m"
	if m.Stmt.Body == nil {
		at := m.Stmt.Line.End
		return text[:at] + " { " + line + " }" + text[at:], true
	}
	for _, s := range m.Stmt.Body.Stmts {
		switch s.Word {
		case "height", "length":
			return text[:s.Line.Start] + s.Word + " = " + exact(h) + " m" + text[s.Line.End:], true
		case "from":
			return "", false // its top is a level, which moves with what stands on it
		}
	}
	at := m.Stmt.Body.Span.Start + 1
	return text[:at] + " " + line + "; " + text[at:], true
}

// chart checks every point.
func (v *varied) chart(r *checker.Result, where Range) *Chart {
	u := r.Units().For(v.dim)
	if v.dim.IsNone() {
		u = unit.Unit{Factor: 1}
	}
	limit := 1.0
	if l := r.Member.Limits.Utilisation; l > 0 {
		limit = l
	}
	c := &Chart{Title: r.Member.Kind.String() + " " + r.Name + ": utilisation against the " + v.name, Limit: limit,
		X: Scale{Name: v.name, Unit: u.Symbol, Least: where.From / u.Factor, Most: where.To / u.Factor}, Y: Scale{Name: "utilisation"}}
	n := max(where.Points, 2)
	x, all := make([]float64, n), Line{Name: "utilisation", Main: true, Y: unknown(n)}
	values := map[string][]float64{}
	var rules []string
	governs := map[string]bool{}
	var gaps []string
	none, first := false, math.NaN()
	for i := range n {
		at := where.From + (where.To-where.From)*float64(i)/float64(n-1)
		x[i] = at / u.Factor
		out := v.at(at)
		if out == nil || len(out.Missing) > 0 {
			none = true
			continue
		}
		for _, k := range out.Checks {
			if k.Rule == "requirement" {
				continue
			}
			if values[k.Rule] == nil {
				values[k.Rule] = unknown(n)
				rules = append(rules, k.Rule)
			}
			values[k.Rule][i] = k.Utilisation
			if k.Verdict == standard.Undecided && !slices.Contains(gaps, words(k.Rule)) {
				gaps = append(gaps, words(k.Rule))
			}
		}
		if all.Y[i] = out.Utilisation; math.IsNaN(out.Utilisation) {
			continue
		}
		governs[out.Governing] = true
		if math.IsNaN(first) && out.Utilisation > limit {
			first = v.crossing(limit, where.From+(where.To-where.From)*max(float64(i)-1, 0)/float64(n-1), at)
		}
	}
	all.X = x
	for _, rule := range rules {
		if governs[rule] && len(governs) > 1 {
			c.Lines = append(c.Lines, Line{Name: words(rule), X: x, Y: values[rule]})
		}
	}
	c.Lines = append(c.Lines, all)
	if !math.IsNaN(r.Utilisation) && v.now >= where.From && v.now <= where.To {
		c.Marks = append(c.Marks, Mark{Name: "now " + checker.Ratio(r.Utilisation), X: v.now / u.Factor, Y: r.Utilisation, Main: true})
	}
	c.fit(limit)
	c.Y.Most = min(c.Y.Most, max(2*limit, 1.2*r.Utilisation))
	known := ""
	if none || len(gaps) > 0 {
		known = ", where it is known,"
	}
	switch {
	case math.IsNaN(first):
		c.Notes = append(c.Notes, fmt.Sprintf("The utilisation%s stays below %s up to %s.", known, checker.Ratio(limit), amount(c.X, where.To/u.Factor)))
	case first <= where.From:
		c.Notes = append(c.Notes, fmt.Sprintf("The utilisation is above %s from %s on.", checker.Ratio(limit), amount(c.X, where.From/u.Factor)))
	default:
		c.Notes = append(c.Notes, fmt.Sprintf("The utilisation reaches %s at %s.", checker.Ratio(limit), amount(c.X, first/u.Factor)))
	}
	if !math.IsNaN(r.Utilisation) {
		c.Notes = append(c.Notes, fmt.Sprintf("Now: %s at %s, by %s.", checker.Ratio(r.Utilisation), amount(c.X, v.now/u.Factor), words(r.Governing)))
	}
	if len(gaps) > 0 {
		c.Notes = append(c.Notes, "Undecided at some points or at all: "+strings.Join(gaps, ", ")+". The utilisation there is that of the other checks.")
	}
	if none {
		c.Notes = append(c.Notes, "Where there is no point the member has no result: a load or a hold would lie outside it.")
	}
	if v.note != "" {
		c.Notes = append(c.Notes, v.note)
	}
	return c
}

func amount(s Scale, v float64) string {
	if s.Unit == "" {
		return s.Name + " " + short(v)
	}
	return s.Name + " " + short(v) + " " + s.Unit
}

// crossing is where the utilisation first exceeds the limit between a value where
// it does not and one where it does; a thousandth of the range or less too low.
func (v *varied) crossing(limit, low, high float64) float64 {
	for range 30 {
		mid := (low + high) / 2
		if out := v.at(mid); out != nil && out.Utilisation > limit {
			high = mid
		} else {
			low = mid
		}
	}
	return low
}
