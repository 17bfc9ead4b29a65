package catalogue

import (
	"math"
	"strconv"
	"strings"

	"kern/checker/section"
)

// hollowSize is the size of a hollow section in micrometres, which makes it
// exact and usable as a key. A circular section has b = 0.
type hollowSize struct {
	cold    bool
	oval    bool  // elliptical, a and b being its axes
	a, b, t int32 // longer side or diameter, shorter side, wall thickness
}

// micrometres per millimetre.
const micro = 1000

// Bounds of what is taken for a hollow section at all. The largest side is the
// largest diameter in the scope of EN 10210-2 and EN 10219-2.
const (
	smallestSide = 10 * micro
	largestSide  = 2500 * micro
	thinnestWall = micro / 2
)

// sane tells whether the size can be made: the wall fits and, in a square or
// rectangular section, so do the standard's corner radii, outside and inside.
func (s hollowSize) sane() bool {
	if s.a > largestSide || s.t < thinnestWall {
		return false
	}
	if s.b == 0 {
		return s.a >= smallestSide && 2*s.t < s.a
	}
	if s.oval {
		// The wall is thinner than the outside's smallest radius of curvature.
		// EN 10219-2 had no elliptical sections before its edition of 2019.
		return !s.cold && s.b >= smallestSide && s.b < s.a && 2*int64(s.t)*int64(s.a) < int64(s.b)*int64(s.b)
	}
	const slack = 1e-9 // m, of the conversion from micrometres
	outer, inner := section.DefaultRadii(s.made(), inMetres(s.t))
	return s.b >= smallestSide && s.b <= s.a && 2*s.t < s.b &&
		2*outer <= inMetres(s.b)+slack && 2*inner <= inMetres(s.b-2*s.t)+slack
}

// made tells how the section is made.
func (s hollowSize) made() section.Made {
	if s.cold {
		return section.Cold
	}
	return section.Hot
}

// family returns EHS, CHS, SHS or RHS.
func (s hollowSize) family() string {
	switch {
	case s.oval:
		return "EHS"
	case s.b == 0:
		return "CHS"
	case s.a == s.b:
		return "SHS"
	}
	return "RHS"
}

// designation returns the canonical name.
func (s hollowSize) designation() string {
	var buf [40]byte
	d := append(buf[:0], s.family()...)
	d = append(d, ' ')
	d = appendMillimetres(d, s.a)
	d = append(d, 'x')
	if s.b != 0 {
		d = appendMillimetres(d, s.b)
		d = append(d, 'x')
	}
	d = appendMillimetres(d, s.t)
	if s.cold {
		d = append(d, " cold"...)
	}
	return string(d)
}

// appendMillimetres writes micrometres as millimetres without trailing zeros.
func appendMillimetres(d []byte, um int32) []byte {
	d = strconv.AppendInt(d, int64(um/micro), 10)
	rest := um % micro
	if rest == 0 {
		return d
	}
	d = append(d, '.')
	for scale := int32(micro / 10); rest > 0; scale /= 10 {
		d = append(d, byte('0'+rest/scale))
		rest %= scale
	}
	return d
}

// entry builds the catalogue's line of a hollow section; the size is sane.
func (s hollowSize) entry(listed bool) Entry {
	e := Entry{
		Designation: s.designation(),
		Family:      s.family(),
		Standard:    "EN 10210-2",
		Product:     HotHollow,
		Listed:      listed,
		Torsion:     torsionHollow,
	}
	if s.cold {
		e.Standard, e.Product = "EN 10219-2", ColdHollow
	}
	if s.oval {
		e.Shape = section.Shape{Kind: section.Ellipse, Made: s.made(), Depth: inMetres(s.a), Width: inMetres(s.b), Wall: inMetres(s.t)}
		return e
	}
	if s.b == 0 {
		e.Torsion = torsionExact
		e.Shape = section.Shape{Kind: section.Pipe, Made: s.made(), Diameter: inMetres(s.a), Wall: inMetres(s.t)}
		return e
	}
	outer, inner := section.DefaultRadii(s.made(), inMetres(s.t))
	e.Shape = section.Shape{
		Kind: section.Tube, Made: s.made(),
		Depth: inMetres(s.a), Width: inMetres(s.b), Wall: inMetres(s.t),
		OuterRadius: outer, InnerRadius: inner,
	}
	return e
}

// inMetres turns micrometres into metres.
func inMetres(um int32) float64 { return float64(um) / 1e6 }

// hollowList is a standard's list of sizes as the tables write it.
type hollowList struct {
	cold  bool
	lines string
}

// hollowLists returns the lists in the order in which All gives them.
func hollowLists() []hollowList {
	return []hollowList{
		{false, hotSquare}, {false, hotRectangular}, {false, hotCircular}, {false, hotElliptical},
		{true, coldSquare}, {true, coldRectangular}, {true, coldCircular},
	}
}

// sizes reads the list. A line that cannot be read is a mistake in the tables,
// not in any input, and stops the program.
func (l hollowList) sizes() []hollowSize {
	var out []hollowSize
	square := l.lines == hotSquare || l.lines == coldSquare
	for line := range strings.Lines(l.lines) {
		head, tail, found := strings.Cut(strings.TrimSpace(line), ":")
		if !found {
			continue
		}
		var s hollowSize
		s.cold, s.oval = l.cold, l.lines == hotElliptical
		long, short, rectangular := strings.Cut(head, "x")
		ok := true
		if s.a, ok = parseMicro(long); !ok {
			panic("catalogue: bad line " + line)
		}
		switch {
		case square:
			s.b = s.a
		case rectangular:
			if s.b, ok = parseMicro(short); !ok {
				panic("catalogue: bad line " + line)
			}
		}
		for field := range strings.FieldsSeq(tail) {
			if s.t, ok = parseMicro(field); !ok || !s.sane() {
				panic("catalogue: bad thickness in line " + line)
			}
			out = append(out, s)
		}
	}
	return out
}

// parseMicro reads a positive decimal number of millimetres with at most three
// decimals as micrometres. Signs and exponents are not numbers here.
func parseMicro(text string) (int32, bool) {
	if len(text) == 0 || len(text) > 9 {
		return 0, false
	}
	var value int64
	decimals := -1 // digits after the point, -1 before it
	digits := 0
	for i := range len(text) {
		c := text[i]
		switch {
		case digit(c):
			value = value*10 + int64(c-'0')
			digits++
			if decimals >= 0 {
				decimals++
			}
		case c == '.' && decimals < 0:
			decimals = 0
		default:
			return 0, false
		}
	}
	if digits == 0 || decimals > 3 || decimals == 0 {
		return 0, false
	}
	for range 3 - max(decimals, 0) {
		value *= 10
	}
	if value <= 0 || value > math.MaxInt32 {
		return 0, false
	}
	return int32(value), true
}
