package action

import "math"

const pi = math.Pi

func sqrt(x float64) float64 { return math.Sqrt(x) }

// CriticalUniform is the elastic critical axial force of a uniform column with
// EI = 1 under a force that does not change with height, on rigid holds
// (ascending, strictly inside): multiply by E I. Zero when the column is a
// mechanism.
func CriticalUniform(base, top End, holds []float64, height float64) float64 {
	return CriticalStepped(base, top, holds, []Step{{To: height, Stiffness: 1}})
}

// CriticalStepped is the elastic critical axial force, N, of a column of several
// stiffnesses under a force that does not change with height, on rigid holds
// (ascending, strictly inside). Zero when the column is a mechanism or a step has
// no positive height and stiffness.
func CriticalStepped(base, top End, holds []float64, steps []Step) float64 {
	bar := Bar{Base: base, Top: top, Nodes: []float64{0}, Held: []bool{false}}
	from := 0.0
	for i, s := range steps {
		inner := holds
		for len(inner) > 0 && inner[0] <= from*(1+1e-9) {
			inner = inner[1:]
		}
		for _, h := range inner {
			if h < s.To*(1-1e-9) {
				bar.node(h, true, s.Stiffness)
			}
		}
		held := false
		for _, h := range holds {
			held = held || math.Abs(h-s.To) <= 1e-9*s.To
		}
		bar.node(s.To, held && i < len(steps)-1, s.Stiffness)
		from = s.To
	}
	return bar.Critical()
}

// node adds a part under a force of 1 N, up to a height.
func (b *Bar) node(z float64, held bool, stiffness float64) {
	b.Nodes, b.Held = append(b.Nodes, z), append(b.Held, held)
	b.Force, b.Stiffness = append(b.Force, 1), append(b.Stiffness, stiffness)
}

// Bar is a straight column cut at its nodes, with an axial force and a bending
// stiffness that are constant between neighbouring nodes.
type Bar struct {
	Base, Top End
	Nodes     []float64 // heights, ascending, from the base to the top
	Held      []bool    // rigid lateral hold at each inner node; ends follow Base and Top
	Lateral   []float64 // stiffness of a lateral spring at each node, N/m; nil for none
	Turning   []float64 // stiffness of a rotational spring at each node, Nm/rad; nil for none
	Force     []float64 // axial compression of each part under the reference loading, N
	Stiffness []float64 // E I of each part, Nm2
}

// Critical is the factor by which the reference forces must grow until the bar
// buckles, by the stiffness method with exact stability functions: the least
// factor at which the stiffness matrix stops being positive definite. Zero for
// a mechanism and for a part without a positive length and stiffness, +Inf when
// nothing is compressed.
func (b *Bar) Critical() float64 {
	// No part can carry more than if it were clamped at both ends: there the
	// stability functions pass their first pole.
	limit := math.Inf(1)
	for i, n := range b.Force {
		l := b.Nodes[i+1] - b.Nodes[i]
		if !(l > 0) || !(b.Stiffness[i] > 0) || !finite(l, n, b.Stiffness[i]) {
			return 0
		}
		if n > 0 {
			limit = min(limit, 4*pi*pi*b.Stiffness[i]/(l*l*n))
		}
	}
	if !b.stands() || !b.stable(0) {
		return 0
	}
	if math.IsInf(limit, 1) {
		return limit
	}
	low, high := 0.0, limit*(1-1e-12)
	if b.stable(high) {
		return limit
	}
	for range 200 {
		mid := (low + high) / 2
		if b.stable(mid) {
			low = mid
		} else {
			high = mid
		}
		if high-low <= 1e-13*high {
			break
		}
	}
	return low
}

// holds tells whether something rigid keeps a node in place.
func (b *Bar) holds(i int) bool {
	switch i {
	case 0:
		return b.Base.held()
	case len(b.Nodes) - 1:
		return b.Top.held()
	}
	return i < len(b.Held) && b.Held[i]
}

// stands tells whether the bar, taken as rigid, can neither shift nor turn. The
// pivots of the stiffness matrix cannot tell: a short part makes their rounding
// errors larger than the stiffness of the rest.
func (b *Bar) stands() bool {
	height := b.Nodes[len(b.Nodes)-1] - b.Nodes[0]
	held, centre := 0, 0.0
	k, kz := 0.0, 0.0
	for i, z := range b.Nodes {
		switch {
		case b.holds(i):
			held, centre = held+1, z
		case b.Lateral != nil:
			k += b.Lateral[i]
			kz += b.Lateral[i] * z
		}
	}
	if b.Base.clamped() || b.Top.clamped() {
		return held > 0 || k > 0
	}
	if held >= 2 {
		return true
	}
	if held == 0 {
		if !(k > 0) {
			return false
		}
		centre = kz / k
	}
	turning := 0.0 // stiffness against turning about the centre
	for i, z := range b.Nodes {
		if b.Lateral != nil && !b.holds(i) {
			turning += b.Lateral[i] * (z - centre) * (z - centre)
		}
		if b.Turning != nil {
			turning += b.Turning[i]
		}
	}
	return turning > 1e-20*k*height*height // above the rounding of the centre
}

