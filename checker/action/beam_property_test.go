package action

import (
	"errors"
	"math"
	"math/rand"
	"testing"
)

// randomBeam makes a beam that stands and a loading. All heights are at least
// 1.5 % of the column apart, except where they coincide on purpose.
func randomBeam(r *rand.Rand) (Beam, []Push) {
	for {
		b := Beam{Base: End(r.Intn(4)), Top: End(r.Intn(4)), Height: math.Exp(r.Float64()*4 - 1)}
		cells := r.Perm(39)
		height := func() float64 {
			c := cells[0]
			cells = cells[1:]
			return b.Height * (float64(c+1) + 0.4*(r.Float64()-0.5)) / 40
		}
		for range r.Intn(4) {
			b.Holds = append(b.Holds, height())
		}
		held := len(b.Holds)
		if b.Base.held() {
			held++
		}
		if b.Top.held() {
			held++
		}
		if held == 0 || held == 1 && !b.Base.clamped() && !b.Top.clamped() {
			continue
		}
		var pushes []Push
		for range 1 + r.Intn(5) {
			z := height()
			switch r.Intn(8) {
			case 0:
				z = 0
			case 1:
				z = b.Height
			case 2:
				if len(b.Holds) > 0 {
					z = b.Holds[r.Intn(len(b.Holds))]
				}
			}
			p := Push{From: z}
			if r.Intn(3) > 0 {
				p.Force = r.NormFloat64() * 1e4
			}
			if r.Intn(3) == 0 {
				p.Moment = r.NormFloat64() * 1e4 * b.Height
			}
			if r.Intn(3) == 0 {
				p.Line = r.NormFloat64() * 1e3
				p.To = height()
				if p.To < p.From {
					p.From, p.To = p.To, p.From
				}
			}
			pushes = append(pushes, p)
		}
		return b, pushes
	}
}

// size is the sum of the loads, N, a scale for what may be lost by rounding.
func size(b Beam, pushes []Push) float64 {
	s := 0.0
	for _, p := range pushes {
		s += math.Abs(p.Force) + math.Abs(p.Moment)/b.Height
		if p.Line != 0 {
			s += math.Abs(p.Line) * (p.To - p.From)
		}
	}
	return s
}

// TestEquations: on 1,000 random beams the pieces satisfy everything that
// determines the solution: the deflection and slope run on over the cuts, the
// moment and shear jump by the loads there, the ends and holds do what their
// names say. The reactions that come out are then in equilibrium with all loads,
// reckoned without the pieces' inner forces.
func TestEquations(t *testing.T) {
	r := rand.New(rand.NewSource(1))
	for n := range 1000 {
		b, pushes := randomBeam(r)
		out, err := b.Solve([][]Push{pushes})
		if err != nil {
			t.Fatalf("beam %d: %v: %+v %+v", n, err, b, pushes)
		}
		if what, off := equations(b, pushes, out[0]); off > 1e-9 {
			t.Errorf("beam %d: %s is off by %.2g of the loads: %+v %+v", n, what, off, b, pushes)
		}
	}
}

