// Command kern checks, formats and explains plain-text column calculations.
package main

import (
	"errors"
	"fmt"
	"os"

	"github.com/spf13/cobra"
)

// Exit statuses.
const (
	exitRight  = 0 // every member passes and nothing is wrong
	exitWrong  = 1 // a member fails or is undecided, or a file has an error
	exitBroken = 2 // the command itself could not run
)

// errWrong ends a command whose answer is "no": everything was said already.
var errWrong = errors.New("something is wrong in the calculation")

func main() { os.Exit(run()) }

func run() int {
	err := root().Execute()
	switch {
	case err == nil:
		return exitRight
	case errors.Is(err, errWrong):
		return exitWrong
	}
	fmt.Fprintln(os.Stderr, "kern: "+err.Error())
	return exitBroken
}

func root() *cobra.Command {
	c := &cobra.Command{
		Use:   "kern",
		Short: "Check plain-text column calculations",
		Long: "kern reads column calculations written as text, checks every member to a published\n" +
			"design standard, and says what fails, by which clause and by how much.\n\n" +
			"Local codes govern; a licensed engineer decides.",
		SilenceErrors: true,
		SilenceUsage:  true,
		Version:       version(),
	}
	c.SetVersionTemplate("kern {{.Version}}\n")
	c.AddCommand(
		checkCommand(),
		recordCommand(),
		watchCommand(),
		sheetCommand(),
		scheduleCommand(),
		sizeCommand(),
		formatCommand(),
		rulesCommand(),
		catalogueCommand(),
		chartCommand(),
		lspCommand(),
		reviewCommand(),
		versionCommand(),
	)
	return c
}
