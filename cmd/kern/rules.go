package main

import (
	"fmt"
	"strings"

	"kern/checker/rule"
	"kern/lang"

	"github.com/spf13/cobra"
)

func rulesCommand() *cobra.Command {
	return &cobra.Command{
		Use:               "rules [NAME]",
		Short:             "List the rules, or explain one",
		Args:              cobra.MaximumNArgs(1),
		ValidArgsFunction: completeRules,
		RunE: func(c *cobra.Command, args []string) error {
			out := c.OutOrStdout()
			if len(args) == 1 {
				r := rule.Find(args[0])
				if r == nil {
					message := "there is no rule '" + args[0] + "'"
					if near := rule.Nearest(args[0], 3); len(near) > 0 {
						message += "; did you mean " + lang.OrList(near) + "?"
					}
					return fmt.Errorf("%s", message)
				}
				_, err := fmt.Fprint(out, strings.TrimRight(r.Page, "\n")+"\n")
				return err
			}
			width := 0
			for _, r := range rule.All() {
				width = max(width, len(r.Name))
			}
			for _, checks := range []bool{true, false} {
				if checks {
					fmt.Fprintln(out, "Checks of members")
				} else {
					fmt.Fprintln(out, "\nRules of the language")
				}
				for _, r := range rule.All() {
					if r.Check == checks {
						fmt.Fprintf(out, "  %-*s  %s\n", width, r.Name, r.Summary)
					}
				}
			}
			return nil
		},
	}
}

func completeRules(_ *cobra.Command, args []string, _ string) ([]string, cobra.ShellCompDirective) {
	if len(args) > 0 {
		return nil, cobra.ShellCompDirectiveNoFileComp
	}
	var out []string
	for _, r := range rule.All() {
		out = append(out, r.Name+"\t"+r.Summary)
	}
	return out, cobra.ShellCompDirectiveNoFileComp
}
