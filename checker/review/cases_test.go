package review_test

import (
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"kern/checker/generate"
	"kern/checker/review"
	"kern/checker/standard"
	"kern/lang"
)

// tie is the worked example of README.md.
func tie(load, area, factor string) string {
	return "basis {\n    standard \"elastic\"\n    factor_yield = " + factor + "\n}\nmaterial m { E = 210 GPa; fy = 250 MPa; density = 7850 kg/m3 }\n" +
		"section s = given { A = " + area + "; I_major = 100 cm4; I_minor = 100 cm4; W_major = 20 cm3; W_minor = 20 cm3; I_t = 1 cm4; thickness = 5 mm }\n" +
		"tie T1 \"Hanger\" {\n    section = s\n    material = m\n    length = 2 m\n    load -" + load + " at top\n}\n"
}

// TestWorkedExample holds the shares against those that README.md works out by
// hand from the definition of the Shapley value.
func TestWorkedExample(t *testing.T) {
	r := compare(tie("100 kN", "10 cm2", "1"), tie("150 kN", "8 cm2", "1.2"))
	c := change(t, r, "T1")
	if c.Method != review.Exact || math.Abs(c.Before.Utilisation-0.4) > 1e-12 || math.Abs(c.After.Utilisation-0.9) > 1e-12 {
		t.Fatalf("%+v", c)
	}
	for text, want := range map[string]float64{
		"load -100 kN": 0.2/3 + 0.25/6 + 0.24/6 + 0.3/3,
		"A = 10 cm2":   0.1/3 + 0.15/6 + 0.12/6 + 0.18/3,
		"factor_yield": 0.08/3 + 0.12/6 + 0.10/6 + 0.15/3,
	} {
		if x := causeOf(c, text); x == nil || math.Abs(x.Share-want) > 1e-12 {
			t.Errorf("%s: %+v, want %.5f", text, x, want)
		}
	}
	if x := causeOf(c, "load -100 kN"); x.Edits[0].Place.Line != 11 || x.Edits[0].Kind != "load" || x.Turns {
		t.Errorf("%+v", x)
	}
}

const plain = `basis {
    standard "EN 1993-1-1:2005"
    actions  "EN 1990:2002"
}
case G permanent
case Q imposed "B"
material s355 = "S355"
section post = "HEB 160"
column A1 "First" {
    section  = post
    material = s355
    height   = 4 m
    base fixed
    load G 300 kN
    load Q 200 kN
}
column A2 as A1 { load G 250 kN; load Q 90 kN }
`

// edit replaces parts of plain.
func edit(t *testing.T, pairs ...string) string {
	t.Helper()
	text := plain
	for i := 0; i < len(pairs); i += 2 {
		if !strings.Contains(text, pairs[i]) {
			t.Fatalf("%q does not stand in the text", pairs[i])
		}
		text = strings.Replace(text, pairs[i], pairs[i+1], 1)
	}
	return text
}

// TestSecondReckoning holds the shares of four edits against the mean over all 24
// orders, each state written as a text of its own and checked whole.
func TestSecondReckoning(t *testing.T) {
	edits := [][2]string{{"height   = 4 m", "height   = 5 m"}, {"load G 300 kN", "load G 340 kN"}, {`"HEB 160"`, `"HEB 180"`}, {"base fixed", "base pinned"}}
	value := func(set int) float64 {
		text := plain
		for i, e := range edits {
			if set>>i&1 == 1 {
				text = strings.Replace(text, e[0], e[1], 1)
			}
		}
		return one(text).Members[0].Utilisation
	}
	want := make([]float64, len(edits))
	var orders func(done int, left []int)
	orders = func(done int, left []int) {
		for k, i := range left {
			rest := append(slices.Clone(left[:k]), left[k+1:]...)
			n := 1.0 // orders that begin so
			for j := 2; j <= len(rest); j++ {
				n *= float64(j)
			}
			want[i] += (value(done|1<<i) - value(done)) * n / 24
			orders(done|1<<i, rest)
		}
	}
	orders(0, []int{0, 1, 2, 3})
	c := change(t, compare(plain, edit(t, edits[0][0], edits[0][1], edits[1][0], edits[1][1], edits[2][0], edits[2][1], edits[3][0], edits[3][1])), "A1")
	sum(t, c)
	for i, e := range edits {
		if x := causeOf(c, strings.Join(strings.Fields(e[1]), " ")); x == nil || math.Abs(x.Share-want[i]) > 1e-12 {
			t.Errorf("%s: %+v, want %.6f", e[1], x, want[i])
		}
	}
}

