package en1993

import (
	"math"
	"sort"
	"strings"
	"testing"

	"kern/checker/model"
	"kern/checker/section"
)

// memberOf builds the member of a record: its lengths as factors on the length
// between forks, so that one member has all three.
func memberOf(t *testing.T, r map[string]string) *beamColumn {
	t.Helper()
	v := func(name string) float64 {
		if r[name] == "" {
			return 0
		}
		return number(t, r[name])
	}
	mm := func(name string) float64 { return v(name) / 1e3 }
	s := section.Shape{Depth: mm("h"), Width: mm("b"), Web: mm("tw"), Flange: mm("tf"), Root: mm("r"), Wall: mm("t"), OuterRadius: mm("ro"), InnerRadius: mm("ri"), Diameter: mm("d")}
	made, kind, _ := strings.Cut(r["kind"], "_")
	switch {
	case kind == "i":
		s.Kind, s.Made = section.ISection, map[string]section.Made{"rolled": section.Rolled, "welded": section.Welded}[made]
	default:
		s.Kind = map[string]section.Kind{"rhs": section.Tube, "chs": section.Pipe}[made]
		s.Made = map[string]section.Made{"hot": section.Hot, "cold": section.Cold}[kind]
	}
	sp := shaped(t, s, v("fy")*1e6)
	p := &sp.section.Properties
	p.Area, p.IMajor, p.IMinor, p.It, p.Iw = v("A")*1e-6, v("Iy")*1e-12, v("Iz")*1e-12, v("It")*1e-12, v("Iw")*1e-18
	p.WelMajor, p.WplMajor, p.WelMinor, p.WplMinor = v("Wely")*1e-9, v("Wply")*1e-9, v("Welz")*1e-9, v("Wplz")*1e-9
	sp.height, sp.force = mm("L_LT"), v("N_Ed")
	b := &beamColumn{specimen: sp, ly: mm("L_y"), lz: mm("L_z"), override: map[string]model.Override{}}
	b.my = [2]float64{v("My_base") / 1e3, v("My_top") / 1e3}
	b.mz = [2]float64{v("Mz_base") / 1e3, v("Mz_top") / 1e3}
	b.line[0] = -v("q") * 1e3 // a load to one side bends against a moment that turns that way at the top
	if v("fy") == 460 {       // the S460 column, by stating the curves that it gives
		major, minor := curves(&sp.section, true)
		sp.section.CurveMajor, sp.section.CurveMinor = major.letter, minor.letter
	}
	return b
}

// Reasons for which a record or a value is left out of the comparison; each is
// counted.
const (
	leftUndecided = "the second implementation is undecided"
	leftShear     = "some shear force is more than half of its resistance: kern takes the sum (6.2), the second implementation goes on with (6.41)"
	leftOneAxis   = "compression with bending about z–z alone: the second implementation takes the web in uniform compression, kern with the alpha of the axial force"
	leftTension   = "tension: the second implementation lets it improve the class, kern does not"
	leftFlanges   = "class 4 about z–z: kern reduces the flange tips as in uniform compression, on the safe side"
	leftNarrow    = "rectangular hollow sections with lambda_LT > 0.4: kern reduces them by curve d, the second implementation does not"
	leftPeak      = "end moments with a load: kern takes the greatest moment in the span for Table B.3, the second implementation that at mid-length"
	leftOver      = "N_Ed is more than the resistance of the section or of the member"
	leftPipe      = "circular tubes beyond the thin ring: kern takes the smaller of two formulas"
	leftEigen     = "end moments with a load: C_1 from an eigenvalue, by two numerical methods"
)

// TestMembersSecond holds bending, lateral-torsional buckling and both annexes
// against a second implementation of random members.
func TestMembersSecond(t *testing.T) {
	left, worst, compared := map[string]int{}, map[string]float64{}, map[string]int{}
	for _, r := range table(t, "members.csv") {
		v := func(name string) float64 { return number(t, r[name]) }
		if math.IsNaN(v("ny")) && v("N_Ed") >= 0 || r["class"] == "" {
			left[leftUndecided]++
			continue
		}
		my, mz, n := v("My_max") > 0, v("Mz_max") > 0, v("N_Ed")
		if n < 0 {
			left[leftTension]++
			continue
		}
		if my || mz {
			compareBending(t, r, my, mz, left, worst, compared)
		}
	}
	var symbols []string
	total := 0
	for s, k := range compared {
		symbols, total = append(symbols, s), total+k
	}
	sort.Strings(symbols)
	for _, s := range symbols {
		t.Logf("%-40s %5d compared, greatest deviation %.2g", s, compared[s], worst[s])
	}
	for why, k := range left {
		t.Logf("%5d left out: %s", k, why)
	}
	if total < 8000 {
		t.Errorf("%d values compared, want 8,000", total)
	}
}

