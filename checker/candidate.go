package checker

import (
	"cmp"
	"slices"
	"strings"
	"sync"

	"kern/checker/catalogue"
	"kern/checker/model"
	"kern/checker/section"
)

// Candidate is a section of the catalogue that a member may get.
type Candidate struct {
	Family  string
	Product catalogue.Product
	Section *model.Section
}

// ofFamily gives the sections of a family by area, each family worked out at its
// first use.
var ofFamily = func() func(family string, american bool) []Candidate {
	type key struct {
		family   string
		american bool
	}
	var mu sync.Mutex
	made := map[key][]Candidate{}
	return func(family string, american bool) []Candidate {
		mu.Lock()
		defer mu.Unlock()
		k := key{family, american}
		if list, ok := made[k]; ok {
			return list
		}
		var out []Candidate
		for _, e := range catalogue.All() {
			if e.Family != family || e.American() != american {
				continue
			}
			found, ok := catalogue.Find(e.Designation)
			if !ok {
				continue
			}
			if s, err := model.RolledSection(found); err == nil {
				out = append(out, Candidate{Family: family, Product: e.Product, Section: s})
			}
		}
		byArea(out)
		made[k] = out
		return out
	}
}()

func byArea(list []Candidate) {
	slices.SortStableFunc(list, func(a, b Candidate) int {
		return cmp.Or(cmp.Compare(a.Section.Area, b.Section.Area), cmp.Compare(a.Section.Shape.Depth, b.Section.Shape.Depth))
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

// FamilyOf is the family of a section, by its designation or by its shape; "" for
// one that the catalogue has none of.
func FamilyOf(s *model.Section) (family string, american bool, product catalogue.Product) {
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

// Alike are the families that may stand for a section, by default.
func Alike(s *model.Section, family string, american bool) []string {
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

// Candidates are the sections of some families that the member may get, lightest
// first, with the greatest outside dimensions, m; 0 for none. Made hot or cold
// stays as it is, as the grade goes with it. The section that it has is not among
// them.
func (r *Result) Candidates(families []string, depth, width float64) []Candidate {
	now := r.Member.Section
	_, american, product := FamilyOf(now)
	var out []Candidate
	for _, f := range families {
		out = append(out, ofFamily(f, american)...)
	}
	hollow := func(p catalogue.Product) bool { return p != catalogue.OpenSection }
	out = slices.DeleteFunc(slices.Clone(out), func(c Candidate) bool {
		d, w := Outside(c.Section.Shape)
		switch {
		case depth > 0 && d > depth*(1+1e-9), width > 0 && w > width*(1+1e-9):
			return true
		case c.Section.Designation == now.Designation:
			return true
		case american:
			_, ok := r.Member.Material.Grade, r.Member.Material.Grade != nil
			if ok {
				_, ok = r.Member.Material.Grade.For(c.Section.Shape)
			}
			return !ok && r.Member.Material.Grade != nil
		}
		if hollow(c.Product) && hollow(product) {
			return c.Product != product
		}
		return hollow(c.Product) != hollow(product) && !suits(r.Member.Material, c.Product)
	})
	for i, c := range out {
		// the wall of an American hollow section counts by its standard
		if american && catalogue.HollowStandard(c.Section.Standard) && catalogue.HollowStandard(now.Standard) && now.Standard != c.Section.Standard {
			if e, ok := catalogue.Find(c.Section.Designation + " " + strings.TrimPrefix(now.Standard, "ASTM ")); ok {
				if s, err := model.RolledSection(e); err == nil {
					out[i].Section = s
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

// Fixed says why a member's section is not to be changed by itself, "" when it
// may be.
func Fixed(m *model.Member) string {
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
