package size

import (
	"math"
	"slices"
	"strings"

	"kern/checker/edit"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// steps is how finely heights and loads are looked through.
const steps = 40

// mostTimes bounds how far above the present value is looked.
const mostTimes = 20.0

// grid gives values from a fraction of one to one itself, or from one upwards.
func grid(now float64, up bool) []float64 {
	var out []float64
	if !up {
		for i := 1; i <= steps; i++ {
			out = append(out, now*float64(i)/steps)
		}
		return out
	}
	for f := 1.0; f < mostTimes; f *= 1.025 {
		out = append(out, now*f)
	}
	return append(out, now*mostTimes)
}

// heights gives the greatest height with which the member passes, and with every
// lower one that is looked at.
func (s *subject) heights() []Mend {
	m := s.r.Member
	if m.Levels || m.Imported != nil || m.Joints[0] != nil || m.Joints[1] != nil {
		return nil // its top is a level; or forces and stiffness ratios belong to the height
	}
	u := lengthOf(s.lengthUnit())
	t := s.trial()
	say := func(h string) ([]lang.Change, bool) {
		word := "height"
		if b := s.own("height"); b != nil {
			word = b.Word
		}
		return s.say("height", word+" = "+h)
	}
	at := func(h float64) state {
		changes, ok := say(unit.Exact(h) + " m")
		if !ok {
			return unknown
		}
		r, ok := t.passes(changes)
		switch {
		case ok:
			return passes
		case r == nil || len(r.Missing) > 0:
			return unknown
		}
		return fails
	}
	up := s.r.Verdict == standard.Passes
	values := slices.DeleteFunc(grid(m.Height, up), func(h float64) bool { return h < 0.05 || h > 200 })
	most, open := greatest(values, at)
	if math.IsNaN(most) || open {
		return nil
	}
	text := Down(most, u, 4)
	changes, ok := say(text)
	if !ok {
		return nil
	}
	r, ok := t.passes(changes)
	if !ok || up && r.Member.Height <= m.Height {
		return nil
	}
	mend := s.mend(Height, "height = "+text, r, changes)
	mend.Value, mend.Now, mend.Dim = r.Member.Height, m.Height, unit.Length
	return []Mend{mend}
}

// loads gives for each load that the member states the greatest value with which
// it passes, the others being as they are.
func (s *subject) loads() []Mend {
	if s.r.Member.Imported != nil {
		return nil
	}
	t := s.trial()
	up := s.r.Verdict == standard.Passes
	lines := edit.Lines(s.calcs[0].Env, s.line)
	var all []edit.Line
	for _, l := range lines {
		if l.Stmt.Word == "load" {
			all = append(all, l)
		}
	}
	var out []Mend
	for i, l := range all {
		value := s.valueOf(l)
		if value == nil {
			continue
		}
		if mend, ok := s.load(t, all, i, value, up); ok {
			out = append(out, mend)
		}
	}
	return out
}

// valueOf is the expression that says how much a load is, nil where there is
// none.
func (s *subject) valueOf(l edit.Line) *lang.Expr {
	args := l.Stmt.Args
	if l.Stmt.Broken || len(args) == 0 {
		return nil
	}
	if e := args[0]; len(args) > 1 && e.Kind == lang.NameExpr {
		n := s.calcs[0].Env.Names[e.Text]
		if e.Is("floor") && n == nil || n != nil && n.Kind == model.CaseName {
			return args[1]
		}
	}
	return args[0]
}

// load finds the greatest value of one load, as a part of what it is.
func (s *subject) load(t *trial, all []edit.Line, i int, value *lang.Expr, up bool) (Mend, bool) {
	l := all[i]
	q, ok := s.calcs[0].Env.EvalIn(s.r.Member, value)
	if !ok || q.Value == 0 {
		return Mend{}, false
	}
	place := lang.Place{Decl: l.Decl, Span: l.Stmt.Line}
	scaled := func(f float64) func(m *model.Member) {
		return func(m *model.Member) {
			for k := range m.Loads {
				if m.Loads[k].Place == place {
					m.Loads[k].Value *= f
					m.Loads[k].Area *= f
				}
			}
		}
	}
	j := newJudge(s.r)
	at := func(f float64) state {
		if _, ok := j.passes(scaled(f)); ok {
			return passes
		}
		return fails
	}
	factors := grid(1, up)
	if !up {
		factors = append([]float64{0}, factors...)
	}
	most, open := greatest(factors, at)
	if math.IsNaN(most) || open || most <= 1e-6 || up && most <= 1 {
		return Mend{}, false
	}
	u, written := s.r.Units().For(q.Dim), unitOf(value)
	for _, known := range unit.For(q.Dim) {
		if known.Symbol == written {
			u = known
		}
	}
	text := Down(q.Value*most, u, 4)
	v := read(text, u)
	if !(v != 0) {
		return Mend{}, false
	}
	say := func(k int) string {
		line := all[k].Text()
		if k != i {
			return line
		}
		from := value.Span.Start - l.Stmt.Span.Start
		return line[:from] + text + line[value.Span.End-l.Stmt.Span.Start:]
	}
	var changes []lang.Change
	if l.Decl == s.line.Decl {
		changes = []lang.Change{{Span: value.Span, New: text}}
	} else { // a line that is taken over: with it, the member says all its loads itself
		var own []string
		for k := range all {
			own = append(own, say(k))
		}
		c, ok := edit.Insert(s.line.Decl.Text, s.line.Stmt, own...)
		if !ok {
			return Mend{}, false
		}
		changes = []lang.Change{c}
	}
	r, ok := t.passes(changes)
	if !ok {
		return Mend{}, false
	}
	mend := s.mend(Load, strings.Join(strings.Fields(say(i)), " "), r, changes)
	mend.Value, mend.Now, mend.Dim, mend.Place = v, q.Value, q.Dim, place
	return mend, true
}
