package action

import "math"

// IdealStiffness is the least stiffness (N/m), the same for each hold, at which a
// column that is held in place at both ends reaches its forces with hinges at all
// of its holds: Winter's model of rigid bars (G. Winter, Lateral bracing of
// columns and beams, 1960), for spans and forces that differ. spans are the
// distances between neighbouring holds and ends, m; forces the compression in
// each, N, of which tension counts as none. For one hold between equal spans a it
// is 2 N/a, for ever more of them it tends to 4 N/a.
//
// With hinges nothing but the holds keeps the column straight, so a hold of this
// stiffness lets it reach any load that its spans can carry by themselves. It is
// NaN for spans without a length.
func IdealStiffness(spans, forces []float64) float64 {
	n := len(spans) - 1
	if n < 1 || len(forces) != len(spans) {
		return math.NaN()
	}
	// the holds move by v: the work of the forces is vᵀ G v / 2, with G tridiagonal
	diagonal, beside := make([]float64, n), make([]float64, n)
	high := 0.0
	for i := range spans {
		if !(spans[i] > 0) || !finite(spans[i], forces[i]) {
			return math.NaN()
		}
	}
	pull := func(i int) float64 { return max(0, forces[i]) / spans[i] }
	for i := range n {
		diagonal[i] = pull(i) + pull(i+1)
		beside[i] = -pull(i + 1)
		high = max(high, diagonal[i]+pull(i)+pull(i+1))
	}
	// the greatest eigenvalue: above it beta I - G is positive definite
	holds := func(beta float64) bool {
		last := 0.0
		for i := range n {
			p := beta - diagonal[i]
			if i > 0 {
				p -= beside[i-1] * beside[i-1] / last
			}
			if !(p > 0) {
				return false
			}
			last = p
		}
		return true
	}
	low := 0.0
	for range 200 {
		mid := (low + high) / 2
		if mid == low || mid == high {
			break
		}
		if holds(mid) {
			high = mid
		} else {
			low = mid
		}
	}
	return high
}
