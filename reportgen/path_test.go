package reportgen

import (
	"encoding/json"
	"math"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/connector"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

// The rope and the absorbers of the worked examples of M-10 and M-12.
const (
	tailRope = "[[connector]]\npart = \"rope\"\nname = \"tail rope\"\nlength = { value = \"2.5 m ± 0 m\", source = \"measured\" }\nmodulus = { value = \"22.5 kN ± 0 kN\", source = \"label\" }\n"

	peakLimit = "[[limit]]\nid = \"peak\"\nquantity = \"peak_force\"\nat_most = \"8 kN\"\nauthority = \"site rule 4\"\nedition = \"second\"\nkind = \"person\"\nchecked_on = \"5 May 2025\"\n"

	quarter = "[model]\nallowance = { value = \"25 %\", source = \"measured\", note = \"drop tests\" }\n"
)

func tearAbsorber(travel string) string {
	return "[[connector]]\npart = \"absorber\"\nname = \"tear absorber\"\ndeployment_force = { value = \"4 kN ± 0 kN\", source = \"label\" }\ntravel_at_most = { value = \"" + travel + " ± 0 m\", source = \"label\" }\n"
}

func pathSheet(t *testing.T, rest string) *Sheet {
	t.Helper()
	return worked(t, "job.toml", []byte(pieces{rest: rest}.toml()))
}

// modelJSON is what the tests below read of the JSON of a modelled job.
type modelJSON struct {
	Estimates []struct {
		Quantity  arrest.Quantity
		Evidence  arrest.Evidence
		High      *float64
		Allowance *float64
		Low       *float64 `json:"compared_low"`
		Top       *float64 `json:"compared_high"`
		Exhausted bool
	}
	Findings []struct {
		Outcome limits.Outcome
		Reason  *limits.ReasonID
		Demand  *float64
	}
	Runs []struct {
		Corner    arrest.Corner
		Peak      *float64 `json:"peak_force"`
		Exhausted []string
		Parts     []struct {
			Name      string
			AtPeak    *float64 `json:"travel_at_peak"`
			Permanent *float64
		}
	} `json:"model_runs"`
}

func readModel(t *testing.T, s *Sheet) (doc modelJSON) {
	t.Helper()
	if err := json.Unmarshal([]byte(asJSON(t, s)), &doc); err != nil {
		t.Fatal(err)
	}
	return doc
}

// The figures that a connector path must show, given with its methods: 100 kg,
// 1.8 m of free fall.
func TestPathJSON(t *testing.T) {
	for _, c := range []struct {
		name, parts string
		quantity    arrest.Quantity
		want        float64
		relative    float64
		exhausted   bool
	}{
		{"absorber alone", tearAbsorber("1.75 m"), arrest.AbsorberTravel, 0.584631053, nineDigits, false},
		{"rope alone", tailRope, arrest.PeakForce, 6702.13770, nineDigits, false},
		{"rope alone", tailRope, arrest.StoppingTime, 0.183733356, nineDigits, false},
		{"not used up", tailRope + tearAbsorber("0.45 m"), arrest.AbsorberTravel, 0.4346, 1e-4, false},
		{"used up", tailRope + tearAbsorber("0.40 m"), arrest.PeakForce, 4296.7, 2e-5, true},
	} {
		doc := readModel(t, pathSheet(t, c.parts))
		found := false
		for _, e := range doc.Estimates {
			if e.Quantity != c.quantity || e.Evidence != arrest.Modelled {
				continue
			}
			found = true
			if !quantity.Close(*e.High, c.want, c.relative) || e.Exhausted != c.exhausted {
				t.Errorf("%s: %s is %v, exhausted %t", c.name, c.quantity, *e.High, e.Exhausted)
			}
		}
		if !found {
			t.Errorf("%s: no %s", c.name, c.quantity)
		}
	}
}

// Without an allowance the figure of the model is shown and decides nothing;
// with one, an exhausted device still keeps the row from being within.
func TestAllowanceAndExhaustion(t *testing.T) {
	for _, c := range []struct {
		rest    string
		outcome limits.Outcome
		reason  limits.ReasonID
		demand  float64
	}{
		{tailRope + tearAbsorber("0.40 m") + peakLimit, limits.Undecided, limits.NoAllowance, 4296.7},
		{tailRope + tearAbsorber("0.40 m") + quarter + peakLimit, limits.Undecided, limits.DeviceExhausted, 1.25 * 4296.7},
		// The allowance is taken on the travel too: 0.45 m less a fifth is used up,
		// and m*g*(h + 0.36 m + F/k) = 4 kN*0.36 m + F^2/(2*k) gives 4609.7 N.
		{tailRope + tearAbsorber("0.45 m") + quarter + peakLimit, limits.Within, "", 1.25 * 4609.7},
	} {
		f := readModel(t, pathSheet(t, c.rest)).Findings[0]
		if f.Outcome != c.outcome || !quantity.Close(*f.Demand, c.demand, 2e-5) || (f.Reason == nil) != (c.reason == "") || f.Reason != nil && *f.Reason != c.reason {
			t.Errorf("%s, demand %v, want %s and %v, %s", f.Outcome, *f.Demand, c.outcome, c.demand, c.reason)
		}
	}
}

// 4 kN and a quarter on either side are 3 kN and 5 kN.
func TestModelledFigureWithAndWithoutAllowance(t *testing.T) {
	s := pathSheet(t, tearAbsorber("1.75 m")+quarter+peakLimit)
	b := newBuilder(s, SIUnits)
	e := b.modelledEstimate(t, arrest.PeakForce)
	if got := breakable(b.estimate(e, pageDigits)); got != "4.00 kN, with the allowance of 25 %: 3.00 to 5.00 kN" {
		t.Errorf("got %q", got)
	}
	demand, _ := b.demandAndLimit(&s.Assessment.Findings[0])
	if got := breakable(demand); got != "3.00 to 5.00 kN, with the allowance of 25 %" {
		t.Errorf("the row says %q", got)
	}
	e.Allowance = nan
	if got := breakable(b.estimate(e, pageDigits)); got != "4.00 kN" {
		t.Errorf("without an allowance %q", got)
	}
}

func (b *builder) modelledEstimate(t *testing.T, q arrest.Quantity) *arrest.Estimate {
	t.Helper()
	i := slices.IndexFunc(b.res().Estimates, func(e arrest.Estimate) bool { return e.Quantity == q && e.Evidence == arrest.Modelled })
	if i < 0 {
		t.Fatal("not modelled: ", q)
	}
	return &b.res().Estimates[i]
}

// S-35 is the first of all warnings, marked twice, before example values too.
func TestExhaustedIsLoudest(t *testing.T) {
	s := worked(t, "job.toml", []byte(pieces{top: "example = true", rest: tailRope + tearAbsorber("0.40 m")}.toml()))
	r := Build(s, BothUnits)
	first := r.Warnings[0]
	if first.Label != "!! S-35" || !first.Loudest || !strings.HasPrefix(first.Text, "EXHAUSTED: the travel of \"tear absorber\"") {
		t.Errorf("first: %+v", first)
	}
	for _, l := range r.Warnings[1:] {
		if l.Loudest || strings.Contains(l.Label, "!!") {
			t.Errorf("as loud: %s", l.Label)
		}
	}
	if painted := asText(t, s, BothUnits, TextOptions{Color: true}); !strings.Contains(painted, "m"+"EXHAUSTED: the travel") {
		t.Error("the sentence itself is not painted")
	}
}

// Where nothing bounds a figure the text says so and JSON has null: an absorber
// alone is rigid once it is used up, and over 0.4 m that takes less than
// W + m*g*h/0.4 m = 5.39 kN.
func TestNoUpperEnd(t *testing.T) {
	weak := strings.Replace(tearAbsorber("0.4 m"), "4 kN ± 0 kN", "5 kN .. 6 kN", 1)
	s := pathSheet(t, weak+peakLimit)
	out := breakable(strings.Join(strings.Fields(asText(t, s, SIUnits, TextOptions{})), " "))
	b := newBuilder(s, SIUnits)
	if got := breakable(b.estimate(b.modelledEstimate(t, arrest.PeakForce), pageDigits)); got != "5.39 kN and more, no upper end" {
		t.Errorf("got %q", got)
	}
	for _, want := range []string{"a figure with no upper end", "no upper end, by the model", "! S-36"} {
		if !strings.Contains(out, want) {
			t.Errorf("no %q in %s", want, out)
		}
	}
	for _, e := range readModel(t, s).Estimates {
		if e.Quantity == arrest.PeakForce && e.Evidence == arrest.Modelled && e.High != nil {
			t.Errorf("high is %v", *e.High)
		}
	}
	if strings.Contains(out, "Inf") {
		t.Error("an infinity is printed")
	}
}

// The reasons of a row whose figure has an open end say so in words.
func TestOpenEndsInReasons(t *testing.T) {
	d := display{SIUnits, quantity.Metric}
	four := arrest.Figure(quantity.Force, 4000, quantity.Nearest)
	for want, args := range map[string][]arrest.Arg{
		"the entries allow 4.00 kN and more, no upper end, and the limit lies between":    {four, openEnd},
		"the entries allow up to 4.00 kN, no lower end, and the limit lies between":       {openEnd, four},
		"over the entries the floor reaches no upper end, beyond the limit":               {openEnd},
		"over the entries the floor reaches a figure with no upper end, beyond the limit": {arrest.Figure(quantity.Force, math.Inf(1), quantity.Up)},
	} {
		p := reasons[limits.Straddles]
		if len(args) == 1 {
			p = reasons[limits.FloorReaches]
		}
		if got := breakable(p.fill(d, quantity.Unit{}, args)); got != want {
			t.Errorf("%q, want %q", got, want)
		}
	}
}

// The section shows each part with its figures as typed, from the anchor to the
// body, and each run with its parts.
func TestPathSections(t *testing.T) {
	s := pathSheet(t, strings.Replace(tailRope, "± 0 m", "± 0.1 m", 1)+tearAbsorber("0.40 m"))
	b := newBuilder(s, SIUnits)
	sections := b.pathSections()
	rows := sections[0].Blocks[0].Table.Rows
	if got := strings.Join(rows[0].Cells, "|"); got != "1|tail rope|rope|length 2.5 m ± 0.1 m\nmodulus 22.5 kN ± 0 kN" {
		t.Error(got)
	}
	if got := strings.Join(rows[1].Cells, "|"); got != "2|tear absorber|absorber|deployment force 4 kN ± 0 kN\ntravel at most 0.40 m ± 0 m" {
		t.Error(got)
	}
	var headings []string
	for _, section := range sections[1:] {
		headings = append(headings, section.Heading)
	}
	if got := strings.Join(headings, "|"); got != "The arrest in time, as written|The arrest in time, at the greatest peak|The arrest in time, at the longest stop" {
		t.Errorf("runs: %s", got)
	}
	// The rope is stretched by the force over its stiffness: 4296.7 N over 9 kN/m.
	travel := sections[1].Blocks[2].Table.Rows
	if got := strings.Join(travel[0].Cells, "|"); breakable(got) != "tail rope|0.477 m|0.477 m|0 m" {
		t.Error(got)
	}
	if got := strings.Join(travel[1].Cells, "|"); breakable(got) != "tear absorber|0.400 m|0.400 m|0.400 m" {
		t.Error(got)
	}
}

// Each account adds up to what it says is left over, line by line as printed:
// five digits of each line lose at most half of the last.
func TestLedgersAddUp(t *testing.T) {
	s := pathSheet(t, tailRope+tearAbsorber("0.40 m"))
	b := newBuilder(s, SIUnits)
	for _, block := range b.ledgerBlocks(&s.Result.Runs[0])[:3] {
		sum, size := 0.0, 0.0
		rows := block.Table.Rows
		for _, r := range rows[:len(rows)-1] {
			x := number(strings.Fields(breakable(r.Cells[1]))[0])
			size = max(size, math.Abs(x))
			if strings.HasPrefix(r.Cells[0], "- ") {
				x = -x
			}
			sum += x
		}
		if !(math.Abs(sum) <= float64(len(rows))*0.5e-4*size) {
			t.Errorf("%s: %g is left over", block.Table.Header[0], sum)
		}
		if last := rows[len(rows)-1]; last.Cells[0] != leftOver || !strings.HasPrefix(last.Cells[1], lessThan) {
			t.Errorf("last line %q", last.Cells)
		}
	}
	// What the weight gives in the time is W t: 980.665 N over the time of the run.
	l := &s.Result.Runs[0].Run
	if want := 980.665 * l.End.Time; !quantity.Close(l.Ledger.Weight, want, 1e-9) {
		t.Errorf("weight %g, want %g", l.Ledger.Weight, want)
	}
}

// A residual is a power of ten that it stays below, never its digits.
func TestLeftText(t *testing.T) {
	for x, want := range map[float64]string{
		0: "less than 1e-9 J", 3e-13: "less than 1e-9 J", -3e-13: "less than 1e-9 J", 2e-9: "less than 1e-8 J", -0.5: "less than 1e0 J",
	} {
		if got := breakable(leftText(x, quantity.Energy.SI())); got != want {
			t.Errorf("%g: %q, want %q", x, got, want)
		}
	}
}

// Ids of the path are closed sets with words of their own.
func TestPathWords(t *testing.T) {
	for s := connector.Stopped; s <= connector.Rigid; s++ {
		if statusWords[s] == "" {
			t.Errorf("no words for %v", s)
		}
	}
	for basis := arrest.ByStiffness; basis < arrest.ByPoints; basis++ {
		if basisWords[basis] == "" {
			t.Errorf("no words for basis %d", basis)
		}
	}
	for _, c := range []arrest.Corner{arrest.AtWritten, arrest.AtLow, arrest.AtHigh, arrest.AtLongest} {
		if cornerWords[c] == "" {
			t.Errorf("no words for the corner %s", c)
		}
	}
}

// The request for an allowance has the comparison beside it: every type with
// its number of drops and signed ends, the worst first. With an allowance the
// comparison stands behind page 1; without a modelled figure nowhere.
func TestPublishedComparison(t *testing.T) {
	at := func(rest, heading string) int {
		return slices.IndexFunc(Build(pathSheet(t, rest), SIUnits).Sections, func(s Section) bool { return s.Heading == heading })
	}
	if i := at(tailRope, comparedHeading); i != 0 {
		t.Errorf("without an allowance it is section %d", i)
	}
	if i := at(tailRope+quarter, comparedHeading); i < at(tailRope+quarter, behindHeading) {
		t.Errorf("with an allowance it is section %d", i)
	}
	if i := at(overDistance, comparedHeading); i >= 0 {
		t.Error("it stands on a sheet without a model")
	}
	rows := Build(pathSheet(t, tailRope), SIUnits).Sections[0].Blocks[1].Table.Rows
	signs := regexp.MustCompile(`^(0|[+-]\d[\d.]*) % to (0|[+-]\d[\d.]*) %$`)
	if len(rows) == 0 || len(rows) != len(connector.Published) {
		t.Fatalf("%d rows", len(rows))
	}
	for i, r := range rows {
		if n, err := strconv.Atoi(r.Cells[1]); err != nil || n < 1 || !signs.MatchString(breakable(r.Cells[2])) {
			t.Errorf("row %q", r.Cells)
		}
		if i > 0 && connector.Published[i].Low < connector.Published[i-1].Low {
			t.Errorf("%s stands after a milder type", r.Cells[0])
		}
	}
}

// A peak predicted a fifth too low is reached by an allowance of a quarter:
// 0.8 (1 + 1/4) = 1. It is rounded up, and none is needed where none was low.
func TestCoveredBy(t *testing.T) {
	for low, want := range map[float64]string{-0.2: "25.0 %", -0.324: "48.0 %", 0: "0 %", 0.1: "0 %"} {
		if got := breakable(coveredBy(low)); got != want {
			t.Errorf("%g: %s, want %s", low, got, want)
		}
	}
}

// A rope known by its rated impact force has the comparison of ropes beside it.
func TestPublishedRopes(t *testing.T) {
	rated := strings.Replace(tailRope, "modulus = { value = \"22.5 kN ± 0 kN\"", "impact_force = { value = \"8.2 kN ± 0 kN\"", 1)
	for rest, want := range map[string]bool{tailRope: false, rated: true} {
		if has := strings.Contains(asText(t, pathSheet(t, rest), SIUnits, TextOptions{}), "Ropes by their rated impact force"); has != want {
			t.Errorf("ropes are compared: %t, want %t", has, want)
		}
	}
}

// Page 1 says of modelled figures what they were compared with, and that it
// promises nothing beyond it.
func TestValidationOfTheModel(t *testing.T) {
	said := func(rest string) bool {
		return strings.Contains(strings.Join(strings.Fields(asText(t, pathSheet(t, rest), SIUnits, TextOptions{})), " "), "That promises nothing for other parts")
	}
	if !said(tailRope) || !said(tailRope+quarter) || said(overDistance) {
		t.Error("the status of the model is not said, or said without a model")
	}
}

// The register names what the model takes for granted, and the allowance.
func TestRegisterOfTheModel(t *testing.T) {
	for rest, want := range map[string][2]bool{overDistance: {}, tailRope: {true, false}, tailRope + quarter: {true, true}} {
		b := newBuilder(pathSheet(t, rest), SIUnits)
		var all []string
		for _, l := range b.register() {
			all = append(all, l.Text)
		}
		out := strings.Join(all, "\n")
		if got := [2]bool{strings.Contains(out, pathAssumption), strings.Contains(out, "the allowance entered, 25 %")}; got != want {
			t.Errorf("%v, want %v", got, want)
		}
	}
}

// The accounts stand in lbf*s and ft*lbf on a sheet in customary units: 594.17
// N*s are 133.57 lbf*s, 1765.197 J are 1301.94 ft*lbf (NIST SP 811, B.8).
func TestLedgersInCustomaryUnits(t *testing.T) {
	s := pathSheet(t, tailRope+tearAbsorber("1.75 m"))
	for units, want := range map[UnitChoice][2]string{
		SIUnits: {"N*s", "1765.2 J"}, USUnits: {"lbf*s", "1301.9 ft*lbf"},
	} {
		b := newBuilder(s, units)
		blocks := b.ledgerBlocks(&s.Result.Runs[0])
		momentum, energy := blocks[0].Table.Rows, blocks[1].Table.Rows
		if got := breakable(energy[0].Cells[1]); got != want[1] {
			t.Errorf("energy %q, want %q", got, want[1])
		}
		for _, row := range momentum {
			if !strings.HasSuffix(row.Cells[1], noBreak+want[0]) {
				t.Errorf("momentum %q, want %s", row.Cells[1], want[0])
			}
		}
	}
}
