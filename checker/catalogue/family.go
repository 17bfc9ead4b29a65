package catalogue

import (
	"strconv"
	"strings"

	"kern/checker/section"
)

// What Entry.Torsion says.
const (
	torsionProducer = "the formula of the European producers, at most 1.075 times that of El Darwish and Johnston"
	torsionJunction = "El Darwish and Johnston (1965)"
	torsionHollow   = "EN 10210-2 and EN 10219-2, Annex"
	torsionExact    = "exact"
)

// textSeries is a family of rolled sections whose table is text: a line holds
// what makes the designation after the family's letters, then dimensions in mm.
type textSeries struct {
	family, standard string
	lines            string
	count            int // dimensions in a line
	unlisted         bool
	shape            func(name string, d []float64) section.Shape
}

// uk makes an I or H section with the torsion constant of the UK tables.
func uk(name string, d []float64) section.Shape {
	s := european(name, d)
	s.Junction = section.ByElDarwishJohnston
	return s
}

// european makes an I or H section with the torsion constant of the European
// producers' tables.
func european(_ string, d []float64) section.Shape {
	return section.Shape{
		Kind: section.ISection, Made: section.Rolled,
		Depth: metres(d[0]), Width: metres(d[1]), Web: metres(d[2]), Flange: metres(d[3]), Root: metres(d[4]),
	}
}

// parallelChannel makes a channel with parallel flanges.
func parallelChannel(name string, d []float64) section.Shape {
	s := european(name, d)
	s.Kind = section.Channel
	return s
}

// rolledAngle makes an angle from its designation and root radius. The toe
// radius is half the root radius, EN 10056-1.
func rolledAngle(name string, d []float64) section.Shape {
	n, _ := numbers(name)
	return section.Shape{
		Kind: section.Angle, Made: section.Rolled,
		Depth: metres(n[0]), Width: metres(n[1]), Wall: metres(n[2]), Root: metres(d[0]), Toe: metres(d[0] / 2),
	}
}

// rolledEntries returns every rolled section in the order in which All gives
// them.
func rolledEntries() []Entry {
	var out []Entry
	text := func(family, standard, lines string, count int, unlisted bool, shape func(string, []float64) section.Shape) {
		out = append(out, textSeries{family, standard, lines, count, unlisted, shape}.entries()...)
	}
	series := openSeries()
	open := func(i int) {
		for _, r := range series[i].rows {
			out = append(out, series[i].entry(r))
		}
	}
	open(0) // IPE
	text("HEAA", "EN 10365", heaaLines, 5, false, european)
	open(1) // HEA
	open(2) // HEB
	open(3) // HEM
	text("HL", "EN 10365", hlLines, 5, false, european)
	text("HD", "EN 10365", hdLines, 5, false, european)
	text("HP", "EN 10365", hpLines, 5, false, european)
	text("UB", "EN 10365", ubLines, 5, false, uk)
	text("UB", "BS 4-1", ubFormerLines, 5, false, uk)
	text("UC", "EN 10365", ucLines, 5, false, uk)
	text("UBP", "EN 10365", ubpLines, 5, false, uk)
	beams := out
	open(4) // UPN
	open(5) // UPE
	text("PFC", "EN 10365", pfcLines, 5, false, parallelChannel)
	text("L", "EN 10056-1", equalLines, 1, false, rolledAngle)
	text("L", "EN 10056-1", unequalLines, 1, false, rolledAngle)
	text("L", "EN 10056-1", furtherAngleLines, 1, true, rolledAngle)
	for _, e := range beams {
		if tee, ok := halfOf(e); ok {
			out = append(out, tee)
		}
	}
	return out
}

// entries reads the table. A line that cannot be read is a mistake in the table,
// not in any input, and stops the program.
func (t textSeries) entries() []Entry {
	var out []Entry
	for line := range strings.Lines(t.lines) {
		fields := strings.Fields(line)
		if len(fields) == 0 {
			continue
		}
		if len(fields) <= t.count {
			panic("catalogue: bad line " + line)
		}
		name := strings.Join(fields[:len(fields)-t.count], " ")
		d := make([]float64, t.count)
		for i, f := range fields[len(fields)-t.count:] {
			v, err := strconv.ParseFloat(f, 64)
			if err != nil {
				panic("catalogue: bad line " + line)
			}
			d[i] = v
		}
		e := Entry{
			Designation: t.family + " " + name,
			Family:      t.family,
			Standard:    t.standard,
			Product:     OpenSection,
			Listed:      !t.unlisted,
			Shape:       t.shape(name, d),
			Torsion:     torsionJunction,
		}
		if e.Shape.Kind == section.ISection && e.Shape.Junction == section.ByProducer {
			e.Torsion = torsionProducer
		}
		out = append(out, e)
	}
	return out
}

// teeParents are the families that tees are cut from.
var teeParents = map[string]bool{"IPE": true, "HEA": true, "HEB": true, "HEM": true, "UB": true, "UC": true}

// halfOf returns the tee of half the depth cut from an I or H section. What the
// cut takes is left out of account, as in the tables of such tees.
func halfOf(e Entry) (Entry, bool) {
	if !teeParents[e.Family] {
		return Entry{}, false
	}
	e.Designation = teePrefix + e.Designation
	e.Family = "T"
	e.Shape.Kind = section.Tee
	e.Shape.Depth /= 2
	e.Shape.Junction = 0
	e.Torsion = torsionJunction
	return e, true
}

// teePrefix begins the designation of a tee, before that of the section it is
// cut from.
const teePrefix = "1/2 "

// numbers returns the numbers of a designation in order, at most four.
func numbers(designation string) (n [4]float64, count int) {
	for i := 0; i < len(designation) && count < len(n); {
		j := i
		for j < len(designation) && (digit(designation[j]) || designation[j] == '.') {
			j++
		}
		if j == i {
			i++
			continue
		}
		if um, ok := parseMicro(designation[i:j]); ok {
			n[count] = float64(um) / micro
			count++
		}
		i = j
	}
	return n, count
}
