package schedule_test

import (
	"bytes"
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"strings"
	"testing"

	"kern/checker"
	"kern/checker/generate"
	"kern/checker/schedule"
	"kern/lang"

	"github.com/xuri/excelize/v2"
)

func check(files map[string]string) *checker.Report {
	var names []string
	for name := range files {
		names = append(names, name)
	}
	return checker.Check(lang.Load(names, func(name string) (string, error) {
		if text, ok := files[name]; ok {
			return text, nil
		}
		return "", os.ErrNotExist
	}, nil), nil)
}

// hand is a calculation whose reactions are worked out by hand.
const hand = `basis { standard "EN 1993-1-1:2005"; actions "EN 1990:2002"; show kN, kNm, mm; selfweight off }
case G permanent
case W wind
level ground at 1 m
level roof at 5 m
column C1 { section = "HEB 200"; material = "S355"; from ground to roof; base fixed; top free; load G 100 kN; load W 30 kN across major at top }
column C2 { section = "HEB 200"; material = "S355"; from ground to roof; load G 50 kN; load G 7 kN at base; load W 6 kN across minor at 3 m }
column C10 { section = "HEA 160"; material = "S355"; height = 3 m; load G 40 kN; selfweight on }
tie T1 { section = "HEA 160"; material = "S355"; length = 2 m; load G -40 kN }
column X1 { section = "HEA 160"; height = 3 m; load G 40 kN }
`

// read gives the rows of the CSV by member, and by column.
func read(t *testing.T, s *schedule.Schedule) map[string]map[string]string {
	t.Helper()
	var b bytes.Buffer
	if err := s.CSV(&b); err != nil {
		t.Fatal(err)
	}
	rows, err := csv.NewReader(&b).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	out := map[string]map[string]string{}
	for _, row := range rows[1:] {
		m := map[string]string{}
		for i, head := range rows[0] {
			m[head] = row[i]
		}
		out[row[0]] = m
	}
	return out
}

// TestReactions holds the forces at the base against statics: a cantilever with 30 kN
// at 4 m has V = 30 and M = 120; a beam of 4 m with 6 kN at 3 m from its base has
// V = 6 · 1/4 there.
func TestReactions(t *testing.T) {
	rows := read(t, schedule.New(check(map[string]string{"a.kern": hand}), schedule.ByFile))
	for _, x := range []struct {
		member, column string
		want           float64
	}{
		{"C1", "N G [kN]", 100}, {"C1", "N W [kN]", 0}, {"C1", "V major W [kN]", 30}, {"C1", "M major W [kNm]", 120}, {"C1", "M minor W [kNm]", 0},
		{"C1", "from [mm]", 1000}, {"C1", "to [mm]", 5000}, {"C1", "length [mm]", 4000},
		{"C2", "N G [kN]", 57}, {"C2", "V minor W [kN]", 1.5}, {"C2", "M minor W [kNm]", 0}, {"C2", "V major W [kN]", 0},
		{"C10", "N G [kN]", 40 + 0.0304*9.80665*3}, // 30.4 kg/m, EN 10365
		{"T1", "N G [kN]", -40},
	} {
		got, err := strconv.ParseFloat(rows[x.member][x.column], 64)
		if err != nil {
			t.Errorf("%s, %s: %v", x.member, x.column, err)
			continue
		}
		if math.Abs(math.Abs(got)-math.Abs(x.want)) > 2e-3*max(math.Abs(x.want), 1e-6) || x.column[0] == 'N' && got*x.want < 0 {
			t.Errorf("%s, %s: %g, by hand %g", x.member, x.column, got, x.want)
		}
	}
	for column, want := range map[string]string{"section": "HEA 160", "grade": "", "N G [kN]": "", "N governing [kN]": "", "utilisation": "", "verdict": "undecided"} {
		if got := rows["X1"][column]; got != want {
			t.Errorf("X1 cannot be checked, yet its %s is %q", column, got)
		}
	}
	for _, m := range []string{"C1", "C2"} {
		// the governing combination is the sum of the cases by its factors
		if rows[m]["governing combination"] != "1.35 G + 1.5 W" {
			t.Errorf("%s is governed by %s", m, rows[m]["governing combination"])
		}
		for _, c := range []string{"N ", "V major ", "M major ", "V minor ", "M minor "} {
			unit := map[byte]string{'N': " [kN]", 'V': " [kN]", 'M': " [kNm]"}[c[0]]
			number := func(of string) float64 {
				v, err := strconv.ParseFloat(rows[m][c+of+unit], 64)
				if err != nil {
					t.Fatal(err)
				}
				return v
			}
			if sum := 1.35*number("G") + 1.5*number("W"); math.Abs(sum-number("governing")) > 1e-6 {
				t.Errorf("%s: %sgoverning is %g, the cases make %g", m, c, number("governing"), sum)
			}
		}
	}
}

