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

// Beam is a column as a beam about one axis, on its ends and holds.
type Beam struct {
	Base, Top End
	Holds     []float64 // heights of rigid lateral holds, strictly inside
	Springs   []Spring
	Height    float64 // m
	// Steps are the parts of different stiffness, from the base up; none for a
	// uniform column.
	Steps []Step
}

// Spring is an elastic support of a beam: its stiffnesses are those of the real one
// divided by E I, where the section changes by that of the base.
type Spring struct {
	At      float64 // height, m; a spring against turning stands at an end
	Lateral float64 // against moving sideways, 1/m3; 0 for none
	Turning float64 // against turning, 1/m; 0 for none
}

// Step is a part of a column with a stiffness of its own. It begins at the top of
// the one below, the first at the base; the last ends at the top of the column.
type Step struct {
	To        float64 // height, m
	Stiffness float64 // E I, Nm2
}

// Piece is a part of a beam in which nothing but a constant line load acts.
// With x the distance from From, the bending moment is
// M + V x + Line x²/2 and the deflection times the piece's own E I is
// D + R x + M x²/2 + V x³/6 + Line x⁴/24.
type Piece struct {
	From, To float64
	M, V     float64 // bending moment and shear at From
	Line     float64
	D, R     float64 // deflection and slope at From, times E I of the piece
}

// Moment is the bending moment at x above From.
func (p Piece) Moment(x float64) float64 { return p.M + x*(p.V+x*p.Line/2) }

// Shear is the shear force at x above From.
func (p Piece) Shear(x float64) float64 { return p.V + x*p.Line }

// GreatestShear is the greater size of the shear forces at its ends, N.
func (p Piece) GreatestShear() float64 {
	return math.Max(math.Abs(p.V), math.Abs(p.Shear(p.To-p.From)))
}

// quiet takes away the shear forces that rounding leaves where the moment is constant,
// so that none is shown or judged.
func quiet(pieces []Piece) []Piece {
	if len(pieces) == 0 {
		return pieces
	}
	most := 0.0
	for _, p := range pieces {
		most = math.Max(most, math.Max(math.Abs(p.M), math.Abs(p.Moment(p.To-p.From))))
	}
	height := pieces[len(pieces)-1].To - pieces[0].From
	for i, p := range pieces {
		if p.Line == 0 && math.Abs(p.V)*height <= 1e-12*most {
			pieces[i].V = 0
		}
	}
	return pieces
}

// Deflection is the deflection times E I at x above From.
func (p Piece) Deflection(x float64) float64 {
	return p.D + x*(p.R+x*(p.M/2+x*(p.V/6+x*p.Line/24)))
}

// Cut is the part of the piece between two heights inside it.
func (p Piece) Cut(from, to float64) Piece {
	x := from - p.From
	return Piece{From: from, To: to, M: p.Moment(x), V: p.Shear(x), Line: p.Line, D: p.Deflection(x), R: p.slope(x)}
}

// slope is the slope times E I at x above From.
func (p Piece) slope(x float64) float64 { return p.R + x*(p.M+x*(p.V/2+x*p.Line/6)) }

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

// ErrLoading is returned for a height, load or hold that is not a finite number
// or does not lie on the column.
var ErrLoading = errors.New("a load or hold is not a number or lies outside the column")

