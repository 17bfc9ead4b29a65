package lang

import "slices"

// Context is a place where statements stand.
type Context string

// The contexts of the language.
const (
	InFile     Context = "file"     // between declarations
	InProject  Context = "project"  // in what the cover says
	InBasis    Context = "basis"    // in the design basis
	InLevel    Context = "level"    // in a level's block
	InMember   Context = "member"   // in a column, strut or tie
	InLift     Context = "lift"     // in the block of a lift of a member
	InMaterial Context = "material" // in a material's block
	InSection  Context = "section"  // in the block of a shape
)

// Form is a statement of the language: how it is written and what it says. The
// forms feed completion, signature help, hovers and the editors' grammars.
type Form struct {
	Word    string // the word it begins with
	In      Context
	Syntax  []string // capitals stand for what the writer puts in, [ ] for what may be left out
	Summary string   // one sentence
	Snippet string   // the statement with placeholders ${1:…} as editors know them
}

// Forms are the statements of the language, by context.
var Forms = []Form{
	{"include", InFile, []string{`include "FILE"`}, "Brings in the declarations of another file of the workspace.", `include "${1:common.kern}"`},
	{"forces", InFile, []string{`forces "FILE" compression positive|negative`}, "Takes the forces of members from a table of an analysis.", `forces "${1:frame.csv}" compression ${2|positive,negative|}`},
	{"project", InFile, []string{`project { … }`}, "What the cover of a printed sheet says: the project, who prepared and checked the calculation, revision and date.", "project {\n    name        \"${1:name}\"\n    number      \"${2:number}\"\n    prepared by \"${3:name}\"\n    revision    \"${4:A}\"\n    $0\n}"},
	{"basis", InFile, []string{`basis { … }`}, "The design basis, once in a calculation.", "basis {\n    standard \"${1:EN 1993-1-1:2005}\"\n    actions  \"${2:EN 1990:2002}\"\n    $0\n}"},
	{"material", InFile, []string{`material NAME = "GRADE" [per "STANDARD"]`, `material NAME { E = …; fy = …; density = … }`}, "A steel grade, or a material with stated values.", `material ${1:s355} = "${2:S355}"`},
	{"section", InFile, []string{`section NAME = "DESIGNATION"`, `section NAME = SHAPE { … }`}, "A cross-section: from the catalogue, or a shape with its dimensions.", `section ${1:post} = "${2:HEB 160}"`},
	{"case", InFile, []string{`case NAME permanent|dead`, `case NAME imposed|live "CATEGORY"`, `case NAME live`, `case NAME roof`, `case NAME snow "PLACE"`, `case NAME rain`, `case NAME wind`, `case NAME temperature`, `case NAME accidental`, `case NAME seismic`,
		`case NAME KIND ["CATEGORY"] psi_0 NUMBER[, psi_1 NUMBER, psi_2 NUMBER] because "REASON"`}, "A load case and what it is.", "case ${1:G} ${2|permanent,dead,imposed,live,roof,snow,rain,wind,temperature,accidental,seismic|}"},
	{"combination", InFile, []string{`combination NAME = FACTOR CASE + FACTOR CASE …`, `combination NAME SITUATION = FACTOR CASE + FACTOR CASE …`}, "A sum of cases, checked besides those that the basis makes.", "combination ${1:name} = ${2:1.1} ${3:G}"},
	{"exclusive", InFile, []string{`exclusive CASE, CASE[, CASE …]`}, "Cases of which one acts at a time, such as wind from one side and from another.", "exclusive ${1:W1}, ${2:W2}"},
	{"level", InFile, []string{`level NAME at HEIGHT [{ CASE LOAD; … }]`}, "A height of the building, with the loads on its floor.", "level ${1:name} at ${2:3.6 m}"},
	{"column", InFile, []string{`column NAME[, NAME …] ["TITLE"] { … }`, `column NAME ["TITLE"] as NAME { … }`}, "A column: what it is made of, how it is held, what it carries.", "column ${1:A1} \"${2:title}\" {\n    section  = ${3:\"HEB 160\"}\n    material = ${4:\"S355\"}\n    height   = ${5:3 m}\n    load ${6:80 kN} at top\n}"},
	{"strut", InFile, []string{`strut NAME[, NAME …] ["TITLE"] { … }`}, "A member of any slope in compression; its own weight is not counted.", "strut ${1:D1} \"${2:title}\" {\n    section  = ${3:\"CHS 114.3x5\"}\n    material = ${4:\"S355H\"}\n    length   = ${5:3 m}\n    load ${6:40 kN}\n}"},
	{"tie", InFile, []string{`tie NAME[, NAME …] ["TITLE"] { … }`}, "A member in tension; its own weight is not counted.", "tie ${1:T1} \"${2:title}\" {\n    section  = ${3:\"CHS 114.3x5\"}\n    material = ${4:\"S355H\"}\n    length   = ${5:3 m}\n    load ${6:-40 kN}\n}"},

	{"name", InProject, []string{`name "TEXT"`}, "What the project is called.", `name "${1:name}"`},
	{"number", InProject, []string{`number "TEXT"`}, "The number of the project or the job.", `number "${1:number}"`},
	{"prepared", InProject, []string{`prepared by "TEXT"`}, "Who made the calculation.", `prepared by "${1:name}"`},
	{"checked", InProject, []string{`checked by "TEXT"`}, "Who checked the calculation.", `checked by "${1:name}"`},
	{"revision", InProject, []string{`revision "TEXT"`}, "The revision of the calculation.", `revision "${1:A}"`},
	{"date", InProject, []string{`date "DATE"`}, "The date of the revision, year-month-day.", `date "${1:2026-03-31}"`},

	{"standard", InBasis, []string{`standard "NAME" [by LRFD|ASD] [annex "NAME"]`}, "The design standard that members are checked to.", `standard "${1:EN 1993-1-1:2005}"`},
	{"actions", InBasis, []string{`actions "EN 1990:2002" [annex "NAME"] [eq "6.10"]`, `actions "EN 1990:2002" [annex "NAME"] eq "6.10a/b"`, `actions "ASCE/SEI 7-22" by LRFD|ASD`}, "The standard that combinations are made by.", `actions "${1:EN 1990:2002}"`},
	{"permanent", InBasis, []string{`permanent cases together`, `permanent cases independent`}, "Whether all permanent cases have the upper or the lower factor together, or each by itself.", "permanent cases ${1|independent,together|}"},
	{"roofs", InBasis, []string{`roofs alone`, `roofs together`}, "Whether imposed loads on roofs (category H) act together with snow and wind.", "roofs ${1|together,alone|}"},
	{"accidental", InBasis, []string{`accidental psi_1`, `accidental psi_2`}, "The value of the leading variable action in accidental situations.", "accidental ${1|psi_2,psi_1|}"},
	{"show", InBasis, []string{`show UNIT[, UNIT …]`}, "Units that results are shown in.", "show ${1:kN, kNm, mm, MPa}"},
	{"effective", InBasis, []string{`effective lengths theoretical`, `effective lengths recommended`}, "Effective length factors of ideal ends, or those recommended for design.", "effective lengths ${1|recommended,theoretical|}"},
	{"stability", InBasis, []string{`stability direct`, `stability effective`}, "The method of stability of ANSI/AISC 360: direct analysis (chapter C) or effective lengths (Appendix 7).", "stability ${1|direct,effective|}"},
	{"lateral", InBasis, []string{`lateral buckling general`, `lateral buckling rolled`}, "The method of lateral-torsional buckling of EN 1993-1-1:2005: the general case (6.3.2.2), or that of rolled and equivalent welded I sections (6.3.2.3).", "lateral buckling ${1|rolled,general|}"},
	{"interaction", InBasis, []string{`interaction annex A`, `interaction annex B`}, "The annex of EN 1993-1-1:2005 that gives the interaction factors of bending and compression (6.3.3).", "interaction annex ${1|A,B|}"},
	{"selfweight", InBasis, []string{`selfweight on`, `selfweight off`}, "Whether members carry their own weight.", "selfweight ${1|off,on|}"},
	{"strengths", InBasis, []string{`strengths "product standard"`, `strengths "EN 1993-1-1 Table 3.1"`}, "Where the strength of a grade comes from.", `strengths "${1|product standard,EN 1993-1-1 Table 3.1|}"`},
	{"critical", InBasis, []string{`critical effective lengths`, `critical exact`}, "Whether critical loads are those of effective lengths, or those of whole members with their holds, springs and stepped forces.", "critical ${1|exact,effective lengths|}"},
	{"imperfection", InBasis, []string{`imperfection on`, `imperfection off`}, "Whether members that can sway carry the forces of a sway imperfection.", "imperfection ${1|on,off|}"},
	{"amplification", InBasis, []string{`amplification secant`, `amplification simple`}, "How the axial force amplifies moments in elastic theory.", "amplification ${1|secant,simple|}"},
	{"moments", InBasis, []string{`moments continuous`, `moments nominal`}, "Whether loads off the centroid bend the whole member, or make the nominal moments of simple construction.", "moments ${1|nominal,continuous|}"},
	{"reduce", InBasis, []string{`reduce imposed by storeys`, `reduce imposed by area`, `reduce live by tributary area K_LL NUMBER`, `reduce imposed off`}, "How the imposed loads of the floors that a member carries are reduced.", "reduce imposed by ${1|storeys,area|}"},
	{"reduction", InBasis, []string{`reduction = NUMBER because "REASON"`}, "A factor of its own on the imposed loads of floors.", "reduction = ${1:0.8} because \"${2:reason}\""},
	{"gamma_M0", InBasis, []string{`gamma_M0 = NUMBER because "REASON"`}, "Replaces the partial factor for cross-sections.", `gamma_M0 = ${1:1.0} because "${2:reason}"`},
	{"gamma_M1", InBasis, []string{`gamma_M1 = NUMBER because "REASON"`}, "Replaces the partial factor for buckling.", `gamma_M1 = ${1:1.0} because "${2:reason}"`},
	{"gamma_G_sup", InBasis, []string{`gamma_G_sup = NUMBER because "REASON"`}, "Replaces the factor of unfavourable permanent actions.", `gamma_G_sup = ${1:1.35} because "${2:reason}"`},
	{"gamma_G_inf", InBasis, []string{`gamma_G_inf = NUMBER because "REASON"`}, "Replaces the factor of favourable permanent actions.", `gamma_G_inf = ${1:1.0} because "${2:reason}"`},
	{"gamma_Q", InBasis, []string{`gamma_Q = NUMBER because "REASON"`}, "Replaces the factor of variable actions.", `gamma_Q = ${1:1.5} because "${2:reason}"`},
	{"xi", InBasis, []string{`xi = NUMBER because "REASON"`}, "Replaces the factor that reduces unfavourable permanent actions in (6.10b).", `xi = ${1:0.85} because "${2:reason}"`},
	{"factor_yield", InBasis, []string{`factor_yield = NUMBER`}, "Factor of safety against first yield, elastic theory.", "factor_yield = ${1:1.5}"},
	{"factor_buckling", InBasis, []string{`factor_buckling = NUMBER`}, "Factor of safety against buckling, elastic theory.", "factor_buckling = ${1:2.0}"},

	{"section", InMember, []string{`section = NAME`, `section = "DESIGNATION"`, `section = SHAPE { … }`}, "The member's cross-section.", "section = ${1:\"HEB 160\"}"},
	{"material", InMember, []string{`material = NAME`, `material = "GRADE"`}, "What the member is made of.", "material = ${1:\"S355\"}"},
	{"height", InMember, []string{`height = LENGTH`}, "The height of the member.", "height = ${1:3 m}"},
	{"length", InMember, []string{`length = LENGTH`}, "The length of the member.", "length = ${1:3 m}"},
	{"from", InMember, []string{`from LEVEL to LEVEL`}, "The levels between which the member stands.", "from ${1:ground} to ${2:roof}"},
	{"lift", InMember, []string{`lift PLACE to PLACE { section = …; material = … }`}, "A part of the height with a section or a material of its own.", "lift ${1:ground} to ${2:first} { section = ${3:\"HEB 200\"} }"},
	{"base", InMember, []string{`base pinned|fixed|free|guided [about major|minor]`, `base spring MOMENT/ANGLE [about major|minor]`, `base spring FORCE/LENGTH [about major|minor]`}, "How the lower end is held.", "base ${1|pinned,fixed,free,guided|}"},
	{"top", InMember, []string{`top pinned|fixed|free|guided [about major|minor]`, `top spring MOMENT/ANGLE [about major|minor]`, `top spring FORCE/LENGTH [about major|minor]`}, "How the upper end is held.", "top ${1|pinned,fixed,free,guided|}"},
	{"hold", InMember, []string{`hold major|minor|both|twist at PLACE`, `hold major|minor|both at PLACE stiffness FORCE/LENGTH`}, "A point between the ends that is restrained.", "hold ${1|both,minor,major,twist|} at ${2:height / 2}"},
	{"effective", InMember, []string{`effective = NUMBER [about major|minor|twist]`}, "The effective length factor, where the calculation knows better than the ends.", "effective = ${1:0.85} about ${2|minor,major,twist|}"},
	{"joints", InMember, []string{`joints NUMBER at base|top, NUMBER at base|top about major|minor sway|braced`}, "Stiffness ratios of the joints of a rigid frame (columns over beams), from which the effective length factor follows.", "joints ${1:1.2} at base, ${2:2.0} at top about ${3|major,minor|} ${4|sway,braced|}"},
	{"connected", InMember, []string{`connected by long|short leg [space]`}, "The leg by which a single angle is connected at both ends; space for web members of box and space trusses.", "connected by ${1|long,short|} leg"},
	{"net", InMember, []string{`net = AREA`}, "The area that holes leave across the path of failure in tension.", "net = ${1:17.2 cm2}"},
	{"connectors", InMember, []string{`connectors every LENGTH welded|pretensioned|snug`}, "What connects the two angles of a pair between its ends, and how far apart.", "connectors every ${1:600 mm} ${2|welded,pretensioned,snug|}"},
	{"choose", InMember, []string{`choose section from FAMILY[, FAMILY …] [with depth|width <= LENGTH [and depth|width <= LENGTH]]`}, "The sections that the member may have: it tells where a lighter one of them would do.", "choose section from ${1:HEB, HEA} with ${2|depth,width|} <= ${3:200 mm}"},
	{"load", InMember, []string{
		`load [CASE] FORCE [at PLACE] [offset LENGTH about AXIS [and LENGTH about AXIS]]`,
		`load [CASE] FORCE across AXIS at PLACE`,
		`load [CASE] FORCE/LENGTH about AXIS [from PLACE to PLACE]`,
		`load [CASE] MOMENT about AXIS [at PLACE]`,
		`load floor AREA at LEVEL [offset LENGTH about AXIS]`,
	}, "What the member carries: along it, across it, or turning it.", "load ${1:80 kN} at ${2:top}"},
	{"limit", InMember, []string{`limit utilisation = NUMBER`, `limit slenderness = NUMBER`, `limit sway = LENGTH [under characteristic|frequent|quasipermanent]`, `limit deflection = LENGTH [under characteristic|frequent|quasipermanent]`}, "A bound that the calculation sets itself.", "limit ${1|utilisation,slenderness,sway,deflection|} = ${2:0.95}"},
	{"require", InMember, []string{`require RESULT >= VALUE [because "REASON"]`}, "A condition on a result.", "require ${1:N_b_minor} >= ${2:400 kN} because \"${3:reason}\""},
	{"depart", InMember, []string{`depart RULE because "REASON"`}, "A check that the member is allowed to break, with the reason.", "depart ${1:slenderness} because \"${2:reason}\""},
	{"critical", InMember, []string{`critical effective lengths`, `critical exact`}, "Whether this member's critical loads are those of effective lengths, or those of the whole member.", "critical ${1|exact,effective lengths|}"},
	{"imperfection", InMember, []string{`imperfection on`, `imperfection off`}, "Whether this member carries the forces of a sway imperfection where it can sway.", "imperfection ${1|on,off|}"},
	{"selfweight", InMember, []string{`selfweight on`, `selfweight off`}, "Whether this member carries its own weight.", "selfweight ${1|off,on|}"},
	{"moments", InMember, []string{`moments continuous`, `moments nominal`}, "Whether loads off the centroid bend the whole member, or make the nominal moments of simple construction.", "moments ${1|nominal,continuous|}"},
	{"reduce", InMember, []string{`reduce imposed by storeys`, `reduce imposed by area`, `reduce live by tributary area K_LL NUMBER`, `reduce imposed off`}, "How the imposed loads of the floors that the member carries are reduced.", "reduce imposed by ${1|storeys,area|}"},
	{"reduction", InMember, []string{`reduction = NUMBER because "REASON"`}, "A factor of its own on the imposed loads of floors.", "reduction = ${1:0.8} because \"${2:reason}\""},
	{"note", InMember, []string{`note "TEXT"`}, "A remark that goes with the results.", `note "${1:text}"`},

	{"section", InLift, []string{`section = NAME`, `section = "DESIGNATION"`, `section = SHAPE { … }`}, "The cross-section of the lift.", "section = ${1:\"HEB 200\"}"},
	{"material", InLift, []string{`material = NAME`, `material = "GRADE"`}, "What the lift is made of.", "material = ${1:\"S355\"}"},

	{"E", InMaterial, []string{`E = STRESS`}, "Young's modulus.", "E = ${1:210 GPa}"},
	{"G", InMaterial, []string{`G = STRESS`}, "Shear modulus; from E and nu when it is not given.", "G = ${1:81 GPa}"},
	{"nu", InMaterial, []string{`nu = NUMBER`}, "Poisson's ratio; 0.3 when it is not given.", "nu = ${1:0.3}"},
	{"fy", InMaterial, []string{`fy = STRESS`}, "Yield strength.", "fy = ${1:355 MPa}"},
	{"fu", InMaterial, []string{`fu = STRESS`}, "Ultimate strength.", "fu = ${1:490 MPa}"},
	{"density", InMaterial, []string{`density = DENSITY`}, "Mass per volume, for self-weight.", "density = ${1:7850 kg/m3}"},

	{"depth", InSection, []string{`depth = LENGTH`}, "Overall depth; an angle's upright leg.", "depth = ${1:200 mm}"},
	{"width", InSection, []string{`width = LENGTH`}, "Overall width; an angle's lying leg.", "width = ${1:100 mm}"},
	{"web", InSection, []string{`web = LENGTH`}, "Thickness of the web or stem.", "web = ${1:8 mm}"},
	{"flange", InSection, []string{`flange = LENGTH`}, "Thickness of the flange.", "flange = ${1:12 mm}"},
	{"wall", InSection, []string{`wall = LENGTH`}, "Thickness of a tube's, pipe's or angle's wall.", "wall = ${1:6.3 mm}"},
	{"outside", InSection, []string{`outside = LENGTH`}, "Outside diameter of a pipe.", "outside = ${1:168.3 mm}"},
	{"diameter", InSection, []string{`diameter = LENGTH`}, "Diameter of a rod.", "diameter = ${1:50 mm}"},
	{"gap", InSection, []string{`gap = LENGTH`}, "Clear distance between the backs of a double angle; 0 when they touch.", "gap = ${1:10 mm}"},
	{"root", InSection, []string{`root = LENGTH`}, "Radius of the fillet between web and flange, or legs.", "root = ${1:12 mm}"},
	{"toe", InSection, []string{`toe = LENGTH`}, "Radius at the free edges.", "toe = ${1:6 mm}"},
	{"corner", InSection, []string{`corner = LENGTH`}, "Outside radius of a tube's corners.", "corner = ${1:12 mm}"},
	{"made", InSection, []string{`made = hot|cold|welded|rolled`}, "How the section is made, which decides its buckling curve.", "made = ${1|hot,cold,welded,rolled|}"},
	{"A", InSection, []string{`A = AREA`}, "Stated area.", "A = ${1:24.1 cm2}"},
	{"I_major", InSection, []string{`I_major = LENGTH^4`}, "Stated second moment of area about the major axis.", "I_major = ${1:612 cm4}"},
	{"I_minor", InSection, []string{`I_minor = LENGTH^4`}, "Stated second moment of area about the minor axis.", "I_minor = ${1:201 cm4}"},
	{"W_major", InSection, []string{`W_major = LENGTH^3`}, "Stated elastic modulus about the major axis.", "W_major = ${1:92 cm3}"},
	{"W_minor", InSection, []string{`W_minor = LENGTH^3`}, "Stated elastic modulus about the minor axis.", "W_minor = ${1:41 cm3}"},
	{"Wpl_major", InSection, []string{`Wpl_major = LENGTH^3`}, "Stated plastic modulus about the major axis.", "Wpl_major = ${1:105 cm3}"},
	{"Wpl_minor", InSection, []string{`Wpl_minor = LENGTH^3`}, "Stated plastic modulus about the minor axis.", "Wpl_minor = ${1:62 cm3}"},
	{"A_v_major", InSection, []string{`A_v_major = AREA`}, "Stated shear area that goes with bending about the major axis.", "A_v_major = ${1:12 cm2}"},
	{"A_v_minor", InSection, []string{`A_v_minor = AREA`}, "Stated shear area that goes with bending about the minor axis.", "A_v_minor = ${1:12 cm2}"},
	{"I_t", InSection, []string{`I_t = LENGTH^4`}, "Stated torsion constant.", "I_t = ${1:9 cm4}"},
	{"I_w", InSection, []string{`I_w = LENGTH^6`}, "Stated warping constant.", "I_w = ${1:12000 cm6}"},
	{"thickness", InSection, []string{`thickness = LENGTH`}, "Stated thickness that decides the strength.", "thickness = ${1:8 mm}"},
	{"class", InSection, []string{`class = 1|2|3`}, "Stated class of the cross-section.", "class = ${1|1,2,3|}"},
	{"curve", InSection, []string{`curve = a0|a|b|c|d`}, "Stated buckling curve about both axes.", "curve = ${1|c,a0,a,b,d|}"},
	{"curve_major", InSection, []string{`curve_major = a0|a|b|c|d`}, "Stated buckling curve about the major axis.", "curve_major = ${1|c,a0,a,b,d|}"},
	{"curve_minor", InSection, []string{`curve_minor = a0|a|b|c|d`}, "Stated buckling curve about the minor axis.", "curve_minor = ${1|c,a0,a,b,d|}"},
}

