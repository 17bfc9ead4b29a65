package checker

import (
	"fmt"
	"math"
	"strings"

	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// undecided says why a member could not be checked, unless the reason is an
// error that is reported where it lies.
func (r *Result) undecided() {
	m := r.Member
	r.problems = append(r.problems, lang.Diagnostic{Decl: m.Decl, Problem: lang.Problem{Rule: "undecided", Severity: lang.Warning, Span: m.NameSpan, Member: r.Name,
		Message: r.Name + " is undecided: " + strings.Join(unique(r.Missing), "; ")}})
}

func unique(list []string) []string {
	var out []string
	seen := map[string]bool{}
	for _, s := range list {
		if !seen[s] {
			seen[s] = true
			out = append(out, s)
		}
	}
	return out
}

// diagnose writes the diagnostics of a member that was worked out.
func (r *Result) diagnose() {
	m := r.Member
	for _, c := range r.Checks {
		switch {
		case c.Departed && c.Verdict != standard.Passes:
			for _, d := range r.Departures {
				if d.Rule == c.Rule {
					r.problems = append(r.problems, lang.Diagnostic{Decl: d.Place.Decl, Problem: lang.Problem{Rule: "departure", Severity: lang.Information, Span: d.Place.Span, Member: r.Name,
						Message: fmt.Sprintf("%s departs from %s%s, because \"%s\"", r.Name, c.Rule, numbers(r, c), d.Because)}})
				}
			}
		case c.Verdict == standard.Fails:
			p := lang.Problem{Rule: c.Rule, Span: m.NameSpan, Member: r.Name, Message: r.Sentence(c)}
			p.Related = r.governs(c)
			r.problems = append(r.problems, lang.Diagnostic{Decl: m.Decl, Problem: p})
		}
	}
	if r.Verdict != standard.Undecided {
		return
	}
	var reasons []string
	rules := map[string][]string{} // of each reason
	because := func(rule, reason string) {
		if rules[reason] == nil {
			reasons = append(reasons, reason)
		}
		rules[reason] = append(rules[reason], rule)
	}
	for _, c := range r.Checks {
		if c.Verdict == standard.Undecided && !c.Departed {
			because(c.Rule, c.Why)
		}
	}
	for _, c := range r.Coverage {
		if c.State == standard.NotCovered && !r.departs(c.Rule) {
			because(c.Rule, c.Why)
		}
	}
	var why []string
	for _, reason := range reasons {
		why = append(why, strings.Join(unique(rules[reason]), ", ")+": "+reason)
	}
	why = append(why, r.Missing...)
	if len(why) == 0 {
		why = []string{"nothing could be checked"}
	}
	r.problems = append(r.problems, lang.Diagnostic{Decl: m.Decl, Problem: lang.Problem{Rule: "undecided", Severity: lang.Warning, Span: m.NameSpan, Member: r.Name,
		Message: r.Name + " is undecided: " + strings.Join(why, "; ")}})
}

// Sentence says what a check needs and what is there.
func (r *Result) Sentence(c standard.Check) string {
	var b strings.Builder
	switch c.Verdict {
	case standard.Fails:
		fmt.Fprintf(&b, "%s fails %s%s", r.Name, c.Rule, c.InLift())
	case standard.Passes:
		fmt.Fprintf(&b, "%s passes %s%s", r.Name, c.Rule, c.InLift())
	default:
		fmt.Fprintf(&b, "%s is undecided in %s%s: %s", r.Name, c.Rule, c.InLift(), c.Why)
		return b.String()
	}
	b.WriteString(numbers(r, c))
	if limit := r.Member.Limits.Utilisation; limit > 0 && c.Utilisation <= 1 && c.Verdict == standard.Fails && c.Rule != "requirement" {
		fmt.Fprintf(&b, ", over the member's own limit of %s", unit.Number(limit, 2))
	}
	if name := r.CombinationName(c); name != "" {
		b.WriteString(" under " + name)
	}
	b.WriteString(" (" + c.Clause)
	if c.Rule == "requirement" && c.Why != "" {
		b.WriteString(", because \"" + c.Why + "\"")
	}
	b.WriteString(")")
	return b.String()
}

func numbers(r *Result, c standard.Check) string {
	if math.IsNaN(c.Utilisation) {
		return ""
	}
	units := r.Units()
	return fmt.Sprintf(": needs %s, has %s, utilisation %s", units.Show(c.Demand, c.Dim, 4), units.Show(c.Capacity, c.Dim, 4), Ratio(c.Utilisation))
}

// Ratio writes a utilisation with two decimals; what is over 1 never reads 1.00.
func Ratio(u float64) string {
	switch {
	case math.IsNaN(u):
		return "–"
	case u > 1 && u < 1.005:
		return "1.01"
	}
	return fmt.Sprintf("%.2f", u)
}

// liftPlace is the line of the lift that a check is about; nothing for a member of
// one section and for what no line says.
func (r *Result) liftPlace(name string) lang.Place {
	for _, l := range r.Member.Lifts {
		if name != "" && (l.Name() == name || strings.HasPrefix(name, l.Low+" to ")) {
			return l.Place
		}
	}
	return lang.Place{}
}

// governs points at the lines that decide a failing check: the section, and the
// greatest load of the governing combination.
func (r *Result) governs(c standard.Check) []lang.Related {
	m := r.Member
	var out []lang.Related
	if c.Rule == "requirement" {
		for _, q := range m.Requires {
			if "require "+q.Symbol == c.Clause {
				out = append(out, lang.Related{Place: q.Place, Message: "required here"})
			}
		}
		return out
	}
	if c.Rule == "slenderness" && m.Limits.SlendernessAt.Decl != nil {
		out = append(out, lang.Related{Place: m.Limits.SlendernessAt, Message: "the limit that it breaks"})
	}
	if at := r.liftPlace(c.Lift); at.Decl != nil {
		out = append(out, lang.Related{Place: at, Message: "the lift that governs"})
	} else if m.SectionAt.Decl != nil {
		out = append(out, lang.Related{Place: m.SectionAt, Message: "its section"})
	}
	if c.Combination >= 0 {
		factors := r.combinations[c.Combination].Factors
		best := -1
		for i, l := range m.Loads {
			if l.Kind != model.AxialLoad || factors[l.Case] == 0 {
				continue
			}
			if best < 0 || math.Abs(l.Value*factors[l.Case]) > math.Abs(m.Loads[best].Value*factors[m.Loads[best].Case]) {
				best = i
			}
		}
		if best >= 0 {
			out = append(out, lang.Related{Place: m.Loads[best].Place, Message: "its greatest load in " + r.combinations[c.Combination].Name})
		}
	}
	return out
}
