package model

import (
	"sort"
	"strings"

	"github.com/agnivade/levenshtein"
)

// closest gives up to n of the names that a person may have meant, the likeliest
// first. A name that shares less than half of its letters is not offered.
func closest(text string, names []string, n int) []string {
	if len(text) > 64 {
		return nil
	}
	type candidate struct {
		name     string
		distance int
	}
	var found []candidate
	seen := map[string]bool{}
	lower := strings.ToLower(text)
	for _, name := range names {
		if seen[name] || len(name) > 64 || name == text {
			continue
		}
		seen[name] = true
		d := levenshtein.ComputeDistance(lower, strings.ToLower(name))
		if d <= max(len(text), len(name))/2 && d <= 4 {
			found = append(found, candidate{name, d})
		}
	}
	sort.Slice(found, func(i, j int) bool {
		if found[i].distance != found[j].distance {
			return found[i].distance < found[j].distance
		}
		return found[i].name < found[j].name
	})
	var out []string
	for i := 0; i < len(found) && i < n; i++ {
		out = append(out, found[i].name)
	}
	return out
}
