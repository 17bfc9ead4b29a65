package catalogue

// steelSeries is a grade with its qualities in one product standard.
type steelSeries struct {
	standard  string
	base      string   // "S355"
	qualities []string // endings of the name; "" stands for the grade itself
	recalled  bool     // strengths from memory
	table     strengthTable
}

// eurocode names the part of Eurocode 3 that covers the grade: EN 1993-1-12
// extends EN 1993-1-1 from S460 up to S700.
func (s steelSeries) eurocode() string {
	if s.table.yield[0].value > 460 {
		return "EN 1993-1-12"
	}
	return "EN 1993-1-1"
}

// by pairs the upper ends of thickness bands with values.
func by(upTo []float64, values ...float64) []band {
	b := make([]band, len(values))
	for i, v := range values {
		b[i] = band{upTo[i], v}
	}
	return b
}

// Thickness bands in mm.
var (
	bands250  = []float64{16, 40, 63, 80, 100, 150, 200, 250}
	bands120  = []float64{16, 40, 63, 80, 100, 120}
	bands65   = []float64{16, 40, 65}
	bands40   = []float64{16, 40}
	tensile25 = []float64{3, 100, 150, 250} // EN 10025-2
	tensile3  = []float64{100, 200, 250}    // EN 10025-3
	tensile4  = []float64{40, 63, 80, 100, 120}
	tensile10 = []float64{3, 100, 120} // EN 10210-1, non-alloy
	tensile19 = []float64{3, 40}       // EN 10219-1, non-alloy
	bands150  = []float64{50, 100, 150}
	tensile6  = []float64{3, 50, 100, 150} // EN 10025-6
	one65     = []float64{65}
	one40     = []float64{40}
)