// TestNothing holds that layout, comments, line ends and the order of
// declarations change nothing.
func TestNothing(t *testing.T) {
	decls := strings.Split(plain, "column A1")
	for name, after := range map[string]string{
		"format":   lang.Format(strings.ReplaceAll(plain, "    ", "\t")),
		"crlf":     strings.ReplaceAll(plain, "\n", "\r\n"),
		"comments": "# A remark.\n" + strings.ReplaceAll(plain, "\n", " # so\n"),
		"glued":    strings.ReplaceAll(plain, " kN\n", "kN\n"),
		"moved":    "column A1" + decls[1] + decls[0],
	} {
		r := compare(plain, after)
		if !r.Nothing() || len(r.Edited) != 0 || r.Same != 2 || len(r.Shared) != 0 || r.Worse() {
			t.Errorf("%s: %+v", name, r)
		}
	}
	if r := compare(plain, edit(t, "base fixed", "base fixed\n    note \"seen\"", `"First"`, `"The first"`)); !r.Nothing() || len(r.Edited) != 2 {
		t.Errorf("a note and a title: %+v", r)
	}
}

// TestIdleEdits holds edits that can do nothing to exactly nothing.
func TestIdleEdits(t *testing.T) {
	c := change(t, compare(plain, edit(t, "load G 250 kN", "load G 260 kN", "load G 300 kN", "load G 700 kN", "load Q 200 kN", "load Q 20 kN", `"First"`, `"Erste"`,
		"case G permanent", "case G permanent\ncase S snow \"below 1000 m\"")), "A2")
	sum(t, c)
	for _, text := range []string{"load G 700 kN", "load Q 20 kN", "Erste"} { // A2 has loads of its own
		if x := causeOf(c, text); x == nil || x.Share != 0 || x.Turns {
			t.Errorf("%s: %+v", text, x)
		}
	}
	if x := causeOf(c, "load G 260 kN"); x == nil || math.Abs(x.Share-(c.After.Utilisation-c.Before.Utilisation)) > 1e-12 {
		t.Errorf("%+v", x)
	}
	if x := causeOf(c, "case S"); x != nil {
		t.Errorf("a case that nothing speaks of: %+v", x)
	}
}

// TestOrderOfEdits holds that the order of declarations has no influence on any
// share, exact or sampled, to the last bit.
func TestOrderOfEdits(t *testing.T) {
	for _, edits := range []int{20, 40} {
		r := rand.New(rand.NewPCG(uint64(edits), 8))
		before := generate.Columns(5, 3)
		after := mutate(before, r, edits)
		shared := func(s string) string {
			if edits > 20 {
				s = strings.Replace(s, "    show ", "    gamma_M1 = 1.05 because \"site\"\n    gamma_M0 = 1.05 because \"site\"\n    show ", 1)
				s = strings.NewReplacer(`"HEB 200"`, `"HEB 180"`, `"HEA 240"`, `"HEA 260"`, `"IPE 300"`, `"IPE 330"`, `"S355H"`, `"S275H"`, `"6.10"`, `"6.10a/b"`, `120x120x6.3`, `120x120x8`).Replace(s)
			}
			return s
		}
		turned := func(text string) string { // the last declaration first
			parts := strings.SplitAfter(text, "}\n\n")
			slices.Reverse(parts)
			return strings.Join(parts, "")
		}
		one := compare(generate.Shared+before, shared(generate.Shared)+after)
		other := compare(turned(before)+"\n"+generate.Shared, turned(after)+"\n"+shared(generate.Shared))
		if len(one.Changes) < 3 || len(one.Changes) != len(other.Changes) {
			t.Fatalf("%d and %d changes", len(one.Changes), len(other.Changes))
		}
		methods := map[review.Method]int{}
		for i := range one.Changes {
			c := &one.Changes[i]
			d := change(t, other, c.Name)
			methods[c.Method]++
			sum(t, c)
			for _, x := range c.Causes {
				if y := causeOf(d, x.Edits[0].String()); y == nil || y.Share != x.Share || d.Method != c.Method {
					t.Errorf("%s: %+v and %+v", c.Name, x, y)
				}
			}
		}
		if edits > 20 && methods[review.Sampled] == 0 {
			t.Errorf("no member had edits enough to be sampled: %v", methods)
		}
	}
}

