package aisc360

// clausesOfBending are chapters F to H, clausesOfAppendices 6 and 8.
var (
	clausesOfBending = []Clause{
		{"B4.1, Table B4.1b", "Local buckling in flexure", "checked", "section-bending-major, section-bending-minor"},
		{"F1(a), (b)", "Flexure, general", "checked", "phi_b = 0.90, Omega_b = 1.67; ends are held against twist unless free"},
		{"F1(c)", "Modification factor C_b", "checked", "lateral-torsional-buckling: (F1-1) for the diagram of each combination, 1.0 for a cantilever, or stated"},
		{"F1(d)", "Singly symmetric members in reverse curvature", "checked", "tees are taken with the stem in compression throughout"},
		{"F2, F3", "I sections and channels with compact webs", "checked", "section-bending-major, lateral-torsional-buckling; channels that are not compact undecided"},
		{"F4, F5", "I sections with noncompact and slender webs", "checked", "section-bending-major, lateral-torsional-buckling; the language has doubly symmetric I sections alone"},
		{"F6", "I sections and channels about the minor axis", "checked", "section-bending-minor"},
		{"F7", "Rectangular HSS and box sections", "checked", "section-bending-major, section-bending-minor, lateral-torsional-buckling; slender webs with slender flanges undecided"},
		{"F8", "Round HSS", "checked", "section-bending-major; D/t from 0.45 E/F_y on undecided"},
		{"F9", "Tees", "checked", "section-bending-major, section-bending-minor, lateral-torsional-buckling in the plane of the stem, the stem in compression; across it undecided"},
		{"F9", "Double angles", "checked", "in the plane of the web legs, both legs in compression; across it undecided"},
		{"F10", "Single angles", "checked", "about the principal axes, toes in compression; bending about geometric axes by their components"},
		{"F11", "Rectangular bars and rounds", "checked", "section-bending-major, section-bending-minor, lateral-torsional-buckling"},
		{"F12", "Unsymmetrical shapes", "not covered", "by hand: sections with stated properties, elliptical tubes and tees bent across the stem are undecided"},
		{"F13.1", "Bolt holes in the tension flange", "not covered", "by hand: F_u A_fn ≥ Y_t F_y A_fg"},
		{"F13.2", "Proportions of I sections", "checked", "section-bending-major: slender webs beyond the limits without stiffeners undecided"},
		{"F13.3, F13.4", "Cover plates, built-up beams", "not applicable", "the language has single shapes"},
		{"G1", "Shear, general", "checked", "phi_v = 0.90, Omega_v = 1.67; 1.00 and 1.50 by G2.1(a)"},
		{"G2.1", "Webs of I sections and channels", "checked", "section-shear-major, without transverse stiffeners"},
		{"G2.2, G2.3, G2.4", "Tension field action, stiffeners", "not applicable", "no stiffeners are counted on"},
		{"G3", "Angles and tees", "checked", "section-shear-major, section-shear-minor; both web legs of double angles; a single angle's shorter leg alone, on the safe side"},
		{"G4", "Rectangular HSS and box sections", "checked", "section-shear-major, section-shear-minor"},
		{"G5", "Round HSS", "checked", "L_v taken as the whole height, on the safe side"},
		{"G6", "Minor-axis shear", "checked", "section-shear-minor; tees undecided"},
		{"G7", "Web openings", "not covered", "by hand: the section is whole throughout"},
		{"J4.2(a)", "Shear of solid bars", "checked", "section-shear-major, section-shear-minor: chapter G has no solid sections, the gross area with the factors of G1"},
		{"J10", "Flanges and webs under concentrated forces", "not covered", "by hand: where loads across the member and beams come in"},
		{"H1.1", "Flexure and compression", "checked", "member-interaction, every stretch and segment; it takes the place of section-interaction"},
		{"H1.2", "Flexure and tension", "checked", "member-interaction, with the increase of C_b for doubly symmetric sections"},
		{"H1.3", "Rolled compact members bent about one axis", "not applicable", "permitted, not made use of: H1.1 is on the safe side"},
		{"H2", "Unsymmetric members", "checked", "member-interaction of single angles, all terms added"},
		{"H3", "Torsion", "not applicable", "torsion: the language has no load that twists; what does, by hand"},
		{"H4", "Flanges with bolt holes in tension", "not covered", "by hand"},
	}
	clausesOfAppendices = []Clause{
		{"App. 6.1, 6.2.2", "Point bracing of columns", "checked", "bracing: strength and stiffness that the holds need are worked out; what holds the member is for a person"},
		{"App. 6.2.1", "Panel bracing of columns", "not covered", "by hand: V_br = 0.005 P_r"},
		{"App. 6.3, 6.4", "Bracing of beams and beam-columns", "not covered", "by hand: what flexure asks of the holds"},
		{"App. 8.1.2", "Multiplier B_1", "checked", "member-interaction: C_m from end moments, 1.0 with loads between, or stated"},
		{"App. 8.1.3", "Multiplier B_2", "checked", "member-interaction: stated in the basis; a column that can sway is undecided without it"},
		{"App. 8.2", "Moment redistribution", "not applicable", "elastic moments alone"},
	}
)
