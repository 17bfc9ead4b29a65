package size

import (
	"cmp"
	"slices"
	"strings"
	"sync"

	"kern/checker"
	"kern/checker/catalogue"
	"kern/checker/edit"
	"kern/checker/model"
	"kern/checker/section"
	"kern/checker/standard"
	"kern/lang"
)

// candidate is a section of the catalogue that a member may get.
type candidate struct {
	family  string
	product catalogue.Product
	section *model.Section
}

// ofFamily gives the sections of a family by area, each family worked out at its
// first use.
var ofFamily = func() func(family string, american bool) []candidate {
	type key struct {
		family   string
		american bool
	}
	var mu sync.Mutex
	made := map[key][]candidate{}
	return func(family string, american bool) []candidate {
		mu.Lock()
		defer mu.Unlock()
		k := key{family, american}
		if list, ok := made[k]; ok {
			return list
		}
		var out []candidate
		for _, e := range catalogue.All() {
			if e.Family != family || e.American() != american {
				continue
			}
			found, ok := catalogue.Find(e.Designation)
			if !ok {
				continue
			}
			if s, err := model.RolledSection(found); err == nil {
				out = append(out, candidate{family: family, product: e.Product, section: s})
			}
		}
		byArea(out)
		made[k] = out
		return out
	}
}()

func byArea(list []candidate) {
	slices.SortStableFunc(list, func(a, b candidate) int {
		return cmp.Or(cmp.Compare(a.section.Area, b.section.Area), cmp.Compare(a.section.Shape.Depth, b.section.Shape.Depth))
	})
}

// alike are the families, European and American, that may stand for one another:
// of one form, piles left out as nobody builds columns of them by default.
var alike = [][2][]string{
	{{"IPE", "HEAA", "HEA", "HEB", "HEM", "HL", "HD", "UB", "UC"}, {"W", "M", "S"}},
	{{"SHS", "RHS", "CHS", "EHS"}, {"HSS", "PIPE"}},
	{{"UPN", "UPE", "PFC"}, {"C", "MC"}},
	{{"L"}, {"L"}},
	{{"T"}, {"WT", "MT", "ST"}},
	{{}, {"2L"}},
}

var piles = []string{"HP", "UBP"}

// familyOf is the family of a section, by its designation or by its shape; "" for
// one that the catalogue has none of.
func familyOf(s *model.Section) (family string, american bool, product catalogue.Product) {
	if s.Designation != "" {
		if e, ok := catalogue.Find(s.Designation); ok {
			return e.Family, e.American(), e.Product
		}
	}
	hollow := catalogue.HotHollow
	if s.Shape.Made == section.Cold {
		hollow = catalogue.ColdHollow
	}
	switch s.Shape.Kind {
	case section.Tube:
		if s.Shape.Depth == s.Shape.Width {
			return "SHS", false, hollow
		}
		return "RHS", false, hollow
	case section.Pipe:
		return "CHS", false, hollow
	case section.Angle:
		return "L", false, catalogue.OpenSection
	}
	return "", false, catalogue.OpenSection
}

// related are the families that may stand for a section.
func related(s *model.Section, family string, american bool) []string {
	side := 0
	if american {
		side = 1
	}
	for _, group := range alike {
		if slices.Contains(group[side], family) {
			return group[side]
		}
	}
	switch {
	case slices.Contains(piles, family):
		return append([]string{family}, alike[0][side]...)
	case family != "":
		return []string{family}
	}
	switch s.Shape.Kind {
	case section.ISection:
		return alike[0][side]
	case section.Channel:
		return alike[2][side]
	case section.Tee:
		return alike[4][side]
	}
	return nil
}

