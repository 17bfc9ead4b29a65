package main

import (
	"fmt"
	"io"
	"slices"
	"strings"
	"text/tabwriter"

	"kern/checker/catalogue"
	"kern/checker/section"
	"kern/lang"
	"kern/lang/unit"

	"github.com/spf13/cobra"
)

func catalogueCommand() *cobra.Command {
	units := ""
	c := &cobra.Command{
		Use:   "catalogue [TEXT…]",
		Short: "List rolled sections and steel grades",
		Long: "catalogue lists the sections that fit the text with their computed properties; a single\n" +
			"one in full. A grade is shown with its strengths by thickness. Properties are computed\n" +
			"from nominal dimensions, root fillets counted. American sections and grades are shown in\n" +
			"inches and ksi, the others in metric units, unless --units says which.",
		Example: "  kern catalogue HEB\n  kern catalogue \"SHS 100x100x5\"\n  kern catalogue W14x90 --units metric\n  kern catalogue S355",
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
			return append(catalogue.Families(), "S235", "S275", "S355", "S460", "A992", "A500 Gr C", "A572 Gr 50", "A36"), cobra.ShellCompDirectiveNoFileComp
		},
		RunE: func(c *cobra.Command, args []string) error {
			out := c.OutOrStdout()
			text := strings.Join(args, " ")
			if units != "" && units != "metric" && units != "us" {
				return fmt.Errorf("--units is metric or us, not '%s'", units)
			}
			in := func(american bool) *unitSet {
				if units == "us" || american && units == "" {
					return &customary
				}
				return &metric
			}
			if g, ok := catalogue.FindGrade(text, ""); ok && text != "" {
				return printGrade(out, g, in(g.American()))
			}
			if e, ok := catalogue.Find(text); ok {
				return printSection(out, e, in(e.American()))
			}
			found := catalogue.Search(text)
			switch len(found) {
			case 0:
				message := "the catalogue has nothing for '" + text + "'"
				near := catalogue.Nearest(text, 3)
				if near = append(near, catalogue.NearestGrades(text, max(1, 3-len(near)))...); len(near) > 0 {
					message += "; the nearest are " + lang.OrList(near)
				}
				return fmt.Errorf("%s", message)
			case 1:
				return printSection(out, found[0], in(found[0].American()))
			}
			// A list of both has two tables, each in its own units.
			i := slices.IndexFunc(found, func(e catalogue.Entry) bool { return e.American() })
			if i < 0 {
				i = len(found)
			}
			if err := printSections(out, found[:i], in(false)); err != nil || i == len(found) {
				return err
			}
			if i > 0 {
				fmt.Fprintln(out)
			}
			return printSections(out, found[i:], in(true))
		},
	}
	c.Flags().StringVar(&units, "units", "", "show in `metric` or us units")
	return c
}

// unitSet are the units of a list.
type unitSet struct {
	length, area, moment, modulus, warping, stress, stiffness string
}

var (
	metric    = unitSet{"mm", "cm2", "cm4", "cm3", "cm6", "MPa", "GPa"}
	customary = unitSet{"in", "in2", "in4", "in3", "in6", "ksi", "ksi"}
)

// showMass writes a mass per length.
func (u *unitSet) showMass(area float64) string {
	if u == &customary {
		return unit.Short(area/(0.0254*0.0254)*490/144, 4) + " lb/ft"
	}
	return unit.Short(area*7850, 4) + " kg/m"
}

// shown writes an SI value in a unit, to four digits.
func shown(v float64, symbol string) string {
	u, err := unit.Parse(symbol)
	if err != nil {
		return "?"
	}
	return unit.Short(v/u.Factor, 4)
}