// Solve gives the pieces of the beam under each of several loadings, all cut at
// the same heights so that they can be added up. The analysis is exact: elastic
// beam theory, first order, stiffness method. The error is ErrLoading or
// ErrMechanism.
func (b Beam) Solve(loadings [][]Push) ([][]Piece, error) {
	if err := b.check(loadings); err != nil {
		return nil, err
	}
	nodes := b.nodes(loadings)
	n := len(nodes)
	// Only the ends, holds, springs and changes of section take part in the
	// equations: loads that lie close together would cost digits there.
	at := []int{0} // these among the nodes
	for i := 1; i < n-1; i++ {
		if b.holdAt(nodes[i]) || b.springAt(nodes[i]) || b.stepAt(nodes[i]) {
			at = append(at, i)
		}
	}
	at = append(at, n-1)
	size := 2 * len(at)
	k := make([][]float64, size)
	for i := range k {
		k[i] = make([]float64, size+len(loadings))
	}
	for i := range len(at) - 1 {
		l := nodes[at[i+1]] - nodes[at[i]]
		ei := b.stiffness(nodes[at[i]], nodes[at[i+1]])
		e := [4][4]float64{
			{12 / (l * l * l), 6 / (l * l), -12 / (l * l * l), 6 / (l * l)},
			{6 / (l * l), 4 / l, -6 / (l * l), 2 / l},
			{-12 / (l * l * l), -6 / (l * l), 12 / (l * l * l), -6 / (l * l)},
			{6 / (l * l), 2 / l, -6 / (l * l), 4 / l},
		}
		for r := range 4 {
			for c := range 4 {
				k[2*i+r][2*i+c] += ei * e[r][c]
			}
		}
	}
	fixed := make([]bool, size)
	held := 0
	for i, node := range at {
		if b.holdAt(nodes[node]) || i == 0 && b.Base.held() || i == len(at)-1 && b.Top.held() {
			fixed[2*i] = true
			held++
		}
	}
	fixed[1], fixed[size-1] = b.Base.clamped(), b.Top.clamped()
	// two points kept in place, or one and an end kept from turning
	if len(b.Springs) == 0 && (held == 0 || held == 1 && !fixed[1] && !fixed[size-1]) {
		return nil, ErrMechanism
	}
	if len(b.Springs) > 0 && !b.sprung(nodes, at, k) {
		return nil, ErrMechanism
	}
	cases := make([]carried, len(loadings))
	for j, pushes := range loadings {
		cases[j] = carry(nodes, at, pushes, b.Height)
		for i := range len(at) - 1 {
			for r, x := range cases[j].span[i] {
				k[2*i+r][size+j] += x
			}
		}
		for i, node := range at {
			k[2*i][size+j] += cases[j].force[node]
			k[2*i+1][size+j] += cases[j].moment[node]
		}
	}
	u, err := eliminate(k, fixed, size, b.Height)
	if err != nil {
		return nil, err
	}
	out := make([][]Piece, len(loadings))
	for j, load := range cases {
		for i := range len(at) - 1 {
			l := nodes[at[i+1]] - nodes[at[i]]
			ei := b.stiffness(nodes[at[i]], nodes[at[i+1]])
			v1, r1, v2, r2 := ei*u[2*i][j], ei*u[2*i+1][j], ei*u[2*i+2][j], ei*u[2*i+3][j]
			p := Piece{D: v1, R: r1}
			p.V = 12/(l*l*l)*(v1-v2) + 6/(l*l)*(r1+r2) - load.span[i][0]
			p.M = -(6/(l*l)*(v1-v2) + (4*r1+2*r2)/l - load.span[i][1])
			for s := at[i]; s < at[i+1]; s++ {
				if s > at[i] { // go on from the end of the part below
					x := p.To - p.From
					p = Piece{M: p.Moment(x) - load.moment[s], V: p.Shear(x) + load.force[s], D: p.Deflection(x), R: p.slope(x)}
				}
				p.From, p.To, p.Line = nodes[s], nodes[s+1], load.line[s]
				if !finite(p.M, p.V, p.D, p.R) {
					return nil, ErrLoading
				}
				out[j] = append(out[j], p)
			}
		}
	}
	return out, nil
}

// stepAt tells whether the stiffness changes at a height.
func (b Beam) stepAt(z float64) bool {
	for i, s := range b.Steps {
		if i < len(b.Steps)-1 && math.Abs(s.To-z) <= 1e-9*b.Height {
			return true
		}
	}
	return false
}

// stiffness is E I between two neighbouring heights in question, over that of the
// base.
func (b Beam) stiffness(from, to float64) float64 {
	middle := (from + to) / 2
	for i, s := range b.Steps {
		if middle < s.To || i == len(b.Steps)-1 {
			return s.Stiffness / b.Steps[0].Stiffness
		}
	}
	return 1
}

// holdAt tells whether a hold is at a height.
func (b Beam) holdAt(z float64) bool {
	for _, h := range b.Holds {
		if math.Abs(h-z) <= 1e-9*b.Height {
			return true
		}
	}
	return false
}

