package catalogue

import (
	"math"
	"slices"
	"strings"

	"kern/checker/section"
)

// Material constants of the AISC standard, A3 and its symbols (from memory): they
// differ from the 200 and 77 GPa of metric texts by 0.03 and 0.3 %.
const (
	ksi                  = 6894757.293168361 // Pa, exact to the digits
	americanModulus      = 29000 * ksi
	americanShearModulus = 11200 * ksi
	// americanDensity is 490 lb/ft3 in kg/m3, by which ASTM A6 finds masses.
	americanDensity = 490 * 0.45359237 / (0.3048 * 0.3048 * 0.3048)
)

// Form is the form of a steel product, which decides the strength of an American
// grade.
type Form uint8

// The forms.
const (
	NoForm       Form = iota // a section whose form is not known
	RolledShape              // hot rolled shape, or a tee or a pair made of one
	Plate                    // plate and bar, and what is welded of them
	RoundHollow              // round hollow section or pipe
	SquareHollow             // square or rectangular hollow section
)

// String names the form.
func (f Form) String() string {
	switch f {
	case RolledShape:
		return "rolled shapes"
	case Plate:
		return "plate and bar"
	case RoundHollow:
		return "round hollow sections"
	case SquareHollow:
		return "square and rectangular hollow sections"
	}
	return "sections of unknown form"
}

// FormOf tells the form of a section's product.
func FormOf(s section.Shape) Form {
	switch s.Kind {
	case section.Bar, section.Rod:
		return Plate
	case section.Unknown, section.Given, section.Ellipse:
		return NoForm
	}
	switch {
	case s.Made == section.Welded:
		return Plate
	case s.Kind == section.Pipe:
		return RoundHollow
	case s.Kind == section.Tube:
		return SquareHollow
	}
	return RolledShape
}

// formTable holds the strengths of an American grade in one form: bands in mm
// and N/mm2, as in every strengthTable.
type formTable struct {
	form  Form
	table *strengthTable
}

// FormStrength is what an American grade has in one form up to a thickness.
type FormStrength struct {
	Form   Form
	Row    string  // the thickness band, "t <= 2 in"
	Fy, Fu float64 // Pa
}

// American tells that the grade is one of ASTM's.
func (g Grade) American() bool { return strings.HasPrefix(g.Standard, "ASTM ") }

// Forms returns the strengths of an American grade by form and thickness, nil for
// a European one.
func (g Grade) Forms() []FormStrength {
	var out []FormStrength
	if g.forms == nil {
		return nil
	}
	for _, f := range *g.forms {
		from := 0.0
		for i, b := range f.table.yield {
			out = append(out, FormStrength{f.form, bandInches(from, b.upTo), b.value * 1e6, f.table.tensile[i].value * 1e6})
			from = b.upTo
		}
	}
	return out
}

// For returns the grade as it is in the product of a section. ok is false if the
// grade's standard is not one of such products. A European grade stays as it is.
func (g Grade) For(s section.Shape) (own Grade, ok bool) {
	if g.forms == nil {
		return g, true
	}
	form := FormOf(s)
	for _, f := range *g.forms {
		if f.form == form {
			g.table = f.table
			return g, true
		}
	}
	return g, form == NoForm // the lowest strengths
}

// bandInches writes a thickness band of an American standard.
func bandInches(from, upTo float64) string {
	in := func(mm float64) string { return decimalInches(int64(math.Round(mm/25.4*inchUnits))) + " in" }
	switch {
	case math.IsInf(upTo, 1) && from == 0:
		return "any thickness"
	case math.IsInf(upTo, 1):
		return "t > " + in(from)
	case from == 0:
		return "t <= " + in(upTo)
	}
	return strings.TrimSuffix(in(from), " in") + " < t <= " + in(upTo)
}

// strength is one line of americanSteels: minimum yield and tensile strength in
// ksi up to a thickness in inches, 0 for any.
type strength struct{ upTo, fy, fu float64 }

// americanSteel is a grade of an ASTM standard.
type americanSteel struct {
	number, grade string // "A572", "50"; "" for a standard of one grade
	rolled, plate []strength
	round, square []strength
}

// americanSteels lists the grades in the order in which Grades gives them.
//
// Sources: ASTM A36, A53, A242, A500, A501, A529, A572, A588, A847, A913, A992,
// A1065 and A1085, and Tables 2-4 and 2-5 of AISC's manual, all from memory. A500:
// the editions before 2021, whose round sections are weaker than the others; later
// ones have the higher strength for both. A913 Grade 50: the lower one of two
// recalled tensile strengths, 60 and 65 ksi.
func americanSteels() []americanSteel {
	all := func(fy, fu float64) []strength { return []strength{{0, fy, fu}} }
	to := func(upTo, fy, fu float64) []strength { return []strength{{upTo, fy, fu}} }
	return []americanSteel{
		{number: "A36", rolled: all(36, 58), plate: []strength{{8, 36, 58}, {0, 32, 58}}},
		{number: "A53", grade: "B", round: all(35, 60)},
		{number: "A242", rolled: []strength{{1.5, 50, 70}, {2, 46, 67}, {0, 42, 63}}, plate: []strength{{0.75, 50, 70}, {1.5, 46, 67}, {4, 42, 63}}},
		{number: "A500", grade: "B", round: all(42, 58), square: all(46, 58)},
		{number: "A500", grade: "C", round: all(46, 62), square: all(50, 62)},
		{number: "A501", grade: "A", round: all(36, 58), square: all(36, 58)},
		{number: "A501", grade: "B", round: all(50, 70), square: all(50, 70)},
		{number: "A529", grade: "50", rolled: to(1.5, 50, 65), plate: to(1, 50, 65)},
		{number: "A529", grade: "55", rolled: to(1.5, 55, 70), plate: to(1, 55, 70)},
		{number: "A572", grade: "42", rolled: all(42, 60), plate: to(6, 42, 60)},
		{number: "A572", grade: "50", rolled: all(50, 65), plate: to(4, 50, 65)},
		{number: "A572", grade: "55", rolled: all(55, 70), plate: to(2, 55, 70)},
		{number: "A572", grade: "60", rolled: to(2, 60, 75), plate: to(1.25, 60, 75)},
		{number: "A572", grade: "65", rolled: to(2, 65, 80), plate: to(1.25, 65, 80)},
		{number: "A588", rolled: all(50, 70), plate: []strength{{4, 50, 70}, {5, 46, 67}, {8, 42, 63}}},
		{number: "A847", round: all(50, 70), square: all(50, 70)},
		{number: "A913", grade: "50", rolled: all(50, 60)},
		{number: "A913", grade: "60", rolled: all(60, 75)},
		{number: "A913", grade: "65", rolled: all(65, 80)},
		{number: "A913", grade: "70", rolled: all(70, 90)},
		{number: "A992", rolled: all(50, 65)},
		{number: "A1065", grade: "50", square: all(50, 60)},
		{number: "A1085", round: all(50, 65), square: all(50, 65)},
	}
}

