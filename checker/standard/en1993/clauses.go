package en1993

// Clause is a clause of sections 5 and 6 that a column can meet, and what the
// program does about it.
type Clause struct {
	Number, Title string
	State         string // "checked", "not applicable", "not covered"
	How           string // the rule that checks it, why it does not apply, or what a person does by hand
}

// Clauses is the coverage of EN 1993-1-1:2005, sections 5 and 6 and annex BB, clause by
// clause. Members say the same by rule; this is the table behind them.
var Clauses = []Clause{
	{"5.1", "Structural modelling", "not covered", "by hand: joints are taken as the ends say; the frame is outside the calculation"},
	{"5.2.1", "Effects of deformed geometry", "checked", "critical exact gives alpha_cr of the member on its own ends, holds and springs; of a frame: by hand"},
	{"5.2.2(1) to (6)", "Second-order effects of frames", "not covered", "by hand: moments here are of first order between the member's own ends and holds"},
	{"5.2.2(7)b, (8)", "Members by 6.3 with buckling lengths", "checked", "flexural-buckling-major, flexural-buckling-minor"},
	{"5.3.1, 5.3.2", "Sway imperfections", "checked", "imperfection on, for columns that carry sway themselves (m = 1, not disregarded by 5.3.2(4)); of a frame by hand: give its notional loads as loads"},
	{"5.3.3", "Imperfection of bracing systems", "checked", "the force on each hold is listed with the member, for m = 1; its stiffness too (hold-stiffness, no clause); splices (4) by hand"},
	{"5.3.4", "Member imperfections", "checked", "within the buckling curves of 6.3 (5.3.4(1))"},
	{"5.4.1, 5.4.2", "Elastic analysis", "checked", "exact first-order analysis of the member on its ends and holds"},
	{"5.4.3", "Plastic analysis", "not applicable", "no plastic hinges are counted on"},
	{"5.5.1, 5.5.2, Table 5.2", "Classes of cross-sections", "checked", "local-buckling: in compression, and under the forces of each combination"},
	{"5.5.2(11), 6.2.2.4", "Class 2 section with a class 3 web", "not applicable", "the section is taken as class 3, on the safe side"},
	{"5.6", "Sections with plastic hinges", "not applicable", "no plastic analysis"},
	{"6.1", "Partial factors", "checked", "recommended values, the annex of the basis, or numbers that the basis states"},
	{"6.2.1(5)", "Yield criterion for elastic checks", "not applicable", "the rules of 6.2.3 to 6.2.10 are used"},
	{"6.2.1(7)", "Linear sum", "checked", "section-interaction, for sections without a formula of their own and beside high shear"},
	{"6.2.2.1", "Gross properties", "checked", "from the exact outline"},
	{"6.2.2.2", "Net area", "checked", "net-section, with net_ratio of the basis; holes of compression members that are not filled: by hand"},
	{"6.2.2.3", "Shear lag", "not applicable", "EN 1993-1-5 3.1: flanges of columns are narrow beside the length; wide flanges: by hand"},
	{"6.2.2.5", "Effective sections of class 4", "checked", "doubly symmetric I and rectangular hollow sections, EN 1993-1-5 4.4; others undecided"},
	{"6.2.3(1), (2)", "Tension", "checked", "section-tension, net-section"},
	{"6.2.3(3), (4)", "Capacity design, category C connections", "not covered", "by hand: N_pl,Rd ≤ N_u,Rd, and N_net,Rd"},
	{"6.2.3(5)", "Angles connected by one leg", "not covered", "by hand: EN 1993-1-8 3.10.3; net-section says so of a member that is connected by one leg"},
	{"6.2.4", "Compression", "checked", "section-compression"},
	{"6.2.5(1) to (3)", "Bending", "checked", "section-bending-major, section-bending-minor"},
	{"6.2.5(4) to (6)", "Holes in bending", "not covered", "by hand: A_f,net 0.9 f_u/gamma_M2 ≥ A_f f_y/gamma_M0"},
	{"6.2.6(1) to (3)", "Shear", "checked", "section-shear-major, section-shear-minor"},
	{"6.2.6(4), (5)", "Elastic shear stress", "not applicable", "the plastic resistance is used"},
	{"6.2.6(6)", "Shear buckling limit", "checked", "section-shear-major; beyond 72 epsilon undecided: EN 1993-1-5 section 5 by hand"},
	{"6.2.7", "Torsion", "not applicable", "torsion: the language has no load that twists; what does, by hand"},
	{"6.2.8", "Bending and shear", "checked", "section-bending-major, section-bending-minor"},
	{"6.2.9.1", "Bending and axial force, class 1 and 2", "checked", "section-interaction"},
	{"6.2.9.2", "Bending and axial force, class 3", "checked", "section-interaction"},
	{"6.2.9.3", "Bending and axial force, class 4", "checked", "section-interaction; e_N = 0 by symmetry, other sections undecided"},
	{"6.2.10", "Bending, shear and axial force", "checked", "section-interaction, by the sum (6.2) with the reduced strength"},
	{"6.3.1.1 to 6.3.1.3", "Flexural buckling", "checked", "flexural-buckling-major, flexural-buckling-minor"},
	{"6.3.1.2(4)", "Small slenderness or force", "not applicable", "chi = 1 up to 0.2 follows from the curve; N_Ed ≤ 0.04 N_cr is not made use of"},
	{"6.3.1.4", "Torsional and flexural-torsional buckling", "checked", "torsional-buckling, flexural-torsional-buckling"},
	{"6.3.2.1, 6.3.2.2", "Lateral-torsional buckling, general case", "checked", "lateral-torsional-buckling; sections that are not doubly symmetric undecided"},
	{"6.3.2.2(4)", "Small slenderness", "not applicable", "not made use of, but for rectangular hollow sections"},
	{"6.3.2.3", "Rolled and equivalent welded sections", "checked", "lateral-torsional-buckling, where the basis (lateral buckling rolled) or its annex says so"},
	{"6.3.2.4", "Simplified method", "not applicable", "6.3.2.2 or 6.3.2.3 is used"},
	{"6.3.3, Annex A, Annex B", "Bending and compression", "checked", "member-interaction, by Annex B or as the basis says (interaction annex A); sections that are not doubly symmetric undecided"},
	{"6.3.4", "General method", "not covered", "by hand, where 6.3.3 leaves a member undecided"},
	{"6.3.5", "Members with plastic hinges", "not applicable", "no plastic analysis"},
	{"6.4", "Built-up compression members", "not covered", "by hand: the language has no built-up members"},
	{"BB.1.2", "Angles as web members", "checked", "flexural-buckling-major, flexural-buckling-minor, with connected by long or short leg; other angles are loaded in their centroid over K L; one bolt at an end (2): by hand"},
	{"BB.2", "Continuous restraint", "not covered", "by hand: holds are points"},
}
