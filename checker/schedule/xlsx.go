package schedule

import (
	"fmt"
	"io"
	"math"
	"unicode/utf8"

	"kern/checker/output"

	"github.com/xuri/excelize/v2"
)

// XLSX writes a workbook: a sheet of members and a sheet of steel, numbers as
// numbers, the heads held in place.
func (s *Schedule) XLSX(w io.Writer, program string) error {
	book := excelize.NewFile()
	const members, steel = "members", "steel"
	if err := book.SetSheetName("Sheet1", members); err != nil {
		return err
	}
	if _, err := book.NewSheet(steel); err != nil {
		return err
	}
	if err := book.SetDocProps(&excelize.DocProperties{Creator: program, LastModifiedBy: program, Created: "2000-01-01T00:00:00Z", Modified: "2000-01-01T00:00:00Z"}); err != nil {
		return err
	}
	x := workbook{book: book}
	var err error
	if x.head, err = book.NewStyle(&excelize.Style{Font: &excelize.Font{Bold: true}, Alignment: &excelize.Alignment{WrapText: true, Vertical: "top"}, Border: []excelize.Border{{Type: "bottom", Style: 1, Color: "000000"}}}); err != nil {
		return err
	}
	notes := append(append([]string(nil), s.Remarks...), output.Caution)
	columns, rows := s.lean()
	if err := x.table(members, columns, rows, notes); err != nil {
		return err
	}
	if err := x.table(steel, steelColumns, s.steelRows(), nil); err != nil {
		return err
	}
	if err := book.Write(w); err != nil {
		return fmt.Errorf("the workbook could not be written: %w", err)
	}
	return book.Close()
}

type workbook struct {
	book   *excelize.File
	head   int
	styles map[string]int
}

// format is the style of numbers: so many decimals that the digits are shown.
func (x *workbook) format(c Column) (int, error) {
	code := "#,##0.0"
	switch {
	case !c.Number:
		return 0, nil
	case c.Digits == 0:
		code = "0.000" // 1.002 must not read 1.00
	case c.Digits == 9:
		code = "0"
	}
	if id, ok := x.styles[code]; ok {
		return id, nil
	}
	id, err := x.book.NewStyle(&excelize.Style{CustomNumFmt: &code})
	if x.styles == nil {
		x.styles = map[string]int{}
	}
	x.styles[code] = id
	return id, err
}

func (x *workbook) table(name string, columns []Column, rows [][]Cell, notes []string) error {
	for i, c := range columns {
		letter, err := excelize.ColumnNumberToName(i + 1)
		if err != nil {
			return err
		}
		if err := x.book.SetCellStr(name, letter+"1", c.Head()); err != nil {
			return err
		}
		style, err := x.format(c)
		if err != nil {
			return err
		}
		width := 6
		for r, row := range rows {
			cell := fmt.Sprintf("%s%d", letter, r+2)
			switch v := row[i]; {
			case !c.Number:
				width = max(width, utf8.RuneCountInString(v.Text))
				err = x.book.SetCellStr(name, cell, v.Text)
			case math.IsNaN(v.Value) || math.IsInf(v.Value, 0):
				err = x.book.SetCellStr(name, cell, "–")
			default:
				width = max(width, 9)
				err = x.book.SetCellFloat(name, cell, clear(v.Value), -1, 64)
			}
			if err != nil {
				return err
			}
		}
		if c.Number && len(rows) > 0 {
			if err := x.book.SetCellStyle(name, letter+"2", fmt.Sprintf("%s%d", letter, len(rows)+1), style); err != nil {
				return err
			}
		}
		if err := x.book.SetColWidth(name, letter, letter, float64(min(width, 40))+2); err != nil {
			return err
		}
		if err := x.book.SetCellStyle(name, letter+"1", letter+"1", x.head); err != nil {
			return err
		}
	}
	for i, n := range notes {
		if err := x.book.SetCellStr(name, fmt.Sprintf("A%d", len(rows)+3+i), n); err != nil {
			return err
		}
	}
	return x.book.SetPanes(name, &excelize.Panes{Freeze: true, XSplit: 1, YSplit: 1, TopLeftCell: "B2", ActivePane: "bottomRight"})
}
