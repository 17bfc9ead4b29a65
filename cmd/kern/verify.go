package main

import "io"

func verifySheet(out io.Writer, file string, paths []string) error { return nil }
