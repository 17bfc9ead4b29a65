package offer

import (
	"cmp"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/edit"
	"kern/checker/model"
	"kern/lang"
)

// missing offers what a diagnostic says is not there: a line of a member, the
// rest of a line, or the declaration of a name.
func (l *list) missing(d *checker.Diagnostic) {
	at, ok := l.file.At(d.Span.Start)
	if !ok || at.Stmt() == nil {
		return
	}
	s := site{At: at, stmt: at.Stmt(), top: at.Stmts[0]}
	switch d.Rule {
	case "missing-value":
		if o, ok := l.memberOf(s); ok && len(s.Stmts) == 1 {
			for _, what := range []string{"section", "material", "height"} {
				if strings.HasSuffix(d.Message, " has no "+what) {
					l.missingLine(d, o, what)
				}
			}
		}
		l.unfinished(d, s)
	case "wrong-form", "unknown-word":
		l.unfinished(d, s)
	case "unknown-name":
		l.undeclared(d, s)
	}
}

// quickly adds a fix of one edit.
func (l *list) quickly(d *checker.Diagnostic, title string, e checker.Edit, ok bool) {
	if ok {
		l.add(Offer{Kind: QuickFix, Title: title, Mends: d, edits: func() []checker.Edit { return []checker.Edit{e} }})
	}
}

// maxChoices bounds how many values are offered for one thing that is missing.
const maxChoices = 3

// missingLine offers a line that a member lacks: what the other members of the
// calculation say most often, and a line to start from.
func (l *list) missingLine(d *checker.Diagnostic, o owner, what string) {
	lines := l.usual(what)
	for _, start := range map[string][]string{"section": {`section = "HEB 160"`}, "material": {`material = "S355"`}, "height": {"height = 3 m"}}[what] {
		if len(lines) == 0 {
			lines = append(lines, start)
		}
	}
	for _, line := range lines {
		e, ok := l.insert(o, line)
		l.quickly(d, "Add "+line, e, ok)
	}
}

// usual are the lines of a word that members of the file have, the most frequent
// first. Only short ones can be offered.
func (l *list) usual(what string) []string {
	count := map[string]int{}
	for _, decl := range l.file.Decls {
		for _, s := range decl.Stmts {
			if s.Body == nil || assigned(s) || s.Word != "column" && s.Word != "strut" && s.Word != "tie" {
				continue
			}
			for _, b := range s.Body.Stmts {
				value, ok := b.Assigned()
				if !ok || b.Word != what || b.Body != nil || b.Broken || len(value) != 1 || what != "height" && !l.good(what, value[0]) {
					continue
				}
				if what == "height" {
					if _, plain := literalOf(value[0]); !plain {
						continue
					}
				}
				count[what+" = "+value[0].Span.Of(decl.Text)]++
			}
		}
	}
	out := make([]string, 0, len(count))
	for line := range count {
		out = append(out, line)
	}
	slices.SortFunc(out, func(a, b string) int { return cmp.Or(cmp.Compare(count[b], count[a]), strings.Compare(a, b)) })
	return out[:min(len(out), maxChoices)]
}

// good tells whether a value of a section or material line means something.
func (l *list) good(what string, e *lang.Expr) bool {
	switch {
	case e.Kind == lang.StringExpr:
		return known(what, e.Text)
	case e.Kind == lang.NameExpr && len(l.calculations) > 0:
		env := l.calculations[0].Env
		n := env.Names[e.Text]
		return n != nil && n.Kind == kindOf[what] && !env.Bad(n) && !n.Twice
	}
	return false
}

var kindOf = map[string]model.NameKind{"section": model.SectionName, "material": model.MaterialName}

// unfinished offers the rest of a line that somebody has begun.
func (l *list) unfinished(d *checker.Diagnostic, s site) {
	args := s.stmt.Args
	inMember := len(s.Stmts) == 2
	var rests []string
	switch word := s.stmt.Word; {
	case word == "hold" && inMember:
		switch {
		case len(args) == 0:
			rests = []string{" both at height / 2", " minor at height / 2"}
		case len(args) == 1 && slices.Contains([]string{"major", "minor", "both", "twist"}, args[0].Text):
			rests = []string{" at height / 2"}
		case len(args) == 2 && args[1].Is("at"):
			rests = []string{" height / 2"}
		}
	case (word == "base" || word == "top") && inMember && len(args) == 0:
		rests = []string{" pinned", " fixed"}
	case word == "case" && len(s.Stmts) == 1 && len(args) == 1 && args[0].Kind == lang.NameExpr:
		for _, kind := range l.caseKinds(args[0].Text) {
			rests = append(rests, " "+kind)
		}
	}
	end := lang.Span{Start: s.stmt.Line.End, End: s.stmt.Line.End}
	for _, rest := range rests {
		l.quickly(d, "Write "+s.stmt.Line.Of(s.Decl.Text)+rest, l.edit(s.Start, end, rest), true)
	}
}

