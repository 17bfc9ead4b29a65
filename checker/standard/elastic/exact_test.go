package elastic

import (
	"math"
	"math/rand"
	"sort"
	"testing"

	"gonum.org/v1/gonum/mat"

	"kern/checker/action"
	"kern/checker/model"
)

// column of the beam-column equation: an exact solution of its own, in which
// nothing of the checked code takes part.
type exactColumn struct {
	bent
	cuts                 []float64 // heights over the column's height, 0 to 1
	force, moment        []float64 // at each cut, made dimensionless
	line, squared, axial []float64 // of each piece: line load, k² and compression (N)
	m                    *mat.Dense
	v                    *mat.VecDense
	row                  int
}

// secondOrder is the greatest stress (Pa, compression, in the outermost fibre)
// of a uniform column with loads along it and across it by the exact solution
// of (E I y”)” + (N y')' = q, piece by piece, for any ends and rigid holds. The
// loads keep their direction.
func secondOrder(t testing.TB, b bent) float64 {
	t.Helper()
	x := exactColumn{bent: b, cuts: []float64{0, 1}}
	x.cut()
	x.load()
	size := 4 * len(x.line)
	x.m, x.v = mat.NewDense(size, size, nil), mat.NewVecDense(size, nil)
	x.conditions()
	var u mat.VecDense
	if err := u.SolveVec(x.m, x.v); err != nil {
		if _, poor := err.(mat.Condition); !poor {
			t.Fatal(err)
		}
	}
	most := 0.0
	for p := range x.line {
		const steps = 200
		l := x.cuts[p+1] - x.cuts[p]
		for i := 0; i <= steps; i++ {
			z := l * float64(i) / steps
			f, o := x.basis(p, z), x.own(p, z)
			m := o[2]
			for c := range 4 {
				m += f[2][c] * u.AtVec(4*p+c)
			}
			most = max(most, math.Abs(x.axial[p])/b.area+math.Abs(m)*modulusE*b.inertia/b.height/b.modulus)
		}
	}
	return most
}

func near(a, b float64) bool { return math.Abs(a-b) < 1e-12 }

// cut divides the column wherever something happens.
func (x *exactColumn) cut() {
	add := func(z float64) {
		for i, c := range x.cuts {
			if near(c, z) {
				return
			}
			if z < c {
				x.cuts = append(x.cuts[:i], append([]float64{z}, x.cuts[i:]...)...)
				return
			}
		}
	}
	for _, z := range x.holds {
		add(z / x.height)
	}
	for _, s := range x.springs {
		add(s.At / x.height)
	}
	for _, l := range x.loads {
		add(l.At / x.height)
		if l.Kind == model.LineLoad {
			add(l.To / x.height)
		}
	}
}

// load makes the loads dimensionless: forces times h2/EI, moments times h/EI.
func (x *exactColumn) load() {
	h, ei := x.height, modulusE*x.inertia
	pieces := len(x.cuts) - 1
	x.force, x.moment = make([]float64, pieces+1), make([]float64, pieces+1)
	x.line, x.squared, x.axial = make([]float64, pieces), make([]float64, pieces), make([]float64, pieces)
	for _, l := range x.loads {
		for i, c := range x.cuts {
			at := near(c, l.At/h)
			switch {
			case l.Kind == model.PointLoad && at:
				x.force[i] += l.Value * h * h / ei
			case l.Kind == model.EndMoment && at:
				x.moment[i] += l.Value * h / ei
			case l.Kind == model.LineLoad && i < pieces && c > l.At/h-1e-12 && x.cuts[i+1] < l.To/h+1e-12:
				x.line[i] += l.Value * h * h * h / ei
			case l.Kind == model.AxialLoad:
				if at {
					x.moment[i] += l.Value * l.Offset[0] * h / ei
				}
				if i < pieces && c < l.At/h-1e-12 {
					x.axial[i] += l.Value
					x.squared[i] += l.Value * h * h / ei
				}
			}
		}
	}
}

