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
	numbers [3]float64 // in mm and, last, kg/m; American: inches and lb/ft; 0 beyond the last
	inches  bool       // American
	suffix  string     // what follows the numbers of an American pipe or double angle
}

// americanSize takes the size from an American designation taken apart. The gap
// of a double angle is left out.
func americanSize(e *Entry, n americanName) size {
	s := size{family: e.Family, inches: true, suffix: n.weight + n.back}
	for i, v := range n.size {
		if i < len(s.numbers) {
			s.numbers[i] = float64(v) / inchUnits
		}
	}
	return s
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
	if s.inches {
		return s.distanceInches(numbers)
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
	return ratios(numbers, n)
}

// distanceInches is distance for American sizes. A round section has two numbers.
func (s size) distanceInches(numbers []float64) float64 {
	n := s.numbers
	switch s.family {
	case "HSS":
		// Two numbers are a round section, or the sides alone of another.
		if sides := len(numbers) > 2 || len(numbers) == 2 && numbers[1] > numbers[0]/4; sides != (n[2] > 0) {
			return math.Inf(1)
		}
		if n[2] == 0 {
			break
		}
		fallthrough
	case "L", "2L":
		if len(numbers) > 1 && numbers[0] < numbers[1] {
			numbers = append([]float64{numbers[1], numbers[0]}, numbers[2:]...)
		}
	}
	return ratios(numbers, n)
}

// ratios is how far numbers are from others: dimensions count by their ratio, the
// earlier ones more.
func ratios(numbers []float64, n [3]float64) float64 {
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
