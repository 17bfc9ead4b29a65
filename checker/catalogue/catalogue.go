// Package catalogue finds rolled and hollow steel sections by designation and
// steel grades by name.
//
// A section is held by its nominal dimensions alone: area, second moments and
// the rest are computed from them by package section. The lists of the hollow
// section standards are largely from memory (each table says which part was
// read), so Entry.Listed is good for a remark and not for a refusal.
package catalogue

import (
	"slices"
	"sync"

	"kern/checker/section"
)

// Product is the kind of steel product that a section is, which decides the
// product standard and the buckling curve.
type Product uint8

// The kinds of product.
const (
	OpenSection Product = iota // hot rolled I or H section, channel, angle, or tee cut from one
	HotHollow                  // hot finished hollow section, EN 10210
	ColdHollow                 // cold formed hollow section, EN 10219, ASTM A500 or A1085
	SteelPipe                  // steel pipe, ASTM A53
)

// String returns the trade's name of the product.
func (p Product) String() string {
	switch p {
	case OpenSection:
		return "rolled open section"
	case HotHollow:
		return "hot finished hollow section"
	case ColdHollow:
		return "cold formed hollow section"
	case SteelPipe:
		return "steel pipe"
	}
	return "unknown product"
}

// Entry is one section of the catalogue.
type Entry struct {
	// Designation is the canonical name: "HEB 200", "UC 203x203x46", "L 150x75x10",
	// "1/2 IPE 300" for a tee of half the depth cut from another section, "SHS
	// 100x100x5" for a hot finished and "SHS 100x100x5 cold" for a cold formed
	// hollow section. American ones are in their own spelling: "W14X90",
	// "HSS8X8X1/2", "HSS6.625X0.280", "Pipe 6 STD", "2L4X3X3/8X3/8 LLBB".
	Designation string
	// Family is IPE, HEAA, HEA, HEB, HEM, HL, HD, HP, UB, UC, UBP, UPN, UPE, PFC, L
	// (angles), T (tees cut from IPE, HEA, HEB, HEM, UB and UC), SHS, RHS, CHS or
	// EHS (elliptical). The American ones, for which American is true, are W, M, S,
	// HP, C, MC, L, WT, MT, ST, 2L (double angles), HSS and PIPE.
	Family string
	// Standard is the standard of dimensions, "EN 10365" for instance; for a tee
	// that of the section it is cut from.
	Standard string
	// Product is the kind of product.
	Product Product
	// Shape holds the nominal dimensions in metres; of an American hollow section
	// and pipe the design wall.
	Shape section.Shape
	// Listed tells whether the standard's list of sizes names this size; false for
	// hollow sections of other sizes and for a few angles. The lists are largely
	// from memory.
	Listed bool
	// Torsion names the formula of the torsion constant that section.Compute finds
	// for the shape: the UK tables (UB, UC, UBP) follow El Darwish and Johnston, the
	// European ones (IPE, HE, HL, HD, HP) the producers' formula. American shapes,
	// channels, tees and angles are computed by El Darwish and Johnston's factors
	// for their shapes.
	Torsion string
	// Assumed names in words what Find took for granted because the designation
	// left it open ("hot finished"); empty if nothing was.
	Assumed string
}

// index is the catalogue made ready for searching.
type index struct {
	entries []Entry
	sizes   []size               // of the entries, for Nearest
	names   map[string]int32     // compact names, see compact
	turned  map[string]int32     // those of unequal angles with the shorter leg first
	hollow  map[hollowSize]int32 // sizes that the standards list
	inches  map[string]int32     // American sizes, see americanName.key
}

// catalogue builds the index at its first use.
var catalogue = sync.OnceValue(func() *index {
	x := &index{
		names:  make(map[string]int32, 8192),
		turned: make(map[string]int32, 256),
		hollow: make(map[hollowSize]int32, 1024),
		inches: make(map[string]int32, 2048),
	}
	for _, e := range rolledEntries() {
		x.add(e)
	}
	x.addTeeSizes()
	for _, l := range hollowLists() {
		for _, size := range l.sizes() {
			x.hollow[size] = int32(len(x.entries))
			x.add(size.entry(true))
		}
	}
	for _, e := range americanEntries() {
		x.addAmerican(e)
	}
	return x
})

// add appends an entry and every compact name that leads to it straight away.
func (x *index) add(e Entry) {
	n := int32(len(x.entries))
	x.entries = append(x.entries, e)
	var buf [maxName]byte
	name, _ := compact(buf[:0], e.Designation)
	x.names[string(name)] = n
	x.sizes = append(x.sizes, sizeOf(&e))
	for _, alias := range aliases(e, string(name)) {
		x.names[alias] = n
	}
	for _, alias := range turnedAliases(e) {
		x.turned[alias] = n
	}
}

// addAmerican appends an American entry. Its names are parsed rather than looked
// up, so that fractions and decimals come to the same.
func (x *index) addAmerican(e Entry) {
	n, ok := parseAmerican(e.Designation)
	if !ok {
		panic("catalogue: bad designation " + e.Designation)
	}
	key, ok := n.key()
	if e.Family == "HSS" {
		h := hollowInches{a: n.size[0], t: n.size[len(n.size)-1]}
		if len(n.size) == 3 {
			h.b = n.size[1]
		}
		key, ok = h.key(), true
	}
	if ok {
		x.inches[key] = int32(len(x.entries))
	}
	x.entries = append(x.entries, e)
	x.sizes = append(x.sizes, americanSize(&e, n))
}

// Families returns the letters of the families in the order in which All gives
// them, each once: for completions.
func Families() []string {
	var out []string
	for i := range catalogue().entries {
		if f := catalogue().entries[i].Family; !slices.Contains(out, f) {
			out = append(out, f)
		}
	}
	return out
}

// All returns every section of the tables, by family and then size, hot finished
// hollow sections before cold formed ones, the American sections last. The slice
// is the caller's own.
func All() []Entry { return slices.Clone(catalogue().entries) }
