package lsp

import (
	"slices"
	"strings"
	"sync"

	"kern/lsp/disk"
)

// files remembers what was read from the disk, so that an edit costs the edited
// file alone.
type files struct {
	folder *disk.Folder
	mu     sync.Mutex
	stale  bool // the list of files is to be made anew
	doubt  bool // files may have changed unseen
	list   []string
	texts  map[string]diskText
}

type diskText struct {
	text  string
	stamp disk.Stamp
}

// found lists the files of the workspace.
func (f *files) found(walk func() []string) []string {
	f.mu.Lock()
	defer f.mu.Unlock()
	if f.stale {
		f.list, f.stale = walk(), false
	}
	if f.doubt {
		f.doubt = false
		for name, t := range f.texts {
			f.confirm(name, t)
		}
	}
	return f.list
}

// confirm forgets a text that the disk no longer has.
func (f *files) confirm(name string, t diskText) bool {
	if stamp, err := f.folder.Stamp(name); err != nil || stamp != t.stamp {
		delete(f.texts, name)
		return false
	}
	return true
}

// read gives the text of a file. That a file is missing is not remembered.
func (f *files) read(name string) (string, error) {
	f.mu.Lock()
	defer f.mu.Unlock()
	if t, ok := f.texts[name]; ok && (strings.HasSuffix(name, disk.Extension) || f.confirm(name, t)) {
		return t.text, nil
	}
	// the stamp comes first: a change between the two is seen the next time
	stamp, err := f.folder.Stamp(name)
	if err != nil {
		return "", err
	}
	text, err := f.folder.Read(name)
	if err != nil {
		return "", err
	}
	f.texts[name] = diskText{text, stamp}
	return text, nil
}

// forget drops the text of a file.
func (f *files) forget(name string) {
	f.mu.Lock()
	defer f.mu.Unlock()
	delete(f.texts, name)
}

// saved drops the text of a file that the editor has written, which may be new.
func (f *files) saved(name string) {
	f.mu.Lock()
	defer f.mu.Unlock()
	delete(f.texts, name)
	f.stale = f.stale || !slices.Contains(f.list, name)
}

// suspect has the files looked at again: the list when it may have changed, and
// the texts by size and time.
func (f *files) suspect(list bool) {
	f.mu.Lock()
	defer f.mu.Unlock()
	f.stale = f.stale || list
	f.doubt = true
}
