package catalogue

import (
	"math"
	"strings"
	"testing"

	"kern/checker/section"
)

// publishedTees holds tees cut from universal beams (BS 4-1:2005), read in a
// public copy of the table: the tee's own size, the section it is cut from, mass
// (kg/m), flange width, depth, web, flange and root radius (mm), distance of the
// centroid from the flange's face (cm) and torsion constant (cm4).
const publishedTees = `
305x457x127 914x305x253 126.7 305.5 459.1 17.3 27.9 19.1 12 312
305x457x112 914x305x224 112.1 304.1 455.1 15.9 23.9 19.1 12.1 210
305x457x101 914x305x201 100.4 303.3 451.4 15.1 20.2 19.1 12.5 145
292x419x113 838x292x226 113.3 293.8 425.4 16.1 26.8 17.8 10.8 256
292x419x97 838x292x194 96.9 292.4 420.3 14.7 21.7 17.8 11.1 152
292x419x88 838x292x176 87.9 291.7 417.4 14 18.8 17.8 11.4 110
267x381x99 762x267x197 98.4 268 384.8 15.6 25.4 16.5 9.89 202
267x381x87 762x267x173 86.5 266.7 381 14.3 21.6 16.5 9.98 133
267x381x74 762x267x147 73.5 265.2 376.9 12.8 17.5 16.5 10.2 79.2
254x343x85 686x254x170 85.1 255.8 346.4 14.5 23.7 15.2 8.67 153
254x343x76 686x254x152 76.2 254.5 343.7 13.2 21 15.2 8.61 109
254x343x70 686x254x140 70 253.7 341.7 12.4 19 15.2 8.63 84.1
254x343x63 686x254x125 62.6 253 338.9 11.7 16.2 15.2 8.85 57.9
305x305x119 610x305x238 119 311.4 317.8 18.4 31.4 16.5 7.11 391
305x305x90 610x305x179 89.5 307.1 310 14.1 23.6 16.5 6.69 170
305x305x75 610x305x149 74.6 304.8 306.1 11.8 19.7 16.5 6.45 99.8
229x305x70 610x229x140 69.9 230.2 308.5 13.1 22.1 12.7 7.61 108
229x305x63 610x229x125 62.5 229 306 11.9 19.6 12.7 7.54 76.9
229x305x57 610x229x113 56.5 228.2 303.7 11.1 17.3 12.7 7.58 55.5
`

func TestTeesHavePublishedProperties(t *testing.T) {
	for line := range strings.Lines(publishedTees) {
		f := strings.Fields(line)
		if len(f) == 0 {
			continue
		}
		e, ok := Find(f[0] + " tee")
		if !ok || e.Designation != "1/2 UB "+f[1] || e.Family != "T" {
			t.Errorf("%s: %+v", f[0], e)
			continue
		}
		s := e.Shape
		for i, got := range []float64{s.Width, s.Depth, s.Web, s.Flange, s.Root} {
			if want := number(t, f[3+i]); math.Abs(got*1000-want) > 0.2 {
				t.Errorf("%s: dimension %d is %.2f mm, printed %g", f[0], i, got*1000, want)
			}
		}
		p, err := section.Compute(s)
		if err != nil {
			t.Errorf("%s: %v", f[0], err)
			continue
		}
		for _, c := range []struct {
			what            string
			got, want, most float64
		}{
			{"mass", p.Area * 7850, number(t, f[2]), 0.008},
			{"centroid", (s.Depth - p.CY) * 100, number(t, f[8]), 0.005},
			{"It", p.It * 1e8, number(t, f[9]), 0.01},
		} {
			if d := c.got/c.want - 1; math.Abs(d) > c.most {
				t.Errorf("%s: %s %.4g, printed %g (%+.2f %%)", f[0], c.what, c.got, c.want, 100*d)
			}
		}
	}
}
