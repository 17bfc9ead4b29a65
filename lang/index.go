package lang

// Index is the number of a declaration in the file, -1 when the file does not
// have it. A declaration remembers where it stood when somebody asked last:
// between two states of a file most move by a few places or not at all.
func (f *File) Index(d *Decl) int {
	hint := int(d.index.Load())
	has := func(i int) bool {
		if i < 0 || i >= len(f.Decls) || f.Decls[i] != d {
			return false
		}
		if i != hint {
			d.index.Store(int32(i))
		}
		return true
	}
	for away := 0; away <= max(hint, len(f.Decls)-hint); away++ {
		if has(hint + away) {
			return hint + away
		}
		if has(hint - away) {
			return hint - away
		}
	}
	return -1
}
