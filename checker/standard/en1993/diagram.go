package en1993

import (
	"math"

	"kern/checker/action"
)

// diagram is the moment diagram of a combination between two heights.
type diagram struct {
	from, to     float64
	first, last  float64 // moments just inside the ends
	middle       float64 // at mid-height
	inner        float64 // the greatest local extreme inside, by size; the middle when there is none greater
	peak         float64 // greatest size anywhere
	straight     bool    // linear: nothing acts inside
	line         bool    // a line load acts inside
	points       int     // kinks and jumps inside
	pointMiddle  bool    // the one kink is at mid-height
	uniform      bool    // one line load over the whole, nothing else
	lower, upper bool    // end moments are next to nothing
}

// clip gives where a piece lies between two heights, false when outside.
func clip(p action.Piece, from, to float64) (x0, x1 float64, ok bool) {
	lo, hi := max(p.From, from), min(p.To, to)
	eps := 1e-9 * (to - from)
	return lo - p.From, hi - p.From, hi-lo > eps
}

// diagramOf reads the moments between two heights. tiny is a moment that counts
// as none.
func diagramOf(pieces []action.Piece, from, to, tiny float64) diagram {
	d := diagram{from: from, to: to, straight: true}
	middle := (from + to) / 2
	started, lines := false, 0
	var before action.Piece
	var x float64
	local := func(m float64) {
		if math.Abs(m) > math.Abs(d.inner) {
			d.inner = m
		}
	}
	for _, p := range pieces {
		x0, x1, ok := clip(p, from, to)
		if !ok {
			continue
		}
		m0, m1 := p.Moment(x0), p.Moment(x1)
		if !started {
			d.first, started = m0, true
			lines = 1
			before = p
		} else {
			vEnd, mEnd := before.Shear(x), before.Moment(x)
			scale := max(math.Abs(vEnd), math.Abs(p.V)) * (to - from)
			jump := math.Abs(m0-mEnd) > 1e-9*max(math.Abs(m0), math.Abs(mEnd)) && math.Abs(m0-mEnd) > tiny
			kink := math.Abs(p.V-vEnd)*(to-from) > max(tiny, 1e-9*scale)
			if jump || kink {
				d.points++
				d.pointMiddle = d.points == 1 && !jump && math.Abs(p.From-middle) <= 1e-6*(to-from)
				d.straight = false
				if jump || p.V*vEnd <= 0 {
					local(m0)
					local(mEnd)
				}
			}
			if p.Line != before.Line {
				lines++
			}
			before = p
		}
		if math.Abs(p.Line)*(to-from)*(to-from) > tiny {
			d.line, d.straight = true, false
			if top := -p.V / p.Line; top > x0 && top < x1 {
				m := p.Moment(top)
				local(m)
				d.peak = max(d.peak, math.Abs(m))
			}
		}
		if p.From+x0 <= middle && middle <= p.From+x1 {
			d.middle = p.Moment(middle - p.From)
		}
		d.peak = max(d.peak, math.Abs(m0), math.Abs(m1))
		d.last, x = m1, x1
	}
	d.uniform = d.line && d.points == 0 && lines == 1
	if math.Abs(d.inner) <= math.Abs(d.middle) {
		d.inner = d.middle
	}
	d.lower, d.upper = math.Abs(d.first) <= 1e-6*d.peak, math.Abs(d.last) <= 1e-6*d.peak
	return d
}

// greatest is the greatest moment between two heights, by size.
func greatest(pieces []action.Piece, from, to float64) float64 {
	most := 0.0
	for _, p := range pieces {
		x0, x1, ok := clip(p, from, to)
		if !ok {
			continue
		}
		most = max(most, math.Abs(p.Moment(x0)), math.Abs(p.Moment(x1)))
		if p.Line != 0 {
			if top := -p.V / p.Line; top > x0 && top < x1 {
				most = max(most, math.Abs(p.Moment(top)))
			}
		}
	}
	return most
}

// at is the moment at a height.
func at(pieces []action.Piece, z float64) float64 {
	for _, p := range pieces {
		if z <= p.To {
			return p.Moment(z - p.From)
		}
	}
	if n := len(pieces); n > 0 {
		return pieces[n-1].Moment(z - pieces[n-1].From)
	}
	return 0
}

