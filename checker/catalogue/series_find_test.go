package catalogue

import (
	"slices"
	"strings"
	"testing"
)

func TestFindTakesTheSeries(t *testing.T) {
	for _, c := range []struct{ text, want, assumed string }{
		{"UB 457x191x67", "UB 457x191x67", ""},
		{"457x191x67 UB", "UB 457x191x67", ""},
		{"457 x 191 x 67 UB", "UB 457x191x67", ""},
		{"457×191 UB 67", "UB 457x191x67", ""},
		{"ub457x191x67", "UB 457x191x67", ""},
		{"UB 457x191x67 BS 4-1", "UB 457x191x67", ""},
		{"457x191x67 UB BS 4-1", "UB 457x191x67", ""},
		{"BS EN 10365 457x191x67 UB", "UB 457x191x67", ""},
		{"UB 1016x305x487", "UB 1016x305x487", ""},
		{"UC 203x203x46", "UC 203x203x46", ""},
		{"203x203x46 UC", "UC 203x203x46", ""},
		{"203 x 203 UC 46", "UC 203x203x46", ""},
		{"203/203/46 uc", "UC 203x203x46", ""},
		{"305x305 UBP 110", "UBP 305x305x110", ""},
		{"UBP 305x305x110", "UBP 305x305x110", ""},
		{"305x305x118 UC", "UC 305x305x118", ""},
		{"PFC 200x75x23", "PFC 200x75x23", ""},
		{"200x75x23 PFC", "PFC 200x75x23", ""},
		{"200 x 75 PFC", "PFC 200x75x23", ""},
		{"PFC 200x75", "PFC 200x75x23", ""},
		{"HD 320x158", "HD 320x158", ""},
		{"HD 320 x 97.6", "HD 320x97.6", ""},
		{"HD 320x97,6", "HD 320x97.6", ""},
		{"HD 320x98", "HD 320x97.6", ""},
		{"HD 260x54", "HD 260x54.1", ""},
		{"HP 305x110", "HP 305x110", ""},
		{"305x110 HP", "HP 305x110", ""},
		{"HL 1000 A", "HL 1000 A", ""},
		{"HL 1000x321", "HL 1000 A", ""},
		{"HL1000AA", "HL 1000 AA", ""},
		{"HL 1100x499", "HL 1100 R", ""},
		{"HL 920x344", "HL 920x344", ""},
		{"HE 200 AA", "HEAA 200", ""},
		{"HEAA 200", "HEAA 200", ""},
		{"HE 200 A", "HEA 200", ""},
		{"L 100x100x10", "L 100x100x10", ""},
		{"L100x10", "L 100x100x10", ""},
		{"100x100x10 L", "L 100x100x10", ""},
		{"RSA 100x100x10", "L 100x100x10", ""},
		{"L 45x45x4,5", "L 45x45x4.5", ""},
		{"L 150x75x10", "L 150x75x10", ""},
		{"L 75x150x10", "L 150x75x10", "longer leg upright"},
		{"75x150x10 L EN 10056-1", "L 150x75x10", "longer leg upright"},
		{"L 150x75x10 EN 10056", "L 150x75x10", ""},
		{"1/2 IPE 300", "1/2 IPE 300", ""},
		{"½ IPE 300", "1/2 IPE 300", ""},
		{"half IPE 300", "1/2 IPE 300", ""},
		{"1/2 HE 300 A", "1/2 HEA 300", ""},
		{"½ 457x191x67 UB", "1/2 UB 457x191x67", ""},
		{"tee cut from UC 305x305x97", "1/2 UC 305x305x97", ""},
		{"T cut from HEB 200", "1/2 HEB 200", ""},
		{"T 305x457x127", "1/2 UB 914x305x253", ""},
		{"305x152x79 tee", "1/2 UC 305x305x158", ""},
		{"133x102x15 T", "1/2 UB 203x133x30", ""},
		{"EHS 300x150x8", "EHS 300x150x8", "hot finished"},
		{"300x150x8 EHS", "EHS 300x150x8", "hot finished"},
		{"EHS 150x300x8", "EHS 300x150x8", "hot finished, longer side upright"},
		{"HFEHS 300x150x8", "EHS 300x150x8", ""},
		{"EHS 300x150x12.5 EN 10210-2", "EHS 300x150x12.5", ""},
	} {
		e, ok := Find(c.text)
		if !ok || e.Designation != c.want || e.Assumed != c.assumed || !e.Listed {
			t.Errorf("Find(%q) = %q, assumed %q, listed %v, %v; want %q, assumed %q", c.text, e.Designation, e.Assumed, e.Listed, ok, c.want, c.assumed)
		}
	}
	for _, text := range []string{"L 150x150x18", "EHS 320x160x10"} {
		if e, ok := Find(text); !ok || e.Listed {
			t.Errorf("Find(%q) = %+v, %v: want it unlisted", text, e, ok)
		}
	}
}

