package action

import (
	"math"
	"testing"
)

// momentAt is the bending moment at a height; where it jumps, the one just
// below (above when up is true).
func momentAt(pieces []Piece, z float64, up bool) float64 {
	p := pieceAt(pieces, z, up)
	return p.Moment(z - p.From)
}

func deflectionAt(pieces []Piece, z float64) float64 {
	p := pieceAt(pieces, z, false)
	return p.Deflection(z - p.From)
}

func pieceAt(pieces []Piece, z float64, up bool) Piece {
	last := pieces[len(pieces)-1]
	slack := 1e-9 * last.To
	for _, p := range pieces {
		if z < p.To-slack || !up && z < p.To+slack {
			return p
		}
	}
	return last
}

// figure is a value that a closed form gives at a height.
type figure struct {
	what rune // 'm' moment below, 'M' moment above, 'v' deflection times E I
	z    float64
	want float64
}

// TestClosedForms: the formulas of elementary beam theory, found in any book of
// the strength of materials (written from memory; several are derived from one
// another, see the notes). Moments are positive where the second derivative of
// the deflection is, so a fixed base under a force has a positive moment.
func TestClosedForms(t *testing.T) {
	for _, l := range []float64{1, 3.6, 12.5} {
		for _, share := range []float64{0.125, 0.37, 0.5, 0.81} {
			closedForms(t, l, share*l)
		}
	}
}

