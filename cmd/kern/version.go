package main

import (
	"fmt"
	"runtime"
	"runtime/debug"

	"kern/checker"

	"github.com/spf13/cobra"
)

// release is the version of the program; results carry it.
const release = "0.1.0"

// program is how outputs name the program.
func program() string { return "kern " + release }

// version is the release, with the commit where the build knows it.
func version() string {
	info, ok := debug.ReadBuildInfo()
	if !ok {
		return release
	}
	for _, s := range info.Settings {
		if s.Key == "vcs.revision" && len(s.Value) >= 12 {
			return release + " (" + s.Value[:12] + ")"
		}
	}
	return release
}

func versionCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "version",
		Short: "Print the version and the standards it checks to",
		Args:  cobra.NoArgs,
		RunE: func(c *cobra.Command, _ []string) error {
			out := c.OutOrStdout()
			fmt.Fprintf(out, "kern %s, %s %s/%s\n", version(), runtime.Version(), runtime.GOOS, runtime.GOARCH)
			for _, s := range checker.Standards() {
				fmt.Fprintf(out, "  checks to %s\n", s)
			}
			return nil
		},
	}
}