func TestFindRefusesInTheSeries(t *testing.T) {
	for _, text := range []string{
		"UB", "UB 457", "UB 457x191", "457x191x67", "UB 457x191x68", "UC 457x191x67", "UB 203x203x46", "UC 46", "UB 457x191x67 cold", "UB 457x191x67 EN 10210",
		"UC 203x203x46 EN 10056-1", "L 150x75x10 EN 10365", "L 150x75x10 BS 4-1", "L 100x100", "L 100x100x11", "L 100", "100x100x10", "L 100x100x-10", "L 75x10 EN 10365",
		"PFC 200", "PFC 75x200", "PFC 200x75x24", "HD 320", "HD 320x159", "HP 310x110", "HL 1000", "HL 1000 C", "HEAA 210",
		"1/2", "1/2 IPE", "1/2 IPE 310", "½", "1 ½ IPE 300", "1/2 SHS 100x100x5", "1/2 L 100x100x10", "1/2 UPE 200", "1/2 1/2 IPE 300", "1/3 IPE 300", "T", "T 305x457x128", "half",
		"EHS 300x150x8 cold", "CFEHS 300x150x8", "EHS 300x300x8", "EHS 300x150", "EHS 300x150x40", "EHS 150x75x18.75", "EHS", "EHS 300x150x8 EN 10219",
	} {
		if e, ok := Find(text); ok {
			t.Errorf("Find(%q) found %q", text, e.Designation)
		}
	}
}

// No name of one section may lead to another: a spelling that two sections could
// claim would be taken by the later one without a word.
func TestAliasesAreNotShared(t *testing.T) {
	owner := map[string]string{}
	for _, e := range All() {
		if e.American() {
			continue // parsed, see TestAmericanNamesAreOwn
		}
		var buf [maxName]byte
		own, _ := compact(buf[:0], e.Designation)
		for _, name := range append(append(aliases(e, string(own)), turnedAliases(e)...), string(own)) {
			if other, taken := owner[name]; taken && other != e.Designation {
				t.Errorf("%q names %s and %s", name, other, e.Designation)
			}
			owner[name] = e.Designation
		}
	}
	if len(owner) < 3000 {
		t.Errorf("only %d names", len(owner))
	}
}

func TestFamilies(t *testing.T) {
	want := strings.Fields("IPE HEAA HEA HEB HEM HL HD HP UB UC UBP UPN UPE PFC L T SHS RHS CHS EHS W M S C MC WT MT ST 2L HSS PIPE")
	if got := Families(); !slices.Equal(got, want) {
		t.Errorf("%q", got)
	}
	for _, f := range want {
		if familyWords[f] == "" {
			t.Errorf("%s has no words for Search", f)
		}
		if len(Search(f)) == 0 {
			t.Errorf("Search(%q) gives nothing", f)
		}
	}
}

// Half of a section has half of its area, but for the fillets' share nothing
// else in common that could be mistaken.
func TestTeesAreHalves(t *testing.T) {
	count := 0
	for _, e := range All() {
		if e.Family != "T" {
			continue
		}
		count++
		parent, ok := Find(strings.TrimPrefix(e.Designation, teePrefix))
		if !ok || parent.Shape.Depth != 2*e.Shape.Depth || parent.Shape.Root != e.Shape.Root || parent.Standard != e.Standard {
			t.Errorf("%s: %+v of %+v", e.Designation, e.Shape, parent.Shape)
		}
	}
	if count != 247 {
		t.Errorf("%d tees", count)
	}
}