// basis are the solutions without load across, by derivative and unknown:
// 1, x, cos kx, sin kx; without axial force 1, x, x2, x3.
func (x *exactColumn) basis(p int, z float64) [4][4]float64 {
	k := math.Sqrt(x.squared[p])
	if k == 0 {
		return [4][4]float64{{1, z, z * z, z * z * z}, {0, 1, 2 * z, 3 * z * z}, {0, 0, 2, 6 * z}, {0, 0, 0, 6}}
	}
	s, c := math.Sincos(k * z)
	return [4][4]float64{{1, z, c, s}, {0, 1, -k * s, k * c}, {0, 0, -k * k * c, -k * k * s}, {0, 0, k * k * k * s, -k * k * k * c}}
}

// own is a solution for the line load of the piece.
func (x *exactColumn) own(p int, z float64) [4]float64 {
	q, kk := x.line[p], x.squared[p]
	if kk == 0 {
		return [4]float64{q * z * z * z * z / 24, q * z * z * z / 6, q * z * z / 2, q * z}
	}
	return [4]float64{q * z * z / (2 * kk), q * z / kk, q / kk, 0}
}

// side is one side of a condition: weights of y, y', y” and y”' of a piece.
type side struct {
	piece  int
	z      float64
	weight [4]float64
}

// equation demands that the sides add up to right.
func (x *exactColumn) equation(right float64, sides ...side) {
	for _, s := range sides {
		f, o := x.basis(s.piece, s.z), x.own(s.piece, s.z)
		for d, w := range s.weight {
			for u := range 4 {
				x.m.Set(x.row, 4*s.piece+u, x.m.At(x.row, 4*s.piece+u)+w*f[d][u])
			}
			right -= w * o[d]
		}
	}
	x.v.SetVec(x.row, right)
	x.row++
}

// across is the force across the column in a piece: E I y”' + N y'.
func (x *exactColumn) across(p int, sign float64) [4]float64 {
	return [4]float64{0, sign * x.squared[p], 0, sign}
}

func (x *exactColumn) conditions() {
	pieces := len(x.line)
	x.end(x.base, 0, 0, -1, 0)
	for i := 1; i < pieces; i++ {
		l := x.cuts[i] - x.cuts[i-1]
		x.equation(0, side{i - 1, l, [4]float64{-1}}, side{i, 0, [4]float64{1}})
		x.equation(0, side{i - 1, l, [4]float64{0, -1}}, side{i, 0, [4]float64{0, 1}})
		x.equation(-x.moment[i], side{i - 1, l, [4]float64{0, 0, -1}}, side{i, 0, [4]float64{0, 0, 1}})
		held := false
		for _, h := range x.holds {
			held = held || near(h/x.height, x.cuts[i])
		}
		if held {
			x.equation(0, side{i, 0, [4]float64{1}})
		} else {
			above := x.across(i, 1)
			for _, s := range x.springs {
				if near(s.At/x.height, x.cuts[i]) {
					above[0] += s.Stiffness * x.height * x.height * x.height / (modulusE * x.inertia)
				}
			}
			x.equation(x.force[i], side{i - 1, l, x.across(i-1, -1)}, side{i, 0, above})
		}
	}
	x.end(x.top, pieces-1, x.cuts[pieces]-x.cuts[pieces-1], 1, pieces)
}

// end writes the two conditions of an end.
func (x *exactColumn) end(e action.End, p int, z, sign float64, node int) {
	spring, h, ei := x.baseSpr, x.height, modulusE*x.inertia
	if sign > 0 {
		spring = x.topSpr
	}
	if e == action.Pinned || e == action.Fixed {
		x.equation(0, side{p, z, [4]float64{1}})
	} else {
		across := x.across(p, 1)
		across[0] -= sign * spring.Lateral * h * h * h / ei
		x.equation(-sign*x.force[node], side{p, z, across})
	}
	if e == action.Fixed || e == action.Guided {
		x.equation(0, side{p, z, [4]float64{0, 1}})
	} else {
		x.equation(sign*x.moment[node], side{p, z, [4]float64{0, sign * spring.Turning * h / ei, 1}})
	}
}

