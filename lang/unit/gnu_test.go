package unit

import (
	"bytes"
	"math"
	"os/exec"
	"strconv"
	"strings"
	"testing"
)

// gnuNames maps every atom to the expression that GNU units understands as the
// same unit. Several of our symbols mean something else there: h is the Planck
// constant, rad a radiation dose, plf a mass per length, and a hyphen a
// subtraction. An atom without an expression is not known there.
var gnuNames = map[string]string{
	"m": "m", "mm": "mm", "cm": "cm", "km": "km", "\u00b5m": "um", "\u03bcm": "um", "um": "um",
	"in": "in", "ft": "ft", "yd": "yd",
	"s": "s", "min": "min", "h": "hour", "Hz": "Hz",
	"rad": "radian", "mrad": "milliradian", "deg": "degree", "°": "degree",
	"%": "percent", "‰": "1|1000",
	"kg": "kg", "t": "tonne", "lb": "pound", "slug": "slug",
	"N": "N", "kN": "kN", "MN": "MN", "kgf": "kgf", "lbf": "lbf", "kip": "kip", "kips": "kip",
	"Pa": "Pa", "kPa": "kPa", "MPa": "MPa", "GPa": "GPa",
	"psi": "psi", "ksi": "ksi", "Msi": "1e6 psi", "psf": "lbf/ft^2", "ksf": "kip/ft^2",
	"Nm": "N m", "kNm": "kN m", "MNm": "MN m", "Nmm": "N mm", "kNmm": "kN mm", "kNcm": "kN cm",
	"lbf-ft": "lbf ft", "lbf-in": "lbf in", "kip-ft": "kip ft", "kip-in": "kip in",
	"plf": "lbf/ft", "klf": "kip/ft", "pcf": "lb/ft^3",
}

// gnuCompounds are compound units as we and as GNU units write them.
var gnuCompounds = map[string]string{
	"mm2": "mm^2", "cm2": "cm^2", "m²": "m^2", "in2": "in^2", "ft2": "ft^2",
	"mm3": "mm^3", "cm3": "cm^3", "m³": "m^3", "in3": "in^3", "ft3": "ft^3",
	"mm4": "mm^4", "cm4": "cm^4", "in^4": "in^4", "mm6": "mm^6", "cm6": "cm^6", "in6": "in^6",
	"kN/m": "kN/m", "N/mm": "N/mm", "kip/ft": "kip/ft", "kip/in": "kip/in", "lbf/in": "lbf/in",
	"kN/m2": "kN/m^2", "N/mm2": "N/mm^2", "kN/cm2": "kN/cm^2", "kN/m/m": "kN/m^2", "lbf/ft2": "lbf/ft^2", "kip/in2": "kip/in^2", "kgf/cm2": "kgf/cm^2",
	"kN/m3": "kN/m^3", "lbf/ft3": "lbf/ft^3", "kip/ft3": "kip/ft^3", "kgf/m3": "kgf/m^3",
	"kg/m3": "kg/m^3", "t/m3": "tonne/m^3", "lb/in3": "pound/in^3", "slug/ft3": "slug/ft^3",
	"kg/m": "kg/m", "lb/ft": "pound/ft", "kg/m2": "kg/m^2", "lb/ft2": "pound/ft^2",
	"kN*m": "kN m", "kN·cm": "kN cm", "kip*ft": "kip ft",
	"kNm/rad": "kN m/radian", "kNm/deg": "kN m/degree", "kip-in/rad": "kip in/radian", "lbf-ft/mrad": "lbf ft/milliradian",
	"kNm2": "kN m^2", "Nmm2": "N mm^2", "kip-in2": "kip in^2", "lbf*ft2": "lbf ft^2",
	"m/s2": "m/s^2", "ft/s2": "ft/s^2", "km/h": "km/hour", "ft/min": "ft/min", "m/s": "m/s",
	"1/m": "1/m", "1/in": "1/in", "kN/rad/m": "kN/radian/m", "lbf/deg/in": "lbf/degree/in",
}

// TestGNUUnits compares every pair of units of one dimension, in both
// directions, with GNU units, an independent program with its own definitions.
func TestGNUUnits(t *testing.T) {
	program, err := exec.LookPath("units")
	if err != nil {
		t.Skip("the program units (GNU units, Debian package units) is not installed: factors are not compared with it")
	}
	type pair struct{ from, to Unit }
	names := map[string]string{}
	for _, a := range Atoms() {
		name, ok := gnuNames[a.Symbol]
		if !ok {
			t.Errorf("no expression for %s: say how GNU units writes it", a.Symbol)
			continue
		}
		names[a.Symbol] = name
	}
	for text, name := range gnuCompounds {
		names[text] = name
	}
	byDim := map[Dim][]Unit{}
	for text := range names {
		u, err := Parse(text)
		if err != nil {
			t.Fatal(err)
		}
		byDim[u.Dim] = append(byDim[u.Dim], u)
	}
	var pairs []pair
	var input strings.Builder
	for _, list := range byDim {
		for _, from := range list {
			for _, to := range list {
				pairs = append(pairs, pair{from, to})
				input.WriteString(names[from.Symbol] + "\n" + names[to.Symbol] + "\n")
			}
		}
	}
	// --strict: no reciprocals, so that 1/m is not taken for m.
	command := exec.Command(program, "--terse", "--strict", "--compact", "--digits", "15")
	command.Env = []string{"LC_ALL=C", "HOME=" + t.TempDir()} // no definitions of the user's own
	command.Stdin = strings.NewReader(input.String())
	var complaints bytes.Buffer
	command.Stderr = &complaints
	output, err := command.Output()
	if err != nil {
		t.Fatalf("%v: %s", err, complaints.String())
	}
	lines := strings.Split(strings.TrimSpace(string(output)), "\n")
	if len(lines) != len(pairs) || len(pairs) < 800 {
		t.Fatalf("%d answers to %d questions; first lines: %q", len(lines), len(pairs), lines[:min(5, len(lines))])
	}
	worst := 0.0
	for i, line := range lines {
		p := pairs[i]
		theirs, err := strconv.ParseFloat(strings.TrimSpace(line), 64)
		if err != nil {
			t.Errorf("%s in %s: answer %q", p.from.Symbol, p.to.Symbol, line)
			continue
		}
		ours := p.from.Factor / p.to.Factor
		deviation := math.Abs(ours/theirs - 1)
		worst = max(worst, deviation)
		// Fifteen digits are printed: at most 5e-15 from their rounding, and
		// a few roundings of 1.1e-16 on either side.
		if !(deviation < 1e-14) {
			t.Errorf("1 %s = %v %s, GNU units has %v", p.from.Symbol, ours, p.to.Symbol, theirs)
		}
	}
	t.Logf("%d pairs, largest deviation %.1e", len(pairs), worst)
}
