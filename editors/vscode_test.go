package editors_test

import (
	"bytes"
	"encoding/json"
	"fmt"
)

// The patterns of the TextMate grammar, in Oniguruma's dialect.

const (
	// tmName is a name of the language.
	tmName = `[\p{L}_][\p{L}\p{N}_]*`
	// tmStart is where a statement can begin: at the start of a line, or behind
	// a semicolon or an opening brace.
	tmStart = `(?:^|(?<=[;{]))\s*`
	// tmExponent is the exponent of a unit.
	tmExponent = `(?:\^?[0-9]|[⁰¹²³⁴⁵⁶⁷⁸⁹])?`
	// tmNumber is a number.
	tmNumber = `(?<![\p{L}\p{N}_.])((?:[0-9][0-9_]*(?:\.[0-9][0-9_]*)?|\.[0-9]+)(?:[eE][+-]?[0-9]+(?![\p{L}\p{N}_]))?)`
)

func tmUnit() string {
	atom := fmt.Sprintf(`(?:%s)%s`, alternation(units()), tmExponent)
	return fmt.Sprintf(`%s(?:[*/·]%s)*(?![\p{L}\p{N}_])`, atom, atom)
}

func vscodeParts() []part {
	const grammar = "vscode/syntaxes/kern.tmLanguage.json"
	match := func(name, pattern string) part {
		return part{grammar, name, []string{`"match": ` + quoted(pattern) + `,`}}
	}
	return []part{
		match("declarations", fmt.Sprintf(`^\s*(%s)\b(?!\s*=)(?:[ \t]+(%s(?:[ \t]*,[ \t]*%s)*))?`, alternation(declarations()), tmName, tmName)),
		match("statements", fmt.Sprintf(tmStart+`(%s)\b`, alternation(statements()))),
		match("properties", fmt.Sprintf(tmStart+`(%s)\b(?=\s*=)`, alternation(sorted(append(properties(), statements()...))))),
		match("shapes", fmt.Sprintf(`(?<![\p{L}\p{N}_])(?:%s)\b`, alternation(shapes()))),
		match("particles", fmt.Sprintf(`(?<![\p{L}\p{N}_])(?:%s)\b`, alternation(particles()))),
		match("functions", fmt.Sprintf(`(?<![\p{L}\p{N}_])(?:%s)(?=\s*\()`, alternation(functions()))),
		match("constants", fmt.Sprintf(`(?<![\p{L}\p{N}_])(?:%s)(?![\p{L}\p{N}_])`, alternation(constants()))),
		match("quantities", tmNumber+`(?:[ \t]?(`+tmUnit()+`))?`),
		match("units", `(?<![\p{L}\p{N}_])`+tmUnit()),
	}
}

// quoted writes a text as JSON without escaping < and >.
func quoted(text string) string {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	if err := e.Encode(text); err != nil {
		panic(err) // a string can always be written
	}
	return string(bytes.TrimSpace(b.Bytes()))
}
