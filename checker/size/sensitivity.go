package size

import (
	"math"
	"slices"

	"kern/checker"
	"kern/checker/edit"
	"kern/checker/model"
	"kern/checker/section"
	"kern/lang/unit"
)

// Sensitivity is how much the utilisation of a member changes with one quantity.
type Sensitivity struct {
	// Parameter is "height", "load" (a factor on all loads), "wall" (of a hollow
	// section, an angle or all plates of an open section), "fy", "offset major" or
	// "offset minor" (of all loads along the member). The corners of a tube keep their
	// proportion to the wall.
	Parameter string
	Value     float64 // now, SI units; 1 for the factor on the loads
	Dim       unit.Dim
	// Below and Above are the changes of utilisation per SI unit of the quantity just
	// below and just above its value. They differ at a kink, where another check or
	// another table row begins to govern. NaN where there is no result on that side.
	Below, Above float64
	// Reference is the change that quantities are compared by, SI units: 1 % of the
	// value, and of offsets 1 % of the depth of the section.
	Reference float64
	// Matters is set for the quantity whose reference changes the utilisation most.
	Matters bool
}

// Kink tells whether the changes on both sides differ.
func (s Sensitivity) Kink() bool {
	if math.IsNaN(s.Below) || math.IsNaN(s.Above) {
		return math.IsNaN(s.Below) != math.IsNaN(s.Above)
	}
	return math.Abs(s.Above-s.Below)*s.Reference > 1e-5+0.02*max(math.Abs(s.Above), math.Abs(s.Below))*s.Reference
}

// Effect is the greater change of utilisation that the reference makes, with its
// sign; NaN where neither side has one.
func (s Sensitivity) Effect() float64 {
	a, b := s.Above*s.Reference, s.Below*s.Reference
	if math.IsNaN(a) || math.Abs(b) > math.Abs(a) {
		return b
	}
	return a
}

// difference is the step of the differences as a part of the value.
const difference = 2e-4

// Sensitivities gives how the utilisation of a member answers to its height, its
// loads, the thickness of its walls, its yield strength and the offsets of its
// loads, each checked by the whole checker at either side of the present value.
// What a member cannot vary is left out: the height between levels, the wall of
// a section whose properties are given. It is empty for a member without a
// utilisation.
func Sensitivities(report *checker.Report, r *checker.Result) []Sensitivity {
	s := newSubject(report, r, edit.NewLayout(report.Project))
	if !s.stated || math.IsNaN(used(r)) {
		return nil
	}
	m := r.Member
	var out []Sensitivity
	add := func(name string, now float64, dim unit.Dim, reference float64, at func(v float64) *checker.Result) {
		h := difference * 100 * reference
		value := func(v float64) float64 {
			x := at(v)
			if x == nil || len(x.Missing) > 0 {
				return nan
			}
			return used(x)
		}
		centre := value(now) // not r's own: a text that is read again may differ in the last bits
		k := Sensitivity{Parameter: name, Value: now, Dim: dim, Reference: reference,
			Below: (centre - value(now-h)) / h, Above: (value(now+h) - centre) / h}
		if !math.IsNaN(k.Below) || !math.IsNaN(k.Above) {
			out = append(out, k)
		}
	}
	with := func(change func(m *model.Member, v float64)) func(v float64) *checker.Result {
		return func(v float64) *checker.Result {
			return r.With(func(m *model.Member) { change(m, v) })
		}
	}
	if !m.Levels && m.Imported == nil {
		t := s.trial()
		add("height", m.Height, unit.Length, m.Height/100, func(h float64) *checker.Result {
			word := "height"
			if b := s.own("height"); b != nil {
				word = b.Word
			}
			changes, ok := s.say("height", word+" = "+unit.Exact(h)+" m")
			if !ok {
				return nil
			}
			x, _ := t.passes(changes)
			return x
		})
	}
	add("load", 1, unit.None, 0.01, with(func(m *model.Member, f float64) {
		if m.Imported != nil {
			m.Imported = m.Imported.Scaled(f, f)
		}
		for i := range m.Loads {
			m.Loads[i].Value *= f
			m.Loads[i].Area *= f
		}
	}))
	if m.Section != nil && m.Material != nil && len(m.Lifts) == 0 {
		if t := wall(m.Section.Shape); t > 0 {
			add("wall", t, unit.Length, t/100, with(func(m *model.Member, v float64) {
				if to := walled(m.Section, v/t); to != nil {
					m.Section = to
				} else {
					m.Missing = append(slices.Clone(m.Missing), "no such section")
				}
			}))
		}
		if fy, _, _, ok := m.Material.StrengthOf(m.Section, r.Env().Basis.TableFy); ok {
			add("fy", fy, unit.Stress, fy/100, with(func(m *model.Member, v float64) {
				to := *m.Material
				to.Stronger = v / fy
				m.Material = &to
			}))
		}
	}
	if d, _ := depthOf(m); d > 0 && m.Imported == nil && slices.ContainsFunc(m.Loads, func(l model.Load) bool { return l.Kind == model.AxialLoad && l.Value != 0 }) {
		for _, a := range []model.Axis{model.Major, model.Minor} {
			now := 0.0
			for _, l := range m.Loads {
				if l.Kind == model.AxialLoad && math.Abs(l.Offset[a]) > math.Abs(now) {
					now = l.Offset[a]
				}
			}
			add("offset "+a.String(), now, unit.Length, d/100, with(func(m *model.Member, v float64) {
				for i := range m.Loads {
					if m.Loads[i].Kind == model.AxialLoad {
						m.Loads[i].Offset[a] += v - now
					}
				}
			}))
		}
	}
	most, best := -1, 0.0
	for i, k := range out {
		if e := math.Abs(k.Effect()); e > best {
			most, best = i, e
		}
	}
	if most >= 0 {
		out[most].Matters = true
	}
	return out
}

func depthOf(m *model.Member) (float64, bool) {
	if m.Section == nil {
		return 0, false
	}
	d, _ := Outside(m.Section.Shape)
	return d, d > 0
}

// wall is the thickness that stands for all of a shape: the wall of a hollow
// section and of an angle, the flange of an open section; 0 for a solid or given
// one.
func wall(s section.Shape) float64 {
	switch s.Kind {
	case section.Tube, section.Pipe, section.Ellipse, section.Angle, section.DoubleAngle:
		return s.Wall
	case section.ISection, section.Channel, section.Tee:
		return s.Flange
	}
	return 0
}

// walled is a section with all its thicknesses, and the corners of a tube, times
// a factor; nil where that cannot be.
func walled(s *model.Section, f float64) *model.Section {
	out := *s
	out.Shape.Wall *= f
	out.Shape.Web *= f
	out.Shape.Flange *= f
	out.Shape.OuterRadius *= f
	out.Shape.InnerRadius *= f
	p, err := section.Compute(out.Shape)
	if err != nil {
		return nil
	}
	out.Properties = p
	out.Thickness *= f
	return &out
}
