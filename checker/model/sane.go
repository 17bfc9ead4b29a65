package model

import (
	"fmt"
	"math"
	"sort"
	"strings"

	"kern/checker/action"
	"kern/checker/catalogue"
	"kern/lang"
	"kern/lang/unit"
)

// complete looks for what the member lacks and states what is assumed.
func (w *memberReader) complete() {
	m := w.m
	missing := func(fix, what string) {
		if len(m.Missing) > 0 && (w.headless || w.said[what]) {
			return // reported where it lies
		}
		if len(m.Missing) == 0 {
			p := lang.Problem{Rule: "missing-value", Span: m.Stmt.Line, Message: "the " + m.Kind.String() + " has no " + what}
			if m.Stmt.Body != nil && fix != "" {
				at := lang.Span{Start: m.Stmt.Body.Span.Start + 1, End: m.Stmt.Body.Span.Start + 1}
				text := "\n    " + fix
				if !strings.Contains(m.Stmt.Body.Span.Of(m.Decl.Text), "\n") {
					text = " " + fix + ";" // a block on one line stays there
				}
				p.Fixes = append(p.Fixes, lang.Replace("Add "+what, false, at, text))
			}
			m.Problems = append(m.Problems, lang.Diagnostic{Decl: m.Decl, Problem: p})
		}
		m.Missing = append(m.Missing, "it has no "+what)
	}
	w.lifts(missing)
	if m.Section == nil {
		missing("section = \"HEB 160\"", "section")
	}
	if m.Material == nil {
		missing("material = \"S355\"", "material")
	}
	if math.IsNaN(m.Height) || m.Height == 0 {
		m.Height = unknown
		missing("height = 3 m", "height")
	}
	w.nominalPlaces()
	for _, l := range m.Parts() {
		s := l.Section
		if s == nil || !(m.Net > s.Area*(1+1e-9)) {
			continue
		}
		at := m.NetAt
		if at.Decl != m.Decl { // a line that is taken over is right where it stands
			at = lang.Place{Decl: m.Decl, Span: m.NameSpan}
		}
		m.Problems = append(m.Problems, lang.Diagnostic{Decl: at.Decl, Problem: lang.Problem{Rule: "impossible-value", Span: at.Span,
			Message: fmt.Sprintf("the net area of %s is more than that of the section %s, %s: holes leave no more than the whole area", w.env.Basis.Show.Short(m.Net, unit.Area, 4), s.Title(), w.env.Basis.Show.Short(s.Area, unit.Area, 4))}})
		m.Missing = append(m.Missing, "its net area cannot be")
		break
	}
	w.settleEnds()
	sort.SliceStable(m.Holds, func(i, j int) bool { return m.Holds[i].At < m.Holds[j].At })
	if w.spans != nil && m.Height > 0 {
		w.spans()
	}
	for _, a := range []Axis{Major, Minor} {
		_, base := w.first["base about "+a.String()]
		_, top := w.first["top about "+a.String()]
		base, top = base || m.BaseSpring[a] != Spring{}, top || m.TopSpring[a] != Spring{}
		switch {
		case !base && !top:
			m.Assumed = append(m.Assumed, "pinned at both ends about "+a.String())
		case !base:
			m.Assumed = append(m.Assumed, "pinned at the base about "+a.String())
		case !top:
			m.Assumed = append(m.Assumed, "pinned at the top about "+a.String())
		}
	}
	if len(m.Assumed) == 2 && strings.TrimSuffix(m.Assumed[0], "major") == strings.TrimSuffix(m.Assumed[1], "minor") {
		m.Assumed = []string{strings.TrimSuffix(m.Assumed[0], " about major")}
	}
	w.fits()
	if m.Kind != Column && m.Weight {
		m.Weight = false
		m.Assumed = append(m.Assumed, "self-weight of the "+m.Kind.String()+" not counted (its slope is not known)")
	}
	if unread := w.env.unread; len(m.Loads) == 0 && len(unread) > 0 && !w.tabled() {
		m.Missing = append(m.Missing, "its forces may stand in a table that could not be read: "+clip(unread[0]))
	}
	if len(m.Loads) == 0 && len(m.Missing) == 0 && !w.tabled() {
		m.Problems = append(m.Problems, lang.Diagnostic{Decl: m.Decl, Problem: lang.Problem{Rule: "member-without-load", Severity: lang.Warning, Span: m.NameSpan,
			Message: "the " + m.Kind.String() + " carries no load"}})
	}
	if m.Section != nil && m.Material != nil && len(m.Missing) == 0 {
		w.sane()
		w.designWall()
	}
}

