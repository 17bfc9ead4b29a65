package model

import "slices"

// Shares tells whether two readings of a calculation have the very same shared
// declarations, so that a member's text means the same in both but for the
// members that it names.
func (env *Env) Shares(old *Env) bool { return slices.Equal(env.decls, old.decls) }

// Owns tells whether the names of a member's statement belong to it alone: none
// of them is given twice.
func (env *Env) Owns(m *Member) bool {
	for _, e := range memberNames(m.Stmt) {
		if n, ok := env.Names[e.Text]; !ok || n.Stmt != m.Stmt {
			return false
		}
	}
	return true
}

// Bad tells whether the definition of a name has an error of its own.
func (env *Env) Bad(n *Named) bool {
	switch {
	case n.Kind == MaterialName && n.Index >= 0:
		return env.Materials[n.Index].Bad
	case n.Kind == SectionName && n.Index >= 0:
		return env.Sections[n.Index].Bad
	}
	return n.Bad
}
