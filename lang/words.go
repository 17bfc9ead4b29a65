package lang

// joinWords are the words that stand between the parts of a statement. After a
// number they are never taken for a unit.
var joinWords = map[string]bool{
	"at": true, "about": true, "across": true, "from": true, "to": true, "by": true, "per": true, "as": true,
	"annex": true, "eq": true, "because": true, "offset": true, "and": true, "with": true, "stiffness": true, "under": true,
	"major": true, "minor": true, "both": true, "twist": true, "top": true, "base": true,
}

// Joins tells whether a word stands between the parts of statements.
func Joins(word string) bool { return joinWords[word] }

// starters are the words that begin a declaration. At the start of a line they
// always do, even inside a bracket that was never closed: that is how a broken
// declaration breaks itself alone.
var starters = map[string]bool{
	"include": true, "basis": true, "material": true, "section": true, "case": true, "combination": true,
	"exclusive": true, "level": true, "column": true, "strut": true, "tie": true, "project": true, "forces": true,
}

// verbs are the words that begin a statement inside a block.
var verbs = map[string]bool{
	"section": true, "material": true, "height": true, "from": true, "base": true, "top": true, "hold": true,
	"effective": true, "joints": true, "connected": true, "connectors": true, "choose": true, "load": true, "limit": true, "require": true, "depart": true, "note": true, "selfweight": true,
	"standard": true, "actions": true, "show": true, "length": true, "lift": true, "moments": true, "reduce": true, "reduction": true, "slope": true, "net": true,
	"critical": true, "imperfection": true, "lateral": true, "interaction": true,
}

// blockAssigned are starters that are also properties inside a member's block:
// there they start a declaration only when the line goes on like one.
var blockAssigned = map[string]bool{"section": true, "material": true}
