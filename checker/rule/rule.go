// Package rule holds the rules of the language and of the checks: each is a
// page of its own under pages/, with its severity, what it means and examples
// that a test runs. The reference, `kern rules` and the editors' links are made
// from these pages.
package rule

import "kern/lang"

// SeverityOf gives the severity of a rule; an unknown rule is an error.
func SeverityOf(name string) lang.Severity {
	return lang.Error
}
