package catalog_test

import (
	"bytes"
	"fmt"
	"runtime"
	"testing"

	"rungwright/catalog"
)

// manyParts is a catalog of n parts with their offers.
func manyParts(n int) []byte {
	var b bytes.Buffer
	b.WriteString("parts:\n")
	for i := range n {
		fmt.Fprintf(&b, `  - part: QLF-%06d
    maker: Quillfen
    kind: capacitor
    technology: ceramic class 2
    characteristic: X7R
    capacitance: %d pF
    tolerance: 10 %%
    voltage: 3 kV
    bias: [[0 V, 100 %%], [1.5 kV, 74 %%], [3 kV, 41 %%]]
    loss_factor: 2.5 %%
    temperature: {least: -55 °C, most: 125 °C}
    size: {length: 10 mm, width: 5 mm, height: 11 mm}
    mounting: through-hole
    status: active
    offers:
      - {supplier: Fellmarket, order_code: FM-%d, stock: 4200, lead: 14 d, least: 10, multiple: 10, prices: [[1, 0.62 EUR], [100, 0.41 EUR], [1000, 0.29 EUR]]}
`, i, 100+i, i)
	}
	return b.Bytes()
}

func BenchmarkRead(b *testing.B) {
	for _, n := range []int{100, 1000, 10000} {
		data := manyParts(n)
		b.Run(fmt.Sprintf("parts=%d", n), func(b *testing.B) {
			b.ReportAllocs()
			b.SetBytes(int64(len(data)))
			for b.Loop() {
				c, err := catalog.ReadBytes("f.yaml", data)
				if err != nil {
					b.Fatal(err)
				}
				runtime.KeepAlive(c)
			}
		})
	}
}
