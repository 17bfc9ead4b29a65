package drawing_test

import (
	"fmt"
	"math/rand/v2"
	"strings"

	"kern/checker"
)

// randomMembers is a calculation of n members of our own invention with anything
// that a picture can have to show: crowded loads and holds, long names, all ends.
func randomMembers(n int, seed uint64) string {
	r := rand.New(rand.NewPCG(seed, 7))
	pick := func(list ...string) string { return list[r.IntN(len(list))] }
	var b strings.Builder
	standards := checker.Stated()
	fmt.Fprintf(&b, "basis { standard %s; actions \"EN 1990:2002\" eq %q; show %s }\n", standards[int(seed)%len(standards)], pick("6.10", "6.10a/b"), pick("kN, kNm, mm, MPa", "kip, kip-ft, in, ksi", "N, Nmm, m"))
	b.WriteString("case G permanent\ncase Imposed_on_the_gallery imposed \"B\"\ncase W wind\n")
	b.WriteString("level ground at 0 m\nlevel the_lower_gallery at 2.1 m { G 4 kN/m2 }\nlevel upper at 2.2 m { W 1 kN/m2 }\nlevel roof at 9 m { G 1 kN/m2; W 2 kN/m2 }\n")
	for i := range n {
		fmt.Fprintf(&b, "%s M%d %q {\n", pick("column", "column", "column", "strut", "tie"), i, pick("", "Edge post", "A post with a very long title that says where it stands and why"))
		fmt.Fprintf(&b, "section = %s\nmaterial = \"S355H\"\n", pick(`"HEB 160"`, `"IPE 300"`, `"SHS 100x100x5"`, `"CHS 168.3x8"`, `"UPN 200"`, `"L 100x100x10"`, `bar { width = 60 mm; depth = 90 mm }`,
			`given { A = 24.1 cm2; I_major = 612 cm4; I_minor = 201 cm4; W_major = 92 cm3; W_minor = 41 cm3; I_t = 9 cm4; thickness = 8 mm; class = 1; curve = c }`))
		height := 0.4 + 14*r.Float64()*r.Float64()
		if r.IntN(4) == 0 {
			height = 9
			b.WriteString("from ground to roof\n")
		} else {
			fmt.Fprintf(&b, "height = %.3f m\n", height)
		}
		if r.IntN(6) == 0 {
			fmt.Fprintf(&b, "lift base to %.3f m { section = %s }\n", height*(0.1+0.8*r.Float64()), pick(`"HEB 300"`, `"IPE 200"`))
		}
		for _, end := range []string{"base", "top"} {
			if r.IntN(2) == 0 {
				fmt.Fprintf(&b, "%s %s\n", end, pick("pinned", "fixed", "free", "guided"))
			} else {
				fmt.Fprintf(&b, "%s %s about major\n%s %s about minor\n", end, pick("pinned", "fixed"), end, pick("pinned", "fixed", "guided"))
			}
		}
		crowd := 1 + r.IntN(3)
		if r.IntN(25) == 0 {
			crowd = 30
		}
		at := func() string { return fmt.Sprintf("%.3f m", height*(0.001+0.998*r.Float64())) }
		for range r.IntN(crowd + 1) {
			fmt.Fprintf(&b, "hold %s at %s\n", pick("major", "minor", "both", "twist"), at())
		}
		if r.IntN(8) == 0 {
			fmt.Fprintf(&b, "hold %s at %s stiffness %.0f kN/m\n", pick("major", "minor", "both"), at(), 5000*r.Float64()+1)
		}
		if r.IntN(6) == 0 {
			fmt.Fprintf(&b, "%s spring %.0f kNm/rad about %s\n", pick("base", "top"), 5000*r.Float64()+1, pick("major", "minor"))
		}
		if r.IntN(5) == 0 {
			b.WriteString("critical exact\n")
		}
		c := func() string { return pick("G", "Imposed_on_the_gallery", "W") }
		size := func() float64 { return (r.Float64() - 0.3) * 200 * r.Float64() }
		for range 1 + r.IntN(crowd*2) {
			switch r.IntN(6) {
			case 0:
				fmt.Fprintf(&b, "load %s %.3f kN at %s offset %.0f mm about %s\n", c(), size(), pick("top", at()), 400*(r.Float64()-0.4), pick("major", "minor"))
			case 1:
				fmt.Fprintf(&b, "load %s %.3f kN across %s at %s\n", c(), size()/10, pick("major", "minor"), pick("top", "base", at()))
			case 2:
				fmt.Fprintf(&b, "load %s %.3f kN/m about %s\n", c(), size()/20, pick("major", "minor"))
			case 3:
				fmt.Fprintf(&b, "load %s %.3f kNm about %s at %s\n", c(), size()/10, pick("major", "minor"), pick("top", "base", at()))
			default:
				fmt.Fprintf(&b, "load %s %.3f kN at %s\n", c(), size(), pick("top", "top", at()))
			}
		}
		if height == 9 && r.IntN(2) == 0 {
			b.WriteString("load floor 20 m2 at roof\n")
		}
		b.WriteString("}\n")
	}
	return b.String()
}
