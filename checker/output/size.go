package output

import (
	"bufio"
	"encoding/json"
	"fmt"
	"io"
	"math"
	"strings"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/size"
	"kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"
)

// Sizing is what is to be said about members that were sized.
type Sizing struct {
	Report  *checker.Report
	Members []size.Sized
	// Sensitivities are those of each member; nil where nobody asked.
	Sensitivities [][]size.Sensitivity
}

type (
	sizedDocument struct {
		Schema  int           `json:"schema"`
		Program string        `json:"program"`
		Caution string        `json:"caution"`
		Members []sizedMember `json:"members"`
	}
	sizedMember struct {
		Name          string        `json:"name"`
		File          string        `json:"file"`
		Line          int           `json:"line"`
		Now           sizedNow      `json:"now"`
		Mends         []mend        `json:"mends"`
		Sensitivities []sensitivity `json:"sensitivities,omitempty"`
	}
	sizedNow struct {
		Section       string   `json:"section"`
		Material      string   `json:"material"`
		Verdict       string   `json:"verdict"`
		Utilisation   *float64 `json:"utilisation"`
		Governing     string   `json:"governing"`
		MassPerLength *float64 `json:"mass_per_length"` // kg/m
	}
	mend struct {
		Kind          string     `json:"kind"`
		Change        string     `json:"change"`
		Family        string     `json:"family,omitempty"`
		Utilisation   *float64   `json:"utilisation"`
		Governing     string     `json:"governing"`
		Combination   string     `json:"combination"`
		MassPerLength *float64   `json:"mass_per_length"`
		Added         *float64   `json:"mass_change"`
		Serves        []string   `json:"serves,omitempty"`
		Needs         []hold     `json:"needs,omitempty"`
		Note          string     `json:"note,omitempty"`
		Edit          *sizedEdit `json:"edit"`
	}
	sizedEdit struct {
		File  string `json:"file"`
		Range span   `json:"range"`
		Text  string `json:"text"`
	}
	sensitivity struct {
		Parameter string   `json:"parameter"`
		Value     amount   `json:"value"`
		Below     *float64 `json:"below"` // per unit of the value
		Above     *float64 `json:"above"`
		Kink      bool     `json:"kink"`
		Step      amount   `json:"step"`
		Change    *float64 `json:"change"` // of the utilisation by the step
		Matters   bool     `json:"matters_most"`
	}
)

// SizingJSON writes mends as one JSON object.
func SizingJSON(w io.Writer, s Sizing, program string, names Names) error {
	lines := newIndex(s.Report.Project)
	d := sizedDocument{Schema: Schema, Program: program, Caution: Caution, Members: []sizedMember{}}
	for i, x := range s.Members {
		r := x.Result
		file, at := s.Report.Place(r)
		m := sizedMember{Name: r.Name, File: names(file), Line: lines.span(file, at).Start.Line, Mends: []mend{},
			Now: sizedNow{Section: sectionsOf(r.Member), Verdict: r.Verdict.String(), Utilisation: finite(r.Utilisation), Governing: r.Governing, MassPerLength: finite(size.Mass(r))}}
		if r.Member.Material != nil {
			m.Now.Material = r.Member.Material.Title()
		}
		for _, k := range x.Mends {
			out := mend{Kind: string(k.Kind), Change: k.Change, Family: k.Family, Utilisation: finite(k.Utilisation), Governing: k.Governing, Combination: k.Combination,
				MassPerLength: finite(k.MassPerLength), Added: finite(k.Added), Serves: k.Serves, Note: k.Note}
			for _, n := range k.Needs {
				out.Needs = append(out.Needs, holdOf(r, n))
			}
			if e, ok := one(s.Report.Project, k.Edits()); ok {
				out.Edit = &sizedEdit{names(e.File), lines.span(e.File, e.Span), e.New}
			}
			m.Mends = append(m.Mends, out)
		}
		if s.Sensitivities != nil {
			for _, k := range s.Sensitivities[i] {
				factor := 1.0
				if !k.Dim.IsNone() {
					factor = r.Units().For(k.Dim).Factor
				}
				m.Sensitivities = append(m.Sensitivities, sensitivity{k.Parameter, amountOf(r.Units(), k.Value, k.Dim), finite(k.Below * factor), finite(k.Above * factor), k.Kink(),
					amountOf(r.Units(), k.Reference, k.Dim), finite(k.Effect()), k.Matters})
			}
		}
		d.Members = append(d.Members, m)
	}
	b := bufio.NewWriter(w)
	e := json.NewEncoder(b)
	e.SetEscapeHTML(false)
	e.SetIndent("", " ")
	if err := e.Encode(d); err != nil {
		return err
	}
	return b.Flush()
}

// one joins edits of one file into one; false when there are none.
func one(p *lang.Project, edits []checker.Edit) (checker.Edit, bool) {
	if len(edits) == 0 {
		return checker.Edit{}, false
	}
	out := edits[0]
	for _, e := range edits[1:] {
		if e.File != out.File {
			return checker.Edit{}, false
		}
		out.New += lang.Span{Start: out.Span.End, End: e.Span.Start}.Of(p.Files[e.File].Text) + e.New
		out.Span.End = e.Span.End
	}
	return out, true
}

func holdOf(r *checker.Result, h standard.HoldDemand) hold {
	units, stated := r.Units(), h.Stated
	if stated == 0 {
		stated = math.NaN()
	}
	out := hold{At: amountOf(units, h.At, unit.Length), Axis: h.Axis.String(), Compression: amountOf(units, h.Compression, unit.Force),
		Force: amountOf(units, h.Force, unit.Force), Clause: standard.HoldForceClause, Practice: amountOf(units, h.Practice, unit.Force),
		Stiffness: amountOf(units, h.Stiffness, unit.ForcePerLength), StiffnessSource: h.How, Stated: amountOf(units, stated, unit.ForcePerLength)}
	if all := r.Combinations(); h.Combination >= 0 && h.Combination < len(all) {
		out.Combination = all[h.Combination].Name
	}
	return out
}

