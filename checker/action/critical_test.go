package action

import (
	"math"
	"math/rand"
	"testing"
)

// uniform is a bar with E I = 1 under a unit force, cut into equal parts.
func uniform(base, top End, height float64, parts int) *Bar {
	b := &Bar{Base: base, Top: top}
	for i := range parts + 1 {
		b.Nodes = append(b.Nodes, height*float64(i)/float64(parts))
		b.Held = append(b.Held, false)
	}
	for range parts {
		b.Force, b.Stiffness = append(b.Force, 1), append(b.Stiffness, 1)
	}
	return b
}

// TestEuler: the cases of Euler, with the smallest root of tan u = u where the
// fixed-pinned bar needs it (Timoshenko and Gere, Theory of Elastic Stability,
// 2.1 and 2.2, from memory), cut into any number of parts.
func TestEuler(t *testing.T) {
	const root = 4.493409457909064 // tan u = u
	for _, c := range []struct {
		base, top End
		want      float64 // N L²/(E I)
	}{
		{Pinned, Pinned, pi * pi},
		{Fixed, Fixed, 4 * pi * pi},
		{Fixed, Pinned, root * root},
		{Fixed, Free, pi * pi / 4},
		{Fixed, Guided, pi * pi},
		{Pinned, Guided, pi * pi / 4},
		{Pinned, Free, 0},
		{Guided, Guided, 0},
		{Guided, Free, 0},
		{Free, Free, 0},
	} {
		for _, height := range []float64{0.2, 1, 3.6, 50} {
			for _, parts := range []int{1, 2, 3, 7, 20, 60} {
				for _, b := range []*Bar{uniform(c.base, c.top, height, parts), uniform(c.top, c.base, height, parts)} {
					want := c.want / (height * height)
					// many short parts cost digits
					tolerance := 1e-12 + 1e-13*float64(parts*parts*parts)
					if got := b.Critical(); !(math.Abs(got-want) <= tolerance*want) {
						t.Errorf("%v-%v, %g m in %d parts: %.15g, want %.15g", b.Base, b.Top, height, parts, got, want)
					}
				}
			}
		}
	}
}

// TestStability: the file names its sources; each record within 1e-6. The figures
// printed in tables, where there are any, within what three digits allow.
func TestStability(t *testing.T) {
	worst := 0.0
	printed := 0
	for i, r := range records(t, "stability.csv", 327) {
		b := &Bar{
			Base: end(t, r["base"]), Top: end(t, r["top"]), Nodes: numbers(t, r["nodes"]),
			Lateral: numbers(t, r["lateral"]), Turning: numbers(t, r["turning"]),
			Force: numbers(t, r["force"]), Stiffness: numbers(t, r["stiffness"]),
		}
		for _, x := range numbers(t, r["held"]) {
			b.Held = append(b.Held, x == 1)
		}
		if b.Held == nil {
			b.Held = make([]bool, len(b.Nodes))
		}
		n := b.Critical()
		var got float64
		switch r["kind"] {
		case "n":
			got = n / (pi * pi)
		case "m":
			got = n
		case "k":
			got = pi / math.Sqrt(n)
		default:
			t.Fatalf("record %d: kind %q", i+1, r["kind"])
		}
		want := number(t, r["figure"])
		off := math.Abs(got/want - 1)
		worst = max(worst, off)
		if !(off <= 1e-6) {
			t.Errorf("record %d, %v: %.10g, want %.10g", i+1, r, got, want)
		}
		if r["printed"] != "" {
			printed++
			if p := number(t, r["printed"]); math.Abs(got/p-1) > 0.03 || math.Abs(got/p-1) > 0.005 && math.Abs(got-p) > 0.0051 {
				t.Errorf("record %d, %v: %.6g, printed %g", i+1, r, got, p)
			}
		}
	}
	if printed != 28 {
		t.Errorf("%d printed figures, want 28", printed)
	}
	t.Logf("worst relative deviation %.1e", worst)
}

