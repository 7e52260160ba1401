package quantity

import (
	"math"
	"math/big"
	"testing"

	"github.com/BurntSushi/toml"
	"pgregory.net/rapid"
)

// factors holds the exact factor of every unit, written out independently of
// the table: NIST Special Publication 811, Appendix B.8, for the pound, the
// foot, the mile and the standard acceleration; by multiplication and division
// of those for the rest.
var factors = []struct {
	symbol    string
	dimension Dimension
	system    System
	factor    string
}{
	{"kg", Mass, Metric, "1"},
	{"g", Mass, Metric, "0.001"},
	{"t", Mass, Metric, "1000"},
	{"lb", Mass, Customary, "0.45359237"},
	{"m", Length, Metric, "1"},
	{"cm", Length, Metric, "0.01"},
	{"mm", Length, Metric, "0.001"},
	{"ft", Length, Customary, "0.3048"},
	{"in", Length, Customary, "0.0254"},
	{"s", Time, Neutral, "1"},
	{"ms", Time, Neutral, "0.001"},
	{"N", Force, Metric, "1"},
	{"kN", Force, Metric, "1000"},
	{"daN", Force, Metric, "10"},
	{"lbf", Force, Customary, "4.4482216152605"},
	{"kip", Force, Customary, "4448.2216152605"},
	{"kgf", Force, Metric, "9.80665"},
	{"m/s", Speed, Metric, "1"},
	{"km/h", Speed, Metric, "5/18"},
	{"ft/s", Speed, Customary, "0.3048"},
	{"mph", Speed, Customary, "0.44704"},
	{"m/s2", Acceleration, Metric, "1"},
	{"ft/s2", Acceleration, Customary, "0.3048"},
	{"deg", Angle, Neutral, "pi/180"},
	{"rad", Angle, Neutral, "1"},
	{"J", Energy, Metric, "1"},
	{"kJ", Energy, Metric, "1000"},
	{"ft*lbf", Energy, Customary, "1.3558179483314004"},
	{"N*s", Impulse, Metric, "1"},
	{"kN*s", Impulse, Metric, "1000"},
	{"lbf*s", Impulse, Customary, "4.4482216152605"},
	{"N/m", Stiffness, Metric, "1"},
	{"kN/m", Stiffness, Metric, "1000"},
	{"lbf/in", Stiffness, Customary, "8896443230521/50800000000"},
	{"lbf/ft", Stiffness, Customary, "8896443230521/609600000000"},
	{"N/s", ForceRate, Metric, "1"},
	{"kN/s", ForceRate, Metric, "1000"},
	{"lbf/s", ForceRate, Customary, "4.4482216152605"},
	{"%", Ratio, Neutral, "0.01"},
}

func TestUnits(t *testing.T) {
	all := Units()
	if len(all) != len(factors) {
		t.Fatalf("%d units, want %d", len(all), len(factors))
	}
	for i, want := range factors {
		u := all[i]
		if u != (Unit{want.symbol, want.dimension, want.system}) {
			t.Errorf("unit %d is %+v, want %s, %v, system %d", i, u, want.symbol, want.dimension, want.system)
		}
		if got := u.Factor(); got != want.factor {
			t.Errorf("factor of %s: %s, want %s", u.Symbol, got, want.factor)
		}
		if found, ok := LookUp(want.symbol); !ok || found != u {
			t.Errorf("LookUp(%q) = %+v, %v", want.symbol, found, ok)
		}
	}
}

func TestLookUpIsExact(t *testing.T) {
	for _, symbol := range []string{"", "KN", "kn", "Kg", "lbs", "kg ", "g/", "ft-lbf"} {
		if u, ok := LookUp(symbol); ok || u != (Unit{}) {
			t.Errorf("LookUp(%q) = %+v, %v", symbol, u, ok)
		}
	}
	if u, ok := LookUp("1"); !ok || u != Ratio.SI() {
		t.Errorf(`LookUp("1") = %+v, %v, want the unit in which ratios are printed`, u, ok)
	}
}

func TestUnknownUnitPanics(t *testing.T) {
	for _, u := range []Unit{{}, {Symbol: "KN", Dimension: Force}, {Symbol: "kN", Dimension: Mass}, {Symbol: "kN"}} {
		panics(t, "no unit", func() { u.From(1) })
		panics(t, "no unit", func() { u.Factor() })
		panics(t, "no unit", func() { Format(1, u, 3, Nearest) })
	}
}

// The figures of pi are those of Machin's formula in integers,
// pi = 16 arctan(1/5) - 4 arctan(1/239), carried ten places further.
func TestPi(t *testing.T) {
	scale := new(big.Int).Exp(big.NewInt(10), big.NewInt(90), nil)
	arctan := func(n int64) *big.Int {
		sum, power := new(big.Int), new(big.Int).Div(scale, big.NewInt(n))
		for k := int64(0); power.Sign() != 0; k++ {
			term := new(big.Int).Div(power, big.NewInt(2*k+1))
			if k%2 == 1 {
				term.Neg(term)
			}
			sum.Add(sum, term)
			power.Div(power, big.NewInt(n*n))
		}
		return sum
	}
	want := new(big.Int).Mul(arctan(5), big.NewInt(16))
	want.Sub(want, new(big.Int).Mul(arctan(239), big.NewInt(4)))
	digits := want.String()
	if got := digits[:1] + "." + digits[1:81]; got != pi {
		t.Errorf("pi = %s, want %s", pi, got)
	}
}

