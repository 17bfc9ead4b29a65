package lsp

import (
	"strings"
	"unicode"
)

// fuzzy tells how well a text answers a query: the query's letters must stand in
// the text in order, capitals or not. The whole text is best, then its
// beginning, then the beginnings of its words and letters side by side. It is 0
// for a text that does not answer; an empty query is answered by any.
func fuzzy(query, text string) int {
	letters := []rune(text)
	var want []rune
	for _, r := range query {
		if !unicode.IsSpace(r) {
			want = append(want, unicode.ToLower(r))
		}
	}
	best := 0
	for start, r := range letters {
		// the first letter may stand in several places
		if len(want) == 0 || unicode.ToLower(r) == want[0] {
			best = max(best, aligned(want, letters, start))
		}
	}
	if best > 0 && strings.EqualFold(query, text) {
		best += 100
	}
	return best
}

// aligned is the score of a query whose letters are looked for from a place on.
func aligned(want, letters []rune, start int) int {
	score, found, beside := 1, 0, false
	for at := start; at < len(letters) && found < len(want); at++ {
		r := letters[at]
		if unicode.ToLower(r) != want[found] {
			beside = false
			continue
		}
		score++
		if at == found {
			score += 4
		}
		if beside {
			score += 4
		}
		if at == 0 || beginsWord(letters[at-1], r) {
			score += 3
		}
		found, beside = found+1, true
	}
	if found < len(want) {
		return 0
	}
	return score
}

// beginsWord tells whether a letter begins a word behind another.
func beginsWord(before, r rune) bool {
	if !unicode.IsLetter(before) && !unicode.IsDigit(before) {
		return true
	}
	return unicode.IsUpper(r) && unicode.IsLower(before) || unicode.IsDigit(r) != unicode.IsDigit(before)
}