// steels lists the grades in the order in which Grades gives them.
//
// Sources of the product standards' strengths:
//   - EN 10025-2 Table 7: read (yield and tensile strengths); S460, an addition
//     of the 2019 edition: yield strengths read, tensile strengths from memory.
//   - EN 10210-1 Table A.3, non-alloy grades: read in a public copy.
//   - EN 10210-1 Table B.3, EN 10219-1 Tables A.3, B.4 and B.5, EN 10025-3 Table
//     4 and EN 10025-4 Table 5: from memory (S420NH up to 16 mm: read).
//   - EN 10025-6 Table 5 (edition of 2004 with its amendment of 2009), quenched and
//     tempered flat products of 3 to 150 mm: from memory. The edition of 2019 goes
//     up to 200 mm, with bands that were not at hand; S890 and S960 are left out.
//     EN 1993-1-1 Table 3.1 has S460Q, QL and QL1 alone; S500 to S690 are steels of
//     EN 1993-1-12.
//
// Table 3.1 of EN 1993-1-1 is from memory throughout.
func steels() []steelSeries {
	return []steelSeries{
		{"EN 10025-2", "S235", []string{"", "JR", "J0", "J2"}, false, strengthTable{
			by(bands250, 235, 225, 215, 215, 215, 195, 185, 175), by(tensile25, 360, 360, 350, 340), true,
			[2][2]float64{{235, 360}, {215, 360}}}},
		{"EN 10025-2", "S275", []string{"", "JR", "J0", "J2"}, false, strengthTable{
			by(bands250, 275, 265, 255, 245, 235, 225, 215, 205), by(tensile25, 430, 410, 400, 380), true,
			[2][2]float64{{275, 430}, {255, 410}}}},
		{"EN 10025-2", "S355", []string{"", "JR", "J0", "J2", "K2"}, false, strengthTable{
			by(bands250, 355, 345, 335, 325, 315, 295, 285, 275), by(tensile25, 510, 470, 450, 450), true,
			[2][2]float64{{355, 490}, {335, 470}}}},
		{"EN 10025-2", "S450", []string{"", "J0"}, false, strengthTable{
			// No tensile strength below 3 mm: long products only.
			by(bands250, 450, 430, 410, 390, 380, 380), by(tensile25, 0, 550, 530), true,
			[2][2]float64{{440, 550}, {410, 550}}}},
		{"EN 10025-2", "S460", []string{"", "JR", "J0", "J2", "K2"}, true, strengthTable{
			by(bands250, 460, 440, 430, 410, 400, 385), by(tensile25, 0, 550, 530), true,
			[2][2]float64{}}},

		{"EN 10210-1", "S235", []string{"H", "JRH"}, false, strengthTable{
			by(bands120, 235, 225, 215, 215, 215, 195), by(tensile10, 360, 360, 350), false,
			[2][2]float64{{235, 360}, {215, 340}}}},
		{"EN 10210-1", "S275", []string{"H", "J0H", "J2H"}, false, strengthTable{
			by(bands120, 275, 265, 255, 245, 235, 225), by(tensile10, 430, 410, 400), false,
			[2][2]float64{{275, 430}, {255, 410}}}},
		{"EN 10210-1", "S355", []string{"H", "J0H", "J2H", "K2H"}, false, strengthTable{
			by(bands120, 355, 345, 335, 325, 315, 295), by(tensile10, 510, 470, 450), false,
			[2][2]float64{{355, 510}, {335, 490}}}},
		{"EN 10210-1", "S275", []string{"NH", "NLH"}, true, strengthTable{
			by(bands65, 275, 265, 255), by(one65, 370), false,
			[2][2]float64{{275, 390}, {255, 370}}}},
		{"EN 10210-1", "S355", []string{"NH", "NLH"}, true, strengthTable{
			by(bands65, 355, 345, 335), by(one65, 470), false,
			[2][2]float64{{355, 490}, {335, 470}}}},
		{"EN 10210-1", "S420", []string{"NH", "NLH"}, true, strengthTable{
			by(bands65, 420, 400, 390), by(one65, 520), false,
			[2][2]float64{{420, 540}, {390, 520}}}},
		{"EN 10210-1", "S460", []string{"NH", "NLH"}, true, strengthTable{
			by(bands65, 460, 440, 430), by(one65, 540), false,
			[2][2]float64{{460, 560}, {430, 550}}}},

		{"EN 10219-1", "S235", []string{"H", "JRH"}, true, strengthTable{
			by(bands40, 235, 225), by(tensile19, 360, 360), true,
			[2][2]float64{{235, 360}}}},
		{"EN 10219-1", "S275", []string{"H", "J0H", "J2H"}, true, strengthTable{
			by(bands40, 275, 265), by(tensile19, 430, 410), true,
			[2][2]float64{{275, 430}}}},
		{"EN 10219-1", "S355", []string{"H", "J0H", "J2H", "K2H"}, true, strengthTable{
			by(bands40, 355, 345), by(tensile19, 510, 470), true,
			[2][2]float64{{355, 510}}}},
		{"EN 10219-1", "S275", []string{"NH", "NLH"}, true, strengthTable{
			by(bands40, 275, 265), by(one40, 370), false,
			[2][2]float64{{275, 370}}}},
		{"EN 10219-1", "S355", []string{"NH", "NLH"}, true, strengthTable{
			by(bands40, 355, 345), by(one40, 470), false,
			[2][2]float64{{355, 470}}}},
		{"EN 10219-1", "S460", []string{"NH", "NLH"}, true, strengthTable{
			by(bands40, 460, 440), by(one40, 540), false,
			[2][2]float64{{460, 550}}}},
		{"EN 10219-1", "S275", []string{"MH", "MLH"}, true, strengthTable{
			by(bands40, 275, 265), by(one40, 360), false,
			[2][2]float64{{275, 360}}}},
		{"EN 10219-1", "S355", []string{"MH", "MLH"}, true, strengthTable{
			by(bands40, 355, 345), by(one40, 470), false,
			[2][2]float64{{355, 470}}}},
		{"EN 10219-1", "S420", []string{"MH", "MLH"}, true, strengthTable{
			by(bands40, 420, 400), by(one40, 500), false,
			[2][2]float64{{420, 500}}}},
		{"EN 10219-1", "S460", []string{"MH", "MLH"}, true, strengthTable{
			by(bands40, 460, 440), by(one40, 530), false,
			[2][2]float64{{460, 530}}}},

		{"EN 10025-3", "S275", []string{"N", "NL"}, true, strengthTable{
			by(bands250, 275, 265, 255, 245, 235, 225, 215, 205), by(tensile3, 370, 350, 350), false,
			[2][2]float64{{275, 390}, {255, 370}}}},
		{"EN 10025-3", "S355", []string{"N", "NL"}, true, strengthTable{
			by(bands250, 355, 345, 335, 325, 315, 295, 285, 275), by(tensile3, 470, 450, 450), false,
			[2][2]float64{{355, 490}, {335, 470}}}},
		{"EN 10025-3", "S420", []string{"N", "NL"}, true, strengthTable{
			by(bands250, 420, 400, 390, 370, 360, 340, 330, 320), by(tensile3, 520, 500, 500), false,
			[2][2]float64{{420, 520}, {390, 520}}}},
		{"EN 10025-3", "S460", []string{"N", "NL"}, true, strengthTable{
			by(bands250, 460, 440, 430, 410, 400, 380, 370), by(tensile3, 540, 530), false,
			[2][2]float64{{460, 540}, {430, 540}}}},
		{"EN 10025-4", "S275", []string{"M", "ML"}, true, strengthTable{
			by(bands120, 275, 265, 255, 245, 245, 240), by(tensile4, 370, 360, 350, 350, 350), false,
			[2][2]float64{{275, 370}, {255, 360}}}},
		{"EN 10025-4", "S355", []string{"M", "ML"}, true, strengthTable{
			by(bands120, 355, 345, 335, 325, 325, 320), by(tensile4, 470, 450, 440, 440, 430), false,
			[2][2]float64{{355, 470}, {335, 450}}}},
		{"EN 10025-4", "S420", []string{"M", "ML"}, true, strengthTable{
			by(bands120, 420, 400, 390, 380, 370, 365), by(tensile4, 520, 500, 480, 470, 460), false,
			[2][2]float64{{420, 520}, {390, 500}}}},
		{"EN 10025-4", "S460", []string{"M", "ML"}, true, strengthTable{
			by(bands120, 460, 440, 430, 410, 400, 385), by(tensile4, 540, 530, 510, 500, 490), false,
			[2][2]float64{{460, 540}, {430, 530}}}},

		// The tensile strength is nil below 3 mm, where the standard does not hold.
		{"EN 10025-6", "S460", quenched[1:], true, strengthTable{
			by(bands150, 460, 440, 400), by(tensile6, 0, 550, 550, 500), true,
			[2][2]float64{{460, 570}, {440, 550}}}},
		{"EN 10025-6", "S500", quenched, true, strengthTable{
			by(bands150, 500, 480, 440), by(tensile6, 0, 590, 590, 540), true,
			[2][2]float64{}}},
		{"EN 10025-6", "S550", quenched, true, strengthTable{
			by(bands150, 550, 530, 490), by(tensile6, 0, 640, 640, 590), true,
			[2][2]float64{}}},
		{"EN 10025-6", "S620", quenched, true, strengthTable{
			by(bands150, 620, 580, 560), by(tensile6, 0, 700, 700, 650), true,
			[2][2]float64{}}},
		{"EN 10025-6", "S690", quenched, true, strengthTable{
			by(bands150, 690, 650, 630), by(tensile6, 0, 770, 760, 710), true,
			[2][2]float64{}}},
	}
}

// quenched are the qualities of EN 10025-6: "" for all of a grade, which S460
// leaves to EN 10025-2, then impact energy at -20, -40 and -60 degrees.
var quenched = []string{"", "Q", "QL", "QL1"}