// TestRenames finds members again by what they say.
func TestRenames(t *testing.T) {
	r := compare(plain, edit(t, "column A1", "column B7", "as A1", "as B7"))
	if len(r.Added)+len(r.Removed) != 0 || r.Same != 2 || len(r.Edited) == 0 {
		t.Errorf("renamed: %+v", r)
	}
	r = compare(plain, edit(t, "column A1", "column B7", "as A1", "as B7", "load G 300 kN", "load G 330 kN"))
	if c := change(t, r, "B7"); c.Was != "A1" || c.Method != review.Exact {
		t.Errorf("renamed and edited: %+v", c)
	} else {
		sum(t, c)
	}
	files := map[string]string{"a.kern": plain}
	moved := map[string]string{"b/posts.kern": edit(t, "height   = 4 m", "height   = 4.2 m")}
	r = review.Compare(check(files), check(moved))
	if c := change(t, r, "A1"); c.Was != "" || len(r.Added)+len(r.Removed) != 0 {
		t.Errorf("moved: %+v", r)
	} else {
		sum(t, c)
	}
	r = compare(plain, plain+"column A3 as A1 { height = 2 m }\n")
	if len(r.Added) != 1 || r.Added[0].Name != "A3" || r.Worse() {
		t.Errorf("added: %+v", r)
	}
	r = compare(plain, strings.Split(plain, "column A2")[0])
	if len(r.Removed) != 1 || r.Removed[0].Name != "A2" || !r.Removed[0].Place.Before {
		t.Errorf("removed: %+v", r)
	}
}

// TestDefinitions: renamed, added and removed definitions are shared out by the
// lines that name them.
func TestDefinitions(t *testing.T) {
	for name, after := range map[string]string{
		"another section": edit(t, "section post", "section mast", `"HEB 160"`, `"HEB 140"`, "section  = post", "section  = mast"),
		"a value":         edit(t, "material s355", "rise = 4.4 m\nmaterial s355", "height   = 4 m", "height   = rise"),
		"a case":          edit(t, "case Q imposed \"B\"", "case Q imposed \"B\"\ncase S snow \"below 1000 m\"", "load Q 200 kN", "load Q 200 kN\n    load S 120 kN"),
		"a case renamed":  edit(t, "case Q imposed \"B\"", "case R imposed \"E1\"", "load Q 200 kN", "load R 210 kN", "load Q 90 kN", "load R 91 kN"),
		"levels":          edit(t, "material s355", "level low at 0 m\nlevel high at 4.5 m { G 2 kN/m2 }\nmaterial s355", "height   = 4 m", "from low to high", "base fixed", "load floor 6 m2 at high"),
		"first permanent": edit(t, "case G permanent", "case D permanent\ncase G permanent", "load G 300 kN", "load G 250 kN\n    load D 70 kN", "load G 250 kN;", "load G 200 kN; load D 60 kN;"),
	} {
		r := compare(plain, after)
		change(t, r, "A1")
		for i := range r.Changes { // A2 has loads of its own
			c := &r.Changes[i]
			if c.Method != review.Exact {
				t.Errorf("%s, %s: %s", name, c.Name, c.Why)
				continue
			}
			sum(t, c)
		}
	}
}

// TestMovedCase: the order of the cases says which of them self-weight belongs to,
// so that moving one is an edit.
func TestMovedCase(t *testing.T) {
	before := edit(t, "case G permanent", "case G permanent\ncase H permanent", "    actions  \"EN 1990:2002\"\n", "", "load Q 90 kN", "load Q 90 kN; load H 5 kN", "load Q 200 kN", "load Q 200 kN\n    load H 5 kN") +
		"combination c = 1.2 G + 1.5 H + 1.5 Q\n"
	after := strings.Replace(before, "case G permanent\ncase H permanent", "case H permanent\ncase G permanent", 1)
	c := change(t, compare(before, after), "A1")
	sum(t, c)
	if x := causeOf(c, "moved case"); x == nil || !(x.Share > 0) {
		t.Errorf("%+v", c)
	}
}

