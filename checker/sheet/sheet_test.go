package sheet_test

import (
	"bytes"
	"encoding/json"
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"runtime"
	"slices"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/derivation"
	"kern/checker/generate"
	"kern/checker/output"
	"kern/checker/sheet"
	"kern/lang"
	"kern/lang/unit"

	"github.com/google/go-cmp/cmp"
	"golang.org/x/tools/txtar"
)

var (
	update = flag.Bool("update", false, "write the golden files anew")
	all    = flag.Bool("all", false, "print all broken files, not a few")
)

// check works out a set of files.
func check(files map[string]string) *checker.Report {
	var names []string
	for name := range files {
		names = append(names, name)
	}
	slices.Sort(names)
	read := func(name string) (string, error) {
		if text, ok := files[name]; ok {
			return text, nil
		}
		return "", os.ErrNotExist
	}
	return checker.Check(lang.Load(names, read, nil), nil)
}

// boathouse is the demo project.
func boathouse(t testing.TB) map[string]string {
	t.Helper()
	paths, err := filepath.Glob("../../testdata/boathouse/*.kern")
	if err != nil || len(paths) < 6 {
		t.Fatal(paths, err)
	}
	files := map[string]string{}
	for _, p := range paths {
		text, err := os.ReadFile(p)
		if err != nil {
			t.Fatal(err)
		}
		files["boathouse/"+filepath.Base(p)] = string(text)
	}
	return files
}

// printed is a report's sheet in a form.
func printed(t testing.TB, r *checker.Report, form string, o sheet.Options) []byte {
	t.Helper()
	o.Program = "kern test"
	s, err := sheet.New(r, o)
	if err != nil {
		t.Fatal(err)
	}
	var b bytes.Buffer
	if err := s.Write(&b, form, nil); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

var forms = []string{"html", "pdf", "markdown"}

// jsonMember is what the machine-readable results say of a member.
type jsonMember struct {
	Name, Verdict, Governing, Combination string
	Utilisation                           *float64
	Checks                                []struct {
		Rule, Verdict    string
		Utilisation      *float64
		Demand, Capacity struct {
			Value *float64
			Unit  string
		}
	}
	Quantities []struct {
		Symbol string
		Value  *float64
		Unit   string
	}
}

func jsonOf(t *testing.T, r *checker.Report) map[string]jsonMember {
	t.Helper()
	var b bytes.Buffer
	if err := output.JSON(&b, r, "kern test", func(s string) string { return s }, nil); err != nil {
		t.Fatal(err)
	}
	var doc struct{ Members []jsonMember }
	if err := json.Unmarshal(b.Bytes(), &doc); err != nil {
		t.Fatal(err)
	}
	out := map[string]jsonMember{}
	for _, m := range doc.Members {
		out[m.Name] = m
	}
	return out
}

// amount is how a sheet prints a value of the JSON: to four digits.
func amount(v *float64, symbol string) string {
	if v == nil {
		return "–"
	}
	return strings.TrimSpace(unit.Number(*v, 4) + " " + ascii.Replace(symbol))
}

func ratio(v *float64) string {
	if v == nil {
		return "–"
	}
	return checker.Ratio(*v)
}

// TestNumbersAreThoseOfJSON holds every row of the tables of checks, and every
// value of every working, against the machine-readable results.
func TestNumbersAreThoseOfJSON(t *testing.T) {
	rows, values := 0, 0
	for _, files := range []map[string]string{boathouse(t), generate.Project(30, 11), generate.BentProject(20, 5)} {
		r, v := sameNumbers(t, check(files))
		rows, values = rows+r, values+v
	}
	if rows < 250 || values < 800 {
		t.Errorf("only %d rows and %d values were compared", rows, values)
	}
}

func sameNumbers(t *testing.T, r *checker.Report) (rows, values int) {
	t.Helper()
	want := jsonOf(t, r)
	for _, c := range chapters(parse(t, printed(t, r, "html", sheet.Options{Full: true}))) {
		first, _, _ := strings.Cut(c.title, ":")
		first, _, _ = strings.Cut(first, ",")
		m, ok := want[first]
		checks := c.table("check", "utilisation")
		if !ok || checks == nil {
			continue
		}
		i := 0
		for _, row := range checks[1:] {
			x := m.Checks[i]
			i++
			got := []string{row[1], row[2], row[3], strings.TrimSuffix(row[4], ", departed from")}
			due := []string{ratio(x.Utilisation), amount(x.Demand.Value, x.Demand.Unit), amount(x.Capacity.Value, x.Capacity.Unit), x.Verdict}
			if !slices.Equal(got, due) {
				t.Errorf("%s, %s: the sheet has %q, the JSON %q", first, row[0], got, due)
			}
			rows++
		}
		if i != len(m.Checks) {
			t.Errorf("%s: %d rows of %d checks", first, i, len(m.Checks))
		}
		// every value that the JSON has of the working stands on the page
		on := map[string][]string{}
		for _, e := range c.equations {
			symbol, _, _ := strings.Cut(e, " = ")
			on[symbol] = append(on[symbol], e[strings.LastIndex(e, " = ")+3:])
		}
		for _, table := range c.tables {
			if table[0][0] == "symbol" {
				for _, row := range table[1:] {
					on[row[0]] = append(on[row[0]], row[2])
				}
			}
		}
		for _, q := range m.Quantities {
			if len(on[q.Symbol]) == 0 || q.Value == nil { // of a check that does not apply
				continue
			}
			due := number(t, unit.Number(*q.Value, derivation.Digits))
			if !slices.ContainsFunc(on[q.Symbol], func(s string) bool {
				digits, _, _ := strings.Cut(s, " ")
				return s != "not known" && number(t, digits) == due
			}) {
				t.Errorf("%s: %s is printed as %s, the JSON has %g", first, q.Symbol, on[q.Symbol], due)
			}
			values++
		}
	}
	return rows, values
}

func number(t *testing.T, s string) float64 {
	t.Helper()
	return evaluate(t, s, nil)
}

// evaluate computes a text with the values of symbols.
func evaluate(t *testing.T, text string, known map[string]unit.Quantity) float64 {
	t.Helper()
	return quantity(t, text, known).Value
}

func quantity(t *testing.T, text string, known map[string]unit.Quantity) unit.Quantity {
	t.Helper()
	e, err := lang.ParseExpr(text)
	if err != nil {
		t.Fatalf("%q cannot be read: %v", text, err)
	}
	q, p := lang.Eval(e, func(n *lang.Expr) (unit.Quantity, *lang.Problem) {
		v, ok := known[n.Text]
		if !ok {
			t.Fatalf("%q: the sheet does not say what %s is", text, n.Text)
		}
		return v, nil
	})
	if p != nil {
		t.Fatalf("%q has no value: %s", text, p.Message)
	}
	return q
}

// TestSameBytes: the same files give the same sheet, in every form, whatever the
// order they were asked for in and the number of cores.
func TestSameBytes(t *testing.T) {
	files := boathouse(t)
	first := map[string][]byte{}
	for _, form := range forms {
		first[form] = printed(t, check(files), form, sheet.Options{})
	}
	defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(1))
	for _, form := range forms {
		if again := printed(t, check(files), form, sheet.Options{}); !bytes.Equal(again, first[form]) {
			t.Errorf("%s differs from run to run", form)
		}
	}
}

