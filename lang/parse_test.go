package lang

import (
	"fmt"
	"strings"
	"testing"
)

func rules(d *Decl) []string {
	var out []string
	for _, p := range d.Problems {
		out = append(out, p.Rule)
	}
	return out
}

// What is not closed breaks itself: the declarations around it read as they
// would without it.
func TestUnclosedBreaksItself(t *testing.T) {
	const before, after = "a = 1 m\n\ncolumn A {\n    load G 5 kN\n}\n\n", "column Z {\n    section = mast\n    load Q 5 kN\n}\n"
	for _, c := range []struct{ text, rule string }{
		{"column B {\n    load G 5 kN\n", "unclosed-block"},
		{"column B {\n    section = tube { width = 90 mm\n    load G 5 kN\n", "unclosed-block"},
		{"basis {\n", "unclosed-block"},
		{"column B {\n    load (5 kN\n}\n", "unclosed-bracket"},
		{"x = max(1, 2\n", "unclosed-bracket"},
		{"x = ((((\n", "missing-value"},
		{"note \"open\n", "unclosed-text"},
		{"column B {\n    note \"open }\n", "unclosed-text"},
		{"column B \"open {\n    load G 5 kN\n}\n", "unclosed-text"},
		{"x = “open\n", "stray-character"},
		{"}\n", "stray-brace"},
		{"}}}\n", "stray-brace"},
		{"column B {\n}}\n", "stray-brace"},
		{"column B\n", ""},
		{"column B,\n", ""},
		{"x = 1 +\n", "missing-value"},
		{"combination c = 1.1 G +\n", "missing-value"},
		{"{\n    load G 5 kN\n}\n", ""}, // belongs to what stands before it
	} {
		for _, end := range []string{"\n", "\r\n", "\r"} {
			text := strings.ReplaceAll(before+c.text+after, "\n", end)
			f := Parse(&FileID{}, text, nil)
			checkTree(t, f)
			first, last := f.Decls[0], f.Decls[len(f.Decls)-1]
			if got := reading(&File{Decls: []*Decl{first}}); !strings.HasPrefix(got, "\"a\" broken=false [9") || len(first.Problems) > 0 {
				t.Errorf("%q: the first declaration reads %s", text, got)
			}
			want := strings.ReplaceAll(after, "\n", end)
			if last.Text != want || len(last.Problems) > 0 || len(last.Stmts) != 1 || len(last.Stmts[0].Body.Stmts) != 2 {
				t.Errorf("%q: the last declaration is %q with %v", text, last.Text, last.Problems)
			}
			found := c.rule == ""
			for _, d := range f.Decls[1 : len(f.Decls)-1] {
				for _, r := range rules(d) {
					found = found || r == c.rule
				}
			}
			if !found {
				t.Errorf("%q: no %s", text, c.rule)
			}
		}
	}
}

// Inside a block too: the statements after a broken one keep their reading,
// unless a bracket reaches over to them and they do not begin like statements.
func TestBrokenStatementBreaksItself(t *testing.T) {
	for _, broken := range []string{"load G 2,5 kN", "load (5 kN", "note \"open", "x = max(1,", "load G 5 kN )", "§", "x = 1..2", "5 kN", "= 5", "hold both,"} {
		text := "column A {\n    height = 5 m\n    " + broken + "\n    load Q 5 kN at top\n    width = 90 mm\n}\n"
		d := Parse(&FileID{}, text, nil).Decls[0]
		body := d.Stmts[0].Body.Stmts
		if len(body) != 4 || body[0].Broken || body[2].Broken || body[3].Broken || len(body[2].Args) != 4 || len(body[3].Args) != 2 {
			t.Errorf("%q: %s", broken, reading(&File{Decls: []*Decl{d}}))
		}
	}
}

func TestBraceOnItsOwnLine(t *testing.T) {
	for _, text := range []string{"column A\n{\n    load G 5 kN\n}\n", "column A # c\n\n# d\n  {\n    load G 5 kN\n}\n", "column A\r{ load G 5 kN }\r"} {
		f := Parse(&FileID{}, text, nil)
		if len(f.Decls) != 1 || len(f.Decls[0].Problems) > 0 || len(f.Decls[0].Stmts) != 1 || len(f.Decls[0].Stmts[0].Body.Stmts) != 1 {
			t.Errorf("%q: %s", text, reading(f))
		}
	}
}

