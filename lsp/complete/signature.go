package complete

import (
	"sort"
	"strings"

	"kern/checker"
	"kern/lang"
)

// Help is how a statement or a function is written, with the part that is due.
type Help struct {
	Forms []Signature
	// Active is the form that fits what has been typed.
	Active int
	// Param is the part of the active form that is due, -1 for none.
	Param int
	// Quoted is set inside a quoted text, where blanks are part of it.
	Quoted bool
}

// Signature is one form.
type Signature struct {
	Syntax  string
	Summary string
	Params  []Param
}

// Param is a part of a form that the writer puts in.
type Param struct {
	Span  lang.Span // in the syntax, in bytes
	Words string    // what it is
}

// placeholderWords say what the writer puts in, by its name in the syntax.
var placeholderWords = map[string]string{
	"FORCE": "a force along the member, compression positive: 80 kN, -12 kN; or a value of that dimension", "FORCE/LENGTH": "a force per length: a line load of 1.8 kN/m, a stiffness against moving sideways of 900 kN/m",
	"MOMENT": "a moment: 5 kNm", "MOMENT/ANGLE": "a stiffness against turning: 4000 kNm/rad", "AREA": "an area: 18 m2", "LENGTH": "a length: 4.80 m, 250 mm, 14 ft 6 in", "HEIGHT": "a height above datum: 3.60 m",
	"LEVEL": "a level, or a height above datum", "PLACE": "top, base, a height above the base, or a level", "STRESS": "a stress: 355 MPa", "PRESSURE": "a load on each square metre: 5.0 kN/m2",
	"DENSITY": "a density: 7850 kg/m3", "NUMBER": "a pure number", "LENGTH^3": "a section modulus: 92 cm3", "LENGTH^4": "a second moment of area: 612 cm4", "LENGTH^6": "a warping constant: 12000 cm6",
	"CASE": "a load case of the calculation", "AXIS": "major or minor", "FAMILY": "a family of the catalogue: HEB, SHS", "NAME": "a name", "SHAPE": "tube, pipe, isection, channel, tee, angle, bar, rod or given", "VALUE": "a value with its unit, or a calculation",
	"RESULT": "a result: N_b_minor, N_cr_major, utilisation, or a symbol of the standard", "RULE": "the name of a check: flexural-buckling-minor", "UNIT": "a unit: kN",
	"FACTOR CASE": "cases with their factors: 1.1 G + 0.5 W", "FILE": "the path of a file, from this one", "DESIGNATION": "a section of the catalogue: HEB 160", "GRADE": "a steel grade: S355",
	"STANDARD": "a product standard: EN 10025-2", "TITLE": "what people call the member", "REASON": "why", "TEXT": "any text", "DATE": "a date, year-month-day: 2026-03-31", "KIND": "imposed, roof, snow, rain, wind or temperature", "SITUATION": "what the combination is for; without it, persistent situations", "CATEGORY": "the category of EN 1990 Table A1.1: A to H",
}

// SignatureAt tells how the statement or the function at a place is written. It
// is false where nothing is written by a form.
func SignatureAt(r *checker.Report, file string, offset int32) (Help, bool) {
	s, ok := newScope(r, file, offset)
	if !ok || s.in == "" {
		return Help{}, false
	}
	if h, ok := s.call(); ok {
		return h, true
	}
	list := s.patterns()
	if s.head == "" {
		if list = patterns[s.in][s.typed()]; s.typed() == "" {
			list = nil
		}
		if len(list) == 0 {
			return Help{}, false
		}
		return s.help(list, 0, -1), true
	}
	if len(list) == 0 {
		return Help{}, false
	}
	whole, value, _ := s.split()
	furthest, best := -1, 0
	complete := false
	for _, fits := range []bool{true, false} {
		for i, p := range list {
			active := -1
			due := func(before []*lang.Expr, quantity bool) func(e *element) {
				return func(e *element) {
					_, _, takes := s.dim(e)
					switch {
					case active >= 0, quantity && !takes && e.name != "FACTOR CASE", fits && !s.goesOn(p, e, before):
					case e.name == "CASE" && !s.env.Declared(), s.quoted && e.kind != textElement:
					default:
						active = e.param
					}
				}
			}
			if value != nil {
				before := s.before[:len(s.before)-len(value)]
				p.next(before, s.accepts, due(before, true))
			}
			if whole || value == nil {
				followed, done := p.next(s.before, s.accepts, due(s.before, false))
				complete = complete || done
				if followed > furthest {
					furthest, best = followed, i
				}
			}
			if active >= 0 {
				return s.help(list, i, min(active, len(p.params)-1)), true
			}
		}
	}
	if complete || furthest < 0 {
		return Help{}, false
	}
	return s.help(list, best, min(furthest, len(list[best].params)-1)), true
}

