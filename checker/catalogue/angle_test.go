package catalogue

import (
	"math"
	"strings"
	"testing"

	"kern/checker/section"
)

// publishedAngles holds the printed properties of angles: area in cm2, second
// moments in cm4 about the axes along the legs (bending the longer leg, the
// shorter leg) and about the minor principal axis; 0 where none is at hand.
//
// 45x30x4 is printed with Iv 1.18, 0.5 % below the computed value: its source has
// a toe radius that is not half the root radius.
//
// Sources: the lines that begin with "seen" (30x20 to 65x50x5, and 150x150x15
// from Steel Buildings in Europe) were read; the others are from memory.
const publishedAngles = `
L 20x20x3 1.12 0.392 0.392 0.165
L 25x25x3 1.42 0.803 0.803 0.334
L 25x25x4 1.85 1.02 1.02 0.430
L 30x30x3 1.74 1.40 1.40 0.585
L 30x30x4 2.27 1.80 1.80 0.754
L 35x35x4 2.67 2.95 2.95 1.23
L 40x40x4 3.08 4.47 4.47 1.86
L 40x40x5 3.79 5.43 5.43 2.26
L 45x45x4.5 3.90 7.15 7.15 0
L 50x50x4 3.89 8.97 8.97 3.73
L 50x50x5 4.80 11.0 11.0 4.55
L 50x50x6 5.69 12.8 12.8 5.34
L 60x60x5 5.82 19.4 19.4 8.03
L 60x60x6 6.91 22.8 22.8 9.44
L 60x60x8 9.03 29.2 29.2 12.2
L 65x65x7 8.70 33.4 33.4 13.9
L 70x70x6 8.13 36.9 36.9 15.3
L 70x70x7 9.40 42.3 42.3 17.5
L 75x75x6 8.73 45.8 45.8 18.9
L 75x75x8 11.4 59.1 59.1 24.5
L 80x80x8 12.3 72.2 72.2 29.9
L 80x80x10 15.1 87.5 87.5 36.4
L 90x90x7 12.2 92.6 92.6 38.3
L 90x90x8 13.9 104 104 43.1
L 90x90x9 15.5 116 116 47.9
L 90x90x10 17.1 127 127 52.6
L 100x100x8 15.5 145 145 59.9
L 100x100x10 19.2 177 177 73.0
L 100x100x12 22.7 207 207 85.7
L 120x120x10 23.2 313 313 129
L 120x120x12 27.5 368 368 152
L 130x130x12 30.0 472 472 194
L 150x150x10 29.3 624 624 258
L 150x150x12 34.8 737 737 303
seen L 150x150x15 43.0 898.1 898.1 369
L 160x160x15 46.1 1100 1100 453
L 180x180x16 55.4 1680 1680 692
L 180x180x18 61.9 1870 1870 768
L 200x200x16 61.8 2340 2340 960
L 200x200x18 69.1 2600 2600 1070
L 200x200x20 76.3 2850 2850 1170
L 200x200x24 90.6 3330 3330 1380
L 250x250x28 133 7700 7700 3170
L 250x250x35 163 9260 9260 3860
seen L 30x20x3 1.43 1.25 0.44 0.26
seen L 30x20x4 1.86 1.59 0 0.33
seen L 40x20x4 2.26 3.59 0.60 0.39
seen L 40x25x4 2.46 3.89 1.16 0.70
seen L 45x30x4 2.87 5.78 2.05 0
seen L 50x30x5 3.78 9.36 2.51 1.54
seen L 60x30x5 4.28 15.6 2.63 1.71
seen L 60x40x5 4.79 17.2 6.11 3.54
seen L 60x40x6 5.68 20.1 7.12 4.16
seen L 65x50x5 5.54 23.2 11.9 6.32
L 70x50x6 6.89 33.4 14.2 7.92
L 75x50x6 7.19 40.5 14.4 8.36
L 75x50x8 9.41 52.0 18.4 10.8
L 80x40x6 6.89 44.9 7.59 4.93
L 80x40x8 9.01 57.6 9.61 6.34
L 80x60x7 9.38 59.0 28.4 15.4
L 100x50x6 8.71 89.9 15.4 9.92
L 100x50x8 11.4 116 19.7 12.8
L 100x65x7 11.2 113 37.6 22.0
L 100x65x8 12.7 127 42.2 24.8
L 100x65x10 15.6 154 51.0 30.1
L 100x75x8 13.5 133 64.1 34.6
L 100x75x10 16.6 162 77.6 42.2
L 100x75x12 19.7 189 90.2 49.5
L 120x80x8 15.5 226 80.8 46.6
L 120x80x10 19.1 276 98.1 56.8
L 120x80x12 22.7 323 114 66.7
L 125x75x8 15.5 247 67.6 40.9
L 125x75x10 19.1 302 82.1 49.9
L 125x75x12 22.7 354 95.5 58.5
L 135x65x8 15.5 291 45.2 29.4
L 135x65x10 19.1 356 54.7 35.9
L 150x75x9 19.6 455 77.9 50.2
L 150x75x10 21.7 501 85.6 55.1
L 150x75x12 25.7 588 99.6 64.7
L 150x75x15 31.7 713 119 78.6
L 150x90x10 23.2 533 146 88.3
L 150x90x12 27.5 627 171 104
L 150x90x15 33.9 761 205 126
L 150x100x10 24.2 552 199 0
L 150x100x12 28.7 650 233 0
L 200x100x10 29.2 1220 210 135
L 200x100x12 34.8 1440 247 159
L 200x100x15 43.0 1760 299 193
L 200x150x12 40.8 1650 803 430
L 200x150x15 50.5 2020 979 526
L 90x90x6 10.6 81.0 81.0 0
L 90x90x12 20.3 149 149 62.0
L 100x100x15 28.0 250 250 0
L 120x120x8 18.8 259 259 107
L 120x120x15 34.0 448 448 186
L 150x150x18 51.2 1060 1060 440
L 200x150x18 60.1 2390 1150 0
`

