package model

import (
	"errors"
	"fmt"
	"math"
	"sync"

	"kern/checker/catalogue"
	"kern/checker/derivation"
	"kern/checker/section"
	"kern/lang"
	"kern/lang/unit"
)

// sections reads the cross-sections.
func (b *builder) sections() {
	for _, d := range b.of("section") {
		r := b.reader(d)
		name := r.name("a section")
		if name == nil {
			continue
		}
		n := b.env.Names[name.Text]
		if n == nil || n.Stmt != d.stmt {
			continue // given twice, or a word that the language has taken
		}
		s := &Section{Name: name.Text, Place: r.place(name.Span)}
		n.Index = len(b.env.Sections)
		b.env.Sections = append(b.env.Sections, s)
		if e := r.take(); e == nil || e.Kind != lang.EqualsExpr {
			r.fail("wrong-form", d.stmt.Line, "a section is a catalogue name or a shape: section %s = \"HEB 160\", or section %s = tube { … }", name.Text, name.Text)
			s.Bad = true
			continue
		}
		s.Bad = !readSection(r, b.reader, d, s) || hurt(d.decl, d.stmt)
	}
}

// readSection reads what stands behind the sign of a section: a designation or
// a shape with its block.
func readSection(r *reader, newReader func(declared) *reader, d declared, s *Section) bool {
	e := r.peek()
	if e != nil && e.Kind == lang.StringExpr {
		r.take()
		if !fromCatalogue(r, e, s) {
			return false
		}
		if d.stmt.Body != nil {
			r.fail("left-over", d.stmt.Body.Span, "a catalogue section takes no block")
		}
		return r.end()
	}
	if p, found := r.inQuotes("a section of the catalogue", inCatalogue); found {
		r.problem(p)
		return false
	}
	word, ok := r.wordOf("the shape", shapeWords...)
	if !ok {
		return false
	}
	if !r.end() {
		return false
	}
	if d.stmt.Body == nil {
		r.fail("wrong-form", d.stmt.Line, "a %s has a block with its dimensions: %s", word, shapeForms[word])
		return false
	}
	if word == "given" {
		return givenSection(r, newReader, d, s)
	}
	return shapedSection(r, newReader, d, s, word)
}

var shapeWords = []string{"tube", "pipe", "bar", "rod", "isection", "channel", "tee", "angle", "doubleangle", "given"}

var shapeForms = map[string]string{
	"tube":        "tube { width = 90 mm; wall = 6.3 mm; made = cold }",
	"pipe":        "pipe { outside = 168.3 mm; wall = 8 mm; made = hot }",
	"bar":         "bar { width = 60 mm; depth = 90 mm }",
	"rod":         "rod { diameter = 50 mm }",
	"isection":    "isection { depth = 400 mm; width = 200 mm; web = 8 mm; flange = 14 mm; made = welded }",
	"channel":     "channel { depth = 200 mm; width = 75 mm; web = 8 mm; flange = 11 mm; made = rolled }",
	"tee":         "tee { depth = 150 mm; width = 150 mm; web = 8 mm; flange = 12 mm; made = welded }",
	"angle":       "angle { depth = 100 mm; width = 75 mm; wall = 8 mm; root = 10 mm }",
	"doubleangle": "doubleangle { depth = 100 mm; width = 75 mm; wall = 8 mm; gap = 10 mm }",
	"given":       "given { A = 24.1 cm2; I_major = 612 cm4; I_minor = 201 cm4; curve = c }",
}

// rolled caches the computed properties of catalogue sections: they never
// change while the program runs.
var rolled sync.Map // designation -> *section.Properties

func fromCatalogue(r *reader, e *lang.Expr, s *Section) bool {
	entry, ok := catalogue.Find(e.Text)
	if n := r.env.Names[e.Text]; !ok && n != nil && n.Kind == SectionName {
		r.problem(unquoted(e, "a section of the calculation"))
		return false
	}
	if !ok {
		near := catalogue.Nearest(e.Text, 4)
		p := lang.Problem{Rule: "unknown-section", Span: e.Span, Message: "'" + clip(e.Text) + "' is no section of the catalogue"}
		if len(near) > 0 {
			p.Message += "; the nearest are " + lang.OrList(near)
		}
		for _, n := range near {
			p.Fixes = append(p.Fixes, lang.Replace("Write "+n, false, e.Span, `"`+n+`"`))
		}
		r.problem(p)
		return false
	}
	if err := s.roll(entry); err != nil {
		r.fail("impossible-section", e.Span, "%s: %v", entry.Designation, err)
		return false
	}
	return true
}

