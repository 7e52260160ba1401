//go:build unix

// Command register-speed holds the register against reading and decoding the
// same jobs and doing nothing else with them, and prints ratios:
//
//	go run ./.ci/register-speed [-jobs 10000] [-rounds 7]
//
// Runs are interleaved, each in a process of its own; a ratio is the median of
// the ratios round by round, of CPU time unless it says otherwise.
package main

import (
	"errors"
	"flag"
	"fmt"
	"io"
	"io/fs"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strconv"
	"syscall"
	"time"

	"github.com/BurntSushi/toml"

	"arrestcheck/arrest/jobfile"
)

func main() {
	jobs := flag.Int("jobs", 10000, "how many jobs")
	rounds := flag.Int("rounds", 7, "how many rounds")
	only := flag.String("only", "", "what a process of its own does: decode or bare")
	flag.Parse()
	if err := run(*only, flag.Arg(0), *jobs, *rounds); err != nil {
		fmt.Fprintln(os.Stderr, "register-speed:", err)
		os.Exit(1)
	}
}

func run(only, folder string, jobs, rounds int) error {
	switch only {
	case "decode":
		return each(folder, func(name string, data []byte) error {
			_, err := jobfile.Read(name, data, nil)
			return err
		})
	case "bare":
		return each(folder, func(_ string, data []byte) error {
			var tree map[string]any
			return toml.Unmarshal(data, &tree)
		})
	}
	work, err := os.MkdirTemp("", "register-speed")
	if err != nil {
		return err
	}
	defer os.RemoveAll(work)
	return measure(work, jobs, rounds)
}

// each reads every job of a folder, as the register finds them.
func each(folder string, do func(name string, data []byte) error) error {
	return filepath.WalkDir(folder, func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		data, err := os.ReadFile(path)
		if err != nil {
			return err
		}
		return do(path, data)
	})
}

// A use is what a process took.
type use struct {
	cpu, wall time.Duration
	memory    int64 // bytes, at most
}

func measure(work string, jobs, rounds int) error {
	program, self, many, more := filepath.Join(work, "arrestcheck"), filepath.Join(work, "self"), filepath.Join(work, "many"), filepath.Join(work, "more")
	for out, in := range map[string]string{program: "./cmd/arrestcheck", self: "./.ci/register-speed"} {
		build := exec.Command("go", "build", "-trimpath", "-o", out, in)
		build.Env = append(os.Environ(), "CGO_ENABLED=0")
		if said, err := build.CombinedOutput(); err != nil {
			return fmt.Errorf("%v: %s", err, said)
		}
	}
	for folder, n := range map[string]int{many: jobs, more: 3 * jobs} {
		if err := write(folder, n); err != nil {
			return err
		}
	}
	runs := map[string][]string{
		"decode": {self, "-only", "decode", many},
		"bare":   {self, "-only", "bare", many},
		"one":    {program, "register", "--format", "jsonl", "--workers", "1", many},
		"two":    {program, "register", "--format", "jsonl", "--workers", "2", many},
		"more":   {program, "register", "--format", "jsonl", "--workers", "2", more},
	}
	order := []string{"decode", "bare", "one", "two", "more"}
	all := map[string][]use{}
	var pairs []use
	for range rounds {
		pair, err := together(runs["decode"])
		if err != nil {
			return err
		}
		pairs = append(pairs, pair)
		for _, name := range order {
			u, err := timed(runs[name])
			if err != nil {
				return err
			}
			all[name] = append(all[name], u)
		}
	}
	cpu := func(u use) float64 { return u.cpu.Seconds() }
	wall := func(u use) float64 { return u.wall.Seconds() }
	fmt.Printf("%d jobs of %d bytes, %d rounds\n", jobs, len(job(0)), rounds)
	fmt.Printf("register over reading and decoding with every check   %.2f   (goal: at most 1.25)\n", ratio(all["one"], all["decode"], cpu))
	fmt.Printf("register over reading and decoding into a bare map    %.2f\n", ratio(all["one"], all["bare"], cpu))
	fmt.Printf("two workers over one, jobs in the same time           %.2f   (goal: at least 1.6)\n", ratio(all["one"], all["two"], wall))
	fmt.Printf("two processes over one at the same time, on this machine  %.2f   (2 where nothing else runs)\n", 2*ratio(all["decode"], pairs, wall))
	fmt.Printf("CPU time of two workers over one                      %.2f   (1 where nothing is lost)\n", ratio(all["two"], all["one"], cpu))
	fmt.Printf("memory of two workers at most, MB                     %.0f   (goal: at most 40)\n", peak(all["two"]))
	fmt.Printf("memory of two workers at most, MB, thrice the jobs    %.0f   (goal: no more)\n", peak(all["more"]))
	return nil
}

