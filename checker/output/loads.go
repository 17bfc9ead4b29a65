package output

import (
	"fmt"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/model"
	"kern/lang/unit"
)

// Loads writes the table of what a member carries, its own weight included.
func Loads(p *Page, r *checker.Result) {
	if in := r.Member.Imported; in != nil {
		p.Text(Words(fmt.Sprintf("Forces from the table '%s': %d combinations.", in.Table, len(in.Combinations))))
		return
	}
	units, cases := r.Units(), r.Env().Cases
	var rows [][]Line
	for _, l := range r.Member.Loads {
		rows = append(rows, []Line{Words(cases[l.Case].Name), Words(Acts(units, l)), Words(LoadValue(units, l)), Words(LoadPlace(units, r.Member, l))})
	}
	if w := r.OwnWeight(); w > 0 {
		rows = append(rows, []Line{Words(cases[r.Env().SelfWeight].Name), Words("along, the member's own weight"), Words(units.Show(w, unit.Force, 4)), Words("over its height")})
	}
	p.Table([]string{"case", "acts", "value", "at"}, "llnl", rows)
}

// Acts says how a load acts.
func Acts(units derivation.Units, l model.Load) string {
	switch l.Kind {
	case model.PointLoad, model.LineLoad:
		return "across, bending about " + l.Axis.String()
	case model.EndMoment:
		return "turning about " + l.Axis.String()
	}
	out := "along"
	for axis, e := range l.Offset {
		if e != 0 {
			out += ", " + Value(units, e, unit.Length) + " off about " + model.Axis(axis).String()
		}
	}
	return out
}

// LoadDim is the dimension of a load's value.
func LoadDim(l model.Load) unit.Dim {
	return map[model.LoadKind]unit.Dim{model.AxialLoad: unit.Force, model.PointLoad: unit.Force, model.LineLoad: unit.ForcePerLength, model.EndMoment: unit.Moment}[l.Kind]
}

// LoadValue writes the value of a load.
func LoadValue(units derivation.Units, l model.Load) string { return Value(units, l.Value, LoadDim(l)) }

// LoadPlace says where on a member a load acts.
func LoadPlace(units derivation.Units, m *model.Member, l model.Load) string {
	at := func(z float64) string {
		switch z {
		case m.Height:
			return "top"
		case 0:
			return "base"
		}
		return Value(units, z, unit.Length)
	}
	if l.Kind == model.LineLoad {
		return at(l.At) + " to " + at(l.To)
	}
	return at(l.At)
}
