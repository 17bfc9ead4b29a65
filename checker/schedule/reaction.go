package schedule

import (
	"math"

	"kern/checker"
	"kern/checker/action"
	"kern/checker/model"
	"kern/checker/standard"
)

// reaction is what a member hands to its base: compression, and about the major and
// the minor axis the shear force and the moment just above the base. N and Nm; NaN
// where it is not known.
type reaction struct {
	n    float64
	v, m [2]float64
}

var unknown = reaction{math.NaN(), [2]float64{math.NaN(), math.NaN()}, [2]float64{math.NaN(), math.NaN()}}

// reactions are those of every case by itself, in the order of the cases, and those
// of the combination that governs.
type reactions struct {
	cases     []reaction
	governing reaction
}

func (x reactions) ofCase(r *checker.Result, name string) reaction {
	for i, c := range r.Env().Cases {
		if c.Name == name && i < len(x.cases) {
			return x.cases[i]
		}
	}
	if x.cases == nil {
		return unknown
	}
	return reaction{} // the member's calculation has no such case
}

func bends(r *checker.Result) bool {
	f := r.Frame()
	return f != nil && (f.Bends[0] || f.Bends[1])
}

func reactionsOf(r *checker.Result) reactions {
	out := reactions{governing: unknown}
	if r.Frame() == nil {
		return out
	}
	env := r.Env()
	if x, ok := governing(r); ok {
		// by itself, so that its number in the frame is known
		out.governing = reactionOf(standard.NewFrame(env, r.Member, []model.Combination{x}), 0)
	}
	if r.Member.Imported != nil {
		return out // the table has combinations and no cases
	}
	// every case as a combination of its own
	alone := make([]model.Combination, len(env.Cases))
	for i := range alone {
		alone[i].Factors = make([]float64, len(env.Cases))
		alone[i].Factors[i] = 1
	}
	f := standard.NewFrame(env, r.Member, alone)
	for i := range alone {
		out.cases = append(out.cases, reactionOf(f, i))
	}
	return out
}

// governing is the combination of the check with the greatest utilisation of those
// that depend on a combination for ultimate limit states: a slenderness does not, and
// a sway is of another. It is false when there is none.
func governing(r *checker.Result) (model.Combination, bool) {
	most, found := math.Inf(-1), model.Combination{}
	for _, c := range r.Checks {
		if x, ok := r.CombinationOf(c); ok && x.Situation.Ultimate() && c.Utilisation > most {
			most, found = c.Utilisation, x
		}
	}
	return found, !math.IsInf(most, -1)
}

// reactionOf is the reaction of a combination of a frame.
func reactionOf(f *standard.Frame, combination int) reaction {
	m, factors := f.Member, f.Combinations[combination].Factors
	out := reaction{n: f.At(combination, 0)}
	for _, l := range m.Loads { // what acts at the base itself goes straight into it
		if l.Kind == model.AxialLoad && l.At <= 1e-9*m.Height {
			out.n += factors[l.Case] * l.Value
		}
	}
	var pieces []action.Piece
	for axis := range out.v {
		p, ok := f.Bending(axis, factors, pieces)
		switch {
		case !ok:
			out.v[axis], out.m[axis] = math.NaN(), math.NaN()
		case len(p) > 0:
			out.v[axis], out.m[axis] = p[0].Shear(0), p[0].Moment(0)
		}
		pieces = p
	}
	return out
}
