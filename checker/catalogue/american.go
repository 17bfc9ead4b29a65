package catalogue

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"kern/checker/section"
)

// inch is the length of the American dimensions in metres.
const inch = 0.0254

// The American product standards.
const (
	astmRolled = "ASTM A6"
	astmPipe   = "ASTM A53"
	astmHollow = "ASTM A500"
)

// coldWall is the part of the nominal wall that counts in hollow sections whose
// standard allows for a thinner wall, AISC 360 B4.2 (from memory).
const coldWall = 0.93

// torsionAmerican is what Entry.Torsion says of the rolled American shapes.
const torsionAmerican = torsionJunction

// American tells that the section is one of the American standards, whose
// dimensions are inches.
func (e Entry) American() bool { return strings.HasPrefix(e.Standard, "ASTM ") }

// americanEntries returns every listed American section in the order in which
// All gives them.
func americanEntries() []Entry {
	var out []Entry
	lines := func(family, text string, shape func(d []float64) section.Shape) []Entry {
		first := len(out)
		for line := range strings.Lines(text) {
			if name, d, ok := americanLine(line); ok {
				out = append(out, Entry{Designation: name, Family: family, Standard: astmRolled, Product: OpenSection,
					Listed: true, Shape: shape(d), Torsion: torsionAmerican})
			}
		}
		return bySize(out[first:])
	}
	wide := lines("W", wideFlangeLines, parallelBeam)
	miscellaneous := lines("M", miscellaneousBeamLines, parallelBeam)
	standard := lines("S", standardBeamLines, taperBeam)
	lines("HP", bearingPileLines, parallelBeam)
	lines("C", standardChannelLines, americanChannel)
	lines("MC", miscellaneousChannelLines, americanChannel)
	angles := americanAngles()
	out = append(out, angles...)
	for _, parents := range [][]Entry{wide, miscellaneous, standard} {
		var tees []Entry
		for _, e := range parents {
			if tee, ok := americanTee(e); ok {
				tees = append(tees, tee)
			}
		}
		out = append(out, bySize(tees)...)
	}
	for _, e := range angles {
		out = append(out, americanPairs(e)...)
	}
	out = append(out, americanHollow()...)
	slices.SortStableFunc(out, func(a, b Entry) int { return cmp.Compare(americanOrder[a.Family], americanOrder[b.Family]) })
	return out
}

// americanOrder is the order of the families in All.
var americanOrder = map[string]int{"W": 1, "M": 2, "S": 3, "HP": 4, "C": 5, "MC": 6, "L": 7, "WT": 8, "MT": 9, "ST": 10, "2L": 11, "HSS": 12, "PIPE": 13}

// bySize sorts the entries of one family by the numbers of their designations.
func bySize(list []Entry) []Entry {
	size := make(map[string][]int64, len(list))
	for _, e := range list {
		n, ok := parseAmerican(e.Designation)
		if !ok {
			panic("catalogue: bad designation " + e.Designation)
		}
		size[e.Designation] = n.size
	}
	slices.SortStableFunc(list, func(a, b Entry) int { return slices.Compare(size[a.Designation], size[b.Designation]) })
	return list
}

// americanLine reads a designation and dimensions in inches. A line that cannot
// be read is a mistake in the table, not in any input, and stops the program.
func americanLine(line string) (name string, d []float64, ok bool) {
	fields := strings.Fields(line)
	if len(fields) == 0 {
		return "", nil, false
	}
	d = make([]float64, len(fields)-1)
	for i, f := range fields[1:] {
		v, ok := parseInches(f)
		if !ok && f != "0" {
			panic("catalogue: bad line " + line)
		}
		d[i] = float64(v) / inchUnits
	}
	return fields[0], d, true
}

// beam makes an I or H section from depth, width, web, flange and root radius.
func beam(d []float64) section.Shape {
	return section.Shape{
		Kind: section.ISection, Made: section.Rolled, Junction: section.ByElDarwishJohnston,
		Depth: d[0] * inch, Width: d[1] * inch, Web: d[2] * inch, Flange: d[3] * inch, Root: d[4] * inch,
	}
}

func parallelBeam(d []float64) section.Shape { return beam(d) }

// taperBeam makes a beam whose flanges slope 1 : 6, their mean thickness halfway
// between the web's face and the tip; the last dimension is the toe radius.
func taperBeam(d []float64) section.Shape {
	s := beam(d)
	s.Toe, s.Taper, s.TaperAt = d[5]*inch, 1.0/6, (s.Width+s.Web)/4
	return s
}

