package quantity

import "math/big"

// A System groups units for display.
type System uint8

const (
	Neutral   System = iota // s, deg, %: used with both
	Metric                  // kg, m, N and their kin, also kgf
	Customary               // US customary: lb, ft, lbf and their kin
)

// A Unit is one spelling with its exact factor to SI.
//
// The units of this package come from LookUp, Units and Dimension.SI; a Unit
// written out with the same Symbol and Dimension is the same unit.
type Unit struct {
	Symbol    string
	Dimension Dimension
	System    System
}

// A row is a Unit with what it takes to convert: SI value = figure x factor,
// figure = SI value x up / down.
type row struct {
	unit     Unit
	factor   exact
	up, down float64
}

// The exact factors behind the table, as integers over integers.
// Source: NIST Special Publication 811, Appendix B.8 (pound 0.453 592 37 kg,
// inch 0.0254 m, foot 0.3048 m, mile 1609.344 m, standard acceleration of free
// fall 9.806 65 m/s2, each exact; the rows are in testdata/reference/units.toml).
// The pound-force is the pound times the standard acceleration, 4.448 221 615
// 260 5 N, exact as well; the kip is 1000 lbf.
const (
	poundTop, poundUnder           = 45359237, 1e8
	gravityTop, gravityUnder       = 980665, 1e5
	inchTop, inchUnder             = 254, 1e4
	footTop, footUnder             = 3048, 1e4
	mileTop, mileUnder             = 1609344, 1e3
	poundForceTop, poundForceUnder = poundTop * gravityTop, poundUnder * gravityUnder
)

// table holds every unit, by dimension, the SI unit of each among them.
var table = [Ratio + 1][]row{
	Mass: rows(Mass,
		entry{"kg", Metric, 1, 1},
		entry{"g", Metric, 1, 1000},
		entry{"t", Metric, 1000, 1},
		entry{"lb", Customary, poundTop, poundUnder}),
	Length: rows(Length,
		entry{"m", Metric, 1, 1},
		entry{"cm", Metric, 1, 100},
		entry{"mm", Metric, 1, 1000},
		entry{"ft", Customary, footTop, footUnder},
		entry{"in", Customary, inchTop, inchUnder}),
	Time: rows(Time,
		entry{"s", Neutral, 1, 1},
		entry{"ms", Neutral, 1, 1000}),
	Force: rows(Force,
		entry{"N", Metric, 1, 1},
		entry{"kN", Metric, 1000, 1},
		entry{"daN", Metric, 10, 1},
		entry{"lbf", Customary, poundForceTop, poundForceUnder},
		entry{"kip", Customary, 1000 * poundForceTop, poundForceUnder},
		entry{"kgf", Metric, gravityTop, gravityUnder}),
	Speed: rows(Speed,
		entry{"m/s", Metric, 1, 1},
		entry{"km/h", Metric, 1000, 3600},
		entry{"ft/s", Customary, footTop, footUnder},
		entry{"mph", Customary, mileTop, mileUnder * 3600}),
	Acceleration: rows(Acceleration,
		entry{"m/s2", Metric, 1, 1},
		entry{"ft/s2", Customary, footTop, footUnder}),
	Angle: angleRows(),
	Energy: rows(Energy,
		entry{"J", Metric, 1, 1},
		entry{"kJ", Metric, 1000, 1},
		entry{"ft*lbf", Customary, footTop * poundForceTop, footUnder * poundForceUnder}),
	Impulse: rows(Impulse,
		entry{"N*s", Metric, 1, 1},
		entry{"kN*s", Metric, 1000, 1},
		entry{"lbf*s", Customary, poundForceTop, poundForceUnder}),
	Stiffness: rows(Stiffness,
		entry{"N/m", Metric, 1, 1},
		entry{"kN/m", Metric, 1000, 1},
		entry{"lbf/in", Customary, poundForceTop * (inchUnder / 100), poundForceUnder / 100 * inchTop},
		entry{"lbf/ft", Customary, poundForceTop * (footUnder / 100), poundForceUnder / 100 * footTop}),
	ForceRate: rows(ForceRate,
		entry{"N/s", Metric, 1, 1},
		entry{"kN/s", Metric, 1000, 1},
		entry{"lbf/s", Customary, poundForceTop, poundForceUnder}),
	Ratio: rows(Ratio,
		entry{"%", Neutral, 1, 100},
		entry{"1", Neutral, 1, 1}),
}

