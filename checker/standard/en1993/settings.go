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
var annexes = []string{"recommended", "recommended with 6.3.2.3", "recommended with Annex A", "recommended with 6.3.2.3 and Annex A", "United Kingdom"}

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

// partial is a recommended partial factor, with its source. The annexes that are
// known have the recommended ones; a calculation states others with its reason.
func (s settings) partial(_ string, recommended float64) (float64, string) {
	return recommended, "recommended"
}
