package elastic

import (
	"math"
	"math/rand"
	"testing"

	"gonum.org/v1/gonum/mat"

	"kern/checker/action"
	"kern/checker/model"
)

// secondOrder is the greatest bending moment (Nm, without its sign) of a
// uniform column under a compression n that does not change with height, N, and
// keeps its direction: the exact solution of E I y'''' + N y” = q, piece by
// piece, for any ends and rigid holds. It is a check of its own: nothing of the
// checked code takes part.
func secondOrder(t testing.TB, b bent, n float64) float64 {
	t.Helper()
	h, ei := b.height, modulusE*b.inertia
	// dimensionless: x/h, forces times h2/EI, moments times h/EI, y/h
	k := math.Sqrt(n * h * h / ei)
	cuts := []float64{0, 1}
	add := func(z float64) {
		for i, c := range cuts {
			if math.Abs(c-z) < 1e-12 {
				return
			}
			if z < c {
				cuts = append(cuts[:i], append([]float64{z}, cuts[i:]...)...)
				return
			}
		}
	}
	held := func(z float64) bool {
		for _, x := range b.holds {
			if math.Abs(x/h-z) < 1e-12 {
				return true
			}
		}
		return false
	}
	for _, z := range b.holds {
		add(z / h)
	}
	for _, l := range b.loads {
		add(l.At / h)
		if l.Kind == model.LineLoad {
			add(l.To / h)
		}
	}
	pieces := len(cuts) - 1
	// applied force and moment at a cut, line load on a piece
	force, moment, line := make([]float64, pieces+1), make([]float64, pieces+1), make([]float64, pieces)
	for _, l := range b.loads {
		for i, c := range cuts {
			at := math.Abs(c-l.At/h) < 1e-12
			switch l.Kind {
			case model.PointLoad:
				if at {
					force[i] += l.Value * h * h / ei
				}
			case model.EndMoment:
				if at {
					moment[i] += l.Value * h / ei
				}
			case model.LineLoad:
				if i < pieces && c > l.At/h-1e-12 && cuts[i+1] < l.To/h+1e-12 {
					line[i] += l.Value * h * h * h / ei
				}
			}
		}
	}
	// y = c0 + c1 x + c2 cos kx + c3 sin kx + q x²/(2 k²) in each piece, x from
	// its lower end
	basis := func(x float64) [4][4]float64 { // derivative, unknown
		s, c := math.Sincos(k * x)
		return [4][4]float64{{1, x, c, s}, {0, 1, -k * s, k * c}, {0, 0, -k * k * c, -k * k * s}, {0, 0, k * k * k * s, -k * k * k * c}}
	}
	own := func(q, x float64) [4]float64 { return [4]float64{q * x * x / (2 * k * k), q * x / (k * k), q / (k * k), 0} }
	size := 4 * pieces
	m, v := mat.NewDense(size, size, nil), mat.NewVecDense(size, nil)
	row := 0
	// equation adds a condition: the sum of weight times derivative of the piece
	// at x, over both sides, is right
	type side struct {
		piece  int
		x      float64
		weight [4]float64
	}
	equation := func(right float64, sides ...side) {
		for _, s := range sides {
			f, o := basis(s.x), own(line[s.piece], s.x)
			for d, w := range s.weight {
				for u := range 4 {
					m.Set(row, 4*s.piece+u, m.At(row, 4*s.piece+u)+w*f[d][u])
				}
				right -= w * o[d]
			}
		}
		v.SetVec(row, right)
		row++
	}
	shear := [4]float64{0, k * k, 0, 1}
	ends := func(e action.End, p int, x, sign float64, node int) {
		switch e {
		case action.Pinned, action.Fixed:
			equation(0, side{p, x, [4]float64{1, 0, 0, 0}})
		default: // the inner transverse force balances what acts at the end
			equation(-sign*force[node], side{p, x, shear})
		}
		switch e {
		case action.Fixed, action.Guided:
			equation(0, side{p, x, [4]float64{0, 1, 0, 0}})
		default:
			equation(sign*moment[node], side{p, x, [4]float64{0, 0, 1, 0}})
		}
	}
	ends(b.base, 0, 0, -1, 0)
	for i := 1; i < pieces; i++ {
		l := cuts[i] - cuts[i-1]
		jump := func(right float64, w [4]float64) {
			below := w
			for d := range below {
				below[d] = -below[d]
			}
			equation(right, side{i - 1, l, below}, side{i, 0, w})
		}
		jump(0, [4]float64{1, 0, 0, 0})
		jump(0, [4]float64{0, 1, 0, 0})
		jump(-moment[i], [4]float64{0, 0, 1, 0})
		if held(cuts[i]) {
			equation(0, side{i, 0, [4]float64{1, 0, 0, 0}})
		} else {
			jump(force[i], shear)
		}
	}
	ends(b.top, pieces-1, cuts[pieces]-cuts[pieces-1], 1, pieces)
	var u mat.VecDense
	if err := u.SolveVec(m, v); err != nil {
		if _, poor := err.(mat.Condition); !poor {
			t.Fatal(err)
		}
	}
	most := 0.0
	for p := range pieces {
		const steps = 200
		l := cuts[p+1] - cuts[p]
		for i := 0; i <= steps; i++ {
			f, o := basis(l * float64(i) / steps), own(line[p], l*float64(i)/steps)
			most = max(most, math.Abs(f[2][2]*u.AtVec(4*p+2)+f[2][3]*u.AtVec(4*p+3)+o[2]))
		}
	}
	return most * ei / h
}

