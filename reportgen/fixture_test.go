package reportgen

import (
	"bytes"
	"math"
	"os"
	"path/filepath"
	"testing"

	"arrestcheck/arrest"
	"arrestcheck/arrest/jobfile"
	"arrestcheck/arrest/quantity"
	"arrestcheck/limits"
)

var nan = math.NaN()

// band reads a figure as a user would type it.
func band(t testing.TB, d quantity.Dimension, text string) quantity.Band {
	t.Helper()
	b, err := quantity.Parse(d, text)
	if err != nil {
		t.Fatal(err)
	}
	return b
}

// fixture is a small sheet made by hand: two inputs, one of them open, a floor
// of the peak, a mean, a rated ceiling, and one row that is undecided. Its
// figures need not follow from each other.
func fixture(t testing.TB) *Sheet {
	mass, distance := band(t, quantity.Mass, "100 kg ± 1 kg"), band(t, quantity.Length, "1.07 m")
	set := &limits.Set{Name: "site.toml", SHA256: "5e7", Title: "Site rules", CheckedOn: "in May"}
	set.Limits = []limits.Limit{{
		ID: "peak", Quantity: arrest.PeakForce, Sense: limits.AtMost, Bound: band(t, quantity.Force, "1800 lbf"),
		Authority: "site rule 4", Edition: "second", Kind: limits.Person,
	}}
	file := &jobfile.File{
		Name: "job.toml", SHA256: "10b",
		Document: jobfile.Document{Title: "Lamp change", Purpose: "how hard is the stop", Revision: "B", System: "lanyard", Rescue: "ladder team"},
		Sets:     []limits.Set{*set},
	}
	res := &arrest.Result{
		Inputs: []arrest.Input{
			{Key: "worker.mass", Role: arrest.OfWorker, Band: mass, Source: arrest.FromMeasured, Note: "scale"},
			{Key: "stop.distance", Role: arrest.OfStop, Band: distance, Source: arrest.FromLabel},
		},
		Estimates: []arrest.Estimate{
			{Quantity: arrest.PeakForce, Evidence: arrest.Given, Method: "M-06", Bound: arrest.AtLeast, Low: 3419.97623, Value: 3419.97623, High: nan, Reach: 3500, Uses: []int{0, 1}},
			{Quantity: arrest.MeanForceOverDistance, Evidence: arrest.Given, Method: "M-02", Bound: arrest.Between, Low: 2604.1, Value: 2630.38182, High: 2656.7, Reach: nan, Uses: []int{0, 1}},
			{Quantity: arrest.PeakForce, Evidence: arrest.Rated, Method: "M-09", Bound: arrest.AtMost, Low: nan, Value: nan, High: 6000, Reach: nan, From: "label of the lanyard"},
			{Quantity: arrest.TotalMass, Evidence: arrest.Given, Method: arrest.Entered, Bound: arrest.Between, Low: 99, Value: 100, High: 101, Reach: nan, Uses: []int{0}},
		},
		Working: []arrest.WorkingLine{
			{Method: "M-02", Formula: "F_d = W + m*v^2/(2*d)", Meaning: "mean force over the distance", Corner: arrest.AtWritten,
				Terms: []arrest.Term{{Symbol: "W", Dimension: quantity.Force, SI: 980.665}, {Symbol: "m", Dimension: quantity.Mass, SI: 100},
					{Symbol: "v", Dimension: quantity.Speed, SI: 5.94171187}, {Symbol: "d", Dimension: quantity.Length, SI: 1.07}},
				Result: arrest.Term{Symbol: "F_d", Dimension: quantity.Force, SI: 2630.38182}},
			{Method: "M-02", Formula: "F_d_wrong = m*v^2/(2*d)", Meaning: "wrong", Corner: arrest.AtWritten,
				Result: arrest.Term{Symbol: "F_d_wrong", Dimension: quantity.Force, SI: 1649.71682}},
		},
		Persons: 1,
	}
	a := &limits.Assessment{
		Findings: []limits.Finding{{
			Limit: &set.Limits[0], Set: set, Outcome: limits.Undecided, Used: []int{0}, Bound: arrest.AtLeast, Demand: 3419.97623, Ratio: nan,
			Reasons: []limits.Reason{{ID: limits.OnlyFloor, Args: []arrest.Arg{arrest.Figure(quantity.Force, 3419.97623, quantity.Down)}}},
		}},
		Groups:     []limits.Group{{Authority: "site rule 4", Rows: []int{0}, Outcome: limits.Undecided}},
		NotEntered: []limits.Expected{{Subject: "clearance"}},
		Elsewhere:  []limits.Elsewhere{{Quantity: arrest.AnchorForce, Where: "anchor register"}},
	}
	return &Sheet{File: file, Result: res, Assessment: a, Tool: "version 0", Number: 1, Of: 2}
}

const jobsFolder = "../testdata/jobs"

// jobNames lists the jobs of testdata that can be worked out.
func jobNames(t testing.TB) []string {
	t.Helper()
	paths, err := filepath.Glob(filepath.Join(jobsFolder, "*.toml"))
	if err != nil || len(paths) == 0 {
		t.Fatal("no jobs in testdata: ", err)
	}
	for i := range paths {
		paths[i] = filepath.Base(paths[i])
	}
	return paths
}

// sheet works one of the jobs of testdata out, as the command does.
func sheet(t testing.TB, name string) *Sheet {
	t.Helper()
	data, err := os.ReadFile(filepath.Join(jobsFolder, name))
	if err != nil {
		t.Fatal(err)
	}
	return worked(t, name, data)
}

func worked(t testing.TB, name string, data []byte) *Sheet {
	t.Helper()
	return workedIn(t, jobsFolder, name, data)
}

// workedWith works a job out with entries set on the command line, a key and
// its figure each.
func workedWith(t testing.TB, name string, data []byte, set ...string) *Sheet {
	t.Helper()
	return workedIn(t, jobsFolder, name, data, set...)
}

func workedIn(t testing.TB, folder, name string, data []byte, set ...string) *Sheet {
	t.Helper()
	var overrides []jobfile.Override
	for i := 0; i < len(set); i += 2 {
		overrides = append(overrides, jobfile.Override{Key: set[i], Value: set[i+1]})
	}
	file, err := jobfile.Read(name, data, os.DirFS(folder), overrides...)
	if err != nil {
		t.Fatal(err)
	}
	res := arrest.Evaluate(&file.Job)
	arrest.ShowWorking(&file.Job, &res)
	a := limits.Assess(&res, file.Sets, file.Elsewhere)
	return &Sheet{File: file, Result: &res, Assessment: &a, Tool: "test", Number: 1, Of: 1}
}

func asText(t testing.TB, s *Sheet, u UnitChoice, o TextOptions) string {
	t.Helper()
	var b bytes.Buffer
	if err := Text(&b, Build(s, u), o); err != nil {
		t.Fatal(err)
	}
	return b.String()
}