// diagramFactor gives the ratio of the critical moment to that of uniform moment for a
// moment diagram between fork ends: the smallest eigenvalue of
//
//	phi'' + (C_1 pi m(x) / L)² phi = 0, phi = 0 at both ends, m = M / M_max,
//
// which is the equation of lateral-torsional buckling without the part of
// warping, loads at the shear centre. Warping makes C_1 greater, so that this is
// a lower bound for every section and length; NCCI SN003 tabulates the same.
func diagramFactor(pieces []action.Piece, d diagram) float64 {
	const n = steps
	var w, phi, rhs [n + 1]float64
	l := d.to - d.from
	k := 0
	for i := range w {
		z := d.from + l*float64(i)/n
		for k < len(pieces)-1 && z > pieces[k].To {
			k++
		}
		m := pieces[k].Moment(z-pieces[k].From) / d.peak
		w[i] = m * m
	}
	meanAtJumps(pieces, d, w[:])
	// Numerov: phi'' + lambda w phi = 0 to the fourth order where w is smooth
	h := 1.0 / n
	for i := 1; i < n; i++ {
		phi[i] = math.Sin(math.Pi * float64(i) * h)
	}
	lambda := 0.0
	cp, inverse := &elimination.cp, &elimination.inverse
	for range 60 {
		top, bottom := 0.0, 0.0
		for i := 1; i < n; i++ {
			rhs[i] = h * h / 12 * (w[i-1]*phi[i-1] + 10*w[i]*phi[i] + w[i+1]*phi[i+1])
		}
		for i := 1; i < n; i++ {
			top += phi[i] * (2*phi[i] - phi[i-1] - phi[i+1])
			bottom += phi[i] * rhs[i]
		}
		next := top / bottom
		if math.Abs(next-lambda) <= 1e-7*next {
			lambda = next
			break
		}
		lambda = next
		rhs[1] *= inverse[1]
		for i := 2; i < n; i++ {
			rhs[i] = (rhs[i] + rhs[i-1]) * inverse[i]
		}
		phi[n-1] = rhs[n-1]
		for i := n - 2; i >= 1; i-- {
			phi[i] = rhs[i] - cp[i]*phi[i+1]
		}
		norm := 0.0
		for i := 1; i < n; i++ {
			norm = max(norm, math.Abs(phi[i]))
		}
		if !(norm > 0) {
			return math.NaN()
		}
		for i := 1; i < n; i++ {
			phi[i] /= norm
		}
	}
	return max(1, math.Sqrt(lambda)/math.Pi)
}

// meanAtJumps gives the points next to which the moment jumps the mean of the
// square of the moment over their cell: which side of the jump the point lies on
// would otherwise decide, and the factor would be 12 % too low to 18 % too high
// instead of within 0.6 % of the exact one.
func meanAtJumps(pieces []action.Piece, d diagram, w []float64) {
	n := float64(len(w) - 1)
	cell := (d.to - d.from) / n
	for k := range len(pieces) - 1 {
		z := pieces[k].To
		before, after := pieces[k].Moment(z-pieces[k].From), pieces[k+1].Moment(0)
		if z <= d.from || z >= d.to || math.Abs(after-before) <= 1e-9*d.peak {
			continue
		}
		i := int(math.Round((z - d.from) / cell))
		low, high := max(d.from, d.from+(float64(i)-0.5)*cell), min(d.to, d.from+(float64(i)+0.5)*cell)
		w[i] = squareMean(pieces, low, high) / (d.peak * d.peak)
	}
}

// squareMean is the mean of the square of the moment between two heights.
func squareMean(pieces []action.Piece, from, to float64) float64 {
	sum := 0.0
	for _, p := range pieces {
		x0, x1, ok := clip(p, from, to)
		if !ok || x1 <= x0 {
			continue
		}
		// Gauss with three points is exact for the square of a parabola
		middle, half := (x0+x1)/2, (x1-x0)/2
		for _, g := range [...]struct{ at, weight float64 }{{-0.7745966692414834, 5. / 9}, {0, 8. / 9}, {0.7745966692414834, 5. / 9}} {
			m := p.Moment(middle + half*g.at)
			sum += half * g.weight * m * m
		}
	}
	return sum / (to - from)
}

// steps is into how many a segment is cut for its eigenvalue.
const steps = 48

// elimination is the tridiagonal matrix (-1, 2, -1) eliminated, once and for all.
var elimination = func() (e struct{ cp, inverse [steps + 1]float64 }) {
	e.cp[1], e.inverse[1] = -0.5, 0.5
	for i := 2; i < steps; i++ {
		e.inverse[i] = 1 / (2 + e.cp[i-1])
		e.cp[i] = -e.inverse[i]
	}
	return e
}()
