package report

import (
	"html/template"
	"strconv"
	"strings"
)

func (s *subject) parts() (template.HTML, error) {
	if len(s.d.Lines) == 0 {
		return "", nil
	}
	t := table{Caption: "The parts of one unit", Heads: numbers(words("Positions", "Pieces", "Part", "Maker", "What for", "Supplier and order code"), 1)}
	for _, l := range s.d.Lines {
		if l.Part == nil {
			continue
		}
		from, code := "no offer", ""
		if o := l.Purchase.Offer; o != nil {
			from, code = o.Supplier, o.OrderCode
		}
		role := cell{Text: string(l.Role)}
		if g := grouped(l.Series, l.Parallel); g != "" {
			role.Below = g
		}
		t.Rows = append(t.Rows, []cell{{Text: ranges(l.Refs)}, {Text: strconv.Itoa(l.PerUnit())}, {Text: l.Part.Number, Below: l.Part.Title()},
			{Text: l.Part.Maker}, role, {Text: from, Below: code}})
	}
	return fill("table", t)
}

// ranges shortens C1 C3 C5 C7 C8 C9 to "C1 C3 C5 C7–C9".
func ranges(refs []string) string {
	var out []string
	for i := 0; i < len(refs); {
		j := i
		for j+1 < len(refs) && follows(refs[j], refs[j+1]) {
			j++
		}
		switch j - i {
		case 0:
			out = append(out, refs[i])
		case 1:
			out = append(out, refs[i], refs[j])
		default:
			out = append(out, refs[i]+"–"+refs[j])
		}
		i = j + 1
	}
	return joined(out)
}

// follows tells whether b is the designator after a.
func follows(a, b string) bool {
	letters := strings.TrimRight(a, "0123456789")
	n, err := strconv.Atoi(a[len(letters):])
	return err == nil && b == letters+strconv.Itoa(n+1)
}
