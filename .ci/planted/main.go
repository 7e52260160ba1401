// Planted shows that the tests can fail: it puts one known fault after the
// other into the sources, by an overlay that leaves the files as they are, and
// demands that the test named with it goes red, and is green without it.
//
//	go run ./.ci/planted
//
// The faults stand in faults.txt beside this file. A fault whose text is no
// longer found exactly once, or that does not build, counts as not caught.
package main

import (
	"bytes"
	"encoding/json"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"sync"
)

// A fault is one entry of faults.txt.
type fault struct {
	name, file, pkg, test string
	from, to              string
}

func main() {
	faults, err := read(filepath.Join(".ci", "planted", "faults.txt"))
	if err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(1)
	}
	dir, err := os.MkdirTemp("", "planted")
	if err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(1)
	}
	defer os.RemoveAll(dir)
	said := make([]string, len(faults))
	var work sync.WaitGroup
	seats := make(chan struct{}, 2)
	for i := range faults {
		work.Go(func() {
			seats <- struct{}{}
			said[i] = faults[i].try(filepath.Join(dir, fmt.Sprint(i)))
			<-seats
		})
	}
	work.Wait()
	caught := 0
	for i, why := range said {
		if why == "" {
			caught++
			continue
		}
		fmt.Printf("not caught: %s: %s\n", faults[i].name, why)
	}
	fmt.Printf("%d planted, %d caught\n", len(faults), caught)
	if caught != len(faults) {
		os.RemoveAll(dir)
		os.Exit(1)
	}
}

// read reads the faults.
func read(name string) ([]fault, error) {
	data, err := os.ReadFile(name)
	if err != nil {
		return nil, err
	}
	var list []fault
	for n, line := range strings.Split(string(data), "\n") {
		key, rest, _ := strings.Cut(line, " ")
		if key == "==" {
			list = append(list, fault{name: rest})
			continue
		}
		if strings.HasPrefix(line, "#") || line == "" {
			continue
		}
		if len(list) == 0 {
			return nil, fmt.Errorf("%s:%d: no fault begins here", name, n+1)
		}
		f := &list[len(list)-1]
		switch key {
		case "file":
			f.file = rest
		case "test":
			f.pkg, f.test, _ = strings.Cut(rest, " ")
		case "-":
			f.from += rest + "\n"
		case "+":
			f.to += rest + "\n"
		default:
			return nil, fmt.Errorf("%s:%d: unknown word %q", name, n+1, key)
		}
	}
	return list, nil
}

// try plants one fault and returns why it was not caught, or nothing.
func (f *fault) try(dir string) string {
	data, err := os.ReadFile(f.file)
	if err != nil {
		return err.Error()
	}
	// A line of the entry stands for the same text with any indent.
	from, to := strings.TrimSuffix(f.from, "\n"), strings.TrimSuffix(f.to, "\n")
	if n := strings.Count(string(data), from); n != 1 {
		return fmt.Sprintf("its text stands %d times in %s", n, f.file)
	}
	if out, err := f.run(); err != nil {
		return "the test is red without the fault:\n" + out
	}
	changed := strings.Replace(string(data), from, to, 1)
	if err := os.Mkdir(dir, 0o700); err != nil {
		return err.Error()
	}
	planted, overlay := filepath.Join(dir, filepath.Base(f.file)), filepath.Join(dir, "overlay.json")
	full, err := filepath.Abs(f.file)
	if err != nil {
		return err.Error()
	}
	list, err := json.Marshal(map[string]map[string]string{"Replace": {full: planted}})
	if err != nil {
		return err.Error()
	}
	for name, text := range map[string][]byte{planted: []byte(changed), overlay: list} {
		if err := os.WriteFile(name, text, 0o600); err != nil {
			return err.Error()
		}
	}
	out, err := f.run("-overlay=" + overlay)
	switch {
	case err == nil:
		return "the test " + f.test + " stays green"
	case strings.Contains(out, "[build failed]") || !strings.Contains(out, "FAIL"):
		return "it does not build:\n" + out
	}
	return ""
}

// run runs the test of the fault.
func (f *fault) run(flags ...string) (string, error) {
	args := append([]string{"test", "-vet=off", "-run", "^" + f.test + "$"}, flags...)
	cmd := exec.Command("go", append(args, "./"+f.pkg)...)
	// The failures are planted: none is to be kept beside the tests.
	cmd.Env = append(os.Environ(), "RAPID_NOFAILFILE=true")
	var out bytes.Buffer
	cmd.Stdout, cmd.Stderr = &out, &out
	err := cmd.Run()
	if strings.Contains(out.String(), "no tests to run") {
		return out.String(), fmt.Errorf("no such test")
	}
	return out.String(), err
}
