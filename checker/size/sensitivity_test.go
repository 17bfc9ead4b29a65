package size_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"kern/checker/size"
)

const post = `basis {
    standard "EN 1993-1-1:2005"
}
material steel {
    E       = 210 GPa
    fy      = %s MPa
    density = 7850 kg/m3
}
section post = tube {
    width = 100 mm
    wall  = %s mm
    made  = cold
}
column C {
    section  = post
    material = steel
    height   = %s m
    load     = 0 kN
}
`

// TestSensitivities compares with central differences of whole checks of the text
// written anew, with a step of another size.
func TestSensitivities(t *testing.T) {
	write := func(fy, wall, height, load, offset float64) string {
		text := fmt.Sprintf(post, fmt.Sprint(fy), fmt.Sprint(wall), fmt.Sprint(height))
		return strings.Replace(text, "    load     = 0 kN", fmt.Sprintf("    load %v kN at top offset %v mm about major", load, offset), 1)
	}
	now := []float64{355, 5, 3.4, 220, 14}
	report := check(t, write(355, 5, 3.4, 220, 14))
	found := size.Sensitivities(report, report.Members[0])
	of := func(i int, v float64) float64 {
		x := append([]float64{}, now...)
		x[i] = v
		return check(t, write(x[0], x[1], x[2], x[3], x[4])).Members[0].Utilisation
	}
	for i, c := range []struct {
		name string
		si   float64 // of one unit of the text
	}{{"fy", 1e6}, {"wall", 1e-3}, {"height", 1}, {"load", 1 / 220.0}, {"offset major", 1e-3}} {
		h := 1e-3 * now[i]
		want := (of(i, now[i]+h) - of(i, now[i]-h)) / (2 * h) / c.si
		ok := false
		for _, s := range found {
			if s.Parameter != c.name {
				continue
			}
			ok = true
			if math.Abs(s.Above-want) > 2e-3*math.Abs(want) || s.Kink() {
				t.Errorf("%s: %v below, %v above, want %v", c.name, s.Below, s.Above, want)
			}
		}
		if !ok {
			t.Errorf("no sensitivity to %s", c.name)
		}
	}
}
