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
	OpenSection Product = iota // hot rolled I, H or channel section
	HotHollow                  // hot finished hollow section, EN 10210
	ColdHollow                 // cold formed hollow section, EN 10219
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
	}
	return "unknown product"
}

// Entry is one section of the catalogue.
type Entry struct {
	// Designation is the canonical name: "HEB 200", "SHS 100x100x5" for a hot
	// finished and "SHS 100x100x5 cold" for a cold formed hollow section.
	Designation string
	// Family is IPE, HEA, HEB, HEM, UPN, UPE, SHS, RHS or CHS.
	Family string
	// Standard is the standard of dimensions, "EN 10365" for instance.
	Standard string
	// Product is the kind of product.
	Product Product
	// Shape holds the nominal dimensions in metres.
	Shape section.Shape
	// Listed tells whether the standard's list of common sizes names this size;
	// false only for hollow sections. The lists are largely from memory.
	Listed bool
	// Assumed names in words what Find took for granted because the designation
	// left it open ("hot finished"); empty if nothing was.
	Assumed string
}

// index is the catalogue made ready for searching.
type index struct {
	entries []Entry
	names   map[string]int32     // compact names, see compact
	hollow  map[hollowSize]int32 // sizes that the standards list
}

// catalogue builds the index at its first use.
var catalogue = sync.OnceValue(func() *index {
	x := &index{
		names:  make(map[string]int32, 4096),
		hollow: make(map[hollowSize]int32, 1024),
	}
	for _, s := range openSeries() {
		for _, r := range s.rows {
			x.add(s.entry(r))
		}
	}
	for _, l := range hollowLists() {
		for _, size := range l.sizes() {
			x.hollow[size] = int32(len(x.entries))
			x.add(size.entry(true))
		}
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
	for _, alias := range aliases(e, string(name)) {
		x.names[alias] = n
	}
}

// All returns every listed section, by family and then size, hot finished
// hollow sections before cold formed ones. The slice is the caller's own.
func All() []Entry { return slices.Clone(catalogue().entries) }
