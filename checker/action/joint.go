package action

import "math"

// Joints are the stiffness ratios of the joints at the ends of a column in a rigid
// frame: the sum of E I/L of the columns over that of the beams at each joint, both
// above zero. Sway says that the joints can move sideways against each other.
type Joints struct {
	Base, Top float64
	Sway      bool
}

// Factor is the effective length factor of the column by the equations behind the
// alignment charts (Julian and Lawrence; ANSI/AISC 360-22 commentary to Appendix 7,
// C-A-7-1 and C-A-7-2), from 0.5 to 1 without sway and above 1 with it. It is NaN
// for ratios that are not above zero.
func (j Joints) Factor() float64 {
	if !(j.Base > 0) || !(j.Top > 0) || math.IsInf(j.Base, 1) || math.IsInf(j.Top, 1) {
		return math.NaN()
	}
	// u = pi/K: both functions rise from below zero to above it between the bounds
	f, low, high := j.braced, pi, 2*pi
	if j.Sway {
		f, low, high = j.swaying, 0, pi
	}
	for range 200 {
		middle := (low + high) / 2
		if f(middle) < 0 {
			low = middle
		} else {
			high = middle
		}
	}
	return pi / ((low + high) / 2)
}

// swaying is (G_A G_B u^2 - 36)/(6 (G_A + G_B)) - u/tan u, with u/tan u in the
// limit at 0.
func (j Joints) swaying(u float64) float64 {
	t := 1.0
	if u > 0 {
		t = u / math.Tan(u)
	}
	return (j.Base*j.Top*u*u-36)/(6*(j.Base+j.Top)) - t
}

// braced is G_A G_B/4 u^2 + (G_A + G_B)/2 (1 - u/tan u) + 2 tan(u/2)/u - 1.
func (j Joints) braced(u float64) float64 {
	return j.Base*j.Top/4*u*u + (j.Base+j.Top)/2*(1-u/math.Tan(u)) + 2*math.Tan(u/2)/u - 1
}
