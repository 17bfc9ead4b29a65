package unit

import (
	"errors"
	"strings"
	"sync"
	"testing"
	"unsafe"
)

// The units that the language promises.
const promised = `m mm cm ft in N kN MN lbf kip Pa kPa MPa GPa psi ksi psf ksf kNm plf klf kg t lb kg/m3 pcf
	deg rad % mm2 mm3 mm4 mm6 cm2 cm3 cm4 cm6 in2 in3 in4 in6 kN/m kN/m2 kN/m3 N/mm2 kip/ft lb/ft3 kNm/rad kN*m m² m³
	kip-ft kip-in lbf/ft2 kip/in`

func TestPromisedUnits(t *testing.T) {
	count := 0
	for text := range strings.FieldsSeq(promised) {
		count++
		u, err := Parse(text)
		if err != nil {
			t.Errorf("%s: %v", text, err)
		} else if u.Symbol != text || !(u.Factor > 0) {
			t.Errorf("%s is %+v", text, u)
		}
	}
	if count != 55 {
		t.Errorf("%d units, expected 55", count)
	}
}

// Factors written out by hand from the definitions: inch 0.0254 m, pound
// 0.45359237 kg, standard gravity 9.80665 m/s2 (NIST SP 811, Appendix B). The
// quotients are computed by the compiler in exact arithmetic.
func TestParse(t *testing.T) {
	const (
		in  = 0.0254
		ft  = 12 * in
		lb  = 0.45359237
		lbf = lb * 9.80665
		kip = 1000 * lbf
	)
	bending := Dim{L: 18, M: 6, T: -12} // force by area
	for _, c := range []struct {
		texts  string
		factor float64
		dim    Dim
	}{
		{"m", 1, Length},
		{"µm \u03bcm um", 1e-6, Length},
		{"mm2 mm^2 mm² mm*mm mm·mm mm⋅mm", 1e-6, Area},
		{"mm3 mm³", 1e-9, Volume},
		{"mm4 mm⁴", 1e-12, Length4},
		{"mm6 mm⁶ mm2*mm4", 1e-18, Length6},
		{"cm3", 1e-6, Volume},
		{"cm4", 1e-8, Length4},
		{"cm6", 1e-12, Length6},
		{"m12 m^12 m¹²", 1, Dim{L: 72}},
		{"in3", in * in * in, Volume},
		{"in^4 in4 in⁴", in * in * in * in, Length4},
		{"in6", in * in * in * in * in * in, Length6},
		{"N/mm2 N/mm^2 N/mm² N/mm/mm MPa MN/m2", 1e6, Stress},
		{"kN/m2 kN/m/m kPa", 1e3, Stress},
		{"kN/mm2 GPa", 1e9, Stress},
		{"kNm kN*m kN·m m*kN", 1e3, Moment},
		{"Nmm N*mm", 1e-3, Moment},
		{"kNmm kN*mm Nm N*m", 1, Moment},
		{"kNcm", 10, Moment},
		{"MNm", 1e6, Moment},
		{"kNm2 kN*m2 kN·m² kNm*m", 1e3, bending},
		{"Nmm2 N*mm2", 1e-6, bending},
		{"kNmm2", 1e-3, bending},
		{"kip-ft kip*ft", kip * ft, Moment},
		{"kip-in kip*in", kip * in, Moment},
		{"lbf-ft lbf*ft", lbf * ft, Moment},
		{"lbf-in lbf*in", lbf * in, Moment},
		{"kip-in2 kip*in2", kip * in * in, bending},
		{"kNm/rad kN*m/rad", 1e3, RotationalStiffness},
		{"kip-in/rad", kip * in, RotationalStiffness},
		{"kN/m", 1e3, ForcePerLength},
		{"plf lbf/ft", lbf / ft, ForcePerLength},
		{"klf kip/ft", kip / ft, ForcePerLength},
		{"kip/in", kip / in, ForcePerLength},
		{"psf lbf/ft2", lbf / (ft * ft), Stress},
		{"ksf kip/ft2", kip / (ft * ft), Stress},
		{"psi lbf/in2", lbf / (in * in), Stress},
		{"ksi kip/in2", kip / (in * in), Stress},
		{"Msi", 1e6 * lbf / (in * in), Stress},
		{"pcf lb/ft3", lb / (ft * ft * ft), Density},
		{"kg/m3", 1, Density},
		{"lb/ft", lb / ft, MassPerLength},
		{"slug", lbf / ft, Mass},
		{"kip kips", kip, Force},
		{"kgf", 9.80665, Force},
		{"kN/m3", 1e3, WeightDensity},
		{"min", 60, Time},
		{"h", 3600, Time},
		{"t", 1000, Mass},
		{"%", 0.01, None},
		{"‰", 0.001, None},
		{"m/m mm/mm 1", 1, None},
		{"mm/m", 0.001, None},
		{"1/mm", 1000, Curvature},
		{"1/s Hz", 1, Frequency},
		{"km/h", 1 / 3.6, Velocity},
		{"deg °", 3.14159265358979323846264338327950288419716939937510582097494459 / 180, Angle},
		{"mrad", 0.001, Angle},
		{"m^(1/2)", 1, Dim{L: 3}},
		{"N/m^(3/2)", 1, Dim{L: -3, M: 6, T: -12}},
	} {
		for text := range strings.FieldsSeq(c.texts) {
			u, err := Parse(text)
			if err != nil {
				t.Errorf("%s: %v", text, err)
			} else if u.Factor != c.factor || u.Dim != c.dim || u.Symbol != text {
				t.Errorf("%s = %+v, want %v and %v", text, u, c.factor, c.dim)
			}
		}
	}
}