func TestNearestInTheSeries(t *testing.T) {
	for _, c := range []struct {
		text string
		n    int
		want []string
	}{
		{"UB 457x191x68", 2, []string{"UB 457x191x67", "UB 457x191x74"}},
		{"457x191x68 UB", 1, []string{"UB 457x191x67"}},
		{"457x191x67", 1, []string{"UB 457x191x67"}},
		{"203x203x46", 1, []string{"UC 203x203x46"}},
		{"UC 200x200x46", 1, []string{"UC 203x203x46"}},
		{"UB 1016x305x415", 2, []string{"UB 1016x305x438", "UB 1016x305x393"}},
		{"HP 310x110", 1, []string{"HP 305x110"}},
		{"HD 320x160", 1, []string{"HD 320x158"}},
		{"HL 1000", 2, []string{"HL 1000 AA", "HL 1000 A"}},
		{"PFC 200x80", 1, []string{"PFC 200x75x23"}},
		{"L 100x100x11", 2, []string{"L 100x100x12", "L 100x100x10"}},
		{"L 100x11", 2, []string{"L 100x100x12", "L 100x100x10"}},
		{"L 75x150x11", 1, []string{"L 150x75x12"}},
		{"1/2 IPE 310", 2, []string{"1/2 IPE 300", "1/2 IPE 330"}},
		{"half UB 457x191x68", 1, []string{"1/2 UB 457x191x67"}},
		{"EHS 300x150", 2, []string{"EHS 300x150x8", "EHS 300x150x10"}},
		{"EHS 300x150x40", 1, []string{"EHS 300x150x16"}},
		{"HEAA 210", 2, []string{"HEAA 200", "HEAA 220"}},
		{"HEB 210", 2, []string{"HEB 200", "HEB 220"}},
	} {
		if got := Nearest(c.text, c.n); !slices.Equal(got, c.want) {
			t.Errorf("Nearest(%q, %d) = %q, want %q", c.text, c.n, got, c.want)
		}
	}
	for _, text := range []string{"U 200", "T", "½", "1/2"} {
		for _, name := range Nearest(text, 5) {
			if _, ok := Find(name); !ok {
				t.Errorf("Nearest(%q) names %q", text, name)
			}
		}
	}
}

func TestSearchInTheSeries(t *testing.T) {
	for _, c := range []struct {
		text  string
		first string
		n     int
	}{
		{"UB", "UB 127x76x13", 111},
		{"UBP", "UBP 203x203x45", 17},
		{"UB 305", "UB 305x102x25", 9},
		{"HE", "HEAA 100", 96},
		{"T", "1/2 IPE 80", 247},
		{"1/2 UC 152", "1/2 UC 152x152x23", 5},
		{"tee UC 152", "1/2 UC 152x152x23", 5},
		{"universal column 203x203", "UC 203x203x46", 8},
		{"unequal angle 200", "L 200x100x10", 6},
		{"equal 150", "L 150x150x10", 4},
		{"457x191x67 UB", "UB 457x191x67", 1},
		{"elliptical 500", "EHS 500x250x10", 3},
		{"pile 254", "UBP 254x254x63", 3},
		{"EN 10056", "L 20x20x3", 97},
	} {
		got := Search(c.text)
		if len(got) != c.n || got[0].Designation != c.first {
			first := "none"
			if len(got) > 0 {
				first = got[0].Designation
			}
			t.Errorf("Search(%q): %d from %s, want %d from %s", c.text, len(got), first, c.n, c.first)
		}
	}
}

func BenchmarkFindSeries(b *testing.B) {
	for _, text := range []string{"UB 457x191x67", "203 x 203 UC 46", "L 75x150x10", "1/2 IPE 300", "EHS 300x150x8", "EHS 320x160x10", "UB 457x191x68", "UC 203x203x46 BS 4-1"} {
		b.Run(text, func(b *testing.B) {
			Find(text)
			b.ReportAllocs()
			for b.Loop() {
				Find(text)
			}
		})
	}
}
