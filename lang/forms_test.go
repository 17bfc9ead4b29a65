package lang

import (
	"os"
	"strings"
	"testing"
)

// TestFormsAreDocumented: every statement stands in the reference, and every
// word that begins a declaration or a statement has a form.
func TestFormsAreDocumented(t *testing.T) {
	page, err := os.ReadFile("README.md")
	if err != nil {
		t.Fatal(err)
	}
	for _, f := range Forms {
		if !strings.Contains(string(page), f.Word) {
			t.Errorf("the reference does not mention %q (%s)", f.Word, f.In)
		}
		if len(f.Syntax) == 0 || f.Summary == "" || f.Snippet == "" {
			t.Errorf("the form %q (%s) lacks its words", f.Word, f.In)
		}
		for _, s := range f.Syntax {
			if !strings.HasPrefix(s, f.Word) {
				t.Errorf("the form %q (%s) is written %q", f.Word, f.In, s)
			}
		}
	}
	for word := range joinWords {
		if Words[word] == "" && !formed(word) && word != "by" && word != "with" && word != "stiffness" {
			t.Errorf("the word %q is not explained", word)
		}
	}
}

func formed(word string) bool {
	for _, f := range Forms {
		if f.Word == word {
			return true
		}
	}
	return false
}
