package drawing

import (
	"math"

	"kern/checker"
)

// envelope is where the standard's checks of a member reach their limit, when
// the axial forces and the moments of a combination are each multiplied by a
// factor. It is found by asking the checker, ray by ray.
type envelope struct {
	r           *checker.Result
	combination int
	limit       float64
	axial       float64 // factor on the axial forces that is reached without moments
	bending     float64 // factor on the moments that is reached without axial force
	points      []factors
}

// factors is a point of the envelope; NaN where the standard cannot decide.
type factors struct{ axial, bending float64 }

// rays is how many directions are asked for.
const rays = 25

// newEnvelope is false where the checker decides nothing along the axes.
func newEnvelope(r *checker.Result, combination int) (*envelope, bool) {
	e := &envelope{r: r, combination: combination, limit: 1}
	if l := r.Member.Limits.Utilisation; l > 0 {
		e.limit = l
	}
	e.axial, e.bending = e.reach(1, 0, 1), e.reach(0, 1, 1)
	if !(e.axial > 0) || !(e.bending > 0) {
		return nil, false
	}
	guess := 1.0
	for i := range rays {
		angle := math.Pi / 2 * float64(i) / (rays - 1)
		sin, cos := math.Sincos(angle)
		switch i {
		case 0:
			sin, cos = 0, 1
		case rays - 1:
			sin, cos = 1, 0
		}
		t := e.reach(cos*e.axial, sin*e.bending, guess)
		if t > 0 {
			guess = t
		}
		e.points = append(e.points, factors{t * cos * e.axial, t * sin * e.bending})
	}
	return e, true
}

// reach is how far one can go in a direction until the limit is reached; NaN
// where it cannot be decided, or not within a million times the guess.
func (e *envelope) reach(axial, bending, guess float64) float64 {
	over := func(t float64) float64 {
		u, _ := e.r.Probe(e.combination, t*axial, t*bending)
		return u - e.limit
	}
	low, lowOver := 0.0, -e.limit
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
			if step := e.limit / (highOver + e.limit); step > 1 && step < 1e6 {
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
func (e *envelope) between(low, lowOver, high, highOver float64, over func(float64) float64) float64 {
	side := 0
	for i := range 40 {
		if high-low <= 1e-3*high {
			break
		}
		mid := (low*highOver - high*lowOver) / (highOver - lowOver)
		if i%3 == 2 {
			mid = (low + high) / 2
		}
		v := over(mid)
		switch {
		case v <= 0 && v > -5e-4:
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
