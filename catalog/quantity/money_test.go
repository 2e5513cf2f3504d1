package quantity

import (
	"fmt"
	"strings"
	"testing"

	"github.com/shopspring/decimal"
	"pgregory.net/rapid"
)

func TestParseMoney(t *testing.T) {
	for text, want := range map[string]string{
		"0.62 EUR": "0.62 EUR", "EUR 0.62": "0.62 EUR", "0.6 EUR": "0.60 EUR", "EUR0.6": "0.60 EUR", " 7 USD ": "7.00 USD", "0.0042 EUR": "0.0042 EUR",
		"120 JPY": "120 JPY", "-3 GBP": "-3.00 GBP", "0 CHF": "0.00 CHF", "999999999999.999999999 EUR": "999999999999.999999999 EUR",
	} {
		if got, err := ParseMoney(text); err != nil || got.String() != want {
			t.Errorf("%q is read as %v (%v), want %s", text, got, err, want)
		}
	}
}

func TestMoneyRefusals(t *testing.T) {
	for text, want := range map[string]string{
		"":                               "nothing is written; write an amount and a currency code, such as 0.62 EUR",
		"0.62":                           `"0.62" has no currency; write an amount and a currency code, such as 0.62 EUR`,
		"EUR":                            `"EUR" is not an amount of money; write an amount and a currency code, such as 0.62 EUR`,
		"0.62 EUX":                       `"0.62 EUX": "EUX" is not a currency; write an ISO 4217 code, such as EUR, USD or GBP`,
		"0.62 eur":                       `"0.62 eur": write the currency code in capitals, EUR`,
		"0.62 euros":                     `"0.62 euros": "euros" is not a currency; write an ISO 4217 code, such as EUR, USD or GBP`,
		"€0.62":                          `"€0.62": write the currency as its ISO 4217 code instead of a sign, such as 0.62 EUR`,
		"0.62 $":                         `"0.62 $": write the currency as its ISO 4217 code instead of a sign, such as 0.62 EUR`,
		"0,62 EUR":                       `"0,62 EUR": write the decimal point as a full stop`,
		"1,000.50 EUR":                   `"1,000.50 EUR": a comma may mean thousands or a decimal point; write neither a comma nor a gap within the digits`,
		"1e3 EUR":                        `"1e3 EUR" is not an amount of money; write an amount and a currency code, such as 0.62 EUR`,
		"NaN EUR":                        `"NaN EUR" is not an amount of money; write an amount and a currency code, such as 0.62 EUR`,
		"0x10 EUR":                       `"0x10 EUR": write a plain decimal number`,
		"1234567890123 EUR":              `"1234567890123 EUR" has more digits than an amount may have; write 12 before and 9 after the point at most`,
		strings.Repeat("1", 80) + " EUR": `"11111111111111111111"… is too long for an amount; write it such as 0.62 EUR`,
	} {
		if got, err := ParseMoney(text); err == nil || err.Error() != want {
			t.Errorf("%q: got %v, %v\nwant %s", text, got, err, want)
		}
	}
}

// Money is exact: a tenth is a tenth, and what is printed is read back.
func TestMoneyIsExact(t *testing.T) {
	sum := decimal.Zero
	for range 10 {
		m, err := ParseMoney("0.10 EUR")
		if err != nil {
			t.Fatal(err)
		}
		sum = sum.Add(m.Amount)
	}
	if !sum.Equal(decimal.NewFromInt(1)) {
		t.Errorf("ten tenths are %v", sum)
	}
	rapid.Check(t, func(t *rapid.T) {
		m := Money{decimal.New(rapid.Int64Range(-999_999_999_999, 999_999_999_999).Draw(t, "value"), -rapid.Int32Range(0, 9).Draw(t, "places")), "EUR"}
		back, err := ParseMoney(m.String())
		if err != nil || !back.Amount.Equal(m.Amount) || back.Currency != m.Currency {
			t.Fatalf("%v is read back as %v (%v)", m, back, err)
		}
	})
}

func FuzzParseMoney(f *testing.F) {
	f.Add("0.62 EUR")
	f.Add("EUR 1,000.50")
	f.Fuzz(func(t *testing.T, text string) {
		m, err := ParseMoney(text)
		if err != nil {
			if strings.ContainsAny(err.Error(), "\n\x1b") {
				t.Fatalf("a raw error: %q", err)
			}
			return
		}
		if back, err := ParseMoney(m.String()); err != nil || !back.Amount.Equal(m.Amount) {
			t.Fatalf("%q prints %v, which is read as %v (%v)", text, m, back, err)
		}
	})
}

func TestFlags(t *testing.T) {
	var load Value[Amps]
	if load.String() != "" || load.Type() != "current" || load.Given {
		t.Errorf("an unset flag is %q of type %q, given %v", load.String(), load.Type(), load.Given)
	}
	if err := load.Set("1.2 mA"); err != nil || load.Q != 1.2e-3 || load.String() != "1.2 mA" || !load.Given {
		t.Errorf("the flag is %v, %v", load.Q, err)
	}
	if err := load.Set("3 V"); err == nil || load.Q != 1.2e-3 {
		t.Errorf("a voltage was taken for a current: %v, %v", load.Q, err)
	}
	var most MoneyValue
	if err := most.Set("14 EUR"); err != nil || most.String() != "14.00 EUR" || most.Type() != "money" {
		t.Errorf("the flag is %v, %v", most.Money, err)
	}
}

func ExampleParseMoney() {
	m, _ := ParseMoney("0.6 EUR")
	fmt.Println(m)
	// Output: 0.60 EUR
}
