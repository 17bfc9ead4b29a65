package main

import (
	"bytes"
	"os"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
)

func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){"kern": func() { os.Exit(run()) }, "edit": edit})
}

// TestScripts runs the commands as a user does.
func TestScripts(t *testing.T) {
	testscript.Run(t, testscript.Params{Dir: "testdata/script", UpdateScripts: *update, RequireExplicitExec: true,
		Setup: func(e *testscript.Env) error {
			e.Setenv("HOME", e.WorkDir)
			return nil
		}})
}

// edit is the command "edit FILE OLD NEW" of the scripts: it replaces a text, as
// somebody with an editor would.
func edit() {
	data, err := os.ReadFile(os.Args[1])
	if err != nil {
		panic(err)
	}
	old, now := []byte(os.Args[2]), []byte(os.Args[3])
	if !bytes.Contains(data, old) {
		panic("the text to replace is not there")
	}
	if err := os.WriteFile(os.Args[1], bytes.Replace(data, old, now, 1), 0o666); err != nil {
		panic(err)
	}
}
