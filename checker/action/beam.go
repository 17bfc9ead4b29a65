package action

import (
	"errors"
	"math"
)

// Push is a load across a column, about one axis.
type Push struct {
	Force  float64 // N, at From
	Moment float64 // Nm, at From; positive turns the way a force above it would
	Line   float64 // N/m, from From to To
	From   float64 // height, m
	To     float64 // height, m; of a line load
}

// Beam is a uniform column as a beam about one axis, on its ends and holds.
type Beam struct {
	Base, Top End
	Holds     []float64 // heights of rigid lateral holds, strictly inside
	Height    float64   // m
}

// Piece is a part of a beam in which nothing but a constant line load acts.
// With x the distance from From, the bending moment is
// M + V x + Line x²/2 and the deflection times E I is
// D + R x + M x²/2 + V x³/6 + Line x⁴/24.
type Piece struct {
	From, To float64
	M, V     float64 // bending moment and shear at From
	Line     float64
	D, R     float64 // deflection and slope at From, times E I
}

// Moment is the bending moment at x above From.
func (p Piece) Moment(x float64) float64 { return p.M + x*(p.V+x*p.Line/2) }

// Shear is the shear force at x above From.
func (p Piece) Shear(x float64) float64 { return p.V + x*p.Line }

// Deflection is the deflection times E I at x above From.
func (p Piece) Deflection(x float64) float64 {
	return p.D + x*(p.R+x*(p.M/2+x*(p.V/6+x*p.Line/24)))
}

// Largest is the moment of greatest size in the piece, with its sign, and its
// height.
func (p Piece) Largest() (moment, height float64) {
	l := p.To - p.From
	moment, height = p.M, p.From
	if m := p.Moment(l); math.Abs(m) > math.Abs(moment) {
		moment, height = m, p.To
	}
	if p.Line != 0 {
		if x := -p.V / p.Line; x > 0 && x < l {
			if m := p.Moment(x); math.Abs(m) > math.Abs(moment) {
				moment, height = m, p.From+x
			}
		}
	}
	return moment, height
}

// ErrMechanism is returned for a beam that cannot stand.
var ErrMechanism = errors.New("the column cannot stand: nothing holds it in place")

// ErrAccuracy is returned when heights lie so close together that the solution
// has lost its digits.
var ErrAccuracy = errors.New("heights of loads or holds lie too close together to solve the column exactly")

// ErrLoading is returned for a height, load or hold that is not a finite number
// or does not lie on the column.
var ErrLoading = errors.New("a load or hold is not a number or lies outside the column")