// name is the canonical name, "A992" or "A572 Gr 50".
func (s americanSteel) name() string {
	if s.grade == "" {
		return s.number
	}
	return s.number + " Gr " + s.grade
}

// graded builds the grade. Without a section's form it has the form with the
// lowest yield strength.
func (s americanSteel) graded() Grade {
	g := Grade{
		Name: s.name(), Standard: "ASTM " + s.number,
		E: americanModulus, G: americanShearModulus, Density: americanDensity, Recalled: true,
	}
	var forms []formTable
	for _, f := range []struct {
		form Form
		rows []strength
	}{{RolledShape, s.rolled}, {Plate, s.plate}, {RoundHollow, s.round}, {SquareHollow, s.square}} {
		if f.rows == nil {
			continue
		}
		t := &strengthTable{}
		for _, r := range f.rows {
			upTo := math.Round(r.upTo*25.4e4) / 1e4 // mm, as thickness gives them
			if r.upTo == 0 {
				upTo = math.Inf(1)
			}
			t.yield = append(t.yield, band{upTo, r.fy * ksi / 1e6})
			t.tensile = append(t.tensile, band{upTo, r.fu * ksi / 1e6})
		}
		forms = append(forms, formTable{f.form, t})
	}
	g.forms = &forms
	g.table = slices.MinFunc(forms, func(a, b formTable) int {
		return int(a.table.yield[0].value - b.table.yield[0].value)
	}).table
	g.Flat = s.rolled == nil && s.round == nil && s.square == nil
	return g
}

// soleGrades are the letters that may follow a standard of one grade.
var soleGrades = map[string]string{"A1085 Gr A": "A1085"}

// americanGradeName writes the name of an American grade in its canonical form:
// "ASTM A572 Grade 50", "A572-50" and "A572 Gr. 50" as "A572 Gr 50". ok is false
// for a text that is no such name, whatever the grade.
func americanGradeName(text string) (name string, ok bool) {
	if len(text) > maxName {
		return "", false
	}
	rest := strings.ToUpper(strings.TrimSpace(text))
	rest = strings.TrimLeft(strings.TrimPrefix(rest, "ASTM"), " ")
	number, rest, ok := americanNumber(rest)
	if !ok {
		return "", false
	}
	grade := strings.TrimLeft(rest, " -")
	for _, word := range []string{"GRADE", "GR.", "GR"} {
		if after, found := strings.CutPrefix(grade, word); found {
			grade = strings.TrimLeft(after, " -")
			break
		}
	}
	if grade == "" {
		return number, strings.TrimLeft(rest, " ") == ""
	}
	for i := range len(grade) {
		if c := grade[i]; !digit(c) && (c < 'A' || c > 'Z') {
			return "", false
		}
	}
	name = number + " Gr " + grade
	if sole, found := soleGrades[name]; found {
		name = sole
	}
	return name, true
}

// americanNumber cuts the number of a standard off, with the metric one behind a
// stroke: "A992/A992M".
func americanNumber(text string) (number, rest string, ok bool) {
	end := func(s string) int {
		i := 1
		for i < len(s) && digit(s[i]) {
			i++
		}
		return i
	}
	if len(text) < 2 || text[0] != 'A' || !digit(text[1]) {
		return "", "", false
	}
	number, rest = text[:end(text)], text[end(text):]
	if len(number) > 5 {
		return "", "", false
	}
	if metric, found := strings.CutPrefix(rest, "/"+number); found {
		if rest, found = strings.CutPrefix(metric, "M"); !found {
			return "", "", false
		}
	}
	return number, rest, true
}

// americanStandard writes the name of an ASTM standard, "ASTM A572", with no year.
func americanStandard(text string) (string, bool) {
	rest := strings.ToUpper(strings.TrimSpace(text))
	rest, astm := strings.CutPrefix(rest, "ASTM")
	number, rest, ok := americanNumber(strings.TrimLeft(rest, " "))
	if !ok {
		return "", false
	}
	rest = strings.TrimLeft(rest, " ")
	if year, found := strings.CutPrefix(rest, "-"); found && (len(year) == 2 || len(year) == 4) && strings.Trim(year, "0123456789") == "" {
		rest = ""
	}
	return "ASTM " + number, rest == "" && (astm || len(number) > 2)
}
