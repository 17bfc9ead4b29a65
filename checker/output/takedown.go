package output

import (
	"math"
	"strconv"

	"kern/checker"
	"kern/lang/unit"
)

// Takedown writes how the loads along a member come down to its base, by level and
// case, and what each case brings there. A member with one load place and no
// bending says all of it in the table of loads.
func Takedown(p *Page, r *checker.Result) {
	t := r.Takedown()
	if t == nil || len(t.Cases) == 0 {
		return
	}
	units, cases := r.Units(), r.Env().Cases
	bends := r.Frame().Bends
	if len(t.Levels) < 2 && !bends[0] && !bends[1] {
		return
	}
	head, align := []string{"level"}, "l"
	for _, c := range t.Cases {
		head, align = append(head, cases[c].Name+" comes in", cases[c].Name+" below"), align+"rr"
		if reduces(t, c) {
			head, align = append(head, "reduction"), align+"l"
		}
	}
	force := func(v float64) Line { return Words(amountText(units, v, unit.Force)) }
	var rows [][]Line
	for _, l := range t.Levels {
		row := []Line{Words(l.Name)}
		for i, c := range t.Cases {
			row = append(row, force(l.Load[i]), force(l.Force[i]))
			if reduces(t, c) {
				text := "–"
				if l.Storeys[i] > 0 {
					text = unit.Short(l.Factor[i], 3) + " for " + units.Floor(l.Area[i], 4) + " of " + storeys(l.Storeys[i])
				}
				row = append(row, Words(text))
			}
		}
		rows = append(rows, row)
	}
	base := []Line{Words("base")}
	for i, c := range t.Cases {
		base = append(base, nil, force(t.Base[i].Axial))
		if reduces(t, c) {
			base = append(base, nil)
		}
	}
	if len(t.Levels) > 1 {
		p.Head(2, "Axial force by level and case")
		p.Table(head, align, append(rows, base))
		p.Text(Words("Characteristic values, not reduced; compression is positive."))
	}
	reactions(p, r, t)
}

// reactions writes the shear forces and moments at the base, by case.
func reactions(p *Page, r *checker.Result, t *checker.Takedown) {
	units, bends := r.Units(), r.Frame().Bends
	head, align := []string{"case", "axial force"}, "lr"
	some := false
	for a, name := range []string{"major", "minor"} {
		if bends[a] {
			head, align, some = append(head, "shear, bending about "+name, "moment about "+name), align+"rr", true
		}
	}
	if !some {
		return
	}
	var rows [][]Line
	for i, c := range t.Cases {
		b := t.Base[i]
		row := []Line{Words(r.Env().Cases[c].Name), Words(amountText(units, b.Axial, unit.Force))}
		for a, bent := range bends {
			if bent {
				row = append(row, Words(amountText(units, clean0(b.Shear[a]), unit.Force)), Words(amountText(units, clean0(b.Moment[a]), unit.Moment)))
			}
		}
		rows = append(rows, row)
	}
	p.Head(2, "Forces at the base by case")
	p.Table(head, align, rows)
}

// clean0 takes the rounding of the analysis for nothing: a thousandth of a newton.
func clean0(v float64) float64 {
	if math.Abs(v) < 1e-3 {
		return 0
	}
	return v
}

func storeys(n int) string {
	if n == 1 {
		return "1 storey"
	}
	return strconv.Itoa(n) + " storeys"
}

// reduces tells whether the loads of a case are reduced anywhere.
func reduces(t *checker.Takedown, c int) bool {
	for i, k := range t.Cases {
		for _, l := range t.Levels {
			if k == c && l.Factor[i] < 1 {
				return true
			}
		}
	}
	return false
}

func buildTakedown(m *checker.Result) *takedown {
	t := m.Takedown()
	if t == nil {
		return nil
	}
	units, cases := m.Units(), m.Env().Cases
	out := &takedown{Levels: []storey{}, Base: []base{}}
	for _, l := range t.Levels {
		s := storey{Level: l.Name, At: amountOf(units, l.At, unit.Length), Cases: []share{}}
		for i, c := range t.Cases {
			x := share{Case: cases[c].Name, Load: amountOf(units, l.Load[i], unit.Force), Force: amountOf(units, l.Force[i], unit.Force)}
			if l.Factor[i] < 1 {
				x.Reduction = finite(l.Factor[i])
			}
			s.Cases = append(s.Cases, x)
		}
		out.Levels = append(out.Levels, s)
	}
	bends := m.Frame().Bends
	for i, c := range t.Cases {
		b := base{Case: cases[c].Name, Axial: amountOf(units, t.Base[i].Axial, unit.Force)}
		for a, to := range []**bent{&b.Major, &b.Minor} {
			if bends[a] {
				*to = &bent{amountOf(units, clean0(t.Base[i].Shear[a]), unit.Force), amountOf(units, clean0(t.Base[i].Moment[a]), unit.Moment)}
			}
		}
		out.Base = append(out.Base, b)
	}
	return out
}