// americanChannel makes a channel with the slope of its flanges as the last
// dimension.
func americanChannel(d []float64) section.Shape {
	s := beam(d)
	s.Kind, s.Junction = section.Channel, 0
	s.Toe, s.Taper, s.TaperAt = d[5]*inch, d[6], (s.Width+s.Web)/2
	return s
}

// withoutTees are the shapes that AISC's list has no tees of.
var withoutTees = map[string]bool{"W44X408": true, "W44X368": true, "M4X4.08": true, "M3X2.9": true}

// americanTee returns the tee of half the depth and half the mass cut from a W,
// M or S. What the cut takes is left out of account, as in AISC's list.
func americanTee(e Entry) (Entry, bool) {
	if withoutTees[e.Designation] {
		return Entry{}, false
	}
	n, ok := parseAmerican(e.Designation)
	if !ok {
		return Entry{}, false
	}
	e.Family += "T"
	e.Designation = e.Family + decimalInches(n.size[0]/2) + "X" + decimalInches(n.size[1]/2)
	if e.Designation == "ST3X8.625" {
		e.Designation = "ST3X8.6" // AISC rounds this one alone
	}
	e.Shape.Kind, e.Shape.Junction = section.Tee, 0
	e.Shape.Depth /= 2
	return e, true
}

// americanAngles reads the table of angles.
func americanAngles() []Entry {
	var out []Entry
	for line := range strings.Lines(americanAngleLines) {
		head, tail, found := strings.Cut(line, ":")
		if !found {
			continue
		}
		legs, d, _ := americanLine(head)
		long, short, _ := strings.Cut(legs, "X")
		a, b := mustInches(long), mustInches(short)
		for field := range strings.FieldsSeq(tail) {
			out = append(out, Entry{
				Designation: "L" + legs + "X" + field, Family: "L", Standard: astmRolled, Product: OpenSection, Listed: true, Torsion: torsionAmerican,
				Shape: section.Shape{
					Kind: section.Angle, Made: section.Rolled, Depth: metresOf(a), Width: metresOf(b), Wall: metresOf(mustInches(field)),
					Root: d[0] * inch, Toe: min(d[1]*inch, metresOf(mustInches(field))),
				},
			})
		}
	}
	return bySize(out)
}

// mustInches reads a number of the tables.
func mustInches(text string) int64 {
	v, ok := parseInches(text)
	if !ok {
		panic("catalogue: bad number " + text)
	}
	return v
}

// americanPairs returns the double angles of an angle that AISC lists: equal
// legs, or the long and the short legs back to back, each with three gaps.
func americanPairs(e Entry) []Entry {
	gaps := []int64{0, 3 * inchUnits / 8, 3 * inchUnits / 4}
	if e.Shape.Depth >= 10*inch {
		gaps = []int64{0, 3 * inchUnits / 4, 3 * inchUnits / 2}
	}
	backs := []string{""}
	if e.Shape.Depth != e.Shape.Width {
		backs = []string{longBacks, shortBacks}
	}
	var out []Entry
	for _, back := range backs {
		for _, gap := range gaps {
			out = append(out, pairOf(e, gap, back, true))
		}
	}
	return out
}

// The words for the legs that stand back to back.
const (
	longBacks  = "LLBB"
	shortBacks = "SLBB"
)

// pairOf makes a double angle: gap in inchUnits between the backs.
func pairOf(e Entry, gap int64, back string, listed bool) Entry {
	e.Designation = "2" + e.Designation
	if gap > 0 {
		e.Designation += "X" + fractionInches(gap)
	}
	if back != "" {
		e.Designation += " " + back
	}
	e.Family, e.Listed = "2L", listed
	e.Shape.Kind, e.Shape.Gap = section.DoubleAngle, metresOf(gap)
	if back == shortBacks {
		e.Shape.Depth, e.Shape.Width = e.Shape.Width, e.Shape.Depth
	}
	return e
}

