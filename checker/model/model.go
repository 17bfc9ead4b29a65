// Package model is what a calculation means: materials, sections, cases,
// levels and members with every name resolved and every unit checked. All
// quantities are in coherent SI units (m, N, Pa, kg, rad).
package model

import (
	"kern/checker/action"
	"kern/checker/catalogue"
	"kern/checker/derivation"
	"kern/checker/section"
	"kern/lang"
	"kern/lang/unit"
)

// Calculation is one root file with all that it includes.
type Calculation struct {
	Root    string
	Files   []*lang.File
	Env     *Env
	Members []*Member // in the order of the files and of the lines
}

// Env is what the members of a calculation share.
type Env struct {
	Project      Project
	Basis        Basis
	Names        map[string]*Named
	Cases        []*Case
	Levels       []*Level
	Materials    []*Material
	Sections     []*Section
	Combinations []Combination // written out in the text, by name
	Values       lang.Values

	// Automatic are the combinations for ultimate limit states that the actions
	// standard makes; empty when there is none or when it could not (then Refused
	// says why).
	Automatic []Combination
	Refused   string
	// Exclusive are groups of cases, by index, of which one acts at a time.
	Exclusive [][]int
	// Assumed is what is assumed about the combinations, for every member.
	Assumed []string
	// SelfWeight is the index of the case that self-weight belongs to; it is a
	// case of its own, the last, when the calculation has no permanent case.
	SelfWeight int

	// Linked is set when a member may use the result of another.
	Linked bool

	Problems []lang.Diagnostic
	decls    []*lang.Decl // the declarations that made it, for comparison with a later text
	members  []*lang.Decl

	definitions []*Named
	service     func() []Combination // made when they are asked for first

	offer     map[NameKind][]string // the names of each kind, for offers
	imported  map[string]*Imported  // by member
	unread    []string              // forces statements whose tables could not be read
	late      []*lang.Value         // values that lean on results of members
	settled   map[*lang.Value]unit.Quantity
	results   Results
	caseNames []*Named // of each case; nil for those that nobody declared
}

// NameKind is what a name stands for.
type NameKind uint8

// What a name can stand for.
const (
	ValueName NameKind = iota
	MaterialName
	SectionName
	CaseName
	CombinationName
	LevelName
	MemberName
)

// String names the kind with its article.
func (k NameKind) String() string {
	return [...]string{"a value", "a material", "a section", "a load case", "a combination", "a level", "a member"}[k]
}

// Named is a name with where it was given.
type Named struct {
	Name  string
	Kind  NameKind
	Place lang.Place
	Stmt  *lang.Stmt
	Index int // into the Env's list of its kind
	Bad   bool
	// Twice is set when something else claims the name: nobody can tell which is
	// meant, so whoever uses it has no result.
	Twice bool
}

// Basis is the design basis.
type Basis struct {
	Stated      bool // there is a basis block
	Place       lang.Place
	Standard    string // "" when not stated
	StandardAt  lang.Place
	Method      string // of a standard that has several: "LRFD" or "ASD"
	Annex       string
	Actions     string     // "" when not stated
	ActionsAt   lang.Place // of ASCE/SEI 7 alone; Equation is its method
	Equation    string
	Combining   Combining
	Show        derivation.Units
	Overrides   map[string]Override // gamma_M0, factor_yield, …
	Recommended bool                // effective lengths: recommended design values
	SelfWeight  bool
	TableFy     bool // strengths from EN 1993-1-1 Table 3.1 rather than the product standard
	Nominal     bool // moments of loads off the centroid are nominal ones
	Reduction   Reduction
	Direct      bool // stability by the direct analysis method of ANSI/AISC 360 chapter C
	DirectAt    lang.Place
	Simple      bool // amplification 1/(1 - N/N_cr) for every moment diagram
	Exact       bool // critical loads of the whole member instead of effective lengths
	Imperfect   bool // members that can sway carry the forces of a sway imperfection
}

// Basic tells whether loads are combined by ASCE/SEI 7.
func (b *Basis) Basic() bool { return b.Actions == basicStandard }

// Override is a number of the standard that the calculation replaces.
type Override struct {
	Value   float64
	Because string
	Place   lang.Place
}

// Material is a steel grade or a material with stated values.
type Material struct {
	Name    string
	Place   lang.Place
	Grade   *catalogue.Grade // nil for stated values
	E, G    float64          // Pa
	Nu      float64          // Poisson's ratio; 0 when G is stated by itself
	Density float64          // kg/m3; NaN when not known
	Fy, Fu  float64          // Pa, of stated values; NaN when not known
	// Stronger is a factor on the strengths, with which sensitivities are found; 0 for
	// none. No text can say it.
	Stronger float64
	Assumed  []string
	Bad      bool
}

// StrengthOf is Strength for a section: an American grade depends on the form of
// the product besides the thickness.
func (m *Material) StrengthOf(s *Section, table31 bool) (fy, fu float64, source string, ok bool) {
	if m.Grade == nil || !m.Grade.American() {
		return m.Strength(s.Thickness, table31)
	}
	own, ok := m.Grade.For(s.Shape)
	if !ok {
		return unknown, unknown, "", false
	}
	of := *m
	of.Grade = &own
	return of.Strength(s.Thickness, table31)
}