func TestParseErrors(t *testing.T) {
	for _, c := range []struct {
		text, part string
		offset     int
		unknown    bool
	}{
		{"", "", 0, false},
		{"KN", "KN", 0, true},
		{"kN/qq2", "qq", 3, true},
		{"qq*kN", "qq", 0, true},
		{"kN·mms²", "mms", 4, true},
		{"g", "g", 0, true},
		{"mN", "mN", 0, true},
		{"kN-m", "kN-m", 0, true},
		{"kip-ftt", "kip-ftt", 0, true},
		{"ft-kip", "ft-kip", 0, true},
		{"2", "2", 0, true},
		{"2m", "2m", 0, true},
		{"²", "²", 0, true},
		{"1*m", "1", 0, true},
		{"m/1", "1", 2, true},
		{"1/", "/", 1, false},
		{"kN/", "/", 2, false},
		{"kN*", "*", 2, false},
		{"kN·", "·", 2, false},
		{"/m", "/", 0, false},
		{"·m", "·", 0, false},
		{"kN//m", "/", 2, false},
		{"kN/*m", "/", 2, false},
		{"m0", "0", 1, false},
		{"m13", "13", 1, false},
		{"m02", "02", 1, false},
		{"m^", "^", 1, false},
		{"m^-2", "^-2", 1, false},
		{"kN/m2x", "2x", 4, false},
		{"m²³", "²³", 1, false},
		{"m⁰", "⁰", 1, false},
		{"m2²", "2²", 1, false},
		{"m²2", "²2", 1, false},
		{"m^²", "^²", 1, false},
		{"m99999999999999999999", "99999999999999999999", 1, false},
		{"m^(1/4)", "^(1/4)", 1, false},
		{"m^(1/1)", "^(1/1)", 1, false},
		{"m^(0/2)", "^(0/2)", 1, false},
		{"m^(73/6)", "^(73/6)", 1, false},
		{"m^(1/2", "^(1/2", 1, false},
		{"m^(/2)", "^(/2)", 1, false},
		{"mm^(1/2)", "^(1/2)", 2, false},
		{"Nm^(1/2)", "^(1/2)", 2, false},
		{"%2", "%2", 0, false},
		{"kN/°2", "°2", 3, false},
		{"N/mm*m", "*", 4, false},
		{"1/m*s", "*", 3, false},
		{"N/mm·m", "·", 4, false},
		{"m12*m12", "m12", 4, false},
		{"1/m12/m12", "m12", 6, false},
		{"m*m*m*m*m*m*m*m*m", "m", 16, false},
		{"GPa12", "GPa12", 0, false},
		{"kN m", "kN m", 0, true},
		{" kN", " kN", 0, true},
		{"kN\n", "kN\n", 0, true},
		{"\xff", "\xff", 0, true},
		{"kN/\xc2", "\xc2", 3, true},
		{strings.Repeat("m", 65), strings.Repeat("m", 65), 0, false},
		{strings.Repeat("m", 64), strings.Repeat("m", 64), 0, true},
	} {
		u, err := Parse(c.text)
		var failure *ParseError
		if !errors.As(err, &failure) {
			t.Errorf("%q gives %+v, %v", c.text, u, err)
			continue
		}
		if u != (Unit{}) {
			t.Errorf("%q fails with a unit %+v", c.text, u)
		}
		if failure.Text != c.text || failure.Part != c.part || failure.Offset != c.offset || failure.Unknown() != c.unknown {
			t.Errorf("%q: part %q at %d, unknown %v; want %q at %d, %v (%v)", c.text,
				failure.Part, failure.Offset, failure.Unknown(), c.part, c.offset, c.unknown, err)
		}
		if message := err.Error(); message == "" || len(message) > 400 {
			t.Errorf("%q: message %q", c.text, message)
		}
	}
}

