package jobfile

// yearPattern is holdsYear as the schema has it.
const yearPattern = `(?:^|[^0-9])[0-9]{4}(?:[^0-9]|$)`

// holdsYear reports whether a text holds a year: four digits and no more of them
// beside each other.
func holdsYear(s string) bool {
	digits := 0
	for i := range len(s) {
		switch {
		case '0' <= s[i] && s[i] <= '9':
			digits++
			continue
		case digits == 4:
			return true
		}
		digits = 0
	}
	return digits == 4
}
