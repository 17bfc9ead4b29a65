package unit

import (
	"math"
	"math/rand/v2"
	"testing"
)

// anyDim draws a dimension with every exponent within limit sixths of zero.
func anyDim(r *rand.Rand, limit int) Dim {
	e := func() int8 { return int8(r.IntN(2*limit+1) - limit) }
	return Dim{e(), e(), e(), e()}
}

func TestMulDivAreInverse(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 1))
	held := 0
	for range 20000 {
		d, e := anyDim(r, 127), anyDim(r, 127)
		product, ok := d.Mul(e)
		fits := true
		for _, pair := range [][2]int8{{d.L, e.L}, {d.M, e.M}, {d.T, e.T}, {d.A, e.A}} {
			sum := int(pair[0]) + int(pair[1])
			fits = fits && sum >= math.MinInt8 && sum <= math.MaxInt8
		}
		if ok != fits {
			t.Fatalf("%v.Mul(%v) reports %v, sums fit: %v", d, e, ok, fits)
		}
		if !ok {
			if product != None {
				t.Fatalf("%v.Mul(%v) failed with %v", d, e, product)
			}
			continue
		}
		held++
		if back, ok := product.Div(e); !ok || back != d {
			t.Fatalf("%v*%v/%v = %v, %v", d, e, e, back, ok)
		}
		if swapped, ok := e.Mul(d); !ok || swapped != product {
			t.Fatalf("%v*%v differs from %v*%v", d, e, e, d)
		}
	}
	if held < 1000 {
		t.Fatalf("only %d products were held", held)
	}
}

func TestPow(t *testing.T) {
	r := rand.New(rand.NewPCG(2, 2))
	for range 5000 {
		d := anyDim(r, 10)
		product := None
		for n := 1; n <= 12; n++ {
			product, _ = product.Mul(d) // 12*10 sixths fit
			if power, ok := d.Pow(n, 1); !ok || power != product {
				t.Fatalf("%v to %d = %v, %v; by products %v", d, n, power, ok, product)
			}
			if root, ok := product.Pow(1, n); !ok || root != d {
				t.Fatalf("root %d of %v = %v, %v; want %v", n, product, root, ok, d)
			}
			if inverse, ok := product.Pow(-1, -n); !ok || inverse != d {
				t.Fatalf("%v to -1/-%d = %v, %v; want %v", product, n, inverse, ok, d)
			}
		}
	}
	for _, c := range []struct {
		d        Dim
		num, den int
		want     Dim
		ok       bool
	}{
		{Area, 1, 2, Length, true},
		{Length, 1, 2, Dim{L: 3}, true},
		{Length, 1, 3, Dim{L: 2}, true},
		{Length, 1, 6, Dim{L: 1}, true},
		{Length, 1, 4, None, false},
		{Length, 1, 12, None, false},
		{Length, 0, 5, None, true},
		{Length, -1, 1, Curvature, true},
		{Length, 1, -1, Curvature, true},
		{Length, 2, 4, Dim{L: 3}, true},
		{Length, 21, 1, Dim{L: 126}, true},
		{Length, 22, 1, None, false},
		{Length, 1, 0, None, false},
		{None, 1, 0, None, false},
		{None, math.MaxInt, 7, None, true},
		{Length, math.MaxInt, 1, None, false},
		{Length, math.MinInt, 1, None, false},
		{Length, math.MinInt, -1, None, false},
		{Length, 1, math.MinInt, None, false},
		{Length, math.MaxInt, math.MaxInt, Length, true},
		{Length, math.MinInt, math.MinInt, Length, true},
		{Dim{L: -128}, 1, 128, Dim{L: -1}, true},
		{Dim{L: -128}, -1, 1, None, false},
	} {
		if got, ok := c.d.Pow(c.num, c.den); got != c.want || ok != c.ok {
			t.Errorf("%v.Pow(%d, %d) = %v, %v; want %v, %v", c.d, c.num, c.den, got, ok, c.want, c.ok)
		}
	}
}

