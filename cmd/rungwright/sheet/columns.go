package sheet

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"rungwright/catalog/form"
)

// ParseColumns reads column names as users give them on a command line:
// "part=MPN, designators=B".
func ParseColumns(text string) (map[Field]string, error) {
	columns := map[Field]string{}
	for pair := range strings.SplitSeq(text, ",") {
		name, column, ok := strings.Cut(pair, "=")
		f := Field(strings.ToLower(strings.TrimSpace(name)))
		if !ok || strings.TrimSpace(column) == "" {
			return nil, fmt.Errorf("%q is not a column; write such as part=MPN or part=C", strings.TrimSpace(pair))
		}
		if err := checkField(f); err != nil {
			return nil, err
		}
		if _, twice := columns[f]; twice {
			return nil, fmt.Errorf("the column for %s is given twice", f)
		}
		columns[f] = strings.TrimSpace(column)
	}
	return columns, nil
}

func checkField(f Field) error {
	if slices.Contains(Fields(), f) {
		return nil
	}
	var names []string
	for _, known := range Fields() {
		names = append(names, string(known))
	}
	return errors.New(form.Unknown("field", string(f), names))
}