func printSections(w io.Writer, list []catalogue.Entry, u *unitSet) error {
	if len(list) == 0 {
		return nil
	}
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	_, mass, _ := strings.Cut(u.showMass(1), " ")
	fmt.Fprintf(t, "section\t%s\tA %s\tI_major %s\tI_minor %s\ti_major %s\ti_minor %s\tstandard\n", mass, u.area, u.moment, u.moment, u.length, u.length)
	for _, e := range list {
		p, err := section.Compute(e.Shape)
		if err != nil {
			return fmt.Errorf("%s: %w", e.Designation, err)
		}
		mass, _, _ := strings.Cut(u.showMass(p.Area), " ")
		fmt.Fprintf(t, "%s\t%s\t%s\t%s\t%s\t%s\t%s\t%s\n", e.Designation, mass, shown(p.Area, u.area), shown(p.IMajor, u.moment), shown(p.IMinor, u.moment),
			shown(p.RMajor, u.length), shown(p.RMinor, u.length), e.Standard)
	}
	return t.Flush()
}

func printSection(w io.Writer, e catalogue.Entry, u *unitSet) error {
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
	}{{"depth", s.Depth}, {"width", s.Width}, {"outside", s.Diameter}, {"web", s.Web}, {"flange", s.Flange}, {"wall", s.Wall}, {"gap", s.Gap}, {"root", s.Root}, {"toe", s.Toe}, {"corner", s.OuterRadius}} {
		if d.value > 0 {
			fmt.Fprintf(t, "  %s\t%s %s\n", d.name, shown(d.value, u.length), u.length)
		}
	}
	fmt.Fprintf(t, "  mass\t%s\n", u.showMass(p.Area))
	for _, d := range []struct {
		name  string
		value float64
		unit  string
	}{
		{"A", p.Area, u.area}, {"I_major", p.IMajor, u.moment}, {"I_minor", p.IMinor, u.moment}, {"i_major", p.RMajor, u.length}, {"i_minor", p.RMinor, u.length},
		{"W_major", p.WelMajor, u.modulus}, {"W_minor", p.WelMinor, u.modulus}, {"Wpl_major", p.WplMajor, u.modulus}, {"Wpl_minor", p.WplMinor, u.modulus}, {"I_t", p.It, u.moment}, {"I_w", p.Iw, u.warping},
	} {
		fmt.Fprintf(t, "  %s\t%s %s\n", d.name, shown(d.value, d.unit), d.unit)
	}
	return t.Flush()
}

func printGrade(w io.Writer, g catalogue.Grade, u *unitSet) error {
	density := unit.Short(g.Density, 4) + " kg/m3"
	if u == &customary {
		density = unit.Short(g.Density*(0.3048*0.3048*0.3048)/0.45359237, 4) + " lb/ft3"
	}
	fmt.Fprintf(w, "%s, %s: E = %s %s, G = %s %s, density %s\n", g.Name, g.Standard, shown(g.E, u.stiffness), u.stiffness, shown(g.G, u.stiffness), u.stiffness, density)
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	if g.American() {
		fmt.Fprintf(t, "  product\tthickness\tfy %s\tfu %s\n", u.stress, u.stress)
		for _, f := range g.Forms() {
			fmt.Fprintf(t, "  %s\t%s\t%s\t%s\n", f.Form, f.Row, shown(f.Fy, u.stress), shown(f.Fu, u.stress))
		}
		return t.Flush()
	}
	fmt.Fprintf(t, "  thickness\tfy %s\tfu %s\tfrom\n", u.stress, u.stress)
	last, lastUlt := "", 0.0
	for mm := 0.5; mm <= 250; mm += 0.5 {
		if fy, fu, row, ok := g.Strength(mm / 1000); ok && (row != last || fu != lastUlt) {
			if row != last || mm > 3 {
				fmt.Fprintf(t, "  %s\t%s\t%s\t%s\n", row, shown(fy, u.stress), shown(fu, u.stress), g.Standard)
			}
			last, lastUlt = row, fu
		}
	}
	last = ""
	for mm := 0.5; mm <= 80; mm += 0.5 {
		if fy, fu, row, ok := g.Table31(mm / 1000); ok && row != last {
			fmt.Fprintf(t, "  %s\t%s\t%s\tEN 1993-1-1 Table 3.1\n", row, shown(fy, u.stress), shown(fu, u.stress))
			last = row
		}
	}
	return t.Flush()
}
