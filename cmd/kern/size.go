package main

import (
	"cmp"
	"errors"
	"fmt"
	"io"
	"os"
	"slices"
	"strings"

	"kern/checker"
	"kern/checker/catalogue"
	"kern/checker/output"
	"kern/checker/size"
	design "kern/checker/standard"
	"kern/lang"
	"kern/lang/unit"

	"github.com/spf13/cobra"
)

// sizing is what the flags of the command say.
type sizing struct {
	members, families    []string
	depth, width         string
	group, write, answer bool
	form                 string
}

func sizeCommand() *cobra.Command {
	var o sizing
	c := &cobra.Command{
		Use:   "size [PATH…]",
		Short: "Say what would make a failing member pass",
		Long: "size looks for the changes with which a member passes, each found and checked by the\n" +
			"checker itself: the lightest section of its family and of all families of its kind, the\n" +
			"next grade, one more hold with what it must be able to do, the greatest height, and the\n" +
			"greatest value of each load. Of a member that passes it says what would be lighter, and\n" +
			"how much more it may take. Without --member it takes the members that do not pass.\n\n" +
			"--write puts the lightest section that was found into the file for each member that\n" +
			"fails; with --group one section for all that share it. Nothing is written where another\n" +
			"member would no longer pass.\n\n" +
			"Exit status: 0 every member looked at passes, or does after --write; 1 one does not;\n" +
			"2 the command itself could not run.",
		Example: "  kern size hall.kern\n  kern size hall.kern --member H1 --family HEB,SHS --max-depth 200mm\n  kern size frame/ --group --write",
		RunE:    func(c *cobra.Command, paths []string) error { return o.run(c.OutOrStdout(), paths) },
	}
	f := c.Flags()
	f.StringSliceVar(&o.members, "member", nil, "members to look at, by name")
	f.StringSliceVar(&o.families, "family", nil, "families of sections that are allowed: HEB,SHS")
	f.StringVar(&o.depth, "max-depth", "", "greatest depth of a section, with its unit: 200mm")
	f.StringVar(&o.width, "max-width", "", "greatest width of a section, with its unit")
	f.BoolVar(&o.group, "group", false, "one section for all members that share one")
	f.BoolVar(&o.write, "write", false, "put the lightest sections into the files")
	f.BoolVar(&o.answer, "sensitivity", false, "say how the utilisation answers to height, load, wall, fy and offset")
	f.StringVarP(&o.form, "output", "o", "text", "form: text or json")
	completeWords(c, "output", "text", "json")
	completeWords(c, "family", catalogue.Families()...)
	return c
}

func (o *sizing) run(out io.Writer, paths []string) error {
	if o.form != "text" && o.form != "json" {
		return fmt.Errorf("--output is text or json, not '%s'", o.form)
	}
	options, err := o.options()
	if err != nil {
		return err
	}
	w, err := openWorkspace(paths)
	if err != nil {
		return err
	}
	report := w.check(os.Stderr)
	members, err := o.chosen(report, w)
	if err != nil {
		return err
	}
	if o.write {
		return o.change(out, w, report, members, options)
	}
	s := output.Sizing{Report: report, Members: sizeAll(report, members, options)}
	if o.answer {
		s.Sensitivities = [][]size.Sensitivity{}
		for _, m := range members {
			s.Sensitivities = append(s.Sensitivities, size.Sensitivities(report, m))
		}
	}
	switch {
	case o.form == "json":
		err = output.SizingJSON(out, s, program(), w.show)
	case len(members) == 0:
		_, err = fmt.Fprintf(out, "Every member passes: name one with --member to see what it could do with less, or take more.\n\n%s\n", output.Caution)
	default:
		err = output.SizingText(out, s)
	}
	if err == nil && slices.ContainsFunc(members, failing) {
		return errWrong
	}
	return err
}

func failing(r *checker.Result) bool { return r.Verdict != design.Passes }

func sizeAll(report *checker.Report, members []*checker.Result, o size.Options) []size.Sized {
	bar := newBar(os.Stderr)
	bar.what = "sizing members"
	defer bar.finish()
	all := size.All(report, members, o, bar.tell)
	if len(o.Kinds) == 2 { // one section for all where there is one, else the member's own
		for i, s := range all {
			shares := func(x size.Mend) bool { return x.Kind == size.Group }
			if slices.ContainsFunc(s.Mends, shares) {
				all[i].Mends = slices.DeleteFunc(s.Mends, func(x size.Mend) bool { return !shares(x) })
			}
		}
	}
	return all
}

// options are the flags as the search takes them.
func (o *sizing) options() (size.Options, error) {
	var out size.Options
	known := catalogue.Families()
	for _, f := range o.families {
		i := slices.IndexFunc(known, func(k string) bool { return strings.EqualFold(k, strings.TrimSpace(f)) })
		if i < 0 {
			return out, fmt.Errorf("'%s' is no family of the catalogue: say %s", f, lang.OrList(known))
		}
		out.Families = append(out.Families, known[i])
	}
	var err error
	if out.MaxDepth, err = bound("--max-depth", o.depth, unit.Length); err != nil {
		return out, err
	}
	if out.MaxWidth, err = bound("--max-width", o.width, unit.Length); err != nil {
		return out, err
	}
	if out.MaxDepth < 0 || out.MaxWidth < 0 {
		return out, errors.New("--max-depth and --max-width are lengths above zero")
	}
	if o.group {
		out.Kinds = []size.Kind{size.Group, size.Section}
	}
	return out, nil
}

