package en1993

import (
	"fmt"
	"slices"

	"kern/checker/action"
	"kern/checker/model"
)

// settings are the choices that a basis makes among the methods of the standard.
type settings struct {
	basis    *model.Basis
	national *national
	special  bool // 6.3.2.3 for rolled and welded I sections
	annexA   bool // Annex A for 6.3.3
}

// national is a set of values and methods that a country chooses. What it does
// not say is as recommended: 6.3.2.2 for all sections and Annex B, the safer ones.
type national struct {
	annex   string
	special bool // 6.3.2.3 for rolled and welded I sections
	british bool // 6.3.2.3 with the curves of the UK National Annex
	gammaM1 float64
	rows    []action.National
}

const (
	note2B = "EN 1993-1-1 6.1(1) note 2B; the first two printed in Steel Buildings in Europe, Multi-Storey Part 10, 2.6.2, gamma_M2 from memory"
	tables = "design tables of columns to DIN EN 1993-1-1 by bauforumstahl, Bemessungshilfe Stützen im Geschossbau, A.1 (all with this factor); gamma_M0 and gamma_M2 are left at the recommended 1.00 and 1.25"
	uk     = "reproduced by printed resistances to the National Annex (test cases EU-05, EU-07); gamma_M2 is left at the recommended 1.25"
)

// nationals are the sets that a basis can name, the default first. A country is
// one of them when each of its values that differs has a source.
var nationals = []*national{
	{annex: "recommended", gammaM1: 1, rows: []action.National{{What: "gamma_M0, gamma_M1, gamma_M2", Value: "1.00, 1.00, 1.25", Source: note2B}}},
	{annex: "Germany", gammaM1: 1.1, rows: []action.National{{What: "gamma_M1", Value: "1.10", Source: tables}}},
	{annex: "United Kingdom", gammaM1: 1, special: true, british: true, rows: []action.National{
		{What: "6.3.2.3 with lambda_LT_0 = 0.4, beta = 0.75 and its own curves; strengths are to be those of the product standard (the default)", Value: "gamma_M0 = gamma_M1 = 1.00", Source: uk}}},
}

func annexNames() []string {
	var out []string
	for _, n := range nationals {
		out = append(out, n.annex)
	}
	return out
}

// Nationals are the numbers and methods of every annex of the edition of 2005 with
// their sources, in order. What a set does not list is as recommended.
func (s Standard) Nationals() []action.National {
	if s.ed != nil {
		return nil
	}
	var out []action.National
	for _, n := range nationals {
		for _, r := range n.rows {
			r.Annex = n.annex
			out = append(out, r)
		}
	}
	return out
}

func settingsOf(basis *model.Basis) settings {
	s := settings{basis: basis, national: nationals[0]}
	if i := slices.IndexFunc(nationals, func(n *national) bool { return n.annex == basis.Annex }); i >= 0 {
		s.national = nationals[i]
	}
	s.special = s.national.special
	if w := basis.Lateral.Word; w != "" {
		s.special = w == "rolled"
	}
	s.annexA = basis.Interaction.Word == "A"
	return s
}

// number is a number that the basis states, 0 when it does not.
func (s settings) number(name string) float64 { return s.basis.Overrides[name].Value }

func (s settings) numberOr(name string, standard float64) float64 {
	if v := s.number(name); v != 0 {
		return v
	}
	return standard
}

func (s settings) because(name string) string { return s.basis.Overrides[name].Because }

// partial is a partial factor of the annex, with its source. A calculation states
// others with its reason.
func (s settings) partial(name string, recommended float64) (float64, string) {
	if name == "gamma_M1" && s.national.gammaM1 != recommended {
		return s.national.gammaM1, fmt.Sprintf("annex %s", s.national.annex)
	}
	return recommended, "recommended"
}