func TestErrorTexts(t *testing.T) {
	for text, want := range map[string]string{
		"KN":      `unknown unit "KN"`,
		"kN/qq2":  `unknown unit "qq" in "kN/qq2"`,
		"m13":     `exponent "13" in "m13" is not a whole number from 1 to 12`,
		"kN/":     `a unit is missing beside "/" in "kN/"`,
		"":        `a unit is missing`,
		"%2":      `"%2" in "%2" cannot have an exponent`,
		"N/mm*m":  `"*" after a solidus in "N/mm*m" can be read in two ways: put the products first, and a solidus before each divisor`,
		"m12*m12": `unit "m12*m12" is too large or too small to compute with`,
	} {
		if _, err := Parse(text); err == nil || err.Error() != want {
			t.Errorf("%q: %v, want %s", text, err, want)
		}
	}
}

// A remembered text must not hold on to the file that it is a piece of.
func TestParseKeepsNoFile(t *testing.T) {
	file := string([]byte("load 80 kip/in3 at top"))
	text := file[8:15]
	if _, err := Parse(text); err != nil {
		t.Fatal(err)
	}
	u, err := Parse("kip/in3")
	if err != nil || u.Symbol != text {
		t.Fatalf("%+v, %v", u, err)
	}
	if unsafe.StringData(u.Symbol) == unsafe.StringData(text) {
		t.Error("the symbol is a piece of the file")
	}
}

// Many goroutines at once read the same as one alone.
func TestParseTogether(t *testing.T) {
	var texts []string
	for _, a := range Atoms() {
		for _, b := range Atoms() {
			texts = append(texts, a.Symbol+"/"+b.Symbol)
		}
	}
	want := make([]Unit, len(texts))
	for i, text := range texts {
		p, failure := read(atoms, text)
		if failure != nil {
			t.Fatal(failure)
		}
		want[i].Symbol, want[i].Dim = text, p.dim
		want[i].Factor, _ = p.rat().Float64()
	}
	var group sync.WaitGroup
	for shift := range 4 {
		group.Go(func() {
			for i := range texts {
				j := (i + shift*len(texts)/4) % len(texts)
				if u, err := Parse(texts[j]); err != nil || u != want[j] {
					t.Errorf("%s = %+v, %v; want %+v", texts[j], u, err, want[j])
				}
			}
		})
	}
	group.Wait()
}

func TestParseAllocatesNothing(t *testing.T) {
	for _, text := range []string{"mm", "kN/m2", "kN·m", "m²"} {
		if _, err := Parse(text); err != nil {
			t.Fatal(err)
		}
		if n := testing.AllocsPerRun(100, func() { _, _ = Parse(text) }); n != 0 {
			t.Errorf("reading %s again allocates %v times", text, n)
		}
	}
}

func FuzzParse(f *testing.F) {
	for text := range strings.FieldsSeq(promised) {
		f.Add(text)
	}
	for _, text := range []string{"", "1", "1/m", "m^(1/2)", "N/mm*m", "kNm2", "m¹²", "kN⋅m", "(", "m^(", "\xc2", "1/m^(127/6)"} {
		f.Add(text)
	}
	f.Fuzz(func(t *testing.T, text string) {
		u, err := Parse(text)
		if err != nil {
			var failure *ParseError
			if !errors.As(err, &failure) {
				t.Fatalf("%q: %T", text, err)
			}
			end := failure.Offset + len(failure.Part)
			if failure.Offset < 0 || end > len(text) || text[failure.Offset:end] != failure.Part {
				t.Fatalf("%q: part %q is not at %d", text, failure.Part, failure.Offset)
			}
			if failure.Part == "" && text != "" {
				t.Fatalf("%q: no part named", text)
			}
			if err.Error() == "" {
				t.Fatalf("%q: no message", text)
			}
			for _, symbol := range Nearest(text, Force, false, 3) {
				if _, err := Parse(symbol); err != nil {
					t.Fatalf("%q: suggestion %q: %v", text, symbol, err)
				}
			}
			return
		}
		if !(u.Factor >= smallestFactor && u.Factor <= largestFactor) {
			t.Fatalf("%q: factor %v", text, u.Factor)
		}
		again, err := Parse(u.Symbol)
		if err != nil || again.Factor != u.Factor || again.Dim != u.Dim {
			t.Fatalf("%q = %+v, but its symbol gives %+v, %v", text, u, again, err)
		}
		if base, err := Parse(u.Dim.Base()); err != nil || base.Dim != u.Dim || base.Factor != 1 {
			t.Fatalf("%q: base %q gives %+v, %v", text, u.Dim.Base(), base, err)
		}
	})
}

var sink Unit

func BenchmarkParse(b *testing.B) {
	texts := strings.Fields(promised)
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		sink, _ = Parse(texts[i%len(texts)])
	}
}

func BenchmarkParseFirstTime(b *testing.B) {
	texts := strings.Fields(promised)
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		p, _ := read(atoms, texts[i%len(texts)])
		sink.Factor, _ = p.rat().Float64()
	}
}

func BenchmarkNearest(b *testing.B) {
	for b.Loop() {
		Nearest("KN/M2", Stress, false, 3)
	}
}
