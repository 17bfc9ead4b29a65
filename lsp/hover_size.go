package lsp

import (
	"kern/checker"
	"kern/checker/output"
	"kern/checker/size"
	"kern/checker/standard"
	"kern/lang/unit"
)

// sized writes what would make the member pass, or what more it may take.
func (h *hovering) sized(r *checker.Result) {
	if len(r.Missing) > 0 || r.Verdict == standard.Undecided {
		return
	}
	all := h.f.mends(r)
	var lines []output.Line
	add := func(text string) { lines = append(lines, output.Words(text)) }
	if r.Verdict == standard.Fails {
		seen := map[size.Kind]bool{}
		for _, m := range all { // of each kind the one that adds least; offers have the others
			if seen[m.Kind] || m.Kind == size.Group {
				continue
			}
			seen[m.Kind] = true
			text := "passes with " + m.Change + ": " + checker.Ratio(m.Utilisation)
			if m.Kind == size.Section {
				text += ", " + output.MassLine(r.Units(), m.Added)
			}
			add(text)
		}
		h.page.List(lines...)
		return
	}
	var most *size.Mend
	for _, m := range all {
		switch m.Kind {
		case size.Section:
			add("lighter: " + m.Change + " at " + checker.Ratio(m.Utilisation) + ", " + output.MassLine(r.Units(), m.Added))
		case size.Height:
			if more := m.Value - m.Now; more > 0 {
				add("may stand " + size.Down(more, taller(r), 2) + " taller")
			}
		case size.Load:
			if m.Dim == unit.Force && m.Now > 0 && (most == nil || m.Now > most.Now) {
				most = &m
			}
		}
	}
	if most != nil && most.Value > most.Now {
		add("may carry " + size.Down(most.Value-most.Now, r.Units().For(unit.Force), 2) + " more: " + most.Change)
	}
	h.page.List(lines...)
}

// taller is the unit of a height that is added.
func taller(r *checker.Result) unit.Unit {
	symbol := "m"
	if r.Units().American() {
		symbol = "ft"
	}
	u, _ := unit.Parse(symbol) // both are known
	return u
}

// sensitivity writes which quantity matters most.
func (h *hovering) sensitivity(r *checker.Result) {
	if r.Verdict == standard.Undecided {
		return
	}
	var lines []output.Line
	for _, line := range output.SensitivityLines(r, size.Sensitivities(h.f.Report(), r)) {
		lines = append(lines, output.Words(line))
	}
	h.page.List(lines...)
}
