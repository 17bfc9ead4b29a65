package drawing

// Style is how a path looks. There are few, so that pictures look alike.
type Style uint8

// The styles.
const (
	Outline    Style = iota // a thin line
	Strong                  // a thick line: the member itself, the resistance
	Faint                   // a hair line: dimensions, divisions
	Dashed                  // a thin dashed line: what is not there, a limit
	Axis                    // a chain line
	Accent                  // a thick line in the accent colour: what governs
	Fill                    // an area of steel with its outline
	Solid                   // an area full of ink: arrow heads, points
	Bar                     // an area of a pale tone without outline
	AccentFill              // an area of the accent colour
	AccentPale              // an area of a pale tone of the accent colour
	Ground                  // an area of the paper, to keep what is above it clear
)

// Look is what a style is drawn with.
type Look struct {
	Name   string    // of the class in SVG
	Line   Colour    // of the line, None for none
	Fill   Colour    // of the area, None for none
	Opaque float64   // of the area, 1 for opaque
	Width  float64   // of the line, mm
	Dashes []float64 // mm, nil for a full line
}

// Colour names a colour of the palette.
type Colour uint8

// The colours of the palette.
const (
	None Colour = iota
	Ink
	Grey
	Steel
	AccentColour
	Paper
)

// Looks gives every style's look.
var Looks = [...]Look{
	Outline:    {Name: "k-outline", Line: Ink, Width: 0.25},
	Strong:     {Name: "k-strong", Line: Ink, Width: 0.6},
	Faint:      {Name: "k-faint", Line: Grey, Width: 0.13},
	Dashed:     {Name: "k-dashed", Line: Grey, Width: 0.25, Dashes: []float64{1.2, 0.8}},
	Axis:       {Name: "k-axis", Line: Grey, Width: 0.2, Dashes: []float64{2.4, 0.6, 0.4, 0.6}},
	Accent:     {Name: "k-accent", Line: AccentColour, Width: 0.55},
	Fill:       {Name: "k-fill", Line: Ink, Fill: Steel, Opaque: 0.45, Width: 0.25},
	Solid:      {Name: "k-solid", Fill: Ink, Opaque: 1},
	Bar:        {Name: "k-bar", Fill: Steel, Opaque: 0.6},
	AccentFill: {Name: "k-accent-fill", Fill: AccentColour, Opaque: 1},
	AccentPale: {Name: "k-accent-pale", Fill: AccentColour, Opaque: 0.16},
	Ground:     {Name: "k-ground", Fill: Paper, Opaque: 1},
}

// Tone is the colour of words.
type Tone uint8

// The tones.
const (
	Plain Tone = iota
	Quiet
	Loud // the accent colour
)

// Tones gives every tone's class and colour.
var Tones = [...]struct {
	Name   string
	Colour Colour
}{
	Plain: {"k-plain", Ink},
	Quiet: {"k-quiet", Grey},
	Loud:  {"k-loud", AccentColour},
}

// Palette is a colour for each name, as #rrggbb.
type Palette [Paper + 1]string

// The palettes: on white paper, on a dark screen, and where the ground is not
// known and colours of middle lightness have to do.
var (
	Light  = Palette{Ink: "#1c2126", Grey: "#5d6770", Steel: "#aab4bd", AccentColour: "#a8450c", Paper: "#ffffff"}
	Dark   = Palette{Ink: "#e4e7ea", Grey: "#9aa4ad", Steel: "#66717b", AccentColour: "#f0a060", Paper: "#16191c"}
	Either = Palette{Ink: "#7f8c99", Grey: "#87919b", Steel: "#7f8c99", AccentColour: "#c8702a", Paper: "none"}
)
