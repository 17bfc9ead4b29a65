package aisc360

// bendingRules and bendingOverrides are what the checks of bending, shear and
// interaction add to the standard's lists.
var (
	bendingRules     = []string{"member-interaction"}
	bendingOverrides = []string{}
)

// bending checks flexure, shear and combined forces (chapters F, G and H).
func (c *calc) bending() {
	if c.f.Bends[0] || c.f.Bends[1] {
		c.undecided("member-interaction", "ANSI/AISC 360 H1", "bending is not worked out: check chapters F, G and H by hand")
	}
}
