package quantity

import "strings"

// badUnit is the fault of word, just read, not being a unit of the dimension.
// The amount before it began at start.
func (p *parser) badUnit(word string, amount exact, start int) *fault {
	d, from := p.dimension, p.at-len(word)
	if d == Acceleration && (word == "g" || word == "G" || word == "gn") {
		return &fault{
			reason: word + " is not read as an acceleration, since g is the gram; " + d.written() +
				", and the standard acceleration of free fall is 9.80665 m/s2",
			better: []string{p.replaced(start, p.at, amount.times(exact{num: gravityTop, den: gravityUnder}).String()+" m/s2")},
		}
	}
	if f := ton(word, d); f != nil {
		return f
	}
	symbol := meant(d, word)
	u, _ := LookUp(symbol)
	switch {
	case symbol == "":
		return &fault{reason: "unknown unit " + quoted(word) + "; " + d.written()}
	case u.Dimension == d || symbol == "%" && symbol != word:
		return &fault{reason: misspelled(word, symbol), better: []string{p.replaced(from, p.at, symbol)}}
	}
	f := &fault{reason: symbol + " is " + u.Dimension.indefinite() + "; " + d.written()}
	if kin := kin(symbol, d); kin != "" {
		f.better = []string{p.replaced(from, p.at, kin)}
	}
	return f
}

// misspelled says how word should have been spelled.
func misspelled(word, symbol string) string {
	if strings.EqualFold(word, symbol) {
		return "unknown unit " + quoted(word) + ": capital and small letters count, it is spelled " + symbol
	}
	return "unknown unit " + quoted(word) + ", which is spelled " + symbol + " here"
}

// kin returns the unit of d that people write symbol for, mass for force or
// force for mass, or "".
func kin(symbol string, d Dimension) string {
	for _, pair := range [...][2]string{{"lb", "lbf"}, {"kg", "kgf"}} {
		switch {
		case symbol == pair[0] && d == Force:
			return pair[1]
		case symbol == pair[1] && d == Mass:
			return pair[0]
		}
	}
	return ""
}

// ton is the fault of a ton, which is three different things.
func ton(word string, d Dimension) *fault {
	switch strings.ToLower(word) {
	case "ton", "tons", "tonf":
		return &fault{reason: "a ton is 2000 lb, 2240 lb or 1000 kg, by country and trade; " + d.written()}
	}
	return nil
}

// meant returns the symbol of the unit that word probably stands for, "" if
// none comes near. Units of d come first; those of other dimensions have to
// be recognised beyond doubt.
func meant(d Dimension, word string) string {
	if symbol := meantWithin(d, word); symbol != "" {
		return symbol
	}
	if u, ok := LookUp(word); ok && u.row().typed() {
		return word
	}
	for _, s := range spellings {
		if s.has(word, false) {
			return s.symbol
		}
	}
	for _, u := range Units() {
		if strings.EqualFold(u.Symbol, word) {
			return u.Symbol
		}
	}
	return nearest(d, word)
}

// meantWithin returns what word stands for among the units of d, capital
// letters or not.
func meantWithin(d Dimension, word string) string {
	for i := range table[d] {
		if symbol := table[d][i].unit.Symbol; strings.EqualFold(symbol, word) && table[d][i].typed() {
			return symbol
		}
	}
	for _, s := range spellings {
		if find(d, s.symbol) != nil && s.has(word, true) {
			return s.symbol
		}
	}
	return ""
}

// A spelling lists what people write for a unit. A word in the place of another
// dimension has to match it with its capital letters: "ns" is no N*s.
type spelling struct{ symbol, others string }

// has reports whether word is one of the spellings, capital letters or not if
// fold is set.
func (s spelling) has(word string, fold bool) bool {
	for other := range strings.FieldsSeq(s.others) {
		if other == word || fold && strings.EqualFold(other, word) {
			return true
		}
	}
	return false
}

// spellings holds what people write for the units; common practice.
var spellings = [...]spelling{
	{"kg", "kgs kilo kilos kilogram kilograms kilogramme kilogrammes"},
	{"g", "gm gms gram grams gramme grammes"},
	{"t", "te tonne tonnes"},
	{"lb", "lbs lbm pound pounds #"},
	{"m", "metre metres meter meters mtr"},
	{"cm", "cms centimetre centimetres centimeter centimeters"},
	{"mm", "mms millimetre millimetres millimeter millimeters"},
	{"ft", "foot feet fts"},
	{"in", "inch inches ins"},
	{"s", "sec secs second seconds"},
	{"ms", "msec msecs millisecond milliseconds"},
	{"N", "newton newtons"},
	{"kN", "kilonewton kilonewtons"},
	{"daN", "decanewton decanewtons dekanewton dekanewtons"},
	{"lbf", "lbsf lbfs lb-f lbs-f lb(f) #f pound-force pounds-force"},
	{"kip", "kips klbf"},
	{"kgf", "kgsf kg-f kg(f) kp kilopond kiloponds kilogram-force"},
	{"m/s", "mps m/sec m*s^-1 ms-1 metres/second meters/second"},
	{"km/h", "kph kmh kmph km/hr"},
	{"ft/s", "fps ft/sec feet/second"},
	{"mph", "mi/h mi/hr miles/h miles/hour"},
	{"m/s2", "m/s^2 m/s**2 m/s/s m/ss m/sec2 m/sec^2 m*s^-2 ms-2"},
	{"ft/s2", "ft/s^2 ft/s**2 ft/s/s ft/sec2 ft/sec^2"},
	{"deg", "degs degree degrees"},
	{"rad", "rads radian radians"},
	{"J", "joule joules Nm N*m N-m N.m"},
	{"kJ", "kilojoule kilojoules kNm kN*m kN-m kN.m"},
	{"ft*lbf", "ft-lbf ft.lbf ftlbf lbf*ft lbf-ft lbf.ft lbfft ft-lb ft-lbs ft*lb ft*lbs ft.lb ft.lbs ftlb ftlbs lb-ft lb*ft foot-pound foot-pounds"},
	{"N*s", "Ns N-s N.s newton-second newton-seconds kg*m/s kg.m/s kgm/s"},
	{"kN*s", "kNs kN-s kN.s"},
	{"lbf*s", "lbfs lbf-s lbf.s lb*s lb-s lb.s"},
	{"N/m", "N/metre N/meter"},
	{"kN/m", "N/mm kN/metre kN/meter"},
	{"lbf/in", "lb/in lbs/in lbf/inch lb/inch pli"},
	{"lbf/ft", "lb/ft lbs/ft lbf/foot lb/foot plf"},
	{"N/s", "N/sec"},
	{"kN/s", "kN/sec"},
	{"lbf/s", "lb/s lbs/s lbf/sec lb/sec"},
	{"%", "percent pct %%"},
}

// nearest returns the unit of d that word is with two neighbouring characters
// exchanged, as in "lfb". Other slips of the finger are not guessed at: with
// one character more or less, km/s would be m/s, and grad rad.
func nearest(d Dimension, word string) string {
	for i := 0; i+1 < len(word); i++ {
		swapped := []byte(word)
		swapped[i], swapped[i+1] = swapped[i+1], swapped[i]
		if r := find(d, string(swapped)); r != nil {
			return r.unit.Symbol
		}
	}
	return ""
}
