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

// MomentsAt are the moments of pieces just below and just above a height, Nm: two
// where a moment comes in there, equal elsewhere.
func MomentsAt(pieces []Piece, z float64) (below, above float64) {
	if len(pieces) == 0 {
		return 0, 0
	}
	eps := 1e-9 * (pieces[len(pieces)-1].To - pieces[0].From)
	found := false
	for _, p := range pieces {
		if z < p.From-eps || z > p.To+eps {
			continue
		}
		m := p.Moment(z - p.From)
		if !found {
			below, found = m, true
		}
		above = m
	}
	return below, above
}
