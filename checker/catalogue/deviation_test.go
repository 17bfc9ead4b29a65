package catalogue

import (
	"flag"
	"fmt"
	"math"
	"os"
	"slices"
	"strconv"
	"strings"
	"testing"

	"kern/checker/section"
)

var update = flag.Bool("update", false, "write DEVIATIONS.md")

// comparison is one table of printed properties with what is known to differ.
type comparison struct {
	title, table string
	// apart are the properties that are known to differ by more than the
	// tolerance, with the largest deviation in per cent and why.
	apart map[string]known
}

type known struct {
	most float64 // per cent
	why  string
}

// The tolerances in per cent beyond the printed digits.
const (
	mostOf        = 0.5 // of areas, centroids, moments, moduli and radii
	mostTorsion   = 2.0 // of J and Cw
	torsionWords  = "J Cw eo"
	deviationsDoc = "DEVIATIONS.md"
)

// Why a computed value leaves a printed one.
const (
	whyPrint  = "k_des is printed for a few of a series alone, or a dimension with three figures"
	whyRadii  = "one pair of radii is taken for all weights of a depth"
	whySmall  = "small tees, which the taper, the roots and the toes make up"
	whyTaper  = "printed with the mean thickness for the whole flange; here the taper counts, as a numerical solution has it"
	whyRoot   = "a root of more than twice the flange counts up to that, see TorsionElDarwishJohnston"
	whyTubeJ  = "here the formula of EN 10219-2, which counts the wall's own torsion besides the cell's: thick walls of small tubes"
	whyTube   = "the sharpest corners: printed from the rounded design wall"
	whyToe    = "the printed minor radius belongs to larger toes than the printed second moments"
	whyAngleJ = "the printed constant belongs to other radii than the printed area"
	whyPlate  = "printed for legs without toes"
	whyWeight = "the printed mass is not that of the printed area"
	whyPipe   = "printed for another wall than the 0.93 of the nominal that the line states: too much for 10 and 12 XXS, A of 10 STD and of a few small ones; too little for A of 12 XS. Of XS from 14 in. up, printed for 0.90 of the wall, so much is taken here"
)

// comparisons lists the tables. What is known to leave the tolerance has the
// bound that it keeps, so that a worse one is found.
func comparisons() []comparison {
	apart := func(pairs ...any) map[string]known {
		m := map[string]known{}
		for i := 0; i < len(pairs); i += 3 {
			for column := range strings.FieldsSeq(pairs[i].(string)) {
				m[column] = known{pairs[i+1].(float64), pairs[i+2].(string)}
			}
		}
		return m
	}
	return []comparison{
		{"W", publishedWideFlanges, apart("Ix Iy", 0.85, whyPrint)},
		{"M", publishedMiscellaneousBeams, apart("Iy", 0.65, whyPrint, "J", 19.5, whyRoot)},
		{"S", publishedStandardBeams, apart("Zy", 1.55, whyRadii)},
		{"HP", publishedBearingPiles, apart("J", 5.8, whyRoot)},
		{"C", publishedStandardChannels, apart("x Zx Zy", 1.0, whyRadii, "Iy Sy ry", 1.2, whyRadii, "J", 4.0, whyRadii, "eo", 23.0, whyTaper, "Cw", 27.0, whyTaper, "ro", 2.6, whyTaper, "H", 6.0, whyTaper)},
		{"MC", publishedMiscellaneousChannels, apart("x Zy Iy Sy ry", 1.45, whyRadii, "eo", 19.5, whyTaper, "Cw", 24.0, whyTaper, "ro", 1.4, whyTaper, "H", 2.85, whyTaper)},
		{"L", publishedAmericanAngles, apart("Ix Sx Iy Sy", 1.1, whyRadii, "rz", 1.9, whyToe, "J", 3.4, whyAngleJ, "tan", 1.55, whyToe, "weight", 1.65, whyWeight)},
		{"WT, MT, ST", publishedAmericanTees, apart("y Ix Zx Sx rx", 4.0, whySmall, "ry Zy ro", 1.5, whyRadii, "J", 2.4, whyRoot)},
		{"2L", publishedPairs, apart("A Ix Sx Iy Zy Sy", 1.25, whyRadii, "Zx", 2.05, whyPlate)},
		{"HSS, square and rectangular", publishedStructuralTubes, apart("Iy Sy", 0.65, whyTube, "J", 4.2, whyTubeJ)},
		{"HSS, round; Pipe", publishedRounds, apart("A Ix Zx Sx J", 3.3, whyPipe, "rx", 0.51, whyPipe)},
	}
}