// Solve gives the pieces of the beam under each of several loadings, all cut at
// the same heights so that they can be added up. The analysis is exact: elastic
// beam theory, first order, stiffness method. The error is ErrLoading,
// ErrMechanism or ErrAccuracy.
func (b Beam) Solve(loadings [][]Push) ([][]Piece, error) {
	if err := b.check(loadings); err != nil {
		return nil, err
	}
	nodes := b.nodes(loadings)
	n := len(nodes)
	size := 2 * n
	k := make([][]float64, size)
	for i := range k {
		k[i] = make([]float64, size+len(loadings))
	}
	for i := range n - 1 {
		l := nodes[i+1] - nodes[i]
		e := [4][4]float64{
			{12 / (l * l * l), 6 / (l * l), -12 / (l * l * l), 6 / (l * l)},
			{6 / (l * l), 4 / l, -6 / (l * l), 2 / l},
			{-12 / (l * l * l), -6 / (l * l), 12 / (l * l * l), -6 / (l * l)},
			{6 / (l * l), 2 / l, -6 / (l * l), 4 / l},
		}
		for r := range 4 {
			for c := range 4 {
				k[2*i+r][2*i+c] += e[r][c]
			}
		}
	}
	line := make([][]float64, len(loadings))  // of each loading, the line load in each part
	nodal := make([][]float64, len(loadings)) // and the force and moment on each node
	for j, pushes := range loadings {
		line[j] = make([]float64, n-1)
		nodal[j] = make([]float64, size)
		for _, p := range pushes {
			at := nodeAt(nodes, p.From)
			nodal[j][2*at] += p.Force
			nodal[j][2*at+1] += p.Moment
			k[2*at][size+j] += p.Force
			k[2*at+1][size+j] += p.Moment
			if p.Line != 0 {
				for i := at; i < n-1 && nodes[i] < p.To-1e-9*b.Height; i++ {
					l := nodes[i+1] - nodes[i]
					line[j][i] += p.Line
					k[2*i][size+j] += p.Line * l / 2
					k[2*i+1][size+j] += p.Line * l * l / 12
					k[2*i+2][size+j] += p.Line * l / 2
					k[2*i+3][size+j] -= p.Line * l * l / 12
				}
			}
		}
	}
	fixed := make([]bool, size)
	for i, z := range nodes {
		for _, h := range b.Holds {
			if math.Abs(h-z) <= 1e-9*b.Height {
				fixed[2*i] = true
			}
		}
	}
	fixed[0] = fixed[0] || b.Base.held()
	fixed[1] = b.Base.clamped()
	fixed[size-2] = fixed[size-2] || b.Top.held()
	fixed[size-1] = b.Top.clamped()
	// Two points kept in place, or one and an end kept from turning. The pivots
	// cannot tell: a short part makes their rounding errors larger than the
	// stiffness of the rest.
	held := 0
	for i := range nodes {
		if fixed[2*i] {
			held++
		}
	}
	if held == 0 || held == 1 && !fixed[1] && !fixed[size-1] {
		return nil, ErrMechanism
	}
	u, err := eliminate(k, fixed, size, b.Height)
	if err != nil {
		return nil, err
	}
	out := make([][]Piece, len(loadings))
	for j := range loadings {
		out[j] = make([]Piece, n-1)
		for i := range n - 1 {
			l := nodes[i+1] - nodes[i]
			v1, r1, v2, r2, w := u[2*i][j], u[2*i+1][j], u[2*i+2][j], u[2*i+3][j], line[j][i]
			f1 := 12/(l*l*l)*(v1-v2) + 6/(l*l)*(r1+r2) - w*l/2
			m1 := 6/(l*l)*(v1-v2) + (4*r1+2*r2)/l - w*l*l/12
			out[j][i] = Piece{From: nodes[i], To: nodes[i+1], M: -m1, V: f1, Line: w, D: v1, R: r1}
		}
		if !balanced(out[j], nodal[j], fixed, b.Height) {
			return nil, ErrAccuracy
		}
	}
	return out, nil
}

// balanced tells whether the forces and moments on every node that is free to
// follow them are in equilibrium with its loads within a thousandth of all
// loads. Parts much shorter than a thousandth of the column lose the digits of
// their ends' deflections.
func balanced(pieces []Piece, nodal []float64, fixed []bool, height float64) bool {
	scale := 0.0 // N
	for i, p := range pieces {
		if !finite(p.M, p.V, p.D, p.R) {
			return false
		}
		scale += math.Abs(p.Line*(p.To-p.From)) + math.Abs(nodal[2*i]) + math.Abs(nodal[2*i+1])/height
	}
	last := len(nodal) - 2
	scale += math.Abs(nodal[last]) + math.Abs(nodal[last+1])/height
	limit := 1e-3 * scale
	for i := 0; i <= len(pieces); i++ {
		force, moment := nodal[2*i], nodal[2*i+1]
		if i > 0 {
			l := pieces[i-1].To - pieces[i-1].From
			force += pieces[i-1].Shear(l)
			moment -= pieces[i-1].Moment(l)
		}
		if i < len(pieces) {
			force -= pieces[i].V
			moment += pieces[i].M
		}
		if !fixed[2*i] && !(math.Abs(force) <= limit) || !fixed[2*i+1] && !(math.Abs(moment) <= limit*height) {
			return false
		}
	}
	return true
}

