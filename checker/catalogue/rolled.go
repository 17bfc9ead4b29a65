package catalogue

import (
	"strconv"

	"kern/checker/section"
)

// rolledRow is one line of such a table: the number in the
// designation and the nominal dimensions, all in millimetres.
type rolledRow struct {
	size         int     // the number that follows the family's letters
	h, b, tw, tf float64 // overall depth, flange width, web and flange thickness
	r            float64 // root radius
	toe          float64 // toe radius of a taper flange, else 0
}

// series is a family of rolled sections.
type series struct {
	family   string
	standard string
	rows     []rolledRow
}

// openSeries lists the rolled families whose designation ends in one number, in
// the order in which rolledEntries takes them.
func openSeries() []series {
	return []series{
		{"IPE", "EN 10365", ipeRows},
		{"HEA", "EN 10365", heaRows},
		{"HEB", "EN 10365", hebRows},
		{"HEM", "EN 10365", hemRows},
		{"UPN", "EN 10365", upnRows},
		{"UPE", "EN 10365", upeRows},
	}
}

// entry builds the catalogue's line of a rolled section.
func (s series) entry(r rolledRow) Entry {
	e := Entry{
		Designation: s.family + " " + strconv.Itoa(r.size),
		Family:      s.family,
		Standard:    s.standard,
		Product:     OpenSection,
		Listed:      true,
		Shape: section.Shape{
			Kind:   section.ISection,
			Made:   section.Rolled,
			Depth:  metres(r.h),
			Width:  metres(r.b),
			Web:    metres(r.tw),
			Flange: metres(r.tf),
			Root:   metres(r.r),
		},
		Torsion: torsionProducer,
	}
	switch s.family {
	case "UPE":
		e.Shape.Kind, e.Torsion = section.Channel, torsionJunction
	case "UPN":
		e.Shape.Kind, e.Torsion = section.Channel, torsionJunction
		e.Shape.Toe = metres(r.toe)
		e.Shape.Taper, e.Shape.TaperAt = section.StandardTaper(e.Shape.Depth, e.Shape.Width, e.Shape.Web)
		if r.size < upnSmallest {
			e.Standard = "DIN 1026-1"
		}
	}
	return e
}

// metres turns a nominal dimension in millimetres into metres.
func metres(mm float64) float64 { return mm / 1000 }
