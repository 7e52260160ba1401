package figure

// A Text is a line of text and where it may stand.
type Text struct {
	Text  string
	Spots []Spot // tried in this order
	Size  Size

	// Turned texts read upwards, turned by 90 degrees.
	Turned bool

	// Rank says which texts are placed first: the lower. Texts of one rank are
	// placed in the order in which they were added.
	Rank Rank

	// Inside, if not nil, is a region that the text must stand in.
	Inside []Point

	scale int // which scale it is a figure of, from 1; 0 is none
}

// Rank is the importance of a text.
type Rank uint8

const (
	RankScale  Rank = iota // a figure of a scale
	RankAxis               // the name of an axis, of a datum, a dimension
	RankLimit              // what a line of comparison is
	RankRegion             // the word for a region
	RankPoint              // a marked point
	RankCurve              // the name of a curve
	RankNote               // anything else
)

// A Spot is a place for a text.
type Spot struct {
	At     Point
	Anchor Anchor
	Lift   Lift
	Gap    float64 // mm further away on paper; in characters it counts nothing
	Lines  int     // lines of text further away, both ways
}

// Anchor is the part of a text that stands at its point.
type Anchor uint8

const (
	Start  Anchor = iota // the text extends to the right
	Middle               // the text is centred
	End                  // the text extends to the left
)

// Lift says how a text stands to the height of its point.
type Lift uint8

const (
	OnLine Lift = iota // its middle is at the point; it keeps clear of it sideways
	Above
	Below
)

// Size is the size of a text.
type Size uint8

const (
	Normal Size = iota
	Small
	Large
)

// em returns the height of the font, mm: about 9.6, 8.5 and 11.6 points.
func (z Size) em() float64 { return [...]float64{3.4, 3.0, 4.1}[z] }

// pitch returns the distance of two lines of text, mm.
func (z Size) pitch() float64 { return grain(z.em() * 1.25) }
