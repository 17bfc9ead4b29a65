package model

import (
	"fmt"
	"math"
	"slices"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/lang"
)

// tabled tells whether a table has forces of one of the members that are read.
func (w *memberReader) tabled() bool {
	return slices.ContainsFunc(memberNames(w.m.Stmt), func(e *lang.Expr) bool { return w.env.imported[e.Text] != nil })
}

// imports gives the member the forces of a table in place of loads of its own.
func (m *Member) imports(in *Imported, show derivation.Units) {
	m.Problems, m.Missing, m.Assumed = slices.Clone(m.Problems), slices.Clone(m.Missing), slices.Clone(m.Assumed)
	m.Imported, m.Weight = in, false
	say := func(at lang.Place, rule, message string) {
		m.Problems = append(m.Problems, lang.Diagnostic{Decl: at.Decl, Problem: lang.Problem{Rule: rule, Span: at.Span, Message: message,
			Related: []lang.Related{{Place: in.Place, Message: "its forces in the table"}}}})
	}
	if len(m.Loads) > 0 {
		at := m.Loads[0].Place
		if at.Decl != m.Decl { // a line that is taken over is right where it stands
			at = lang.Place{Decl: m.Decl, Span: m.NameSpan}
		}
		say(at, "forces-and-loads", "the forces of "+m.Name+" come from the table '"+in.Table+"'; a load beside them would count twice")
		m.Missing = append(m.Missing, "it has both loads and forces from a table")
	}
	if len(in.Combinations) == 0 {
		m.Missing = append(m.Missing, "its forces in '"+in.Table+"' have an error")
		return
	}
	if math.IsNaN(m.Height) {
		return
	}
	first, last := in.Positions[0], in.Positions[len(in.Positions)-1]
	if tolerance := 1e-3 * m.Height; !in.Single && (math.Abs(first) > tolerance || math.Abs(last-m.Height) > tolerance) {
		m.Problems = append(m.Problems, lang.Diagnostic{Decl: in.Place.Decl, Problem: lang.Problem{Rule: "wrong-table", Span: in.Place.Span,
			Message: fmt.Sprintf("the forces of %s go from %s to %s; the member goes from 0 to %s", m.Name, show.Place(first), show.Place(last), show.Place(m.Height)),
			Related: []lang.Related{{Place: lang.Place{Decl: m.Decl, Span: m.NameSpan}, Message: "the member"}}}})
		m.Missing = append(m.Missing, "its forces in '"+in.Table+"' are not given from its base to its top")
	}
}

// Scaled is the same with the forces along the member and what bends it
// multiplied.
func (in *Imported) Scaled(axial, bending float64) *Imported {
	out := *in
	out.Combinations = make([]ImportedCombination, len(in.Combinations))
	for k, c := range in.Combinations {
		spans := slices.Clone(c.Spans)
		for i := range spans {
			for e := range 2 {
				spans[i].N[e] *= axial
				for a := range 2 {
					spans[i].M[a][e] *= bending
					spans[i].V[a][e] *= bending
				}
			}
		}
		out.Combinations[k] = ImportedCombination{c.Name, spans}
	}
	return &out
}

// List gives the combinations of a table. The factors count in combinations of
// the table, not in load cases.
func (in *Imported) List() []Combination {
	out := make([]Combination, len(in.Combinations))
	for i, c := range in.Combinations {
		factors := make([]float64, len(in.Combinations))
		factors[i] = 1
		out[i] = Combination{Combination: action.Combination{Name: c.Name, Factors: factors, Source: in.Table}, Label: c.Name, Place: in.Place}
	}
	return out
}
