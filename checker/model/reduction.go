package model

import (
	"strings"

	"kern/checker/action"
	"kern/lang"
)

// ReductionKind is how imposed loads of floors are reduced for a member.
type ReductionKind uint8

// The kinds of reduction.
const (
	NoReduction     ReductionKind = iota
	ByStoreys                     // EN 1991-1-1 6.3.1.2(11)
	ByArea                        // EN 1991-1-1 6.3.1.2(10)
	ByTributaryArea               // ASCE/SEI 7 4.7
	StatedReduction               // the factor is stated
)

// Reduction is how the imposed loads of the floors that a member carries are
// reduced.
type Reduction struct {
	Kind    ReductionKind
	Value   float64 // of a stated one
	Because string
	Element float64 // K_LL of a reduction by tributary area
	Place   lang.Place
}

// reduce reads
//
//	reduce imposed by storeys|by area|off
//	reduce live by tributary area K_LL NUMBER
func (r *reader) reduce() (Reduction, bool) {
	out := Reduction{Place: r.place(r.stmt.Line)}
	what, ok := r.wordOf("what is reduced", "imposed", "live")
	if !ok {
		return out, false
	}
	if _, off := r.word("off"); off {
		return out, r.end()
	}
	if _, ok := r.wordOf("how it is reduced", "by"); !ok {
		return out, false
	}
	if what == "live" {
		out.Kind = ByTributaryArea
		for _, w := range []string{"tributary", "area"} {
			if _, ok := r.wordOf("how live loads are reduced", w); !ok {
				return out, false
			}
		}
		if _, ok := r.wordOf("the live load element factor (4 for inner columns)", "K_LL"); !ok {
			return out, false
		}
		if out.Element, _, ok = r.quantity(want{what: "the live load element factor K_LL", min: 1, max: 4}); !ok {
			return out, false
		}
		return out, r.end()
	}
	word, ok := r.wordOf("how imposed loads are reduced", "storeys", "area")
	if !ok {
		return out, false
	}
	out.Kind = map[string]ReductionKind{"storeys": ByStoreys, "area": ByArea}[word]
	if e := r.peek(); e.Is("and") || e.Is("by") || e.Is("storeys") || e.Is("area") {
		r.problem(lang.Problem{Rule: "reductions-together", Span: e.Span.Join(r.args[len(r.args)-1].Span), Message: bothReductions,
			Fixes: []lang.Fix{lang.Replace("Keep by "+word, false, lang.Span{Start: e.Span.Start, End: r.args[len(r.args)-1].Span.End}, "")}})
		return out, false
	}
	return out, r.end()
}

const bothReductions = "imposed loads are reduced by storeys (alpha_n) or by area (alpha_A), never by both: EN 1991-1-1 6.3.1.2"

// reduction reads the factor that a calculation states itself, "reduction = 0.8
// because …"; the sign is taken.
func (r *reader) reduction() (Reduction, bool) {
	out := Reduction{Kind: StatedReduction, Place: r.place(r.stmt.Line)}
	var ok bool
	if out.Value, _, ok = r.quantity(want{what: "the reduction factor", min: 0.1, max: 1}); !ok {
		return out, false
	}
	if out.Because, ok = r.because(); !ok {
		return out, false
	}
	return out, r.end()
}

// reducedTwice reports a second reduction in one block.
func (r *reader) reducedTwice(first declared) {
	p := lang.Problem{Rule: "value-given-twice", Span: r.stmt.Line, Message: "how imposed loads are reduced is said twice",
		Related: []lang.Related{{Place: lang.Place{Decl: first.decl, Span: first.stmt.Line}, Message: "said here first"}}}
	text := func(d *lang.Decl, s *lang.Stmt) string { return strings.Join(strings.Fields(s.Line.Of(d.Text)), " ") }
	a, b := text(first.decl, first.stmt), text(r.decl, r.stmt)
	if a != b && strings.HasPrefix(a, "reduce imposed by ") && strings.HasPrefix(b, "reduce imposed by ") {
		p.Rule, p.Message = "reductions-together", bothReductions
	}
	r.problem(p)
}

// moments reads "moments nominal" or "moments continuous": whether loads off the
// centroid make nominal moments of simple construction.
func (r *reader) moments() (nominal bool) {
	w, _ := r.wordOf("how moments of loads off the centroid are found", "continuous", "nominal")
	return w == "nominal"
}

// Accompanied tells whether a combination has, or for one that is written out may
// have, a psi value in the factor of a case. A factor that is written out counts as
// a full one from gamma_Q on, or from 1 where no standard combines the cases.
func (env *Env) Accompanied(c Combination, i int) bool {
	if c.Label == "" {
		return i < len(c.Accompanying) && c.Accompanying[i]
	}
	full := 1.0
	if env.Basis.Actions == actionsStandard {
		full = env.Basis.Combining.Values.Q
		if o, ok := env.Basis.Overrides["gamma_Q"]; ok {
			full = o.Value
		}
	}
	return c.Factors[i] < full*(1-1e-9)
}

// PsiOf is psi_0 of a case, 1 where it is not known.
func (env *Env) PsiOf(i int) float64 {
	v := env.Basis.Combining.Values
	if v.Annex == "" {
		v = action.Recommended
	}
	if p, ok := v.Psi(env.Cases[i].Case); ok {
		return p[0]
	}
	return 1
}
