package action

import "math"

// Curve is a part of a bar under axial force in which nothing but a constant line
// load acts across: its bending moment of second order.
type Curve struct {
	From, To float64
	M, S     float64 // bending moment and its slope at From, Nm and N
	Line     float64 // N/m
	Squared  float64 // N/(E I), compression positive, 1/m2
}

// Moment is the bending moment at x above From.
func (c Curve) Moment(x float64) float64 {
	l := c.To - c.From
	switch kk := c.Squared; {
	case math.Abs(kk)*l*l < 1e-6:
		// the first terms of the series: what is left out is below rounding
		return c.M*(1-kk*x*x/2) + c.S*x*(1-kk*x*x/6) + c.Line*x*x/2*(1-kk*x*x/12)
	case kk > 0:
		k, q := math.Sqrt(kk), c.Line/kk
		sin, cos := math.Sincos(k * x)
		return (c.M-q)*cos + c.S/k*sin + q
	default:
		k, q := math.Sqrt(-kk), c.Line/-kk
		return (c.M+q)*math.Cosh(k*x) + c.S/k*math.Sinh(k*x) - q
	}
}

// Peaks are the heights where the moment can be greatest: the ends, and where its
// slope is zero.
func (c Curve) Peaks() []float64 {
	out := []float64{c.From, c.To}
	l := c.To - c.From
	switch kk := c.Squared; {
	case kk*l*l >= 1e-6:
		k := math.Sqrt(kk)
		for x := math.Atan2(c.S/k, c.M-c.Line/kk) / k; x < l; x += math.Pi / k {
			if x > 0 {
				out = append(out, c.From+x)
			}
		}
	case kk*l*l <= -1e-6:
		k := math.Sqrt(-kk)
		if t := -c.S / k / (c.M + c.Line/-kk); math.Abs(t) < 1 {
			if x := math.Atanh(t) / k; x > 0 && x < l {
				out = append(out, c.From+x)
			}
		}
	case c.Line != 0:
		if x := -c.S / c.Line; x > 0 && x < l {
			out = append(out, c.From+x)
		}
	}
	return out
}

// SecondOrder gives the bending moments of second order of the bar under its
// forces and loads across it, by the stiffness matrix with exact stability
// functions. Every load must act at a node, and a line load from node to node. It
// is false when the bar has reached its critical load or cannot stand.
func (b *Bar) SecondOrder(loads []Push) ([]Curve, bool) {
	if !b.stands() {
		return nil, false
	}
	k, fixed := b.matrix(1)
	if !factorise(k) {
		return nil, false
	}
	n := len(b.Force)
	u := make([]float64, len(k))
	line := make([]float64, n)
	height := b.Nodes[n]
	for _, p := range loads {
		i := nodeAt(b.Nodes, p.From)
		u[2*i] += p.Force
		u[2*i+1] += p.Moment
		if p.Line != 0 {
			for ; i < n && b.Nodes[i] < p.To-1e-9*height; i++ {
				line[i] += p.Line
			}
		}
	}
	ends := make([]float64, n) // moments of line loads on clamped ends
	for i, w := range line {
		l := b.Nodes[i+1] - b.Nodes[i]
		ends[i] = w * l * l * clamped(b.Force[i]*l*l/b.Stiffness[i])
		u[2*i] += w * l / 2
		u[2*i+2] += w * l / 2
		u[2*i+1] += ends[i]
		u[2*i+3] -= ends[i]
	}
	for i := range u {
		if fixed[i] {
			u[i] = 0
		}
	}
	solveBand(k, u)
	out := make([]Curve, n)
	for i := range n {
		l, ei := b.Nodes[i+1]-b.Nodes[i], b.Stiffness[i]
		s, c, t := stability(b.Force[i] * l * l / ei)
		v1, r1, v2, r2 := u[2*i], u[2*i+1], u[2*i+2], u[2*i+3]
		m := -(ei/(l*l)*(s+c)*(v1-v2) + ei/l*(s*r1+c*r2) - ends[i])
		q := ei/(l*l*l)*t*(v1-v2) + ei/(l*l)*(s+c)*(r1+r2) - line[i]*l/2
		out[i] = Curve{From: b.Nodes[i], To: b.Nodes[i+1], M: m, S: q - b.Force[i]*r1, Line: line[i], Squared: b.Force[i] / ei}
		if !finite(out[i].M, out[i].S) {
			return nil, false
		}
	}
	return out, true
}

// clamped is the moment of a line load at the ends of a part that cannot turn
// there, over w l²; x is N l²/(E I), compression positive.
func clamped(x float64) float64 {
	switch {
	case math.Abs(x) < 0.01:
		return 1./12 + x/720 + x*x/30240
	case x > 0:
		u := math.Sqrt(x)
		return (1 - u/2/math.Tan(u/2)) / x
	}
	u := math.Sqrt(-x)
	return (u/2/math.Tanh(u/2) - 1) / -x
}
