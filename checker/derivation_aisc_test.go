package checker_test

import (
	"math/rand"
	"testing"

	"kern/checker/derivation"
	"kern/checker/standard/aisc360"
)

// aiscMembers are members that come to formulas of ANSI/AISC 360 which those of the
// other standards do not need.
const aiscMembers = handmade + `
section hairpipe = pipe { outside = 600 mm; wall = 5 mm; made = cold }
section slimell  = angle { depth = 150 mm; wall = 6 mm; root = 12 mm }
section slimun   = angle { depth = 150 mm; width = 100 mm; wall = 6 mm; root = 12 mm }
section thinroll = isection { depth = 500 mm; width = 200 mm; web = 6 mm; flange = 10 mm; root = 12 mm; made = rolled }
section hardell  = angle { depth = 150 mm; width = 100 mm; wall = 12 mm; root = 12 mm }
material hard { E = 200 GPa; fy = 345 MPa; fu = 450 MPa; density = 7850 kg/m3 }
column E1 as A1 { section = hairpipe }
column E2 as A1 { section = slimell; height = 1 m }
column E3 as A1 { section = slimun; height = 1 m }
column E4 as A1 { section = thinroll; effective = 3 about twist }
column E5 as A1 { section = thinroll; base fixed; top free; material = hard; load 3000 kN }
column E6 as A1 { section = "HEB 200"; joints 1.2 at base, 2 at top about major sway; joints 1.2 at base, 2 at top about minor braced }
column E12 as A1 { section = "HEB 200"; joints 0.4 at base, 7 at top about major braced; joints 5 at base, 0.8 at top about minor sway }
column E7 as A1 { section = flat; effective = 3 about twist }
column E8 as A1 { section = hairpipe; load 4000 kN; material = hard }
column E9 as A1 { section = "HEB 200"; load 2500 kN; load 5 kN across major at 2 m; material = hard }
column E11 as A1 { section = box; height = 25 m; load 100 kN }
column E10 as A1 { section = thinroll; load 2500 kN; load 5 kN across major at 2 m; load 1 kN across minor at 2 m; material = hard }
strut L1 { section = hardell; material = hard; length = 1 m; load 50 kN; connected by long leg }
strut L2 as L1 { length = 3.5 m }
strut L3 as L1 { connected by short leg }
strut L4 as L1 { length = 4 m; connected by short leg }
strut L5 as L1 { connected by long leg space }
strut L6 as L1 { length = 3 m; connected by long leg space }
strut L7 as L1 { connected by short leg space }
strut L8 as L1 { length = 4 m; connected by short leg space }
strut PA1 { section = "2L4x3-1/2x3/8x3/4 LLBB"; material = hard; length = 2.4 m; load 100 kN; connectors every 800 mm welded }
strut PA2 as PA1 { connectors every 500 mm pretensioned }
strut PA3 as PA1 { connectors every 500 mm snug }
strut PA4 as PA1 { section = "2L5x3x1/4 LLBB"; connectors every 800 mm welded }
strut PA5 as PA4 { connectors every 500 mm welded }
strut PA6 as PA4 { connectors every 500 mm snug }
tie R1 { section = solid; material = hard; length = 3 m; load -100 kN }
tie R2 { section = rolled; material = hard; length = 3 m; load -100 kN; load 5 kN across major at 1 m }
` + aiscBending

var aiscBases = []string{
	"basis { standard \"ANSI/AISC 360-22\" by LRFD; net_ratio = 0.85 because \"holes\"; U = 0.9 because \"Table D3.1\"; show kip, kip-ft, in, ksi }",
	"basis { standard \"ANSI/AISC 360-22\" by ASD; stability direct; net_ratio = 0.9 because \"holes\"; U = 1 because \"Table D3.1\" }",
	"basis { standard \"ANSI/AISC 360-16\" by LRFD; stability direct }",
	"basis { standard \"ANSI/AISC 360-16\" by ASD; net_ratio = 0.85 because \"holes\"; U = 0.9 because \"Table D3.1\" }",
}

// TestDerivationsAISC is TestDerivations for ANSI/AISC 360: every formula of the
// edition of 2022 is reached by some member, and 400 random members are put in.
func TestDerivationsAISC(t *testing.T) {
	d := &derived{t: t, formulas: map[*derivation.Formula]int{}}
	for _, b := range append(aiscBases, aiscBendingBases...) {
		for _, m := range derivedReport(t, b+aiscMembers, true) {
			d.check(m)
		}
	}
	byHand := d.members
	r := rand.New(rand.NewSource(360))
	for range 20 {
		for _, m := range derivedReport(t, aiscBases[r.Intn(len(aiscBases))]+randomColumns(r, 20), false) {
			d.check(m)
		}
	}
	if d.members-byHand < 380 {
		t.Errorf("%d of 400 random members have a derivation", d.members-byHand)
	}
	t.Logf("%d members, %d steps", d.members, d.steps)
	t.Logf("greatest deviation with all digits %.2g in %s", d.exact.deviation, d.exact.text)
	t.Logf("greatest deviation as printed %.2g in %s", d.rounded.deviation, d.rounded.text)
	set := aisc360.Standard{}.Symbols()
	for _, f := range set.Formulas() {
		if d.formulas[f] == 0 {
			t.Errorf("no member comes to %s = %s (%s)", set.At(f.Symbol).Name, f.Text, f.Clause)
		}
	}
}
