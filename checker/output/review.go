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

// ReviewForm is how a review is printed.
type ReviewForm struct {
	// Before and After are the names of the two states.
	Before, After string
	Names         Names
	// Link gives the address of a line, "" for none; nil for no addresses.
	Link func(review.Place) string
	// Rows bounds the changed members that are shown, 0 for all. What is left out
	// is counted.
	Rows int
	// Together are the members that fail or are undecided in a merged state alone
	// (kern review --merge); Merge is set for a review of one.
	Together []string
	Merge    bool
	// Program is the name and version of the program.
	Program string
}

// ReviewPage is a review as a page: in Markdown, or as plain text.
func ReviewPage(r *review.Review, f ReviewForm, markdown bool) string {
	p := NewPage(markdown)
	(&reviewing{r, f, p, !markdown}).compose()
	return p.String()
}

type reviewing struct {
	r *review.Review
	f ReviewForm
	*Page
	narrow bool // tables are to fit on a terminal
}

func (w *reviewing) compose() {
	r := w.r
	w.Head(2, w.headline())
	w.Text(Words(w.states()))
	if w.f.Merge {
		w.merge()
	}
	if r.Nothing() && len(r.Loosened) == 0 {
		w.Text(Strong("Nothing changed in any result."), Words(" "+w.unchanged()))
	}
	w.failing()
	w.errors()
	w.loosened()
	w.changed()
	w.shared()
	w.members()
	w.assumptions()
	w.Text(Words(w.method() + Caution))
}

// counted is a number with its word.
func counted(n int, one, many string) string {
	if n == 1 {
		return "1 " + one
	}
	return fmt.Sprintf("%d %s", n, many)
}

func (w *reviewing) headline() string {
	r := w.r
	var fails, undecided, mended int
	for i := range r.Changes {
		c := &r.Changes[i]
		switch {
		case c.NewlyFails():
			fails++
		case c.NewlyUndecided():
			undecided++
		case c.After.Verdict == standard.Passes && c.Before.Verdict != standard.Passes:
			mended++
		}
	}
	for _, m := range r.Added {
		switch m.State.Verdict {
		case standard.Fails:
			fails++
		case standard.Undecided:
			undecided++
		}
	}
	var parts []string
	add := func(n int, one, many string) {
		if n > 0 {
			parts = append(parts, counted(n, one, many))
		}
	}
	add(fails, "member newly fails", "members newly fail")
	add(undecided, "member is newly undecided", "members are newly undecided")
	add(len(r.Errors), "new error", "new errors")
	add(mended, "member passes now", "members pass now")
	add(len(r.Loosened), "thing loosened or reworded", "things loosened or reworded")
	add(len(r.Changes)-fails-undecided-mended+addedBad(r), "other member changed", "other members changed")
	if len(parts) == 0 {
		if r.Nothing() {
			return "Nothing changed in any result"
		}
		return "No verdict got worse"
	}
	s := strings.Join(parts, ", ")
	return strings.ToUpper(s[:1]) + s[1:]
}

// addedBad is the number of added members that do not pass.
func addedBad(r *review.Review) int {
	n := 0
	for _, m := range r.Added {
		if m.State.Verdict != standard.Passes {
			n++
		}
	}
	return n
}

func (w *reviewing) states() string {
	say := func(s checker.Summary) string {
		return fmt.Sprintf("%s: %d pass, %d fail, %d undecided", counted(s.Members, "member", "members"), s.Passes, s.Fails, s.Undecided)
	}
	return "Before, " + w.f.Before + ": " + say(w.r.Before) + ". Now, " + w.f.After + ": " + say(w.r.After) + "."
}

func (w *reviewing) unchanged() string {
	s := fmt.Sprintf("%s, each with the same checks, utilisations and verdict as before", counted(w.r.Same, "member", "members"))
	if n := len(w.r.Edited); n > 0 {
		s += fmt.Sprintf("; something was edited that %d of them depend on", n)
	}
	return s + "."
}

