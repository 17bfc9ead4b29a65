package action

import (
	"math"
	"testing"
)

// TestJointFactor holds the equations of the alignment charts against published
// readings: AISC Design Examples v16.0, E.4A and E.4B (read in the source; charts
// are read to two figures, so that a reading may be off by 0.05).
func TestJointFactor(t *testing.T) {
	for _, c := range []struct {
		joints       Joints
		want, within float64
	}{
		{Joints{1.63, 1.38, true}, 1.5, 0.05},
		{Joints{1.0, 1.62, true}, 1.4, 0.05},
		{Joints{10, 1.62, true}, 2.0, 0.05},
	} {
		if got := c.joints.Factor(); !(math.Abs(got-c.want) <= c.within) {
			t.Errorf("%+v: K = %.4f, published %g", c.joints, got, c.want)
		}
	}
}

// TestJointFactorFrame holds the factor against the critical load of the column
// with the turning springs of its beams at both ends: a beam in reverse curvature
// (sway) gives 6 E I/L to the joint and one in single curvature (no sway) 2 E I/L,
// so that with E I/L = 1 of the column the springs are 6/G and 2/G.
func TestJointFactorFrame(t *testing.T) {
	for _, sway := range []bool{false, true} {
		for _, base := range []float64{0.05, 0.3, 1, 2.5, 10, 100} {
			for _, top := range []float64{0.05, 0.8, 1, 4, 50} {
				j := Joints{base, top, sway}
				spring := 2.0
				bar := Bar{Base: Pinned, Top: Pinned, Nodes: []float64{0, 1}, Force: []float64{1}, Stiffness: []float64{1}}
				if sway {
					spring, bar.Top = 6, Free
				}
				bar.Turning = []float64{spring / base, spring / top}
				if want := pi / math.Sqrt(bar.Critical()); !(math.Abs(j.Factor()/want-1) <= 1e-6) {
					t.Errorf("%+v: K = %.8f, critical load gives %.8f", j, j.Factor(), want)
				}
			}
		}
	}
}

// TestJointFactorLimits: rigid and pinned joints give the factors of ideal ends, a
// softer joint never a smaller factor, and what is no ratio no factor.
func TestJointFactorLimits(t *testing.T) {
	const soft, stiff = 1e9, 1e-9
	for _, c := range []struct {
		joints Joints
		want   float64
	}{
		{Joints{stiff, stiff, false}, 0.5}, {Joints{soft, soft, false}, 1}, {Joints{stiff, soft, false}, 0.699156}, {Joints{stiff, stiff, true}, 1}, {Joints{stiff, soft, true}, 2},
	} {
		if got := c.joints.Factor(); !(math.Abs(got-c.want) <= 1e-5) {
			t.Errorf("%+v: K = %.8f, want %g", c.joints, got, c.want)
		}
	}
	last := [2]float64{}
	for g := 0.01; g < 100; g *= 1.1 {
		for i, sway := range []bool{false, true} {
			k := Joints{g, 1.7, sway}.Factor()
			if k < last[i] {
				t.Errorf("G = %g, sway %v: K falls to %g", g, sway, k)
			}
			last[i] = k
		}
	}
	for _, g := range []float64{0, -1, math.NaN(), math.Inf(1)} {
		if k := (Joints{g, 1, true}).Factor(); !math.IsNaN(k) {
			t.Errorf("G = %g: K = %g", g, k)
		}
	}
}
