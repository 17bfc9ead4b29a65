package drawing

import "kern/checker"

// Corners are the compression without moments and the moment without
// compression at which the line of the interaction picture begins and ends, N
// and Nm.
func Corners(r *checker.Result) (n, m float64, ok bool) {
	i, ok := r.Interaction()
	if !ok {
		return 0, 0, false
	}
	return i.Envelope.Axial * i.Force, i.Envelope.Bending * i.Moments[i.Axis], true
}