func TestProbe(t *testing.T) {
	r := rand.New(rand.NewSource(3))
	type key struct {
		ends, holds, loads, formula string
	}
	low := map[key]float64{}
	count := map[key]int{}
	worstCase := map[key]bent{}
	pairs := [][2]action.End{{action.Pinned, action.Pinned}, {action.Fixed, action.Free}, {action.Fixed, action.Pinned}, {action.Fixed, action.Fixed}, {action.Fixed, action.Guided}, {action.Pinned, action.Guided}}
	for range 40000 {
		p := pairs[r.Intn(len(pairs))]
		b := bent{area: 1, inertia: 1e-5, modulus: 1e-4, height: 5, base: p[0], top: p[1]}
		if r.Intn(2) == 0 {
			b.base, b.top = p[1], p[0]
		}
		nh := r.Intn(3)
		if b.base == action.Free || b.top == action.Free {
			nh = 0
		}
		holds := "no holds"
		for range nh {
			b.holds = append(b.holds, b.height*(0.1+0.8*r.Float64()))
		}
		if nh == 2 && b.holds[0] > b.holds[1] {
			b.holds[0], b.holds[1] = b.holds[1], b.holds[0]
		}
		if nh > 0 {
			holds = "holds"
		}
		what := ""
		switch r.Intn(7) {
		case 0:
			what = "full line"
			b.loads = append(b.loads, model.Load{Kind: model.LineLoad, Value: 1000, To: b.height})
		case 1:
			what = "one point"
			b.loads = append(b.loads, model.Load{Kind: model.PointLoad, Value: 1000, At: b.height * r.Float64()})
		case 2:
			what = "two points"
			b.loads = append(b.loads, model.Load{Kind: model.PointLoad, Value: 1000, At: b.height * r.Float64()}, model.Load{Kind: model.PointLoad, Value: 1000 * (r.Float64()*2 - 1), At: b.height * r.Float64()})
		case 3:
			what = "part line"
			f := b.height * r.Float64() * 0.9
			b.loads = append(b.loads, model.Load{Kind: model.LineLoad, Value: 1000, At: f, To: f + (b.height-f)*(0.1+0.9*r.Float64())})
		case 4:
			what = "moment"
			b.loads = append(b.loads, model.Load{Kind: model.EndMoment, Value: 1000, At: b.height * float64(r.Intn(2))})
		case 5:
			what = "moment inside"
			b.loads = append(b.loads, model.Load{Kind: model.EndMoment, Value: 1000, At: b.height * r.Float64()})
		case 6:
			what = "mixed"
			b.loads = append(b.loads, model.Load{Kind: model.EndMoment, Value: 1000, At: 0}, model.Load{Kind: model.EndMoment, Value: 1000 * (r.Float64()*2 - 1), At: b.height}, model.Load{Kind: model.PointLoad, Value: 1000 * (r.Float64()*2 - 1), At: b.height * r.Float64()})
		}
		_, rec := b.check(355e6)
		pcr := math.Inf(1)
		// least critical load over the stretches
		full := b
		full.loads = append([]model.Load{{Kind: model.AxialLoad, Value: 1, At: b.height}}, b.loads...)
		o, rec := full.check(355e6)
		for _, c := range o.Checks {
			if c.Rule == "elastic-buckling-major" {
				pcr = c.Capacity
			}
		}
		n := 0.98 * r.Float64() * pcr
		full.loads[0].Value = n
		o, rec = full.check(355e6)
		c := firstYield(t, o)
		m := (c.Demand - n/full.area) * full.modulus
		f := ""
		for _, s := range rec.Steps {
			if s.Formula != nil && set.At(s.Symbol).Name == "a_major" {
				f = s.Formula.Text[:4]
			}
		}
		exact := secondOrder(t, b, n)
		if exact < 1e-6 {
			continue
		}
		k := key{p[0].String() + "-" + p[1].String(), holds, what, f}
		count[k]++
		if v, ok := low[k]; !ok || m/exact < v {
			low[k] = m / exact
			worstCase[k] = full
		}
	}
	for k, v := range low {
		w := ""
		if v < 0.999 {
			w = "  <<<<"
		}
		t.Logf("%-14s %-9s %-14s %-5s %5d least %.4f%s", k.ends, k.holds, k.loads, k.formula, count[k], v, w)
	}
}
