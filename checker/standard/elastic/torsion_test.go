package elastic

import (
	"math"
	"strconv"
	"testing"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/section"
	"kern/checker/standard"
)

// TestTorsionOfSecondImplementation holds the critical loads of open sections
// against those in en1993/testdata/second.csv: the theory is the same. It is a
// second implementation, not a published source. Its torsion and warping
// constants are put in, as its choice of them differs (see package en1993).
func TestTorsionOfSecondImplementation(t *testing.T) {
	seen := map[section.Kind]int{}
	for _, r := range table(t, "../../en1993/testdata/second.csv") {
		num := func(name string) float64 {
			x, err := strconv.ParseFloat(r[name], 64)
			if err != nil {
				return 0
			}
			return x
		}
		shape := section.Shape{Depth: num("h") / 1000, Width: num("b") / 1000, Web: num("tw") / 1000, Flange: num("tf") / 1000, Root: num("r") / 1000, Wall: num("t") / 1000}
		switch r["kind"] {
		case "rolled_i":
			shape.Kind, shape.Made = section.ISection, section.Rolled
		case "welded_i":
			shape.Kind, shape.Made = section.ISection, section.Welded
		case "channel":
			shape.Kind, shape.Made = section.Channel, section.Rolled
		case "tee":
			shape.Kind, shape.Made = section.Tee, section.Welded
		case "angle":
			shape.Kind, shape.Made, shape.Width = section.Angle, section.Rolled, shape.Depth
		default:
			continue
		}
		seen[shape.Kind]++
		props, err := section.Compute(shape)
		if err != nil {
			t.Fatal(err)
		}
		props.It, props.Iw = num("It")*1e-12, num("Iw")*1e-18
		factor := [3]float64{num("ky"), num("kz"), num("LT") / num("L")}
		if num("Iz") > num("Iy") { // a tee wider than deep
			factor[0], factor[1] = factor[1], factor[0]
		}
		c := &model.Case{}
		c.Name = "load"
		env := &model.Env{Cases: []*model.Case{c}, Basis: model.Basis{Standard: "elastic", Overrides: map[string]model.Override{}}}
		h := num("L") / 1000
		m := &model.Member{Name: "A1", Height: h, Factor: factor, Section: &model.Section{Name: "s", Shape: shape, Properties: props},
			Material: &model.Material{Name: "m", E: 210e9, G: 81e9, Fy: num("fy") * 1e6},
			Base:     [2]action.End{action.Pinned, action.Pinned}, Top: [2]action.End{action.Pinned, action.Pinned},
			Loads: []model.Load{{Kind: model.AxialLoad, Value: num("NEd"), At: h}}}
		one := model.Combination{}
		one.Name, one.Factors = "load", []float64{1}
		record := &derivation.Record{Set: set}
		Standard{}.Check(standard.NewFrame(env, m, []model.Combination{one}), record)
		check := func(symbol string, want, tolerance float64) {
			t.Helper()
			if got := last(record, symbol); !(math.Abs(got/want-1) <= tolerance) {
				t.Errorf("record %s, %s: %s = %.12g, second implementation %.12g", r["id"], r["kind"], symbol, got, want)
			}
		}
		check("P_cr_T", num("N_cr_T"), 1e-9)
		if shape.Kind == section.ISection {
			continue
		}
		// the smaller root as a difference loses as many digits as the two loads
		// lie apart
		flexural := num("N_cr_y")
		if r["tf_pairs_with"] == "z" {
			flexural = num("N_cr_z")
		}
		apart := max(num("N_cr_T")/flexural, flexural/num("N_cr_T"))
		check("P_cr_TF", num("N_cr_TF"), max(1e-9, 1e-14*apart))
	}
	for _, k := range []section.Kind{section.ISection, section.Channel, section.Tee, section.Angle} {
		if seen[k] < 20 {
			t.Errorf("%d records of a %s", seen[k], k)
		}
	}
}
