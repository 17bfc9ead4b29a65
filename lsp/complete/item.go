package complete

import (
	"fmt"
	"slices"
	"sort"
	"strings"

	"kern/checker"
	"kern/lang"
)

// Item is something that could be written at a place.
type Item struct {
	Label  string
	Detail string
	Kind   Kind
	Text   string // what is written, when it is not the label
	// Snippet is the same with places to fill in, as editors know them; "" for
	// none.
	Snippet string
	Filter  string // what the editor compares with what is typed, when it is not the label
	Group   int    // the likeliest come first
	// Eager items are shown without being asked for, when a blank or a sign was
	// typed.
	Eager bool
	// Closed is set for the words of a set that nothing else can come from: a
	// semicolon takes the one that is chosen.
	Closed bool
	About  About // what its documentation is about
}

// Kind is what an Item is, for the editor's icon.
type Kind uint8

const (
	StatementItem Kind = iota
	WordItem
	SignItem
	SectionItem
	FamilyItem
	MaterialItem
	CaseItem
	LevelItem
	MemberItem
	ValueItem
	FunctionItem
	ConstantItem
	UnitItem
	ResultItem
	RuleItem
	TextItem
	FileItem
)

// about names what a documentation is about.
type About struct {
	Of   string `json:"of"`            // form, section, grade, name, symbol, rule, function, unit
	Name string `json:"name"`          // of it
	In   string `json:"in,omitempty"`  // the context of a form, the standard of a symbol
	URI  string `json:"uri,omitempty"` // the document, where the name has its meaning in it
}

// List is what can be written at a place.
type List struct {
	Items []Item
	// More is set when there would be more: the editor asks again as typing goes
	// on.
	More bool
	// Word is what was typed and Whole what stands there, beyond the place too;
	// one of them is replaced. Spans of the file.
	Word, Whole lang.Span
}

// maxItems bounds a list; nobody reads so many.
const maxItems = 200

// Asking is how the editor came to ask.
type Asking uint8

const (
	ByUser     Asking = iota // by a key, or by typing on in a word
	ByBlank                  // a blank was typed
	BySign                   // a sign of which words can follow
	ByCatching               // a sign that is of use in one kind of place alone
)

// At gives what can be written at a place of a file.
func At(r *checker.Report, file string, offset int32, how Asking) List {
	s, ok := newScope(r, file, offset)
	if !ok {
		return List{}
	}
	out := List{Word: s.word, Whole: s.whole}
	if s.fresh {
		out.Word, out.Whole = lang.Span{Start: offset, End: offset}, lang.Span{Start: offset, End: offset}
	}
	switch {
	case s.in == "":
	case s.head == "" && !s.quoted:
		if how == ByUser {
			out.Items = s.statements()
		}
	default:
		for _, d := range s.due() {
			list, more := s.itemsOf(d)
			out.Items = append(out.Items, list...)
			out.More = out.More || more
		}
	}
	out.trim(s, how)
	return out
}

// trim keeps what the place has use for, the likeliest first.
func (o *List) trim(s *scope, how Asking) {
	o.Items = slices.DeleteFunc(o.Items, func(x Item) bool {
		switch how {
		case ByBlank, BySign:
			return !x.Eager
		case ByCatching:
			return x.Kind != FileItem && (x.Kind != UnitItem || s.typed() == "")
		}
		return false
	})
	sort.SliceStable(o.Items, func(i, j int) bool { return o.Items[i].Group < o.Items[j].Group })
	seen := map[string]bool{}
	o.Items = slices.DeleteFunc(o.Items, func(x Item) bool {
		twice := seen[x.Label]
		seen[x.Label] = true
		return twice
	})
	if len(o.Items) > maxItems {
		// the likeliest of those that can still be meant
		typed := strings.ToLower(s.typed())
		o.Items = slices.DeleteFunc(o.Items, func(x Item) bool { return !begins(x.key(), typed) })
		o.More = true
		o.Items = o.Items[:min(len(o.Items), maxItems)]
	}
	if s.last() == '=' && !s.quoted || s.fresh {
		for i := range o.Items {
			x := &o.Items[i]
			x.Text = " " + x.written()
			if x.Snippet != "" {
				x.Snippet = " " + x.Snippet
			}
		}
	}
}

// key is what the editor compares with what is typed.
func (x *Item) key() string {
	if x.Filter != "" {
		return x.Filter
	}
	return x.Label
}

// written is the text that the Item writes.
func (x *Item) written() string {
	if x.Text != "" {
		return x.Text
	}
	return x.Label
}

// begins tells whether the letters of a text stand in a word in their order, as
// editors compare; typed is in small letters.
func begins(word, typed string) bool {
	word = strings.ToLower(word)
	for _, r := range typed {
		i := strings.IndexRune(word, r)
		if i < 0 {
			return false
		}
		word = word[i+len(string(r)):]
	}
	return true
}

// itemsOf gives what fits a duty. more is set when there would be more.
func (s *scope) itemsOf(d duty) (list []Item, more bool) {
	switch d.kind {
	case wordElement:
		if !s.quoted {
			return s.words(d), false
		}
	case signElement:
		if !s.quoted {
			return signs(d.name), false
		}
	case blockElement:
		if !s.quoted && len(s.after) == 0 {
			return []Item{{Label: "{ … }", Kind: SignItem, Text: "{", Snippet: "{\n    $0\n}", Filter: "{", Detail: "what it is made of and what it carries", Group: 8}}, false
		}
	case textElement:
		return s.texts(d)
	case valueElement:
		if !s.quoted {
			return s.valuesFor(d)
		}
	}
	return nil, false
}

// signs are the signs that can stand at a place.
func signs(sign string) []Item {
	switch sign {
	case "=":
		return []Item{{Label: "=", Kind: SignItem, Detail: "gives it its value", Group: 8}}
	case "<=":
		return []Item{{Label: "<=", Kind: SignItem, Detail: "at most", Eager: true}}
	case ">=":
		return []Item{
			{Label: ">=", Kind: SignItem, Detail: "at least", Eager: true}, {Label: "<=", Kind: SignItem, Detail: "at most", Eager: true},
			{Label: ">", Kind: SignItem, Detail: "more than", Group: 1}, {Label: "<", Kind: SignItem, Detail: "less than", Group: 1}}
	}
	return nil
}

// words are the words of the language at a place.
func (s *scope) words(d duty) []Item {
	var out []Item
	words := d.words
	switch {
	case s.head == "made" && madeWords(s.shape()) != nil:
		words = madeWords(s.shape())
	}
	methods := true // of the standard, where one is named
	if s.head == "standard" {
		standard := checker.StandardNamed(s.text1())
		methods = standard != nil && standard.Methods() != nil
	}
	for _, w := range words {
		if w == "by" && !methods {
			continue
		}
		x := Item{Label: w, Kind: WordItem, Detail: lang.Words[w], Eager: true, Closed: !joining(w)}
		switch {
		case w == "because":
			x.Snippet = `because "$1"`
		case w == "floor":
			x.Group = 3
			if !s.pressed() {
				x.Group = 6
			}
		case s.head == "class":
			x.Detail = "class " + w + " of the cross-section"
		case strings.HasPrefix(s.head, "curve"):
			x.Detail = "buckling curve " + w
		case s.head == "load" && joining(w), s.head == "column":
			x.Group = 1
		}
		out = append(out, x)
	}
	return out
}

// counted writes a count with its noun.
func counted(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return fmt.Sprintf("%d %ss", n, noun)
}
