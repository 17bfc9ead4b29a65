package rule

import (
	"strings"
	"testing"
)

const sound = "---\nseverity: error\ntopic: text\nsummary: S.\nfix: none\n---\n"

// TestParseRefuses wants a page with a slip in it refused, not half read.
func TestParseRefuses(t *testing.T) {
	for _, c := range []struct{ text, why string }{
		{"no front matter", "front matter"},
		{strings.Replace(sound, "severity: error", "severity: bad", 1), "severity"},
		{strings.Replace(sound, "topic: text", "topic: weather", 1), "topic"},
		{strings.Replace(sound, "fix: none", "fix: maybe", 1), "fix"},
		{strings.Replace(sound, "fix: none", "fix: none\nfix: safe", 1), "twice"},
		{strings.Replace(sound, "fix: none", "colour: red", 1), "colour"},
		{strings.Replace(sound, "summary: S.\n", "", 1), "summary"},
		{strings.Replace(sound, "topic: text", "topic: check", 1), "outcome"},
		{strings.Replace(sound, "fix: none", "fix: none\noutcome: fails", 1), "outcome"},
		{sound + "```kern bad\nx = 1", "not closed"},
		{sound + "```kern ugly\nx = 1\n```\n", "neither"},
		{sound + "```kern file=a.kern\nx = 1\n```\n", "neither"},
		{sound + "```kern bad repeat=0\nx = 1\n```\n", "repeat"},
		{sound + "```kern bad repeat=2\nx = ⟨1\n```\n", "not closed"},
		{sound + "```kern bad loud\nx = 1\n```\n", "flag"},
	} {
		if _, err := parse("name", c.text); err == nil || !strings.Contains(err.Error(), c.why) {
			t.Errorf("%q: error %v, want one about %q", c.text, err, c.why)
		}
	}
}

// TestParseExamples reads every form that an example can have.
func TestParseExamples(t *testing.T) {
	r, err := parse("name", sound+"\nWords.\n```kern bad bytes\nx = ␀1\n```\n```kern file=a.kern\ny = 2\n```\n```equation\na = b\n```\n```kern good repeat=3\n⟨(⟩1⟨)⟩\n```\n")
	if err != nil {
		t.Fatal(err)
	}
	if !strings.HasPrefix(r.Page, "Words.\n") {
		t.Errorf("page %q", r.Page)
	}
	if len(r.Examples) != 2 || r.Examples[0].Text != "x = \x001\n" || r.Examples[0].Files["a.kern"] != "y = 2\n" || r.Examples[1].Text != "(((1)))\n" {
		t.Errorf("examples %+v", r.Examples)
	}
}