// timed runs a program to its end. Exit codes 1 to 3 say something of the jobs.
func timed(args []string) (use, error) {
	cmd := exec.Command(args[0], args[1:]...)
	cmd.Stdout = io.Discard
	begun := time.Now()
	err := cmd.Run()
	spent := time.Since(begun)
	if code := cmd.ProcessState.ExitCode(); code < 0 || code > 3 {
		return use{}, fmt.Errorf("%v: %v", args, err)
	}
	s := cmd.ProcessState
	usage := s.SysUsage().(*syscall.Rusage)
	return use{s.UserTime() + s.SystemTime(), spent, usage.Maxrss * 1024}, nil
}

// together runs a program twice at once, and says how long both took: what two
// workers can gain at all, however busy the machine is.
func together(args []string) (use, error) {
	begun := time.Now()
	first := exec.Command(args[0], args[1:]...)
	if err := first.Start(); err != nil {
		return use{}, err
	}
	_, err := timed(args)
	err = errors.Join(err, first.Wait())
	return use{wall: time.Since(begun)}, err
}

// ratio is the median of the ratios round by round.
func ratio(over, under []use, of func(use) float64) float64 {
	list := make([]float64, len(over))
	for i := range over {
		list[i] = of(over[i]) / of(under[i])
	}
	slices.Sort(list)
	return list[len(list)/2]
}

func peak(list []use) float64 {
	most := int64(0)
	for _, u := range list {
		most = max(most, u.memory)
	}
	return float64(most) / 1e6
}

func write(folder string, n int) error {
	for i := range n {
		below := filepath.Join(folder, strconv.Itoa(i/1000))
		if i%1000 == 0 {
			if err := os.MkdirAll(below, 0o777); err != nil {
				return err
			}
		}
		if err := os.WriteFile(filepath.Join(below, strconv.Itoa(i)+".toml"), []byte(job(i)), 0o666); err != nil {
			return err
		}
	}
	return nil
}

// job is a job of about 1 KB: a rating, two limits of its own.
func job(i int) string {
	return fmt.Sprintf(`format = "arrestcheck job 1"

[document]
title = "Roof light, boiler house"
site = "paper mill"
reference = "PM-%05[1]d"
revision = "B"
rescue = "platform in the yard"

[worker]
mass = { value = "%[2]d kg ± 1 kg", source = "measured" }
tools = { value = "0 kg .. 6 kg", source = "plan" }

[fall]
free_fall = { value = "1.5 m .. 1.8 m", source = "drawing" }

[[rated]]
document = "label of the lanyard"
total_mass = "59 kg .. 140 kg"
free_fall_at_most = "2 m"
peak_force_at_most = "6 kN"

[[limit]]
id = "peak"
quantity = "peak_force"
at_most = "6 kN"
authority = "mill rule 8, clause 3"
edition = "2024, as read on 19 May 2025"
kind = "person"
checked_on = "26 May 2025"

[[limit]]
id = "fall"
quantity = "free_fall"
at_most = "1.8 m"
authority = "mill rule 8, clause 1"
edition = "2024, as read on 19 May 2025"
kind = "motion"
checked_on = "26 May 2025"
`, i, 60+i%70)
}
