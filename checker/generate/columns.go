// Package generate writes calculations of any size for tests and benchmarks.
package generate

import (
	"fmt"
	"math/rand/v2"
	"strings"
)

// Shared is a basis with EN 1993-1-1 and EN 1990, four cases (26 combinations),
// materials and sections.
const Shared = `basis {
    standard "EN 1993-1-1:2005" annex "recommended"
    actions  "EN 1990:2002" eq "6.10"
    show     kN, mm, MPa
}

material s355  = "S355" per "EN 10025-2"
material s355h = "S355H" per "EN 10210-1"

section s0 = "HEB 200"
section s1 = "HEA 240"
section s2 = "IPE 300"
section s3 = "SHS 120x120x6.3"
section s4 = "CHS 168.3x8"
section s5 = tube { width = 120 mm; depth = 180 mm; wall = 6 mm; made = cold }

case G permanent
case Q imposed "B"
case S snow "below 1000 m"
case W wind

`

// Columns writes n columns, no two with the same loads, to a seed. Most pass.
func Columns(n int, seed uint64) string {
	r := rand.New(rand.NewPCG(seed, 1))
	var b strings.Builder
	b.Grow(n * 420)
	for i := range n {
		section := r.IntN(6)
		material := "s355"
		if section >= 3 {
			material = "s355h"
		}
		height := 2.4 + 0.05*float64(r.IntN(60))
		fmt.Fprintf(&b, "column C%d \"Column on grid %d\" {\n", i, i)
		fmt.Fprintf(&b, "    section  = s%d\n    material = %s\n    height   = %.2f m\n", section, material, height)
		base := []string{"pinned", "fixed"}[r.IntN(2)]
		fmt.Fprintf(&b, "    base %s\n    top  pinned\n", base)
		if r.IntN(3) == 0 {
			fmt.Fprintf(&b, "    hold minor at %.2f m\n", height/2)
		}
		fmt.Fprintf(&b, "    load G %.1f kN at top\n", 40+float64(r.IntN(3000))/10)
		fmt.Fprintf(&b, "    load Q %.1f kN at top\n", 30+float64(r.IntN(2000))/10)
		fmt.Fprintf(&b, "    load S %.1f kN at top\n", 5+float64(r.IntN(500))/10)
		fmt.Fprintf(&b, "    load W %.1f kN at top\n", 2+float64(r.IntN(300))/10)
		b.WriteString("}\n\n")
	}
	return b.String()
}

// Project splits n columns over files of at most 500, each with the shared
// definitions included.
func Project(n int, seed uint64) map[string]string {
	files := map[string]string{"shared.kern": Shared}
	for i := 0; i*500 < n; i++ {
		files[fmt.Sprintf("columns%04d.kern", i)] = "include \"shared.kern\"\n\n" + Columns(min(500, n-i*500), seed+uint64(i))
	}
	return files
}
