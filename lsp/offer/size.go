package offer

import (
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/output"
	"kern/checker/size"
	"kern/checker/standard"
	"kern/lang"
)

// sized offers the changes with which a member that fails passes, the least mass
// first, with the utilisation that each comes to.
func (l *list) sized(d *checker.Diagnostic) {
	if r := l.failing(d); r != nil {
		l.mends(r, d, func(size.Mend) bool { return true })
	}
}

// sizedAt offers those that change the line at the place, of a member that fails.
func (l *list) sizedAt(s site) {
	o, ok := l.memberOf(s)
	if !ok || len(s.Stmts) < 2 {
		return
	}
	for _, r := range l.results(o) {
		if r.Verdict == standard.Fails {
			l.mends(r, nil, func(m size.Mend) bool {
				return m.Place == lang.Place{Decl: s.Decl, Span: s.Stmts[1].Line} || m.Kind == size.Hold && s.Stmts[1].Word == "hold" ||
					m.Kind == size.Group && s.Stmts[1].Word == "section"
			})
			return // the others of the statement are the same
		}
	}
}

// mends offers some of a member's mends, each once.
func (l *list) mends(r *checker.Result, d *checker.Diagnostic, which func(size.Mend) bool) {
	if l.Mends == nil {
		return
	}
	for _, m := range l.Mends(r) {
		if !which(m) {
			continue
		}
		title := mendTitle(r, m)
		key := r.Name + "\n" + title
		if slices.Contains(l.sizes, key) {
			continue
		}
		l.sizes = append(l.sizes, key)
		l.add(Offer{Kind: QuickFix, Title: title, Mends: d, edits: m.Edits})
	}
}

// mendTitle is "HEB 180: 0.93, +8.6 kg/m".
func mendTitle(r *checker.Result, m size.Mend) string {
	title := m.Change
	switch m.Kind {
	case size.Group:
		title += " for " + some(m.Serves)
	case size.Grade:
		title = "grade " + title
	}
	title += ": " + checker.Ratio(m.Utilisation)
	if m.Kind == size.Section || m.Kind == size.Group {
		title += ", " + output.MassLine(r.Units(), m.Added)
	}
	return title
}

// some names the first of several members.
func some(names []string) string {
	if len(names) > 4 {
		return strings.Join(names[:3], ", ") + " …"
	}
	return strings.Join(names, ", ")
}