// candidates are the sections that a member may get, lightest first. Made hot or
// cold stays as it is, as the grade goes with it.
func candidates(r *checker.Result, families []string, o Options) []candidate {
	now := r.Member.Section
	_, american, product := familyOf(now)
	var out []candidate
	for _, f := range families {
		out = append(out, ofFamily(f, american)...)
	}
	hollow := func(p catalogue.Product) bool { return p != catalogue.OpenSection }
	out = slices.DeleteFunc(slices.Clone(out), func(c candidate) bool {
		d, w := Outside(c.section.Shape)
		switch {
		case o.MaxDepth > 0 && d > o.MaxDepth*(1+1e-9), o.MaxWidth > 0 && w > o.MaxWidth*(1+1e-9):
			return true
		case c.section.Designation == now.Designation:
			return true
		case american:
			_, ok := r.Member.Material.Grade, r.Member.Material.Grade != nil
			if ok {
				_, ok = r.Member.Material.Grade.For(c.section.Shape)
			}
			return !ok && r.Member.Material.Grade != nil
		}
		if hollow(c.product) && hollow(product) {
			return c.product != product
		}
		return hollow(c.product) != hollow(product) && !suits(r.Member.Material, c.product)
	})
	for i, c := range out {
		// the wall of an American hollow section counts by its standard
		if american && catalogue.HollowStandard(c.section.Standard) && catalogue.HollowStandard(now.Standard) && now.Standard != c.section.Standard {
			if e, ok := catalogue.Find(c.section.Designation + " " + strings.TrimPrefix(now.Standard, "ASTM ")); ok {
				if s, err := model.RolledSection(e); err == nil {
					out[i].section = s
				}
			}
		}
	}
	byArea(out)
	return out
}

// suits tells whether a European grade is made in a kind of product.
func suits(m *model.Material, p catalogue.Product) bool {
	if m.Grade == nil {
		return true
	}
	in := map[catalogue.Product]string{catalogue.HotHollow: "EN 10210", catalogue.ColdHollow: "EN 10219"}[p]
	of := strings.HasPrefix(m.Grade.Standard, "EN 10210") || strings.HasPrefix(m.Grade.Standard, "EN 10219")
	if in == "" {
		return !of
	}
	return strings.HasPrefix(m.Grade.Standard, in)
}

// Outside gives the outside dimensions of a section, m; 0 where they are not
// known.
func Outside(s section.Shape) (depth, width float64) {
	switch s.Kind {
	case section.Pipe, section.Rod:
		return s.Diameter, s.Diameter
	case section.DoubleAngle:
		return s.Depth, 2*s.Width + s.Gap
	}
	return s.Depth, s.Width
}

// fixed says why a member's section is not to be changed by itself, "" when it
// may be.
func fixed(m *model.Member) string {
	switch {
	case m.Section == nil || m.Material == nil:
		return "it has no section"
	case len(m.Lifts) > 0:
		return "it has lifts with sections of their own"
	case m.Imported != nil:
		return "its forces come from an analysis with the section that it has"
	case m.Net == m.Net:
		return "its net area is stated for the section that it has"
	case m.Joints[0] != nil || m.Joints[1] != nil:
		return "the stiffness ratios of its joints are stated for the section that it has"
	}
	return ""
}

// sections gives the lightest section of the member's own family and of all that
// are allowed.
func (s *subject) sections(o Options) []Mend {
	m := s.r.Member
	if fixed(m) != "" {
		return nil
	}
	family, american, _ := familyOf(m.Section)
	allowed := o.Families
	if allowed == nil {
		allowed = related(m.Section, family, american)
	}
	t := s.trial()
	var out []Mend
	try := func(families []string) {
		if mend, ok := s.lightest(t, candidates(s.r, families, o)); ok {
			if !slices.ContainsFunc(out, func(x Mend) bool { return x.Change == mend.Change }) {
				out = append(out, mend)
			}
		}
	}
	if slices.Contains(allowed, family) {
		try([]string{family})
	}
	if len(allowed) > 1 || !slices.Contains(allowed, family) {
		try(allowed)
	}
	return out
}

// lightest finds the first candidate with which the member passes; for a member
// that passes, one that is lighter than what it has.
func (s *subject) lightest(t *trial, list []candidate) (Mend, bool) {
	j := newJudge(s.r)
	passes := s.r.Verdict == standard.Passes
	refused := 0
	for _, c := range list {
		if passes && c.section.Area >= s.r.Member.Section.Area*(1-1e-9) {
			break
		}
		if _, ok := j.passes(swap(c.section)); !ok {
			continue
		}
		changes, ok := s.say("section", `section = "`+c.section.Designation+`"`)
		if !ok {
			return Mend{}, false
		}
		if r, ok := t.passes(changes); ok {
			mend := s.mend(Section, c.section.Designation, r, changes)
			mend.Family = c.family
			if offset(s.r.Member) {
				mend.Note = "offsets of loads stay as they are: look whether they follow the size of the section"
			}
			return mend, true
		}
		if refused++; refused > 20 {
			break // others that are "as" this member hold it back, or the text does
		}
	}
	return Mend{}, false
}

func swap(to *model.Section) func(m *model.Member) {
	return func(m *model.Member) { m.Section = to }
}

// offset tells whether a load stands off the centroid.
func offset(m *model.Member) bool {
	return slices.ContainsFunc(m.Loads, func(l model.Load) bool { return l.Offset != [2]float64{} })
}