func TestHalfTurn(t *testing.T) {
	b, err := Parse(Angle, "180 deg")
	if err != nil || b.Value != math.Pi {
		t.Errorf("180 deg = %v rad, %v; want %v", b.Value, err, math.Pi)
	}
}

// From is within the error it promises of the exact quotient, and correctly
// rounded for the units it names.
func TestFrom(t *testing.T) {
	rounded := map[string]bool{"kN": true, "daN": true, "t": true, "kJ": true, "cm": true, "mm": true, "g": true, "ms": true, "%": true}
	rapid.Check(t, func(t *rapid.T) {
		u := rapid.SampledFrom(Units()).Draw(t, "unit")
		si := rapid.Float64Range(-1e12, 1e12).Draw(t, "si")
		exactly := new(big.Rat).Quo(new(big.Rat).SetFloat64(si), factorOf(u))
		want, _ := exactly.Float64()
		if got := u.From(si); got != want && (rounded[u.Symbol] || math.Abs(got-want) > 2.3e-16*math.Abs(want)) {
			t.Fatalf("From(%v) = %v %s, want %v", si, got, u.Symbol, want)
		}
	})
}

// factorOf returns the factor of u as the list above has it.
func factorOf(u Unit) *big.Rat {
	for _, f := range factors {
		if f.symbol == u.Symbol && f.symbol == "deg" {
			r, _ := new(big.Rat).SetString(pi)
			return r.Quo(r, big.NewRat(180, 1))
		}
		if f.symbol == u.Symbol {
			r, _ := new(big.Rat).SetString(f.factor)
			return r
		}
	}
	panic("no factor of " + u.Symbol)
}

// expressed says how each published row is written in the units of this
// package: a text, and the unit in which the source prints the answer.
var expressed = map[string]struct {
	dimension Dimension
	text, in  string
}{
	"u-fps-mph":     {Speed, "1 ft/s", "mph"},
	"u-ft-m":        {Length, "1 ft", "m"},
	"u-ftlbf-J":     {Energy, "1 ft*lbf", "J"},
	"u-gn-mps2":     {Force, "1 kgf", "N"}, // the weight of 1 kg
	"u-in-m":        {Length, "1 in", "m"},
	"u-kgf-N":       {Force, "1 kgf", "N"},
	"u-kip-N":       {Force, "1 kip", "N"},
	"u-lb-kg":       {Mass, "1 lb", "kg"},
	"u-lbf-N":       {Force, "1 lbf", "N"},
	"u-lbf-per-ft":  {Stiffness, "1 lbf/ft", "N/m"},
	"u-lbf-per-in":  {Stiffness, "1 lbf/in", "N/m"},
	"u-mi-m":        {Length, "5280 ft", "m"},
	"u-mph-fps":     {Speed, "1 mph", "ft/s"},
	"u-mph-mps":     {Speed, "1 mph", "m/s"},
	"u-ozf-N":       {Force, "0.0625 lbf", "N"},
	"u-shortton-kg": {Mass, "2000 lb", "kg"},
	"u-tonforce-N":  {Force, "2000 lbf", "N"},
	"u-yd-m":        {Length, "3 ft", "m"},
}

// notExpressed says why the other rows cannot be written.
var notExpressed = map[string]string{
	"u-inlbf-Nm":  "no inch-pound: a twelfth of a foot-pound is no finite decimal",
	"u-kg-slug":   "no slug among the units of mass",
	"u-slug-kg":   "no slug among the units of mass",
	"u-poundal-N": "no poundal among the units of force",
	"u-knot-mps":  "no knot among the units of speed",
	"u-surveyft":  "no survey foot among the units of length; the source prints its reciprocal by mistake",
	"u-kgfcm2-Pa": "no dimension of pressure",
	"u-ksi-Pa":    "no dimension of pressure",
	"u-psf-Pa":    "no dimension of pressure",
	"u-psi-Pa":    "no dimension of pressure",
}

func TestPublishedFactors(t *testing.T) {
	var file struct {
		Check []struct {
			ID                              string
			Expected, Tolerance, Recomputed float64
			Agrees                          bool
			Mark, Source                    string
		}
	}
	if _, err := toml.DecodeFile("../../testdata/reference/units.toml", &file); err != nil {
		t.Fatal(err)
	}
	const rows = 28
	if len(file.Check) != rows || len(expressed)+len(notExpressed) != rows {
		t.Errorf("%d rows in the file, %d expressed, %d not, want %d in all", len(file.Check), len(expressed), len(notExpressed), rows)
	}
	for _, row := range file.Check {
		if row.Source == "" || row.Mark == "" || row.Tolerance <= 0 {
			t.Errorf("%s: no source, mark or tolerance", row.ID)
		}
		how, ok := expressed[row.ID]
		if !ok {
			if notExpressed[row.ID] == "" {
				t.Errorf("%s is neither expressed nor excused", row.ID)
			}
			continue
		}
		if !row.Agrees {
			t.Errorf("%s: the source is off, compare with the recomputed figure", row.ID)
		}
		b, err := Parse(how.dimension, how.text)
		if err != nil {
			t.Errorf("%s: %v", row.ID, err)
			continue
		}
		u, _ := LookUp(how.in)
		got := u.From(b.Value)
		if math.Abs(got-row.Expected) > row.Tolerance {
			t.Errorf("%s: %s is %v %s, published %v within %v (%s)", row.ID, how.text, got, how.in, row.Expected, row.Tolerance, row.Source)
		}
		if !Close(got, row.Recomputed, 1e-11) {
			t.Errorf("%s: %s is %v %s, recomputed %v", row.ID, how.text, got, how.in, row.Recomputed)
		}
	}
}