func compareBending(t *testing.T, r map[string]string, my, mz bool, left map[string]int, worst map[string]float64, compared map[string]int) {
	t.Helper()
	v := func(name string) float64 { return number(t, r[name]) }
	open := strings.HasSuffix(r["kind"], "_i")
	q := v("q") != 0
	b := memberOf(t, r)
	o := b.check()
	tolerance := 1e-7
	same := func(rule, symbol, column string, factor float64) {
		got, want := o.value(rule, symbol), v(column)*factor
		if math.IsNaN(want) {
			return
		}
		compared[symbol]++
		dev := math.Abs(got - want)
		if want != 0 {
			dev = math.Abs(got/want - 1)
		}
		worst[symbol] = max(worst[symbol], dev)
		if !(dev <= tolerance) {
			t.Errorf("record %s (%s): %s = %.9g, second implementation %.9g (%.2g)", r["id"], r["kind"], symbol, got, want, dev)
		}
	}
	if !my && mz && open {
		left[leftOneAxis]++
		return
	}
	anywhere := "section-bending-major"
	if !my {
		anywhere = "section-bending-minor"
	}
	same(anywhere, "class_NM", "class", 1)
	class := v("class")
	weffZ := open && class == 4 && mz
	if weffZ {
		left[leftFlanges]++
	}
	if my {
		same("section-bending-major", "M_c_y_Rd", "McyRd", 1e-3)
	}
	if mz && !weffZ {
		same("section-bending-minor", "M_c_z_Rd", "MczRd", 1e-3)
	}
	// the shear forces differ where the lengths do, as one member has them all here
	known := func(symbol string) bool { return !math.IsNaN(o.value("section-interaction", symbol)) }
	shear := v("rho_z") > 0 || v("rho_y") > 0 || known("rho_V_z") || known("rho_V_y")
	over := !(v("n") < 0.99)
	switch {
	case shear:
		left[leftShear]++
	case over:
		left[leftOver]++
	case class <= 2 && v("N_Ed") > 0:
		pipe := strings.HasPrefix(r["kind"], "chs")
		if pipe && math.Pow(v("n"), 1.7) < 1-math.Cos(math.Pi/2*v("n")) {
			left[leftPipe]++
			break
		}
		if my {
			same("section-interaction", "M_N_y_Rd", "MNy", 1e-3)
		}
		if mz {
			same("section-interaction", "M_N_z_Rd", "MNz", 1e-3)
		}
		if my && mz {
			same("section-interaction", "alpha_NM", "exp_a", 1)
			same("section-interaction", "beta_NM", "exp_b", 1)
			got, want := o.value("section-interaction", "u_NM"), v("sec_max_noV")
			if got < want*(1-1e-6) || want >= 1 && math.Abs(got/want-1) > 1e-4 && v("n") < want {
				t.Errorf("record %s: u_NM = %.7g, second implementation %.7g", r["id"], got, want)
			}
			compared["u_NM"]++
		}
	case class >= 3 && !weffZ && v("N_Ed") > 0:
		tolerance = 1e-4 // the place of the greatest sum is searched by both
		same("section-interaction", "u_NM", "sec_max_noV", 1)
		tolerance = 1e-7
	}
	rhs := strings.HasPrefix(r["kind"], "rhs")
	narrow := rhs && my && v("lambda_LT") > 0.4
	if narrow {
		left[leftNarrow]++
		return
	}
	if my && (open || rhs && r["h"] != r["b"]) {
		if q && (r["My_top"] != "0" || r["My_base"] != "0") {
			tolerance = 0.003
			left[leftEigen]++
		} else if q {
			tolerance = 0.0005
		}
		same("lateral-torsional-buckling", "M_cr", "Mcr", 1e-3)
		same("lateral-torsional-buckling", "lambda_LT", "lambda_LT", 1)
		if open {
			same("lateral-torsional-buckling", "chi_LT", "chi_LT_gen", 1)
		}
		same("lateral-torsional-buckling", "u_LT", "lt_util_gen", 1)
	}
	const rule = "member-interaction"
	if weffZ || !(v("N_Ed") > 0) {
		return
	}
	eigen := tolerance
	tolerance = 1e-7
	for _, s := range []string{"y", "z"} {
		same(rule, "lambda_"+s, "lambda_"+s, 1)
		same(rule, "chi_"+s, "chi_"+s, 1)
		same(rule, "n_"+s, "n"+s, 1)
	}
	tolerance = max(eigen, 1e-7)
	if q && v("B_Cmy") != v("B_Cmy_spanmax") {
		left[leftPeak]++
	} else if !(v("nz") <= 1) {
		left[leftOver]++
	} else {
		if my {
			same(rule, "C_my", "B_Cmy", 1)
			same(rule, "k_yy", "B_kyy", 1)
			same(rule, "k_zy", "B_kzy", 1)
		}
		if mz {
			same(rule, "C_mz", "B_Cmz", 1)
			same(rule, "k_yz", "B_kyz", 1)
			same(rule, "k_zz", "B_kzz", 1)
		}
		same(rule, "u_61", "B_661", 1)
		same(rule, "u_62", "B_662", 1)
	}
	if r["A_status"] != "ok" || !(v("ny") < 1 && v("nz") < 1) {
		left[leftOver]++
		return
	}
	b.annexA = true
	o = b.check()
	names := map[string]string{"mu_y": "A_muy", "mu_z": "A_muz"}
	if my {
		for k, c := range map[string]string{"C_my": "A_Cmy", "C_mLT_A": "A_CmLT", "k_yy": "A_kyy", "k_zy": "A_kzy"} {
			names[k] = c
		}
	}
	if mz {
		for k, c := range map[string]string{"C_mz": "A_Cmz", "k_yz": "A_kyz", "k_zz": "A_kzz"} {
			names[k] = c
		}
	}
	for k, c := range names {
		same(rule, k, c, 1)
	}
	same(rule, "u_61", "A_661", 1)
	same(rule, "u_62", "A_662", 1)
}