// check is ErrLoading when something is not finite, lies outside the column
// (within a billionth of it) or is a line load that ends before it begins.
func (b Beam) check(loadings [][]Push) error {
	slack := 1e-9 * b.Height
	inside := func(z float64) bool { return z >= -slack && z <= b.Height+slack }
	if !finite(b.Height) || !(b.Height > 0) {
		return ErrLoading
	}
	for _, h := range b.Holds {
		if !inside(h) {
			return ErrLoading
		}
	}
	for _, pushes := range loadings {
		for _, p := range pushes {
			if !finite(p.Force, p.Moment, p.Line) || !inside(p.From) {
				return ErrLoading
			}
			if p.Line != 0 && !(inside(p.To) && p.To >= p.From) {
				return ErrLoading
			}
		}
	}
	return nil
}

// finite tells whether all numbers are finite.
func finite(x ...float64) bool {
	for _, v := range x {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return false
		}
	}
	return true
}

// nodes are the heights where something holds, pushes or changes.
func (b Beam) nodes(loadings [][]Push) []float64 {
	z := append([]float64{0, b.Height}, b.Holds...)
	for _, pushes := range loadings {
		for _, p := range pushes {
			z = append(z, p.From)
			if p.Line != 0 {
				z = append(z, p.To)
			}
		}
	}
	return merge(z, b.Height)
}

// merge sorts heights and drops those that are the same within a billionth of
// the column.
func merge(z []float64, height float64) []float64 {
	for i := 1; i < len(z); i++ {
		for j := i; j > 0 && z[j] < z[j-1]; j-- {
			z[j], z[j-1] = z[j-1], z[j]
		}
	}
	out := z[:0]
	for _, x := range z {
		x = min(max(x, 0), height)
		if len(out) == 0 || x-out[len(out)-1] > 1e-9*height {
			out = append(out, x)
		}
	}
	return out
}

func nodeAt(nodes []float64, z float64) int {
	best := 0
	for i, n := range nodes {
		if math.Abs(n-z) < math.Abs(nodes[best]-z) {
			best = i
		}
	}
	return best
}

// eliminate solves the equations with the fixed displacements at zero; columns
// from size on are right-hand sides.
func eliminate(k [][]float64, fixed []bool, size int, height float64) ([][]float64, error) {
	sides := len(k[0]) - size
	for i := range size {
		if !fixed[i] {
			continue
		}
		for c := range k[i] {
			k[i][c] = 0
		}
		for r := range size {
			k[r][i] = 0
		}
		k[i][i] = 1
	}
	for i := range size {
		floor := 1e-10 / (height * height * height)
		if i%2 == 1 {
			floor = 1e-10 / height
		}
		if !(k[i][i] > floor) {
			return nil, ErrMechanism
		}
		for r := i + 1; r < size && r < i+4; r++ {
			f := k[r][i] / k[i][i]
			if f == 0 {
				continue
			}
			for c := i; c < len(k[i]); c++ {
				if c > i+3 && c < size {
					c = size - 1
					continue
				}
				k[r][c] -= f * k[i][c]
			}
		}
	}
	u := make([][]float64, size)
	for i := size - 1; i >= 0; i-- {
		u[i] = make([]float64, sides)
		for j := range sides {
			x := k[i][size+j]
			for c := i + 1; c < size && c < i+4; c++ {
				x -= k[i][c] * u[c][j]
			}
			u[i][j] = x / k[i][i]
		}
	}
	return u, nil
}

// Add sums pieces that are cut at the same heights, each times its factor.
func Add(pieces [][]Piece, factors []float64, into []Piece) []Piece {
	into = into[:0]
	if len(pieces) == 0 {
		return into
	}
	for i := range pieces[0] {
		p := Piece{From: pieces[0][i].From, To: pieces[0][i].To}
		for j, f := range factors {
			if f == 0 {
				continue
			}
			q := pieces[j][i]
			p.M += f * q.M
			p.V += f * q.V
			p.Line += f * q.Line
			p.D += f * q.D
			p.R += f * q.R
		}
		into = append(into, p)
	}
	return into
}