// TestSpringThreshold: a bar on equal springs buckles between them only from the
// threshold on (Timoshenko and Gere 2.6, from memory: k = m Pe/(α L) with
// α = 1/(2 (1 + cos(π/m))), Pe the load of a span).
func TestSpringThreshold(t *testing.T) {
	for m := 2; m <= 9; m++ {
		b := uniform(Pinned, Pinned, float64(m), m)
		b.Lateral = make([]float64, m+1)
		alpha := 1 / (2 * (1 + math.Cos(pi/float64(m))))
		for _, x := range []float64{0.9, 0.999, 1.001, 10} {
			for i := 1; i < m; i++ {
				b.Lateral[i] = x * pi * pi / alpha
			}
			ratio := b.Critical() / (pi * pi)
			switch {
			case x > 1 && math.Abs(ratio-1) > 1e-9:
				t.Errorf("%d spans, %g of the threshold: %.12g of the span's load", m, x, ratio)
			case x < 1 && !(ratio < 1-1e-5):
				t.Errorf("%d spans, %g of the threshold: %.12g of the span's load", m, x, ratio)
			}
		}
	}
}

// TestCriticalSecond: against the second implementation, which is no published
// source.
func TestCriticalSecond(t *testing.T) {
	worst, mechanisms := 0.0, 0
	for i, r := range records(t, "critical-second.csv", 300) {
		got := CriticalUniform(end(t, r["base"]), end(t, r["top"]), numbers(t, r["holds"]), number(t, r["height"]))
		want := number(t, r["critical"]) / number(t, r["stiffness"])
		if want == 0 {
			mechanisms++
			if got != 0 {
				t.Errorf("record %d, %v: %g, want none", i+1, r, got)
			}
			continue
		}
		off := math.Abs(got/want - 1)
		worst = max(worst, off)
		if !(off <= 1e-6) {
			t.Errorf("record %d, %v: %.10g, want %.10g", i+1, r, got, want)
		}
	}
	if mechanisms != 15 {
		t.Errorf("%d mechanisms, want 15", mechanisms)
	}
	t.Logf("worst relative deviation %.1e", worst)
}

// TestShortParts: a hold very close to a support works as a clamp; its critical
// force lies between those of the bar pinned and fixed there and tends to the
// latter.
func TestShortParts(t *testing.T) {
	for _, d := range []float64{1, 0.1, 0.01, 1e-3, 1e-4, 1e-5} {
		clamp := CriticalUniform(Fixed, Pinned, nil, 10-d)
		for _, base := range []End{Pinned, Fixed} {
			got := CriticalUniform(base, Pinned, []float64{d}, 10)
			if !(got <= clamp*(1+1e-9) && got >= clamp*(1-0.8*d)) {
				t.Errorf("%v base, hold at %g: %.9g, clamped %.9g", base, d, got, clamp)
			}
		}
		// two holds as a clamp in the middle: two cantilevers
		got := CriticalUniform(Free, Free, []float64{5, 5 + d}, 10)
		want := pi * pi / 4 / 25
		if !(got <= want*(1+1e-9)) || !(got >= want*(1-1.4*d/5)) {
			t.Errorf("holds %g apart: %.9g, clamped %.9g", d, got, want)
		}
	}
}