// equations gives the equation that is satisfied worst and by how much, relative
// to the loads.
func equations(b Beam, pushes []Push, pieces []Piece) (worst string, off float64) {
	force, h := size(b, pushes), b.Height
	note := func(what string, x, scale float64) {
		if x = math.Abs(x) / scale; !(x <= off) {
			worst, off = what, x
		}
	}
	near := func(x, y float64) bool { return math.Abs(x-y) <= 1e-9*h }
	held := func(z float64) bool {
		for _, x := range b.Holds {
			if near(x, z) {
				return true
			}
		}
		return near(z, 0) && b.Base.held() || near(z, h) && b.Top.held()
	}
	clamped := func(z float64) bool { return near(z, 0) && b.Base.clamped() || near(z, h) && b.Top.clamped() }
	sumForce, sumMoment := 0.0, 0.0 // of loads and reactions, moments about the base
	for i := 0; i <= len(pieces); i++ {
		var below, above Piece // the state below and above the cut
		z := h
		if i < len(pieces) {
			above, z = pieces[i], pieces[i].From
		}
		var v, slope float64
		if i > 0 {
			q := pieces[i-1]
			l := q.To - q.From
			if q.To != z || !(l > 0) {
				note("the cuts", h, h)
			}
			below = Piece{M: q.Moment(l), V: q.Shear(l)}
			v, slope = q.Deflection(l), q.R+l*(q.M+l*(q.V/2+l*q.Line/6))
			if i < len(pieces) {
				note("deflection", above.D-v, force*h*h*h)
				note("slope", above.R-slope, force*h*h)
			}
		} else {
			v, slope = above.D, above.R
		}
		f, m := 0.0, 0.0
		for _, p := range pushes {
			if near(p.From, z) {
				f, m = f+p.Force, m+p.Moment
			}
		}
		// E I v''' jumps by the force, E I v'' by minus the moment
		reaction, fixing := above.V-below.V-f, below.M-above.M-m
		if held(z) {
			note("a held point's deflection", v, force*h*h*h)
		} else {
			note("shear", reaction, force)
		}
		if clamped(z) {
			note("a clamped end's slope", slope, force*h*h)
		} else {
			note("moment", fixing, force*h)
		}
		sumForce += f + reaction
		sumMoment += m + fixing + z*(f+reaction)
		if i < len(pieces) {
			line := 0.0
			for _, p := range pushes {
				if mid := (above.From + above.To) / 2; p.Line != 0 && p.From < mid && mid < p.To {
					line += p.Line
				}
			}
			note("line load", (above.Line-line)*h, force)
			l := above.To - above.From
			sumForce += line * l
			sumMoment += line * l * (above.From + above.To) / 2
		}
	}
	if pieces[0].From != 0 || !near(pieces[len(pieces)-1].To, h) {
		note("the ends", h, h)
	}
	note("equilibrium of forces", sumForce, force)
	note("equilibrium of moments", sumMoment, force*h)
	return worst, off
}

// TestSuperposition: the pieces of loadings, added with factors, are those of
// the loadings with their loads times the factors.
func TestSuperposition(t *testing.T) {
	r := rand.New(rand.NewSource(2))
	var into []Piece
	for n := range 1000 {
		b, first := randomBeam(r)
		// the loads of one beam in three cases, the last of them in none
		loadings := make([][]Push, 4)
		factors := []float64{r.NormFloat64(), 0, r.NormFloat64()}
		for _, p := range first {
			j := r.Intn(3)
			loadings[j] = append(loadings[j], p)
			f := factors[j]
			loadings[3] = append(loadings[3], Push{Force: f * p.Force, Moment: f * p.Moment, Line: f * p.Line, From: p.From, To: p.To})
		}
		out, err := b.Solve(loadings)
		if err != nil {
			t.Fatalf("beam %d: %v", n, err)
		}
		into = Add(out[:3], factors, into)
		if len(into) != len(out[3]) {
			t.Fatalf("beam %d: %d pieces, want %d", n, len(into), len(out[3]))
		}
		s, h := size(b, first)*5, b.Height
		for i, p := range into {
			q := out[3][i]
			off := max(math.Abs(p.M-q.M)/h, math.Abs(p.V-q.V), math.Abs(p.Line-q.Line)*h, math.Abs(p.D-q.D)/(h*h*h), math.Abs(p.R-q.R)/(h*h))
			if p.From != q.From || p.To != q.To || off > 1e-9*s {
				t.Errorf("beam %d, piece %d: %+v, want %+v", n, i, p, q)
			}
		}
	}
	if got := Add(nil, nil, into); len(got) != 0 {
		t.Errorf("nothing added up is %v", got)
	}
}

