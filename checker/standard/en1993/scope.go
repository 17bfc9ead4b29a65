package en1993

import (
	"fmt"

	"kern/checker/derivation"
	"kern/checker/model"
	"kern/lang/unit"
)

// outOfScope says why EN 1993-1-1 does not hold for a steel: it covers grades
// up to S460 (3.1); EN 1993-1-12 has those above. "" when it holds. It
// speaks in the units that results are shown in.
func outOfScope(m *model.Material, fy float64, units derivation.Units) string {
	switch {
	case m.Grade != nil && m.Grade.American():
		return fmt.Sprintf("%s is no steel of EN 1993-1-1 Table 3.1: if the project allows it, state its strengths in a material of your own", m.Grade.Name)
	case m.Grade != nil && m.Grade.Eurocode != "" && m.Grade.Eurocode != "EN 1993-1-1":
		return fmt.Sprintf("%s is beyond EN 1993-1-1, which covers steels up to S460; see %s", m.Grade.Name, m.Grade.Eurocode)
	case m.Grade == nil && fy > 460e6*(1+1e-9):
		return "a yield strength above " + units.Short(460e6, unit.Stress, 3) + " is beyond EN 1993-1-1; see EN 1993-1-12"
	}
	return ""
}
