package reportgen

import "strings"

// GuardCell keeps a spreadsheet from taking a cell of CSV for a formula: an
// apostrophe stands before a first character that begins one, also one behind
// blanks, and before an apostrophe, so that UnguardCell gives the cell back.
func GuardCell(cell string) string {
	if dangerous(cell) {
		return "'" + cell
	}
	return cell
}

// UnguardCell takes the apostrophe away that GuardCell put before a cell.
func UnguardCell(cell string) string {
	if rest, found := strings.CutPrefix(cell, "'"); found && dangerous(rest) {
		return rest
	}
	return cell
}

func dangerous(cell string) bool {
	for _, first := range strings.TrimLeft(cell, " "+noBreak) {
		return strings.ContainsRune("=+-@\t\r\n'|%＝＋－＠", first)
	}
	return false
}
