package editors_test

import (
	"fmt"
	"strings"
)

// Vim's patterns, in its "very magic" dialect.

func vimParts() []part {
	const syntax = "vim/syntax/kern.vim"
	words := func(list []string) string { return `<%(` + alternation(list) + `)>` }
	// % and ° are no word characters, so that > does not end a unit; < and = have a
	// meaning in this dialect, % as well.
	atom := `%(` + strings.ReplaceAll(alternation(units()), "%", `\%`) + `)%(\^?[0-9]|[⁰¹²³⁴⁵⁶⁷⁸⁹])?`
	unit := atom + `%([*/·]` + atom + `)*` + `%([[:alnum:]_])@!`
	line := func(format string, args ...any) string { return fmt.Sprintf(format, args...) }
	return []part{
		{syntax, "words", []string{
			line(`syn match kernParticle /\v%s/`, words(particles())),
			line(`syn match kernShape /\v%s/`, words(shapes())),
			line(`syn match kernFunction /\v%s\ze\s*\(/`, words(functions())),
			line(`syn match kernConstant /\v%s/`, words(constants())),
			line(`syn match kernProperty /\v%%(^|[;{])\s*\zs%s\ze\s*\=/`, words(properties())),
			line(`syn match kernStatement /\v%%(^|[;{])\s*\zs%s/ nextgroup=kernUnits skipwhite`, words(statements())),
			line(`syn match kernDeclaration /\v^\s*\zs%s%%(\s*\=)@!/ nextgroup=kernName skipwhite`, words(declarations())),
		}},
		{syntax, "units", []string{
			line(`syn match kernUnit contained /\v%s/`, strings.ReplaceAll(unit, "/", `\/`)),
		}},
	}
}