// NeedsLine says what a new hold must be able to do.
func NeedsLine(r *checker.Result, needs []standard.HoldDemand) string {
	var axes, out []string
	u := r.Units()
	for _, n := range needs {
		line := fmt.Sprintf("it must take %s (%s)", u.Show(n.Practice, unit.Force, 3), standard.HoldPractice)
		if !math.IsNaN(n.Force) {
			line += fmt.Sprintf(", %s by %s", u.Show(n.Force, unit.Force, 3), standard.HoldForceClause)
		}
		if !math.IsNaN(n.Stiffness) {
			line += fmt.Sprintf(", with a stiffness of %s", u.Show(n.Stiffness, unit.ForcePerLength, 3))
		}
		if last := len(out) - 1; last >= 0 && out[last] == line {
			axes[last] += " and " + n.Axis.String()
			continue
		}
		axes, out = append(axes, n.Axis.String()), append(out, line)
	}
	for i := range out {
		out[i] = "about " + axes[i] + " " + out[i]
	}
	return strings.Join(out, "; ")
}

// MassLine writes a change of mass per length, kg/m: "+8.6 kg/m", "same mass".
func MassLine(units derivation.Units, added float64) string {
	u := units.For(unit.MassPerLength)
	switch {
	case math.IsNaN(added):
		return "mass not known"
	case math.Abs(added) < 0.05:
		return "same mass"
	}
	return fmt.Sprintf("%+.1f %s", added/u.Factor, u.Symbol)
}

// SizingText writes mends for a terminal.
func SizingText(w io.Writer, s Sizing) error {
	b := bufio.NewWriter(w)
	for i, x := range s.Members {
		r := x.Result
		if i > 0 {
			fmt.Fprintln(b)
		}
		of := sectionsOf(r.Member)
		if r.Member.Material != nil {
			of += ", " + r.Member.Material.Title()
		}
		if mass := size.Mass(r); !math.IsNaN(mass) {
			of += ", " + r.Units().Show(mass, unit.MassPerLength, 3)
		}
		fmt.Fprintf(b, "%s (%s): %s", r.Name, of, r.Verdict)
		if !math.IsNaN(r.Utilisation) {
			fmt.Fprintf(b, ", %s by %s", checker.Ratio(r.Utilisation), r.Governing)
		}
		fmt.Fprintln(b)
		switch {
		case len(r.Missing) > 0:
			fmt.Fprintln(b, "  cannot be sized: "+strings.Join(r.Missing, "; "))
		case len(x.Mends) == 0 && r.Verdict == standard.Passes:
			fmt.Fprintln(b, "  nothing lighter was found, nor a limit of height or load")
		case len(x.Mends) == 0:
			fmt.Fprintln(b, "  no change that was tried makes it pass")
		}
		rows := [][4]string{}
		width := [4]int{}
		for _, k := range x.Mends {
			row := [4]string{words[k.Kind] + k.Change, checker.Ratio(k.Utilisation), k.Governing, MassLine(r.Units(), k.Added)}
			for c := range row {
				width[c] = max(width[c], len([]rune(row[c])))
			}
			rows = append(rows, row)
		}
		for n, row := range rows {
			line := fmt.Sprintf("  %-*s  %*s  %-*s  %s", width[0], row[0], width[1], row[1], width[2], row[2], row[3])
			fmt.Fprintln(b, strings.TrimRight(line, " "))
			k := x.Mends[n]
			if len(k.Serves) > 0 {
				fmt.Fprintln(b, "      serves "+strings.Join(k.Serves, ", "))
			}
			if len(k.Needs) > 0 {
				fmt.Fprintln(b, "      "+NeedsLine(r, k.Needs))
			}
			if k.Note != "" {
				fmt.Fprintln(b, "      "+k.Note)
			}
		}
		if s.Sensitivities != nil {
			for _, line := range SensitivityLines(r, s.Sensitivities[i]) {
				fmt.Fprintln(b, "  "+line)
			}
		}
	}
	fmt.Fprintln(b, "\n"+Caution)
	return b.Flush()
}

// words begin the line of a mend, by its kind.
var words = map[size.Kind]string{size.Section: "section ", size.Group: "one section for all ", size.Grade: "grade ", size.Hold: "", size.Height: "", size.Load: ""}

// SensitivityLines says how the utilisation answers to each quantity that it
// answers to.
func SensitivityLines(r *checker.Result, all []size.Sensitivity) []string {
	var out []string
	for _, k := range all {
		if math.Abs(k.Effect()) < 0.00005 {
			continue // nothing to be seen in four decimals
		}
		step := r.Units().Show(k.Reference, k.Dim, 3)
		if k.Dim.IsNone() {
			step = "1 %"
		}
		side := func(v float64) string {
			if v *= k.Reference; !math.IsNaN(v) {
				return fmt.Sprintf("%+.4f", v)
			}
			return "not known"
		}
		line := k.Parameter + " " + step + " more: utilisation " + side(k.Above)
		if k.Kink() {
			line = k.Parameter + " by " + step + ": utilisation " + side(k.Above) + " upwards, " + side(-k.Below) + " downwards, a kink"
		} else if math.IsNaN(k.Above) {
			line = k.Parameter + " " + step + " less: utilisation " + side(-k.Below)
		}
		if k.Matters {
			line += "; matters most"
		}
		out = append(out, line)
	}
	return out
}