// americanHollow returns the hollow structural sections and the pipes.
func americanHollow() []Entry {
	var out []Entry
	for _, list := range []string{americanSquareLines, americanRectangularLines, americanRoundLines} {
		var sizes []Entry
		for line := range strings.Lines(list) {
			head, tail, found := strings.Cut(strings.TrimSpace(line), ":")
			if !found {
				continue
			}
			var h hollowInches
			long, short, two := strings.Cut(head, "x")
			h.a = mustInches(long)
			switch {
			case two:
				h.b = mustInches(short)
			case list == americanSquareLines:
				h.b = h.a
			}
			for field := range strings.FieldsSeq(tail) {
				h.t = mustInches(field)
				if !h.sane() {
					panic("catalogue: bad wall in line " + line)
				}
				sizes = append(sizes, h.entry(true))
			}
		}
		out = append(out, bySize(sizes)...)
	}
	var pipes []Entry
	for line := range strings.Lines(pipeLines) {
		name, d, ok := americanLine(line)
		if !ok {
			continue
		}
		for i, weight := range pipeWeights {
			if wall := d[1+i]; wall > 0 {
				part := coldWall
				if weight == "XS" && d[0] >= largePipe {
					part = largePipeWall
				}
				pipes = append(pipes, Entry{
					Designation: "Pipe " + name + " " + weight, Family: "PIPE", Standard: astmPipe, Product: SteelPipe, Listed: true, Torsion: torsionExact,
					Shape: section.Shape{Kind: section.Pipe, Made: section.Cold, Diameter: d[0] * inch, Wall: part * wall * inch},
				})
			}
		}
	}
	return append(out, bySize(pipes)...)
}

// What AISC's list prints of the pipes XS from 14 in. up belongs to 0.90 of the
// nominal wall, though it states 0.93 as the standard does: the lower one is taken.
const (
	largePipe     = 14 // in
	largePipeWall = 0.90
)

// pipeWeights are the weights of a pipe: standard, extra strong and double
// extra strong.
var pipeWeights = []string{"STD", "XS", "XXS"}

// hollowInches is the size of an American hollow section in inchUnits: a round
// one has b = 0. standard is the product standard, "" for A500.
type hollowInches struct {
	a, b, t  int64
	standard string
}

// sane tells whether the size can be made.
func (h hollowInches) sane() bool {
	const largest, thinnest = 48 * inchUnits, inchUnits / 25
	if h.a > largest || h.t < thinnest {
		return false
	}
	if h.b == 0 {
		// The designation of a round section has three decimals.
		const thousandth = inchUnits / 1000
		t := sixteenth(h.t)
		return h.a >= inchUnits/2 && 2*h.t < h.a && h.a%thousandth == 0 && (t%thousandth == 0 || t%(inchUnits/16) == 0)
	}
	// The corners have twice the wall outside.
	return h.b >= inchUnits/2 && h.b <= h.a && 4*h.t <= h.b
}

// fullWalls are the standards of hollow sections whose nominal wall counts in
// full, AISC 360 B4.2 (from memory).
var fullWalls = map[string]bool{"ASTM A1085": true, "ASTM A1065": true}

// FullWall tells whether the nominal wall of a hollow section of a standard counts
// in full.
func FullWall(standard string) bool { return fullWalls[standard] }

// HollowStandard tells whether a standard is one of American hollow sections.
func HollowStandard(standard string) bool { return hollowStandards[standard] }

// hollowStandards are the product standards that a hollow section may be of.
var hollowStandards = map[string]bool{"ASTM A500": true, "ASTM A501": true, "ASTM A847": true, "ASTM A1065": true, "ASTM A1085": true}

// entry builds the catalogue's line; the size is sane. The wall is the design
// wall. Corners have the radii of ASTM's tables, twice the wall outside and once
// inside.
func (h hollowInches) entry(listed bool) Entry {
	e := Entry{Family: "HSS", Standard: astmHollow, Product: ColdHollow, Listed: listed, Torsion: torsionHollow}
	wall := metresOf(sixteenth(h.t)) * coldWall
	if h.standard != "" {
		e.Standard = h.standard
	}
	if fullWalls[e.Standard] {
		wall = metresOf(sixteenth(h.t))
	}
	made := section.Cold
	if e.Standard == "ASTM A501" {
		made, e.Product = section.Hot, HotHollow
	}
	if h.b == 0 {
		e.Designation = fmt.Sprintf("HSS%.3fX%.3f", float64(h.a)/inchUnits, float64(h.t)/inchUnits)
		e.Torsion = torsionExact
		e.Shape = section.Shape{Kind: section.Pipe, Made: made, Diameter: metresOf(h.a), Wall: wall}
	} else {
		e.Designation = "HSS" + fractionInches(h.a) + "X" + fractionInches(h.b) + "X" + fractionInches(sixteenth(h.t))
		e.Shape = section.Shape{Kind: section.Tube, Made: made, Depth: metresOf(h.a), Width: metresOf(h.b), Wall: wall, OuterRadius: 2 * wall, InnerRadius: wall}
	}
	if e.Standard != astmHollow {
		e.Designation += " " + strings.TrimPrefix(e.Standard, "ASTM ")
	}
	return e
}
