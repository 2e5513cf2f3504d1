package workbook

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"strings"
	"testing"

	"github.com/shopspring/decimal"
)

// RFC 4180: CRLF line ends, every record as long as the first; a byte-order
// mark in front, which spreadsheets want.
func TestOrderCSV(t *testing.T) {
	d, o := testDesign(), testOptions()
	o = planned(t, d, o)
	for _, supplier := range o.Plan.Orders {
		data := OrderCSV(supplier, false)
		text, marked := strings.CutPrefix(string(data), "\uFEFF")
		if !marked || strings.Count(text, "\n") != strings.Count(text, "\r\n") {
			t.Fatalf("no mark or bare line ends: %q", data)
		}
		rows, err := csv.NewReader(strings.NewReader(text)).ReadAll()
		if err != nil || len(rows) != len(supplier.Purchases)+1 {
			t.Fatalf("got %d rows, %v", len(rows), err)
		}
		sum := decimal.Zero
		for _, row := range rows[1:] {
			amount := decimal.RequireFromString(row[7])
			if row[5] == "USD" {
				amount = amount.Mul(o.Terms.Rates["USD"]).Round(2)
			}
			sum = sum.Add(amount)
		}
		if !sum.Equal(supplier.Goods) {
			t.Errorf("%s: the lines come to %s, the order says %s", supplier.Supplier.Name, sum, supplier.Goods)
		}
	}
}

func TestHarmless(t *testing.T) {
	cases := map[string]string{"=1+1": "'=1+1", " =1": "' =1", "+x": "'+x", "@A1": "'@A1", "-2+3": "'-2+3", "＝1": "'＝1",
		"-12.5": "-12.5", "+4": "+4", "C1 C2": "C1 C2", "": "", "a=b": "a=b"}
	for in, want := range cases {
		if got := harmless(in); got != want {
			t.Errorf("%q: got %q, want %q", in, got, want)
		}
	}
}

func hostileCSV() []byte {
	d, o := hostileDesign()
	return PartsCSV(d, o, false)
}

// An office suite must find no formula in the CSV of a hostile design.
func TestHostileCSV(t *testing.T) {
	if rows, err := csv.NewReader(bytes.NewReader(hostileCSV()[3:])).ReadAll(); err != nil || len(rows) < 3 {
		t.Fatal(len(rows), err)
	}
	f := mustOpen(t, recalculatedFile(t, "parts"))
	sheet := f.GetSheetList()[0]
	rows, err := f.GetRows(sheet)
	if err != nil || len(rows) < 3 {
		t.Fatal(len(rows), err)
	}
	for r := range rows {
		for c := range rows[r] {
			if formula, _ := f.GetCellFormula(sheet, at(c, r+1)); formula != "" {
				t.Errorf("%s became the formula %s", at(c, r+1), formula)
			}
		}
	}
}

func TestOrderJSON(t *testing.T) {
	d, o := testDesign(), testOptions()
	o = planned(t, d, o)
	data, err := OrderJSON(o.Plan)
	if err != nil {
		t.Fatal(err)
	}
	var back struct {
		Total  string
		Orders []struct {
			Total string
			Lines []struct{ Quantity int }
		}
	}
	if err := json.Unmarshal(data, &back); err != nil {
		t.Fatal(err)
	}
	sum := decimal.Zero
	for _, s := range back.Orders {
		sum = sum.Add(decimal.RequireFromString(s.Total))
	}
	if sum.StringFixed(2) != back.Total || back.Total != o.Plan.Total.StringFixed(2) {
		t.Errorf("got %s, sum %s, want %s", back.Total, sum, o.Plan.Total)
	}
}
