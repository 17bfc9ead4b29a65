package main

import (
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/chart"
	"kern/checker/drawing"
	"kern/lang"
	"kern/lang/unit"

	"github.com/spf13/cobra"
)

// charting is what the flags of the command say.
type charting struct {
	section, material, standard, annex, method, effective string
	member, vary, picture                                 string
	interaction                                           bool
	from, to                                              string
	points                                                int
	form, file                                            string
}

// pictures are the drawings of a member by the words of --picture.
var pictures = map[string]func(*checker.Result) *drawing.Scene{
	"elevation": drawing.Elevation, "buckling": drawing.Buckling, "diagrams": drawing.Diagrams, "section": drawing.SectionOf,
	"interaction": drawing.Interaction, "utilisation": drawing.Bars,
}

var pictureWords = []string{"elevation", "buckling", "diagrams", "section", "interaction", "utilisation"}

func chartCommand() *cobra.Command {
	var o charting
	c := &cobra.Command{
		Use:   "chart [PATH…]",
		Short: "Draw resistance, utilisation or interaction",
		Long: "chart draws one result against another, found by checking every point:\n\n" +
			"  --section and --material   resistance to compression against height, about both axes\n" +
			"  --vary WHAT                a member's utilisation against its height, load, load:CASE,\n" +
			"                             offset:major or offset:minor\n" +
			"  --interaction              compression against bending, with the point of every combination\n" +
			"  --picture NAME             a picture of a member: " + strings.Join(pictureWords, ", ") + "\n\n" +
			"As text it is a plot of characters with its findings in sentences and a table.",
		Example: "  kern chart --section \"HEB 160\" --material S355\n  kern chart hall.kern --member H1 --vary height --output svg --file h1.svg\n  kern chart hall.kern --member H1 --interaction",
		RunE: func(c *cobra.Command, paths []string) error {
			if !slices.Contains([]string{"text", "svg", "csv"}, o.form) {
				return fmt.Errorf("--output is text, svg or csv, not '%s'", o.form)
			}
			if strings.EqualFold(filepath.Ext(o.file), extension) {
				return fmt.Errorf("--file is where the chart goes, and %s would be a calculation", o.file)
			}
			var b strings.Builder
			if err := o.write(&b, paths, style(c.OutOrStdout()).Width); err != nil {
				return err
			}
			if o.file == "" {
				_, err := io.WriteString(c.OutOrStdout(), b.String())
				return err
			}
			if err := os.WriteFile(o.file, []byte(b.String()), 0o666); err != nil {
				return fmt.Errorf("%s: %w", o.file, reason(err))
			}
			return nil
		},
	}
	f := c.Flags()
	f.StringVar(&o.section, "section", "", "a section of the catalogue, for its resistance")
	f.StringVar(&o.material, "material", "S355", "the grade of steel, with --section")
	f.StringVar(&o.standard, "standard", "EN 1993-1-1:2005", "the design standard, with --section: "+strings.Join(checker.Standards(), ", "))
	f.StringVar(&o.method, "by", "", "the method of the standard where it has several (LRFD, ASD), with --section")
	f.StringVar(&o.annex, "annex", "", "the annex of the standard, with --section")
	f.StringVar(&o.effective, "effective", "1", "effective length factor about both axes, or major,minor, with --section")
	f.StringVar(&o.member, "member", "", "the member to draw")
	f.StringVar(&o.vary, "vary", "", "what to vary: height, load, load:CASE, offset:major, offset:minor")
	f.BoolVar(&o.interaction, "interaction", false, "compression against bending")
	f.StringVar(&o.picture, "picture", "", "a picture of the member: "+strings.Join(pictureWords, ", "))
	f.StringVar(&o.from, "from", "", "where the range begins, with its unit: 2 m")
	f.StringVar(&o.to, "to", "", "where the range ends")
	f.IntVar(&o.points, "points", 101, "how many points are checked")
	f.StringVarP(&o.form, "output", "o", "text", "form: text, svg or csv")
	f.StringVar(&o.file, "file", "", "write to a file instead")
	completeWords(c, "output", "text", "svg", "csv")
	completeWords(c, "vary", "height", "load", "offset:major", "offset:minor")
	completeWords(c, "picture", pictureWords...)
	completeWords(c, "standard", checker.Standards()...)
	return c
}

// write makes the chart that the flags ask for.
func (o *charting) write(w io.Writer, paths []string, width int) error {
	if o.points < 2 || o.points > 10000 {
		return fmt.Errorf("--points is between 2 and 10000, not %d", o.points)
	}
	asked := 0
	for _, on := range []bool{o.section != "", o.vary != "", o.interaction, o.picture != ""} {
		if on {
			asked++
		}
	}
	switch {
	case asked == 0:
		return errors.New("say what to draw: --section NAME, or --member NAME with --vary, --interaction or --picture")
	case asked > 1:
		return errors.New("--section, --vary, --interaction and --picture are a chart each: give one of them")
	case o.section != "" && len(paths) > 0:
		return errors.New("--section needs no calculation: leave the path out, or give --member with --vary")
	case o.section != "":
		c, err := o.resistance()
		if err != nil {
			return err
		}
		return o.print(w, c, width)
	}
	space, err := openWorkspace(paths)
	if err != nil {
		return err
	}
	report := space.check(os.Stderr)
	m, err := o.find(report, space)
	if err != nil {
		return err
	}
	if o.interaction && o.form == "svg" {
		o.picture = "interaction"
	}
	if o.picture != "" {
		return o.draw(w, m)
	}
	c, err := o.of(report, m)
	if err != nil {
		return err
	}
	return o.print(w, c, width)
}

