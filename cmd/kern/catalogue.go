package main

import (
	"fmt"
	"io"
	"strings"
	"text/tabwriter"

	"kern/checker/catalogue"
	"kern/checker/section"
	"kern/lang"
	"kern/lang/unit"

	"github.com/spf13/cobra"
)

func catalogueCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "catalogue [TEXT…]",
		Short: "List rolled sections and steel grades",
		Long: "catalogue lists the sections that fit the text with their computed properties; a single\n" +
			"one in full. A grade is shown with its strengths by thickness. Properties are computed\n" +
			"from nominal dimensions, root fillets counted.",
		Example: "  kern catalogue HEB\n  kern catalogue \"SHS 100x100x5\"\n  kern catalogue S355",
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
			return append(catalogue.Families(), "S235", "S275", "S355", "S460"), cobra.ShellCompDirectiveNoFileComp
		},
		RunE: func(c *cobra.Command, args []string) error {
			out := c.OutOrStdout()
			text := strings.Join(args, " ")
			if g, ok := catalogue.FindGrade(text, ""); ok && text != "" {
				return printGrade(out, g)
			}
			if e, ok := catalogue.Find(text); ok {
				return printSection(out, e)
			}
			found := catalogue.Search(text)
			switch len(found) {
			case 0:
				message := "the catalogue has nothing for '" + text + "'"
				if near := append(catalogue.Nearest(text, 3), catalogue.NearestGrades(text, 1)...); len(near) > 0 {
					message += "; the nearest are " + lang.OrList(near)
				}
				return fmt.Errorf("%s", message)
			case 1:
				return printSection(out, found[0])
			}
			return printSections(out, found)
		},
	}
}

// shown writes an SI value in a unit, to four digits.
func shown(v float64, symbol string) string {
	u, err := unit.Parse(symbol)
	if err != nil {
		return "?"
	}
	return unit.Short(v/u.Factor, 4)
}

func printSections(w io.Writer, list []catalogue.Entry) error {
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	fmt.Fprintln(t, "section\tkg/m\tA cm2\tI_major cm4\tI_minor cm4\ti_major mm\ti_minor mm\tstandard")
	for _, e := range list {
		p, err := section.Compute(e.Shape)
		if err != nil {
			return fmt.Errorf("%s: %w", e.Designation, err)
		}
		fmt.Fprintf(t, "%s\t%s\t%s\t%s\t%s\t%s\t%s\t%s\n", e.Designation, unit.Short(p.Area*7850, 4), shown(p.Area, "cm2"), shown(p.IMajor, "cm4"), shown(p.IMinor, "cm4"),
			shown(p.RMajor, "mm"), shown(p.RMinor, "mm"), e.Standard)
	}
	return t.Flush()
}

func printSection(w io.Writer, e catalogue.Entry) error {
	p, err := section.Compute(e.Shape)
	if err != nil {
		return fmt.Errorf("%s: %w", e.Designation, err)
	}
	fmt.Fprintf(w, "%s, %s, %s\n", e.Designation, e.Product, e.Standard)
	if e.Torsion != "" {
		fmt.Fprintf(w, "I_t by %s\n", e.Torsion)
	}
	if e.Assumed != "" {
		fmt.Fprintf(w, "taken as %s\n", e.Assumed)
	}
	if !e.Listed {
		fmt.Fprintf(w, "not among the common sizes of %s\n", e.Standard)
	}
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	s := e.Shape
	for _, d := range []struct {
		name  string
		value float64
	}{{"depth", s.Depth}, {"width", s.Width}, {"outside", s.Diameter}, {"web", s.Web}, {"flange", s.Flange}, {"wall", s.Wall}, {"root", s.Root}, {"toe", s.Toe}, {"corner", s.OuterRadius}} {
		if d.value > 0 {
			fmt.Fprintf(t, "  %s\t%s mm\n", d.name, shown(d.value, "mm"))
		}
	}
	for _, d := range []struct {
		name  string
		value float64
		unit  string
	}{
		{"mass", p.Area * 7850, "kg/m"}, {"A", p.Area, "cm2"}, {"I_major", p.IMajor, "cm4"}, {"I_minor", p.IMinor, "cm4"}, {"i_major", p.RMajor, "mm"}, {"i_minor", p.RMinor, "mm"},
		{"W_major", p.WelMajor, "cm3"}, {"W_minor", p.WelMinor, "cm3"}, {"Wpl_major", p.WplMajor, "cm3"}, {"Wpl_minor", p.WplMinor, "cm3"}, {"I_t", p.It, "cm4"}, {"I_w", p.Iw, "cm6"},
	} {
		fmt.Fprintf(t, "  %s\t%s %s\n", d.name, shown(d.value, d.unit), d.unit)
	}
	return t.Flush()
}

func printGrade(w io.Writer, g catalogue.Grade) error {
	fmt.Fprintf(w, "%s, %s: E = %s GPa, G = %s GPa, density %s kg/m3\n", g.Name, g.Standard, shown(g.E, "GPa"), shown(g.G, "GPa"), unit.Short(g.Density, 4))
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	fmt.Fprintln(t, "  thickness\tfy MPa\tfu MPa\tfrom")
	last, lastUlt := "", 0.0
	for mm := 0.5; mm <= 250; mm += 0.5 {
		if fy, fu, row, ok := g.Strength(mm / 1000); ok && (row != last || fu != lastUlt) {
			if row != last || mm > 3 {
				fmt.Fprintf(t, "  %s\t%s\t%s\t%s\n", row, shown(fy, "MPa"), shown(fu, "MPa"), g.Standard)
			}
			last, lastUlt = row, fu
		}
	}
	last = ""
	for mm := 0.5; mm <= 80; mm += 0.5 {
		if fy, fu, row, ok := g.Table31(mm / 1000); ok && row != last {
			fmt.Fprintf(t, "  %s\t%s\t%s\tEN 1993-1-1 Table 3.1\n", row, shown(fy, "MPa"), shown(fu, "MPa"))
			last = row
		}
	}
	return t.Flush()
}