func (w *reviewing) merge() {
	if len(w.f.Together) == 0 {
		w.Text(Words("The merge is clean, and nothing fails or is undecided in it that does not on one of the sides."))
		return
	}
	w.Text(Strong("The merge is clean as text, but its result is not: "), Words("each side is right by itself, and together "+strings.Join(w.f.Together, ", ")+
		oneOr(len(w.f.Together), " fails or is undecided.", " fail or are undecided.")))
}

func oneOr(n int, one, many string) string {
	if n == 1 {
		return one
	}
	return many
}

var changeHead = []string{"member", "before", "now", "governing check", "why", "line"}

func (w *reviewing) line(x reviewRow) []Line {
	governing := x.After.Governing
	if x.Before.Governing != x.After.Governing && x.Before.Governing != "" {
		governing += ", was " + x.Before.Governing
	}
	now := Words(w.answer(x.After))
	if x.After.Verdict == standard.Fails {
		now = Strong(w.answer(x.After))
	}
	why := x.why(2, 60)
	if w.narrow {
		why = x.why(1, 44)
	}
	if x.After.Verdict == standard.Undecided && len(x.After.Missing) > 0 {
		why = shortened(x.After.Missing[0], 100)
	}
	return []Line{Words(x.title()), Words(w.answer(x.Before)), now, Words(dash(governing)), Words(why), w.at(x.Place)}
}

// failing shows what fails or is undecided now and was not, then what fails still.
func (w *reviewing) failing() {
	var now, still [][]Line
	failing := 0
	for _, x := range reviewRows(w.r.Changes) {
		if x.After.Verdict == standard.Fails {
			failing += len(x.names)
		}
		switch {
		case x.NewlyFails() || x.NewlyUndecided():
			now = append(now, w.line(x))
		case x.After.Verdict == standard.Fails:
			still = append(still, w.line(x))
		}
	}
	for _, m := range w.r.Added {
		if m.State.Verdict == standard.Passes {
			continue
		}
		if m.State.Verdict == standard.Fails {
			failing++
		}
		why := "added"
		if m.State.Verdict == standard.Undecided && len(m.State.Missing) > 0 {
			why += "; " + shortened(m.State.Missing[0], 100)
		}
		now = append(now, []Line{Words(m.Name), Words("–"), Strong(w.answer(m.State)), Words(dash(m.State.Governing)), Words(why), w.at(m.Place)})
	}
	w.table("Newly fails or undecided", now)
	w.table("Fails as before, with other numbers", still)
	if n := w.r.After.Fails - failing; n > 0 {
		w.Text(Words(fmt.Sprintf("%s as before.", counted(n, "other member fails", "other members fail"))))
	}
}

// table shows the first rows of a list and counts the others.
func (w *reviewing) table(title string, lines [][]Line) {
	if len(lines) == 0 {
		return
	}
	w.Head(3, title)
	left := 0
	if w.f.Rows > 0 && len(lines) > w.f.Rows {
		left, lines = len(lines)-w.f.Rows, lines[:w.f.Rows]
	}
	w.Table(changeHead, "lrrlll", lines)
	if left > 0 {
		w.Text(Words(fmt.Sprintf("And %d more.", left)))
	}
}

func (w *reviewing) errors() {
	if len(w.r.Errors) == 0 {
		return
	}
	w.Head(3, "New errors in the text")
	var items []Line
	for i, e := range w.r.Errors {
		if w.f.Rows > 0 && i == w.f.Rows {
			items = append(items, Words(fmt.Sprintf("and %d more", len(w.r.Errors)-i)))
			break
		}
		items = append(items, Join(w.at(e.Place), Words(" "+e.Rule+": "+e.Message)))
	}
	w.List(items...)
}

// names lists members, the first few by name.
func (w *reviewing) names(list []string) string {
	const few = 12
	if len(list) > few {
		return strings.Join(list[:few], ", ") + fmt.Sprintf(" and %d more", len(list)-few)
	}
	return strings.Join(list, ", ")
}