// print writes a chart in the form that was asked for.
func (o *charting) print(w io.Writer, c *chart.Chart, width int) error {
	switch o.form {
	case "csv":
		return c.CSV(w)
	case "svg":
		_, err := io.WriteString(w, c.Scene().SVG(drawing.Alone)+"\n")
		return err
	}
	if width <= 0 {
		width = 80
	}
	_, err := io.WriteString(w, c.Text(min(width, 110), 21))
	return err
}

// draw writes a picture of a member, or what it shows in words.
func (o *charting) draw(w io.Writer, m *checker.Result) error {
	draw := pictures[o.picture]
	if draw == nil {
		return fmt.Errorf("'%s' is no picture: say %s", o.picture, lang.OrList(pictureWords))
	}
	if o.form == "csv" {
		return errors.New("a picture has no table of values: --output is svg or text")
	}
	s := draw(m)
	if s == nil {
		return fmt.Errorf("there is nothing to draw: the %s of %s is not known, or the loads make none", o.picture, m.Name)
	}
	text := s.Title + "\n\n" + s.Description
	if o.form == "svg" {
		text = s.SVG(drawing.Alone)
	}
	_, err := io.WriteString(w, text+"\n")
	return err
}

// of is the chart of a member.
func (o *charting) of(report *checker.Report, m *checker.Result) (*chart.Chart, error) {
	if o.interaction {
		if o.from != "" || o.to != "" {
			return nil, errors.New("--from and --to belong to --vary and --section")
		}
		return chart.Interaction(m)
	}
	dim := unit.None
	if !strings.HasPrefix(o.vary, "load") {
		dim = unit.Length
	}
	where := chart.Range{Points: o.points}
	var err error
	if where.From, err = bound("--from", o.from, dim); err != nil {
		return nil, err
	}
	if where.To, err = bound("--to", o.to, dim); err != nil {
		return nil, err
	}
	return chart.Vary(report, m, o.vary, where)
}

// resistance is the chart of a section.
func (o *charting) resistance() (*chart.Chart, error) {
	if o.member != "" {
		return nil, errors.New("--member and --section are different charts: give one of them")
	}
	if !slices.Contains(checker.Standards(), o.standard) {
		return nil, fmt.Errorf("'%s' is no design standard that is known: say %s", o.standard, lang.OrList(checker.Standards()))
	}
	p := chart.Plain{Section: o.section, Material: o.material, Standard: o.standard, Annex: o.annex, Method: o.method, Points: o.points}
	major, minor, two := strings.Cut(o.effective, ",")
	if !two {
		minor = major
	}
	var err error
	for a, text := range []string{major, minor} {
		if p.K[a], err = bound("--effective", text, unit.None); err != nil {
			return nil, err
		}
		if !(p.K[a] >= 0.1 && p.K[a] <= 10) {
			return nil, fmt.Errorf("--effective is a factor between 0.1 and 10, not '%s'", strings.TrimSpace(text))
		}
	}
	if p.From, err = bound("--from", o.from, unit.Length); err != nil {
		return nil, err
	}
	if p.To, err = bound("--to", o.to, unit.Length); err != nil {
		return nil, err
	}
	return chart.Resistance(p)
}

// bound reads a quantity of a flag in SI units; 0 for one that is not given.
func bound(flag, text string, dim unit.Dim) (float64, error) {
	if strings.TrimSpace(text) == "" {
		return 0, nil
	}
	want := map[unit.Dim]string{unit.Length: "a length such as 4.5 m", unit.None: "a number such as 1.5"}[dim]
	e, err := lang.ParseExpr(text)
	if err != nil {
		return 0, fmt.Errorf("%s is %s, not '%s'", flag, want, text)
	}
	q, p := lang.Eval(e, func(e *lang.Expr) (unit.Quantity, *lang.Problem) {
		return unit.Quantity{}, &lang.Problem{Message: "a name"}
	})
	if p != nil || q.Dim != dim {
		return 0, fmt.Errorf("%s is %s, not '%s'", flag, want, text)
	}
	return q.Value, nil
}

// find is the member that was asked for, or the only one.
func (o *charting) find(report *checker.Report, w *workspace) (*checker.Result, error) {
	var names []string
	var found []*checker.Result
	for _, m := range report.Members {
		if file, _ := report.Place(m); !slices.Contains(w.names, file) {
			continue
		}
		names = append(names, m.Name)
		if m.Name == o.member || o.member == "" {
			found = append(found, m)
		}
	}
	switch {
	case len(names) == 0:
		return nil, errors.New("the calculation has no members")
	case len(found) == 1:
		return found[0], nil
	case o.member == "":
		return nil, fmt.Errorf("give --member NAME: the calculation has %s", some(names))
	case len(found) == 0:
		return nil, fmt.Errorf("there is no member '%s': the calculation has %s", o.member, some(names))
	}
	return nil, fmt.Errorf("'%s' stands in several of the files: give the path of one of them", o.member)
}

// some lists the first names.
func some(names []string) string {
	const most = 12
	if len(names) > most {
		return strings.Join(names[:most], ", ") + fmt.Sprintf(" and %d more", len(names)-most)
	}
	return strings.Join(names, ", ")
}
