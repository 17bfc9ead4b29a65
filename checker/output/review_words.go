package output

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/review"
	"kern/checker/standard"
)

// at is a line that an edit or a member stands in.
func (w *reviewing) at(p review.Place) Line {
	if p.File == "" {
		return nil
	}
	text := fmt.Sprintf("%s:%d", w.f.Names(p.File), p.Line)
	if strings.HasPrefix(text, ":") { // where there is but one file
		text = "line " + text[1:]
	}
	if p.Before {
		text += " before"
	}
	if w.f.Link != nil {
		if to := w.f.Link(p); to != "" {
			return Link(text, to)
		}
	}
	return Words(text)
}

// Answer is a verdict with its utilisation, in a few words.
func Answer(s review.State) string {
	switch {
	case s.Verdict == standard.Undecided:
		return "undecided"
	case math.IsNaN(s.Utilisation):
		return s.Verdict.String()
	case s.Verdict == standard.Fails:
		return "fails " + checker.Ratio(s.Utilisation)
	}
	return checker.Ratio(s.Utilisation)
}

// answer is Answer without a place to break the line.
func (w *reviewing) answer(s review.State) string {
	if w.narrow {
		return Answer(s)
	}
	return strings.ReplaceAll(Answer(s), " ", "\u00a0")
}

// shortened shortens a text for a cell of a table.
func shortened(s string, most int) string {
	if r := []rune(s); len(r) > most {
		return string(r[:most-1]) + "…"
	}
	return s
}

// editWords say an edit; of a member's own line its name is left out.
func editWords(e review.Edit, own string) string {
	s := strings.Join(strings.Fields(e.String()), " ")
	if own != "" && strings.HasSuffix(e.Of, " "+own) {
		s = strings.TrimPrefix(s, e.Of+": ")
	}
	return s
}

func shareText(v float64) string {
	switch {
	case math.IsNaN(v):
		return "–"
	case v == 0:
		return "0"
	case math.Abs(v) < 0.0005:
		return fmt.Sprintf("%+.0e", v)
	}
	return fmt.Sprintf("%+.3f", v)
}

// reviewRow is members of one block that changed alike.
type reviewRow struct {
	names []string
	*review.Change
}

// reviewRows groups changes: members of one block say the same.
func reviewRows(list []review.Change) []reviewRow {
	var out []reviewRow
	at := map[string]int{}
	for i := range list {
		c := &list[i]
		k := fmt.Sprint(c.Place, c.Before, c.After, c.Was == "", len(c.Causes), len(c.Rows))
		if j, ok := at[k]; ok && c.Was == "" {
			out[j].names = append(out[j].names, c.Name)
			continue
		}
		at[k] = len(out)
		out = append(out, reviewRow{[]string{c.Name}, c})
	}
	return out
}

func (x reviewRow) title() string {
	s := shortened(strings.Join(x.names, ", "), 60)
	if x.Was != "" {
		s += " (was " + x.Was + ")"
	}
	return s
}

// why names the causes that did most, some of them.
func (x reviewRow) why(some, width int) string {
	if x.Method == review.None && len(x.Causes) == 0 {
		return x.Why
	}
	var parts []string
	causes := slices.Clone(x.Causes)
	if x.Before.Verdict != x.After.Verdict { // what turned the verdict comes first
		slices.SortStableFunc(causes, func(a, b review.Cause) int {
			switch {
			case a.Turns && !b.Turns:
				return -1
			case b.Turns && !a.Turns:
				return 1
			}
			return 0
		})
	}
	for _, c := range causes {
		if len(parts) == some {
			parts = append(parts, "…")
			break
		}
		if c.Share == 0 && !c.Turns {
			continue
		}
		text := shortened(editWords(c.Edits[0], x.Name), width)
		if n := len(c.Edits); n > 1 {
			text += fmt.Sprintf(" and %d more", n-1)
		}
		if !math.IsNaN(c.Share) && c.Share != 0 {
			text = shareText(c.Share) + " " + text
		}
		parts = append(parts, text)
	}
	return strings.Join(parts, "; ")
}