// Strength is the yield and ultimate strength for a thickness in metres, and
// the row of the table it comes from. It is false when there is none. See
// StrengthOf for the strength in a section.
func (m *Material) Strength(thickness float64, table31 bool) (fy, fu float64, source string, ok bool) {
	if m.Stronger > 0 {
		plain := *m
		plain.Stronger = 0
		fy, fu, source, ok = plain.Strength(thickness, table31)
		return fy * m.Stronger, fu * m.Stronger, source, ok
	}
	if m.Grade == nil {
		return m.Fy, m.Fu, "stated", m.Fy > 0
	}
	if table31 {
		fy, fu, row, ok := m.Grade.Table31(thickness)
		return fy, fu, "EN 1993-1-1 Table 3.1, " + m.Grade.Name + ", " + row, ok
	}
	fy, fu, row, ok := m.Grade.Strength(thickness)
	return fy, fu, m.Grade.Standard + ", " + m.Grade.Name + ", " + row, ok
}

// Title is how a derivation names the material.
func (m *Material) Title() string {
	if m.Grade != nil {
		return m.Grade.Name
	}
	return m.Name
}

// Section is a cross-section with its computed properties.
type Section struct {
	Name        string
	Place       lang.Place
	Designation string // catalogue name, "" otherwise
	Standard    string // product standard, "" otherwise
	Shape       section.Shape
	section.Properties
	// Thickness decides the strength of a grade: the thickest part, m; NaN when
	// not known.
	Thickness float64
	// CurveMajor and CurveMinor are stated buckling curves ("" to look them up).
	CurveMajor, CurveMinor string
	CornerStated           bool // the corner radius of a tube is given, not that of a product standard
	Class                  int  // stated cross-section class, 0 to determine it
	Assumed                []string
	Bad                    bool
}

// Title is how a derivation names the section.
func (s *Section) Title() string {
	if s.Designation != "" {
		return s.Designation
	}
	return s.Name
}

// Case is a load case with where it was declared.
type Case struct {
	action.Case
	Place   lang.Place
	Given   string // the category as written
	Because string // why the case states psi values of its own
	Bad     bool
}

// Level is a height with the pressures on its floor.
type Level struct {
	Name      string
	At        float64 // m
	Place     lang.Place
	Pressures []Pressure
	Bad       bool
}

// Pressure is a load on each square metre of a level.
type Pressure struct {
	Case  int
	Value float64 // Pa
	Place lang.Place
}

// Combination is a combination with where it was declared (a nil declaration
// for automatic ones).
type Combination struct {
	action.Combination
	Label string // the name given in the text
	Place lang.Place
}

// Kind is what sort of member it is.
type Kind uint8

// The kinds of member.
const (
	Column Kind = iota
	Strut
	Tie
)

// String is the kind's word in the language.
func (k Kind) String() string { return [...]string{"column", "strut", "tie"}[k] }

// Axis is a bending axis of a member.
type Axis uint8

// The axes of a member.
const (
	Major Axis = iota
	Minor
)

// String is the axis's word in the language.
func (a Axis) String() string { return [...]string{"major", "minor"}[a] }

// Member is a column, strut or tie, ready to be checked.
type Member struct {
	Name, Title string
	Kind        Kind
	Decl        *lang.Decl
	NameSpan    lang.Span
	Stmt        *lang.Stmt

	Section   *Section
	Material  *Material
	SectionAt lang.Place
	MaterialAt,
	HeightAt lang.Place

	// Net is the area that holes leave, m2 (EN 1993-1-1 6.2.2.2); NaN when it is not
	// stated.
	Net   float64
	NetAt lang.Place
	// Lifts are the parts of the height with a section and material of their own,
	// from the base up and without gaps; none for a member of one section.
	Lifts     []Lift
	Height    float64 // m
	From      float64 // height of the base above datum, m
	Levels    bool    // it stands between levels: From is known
	Base, Top [2]action.End
	// BaseSpring and TopSpring hold the ends besides Base and Top, about each axis.
	BaseSpring, TopSpring [2]Spring
	Holds                 []Hold
	Exact                 bool              // critical loads of the whole member instead of effective lengths
	Imperfect             bool              // carries the forces of a sway imperfection where it can sway
	Joints                [2]*action.Joints // stiffness ratios of rigid joints: major, minor; nil for none
	Connectors            Connectors        // of a pair of angles
	Leg                   Leg               // the leg by which a single angle is connected
	Factor                [3]float64        // effective length factors of the user: major, minor, twist; 0 for none
	Loads                 []Load
	Imported              *Imported // forces from a table in place of loads; nil for none
	Weight                bool      // self-weight counts
	Nominal               bool      // moments of loads off the centroid are those of simple construction
	Reduction             Reduction

	Limits   Limits
	Requires []Require
	Departs  []Departure
	Notes    []string

	Assumed []string
	// Missing is why the member cannot be judged; its checks are then undecided.
	Missing []string
	Uses    []*Named
	As      *lang.Decl // the declaration it leans on, nil for none

	Problems []lang.Diagnostic
}

