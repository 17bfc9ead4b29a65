package section

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

// The range of any length that is taken for a real dimension (m). Below and
// above it a slip of the unit is certain; within it the arithmetic of this
// package keeps its accuracy.
const (
	smallest = 1e-5
	largest  = 100
)

// Fault is one thing about a shape that cannot be.
type Fault struct {
	Field   string  // the language's word for the dimension at fault
	Message string  // what is wrong, for people
	Limit   float64 // the bound that it breaks (m, or the pure number of a slope); 0 if there is none
}

// In is the message with its limit as show writes a length (m).
func (f Fault) In(show func(length float64) string) string {
	return strings.Replace(f.Message, millimetres(f.Limit), show(f.Limit), 1)
}

// ShapeError is the error for a shape whose geometry cannot be.
type ShapeError struct {
	Kind   Kind
	Faults []Fault // never empty
}

// Error lists the faults in one line.
func (e *ShapeError) Error() string {
	parts := make([]string, len(e.Faults))
	for i, f := range e.Faults {
		parts[i] = f.Message
	}
	return e.Kind.String() + ": " + strings.Join(parts, "; ")
}

var radiusWords = map[string]string{
	"root":  "root radius",
	"toe":   "toe radius",
	"outer": "outside corner radius",
	"inner": "inside corner radius",
}

// millimetres prints a length for a message.
func millimetres(v float64) string {
	return strconv.FormatFloat(v*1000, 'g', 6, 64) + " mm"
}

// dimension is a field of the shape with the word that the language has for it.
type dimension struct {
	word  string
	value float64
}

// dimensions sorts the fields of a shape by the part that they play in its
// kind: those that it needs, those that may be zero, and the rest, which must
// be.
func (s Shape) dimensions() (needed, optional, unused []dimension) {
	outside := "diameter"
	if s.Kind == Pipe {
		outside = "outside"
	}
	all := []dimension{
		{"depth", s.Depth}, {"width", s.Width}, {"web", s.Web}, {"flange", s.Flange}, {"wall", s.Wall},
		{outside, s.Diameter}, {"root", s.Root}, {"toe", s.Toe}, {"outer", s.OuterRadius}, {"inner", s.InnerRadius},
		{"taper", s.Taper}, {"taper at", s.TaperAt}, {"gap", s.Gap},
	}
	need, may := "", ""
	switch s.Kind {
	case Tube:
		need, may = "depth,width,wall", "outer,inner"
	case Pipe:
		need = "outside,wall"
	case Ellipse:
		need = "depth,width,wall"
	case Bar:
		need = "depth,width"
	case Rod:
		need = "diameter"
	case ISection, Tee, Channel:
		need, may = "depth,width,web,flange", "root,toe,taper,taper at"
	case Angle:
		need, may = "depth,width,wall", "root,toe"
	case DoubleAngle:
		need, may = "depth,width,wall", "root,toe,gap"
	}
	for _, d := range all {
		switch {
		case lists(need, d.word):
			needed = append(needed, d)
		case lists(may, d.word):
			optional = append(optional, d)
		default:
			unused = append(unused, d)
		}
	}
	return needed, optional, unused
}

func lists(words, word string) bool {
	for w := range strings.SplitSeq(words, ",") {
		if w == word {
			return true
		}
	}
	return false
}

// Check looks for geometry that cannot be: a dimension that is missing, not a
// number, negative or of impossible size, walls that meet, radii that do not
// fit, a dimension that the kind does not have. It gives nil for a sound shape.
// The kinds Unknown and Given have no geometry and always fail.
func (s Shape) Check() []Fault {
	if s.Kind == Unknown || s.Kind >= Given {
		return []Fault{{Field: "kind", Message: "a section of kind " + s.Kind.String() + " has no geometry"}}
	}
	var faults []Fault
	add := func(field string, limit float64, format string, args ...any) {
		faults = append(faults, Fault{field, fmt.Sprintf(format, args...), limit})
	}
	needed, optional, unused := s.dimensions()
	for _, d := range needed {
		switch {
		case math.IsNaN(d.value) || math.IsInf(d.value, 0):
			add(d.word, 0, "the %s is not a finite number", d.word)
		case d.value == 0:
			add(d.word, 0, "the %s is missing", d.word)
		case d.value < 0:
			add(d.word, 0, "the %s is negative", d.word)
		case d.value < smallest:
			add(d.word, smallest, "the %s is less than %s", d.word, millimetres(smallest))
		case d.value > largest:
			add(d.word, largest, "the %s is more than %d m", d.word, largest)
		}
	}
	for _, d := range optional {
		switch {
		case math.IsNaN(d.value) || math.IsInf(d.value, 0):
			add(d.word, 0, "the %s is not a finite number", d.word)
		case d.value < 0:
			add(d.word, 0, "the %s is negative", d.word)
		case d.value > largest:
			add(d.word, largest, "the %s is more than %d m", d.word, largest)
		}
	}
	for _, d := range unused {
		if d.value != 0 {
			add(d.word, 0, "a section of kind %s has no %s", s.Kind, d.word)
		}
	}
	if len(faults) > 0 {
		return faults
	}
	faults = s.checkParts()
	if len(faults) > 0 {
		return faults
	}
	for _, polygon := range s.corners() {
		for _, f := range crowded(polygon) {
			faults = addTightest(faults, f)
		}
	}
	return faults
}

