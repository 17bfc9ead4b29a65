package checker_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"runtime"
	"slices"
	"strings"
	"testing"
	"time"

	"kern/checker"
	"kern/checker/standard"
	"kern/lang"
)

// thirty writes a calculation of 30 members that lean on shared definitions, on
// values, on levels and on one another.
func thirty() string {
	var b strings.Builder
	b.WriteString(`basis {
    standard "EN 1993-1-1:2005"
    actions  "EN 1990:2002" eq "6.10"
}
eaves = 4.80 m
rise  = eaves / 4
storey = max(3 m, eaves - 1.5 m)
material s355 = "S355" per "EN 10025-2"
material s275 = "S275" per "EN 10025-2"
material own { E = 205 GPa; fy = 300 MPa; density = 7850 kg/m3 }
section mast = "HEB 160"
section post = "HEA 200"
section leg = tube { width = 90 mm; wall = 6.3 mm; made = cold }
section pole = pipe { outside = 168.3 mm; wall = 8 mm; made = hot }
case G permanent
case Q imposed "C3"
case S snow "below 1000 m"
level ground at 0 m
level gallery at 4.20 m { G 4.1 kN/m2; Q 5 kN/m2 }
level roof at 8.10 m { G 0.9 kN/m2; S 0.8 kN/m2 }
`)
	sections := []string{"mast", "post", "leg", "pole"}
	materials := []string{"s355", "s275", "own"}
	heights := []string{"3 m", "eaves", "rise + 2 m", "storey", "14 ft 6 in"}
	for i := 1; i <= 30; i++ {
		if i%7 == 0 {
			fmt.Fprintf(&b, "\ncolumn C%d as C%d { load Q %d kN; load G 20 kN }\n", i, i-1, 2+i)
			continue
		}
		fmt.Fprintf(&b, "\ncolumn C%d \"Column %d\" {\n    section = %s\n    material = %s\n", i, i, sections[i%min(4, 1+i%5)], materials[i%3])
		if i%5 == 0 {
			b.WriteString("    from ground to roof\n    hold both at gallery\n    load floor 9 m2 at gallery\n    load floor 9 m2 at roof\n")
		} else {
			fmt.Fprintf(&b, "    height = %s\n    base fixed about major\n    load Q %d kN\n", heights[i%5], 5+i)
		}
		fmt.Fprintf(&b, "    load G %d kN at top\n    limit slenderness = 200\n}\n", 10+2*i)
	}
	return b.String()
}

// sameResult tells whether two results are the same to the last bit.
func sameResult(a, b *checker.Result) bool {
	bits := math.Float64bits
	if a.Verdict != b.Verdict || bits(a.Utilisation) != bits(b.Utilisation) || a.Governing != b.Governing || a.Combination != b.Combination ||
		len(a.Checks) != len(b.Checks) || !slices.Equal(a.Assumptions, b.Assumptions) || !slices.Equal(a.Missing, b.Missing) || !slices.Equal(a.Coverage, b.Coverage) {
		return false
	}
	for i, c := range a.Checks {
		d := b.Checks[i]
		if c.Rule != d.Rule || c.Verdict != d.Verdict || a.CombinationName(c) != b.CombinationName(d) || c.Why != d.Why || c.Departed != d.Departed ||
			bits(c.Demand) != bits(d.Demand) || bits(c.Capacity) != bits(d.Capacity) || bits(c.Utilisation) != bits(d.Utilisation) {
			return false
		}
	}
	return true
}

// mutated breaks one random line of a text.
func mutated(text string, r *rand.Rand) string {
	lines := strings.Split(text, "\n")
	i := r.IntN(len(lines))
	for lines[i] == "" {
		i = r.IntN(len(lines))
	}
	line := lines[i]
	at := r.IntN(len(line))
	switch r.IntN(4) {
	case 0:
		line = line[:at] + line[at+1:]
	case 1:
		const signs = "{}()\",;=#.-+*/_ 0aGk\r\x80é"
		c := signs[r.IntN(len(signs))]
		line = line[:at] + string([]byte{c}) + line[at:]
	case 2:
		line = line[:at]
	default:
		if at+1 < len(line) {
			line = line[:at] + line[at+1:at+2] + line[at:at+1] + line[at+2:]
		} else {
			line += line
		}
	}
	lines[i] = line
	return strings.Join(lines, "\n")
}

// given are the names that a declaration's statements give or may give, and the
// words that they begin with.
func given(d *lang.Decl) (names, words []string) {
	for _, s := range d.Stmts {
		words = append(words, s.Word)
		names = append(names, s.Word)
		for _, e := range s.Args {
			if e.Kind == lang.NameExpr {
				names = append(names, e.Text)
			}
		}
	}
	return names, words
}

