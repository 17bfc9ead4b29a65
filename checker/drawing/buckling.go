package drawing

import (
	"math"
	"strings"

	"kern/checker"
	"kern/checker/action"
	"kern/checker/model"
	"kern/lang/unit"
)

// Buckling draws the shapes in which a member buckles about both axes under the
// combination that compresses it most, each with its factor for the whole member
// and with what the checks took. It is nil for a member that is not compressed.
func Buckling(r *checker.Result) *Scene {
	s, ok := about(r)
	if !ok || s.f == nil {
		return nil
	}
	k := s.pressed()
	if k < 0 || !(s.f.Compression(k, 0, s.m.Height) > 0) {
		return nil
	}
	b := buckling{subject: s, combination: k}
	weak := -1
	for a := range b.modes {
		b.modes[a], b.known[a] = b.f.Bar(a, k).Buckled()
		if b.known[a] && (weak < 0 || b.modes[a].Factor < b.modes[weak].Factor*(1-1e-9)) {
			weak = a
		}
	}
	b.view(0, 15.5, weak)
	b.view(1, 45.5, weak)
	b.text(Text{At: Point{1, tallSheet - 1.2}, Words: clip("under "+r.Combinations()[k].Name, small, bucklingWidth-2, false), Size: small, Tone: Quiet})
	return &Scene{Width: bucklingWidth, Height: tallSheet, Title: s.title("buckled shapes"), Description: b.describe(), Items: b.items}
}

const bucklingWidth = 61.0

type buckling struct {
	subject
	pen
	combination int
	modes       [2]action.Mode
	known       [2]bool
}

// view draws the shape about an axis at x.
func (b *buckling) view(axis int, x float64, weak int) {
	const reach = 8.0 // of the shape, mm
	top, base := b.y(b.m.Height), b.y(0)
	b.text(Text{At: Point{x, 4}, Words: "about " + model.Axis(axis).String(), Bold: true, Anchor: Middle, Size: normal})
	b.line(Dashed, x, top, x, base)
	b.base(b.m.Base[axis], x, base, 0.7)
	b.top(b.m.Top[axis], x, top, 0.7)
	for _, s := range b.supports(axis) {
		b.support(s, x, b.y(s.at), 0.4, -1)
	}
	style, tone := Outline, Plain
	if axis == weak {
		style, tone = Accent, Loud
	}
	lines := b.lines(axis)
	if b.known[axis] {
		var pts []Point
		for i := range 81 {
			z := b.m.Height * float64(i) / 80
			pts = append(pts, Point{x + reach*b.modes[axis].Deflection(z), b.y(z)})
		}
		b.polyline(style, pts...)
	}
	for i, l := range lines {
		t := Text{At: Point{x, 9 + pitch*float64(i)}, Words: clip(l, small, 29.5, i == 0 && axis == weak), Size: small, Anchor: Middle}
		if i == 0 {
			t.Tone, t.Bold = tone, axis == weak
		}
		b.text(t)
	}
}

// lines say at what load the member buckles about an axis, and what the check
// took instead.
func (b *buckling) lines(axis int) []string {
	if !b.f.Stands[axis] && !b.known[axis] {
		return []string{"does not stand"}
	}
	out := []string{"at " + show(nil, b.modes[axis].Factor, unit.None) + " × the loads"}
	if !b.known[axis] {
		out[0] = "not known"
	}
	if s, ok := b.checked(axis); ok {
		if b.f.Stepped(s.From, s.To) { // each lift has an effective length of its own
			return append(out, "checked lift by lift")
		}
		k := "checked with K "
		if s.Overridden {
			k = "with the stated K "
		}
		out = append(out, k+unit.Short(s.K, 3), "N_cr "+b.show(b.f.Critical(axis, s), unit.Force), "L_cr "+b.show(s.Effective(), unit.Length))
	}
	return out
}

// checked is the stretch about an axis that is nearest to its critical force.
func (b *buckling) checked(axis int) (action.Stretch, bool) {
	best, at := math.Inf(-1), -1
	if !b.f.Stands[axis] {
		return action.Stretch{}, false // effective lengths cannot tell
	}
	for i, s := range b.f.Stretches[axis] {
		s = b.f.Under(axis, s, b.combination)
		if u := b.f.Compression(b.combination, s.From, s.To) * s.Effective() * s.Effective(); u > best {
			best, at = u, i
		}
	}
	if at < 0 {
		return action.Stretch{}, false
	}
	return b.f.Under(axis, b.f.Stretches[axis][at], b.combination), true
}

func (b *buckling) describe() string {
	var parts []string
	for a, name := range []string{"major", "minor"} {
		parts = append(parts, "about "+name+" "+strings.Join(b.lines(a), ", "))
	}
	return "The member buckles " + strings.Join(parts, "; ") + ". Combination " + b.r.Combinations()[b.combination].Name + "."
}