// RolledSection is a section of the catalogue as a calculation has it that names
// its designation. Whoever uses the section gives it its name and place.
func RolledSection(entry catalogue.Entry) (*Section, error) {
	s := &Section{}
	return s, s.roll(entry)
}

// roll gives a section the dimensions and properties of one of the catalogue.
func (s *Section) roll(entry catalogue.Entry) error {
	s.Designation, s.Standard, s.Shape = entry.Designation, entry.Standard, entry.Shape
	if entry.Assumed != "" {
		s.Assumed = append(s.Assumed, entry.Designation+" taken as "+entry.Assumed)
	}
	if !entry.Listed {
		s.Assumed = append(s.Assumed, entry.Designation+" is not among the common sizes of "+entry.Standard)
	}
	s.assumePair()
	if p, ok := rolled.Load(entry.Designation); ok {
		s.Properties = *p.(*section.Properties)
	} else {
		props, err := section.Compute(entry.Shape)
		if err != nil {
			return err
		}
		rolled.Store(entry.Designation, &props)
		s.Properties = props
	}
	s.Thickness = thickest(s.Shape)
	return nil
}

// thickest is the thickness that decides a grade's strength.
func thickest(s section.Shape) float64 {
	switch s.Kind {
	case section.Bar:
		return min(s.Depth, s.Width)
	case section.Rod:
		return s.Diameter
	}
	return max(s.Web, s.Flange, s.Wall)
}

var wantSize = want{what: "a size of the section", dim: unit.Length, unit: "mm", min: 2e-3, max: 5}
var wantWall = want{what: "a thickness", dim: unit.Length, unit: "mm", min: 0.3e-3, max: 0.5}
var wantRadius = want{what: "a radius", dim: unit.Length, unit: "mm", max: 0.5, zero: true}