// randomBent is a column that random loads across it, end moments and offset
// loads bend, with the axial force at the top (and, for stepped, also below).
func randomBent(r *rand.Rand, stepped bool) (b bent, kind string) {
	pairs := [][2]action.End{{action.Pinned, action.Pinned}, {action.Fixed, action.Free}, {action.Fixed, action.Pinned}, {action.Fixed, action.Fixed}, {action.Fixed, action.Guided}, {action.Pinned, action.Guided}}
	p := pairs[r.Intn(len(pairs))]
	b = bent{area: 1e-3 * (1 + 9*r.Float64()), inertia: 1e-5, modulus: 1e-4, height: 5, base: p[0], top: p[1]}
	if r.Intn(2) == 0 && !stepped {
		b.base, b.top = p[1], p[0]
	}
	kind = p[0].String() + "-" + p[1].String()
	if holds := r.Intn(3); p[1] != action.Free && holds > 0 {
		kind += " with holds"
		even := r.Intn(3) == 0
		for i := range holds {
			z := b.height * float64(i+1) / float64(holds+1)
			if !even {
				z = b.height * (float64(i) + 0.1 + 0.8*r.Float64()) / float64(holds)
			}
			b.holds = append(b.holds, z)
		}
	}
	h := b.height
	somewhere := func() float64 { return h * r.Float64() }
	value := func() float64 { return 2000*r.Float64() - 1000 }
	b.loads = append(b.loads, model.Load{Kind: model.AxialLoad, Value: 1, At: h})
	push := func(l ...model.Load) { b.loads = append(b.loads, l...) }
	switch r.Intn(8) {
	case 0:
		kind += ", line load over the height"
		push(model.Load{Kind: model.LineLoad, Value: 1000, To: h})
	case 1:
		kind += ", one point load"
		push(model.Load{Kind: model.PointLoad, Value: 1000, At: somewhere()})
	case 2:
		kind += ", two point loads"
		push(model.Load{Kind: model.PointLoad, Value: 1000, At: somewhere()}, model.Load{Kind: model.PointLoad, Value: value(), At: somewhere()})
	case 3:
		kind += ", line load on a part"
		from := somewhere() * 0.9
		push(model.Load{Kind: model.LineLoad, Value: 1000, At: from, To: from + (h-from)*(0.1+0.9*r.Float64())})
	case 4:
		kind += ", end moments"
		push(model.Load{Kind: model.EndMoment, Value: 1000, At: 0}, model.Load{Kind: model.EndMoment, Value: value(), At: h})
	case 5:
		kind += ", moment anywhere"
		push(model.Load{Kind: model.EndMoment, Value: 1000, At: somewhere()})
	case 6:
		kind += ", offset load"
		b.loads[0].Offset[0] = 0.05 * r.Float64()
	case 7:
		kind += ", all together"
		push(model.Load{Kind: model.EndMoment, Value: value(), At: 0}, model.Load{Kind: model.PointLoad, Value: value(), At: somewhere()}, model.Load{Kind: model.LineLoad, Value: value(), To: h})
		b.loads[0].Offset[0] = 0.05 * r.Float64()
	}
	if stepped {
		push(model.Load{Kind: model.AxialLoad, Value: 3 * r.Float64(), At: h * (0.05 + 0.9*r.Float64()), Offset: [2]float64{0.1 * (r.Float64() - 0.5)}})
	}
	return b, kind
}

