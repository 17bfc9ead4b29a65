package offer

import (
	"strconv"
	"strings"
	"unicode"

	"kern/lang"
	"kern/lang/unit"
)

// free gives a name that nothing in the calculations of the file is called, and
// that stands nowhere in their text: it could be a name that is still missing.
func (l *list) free(want string) string {
	name := want
	for n := 2; l.taken(name); n++ {
		name = want + "_" + strconv.Itoa(n)
	}
	return name
}

func (l *list) taken(name string) bool {
	if _, constant := lang.Constants[name]; constant || lang.Joins(name) || unit.Known(name) {
		return true
	}
	if _, function := lang.Functions[name]; function {
		return true
	}
	if _, word := lang.Words[name]; word {
		return true
	}
	for _, form := range lang.Forms {
		if form.Word == name {
			return true
		}
	}
	for _, c := range l.calculations {
		if c.Env.Names[name] != nil {
			return true
		}
		for _, f := range c.Files {
			if strings.Contains(f.Text, name) && stands(f.Text, name) {
				return true
			}
		}
	}
	return false
}

// stands tells whether a name stands in a text as a word of its own.
func stands(text, name string) bool {
	letter := func(r rune) bool { return r == '_' || unicode.IsLetter(r) || unicode.IsDigit(r) }
	for rest := text; ; {
		i := strings.Index(rest, name)
		if i < 0 {
			return false
		}
		before := strings.TrimRightFunc(rest[:i], letter) == rest[:i]
		rest = rest[i+len(name):]
		if before && strings.TrimLeftFunc(rest, letter) == rest {
			return true
		}
	}
}

// word makes a name of a text: letters and digits, and _ for a point between
// digits.
func word(text string) string {
	var b strings.Builder
	for _, r := range strings.ToLower(text) {
		switch {
		case unicode.IsLetter(r), unicode.IsDigit(r) && b.Len() > 0:
			b.WriteRune(r)
		case r == '.' || r == '_':
			b.WriteByte('_')
		}
	}
	return b.String()
}

// quantityNames are what a value of a line is called, by the word of the line and
// what the value is there.
var quantityNames = map[string]string{
	"height": "clear_height", "length": "member_length", "from": "level_offset", "hold": "hold_height", "level": "level_height",
	"offset": "load_offset", "place": "load_height", "sway": "sway_limit", "wall": "wall_thickness", "web": "web_thickness", "flange": "flange_thickness",
	"thickness": "section_thickness", "depth": "section_depth", "width": "section_width", "outside": "outside_diameter", "diameter": "rod_diameter",
	"root": "root_radius", "toe": "toe_radius", "corner": "corner_radius", "E": "youngs_modulus", "G": "shear_modulus", "fy": "yield_strength", "fu": "ultimate_strength",
	"floor": "floor_area", "A": "section_area",
}

// dimensionNames are what a value is called where its line does not tell.
var dimensionNames = map[unit.Dim]string{
	unit.Length: "common_length", unit.Area: "common_area", unit.Force: "common_force", unit.Moment: "common_moment", unit.ForcePerLength: "line_load",
	unit.Stress: "common_stress", unit.Density: "common_density",
}
