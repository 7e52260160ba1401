package jobfile_test

import (
	"bytes"
	"encoding/json"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"time"

	"github.com/BurntSushi/toml"
	"github.com/santhosh-tekuri/jsonschema/v6"

	"arrestcheck/arrest/jobfile"
)

// compiled returns a schema of the table as an independent validator reads it,
// which holds it against the draft first.
func compiled(t testing.TB, kind string) *jsonschema.Schema {
	t.Helper()
	data, err := jobfile.Schema(kind)
	if err != nil {
		t.Fatal(err)
	}
	document, err := jsonschema.UnmarshalJSON(bytes.NewReader(data))
	if err != nil {
		t.Fatal(err)
	}
	c := jsonschema.NewCompiler()
	if err := c.AddResource(kind+".json", document); err != nil {
		t.Fatal(err)
	}
	s, err := c.Compile(kind + ".json")
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// asJSON turns decoded TOML into what JSON can hold, as editors do it: dates
// become texts, figures that are none become texts too.
func asJSON(v any) any {
	switch v := v.(type) {
	case map[string]any:
		m := map[string]any{}
		for name, in := range v {
			m[name] = asJSON(in)
		}
		return m
	case []map[string]any:
		list := make([]any, len(v))
		for i, in := range v {
			list[i] = asJSON(in)
		}
		return list
	case []any:
		list := make([]any, len(v))
		for i, in := range v {
			list[i] = asJSON(in)
		}
		return list
	case time.Time:
		return v.Format(time.RFC3339)
	case float64:
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return "no figure"
		}
	}
	return v
}

// held holds TOML against a schema. undecoded says that it is no TOML.
func held(s *jsonschema.Schema, data []byte) (undecoded bool, err error) {
	var tree map[string]any
	if err := toml.Unmarshal(data, &tree); err != nil {
		return true, err
	}
	return false, s.Validate(asJSON(tree))
}

func TestSchemaTakesWhatIsRead(t *testing.T) {
	for _, c := range []struct {
		kind, folder string
		atLeast      int
	}{
		{"job", jobsFolder, 15},
		{"limits", limitsFolder, 3},
		{"limits", filepath.Join(jobsFolder, "site"), 2},
	} {
		s := compiled(t, c.kind)
		for _, name := range files(t, c.folder, c.atLeast) {
			data, err := os.ReadFile(filepath.Join(c.folder, name))
			if err != nil {
				t.Fatal(err)
			}
			if _, err := held(s, data); err != nil {
				t.Errorf("%s: %#v", name, err)
			}
		}
	}
}

// What a schema cannot say, and why. A file that is listed here and fails the
// schema all the same, or is not there any more, is an error.
const (
	compares   = "a schema does not compare two figures, of one text or of two"
	magnitude  = "a schema does not know how large a figure in a unit is"
	names      = "a schema does not compare names that stand in several places"
	counts     = "the table of keys does not say how many figures and parts are calculated with"
	components = "the table of keys does not say what goes with how many components"
	several    = "the table of keys does not say what changes where a section stands several times"
	otherFile  = "a schema sees one file"
	apart      = "the table of keys does not say what goes with the keys of another section"
	reach      = "a schema does not work out a layout"
	besideTrue = "the table of keys does not say what stands beside true and not beside false"
	dates      = "JSON has no dates: one without quotes arrives as a text"
)