// TestTogether: edits that make no sense apart are taken as one.
func TestTogether(t *testing.T) {
	before := edit(t, `"HEB 160"`, "tube { width = 200 mm; depth = 120 mm; wall = 8 mm; made = hot }")
	after := edit(t, `"HEB 160"`, "pipe { outside = 168.3 mm; wall = 10 mm; made = hot }", "load G 300 kN", "load G 310 kN")
	c := change(t, compare(before, after), "A1")
	if c.Method != review.Exact {
		t.Fatal(c.Why)
	}
	sum(t, c)
	if x := causeOf(c, "pipe"); x == nil || len(x.Edits) != 5 {
		t.Errorf("%+v", x)
	}
	if x := causeOf(c, "load G 310 kN"); x == nil || len(x.Edits) != 1 {
		t.Errorf("%+v", x)
	}
}

// TestUndecided: where the utilisation is not known there are no shares, and the
// edits are listed.
func TestUndecided(t *testing.T) {
	broken := edit(t, "load G 300 kN", "load G 300 kn")
	r := compare(plain, broken)
	c := change(t, r, "A1")
	if !r.Worse() || !c.NewlyUndecided() || c.Method != review.None || c.Why == "" || causeOf(c, "300 kn") == nil || !math.IsNaN(causeOf(c, "300 kn").Share) || len(r.Errors) != 1 {
		t.Errorf("%+v", r)
	}
	r = compare(broken, plain)
	c = change(t, r, "A1")
	if r.Worse() || c.Method != review.None || r.Mended != 1 || len(r.Errors) != 0 || causeOf(c, "300 kN") == nil {
		t.Errorf("%+v", r)
	}
	for _, text := range []string{"", "}{", "column", "\x00", "basis {\ncolumn A1 {"} {
		if r := compare(text, plain); len(r.Added)+len(r.Changes) != 2 {
			t.Errorf("from %q: %+v", text, r)
		}
		compare(plain, text)
	}
}

// TestTurns: the verdict can hang on an edit that does nothing to the utilisation.
func TestTurns(t *testing.T) {
	c := change(t, compare(edit(t, "base fixed", "base fixed\n    limit utilisation = 0.5"), plain), "A1")
	if c.Before.Verdict != standard.Fails || c.After.Verdict != standard.Passes || len(c.Causes) != 1 || c.Causes[0].Share != 0 || !c.Causes[0].Turns || c.Causes[0].Without != standard.Fails {
		t.Errorf("%+v", c)
	}
}

// TestLinked: an edit reaches members that use another's result.
func TestLinked(t *testing.T) {
	before := plain + "column B1 { section = post; material = s355; height = 3 m; load G A1.base.G at top }\n"
	c := change(t, compare(before, strings.Replace(before, "load G 300 kN", "load G 350 kN", 1)), "B1")
	sum(t, c)
	if x := causeOf(c, "load G 350 kN"); x == nil || !(x.Share > 0) {
		t.Errorf("%+v", c)
	}
}

// TestShared lists edits of shared definitions with those that they reach.
func TestShared(t *testing.T) {
	before := map[string]string{"common.kern": strings.Split(plain, "column A1")[0] + "section other = \"HEA 200\"\n", "a.kern": "include \"common.kern\"\ncolumn A1" + strings.Split(plain, "column A1")[1],
		"b.kern": "include \"common.kern\"\ncolumn B1 { section = other; material = s355; height = 3 m; load G 100 kN }\n"}
	after := map[string]string{"common.kern": strings.Replace(before["common.kern"], "HEB 160", "HEB 180", 1), "a.kern": before["a.kern"], "b.kern": before["b.kern"]}
	r := review.Compare(check(before), check(after))
	if len(r.Shared) != 1 || !slices.Equal(r.Shared[0].Reaches, []string{"A1", "A2"}) || r.Shared[0].Changed != 2 || r.Shared[0].Edit.Place.File != "common.kern" || r.Same != 1 {
		t.Errorf("%+v", r)
	}
}

