//go:build !windows

package lsp

import (
	"errors"
	"os"
	"syscall"
)

// alive tells whether a process exists.
func alive(pid int) bool {
	p, err := os.FindProcess(pid)
	if err != nil {
		return false
	}
	defer p.Release()
	err = p.Signal(syscall.Signal(0))
	return err == nil || errors.Is(err, os.ErrPermission)
}
