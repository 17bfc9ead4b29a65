package complete

import (
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"kern/checker"
	"kern/lang"
)

// kernBlocks are the examples of the reference.
var kernBlocks = regexp.MustCompile("(?s)```kern( column)?\n(.*?)```")

// written gives the calculations that people have written: the demo project and
// the examples of the reference.
func written(t testing.TB) []map[string]string {
	t.Helper()
	demo := map[string]string{}
	paths, err := filepath.Glob("../../testdata/boathouse/*.kern")
	if err != nil || len(paths) < 5 {
		t.Fatal(paths, err)
	}
	for _, p := range paths {
		raw, err := os.ReadFile(p)
		if err != nil {
			t.Fatal(err)
		}
		demo[filepath.Base(p)] = string(raw)
	}
	out := []map[string]string{demo}
	raw, err := os.ReadFile("../../lang/README.md")
	if err != nil {
		t.Fatal(err)
	}
	for _, m := range kernBlocks.FindAllStringSubmatch(string(raw), -1) {
		text := m[2]
		if m[1] != "" {
			text = "column X {\n" + text + "}\n"
		}
		out = append(out, map[string]string{"example.kern": text})
	}
	if len(out) < 20 {
		t.Fatalf("%d calculations", len(out))
	}
	return out
}

// TestRecall asks at every word of what people have written for what stands
// there, with nothing of it typed and with its first letter typed: it is
// offered. Words that are new there (names given, titles, reasons, numbers) are
// nobody's to know.
func TestRecall(t *testing.T) {
	asked, missed := 0, 0
	for _, files := range written(t) {
		whole := reportOf(files)
		for name, text := range files {
			tokens := lang.Tokens(text)
			for i, tok := range tokens {
				word, start := tok.Span().Of(text), tok.Start
				switch tok.Kind {
				case lang.Name, lang.Unit:
				case lang.String:
					word, start = strings.Trim(word, `"`), start+1
				default:
					continue
				}
				if fresh(text, tokens, i) {
					continue
				}
				if dot := strings.IndexByte(word, '.'); dot >= 0 && tok.Kind == lang.Name {
					// the result of a member is offered behind the dot
					cut := text[:start] + word[:dot+1] + text[tok.End:]
					asked++
					if l := At(edited(whole, files, name, cut), name, start+int32(dot)+1, ByUser); !has(l, word, false) {
						missed++
						t.Errorf("%s: %s lacks %q; has %.120s", name, word[:dot+1], word, labels(l))
					}
					continue
				}
				word = strings.ReplaceAll(word, "²", "2")
				for _, typed := range []int{0, 1} {
					if typed > len(word) || typed == 0 && word == "basis" {
						continue // a brace at the beginning of a line belongs to the line before
					}
					end := tok.End
					if tok.Kind == lang.String {
						end--
					}
					cut := text[:start] + text[start:start+int32(typed)] + text[end:]
					r := edited(whole, files, name, cut)
					l := At(r, name, start+int32(typed), ByUser)
					asked++
					if got, ok := taken(cut, l, word); ok && strings.ReplaceAll(got, " ", "") != strings.ReplaceAll(text, " ", "") {
						t.Errorf("%s: %q was taken as %q", name, word, got[start:min(len(got), int(end)+20)])
					}
					if !has(l, word, tok.Kind == lang.String && typed < 2) {
						missed++
						line := cut[strings.LastIndex(cut[:start], "\n")+1 : start+int32(typed)]
						t.Errorf("%s: %s¦ lacks %q; has %.120s", name, line, word, labels(l))
					}
				}
			}
		}
	}
	if asked < 900 {
		t.Errorf("only %d words were asked for", asked)
	}
	t.Logf("%d of %d were offered", asked-missed, asked)
}

// edited is the report when one file has another text.
func edited(r *checker.Report, files map[string]string, name, text string) *checker.Report {
	var names []string
	for n := range files {
		names = append(names, n)
	}
	read := func(n string) (string, error) {
		if n == name {
			return text, nil
		}
		return files[n], nil
	}
	return checker.CheckAgain(r, lang.Load(names, read, r.Project), nil)
}

// taken is a text in which an item has been taken, as an editor without snippets
// does it, for items that write themselves.
func taken(text string, l List, word string) (string, bool) {
	for _, x := range l.Items {
		if x.Label == word && strings.Trim(x.written(), ` "`) == word && !strings.Contains(word, "2") {
			return text[:l.Whole.Start] + x.written() + text[l.Whole.End:], true
		}
	}
	return "", false
}

// has tells whether a list leads to a word; a designation may be reached by its
// family.
func has(l List, word string, family bool) bool {
	for _, x := range l.Items {
		switch {
		case x.Label == word, x.Label == "height / 2" && word == "height",
			family && x.Kind == FamilyItem && strings.HasPrefix(word, strings.Trim(x.written(), `"`)):
			return true
		case x.Kind == RuleItem && strings.HasPrefix(x.Label, word):
			return true
		}
	}
	return false
}

// fresh tells the words that somebody thinks up where they stand.
func fresh(text string, tokens []lang.Token, i int) bool {
	tok := tokens[i]
	word := tok.Span().Of(text)
	line := text[strings.LastIndex(text[:tok.Start], "\n")+1 : tok.Start]
	if at := strings.LastIndexAny(line, ";{"); at >= 0 {
		line = line[at+1:]
	}
	before := strings.Fields(line)
	if len(before) == 0 {
		inside := strings.Count(text[:tok.Start], "{") > strings.Count(text[:tok.Start], "}")
		return !inside && strings.HasPrefix(strings.TrimSpace(text[tok.End:]), "=")
	}
	last := before[len(before)-1]
	if last == "because" {
		return true
	}
	switch before[0] {
	case "column", "strut", "tie":
		return last != "as" && word != "as"
	case "material", "section", "case", "combination", "level":
		return len(before) == 1
	case "note":
		return true
	case "name", "number", "prepared", "checked", "revision", "date":
		return tok.Kind == lang.String
	}
	return false
}
