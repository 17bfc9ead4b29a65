package catalogue

import (
	"slices"
	"strings"
	"unicode/utf8"
)

// maxWords bounds the words of a search that are looked at.
const maxWords = 8

// Search returns the sections that a text describes, in the order of All: those
// whose designation begins with the text ("IPE 3", "SHS 100"), or else those
// that every word of the text fits ("cold square 100", "HE 200", "EN 10219"), or
// else the one unlisted section that the text names. An empty text gives all.
func Search(text string) []Entry {
	x := catalogue()
	if strings.TrimSpace(text) == "" {
		return All()
	}
	if len(text) > 4*maxName || !utf8.ValidString(text) {
		return nil
	}
	var buf, own [maxName]byte
	var out []Entry
	if name, ok := compact(buf[:0], text); ok {
		_, family := familyWords[string(name)]
		for i := range x.entries {
			if family { // and "UB" is no beginning of UBP
				if x.entries[i].Family == string(name) {
					out = append(out, x.entries[i])
				}
				continue
			}
			d, _ := compact(own[:0], x.entries[i].Designation)
			if strings.HasPrefix(string(d), string(name)) {
				out = append(out, x.entries[i])
			}
		}
	}
	if len(out) > 0 {
		return out
	}
	wanted := strings.Fields(strings.ToUpper(strings.NewReplacer("×", "x", ",", ".").Replace(text)))
	if len(wanted) > maxWords {
		return nil
	}
	tees := slices.ContainsFunc(wanted, func(w string) bool {
		return w == "1/2" || w == "½" || w == "T" || len(w) > 1 && fits([]string{"TEE", "HALF", "CUT"}, []string{w})
	})
	for i := range x.entries {
		if x.entries[i].Family == "T" && !tees {
			continue // a tee has the words of the section that it is cut from
		}
		if fits(descriptors(&x.entries[i]), wanted) {
			out = append(out, x.entries[i])
		}
	}
	if len(out) > 0 {
		return out
	}
	if e, ok := Find(text); ok {
		return []Entry{e}
	}
	return nil
}

// fits tells whether every wanted word begins one of the descriptors.
func fits(descriptors, wanted []string) bool {
	for _, w := range wanted {
		hit := false
		for _, d := range descriptors {
			if strings.HasPrefix(d, w) {
				hit = true
				break
			}
		}
		if !hit {
			return false
		}
	}
	return true
}

// familyWords describes the families in words.
var familyWords = map[string]string{
	"IPE":  "I SECTION BEAM OPEN ROLLED",
	"HEAA": "HE H SECTION WIDE FLANGE EXTRA LIGHT OPEN ROLLED",
	"HL":   "H SECTION EXTRA WIDE FLANGE BEAM OPEN ROLLED",
	"HD":   "H SECTION WIDE FLANGE COLUMN OPEN ROLLED",
	"HP":   "H SECTION WIDE FLANGE BEARING PILE OPEN ROLLED",
	"UB":   "I SECTION UNIVERSAL BEAM OPEN ROLLED",
	"UC":   "H SECTION UNIVERSAL COLUMN OPEN ROLLED",
	"UBP":  "H SECTION UNIVERSAL BEARING PILE OPEN ROLLED",
	"PFC":  "U CHANNEL PARALLEL FLANGE OPEN ROLLED",
	"L":    "ANGLE LEG OPEN ROLLED",
	"T":    "TEE SECTION HALF CUT OPEN ROLLED",
	"EHS":  "ELLIPTICAL OVAL HOLLOW SECTION TUBE",
	"HEA":  "HE H SECTION WIDE FLANGE LIGHT OPEN ROLLED",
	"HEB":  "HE H SECTION WIDE FLANGE OPEN ROLLED",
	"HEM":  "HE H SECTION WIDE FLANGE HEAVY OPEN ROLLED",
	"UPN":  "U CHANNEL TAPER FLANGE OPEN ROLLED",
	"UPE":  "U CHANNEL PARALLEL FLANGE OPEN ROLLED",
	"SHS":  "SQUARE HOLLOW SECTION TUBE",
	"RHS":  "RECTANGULAR HOLLOW SECTION TUBE",
	"CHS":  "CIRCULAR ROUND HOLLOW SECTION PIPE TUBE",
	"W":    "WIDE FLANGE BEAM COLUMN OPEN ROLLED AMERICAN",
	"M":    "MISCELLANEOUS BEAM OPEN ROLLED AMERICAN",
	"S":    "STANDARD BEAM TAPER FLANGE OPEN ROLLED AMERICAN",
	"C":    "STANDARD CHANNEL TAPER FLANGE OPEN ROLLED AMERICAN",
	"MC":   "MISCELLANEOUS CHANNEL TAPER FLANGE OPEN ROLLED AMERICAN",
	"WT":   "TEE SECTION CUT OPEN ROLLED AMERICAN",
	"MT":   "TEE SECTION CUT OPEN ROLLED AMERICAN",
	"ST":   "TEE SECTION CUT TAPER FLANGE OPEN ROLLED AMERICAN",
	"2L":   "DOUBLE ANGLE PAIR LEG OPEN ROLLED AMERICAN",
	"HSS":  "HOLLOW STRUCTURAL SECTION SQUARE RECTANGULAR ROUND TUBE AMERICAN",
	"PIPE": "STEEL PIPE ROUND TUBE AMERICAN",
}

// descriptors returns the words, in capitals, that a search may use for e.
func descriptors(e *Entry) []string {
	d := strings.Fields(strings.ToUpper(e.Designation) + " " + familyWords[e.Family] + " " + e.Standard)
	d = append(d, strings.TrimPrefix(e.Standard, "EN "), strings.ReplaceAll(e.Standard, " ", ""))
	if e.American() {
		d = append(d, strings.TrimPrefix(strings.ToUpper(e.Designation), e.Family), "AMERICAN", strings.TrimPrefix(e.Standard, "ASTM "))
	}
	if e.Family == "L" || e.Family == "2L" {
		if e.Shape.Depth == e.Shape.Width {
			d = append(d, "EQUAL")
		} else {
			d = append(d, "UNEQUAL")
		}
	}
	switch e.Product {
	case HotHollow:
		d = append(d, "HOT", "FINISHED")
	case ColdHollow:
		d = append(d, "COLD", "FORMED")
	}
	return d
}
