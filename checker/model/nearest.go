package model

import (
	"sort"
	"strings"

	"github.com/agnivade/levenshtein"
)

// Closest gives up to n of the names that a person may have meant, the likeliest
// first: those that the text begins, as it may be half typed, then those that
// differ from it by a slip. A name that shares less than two thirds of its
// letters is not offered.
func Closest(text string, names []string, n int) []string {
	near, _ := nearest(text, names, n)
	return near
}

// nearest is Closest, and tells whether the first name is the only one that can
// have been meant: one letter away (two in a long word) where the next name is
// farther, and not half typed.
func nearest(text string, names []string, n int) (near []string, sure bool) {
	if len(text) > 64 || text == "" {
		return nil, false
	}
	type candidate struct {
		name     string
		half     bool // the text begins the name
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
		to := strings.ToLower(name)
		if far := len(name) - len(text); (far > 4 || far < -4) && !strings.HasPrefix(to, lower) {
			continue
		}
		d := distance(lower, to)
		half := len(text) >= 2 && d > 0 && strings.HasPrefix(to, lower)
		if half || d <= min(4, max(1, (max(len(text), len(name))+1)/3)) && d < max(len(text), len(name)) {
			found = append(found, candidate{name, half, d})
		}
	}
	sort.Slice(found, func(i, j int) bool {
		a, b := found[i], found[j]
		switch {
		case a.half != b.half:
			return a.half
		case a.distance != b.distance:
			return a.distance < b.distance
		}
		if p, q := common(lower, a.name), common(lower, b.name); p != q {
			return p > q
		}
		return a.name < b.name
	})
	if len(found) > 0 {
		first := found[0]
		sure = len(text) > 1 && !first.half && (first.distance <= 1 || first.distance == 2 && len(text) >= 8) &&
			(len(found) == 1 || found[1].distance > first.distance)
	}
	for i := 0; i < len(found) && i < n; i++ {
		near = append(near, found[i].name)
	}
	return near, sure
}

// common is how many letters two words begin with together.
func common(a, b string) int {
	n := 0
	for n < len(a) && n < len(b) && a[n] == b[n] {
		n++
	}
	return n
}

// distance is the number of letters to change, leave out or put in; two
// neighbours exchanged count as one.
func distance(a, b string) int {
	if len(a) == len(b) {
		for i := 0; i+1 < len(a); i++ {
			if a[i] != b[i] {
				if a[i] == b[i+1] && a[i+1] == b[i] && a[i+2:] == b[i+2:] {
					return 1
				}
				break
			}
		}
	}
	return levenshtein.ComputeDistance(a, b)
}