// TestLoosened lists what asks less than before.
func TestLoosened(t *testing.T) {
	has := func(before, after, what string, unexplained bool) {
		t.Helper()
		r := compare(before, after)
		for _, l := range r.Loosened {
			if strings.Contains(l.What, what) && l.Unexplained() == unexplained && l.Place.Line > 0 {
				return
			}
		}
		t.Errorf("no %q in %+v", what, r.Loosened)
	}
	limit := func(line string) string { return edit(t, "base fixed", "base fixed\n    "+line) }
	has(limit("limit utilisation = 0.8"), limit("limit utilisation = 0.9"), "limit utilisation raised", true)
	has(limit("limit slenderness = 180"), plain, "limit slenderness removed", true)
	has(limit("limit sway = height / 300"), limit("limit sway = height / 200"), "limit sway raised", true)
	has(limit("limit deflection = span / 300"), plain, "limit deflection removed", true)
	has(limit("require utilisation <= 0.8"), limit(`require utilisation <= 0.95 because "agreed"`), "requirement loosened", false)
	has(limit("require N_b_minor >= 100 kN"), limit("require N_b_minor >= 90 kN"), "requirement loosened", true)
	has(limit("require N_b_minor >= 100 kN"), plain, "requirement removed", true)
	has(limit(`require utilisation <= 0.8 because "one"`), limit(`require utilisation <= 0.8 because "two"`), "in other words", false)
	has(plain, limit(`depart flexural-buckling-minor because "existing"`), "departs from flexural-buckling-minor", false)
	has(limit(`depart slenderness because "one"`), limit(`depart slenderness because "two"`), "in other words", false)
	has(plain, limit("selfweight off"), "self-weight no longer counts", true)
	has(plain, limit("effective = 0.7"), "effective length factor", true)
	basis := func(line string) string { return edit(t, "    actions", "    "+line+"\n    actions") }
	has(plain, basis(`gamma_M1 = 0.95 because "so"`), "gamma_M1 replaces", false)
	has(basis(`gamma_M1 = 1.1 because "so"`), basis(`gamma_M1 = 1.05 because "so"`), "gamma_M1 lowered", false)
	has(basis(`gamma_M1 = 1.1 because "so"`), plain, "standard's value again", true)
	has(basis(`gamma_M1 = 1.1 because "so"`), basis(`gamma_M1 = 1.1 because "such"`), "in other words", false)
	has(plain, basis("selfweight off"), "self-weight no longer counts", true)
	has(plain, edit(t, "1-1:2005", "1-1:2022"), "another design standard", true)
	has(plain, edit(t, `"EN 1990:2002"`, `"EN 1990:2002" eq "6.10a/b"`), "other combinations", true)
	if r := compare(limit("limit utilisation = 0.9"), limit("limit utilisation = 0.8")); len(r.Loosened) != 0 {
		t.Errorf("a limit that asks more: %+v", r.Loosened)
	}
}

// TestTables: the lines of a table of forces are an edit of the members that they
// are about.
func TestTables(t *testing.T) {
	files := func(text, table string) map[string]string {
		return map[string]string{"frame/a.kern": "include \"../basis.kern\"\nforces \"out/frame.csv\" compression positive\n" + text, "basis.kern": "basis { standard \"EN 1993-1-1:2005\" }\n", "frame/out/frame.csv": table}
	}
	const text = "column A1 { section = \"HEB 160\"; material = \"S355\"; height = 4 m }\ncolumn A2 as A1 {}\n"
	const table = "# from the frame\nmember;position [m];combination;N [kN];M_major [kNm]\nA1;0;one;412;0\nA1;4;one;410;20\nA1;0;two;300;0\nA1;4;two;300;30\nA2;0;one;200;0\nA2;4;one;200;10\n"
	edited := strings.NewReplacer("A1;4;one;410;20", "A1;4;one;520;40", "A1;0;one;412", "A1;0;one;522").Replace(table)
	r := review.Compare(check(files(text, table)), check(files(strings.Replace(text, "height = 4 m", "height = 4 m; base fixed", 1), edited)))
	c := change(t, r, "A1")
	if c.Method != review.Exact || len(c.Causes) != 2 {
		t.Fatalf("%+v", c)
	}
	sum(t, c)
	if x := causeOf(c, "A1;4;one;520;40"); x == nil || len(x.Edits) != 2 || !(x.Share > 0) || x.Edits[1].Place.File != "frame/out/frame.csv" || x.Edits[1].Place.Line != 4 {
		t.Errorf("%+v", x)
	}
	d := change(t, r, "A2")
	if x := causeOf(d, "A1;4;one;520;40"); x != nil || len(d.Causes) != 1 {
		t.Errorf("the lines of another: %+v", d)
	}
	sum(t, d)
	r = review.Compare(check(files(text, table)), check(files(strings.Replace(text, "A1", "B1", 2), strings.ReplaceAll(edited, "A1", "B1"))))
	if c := change(t, r, "B1"); c.Was != "A1" || c.Method != review.Exact {
		t.Errorf("renamed: %+v", c)
	} else {
		sum(t, c)
	}
}
