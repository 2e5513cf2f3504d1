package quantity

// Value is a command-line flag of a quantity; it satisfies the Value
// interfaces of package flag and of pflag. Given tells whether it was set.
type Value[Q Quantity] struct {
	Q     Q
	Given bool
}

// Set reads the flag's text.
func (v *Value[Q]) Set(text string) error {
	q, err := Read[Q](text)
	if err != nil {
		return err
	}
	v.Q, v.Given = q, true
	return nil
}

// String prints the value; "" until one is given.
func (v *Value[Q]) String() string {
	if !v.Given {
		return ""
	}
	return v.Q.String()
}

// Type names the dimension in usage texts: "voltage".
func (v *Value[Q]) Type() string { return v.Q.Dimension().noun() }

// MoneyValue is a command-line flag of an amount of money.
type MoneyValue struct {
	Money Money
	Given bool
}

// Set reads the flag's text.
func (v *MoneyValue) Set(text string) error {
	m, err := ParseMoney(text)
	if err != nil {
		return err
	}
	v.Money, v.Given = m, true
	return nil
}

// String prints the amount; "" until one is given.
func (v *MoneyValue) String() string {
	if !v.Given {
		return ""
	}
	return v.Money.String()
}

// Type names the value in usage texts.
func (v *MoneyValue) Type() string { return "money" }
