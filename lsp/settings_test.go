package lsp

import (
	"strings"
	"testing"
)

// TestSettingsTable looks at every setting: it can be set by each way of
// writing it, it changes nothing else, and its default is what it says.
func TestSettingsTable(t *testing.T) {
	seen := map[string]bool{}
	for _, d := range SettingsTable() {
		if seen[d.Name] || d.Description == "" || !strings.HasSuffix(d.Description, ".") {
			t.Errorf("%s stands twice or says nothing", d.Name)
		}
		seen[d.Name] = true
		value, wrong := "", `[1]`
		switch d.Type {
		case "boolean":
			value = map[bool]string{true: "false", false: "true"}[d.Default.(bool)]
		case "integer":
			value = "7"
		case "string":
			value = "verbose"
		default:
			t.Errorf("%s is a %s", d.Name, d.Type)
		}
		quoted := value
		if d.Type == "string" {
			quoted = `"` + value + `"`
		}
		var flag Settings = DefaultSettings()
		if err := flag.Set(d.Name + "=" + value); err != nil {
			t.Errorf("%s: %v", d.Name, err)
		}
		if flag == DefaultSettings() {
			t.Errorf("%s=%s changes nothing", d.Name, value)
		}
		nested := quoted
		parts := strings.Split(d.Name, ".")
		for i := len(parts) - 1; i >= 0; i-- {
			nested = `{"` + parts[i] + `":` + nested + `}`
		}
		for _, way := range []string{nested, `{"` + d.Name + `":` + quoted + `}`, `{"kern":` + nested + `,"other":{"x":1}}`, `{"kern.` + d.Name + `":` + quoted + `}`} {
			s := DefaultSettings()
			if err := s.apply([]byte(way)); err != nil || s != flag {
				t.Errorf("%s: %v, %+v", way, err, s)
			}
			if err := s.apply([]byte(strings.ReplaceAll(way, quoted, "null"))); err != nil || s != DefaultSettings() && !strings.Contains(way, `"kern":null`) {
				t.Errorf("%s, null: %v, %+v", way, err, s)
			}
			if err := s.apply([]byte(strings.ReplaceAll(way, quoted, wrong))); err == nil || s != DefaultSettings() {
				t.Errorf("%s, wrong: %v, %+v", way, err, s)
			}
		}
	}
	s := DefaultSettings()
	for _, wrong := range []string{`7`, `{"nonsense": 1}`, `{"kern": 5}`, `{"trace": "loud"}`, `{"diagnostics": {"holdMilliseconds": -1}}`, `{"diagnostics": {"holdMilliseconds": 1e9}}`, `{"codeLens": "yes"}`, `{`} {
		if err := s.apply([]byte(wrong)); err == nil || s != DefaultSettings() {
			t.Errorf("%s: %v, %+v", wrong, err, s)
		}
	}
	for _, right := range []string{``, `null`, `{}`, `{"kern": null}`, `{"kern": {}, "editor": {"x": 1}}`} {
		if err := s.apply([]byte(right)); err != nil || s != DefaultSettings() {
			t.Errorf("%s: %v, %+v", right, err, s)
		}
	}
	for _, wrong := range []string{"x", "nonsense=1", "codeLens=maybe", "trace=loud", "diagnostics.holdMilliseconds=-3"} {
		if err := s.Set(wrong); err == nil {
			t.Errorf("--set %s is taken", wrong)
		}
	}
}