// loosened is never folded away and never shortened.
func (w *reviewing) loosened() {
	if len(w.r.Loosened) == 0 {
		return
	}
	w.Head(3, "Loosened, departed from, reworded")
	var items []Line
	for _, l := range w.r.Loosened {
		line := Strong(l.What)
		switch {
		case l.Before != "" && l.After != "":
			line = Join(line, Words(": "+l.Before+" → "+l.After))
		case l.Before != "":
			line = Join(line, Words(": was "+l.Before))
		case l.After != "":
			line = Join(line, Words(": "+l.After))
		}
		if len(l.Members) > 0 {
			line = Join(line, Words(", "+w.names(l.Members)))
		}
		switch {
		case l.Reworded:
		case l.Unexplained():
			line = Join(line, Words("; "), Strong("no reason given"))
		default:
			line = Join(line, Words("; because \""+l.Because+"\""))
		}
		items = append(items, Join(line, Words(" ("), w.at(l.Place), Words(")")))
	}
	w.List(items...)
}

// changed lists the members that changed, and what did it.
func (w *reviewing) changed() {
	all := reviewRows(w.r.Changes)
	if len(all) == 0 {
		return
	}
	var others [][]Line
	var little []string
	for _, x := range all {
		switch {
		case x.After.Verdict == standard.Fails || x.NewlyUndecided():
		case x.Before.Verdict == x.After.Verdict && !(math.Abs(x.After.Utilisation-x.Before.Utilisation) >= 0.005) && !math.IsNaN(x.After.Utilisation-x.Before.Utilisation):
			little = append(little, x.names...)
		default:
			others = append(others, w.line(x))
		}
	}
	w.table("Changed", others)
	if len(little) > 0 {
		w.Text(Words("Utilisation changed by less than 0.005, or other checks alone: " + w.names(little) + "."))
	}
	w.Add(Fold{"What each edit did, member by member"})
	for i, x := range all {
		if w.f.Rows > 0 && i == w.f.Rows {
			w.Text(Words(fmt.Sprintf("And %d more.", len(all)-i)))
			break
		}
		w.detail(x)
	}
	w.Add(Unfold{})
}

// ChangePage writes what changed of one member, and which edits did it.
func ChangePage(p *Page, c *review.Change, title string, names Names) {
	w := &reviewing{&review.Review{}, ReviewForm{Names: names}, p, true}
	w.detail(reviewRow{[]string{title}, c})
}

// mostEdits bounds how many edits that are taken as one are written out.
const mostEdits = 6

// exactly is a utilisation with three decimals, as shares have.
func exactly(u float64) string {
	if math.IsNaN(u) {
		return "not known"
	}
	return fmt.Sprintf("%.3f", u)
}

