// Command goldens-version holds the figures of the golden results against the
// version of the mechanics: a figure of a job whose file and limit sets did not
// change may move only when arrest.ModelVersion does.
//
//	go run ./.ci/goldens-version
//
// The files as they lie here are held against the last commit, and the last
// commit against the one before it. Where a commit is not there, as in a
// shallow clone, that is said and nothing is held against it.
package main

import (
	"fmt"
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"slices"
	"strings"

	"arrestcheck/reportgen/archive"
)

const (
	goldens = "testdata/golden"
	version = "arrest/version.go"
)

// A state is the files at one commit, or as they lie here.
type state struct {
	name string
	read func(path string) ([]byte, error)
	list func() ([]string, error)
}

func main() {
	here := state{"the files here", os.ReadFile, func() ([]string, error) { return filepath.Glob(goldens + "/*.json") }}
	head, before := commit("HEAD"), commit("HEAD^")
	faults := 0
	for _, pair := range [][2]*state{{head, &here}, {before, head}} {
		if pair[0] == nil || pair[1] == nil {
			fmt.Println("goldens-version: a commit to hold the goldens against is not here (a shallow clone, or the first commit): not looked at")
			continue
		}
		n, err := hold(pair[0], pair[1])
		if err != nil {
			fmt.Fprintln(os.Stderr, "goldens-version:", err)
			os.Exit(1)
		}
		faults += n
	}
	if faults > 0 {
		fmt.Printf("%d figures moved; raise arrest.ModelVersion, say why in testdata/history.toml, and look at every line of the goldens\n", faults)
		os.Exit(1)
	}
}

// commit returns the state at a commit, nil where it is not there.
func commit(name string) *state {
	if exec.Command("git", "rev-parse", "--quiet", "--verify", name+"^{tree}").Run() != nil {
		return nil
	}
	return &state{
		name,
		func(path string) ([]byte, error) { return exec.Command("git", "show", name+":"+path).Output() },
		func() ([]string, error) {
			out, err := exec.Command("git", "ls-tree", "--name-only", name, goldens+"/").Output()
			return slices.DeleteFunc(strings.Fields(string(out)), func(s string) bool { return filepath.Ext(s) != ".json" }), err
		},
	}
}

// hold prints every figure that moved from one state to the next while the
// version of the mechanics stayed, and returns how many did.
func hold(was, is *state) (faults int, err error) {
	versionWas, errWas := modelVersion(was)
	versionIs, errIs := modelVersion(is)
	paths, errList := is.list()
	for _, err := range []error{errWas, errIs, errList} {
		if err != nil {
			return 0, err
		}
	}
	held := 0
	for _, path := range paths {
		a, errA := results(was, path)
		b, errB := results(is, path)
		if errA != nil || errB != nil || !sameFiles(a, b) {
			continue // new, of an older form, or of another job
		}
		held++
		for _, d := range archive.Differences(a, b) {
			if math.IsNaN(d.By) || versionWas != versionIs {
				continue
			}
			faults++
			fmt.Printf("%s: %s %s %s: %s became %s\n", path, d.Part, d.What, d.Field, d.Was, d.Is)
		}
	}
	fmt.Printf("goldens-version: %s against %s: %d goldens, mechanics %s and %s\n", is.name, was.name, held, versionWas, versionIs)
	return faults, nil
}

var constant = regexp.MustCompile(`(?m)^const ModelVersion = "(.*)"$`)

func modelVersion(s *state) (string, error) {
	data, err := s.read(version)
	if err != nil {
		return "", fmt.Errorf("%s of %s: %v", version, s.name, err)
	}
	m := constant.FindSubmatch(data)
	if m == nil {
		return "", fmt.Errorf("%s of %s holds no ModelVersion", version, s.name)
	}
	return string(m[1]), nil
}

func results(s *state, path string) (*archive.Results, error) {
	data, err := s.read(path)
	if err != nil {
		return nil, err
	}
	r, err := archive.ReadResults(data)
	return &r, err
}

// sameFiles reports whether two results are of one job and its limit sets.
func sameFiles(a, b *archive.Results) bool {
	return a.Job.SHA256 == b.Job.SHA256 && slices.Equal(a.Sets, b.Sets)
}