// stable tells whether the bar's stiffness matrix is positive definite under
// the reference forces times factor: a factorisation without a pivot at or
// below zero.
func (b *Bar) stable(factor float64) bool {
	k, _ := b.matrix(factor)
	return factorise(k)
}

// matrix is the stiffness matrix under the reference forces times factor, with
// the movements that a support prevents. It has a half band of three besides the
// diagonal: k[i][d] is the entry (i, i+d).
func (b *Bar) matrix(factor float64) (k [][4]float64, fixed []bool) {
	nodes := len(b.Nodes)
	size := 2 * nodes
	k = make([][4]float64, size)
	for i := range b.Force {
		l := b.Nodes[i+1] - b.Nodes[i]
		s, c, t := stability(factor * b.Force[i] * l * l / b.Stiffness[i])
		ei := b.Stiffness[i]
		r := 2 * i
		// slope-deflection form: s, c rotational terms, t the sway term
		k[r][0] += ei / (l * l * l) * t
		k[r][1] += ei / (l * l) * (s + c)
		k[r][2] += -ei / (l * l * l) * t
		k[r][3] += ei / (l * l) * (s + c)
		k[r+1][0] += ei / l * s
		k[r+1][1] += -ei / (l * l) * (s + c)
		k[r+1][2] += ei / l * c
		k[r+2][0] += ei / (l * l * l) * t
		k[r+2][1] += -ei / (l * l) * (s + c)
		k[r+3][0] += ei / l * s
	}
	for i := range nodes {
		if b.Lateral != nil {
			k[2*i][0] += b.Lateral[i]
		}
		if b.Turning != nil {
			k[2*i+1][0] += b.Turning[i]
		}
	}
	fixed = make([]bool, size)
	for i := range nodes {
		fixed[2*i] = b.holds(i)
	}
	fixed[1], fixed[size-1] = b.Base.clamped(), b.Top.clamped()
	for i := range size {
		if fixed[i] {
			for d := 1; d < 4; d++ {
				k[i][d] = 0
				if i-d >= 0 {
					k[i-d][d] = 0
				}
			}
			k[i][0] = 1
		}
	}
	return k, fixed
}

// factorise brings a banded symmetric matrix to triangular form in place; false
// where a pivot is not positive.
func factorise(k [][4]float64) bool {
	size := len(k)
	for i := range size {
		p := k[i][0]
		if !(p > 0) {
			return false
		}
		for d := 1; d < 4 && i+d < size; d++ {
			f := k[i][d] / p
			for e := d; e < 4 && i+e < size; e++ {
				k[i+d][e-d] -= f * k[i][e]
			}
		}
	}
	return true
}

// stability gives the stability functions of a part: s and c of the rotations,
// in units of EI/l, and t of the sway, in units of EI/l³. x is N l²/(E I),
// compression positive.
func stability(x float64) (s, c, t float64) {
	switch {
	case math.Abs(x) < 4:
		s, c = stabilitySeries(x)
	case x > 0:
		u := math.Sqrt(x)
		sin, cos := math.Sincos(u)
		d := 2 - 2*cos - u*sin
		s = u * (sin - u*cos) / d
		c = u * (u - sin) / d
	case x > -1600:
		u := math.Sqrt(-x)
		sh, ch := math.Sinh(u), math.Cosh(u)
		d := 2 - 2*ch + u*sh
		s = u * (u*ch - sh) / d
		c = u * (sh - u) / d
	default: // e^u is past 1e17 and would overflow: what is left without e^-u
		u := math.Sqrt(-x)
		s = u * (u - 1) / (u - 2)
		c = u / (u - 2)
	}
	return s, c, 2*(s+c) - x
}

// stabilitySeries is the quotient of the power series of the closed forms'
// numerators and denominator, each divided by u⁴. For small x the closed forms
// lose their digits in differences.
func stabilitySeries(x float64) (s, c float64) {
	var ns, nc, d float64
	term := 1.0 / 6 // (-x)^(k-1)/(2k+1)!
	for k := 1.0; k <= 16; k++ {
		ns += term * 2 * k
		nc += term
		d += term * 2 * k / (2*k + 2)
		term *= -x / ((2*k + 2) * (2*k + 3))
	}
	return ns / d, nc / d
}