func (w *reviewing) detail(x reviewRow) {
	head := Join(Strong(x.title()), Words(fmt.Sprintf(": %s, utilisation %s → %s, utilisation %s", x.Before.Verdict, exactly(x.Before.Utilisation), x.After.Verdict, exactly(x.After.Utilisation))))
	switch x.Method {
	case review.None:
		head = Join(head, Words("; not shared out among the edits: "+x.Why))
	case review.Sampled:
		head = Join(head, Words(fmt.Sprintf("; shares estimated from %d orders of the edits", x.Orders)))
	}
	w.Text(head)
	var items []Line
	var nothing Line
	for _, c := range x.Causes {
		if c.Share == 0 && !c.Turns {
			if nothing == nil {
				nothing = Words("0 each: ")
			} else {
				nothing = Join(nothing, Words("; "))
			}
			for k, e := range c.Edits[:min(len(c.Edits), mostEdits)] {
				if k > 0 {
					nothing = Join(nothing, Words(" with "))
				}
				nothing = Join(nothing, Words(shortened(editWords(e, x.Name), 80)+" ("), w.at(e.Place), Words(")"))
			}
			continue
		}
		var line Line
		if x.Method != review.None {
			line = Join(Words(shareText(c.Share) + " "))
		}
		for k, e := range c.Edits {
			if k == mostEdits {
				line = Join(line, Words(fmt.Sprintf(" with %d more", len(c.Edits)-k)))
				break
			}
			if k > 0 {
				line = Join(line, Words(" with "))
			}
			line = Join(line, Words(shortened(editWords(e, x.Name), 160)+" ("), w.at(e.Place), Words(")"))
		}
		if c.Turns {
			line = Join(line, Words("; without it: "+c.Without.String()))
		}
		items = append(items, line)
	}
	if nothing != nil {
		items = append(items, nothing)
	}
	for _, row := range x.Rows {
		if row.Rule == x.After.Governing && row.Rule == x.Before.Governing {
			continue
		}
		say := func(u float64, v standard.Verdict) string {
			if math.IsNaN(u) {
				return "not made"
			}
			return v.String() + " " + checker.Ratio(u)
		}
		items = append(items, Words("check "+row.Rule+": "+say(row.Before, row.Verdict[0])+" → "+say(row.After, row.Verdict[1])))
	}
	w.List(items...)
}

func (w *reviewing) shared() {
	if len(w.r.Shared) == 0 {
		return
	}
	w.Head(3, "Shared definitions that were edited")
	var items []Line
	for i, s := range w.r.Shared {
		if w.f.Rows > 0 && i == w.f.Rows {
			items = append(items, Words(fmt.Sprintf("and %d more", len(w.r.Shared)-i)))
			break
		}
		reach := "no member depends on it"
		if n := len(s.Reaches); n > 0 {
			reach = fmt.Sprintf("%s (%s), %d with other results", oneOr(n, "1 member depends on it", fmt.Sprintf("%d members depend on it", n)), w.names(s.Reaches), s.Changed)
		}
		items = append(items, Join(Words(shortened(editWords(s.Edit, ""), 160)+" ("), w.at(s.Edit.Place), Words("): "+reach)))
	}
	w.List(items...)
}

func (w *reviewing) members() {
	list := func(title string, members []review.Member) {
		if len(members) == 0 {
			return
		}
		w.Head(3, title)
		var items []Line
		for i, m := range members {
			if w.f.Rows > 0 && i == w.f.Rows {
				items = append(items, Words(fmt.Sprintf("and %d more", len(members)-i)))
				break
			}
			items = append(items, Join(Words(strings.TrimSpace(m.Name+" "+m.Title)+": "+w.answer(m.State)+" ("), w.at(m.Place), Words(")")))
		}
		w.List(items...)
	}
	list("Added members", w.r.Added)
	list("Removed members", w.r.Removed)
	if len(w.r.Edited) > 0 && !w.r.Nothing() {
		var names []string
		for _, m := range w.r.Edited {
			names = append(names, m.Name)
		}
		w.Text(Words("Edited without any other result: " + w.names(names) + "."))
	}
}

func (w *reviewing) assumptions() {
	if len(w.r.Assumptions) == 0 {
		return
	}
	w.Head(3, "Assumptions")
	var items []Line
	for i, a := range w.r.Assumptions {
		if w.f.Rows > 0 && i == w.f.Rows {
			items = append(items, Words(fmt.Sprintf("and %d more", len(w.r.Assumptions)-i)))
			break
		}
		word := "no longer assumed: "
		if a.Added {
			word = "now assumed: "
		}
		items = append(items, Words(word+a.Text+" ("+w.names(a.Members)+")"))
	}
	w.List(items...)
}

// method says how the shares are to be read.
func (w *reviewing) method() string {
	if !slices.ContainsFunc(w.r.Changes, func(c review.Change) bool { return c.Method != review.None }) {
		return ""
	}
	return "The number before an edit is its share in the change of the utilisation (Shapley value); the shares of a member add up to its change. "
}
