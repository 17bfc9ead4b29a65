package en1993

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"testing"

	"kern/checker/action"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/checker/section"
	"kern/checker/standard"
)

// specimen is a member with one axial load, built without the language.
type specimen struct {
	section  model.Section
	material model.Material
	height   float64 // m
	factor   [3]float64
	force    float64 // N, compression positive
}

// shaped gives a specimen of a shape with its computed properties.
func shaped(t testing.TB, s section.Shape, fy float64) *specimen {
	t.Helper()
	props, err := section.Compute(s)
	if err != nil {
		t.Fatalf("%+v: %v", s, err)
	}
	return &specimen{
		section:  model.Section{Name: "section", Shape: s, Properties: props, Thickness: max(s.Web, s.Flange, s.Wall)},
		material: model.Material{Name: "steel", E: 210e9, G: 81e9, Density: 7850, Fy: fy, Fu: math.NaN()},
		height:   1,
		force:    1,
	}
}

// frame is the specimen as the standard starts from it.
func (s *specimen) frame() *standard.Frame {
	c := &model.Case{}
	c.Name = "load"
	env := &model.Env{Cases: []*model.Case{c}, Basis: model.Basis{Standard: Standard{}.Name(), Overrides: map[string]model.Override{}}}
	m := &model.Member{Name: "A1", Section: &s.section, Material: &s.material, Height: s.height, Factor: s.factor,
		Base: [2]action.End{action.Pinned, action.Pinned}, Top: [2]action.End{action.Pinned, action.Pinned}}
	if s.force != 0 {
		m.Loads = []model.Load{{Kind: model.AxialLoad, Value: s.force, At: s.height}}
	}
	one := model.Combination{}
	one.Name, one.Factors = "load", []float64{1}
	return standard.NewFrame(env, m, []model.Combination{one})
}

// outcome is a specimen worked out: the checks, and the last value of each
// symbol in each check's own derivation.
type outcome struct {
	*standard.Outcome
	record *derivation.Record
}

func (s *specimen) check() outcome {
	record := &derivation.Record{Set: set}
	return outcome{Standard{}.Check(s.frame(), record), record}
}

// value is the value of a symbol in the derivation of a rule; "" takes the last
// one anywhere. NaN when there is none.
func (o outcome) value(rule, symbol string) float64 {
	v := math.NaN()
	for _, s := range o.record.Steps {
		if s.Note == "" && set.At(s.Symbol).Name == symbol && (rule == "" || s.Group == rule) {
			v = s.Value
		}
	}
	return v
}

// row is the row of a rule among the checks.
func (o outcome) row(rule string) (standard.Check, bool) {
	for _, c := range o.Checks {
		if c.Rule == rule {
			return c, true
		}
	}
	return standard.Check{}, false
}

func (o outcome) state(rule string) (standard.State, string) {
	for _, c := range o.Coverage {
		if c.Rule == rule {
			return c.State, c.Why
		}
	}
	return standard.NotCovered, "no such line"
}

// table reads a file of testdata: the records by column name, and the comment
// lines at its head are skipped.
func table(t testing.TB, name string) []map[string]string {
	t.Helper()
	f, err := os.Open("testdata/" + name)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	r := csv.NewReader(f)
	r.Comment = '#'
	lines, err := r.ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	var out []map[string]string
	for _, l := range lines[1:] {
		m := map[string]string{}
		for i, head := range lines[0] {
			m[head] = l[i]
		}
		out = append(out, m)
	}
	return out
}

// number reads a cell; NaN when it is empty.
func number(t testing.TB, s string) float64 {
	t.Helper()
	if s == "" {
		return math.NaN()
	}
	x, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return x
}
