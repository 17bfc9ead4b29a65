package aisc360

// Difference is something that the edition of 2016 has otherwise than that of 2022.
type Difference struct{ Clause, Was, Is, Certainty, Choice string }

// Differences are those that a column meets. The text of 2022 was read; what 2016 has
// is from memory.
var Differences = []Difference{
	{"E3, E4, E7", "F_cr", "F_n", "certain", "each edition has its letter; the value is the same"},
	{"E2, user note", "L_c/r preferably at most 200", "the same, and the fabricated length over r at most 300", "fairly certain", "both are said with the assumptions of either edition"},
	{"E4(d) to (f)", "not in the text (commentary)", "buckling about an axis that lateral bracing off the shear centre enforces", "certain", "not covered in either edition: holds are at the shear centre"},
	{"Table D3.1", "cases for HSS with other formulas", "new formulas for slotted HSS and for side plates", "certain", "the factor U is stated in both editions"},
	{"F6.2, slender flanges", "F_cr = 0.69 E/(b/t)^2", "F_cr = 0.70 E/(b/t)^2", "fairly certain", "each edition has its number"},
	{"F7.2(b), F7.3(b)", "(3.57 b/t sqrt(F_y/E) - 4.0) and (0.305 h/t sqrt(F_y/E) - 0.738), for boxes as well", "between lambda_p and lambda_r of Table B4.1b, whose lambda_r of box flanges is 1.49 sqrt(E/F_y)", "fairly certain", "each edition has its own; HSS differ in the rounding alone"},
	{"App. 6.2", "the same equations for panel and point bracing", "the same", "fairly certain", "one set of equations"},
	{"C2.2b, C2.3, App. 7, App. 8", "the same equations", "the same", "certain", "one set of equations"},
}