func used(r *checker.Result) float64 {
	u, _, _ := Used(r)
	return u
}

// shared are the members whose section is given in one place with that of the
// subject: a section that has a name, or a line that others take over. place is
// what is to be replaced there.
func (s *subject) shared() (users []*checker.Result, at edit.Line, ok bool) {
	m := s.r.Member
	if m.Section == nil {
		return nil, edit.Line{}, false
	}
	var named *model.Named
	for _, n := range m.Uses {
		if n.Kind == model.SectionName && n.Index >= 0 && n.Index < len(s.r.Env().Sections) && s.r.Env().Sections[n.Index] == m.Section {
			named = n
		}
	}
	for _, r := range s.report.Members {
		u := r.Member
		switch {
		case u.Section == nil || len(r.Missing) > 0:
		case named != nil && slices.ContainsFunc(u.Uses, func(n *model.Named) bool { return n.Place == named.Place }):
			if u.Section != m.Section && !u.Section.Same(m.Section) || fixed(u) != "" {
				return nil, edit.Line{}, false
			}
			users = append(users, r)
		case named == nil && u.SectionAt == m.SectionAt:
			if fixed(u) != "" {
				return nil, edit.Line{}, false
			}
			users = append(users, r)
		}
	}
	if named != nil {
		return users, edit.Line{Decl: named.Place.Decl, Stmt: named.Stmt}, !named.Twice
	}
	for _, l := range edit.Lines(s.calcs[0].Env, s.line) {
		if l.Stmt.Word == "section" {
			return users, l, true
		}
	}
	return nil, edit.Line{}, false
}

// group gives the lightest section that serves all members that share one.
func (s *subject) group(o Options) []Mend {
	users, at, ok := s.shared()
	if !ok || len(users) < 2 || fixed(s.r.Member) != "" {
		return nil
	}
	family, american, _ := familyOf(s.r.Member.Section)
	allowed := o.Families
	if allowed == nil {
		allowed = related(s.r.Member.Section, family, american)
	}
	order := slices.Clone(users)
	slices.SortStableFunc(order, func(a, b *checker.Result) int { return cmp.Compare(b.Utilisation, a.Utilisation) })
	var judges []*judge
	all := true
	for _, r := range order {
		judges = append(judges, newJudge(r))
		all = all && r.Verdict == standard.Passes
	}
	var out []Mend
	try := func(families []string) {
		for _, c := range candidates(s.r, families, o) {
			if (all || s.r.Verdict == standard.Passes) && c.section.Area >= s.r.Member.Section.Area*(1-1e-9) {
				return
			}
			var worst *checker.Result
			fits := true
			for _, j := range judges {
				r, ok := j.passes(swap(c.section))
				if fits = ok; !ok {
					break
				}
				if worst == nil || used(r) > used(worst) {
					worst = r
				}
			}
			if !fits {
				continue
			}
			if slices.ContainsFunc(out, func(x Mend) bool { return x.Change == c.section.Designation }) {
				return
			}
			from, ok := valueStart(at.Stmt)
			if !ok {
				return
			}
			file, span := s.report.Where(lang.Place{Decl: at.Decl, Span: lang.Span{Start: from, End: at.Stmt.Span.End}})
			mass := c.section.Area * s.r.Member.Material.Density
			most, governing, under := Used(worst)
			mend := Mend{Kind: Group, Change: c.section.Designation, Family: c.family, Utilisation: most, Governing: governing, Combination: under,
				MassPerLength: mass, Added: mass - Mass(s.r), Value: nan, Now: nan, Place: s.r.Member.SectionAt,
				edits: func() []checker.Edit {
					return s.layout.Tidy([]checker.Edit{{File: file, Span: span, New: `"` + c.section.Designation + `"`}})
				}}
			for _, u := range users {
				mend.Serves = append(mend.Serves, u.Name)
			}
			out = append(out, mend)
			return
		}
	}
	if slices.Contains(allowed, family) {
		try([]string{family})
	}
	if len(allowed) > 1 || !slices.Contains(allowed, family) {
		try(allowed)
	}
	return out
}

// valueStart is where the value of a statement begins: behind its sign =.
func valueStart(s *lang.Stmt) (int32, bool) {
	for i, e := range s.Args {
		if e.Kind == lang.EqualsExpr && i+1 < len(s.Args) {
			return s.Args[i+1].Span.Start, true
		}
	}
	return 0, false
}
