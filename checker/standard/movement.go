package standard

import (
	"fmt"
	"math"
	"strings"

	"kern/checker/action"
	"kern/checker/model"
)

// moved is the movement nearest to its limit.
type moved struct {
	size, limit  float64 // m
	under, where string
	without      string // about which axis nothing could be said
}

// served are the combinations that movements are limited in, with why there are
// none.
func (f *Frame) served(under action.Situation) ([]model.Combination, string) {
	var out []model.Combination
	for _, c := range f.Env.Service() {
		if c.Situation == under {
			out = append(out, c)
		}
	}
	if len(out) == 0 && f.Env.Basis.Actions == "" && under == action.Characteristic {
		out = f.Env.Automatic // all cases with factor 1
	}
	if len(out) == 0 {
		return nil, fmt.Sprintf("no %s combination is made or written out: state actions in the basis, or write combination NAME %s = …", under, under)
	}
	return out, ""
}

// greatest finds the sway or deflection nearest to its limit, and why there is
// none.
func (f *Frame) greatest(rule string, l model.Movement) (moved, string) {
	m := f.Member
	if m.Imported != nil {
		return moved{}, "forces from a table say nothing of movements: compare those of the analysis with the limit by hand"
	}
	combinations, why := f.served(l.Under)
	if why != "" {
		return moved{}, why
	}
	best := moved{limit: math.NaN(), size: math.NaN()}
	first := true
	try := func(size, limit float64, under, where string) {
		// compared with an equal place, one that is not known wins
		if u := size / limit; first || u > best.size/best.limit || math.IsNaN(u) {
			best.size, best.limit, best.under, best.where, first = size, limit, under, where, false
		}
	}
	var outside []string
	for axis := range f.Bends {
		a := model.Axis(axis)
		ends := m.Base[a].Held() && m.Top[a].Held()
		if rule == "sway" && ends {
			outside = append(outside, a.String())
			continue
		}
		if !f.Bends[axis] {
			if rule == "sway" {
				try(0, l.Limit, combinations[0].Name, "about "+a.String()+", which no load bends")
				continue
			}
			for i, s := range m.Spans(a) {
				try(0, f.spanLimit(l, axis, i), combinations[0].Name, "about "+a.String()+", "+f.between(s))
			}
			continue
		}
		ei := func(z float64) float64 { return Known(bending(f.partAt(z), axis)) }
		for _, c := range combinations {
			pieces, ok := f.Bending(axis, c.Factors, nil)
			if !ok {
				return moved{}, f.NotHeld(axis)
			}
			if rule == "sway" {
				try(math.Abs(across(pieces, m.Height, ei)-across(pieces, 0, ei)), l.Limit, c.Name, "about "+a.String())
				continue
			}
			for i, s := range m.Spans(a) {
				try(FromChord(pieces, s[0], s[1], ei), f.spanLimit(l, axis, i), c.Name, "about "+a.String()+", "+f.between(s))
			}
		}
	}
	if first {
		return moved{}, "both ends are held in place, so the sway is that of what holds them: compare it with the limit by hand"
	}
	if len(outside) > 0 {
		best.without = "about " + strings.Join(outside, " and ") + " both ends are held in place: what holds them is taken as still"
	}
	return best, ""
}

func (f *Frame) spanLimit(l model.Movement, axis, i int) float64 {
	if i < len(l.Spans[axis]) {
		return l.Spans[axis][i]
	}
	return math.NaN()
}

func (f *Frame) between(s [2]float64) string {
	return "from " + f.Place(s[0]) + " to " + f.Place(s[1])
}

// across is the deflection at a height, m; ei gives E I at a height.
func across(pieces []action.Piece, z float64, ei func(z float64) float64) float64 {
	for i, p := range pieces {
		if z <= p.To || i == len(pieces)-1 {
			return p.Deflection(z-p.From) / ei((p.From+p.To)/2)
		}
	}
	return 0
}

// FromChord is the greatest deflection between two heights, m, measured from the
// line through the points there: exact but for the halving that finds it. ei gives
// E I at a height, Nm2.
func FromChord(pieces []action.Piece, from, to float64, ei func(z float64) float64) float64 {
	first, l := across(pieces, from, ei), to-from
	slope := (across(pieces, to, ei) - first) / l
	most := 0.0
	for _, p := range pieces {
		low, high := max(from, p.From), min(to, p.To)
		if !(high > low) {
			continue
		}
		stiff := ei((p.From + p.To) / 2)
		off := func(z float64) float64 { return math.Abs(p.Deflection(z-p.From)/stiff - first - slope*(z-from)) }
		const n = 16
		at := low
		for i := range n + 1 {
			z := low + (high-low)*float64(i)/n
			if v := off(z); v > most {
				most, at = v, z
			}
		}
		for step := (high - low) / n / 2; step > (high-low)*1e-7; step /= 2 {
			for _, z := range []float64{at - step, at + step} {
				if z > low && z < high && off(z) > most {
					most, at = off(z), z
				}
			}
		}
	}
	return most
}
