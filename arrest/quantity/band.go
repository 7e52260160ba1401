package quantity

// Tolerance says how the spread of a Band was written.
type Tolerance uint8

const (
	Untold    Tolerance = iota // one figure, nothing said about its spread
	PlusMinus                  // "100 kg ± 5 kg", "100 kg +/- 5 %", also "± 0 kg"
	Range                      // "86 kg .. 104 kg"; has no middle figure
)

// A Band is a figure as a person wrote it, with its spread, in SI units.
//
// Low <= Value <= High, each the exact decimal times the exact factor of the
// unit, rounded once to the nearest float64. Value is NaN for a Range: a range
// has no middle unless somebody wrote one. Untold has Low = Value = High.
type Band struct {
	Low, Value, High float64
	Tolerance        Tolerance
	Unit             Unit   // the unit of the (first) figure as written
	Text             string // as written

	// The same three before rounding, so that Sum rounds once; value is
	// unknown for a Range.
	low, value, high exact
}
