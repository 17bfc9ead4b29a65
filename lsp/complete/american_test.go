package complete

import (
	"slices"
	"strings"
	"testing"

	"kern/checker/catalogue"
)

// A European calculation is offered European sections first, an American one
// American ones; where letters are shared (HP, L) the sizes follow suit.
func TestSectionsOfThePartOfTheWorld(t *testing.T) {
	european := "basis { standard \"EN 1993-1-1:2005\" }\n"
	american := "basis { standard \"ANSI/AISC 360-22\" by LRFD }\n"
	own := "basis { standard \"elastic\" }\nsection w = \"W14x90\"\n"
	for _, c := range []struct {
		basis, typed string
		first        []string // of the families
		american     bool     // the first section
	}{
		{european, "", []string{"HEA", "HEB", "HEM"}, false}, {american, "", []string{"W", "HSS", "Pipe"}, true}, {own, "", []string{"W", "HSS", "Pipe"}, true},
		{european, "H", []string{"HEA", "HEB"}, false}, {american, "H", []string{"HSS", "HP"}, true},
		{european, "L", nil, false}, {american, "L", nil, true}, {european, "HP", nil, false}, {american, "HP", nil, true},
		{european, "W14", nil, true}, {european, "square 8", nil, false}, {american, "square 8", nil, true},
	} {
		text := c.basis + "column A1 { section = \"" + c.typed
		offset := int32(len(text))
		l := At(reportOf(map[string]string{"a.kern": text + "\" }\n"}), "a.kern", offset, ByUser)
		var families []string
		section := ""
		for _, x := range l.Items {
			switch {
			case x.Kind == FamilyItem:
				families = append(families, x.Label)
			case x.Kind == SectionItem && section == "" && c.typed != "":
				section = x.Label
			}
		}
		if len(families) < len(c.first) || !slices.Equal(families[:len(c.first)], c.first) {
			t.Errorf("%q after %q: families %q, want %q first", c.typed, strings.TrimSpace(c.basis), families, c.first)
		}
		if section == "" {
			continue
		}
		if e, ok := catalogue.Find(section); !ok || e.American() != c.american {
			t.Errorf("%q after %q: %s first", c.typed, strings.TrimSpace(c.basis), section)
		}
		if len(l.Items) > maxItems {
			t.Errorf("%q: %d items", c.typed, len(l.Items))
		}
	}
}
