package reportgen

import (
	"io"

	"arrestcheck/arrest"
	"arrestcheck/arrest/quantity"
	"arrestcheck/arrest/study"
)

// SensitivityFormat is the first value of the JSON of a sensitivity.
const SensitivityFormat = "arrestcheck sensitivity 1"

// jsonRanking is what moves one row.
type jsonRanking struct {
	Limit     string          `json:"limit"`
	Set       *string         `json:"set"`
	Quantity  arrest.Quantity `json:"quantity"`
	Zone      string          `json:"zone"`
	Evidence  *string         `json:"evidence"` // of the figure that leads the row
	End       *string         `json:"end"`
	Unit      string          `json:"unit"`
	AtCentres string          `json:"at_centres"`
	Inputs    []jsonInfluence `json:"inputs"`
}

type jsonInfluence struct {
	Key       string        `json:"key"`
	Open      bool          `json:"open"`
	Low       figure        `json:"low"`
	High      figure        `json:"high"`
	Spread    figure        `json:"spread"`
	Tolerance jsonTolerance `json:"tolerance"`
}

type jsonTolerance struct {
	Help    string `json:"help"`
	About   figure `json:"about"`
	Written bool   `json:"written"`
	By      figure `json:"by"`
	Unit    string `json:"unit"`
	Then    string `json:"then"`
}

// jsonSensitivity is what to measure first, row by row; empty where it is not
// worked out for a sheet.
func (b *builder) jsonSensitivity() []jsonRanking {
	list, _ := b.rankings()
	return b.jsonRankings(list)
}

func (b *builder) jsonRankings(list []*study.Ranking) []jsonRanking {
	all := []jsonRanking{}
	for _, r := range list {
		if r != nil {
			all = append(all, b.jsonRanking(r))
		}
	}
	return all
}

func (b *builder) jsonRanking(r *study.Ranking) jsonRanking {
	l := r.Finding.Limit
	j := jsonRanking{
		Limit: l.ID, Quantity: l.Quantity, Zone: r.Zone.String(), Evidence: text(r.Column.Evidence), End: text(r.End),
		Unit: dimensionOf(l.Quantity).SI().Symbol, AtCentres: r.AtCentres.String(),
		Inputs: each(r.Influences, func(n *study.Influence) jsonInfluence {
			t := &n.Tolerance
			return jsonInfluence{n.Key, n.Open != arrest.Settled, figure(n.Low), figure(n.High), figure(n.Spread),
				jsonTolerance{string(t.Help), figure(t.About), t.Written, figure(t.By), b.unitOf(n.Key).Symbol, t.Then.String()}}
		}),
	}
	if r.Finding.Set != nil {
		j.Set = text(r.Finding.Set.Name)
	}
	return j
}

// unitOf is the SI unit of an input.
func (b *builder) unitOf(key string) quantity.Unit {
	return inputOf(&b.s.File.Job, key).Band.Unit.Dimension.SI()
}

// JSON writes the sensitivity as one JSON document on one line. The error is
// that of to.
func (v *Sensitivity) JSON(to io.Writer) error {
	b := newBuilder(v.Sheet, SIUnits)
	return encode(to, struct {
		studyDocument
		Sensitivity []jsonRanking `json:"sensitivity"`
	}{b.studyDocument(SensitivityFormat, b.studyWarnings(nil, b.told(aloneAsEntered))), b.jsonRankings(v.list)})
}

// CSV writes one input of one row a line, in SI units with 12 significant
// digits. The error is that of to.
func (v *Sensitivity) CSV(to io.Writer) error {
	b := newBuilder(v.Sheet, SIUnits)
	c := newCSV(to)
	for _, head := range []string{"limit", "quantity", "zone", "input", "open", "demand low (SI)", "demand high (SI)", "help", "about (SI)", "within (SI)", "then"} {
		c.text(head)
	}
	c.end()
	for _, r := range b.jsonRankings(v.list) {
		for _, n := range r.Inputs {
			for _, s := range []string{r.Limit, string(r.Quantity), r.Zone, n.Key, yesOrNo(n.Open)} {
				c.text(s)
			}
			c.figure(float64(n.Low))
			c.figure(float64(n.High))
			c.text(n.Tolerance.Help)
			c.figure(float64(n.Tolerance.About))
			c.figure(float64(n.Tolerance.By))
			c.text(n.Tolerance.Then)
			c.end()
		}
	}
	return c.out.Flush()
}
