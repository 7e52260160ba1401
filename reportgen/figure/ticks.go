package figure

import (
	"math"
	"strconv"
	"strings"
)

// A Tick is a round number on an axis and its figure.
type Tick struct {
	Value float64
	Label string
}

// Ticks returns the multiples of 1, 2 or 5 times a power of ten from low to
// high, as many as are at most most, or the few more without which there would
// be fewer than two. Their figures have one number of decimals. low must be
// below high, both finite and their difference too.
//
// An end that is a multiple but for the last bits belongs to the range.
func Ticks(low, high float64, most int) []Tick {
	s := stepFor(low, high, max(most, 2))
	first, last := s.count(low, math.Ceil), s.count(high, math.Floor)
	list := make([]Tick, 0, int(last-first)+1)
	for i := first; i <= last; i++ {
		list = append(list, s.tick(int64(i)))
	}
	return list
}

// A step is digit x 10^exponent, digit 1, 2 or 5.
type step struct {
	digit    int64
	exponent int
}

// stepFor returns the least step with at most most multiples from low to high,
// or the greatest with at least two.
func stepFor(low, high float64, most int) step {
	s := step{1, int(math.Floor(math.Log10((high-low)/float64(most)))) - 1}
	for s.ticks(low, high) > float64(most) {
		greater := s.next()
		if greater.ticks(low, high) < 2 {
			break
		}
		s = greater
	}
	return s
}

// ticks returns the number of multiples from low to high.
func (s step) ticks(low, high float64) float64 {
	return s.count(high, math.Floor) - s.count(low, math.Ceil) + 1
}

// next returns the next greater step.
func (s step) next() step {
	switch s.digit {
	case 1:
		return step{2, s.exponent}
	case 2:
		return step{5, s.exponent}
	}
	return step{1, s.exponent + 1}
}

// count returns x in steps, rounded by round unless it is a whole number but
// for the last bits.
func (s step) count(x float64, round func(float64) float64) float64 {
	n := x / s.times(1)
	if whole := math.Round(n); math.Abs(n-whole) <= 1e-9*max(1, math.Abs(whole)) {
		return whole
	}
	return round(n)
}

// times returns i steps, the float64 nearest to that decimal.
func (s step) times(i int64) float64 {
	x, _ := strconv.ParseFloat(strconv.FormatInt(i*s.digit, 10)+"e"+strconv.Itoa(s.exponent), 64)
	return x
}

// tick returns i steps with its figure.
func (s step) tick(i int64) Tick {
	x := s.times(i)
	return Tick{x, decimalText(x, max(-s.exponent, 0))}
}

// decimalText writes x with a number of decimals; figures that would be longer
// than nine characters are written with a power of ten.
func decimalText(x float64, decimals int) string {
	text := strconv.FormatFloat(x+0, 'f', decimals, 64)
	if len(text) <= 9 {
		return text
	}
	mantissa, exponent, _ := strings.Cut(strconv.FormatFloat(x, 'e', -1, 64), "e")
	n, _ := strconv.Atoi(exponent)
	return mantissa + "e" + strconv.Itoa(n)
}

// LogTicks returns round numbers from low to high, which are positive, for a
// logarithmic axis, at most most of them: 1, 2, 3 ... 9, or 1, 2, 5, or 1 times
// powers of ten, or every second, third ... power; where that leaves fewer than
// two or the range is within a factor of three, the round numbers of Ticks.
func LogTicks(low, high float64, most int) []Tick {
	most = max(most, 2)
	if high/low < 3 {
		return Ticks(low, high, most)
	}
	for _, digits := range [][]int64{{1, 2, 3, 4, 5, 6, 7, 8, 9}, {1, 2, 5}, {1}} {
		if list := logTicks(low, high, digits, 1); len(list) <= most && len(list) >= 2 {
			return list
		}
	}
	for every := 2; ; every++ {
		list := logTicks(low, high, []int64{1}, every)
		if len(list) < 2 {
			return Ticks(low, high, most)
		}
		if len(list) <= most {
			return list
		}
	}
}

// logTicks returns digits times each power of ten that is a multiple of every.
func logTicks(low, high float64, digits []int64, every int) []Tick {
	var list []Tick
	first := int(math.Floor(math.Log10(low)))
	for e := first - 1; e <= int(math.Ceil(math.Log10(high))); e++ {
		if e%every != 0 {
			continue
		}
		for _, digit := range digits {
			t := step{digit, e}.tick(1)
			if t.Value >= low*(1-1e-9) && t.Value <= high*(1+1e-9) {
				list = append(list, t)
			}
		}
	}
	return list
}

// fineTicks returns the unmarked ticks between those of a logarithmic axis, or
// nil where there would be more than most.
func fineTicks(low, high float64, most int) []Tick {
	if high/low < 3 {
		return nil
	}
	list := logTicks(low, high, []int64{1, 2, 3, 4, 5, 6, 7, 8, 9}, 1)
	if len(list) > most {
		return nil
	}
	return list
}