func closedForms(t *testing.T, l, a float64) {
	const p, w, c = 7300.0, 1900.0, 5100.0 // N, N/m, Nm
	b := l - a
	end := min(l, a+0.3*b)
	m := (a + end) / 2 // middle of the partial line load
	q := w * (end - a)
	half := l / 2
	force := func(z float64) []Push { return []Push{{Force: p, From: z}} }
	turn := func(z float64) []Push { return []Push{{Moment: c, From: z}} }
	line := func(from, to float64) []Push { return []Push{{Line: w, From: from, To: to}} }
	over := l - a // overhang above a hold at a
	for _, x := range []struct {
		name      string
		base, top End
		holds     []float64
		pushes    []Push
		want      []figure
	}{
		{"cantilever, force at the tip", Fixed, Free, nil, force(l), []figure{{'m', 0, p * l}, {'v', l, p * l * l * l / 3}}},
		{"cantilever, uniform", Fixed, Free, nil, line(0, l), []figure{{'m', 0, w * l * l / 2}, {'v', l, w * l * l * l * l / 8}}},
		{"cantilever, force", Fixed, Free, nil, force(a), []figure{{'m', 0, p * a}, {'m', l, 0}, {'v', l, p * a * a * (3*l - a) / 6}}},
		{"cantilever, couple", Fixed, Free, nil, turn(a), []figure{{'m', 0, c}, {'m', a, c}, {'M', a, 0}, {'v', l, c * a * (l - a/2)}}},
		{"cantilever, partial line", Fixed, Free, nil, line(a, end), []figure{{'m', 0, q * m}, {'m', a, q * (m - a)}, {'m', end, 0}}},
		{"cantilever upside down, force", Free, Fixed, nil, force(a), []figure{{'m', l, p * b}, {'m', a, 0}}},

		{"pinned, force", Pinned, Pinned, nil, force(a), []figure{{'m', a, -p * a * b / l}, {'v', a, p * a * a * b * b / (3 * l)}}},
		{"pinned, uniform", Pinned, Pinned, nil, line(0, l), []figure{{'m', half, -w * l * l / 8}, {'v', half, 5 * w * l * l * l * l / 384}}},
		{"pinned, couple", Pinned, Pinned, nil, turn(a), []figure{{'m', a, c * a / l}, {'M', a, -c * b / l}, {'v', a, c * a * b * (b - a) / (3 * l)}}},
		{"pinned, couple at the base", Pinned, Pinned, nil, turn(0), []figure{{'M', 0, -c}, {'m', l, 0}, {'m', half, -c / 2}}},
		{"pinned, couple at the top", Pinned, Pinned, nil, turn(l), []figure{{'M', 0, 0}, {'m', l, c}}},
		{"pinned, line below a", Pinned, Pinned, nil, line(0, a), []figure{{'m', a, -w * a * a / (2 * l) * b}}},
		{"pinned, partial line", Pinned, Pinned, nil, line(a, end), []figure{{'m', a, -q * (l - m) / l * a}, {'m', end, -q * m / l * (l - end)}}},

		{"propped, uniform", Fixed, Pinned, nil, line(0, l), []figure{{'m', 0, w * l * l / 8}, {'m', 5 * l / 8, -9 * w * l * l / 128}, {'m', l, 0}}},
		{"propped, force", Fixed, Pinned, nil, force(a), []figure{{'m', 0, p * a * b * (l + b) / (2 * l * l)}, {'m', a, -p * a * a * (3*l - a) / (2 * l * l * l) * b}}},
		{"propped, couple", Fixed, Pinned, nil, turn(a), []figure{{'m', 0, c - 3*c*a*(2*l-a)/(2*l*l)}, {'m', l, 0}}},
		{"propped, couple at the top", Fixed, Pinned, nil, turn(l), []figure{{'m', 0, -c / 2}, {'m', l, c}}},
		{"propped upside down, uniform", Pinned, Fixed, nil, line(0, l), []figure{{'m', l, w * l * l / 8}, {'m', 3 * l / 8, -9 * w * l * l / 128}}},

		{"fixed, uniform", Fixed, Fixed, nil, line(0, l), []figure{{'m', 0, w * l * l / 12}, {'m', half, -w * l * l / 24}, {'m', l, w * l * l / 12}, {'v', half, w * l * l * l * l / 384}}},
		{"fixed, force", Fixed, Fixed, nil, force(a), []figure{{'m', 0, p * a * b * b / (l * l)}, {'m', l, p * a * a * b / (l * l)}, {'m', a, -2 * p * a * a * b * b / (l * l * l)}}},
		{"fixed, couple", Fixed, Fixed, nil, turn(a), []figure{{'m', 0, c * b * (b - 2*a) / (l * l)}, {'m', l, -c * a * (a - 2*b) / (l * l)}}},

		{"fixed-guided, force at the top", Fixed, Guided, nil, force(l), []figure{{'m', 0, p * l / 2}, {'m', l, -p * l / 2}, {'v', l, p * l * l * l / 12}}},
		{"fixed-guided, uniform", Fixed, Guided, nil, line(0, l), []figure{{'m', 0, w * l * l / 3}, {'m', l, -w * l * l / 6}, {'v', l, w * l * l * l * l / 24}}},
		{"fixed-guided, force", Fixed, Guided, nil, force(a), []figure{{'m', 0, p*a - p*a*a/(2*l)}, {'m', l, -p * a * a / (2 * l)}}},
		{"fixed-guided, couple", Fixed, Guided, nil, turn(a), []figure{{'m', 0, c - c*a/l}, {'m', l, -c * a / l}}},
		// half of a pinned beam of twice the length
		{"pinned-guided, uniform", Pinned, Guided, nil, line(0, l), []figure{{'m', l, -w * l * l / 2}, {'v', l, 5 * w * 16 * l * l * l * l / 384}}},
		{"pinned-guided, force at the top", Pinned, Guided, nil, force(l), []figure{{'m', l, -p * l}, {'v', l, p * l * l * l / 3}}},
		{"pinned-guided, force", Pinned, Guided, nil, force(a), []figure{{'m', a, -p * a}, {'m', l, -p * a}}},
		{"guided-pinned, force", Guided, Pinned, nil, force(a), []figure{{'m', 0, -p * b}, {'m', a, -p * b}}},
		{"guided-fixed, uniform", Guided, Fixed, nil, line(0, l), []figure{{'m', 0, -w * l * l / 6}, {'m', l, w * l * l / 3}}},

		{"two spans, uniform", Pinned, Pinned, []float64{a}, line(0, l), []figure{{'m', a, w * (a*a*a + b*b*b) / (8 * l)}, {'v', a, 0}}},
		{"two equal spans, uniform", Pinned, Pinned, []float64{half}, line(0, l), []figure{{'m', half, w * half * half / 8}, {'m', 3 * half / 8, -9 * w * half * half / 128}}},
		{"two equal spans, one loaded", Pinned, Pinned, []float64{half}, line(0, half), []figure{{'m', half, w * half * half / 16}}},
		{"two equal spans, a force in one", Pinned, Pinned, []float64{half}, force(half / 2), []figure{{'m', half, 3 * p * half / 32}}},
		{"two spans, a force at mid-height of the lower", Pinned, Pinned, []float64{a}, force(a / 2), []figure{{'m', a, p * (a / 2) * (a*a - a*a/4) / (2 * a * l)}}}, // three moments
		{"three equal spans, uniform", Pinned, Pinned, []float64{l / 3, 2 * l / 3}, line(0, l), []figure{{'m', l / 3, w * l * l / 90}, {'m', 2 * l / 3, w * l * l / 90}, {'m', half, -w * l * l / 9 * (0.125 - 0.1)}}},
		{"fixed ends, equal spans, uniform", Fixed, Fixed, []float64{half}, line(0, l), []figure{{'m', 0, w * half * half / 12}, {'m', half, w * half * half / 12}}},

		{"overhang, force at the top", Pinned, Free, []float64{a}, force(l), []figure{{'m', a, p * over}, {'m', 0, 0}, {'v', l, p * over * over * l / 3}}},
		{"overhang on a fixed base", Fixed, Free, []float64{a}, force(l), []figure{{'m', a, p * over}, {'m', 0, -p * over / 2}}},
		{"two overhangs, uniform", Free, Free, []float64{l / 5, 4 * l / 5}, line(0, l), []figure{{'m', l / 5, w * l * l / 50}, {'m', 4 * l / 5, w * l * l / 50}, {'m', half, w*l*l/50 - w*9*l*l/25/8}}},
		{"a force on a hold", Pinned, Pinned, []float64{a}, force(a), []figure{{'m', a, 0}, {'v', half, 0}}},
	} {
		out, err := Beam{Base: x.base, Top: x.top, Holds: x.holds, Height: l}.Solve([][]Push{x.pushes})
		if err != nil {
			t.Errorf("%s, l %g, a %g: %v", x.name, l, a, err)
			continue
		}
		for _, f := range x.want {
			got, scale := momentAt(out[0], f.z, f.what == 'M'), p*l
			if f.what == 'v' {
				got, scale = deflectionAt(out[0], f.z), p*l*l*l
			}
			// of an exact value 1e-9; of zero, of the loads
			if f.want != 0 {
				scale = math.Abs(f.want)
			}
			if !(math.Abs(got-f.want) <= 1e-9*scale) {
				t.Errorf("%s, l %g, a %g: %c at %g is %.12g, want %.12g", x.name, l, a, f.what, f.z, got, f.want)
			}
		}
	}
}
