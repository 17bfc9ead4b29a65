package lsp

import (
	"encoding/json"
	"errors"
	"fmt"
	"sort"
	"strconv"
	"strings"
)

// Settings are what a user can set. The zero value is of no use: start from
// DefaultSettings.
type Settings struct {
	HintResults, HintSections, HintStrengths, HintValues, HintUnits, HintAssumptions, HintHistory bool

	CodeLens         bool
	HoldMilliseconds int // how long a new error on the line being typed is held back
	HoverDrawings    bool
	HoverHistory     bool
	DocsURL          string // base address of the rules' pages, "" for none
	Trace            string // off, messages or verbose
}

// Setting is one setting: its place in an editor's configuration (below the
// section "kern"), and what it means.
type Setting struct {
	// Name is the name with dots, as "inlayHints.results".
	Name string
	// Type is boolean, integer or string.
	Type string
	// Default is the value when nobody sets it: a bool, an int or a string.
	Default any
	// Values are the values that a string may have, nil for any.
	Values []string
	// Least and Most bound an integer.
	Least, Most int
	// Description says in one sentence what the setting does.
	Description string

	flag   func(*Settings) *bool
	number func(*Settings) *int
	text   func(*Settings) *string
}

// settings is the one table of settings. The settings of the editors'
// extensions are generated from it.
var settings = []Setting{
	{Name: "inlayHints.results", Type: "boolean", Default: true, flag: func(s *Settings) *bool { return &s.HintResults },
		Description: "Show utilisation and governing check after a member's first line."},
	{Name: "inlayHints.sections", Type: "boolean", Default: true, flag: func(s *Settings) *bool { return &s.HintSections },
		Description: "Show the computed properties after a section."},
	{Name: "inlayHints.strengths", Type: "boolean", Default: true, flag: func(s *Settings) *bool { return &s.HintStrengths },
		Description: "Show the yield strength after a steel grade."},
	{Name: "inlayHints.values", Type: "boolean", Default: true, flag: func(s *Settings) *bool { return &s.HintValues },
		Description: "Show the value of a named expression."},
	{Name: "inlayHints.units", Type: "boolean", Default: true, flag: func(s *Settings) *bool { return &s.HintUnits },
		Description: "Show quantities converted where units are mixed."},
	{Name: "inlayHints.assumptions", Type: "boolean", Default: true, flag: func(s *Settings) *bool { return &s.HintAssumptions },
		Description: "Show what is assumed about a member."},
	{Name: "inlayHints.history", Type: "boolean", Default: true, flag: func(s *Settings) *bool { return &s.HintHistory },
		Description: "Show what a member's result was in the last commit, where it was another."},
	{Name: "codeLens", Type: "boolean", Default: true, flag: func(s *Settings) *bool { return &s.CodeLens },
		Description: "Show verdict, governing check and \"show working\" above each member."},
	{Name: "diagnostics.holdMilliseconds", Type: "integer", Default: 600, Least: 0, Most: 10_000, number: func(s *Settings) *int { return &s.HoldMilliseconds },
		Description: "How long a new error on the line being typed is held back, in milliseconds; 0 shows it at once."},
	{Name: "diagnostics.docsURL", Type: "string", Default: "", text: func(s *Settings) *string { return &s.DocsURL },
		Description: "Base address of the rules' pages, for links from diagnostics; empty for none."},
	{Name: "hover.drawings", Type: "boolean", Default: true, flag: func(s *Settings) *bool { return &s.HoverDrawings },
		Description: "Draw sections to scale in hovers, where the editor can show pictures."},
	{Name: "hover.history", Type: "boolean", Default: true, flag: func(s *Settings) *bool { return &s.HoverHistory },
		Description: "Show in a member's hover which edits since the last commit changed its utilisation."},
	{Name: "trace", Type: "string", Default: "off", Values: []string{"off", "messages", "verbose"}, text: func(s *Settings) *string { return &s.Trace },
		Description: "Log the messages that the server handles."},
}

// SettingsTable lists every setting, by name.
func SettingsTable() []Setting {
	out := append([]Setting(nil), settings...)
	sort.Slice(out, func(i, j int) bool { return out[i].Name < out[j].Name })
	return out
}