// checkParts compares the parts of a shape, all of them finite, with each
// other.
func (s Shape) checkParts() []Fault {
	var faults []Fault
	// below demands value < limit. A part that fills its room to within a
	// thousandth of a per cent leaves nothing to compute with.
	below := func(field string, value, limit float64, message string) {
		if value >= limit*(1-1e-5) {
			faults = append(faults, Fault{field, message + " (" + millimetres(limit) + ")", limit})
		}
	}
	h, b := s.Depth, s.Width
	side := math.Min(h, b)
	sideWord := "width"
	if h < b {
		sideWord = "depth"
	}
	switch s.Kind {
	case Tube:
		below("wall", s.Wall, side/2, "the wall is not thinner than half the "+sideWord)
		if limit := s.InnerRadius + 2*s.Wall; s.OuterRadius > limit*(1+1e-9) {
			faults = append(faults, Fault{"outer",
				"the outside corner radius leaves too little wall at the corner: at most the inside radius and twice the wall (" + millimetres(limit) + ")", limit})
		}
	case Pipe:
		below("wall", s.Wall, s.Diameter/2, "the wall is not thinner than half the outside diameter")
	case Ellipse:
		// A wall of even thickness needs room within the outside's tightest bend.
		below("wall", s.Wall, side*side/(2*math.Max(h, b)), "the wall is not thinner than the outside's smallest radius of curvature")
	case ISection, Channel:
		below("web", s.Web, b, "the web is not thinner than the width")
		below("flange", s.Flange, h/2, "the flange is not thinner than half the depth")
		below("flange", s.Flange, b, "the flange is not thinner than the width")
	case Tee:
		below("web", s.Web, b, "the web is not thinner than the width")
		below("flange", s.Flange, h, "the flange is not thinner than the depth")
		below("flange", s.Flange, b, "the flange is not thinner than the width")
	case Angle, DoubleAngle:
		below("wall", s.Wall, side, "the wall is not thinner than the "+sideWord)
	}
	if s.Made == Welded && s.Root > 0 {
		faults = append(faults, Fault{Field: "root", Message: "a welded section is computed without root fillets"})
	}
	if len(faults) == 0 {
		faults = s.checkTaper()
	}
	return faults
}

// checkTaper looks at a taper flange from end to end.
func (s Shape) checkTaper() []Fault {
	if s.Taper == 0 {
		return nil // TaperAt says nothing then
	}
	// The flange from the web's face to its tip, where TaperAt counts from.
	room, face, b := s.Depth/2, s.Web/2, s.Width/2
	switch s.Kind {
	case Tee:
		room = s.Depth
	case Channel:
		face, b = s.Web, s.Width
	}
	switch {
	case s.Made == Welded:
		return []Fault{{Field: "taper", Message: "a welded section has parallel flanges"}}
	case s.TaperAt <= 0:
		return []Fault{{Field: "taper at", Message: "a taper needs the place at which the flange is measured"}}
	case s.TaperAt > b*(1+1e-9):
		return []Fault{{Field: "taper at", Message: "the flange is measured outside of the flange (" + millimetres(b) + ")", Limit: b}}
	}
	if s.flangeAt(b) < 1e-3*s.Flange {
		limit := s.Flange / (b - s.TaperAt)
		return []Fault{{Field: "taper", Message: fmt.Sprintf("the taper leaves no flange at the tip: less than %.3g %%", 100*limit), Limit: limit}}
	}
	if s.flangeAt(face) > room*(1-1e-5) {
		limit := (room - s.Flange) / (s.TaperAt - face)
		return []Fault{{Field: "taper", Message: fmt.Sprintf("the flanges meet at the web: less than %.3g %%", 100*limit), Limit: limit}}
	}
	return nil
}
