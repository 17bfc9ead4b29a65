package action

import "math"

// Mode is the shape that a bar takes when it buckles.
type Mode struct {
	Factor float64 // the factor at which it does, as Bar.Critical
	bar    *Bar
	at     []float64 // sideways movement and rotation of each node, 1 and 1/m
	part   int       // the part that buckles between nodes that stay as they are, -1 for none
	scale  float64   // what the deflection is divided by
}

// Buckled gives the shape in which the bar buckles, from the same stiffness
// matrix as Critical: exact between the nodes too. It is false when the bar is a
// mechanism or when nothing is compressed.
func (b *Bar) Buckled() (Mode, bool) {
	m := Mode{Factor: b.Critical(), bar: b, part: -1, scale: 1}
	if !(m.Factor > 0) || math.IsInf(m.Factor, 1) {
		return m, false
	}
	m.at = make([]float64, 2*len(b.Nodes))
	for i, n := range b.Force {
		l := b.Nodes[i+1] - b.Nodes[i]
		if n > 0 && m.Factor*n*l*l/b.Stiffness[i] >= 4*pi*pi*(1-1e-9) {
			m.part = i // clamped by its neighbours, its shape is 1 - cos
			m.scale = 2
			return m, true
		}
	}
	k, fixed := b.matrix(m.Factor * (1 - 1e-9))
	for i := range m.at {
		// any start will do that is not at right angles to the shape
		if m.at[i] = 1 + 0.3*math.Sin(float64(3*i)); fixed[i] {
			m.at[i] = 0
		}
	}
	if !factorise(k) {
		return m, false
	}
	for range 4 {
		solveBand(k, m.at)
		most := 0.0
		for i := range m.at {
			if fixed[i] {
				m.at[i] = 0
			}
			most = max(most, math.Abs(m.at[i]))
		}
		if !(most > 0) || math.IsInf(most, 0) {
			return m, false
		}
		for i := range m.at {
			m.at[i] /= most
		}
	}
	most := 0.0
	from, to := b.Nodes[0], b.Nodes[len(b.Nodes)-1]
	for i := range 401 {
		if v := m.Deflection(from + (to-from)*float64(i)/400); math.Abs(v) > math.Abs(most) {
			most = v
		}
	}
	if most == 0 || !finite(most) {
		return m, false
	}
	m.scale = most
	return m, true
}

// Deflection is the sideways movement at a height, as a part of the greatest
// one, which is 1.
func (m Mode) Deflection(z float64) float64 {
	b := m.bar
	i := 0
	for i < len(b.Force)-1 && z > b.Nodes[i+1] {
		i++
	}
	l := b.Nodes[i+1] - b.Nodes[i]
	x := min(max(z-b.Nodes[i], 0), l)
	if m.part >= 0 {
		if m.part != i {
			return 0
		}
		return (1 - math.Cos(2*pi*x/l)) / m.scale
	}
	v1, r1, v2, r2 := m.at[2*i], m.at[2*i+1], m.at[2*i+2], m.at[2*i+3]
	return between(m.Factor*b.Force[i]/b.Stiffness[i], l, x, v1, r1, v2, r2) / m.scale
}

// between is the deflection inside a part whose ends move and turn; kk is
// N/(E I), compression positive.
func between(kk, l, x, v1, r1, v2, r2 float64) float64 {
	t := x / l
	cubic := v1*(1-t*t*(3-2*t)) + r1*l*t*(1-t)*(1-t) + v2*t*t*(3-2*t) + r2*l*t*t*(t-1)
	if math.Abs(kk*l*l) < 1e-3 {
		return cubic
	}
	// v = A + B x + C c(x) + D s(x) with the circular or hyperbolic functions
	u := math.Sqrt(math.Abs(kk)) * l
	c, s := math.Cos, math.Sin
	sign := -1.0 // c' = sign s
	if kk < 0 {
		if u > 40 {
			return cubic // a tie this slack-free is a straight line but for its ends
		}
		c, s, sign = math.Cosh, math.Sinh, 1
	}
	// from v(0), v'(0): A = v1 - C, B l = r1 l - D u; then two equations at l
	c1, s1 := c(u)-1, s(u)-u
	c2, s2 := sign*u*s(u), u*(c(u)-1)
	p, q := v2-v1-r1*l, (r2-r1)*l
	det := c1*s2 - s1*c2
	if det == 0 {
		return cubic
	}
	cc, dd := (p*s2-s1*q)/det, (c1*q-p*c2)/det
	return v1 + r1*l*t + cc*(c(u*t)-1) + dd*(s(u*t)-u*t)
}

// solveBand solves a factorised banded system in place, see factorise.
func solveBand(k [][4]float64, x []float64) {
	n := len(k)
	for i := range n {
		for d := 1; d < 4 && i+d < n; d++ {
			x[i+d] -= k[i][d] / k[i][0] * x[i]
		}
	}
	for i := n - 1; i >= 0; i-- {
		x[i] /= k[i][0]
		for d := 1; d < 4 && i+d < n; d++ {
			x[i] -= k[i][d] / k[i][0] * x[i+d]
		}
	}
}
