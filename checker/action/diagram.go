package action

import "math"

// Diagram is the moment diagram of a loading between two heights.
type Diagram struct {
	From, To    float64
	First, Last float64 // moments just inside the ends, Nm
	Peak        float64 // greatest size anywhere, Nm
	Straight    bool    // linear: nothing acts inside
}

// DiagramOf reads the moments of pieces, which go up in order, between two
// heights. tiny is a moment that counts as none, Nm.
func DiagramOf(pieces []Piece, from, to, tiny float64) Diagram {
	d := Diagram{From: from, To: to, Straight: true}
	span := to - from
	started := false
	var end, shear float64 // at the end of the piece below
	for _, p := range pieces {
		x0, x1 := max(p.From, from)-p.From, min(p.To, to)-p.From
		if !(x1-x0 > 1e-9*span) {
			continue
		}
		m0, m1 := p.Moment(x0), p.Moment(x1)
		if !started {
			d.First, started = m0, true
		} else if math.Abs(m0-end) > max(tiny, 1e-9*math.Abs(end)) || math.Abs(p.Shear(x0)-shear)*span > max(tiny, 1e-9*math.Abs(shear)*span) {
			d.Straight = false
		}
		if math.Abs(p.Line)*span*span > tiny {
			d.Straight = false
			if top := -p.V / p.Line; top > x0 && top < x1 {
				d.Peak = max(d.Peak, math.Abs(p.Moment(top)))
			}
		}
		d.Peak = max(d.Peak, math.Abs(m0), math.Abs(m1))
		d.Last, end, shear = m1, m1, p.Shear(x1)
	}
	return d
}

// MomentAt is the moment of pieces at a height, Nm; where a moment comes in, the
// one below it.
func MomentAt(pieces []Piece, z float64) float64 {
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