// leansOn gives the names that a declaration mentions, and those that the
// declarations of these names mention, to the end.
func leansOn(f *lang.File, d *lang.Decl) map[string]bool {
	owner := map[string][]*lang.Decl{}
	for _, d := range f.Decls {
		for _, s := range d.Stmts {
			if _, value := s.Assigned(); value {
				owner[s.Word] = append(owner[s.Word], d)
			} else if len(s.Args) > 0 {
				owner[s.Args[0].Text] = append(owner[s.Args[0].Text], d)
			}
		}
	}
	out := map[string]bool{}
	queue := []*lang.Decl{d}
	for len(queue) > 0 {
		d := queue[0]
		queue = queue[1:]
		for _, t := range lang.Tokens(d.Text) {
			if name := t.Span().Of(d.Text); t.Kind == lang.Name && !out[name] {
				out[name] = true
				queue = append(queue, owner[name]...)
			}
		}
	}
	return out
}

// TestBrokenLineBreaksItself breaks one line of a calculation of 30 members in
// 500 ways: every member whose own text and whose shared definitions are as
// they were has the result that it had, to the last bit.
func TestBrokenLineBreaksItself(t *testing.T) {
	text := thirty()
	whole := checkFiles(map[string]string{"a.kern": text})
	if whole.Summary.Members != 30 || whole.Summary.Errors > 0 || whole.Summary.Undecided > 0 {
		t.Fatalf("the calculation is not good: %+v\n%s", whole.Summary, reported(map[string]string{"a.kern": text}, whole))
	}
	shared := map[string]bool{"basis": true, "case": true, "combination": true, "level": true}
	r := rand.New(rand.NewPCG(1, 2))
	compared, broken := 0, 0
	for round := range 500 {
		files := map[string]string{"a.kern": mutated(text, r)}
		after := checkFiles(files)
		spansInside(t, files, after)
		soundMembers(t, after)
		if after.Summary.Failed() {
			broken++
		}
		read := func(name string) (string, error) { return files[name], nil }
		again := checker.CheckAgain(whole, lang.Load([]string{"a.kern"}, read, whole.Project), nil)
		if want, got := reported(files, after), reported(files, again); want != got {
			t.Errorf("round %d: after the edit the report is not that of the text: %s", round, firstDifference(want, got))
		}
		count := map[string]int{}
		for _, d := range whole.Project.Files["a.kern"].Decls {
			count[d.Text]++
		}
		var touched []*lang.Decl
		for _, d := range after.Project.Files["a.kern"].Decls {
			if count[d.Text]--; count[d.Text] < 0 {
				touched = append(touched, d)
			}
		}
		for _, d := range whole.Project.Files["a.kern"].Decls {
			if count[d.Text] > 0 {
				touched = append(touched, d)
			}
		}
		changed := map[string]bool{}
		everything := false
		for _, d := range touched {
			names, words := given(d)
			for _, n := range names {
				changed[n] = true
			}
			for _, w := range words {
				everything = everything || shared[w]
			}
		}
		if everything {
			continue
		}
		for _, m := range whole.Members {
			leans := leansOn(whole.Project.Files["a.kern"], m.Member.Decl)
			free := !slices.Contains(touched, m.Member.Decl)
			for _, d := range touched {
				_, words := given(d)
				// what a broken member mentions, it does not define
				if len(words) > 0 && words[0] == "column" && len(d.Stmts) == 1 {
					free = free && !(len(d.Stmts[0].Args) > 0 && leans[d.Stmts[0].Args[0].Text])
					continue
				}
				names, _ := given(d)
				for _, n := range names {
					free = free && !leans[n]
				}
			}
			if !free {
				continue
			}
			compared++
			now := member(after, m.Name)
			if now == nil || !sameResult(m, now) {
				t.Errorf("round %d: %s was %s %v, is now %+v; touched was %q", round, m.Name, m.Verdict, m.Utilisation, now, texts(touched))
			}
		}
	}
	t.Logf("%d of 500 texts are broken; %d results compared", broken, compared)
	if compared < 8000 || broken < 250 {
		t.Errorf("only %d results were compared, %d texts were broken", compared, broken)
	}
}

func texts(decls []*lang.Decl) []string {
	var out []string
	for _, d := range decls {
		out = append(out, d.Text)
	}
	return out
}

