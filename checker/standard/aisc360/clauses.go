package aisc360

// Clause is a section of the standard that a column can meet, and what the program
// does about it.
type Clause struct {
	Number, Title string
	State         string // "checked", "not applicable", "not covered"
	How           string // the rule that checks it, why it does not apply, or what a person does by hand
}

// Clauses is the coverage of ANSI/AISC 360-22, chapters B to H and appendices 6 to
// 8, section by section; the edition of 2016 has the same sections. Members say the
// same by rule; this is the table behind them.
var Clauses = append(append([]Clause{
	{"A3.1", "Materials", "not covered", "by hand: that the steel is one of those listed; strengths are those of its product standard or as stated"},
	{"B2", "Loads and load combinations", "checked", "the combinations of the calculation; those of LRFD or ASD are the writer's to give"},
	{"B3.1", "Design for strength by LRFD", "checked", "by LRFD in the basis"},
	{"B3.2", "Design for strength by ASD", "checked", "by ASD in the basis"},
	{"B3.4 to B3.6", "Connections, diaphragms, anchorage", "not covered", "by hand: joints and base plates"},
	{"B3.8", "Serviceability", "checked", "sway, deflection: against the limits of the member; the drift of a frame by hand (hold-stiffness, of holds that state one, is of no clause)"},
	{"B3.11 to B3.13", "Fatigue, fire, corrosion", "not covered", "by hand: appendices 3 and 4"},
	{"B4.1, Table B4.1a", "Local buckling in compression", "checked", "local-buckling"},
	{"B4.2", "Design wall thickness of HSS", "checked", "the wall of the section, as its catalogue or the calculation gives it"},
	{"B4.3a", "Gross area", "checked", "from the exact outline"},
	{"B4.3b", "Net area", "checked", "net-section, with the net area of the member or net_ratio of the basis"},
	{"C1.1, C2.1, C2.3", "Direct analysis: analysis and stiffness", "checked", "frame-stability: stability direct, with 0.8 tau_b E I in the multiplier B_1; the frame itself by hand"},
	{"C2.2", "System imperfections", "checked", "frame-stability: the notional load of the column is shown; a column that can sway is undecided until its loads have it"},
	{"C3", "Available strengths by direct analysis", "checked", "unbraced lengths without factors"},
	{"App. 1", "Design by advanced analysis", "not applicable", "elastic analysis alone"},
	{"App. 7.2.1, 7.2.2", "Effective length method: limits and analysis", "not covered", "by hand: the limit of 1.5 on the growth of drift and the notional loads of the frame; said with the assumptions"},
	{"App. 7.2.3, Table C-A-7.1", "Effective length factors", "checked", "theoretical or recommended values, stated ones, or the equations of the alignment charts (joints)"},
	{"App. 7.3", "First-order analysis method", "not applicable", "not offered: direct analysis or effective lengths"},
	{"D1", "Slenderness of members in tension", "checked", "no limit; above 300 the assumptions say so"},
	{"D2(a)", "Tensile yielding", "checked", "section-tension"},
	{"D2(b), D3", "Tensile rupture", "checked", "net-section; the shear lag factor U is stated"},
	{"Table D3.1", "Shear lag factors", "not covered", "by hand: U from the connection, given in the basis"},
	{"D4", "Built-up members in tension", "not covered", "by hand: spacing of connectors"},
	{"D5, D6", "Pin-connected members, eyebars", "not covered", "by hand: a member is taken with its section throughout"},
	{"J4.3", "Block shear at end connections", "not covered", "by hand"},
	{"E1", "General", "checked", "the least strength of all modes of buckling; phi_c = 0.90, Omega_c = 1.67"},
	{"E2", "Effective length, slenderness of 200", "checked", "the user note's limits are said with the assumptions; slenderness checks a limit that the member sets"},
	{"E3", "Flexural buckling", "checked", "flexural-buckling-major, flexural-buckling-minor"},
	{"E4(a)", "Torsional buckling of doubly symmetric members", "checked", "torsional-buckling"},
	{"E4(b), (c)", "Flexural-torsional buckling", "checked", "flexural-torsional-buckling"},
	{"E4(d) to (f)", "Lateral bracing off the shear centre", "not covered", "by hand: holds are taken at the shear centre"},
	{"E5", "Single angles", "checked", "flexural-buckling-minor where the member says connected by one leg; else as loaded in its centroid"},
	{"E6.1, E6.2(a)", "Pairs of angles", "checked", "the slenderness between connectors in flexural-buckling-minor or -major and flexural-torsional-buckling; connector-spacing"},
	{"E6.2(b) to (e)", "Built-up members otherwise", "not covered", "by hand: the connectors themselves, lacing, cover plates, and members of other shapes"},
	{"E7", "Slender elements", "checked", "local-buckling, and the strengths with the effective area"},
	{"E7.2", "Round HSS with slender walls", "checked", "up to D/t = 0.45 E/F_y, undecided beyond"},
}, clausesOfBending...), clausesOfAppendices...)
