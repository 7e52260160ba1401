package arrest

// Impossible reports whether nothing in the whole of the job's bands can
// happen (M-05): a force that only pulls needs
//
//	d < v*t + g*t^2/2
//
// and limit, m, is the greatest right side the entries allow. Both distance
// and time must be given; else nothing is impossible.
func Impossible(j *Job) (limit float64, impossible bool) {
	least, greatest := ends(j)
	if least.Distance <= 0 || greatest.Time <= 0 {
		return 0, false
	}
	var p Point
	At(&greatest, &p)
	limit = reachable(p.Speed, greatest.Gravity, greatest.Time)
	return limit, least.Distance >= limit
}
