package complete

import (
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"

	"kern/lang"
)

// pattern is the written form of a statement (lang.Form.Syntax) taken apart, so
// that what has been typed can be held against it.
type pattern struct {
	form   lang.Form
	syntax string
	nodes  []patternNode // behind the first word
	params []lang.Span   // what the writer puts in, with the word before it, as parts of syntax
}

// patternNode is an element or a group of nodes that may be left out.
type patternNode struct {
	element *element
	group   []patternNode
	repeat  bool
}

// elementKind is what may stand at an element.
type elementKind uint8

const (
	wordElement  elementKind = iota // one of some words of the language
	signElement                     // = , or a comparison
	textElement                     // a quoted text
	valueElement                    // what the writer puts in without quotes
	blockElement                    // { … }
)

// element is one part of a pattern.
type element struct {
	kind    elementKind
	words   []string // of wordElement; of textElement the text when it is fixed
	name    string   // what the writer puts in, in capitals as the syntax has it; the sign of signElement
	pattern *pattern
	param   int    // index into params
	lead    string // the word that stands before it in its group
}

// levelForm and valueForm are statements that begin with a name.
var (
	levelForm = lang.Form{In: lang.InLevel, Syntax: []string{"CASE PRESSURE"}, Summary: "A load on each square metre of the level's floor."}
	valueForm = lang.Form{In: lang.InFile, Syntax: []string{"NAME = VALUE"}, Summary: "A named value: a number with its unit, or a calculation."}
)

// fuller are forms that lang.Forms shortens: several members can be like another
// one, struts and ties too, and a factor of safety can have its reason.
var fuller = map[string][]string{
	"column":          memberSyntax("column"),
	"strut":           memberSyntax("strut"),
	"tie":             memberSyntax("tie"),
	"factor_yield":    {`factor_yield = NUMBER [because "REASON"]`},
	"factor_buckling": {`factor_buckling = NUMBER [because "REASON"]`},
}

func memberSyntax(word string) []string {
	return []string{word + ` NAME[, NAME …] ["TITLE"] { … }`, word + ` NAME[, NAME …] ["TITLE"] as NAME [{ … }]`}
}

// patterns are the patterns of every statement, by context and first word.
var patterns = func() map[lang.Context]map[string][]*pattern {
	out := map[lang.Context]map[string][]*pattern{}
	add := func(f lang.Form) {
		if out[f.In] == nil {
			out[f.In] = map[string][]*pattern{}
		}
		syntax := f.Syntax
		if more := fuller[f.Word]; more != nil {
			syntax = more
		}
		for _, s := range syntax {
			out[f.In][f.Word] = append(out[f.In][f.Word], newPattern(f, s))
		}
	}
	for _, f := range lang.Forms {
		add(f)
	}
	add(levelForm)
	add(valueForm)
	return out
}()

// patterns are those of the statement that the caret is in; nil for a statement
// that the place does not have.
func (c *caret) patterns() []*pattern {
	if found := patterns[c.in][c.head]; c.head != "" && found != nil {
		return found
	}
	switch {
	case c.head == "":
	case c.in == lang.InLevel, c.in == lang.InFile && len(c.before) > 0 && c.before[0].Kind == lang.EqualsExpr:
		return patterns[c.in][""]
	}
	return nil
}

func newPattern(f lang.Form, syntax string) *pattern {
	p := &pattern{form: f, syntax: syntax}
	r := patternReader{p: p, text: syntax}
	if f.Word == "combination" { // its sum is one value to the language
		at := strings.Index(syntax, "= ") + 2
		r.text = syntax[:at]
		r.sum = lang.Span{Start: int32(at), End: int32(len(syntax))}
	}
	p.nodes = r.nodes()
	if len(p.nodes) > 0 {
		p.nodes = p.nodes[1:] // the first word, or the name in its place
	}
	return p
}

// patternReader reads a syntax.
type patternReader struct {
	p    *pattern
	text string
	pos  int
	lead string // the word just before
	from int    // where it stands
	sum  lang.Span
}