// TestMirror: a beam turned upside down has the same deflections and moments.
func TestMirror(t *testing.T) {
	r := rand.New(rand.NewSource(3))
	for n := range 1000 {
		b, pushes := randomBeam(r)
		h := b.Height
		m := Beam{Base: b.Top, Top: b.Base, Height: h}
		for _, z := range b.Holds {
			m.Holds = append(m.Holds, h-z)
		}
		var turned []Push
		for _, p := range pushes {
			turned = append(turned, Push{Force: p.Force, Moment: -p.Moment, From: h - p.From})
			if p.Line != 0 {
				turned = append(turned, Push{Line: p.Line, From: h - p.To, To: h - p.From})
			}
		}
		one, err := b.Solve([][]Push{pushes})
		two, err2 := m.Solve([][]Push{turned})
		if err != nil || err2 != nil {
			t.Fatalf("beam %d: %v, %v", n, err, err2)
		}
		if len(one[0]) != len(two[0]) {
			t.Fatalf("beam %d: %d pieces, mirrored %d", n, len(one[0]), len(two[0]))
		}
		s := size(b, pushes)
		for i, p := range one[0] {
			q := two[0][len(two[0])-1-i]
			l, k := p.To-p.From, q.To-q.From
			for _, x := range []float64{0, 0.3, 1} {
				dm := p.Moment(x*l) - q.Moment((1-x)*k)
				dv := p.Deflection(x*l) - q.Deflection((1-x)*k)
				ds := p.Shear(x*l) + q.Shear((1-x)*k)
				if off := max(math.Abs(dm)/h, math.Abs(dv)/(h*h*h), math.Abs(ds)); !(off <= 1e-9*s) {
					t.Errorf("beam %d, piece %d: off by %.2g of the loads", n, i, off/s)
				}
			}
		}
	}
}

// TestLargest: the largest moment of a piece is not exceeded anywhere in it and
// is met where it says.
func TestLargest(t *testing.T) {
	r := rand.New(rand.NewSource(4))
	inside := 0
	for range 1000 {
		p := Piece{From: r.Float64(), M: r.NormFloat64(), V: 2 * r.NormFloat64()}
		p.To = p.From + 0.1 + r.Float64()
		if r.Intn(3) > 0 {
			p.Line = 10 * r.NormFloat64()
		}
		m, z := p.Largest()
		if z < p.From || z > p.To || math.Abs(p.Moment(z-p.From)-m) > 1e-12*(1+math.Abs(m)) {
			t.Errorf("%+v: %g at %g is not its moment", p, m, z)
		}
		if z > p.From && z < p.To {
			inside++
		}
		for i := range 201 {
			if x := p.Moment((p.To - p.From) * float64(i) / 200); math.Abs(x) > math.Abs(m)*(1+1e-12) {
				t.Errorf("%+v: %g, but %g in it", p, m, x)
				break
			}
		}
	}
	if inside < 50 {
		t.Errorf("only %d of 1000 pieces have it inside", inside)
	}
}

// TestMechanisms: a column that nothing holds in place is refused, however its
// loads cut it; also where a load is so near another that the pivots of the
// equations are noise.
func TestMechanisms(t *testing.T) {
	type column struct {
		base, top End
		holds     []float64
	}
	for _, c := range []column{
		{Free, Free, nil}, {Free, Free, []float64{4}}, {Pinned, Free, nil}, {Free, Pinned, nil},
		{Guided, Free, nil}, {Free, Guided, nil}, {Guided, Guided, nil}, {Free, Free, []float64{4, 4}},
	} {
		for _, d := range []float64{0, 5, 1, 0.5, 0.2, 0.1, 0.05, 0.02, 0.01, 1e-3, 1e-4} {
			pushes := []Push{{Force: 1000, From: d}, {Force: 100, From: 7}, {Force: 1, From: 10 - d/3}}
			_, err := Beam{Base: c.base, Top: c.top, Holds: c.holds, Height: 10}.Solve([][]Push{pushes})
			if !errors.Is(err, ErrMechanism) {
				t.Errorf("%v, loads %g apart: %v", c, d, err)
			}
		}
	}
	for _, c := range []column{
		{Fixed, Free, nil}, {Pinned, Pinned, nil}, {Fixed, Guided, nil}, {Guided, Pinned, nil}, {Free, Free, []float64{4, 6}},
		{Free, Guided, []float64{4}}, {Guided, Guided, []float64{4}}, {Pinned, Free, []float64{4}},
	} {
		if _, err := (Beam{Base: c.base, Top: c.top, Holds: c.holds, Height: 10}).Solve([][]Push{{{Force: 1, From: 7}}}); err != nil {
			t.Errorf("%v stands, but: %v", c, err)
		}
	}
}

