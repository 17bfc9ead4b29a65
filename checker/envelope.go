package checker

import "math"

// Envelope is where the checks of a member reach their limit, when the axial
// forces and the moments of a combination are each multiplied by a factor. It is
// found by asking the member's own standard, ray by ray.
type Envelope struct {
	Limit   float64 // the utilisation on the line
	Axial   float64 // factor on the axial forces that is reached without moments
	Bending float64 // factor on the moments that is reached without axial forces
	Points  []Factors

	r           *Result
	combination int
	close       float64 // how near to the limit the utilisation is on the line
}

// Factors is a point of an envelope; NaN where the standard cannot decide.
type Factors struct{ Axial, Bending float64 }

// rays is how many directions are asked for.
const rays = 25

// Envelope finds the envelope of a combination, by its index. It is false where
// the standard decides nothing without moments or without axial forces.
func (r *Result) Envelope(combination int) (*Envelope, bool) {
	e := &Envelope{r: r, combination: combination, Limit: r.limit(), close: 1e-4} // the ends are said as numbers
	e.Axial, e.Bending = e.reach(1, 0, 1), e.reach(0, 1, 1)
	if !(e.Axial > 0) || !(e.Bending > 0) {
		return nil, false
	}
	guess := 1.0
	e.close = 2e-3 // finer than a line is wide
	for i := range rays {
		angle := math.Pi / 2 * float64(i) / (rays - 1)
		sin, cos := math.Sincos(angle)
		switch i {
		case 0:
			sin, cos = 0, 1
		case rays - 1:
			sin, cos = 1, 0
		}
		t := 1.0 // at the ends, which are known
		if i > 0 && i < rays-1 {
			t = e.reach(cos*e.Axial, sin*e.Bending, guess)
		}
		if t > 0 {
			guess = t
		}
		e.Points = append(e.Points, Factors{t * cos * e.Axial, t * sin * e.Bending})
	}
	return e, true
}

// reach is how far one can go in a direction until the limit is reached; NaN
// where it cannot be decided, or not within a million times the guess.
func (e *Envelope) reach(axial, bending, guess float64) float64 {
	over := func(t float64) float64 {
		u, _ := e.r.Probe(e.combination, t*axial, t*bending)
		return u - e.Limit
	}
	low, lowOver := 0.0, -e.Limit
	high := guess
	highOver := over(high)
	for range 40 {
		switch {
		case math.IsNaN(highOver):
			// too far out: the standard has no answer there
			if high = (low + high) / 2; high-low < 1e-4*high {
				return math.NaN()
			}
		case highOver <= 0:
			low, lowOver = high, highOver
			// utilisation grows about as the load does, or faster
			if step := e.Limit / (highOver + e.Limit); step > 1 && step < 1e6 {
				high *= step * 1.02
			} else {
				high *= 1.02
			}
			if high > 1e6*guess {
				return math.NaN()
			}
		default:
			return e.between(low, lowOver, high, highOver, over)
		}
		highOver = over(high)
	}
	return math.NaN()
}

// between narrows the crossing down from both sides (false position, Illinois,
// with a halving every third time) and gives the lower side: the point that is
// drawn still passes.
func (e *Envelope) between(low, lowOver, high, highOver float64, over func(float64) float64) float64 {
	side := 0
	for i := range 40 {
		if high-low <= e.close*high {
			break
		}
		mid := (low*highOver - high*lowOver) / (highOver - lowOver)
		if i%3 == 2 {
			mid = (low + high) / 2
		}
		v := over(mid)
		switch {
		case v <= 0 && v > -e.close:
			return mid
		case v <= 0:
			low, lowOver = mid, v
			if side < 0 {
				highOver /= 2
			}
			side = -1
		case v > 0:
			high, highOver = mid, v
			if side > 0 {
				lowOver /= 2
			}
			side = 1
		default:
			return math.NaN()
		}
	}
	return low
}

// limit is the utilisation that the member may reach.
func (r *Result) limit() float64 {
	if l := r.Member.Limits.Utilisation; l > 0 {
		return l
	}
	return 1
}
