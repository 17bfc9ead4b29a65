package checker

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"kern/checker/generate"
	"kern/checker/standard"
	"kern/lang"
)

// tableOf writes what the program's own analysis of a member found, as another
// analysis would: the forces at every height where they have a kink or a step.
func tableOf(b *strings.Builder, r *Result, sign float64) {
	f := standard.NewFrame(r.env, r.Member, r.combinations)
	h := r.Member.Height
	for k, c := range r.combinations {
		heights := append([]float64(nil), f.Heights()...)
		var pieces [2][]float64
		moment := func(axis int, z float64, above bool) (m, v float64) {
			list, ok := f.Bending(axis, c.Factors, nil)
			if !ok {
				return math.NaN(), math.NaN()
			}
			for i, p := range list {
				if z < p.To-1e-9*h || i == len(list)-1 || !above && z < p.To+1e-9*h {
					return p.Moment(z - p.From), p.Shear(z - p.From)
				}
			}
			return 0, 0
		}
		for axis := range pieces {
			list, _ := f.Bending(axis, c.Factors, nil)
			for _, p := range list {
				heights = append(heights, p.From, p.To)
			}
		}
		at := map[string]float64{}
		for _, z := range heights {
			at[fmt.Sprintf("%.9f", z)] = z
		}
		for _, z := range at {
			for _, above := range []bool{false, true} {
				if above && z > h-1e-9*h || !above && z < 1e-9*h {
					continue
				}
				n := 0.0
				if eps := 1e-7 * h; above {
					n, _ = f.Between(k, z, z+eps)
				} else {
					_, n = f.Between(k, z-eps, z)
				}
				mm, vm := moment(0, z, above)
				mi, vi := moment(1, z, above)
				fmt.Fprintf(b, "%s;%.12g;%s;%.15g;%.15g;%.15g;%.15g;%.15g\n", r.Name, z*1e3, "ULS "+fmt.Sprint(k+1), sign*n/1e3, mm/1e3, vm/1e3, mi/1e3, vi/1e3)
			}
		}
	}
}

// TestTablesEqualLoads: a member that takes its forces from a table of the
// program's own analysis comes to the results that its loads gave. The lines of
// a table may stand in any order but for those at one height.
func TestTablesEqualLoads(t *testing.T) {
	checked := 0
	for _, seed := range []uint64{1, 2} {
		text := generate.Shared + generate.BentColumns(40, seed)
		whole := Check(load(map[string]string{"a.kern": text}), nil)
		var table strings.Builder
		table.WriteString("member;position [mm];combination;N [kN];M_major [kNm];V_major [kN];M_minor [kNm];V_minor [kN]\n")
		var lines []string
		for _, r := range whole.Members {
			if len(r.Missing) > 0 {
				continue
			}
			var b strings.Builder
			tableOf(&b, r, -1)
			lines = append(lines, strings.Split(strings.TrimSpace(b.String()), "\n")...)
		}
		byMember := map[string][]string{}
		for _, l := range lines {
			name, _, _ := strings.Cut(l, ";")
			byMember[name] = append(byMember[name], l)
		}
		for _, r := range whole.Members {
			for _, l := range byMember[r.Name] {
				table.WriteString(l + "\n")
			}
		}
		without := lines[:0:0]
		for _, l := range strings.Split(text, "\n") {
			if !strings.HasPrefix(strings.TrimSpace(l), "load ") {
				without = append(without, l)
			}
		}
		tabled := Check(load(map[string]string{"a.kern": "forces \"t.csv\" compression negative\n" + strings.Join(without, "\n"), "t.csv": table.String()}), nil)
		for _, d := range tabled.Diagnostics {
			if d.Rule == "wrong-table" || d.Severity == lang.Error && strings.HasPrefix(d.Rule, "wrong") {
				t.Errorf("%s: %s", d.Rule, d.Message)
			}
		}
		for _, r := range tabled.Members {
			want := resultOf(t, whole, r.Name)
			if len(want.Missing) > 0 || want.Member.Kind != 0 {
				continue
			}
			if r.Member.Imported == nil {
				t.Fatalf("%s takes nothing from the table", r.Name)
			}
			for _, c := range want.Checks {
				for _, now := range r.Checks {
					if now.Rule != c.Rule {
						continue
					}
					checked++
					if math.IsNaN(c.Utilisation) != math.IsNaN(now.Utilisation) || math.Abs(c.Utilisation-now.Utilisation) > 1e-6*math.Abs(c.Utilisation)+1e-9 {
						t.Errorf("%s %s: %v by loads, %v by the table (%s)", r.Name, c.Rule, c.Utilisation, now.Utilisation, want.Member.Decl.Text)
					}
				}
			}
		}
	}
	if checked < 400 {
		t.Errorf("only %d checks were compared", checked)
	}
}