// TestStabilityFunctions: the series and the closed forms meet where they change
// over, and the functions are those of a beam without a force (4, 2, 12).
func TestStabilityFunctions(t *testing.T) {
	if s, c, w := stability(0); s != 4 || c != 2 || w != 12 {
		t.Errorf("without a force: %v %v %v", s, c, w)
	}
	for _, x := range []float64{4, -4, -1600} {
		s, c, w := stability(math.Nextafter(x, 0))
		s2, c2, w2 := stability(math.Nextafter(x, 2*x))
		if off := max(math.Abs(s/s2-1), math.Abs(c/c2-1), math.Abs(w/w2-1)); off > 3e-14 {
			t.Errorf("at %g off by %.2g", x, off)
		}
	}
	// The equation of the bar is E I w'''' + N w'' = 0. Its end moments from
	// elementary functions, by other means: tan of the half length.
	for x := 0.3; x < 39; x += 0.37 {
		u := math.Sqrt(x)
		if math.Abs(u-pi) < 0.02 { // tan has a pole there
			continue
		}
		s, c, _ := stability(x)
		symmetric := u / math.Tan(u/2)                                 // s - c
		antisymmetric := x / 2 * math.Tan(u/2) / (math.Tan(u/2) - u/2) // s + c
		if math.Abs(s-c-symmetric) > 1e-9*(1+math.Abs(symmetric)) || math.Abs(s+c-antisymmetric) > 1e-9*(1+math.Abs(antisymmetric)) {
			t.Errorf("x %g: s-c %.12g, want %.12g; s+c %.12g, want %.12g", x, s-c, symmetric, s+c, antisymmetric)
		}
	}
}

// TestTension: parts in tension stiffen, without a limit: towards the
// compressed part clamped where it meets them.
func TestTension(t *testing.T) {
	clamp := CriticalUniform(Pinned, Fixed, nil, 5)
	last := 0.0
	for _, n := range []float64{0, 1, 1e2, 1e4, 1e5, 1e6, 1e7, 1e9, 1e12} {
		b := &Bar{Base: Pinned, Top: Pinned, Nodes: []float64{0, 5, 10}, Held: []bool{false, true, false}, Force: []float64{1, -n}, Stiffness: []float64{1, 1}}
		got := b.Critical()
		if !(got > last && got < clamp) {
			t.Errorf("tension %g: %g, before %g, limit %g", n, got, last, clamp)
		}
		last = got
	}
	if last < 0.999*clamp {
		t.Errorf("%g, want nearly %g", last, clamp)
	}
	b := uniform(Fixed, Free, 1, 2)
	b.Force = []float64{-1, 0}
	if got := b.Critical(); !math.IsInf(got, 1) {
		t.Errorf("nothing compressed: %g", got)
	}
}

// TestCriticalScope: a bar that is none has no critical force.
func TestCriticalScope(t *testing.T) {
	for _, ends := range [][2]End{{Fixed, Fixed}, {Fixed, Free}, {Pinned, Pinned}} {
		for _, x := range []float64{math.NaN(), math.Inf(1), math.Inf(-1), 0, -1} {
			b := uniform(ends[0], ends[1], 1, 2)
			b.Stiffness[1] = x
			if got := b.Critical(); got != 0 {
				t.Errorf("%v: stiffness %g: %g", ends, x, got)
			}
			b = uniform(ends[0], ends[1], 1, 2)
			b.Nodes[2] = 0.5 + x
			if got := b.Critical(); got != 0 {
				t.Errorf("%v: length %g: %g", ends, x, got)
			}
			if x == 0 || x == -1 {
				continue
			}
			b = uniform(ends[0], ends[1], 1, 2)
			b.Force[1] = x
			if got := b.Critical(); got != 0 {
				t.Errorf("%v: force %g: %g", ends, x, got)
			}
		}
	}
}

// TestSpringsHold: springs alone can keep a bar in place, or fail to.
func TestSpringsHold(t *testing.T) {
	for _, c := range []struct {
		base, top        End
		lateral, turning []float64
		stands           bool
	}{
		{Free, Free, []float64{1, 0, 1}, nil, true},
		{Free, Free, []float64{0, 1, 0}, nil, false},
		{Free, Free, []float64{0, 1, 0}, []float64{1, 0, 0}, true},
		{Free, Free, nil, []float64{1, 1, 1}, false},
		{Pinned, Free, nil, []float64{0, 0, 1}, true},
		{Pinned, Free, []float64{1, 0, 0}, nil, false},
		{Pinned, Free, []float64{0, 1e-6, 0}, nil, true},
		{Guided, Free, []float64{0, 1, 0}, nil, true},
		{Guided, Free, nil, []float64{0, 1, 0}, false},
		{Guided, Guided, []float64{0, 0, 1}, nil, true},
	} {
		b := uniform(c.base, c.top, 3, 2)
		b.Lateral, b.Turning = c.lateral, c.turning
		if got := b.Critical(); (got > 0) != c.stands {
			t.Errorf("%+v: %g", c, got)
		}
	}
}

