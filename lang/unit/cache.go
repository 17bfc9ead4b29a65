package unit

import (
	"hash/maphash"
	"strings"
	"sync/atomic"
)

// A file of 100,000 lines uses a few dozen different unit texts, so that
// remembering the last ones makes reading a unit one hash and one comparison.
// The memory is a fixed table of pairs of places: it cannot grow whatever the
// input is, and goroutines share it without a lock because an entry never
// changes once it can be seen.
const places = 1024 // pairs; a power of two

var (
	seed   = maphash.MakeSeed()
	memory [places][2]atomic.Pointer[Unit]
)

// remembered returns the pair of places that a text may stand in, and the unit
// if one of them holds it.
func remembered(text string) (*[2]atomic.Pointer[Unit], *Unit) {
	pair := &memory[maphash.String(seed, text)%places]
	for i := range pair {
		if u := pair[i].Load(); u != nil && u.Symbol == text {
			return pair, u
		}
	}
	return pair, nil
}

// remember puts u into its pair in place of the older entry. Two goroutines
// may lose an entry to each other here, which only costs a second reading.
func remember(pair *[2]atomic.Pointer[Unit], u Unit) *Unit {
	// The symbol is often a piece of a large file, which must not be kept.
	u.Symbol = strings.Clone(u.Symbol)
	pair[1].Store(pair[0].Load())
	pair[0].Store(&u)
	return &u
}