// TestImported: a member with forces from a table has those of its governing
// combination at the base, and none by case.
func TestImported(t *testing.T) {
	r := check(map[string]string{"a.kern": "basis { standard \"elastic\"; show kN, kNm, mm }\nforces \"f.csv\" compression positive\ncolumn A1 { section = \"HEB 200\"; material = \"S355\"; height = 4 m }\ncolumn B1 { section = \"HEB 200\"; material = \"S355\"; height = 4 m; load 5 kN }\n",
		"f.csv": "member,position [m],combination,N [kN],V_major [kN],M_major [kNm]\nA1,0,one,412.5,7.5,0\nA1,4,one,410,7.5,30\n"})
	row := read(t, schedule.New(r, schedule.ByFile))["A1"]
	for column, want := range map[string]string{"N load [kN]": "", "N governing [kN]": "412.5", "V major governing [kN]": "7.5", "M major governing [kNm]": "0", "governing combination": "one"} {
		if row[column] != want {
			t.Errorf("%s is %q, the table has %q", column, row[column], want)
		}
	}
}

// TestSteel holds masses against those that EN 10365 gives: HEB 200 61.3 kg/m, HEA
// 160 30.4 kg/m.
func TestSteel(t *testing.T) {
	s := schedule.New(check(map[string]string{"a.kern": strings.ReplaceAll(hand, "column X1", "# ")}), schedule.ByFile)
	want := map[string][3]float64{"HEB 200": {2, 8, 8 * 61.3}, "HEA 160": {2, 5, 5 * 30.4}}
	for _, x := range s.Steel {
		w := want[x.Section]
		if float64(x.Pieces) != w[0] || math.Abs(x.Length-w[1]) > 1e-9 || math.Abs(x.Mass/w[2]-1) > 3e-3 {
			t.Errorf("%+v, want %v", x, w)
		}
	}
	if total := s.Total(); total.Pieces != 4 || math.Abs(total.Mass-(8*61.3+5*30.4)) > 2 {
		t.Errorf("%+v", total)
	}
}

// TestOrder sorts the rows.
func TestOrder(t *testing.T) {
	r := check(map[string]string{"a.kern": hand})
	for order, want := range map[schedule.Order]string{
		schedule.ByFile: "C1 C2 C10 T1 X1", schedule.ByName: "C1 C2 C10 T1 X1", schedule.BySection: "C10 T1 X1 C1 C2",
	} {
		if got := names(schedule.New(r, order)); got != want {
			t.Errorf("by %s: %s, want %s", order, got, want)
		}
	}
	list := strings.Fields(names(schedule.New(r, schedule.ByUtilisation)))
	if list[0] != "X1" {
		t.Errorf("what nobody could check is not the first: %v", list)
	}
	last := math.Inf(1)
	for _, m := range list[1:] {
		for _, x := range r.Members {
			if x.Name == m {
				if x.Utilisation > last {
					t.Errorf("%s comes too late", m)
				}
				last = x.Utilisation
			}
		}
	}
	if _, err := schedule.ParseOrder("colour"); err == nil || !strings.Contains(err.Error(), "file, name, utilisation or section") {
		t.Errorf("%v", err)
	}
}

func names(s *schedule.Schedule) string {
	var out []string
	for _, row := range s.Rows {
		out = append(out, row[0].Text)
	}
	return strings.Join(out, " ")
}

// TestWorkbook reads the workbook back: it says what the CSV says, and is the same to
// the byte from run to run.
func TestWorkbook(t *testing.T) {
	r := check(generate.BentProject(25, 2))
	s := schedule.New(r, schedule.ByName)
	var a, b bytes.Buffer
	if err := s.XLSX(&a, "kern test"); err != nil {
		t.Fatal(err)
	}
	if err := schedule.New(r, schedule.ByName).XLSX(&b, "kern test"); err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(a.Bytes(), b.Bytes()) {
		t.Error("the workbook differs from run to run")
	}
	book, err := excelize.OpenReader(&a)
	if err != nil {
		t.Fatal(err)
	}
	rows, err := book.GetRows("members", excelize.Options{RawCellValue: true})
	if err != nil {
		t.Fatal(err)
	}
	want, compared := read(t, s), 0
	for _, row := range rows[1 : len(s.Rows)+1] {
		for i, head := range rows[0] {
			due := want[row[0]][head]
			if due == "" {
				due = "–"
			}
			if row[i] != due {
				x, errX := strconv.ParseFloat(row[i], 64)
				y, errY := strconv.ParseFloat(due, 64)
				if errX != nil || errY != nil || math.Abs(x-y) > 1e-9*math.Abs(y) {
					t.Errorf("%s, %s: the workbook has %s, the CSV %s", row[0], head, row[i], due)
				}
			}
			compared++
		}
	}
	if compared < 300 {
		t.Errorf("only %d cells were compared", compared)
	}
	steel, err := book.GetRows("steel")
	if err != nil || len(steel) != len(s.Steel)+2 || steel[len(steel)-1][0] != "all" {
		t.Errorf("%v %v", steel, err)
	}
}

// TestEmpty lists files without members.
func TestEmpty(t *testing.T) {
	s := schedule.New(check(map[string]string{"a.kern": ""}), schedule.ByFile)
	var b bytes.Buffer
	if err := s.Text(&b, false); err != nil || !strings.Contains(b.String(), "describe no member") {
		t.Errorf("%s %v", b.String(), err)
	}
	if err := s.XLSX(&b, ""); err != nil {
		t.Error(err)
	}
}
