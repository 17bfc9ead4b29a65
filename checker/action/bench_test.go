package action

import "testing"

func BenchmarkCriticalSingle(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		CriticalUniform(Fixed, Pinned, nil, 6)
	}
}

func BenchmarkCriticalHolds(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		CriticalUniform(Fixed, Free, []float64{3, 6.5, 9}, 12)
	}
}

func BenchmarkCriticalStepped(b *testing.B) {
	bar := uniform(Fixed, Pinned, 12, 5)
	bar.Held[2] = true
	for i := range bar.Force {
		bar.Force[i], bar.Stiffness[i] = float64(5-i), float64(9-i)
	}
	b.ReportAllocs()
	for b.Loop() {
		bar.Critical()
	}
}

func BenchmarkSolve(b *testing.B) {
	beam := Beam{Base: Fixed, Top: Pinned, Holds: []float64{4, 8}, Height: 12}
	loadings := [][]Push{
		{{Moment: 1000, From: 12}},
		{{Line: 1500, From: 0, To: 12}},
		{{Force: 8000, From: 6}, {Force: 4000, From: 10}},
	}
	b.ReportAllocs()
	for b.Loop() {
		if _, err := beam.Solve(loadings); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkAdd(b *testing.B) {
	beam := Beam{Base: Fixed, Top: Pinned, Holds: []float64{4, 8}, Height: 12}
	pieces, err := beam.Solve([][]Push{{{Moment: 1000, From: 12}}, {{Line: 1500, From: 0, To: 12}}, {{Force: 8000, From: 6}}})
	if err != nil {
		b.Fatal(err)
	}
	factors := []float64{1.35, 1.5, 0.9}
	var into []Piece
	b.ReportAllocs()
	for b.Loop() {
		into = Add(pieces, factors, into)
	}
}
