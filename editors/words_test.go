package editors_test

import (
	"maps"
	"regexp"
	"slices"
	"strings"
	"testing"

	"kern/checker/section"
	"kern/lang"
	"kern/lang/unit"
)

// Lists of words by the part that they play; each is sorted, each word once.

// declarations are the words that begin a declaration.
func declarations() []string { return formWords(lang.InFile) }

// statements are the words that begin a line in the block of the project, the basis
// or a member.
func statements() []string { return formWords(lang.InProject, lang.InBasis, lang.InMember) }

// properties are the words before "=" in the block of a material or a shape.
func properties() []string { return formWords(lang.InMaterial, lang.InSection) }

// shapes are the words for cross-sections that can be written.
func shapes() []string {
	var out []string
	for k := section.Kind(1); k.String() != section.Unknown.String(); k++ {
		if lang.Words[k.String()] != "" {
			out = append(out, k.String())
		}
	}
	return sorted(out)
}

// particles are the words inside statements, but for the shapes.
func particles() []string {
	shape := shapes()
	var out []string
	for w := range lang.Words {
		if !slices.Contains(shape, w) {
			out = append(out, w)
		}
	}
	return sorted(out)
}

func functions() []string { return sorted(slices.Collect(maps.Keys(lang.Functions))) }
func constants() []string { return sorted(slices.Collect(maps.Keys(lang.Constants))) }

// units are the symbols of units, longer ones first, so that in an alternation
// "mm" comes before "m".
func units() []string {
	var out []string
	for _, a := range unit.Atoms() {
		out = append(out, a.Symbol)
	}
	slices.SortStableFunc(out, func(a, b string) int { return len(b) - len(a) })
	return out
}

func formWords(contexts ...lang.Context) []string {
	var out []string
	for _, c := range contexts {
		for _, f := range lang.FormsIn(c) {
			out = append(out, f.Word)
		}
	}
	return sorted(out)
}

func sorted(words []string) []string {
	slices.Sort(words)
	return slices.Compact(words)
}

// alternation joins words for a regular expression. Words of the language have
// no character with a meaning in any of the dialects that are written here; the
// test below holds that true.
func alternation(words []string) string { return strings.Join(words, "|") }

// wrapped lays words out in lines of at most 100 characters, each behind a
// prefix.
func wrapped(words []string, prefix string) []string {
	var out []string
	line := prefix
	for _, w := range words {
		if len(line)+1+len(w) > 100 {
			out = append(out, line)
			line = prefix
		}
		if line != "" && !strings.HasSuffix(line, " ") {
			line += " "
		}
		line += w
	}
	return append(out, line)
}

func TestWordsAreFitForPatterns(t *testing.T) {
	plain := regexp.MustCompile(`^[\p{L}\p{N}_%‰°-]+$`)
	lists := map[string][]string{"declarations": declarations(), "statements": statements(), "properties": properties(), "shapes": shapes(),
		"particles": particles(), "functions": functions(), "constants": constants(), "units": units()}
	for name, words := range lists {
		if len(words) < 2 {
			t.Errorf("there are no %s", name)
		}
		for _, w := range words {
			if !plain.MatchString(w) {
				t.Errorf("%s: %q has a character with a meaning in patterns", name, w)
			}
		}
	}
	for _, u := range units() {
		if lang.Joins(u) {
			t.Errorf("the unit %q is a word of the language too", u)
		}
	}
}