// Connectors are what connects the two angles of a pair between its ends.
type Connectors struct {
	Every float64 // distance between them, m; 0 when it is not stated
	Kind  string  // "welded", "pretensioned" or "snug"
	Place lang.Place
}

// Snug tells whether the connectors are bolts that are not pretensioned, which
// slip.
func (c Connectors) Snug() bool { return c.Kind == "snug" }

// Leg is the leg by which a single angle is connected at both ends.
type Leg struct {
	Long, Short bool
	Space       bool // web member of a box or space truss
	Place       lang.Place
}

// Stated tells whether the member is an angle that is connected by one leg.
func (l Leg) Stated() bool { return l.Long || l.Short }

// Hold is a point between the ends where the member is restrained.
type Hold struct {
	At                  float64 // height above the base, m
	Major, Minor, Twist bool
	Stiffness           float64 // of a spring, N/m; 0 for a rigid hold
	Place               lang.Place
}

// About tells whether the hold keeps the member from moving sideways where it
// bends about an axis.
func (h Hold) About(a Axis) bool { return a == Major && h.Major || a == Minor && h.Minor }

// Spring is an elastic hold of an end about one axis.
type Spring struct {
	Lateral float64 // against moving sideways, N/m; 0 for none
	Turning float64 // against turning, Nm/rad; 0 for none
}

// Sprung tells whether a spring holds the member about an axis.
func (m *Member) Sprung(a Axis) bool {
	for _, h := range m.Holds {
		if h.About(a) && h.Stiffness > 0 {
			return true
		}
	}
	return m.BaseSpring[a] != Spring{} || m.TopSpring[a] != Spring{}
}

// Sways tells whether an end of the member can move sideways about an axis.
func (m *Member) Sways(a Axis) bool { return !m.Base[a].Held() || !m.Top[a].Held() }

// RigidHolds are the heights of the holds about an axis that do not give, from
// the base up, m.
func (m *Member) RigidHolds(a Axis) []float64 {
	var out []float64
	for _, h := range m.Holds {
		if h.About(a) && h.Stiffness == 0 {
			out = append(out, h.At)
		}
	}
	return out
}

// LoadKind is how a load acts.
type LoadKind uint8

// The kinds of load.
const (
	AxialLoad LoadKind = iota // along the member, compression positive
	PointLoad                 // across the member
	LineLoad                  // across the member, per length
	EndMoment                 // a moment
)

// Load is one load of one case on a member.
type Load struct {
	Case   int
	Kind   LoadKind
	Value  float64 // N, N/m or Nm
	At, To float64 // heights above the base, m; To of a line load
	Axis   Axis    // of PointLoad, LineLoad and EndMoment
	// Offset is the distance of an axial load from the centroid: it bends the
	// member about the major and the minor axis, m.
	Offset [2]float64
	// Level and Area are the floor that an axial load comes from, m2; nil for a
	// load that is given as a force.
	Level *Level
	Area  float64
	Place lang.Place
}

// Limits are the bounds that a calculation sets itself; zero for none.
type Limits struct {
	Utilisation, Slenderness float64
	Sway, Deflection         Movement
	UtilisationAt            lang.Place
	SlendernessAt            lang.Place
}

// Movement is a limit of movements across the member.
type Movement struct {
	Limit float64 // of the movement of the top, m; 0 for none
	// Spans are the limits between the points that hold the member, m, in the order
	// of Member.Spans about each axis; nil for none.
	Spans [2][]float64
	Under action.Situation
	Place lang.Place
}

// Set tells whether there is such a limit.
func (l Movement) Set() bool { return l.Place.Decl != nil }

// Spans are the parts of the member between neighbouring points that something
// keeps in place about an axis, a spring too, from the base up, m; the whole
// member where there are no two of them.
func (m *Member) Spans(a Axis) [][2]float64 {
	var z []float64
	if m.Base[a].Held() || m.BaseSpring[a].Lateral > 0 {
		z = append(z, 0)
	}
	for _, h := range m.Holds {
		if h.About(a) {
			z = append(z, h.At)
		}
	}
	if m.Top[a].Held() || m.TopSpring[a].Lateral > 0 {
		z = append(z, m.Height)
	}
	if len(z) < 2 {
		return [][2]float64{{0, m.Height}}
	}
	var out [][2]float64
	for i := range len(z) - 1 {
		out = append(out, [2]float64{z[i], z[i+1]})
	}
	return out
}

// Require is a condition on a result.
type Require struct {
	Symbol   string
	Compare  string // < <= > >=
	Quantity unit.Quantity
	Value    *lang.Expr // what Quantity was written as
	Because  string
	Place    lang.Place
	SymbolAt lang.Span
}

// Departure is a rule that the member is allowed to break, with the reason.
type Departure struct {
	Rule, Because string
	Place         lang.Place
}