// TestGolden keeps a sheet as it reads: structure and numbers.
func TestGolden(t *testing.T) {
	files := boathouse(t)
	asked := []string{"boathouse/gallery.kern", "boathouse/mast.kern"}
	r := checker.Check(lang.Load(asked, func(name string) (string, error) { return files[name], nil }, nil), nil)
	got := printed(t, r, "markdown", sheet.Options{Asked: asked})
	path := filepath.Join("testdata", "boathouse.md")
	if *update {
		if err := os.MkdirAll("testdata", 0o777); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(path, got, 0o666); err != nil {
			t.Fatal(err)
		}
		return
	}
	want, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if d := cmp.Diff(string(bytes.ReplaceAll(want, []byte("\r\n"), []byte("\n"))), string(got)); d != "" {
		t.Errorf("(-want +got; -update writes it)\n%s", d)
	}
}

// TestNothingIsLost: verdicts that are no pass, departures with their reasons, what
// was not checked and assumptions stand in every form.
func TestNothingIsLost(t *testing.T) {
	r := check(boathouse(t))
	for _, form := range forms {
		data := printed(t, r, form, sheet.Options{})
		text := string(data)
		switch form {
		case "html":
			text = said(parse(t, data))
		case "pdf":
			var b strings.Builder
			for _, p := range pdfPages(t, data) {
				for _, w := range p.words {
					b.WriteString(w.text + " ")
				}
			}
			text = b.String()
		}
		squeeze := strings.NewReplacer(" ", "", "\n", "", "**", "", "`", "", `\`, "", "|", "")
		text = squeeze.Replace(text)
		for _, m := range r.Members {
			due := []string{m.Title}
			for _, d := range m.Departures {
				due = append(due, d.Because)
			}
			due = append(due, m.Assumptions...)
			due = append(due, m.Member.Notes...)
			for _, c := range m.Coverage {
				due = append(due, c.Rule, c.Why)
			}
			for _, d := range due {
				if !strings.Contains(text, squeeze.Replace(strings.NewReplacer("mm2", "mm²", " m2", " m²").Replace(d))) && !strings.Contains(text, squeeze.Replace(d)) {
					t.Errorf("%s: %s: %q is not there", form, m.Name, d)
				}
			}
		}
		for _, due := range []string{"Local codes govern; a licensed engineer decides.", "kern test", fmt.Sprintf("%d members: %d pass, %d fail, %d undecided", r.Summary.Members, r.Summary.Passes, r.Summary.Fails, r.Summary.Undecided)} {
			if !strings.Contains(text, squeeze.Replace(due)) {
				t.Errorf("%s lacks %q", form, due)
			}
		}
	}
}

// TestUnknownMember asks for a member that is not there.
func TestUnknownMember(t *testing.T) {
	_, err := sheet.New(check(boathouse(t)), sheet.Options{Members: []string{"Z9"}})
	if err == nil || !strings.Contains(err.Error(), "Z9") || !strings.Contains(err.Error(), "P1") {
		t.Errorf("the error says %v", err)
	}
}

// TestEmpty prints files with nothing in them, and files with nothing but errors.
func TestEmpty(t *testing.T) {
	for name, text := range map[string]string{"empty": "", "comment": "# nothing\n", "broken": "colunm A1 {\n", "no standard": "column A1 { section = \"HEB 160\"; material = \"S355\"; height = 4 m; load 20 kN }\n", "binary": "\x00\x01\x02"} {
		r := check(map[string]string{"a.kern": text})
		for _, form := range forms {
			if data := printed(t, r, form, sheet.Options{}); len(data) < 200 {
				t.Errorf("%s as %s: %d bytes", name, form, len(data))
			}
		}
		if s, err := sheet.New(r, sheet.Options{}); err != nil || s.Tally.Word == "passes" {
			t.Errorf("%s: %v, the cover says %v", name, err, s)
		}
	}
}

func ExampleReadMark() {
	_, ok := sheet.ReadMark([]byte("a letter"))
	fmt.Println(ok)
	// Output: false
}

// TestSharedBasis: calculations that include one basis have it written once, unless a
// name means different things in them.
func TestSharedBasis(t *testing.T) {
	count := func(files map[string]string) int {
		return strings.Count(string(printed(t, check(files), "markdown", sheet.Options{})), "\n## Basis of ")
	}
	column := func(name, section string) string {
		return "include \"basis.kern\"\n" + section + "\ncolumn " + name + " { section = post; material = \"S355\"; height = 3 m; load 10 kN }\n"
	}
	files := map[string]string{"basis.kern": "basis { standard \"elastic\" }\n"}
	same, other := "section post = bar { width = 50 mm }", "section post = bar { width = 60 mm }"
	files["a.kern"], files["b.kern"] = column("A1", same), column("B1", same)
	if n := count(files); n != 1 {
		t.Errorf("one basis is written %d times", n)
	}
	files["b.kern"] = column("B1", other)
	if n := count(files); n != 2 {
		t.Errorf("two sections of one name stand below %d headings", n)
	}
	files["b.kern"] = strings.Replace(column("B1", same), "include \"basis.kern\"", "basis { standard \"elastic\"; factor_yield = 1.5 }", 1)
	if n := count(files); n != 2 {
		t.Errorf("two bases stand below %d headings", n)
	}
}

// TestBrokenFiles prints the broken files of the language in every form: nothing
// stops the printer, and no cover says that broken files pass. A few are taken,
// all with -all.
func TestBrokenFiles(t *testing.T) {
	paths, err := filepath.Glob("../../testdata/broken/*.txtar")
	if err != nil || len(paths) < 100 {
		t.Fatal(len(paths), err)
	}
	step := 40
	if *all {
		step = 1
	}
	for i := 0; i < len(paths); i += step {
		data, err := os.ReadFile(paths[i])
		if err != nil {
			t.Fatal(err)
		}
		files := map[string]string{}
		for _, f := range txtar.Parse(data).Files {
			if f.Name != "want" {
				files[f.Name] = string(f.Data)
			}
		}
		r := check(files)
		for _, form := range forms {
			printed(t, r, form, sheet.Options{Full: true})
		}
		s, err := sheet.New(r, sheet.Options{})
		if err != nil {
			t.Fatal(err)
		}
		if r.Summary.Errors > 0 && s.Tally.Word == "passes" {
			t.Errorf("%s has %d errors, and the cover says it passes", paths[i], r.Summary.Errors)
		}
	}
}
