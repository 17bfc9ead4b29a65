package checker_test

import (
	"fmt"
	"math"
	"math/rand"
	"strings"
	"testing"

	"gonum.org/v1/gonum/mat"
)

// steppedColumn is a random column of three lifts, pinned or fixed at the base and
// pinned at the top, in kN, m, cm2, cm4 and cm3.
type steppedColumn struct {
	fixed            bool
	to               [3]float64
	area, i, w       [3]float64
	low, top         float64 // forces at the first change and at the top
	lowAt, topAt     float64 // their offsets
	moment, lineLoad float64
}

func randomStepped(r *rand.Rand) steppedColumn {
	u := func(a, b float64) float64 { return a + (b-a)*r.Float64() }
	c := steppedColumn{fixed: r.Intn(3) == 0, low: u(0, 300), top: u(50, 900), lowAt: u(-0.2, 0.2), topAt: u(-0.2, 0.2)}
	h := u(3, 9)
	c.to[0] = h * u(0.05, 0.95)
	c.to[1] = c.to[0] + (h-c.to[0])*u(0.05, 0.95)
	c.to[2] = h
	for k := range 3 {
		c.area[k], c.i[k] = u(20, 120), math.Pow(10, u(2.5, 4.2))
		c.w[k] = 2 * c.i[k] / u(10, 30)
	}
	if r.Intn(3) == 0 {
		c.lowAt, c.topAt = 0, 0
	}
	switch r.Intn(3) {
	case 0:
		c.moment = u(-40, 40)
	case 1:
		c.lineLoad = u(-6, 6)
	}
	return c
}

func (c steppedColumn) text() string {
	var b strings.Builder
	base := map[bool]string{true: "fixed", false: "pinned"}[c.fixed]
	fmt.Fprintf(&b, "basis { standard \"elastic\" }\nmaterial steel { E = 210 GPa; fy = 355 MPa; density = 7850 kg/m3 }\ncolumn C1 { material = steel; height = %.9f m; selfweight off; base %s; effective = 0.1 about minor\n", c.to[2], base)
	from := 0.0
	for k := range 3 {
		fmt.Fprintf(&b, "lift %.9f m to %.9f m { section = given { A = %.9f cm2; I_major = %.9f cm4; I_minor = %.9f cm4; W_major = %.9f cm3; W_minor = %.9f cm3 } }\n", from, c.to[k], c.area[k], c.i[k], c.i[k], c.w[k], c.w[k])
		from = c.to[k]
	}
	fmt.Fprintf(&b, "load %.9f kN at %.9f m offset %.9f m about major\nload %.9f kN at top offset %.9f m about major\nload %.9f kNm about major at base\nload %.9f kN/m about major\n}", c.low, c.to[0], c.lowAt, c.top, c.topAt, c.moment, c.lineLoad)
	return b.String()
}

// exact is the greatest stress over f_y by second-order theory: cubic elements with
// geometric stiffness, 40 along the height; +Inf past the critical load.
func (c steppedColumn) exact() float64 {
	var z []float64
	var part []int
	from := 0.0
	for k, to := range c.to {
		n := max(3, int(40*(to-from)/c.to[2]))
		for i := range n {
			z, part = append(z, from+(to-from)*float64(i)/float64(n)), append(part, k)
		}
		from = to
	}
	z = append(z, from)
	size := 2 * len(z)
	stiffness, load := mat.NewSymDense(size, nil), make([]float64, size)
	force := func(i int) float64 {
		if part[i] == 0 {
			return (c.low + c.top) * 1e3
		}
		return c.top * 1e3
	}
	element := func(i int) (e [4][4]float64, fixed [4]float64) {
		l, ei, p, q := z[i+1]-z[i], 210e9*c.i[part[i]]*1e-8, force(i), c.lineLoad*1e3
		bending := [4][4]float64{{12, 6 * l, -12, 6 * l}, {6 * l, 4 * l * l, -6 * l, 2 * l * l}, {-12, -6 * l, 12, -6 * l}, {6 * l, 2 * l * l, -6 * l, 4 * l * l}}
		axial := [4][4]float64{{36, 3 * l, -36, 3 * l}, {3 * l, 4 * l * l, -3 * l, -l * l}, {-36, -3 * l, 36, -3 * l}, {3 * l, -l * l, -3 * l, 4 * l * l}}
		for a := range 4 {
			for b := range 4 {
				e[a][b] = ei/(l*l*l)*bending[a][b] - p/(30*l)*axial[a][b]
			}
		}
		return e, [4]float64{q * l / 2, q * l * l / 12, q * l / 2, -q * l * l / 12}
	}
	for i := range part {
		e, f := element(i)
		for a := range 4 {
			load[2*i+a] += f[a]
			for b := a; b < 4; b++ {
				stiffness.SetSym(2*i+a, 2*i+b, stiffness.At(2*i+a, 2*i+b)+e[a][b])
			}
		}
	}
	for i := range z {
		if z[i] == c.to[0] {
			load[2*i+1] += c.low * c.lowAt * 1e3
		}
	}
	load[size-1] += c.top * c.topAt * 1e3
	load[1] += c.moment * 1e3
	held := []int{0, size - 2}
	if c.fixed {
		held = append(held, 1)
	}
	for _, h := range held {
		for j := range size {
			stiffness.SetSym(h, j, 0)
		}
		stiffness.SetSym(h, h, 1e7)
		load[h] = 0
	}
	var factors mat.Cholesky
	if !factors.Factorize(stiffness) {
		return math.Inf(1)
	}
	var moved mat.VecDense
	if err := factors.SolveVecTo(&moved, mat.NewVecDense(size, load)); err != nil {
		return math.Inf(1)
	}
	worst := 0.0
	for i, k := range part {
		e, f := element(i)
		for _, a := range []int{1, 3} {
			m := -f[a]
			for b := range 4 {
				m += e[a][b] * moved.AtVec(2*i+b)
			}
			worst = max(worst, (force(i)/(c.area[k]*1e-4)+math.Abs(m)/(c.w[k]*1e-6))/355e6)
		}
	}
	return worst
}

// TestLiftsExact holds first yield of stepped columns against second-order theory:
// the amplification by the critical load of the stepped column is never too small.
// 40,000 such columns were tried by hand (seeds 2 and 5); the least quotient was 1.
func TestLiftsExact(t *testing.T) {
	r := rand.New(rand.NewSource(11))
	decided := 0
	for range 60 {
		c := randomStepped(r)
		m := one(t, c.text())
		got, want := row(m, "first-yield").Utilisation, c.exact()
		if math.IsInf(want, 1) {
			got = max(got, row(m, "elastic-buckling-major").Utilisation) // without moments nothing yields first
		}
		if got >= 1 && want >= 1 {
			continue // fails by both
		}
		decided++
		if !(got >= want*(1-1e-5)) {
			t.Errorf("utilisation %g, by second-order theory %g\n%s", got, want, c.text())
		}
	}
	if decided < 15 {
		t.Errorf("only %d columns were not far past yield", decided)
	}
}