// TestStressIsAnUpperBound holds the stress of random columns, with every kind
// of end, holds and load, against the exact second-order solution: it is never
// below it. That the amplification is an upper bound follows from theory for
// columns on two supports, and rests on this test for all others.
func TestStressIsAnUpperBound(t *testing.T) {
	r := rand.New(rand.NewSource(3))
	over := map[string]spread{}
	for i := range 12000 {
		stepped := i%2 == 0
		b, kind := randomBent(r, stepped)
		if stepped { // little at the top, so that the axial force steps
			b.loads[0].Value = math.Pow(r.Float64(), 4) + 1e-6
			kind = "stepped, " + kind
		}
		o, _ := b.check(355e6)
		// the share of the critical load that the axial forces make together
		share := 0.0
		for _, c := range o.Checks {
			if c.Rule == "elastic-buckling-major" {
				share = c.Utilisation
			}
		}
		if !(share > 0) {
			t.Fatalf("%s: no critical load", kind)
		}
		scale := 0.98 * math.Sqrt(r.Float64()) / share
		across := math.Pow(10, 2*r.Float64()-0.5)
		for j := range b.loads {
			if b.loads[j].Kind == model.AxialLoad {
				b.loads[j].Value *= scale
				b.loads[j].Offset[0] /= 1 + 100*r.Float64()
			} else {
				b.loads[j].Value *= across
			}
		}
		o, _ = b.check(355e6)
		c := firstYield(t, o)
		exact := secondOrder(t, b)
		ratio := c.Demand / exact
		over[kind] = append(over[kind], ratio)
		if !(ratio > 0.9999) {
			t.Errorf("%s: sigma = %.6g MPa, exact %.6g (%.4f)\n%+v", kind, c.Demand/1e6, exact/1e6, ratio, b)
		}
	}
	var names []string
	for n := range over {
		names = append(names, n)
	}
	sort.Strings(names)
	for _, n := range names {
		over[n].log(t, n)
	}
}

// TestAmplificationByName pins the loadings in which a smaller amplification
// than the secant, or one that follows the moment of first order from height to
// height, is not safe.
func TestAmplificationByName(t *testing.T) {
	axial := func(n, at float64) model.Load { return model.Load{Kind: model.AxialLoad, Value: n, At: at} }
	push := func(p, at float64) model.Load { return model.Load{Kind: model.PointLoad, Value: p, At: at} }
	line := model.Load{Kind: model.LineLoad, Value: 1000, To: 5}
	for _, c := range []struct {
		name      string
		base, top action.End
		loads     []model.Load
		formula   string
	}{
		{"two loads near the ends: the moment is even between them", action.Pinned, action.Pinned, []model.Load{axial(1, 5), push(1000, 0.5), push(1000, 4.5)}, "secant"},
		{"a load below a guided end: the moment is even above it", action.Pinned, action.Guided, []model.Load{axial(1, 5), push(1000, 0.5)}, "secant"},
		{"a load at the top of a cantilever against a line load", action.Fixed, action.Free, []model.Load{axial(1, 5), {Kind: model.LineLoad, Value: -1000, To: 5}, push(2400, 5)}, "secant"},
		{"a line load and a point load", action.Pinned, action.Pinned, []model.Load{axial(1, 5), line, push(1000, 1)}, "secant"},
		{"a line load over the height", action.Pinned, action.Pinned, []model.Load{axial(1, 5), line}, "one load"},
		{"two line loads over the height", action.Pinned, action.Guided, []model.Load{axial(1, 5), line, line}, "one load"},
		{"one point load", action.Fixed, action.Pinned, []model.Load{axial(1, 5), push(1000, 2)}, "one load"},
		{"the axial force comes in below the moment", action.Pinned, action.Guided, []model.Load{axial(0.01, 5), axial(1, 4), {Kind: model.EndMoment, Value: 2e4, At: 4.1}}, "secant"},
	} {
		for _, n := range []float64{0.1, 0.4, 0.7, 0.95} {
			b := bent{area: 2e-3, inertia: 1e-5, modulus: 1e-4, height: 5, base: c.base, top: c.top, loads: append([]model.Load(nil), c.loads...)}
			_, record := b.check(355e6)
			pcr := last(record, "P_cr_major")
			for i := range b.loads {
				if b.loads[i].Kind == model.AxialLoad {
					b.loads[i].Value *= n * pcr / 1.01
				}
			}
			o, record := b.check(355e6)
			formula := "none"
			for _, s := range record.Steps {
				switch s.Formula {
				case axes[0].secant:
					formula = "secant"
				case axes[0].sway:
					formula = "one load"
				}
			}
			if formula != c.formula {
				t.Errorf("%s: amplified by %s, want %s", c.name, formula, c.formula)
			}
			if got, exact := firstYield(t, o).Demand, secondOrder(t, b); got < exact*0.9999 {
				t.Errorf("%s, n = %g: sigma = %.6g MPa, exact %.6g", c.name, n, got/1e6, exact/1e6)
			}
		}
	}
}
