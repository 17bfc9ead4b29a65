package checker

import (
	"fmt"
	"os"
	"regexp"
	"strings"
	"testing"

	"kern/lang"
)

// TestReferenceExamples checks every example of the language reference: it must
// be read without an error. Blocks marked "kern column" are the inside of a
// column.
func TestReferenceExamples(t *testing.T) {
	page, err := os.ReadFile("../lang/README.md")
	if err != nil {
		t.Fatal(err)
	}
	blocks := regexp.MustCompile("(?ms)^```kern( column| include| forces)?\n(.*?)^```$").FindAllStringSubmatch(string(page), -1)
	if len(blocks) < 23 {
		t.Fatalf("only %d examples found", len(blocks))
	}
	table := regexp.MustCompile("(?ms)^```csv\n(.*?)^```$").FindSubmatch(page)
	if table == nil {
		t.Fatal("no table of forces found")
	}
	for i, b := range blocks {
		text := b[2]
		if b[1] == " forces" {
			text += "column A1 { section = \"HEB 160\"; material = \"S355\"; height = 4 m }\n"
		}
		if b[1] == " column" {
			fill := ""
			for word, line := range map[string]string{"section": "section = \"HEB 160\"", "material": "material = \"S355\"", "height": "height = 3 m", "load": "load 20 kN"} {
				if !regexp.MustCompile(`(?m)^` + word + `\b`).MatchString(text) {
					fill += line + "\n"
				}
			}
			text = "column X1 {\n" + fill + text + "}\n"
		}
		if !strings.Contains(text, "basis {") {
			text = "basis {\n    standard \"elastic\"\n}\n" + text
		}
		t.Run(fmt.Sprint(i+1), func(t *testing.T) {
			files := map[string]string{"example.kern": text, "common.kern": "eaves = 3 m\n"}
			if b[1] == " forces" {
				files["frame.csv"] = string(table[1])
			}
			report := Check(load(files), nil)
			if b[1] == " forces" && (len(report.Members) != 1 || report.Members[0].Member.Imported == nil) {
				t.Error("the member has no forces from the table")
			}
			for _, d := range report.Diagnostics {
				if d.Severity == lang.Error && !strings.HasPrefix(d.Rule, "elastic-buckling") && d.Rule != "first-yield" {
					t.Errorf("%s: %s\n%s", d.Rule, d.Message, text)
				}
			}
		})
	}
}
