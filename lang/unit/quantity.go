package unit

import "math"

// StandardGravity is the standard acceleration of free fall, 9.80665 m/s2
// exactly (NIST SP 811, Appendix B; 3rd CGPM, 1901). It is the constant g of
// the language.
const StandardGravity = 9.80665

// Unit is a unit of measure: value in SI = value in the unit * Factor.
type Unit struct {
	// Symbol is the text as it was written, for example "kN/m2".
	Symbol string
	// Factor is positive and finite: SI base units in one of this unit.
	Factor float64
	// Dim is the dimension of the unit.
	Dim Dim
}

// Quantity is a value in coherent SI base units (m, kg, s, rad) with its
// dimension.
type Quantity struct {
	Value float64
	Dim   Dim
}

// In returns the value of q in the unit u. It returns NaN when u has another
// dimension than q, or no factor, so that a slip cannot pass for a number.
func (q Quantity) In(u Unit) float64 {
	if q.Dim != u.Dim || u.Factor == 0 {
		return math.NaN()
	}
	// A division, and not a product with the inverse: 6.3 mm stored as
	// 6.3*0.001 m more often reads back as 6.3.
	return q.Value / u.Factor
}