// An entry is one line of the table as it is typed in: the factor to SI is
// top / under.
type entry struct {
	symbol     string
	system     System
	top, under int64
}

// rows turns the entries of one dimension into rows.
func rows(d Dimension, entries ...entry) []row {
	made := make([]row, len(entries))
	for i, e := range entries {
		factor := exact{num: e.top, den: e.under}.lowest()
		made[i] = row{unit: Unit{e.symbol, d, e.system}, factor: factor, up: 1, down: factor.float()}
		if factor.num == 1 {
			made[i].up, made[i].down = float64(factor.den), 1
		}
	}
	return made
}

// pi is cut after 80 decimals, which the test of this file works out anew. It
// is the one inexact factor of the package; the error, below 1e-80, can matter
// to the rounding only where a figure lies within 1e-60 of half way between
// two float64.
const pi = "3.14159265358979323846264338327950288419716939937510582097494459230781640628620899"

// angleRows makes the rows of Angle, the one dimension with an irrational
// factor.
func angleRows() []row {
	factor, _ := new(big.Rat).SetString(pi)
	factor.Quo(factor, big.NewRat(180, 1))
	degree := exact{wide: factor}
	return []row{
		{unit: Unit{"deg", Angle, Neutral}, factor: degree, up: 1, down: degree.float()},
		{unit: Unit{"rad", Angle, Neutral}, factor: whole(1), up: 1, down: 1},
	}
}

// find returns the row of symbol within d, or nil.
func find(d Dimension, symbol string) *row {
	for i := range table[d] {
		if table[d][i].unit.Symbol == symbol {
			return &table[d][i]
		}
	}
	return nil
}

// row returns the row of u. It panics for a Unit that is not in the table.
func (u Unit) row() *row {
	if u.Dimension.known() {
		if r := find(u.Dimension, u.Symbol); r != nil {
			return r
		}
	}
	panic("quantity: no unit " + quoted(u.Symbol) + " of " + u.Dimension.String())
}

// typed reports whether Parse reads r; the unit "1" of a ratio is printed only.
func (r *row) typed() bool { return r.unit.Symbol != "1" }

// LookUp returns the unit with exactly this symbol: "kN" is found, "KN" and
// "kn" are not. No symbol belongs to two dimensions.
func LookUp(symbol string) (Unit, bool) {
	for d := range table {
		if r := find(Dimension(d), symbol); r != nil {
			return r.unit, true
		}
	}
	return Unit{}, false
}

// Units returns every unit that Parse reads, by dimension. It is a new slice
// at each call.
func Units() []Unit {
	var all []Unit
	for d := range table {
		for i := range table[d] {
			if r := &table[d][i]; r.typed() {
				all = append(all, r.unit)
			}
		}
	}
	return all
}

// Factor returns the exact factor from u to SI as text: a decimal where it
// ends ("0.45359237"), else a fraction in lowest terms ("5/18"), and "pi/180"
// for deg. It panics for a Unit that is not in the table.
func (u Unit) Factor() string {
	factor := u.row().factor
	if factor.wide != nil {
		return "pi/180"
	}
	return factor.String()
}

// From returns an SI figure expressed in u:
//
//	From(si) = si / factor
//
// It is correctly rounded where the factor or its reciprocal is a whole number
// (kN, daN, t, kJ, cm, mm, g, ms, %); elsewhere the rounding of the factor
// adds to that of the division, and the relative error is below 2.3e-16. NaN
// and infinities stay what they are. It panics for a Unit that is not in the
// table.
func (u Unit) From(si float64) float64 {
	r := u.row()
	return float64(si*r.up) / r.down
}
