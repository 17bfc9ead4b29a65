package en1993_2022

// Difference is a place in which the edition of 2022 gives another result than
// that of 2005, or is held to do so.
type Difference struct {
	Clause    string // of 2022
	Was       string
	Is        string
	Certainty string // high, medium, low: all are from memory
	Choice    string // what is done with it
}

// Differences are all that is known.
var Differences = []Difference{
	{"1, 5", "steels S235 to S460", "S235 to S700", "high", "as in 2022; the second column of the buckling curves is taken for S460 alone"},
	{"7, 8", "sections 5 and 6", "sections 7 and 8, with paragraphs in the same order", "high", "clauses are cited by the new numbers, without those of equations"},
	{"Table 7.3", "internal parts in compression 33, 38, 42 epsilon", "28, 34, 38 epsilon", "high", "as in 2022"},
	{"Table 7.3", "internal parts in bending: class 3 to 124 epsilon; with axial force 396/(13 alpha - 1), 456/(13 alpha - 1), 42/(0.67 + 0.33 psi)", "121 epsilon; 126/(5.5 alpha - 1), 188/(6.53 alpha - 1), 38/(0.608 + 0.343 psi + 0.049 psi²)", "high", "as in 2022"},
	{"Table 7.3", "circular tubes in bending: class 3 to 90 epsilon²", "to 140 epsilon²", "medium", "90 epsilon², the safer"},
	{"8.2.5, Annex B", "class 3: elastic modulus", "class 3: modulus between elastic and plastic", "medium", "elastic modulus, the safer"},
	{"Table 8.3", "S460, rolled I sections, z–z: a0 and a", "a step lower: a and b", "medium", "as in 2022, the safer"},
	{"Table 8.3", "rolled angles of S460: b", "a", "medium", "b, the safer"},
	{"8.3.2.3", "lateral-torsional buckling of I sections: general case with alpha of Table 6.3, or 6.3.2.3 with f", "chi_LT with f_M and alpha_LT of the ratio of the elastic moduli, tied to lambda_z", "high on the form, medium on the limits", "as in 2022; f_M = 1 but for end moments, a uniform load and a load at mid-height"},
	{"8.3.2", "general case for other sections", "stays", "high", "as in 2005"},
	{"8.3.3", "Annex A and Annex B", "the method of Annex B alone; that of Annex A is in CEN/TS 1993-1-101", "high", "Annex B; class 3 with elastic moduli"},
	{"8.2.9", "circular tubes: no formula for M_N", "1 - n^1.7", "medium", "the smaller of that and plastic theory, in both editions"},
	{"7.3", "imperfections of frames and members for second-order analysis", "other values", "medium", "does not arise: imperfections are in the buckling curves"},
}
