package unit

import (
	"fmt"
	"math/big"
	"slices"
	"strings"
)

// Atom is one unit symbol of the language, from which Parse makes compound
// units.
type Atom struct {
	// Symbol is the text of the atom, case-sensitive.
	Symbol string
	// Factor is the number of SI base units (m, kg, s, rad) in one of it.
	Factor float64
	// Dim is its dimension.
	Dim Dim
	// Name is its name in words, in the singular ("kilonewton").
	Name string
	// Source is where the factor is defined.
	Source string
	// Exact reports whether the factor has a finite decimal expansion, as the
	// inch has (0.0254) and the pound-force per square inch has not. Factor is
	// the nearest float64 in both cases.
	Exact bool
}

// known is an Atom together with what the parser needs.
type known struct {
	Atom
	factor *big.Rat // the factor itself, before rounding
	// head and tail are the two units of one that is run together, such as
	// kNm: an exponent belongs to the tail alone, so that kNm2 is kN*m2, the
	// unit of a flexural rigidity, as it is wherever the trade writes it.
	head, tail *known
	bare       bool // takes no exponent: a percent sign, a degree sign
	alias      bool // another spelling, never suggested
}

var (
	atoms     = makeAtoms()
	atomOrder = orderAtoms(atoms)
)

// Atoms returns every atom of the language, sorted by symbol (byte order).
func Atoms() []Atom {
	list := make([]Atom, len(atomOrder))
	for i, symbol := range atomOrder {
		list[i] = atoms[symbol].Atom
	}
	return list
}

// Known reports whether the text is an atom of the language: "kN" is one, and
// "kN/m" and "mm2" are made of several or have an exponent.
func Known(atom string) bool {
	_, ok := atoms[atom]
	return ok
}

func orderAtoms(table map[string]*known) []string {
	order := make([]string, 0, len(table))
	for symbol := range table {
		order = append(order, symbol)
	}
	slices.Sort(order)
	return order
}

// makeAtoms computes the table from the definitions, in exact arithmetic. A
// definition that does not hold together is a mistake in this program.
func makeAtoms() map[string]*known {
	table := make(map[string]*known, len(definitions)+4)
	for symbol, base := range map[string]struct {
		name string
		dim  Dim
	}{"m": {"metre", Length}, "kg": {"kilogram", Mass}, "s": {"second", Time}, "rad": {"radian", Angle}} {
		source := siBase
		if symbol == "rad" {
			source = siNamed
		}
		table[symbol] = &known{
			Atom:   Atom{Symbol: symbol, Factor: 1, Dim: base.dim, Name: base.name, Source: source, Exact: true},
			factor: big.NewRat(1, 1),
		}
	}
	for _, d := range definitions {
		scale, of, _ := strings.Cut(d.value, " ")
		factor, terminates := scaleOf(scale)
		product, failure := read(table, of)
		if failure != nil || factor == nil || table[d.symbol] != nil {
			panic(fmt.Sprintf("unit: definition of %q: %v", d.symbol, failure))
		}
		factor.Mul(factor, product.rat())
		rounded, _ := factor.Float64()
		k := &known{
			Atom: Atom{
				Symbol: d.symbol, Factor: rounded, Dim: product.dim, Name: d.name,
				Source: d.source, Exact: terminates && finiteDecimal(factor.Denom()),
			},
			factor: factor,
			bare:   d.form == sign,
			alias:  d.form == spelling || d.symbol == "°",
		}
		if d.form == joined {
			head, tail, _ := strings.Cut(of, "*")
			k.head, k.tail = table[head], table[tail]
		}
		table[d.symbol] = k
	}
	return table
}

// pi to 60 decimals, so that the factor of a degree is the nearest float64.
const pi = "3.141592653589793238462643383279502884197169399375105820974944"

// scaleOf reads the number of a definition: a decimal, or "pi/" and a decimal.
// It reports whether the number is the definition itself, which an
// approximation of pi is not.
func scaleOf(text string) (factor *big.Rat, exact bool) {
	divisor, angular := strings.CutPrefix(text, "pi/")
	factor, ok := new(big.Rat).SetString(divisor)
	if !ok {
		return nil, false
	}
	if angular {
		circle, _ := new(big.Rat).SetString(pi)
		return circle.Quo(circle, factor), false
	}
	return factor, true
}

// finiteDecimal reports whether a fraction in lowest terms with this
// denominator has a finite decimal expansion: no prime factor but 2 and 5.
func finiteDecimal(denominator *big.Int) bool {
	rest, digit := new(big.Int).Set(denominator), new(big.Int)
	for _, prime := range []int64{2, 5} {
		p := big.NewInt(prime)
		for {
			quotient, remainder := new(big.Int).QuoRem(rest, p, digit)
			if remainder.Sign() != 0 {
				break
			}
			rest = quotient
		}
	}
	return rest.IsInt64() && rest.Int64() == 1
}