// caseKinds are the kinds that a case of this name is likely to have, by the
// letters that the Eurocodes use, and those that it may have.
func (l *list) caseKinds(name string) []string {
	imposed, snow := `imposed "B"`, `snow "below 1000 m"`
	likely := map[string]string{"G": "permanent", "D": "permanent", "Q": imposed, "L": imposed, "I": imposed, "S": snow, "W": "wind", "T": "temperature"}[strings.ToUpper(name[:1])]
	out := []string{"permanent", imposed, "wind"}
	if likely != "" {
		out = append([]string{likely}, slices.DeleteFunc(out, func(k string) bool { return k == likely })...)
	}
	return out[:maxChoices]
}

// undeclared offers to declare a name that nobody gives.
func (l *list) undeclared(d *checker.Diagnostic, s site) {
	name := d.Span.Of(l.file.Text)
	if _, taken := lang.Constants[name]; taken {
		return
	}
	if _, taken := lang.Functions[name]; taken || name == "" || lang.Joins(name) {
		return
	}
	first := len(s.stmt.Args) > 0 && s.Start+s.stmt.Args[0].Span.Start == d.Span.Start
	value, isValue := s.stmt.Assigned()
	switch word := s.stmt.Word; {
	case word == "load" && len(s.Stmts) == 2 && first && strings.Contains(d.Message, "load case"),
		s.top.Word == "level" && len(s.Stmts) == 2 && s.Start+s.stmt.Head.Start == d.Span.Start,
		s.top.Word == "combination" && strings.Contains(d.Message, "load case"):
		for _, kind := range l.caseKinds(name) {
			text := "case " + name + " " + kind
			e, ok := l.declare(s, "case", text)
			l.quickly(d, "Declare the load case: "+text, e, ok)
		}
	case (word == "section" || word == "material") && len(s.Stmts) == 2 && isValue && len(value) > 0 && s.Start+value[0].Span.Start == d.Span.Start:
		text := map[string]string{"section": `section ` + name + ` = "HEB 160"`, "material": `material ` + name + ` = "S355"`}[word]
		e, ok := l.declare(s, word, text)
		l.quickly(d, "Declare the "+word+": "+text, e, ok)
	}
}

// declare gives the edit that puts a declaration of a word behind the last of its
// kind in the file, or above the declaration of the site.
func (l *list) declare(s site, word, text string) (checker.Edit, bool) {
	for i := len(l.file.Decls) - 1; i >= 0; i-- {
		d := l.file.Decls[i]
		if len(d.Stmts) != 1 || d.Stmts[0].Word != word || assigned(d.Stmts[0]) || d.Stmts[0].Body != nil || len(d.Problems) > 0 {
			continue
		}
		if to, ok := edit.Rest(d.Text, d.Stmts[0].Span.End); ok {
			return l.declares(l.edit(l.file.Starts[i], lang.Span{Start: to, End: to}, "\n"+text), text)
		}
	}
	return l.above(l.file.DeclAt(s.Start), text)
}

// above gives the edit that puts a declaration above another one and above the
// comment that belongs to that.
func (l *list) above(decl int, text string) (checker.Edit, bool) {
	d := l.file.Decls[decl]
	if len(d.Stmts) == 0 || !edit.First(strings.TrimPrefix(d.Text[:d.Stmts[0].Span.Start], "\ufeff"), int32(len(strings.TrimPrefix(d.Text[:d.Stmts[0].Span.Start], "\ufeff")))) {
		return checker.Edit{}, false
	}
	all := l.file.Text
	line := edit.LineStart(all, l.file.Starts[decl]+d.Stmts[0].Span.Start)
	at := line
	for at > 0 {
		before := at - 1
		if before > 0 && all[before] == '\n' && all[before-1] == '\r' {
			before--
		}
		start := edit.LineStart(all, before)
		if !strings.HasPrefix(strings.TrimLeft(all[start:before], " \t"), "#") {
			break
		}
		at = start
	}
	if at == 0 && at < line {
		at = line // the comment at the head of a file belongs to the file
	}
	if at == 0 && strings.HasPrefix(all, "\ufeff") {
		at = int32(len("\ufeff"))
	}
	text += "\n"
	if b := d.Stmts[0].Body; b != nil && strings.ContainsAny(b.Span.Of(d.Text), "\r\n") {
		text += "\n"
	}
	return l.declares(checker.Edit{File: l.File, Span: lang.Span{Start: at, End: at}, New: text}, text)
}

// declares tells whether a text that is put into the file is a declaration there:
// behind a block that is not closed it may be a line of that. Where a declaration
// begins, nothing before it counts, so that the neighbours are enough to look at.
func (l *list) declares(e checker.Edit, text string) (checker.Edit, bool) {
	f := l.file
	from, to := f.DeclAt(max(0, e.Span.Start-1)), f.DeclAt(e.Span.Start)+1
	from = max(0, from-1)
	to = min(to+1, len(f.Decls))
	start, end := f.Starts[from], int32(len(f.Text))
	if to < len(f.Decls) {
		end = f.Starts[to]
	}
	around := lang.Parse(&lang.FileID{Name: l.File}, f.Text[start:e.Span.Start]+e.New+f.Text[e.Span.Start:end], nil)
	want := strings.TrimSpace(text)
	for _, d := range around.Decls {
		if len(d.Stmts) == 1 && len(d.Problems) == 0 && d.Stmts[0].Span.Of(d.Text) == want {
			return e, len(around.Decls) == to-from+1
		}
	}
	return e, false
}
