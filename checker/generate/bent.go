package generate

import (
	"fmt"
	"math/rand/v2"
	"strings"
)

// BentColumns writes n columns that are pressed and bent about both axes in every
// combination: floor loads off the centroid and wind across, so that
// lateral-torsional buckling and the interaction of compression with bending are
// checked too. Most pass.
func BentColumns(n int, seed uint64) string {
	r := rand.New(rand.NewPCG(seed, 2))
	var b strings.Builder
	b.Grow(n * 560)
	for i := range n {
		section := r.IntN(6)
		material := "s355"
		if section >= 3 {
			material = "s355h"
		}
		height := 2.4 + 0.05*float64(r.IntN(40))
		fmt.Fprintf(&b, "column C%d \"Column on grid %d\" {\n", i, i)
		fmt.Fprintf(&b, "    section  = s%d\n    material = %s\n    height   = %.2f m\n", section, material, height)
		if r.IntN(3) == 0 {
			fmt.Fprintf(&b, "    hold minor at %.2f m\n    hold twist at %.2f m\n", height/2, height/2)
		}
		off := func() int { return 20 + 5*r.IntN(10) }
		fmt.Fprintf(&b, "    load G %.1f kN at top offset %d mm about major and %d mm about minor\n", 20+float64(r.IntN(800))/10, off(), off()/4)
		fmt.Fprintf(&b, "    load Q %.1f kN at top offset %d mm about major and %d mm about minor\n", 15+float64(r.IntN(600))/10, off(), off()/4)
		fmt.Fprintf(&b, "    load S %.1f kN at top offset %d mm about major\n", 5+float64(r.IntN(200))/10, off())
		fmt.Fprintf(&b, "    load W %.2f kN/m about major\n", 0.5+float64(r.IntN(150))/100)
		b.WriteString("}\n\n")
	}
	return b.String()
}

// BentProject is Project with bent columns.
func BentProject(n int, seed uint64) map[string]string {
	files := map[string]string{"shared.kern": Shared}
	for i := 0; i*500 < n; i++ {
		files[fmt.Sprintf("columns%04d.kern", i)] = "include \"shared.kern\"\n\n" + BentColumns(min(500, n-i*500), seed+uint64(i))
	}
	return files
}
