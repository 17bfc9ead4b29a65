package en1993

import (
	"strings"

	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Standard is EN 1993-1-1 in one of its editions; the zero value is that of 2005.
type Standard struct{ ed *edition }

// edition is what one edition of the standard has of its own.
type edition struct {
	name       string
	annexes    []string
	set        *derivation.Set
	own        map[*derivation.Formula]*derivation.Formula // its formula for each of 2005; nil for 2005
	extra      map[string]*derivation.Formula              // formulas that 2005 does not have
	renumber   func(string) string                         // its clause for one of 2005; nil for 2005
	curves     func(s *model.Section, s460 bool) (major, minor curve)
	outOfScope func(m *model.Material, fy float64, units derivation.Units) string
}

var edition2005 = &edition{name: "EN 1993-1-1:2005", annexes: annexNames(), set: set, curves: curves, outOfScope: outOfScope}

func (s Standard) edition() *edition {
	if s.ed == nil {
		return edition2005
	}
	return s.ed
}

// Text is a formula as text in the language's own expressions.
type Text struct{ Symbol, Text, Clause string }

// Letter is a symbol that an edition adds.
type Letter struct {
	Name string
	Dim  unit.Dim
	What string
}

// Change is a formula of the 2005 edition that another edition writes otherwise:
// the one of the symbol that has the old text.
type Change struct{ Symbol, Old, New, Clause string }

// Edition is another edition of EN 1993-1-1, as differences from that of 2005:
// what it does not name stays the same.
type Edition struct {
	Name    string
	Annexes []string
	// Renumber turns a clause, table or source of the 2005 edition into its own.
	Renumber func(string) string
	Changes  []Change
	Letters  []Letter
	// Extra are the formulas of steps that the 2005 edition does not have, by the
	// names that the checks look for.
	Extra map[string]Text
	// Column460 gives the buckling curves of rolled I sections of the second column
	// of the table of curves, y–y and z–z, "" for no row; h/b > 1.2 is slim, tf in
	// metres.
	Column460 func(slim bool, tf float64) (y, z string)
	// Yield is the greatest yield strength in its scope, Pa.
	Yield float64
}

// New makes a standard of an edition. An edition that changes a formula which
// 2005 does not have is a defect of the program and panics at start.
func New(e Edition) Standard {
	own := derivation.NewSet()
	for i := range set.Len() {
		s := set.At(derivation.ID(i))
		own.Symbol(s.Name, s.Dim, s.What)
	}
	for _, l := range e.Letters {
		own.Symbol(l.Name, l.Dim, l.What)
	}
	ed := &edition{name: e.Name, annexes: e.Annexes, set: own, own: map[*derivation.Formula]*derivation.Formula{}, extra: map[string]*derivation.Formula{}, renumber: e.Renumber}
	used := make([]bool, len(e.Changes))
	for _, f := range set.Formulas() {
		text, clause := f.Text, e.Renumber(f.Clause)
		for i, c := range e.Changes {
			if set.At(f.Symbol).Name == c.Symbol && f.Text == c.Old {
				text, clause, used[i] = c.New, c.Clause, true
			}
		}
		ed.own[f] = own.Formula(f.Symbol, text, clause)
	}
	for i, c := range e.Changes {
		if !used[i] {
			panic("en1993: " + e.Name + " changes a formula that is not there: " + c.Symbol + " = " + c.Old)
		}
	}
	for name, t := range e.Extra {
		id, ok := own.Find(t.Symbol)
		if !ok {
			panic("en1993: " + e.Name + " has no symbol " + t.Symbol)
		}
		ed.extra[name] = own.Formula(id, t.Text, t.Clause)
	}
	own.Seal()
	ed.outOfScope = func(m *model.Material, fy float64, units derivation.Units) string {
		if fy > e.Yield*(1+1e-9) {
			return "a yield strength above " + units.Short(e.Yield, unit.Stress, 3) + " is beyond " + e.Name
		}
		return ""
	}
	ed.curves = func(s *model.Section, s460 bool) (major, minor curve) {
		return curvesOf(s, s460, e.Column460)
	}
	return Standard{ed}
}

// Name implements standard.Standard.
func (s Standard) Name() string { return s.edition().name }

// Annexes implements standard.Standard.
func (s Standard) Annexes() []string { return s.edition().annexes }

// Methods implements standard.Standard: there is one alone.
func (Standard) Methods() []string { return nil }

// Choices implements standard.Standard: the edition of 2005 leaves two methods of
// lateral-torsional buckling (6.3.2.2, 6.3.2.3) and two annexes for 6.3.3.
func (s Standard) Choices() []string {
	if s.ed == nil {
		return []string{"lateral", "interaction"}
	}
	return nil
}

// Overrides implements standard.Standard.
func (s Standard) Overrides() map[string]bool {
	out := map[string]bool{"gamma_M0": true, "gamma_M1": true, "gamma_M2": true, "net_ratio": true, "C_1": true, "C_2": true, "z_g_h": true}
	if s.ed == nil { // numbers of 6.3.2.3
		out["k_c"], out["lambda_LT_0"], out["beta_LT"] = true, true, true
	}
	return out
}

// Rules implements standard.Standard.
func (Standard) Rules() []string {
	return append([]string{"local-buckling", "section-compression", "section-tension", "net-section", "section-bending-major", "section-bending-minor",
		"section-shear-major", "section-shear-minor", "section-interaction", "flexural-buckling-major", "flexural-buckling-minor",
		"torsional-buckling", "flexural-torsional-buckling", "lateral-torsional-buckling", "member-interaction", "torsion", "slenderness"}, standard.CommonRules...)
}

// Symbols implements standard.Standard.
func (s Standard) Symbols() *derivation.Set { return s.edition().set }

// Alias implements standard.Standard: N_b_major for N_b_y_Rd and so on.
func (s Standard) Alias(word string) string {
	switch word {
	case "N_b_major":
		return "N_b_y_Rd"
	case "N_b_minor":
		return "N_b_z_Rd"
	case "N_b_twist":
		return "N_b_T_Rd"
	case "N_c":
		return "N_c_Rd"
	case "M_b":
		return "M_b_Rd"
	case "M_c_major":
		return "M_c_y_Rd"
	case "M_c_minor":
		return "M_c_z_Rd"
	}
	for from, to := range map[string]string{"_major": "_y", "_minor": "_z"} {
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
	c := &calc{ed: ed, f: f, s: derivation.NewSheet(ed.set), record: record, settings: settingsOf(&f.Env.Basis)}
	c.out.Value = c.value
	c.run()
	if ed.renumber != nil {
		for i := range c.out.Checks {
			c.out.Checks[i].Clause = ed.renumber(c.out.Checks[i].Clause)
			c.out.Checks[i].Why = ed.renumber(c.out.Checks[i].Why)
		}
		for i := range c.out.Coverage {
			c.out.Coverage[i].Why = ed.renumber(c.out.Coverage[i].Why)
		}
	}
	return &c.out
}