// soundMembers demands of every report that each member has a verdict, and that
// none passes without a utilisation or with an error in its own declaration.
func soundMembers(t testing.TB, r *checker.Report) {
	t.Helper()
	judged := map[*lang.Stmt]bool{}
	for _, m := range r.Members {
		judged[m.Member.Stmt] = true
		if m.Verdict != standard.Passes {
			continue
		}
		if math.IsNaN(m.Utilisation) || math.IsInf(m.Utilisation, 0) {
			t.Errorf("%s passes with utilisation %v", m.Name, m.Utilisation)
		}
		file, name := r.Place(m)
		start := name.Start - m.Member.NameSpan.Start
		own := lang.Span{Start: start + m.Member.Stmt.Span.Start, End: start + m.Member.Stmt.Span.End}
		for _, d := range r.Diagnostics {
			if d.Severity == lang.Error && d.File == file && own.Start <= d.Span.Start && d.Span.End <= own.End {
				t.Errorf("%s passes, yet its declaration has the error %s: %s", m.Name, d.Rule, d.Message)
			}
		}
	}
	for _, root := range r.Project.Roots {
		for _, f := range r.Project.Closure(root) {
			for _, d := range f.Decls {
				for _, s := range d.Stmts {
					named := len(s.Args) > 0 && s.Args[0].Kind == lang.NameExpr && !s.Args[0].Is("as")
					if (s.Word == "column" || s.Word == "strut" || s.Word == "tie") && named && !judged[s] {
						t.Errorf("%q has no verdict", s.Line.Of(d.Text))
					}
				}
			}
		}
	}
	if n := r.Summary.Passes + r.Summary.Fails + r.Summary.Undecided; n != len(r.Members) {
		t.Errorf("%d verdicts for %d members", n, len(r.Members))
	}
}

// FuzzCheck checks any text: it never panics, ends soon, says everything within
// the text, gives every member a verdict, and says the same again.
func FuzzCheck(f *testing.F) {
	for _, a := range brokenArchives(f) {
		f.Add(a.files["a.kern"])
	}
	f.Add(thirty())
	f.Add("basis { standard \"elastic\" }\ncolumn A { section = \"HEB 160\"; material = \"S355\"; height = 4 m; load 80 kN at top offset 20 mm about major }\n")
	f.Fuzz(func(t *testing.T, text string) {
		if len(text) > 64<<10 {
			return
		}
		files := map[string]string{"a.kern": text, "b.kern": "eaves = 4 m\nsection hb = \"HEB 200\"\n", "c.kern": "include \"a.kern\"\n"}
		start := time.Now()
		r := checkFiles(files)
		if took := time.Since(start); took > 5*time.Second {
			t.Errorf("%d bytes took %v", len(text), took)
		}
		spansInside(t, files, r)
		soundMembers(t, r)
		if first, second := reported(files, r), reported(files, checkFiles(files)); first != second {
			t.Errorf("the same text says\n%s\nand then\n%s", first, second)
		}
	})
}

// TestCheckIsDeterministic checks the same files in other orders and on other
// numbers of cores.
func TestCheckIsDeterministic(t *testing.T) {
	files := map[string]string{}
	var names []string
	for _, a := range brokenArchives(t) {
		for name, text := range a.files {
			name = a.name + "/" + name
			files[name] = text
			names = append(names, name)
		}
	}
	files["thirty.kern"] = thirty()
	names = append(names, "thirty.kern")
	check := func() *checker.Report {
		return checker.Check(lang.Load(names, func(name string) (string, error) {
			if text, ok := files[name]; ok {
				return text, nil
			}
			return "", fmt.Errorf("there is no such file")
		}, nil), nil)
	}
	slices.Sort(names)
	first := check()
	want := reported(files, first)
	if len(first.Members) < 400 || len(first.Diagnostics) < 1000 {
		t.Fatalf("%d members and %d diagnostics are too few to compare", len(first.Members), len(first.Diagnostics))
	}
	r := rand.New(rand.NewPCG(3, 4))
	cores := runtime.GOMAXPROCS(0)
	defer runtime.GOMAXPROCS(cores)
	for round := range 6 {
		runtime.GOMAXPROCS(1 + round%2)
		r.Shuffle(len(names), func(i, j int) { names[i], names[j] = names[j], names[i] })
		again := check()
		if got := reported(files, again); got != want {
			t.Fatalf("round %d: another order or number of cores says something else\n%s", round, firstDifference(want, got))
		}
		for i, m := range first.Members {
			if !sameResult(m, again.Members[i]) {
				t.Errorf("round %d: %s has another result", round, m.Name)
			}
		}
	}
}

func firstDifference(a, b string) string {
	x, y := strings.Split(a, "\n"), strings.Split(b, "\n")
	for i := range min(len(x), len(y)) {
		if x[i] != y[i] {
			return fmt.Sprintf("line %d: %q is now %q", i, x[i], y[i])
		}
	}
	return "one is longer"
}

// TestMutatedArchives breaks a line more of every broken calculation.
func TestMutatedArchives(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 6))
	for _, a := range brokenArchives(t) {
		for range mutations {
			if strings.TrimSpace(a.files["a.kern"]) == "" {
				continue
			}
			files := map[string]string{}
			for name, text := range a.files {
				files[name] = text
			}
			files["a.kern"] = mutated(a.files["a.kern"], r)
			report := checkFiles(files)
			spansInside(t, files, report)
			soundMembers(t, report)
			if t.Failed() {
				t.Fatalf("%s, broken further:\n%s", a.name, files["a.kern"])
			}
		}
	}
}

// mutations is how often each archive is broken further.
const mutations = 10
