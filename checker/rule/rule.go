// Package rule holds the rules of the language and of the checks: each is a
// page of its own under pages/, with its severity, what it means and examples
// that a test runs. The reference, `kern rules` and the editors' links are made
// from these pages.
package rule

import (
	"sort"
	"strings"
	"sync"

	"kern/lang"

	"github.com/agnivade/levenshtein"
)

// Rule is one rule with its reference page. It is shared by all who ask for it
// and must not be changed.
type Rule struct {
	// Name is in kebab case; it is the page's file name.
	Name string
	// Severity is that of a diagnostic of the rule which does not set its own.
	Severity lang.Severity
	// Topic groups the rules: units, text, names, values, sections, loads,
	// calculation or check.
	Topic string
	// Summary says in one sentence what is wrong, or what a check asks.
	Summary string
	// Page is the reference page in Markdown, without its front matter.
	Page string
	// Check is set for the checks of the standards and of requirements, which
	// judge a member rather than the text.
	Check bool
	// Fix is what the rule's diagnostics offer in the page's first bad example:
	// none, safe (a change that no other meaning is lost by) or offer.
	Fix string
	// Also are rules that the page's examples meet besides the rule itself.
	Also []string
	// Outcome is what the check comes to in the page's bad examples: fails;
	// undecided where the program leaves the check to a person; none where no
	// standard of the program makes it. It is "" for rules that are no checks.
	Outcome string
	// Examples are the page's examples, in its order.
	Examples []Example
}

// Example is a small calculation on a page.
type Example struct {
	// Kind is bad for an example that breaks the rule and good for one that keeps
	// it.
	Kind string
	// Text is the calculation, written out in full.
	Text string
	// Files are the other files that the calculation includes, by name; nil for
	// none.
	Files map[string]string
}

// topics are the groups that a page may name.
var topics = []string{"units", "text", "names", "values", "sections", "loads", "calculation", "check"}

// book is all pages, read once: pages are part of the program, so a page that
// cannot be read is a defect of the program and panics.
var book = sync.OnceValue(func() *index {
	b := &index{of: map[string]*Rule{}}
	entries, err := pages.ReadDir("pages")
	if err != nil {
		panic("rule: " + err.Error())
	}
	for _, e := range entries {
		text, err := pages.ReadFile("pages/" + e.Name())
		if err != nil {
			panic("rule: " + err.Error())
		}
		r, err := parse(strings.TrimSuffix(e.Name(), ".md"), string(text))
		if err != nil {
			panic("rule: pages/" + e.Name() + ": " + err.Error())
		}
		b.all = append(b.all, r)
		b.of[r.Name] = r
	}
	sort.Slice(b.all, func(i, j int) bool { return b.all[i].Name < b.all[j].Name })
	return b
})

type index struct {
	all []*Rule
	of  map[string]*Rule
}

// All gives every rule by name.
func All() []*Rule { return append([]*Rule(nil), book().all...) }

// Find gives the rule of a name, nil when there is none.
func Find(name string) *Rule { return book().of[name] }

// SeverityOf gives the severity of a rule; an unknown rule is an error.
func SeverityOf(name string) lang.Severity {
	if r := Find(name); r != nil {
		return r.Severity
	}
	return lang.Error
}

// Nearest gives up to n rules that a person may have meant by a name, the
// likeliest first: the rule itself when only capitals or hyphens differ, those
// that it is part of, then those that differ in the fewest letters, at most in
// half of them.
func Nearest(name string, n int) []string {
	const longest = 64 // no rule has a name near as long
	name = strings.ToLower(strings.NewReplacer("_", "-", " ", "-").Replace(strings.TrimSpace(name)))
	if name == "" || len(name) > longest {
		return nil
	}
	type candidate struct {
		name     string
		distance int
	}
	var found []candidate
	for _, r := range book().all {
		d := levenshtein.ComputeDistance(name, r.Name)
		switch {
		case d > 0 && len(name) >= 3 && strings.Contains(r.Name, name):
			d = 1 // "buckling" means one of the rules that have it in their name
		case 2*d > max(len(name), len(r.Name)):
			continue
		}
		found = append(found, candidate{r.Name, d})
	}
	sort.SliceStable(found, func(i, j int) bool { return found[i].distance < found[j].distance })
	var out []string
	for i := 0; i < len(found) && i < n; i++ {
		out = append(out, found[i].name)
	}
	return out
}
