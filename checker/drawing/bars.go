package drawing

import (
	"math"

	"kern/checker"
	"kern/checker/standard"
	"kern/lang/unit"
)

// Bars draws the utilisation of every check as a bar against the limit. It is
// nil for a member without checks.
func Bars(r *checker.Result) *Scene {
	if len(r.Checks) == 0 {
		return nil
	}
	limit := 1.0
	if l := r.Member.Limits.Utilisation; l > 0 {
		limit = l
	}
	most := limit
	for _, c := range r.Checks {
		if c.Utilisation > most { // false for NaN
			most = c.Utilisation
		}
	}
	const (
		names = 58.0  // where the bars begin
		ends  = 112.0 // where they end
		row   = 5.2
		head  = 6.0
	)
	most = min(most*1.03, 2*limit)
	x := func(u float64) float64 { return names + (ends-names)*min(u, most)/most }
	var p pen
	height := head + row*float64(len(r.Checks)) + 2
	governing, found := r.GoverningCheck()
	for i, c := range r.Checks {
		y := head + row*float64(i)
		bold := found && c == governing
		found = found && !bold // one row alone
		name := words(c.Rule)
		if c.Rule == "requirement" {
			name = c.Clause
		}
		if c.Lift != "" {
			name += ", " + c.Lift
		}
		p.text(Text{At: Point{1, y + 3.4}, Words: clip(name, small, names-3, bold), Size: small, Bold: bold})
		value := Text{At: Point{ends + 2, y + 3.4}, Size: small, Bold: bold}
		if math.IsNaN(c.Utilisation) {
			p.line(Faint, names+24, y+row/2, ends, y+row/2)
			p.rect(Dashed, Box{names, y + 0.9, names + 24, y + row - 0.9})
			p.text(Text{At: Point{names + 12, y + 3.4}, Words: "undecided", Size: small, Anchor: Middle, Tone: Quiet})
		} else {
			style := Fill
			if bold {
				style = AccentFill
			}
			p.line(Faint, x(c.Utilisation), y+row/2, ends, y+row/2)
			p.rect(style, Box{names, y + 0.9, x(c.Utilisation), y + row - 0.9})
			if c.Utilisation > most { // the bar is longer than the picture
				p.polygon(Ground, Point{ends - 4, y + 0.5}, Point{ends - 2.6, y + 0.5}, Point{ends - 3.4, y + row - 0.5}, Point{ends - 4.8, y + row - 0.5})
			}
			value.Words = ratio(c.Utilisation)
			p.text(value)
		}
		if w := verdict(c); w != "" {
			p.text(Text{At: Point{ends + 12, y + 3.4}, Words: w, Size: small, Bold: bold || c.Verdict == standard.Fails})
		}
		if name := r.CombinationName(c); name != "" {
			p.text(Text{At: Point{SheetWidth - 0.5, y + 3.4}, Words: clip(name, 2.1, SheetWidth-ends-25, false), Size: 2.1, Anchor: End, Tone: Quiet})
		}
	}
	p.line(Dashed, x(limit), head-1.2, x(limit), height-1)
	p.text(Text{At: Point{x(limit), head - 2}, Words: "limit " + checker.Ratio(limit), Size: small, Anchor: Middle})
	return &Scene{Width: SheetWidth, Height: height, Title: r.Member.Kind.String() + " " + r.Name + ": utilisation of every check",
		Description: count(len(r.Checks), "check") + "; the greatest utilisation is " + checker.Ratio(r.Utilisation) + ", by " + words(r.Governing) + ".", Items: p.items}
}

// verdict says what a bar cannot.
func verdict(c standard.Check) string {
	switch {
	case c.Departed:
		return "departed"
	case c.Verdict == standard.Fails:
		return "fails"
	}
	return ""
}

// ratio writes a utilisation in little room.
func ratio(u float64) string {
	if u >= 100 {
		return unit.Short(u, 3)
	}
	return checker.Ratio(u)
}
