// Startup measures what it costs to start the program: the processor time of
// one check of a small job over that of a program that links the same
// libraries and prints one line, and what each of them adds.
//
//	go run ./.ci/startup
//
// The programs run in turn, round after round; a figure is the median over the
// rounds of the ratio within a round, so that a busy machine disturbs it
// little. It prints a table and fails only where a program cannot be built or
// run: times are no test.
package main

import (
	"bytes"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strings"
	"time"
)

const (
	job    = "testdata/jobs/rated.toml"
	layout = "testdata/jobs/layout-two-positions.toml"
	rounds = 41
	times  = 5 // runs of each program in a round

	sameLibraries = "+ what else it links"
)

// A program is what is measured: its name in the table, the packages it links,
// and, for the program itself, its arguments.
type program struct {
	name  string
	links []string
	args  []string
	path  string
}

func main() {
	if err := measure(); err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(1)
	}
}

func measure() error {
	dir, err := os.MkdirTemp("", "startup")
	if err != nil {
		return err
	}
	defer os.RemoveAll(dir)
	programs, err := programs()
	if err != nil {
		return err
	}
	for i := range programs {
		if err := programs[i].build(filepath.Join(dir, fmt.Sprint(i))); err != nil {
			return err
		}
	}
	spent, err := interleaved(programs)
	if err != nil {
		return err
	}
	return report(programs, spent)
}

// programs lists the peers, each with one library more than the one before it,
// and the program.
func programs() ([]program, error) {
	third, standard, err := libraries()
	if err != nil {
		return nil, err
	}
	list := []program{{name: "one line, nothing linked"}}
	var links []string
	add := func(name string, more ...string) {
		links = append(slices.Clone(links), more...)
		list = append(list, program{name: name, links: links})
	}
	for _, name := range []string{"spf13", "BurntSushi/toml", "fatih/color", "olekukonko/tablewriter"} {
		var more []string
		for _, path := range third {
			if strings.Contains(path, name) {
				more = append(more, path)
			}
		}
		if len(more) == 0 {
			return nil, fmt.Errorf("the program no longer links %s", name)
		}
		add("+ "+name, more...)
	}
	add(sameLibraries, append(third, standard...)...)
	return append(list,
		program{name: "arrestcheck version", args: []string{"version"}},
		program{name: "arrestcheck check --format json", args: []string{"check", "--format", "json", job}},
		program{name: "arrestcheck check", args: []string{"check", job}},
		program{name: "arrestcheck check, a layout", args: []string{"check", layout}}), nil
}

// libraries returns the packages of others that the program links, and those of
// the standard library that it imports itself.
func libraries() (third, standard []string, err error) {
	const line = `{{if not .Standard}}{{.ImportPath}}{{range .Imports}} {{.}}{{end}}{{end}}`
	out, err := exec.Command("go", "list", "-deps", "-f", line, "./cmd/arrestcheck").Output()
	if err != nil {
		return nil, nil, fmt.Errorf("go list: %w", err)
	}
	for text := range strings.Lines(string(out)) {
		paths := strings.Fields(text)
		if len(paths) == 0 {
			continue
		}
		if !strings.HasPrefix(paths[0], "arrestcheck/") {
			if !strings.Contains(paths[0], "/internal") {
				third = append(third, paths[0])
			}
			continue
		}
		for _, path := range paths[1:] {
			if !strings.Contains(strings.SplitN(path, "/", 2)[0], ".") && !strings.HasPrefix(path, "arrestcheck/") && path != "unsafe" {
				standard = append(standard, path)
			}
		}
	}
	return third, standard, nil
}

// build makes the program without cgo, as it is released.
func (p *program) build(path string) error {
	p.path = path
	what := "./cmd/arrestcheck"
	if p.args == nil {
		what = path + ".go"
		links := slices.Compact(slices.Sorted(slices.Values(p.links)))
		var b strings.Builder
		b.WriteString("package main\n\nimport (\n\t\"os\"\n")
		for _, l := range links {
			fmt.Fprintf(&b, "\t_ %q\n", l)
		}
		b.WriteString(")\n\nfunc main() { os.Stdout.WriteString(\"one line\\n\") }\n")
		if err := os.WriteFile(what, []byte(b.String()), 0o600); err != nil {
			return err
		}
	}
	cmd := exec.Command("go", "build", "-trimpath", "-o", path, what)
	cmd.Env = append(os.Environ(), "CGO_ENABLED=0")
	if out, err := cmd.CombinedOutput(); err != nil {
		return fmt.Errorf("%s: %w\n%s", p.name, err, out)
	}
	return nil
}

// run runs the program once and returns the processor time it took. Every exit
// code but a refusal is a result.
func (p *program) run() (time.Duration, error) {
	cmd := exec.Command(p.path, p.args...)
	err := cmd.Run()
	if state := cmd.ProcessState; state == nil || state.ExitCode() > 2 || state.ExitCode() < 0 {
		return 0, fmt.Errorf("%s: %v", p.name, err)
	}
	return cmd.ProcessState.UserTime() + cmd.ProcessState.SystemTime(), nil
}

// interleaved returns the time of each program in each round.
func interleaved(programs []program) ([][]time.Duration, error) {
	spent := make([][]time.Duration, len(programs))
	for round := range rounds + 1 {
		for i := range programs {
			var sum time.Duration
			for range times {
				took, err := programs[i].run()
				if err != nil {
					return nil, err
				}
				sum += took
			}
			if round > 0 { // the first one warms up
				spent[i] = append(spent[i], sum/times)
			}
		}
	}
	return spent, nil
}

// ratio is the median over the rounds of a over b.
func ratio(a, b []time.Duration) float64 {
	all := make([]float64, len(a))
	for i := range a {
		all[i] = float64(a[i]) / float64(b[i])
	}
	slices.Sort(all)
	return all[len(all)/2]
}

func report(programs []program, spent [][]time.Duration) error {
	linked := slices.IndexFunc(programs, func(p program) bool { return p.name == sameLibraries })
	fmt.Printf("processor time of a run, median of %d rounds of %d runs in turn\n\n", rounds, times)
	fmt.Println("| program | over nothing linked | over the same libraries | ms | resident memory, MB | file, MB |")
	fmt.Println("| --- | --- | --- | --- | --- | --- |")
	for i := range programs {
		info, err := os.Stat(programs[i].path)
		if err != nil {
			return err
		}
		fmt.Printf("| %s | %.2f | %.2f | %.2f | %s | %.1f |\n", programs[i].name,
			ratio(spent[i], spent[0]), ratio(spent[i], spent[linked]), median(spent[i]).Seconds()*1000,
			programs[i].resident(), float64(info.Size())/1e6)
	}
	return nil
}

func median(all []time.Duration) time.Duration {
	return slices.Sorted(slices.Values(all))[len(all)/2]
}

// resident is the greatest resident memory as time -v tells it. A program that
// this one starts itself would be told to have what this one has.
func (p *program) resident() string {
	var told bytes.Buffer
	cmd := exec.Command("/usr/bin/time", append([]string{"-v", p.path}, p.args...)...)
	cmd.Stderr = &told
	_ = cmd.Run() // its exit code is that of the program
	_, rest, found := strings.Cut(told.String(), "Maximum resident set size (kbytes): ")
	var kB float64
	if _, err := fmt.Sscan(rest, &kB); !found || err != nil {
		return "not measured: Debian's package time is missing"
	}
	return fmt.Sprintf("%.1f", kB/1000)
}
