package unit

import (
	"slices"
	"strings"
)

// suggestion is a unit that may have been meant.
type suggestion struct {
	symbol string
	dim    Dim
	cost   int // how far it is from what was written
	rank   int // how usual it is, 0 the most
}

// pool holds what is suggested for a whole text: the usual units and every
// atom.
var pool = makePool()

func makePool() []suggestion {
	var list []suggestion
	add := func(symbol string, dim Dim) {
		if !slices.ContainsFunc(list, func(s suggestion) bool { return s.symbol == symbol }) {
			list = append(list, suggestion{symbol: symbol, dim: dim, rank: len(list)})
		}
	}
	for _, row := range usualTexts {
		for _, u := range usual[row.dim] {
			add(u.Symbol, u.Dim)
		}
	}
	for _, symbol := range atomOrder {
		if k := atoms[symbol]; !k.alias {
			add(symbol, k.Dim)
		}
	}
	return list
}

// Nearest returns at most n units that may have been meant by a text that is
// not a unit, or that is one of another dimension: the same letters in another
// case first, then other names ("feet", "lbs"), then a few letters' difference.
// Those of the dimension dim stand first, unless anyDim says that the dimension
// is not known. A text that is a unit of another dimension gets only units of
// dim. Where no unit of another dimension is near, the usual units of dim
// follow, so that there is always a suggestion when the dimension is known.
func Nearest(text string, dim Dim, anyDim bool, n int) []string {
	if n <= 0 {
		return nil
	}
	best := map[string]suggestion{}
	if len(text) <= maxText {
		found := near(text)
		_, err := Parse(text)
		if err == nil {
			found = append(found, misplaced(text)...)
		}
		for _, s := range found {
			if err == nil && !anyDim && s.dim != dim {
				continue
			}
			if old, ok := best[s.symbol]; s.symbol != text && (!ok || s.cost < old.cost) {
				best[s.symbol] = s
			}
		}
	}
	list := make([]suggestion, 0, len(best))
	others := false
	for _, s := range best {
		list = append(list, s)
		others = others || s.dim != dim
	}
	slices.SortFunc(list, func(a, b suggestion) int {
		if aFits, bFits := a.dim == dim, b.dim == dim; !anyDim && aFits != bFits {
			if aFits {
				return -1
			}
			return 1
		}
		if a.cost != b.cost {
			return a.cost - b.cost
		}
		if a.rank != b.rank {
			return a.rank - b.rank
		}
		return strings.Compare(a.symbol, b.symbol)
	})
	if !anyDim && !others {
		for _, u := range For(dim) {
			if _, ok := best[u.Symbol]; !ok && u.Symbol != text {
				list = append(list, suggestion{symbol: u.Symbol})
			}
		}
	}
	symbols := make([]string, 0, min(n, len(list)))
	for _, s := range list[:min(n, len(list))] {
		symbols = append(symbols, s.symbol)
	}
	return symbols
}

// near returns the units near a text, some of them perhaps twice.
func near(text string) []suggestion {
	var list []suggestion
	key := plainForm(text)
	for i, symbol := range words[strings.ToLower(key)] {
		if u, err := Parse(symbol); err == nil {
			list = append(list, suggestion{symbol, u.Dim, wordCost, i})
		}
	}
	for _, s := range pool {
		if cost, ok := distance(key, plainForm(s.symbol)); ok {
			s.cost = cost
			list = append(list, s)
		}
	}
	return append(list, repaired(text)...)
}

// plainForm writes a unit text in the plainest of its forms: digits for raised
// digits, no caret, a star for a dot and no spaces.
func plainForm(text string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r == '^' || r == ' ' || r == '\t' || r == '\u00a0':
			return -1
		case r == '·' || r == '⋅' || r == '×':
			return '*'
		case raisedDigit(r) >= 0:
			return '0' + rune(raisedDigit(r))
		}
		return r
	}, text)
}

// repaired returns the text with its unknown atoms replaced by the nearest
// ones, for every choice among them that makes a unit: "KN/m2" as "kN/m2".
func repaired(text string) []suggestion {
	const choices, most = 3, 27
	drafts := []suggestion{{}}
	for at, count := 0, 0; at < len(text); count++ {
		end, operator := factorEnd(text, at)
		atom, rest := splitExponent(text[at:end])
		rest += text[end : end+operator]
		options := []suggestion{{symbol: atom}}
		if !Known(atom) && !(atom == "" && count == 0) { // "1/" stands as it is
			options = nearAtoms(atom, choices)
		}
		var next []suggestion
		for _, d := range drafts {
			for _, o := range options {
				next = append(next, suggestion{
					symbol: d.symbol + o.symbol + rest, cost: d.cost + o.cost, rank: d.rank + o.rank,
				})
			}
		}
		if len(next) == 0 || len(next) > most || count >= maxFactors {
			return nil
		}
		drafts, at = next, end+operator
	}
	list := drafts[:0]
	for _, d := range drafts {
		if u, err := Parse(d.symbol); err == nil {
			d.dim = u.Dim
			list = append(list, d)
		}
	}
	return list
}

// nearAtoms returns the few atoms nearest to one that is not known.
func nearAtoms(atom string, most int) []suggestion {
	var list []suggestion
	for i, symbol := range words[strings.ToLower(atom)] {
		list = append(list, suggestion{symbol: symbol, cost: wordCost, rank: i})
	}
	for _, s := range pool {
		if !Known(s.symbol) {
			continue
		}
		if cost, ok := distance(atom, s.symbol); ok {
			list = append(list, suggestion{symbol: s.symbol, cost: cost, rank: s.rank})
		}
	}
	slices.SortStableFunc(list, func(a, b suggestion) int { return a.cost - b.cost })
	return list[:min(most, len(list))]
}
