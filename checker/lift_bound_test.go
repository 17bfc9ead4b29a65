package checker_test

import (
	"fmt"
	"math"
	"math/rand"
	"testing"

	"gonum.org/v1/gonum/mat"

	"kern/checker/standard"
)

// twistMatrices are the stiffness of a member of two lifts against twist and
// warping, ends held against twist and free to warp, and what times its factor is
// taken off: the axial force with the polar radius for torsional buckling, 1/EI_z for
// lateral-torsional buckling under uniform moment (with the square of the moment).
// Cubic elements, 24 a lift.
func twistMatrices(lifts []*standard.Frame, force [2]float64, lateral bool) (k, g *mat.SymDense) {
	const n = 24
	size := 2 * (2*n + 1)
	k, g = mat.NewSymDense(size, nil), mat.NewSymDense(size, nil)
	for part, f := range lifts {
		s, m := f.Member.Section, f.Member.Material
		l := (f.To - f.From) / n
		bending := [4][4]float64{{12, 6 * l, -12, 6 * l}, {6 * l, 4 * l * l, -6 * l, 2 * l * l}, {-12, -6 * l, 12, -6 * l}, {6 * l, 2 * l * l, -6 * l, 4 * l * l}}
		slope := [4][4]float64{{36, 3 * l, -36, 3 * l}, {3 * l, 4 * l * l, -3 * l, -l * l}, {-36, -3 * l, 36, -3 * l}, {3 * l, -l * l, -3 * l, 4 * l * l}}
		value := [4][4]float64{{156, 22 * l, 54, -13 * l}, {22 * l, 4 * l * l, 13 * l, -3 * l * l}, {54, 13 * l, 156, -22 * l}, {-13 * l, -3 * l * l, -22 * l, 4 * l * l}}
		for i := range n {
			at := 2 * (part*n + i)
			for a := range 4 {
				for b := a; b < 4; b++ {
					k.SetSym(at+a, at+b, k.At(at+a, at+b)+m.E*s.Iw/(l*l*l)*bending[a][b]+m.G*s.It/(30*l)*slope[a][b])
					load := force[part] * (s.IMajor + s.IMinor) / s.Area / (30 * l) * slope[a][b]
					if lateral {
						load = l / 420 / (m.E * s.IMinor) * value[a][b]
					}
					g.SetSym(at+a, at+b, g.At(at+a, at+b)+load)
				}
			}
		}
	}
	for _, h := range []int{0, size - 2} {
		for j := range size {
			k.SetSym(h, j, 0)
			g.SetSym(h, j, 0)
		}
		k.SetSym(h, h, 1)
	}
	return k, g
}

// critical is the factor of g at which k less it stops being positive definite.
func critical(k, g *mat.SymDense, high float64) float64 {
	low := 0.0
	var c mat.Cholesky
	var d mat.SymDense
	for range 60 {
		middle := (low + high) / 2
		d.ScaleSym(-middle, g)
		d.AddSym(k, &d)
		if c.Factorize(&d) {
			low = middle
		} else {
			high = middle
		}
	}
	return low
}

// TestLiftBounds holds the bounds for twist and lateral buckling of two lifts
// between points held against the eigenvalues of the stepped member: they are
// never above them.
func TestLiftBounds(t *testing.T) {
	r := rand.New(rand.NewSource(4))
	sections := []string{"HEB 140", "HEB 160", "HEA 200", "IPE 300", "HEB 300", "IPE 200", "HEM 180"}
	for range 30 {
		lower, upper := sections[r.Intn(len(sections))], sections[r.Intn(len(sections))]
		h, z := 3+6*r.Float64(), 0.1+0.8*r.Float64()
		if lower == upper {
			continue
		}
		m := one(t, fmt.Sprintf(`basis { standard "elastic" }
column C1 { material = "S355"; height = %.6f m; selfweight off
    lift base to %.6f m { section = %q }
    lift %.6f m to top { section = %q }
    load %.6f kN at %.6f m
    load %.6f kN at top
}`, h, h*z, lower, h*z, upper, 300*r.Float64(), h*z, 20+300*r.Float64()))
		f := m.Frame()
		lifts := []*standard.Frame{f.Part(0, 0), f.Part(1, 0)}
		force := [2]float64{lifts[0].Compression(0, 0, h), lifts[1].Compression(0, 0, h)}
		k, g := twistMatrices(lifts, force, false)
		exact := critical(k, g, 1e5)
		k, g = twistMatrices(lifts, force, true)
		moment := math.Sqrt(critical(k, g, 1e16))
		for i, p := range lifts {
			s, mat := p.Member.Section, p.Member.Material
			it, iw, _ := p.Twisting()
			ncr := (mat.G*it + math.Pi*math.Pi*mat.E*iw/(p.Twist*p.Twist)) * s.Area / (s.IMajor + s.IMinor)
			if bound := ncr / force[i]; !(bound <= exact*(1+1e-9) && bound > 0) {
				t.Errorf("%s under %s, lift %d: factor of torsional buckling %g, exact %g", upper, lower, i, bound, exact)
			}
			g := p.Lateral()[0]
			l := (g.To - g.From) * g.Factor
			mcr := math.Pi / l * math.Sqrt(mat.E*s.IMinor*(mat.G*s.It+math.Pi*math.Pi*mat.E*s.Iw/(l*l)))
			if !(mcr <= moment*(1+1e-9) && mcr > 0) {
				t.Errorf("%s under %s, lift %d: M_cr %g, exact %g", upper, lower, i, mcr, moment)
			}
		}
	}
	// without a change of section the element model gives the closed form
	m := one(t, `basis { standard "elastic" }
column C1 { material = "S355"; height = 6 m; selfweight off; lift base to 2 m { section = "HEB 200" }; lift 2 m to top { section = "HEB 160" }; load 100 kN }`)
	p := m.Frame().Part(0, 0)
	whole := *p
	whole.From, whole.To = 0, 3
	k, g := twistMatrices([]*standard.Frame{&whole, &whole}, [2]float64{1e5, 1e5}, false)
	s, e, shear := p.Member.Section, p.Member.Material.E, p.Member.Material.G
	want := (shear*s.It + math.Pi*math.Pi*e*s.Iw/36) * s.Area / (s.IMajor + s.IMinor) / 1e5
	if got := critical(k, g, 1e5); math.Abs(got/want-1) > 1e-6 {
		t.Errorf("the model gives %g, the closed form %g", got, want)
	}
}
