package drawing

import "kern/checker"

// Corners are the compression without moments and the moment without
// compression at which the line of the interaction picture begins and ends, N
// and Nm.
func Corners(r *checker.Result) (n, m float64, ok bool) {
	s, _ := about(r)
	k := s.combination()
	e, ok := newEnvelope(r, k)
	if !ok {
		return 0, 0, false
	}
	i := interaction{subject: s}
	return e.axial * s.f.Compression(k, 0, s.m.Height), e.bending * i.moment(0, k), true
}