// The relations between the named dimensions are those of mechanics.
func TestNamedDimensions(t *testing.T) {
	over := func(a, b Dim) Dim {
		d, ok := a.Div(b)
		if !ok {
			t.Fatalf("%v/%v", a, b)
		}
		return d
	}
	for _, c := range []struct {
		what      string
		got, want Dim
	}{
		{"area / length", over(Area, Length), Length},
		{"volume / area", over(Volume, Area), Length},
		{"m4 / m3", over(Length4, Volume), Length},
		{"m5 / m4", over(Length5, Length4), Length},
		{"m6 / m4", over(Length6, Length4), Area},
		{"1 / length", over(None, Length), Curvature},
		{"1 / time", over(None, Time), Frequency},
		{"length / time", over(Length, Time), Velocity},
		{"velocity / time", over(Velocity, Time), Acceleration},
		{"force / mass", over(Force, Mass), Acceleration},
		{"moment / force", over(Moment, Force), Length},
		{"force / stress", over(Force, Stress), Area},
		{"force / length", over(Force, Length), ForcePerLength},
		{"mass / volume", over(Mass, Volume), Density},
		{"mass / length", over(Mass, Length), MassPerLength},
		{"mass / area", over(Mass, Area), MassPerArea},
		{"force / volume", over(Force, Volume), WeightDensity},
		{"weight density / acceleration", over(WeightDensity, Acceleration), Density},
		{"moment / angle", over(Moment, Angle), RotationalStiffness},
	} {
		if c.got != c.want {
			t.Errorf("%s = %v (%s), want %v (%s)", c.what, c.got, c.got.Name(), c.want, c.want.Name())
		}
	}
	if !None.IsNone() || Angle.IsNone() {
		t.Error("a pure number is not an angle")
	}
}

func TestNames(t *testing.T) {
	for _, c := range []struct {
		d          Dim
		name, base string
	}{
		{None, "pure number", "1"},
		{Length, "length", "m"},
		{Force, "force", "N"},
		{Stress, "stress or pressure", "Pa"},
		{Moment, "moment", "N*m"},
		{ForcePerLength, "force per length", "N/m"},
		{Density, "density", "kg/m3"},
		{RotationalStiffness, "rotational stiffness", "N*m/rad"},
		{Rigidity, "flexural rigidity", "N*m2"},
		{Dim{L: 24, M: 6, T: -12}, "kg·m4/s2", "kg*m4/s2"},
		{Dim{L: 3}, "m^(1/2)", "m^(1/2)"},
		{Dim{L: 15, T: -9}, "m^(5/2)/s^(3/2)", "m^(5/2)/s^(3/2)"},
		{Dim{L: -12, M: -6}, "1/kg/m2", "1/kg/m2"},
		{Dim{L: 120}, "m12·m8", "m12*m8"},
	} {
		if name, base := c.d.Name(), c.d.Base(); name != c.name || base != c.base {
			t.Errorf("%v is %q, %q; want %q, %q", c.d, name, base, c.name, c.base)
		}
	}
	seen := map[string]Dim{}
	for d, n := range namings {
		if other, ok := seen[n.name]; ok {
			t.Errorf("%v and %v are both a %s", d, other, n.name)
		}
		seen[n.name] = d
	}
}

// Every Base reads back to its own dimension with the factor 1.
func TestBaseReadsBack(t *testing.T) {
	check := func(d Dim) {
		t.Helper()
		u, err := Parse(d.Base())
		if err != nil || u.Dim != d || u.Factor != 1 {
			t.Fatalf("Base of %v: Parse(%q) = %v, %v", d, d.Base(), u, err)
		}
	}
	for d := range namings {
		check(d)
	}
	for _, e := range []int8{-128, -127, -73, -72, 72, 73, 127} {
		check(Dim{e, e, e, e})
	}
	r := rand.New(rand.NewPCG(3, 3))
	for range 5000 {
		check(anyDim(r, 127))
		check(anyDim(r, 12))
	}
}