// springAt tells whether a spring is at a height.
func (b Beam) springAt(z float64) bool {
	for _, s := range b.Springs {
		if math.Abs(s.At-z) <= 1e-9*b.Height {
			return true
		}
	}
	return false
}

// sprung adds the springs to the equations. It is false for a beam that can shift
// or turn all the same.
func (b Beam) sprung(nodes []float64, at []int, k [][]float64) bool {
	bar := Bar{Base: b.Base, Top: b.Top, Lateral: make([]float64, len(at)), Turning: make([]float64, len(at))}
	for _, node := range at {
		bar.Nodes = append(bar.Nodes, nodes[node])
		bar.Held = append(bar.Held, b.holdAt(nodes[node]))
	}
	for _, s := range b.Springs {
		i := nodeAt(bar.Nodes, s.At)
		bar.Lateral[i] += s.Lateral
		bar.Turning[i] += s.Turning
		k[2*i][2*i] += s.Lateral
		k[2*i+1][2*i+1] += s.Turning
	}
	return bar.stands()
}

// carried is a loading by nodes and spans.
type carried struct {
	force, moment []float64    // on each node, N and Nm
	line          []float64    // on each part above a node, N/m
	span          [][4]float64 // of the loads inside each span: equivalent force and moment on its lower and upper end
}

// carry sorts a loading. A load inside a span does the same work on the cubic
// shapes of a beam without loads as its equivalent on the ends; this is exact
// for the ends.
func carry(nodes []float64, at []int, pushes []Push, height float64) carried {
	n := len(nodes)
	c := carried{make([]float64, n), make([]float64, n), make([]float64, n-1), make([][4]float64, len(at)-1)}
	for _, p := range pushes {
		i := nodeAt(nodes, p.From)
		c.force[i] += p.Force
		c.moment[i] += p.Moment
		if p.Line != 0 {
			for ; i < n-1 && nodes[i] < p.To-1e-9*height; i++ {
				c.line[i] += p.Line
			}
		}
	}
	for i := range c.span {
		from, l := nodes[at[i]], nodes[at[i+1]]-nodes[at[i]]
		area := func(z float64) [4]float64 { // integrals of the shapes up to z
			x := (z - from) / l
			return [4]float64{
				l * (x - x*x*x + x*x*x*x/2), l * l * x * x * (0.5 - x*(2./3-x/4)),
				l * x * x * x * (1 - x/2), l * l * x * x * x * (x/4 - 1./3),
			}
		}
		for s := at[i]; s < at[i+1]; s++ {
			if c.line[s] != 0 {
				low, high := area(nodes[s]), area(nodes[s+1])
				for r := range 4 {
					c.span[i][r] += c.line[s] * (high[r] - low[r])
				}
			}
			if s == at[i] {
				continue
			}
			x := (nodes[s] - from) / l
			shape := [4]float64{1 - x*x*(3-2*x), l * x * (1 - x) * (1 - x), x * x * (3 - 2*x), l * x * x * (x - 1)}
			slope := [4]float64{6 * x * (x - 1) / l, (1 - x) * (1 - 3*x), 6 * x * (1 - x) / l, x * (3*x - 2)}
			for r := range 4 {
				c.span[i][r] += c.force[s]*shape[r] + c.moment[s]*slope[r]
			}
		}
	}
	return c
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
	for _, s := range b.Springs {
		if !inside(s.At) || !finite(s.Lateral, s.Turning) || s.Lateral < 0 || s.Turning < 0 {
			return ErrLoading
		}
	}
	for i, s := range b.Steps {
		if !inside(s.To) || i > 0 && !(s.To > b.Steps[i-1].To) || !finite(s.Stiffness) || !(s.Stiffness > 0) {
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
	for _, s := range b.Springs {
		z = append(z, s.At)
	}
	for _, s := range b.Steps {
		z = append(z, s.To)
	}
	for _, pushes := range loadings {
		for _, p := range pushes {
			z = append(z, p.From)
			if p.Line != 0 {
				z = append(z, p.To)
			}
		}
	}
	return Merge(z, b.Height)
}

// Merge sorts heights and drops those that are the same within a billionth of
// the column.
func Merge(z []float64, height float64) []float64 {
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
		return quiet(into)
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
	return quiet(into)
}