// shapedSection reads the dimensions of a shape.
func shapedSection(r *reader, newReader func(declared) *reader, d declared, s *Section, word string) bool {
	shape := &s.Shape
	places := map[string]lang.Span{}
	corner := math.NaN()
	set := func(to *float64, w want) func(r *reader) {
		return func(r *reader) {
			w.what = "the " + r.stmt.Word
			if v, span, ok := r.quantity(w); ok {
				*to = v
				places[r.stmt.Word] = span
			}
		}
	}
	made := func(allowed ...string) func(r *reader) {
		return func(r *reader) {
			if w, ok := r.wordOf("the way of making", allowed...); ok {
				shape.Made = map[string]section.Made{"rolled": section.Rolled, "hot": section.Hot, "cold": section.Cold, "welded": section.Welded}[w]
			}
		}
	}
	var take map[string]func(r *reader)
	var need []string
	plates := map[string]func(r *reader){"depth": set(&shape.Depth, wantSize), "width": set(&shape.Width, wantSize), "web": set(&shape.Web, wantWall),
		"flange": set(&shape.Flange, wantWall), "root": set(&shape.Root, wantRadius), "made": made("rolled", "welded")}
	switch word {
	case "tube":
		shape.Kind = section.Tube
		take = map[string]func(r *reader){"depth": set(&shape.Depth, wantSize), "width": set(&shape.Width, wantSize), "wall": set(&shape.Wall, wantWall),
			"corner": set(&corner, wantRadius), "made": made("hot", "cold", "welded")}
		need = []string{"width", "wall"}
	case "pipe":
		shape.Kind = section.Pipe
		take = map[string]func(r *reader){"outside": set(&shape.Diameter, wantSize), "wall": set(&shape.Wall, wantWall), "made": made("hot", "cold", "welded")}
		need = []string{"outside", "wall"}
	case "bar":
		shape.Kind = section.Bar
		take = map[string]func(r *reader){"depth": set(&shape.Depth, wantSize), "width": set(&shape.Width, wantSize)}
		need = []string{"width"}
	case "rod":
		shape.Kind = section.Rod
		take = map[string]func(r *reader){"diameter": set(&shape.Diameter, wantSize)}
		need = []string{"diameter"}
	case "isection":
		shape.Kind, take = section.ISection, plates
		need = []string{"depth", "width", "web", "flange"}
	case "channel":
		shape.Kind, take = section.Channel, plates
		take["toe"] = set(&shape.Toe, wantRadius)
		need = []string{"depth", "width", "web", "flange"}
	case "tee":
		shape.Kind, take = section.Tee, plates
		need = []string{"depth", "width", "web", "flange"}
	case "angle", "doubleangle":
		shape.Kind = section.Angle
		take = map[string]func(r *reader){"depth": set(&shape.Depth, wantSize), "width": set(&shape.Width, wantSize), "wall": set(&shape.Wall, wantWall),
			"root": set(&shape.Root, wantRadius), "toe": set(&shape.Toe, wantRadius), "made": made("rolled", "welded")}
		need = []string{"depth", "wall"}
		if word == "doubleangle" {
			shape.Kind = section.DoubleAngle
			take["gap"] = set(&shape.Gap, wantRadius)
		}
	}
	if !readBody(newReader, word, d, d.stmt.Body, take) {
		return false
	}
	if hurt(d.decl, d.stmt) {
		return false // what is missing may stand where it could not be read
	}
	for _, n := range need {
		if _, ok := places[n]; !ok {
			r.problem(lang.Problem{Rule: "missing-value", Span: s.Place.Span, Message: fmt.Sprintf("the %s lacks its %s: %s", word, n, shapeForms[word])})
			return false
		}
	}
	s.complete(corner, r.env.Basis.Show)
	var shapeErr *section.ShapeError
	props, err := section.Compute(*shape)
	if errors.As(err, &shapeErr) {
		f := shapeErr.Faults[0]
		if f.Field == "outer" || f.Field == "inner" {
			f.Field = "corner"
		}
		span, ok := places[f.Field]
		if !ok {
			span = d.stmt.Line
		}
		r.fail("impossible-section", span, "%s", f.In(func(v float64) string { return r.env.Basis.Show.Short(v, unit.Length, 6) }))
		return false
	}
	if err != nil {
		r.fail("impossible-section", d.stmt.Line, "%v", err)
		return false
	}
	s.Properties = props
	s.Thickness = thickest(*shape)
	return true
}

// assumePair names what every check of a pair of angles takes for granted.
func (s *Section) assumePair() {
	if s.Shape.Kind == section.DoubleAngle {
		s.Assumed = append(s.Assumed, "the two angles of "+s.Title()+" act as one: connectors hold them so closely that neither buckles or slips between")
	}
}

// complete fills in what a shape leaves open, each as an assumption, in the units that
// results are shown in.
func (s *Section) complete(corner float64, units derivation.Units) {
	shape := &s.Shape
	assume := func(format string, args ...any) { s.Assumed = append(s.Assumed, fmt.Sprintf(format, args...)) }
	switch shape.Kind {
	case section.Tube, section.Bar:
		if shape.Depth == 0 {
			shape.Depth = shape.Width
		}
	case section.Angle, section.DoubleAngle:
		if shape.Width == 0 {
			shape.Width = shape.Depth
		}
	}
	s.assumePair()
	if shape.Made == section.MadeUnknown {
		switch shape.Kind {
		case section.Tube, section.Pipe:
			shape.Made = section.Cold
			assume("'%s' taken as cold formed (made is not given)", s.Name)
		case section.ISection, section.Channel, section.Tee:
			if shape.Root > 0 {
				shape.Made = section.Rolled
				assume("'%s' taken as rolled, as it has root fillets (made is not given)", s.Name)
			} else {
				shape.Made = section.Welded
				assume("'%s' taken as welded, as it has no root fillets (made is not given)", s.Name)
			}
		case section.Angle, section.DoubleAngle:
			shape.Made = section.Rolled
			assume("'%s' taken as rolled (made is not given)", s.Name)
		}
	}
	if shape.Kind == section.Tube {
		if math.IsNaN(corner) {
			shape.OuterRadius, shape.InnerRadius = section.DefaultRadii(shape.Made, shape.Wall)
			if shape.OuterRadius > 0 {
				assume("'%s' with corners of outside radius %s (corner is not given)", s.Name, units.Short(shape.OuterRadius, unit.Length, 3))
			}
		} else {
			s.CornerStated = true
			shape.OuterRadius = corner
			shape.InnerRadius = max(0, corner-shape.Wall)
		}
	}
}