// FormsIn are the forms of a context, in order.
func FormsIn(in Context) []Form {
	var out []Form
	for _, f := range Forms {
		if f.In == in {
			out = append(out, f)
		}
	}
	return out
}

// WordsIn lists the words that begin the statements of a context, each once, in
// the order of the table.
func WordsIn(in Context) []string {
	var out []string
	for _, f := range Forms {
		if f.In == in && !slices.Contains(out, f.Word) {
			out = append(out, f.Word)
		}
	}
	return out
}

// Words explains the other words of the language: those that stand inside
// statements.
var Words = map[string]string{
	"tube": "square or rectangular hollow section", "pipe": "circular hollow section", "bar": "solid rectangle", "rod": "solid round",
	"isection": "I or H section", "channel": "U section", "tee": "T section", "angle": "L section", "doubleangle": "two equal L sections back to back", "given": "a section whose properties are stated",
	"pinned": "held in place, free to turn", "fixed": "held in place and against turning", "free": "not held", "guided": "free to move sideways, held against turning",
	"major": "the section's strong axis", "minor": "the section's weak axis", "both": "both axes", "twist": "turning about the member's own axis",
	"at": "where it acts", "about": "the axis that it bends about", "across": "across the member, bending it about an axis", "offset": "off the centroid", "and": "also about the other axis",
	"from": "from a place", "to": "to a place", "top": "the upper end", "as": "like another member, but for what is said here", "per": "by a product standard",
	"by": "by whom, or by which method", "LRFD": "load and resistance factor design", "ASD": "allowable strength design",
	"annex": "a set of national values", "eq": "the equation of the combinations", "because": "the reason", "floor": "an area of floor that the member carries",
	"hot": "hot finished (EN 10210)", "cold": "cold formed (EN 10219)", "welded": "built up by welding", "rolled": "hot rolled",
	"compression": "pressing along the member", "positive": "more than zero", "negative": "less than zero",
	"permanent": "acts always", "imposed": "people, goods, vehicles", "snow": "snow", "wind": "wind", "temperature": "temperature",
	"dead": "acts always", "live": "people, goods, vehicles", "roof": "live load of a roof", "rain": "rain",
	"accidental": "impact, explosion or another accident", "seismic": "earthquake", "persistent": "for persistent and transient situations",
	"characteristic": "for deflections that do not go back", "frequent": "for deflections that go back", "quasipermanent": "for deflections that last",
	"psi_0": "the combination value of a variable action", "psi_1": "its frequent value", "psi_2": "its quasi-permanent value",
	"cases": "load cases", "together": "at the same time", "alone": "not at the same time", "independent": "each by itself",
	"on": "counted", "off": "not counted", "lengths": "effective lengths", "theoretical": "of ideal ends", "recommended": "recommended for design",
	"general": "for all sections", "buckling": "the method of lateral-torsional buckling",
	"continuous": "of the member as a continuous beam", "nominal": "of simple construction, at each level by itself",
	"storeys": "the number of storeys above (alpha_n)", "area": "the area of floor above (alpha_A)", "tributary": "that a member carries",
	"K_LL":   "the live load element factor",
	"secant": "the secant formula", "simple": "1/(1 - N/N_cr)", "utilisation": "demand over capacity", "slenderness": "effective length over radius of gyration",
	"sway": "sideways movement of the top", "deflection": "sideways movement from the line between neighbouring holds", "span": "the distance of neighbouring holds",
	"under": "in which combinations", "spring": "an elastic hold of an end", "stiffness": "force by movement, or moment by rotation", "exact": "of the whole member",
	"braced": "the joints cannot move sideways against each other", "direct": "the direct analysis method", "effective": "effective lengths",
	"every": "the distance between them", "pretensioned": "by pretensioned bolts", "snug": "by bolts that are not pretensioned",
	"long": "the longer leg of an angle", "short": "the shorter leg of an angle", "leg": "one of the two plates of an angle", "space": "web member of a box or space truss",
}