func TestAnglesHavePublishedProperties(t *testing.T) {
	seen := map[string]bool{}
	for line := range strings.Lines(publishedAngles) {
		f := strings.Fields(strings.TrimPrefix(strings.TrimSpace(line), "seen "))
		if len(f) == 0 {
			continue
		}
		name := f[0] + " " + f[1]
		seen[name] = true
		e, ok := Find(name)
		if !ok {
			t.Errorf("%s: not found", name)
			continue
		}
		nominal, err := section.Compute(e.Shape)
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		if e.Shape.Depth < e.Shape.Width || math.Abs(e.Shape.Toe-e.Shape.Root/2) > 1e-12 {
			t.Errorf("%s: %+v", name, e.Shape)
		}
		p := nominal
		if !e.Listed {
			// The printed values of these are those of the toe radius of BS 4848-4,
			// 4.8 mm whatever the size. The catalogue's, half the root radius as in
			// EN 10056-1, gives up to 1.4 % less.
			e.Shape.Toe = 0.0048
			if p, err = section.Compute(e.Shape); err != nil {
				t.Errorf("%s: %v", name, err)
			}
			if r := nominal.IMinor / p.IMinor; r > 1 || r < 0.985 {
				t.Errorf("%s: Iv %.3f of that with a toe radius of 4.8 mm", name, r)
			}
		}
		for i, got := range []float64{p.Area * 1e4, p.IX * 1e8, p.IY * 1e8, p.IMinor * 1e8} {
			want := number(t, f[2+i])
			if want == 0 {
				continue
			}
			what := []string{"A", "Iy", "Iz", "Iv"}[i]
			// Two figures in the seen lines: half a unit of the last.
			if !printed(got, want) && !(want < 1.2 && math.Abs(got-want) <= 0.00501) {
				t.Errorf("%s: %s computed %.4g, printed %g (%+.2f %%)", name, what, got, want, 100*(got/want-1))
			}
		}
	}
	for _, e := range All() {
		if e.Family == "L" && !e.American() && !seen[e.Designation] {
			t.Errorf("%s has no published line", e.Designation)
		}
	}
}
