package catalogue

import (
	"strconv"
	"strings"
)

// aliases returns further compact names of a listed section. name is the
// compact form of its designation.
func aliases(e Entry, name string) []string {
	if e.Family == "T" {
		return teeAliases(e)
	}
	size := strings.TrimPrefix(name, e.Family)
	switch e.Family {
	case "HEAA":
		return []string{"HE" + size + "AA"}
	case "HEA":
		return []string{"HE" + size + "A", "IPBL" + size}
	case "HEB":
		return []string{"HE" + size + "B", "IPB" + size}
	case "HEM":
		return []string{"HE" + size + "M", "IPBV" + size}
	case "UPN":
		// "U" alone is no alias: EN 10365 has another series of that name.
		return []string{"UNP" + size}
	case "UB", "UC", "UBP":
		serial, mass := cutMass(size)
		return []string{size + e.Family, serial + e.Family + mass}
	case "PFC":
		// Every depth and width has one channel.
		serial, mass := cutMass(size)
		return []string{size + "PFC", serial + "PFC" + mass, serial + "PFC", "PFC" + serial}
	case "HD", "HP":
		return append(roundedMass(e.Family, size), size+e.Family)
	case "HL":
		if serial, _ := cutMass(size); serial == "" {
			mass := strconv.Itoa(hlMasses[size])
			return []string{"HL" + strings.TrimRight(size, "ABMR") + "X" + mass}
		}
		return []string{size + "HL"}
	case "L":
		out := []string{size + "L", "RSA" + size, size + "RSA"}
		if legs, t := cutMass(size); e.Shape.Depth == e.Shape.Width {
			leg, _ := cutMass(legs)
			out = append(out, "L"+leg+"X"+t, leg+"X"+t+"L")
		}
		return out
	}
	return nil
}

// hlMasses are the masses in kg/m by which the HL with a letter are also known.
var hlMasses = map[string]int{
	"1000AA": 296, "1000A": 321, "1000B": 371, "1000M": 412,
	"1100A": 343, "1100B": 390, "1100M": 433, "1100R": 499,
}

// cutMass cuts a compact size at its last X; serial is empty if there is none.
func cutMass(size string) (serial, mass string) {
	i := strings.LastIndexByte(size, 'X')
	if i < 0 {
		return "", size
	}
	return size[:i], size[i+1:]
}

// roundedMass returns the name with the mass rounded to the kilogram, as many
// write "HD 320x98" for "HD 320x97.6".
func roundedMass(family, size string) []string {
	serial, mass := cutMass(size)
	um, ok := parseMicro(mass)
	if !ok || um%micro == 0 {
		return nil
	}
	return []string{family + serial + "X" + strconv.Itoa(int((um+micro/2)/micro))}
}

// turnedAliases returns the compact names of an unequal angle with the shorter
// leg first.
func turnedAliases(e Entry) []string {
	if e.Family != "L" || e.Shape.Depth == e.Shape.Width {
		return nil
	}
	size := strings.ToUpper(strings.TrimPrefix(e.Designation, "L "))
	legs, t := cutMass(size)
	long, short := cutMass(legs)
	size = short + "X" + long + "X" + t
	return []string{"L" + size, size + "L", "RSA" + size, size + "RSA"}
}

// teeAliases returns the compact names of a tee beside "1/2" before the
// section's own: half of the section's further names, and the words of the trade.
func teeAliases(e Entry) []string {
	parent := e
	parent.Designation = strings.TrimPrefix(e.Designation, teePrefix)
	parent.Family, _, _ = strings.Cut(parent.Designation, " ")
	var buf [maxName]byte
	own, _ := compact(buf[:0], parent.Designation)
	var out []string
	for i, name := range append([]string{string(own)}, aliases(parent, string(own))...) {
		half := "1X2"
		if digit(name[0]) {
			half = "1X2X" // two numbers with a blank between them
		}
		if i > 0 {
			out = append(out, half+name)
		}
		out = append(out, "HALF"+name, "T"+half+name, "TEECUTFROM"+name, "TCUTFROM"+name)
	}
	return out
}

// addTeeSizes adds the names of tees by their own size, as the UK tables write
// them: flange width, half the serial depth and half the mass, "305x457x127" for
// half of UB 914x305x253. The halves are rounded up or down; a size that two tees
// could have names none.
func (x *index) addTeeSizes() {
	seen := map[string]int32{}
	const several = -1
	for i := range x.entries {
		e := &x.entries[i]
		parent := strings.TrimPrefix(e.Designation, teePrefix)
		if e.Family != "T" || !strings.HasPrefix(parent, "UB ") && !strings.HasPrefix(parent, "UC ") {
			continue
		}
		n, _ := numbers(parent)
		depth, width, mass := int(n[0]), int(n[1]), int(n[2])
		for _, d := range halves(depth) {
			for _, m := range halves(mass) {
				size := strconv.Itoa(width) + "X" + strconv.Itoa(d) + "X" + strconv.Itoa(m)
				if _, taken := seen[size]; taken {
					seen[size] = several
				} else {
					seen[size] = int32(i)
				}
			}
		}
	}
	for size, n := range seen {
		if n == several {
			continue
		}
		for _, name := range []string{"T" + size, size + "T", "TEE" + size, size + "TEE"} {
			x.names[name] = n
		}
	}
}

// halves returns half of a number, rounded down and up where it is odd.
func halves(n int) []int {
	if n%2 == 0 {
		return []int{n / 2}
	}
	return []int{n / 2, n/2 + 1}
}
