package en1993

import (
	"strings"

	"kern/checker/model"
	"kern/checker/section"
)

// alphas are the imperfection factors of Table 6.1.
var alphas = map[string]float64{"a0": 0.13, "a": 0.21, "b": 0.34, "c": 0.49, "d": 0.76}

// curve is a buckling curve with the row of Table 6.2 that chose it, or why
// there is none.
type curve struct {
	letter string
	row    string
}

// isS460 tells which column of Table 6.2 holds: S460 steels have their own.
// Stated strengths take the column of S235 to S420, which is never the higher.
func isS460(m *model.Material) bool {
	return m.Grade != nil && strings.HasPrefix(m.Grade.Name, "S460")
}

// curves chooses the buckling curves about the major and the minor axis by
// Table 6.2. The rows of I sections speak of the axis along the flanges (y–y)
// and the axis along the web (z–z), whichever of them is the stronger.
func curves(s *model.Section, s460 bool) (major, minor curve) { return curvesOf(s, s460, nil) }

// curvesOf is curves; rolled gives the second column for rolled I sections where
// an edition has its own.
func curvesOf(s *model.Section, s460 bool, rolled func(slim bool, tf float64) (y, z string)) (major, minor curve) {
	if s.CurveMajor != "" || s.CurveMinor != "" {
		state := func(letter string) curve {
			if letter == "" {
				return curve{row: "the buckling curve about this axis is not stated"}
			}
			return curve{letter, "stated with the section"}
		}
		return state(s.CurveMajor), state(s.CurveMinor)
	}
	sh := s.Shape
	same := func(letter, row string) (curve, curve) { c := curve{letter, row}; return c, c }
	pick := func(low, high string) string {
		if s460 {
			return high
		}
		return low
	}
	switch sh.Kind {
	case section.Tube, section.Pipe:
		switch sh.Made {
		case section.Hot:
			return same(pick("a", "a0"), "hollow section, hot finished")
		case section.Cold:
			return same("c", "hollow section, cold formed")
		case section.Welded:
			if sh.Kind == section.Tube {
				return same("b", "welded box section, welds not thick")
			}
			return same("c", "welded tube, taken as cold formed")
		}
	case section.Bar, section.Rod:
		return same("c", "solid section")
	case section.Channel, section.Tee:
		return same("c", "U and T sections")
	case section.Angle:
		if sh.Made == section.Welded {
			return same("c", "welded angle, not in Table 6.2; taken as for T sections")
		}
		return same("b", "L sections")
	case section.ISection:
		y, z := curvesI(sh, pick)
		if s460 && rolled != nil && sh.Made != section.Welded {
			y.letter, z.letter = rolled(sh.Depth > 1.2*sh.Width*(1+1e-9), sh.Flange)
		}
		if s.Turned {
			return z, y
		}
		return y, z
	}
	return same("", "the standard gives no buckling curve for this section")
}

func curvesI(sh section.Shape, pick func(low, high string) string) (y, z curve) {
	// a hair of tolerance, so that 40 mm in inches is still 40 mm
	const hair = 1 + 1e-9
	tf := sh.Flange * 1000
	if sh.Made == section.Welded {
		if tf <= 40*hair {
			row := "welded I section, t_f ≤ 40 mm"
			return curve{"b", row}, curve{"c", row}
		}
		row := "welded I section, t_f > 40 mm"
		return curve{"c", row}, curve{"d", row}
	}
	slim := sh.Depth > 1.2*sh.Width*hair
	switch {
	case slim && tf <= 40*hair:
		row := "rolled I section, h/b > 1.2, t_f ≤ 40 mm"
		return curve{pick("a", "a0"), row}, curve{pick("b", "a0"), row}
	case slim && tf <= 100*hair:
		row := "rolled I section, h/b > 1.2, 40 mm < t_f ≤ 100 mm"
		return curve{pick("b", "a"), row}, curve{pick("c", "a"), row}
	case slim:
		row := "Table 6.2 has no row for rolled I sections with h/b > 1.2 and t_f > 100 mm"
		return curve{"", row}, curve{"", row}
	case tf <= 100*hair:
		row := "rolled I section, h/b ≤ 1.2, t_f ≤ 100 mm"
		return curve{pick("b", "a"), row}, curve{pick("c", "a"), row}
	}
	row := "rolled I section, h/b ≤ 1.2, t_f > 100 mm"
	return curve{pick("d", "c"), row}, curve{pick("d", "c"), row}
}