// help makes the forms of a statement.
func (s *scope) help(list []*pattern, active, param int) Help {
	h := Help{Active: active, Param: param, Quoted: s.quoted}
	for _, p := range list {
		x := Signature{Syntax: p.syntax, Summary: p.form.Summary}
		for i, span := range p.params {
			x.Params = append(x.Params, Param{Span: span, Words: p.paramWords(i)})
		}
		h.Forms = append(h.Forms, x)
	}
	return h
}

// paramWords say what a part of a form is.
func (p *pattern) paramWords(param int) string {
	words := ""
	var visit func(nodes []patternNode)
	visit = func(nodes []patternNode) {
		for _, n := range nodes {
			visit(n.group)
			e := n.element
			if e == nil || e.param != param || e.kind == signElement || e.kind == blockElement || words != "" {
				continue
			}
			switch {
			case e.name == "NAME" && e.kind == textElement && e.lead == "annex":
				words = "a set of national values"
			case e.name == "NAME" && e.kind == textElement:
				words = "a design standard"
			case e.name == "PLACE" && e.kind == textElement:
				words = "the category of EN 1990 Table A1.1: below 1000 m or above 1000 m"
			case e.name == "NAME" && e.lead == "as":
				words = "the member to be like"
			case e.name == "NAME" && p.form.In == lang.InMember:
				words = lang.A(p.form.Word) + " that the calculation declares"
			case e.name != "":
				words = placeholderWords[e.name]
			case e.kind == textElement:
				words = fixedWords[e.words[0]]
			case e.words[0] == "section":
				words = "the cross-section"
			case e.words[0] == "depth": // no words that are taken: a calculation may have such names
				words = "depth or width: the overall dimension of the section"
			case p.form.Word == "class":
				words = "the class of the cross-section"
			case strings.HasPrefix(p.form.Word, "curve"):
				words = "a buckling curve"
			case p.form.Word == "interaction":
				words = "the annex with the interaction factors"
			case len(e.words) > 1:
				var each []string
				for _, w := range e.words {
					if lang.Words[w] != "" {
						each = append(each, w+": "+lang.Words[w])
					}
				}
				words = strings.Join(each, "; ")
			case !joining(e.words[0]):
				words = lang.Words[e.words[0]]
			}
		}
	}
	visit(p.nodes)
	return words
}

// call is the help of the innermost function whose brackets are open.
func (s *scope) call() (Help, bool) {
	if len(s.before) == 0 || s.quoted {
		return Help{}, false
	}
	var found *lang.Expr
	name := ""
	for e := s.before[len(s.before)-1]; e != nil; {
		if e.Kind == lang.BadExpr && e.Text == "(" {
			if f := calledIn(e, s.text[s.start:]); lang.Functions[f] != "" {
				found, name = e, f
			} else {
				found = nil // a bracket of its own in the call, or no function
			}
		}
		if e.Kind == lang.ParenExpr || e.Kind == lang.CallExpr || len(e.Args) == 0 {
			break
		}
		e = e.Args[len(e.Args)-1]
	}
	if found == nil {
		return Help{}, false
	}
	x := functionSignature(name)
	return Help{Forms: []Signature{x}, Param: min(max(0, len(found.Args)-1), len(x.Params)-1)}, true
}

// functionSignature is how a function is written.
func functionSignature(name string) Signature {
	x := Signature{Syntax: name + "(VALUE)", Summary: capitalised(lang.Functions[name]) + "."}
	param := func(start int, words string) {
		x.Params = append(x.Params, Param{Span: lang.Span{Start: int32(start), End: int32(start + len("VALUE"))}, Words: words})
	}
	switch name {
	case "min", "max":
		x.Syntax = name + "(VALUE, OTHER, …)"
		param(len(name)+1, "the first value")
		param(len(name)+8, "another value of the same dimension")
		return x
	case "sqrt":
		param(len(name)+1, "a value that is not negative; its dimension is halved")
	case "abs":
		param(len(name)+1, "a value of any dimension")
	default:
		x.Syntax = name + "(ANGLE)"
		param(len(name)+1, "an angle: 30 deg, 0.5 rad; a pure number counts in radians")
	}
	return x
}

func capitalised(s string) string {
	if s == "" {
		return ""
	}
	return strings.ToUpper(s[:1]) + s[1:]
}

// functionNames are the functions of the language in order.
func functionNames() []string {
	var out []string
	for f := range lang.Functions {
		out = append(out, f)
	}
	sort.Strings(out)
	return out
}