// chosen are the members that were named, or those that do not pass.
func (o *sizing) chosen(report *checker.Report, w *workspace) ([]*checker.Result, error) {
	var names []string
	var out []*checker.Result
	for _, m := range report.Members {
		if file, _ := report.Place(m); !slices.Contains(w.names, file) {
			continue
		}
		names = append(names, m.Name)
		if slices.Contains(o.members, m.Name) || len(o.members) == 0 && failing(m) {
			out = append(out, m)
		}
	}
	if len(names) == 0 {
		return nil, errors.New("the calculation has no members")
	}
	for _, name := range o.members {
		if !slices.Contains(names, name) {
			return nil, fmt.Errorf("there is no member '%s': the calculation has %s", name, some(names))
		}
	}
	return out, nil
}

// change writes the lightest sections that were found, if all that passes now
// passes then.
func (o *sizing) change(out io.Writer, w *workspace, report *checker.Report, members []*checker.Result, options size.Options) error {
	before := report
	if !o.group {
		options.Kinds = []size.Kind{size.Section}
	}
	texts := map[string]string{}
	var lines []string
	named := func(name string) bool {
		return slices.ContainsFunc(members, func(m *checker.Result) bool { return m.Name == name })
	}
	// One change may do for others that take the line over, and changes of one file
	// move each other, so they are made in rounds.
	for range 4 {
		var todo []*checker.Result
		for _, m := range report.Members {
			if named(m.Name) && failing(m) {
				todo = append(todo, m)
			}
		}
		var changes []checker.Edit
		for _, s := range sizeAll(report, todo, options) {
			if len(s.Mends) == 0 {
				continue
			}
			x := s.Mends[0]
			edits := x.Edits()
			clash := slices.ContainsFunc(edits, func(e checker.Edit) bool {
				return slices.ContainsFunc(changes, func(c checker.Edit) bool {
					return c.File == e.File && c.Span.Start <= e.Span.End && e.Span.Start <= c.Span.End
				})
			})
			if len(edits) == 0 || clash {
				continue
			}
			changes = append(changes, edits...)
			of := s.Result.Name
			if len(x.Serves) > 0 {
				of = strings.Join(x.Serves, ", ")
			}
			lines = append(lines, fmt.Sprintf("%s: %s in place of %s, %s by %s, %s", of, x.Change, s.Result.Member.Section.Title(), checker.Ratio(x.Utilisation), x.Governing,
				output.MassLine(s.Result.Units(), x.Added)))
		}
		if len(changes) == 0 {
			break
		}
		slices.SortFunc(changes, func(a, b checker.Edit) int {
			return cmp.Or(strings.Compare(a.File, b.File), cmp.Compare(a.Span.Start, b.Span.Start))
		})
		by := map[string][]lang.Change{}
		for _, e := range changes {
			by[e.File] = append(by[e.File], lang.Change{Span: e.Span, New: e.New})
		}
		for name, c := range by {
			now := report.Project.Files[name].Text
			texts[name] = lang.Apply(now, c)
			if lang.Format(now) == now {
				texts[name] = lang.Format(texts[name])
			}
		}
		report = checker.Check(lang.Load(w.names, func(name string) (string, error) {
			if text, ok := texts[name]; ok {
				return text, nil
			}
			return w.read(name)
		}, nil), nil)
	}
	if len(lines) == 0 {
		fmt.Fprintln(out, "Nothing was written: no section was found for a member that fails.")
		if slices.ContainsFunc(members, failing) {
			return errWrong
		}
		return nil
	}
	for _, m := range before.Members {
		file, _ := before.Place(m)
		for _, now := range report.Members {
			if at, _ := report.Place(now); at == file && now.Name == m.Name && !failing(m) && failing(now) {
				return fmt.Errorf("nothing was written: %s passes now and would not any more", m.Name)
			}
		}
	}
	var names []string
	for name := range texts {
		names = append(names, name)
	}
	slices.Sort(names)
	for _, name := range names {
		if err := w.replace(name, texts[name]); err != nil {
			return fmt.Errorf("%s: %w", w.show(name), err)
		}
	}
	for _, line := range lines {
		fmt.Fprintln(out, line)
	}
	for _, name := range names {
		fmt.Fprintln(out, "written: "+w.show(name))
	}
	left := 0
	for _, m := range report.Members {
		if named(m.Name) && failing(m) {
			fmt.Fprintf(out, "%s still %s\n", m.Name, m.Verdict)
			left++
		}
	}
	fmt.Fprintln(out, "\n"+output.Caution)
	if left > 0 {
		return errWrong
	}
	return nil
}
