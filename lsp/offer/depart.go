package offer

import (
	"kern/checker"
	"kern/checker/standard"
)

// depart offers to let the member break the check that a diagnostic reports. The
// reason is left open: until somebody writes one, the member has an error.
func (l *list) depart(d *checker.Diagnostic) {
	r := l.failing(d)
	if r == nil {
		return
	}
	o := owner{r.Member.Decl, r.Member.Stmt}
	title := "Depart from " + d.Rule + ` because "…"`
	if names := l.results(o); len(names) > 1 {
		title += " (" + list3(names) + ")"
	}
	lines := append(takenOver(l.envOf(r), o, "depart"), "depart "+d.Rule+` because "…"`)
	if e, ok := l.insert(o, lines...); ok {
		l.add(Offer{Kind: QuickFix, Title: title, Mends: d, last: true, edits: func() []checker.Edit { return []checker.Edit{e} }})
	}
}

// failing finds the result that a diagnostic of a failing check reports.
func (l *list) failing(d *checker.Diagnostic) *checker.Result {
	if d.Member == "" {
		return nil
	}
	at, ok := l.file.At(d.Span.Start)
	if !ok {
		return nil
	}
	for _, r := range l.Report.Results(at.Decl) {
		if r.Name != d.Member || r.Member.Stmt == nil {
			continue
		}
		for _, c := range r.Checks {
			if c.Rule == d.Rule && c.Verdict == standard.Fails && !c.Departed {
				return r
			}
		}
	}
	return nil
}

// list3 names the members of a declaration, three at most.
func list3(all []*checker.Result) string {
	out := ""
	for i, r := range all {
		switch {
		case i == 3:
			return out + " …"
		case i > 0:
			out += ", "
		}
		out += r.Name
	}
	return out
}
