package standard

import (
	"fmt"
	"math"

	"kern/checker/action"
	"kern/checker/model"
	"kern/lang/unit"
)

const swayBasic = 1.0 / 200

// Inclination is the sway imperfection of EN 1993-1-1 5.3.2(3)a for a column of a
// height (m) by itself: phi = phi_0 alpha_h alpha_m with phi_0 = 1/200,
// alpha_h = 2/sqrt(h) between 2/3 and 1, and alpha_m = 1 for m = 1 column (from
// memory; the edition of 2022 has 1/400 for elastic checks, which is not made use
// of).
func Inclination(height float64) float64 {
	return swayBasic * min(1, max(2./3, 2/math.Sqrt(height)))
}

// Imperfect tells whether the member carries the forces of a sway imperfection:
// it is asked for, and an end can move sideways.
func (f *Frame) Imperfect() bool { return imperfect(f.Member) }

func imperfect(m *model.Member) bool {
	return m.Imperfect && m.Imported == nil && (m.Sways(model.Major) || m.Sways(model.Minor))
}

// Imperfections gives the combinations that a member is checked under: those
// given, or, where it carries the forces of a sway imperfection, each of them with
// these forces to either side about each axis that it can sway about. Behind the
// factors of the cases stand those of the forces: for each axis one a case, and
// one of the self-weight.
func Imperfections(env *model.Env, m *model.Member, combinations []model.Combination) []model.Combination {
	if !imperfect(m) {
		return combinations
	}
	f := &Frame{Member: m, Env: env}
	cases := len(env.Cases)
	var out []model.Combination
	for _, c := range combinations {
		for _, a := range []model.Axis{model.Major, model.Minor} {
			if !m.Sways(a) {
				continue
			}
			for _, side := range []float64{1, -1} {
				k := c
				k.Factors = make([]float64, cases+2*(cases+1))
				copy(k.Factors, c.Factors)
				at := cases + int(a)*(cases+1)
				for i := range cases {
					k.Factors[at+i] = side * c.Factors[i]
				}
				k.Factors[at+cases] = side * f.ownFactor(c)
				k.Name += fmt.Sprintf(", sway %s about %s", map[float64]string{1: "+", -1: "-"}[side], a)
				k.Source += ", EN 1993-1-1 5.3.2"
				out = append(out, k)
			}
		}
	}
	return out
}

// notional are the forces of a sway imperfection about an axis, as loadings
// behind those of the cases: the inclination times each force along the member,
// at its height. Those of the other axis push nothing here.
func (f *Frame) notional(axis int) [][]action.Push {
	m, cases := f.Member, len(f.Env.Cases)
	out := make([][]action.Push, 2*(cases+1))
	if !m.Sways(model.Axis(axis)) {
		return out
	}
	own := out[axis*(cases+1):]
	phi := Inclination(m.Height)
	for _, l := range m.Loads {
		if l.Kind == model.AxialLoad {
			own[l.Case] = append(own[l.Case], action.Push{Force: phi * l.Value, From: l.At})
		}
	}
	for s, w := range f.own {
		if w != 0 {
			own[cases] = append(own[cases], action.Push{Line: phi * w, From: f.cuts[s], To: f.cuts[s+1]})
		}
	}
	return out
}

// swayAssumptions say whether a member that can sway carries the forces of a sway
// imperfection.
func (f *Frame) swayAssumptions() []string {
	m := f.Member
	if !m.Sways(model.Major) && !m.Sways(model.Minor) {
		return nil
	}
	if m.Imported != nil {
		return []string{"sway imperfections are those of the analysis that the table comes from (EN 1993-1-1 5.3.2)"}
	}
	if !m.Imperfect {
		return []string{"no sway imperfection is counted (EN 1993-1-1 5.3.2): say imperfection on, or give its forces as loads"}
	}
	return []string{fmt.Sprintf("sway imperfection 1/%s (EN 1993-1-1 5.3.2, the column by itself): this part of each force along the member acts across it at the same height, in each combination to either side about each axis that can sway",
		unit.Short(1/Inclination(m.Height), 4))}
}
