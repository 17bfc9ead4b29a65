package lsp

import (
	"slices"
	"strings"
	"testing"
	"time"

	"go.lsp.dev/protocol"
)

// TestProgress shows long work, and only long work, to a client that can see it.
func TestProgress(t *testing.T) {
	for _, can := range []bool{true, false} {
		s := start(t, t.TempDir())
		s.initialize(map[bool]string{true: `{}`, false: `{"window": null}`}[can], "", ".")
		p := s.server.newProgress("Checking")
		p.tell(32, 320)
		s.advance(900 * time.Millisecond)
		p.tell(64, 320)
		s.advance(100 * time.Millisecond)
		p.tell(96, 320)
		s.settle()
		p.tell(128, 320) // too soon after the last
		s.advance(time.Second)
		p.tell(160, 320)
		p.tell(161, 320)
		p.end()
		p.tell(320, 320)
		s.settle()
		s.mu.Lock()
		var kinds []string
		for _, x := range s.progress {
			for _, k := range []string{"begin", "report", "end"} {
				if strings.Contains(x, `"kind":"`+k+`"`) {
					kinds = append(kinds, k)
				}
			}
		}
		asked := slices.Contains(s.asked, "window/workDoneProgress/create")
		s.mu.Unlock()
		want := []string{"begin", "report", "end"}
		if !can {
			want = nil
		}
		if !slices.Equal(kinds, want) || asked != can {
			t.Errorf("a client that can see progress (%v) was shown %v, want %v: %v", can, kinds, want, s.progress)
		}
	}
}

// TestRefresh has the client ask again, once for a burst of changes, when a
// result may change in a document that was not edited.
func TestRefresh(t *testing.T) {
	before := features
	defer func() { features = before }()
	features = append(slices.Clone(features), feature{name: "refreshed", refresh: func(c *Client) string {
		if c.Capabilities.Workspace == nil {
			return ""
		}
		return protocol.MethodWorkspaceFoldingRangeRefresh
	}})
	s := start(t, t.TempDir())
	s.initialize(`{}`, "", ".")
	count := func() int {
		s.advance(time.Second)
		s.mu.Lock()
		defer s.mu.Unlock()
		n := 0
		for _, m := range s.asked {
			if m == protocol.MethodWorkspaceFoldingRangeRefresh {
				n++
			}
		}
		s.asked = nil
		return n
	}
	count()
	s.openText("a.kern", "x = 1 m\n")
	count()
	s.edit("a.kern", 0, 0, "y = 1 m\n")
	if n := count(); n != 0 {
		t.Errorf("an edit of the only document: %d", n)
	}
	s.openText("b.kern", "x = 1 m\n")
	count()
	for range 5 {
		s.edit("a.kern", 0, 0, "y = 1 m\n")
	}
	if n := count(); n != 1 {
		t.Errorf("edits beside another document: %d", n)
	}
	s.mu.Lock()
	s.config = []byte(`{"codeLens": false}`)
	s.mu.Unlock()
	s.notify("workspace/didChangeConfiguration", `{"settings":null}`)
	if n := count(); n != 1 {
		t.Errorf("other settings: %d", n)
	}
}
