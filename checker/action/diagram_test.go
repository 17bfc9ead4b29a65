package action

import (
	"math"
	"testing"
)

// TestDiagramOf reads diagrams that beam theory gives in closed form.
func TestDiagramOf(t *testing.T) {
	solve := func(pushes ...Push) []Piece {
		p, err := Beam{Height: 4}.Solve([][]Push{pushes})
		if err != nil {
			t.Fatal(err)
		}
		return p[0]
	}
	near := func(what string, got, want float64) {
		t.Helper()
		if math.Abs(got-want) > 1e-9*max(1, math.Abs(want)) {
			t.Errorf("%s is %g, want %g", what, got, want)
		}
	}
	uniform := solve(Push{Line: 3, To: 4}) // w L²/8
	d := DiagramOf(uniform, 0, 4, 1e-9)
	near("the peak of a uniform load", d.Peak, 3*16/8.)
	if d.Straight {
		t.Error("the diagram of a uniform load is not straight")
	}
	below, above := MomentsAt(uniform, 1)
	near("the moment at a quarter", math.Abs(below), 3*1*3/2.)
	near("the moment above it", above, below)

	half := DiagramOf(solve(Push{Force: 8, From: 2}), 0, 2, 1e-9) // P L/4, nothing inside the half
	near("the peak of a load in the middle", half.Peak, 8)
	if !half.Straight || math.Abs(half.First) > 1e-9 || math.Abs(math.Abs(half.Last)-8) > 1e-9 {
		t.Errorf("the lower half is %+v", half)
	}
	if whole := DiagramOf(solve(Push{Force: 8, From: 2}), 0, 4, 1e-9); whole.Straight {
		t.Error("a kink is not straight")
	}
	jump := DiagramOf(solve(Push{Moment: 8, From: 2}), 0, 4, 1e-9)
	near("the peak beside a moment", jump.Peak, 4)
	below, above = MomentsAt(solve(Push{Moment: 8, From: 2}), 2)
	near("the step at a moment", math.Abs(above-below), 8)
	if jump.Straight {
		t.Error("a jump is not straight")
	}
	ends := DiagramOf(solve(Push{Moment: 6, From: 4}), 0, 4, 1e-9)
	near("the end moment", math.Abs(ends.Last), 6)
	if !ends.Straight {
		t.Error("the diagram of an end moment is straight")
	}
}
