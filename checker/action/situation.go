package action

// Situation is a design situation of EN 1990 3.2 and 6.4, or a combination of
// actions for the limit states of serviceability, 6.5.3.
type Situation uint8

// The situations. The first three are for ultimate limit states, the others for
// those of serviceability.
const (
	Persistent     Situation = iota // persistent and transient, 6.4.3.2
	Accidental                      // 6.4.3.3
	Seismic                         // 6.4.3.4
	Characteristic                  // 6.5.3(2)a
	Frequent                        // 6.5.3(2)b
	QuasiPermanent                  // 6.5.3(2)c
)

// situationNames are the words of the language, in the order of the constants.
var situationNames = [...]string{"persistent", "accidental", "seismic", "characteristic", "frequent", "quasipermanent"}

// String is the situation's word in the language.
func (s Situation) String() string {
	if int(s) < len(situationNames) {
		return situationNames[s]
	}
	return "unknown"
}

// Ultimate tells whether resistances are checked in the situation; in the others
// deflections are.
func (s Situation) Ultimate() bool { return s <= Seismic }

// SituationNames are the words of the language for situations, in order.
func SituationNames() []string { return append([]string(nil), situationNames[:]...) }

// SituationOf finds a situation by its word; false when it is none.
func SituationOf(word string) (Situation, bool) {
	for i, n := range situationNames {
		if n == word {
			return Situation(i), true
		}
	}
	return 0, false
}
