package quantity

import (
	"math"
	"sort"
	"strconv"
)

// Series is a series of preferred numbers of IEC 60063, by how many values
// it has in a decade.
type Series int

// The series.
const (
	E3   Series = 3
	E6   Series = 6
	E12  Series = 12
	E24  Series = 24
	E48  Series = 48
	E96  Series = 96
	E192 Series = 192
)

// e24 holds the two-digit values, which the table of IEC 60063 sets and no
// rule gives. E12, E6 and E3 take every second, fourth and eighth of them.
var e24 = []int{10, 11, 12, 13, 15, 16, 18, 20, 22, 24, 27, 30, 33, 36, 39, 43, 47, 51, 56, 62, 68, 75, 82, 91}

// Decade lists the values of one decade from 100 on, as whole numbers of
// three digits: 100, 220, 470 for E3. It is nil for another series.
func (s Series) Decade() []int {
	switch s {
	case E3, E6, E12, E24:
		return everyNth(e24, 24/int(s))
	case E48, E96, E192:
		return geometric(int(s))
	}
	return nil
}

func everyNth(values []int, n int) []int {
	var out []int
	for i := 0; i < len(values); i += n {
		out = append(out, 10*values[i])
	}
	return out
}

// geometric is the rule of the three-digit series: the powers of the n-th
// root of ten, rounded. The standard's one exception (from memory) is 920 in
// E192, where the rule gives 919.
func geometric(n int) []int {
	out := make([]int, n)
	for i := range out {
		out[i] = int(math.Round(100 * math.Pow(10, float64(i)/float64(n))))
		if n == 192 && out[i] == 919 {
			out[i] = 920
		}
	}
	return out
}

// Nearest is the value of the series nearest to v by ratio, the lower of two
// equally near. It is v itself when v is not above zero or not finite, or the
// series is unknown.
func (s Series) Nearest(v float64) float64 {
	below, above := s.around(v)
	if v/below <= above/v {
		return below
	}
	return above
}

// Above is the least value of the series that is not below v.
func (s Series) Above(v float64) float64 {
	below, above := s.around(v)
	if below >= v {
		return below
	}
	return above
}

// Below is the greatest value of the series that is not above v.
func (s Series) Below(v float64) float64 {
	below, above := s.around(v)
	if above <= v {
		return above
	}
	return below
}

// around is the greatest value of the series at or below v and the next.
func (s Series) around(v float64) (below, above float64) {
	decade := s.Decade()
	if decade == nil || !(v > 0) || math.IsInf(v, 0) {
		return v, v
	}
	ten := round(v, 17).exponent - 2
	i := sort.Search(len(decade), func(i int) bool { return shift(decade[i], ten) > v })
	if i == 0 { // v is a hair below its decade's first value
		return shift(decade[len(decade)-1], ten-1), shift(decade[0], ten)
	}
	if i == len(decade) {
		return shift(decade[i-1], ten), shift(decade[0], ten+1)
	}
	return shift(decade[i-1], ten), shift(decade[i], ten)
}

// shift is whole × 10^ten, rounded once.
func shift(whole, ten int) float64 {
	n := number{whole: strconv.Itoa(whole)}
	v, err := n.value(scale{ten: ten}, n.whole)
	if err != nil { // at the very ends of float64
		return float64(whole) * math.Pow(10, float64(ten))
	}
	return v
}