// DefaultSettings are the settings when nobody has set anything.
func DefaultSettings() Settings {
	var s Settings
	for _, d := range settings {
		switch {
		case d.flag != nil:
			*d.flag(&s) = d.Default.(bool)
		case d.number != nil:
			*d.number(&s) = d.Default.(int)
		case d.text != nil:
			*d.text(&s) = d.Default.(string)
		}
	}
	return s
}

// Set sets one setting from a text, as a command line gives it:
// "inlayHints.results=false".
func (s *Settings) Set(assignment string) error {
	name, value, ok := strings.Cut(assignment, "=")
	if !ok {
		return fmt.Errorf("'%s' is no NAME=VALUE", assignment)
	}
	for _, d := range settings {
		if d.Name != name {
			continue
		}
		raw := value
		if d.text != nil {
			raw = strconv.Quote(value)
		}
		return d.set(s, json.RawMessage(raw))
	}
	return fmt.Errorf("there is no setting '%s'", name)
}

// apply reads settings from a JSON object: names nested or with dots, with or
// without the section "kern" around them. What it does not know or cannot read
// keeps its value; the error lists it.
func (s *Settings) apply(raw []byte) error {
	if len(raw) == 0 || string(raw) == "null" {
		return nil
	}
	var top map[string]json.RawMessage
	if err := json.Unmarshal(raw, &top); err != nil {
		return errors.New("settings are no JSON object")
	}
	if section, ok := top["kern"]; ok {
		if string(section) == "null" {
			return nil
		}
		top = nil // an editor may send the settings of others beside ours
		if err := json.Unmarshal(section, &top); err != nil {
			return errors.New("the settings of kern are no JSON object")
		}
	}
	flat := map[string]json.RawMessage{}
	flatten("", top, flat)
	var wrong []error
	for _, d := range settings {
		if value, ok := flat[d.Name]; ok {
			delete(flat, d.Name)
			if err := d.set(s, value); err != nil {
				wrong = append(wrong, err)
			}
		}
	}
	var unknown []string
	for name := range flat {
		unknown = append(unknown, name)
	}
	sort.Strings(unknown)
	for _, name := range unknown {
		wrong = append(wrong, fmt.Errorf("there is no setting '%s'", name))
	}
	return errors.Join(wrong...)
}

// flatten writes the names of nested objects with dots.
func flatten(prefix string, object, into map[string]json.RawMessage) {
	for name, value := range object {
		name = strings.TrimPrefix(prefix+name, "kern.")
		var below map[string]json.RawMessage
		if len(value) > 0 && value[0] == '{' && json.Unmarshal(value, &below) == nil {
			flatten(name+".", below, into)
			continue
		}
		into[name] = value
	}
}

// set reads the value of one setting; null means the default.
func (d *Setting) set(s *Settings, raw json.RawMessage) error {
	if string(raw) == "null" {
		defaults := DefaultSettings()
		switch {
		case d.flag != nil:
			*d.flag(s) = *d.flag(&defaults)
		case d.number != nil:
			*d.number(s) = *d.number(&defaults)
		case d.text != nil:
			*d.text(s) = *d.text(&defaults)
		}
		return nil
	}
	wrong := fmt.Errorf("the setting '%s' cannot be %s: it is a%s", d.Name, raw, map[string]string{"boolean": " boolean", "integer": "n integer", "string": " string"}[d.Type])
	switch {
	case d.flag != nil:
		var v bool
		if json.Unmarshal(raw, &v) != nil {
			return wrong
		}
		*d.flag(s) = v
	case d.number != nil:
		var v int
		if json.Unmarshal(raw, &v) != nil {
			return wrong
		}
		if v < d.Least || v > d.Most {
			return fmt.Errorf("the setting '%s' cannot be %d: it lies between %d and %d", d.Name, v, d.Least, d.Most)
		}
		*d.number(s) = v
	case d.text != nil:
		var v string
		if json.Unmarshal(raw, &v) != nil {
			return wrong
		}
		for i, allowed := range d.Values {
			if v == allowed {
				break
			}
			if i == len(d.Values)-1 {
				return fmt.Errorf("the setting '%s' cannot be '%s': it is %s", d.Name, v, strings.Join(d.Values, ", "))
			}
		}
		*d.text(s) = v
	}
	return nil
}
