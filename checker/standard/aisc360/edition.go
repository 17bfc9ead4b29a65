package aisc360

import (
	"regexp"
	"strings"

	"kern/checker/derivation"
	"kern/checker/standard"
)

// Standard is ANSI/AISC 360 in one of its editions; the zero value is that of
// 2022.
type Standard struct{ ed *edition }

// edition is what one edition has of its own. A column meets the same equations
// in both: the letters differ.
type edition struct {
	name   string
	set    *derivation.Set
	own    map[*derivation.Formula]*derivation.Formula // its formula for each of 2022; nil for 2022
	letter func(string) string                         // its letter for one of 2022; nil for 2022
}

var edition2022 = &edition{name: "ANSI/AISC 360-22", set: set}

// Edition2016 is ANSI/AISC 360-16.
var Edition2016 Standard

func (s Standard) edition() *edition {
	if s.ed == nil {
		return edition2022
	}
	return s.ed
}

// stress is a nominal stress in compression, whose letter the editions write
// differently.
var stress = regexp.MustCompile(`\bF_n(_[a-zA-Z]+)?\b`)

func init() {
	set.Seal()
	old := &edition{name: "ANSI/AISC 360-16", set: derivation.NewSet(), own: map[*derivation.Formula]*derivation.Formula{}}
	old.letter = func(text string) string { return stress.ReplaceAllString(text, "F_cr$1") }
	for i := range set.Len() {
		s := set.At(derivation.ID(i))
		old.set.Symbol(old.letter(s.Name), s.Dim, s.What)
	}
	for _, f := range set.Formulas() {
		text := f.Text
		if t, ok := changed2016[f]; ok {
			text = t
		}
		old.own[f] = old.set.Formula(f.Symbol, old.letter(text), f.Clause)
	}
	old.set.Seal()
	Edition2016 = Standard{old}
}

// Name implements standard.Standard.
func (s Standard) Name() string { return s.edition().name }

// Annexes implements standard.Standard: there are none.
func (Standard) Annexes() []string { return nil }

// Methods implements standard.Standard.
func (Standard) Methods() []string { return []string{"LRFD", "ASD"} }

// Choices implements standard.Standard: what depends on a method is in Methods.
func (Standard) Choices() []string { return nil }

// Overrides implements standard.Standard.
func (Standard) Overrides() map[string]bool {
	out := map[string]bool{"net_ratio": true, "U": true}
	for _, name := range bendingOverrides {
		out[name] = true
	}
	return out
}

// Rules implements standard.Standard.
func (Standard) Rules() []string {
	return append([]string{"local-buckling", "section-tension", "net-section", "flexural-buckling-major", "flexural-buckling-minor",
		"torsional-buckling", "flexural-torsional-buckling", "connector-spacing", "frame-stability", "slenderness"}, append(standard.CommonRules, bendingRules...)...)
}

// Symbols implements standard.Standard.
func (s Standard) Symbols() *derivation.Set { return s.edition().set }

// Alias implements standard.Standard: N_b_minor for the available strength
// P_c_y and so on.
func (s Standard) Alias(word string) string {
	switch word {
	case "N_b_major":
		return "P_c_x"
	case "N_b_minor":
		return "P_c_y"
	case "N_b_twist":
		return "P_c_T"
	case "N_b":
		return "P_c"
	case "N_cr_major":
		return "P_e_x"
	case "N_cr_minor":
		return "P_e_y"
	case "N_Ed":
		return "P_r"
	case "N_t_Ed":
		return "P_r_t"
	}
	for from, to := range map[string]string{"_major": "_x", "_minor": "_y"} {
		if base, ok := strings.CutSuffix(word, from); ok {
			if _, known := s.edition().set.Find(base + to); known {
				return base + to
			}
		}
	}
	return ""
}

// Check implements standard.Standard.
func (s Standard) Check(f *standard.Frame, record *derivation.Record) *standard.Outcome {
	ed := s.edition()
	c := &calc{ed: ed, f: f, s: derivation.NewSheet(ed.set), record: record, asd: f.Env.Basis.Method == "ASD"}
	c.out.Value = c.value
	c.run()
	return &c.out
}

var _ standard.Standard = Standard{}
