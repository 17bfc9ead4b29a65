package checker

import (
	"io/fs"
	"maps"
	"slices"

	"kern/lang"
)

// load reads a project from texts by name.
func load(files map[string]string) *lang.Project {
	return lang.Load(slices.Sorted(maps.Keys(files)), func(name string) (string, error) {
		text, ok := files[name]
		if !ok {
			return "", fs.ErrNotExist
		}
		return text, nil
	}, nil)
}