func (r *patternReader) nodes() []patternNode {
	var out []patternNode
	for r.pos < len(r.text) {
		rest := r.text[r.pos:]
		switch c := rest[0]; {
		case c == ' ':
			r.pos++
		case c == '[':
			r.pos++
			r.lead = ""
			n := patternNode{group: r.nodes()}
			n.repeat = strings.HasSuffix(strings.TrimRight(r.text[:r.pos-1], " "), "…") && n.group[0].element != nil && n.group[0].element.kind == signElement
			out = append(out, n)
			r.lead = ""
		case c == ']':
			r.pos++
			return out
		case strings.HasPrefix(rest, "…"):
			r.pos += len("…")
		case c == '{':
			end := strings.IndexByte(rest, '}') + 1
			out = append(out, r.element(element{kind: blockElement}, end, true))
		case c == '"':
			end := strings.IndexByte(rest[1:], '"') + 2
			e := element{kind: textElement, name: rest[1 : end-1]}
			if !capitals(e.name) {
				e.words, e.name = []string{e.name}, ""
			}
			out = append(out, r.element(e, end, true))
		case c == ',' || c == '=' || c == '>' || c == '<':
			sign := rest[:1]
			if strings.HasPrefix(rest, ">=") || strings.HasPrefix(rest, "<=") {
				sign = rest[:2]
			}
			out = append(out, r.element(element{kind: signElement, name: sign}, len(sign), false))
		default:
			end := strings.IndexAny(rest, " ,[]")
			if end < 0 {
				end = len(rest)
			}
			word := rest[:end]
			if capitals(word) {
				out = append(out, r.element(element{kind: valueElement, name: word}, end, true))
				break
			}
			words := strings.Split(word, "|")
			out = append(out, r.element(element{kind: wordElement, words: words}, end, len(words) > 1 || !lang.Joins(word)))
		}
	}
	if r.sum.End > 0 {
		r.pos = int(r.sum.Start)
		r.text = r.p.syntax
		out = append(out, r.element(element{kind: valueElement, name: "FACTOR CASE"}, r.sum.Len(), true))
		r.sum, r.pos = lang.Span{}, len(r.text)
	}
	return out
}

// element finishes an element of some length. One that the writer puts in is a
// parameter, together with the word before it.
func (r *patternReader) element(e element, length int, param bool) patternNode {
	e.pattern = r.p
	start := r.pos
	r.pos += length
	first := start == 0
	if e.kind == wordElement && !param {
		// the word belongs to what follows it
		r.lead, r.from = e.words[0], start
		e.param = len(r.p.params)
		return patternNode{element: &e}
	}
	e.param = max(0, len(r.p.params)-1)
	if e.kind == signElement {
		e.param = len(r.p.params)
		r.lead = ""
	}
	if param && e.kind != blockElement && (!first || e.kind == valueElement) {
		e.param = len(r.p.params)
		e.lead = r.lead
		if r.lead != "" {
			start = r.from
		}
		r.p.params = append(r.p.params, lang.Span{Start: int32(start), End: int32(r.pos)})
		r.lead = ""
	}
	return patternNode{element: &e}
}

// capitals tells what the writer puts in from words and texts that stand as they
// are.
func capitals(s string) bool {
	upper := 0
	for _, r := range s {
		switch {
		case unicode.IsUpper(r):
			upper++
		case r == '/' || r == '^' || r == ' ' || unicode.IsDigit(r):
		default:
			return false
		}
	}
	first, _ := utf8.DecodeRuneInString(s)
	return upper > 1 && unicode.IsUpper(first) && !strings.HasPrefix(s, "EN ")
}

// accepts tells whether a part that was typed can stand at an element.
type accepts func(e *element, part *lang.Expr) bool

// next holds the parts that were typed against the pattern. It calls due for
// every element that can come next, and gives how many parts it could follow and
// whether nothing more needs to come.
func (p *pattern) next(parts []*lang.Expr, ok accepts, due func(*element)) (followed int, complete bool) {
	w := walker{parts: parts, ok: ok, due: due}
	w.walk(p.nodes, 0, func(at int) {
		complete = complete || at == len(parts)
	})
	return w.furthest, complete
}

type walker struct {
	parts    []*lang.Expr
	ok       accepts
	due      func(*element)
	furthest int
	steps    int
}

// maxWalk bounds the ways that are tried; a statement has a handful.
const maxWalk = 20_000

func (w *walker) walk(nodes []patternNode, at int, done func(at int)) {
	if w.steps++; w.steps > maxWalk {
		return
	}
	w.furthest = max(w.furthest, at)
	if len(nodes) == 0 {
		done(at)
		return
	}
	n := nodes[0]
	if n.group != nil {
		w.walk(n.group, at, func(then int) {
			if n.repeat && then > at {
				w.walk(nodes, then, done)
				return
			}
			w.walk(nodes[1:], then, done)
		})
		w.walk(nodes[1:], at, done)
		return
	}
	if at == len(w.parts) {
		w.due(n.element)
		return
	}
	if w.ok(n.element, w.parts[at]) {
		w.walk(nodes[1:], at+1, done)
	}
}

// placeholders are the names of what the writer puts in, for a test.
func (p *pattern) placeholders() []string {
	var out []string
	var visit func(nodes []patternNode)
	visit = func(nodes []patternNode) {
		for _, n := range nodes {
			visit(n.group)
			if e := n.element; e != nil && e.name != "" && e.kind != signElement && !slices.Contains(out, e.name) {
				out = append(out, e.name)
			}
		}
	}
	visit(p.nodes)
	return out
}
