package lsp

import (
	"slices"

	"kern/lang"

	"go.lsp.dev/protocol"
)

// tokenKind is what a word or sign is.
type tokenKind uint8

const (
	noToken          tokenKind = iota
	keywordToken               // a word that begins a statement, or joins its parts
	choiceToken                // a word that is one of several: pinned, major, cold
	propertyToken              // a word that a value is assigned to in a block, or what a member has of its own
	memberToken                // the name of a member
	sectionToken               // a section, of the calculation or the catalogue
	materialToken              // a material, or a steel grade
	caseToken                  // a load case
	quantityToken              // a named value, a level, a constant, a result
	combinationToken           // a combination
	functionToken
	numberToken
	unitToken
	stringToken
	commentToken
	operatorToken
	tokenKinds
)

// lexicalKind is what a token is that nothing more is known of.
var lexicalKind = [...]tokenKind{lang.Comment: commentToken, lang.Number: numberToken, lang.Unit: unitToken, lang.String: stringToken,
	lang.Equals: operatorToken, lang.Operator: operatorToken}

// tokenNames are the protocol's names for the kinds, the best first: a client
// that does not know it gets the next. The protocol has none for a unit, which
// stands under its own name: clients that have no colour for it leave it as
// their grammar has it.
var tokenNames = [tokenKinds][]protocol.SemanticTokenTypes{
	keywordToken:     {protocol.SemanticTokenTypesKeyword},
	choiceToken:      {protocol.SemanticTokenTypesEnumMember, protocol.SemanticTokenTypesKeyword},
	propertyToken:    {protocol.SemanticTokenTypesProperty, protocol.SemanticTokenTypesKeyword},
	memberToken:      {protocol.SemanticTokenTypesStruct, protocol.SemanticTokenTypesClass},
	sectionToken:     {protocol.SemanticTokenTypesClass, protocol.SemanticTokenTypesType},
	materialToken:    {protocol.SemanticTokenTypesType, protocol.SemanticTokenTypesClass},
	caseToken:        {protocol.SemanticTokenTypesParameter, protocol.SemanticTokenTypesVariable},
	quantityToken:    {protocol.SemanticTokenTypesVariable},
	combinationToken: {protocol.SemanticTokenTypesVariable},
	functionToken:    {protocol.SemanticTokenTypesFunction},
	numberToken:      {protocol.SemanticTokenTypesNumber},
	unitToken:        {unitType},
	stringToken:      {protocol.SemanticTokenTypesString},
	commentToken:     {protocol.SemanticTokenTypesComment},
	operatorToken:    {protocol.SemanticTokenTypesOperator},
}

const unitType protocol.SemanticTokenTypes = "unit"

// The modifiers of a token.
const (
	declares uint8 = 1 << iota // the name is given here
	fixed                      // it does not change
	builtIn                    // it comes with the language, the standard or the catalogue
)

var modifierNames = []protocol.SemanticTokenModifiers{protocol.SemanticTokenModifiersDeclaration, protocol.SemanticTokenModifiersReadonly,
	protocol.SemanticTokenModifiersDefaultLibrary}

// tokenWays is how tokens are told to a client.
type tokenWays struct {
	types, modifiers []string // the legend
	number           [tokenKinds]int
	shift            []int // the bit of each modifier in the legend, -1 for none

	full, delta, ranges bool
	// augments is set for a client that has a grammar of its own: comments,
	// numbers, texts and signs are left to it.
	augments bool
}

// newTokenWays reads what the client can do; nil when it takes no tokens.
func newTokenWays(c protocol.SemanticTokensClientCapabilities) *tokenWays {
	if !slices.Contains(c.Formats, protocol.TokenFormatRelative) {
		return nil
	}
	w := &tokenWays{augments: is(c.AugmentsSyntaxTokens)}
	switch r := c.Requests.Full.(type) {
	case protocol.Boolean:
		w.full = bool(r)
	case *protocol.ClientSemanticTokensRequestFullDelta:
		w.full, w.delta = true, is(r.Delta)
	}
	switch r := c.Requests.Range.(type) {
	case protocol.Boolean:
		w.ranges = bool(r)
	case *protocol.SemanticTokensOptionsRange:
		w.ranges = true
	}
	if !w.full && !w.ranges {
		return nil
	}
	for kind, names := range tokenNames {
		w.number[kind] = -1
		for _, name := range names {
			if name != unitType && !slices.Contains(c.TokenTypes, string(name)) {
				continue
			}
			if w.number[kind] = slices.Index(w.types, string(name)); w.number[kind] < 0 {
				w.number[kind] = len(w.types)
				w.types = append(w.types, string(name))
			}
			break
		}
	}
	w.modifiers = []string{}
	for _, name := range modifierNames {
		bit := -1
		if slices.Contains(c.TokenModifiers, string(name)) {
			bit = len(w.modifiers)
			w.modifiers = append(w.modifiers, string(name))
		}
		w.shift = append(w.shift, bit)
	}
	return w
}

// plain tells whether a kind is left to the client's own grammar.
func (w *tokenWays) plain(k tokenKind) bool {
	return w.augments && (k == commentToken || k == numberToken || k == stringToken || k == operatorToken)
}

// bits writes modifiers by the legend.
func (w *tokenWays) bits(modifiers uint8) uint32 {
	out := uint32(0)
	for i, shift := range w.shift {
		if modifiers&(1<<i) != 0 && shift >= 0 {
			out |= 1 << shift
		}
	}
	return out
}
