package standard

import (
	"math"

	"kern/checker/action"
	"kern/checker/model"
)

// importedForces takes the axial force from the table of an analysis. The factors
// of the frame's combinations count in those of the table.
func (f *Frame) importedForces(in *model.Imported) {
	segments := len(f.cuts) - 1
	f.last = segments - 1
	f.own = make([]float64, segments)
	f.axial = make([][]float64, len(f.Combinations))
	f.slope = make([][]float64, len(f.Combinations))
	f.weight = make([]float64, len(f.Combinations))
	for c, combination := range f.Combinations {
		f.axial[c], f.slope[c] = make([]float64, segments), make([]float64, segments)
		for s := range segments {
			i := spanAt(in, (f.cuts[s]+f.cuts[s+1])/2)
			from, to := spanEnds(in, f.Member.Height, i)
			for k, factor := range combination.Factors {
				if factor == 0 {
					continue
				}
				n := in.Combinations[k].Spans[i].N
				slope := (n[0] - n[1]) / (to - from)
				f.slope[c][s] += factor * slope
				f.axial[c][s] += factor * (n[0] - slope*(f.cuts[s]-from))
			}
		}
	}
}

// spanAt is the part of the table that a height lies in.
func spanAt(in *model.Imported, z float64) int {
	last := len(in.Positions) - 2
	for i := range last {
		if z < in.Positions[i+1] {
			return i
		}
	}
	return last
}

// spanEnds are the heights between which a part of the table lies, within the
// member, whose height the table may miss by a rounding.
func spanEnds(in *model.Imported, height float64, i int) (from, to float64) {
	from, to = in.Positions[i], in.Positions[i+1]
	if i == 0 {
		from = 0
	}
	if i == len(in.Positions)-2 {
		to = height
	}
	return from, to
}

// importedMoments takes the moments from the table: straight between its
// positions or, where shear forces are given, the curve that they are the slope
// of. The deflections are not known.
func (f *Frame) importedMoments(in *model.Imported) {
	f.Bends = in.Bends
	nan := math.NaN()
	for axis := range f.Bends {
		if !f.Bends[axis] {
			continue
		}
		f.beamOK[axis] = true
		f.beams[axis] = make([][]action.Piece, len(in.Combinations))
		for c, combination := range in.Combinations {
			for i, s := range combination.Spans {
				from, to := spanEnds(in, f.Member.Height, i)
				l, m := to-from, s.M[axis]
				p := action.Piece{From: from, To: to, M: m[0], V: (m[1] - m[0]) / l, D: nan, R: nan}
				if in.Sheared[axis] && !in.Single {
					// the given moments count; the shear forces say how it bends between
					bend := (s.V[axis][1] - s.V[axis][0]) / l
					p.Line = bend
					p.V = (m[1]-m[0])/l - bend*l/2
				}
				f.beams[axis][c] = append(f.beams[axis][c], p)
			}
			f.Pushed[axis] = f.Pushed[axis] || pushed(f.beams[axis][c])
		}
	}
}

// pushed tells whether the moments have a bend or a kink: a load acts across the
// member, or a hold does.
func pushed(pieces []action.Piece) bool {
	most := 0.0
	for _, p := range pieces {
		most = max(most, math.Abs(p.V), math.Abs(p.Line)*(p.To-p.From))
	}
	for i, p := range pieces {
		if math.Abs(p.Line)*(p.To-p.From) > 1e-9*most || i > 0 && math.Abs(p.V-pieces[i-1].Shear(pieces[i-1].To-pieces[i-1].From)) > 1e-9*most {
			return true
		}
	}
	return false
}

// importedAssumptions say what is taken for granted about forces of a table.
func importedAssumptions(in *model.Imported) []string {
	out := []string{"forces from the table '" + in.Table + "', taken as those of a first-order analysis with the member's own weight in them"}
	if in.Single {
		out = append(out, "the forces of the table act all along the member")
	}
	for axis, name := range []string{"major", "minor"} {
		switch {
		case !in.Bends[axis]:
			out = append(out, "no moment about "+name+": the table gives none")
		case !in.Single && in.Sheared[axis]:
			out = append(out, "moments about "+name+" between the positions of the table by the shear forces given there")
		case !in.Single:
			out = append(out, "moments about "+name+" straight between the positions of the table")
		}
	}
	return out
}
