package main

import (
	"bytes"
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"
)

// breakers make a job that is refused, each in another way.
var breakers = []func(string) string{
	func(s string) string { return strings.Replace(s, "kg\"", "stone\"", 1) },
	func(s string) string { return s[:len(s)/2] },
	func(string) string { return "" },
	func(s string) string { return "\xff\xfe" + s },
	func(s string) string { return strings.Replace(s, "[worker]", "[wroker]", 1) },
	func(s string) string { return strings.Replace(s, "job 1", "job 2", 1) },
	func(s string) string { return s + "\nmass = \"1 kg\"\n" },
	func(s string) string { return s + strings.Repeat("#", 1<<20) },
}

// manyJobs writes jobs of about 1 KB below folder, of which every 33rd is
// broken, and returns how many are.
func manyJobs(t testing.TB, folder string, n int) (broken int) {
	t.Helper()
	for i := range n {
		below := filepath.Join(folder, fmt.Sprintf("%02d", i/1000))
		if i%1000 == 0 {
			if err := os.MkdirAll(below, 0o777); err != nil {
				t.Fatal(err)
			}
		}
		job := oneOfMany(i)
		if i%33 == 32 {
			job = breakers[broken%len(breakers)](job)
			broken++
		}
		writeFile(t, filepath.Join(below, fmt.Sprintf("%05d.toml", i)), job)
	}
	return broken
}

// oneOfMany is the job of a number: the same text, other figures.
func oneOfMany(i int) string {
	return fmt.Sprintf(`format = "arrestcheck job 1"
[document]
title = "Roof light %[1]d, boiler house"
site = "paper mill, house %[2]d"
reference = "PM-%05[1]d"
revision = "%[2]d"
rescue = "platform in the yard, two trained persons at the lift"
prepared_by = "safety planner"
checked_by = "qualified person of the mill"
[worker]
mass = { value = "%[3]d kg ± 1 kg", source = "measured", note = "gate scale" }
tools = { value = "0 kg .. %[2]d kg", source = "plan", note = "holds only while lamps are hoisted" }
[fall]
free_fall = { value = "1.%[2]d m .. 1.9 m", source = "drawing", note = "sheet %[1]d" }
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
`, i, i%9, 60+i%70)
}

// 10,000 jobs, 3 % of them broken, in a time that a test can take: every one
// has its row, in order, and the broken ones stop nothing.
func TestRegisterOfManyJobs(t *testing.T) {
	const jobs, most = 10000, 2 * time.Minute
	folder := t.TempDir()
	broken := manyJobs(t, folder, jobs)
	if broken < jobs*3/100 {
		t.Fatalf("only %d are broken", broken)
	}
	out := filepath.Join(t.TempDir(), "register.jsonl")
	begun := time.Now()
	code, stdout, stderr := try("register", "--format", "jsonl", "--out", out, folder)
	if spent := time.Since(begun); spent > most {
		t.Errorf("it took %v", spent)
	}
	if code != int(exitRefused) || stdout != "" || stderr != "" {
		t.Fatalf("exit code %d, %q, %q", code, stdout, stderr)
	}
	rows, refused := 0, 0
	for line := range strings.Lines(readAll(t, out)) {
		var row struct {
			File   string
			Code   int
			Errors []string
		}
		if err := json.Unmarshal([]byte(line), &row); err != nil {
			t.Fatal(err)
		}
		if want := fmt.Sprintf("%05d.toml", rows); filepath.Base(row.File) != want {
			t.Fatalf("row %d is that of %s", rows, row.File)
		}
		if (row.Code == int(exitRefused)) != (len(row.Errors) > 0) || (len(row.Errors) > 0) != (rows%33 == 32) {
			t.Fatalf("%s", line)
		}
		rows++
		if len(row.Errors) > 0 {
			refused++
		}
	}
	if rows != jobs || refused != broken {
		t.Errorf("%d rows, %d refused; want %d, %d", rows, refused, jobs, broken)
	}
}

// However many workers there are, the bytes are the same.
func TestRegisterWithWorkers(t *testing.T) {
	folder := t.TempDir()
	manyJobs(t, folder, 500)
	for _, format := range []string{"text", "csv", "jsonl"} {
		_, want, _ := try("register", "--format", format, "--workers", "1", folder)
		for _, workers := range []string{"2", "3", "64"} {
			if _, got, _ := try("register", "--format", format, "--workers", workers, folder); got != want {
				t.Errorf("%s with %s workers differs", format, workers)
			}
		}
	}
}

// A register that is interrupted leaves no file, also while it waits for names.
func TestRegisterInterrupted(t *testing.T) {
	folder := t.TempDir()
	to := filepath.Join(folder, "register.csv")
	names, feed := io.Pipe()
	defer feed.Close()
	ctx, interrupt := context.WithCancel(t.Context())
	go func() {
		fmt.Fprintln(feed, "../../testdata/jobs/settled.toml")
		interrupt()
	}()
	o, err := execute(ctx, []string{"register", "--format", "csv", "--out", to, "-"}, surroundings{stdin: names, stdout: io.Discard, stderr: io.Discard})
	if err != nil {
		t.Fatal(err)
	}
	if err := deliver(ctx, &o, io.Discard); !errors.Is(err, context.Canceled) {
		t.Errorf("%v", err)
	}
	if entries, err := os.ReadDir(folder); err != nil || len(entries) != 0 {
		t.Errorf("%v, %v", entries, err)
	}
}

// Where a row cannot be written the run ends with it.
func TestRegisterNobodyReads(t *testing.T) {
	var stderr bytes.Buffer
	code := run([]string{"register", "../../testdata/jobs"}, strings.NewReader(""), brokenWriter{}, &stderr)
	if code != int(exitFile) || !strings.Contains(stderr.String(), "cannot write standard output") {
		t.Errorf("exit code %d, %s", code, stderr.String())
	}
}

// A worker that stumbles over a mistake of a programmer's ends the run, and
// does not hang it.
func TestRegisterInAPanic(t *testing.T) {
	b := &batch{candidates: []candidate{{name: "nowhere"}, {name: "../../testdata/jobs/settled.toml"}}}
	(&registrar{}).work(b)
	if b.fatal != nil || b.rows[0].Code != int(exitFile) || b.rows[1].Broken() {
		t.Errorf("%v, %+v", b.fatal, b.rows)
	}
	var none *registrar // the mistake
	none.work(b)
	if internal := (*internalError)(nil); !errors.As(b.fatal, &internal) {
		t.Errorf("%v", b.fatal)
	}
}
