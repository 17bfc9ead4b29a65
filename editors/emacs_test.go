package editors_test

import "strings"

// Emacs makes its patterns itself, from lists of words.

func emacsParts() []part {
	const mode = "emacs/kern-mode.el"
	list := func(name, what string, words []string) part {
		lines := []string{"(defconst kern-mode-" + name}
		quotedWords := make([]string, len(words))
		for i, w := range words {
			quotedWords[i] = `"` + w + `"`
		}
		lines = append(lines, wrapped(quotedWords, "    ")...)
		lines[1] = "  '(" + strings.TrimLeft(lines[1], " ")
		lines[len(lines)-1] += ")"
		return part{mode, name, append(lines, `  "`+what+`")`)}
	}
	return []part{
		list("declarations", "Words that begin a declaration.", declarations()),
		list("statements", "Words that begin a line in a block.", statements()),
		list("properties", "Words before an equals sign in the block of a material or shape.", properties()),
		list("shapes", "Words for cross-sections.", shapes()),
		list("particles", "Words inside statements.", particles()),
		list("functions", "Functions in expressions.", functions()),
		list("constants", "Constants in expressions.", constants()),
		list("units", "Symbols of units, longer ones first.", units()),
	}
}
