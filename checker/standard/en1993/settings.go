package en1993

import (
	"strings"

	"kern/checker/model"
)

// settings are the choices that a basis makes among the methods of the standard.
type settings struct {
	basis   *model.Basis
	special bool // 6.3.2.3 for rolled and welded I sections
	annexA  bool // Annex A for 6.3.3
	british bool // values of the UK National Annex
}

// annexes are the sets of values and methods that a basis can name. The words
// behind the first choose the method where the standard leaves a choice.
var annexes = []string{"recommended", "recommended with 6.3.2.3", "recommended with Annex A", "recommended with 6.3.2.3 and Annex A", "United Kingdom", "Germany"}

// national are the partial factors of the annexes that differ from the
// recommended values (from memory).
var national = map[string]map[string]float64{
	"United Kingdom": {"gamma_M2": 1.10},
	"Germany":        {"gamma_M1": 1.10},
}

func settingsOf(basis *model.Basis) settings {
	s := settings{basis: basis}
	s.special = strings.Contains(basis.Annex, "6.3.2.3") || basis.Annex == "United Kingdom"
	s.annexA = strings.Contains(basis.Annex, "Annex A")
	s.british = basis.Annex == "United Kingdom"
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

// partial is a recommended partial factor or that of the annex, with its source.
func (s settings) partial(name string, recommended float64) (float64, string) {
	if v, ok := national[s.basis.Annex][name]; ok {
		return v, "National Annex, " + s.basis.Annex + " (from memory)"
	}
	return recommended, "recommended"
}
