// Package section computes the properties of cross-sections from their
// dimensions. Lengths are metres throughout; derived properties are in the
// matching powers of the metre.
package section

// Kind is the family of shapes that a cross-section belongs to.
type Kind uint8

// The kinds of cross-section that the language can describe.
const (
	Unknown     Kind = iota
	Tube             // square or rectangular hollow section
	Pipe             // circular hollow section
	Bar              // solid rectangle
	Rod              // solid round
	ISection         // I or H, doubly symmetric, rolled or welded
	Channel          // U, web and two flanges on one side
	Tee              // T, one flange on top of a stem
	Angle            // L, equal or unequal legs
	Ellipse          // elliptical hollow section
	DoubleAngle      // two equal L back to back, one the mirror image of the other
	Given            // properties stated by the user, no geometry
)

// Made is how a section was produced, which decides its residual stresses and
// so its buckling curve.
type Made uint8

// The ways of making a section.
const (
	MadeUnknown Made = iota
	Rolled           // hot rolled open section
	Hot              // hot finished hollow section (EN 10210)
	Cold             // cold formed hollow section (EN 10219)
	Welded           // built up by welding
)

// Junction names the formula by which the junctions of web and flanges count in
// the torsion constant of a rolled I or H section. Two are published, and the
// tables of different countries follow different ones.
type Junction uint8

// The junction formulas.
const (
	// ByProducer is the formula behind the tables of the European producers,
	// TorsionProducer, at most 1.075 times the other one.
	ByProducer Junction = iota
	// ByElDarwishJohnston is the formula behind the UK tables,
	// TorsionElDarwishJohnston.
	ByElDarwishJohnston
)

// Shape is the geometry of a cross-section as it stands on paper: the web
// vertical, the flanges horizontal, x to the right and y up. All lengths are
// in metres. Fields that a kind does not use are zero.
type Shape struct {
	Kind Kind
	Made Made

	Depth  float64 // overall depth h, along y (Tube, Ellipse, Bar, ISection, Channel, Tee, Angle: vertical leg; DoubleAngle: the legs back to back)
	Width  float64 // overall width b, along x (flange width; Angle: horizontal leg; DoubleAngle: the outstanding leg of one angle)
	Web    float64 // web or stem thickness t_w
	Flange float64 // flange thickness t_f; for a taper flange the thickness at TaperAt
	Wall   float64 // wall thickness t (Tube, Pipe, Ellipse, Angle, DoubleAngle)
	Gap    float64 // clear distance between the backs of a DoubleAngle, 0 for legs that touch

	Diameter float64 // outside diameter (Pipe, Rod)

	Root float64 // root fillet radius r between web and flange, or in an angle's heel
	Toe  float64 // toe radius at the free edges of flanges or legs (rolled angles and sections with taper flanges)

	OuterRadius float64 // outside corner radius of a Tube
	InnerRadius float64 // inside corner radius of a Tube

	Taper   float64 // slope of the inner flange face (0.08 for 8 %), 0 for parallel flanges
	TaperAt float64 // distance at which Flange is measured: from the web's back (Channel), from the web's middle (ISection, Tee)

	// Junction says by which formula a rolled ISection's torsion constant is
	// found; other kinds take no notice of it.
	Junction Junction
}
