package catalogue

import (
	"math"
	"strings"
)

// size is what Nearest compares: the family, of a tee that of the section it is
// cut from, and the numbers of the designation.
type size struct {
	family  string
	tee     bool
	numbers [3]float64 // in mm and, last, kg/m; 0 beyond the last
}

// sizeOf takes the size from a designation.
func sizeOf(e *Entry) size {
	s := size{family: e.Family}
	designation, tee := strings.CutPrefix(e.Designation, teePrefix)
	if tee {
		s.tee = true
		s.family, _, _ = strings.Cut(designation, " ")
	}
	n, _ := numbers(designation)
	copy(s.numbers[:], n[:])
	return s
}

// distance tells how far a size is from the numbers of a designation, of which
// there may be too few.
func (s size) distance(numbers []float64) float64 {
	if len(numbers) == 0 {
		return 0
	}
	n := s.numbers
	if n[1] == 0 {
		return math.Abs(numbers[0] - n[0])
	}
	switch s.family {
	case "SHS", "L":
		if len(numbers) == 2 && numbers[1] < numbers[0]/2 {
			if n[0] != n[1] {
				return math.Inf(1) // a leg and a thickness name an equal angle
			}
			n = [3]float64{n[0], n[2]}
		}
	case "PFC":
		if len(numbers) == 2 {
			n[2] = 0
		}
	}
	switch s.family {
	case "RHS", "EHS", "L":
		if len(numbers) > 1 && n[2] != 0 && numbers[0] < numbers[1] {
			numbers = append([]float64{numbers[1], numbers[0]}, numbers[2:]...)
		}
	}
	// Dimensions count by their ratio, the earlier ones more.
	total, weight := 0.0, 100.0
	for i, d := range n {
		if i == len(numbers) || d == 0 {
			break
		}
		total += weight * math.Abs(math.Log(numbers[i]/d))
		weight /= 10
	}
	return total
}