// TestOneSpring: a single spring, however stiff and wherever it is, does not keep
// a free bar from turning about it.
func TestOneSpring(t *testing.T) {
	r := rand.New(rand.NewSource(7))
	for range 1000 {
		b := uniform(Free, Free, math.Exp(r.Float64()*6-3), 7)
		b.Lateral = make([]float64, 8)
		b.Lateral[r.Intn(8)] = math.Exp(r.Float64()*40 - 20)
		if got := b.Critical(); got != 0 {
			t.Fatalf("%g: %+v", got, b)
		}
	}
}

// TestCutting: cutting parts in two changes nothing, scaling does what it must.
func TestCutting(t *testing.T) {
	r := rand.New(rand.NewSource(5))
	for n := range 200 {
		b := randomBar(r)
		want := b.Critical()
		cut := *b
		cut.Nodes, cut.Held, cut.Lateral, cut.Turning, cut.Force, cut.Stiffness = nil, nil, nil, nil, nil, nil
		for i, z := range b.Nodes {
			cut.Nodes, cut.Held = append(cut.Nodes, z), append(cut.Held, b.Held[i])
			cut.Lateral, cut.Turning = append(cut.Lateral, b.Lateral[i]), append(cut.Turning, b.Turning[i])
			if i == len(b.Force) {
				break
			}
			f, ei := b.Force[i], b.Stiffness[i]
			cut.Nodes = append(cut.Nodes, z+(0.3+0.4*r.Float64())*(b.Nodes[i+1]-z))
			cut.Held = append(cut.Held, false)
			cut.Lateral, cut.Turning = append(cut.Lateral, 0), append(cut.Turning, 0)
			cut.Force, cut.Stiffness = append(cut.Force, f, f), append(cut.Stiffness, ei, ei)
		}
		if got := cut.Critical(); got != want && !(math.Abs(got/want-1) <= 1e-8) {
			t.Errorf("bar %d: %g, cut %g: %+v", n, want, got, b)
		}
		for i := range b.Force {
			b.Force[i] *= 250
		}
		if got := b.Critical(); got != want && !(math.Abs(got*250/want-1) <= 1e-9) {
			t.Errorf("bar %d: %g, with 250 times the forces %g: %+v", n, want, got, b)
		}
	}
}

// randomBar makes a bar of one to five parts, most of it in compression.
func randomBar(r *rand.Rand) *Bar {
	b := &Bar{Base: End(r.Intn(4)), Top: End(r.Intn(4))}
	z := 0.0
	for i, n := 0, 1+r.Intn(5); i <= n; i++ {
		b.Nodes = append(b.Nodes, z)
		z += math.Exp(r.Float64()*3 - 1)
		b.Held = append(b.Held, r.Intn(3) == 0)
		spring := func() float64 {
			if r.Intn(3) > 0 {
				return 0
			}
			return math.Exp(r.Float64()*16 - 8)
		}
		b.Lateral, b.Turning = append(b.Lateral, spring()), append(b.Turning, spring())
		if i == n {
			break
		}
		f := math.Exp(r.Float64()*3 - 1)
		if r.Intn(6) == 0 {
			f = -f
		}
		b.Force, b.Stiffness = append(b.Force, f), append(b.Stiffness, math.Exp(r.Float64()*4-2))
	}
	return b
}