// TestLoadingErrors: what is not a number or not on the column is refused, not
// moved or left out.
func TestLoadingErrors(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	ok := Beam{Base: Fixed, Top: Pinned, Height: 10}
	for _, p := range []Push{
		{Force: nan}, {Force: inf}, {Moment: nan}, {Line: nan, To: 1}, {Force: 1, From: nan}, {Force: 1, From: -inf},
		{Force: 1, From: -0.1}, {Force: 1, From: 10.1}, {Line: 1, From: 2, To: 1}, {Line: 1, From: 2, To: 10.1}, {Line: 1, To: nan},
	} {
		if _, err := ok.Solve([][]Push{{p}}); !errors.Is(err, ErrLoading) {
			t.Errorf("%+v: %v", p, err)
		}
	}
	for _, b := range []Beam{
		{Base: Fixed, Height: 0}, {Base: Fixed, Height: -1}, {Base: Fixed, Height: nan}, {Base: Fixed, Height: inf},
		{Base: Fixed, Height: 10, Holds: []float64{nan}}, {Base: Fixed, Height: 10, Holds: []float64{11}},
	} {
		if _, err := b.Solve([][]Push{{{Force: 1}}}); !errors.Is(err, ErrLoading) {
			t.Errorf("%+v: %v", b, err)
		}
	}
}

// TestCloseHeights: loads and holds that nearly coincide are solved as exactly as
// others.
func TestCloseHeights(t *testing.T) {
	for _, ends := range [][2]End{{Fixed, Free}, {Pinned, Pinned}, {Fixed, Guided}, {Fixed, Fixed}} {
		for e := -1.0; e >= -8; e -= 0.25 {
			d := 10 * math.Pow(10, e)
			b := Beam{Base: ends[0], Top: ends[1], Height: 10}
			near, err := b.Solve([][]Push{{{Force: 1, From: 5}, {Force: 0, From: 5 + d}}})
			if err != nil {
				t.Fatal(err)
			}
			plain, err := b.Solve([][]Push{{{Force: 1, From: 5}}})
			if err != nil {
				t.Fatal(err)
			}
			for _, z := range []float64{0, 5, 10} {
				want := momentAt(plain[0], z, false)
				if off := math.Abs(momentAt(near[0], z, false)-want) / 5; !(off <= 1e-9) {
					t.Errorf("%v, %.2g m apart: moment at %g off by %.2g", ends, d, z, off)
				}
			}
			// two holds so near each other are a clamp for the overhang
			if ends[1] == Free {
				continue
			}
			b = Beam{Base: ends[0], Top: Free, Height: 10, Holds: []float64{5, 5 + d}}
			over, err := b.Solve([][]Push{{{Force: 1, From: 10}}})
			if err != nil {
				t.Fatal(err)
			}
			if m := momentAt(over[0], 5+d, true); !(math.Abs(m-(5-d)) <= 1e-9*5) {
				t.Errorf("%v, holds %.2g m apart: %.12g", ends, d, m)
			}
		}
	}
}