// givenSection reads properties that the user states.
func givenSection(r *reader, newReader func(declared) *reader, d declared, s *Section) bool {
	s.Shape.Kind = section.Given
	s.Thickness = math.NaN()
	p := &s.Properties
	nan := math.NaN()
	*p = section.Properties{Area: nan, IMajor: nan, IMinor: nan, WelMajor: nan, WelMinor: nan, WplMajor: nan, WplMinor: nan, It: nan, Iw: nan, AvMajor: nan, AvMinor: nan}
	places := map[string]lang.Span{}
	set := func(to *float64, w want) func(r *reader) {
		return func(r *reader) {
			if v, span, ok := r.quantity(w); ok {
				*to, places[r.stmt.Word] = v, span
			}
		}
	}
	i4 := func(what string, zero bool) want {
		return want{what: what, dim: unit.Length4, unit: "cm4", min: 1e-12, max: 1, zero: zero}
	}
	w3 := func(what string) want {
		return want{what: what, dim: unit.Volume, unit: "cm3", min: 1e-9, max: 1}
	}
	curve := func(to ...*string) func(r *reader) {
		return func(r *reader) {
			if w, ok := r.wordOf("the buckling curve", "a0", "a", "b", "c", "d"); ok {
				for _, t := range to {
					if *t == "" {
						*t = w
					}
				}
			}
		}
	}
	class := 0.0
	ok := readBody(newReader, "given section", d, d.stmt.Body, map[string]func(r *reader){
		"A":       set(&p.Area, want{what: "the area", dim: unit.Area, unit: "cm2", min: 1e-6, max: 10}),
		"I_major": set(&p.IMajor, i4("the second moment of area", false)), "I_minor": set(&p.IMinor, i4("the second moment of area", false)),
		"W_major": set(&p.WelMajor, w3("the elastic section modulus")), "W_minor": set(&p.WelMinor, w3("the elastic section modulus")),
		"Wpl_major": set(&p.WplMajor, w3("the plastic section modulus")), "Wpl_minor": set(&p.WplMinor, w3("the plastic section modulus")),
		"A_v_major": set(&p.AvMajor, want{what: "the shear area", dim: unit.Area, unit: "cm2", min: 1e-6, max: 10}),
		"A_v_minor": set(&p.AvMinor, want{what: "the shear area", dim: unit.Area, unit: "cm2", min: 1e-6, max: 10}),
		"I_t":       set(&p.It, i4("the torsion constant", true)),
		"I_w":       set(&p.Iw, want{what: "the warping constant", dim: unit.Length6, unit: "cm6", max: 1, zero: true}),
		"thickness": set(&s.Thickness, wantWall),
		"class":     set(&class, want{what: "the cross-section class"}),
		"curve":     curve(&s.CurveMajor, &s.CurveMinor), "curve_major": curve(&s.CurveMajor), "curve_minor": curve(&s.CurveMinor),
	})
	if !ok {
		return false
	}
	for _, n := range []struct {
		name  string
		value float64
	}{{"A", p.Area}, {"I_major", p.IMajor}, {"I_minor", p.IMinor}} {
		if math.IsNaN(n.value) {
			r.problem(lang.Problem{Rule: "missing-value", Span: s.Place.Span, Message: fmt.Sprintf("the section lacks its %s: %s", n.name, shapeForms["given"])})
			return false
		}
	}
	if _, given := places["class"]; given && (class != math.Trunc(class) || class > 4) {
		r.problem(lang.Problem{Rule: "impossible-value", Span: places["class"], Message: "a cross-section class is 1, 2, 3 or 4"})
		return false
	}
	s.Class = int(class)
	if p.IMinor > p.IMajor {
		r.problem(lang.Problem{Rule: "impossible-section", Span: places["I_minor"], Message: "I_minor is larger than I_major: the major axis is the strong one"})
		return false
	}
	p.RMajor, p.RMinor = math.Sqrt(p.IMajor/p.Area), math.Sqrt(p.IMinor/p.Area)
	return true
}