func TestUnreadableFiles(t *testing.T) {
	for _, text := range []string{"a = 1\x00", "\x00", strings.Repeat("a = 1\n", 1000) + "\x00"} {
		f := Parse(&FileID{}, text, nil)
		if f.Unreadable == "" || len(f.Decls) != 1 || len(f.Decls[0].Stmts) > 0 {
			t.Errorf("%.20q was read", text)
		}
		checkTree(t, f)
		if next := Parse(&FileID{}, "a = 1\n", f); next.Unreadable != "" || len(next.Decls[0].Stmts) != 1 {
			t.Errorf("after %.20q: %s", text, reading(next))
		}
	}
}

// Depth costs nothing but itself: 100,000 brackets, signs, powers and blocks end
// in a problem of the statement, and what follows is read.
func TestDeepNesting(t *testing.T) {
	const n = 100_000
	for name, text := range map[string]string{
		"brackets":          "x = " + strings.Repeat("(", n) + "1" + strings.Repeat(")", n),
		"open brackets":     "x = " + strings.Repeat("(", n),
		"closing brackets":  "x = 1" + strings.Repeat(")", n),
		"calls":             "x = " + strings.Repeat("max(1, ", n) + "1" + strings.Repeat(")", n),
		"signs":             "x = " + strings.Repeat("-", n) + "1",
		"powers":            "x = " + strings.Repeat("2^", n) + "1",
		"blocks":            strings.Repeat("a {", n) + strings.Repeat("}", n),
		"open blocks":       strings.Repeat("a {\n", n),
		"blocks in a block": "column B {\n" + strings.Repeat("a {\n", n) + strings.Repeat("}\n", n) + "}",
		"closing braces":    strings.Repeat("}", n),
		"short brackets":    "x = " + strings.Repeat("(", 9000) + "1" + strings.Repeat(")", 9000),
		"short powers":      "x = " + strings.Repeat("2^", 9000) + "1",
	} {
		f := Parse(&FileID{}, text+"\ncolumn A {\n    load G 5 kN\n}\n", nil)
		problems := 0
		for _, d := range f.Decls[:len(f.Decls)-1] {
			problems += len(d.Problems)
		}
		last := f.Decls[len(f.Decls)-1]
		if problems == 0 || len(last.Problems) > 0 || len(last.Stmts) != 1 || len(last.Stmts[0].Body.Stmts) != 1 {
			t.Errorf("%s: %d problems; the last declaration has %v", name, problems, last.Problems)
		}
		checkTree(t, f)
		if got := Format(f.Text); !strings.HasSuffix(got, "column A {\n    load G 5 kN\n}\n") {
			t.Errorf("%s: the formatter lost what follows", name)
		}
	}
	// what is allowed is read and computed: many terms are no depth
	text := "x = 1" + strings.Repeat(" + 1", 9000) + "\n"
	f := Parse(&FileID{}, text, nil)
	parts, _ := f.Decls[0].Stmts[0].Assigned()
	if q, p := Eval(parts[0], nil); p != nil || q.Value != 9001 {
		t.Errorf("9001 terms give %v, %v", q.Value, p)
	}
	deep := "x = " + strings.Repeat("(", maxDepth-1) + "1" + strings.Repeat(")", maxDepth-1) + "\n"
	if d := Parse(&FileID{}, deep, nil).Decls[0]; len(d.Problems) > 0 {
		t.Errorf("%d brackets: %v", maxDepth-1, rules(d))
	}
	nested := strings.Repeat("a { ", maxBlocks) + strings.Repeat("}", maxBlocks) + "\n"
	if d := Parse(&FileID{}, nested, nil).Decls[0]; len(d.Problems) > 0 {
		t.Errorf("%d blocks: %v", maxBlocks, rules(d))
	}
}

func TestStatementTooLong(t *testing.T) {
	for _, n := range []int{maxTokens - 1, maxTokens} {
		d := Parse(&FileID{}, "x"+strings.Repeat(" 1", n)+"\ny = 1\n", nil).Decls[0]
		if long := fmt.Sprint(rules(d)) == "[statement-too-long]"; long != (n >= maxTokens) || d.Stmts[0].Broken != long {
			t.Errorf("%d words: %v, broken %v", n+1, rules(d), d.Stmts[0].Broken)
		}
	}
}