var notOfASchema = map[string]string{
	"connector-activation-bands-overlap.toml":      compares,
	"connector-activation-travel-longer.toml":      compares,
	"connector-activation-travel-unwanted.toml":    compares,
	"connector-activation-without-travel.toml":     compares,
	"connector-bands-too-many.toml":                counts,
	"connector-figures-too-many.toml":              counts,
	"connector-impact-force-in-pounds.toml":        magnitude,
	"connector-impact-force-of-no-rope.toml":       magnitude,
	"connector-locking-beyond-the-free-fall.toml":  compares,
	"connector-locking-without-free-fall.toml":     compares,
	"connector-name-twice.toml":                    names,
	"connector-parts-too-many.toml":                counts,
	"connector-points-begin-in-the-air.toml":       compares,
	"connector-points-begin-with-a-force.toml":     compares,
	"connector-points-end-flat.toml":               compares,
	"connector-points-extension-falls.toml":        compares,
	"connector-points-extension-stays.toml":        compares,
	"connector-points-flat-without-unloading.toml": compares,
	"connector-points-force-falls.toml":            compares,
	"connector-points-without-force.toml":          magnitude,
	"connector-unloading-shallow.toml":             compares,
	"connector-unloading-with-a-band.toml":         compares,
	"figure-low-end-not-above-zero.toml":           compares,
	"figure-not-plausible.toml":                    magnitude,
	"figure-overflow.toml":                         magnitude,
	"figure-reversed-range.toml":                   compares,
	"gravity-of-another-planet.toml":               magnitude,
	"impossible.toml":                              compares,
	"impossible-over-the-whole-box.toml":           compares,
	"clearance-counted-in-both.toml":               names,
	"clearance-counted-in-path-and-margin.toml":    apart,
	"clearance-counted-in-the-margin.toml":         names,
	"clearance-counted-in-the-path.toml":           apart,
	"clearance-counted-in-the-stop.toml":           apart,
	"clearance-counted-in-three.toml":              names,
	"clearance-deceleration-beside-a-stop.toml":    apart,
	"layout-bands-too-many.toml":                   counts,
	"layout-bands-too-many-for-a-swing.toml":       counts,
	"layout-figures-too-many.toml":                 counts,
	"layout-inside-the-structure.toml":             reach,
	"layout-length-below-the-parts.toml":           compares,
	"layout-length-missing.toml":                   apart,
	"layout-length-of-one-part-missing.toml":       apart,
	"layout-locking-said-twice.toml":               apart,
	"layout-not-plausible.toml":                    magnitude,
	"layout-out-of-reach.toml":                     reach,
	"layout-out-of-reach-beyond-the-edge.toml":     reach,
	"layout-out-of-reach-in-feet.toml":             reach,
	"layout-out-of-reach-in-part.toml":             reach,
	"layout-out-of-reach-over-the-bands.toml":      reach,
	"layout-retractables-two.toml":                 several,
	"layout-slack-beside-a-retractable-part.toml":  apart,
	"layout-slack-missing.toml":                    apart,
	"layout-slack-twice.toml":                      apart,
	"obstacle-level-with-an-underside.toml":        besideTrue,
	"obstacle-moving-with-sides.toml":              besideTrue,
	"obstacle-name-twice.toml":                     names,
	"obstacles-too-many.toml":                      counts,
	"position-name-twice.toml":                     names,
	"position-names-missing.toml":                  several,
	"positions-too-many.toml":                      counts,
	"limit-file-a-job.toml":                        otherFile,
	"limit-file-absent.toml":                       otherFile,
	"limit-file-pin-differs.toml":                  otherFile,
	"limit-file-twice.toml":                        names,
	"limit-name-twice-in-a-job.toml":               names,
	"limit-names-twice.toml":                       otherFile,
	"limit-pair-apart.toml":                        compares,
	"limits/checked-on-a-date.toml":                dates,
	"load-backwards.toml":                          magnitude,
	"load-backwards-in-a-part.toml":                compares,
	"load-bounces-over-a-distance.toml":            compares,
	"load-components-differ.toml":                  components,
	"load-distance-in-a-plane.toml":                components,
	"load-driving-force-missing.toml":              components,
	"load-not-slowed.toml":                         compares,
	"load-nothing-stopped.toml":                    compares,
	"load-slope-too-steep.toml":                    magnitude,
	"load-still.toml":                              magnitude,
	"load-still-with-a-direction.toml":             magnitude,
	"load-up-along-no-component.toml":              components,
	"model-above-all.toml":                         magnitude,
	"rating-part-misspelt.toml":                    names,
	"rating-part-without-connector.toml":           names,
	"rise-fraction-above-one.toml":                 magnitude,
	"workers-together.toml":                        several,
}

// Every refused file is refused by the schema too, is no TOML, or is listed.
func TestSchemaRefusesWhatIsRefused(t *testing.T) {
	refused, listed, noTOML := 0, 0, 0
	for _, c := range []struct {
		kind, folder string
		atLeast      int
	}{{"job", "", 100}, {"limits", "limits", 8}} {
		s := compiled(t, c.kind)
		for _, name := range files(t, filepath.Join(invalidFolder, c.folder), c.atLeast) {
			data, err := os.ReadFile(filepath.Join(invalidFolder, c.folder, name))
			if err != nil {
				t.Fatal(err)
			}
			name = filepath.ToSlash(filepath.Join(c.folder, name))
			reason, isListed := notOfASchema[name]
			undecoded, err := held(s, data)
			switch {
			case undecoded && !isListed:
				noTOML++
			case err == nil && isListed:
				listed++
			case err == nil:
				t.Errorf("%s: the schema takes it; list it with the reason, or let the schema say it", name)
			case isListed:
				t.Errorf("%s is listed (%s), but the schema refuses it: %v", name, reason, err)
			default:
				refused++
			}
		}
	}
	if listed != len(notOfASchema) {
		t.Errorf("%d files are listed, %d of them are there", len(notOfASchema), listed)
	}
	if refused < 75 {
		t.Errorf("the schema refuses %d files, at least 75 expected", refused)
	}
	t.Logf("%d refused by the schema, %d listed, %d no TOML", refused, listed, noTOML)
}

// The schema names every key of the table, says of each what the table says,
// and lets no other key through.
func TestSchemaFollowsTheTable(t *testing.T) {
	for kind, place := range map[string]jobfile.Places{"job": jobfile.InJob, "limits": jobfile.InLimits} {
		data, err := jobfile.Schema(kind)
		if err != nil {
			t.Fatal(err)
		}
		again, _ := jobfile.Schema(kind)
		if !bytes.Equal(data, again) {
			t.Errorf("%s: two bytes of one schema differ", kind)
		}
		for _, k := range jobfile.Keys() {
			if k.Places&place == 0 {
				continue
			}
			help, _ := json.Marshal(k.Help)
			if !bytes.Contains(data, []byte(`"`+k.Name+`": {`)) || !bytes.Contains(data, help) {
				t.Errorf("%s: nothing about %s", kind, k.Path())
			}
		}
		s := compiled(t, kind)
		for _, strange := range []string{"strange = true\n", "[strange]\n"} {
			text := map[string]string{"job": minimalJob, "limits": oneLimit}[kind]
			if _, err := held(s, []byte(strings.Replace(text, "\n[", "\n"+strange+"[", 1))); err == nil {
				t.Errorf("%s: %q is let through", kind, strange)
			}
		}
	}
	if _, err := jobfile.Schema("jobs"); err == nil || !strings.Contains(err.Error(), `"jobs"; there are: job, limits`) {
		t.Errorf("an unknown kind: %v", err)
	}
	if got := jobfile.Schemas(); !slices.Equal(got, []string{"job", "limits"}) {
		t.Errorf("%q", got)
	}
}
