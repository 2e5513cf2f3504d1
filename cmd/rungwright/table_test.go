package main

import (
	"strings"
	"testing"

	"rungwright/catalog/quantity"
)

// sample has one column that only wide screens show.
func sample() table {
	t := table{columns: []column{
		words("part", "part"), measure("voltage", "voltage_v", quantity.Voltage),
		words("remark", "remark").optional(1), words("used", "used_ratio"),
	}}
	t.add("C1", 1234.5678901234, strings.Repeat("long ", 12), bar(0.42))
	t.add("C2", 5.0, "short", bar(1.04))
	return t
}

func TestTableFitsTheScreen(t *testing.T) {
	for _, width := range []int{80, 200} {
		p := pretendTerminal(width)
		p.printTable(sample())
		got := p.printed()
		mustFit(t, got, width)
		if shown := strings.Contains(got, "remark"); shown != (width == 200) {
			t.Errorf("at %d columns the optional column is shown: %t\n%s", width, shown, got)
		}
		for _, want := range []string{"1.235 kV", "■■■■······  42 %", "104 % OVER"} {
			if !strings.Contains(got, want) {
				t.Errorf("at %d columns %q is missing:\n%s", width, want, got)
			}
		}
		if strings.Contains(got, "\x1b") {
			t.Errorf("colour without leave: %q", got)
		}
	}
}

// TestLongTextIsCut: text that leaves no room is cut with a mark; numbers and
// bars never are.
func TestLongTextIsCut(t *testing.T) {
	long := table{columns: []column{words("part", "part"), measure("voltage", "voltage_v", quantity.Voltage)}}
	long.add(strings.Repeat("part ", 30), 1234.5)
	p := pretendTerminal(80)
	p.printTable(long)
	got := p.printed()
	mustFit(t, got, 80)
	if !strings.Contains(got, "…") || !strings.Contains(got, "1.234 kV") && !strings.Contains(got, "1.235 kV") {
		t.Errorf("printed\n%s", got)
	}
}

func TestTableInAPipe(t *testing.T) {
	p := pretendPipe()
	p.printTable(sample())
	want := "part\tvoltage_v\tremark\tused_ratio\n" +
		"C1\t1234.56789\t" + strings.Repeat("long ", 12) + "\t0.42\n" +
		"C2\t5\tshort\t1.04\n"
	if got := p.printed(); got != want {
		t.Errorf("got\n%swant\n%s", got, want)
	}
}

func TestPipeCellsKeepTheirLine(t *testing.T) {
	if got := plainCell("a\tb\nc"); got != "a b c" {
		t.Errorf("a cell with a tab and a line end came out as %q", got)
	}
}

// TestColourSaysNothingAlone: with the codes taken out, the coloured output is
// the plain one.
func TestColourSaysNothingAlone(t *testing.T) {
	plain, coloured := pretendTerminal(80), pretendTerminal(80)
	coloured.colour = true
	plain.printTable(sample())
	coloured.printTable(sample())
	text := coloured.printed()
	if !strings.Contains(text, "\x1b[31m") {
		t.Errorf("what is over its limit is not red: %q", text)
	}
	for _, code := range []string{"\x1b[0m", "\x1b[1m", "\x1b[2m", "\x1b[31m", "\x1b[32m", "\x1b[33m"} {
		text = strings.ReplaceAll(text, code, "")
	}
	if text != plain.printed() {
		t.Errorf("without its colours the table differs:\n%q\n%q", text, plain.printed())
	}
}

func TestBar(t *testing.T) {
	for _, c := range []struct {
		share bar
		want  string
	}{
		{0, "··········   0 %"},
		{0.899, "■■■■■■■■··  90 %"},
		{0.9, "■■■■■■■■■·  90 % near"},
		{0.9999, "■■■■■■■■■· <100 % near"},
		{1, "■■■■■■■■■■ 100 % near"},
		{1.0001, "■■■■■■■■■■ >100 % OVER"},
		{250, "■■■■■■■■■■ >999 % OVER"},
		{-0.5, "·········· -50 %"},
	} {
		if got := c.share.String(); got != c.want {
			t.Errorf("bar(%g) = %q, want %q", float64(c.share), got, c.want)
		}
	}
}

func TestWrap(t *testing.T) {
	got := wrap("one two three four  five", 9, "  ")
	want := []string{"one two", "  three", "  four", "  five"}
	if strings.Join(got, "|") != strings.Join(want, "|") {
		t.Errorf("wrap = %q, want %q", got, want)
	}
	if got := wrap("  ", 9, ""); got != nil {
		t.Errorf("wrap of nothing = %q", got)
	}
}
