package reportgen

import (
	"slices"
	"strings"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/limits"
)

// A limit for what feels the peak, put on a mean, makes S-32 loud and is named;
// one of a product test or of the motion does not.
func TestMeansOnRows(t *testing.T) {
	for kind, is := range map[limits.Kind]bool{
		limits.Person: true, limits.Anchor: true, limits.Structure: true, limits.Motion: false, limits.ProductTest: false,
	} {
		for _, q := range []arrest.Quantity{arrest.MeanForceOverDistance, arrest.MeanForceOverTime, arrest.MeanAboveLevel, arrest.StoppingForce} {
			s := fixture(t)
			l := s.Assessment.Findings[0].Limit
			l.Quantity, l.Kind = q, kind
			list := display{}.statements(s)
			one := list[slices.IndexFunc(list, func(one said) bool { return one.number == "S-32" })]
			want := " Row 1 holds a mean, " + title(q) + ", against at most 1800 lbf, a limit for kind \"" + string(kind) + "\": the peak is above the mean."
			if (one.weight == loud) != is || strings.HasSuffix(one.text, want) != is || !strings.HasPrefix(one.text, meansAreNotPeaks.text) {
				t.Errorf("%s, %s: weight %d, %s", kind, q, one.weight, one.text)
			}
		}
	}
	s := worked(t, "job.toml", []byte(trolleyJob+strings.Replace(stopLimit, "peak_force", "stopping_force", 1)))
	list := display{}.statements(s)
	if i := slices.IndexFunc(list, func(one said) bool { return one.number == "S-48" }); list[i].weight != loud || !strings.Contains(list[i].text, " Row 1 holds a mean") {
		t.Errorf("S-48: %+v", list[i])
	}
}
