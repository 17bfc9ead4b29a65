// Package unit knows the dimensions and units of the language: it reads unit
// texts such as "kN/m2", converts quantities, suggests units for a misspelt
// one and prints numbers.
//
// Every quantity is a float64 in the coherent base units metre, kilogram,
// second and radian, together with its dimension. The plane angle has a
// dimension of its own, so that a rotational stiffness (N*m/rad) cannot be
// taken for a moment (N*m).
package unit

// sixths is the number of steps into which one whole exponent of a Dim is
// divided: the smallest number that holds both halves and thirds.
const sixths = 6

// Dim is a dimension: the exponents of length, mass, time and plane angle,
// each in sixths, so that square roots and cube roots are exact. A whole
// exponent n is stored as 6*n; the range is -128/6 to 127/6. The zero value is
// the dimension of a pure number. Dims are compared with ==.
type Dim struct{ L, M, T, A int8 }

// The dimensions that the language names. They are values to compare with and
// to compute with; nothing may assign to them.
var (
	// None is the dimension of a pure number.
	None = Dim{}
	// Length is measured in m.
	Length = Dim{L: 1 * sixths}
	// Area is measured in m2.
	Area = Dim{L: 2 * sixths}
	// Volume is measured in m3; a section modulus has this dimension too.
	Volume = Dim{L: 3 * sixths}
	// Length4 is the dimension of a second moment of area, m4.
	Length4 = Dim{L: 4 * sixths}
	// Length5 is measured in m5.
	Length5 = Dim{L: 5 * sixths}
	// Length6 is the dimension of a warping constant, m6.
	Length6 = Dim{L: 6 * sixths}
	// Curvature is the inverse of a length, 1/m.
	Curvature = Dim{L: -1 * sixths}
	// Mass is measured in kg. Mass is not force.
	Mass = Dim{M: 1 * sixths}
	// Time is measured in s.
	Time = Dim{T: 1 * sixths}
	// Frequency is the inverse of a time, Hz.
	Frequency = Dim{T: -1 * sixths}
	// Angle is a plane angle, rad.
	Angle = Dim{A: 1 * sixths}
	// Velocity is measured in m/s.
	Velocity = Dim{L: 1 * sixths, T: -1 * sixths}
	// Acceleration is measured in m/s2.
	Acceleration = Dim{L: 1 * sixths, T: -2 * sixths}
	// Force is measured in N.
	Force = Dim{L: 1 * sixths, M: 1 * sixths, T: -2 * sixths}
	// Moment is a force by a length, N*m; work and energy have this
	// dimension too.
	Moment = Dim{L: 2 * sixths, M: 1 * sixths, T: -2 * sixths}
	// Stress is a force on an area, Pa; a pressure has this dimension too.
	Stress = Dim{L: -1 * sixths, M: 1 * sixths, T: -2 * sixths}
	// ForcePerLength is a line load or a translational stiffness, N/m.
	ForcePerLength = Dim{M: 1 * sixths, T: -2 * sixths}
	// Density is a mass on a volume, kg/m3.
	Density = Dim{L: -3 * sixths, M: 1 * sixths}
	// MassPerLength is measured in kg/m.
	MassPerLength = Dim{L: -1 * sixths, M: 1 * sixths}
	// MassPerArea is measured in kg/m2.
	MassPerArea = Dim{L: -2 * sixths, M: 1 * sixths}
	// WeightDensity is a force on a volume, N/m3.
	WeightDensity = Dim{L: -2 * sixths, M: 1 * sixths, T: -2 * sixths}
	// RotationalStiffness is a moment by an angle, N*m/rad.
	RotationalStiffness = Dim{L: 2 * sixths, M: 1 * sixths, T: -2 * sixths, A: -1 * sixths}
	// Rigidity is that of a member in bending, E I, N*m2.
	Rigidity = Dim{L: 3 * sixths, M: 1 * sixths, T: -2 * sixths}
)

// IsNone reports whether d is the dimension of a pure number.
func (d Dim) IsNone() bool { return d == None }

// Mul returns the dimension of a product. It reports false, with the zero Dim,
// when an exponent leaves the range that a Dim can hold.
func (d Dim) Mul(e Dim) (Dim, bool) {
	return fromInts(int(d.L)+int(e.L), int(d.M)+int(e.M), int(d.T)+int(e.T), int(d.A)+int(e.A))
}

// Div returns the dimension of a quotient. It reports false, with the zero
// Dim, when an exponent leaves the range that a Dim can hold.
func (d Dim) Div(e Dim) (Dim, bool) {
	return fromInts(int(d.L)-int(e.L), int(d.M)-int(e.M), int(d.T)-int(e.T), int(d.A)-int(e.A))
}

// Pow returns the dimension of a quantity raised to num/den. It reports false,
// with the zero Dim, when den is zero, when an exponent of the result is not a
// whole number of sixths, or when it leaves the range that a Dim can hold.
func (d Dim) Pow(num, den int) (Dim, bool) {
	if den == 0 {
		return Dim{}, false
	}
	if d == None {
		return None, true
	}
	if g := divisor(num, den); g != 0 {
		num, den = num/g, den/g
	}
	// In lowest terms the divisor must divide an exponent (at most 128) and
	// the result must not pass 128, so that anything larger cannot be held;
	// the check also keeps the products below far from overflow.
	const most = 128
	if num > most*most || num < -most*most || den > most || den < -most {
		return Dim{}, false
	}
	parts := [4]int{int(d.L) * num, int(d.M) * num, int(d.T) * num, int(d.A) * num}
	for i, part := range parts {
		if part%den != 0 {
			return Dim{}, false
		}
		parts[i] = part / den
	}
	return fromInts(parts[0], parts[1], parts[2], parts[3])
}

// fromInts makes a Dim of four exponents in sixths, if each fits.
func fromInts(l, m, t, a int) (Dim, bool) {
	d := Dim{int8(l), int8(m), int8(t), int8(a)}
	if int(d.L) != l || int(d.M) != m || int(d.T) != t || int(d.A) != a {
		return Dim{}, false
	}
	return d, true
}

// divisor returns a greatest common divisor of a and b, of either sign.
func divisor(a, b int) int {
	for b != 0 {
		a, b = b, a%b
	}
	return a
}
