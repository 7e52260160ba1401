package archive

import (
	"bytes"
	"encoding/json"
	"math"
	"math/rand/v2"
	"testing"

	"arrestcheck/arrest/quantity"
)

// Those values and texts of RFC 8785, appendix B, that have at most 12 digits,
// from memory; the loop below holds the same writer against another one.
func TestNumbersOfTheRFC(t *testing.T) {
	for bits, want := range map[uint64]string{
		0x0000000000000000: "0",
		0x8000000000000000: "0",
		0x44b52d02c7e14af6: "1e+23",
		0x444b1ae4d6e2ef50: "1e+21",
		0x3eb0c6f7a0b5ed8d: "0.000001",
		0x43e0000000000000: "9223372036850000000", // 2^63 in 12 digits
	} {
		if got := string(float(nil, math.Float64frombits(bits))); got != want {
			t.Errorf("%016x: %s, want %s", bits, got, want)
		}
	}
	for _, x := range []float64{math.NaN(), math.Inf(1), math.Inf(-1)} {
		if got := string(float(nil, x)); got != "null" {
			t.Errorf("%v: %s", x, got)
		}
	}
}

// The standard library writes numbers as ECMAScript does too. A figure is
// written as what it is snapped to.
func TestNumbersAgainstTheStandardLibrary(t *testing.T) {
	random := rand.New(rand.NewPCG(8785, 1))
	for n := range 300000 {
		x := math.Float64frombits(random.Uint64())
		switch n % 3 {
		case 1: // of the size that figures have
			x = (random.Float64() - 0.5) * math.Pow(10, float64(random.IntN(40)-16))
		case 2: // as typed
			x = float64(random.IntN(1e6)-5e5) / math.Pow(10, float64(random.IntN(12)))
		}
		if x != x || math.IsInf(x, 0) || math.Abs(x) < 1e-300 {
			continue // the last digits of the very smallest numbers are not all there
		}
		want, err := json.Marshal(quantity.Snap(x))
		if err != nil {
			t.Fatal(err)
		}
		if got := float(nil, x); !bytes.Equal(got, want) {
			t.Fatalf("%v: %s, want %s", x, got, want)
		}
	}
}

// A map that the standard library writes has its keys sorted and no blanks: the
// canonical form read into maps and written again is the same bytes.
func TestCanonicalAgainstTheStandardLibrary(t *testing.T) {
	for _, name := range jobNames(t) {
		r := Of(sheet(t, name))
		canonical := r.Canonical(nil)
		var tree any
		if err := json.Unmarshal(canonical, &tree); err != nil {
			t.Fatal(name, err)
		}
		var again bytes.Buffer
		e := json.NewEncoder(&again)
		e.SetEscapeHTML(false)
		if err := e.Encode(tree); err != nil {
			t.Fatal(err)
		}
		if got := bytes.TrimSpace(again.Bytes()); !bytes.Equal(got, canonical) {
			t.Errorf("%s:\n%s\n%s", name, canonical, got)
		}
	}
}

func TestStringsOfTheRFC(t *testing.T) {
	// RFC 8785, 3.2.2.2: these escapes and no others, small hexadecimal digits.
	in := "\u20ac$\x0f\nA'B\"\\\\\"/\b\f\r\t\x1f\u2028é"
	want := `"€$\u000f\nA'B\"\\\\\"/\b\f\r\t\u001f` + "\u2028" + `é"`
	if got := string(quote(nil, in)); got != want {
		t.Errorf("%s, want %s", got, want)
	}
}