// americanProperties are the properties of an American table, in inches.
func americanProperties(e Entry, p section.Properties) map[string]float64 {
	in := func(v float64, power int) float64 { return v / math.Pow(inch, float64(power)) }
	wx, wy, zx, zy := p.WelMajor, p.WelMinor, p.WplMajor, p.WplMinor
	if p.Turned {
		wx, wy, zx, zy = wy, wx, zy, zx
	}
	out := map[string]float64{
		"A": in(p.Area, 2), "Ix": in(p.IX, 4), "Iy": in(p.IY, 4), "Sx": in(wx, 3), "Sy": in(wy, 3), "Zx": in(zx, 3), "Zy": in(zy, 3),
		"rx": in(math.Sqrt(p.IX/p.Area), 1), "ry": in(math.Sqrt(p.IY/p.Area), 1), "rz": in(p.RMinor, 1), "J": in(p.It, 4), "Cw": in(p.Iw, 6),
		"x": in(p.CX, 1), "y": in(p.CY, 1), "eo": -in(p.SX+p.CX, 1),
		"ro": in(math.Sqrt((p.IX+p.IY)/p.Area+p.SX*p.SX+p.SY*p.SY), 1), "weight": in(p.Area, 2) * 12 * 490 / 1728,
	}
	offset := p.SX*p.SX + p.SY*p.SY
	out["H"] = 1 - offset/(offset+(p.IX+p.IY)/p.Area)
	out["tan"] = math.Tan(p.Angle)
	switch e.Shape.Kind {
	case section.Angle:
		// The moduli of the table are about the legs' axes, not the principal ones.
		out["Sx"], out["Sy"] = in(p.IX/(e.Shape.Depth-p.CY), 3), in(p.IY/(e.Shape.Width-p.CX), 3)
		out["Zx"], out["Zy"] = math.NaN(), math.NaN()
	case section.Tee, section.DoubleAngle:
		out["y"] = in(e.Shape.Depth-p.CY, 1)
	}
	return out
}

// beyond is by how much a value leaves the printed digits, in per cent.
func beyond(got float64, text string) float64 {
	want, err := strconv.ParseFloat(text, 64)
	if err != nil {
		return math.NaN()
	}
	half := 0.5
	if i := strings.IndexByte(text, '.'); i >= 0 {
		half = 0.5 * math.Pow(10, -float64(len(text)-i-1))
	} else {
		half *= math.Pow(10, math.Max(0, float64(len(text)-3))) // three significant figures
	}
	d := math.Abs(got-want) - half
	if d <= 0 {
		return 0
	}
	return math.Copysign(100*d/want, got-want)
}

// worst keeps the largest deviation of a property.
type worst struct {
	value float64
	name  string
	rows  int
	over  int
}

// TestAmericanProperties compares every American section of which a printed line
// was reachable, and writes what it found to DEVIATIONS.md with -update.
func TestAmericanProperties(t *testing.T) {
	var doc strings.Builder
	doc.WriteString(deviationsHead)
	for _, c := range comparisons() {
		lines := strings.Split(strings.TrimSpace(c.table), "\n")
		columns := strings.Fields(lines[0])[1:]
		found := map[string]*worst{}
		for _, line := range lines[1:] {
			fields := strings.Fields(line)
			e, ok := Find(fields[0])
			if !ok || len(fields) != len(columns)+1 {
				t.Errorf("%s: not found, or a line that does not fit", fields[0])
				continue
			}
			p, err := section.Compute(e.Shape)
			if err != nil {
				t.Errorf("%s: %v", fields[0], err)
				continue
			}
			got := americanProperties(e, p)
			for i, column := range columns {
				if fields[1+i] == "-" || math.IsNaN(got[column]) {
					continue
				}
				if found[column] == nil {
					found[column] = &worst{}
				}
				w := found[column]
				w.rows++
				d := beyond(got[column], fields[1+i])
				most := tolerance(column)
				if k, ok := c.apart[column]; ok {
					most = k.most
				}
				if math.IsNaN(d) || math.Abs(d) > max(most, tolerance(column)) {
					t.Errorf("%s: %s computed %.4g, printed %s (%+.2f %% beyond its digits)", fields[0], column, got[column], fields[1+i], d)
				}
				if math.Abs(d) > tolerance(column) {
					w.over++
				}
				if math.Abs(d) > math.Abs(w.value) {
					w.value, w.name = d, fields[0]
				}
			}
		}
		fmt.Fprintf(&doc, "\n## %s: %d sections\n\n| property | lines | worst | where | beyond the tolerance | why |\n|---|---|---|---|---|---|\n", c.title, len(lines)-1)
		for _, column := range columns {
			w := found[column]
			if w == nil {
				continue
			}
			why := ""
			if k, ok := c.apart[column]; ok {
				why = k.why
				if w.over == 0 {
					t.Errorf("%s: %s does not differ any more", c.title, column)
				}
			}
			fmt.Fprintf(&doc, "| %s | %d | %+.2f %% | %s | %d | %s |\n", column, w.rows, w.value, w.name, w.over, why)
		}
	}
	text := doc.String()
	if *update {
		if err := os.WriteFile(deviationsDoc, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	have, err := os.ReadFile(deviationsDoc)
	if err != nil || strings.ReplaceAll(string(have), "\r\n", "\n") != text {
		t.Errorf("%s is not what the test finds: go test ./checker/catalogue -run AmericanProperties -update (%v)", deviationsDoc, err)
	}
}

// tolerance is that of a property in per cent.
func tolerance(column string) float64 {
	if slices.Contains(strings.Fields(torsionWords), column) {
		return mostTorsion
	}
	return mostOf
}

const deviationsHead = `# Computed and printed properties of the American sections

Written by ` + "`go test ./checker/catalogue -run AmericanProperties -update`" + `. The printed values are those of AISC's public
shapes database (version 16, read in an open copy; a few lines of version 15). A deviation counts from the nearest value that
would be printed so: a printed 1.03 stands for anything from 1.025 to 1.035. The tolerance is 0.5 %, of J, Cw and the shear centre
eo 2 %.
`
