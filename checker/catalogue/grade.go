package catalogue

import (
	"math"
	"slices"
	"strconv"
)

// Material constants of structural steel.
const (
	// modulus is Young's modulus in Pa, EN 1993-1-1 3.2.6(1).
	modulus = 210e9
	// shearModulus in Pa as EN 1993-1-1 3.2.6(1) rounds E/(2(1 + nu)).
	shearModulus = 81e9
	// density in kg/m3. EN 1991-1-1 Table A.4 gives 77.0 to 78.5 kN/m3; the
	// dimensional standards compute masses with 7850 kg/m3.
	density = 7850
)

// Grade is a grade of structural steel as one product standard defines it.
type Grade struct {
	// Name is the canonical name, with the quality: "S355J2", "S275NH". A name
	// without quality ("S355", "S355H") stands for all qualities of the grade.
	// American ones: "A992", "A572 Gr 50".
	Name string
	// Standard is the product standard, "EN 10025-2" or "ASTM A992" for instance.
	Standard string
	// E and G are Young's modulus and the shear modulus in Pa, EN 1993-1-1 3.2.6; of
	// American grades 29000 and 11200 ksi, as AISC 360 takes them.
	E, G float64
	// Density is the mass density in kg/m3, EN 1991-1-1 Table A.4; of American
	// grades 490 lb/ft3.
	Density float64
	// Recalled tells that the strengths of the product standard were set down
	// from memory and not read in a copy of its table.
	Recalled bool
	// Eurocode is the part of Eurocode 3 whose scope the grade is in, "EN
	// 1993-1-1" up to S460 and "EN 1993-1-12" above, up to S700; "" for American
	// grades.
	Eurocode string
	// Flat tells that the product standard is one of flat products alone (plate
	// and strip), so that no rolled section and no tube is made to it.
	Flat bool

	table *strengthTable
	forms *[]formTable // of an American grade, else nil
}

// band is one column of a strength table: the value in N/mm2 up to and
// including a thickness in mm.
type band struct{ upTo, value float64 }

// strengthTable holds the minimum strengths of a grade.
type strengthTable struct {
	yield []band // ReH of the product standard by nominal thickness
	// tensile is the lower bound of Rm. The first band may be that of thin
	// material, see thin.
	tensile []band
	// thinOpen tells that the first tensile band is "t < 3 mm", without 3 mm
	// itself; else bands include their upper bound.
	thinOpen bool
	// eurocode is EN 1993-1-1 Table 3.1: fy and fu up to 40 mm and above 40 up
	// to 80 mm; zero where the table has no value.
	eurocode [2][2]float64
}

// thickness turns metres into millimetres, freed of the noise of conversion so
// that 16 mm is 16 mm; ok is false if it is no thickness.
func thickness(t float64) (mm float64, ok bool) {
	mm = math.Round(t*1e7) / 1e4
	return mm, mm > 0 && !math.IsInf(mm, 0)
}

// find returns the band of thickness mm and the lower end of that band.
func find(bands []band, mm float64, thinOpen bool) (value, from, upTo float64, ok bool) {
	for i, b := range bands {
		if mm < b.upTo || mm == b.upTo && !(thinOpen && i == 0) {
			return b.value, from, b.upTo, b.value > 0
		}
		from = b.upTo
	}
	return 0, 0, 0, false
}

// Strength returns the minimum yield strength ReH and the minimum tensile
// strength Rm in Pa that the grade's product standard requires at a nominal
// thickness t in metres, and the thickness band of the yield strength, such as
// "16 < t <= 40 mm". ok is false if the standard has no value for t. The strength
// of an American grade depends on the form of the product as well: see For.
func (g Grade) Strength(t float64) (fy, fu float64, row string, ok bool) {
	mm, ok := thickness(t)
	if !ok || g.table == nil {
		return 0, 0, "", false
	}
	fy, from, upTo, ok := find(g.table.yield, mm, false)
	if !ok {
		return 0, 0, "", false
	}
	if fu, _, _, ok = find(g.table.tensile, mm, g.table.thinOpen); !ok {
		return 0, 0, "", false
	}
	row = bandName(from, upTo)
	if g.forms != nil {
		row = bandInches(from, upTo)
	}
	return fy * 1e6, fu * 1e6, row, true
}

// Table31 returns the nominal yield strength fy and ultimate strength fu in Pa
// of EN 1993-1-1:2005 Table 3.1 (with the 2009 corrigendum) at a nominal
// thickness t in metres, and the thickness band. ok is false above 80 mm and
// where the table has no value for the grade.
func (g Grade) Table31(t float64) (fy, fu float64, row string, ok bool) {
	mm, ok := thickness(t)
	if !ok || g.table == nil || mm > 80 {
		return 0, 0, "", false
	}
	i, row := 0, bandName(0, 40)
	if mm > 40 {
		i, row = 1, bandName(40, 80)
	}
	v := g.table.eurocode[i]
	if v[0] == 0 || v[1] == 0 {
		return 0, 0, "", false
	}
	return v[0] * 1e6, v[1] * 1e6, row, true
}

// bandName writes a thickness band.
func bandName(from, upTo float64) string {
	upper := strconv.FormatFloat(upTo, 'f', -1, 64)
	if from == 0 {
		return "t <= " + upper + " mm"
	}
	return strconv.FormatFloat(from, 'f', -1, 64) + " < t <= " + upper + " mm"
}

// Grades returns every grade, by standard and then strength. The slice is the
// caller's own.
func Grades() []Grade { return slices.Clone(gradeIndex().grades) }