// designWall warns of an American hollow section whose wall counts by another
// standard than that of the steel.
func (w *memberReader) designWall() {
	m := w.m
	g := m.Material.Grade
	if g == nil || !g.American() || !catalogue.HollowStandard(m.Section.Standard) || m.Section.Standard == g.Standard {
		return
	}
	if _, ok := g.For(m.Section.Shape); !ok || catalogue.FullWall(g.Standard) == catalogue.FullWall(m.Section.Standard) {
		return // no standard of such sections, or the same wall
	}
	message := fmt.Sprintf("the wall of %s counts with 0.93 of the nominal, as of %s; the steel is of %s, whose walls count in full: \"%s %s\"",
		m.Section.Designation, m.Section.Standard, g.Standard, m.Section.Designation, strings.TrimPrefix(g.Standard, "ASTM "))
	if catalogue.FullWall(m.Section.Standard) {
		size, _, _ := strings.Cut(m.Section.Designation, " ")
		message = fmt.Sprintf("the wall of %s counts in full, as of %s; the steel is of %s, whose walls count with 0.93 of the nominal: \"%s\"", m.Section.Designation, m.Section.Standard, g.Standard, size)
		m.Missing = append(m.Missing, "its section has the wall of "+m.Section.Standard+" and its steel is of "+g.Standard)
	}
	m.Problems = append(m.Problems, lang.Diagnostic{Decl: m.SectionAt.Decl, Problem: lang.Problem{Rule: "design-wall", Severity: lang.Warning, Span: m.SectionAt.Span, Message: message}})
}

// sane warns of loads that are out by powers of ten beside what the section
// can carry at all.
func (w *memberReader) sane() {
	m := w.m
	fy, _, _, ok := m.Material.StrengthOf(m.Section, w.env.Basis.TableFy)
	if !ok && m.Material.Grade == nil || math.IsNaN(m.Section.Area) {
		return
	}
	if !ok {
		fy = 235e6
	}
	squash := m.Section.Area * fy
	for _, l := range m.Loads {
		if l.Kind != AxialLoad {
			continue
		}
		v := math.Abs(l.Value)
		switch {
		case v > 50*squash:
			m.Problems = append(m.Problems, lang.Diagnostic{Decl: l.Place.Decl, Problem: lang.Problem{Rule: "implausible-load", Severity: lang.Warning, Span: l.Place.Span,
				Message: fmt.Sprintf("a load of %s is %s times what the section can carry at all: is the unit meant?", w.env.Basis.Show.Short(v, unit.Force, 3), unit.Short(v/squash, 2))}})
		case v < 1e-4*squash && v < 200:
			m.Problems = append(m.Problems, lang.Diagnostic{Decl: l.Place.Decl, Problem: lang.Problem{Rule: "implausible-load", Severity: lang.Warning, Span: l.Place.Span,
				Message: fmt.Sprintf("a load of %s is next to nothing for this section: is the unit meant?", w.env.Basis.Show.Short(v, unit.Force, 3))}})
		}
	}
}

// nominalPlaces looks for loads off the centroid where nothing holds the member:
// they have no nominal moments.
func (w *memberReader) nominalPlaces() {
	m := w.m
	if !m.Nominal || math.IsNaN(m.Height) || len(m.Missing) > 0 {
		return
	}
	for _, l := range m.Loads {
		for a, e := range l.Offset {
			if l.Kind != AxialLoad || e == 0 || w.held(Axis(a), l.At) {
				continue
			}
			m.Missing = append(m.Missing, "a load with a nominal moment comes in where nothing holds it")
			p := lang.Problem{Rule: "nominal-without-hold", Span: l.Place.Span,
				Message: fmt.Sprintf("the load is off the centroid about %s at %s, where nothing holds the member about that axis: it has no nominal moment there", Axis(a), w.env.PlaceName(m, l.At)),
				Notes:   []string{"hold the member there, or say moments continuous"}}
			d := lang.Diagnostic{Decl: l.Place.Decl, Problem: p}
			if d.Decl != m.Decl { // a line that is taken over is right where it stands
				d = lang.Diagnostic{Decl: m.Decl, Problem: p}
				d.Span, d.Related = w.asSpan, []lang.Related{{Place: l.Place, Message: "the line"}}
			}
			m.Problems = append(m.Problems, d)
			return
		}
	}
}

// held tells whether the member is held in place about an axis at a height.
func (w *memberReader) held(a Axis, z float64) bool {
	m := w.m
	keeps := func(e action.End) bool { return e == action.Pinned || e == action.Fixed }
	switch {
	case z <= 1e-9*m.Height:
		return keeps(m.Base[a])
	case z >= m.Height*(1-1e-9):
		return keeps(m.Top[a])
	}
	for _, h := range m.Holds {
		if h.About(a) && h.Stiffness == 0 && math.Abs(h.At-z) <= 1e-6*m.Height {
			return true
		}
	}
	return false
}
