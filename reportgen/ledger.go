package reportgen

import (
	"math"
	"strconv"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
)

// An entry is one line of an account.
type entry struct {
	what string
	si   float64
}

// ledgerBlocks are the accounts of momentum and energy of a run, line by line,
// and what is left over.
func (b *builder) ledgerBlocks(r *arrest.ModelRun) []Block {
	l := &r.Run.Ledger
	momentum, energy := b.ledgerUnit(quantity.Impulse), b.ledgerUnit(quantity.Energy)
	return []Block{
		{Table: account(momentumHead, momentum, l.MomentumLeft, entry{weightEntry, l.Weight}, entry{pullEntry, l.Impulse}, entry{motionEntry, l.Motion})},
		{Table: account(energyHead, energy, l.EnergyLeft, entry{beforeEntry, l.Before}, entry{fallenEntry, l.Fallen},
			entry{afterEntry, l.After}, entry{workEntry, l.Work}, entry{viscousEntry, l.Viscous})},
		{Table: account(partsEnergyHead, energy, l.PartsLeft, entry{workOnParts, l.Work}, entry{storedEntry, l.Stored}, entry{lostEntry, l.Lost})},
		{Text: ledgerRemark},
	}
}

// ledgerUnit returns the unit of an account: the customary one where the sheet
// shows those first, else that of the SI.
func (b *builder) ledgerUnit(d quantity.Dimension) quantity.Unit {
	if u := b.d.pair(d, quantity.Unit{}, 1)[0]; u.System == quantity.Customary {
		return u
	}
	return d.SI()
}

// account is the table of one account.
func account(head string, u quantity.Unit, left float64, entries ...entry) *Table {
	t := &Table{Header: []string{head, figureHead}, Widths: []int{46, 32}}
	for _, e := range entries {
		t.Rows = append(t.Rows, Row{Cells: []string{e.what, format(e.si, u, workingDigits, quantity.Nearest)}})
	}
	t.Rows = append(t.Rows, Row{Cells: []string{leftOver, leftText(left, u)}})
	return t
}

// noise is the size below which what an account leaves over is nothing but
// rounding, in SI units: last bits are not the same on every processor.
const noise = 1e-9

// leftText returns what is left over, as a power of ten that it stays below:
// nobody needs the digits of a rounding error.
func leftText(x float64, u quantity.Unit) string {
	return lessThan + noBreak + powerAbove(math.Abs(u.From(x)), noise) + noBreak + u.Symbol
}

// powerAbove returns the least power of ten above x, and at least that of
// smallest.
func powerAbove(x, smallest float64) string {
	exponent := math.Ceil(math.Log10(max(x, smallest)))
	return "1e" + strconv.Itoa(int(exponent))
}

// ofNothing is the size below which a share is nothing but rounding.
const ofNothing = 1e-12

// shareLeft puts the share that a ledger leaves over in words.
func shareLeft(a arrest.Arg) arrest.Arg {
	return arrest.Text(lessThan + noBreak + powerAbove(a.SI, ofNothing))
}
